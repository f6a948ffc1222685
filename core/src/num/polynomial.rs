//! Polynomials.

use crate::num::Lane;

/// `coefficients[0] + coefficients[1] x + …`, from the highest power down.
#[inline(always)]
pub(crate) fn horner<R: Lane, const N: usize>(x: R, coefficients: &[f64; N]) -> R {
    let mut sum = R::splat(0.0);
    for &coefficient in coefficients.iter().rev() {
        sum = sum.mul_add(x, R::splat(coefficient));
    }
    sum
}
