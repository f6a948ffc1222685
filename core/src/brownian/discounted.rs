//! Discounted first passage: what one unit of cash paid at the moment of touching is worth.
//!
//! On paper, for a level at distance `h`, drift `nu` towards it, volatility `v`, horizon `T`, rate `r`:
//!
//! ```text
//! E[exp(-r tau); tau <= T] = exp((nu - w) h / v^2) N((-h + w T) / s) + exp((nu + w) h / v^2) N((-h - w T) / s)
//! w = sqrt(nu^2 + 2 r v^2),  s = v sqrt(T)
//! ```
//!
//! The code departs from it in three ways. The second term is formed as density times Mills ratio, since its
//! weight overflows where its tail underflows. `nu - w` and `nu + w` are taken from their product `-2 r v^2`
//! where they would cancel. And where `w` is imaginary or nearly 0, which ordinary negative rates bring about,
//! the expectation is integrated as it stands: with `y = h / (v sqrt(tau))` it is
//!
//! ```text
//! 2 exp(nu h / v^2) integral over y from h / s of phi(y) exp(-c / y^2),  c = h^2 w^2 / (2 v^4)
//! ```
//!
//! whose integrand is positive and smooth whatever the sign of `c`.

use libm::sqrt;

use crate::num::GAUSS_LEGENDRE_16;
use crate::special::{INV_ROOT_TWO_PI, exp, expm1, log1p, mills_ratio_lane};

/// Below this value of `w^2 / v^4` (and if also `w^2 T < v^2`) the two exponentials are too alike for their
/// difference, which the Greeks need, to keep its digits: the integral takes over.
const SEAM_ROOT: f64 = 1.0 / 64.0;

/// The widest panel of the integral, in `ln y`.
const WIDEST_PANEL: f64 = 0.75;

/// The discounted first passage over a horizon, in the parts that its derivatives need.
#[derive(Clone, Copy, Debug)]
pub(crate) struct DiscountedPassage {
    /// `E[exp(-r tau); tau <= T]`
    pub(crate) value: f64,
    /// `exp(-r T) phi((h - nu T) / s)`
    pub(crate) density: f64,
    /// How the value came about.
    pub(crate) form: Form,
}

/// How the value of a discounted first passage came about.
#[derive(Clone, Copy, Debug)]
pub(crate) enum Form {
    /// The sum of two exponentials times tails.
    Closed {
        /// `w`
        root: f64,
        /// `(nu - w) / v^2` and `(nu + w) / v^2`
        exponents: [f64; 2],
        /// The two terms.
        terms: [f64; 2],
    },
    /// The integral.
    Integral {
        /// The integral with a factor `1 / y^2` and `1 / y^4`: minus its first, and its second derivative in `c`.
        moments: [f64; 2],
    },
}

impl DiscountedPassage {
    /// For `distance > 0`, `vol > 0`, `horizon > 0`, `drift` counted towards the level.
    pub(crate) fn new(distance: f64, drift: f64, vol: f64, horizon: f64, discount_rate: f64) -> DiscountedPassage {
        let variance = vol * vol;
        let deviation = vol * sqrt(horizon);
        let root_squared = drift * drift + 2.0 * discount_rate * variance;
        let z = (distance - drift * horizon) / deviation;
        let exponent = -0.5 * z * z - discount_rate * horizon;
        let density = INV_ROOT_TWO_PI * exp(exponent);
        if root_squared < 0.0 || (root_squared < SEAM_ROOT * variance * variance && root_squared * horizon < variance) {
            let tilt = -0.5 * root_squared * horizon / variance;
            let [value, first, second] = moments(distance / deviation, tilt, exponent);
            return DiscountedPassage { value, density, form: Form::Integral { moments: [first, second] } };
        }
        let root = sqrt(root_squared);
        let exponents = if drift > 0.0 {
            [-2.0 * discount_rate / (drift + root), (drift + root) / variance]
        } else if root > drift {
            [(drift - root) / variance, 2.0 * discount_rate / (root - drift)]
        } else {
            [0.0; 2]
        };
        let reach = (root * horizon - distance) / deviation;
        let near = if reach > 0.0 {
            exp(exponents[0] * distance) - density * mills_ratio_lane(reach)
        } else {
            density * mills_ratio_lane(-reach)
        };
        let far = density * mills_ratio_lane((root * horizon + distance) / deviation);
        DiscountedPassage { value: near + far, density, form: Form::Closed { root, exponents, terms: [near, far] } }
    }
}

/// `2 exp(nu h / v^2)` times the integrals over `y > start` of `phi(y) exp(tilt (start / y)^2) / y^(2 k)`, k = 0, 1, 2,
/// where `exponent` is that of the whole integrand at its start.
///
/// In `ln y` the integrand has no kink, no singularity and one scale at its start; panels of 16 nodes grow from
/// that scale.
fn moments(start: f64, tilt: f64, exponent: f64) -> [f64; 3] {
    /// The integrand is negligible where its Gaussian has lost this many units in the exponent.
    const NEGLIGIBLE: f64 = 90.0;
    let square = start * start;
    let length = 0.5 * log1p(NEGLIGIBLE / square);
    let mut width = (2.0 / (1.0 + square + 2.0 * tilt.abs())).min(WIDEST_PANEL);
    let mut from = 0.0;
    let mut sums = [0.0; 3];
    while from < length {
        let half = 0.5 * width.min(length - from);
        for (node, weight) in GAUSS_LEGENDRE_16 {
            // y = start (1 + growth)^(1/2)
            let growth = expm1(2.0 * (from + half * (1.0 + node)));
            let value = half * weight * exp(exponent - 0.5 * square * growth - tilt * growth / (1.0 + growth));
            let y_squared = square * (1.0 + growth);
            let y = sqrt(y_squared);
            sums[0] += value * y;
            sums[1] += value / y;
            sums[2] += value / (y * y_squared);
        }
        from += 2.0 * half;
        width = (2.0 * width).min(WIDEST_PANEL);
    }
    sums.map(|sum| 2.0 * INV_ROOT_TWO_PI * sum)
}
