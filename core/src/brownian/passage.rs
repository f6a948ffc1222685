//! The time at which a level is first touched.

use crate::brownian::{DiscountedPassage, Walk, density};
use crate::special::Functions;

impl<R: Functions> Walk<R> {
    /// The motion turned so that a level lies above, and its distance.
    pub(crate) fn towards(self, level: R) -> (Walk<R>, R) {
        if level < R::of(0.0) { (self.mirrored(), -level) } else { (self, level) }
    }

    /// Density of the first passage at a time; `level` is not 0.
    pub(crate) fn first_passage_pdf(&self, level: R, time: R) -> R {
        let zero = R::of(0.0);
        if time <= zero || !time.nearest().is_finite() {
            return zero;
        }
        let (walk, distance) = self.until(time).towards(level);
        density(walk.score(distance).square().times(-0.5)) * (distance / walk.deviation) / time
    }

    /// `P(tau <= time)`
    pub(crate) fn first_passage_cdf(&self, level: R, time: R) -> R {
        let zero = R::of(0.0);
        if level == zero {
            return R::of(1.0);
        }
        if time <= zero {
            return zero;
        }
        let (walk, distance) = self.towards(level);
        if time.nearest().is_finite() { walk.until(time).max_tail(distance) } else { walk.ever(distance) }
    }

    /// Probability that a level above is ever touched.
    pub(crate) fn ever(&self, distance: R) -> R {
        (self.drift.times(2.0) * distance / self.vol.square()).smaller(R::of(0.0)).exp()
    }

    /// `E[exp(-discount_rate tau); tau <= horizon]`
    pub(crate) fn discounted_first_passage(&self, level: R, discount_rate: R) -> R {
        if level == R::of(0.0) {
            return R::of(1.0);
        }
        let (walk, distance) = self.towards(level);
        DiscountedPassage::new(distance, walk.drift, walk.vol, walk.horizon, discount_rate).value
    }
}
