//! One edge of a strip: the mass of a weighted normal law on either side of a point.
//!
//! Every probability that Brownian motion ends in a strip, having touched a level or not, is a difference of
//! two such edges. The law is either plain or the image that the level casts; the weight of the image may
//! overflow where its tail underflows, so the edge takes the exponent of their product.

use crate::num::Lane;
use crate::special::{INV_ROOT_TWO_PI, exp_sum, mills_ratio_lane};

/// The mass of a weighted normal law above and below a point.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Edge<R> {
    /// Mass above the point.
    pub(crate) above: R,
    /// Mass below the point.
    pub(crate) below: R,
}

impl<R: Lane> Edge<R> {
    /// From `score`, the standard deviations by which the mean exceeds the point, the weighted standard normal
    /// density there, and the weight itself, of which only the larger side makes use.
    #[inline(always)]
    pub(crate) fn new(score: R, density: R, weight: R) -> Edge<R> {
        let tail = density * mills_ratio_lane(score.abs());
        let bulk = weight - tail;
        let high = R::splat(0.0).less(score);
        Edge { above: R::select(high, bulk, tail), below: R::select(high, tail, bulk) }
    }

    /// Mass between two points of the same law; the difference is taken on the side where both are small.
    #[inline(always)]
    pub(crate) fn between(lower: Edge<R>, upper: Edge<R>) -> R {
        let upper_side = lower.above.less(upper.below);
        R::select(upper_side, lower.above - upper.above, upper.below - lower.below)
    }
}

/// `exp(exponent) / sqrt(2 pi)`
#[inline(always)]
pub(crate) fn density<R: Lane>(exponent: R) -> R {
    R::splat(INV_ROOT_TWO_PI) * exp_sum(exponent, R::splat(0.0))
}
