//! The normal law and its tails.

use crate::num::Lane;
use crate::special::{exp_sum, ln, log1p, mills_ratio_lane};

/// 1 / sqrt(2 pi)
pub(crate) const INV_ROOT_TWO_PI: f64 = 0.3989422804014327;

/// Density of the standard normal law, `exp(-x^2 / 2) / sqrt(2 pi)`.
///
/// The square is formed in two parts, so the far tails keep their digits.
///
/// # Accuracy
///
/// At most 1.97 ulp, measured on 100,000 random arguments over all of binary64 against 160-bit ball arithmetic.
pub fn normal_pdf(x: f64) -> f64 {
    if x.is_nan() {
        return x;
    }
    // Beyond 40 the density is 0, and a huge square must not make NaN.
    let x = x.abs().min(40.0);
    let half = x.upper_half();
    INV_ROOT_TWO_PI * exp_sum(-0.5 * half * half, -0.5 * (x - half) * (x + half))
}

/// Upper tail of the standard normal law, `P(X > x)`.
///
/// # Accuracy
///
/// At most 6.2 ulp, measured as for [`normal_pdf`]; 99.9 % within 4.1 ulp.
pub fn normal_tail(x: f64) -> f64 {
    if x.is_nan() {
        return x;
    }
    let tail = normal_pdf(x) * mills_ratio_lane(x.abs().min(f64::MAX));
    if x < 0.0 { 1.0 - tail } else { tail }
}

/// Distribution function of the standard normal law, `P(X <= x)`.
///
/// # Accuracy
///
/// As [`normal_tail`].
pub fn normal_cdf(x: f64) -> f64 {
    normal_tail(-x)
}

/// Logarithm of the upper tail, `ln P(X > x)`, finite long after the tail itself has underflowed.
///
/// # Accuracy
///
/// At most 7.4 ulp, measured as for [`normal_pdf`]; 99.9 % within 5.3 ulp below 0 and 2.3 ulp above.
pub fn normal_log_tail(x: f64) -> f64 {
    if x.is_nan() {
        x
    } else if x < 0.0 {
        log1p(-normal_tail(-x))
    } else {
        ln(INV_ROOT_TWO_PI * mills_ratio_lane(x.min(f64::MAX))) - 0.5 * x * x
    }
}
