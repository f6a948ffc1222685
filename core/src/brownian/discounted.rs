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

use crate::brownian::density;
use crate::num::integrate;
use crate::special::{self, Functions};

/// Below this fraction of `v^4`, or of `nu^2` (what a negative rate takes it from), `w^2` is too small for the two
/// exponentials to differ enough, and has too few digits, if also `w^2 T < v^2`: the integral takes over.
const SEAM_ROOT: f64 = 1.0 / 64.0;

/// The widest panel of the integral, in `ln y`.
const WIDEST_PANEL: f64 = 0.75;

/// The discounted first passage over a horizon, in the parts that its derivatives need.
#[derive(Clone, Copy, Debug)]
pub(crate) struct DiscountedPassage<R> {
    /// `E[exp(-r tau); tau <= T]`
    pub(crate) value: R,
    /// `exp(-r T) phi((h - nu T) / s)`
    pub(crate) density: R,
    /// How the value came about.
    pub(crate) form: Form<R>,
}

/// How the value of a discounted first passage came about.
#[derive(Clone, Copy, Debug)]
pub(crate) enum Form<R> {
    /// The sum of two exponentials times tails.
    Closed {
        /// `w`
        root: R,
        /// The two terms.
        terms: [R; 2],
    },
    /// The integral.
    Integral {
        /// The integral with a factor `1 / y^2` and `1 / y^4`: minus its first, and its second derivative in `c`.
        moments: [R; 2],
    },
}

impl<R: Functions> DiscountedPassage<R> {
    /// For `distance > 0`, `vol > 0`, `horizon > 0`, `drift` counted towards the level.
    pub(crate) fn new(distance: R, drift: R, vol: R, horizon: R, discount_rate: R) -> DiscountedPassage<R> {
        let zero = R::of(0.0);
        let variance = vol.square();
        let deviation = vol * horizon.sqrt();
        let root_squared = drift.square() + discount_rate.times(2.0) * variance;
        let z = (distance - drift * horizon) / deviation;
        let exponent = z.square().times(-0.5) - discount_rate * horizon;
        let density = density(exponent);
        let small = variance.square().larger(drift.square()).times(SEAM_ROOT);
        if root_squared < zero || (root_squared < small && root_squared * horizon < variance) {
            let tilt = root_squared.times(-0.5) * horizon / variance;
            let [value, first, second] = moments(distance / deviation, tilt, drift * distance / variance);
            return DiscountedPassage { value, density, form: Form::Integral { moments: [first, second] } };
        }
        let root = root_squared.sqrt();
        let exponent =
            if drift > zero { discount_rate.times(-2.0) / (drift + root) } else { (drift - root) / variance };
        let reach = (root * horizon - distance) / deviation;
        let near = if reach > zero {
            (exponent * distance).exp() - density * reach.mills()
        } else {
            density * (-reach).mills()
        };
        let far = density * ((root * horizon + distance) / deviation).mills();
        DiscountedPassage { value: near + far, density, form: Form::Closed { root, terms: [near, far] } }
    }
}

