//! Polynomials.

use crate::num::{DoubleDouble, Lane};

/// `coefficients[0] + coefficients[1] x + …`, from the highest power down.
#[inline(always)]
pub(crate) fn horner<R: Lane, const N: usize>(x: R, coefficients: &[f64; N]) -> R {
    let mut sum = R::splat(0.0);
    for &coefficient in coefficients.iter().rev() {
        sum = sum.mul_add(x, R::splat(coefficient));
    }
    sum
}

/// The same in double-double, from coefficients in two parts.
pub(crate) fn horner_extended(x: DoubleDouble, coefficients: &[(f64, f64)]) -> DoubleDouble {
    let mut sum = DoubleDouble::default();
    for &coefficient in coefficients.iter().rev() {
        sum = sum * x + DoubleDouble::new(coefficient);
    }
    sum
}
