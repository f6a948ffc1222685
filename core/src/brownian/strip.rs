//! One edge of a strip: the mass of a weighted normal law on either side of a point.
//!
//! Every probability that Brownian motion ends in a strip, having touched a level or not, is a difference of
//! two such edges. The law is either plain or the image that the level casts; the weight of the image may
//! overflow where its tail underflows, so the edge takes the exponent of their product, and the weight is asked
//! for only where it takes part.

use crate::special::Functions;

/// A point in a weighted normal law, by the smaller of the two masses that it parts.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Edge<R> {
    /// The mass on the side that the mean is not on.
    pub(crate) tail: R,
    /// Whether the mean is above the point.
    pub(crate) low: bool,
}

/// The mass on both sides of a point.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Sides<R> {
    pub(crate) above: R,
    pub(crate) below: R,
}

impl<R: Functions> Edge<R> {
    /// From `score`, the standard deviations by which the mean exceeds the point, and the weighted standard normal
    /// density there.
    pub(crate) fn new(score: R, density: R) -> Edge<R> {
        Edge { tail: density * score.magnitude().mills(), low: score > R::of(0.0) }
    }

    /// Mass above the point.
    pub(crate) fn above(self, weight: impl FnOnce() -> R) -> R {
        if self.low { weight() - self.tail } else { self.tail }
    }

    /// Mass below the point.
    pub(crate) fn below(self, weight: impl FnOnce() -> R) -> R {
        if self.low { self.tail } else { weight() - self.tail }
    }

    /// Mass on both sides.
    pub(crate) fn sides(self, weight: R) -> Sides<R> {
        Sides { above: self.above(|| weight), below: self.below(|| weight) }
    }

    /// Mass between two points of the same law, and the magnitude of what is subtracted from to get it; the
    /// difference is taken on the side where both are tails, if there is one.
    pub(crate) fn between(lower: Edge<R>, upper: Edge<R>, weight: impl FnOnce() -> R) -> (R, R) {
        if !lower.low {
            (lower.tail - upper.tail, lower.tail)
        } else if upper.low {
            (upper.tail - lower.tail, upper.tail)
        } else {
            let weight = weight();
            (weight - (lower.tail + upper.tail), weight)
        }
    }
}

/// `exp(exponent) / sqrt(2 pi)`
pub(crate) fn density<R: Functions>(exponent: R) -> R {
    R::inv_root_two_pi() * exponent.exp()
}
