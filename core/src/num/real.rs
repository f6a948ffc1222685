//! A real number as the formulas see it: binary64 for the fast path, double-double for the reference path.

use core::ops::{Add, Div, Mul, Neg, Sub};

use crate::num::GAUSS_LEGENDRE_16;

/// What a formula may do to a number, so that every formula is written once for both precisions.
pub(crate) trait Real:
    Copy
    + PartialOrd
    + Add<Output = Self>
    + Sub<Output = Self>
    + Mul<Output = Self>
    + Div<Output = Self>
    + Neg<Output = Self>
{
    /// The number that a binary64 is.
    fn of(value: f64) -> Self;
    /// The nearest binary64.
    fn nearest(self) -> f64;
    /// The product with a binary64.
    fn times(self, factor: f64) -> Self;
    /// Square root.
    fn sqrt(self) -> Self;
    /// Visits the nodes and weights of the Gauss-Legendre rule on (-1, 1) that suits the precision.
    fn each_node(visit: impl FnMut(Self, Self));

    /// The square.
    fn square(self) -> Self {
        self * self
    }

    /// The magnitude.
    fn magnitude(self) -> Self {
        if self < Self::of(0.0) { -self } else { self }
    }

    /// The smaller of two.
    fn smaller(self, other: Self) -> Self {
        if other < self { other } else { self }
    }

    /// The larger of two.
    fn larger(self, other: Self) -> Self {
        if self < other { other } else { self }
    }
}

impl Real for f64 {
    fn of(value: f64) -> f64 {
        value
    }
    fn nearest(self) -> f64 {
        self
    }
    fn times(self, factor: f64) -> f64 {
        self * factor
    }
    fn sqrt(self) -> f64 {
        libm::sqrt(self)
    }
    fn each_node(mut visit: impl FnMut(f64, f64)) {
        for (node, weight) in GAUSS_LEGENDRE_16 {
            visit(node, weight);
        }
    }
}
