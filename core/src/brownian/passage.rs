//! The time at which a level is first touched.

use crate::brownian::{DiscountedPassage, Walk, from_exponent};
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
        from_exponent(walk.score(distance).square().times(-0.5), |gaussian| {
            R::inv_root_two_pi() * gaussian * (distance / walk.deviation) / time
        })
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

#[cfg(test)]
mod tests {
    use super::*;

    fn walks() -> impl Iterator<Item = Walk<f64>> {
        [(0.1, 0.3, 2.0), (-0.7, 0.4, 0.5), (0.0, 1.0, 1.0)].into_iter().map(|(drift, vol, t)| Walk::new(drift, vol, t))
    }

    #[test]
    fn a_level_is_passed_when_the_maximum_or_the_minimum_has_reached_it() {
        for walk in walks() {
            for level in [0.01, 0.2, 1.0] {
                assert_eq!(walk.first_passage_cdf(level, walk.horizon), walk.max_tail(level));
                assert_eq!(walk.first_passage_cdf(-level, walk.horizon), walk.mirrored().max_tail(level));
            }
        }
    }

    #[test]
    fn the_limits_of_the_time_and_of_the_level() {
        for walk in walks() {
            for level in [-0.5, 0.5] {
                assert_eq!(walk.first_passage_cdf(level, 0.0), 0.0);
                assert_eq!(walk.first_passage_pdf(level, 0.0), 0.0);
                assert_eq!(walk.first_passage_pdf(level, f64::INFINITY), 0.0);
                let ever = walk.first_passage_cdf(level, f64::INFINITY);
                let late = walk.first_passage_cdf(level, 1e6);
                let towards = walk.drift * level;
                let wanted = if towards < 0.0 { libm::exp(2.0 * towards / (walk.vol * walk.vol)) } else { 1.0 };
                assert!((ever / wanted - 1.0).abs() < 1e-14, "{walk:?} {level}: {ever}");
                assert!(late <= ever && ever - late < 1e-3, "{walk:?} {level}: {late} {ever}");
            }
            assert_eq!(walk.first_passage_cdf(0.0, 0.0), 1.0);
            assert_eq!(walk.discounted_first_passage(0.0, 0.3), 1.0);
        }
    }

    #[test]
    fn the_density_is_the_slope_of_the_distribution() {
        for walk in walks() {
            for (level, time) in [(0.3, 0.5), (-0.2, 1.0), (1.0, 4.0)] {
                let step = 1e-4 * time;
                let [early, late] = [time - step, time + step].map(|time| walk.first_passage_cdf(level, time));
                let slope = (late - early) / (2.0 * step);
                let density = walk.first_passage_pdf(level, time);
                assert!((slope / density - 1.0).abs() < 1e-6, "{walk:?} {level} {time}: {slope} {density}");
            }
        }
    }
}
