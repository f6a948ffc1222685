//! A number of some 31 digits: the unevaluated sum of two binary64.

use core::cmp::Ordering;
use core::ops::{Add, Div, Mul, Neg, Sub};

use crate::num::{GAUSS_LEGENDRE_32, Lane, Real};

/// `high + low` with `low` at most half a unit in the last place of `high`.
///
/// # Accuracy
///
/// Each operation is right to some 2^-103 relative, as long as nothing leaves the range of binary64.
///
/// # Source
///
/// Dekker, A floating-point technique for extending the available precision, 1971; the splitting by a mask loses
/// one bit of the last partial product, far below the accuracy stated.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub(crate) struct DoubleDouble {
    high: f64,
    low: f64,
}

impl DoubleDouble {
    /// From the two parts.
    pub(crate) const fn new((high, low): (f64, f64)) -> DoubleDouble {
        DoubleDouble { high, low }
    }

    pub(crate) const fn high(self) -> f64 {
        self.high
    }

    /// `a + b` exactly.
    pub(crate) fn sum(a: f64, b: f64) -> DoubleDouble {
        let high = a + b;
        let b_part = high - a;
        let low = (a - (high - b_part)) + (b - b_part);
        DoubleDouble { high, low: if high.is_finite() { low } else { 0.0 } }
    }

    /// `a + b` exactly, for `|a| >= |b|`.
    fn ordered_sum(a: f64, b: f64) -> DoubleDouble {
        let high = a + b;
        DoubleDouble { high, low: if high.is_finite() { b - (high - a) } else { 0.0 } }
    }

    /// `a b`.
    pub(crate) fn product(a: f64, b: f64) -> DoubleDouble {
        let high = a * b;
        let (a_upper, b_upper) = (a.upper_half(), b.upper_half());
        let (a_lower, b_lower) = (a - a_upper, b - b_upper);
        let low = ((a_upper * b_upper - high) + a_upper * b_lower + a_lower * b_upper) + a_lower * b_lower;
        DoubleDouble { high, low: if high.is_finite() { low } else { 0.0 } }
    }

    /// The product with a power of two, exact unless it underflows.
    pub(crate) fn scaled(self, power_of_two: f64) -> DoubleDouble {
        DoubleDouble { high: self.high * power_of_two, low: self.low * power_of_two }
    }
}

impl PartialOrd for DoubleDouble {
    fn partial_cmp(&self, other: &DoubleDouble) -> Option<Ordering> {
        match self.high.partial_cmp(&other.high) {
            Some(Ordering::Equal) => self.low.partial_cmp(&other.low),
            order => order,
        }
    }
}

impl Neg for DoubleDouble {
    type Output = DoubleDouble;

    fn neg(self) -> DoubleDouble {
        DoubleDouble { high: -self.high, low: -self.low }
    }
}

impl Add for DoubleDouble {
    type Output = DoubleDouble;

    fn add(self, other: DoubleDouble) -> DoubleDouble {
        let high = DoubleDouble::sum(self.high, other.high);
        if !high.high.is_finite() {
            return high;
        }
        let low = DoubleDouble::sum(self.low, other.low);
        let middle = DoubleDouble::ordered_sum(high.high, high.low + low.high);
        DoubleDouble::ordered_sum(middle.high, middle.low + low.low)
    }
}

impl Sub for DoubleDouble {
    type Output = DoubleDouble;

    fn sub(self, other: DoubleDouble) -> DoubleDouble {
        self + -other
    }
}

impl Mul for DoubleDouble {
    type Output = DoubleDouble;

    fn mul(self, other: DoubleDouble) -> DoubleDouble {
        let product = DoubleDouble::product(self.high, other.high);
        if !product.high.is_finite() {
            return product;
        }
        let cross = self.high * other.low + self.low * other.high;
        DoubleDouble::ordered_sum(product.high, product.low + cross)
    }
}

impl Div for DoubleDouble {
    type Output = DoubleDouble;

    fn div(self, other: DoubleDouble) -> DoubleDouble {
        let first = self.high / other.high;
        if !first.is_finite() || other.high.is_infinite() {
            return DoubleDouble { high: first, low: 0.0 };
        }
        let rest = self - other.times(first);
        let second = rest.high / other.high;
        let rest = rest - other.times(second);
        let third = rest.high / other.high;
        DoubleDouble::ordered_sum(first, second) + DoubleDouble::of(third)
    }
}

impl Real for DoubleDouble {
    fn of(value: f64) -> DoubleDouble {
        DoubleDouble { high: value, low: 0.0 }
    }

    fn nearest(self) -> f64 {
        self.high + self.low
    }

    fn times(self, factor: f64) -> DoubleDouble {
        let product = DoubleDouble::product(self.high, factor);
        if !product.high.is_finite() {
            return product;
        }
        DoubleDouble::ordered_sum(product.high, product.low + self.low * factor)
    }

    fn sqrt(self) -> DoubleDouble {
        let root = libm::sqrt(self.high);
        if root == 0.0 || !root.is_finite() {
            return DoubleDouble::of(root);
        }
        let rest = self - DoubleDouble::product(root, root);
        DoubleDouble::ordered_sum(root, rest.high / (2.0 * root))
    }

    fn each_node(mut visit: impl FnMut(DoubleDouble, DoubleDouble)) {
        for (node, weight) in GAUSS_LEGENDRE_32 {
            visit(DoubleDouble::new(node), DoubleDouble::new(weight));
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// 2^-100
    const TINY: f64 = 7.888609052210118e-31;

    fn close(a: DoubleDouble, b: DoubleDouble) -> bool {
        (a - b).nearest().abs() <= TINY * b.nearest().abs()
    }

    #[test]
    fn a_sum_of_doubles_is_exact() {
        let sum = DoubleDouble::sum(1.0, 1e-30);
        assert_eq!((sum.high, sum.low), (1.0, 1e-30));
    }

    #[test]
    fn a_product_of_doubles_agrees_with_the_fused_one() {
        for (a, b) in [(0.1, 0.3), (1e10 / 3.0, 1e-7 / 7.0), (-2.0 / 3.0, 5.0 / 7.0)] {
            let product = DoubleDouble::product(a, b);
            let exact = libm::fma(a, b, -product.high);
            assert!((product.low - exact).abs() <= TINY * product.high.abs(), "{a} {b}");
        }
    }

    #[test]
    fn division_undoes_multiplication_and_squares_undo_roots() {
        let a = DoubleDouble::of(2.0) / DoubleDouble::of(3.0);
        let b = DoubleDouble::of(1.0) / DoubleDouble::of(7.0);
        assert!(close(a * b / b, a));
        assert!(close(a.sqrt().square(), a));
        assert!(close((a + b) - b, a));
    }

    #[test]
    fn what_leaves_the_range_is_infinite_and_not_nan() {
        let large = DoubleDouble::of(1e300);
        assert_eq!((large * large).nearest(), f64::INFINITY);
        assert_eq!((large / DoubleDouble::of(1e-300)).nearest(), f64::INFINITY);
        assert_eq!((DoubleDouble::of(1.0) / DoubleDouble::of(f64::INFINITY)).nearest(), 0.0);
    }
}
