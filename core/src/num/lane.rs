//! The lane: what a kernel may do to a number, so that one number and a register of numbers run the same code.

use core::ops::{Add, Div, Mul, Neg, Sub};

/// A number, or several side by side, on which every kernel is written once.
///
/// Operation order is fixed and every product-and-sum goes through [`Lane::mul_add`], which rounds twice
/// on purpose: separate multiplication and addition have the same bits on every machine for free, while a
/// fused one is tens of times slower wherever software has to imitate it.
/// Choices are made by [`Lane::select`], never by a branch, so that lanes may disagree.
pub(crate) trait Lane:
    Copy + Add<Output = Self> + Sub<Output = Self> + Mul<Output = Self> + Div<Output = Self> + Neg<Output = Self>
{
    /// The outcome of a comparison, lane by lane.
    type Mask: Copy;

    /// The same number in every lane.
    fn splat(value: f64) -> Self;
    /// `self * factor + summand`, rounded twice.
    fn mul_add(self, factor: Self, summand: Self) -> Self;
    /// Whether `self < other`; false where either is NaN.
    fn less(self, other: Self) -> Self::Mask;
    /// `yes` where the mask is true, `no` elsewhere.
    fn select(mask: Self::Mask, yes: Self, no: Self) -> Self;
    /// `2^exponent` for a whole `exponent` from -1022 to 1023.
    fn two_to(exponent: Self) -> Self;
    /// `self` split into a significand in [1, 2) and a whole exponent; `self` is positive and normal.
    fn significand_exponent(self) -> (Self, Self);
    /// `self` with the lower half of its significand cleared, so that its square is exact.
    fn upper_half(self) -> Self;

    /// The smaller of the two; `other` where `self` is NaN.
    #[inline(always)]
    fn min(self, other: Self) -> Self {
        Self::select(self.less(other), self, other)
    }

    /// The larger of the two; `other` where `self` is NaN.
    #[inline(always)]
    fn max(self, other: Self) -> Self {
        Self::select(other.less(self), self, other)
    }

    /// The nearest whole number, ties to even, for `|self| < 2^51`.
    #[inline(always)]
    fn round(self) -> Self {
        /// Adding 1.5 * 2^52 leaves no bits behind the point.
        const SHIFT: f64 = 6755399441055744.0;
        (self + Self::splat(SHIFT)) - Self::splat(SHIFT)
    }
}

impl Lane for f64 {
    type Mask = bool;

    #[inline(always)]
    fn splat(value: f64) -> f64 {
        value
    }
    #[inline(always)]
    fn mul_add(self, factor: f64, summand: f64) -> f64 {
        self * factor + summand
    }
    #[inline(always)]
    fn less(self, other: f64) -> bool {
        self < other
    }
    #[inline(always)]
    fn select(mask: bool, yes: f64, no: f64) -> f64 {
        if mask { yes } else { no }
    }
    #[inline(always)]
    fn two_to(exponent: f64) -> f64 {
        /// Adding 2^52 + 2^51 + 1023 puts the biased exponent into the low bits of the significand.
        const BIAS: f64 = 6755399441055744.0 + 1023.0;
        f64::from_bits((exponent + BIAS).to_bits() << 52)
    }
    #[inline(always)]
    fn significand_exponent(self) -> (f64, f64) {
        const SIGNIFICAND: u64 = (1 << 52) - 1;
        const ONE: u64 = 1023 << 52;
        /// 2^52: its low bits take a whole number as it is.
        const CARRIER: f64 = 4503599627370496.0;
        let bits = self.to_bits();
        let exponent = f64::from_bits(CARRIER.to_bits() | (bits >> 52)) - (CARRIER + 1023.0);
        (f64::from_bits((bits & SIGNIFICAND) | ONE), exponent)
    }
    #[inline(always)]
    fn upper_half(self) -> f64 {
        f64::from_bits(self.to_bits() & !((1 << 27) - 1))
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn two_to_is_exact_over_all_normal_exponents() {
        for exponent in -1022..=1023 {
            assert_eq!(f64::two_to(f64::from(exponent)), libm::ldexp(1.0, exponent));
        }
    }

    #[test]
    fn significand_and_exponent_give_the_number_back() {
        for x in [1.0, 1.5, 0.1, 1e300, f64::MIN_POSITIVE, f64::MAX, core::f64::consts::PI] {
            let (significand, exponent) = x.significand_exponent();
            assert!((1.0..2.0).contains(&significand));
            assert_eq!(significand * f64::two_to(exponent), x);
        }
    }

    #[test]
    fn the_upper_half_squares_exactly() {
        let x = core::f64::consts::E;
        let half = x.upper_half();
        assert_eq!(libm::fma(half, half, -(half * half)), 0.0);
        assert!((x - half).abs() < x * f64::two_to(-25.0));
    }
}
