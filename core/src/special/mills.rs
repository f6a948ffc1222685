//! Mills ratio of the normal law: its upper tail over its density.

use crate::num::{Lane, horner};
use crate::special::exp_sum;

/// `(x + 4) R(x)` as a polynomial in `t = (x - 4) / (x + 4)`, which maps the half-line onto [-1, 1).
///
/// Chebyshev expansion of degree 24 in 80 digits, relative error 1.3e-17. The coefficients' magnitudes
/// add up to the value at `x = 0`, so no digit is lost in the sum. Branching over pieces, and a rational
/// function of `x` (which overflows and lets rounding pile up), were tried and rejected.
const MILLS: [f64; 25] = [
    1.8932190633084853,
    -1.5237709108199835,
    0.9704095548675884,
    -0.4675409629983325,
    0.15139176231244347,
    -0.018900450861711257,
    -0.008722295274260125,
    0.004087855681200072,
    0.0003342446162328441,
    -0.0005792693046478719,
    -4.783264259417208e-06,
    8.809573121072337e-05,
    1.7963971214040778e-06,
    -1.4843277679080294e-05,
    -1.5787665654677373e-06,
    2.568755311229722e-06,
    6.829633831673466e-07,
    -4.00493929251171e-07,
    -2.1774195022039326e-07,
    4.473060051450323e-08,
    5.3711037651589576e-08,
    -1.4722998923746307e-09,
    -9.35134044482434e-09,
    -3.0073979672398766e-10,
    8.53083886026053e-10,
];

/// `R(x)` for `x >= 0`.
#[inline(always)]
pub(crate) fn mills_ratio_lane<R: Lane>(x: R) -> R {
    let four = R::splat(4.0);
    let scale = R::splat(1.0) / (x + four);
    horner((x - four) * scale, &MILLS) * scale
}

/// Mills ratio `R(x) = Q(x) / phi(x)` of the normal law, `sqrt(pi / 2) exp(x^2 / 2) erfc(x / sqrt(2))`:
/// what is left of a tail when its Gaussian factor is taken out.
///
/// # Domain
///
/// All `x`; infinite where `x < -37.6` makes the answer exceed binary64, 0 at plus infinity.
///
/// # Accuracy
///
/// At most 4.8 ulp for `x >= 0` and 5.7 ulp below, measured on 100,000 random arguments on either side against 160-bit
/// ball arithmetic; 99.9 % within 3.1 and 4.4 ulp.
///
/// # Source
///
/// J. P. Mills, Table of the ratio: area to bounding ordinate, Biometrika 18 (1926); expansion derived here.
pub fn mills_ratio(x: f64) -> f64 {
    if x == f64::INFINITY {
        0.0
    } else if x >= 0.0 {
        mills_ratio_lane(x)
    } else if x < 0.0 {
        /// sqrt(2 pi)
        const ROOT_TWO_PI: f64 = 2.5066282746310002;
        // Beyond 40 the ratio is infinite, and a huge square must not make NaN.
        let x = x.max(-40.0);
        let half = x.upper_half();
        let gaussian = exp_sum(0.5 * half * half, 0.5 * (x - half) * (x + half));
        ROOT_TWO_PI * gaussian - mills_ratio_lane(-x)
    } else {
        x
    }
}
