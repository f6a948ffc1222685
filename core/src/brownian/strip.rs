//! One edge of a strip: the mass of a weighted normal law on either side of a point.
//!
//! Every probability that Brownian motion ends in a strip, having touched a level or not, is a difference of
//! two such edges. The law is either plain or the image that the level casts; the weight of the image may
//! overflow where its tail underflows, so the edge takes the exponent of their product.

use crate::special::Functions;

/// The mass of a weighted normal law above and below a point.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Edge<R> {
    /// Mass above the point.
    pub(crate) above: R,
    /// Mass below the point.
    pub(crate) below: R,
}

impl<R: Functions> Edge<R> {
    /// From `score`, the standard deviations by which the mean exceeds the point, the weighted standard normal
    /// density there, and the weight itself, of which only the larger side makes use.
    pub(crate) fn new(score: R, density: R, weight: R) -> Edge<R> {
        let tail = density * score.magnitude().mills();
        if score > R::of(0.0) {
            Edge { above: weight - tail, below: tail }
        } else {
            Edge { above: tail, below: weight - tail }
        }
    }

    /// Mass between two points of the same law, and the magnitude of what was subtracted to get it; the
    /// difference is taken on the side where both are small.
    pub(crate) fn between(lower: Edge<R>, upper: Edge<R>) -> (R, R) {
        if lower.above < upper.below {
            (lower.above - upper.above, lower.above)
        } else {
            (upper.below - lower.below, upper.below)
        }
    }
}

/// `exp(exponent) / sqrt(2 pi)`
pub(crate) fn density<R: Functions>(exponent: R) -> R {
    R::inv_root_two_pi() * exponent.exp()
}