/// `2 exp(nu h / v^2)` times the integrals over `y > start` of `phi(y) exp(tilt (start / y)^2) / y^(2 k)`, k = 0, 1, 2;
/// `prefactor` is `nu h / v^2`.
///
/// In `ln y` the integrand has no kink, no singularity and one scale at its start.
fn moments<R: Functions>(start: R, tilt: R, prefactor: R) -> [R; 3] {
    let square = start.square();
    let one = R::of(1.0);
    // Even a square that underflows must not make the way infinite.
    let length = 0.5 * special::log1p(2.0 * R::NEGLIGIBLE / square.nearest().max(1e-300));
    let finest = 2.0 / (1.0 + square.nearest() + 2.0 * tilt.magnitude().nearest());
    // Near the level the value is that of certain touching and a little more: only the little is integrated.
    let near = start < one;
    let exponent = prefactor - square.times(0.5);
    let mut sums = [R::of(0.0); 3];
    integrate(R::of(0.0), R::of(length), finest, WIDEST_PANEL, |node, weight| {
        // y = start (1 + growth)^(1/2)
        let growth = node.times(2.0).expm1();
        let lift = tilt / (one + growth);
        let plain = exponent - (square * growth).times(0.5);
        let value = weight * (plain + lift).exp();
        let y_squared = square * (one + growth);
        let y = y_squared.sqrt();
        let first = if near { weight * plain.exp() * lift.expm1() } else { value };
        sums[0] = sums[0] + first * y;
        sums[1] = sums[1] + value / y;
        sums[2] = sums[2] + value / (y * y_squared);
    });
    let mut sums = sums.map(|sum| R::inv_root_two_pi().times(2.0) * sum);
    if near {
        sums[0] = sums[0] + density(exponent).times(2.0) * start.mills();
    }
    sums
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::num::{DoubleDouble, Real};

    /// Walks 64 neighbours of one argument on either side of a seam; how far the value is off, at most, and how
    /// often it came about by the integral.
    fn walk(seam: f64, arguments: impl Fn(f64) -> [f64; 5]) -> (f64, u32) {
        let (mut worst, mut integrals) = (0.0_f64, 0);
        let (mut below, mut above) = (seam, seam);
        for _ in 0..64 {
            below = below.next_down();
            for at in [below, above] {
                let [distance, drift, vol, horizon, rate] = arguments(at);
                let fast = DiscountedPassage::new(distance, drift, vol, horizon, rate);
                let [d, n, v, t, r] = [distance, drift, vol, horizon, rate].map(DoubleDouble::of);
                let exact = DiscountedPassage::new(d, n, v, t, r).value.nearest();
                worst = worst.max((fast.value / exact - 1.0).abs());
                integrals += u32::from(matches!(fast.form, Form::Integral { .. }));
            }
            above = above.next_up();
        }
        (worst, integrals)
    }

    #[test]
    fn the_closed_form_meets_the_integral() {
        for (vol, drift, distance) in [
            (1.0, 0.0, 0.5),
            (1.0, 0.25, 2.0),
            (0.5, -0.25, 0.125),
            (2.0, 1.0, 7.0),
            (0.25, 0.5, 0.1),
            (0.25, -0.5, 0.1),
        ] {
            let (vol, drift): (f64, f64) = (vol, drift);
            let scale = (vol * vol * vol * vol).max(drift * drift);
            let seam = (SEAM_ROOT * scale - drift * drift) / (2.0 * vol * vol);
            let (worst, integrals) = walk(seam, |rate| [distance, drift, vol, 1.0, rate]);
            assert!(worst <= 16.0 * f64::EPSILON, "{vol} {drift} {distance}: {worst:e}");
            assert!(integrals > 0 && integrals < 128, "{integrals} of 128 by the integral");
        }
    }

    #[test]
    fn the_long_and_the_short_integral_meet() {
        for (vol, drift, rate) in [(1.0, 0.0, -0.5), (1.0, 0.5, -2.0), (0.05, 0.01, -0.03), (0.3, -0.1, -0.4)] {
            // The horizon is 1: the level is one deviation away.
            let (worst, integrals) = walk(vol, |distance| [distance, drift, vol, 1.0, rate]);
            assert!(worst <= 16.0 * f64::EPSILON, "{vol} {drift} {rate}: {worst:e}");
            assert_eq!(integrals, 128);
        }
    }

    #[test]
    fn without_discount_it_is_the_probability_of_touching() {
        for (distance, drift) in [(0.1, 0.3), (1.0, 0.0), (0.5, -0.5), (3.0, 1.0)] {
            let value = DiscountedPassage::new(distance, drift, 0.8, 2.0, 0.0).value;
            let touched = crate::brownian::Walk::new(drift, 0.8, 2.0).max_tail(distance);
            assert!((value / touched - 1.0).abs() <= 16.0 * f64::EPSILON, "{distance} {drift}: {value} {touched}");
        }
    }
}
