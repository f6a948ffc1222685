//! What the end of a path tells of its way: the bridge's chance to have touched a level, its maximum, and the
//! weight of the path under another drift.

use crate::brownian::Walk;
use crate::special::Functions;

impl<R: Functions> Walk<R> {
    /// `P(level touched | W_T = terminal)`
    pub(crate) fn bridge_crossing(&self, terminal: R, level: R) -> R {
        let zero = R::of(0.0);
        let beyond = if level > zero { terminal >= level } else { terminal <= level };
        if level == zero || beyond {
            return R::of(1.0);
        }
        let ways = (level / self.deviation) * ((level - terminal) / self.deviation);
        ways.times(-2.0).exp()
    }

    /// The maximum that is exceeded with probability `uniform`, given the end; `log_uniform` its logarithm.
    pub(crate) fn bridge_max(&self, terminal: R, log_uniform: R) -> R {
        let spread = self.deviation.square() * log_uniform.times(-2.0);
        let root = (terminal.square() + spread).sqrt();
        if terminal > R::of(0.0) {
            (terminal + root).times(0.5)
        } else {
            // The sum would cancel.
            spread / (root - terminal).times(2.0)
        }
    }

    /// `dP' / dP` on a path ending at `terminal`, where `P'` has another drift.
    pub(crate) fn drift_weight(&self, terminal: R, other: R) -> R {
        let half_way = (other + self.drift) * self.horizon;
        ((other - self.drift) * (terminal - half_way.times(0.5)) / self.vol.square()).exp()
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::num::integrate;

    fn integral(from: f64, to: f64, function: impl Fn(f64) -> f64) -> f64 {
        let mut sum = 0.0;
        let width = (to - from) / 24.0;
        integrate(from, to, width, width, |node, weight| sum += weight * function(node));
        sum
    }

    #[test]
    fn crossings_over_all_ends_make_up_the_tail_of_the_maximum() {
        for (drift, vol, horizon) in [(0.1, 0.3, 2.0), (-0.7, 0.4, 0.5), (0.0, 1.0, 1.0)] {
            let walk = Walk::new(drift, vol, horizon);
            for score in [0.1, 0.7, 2.0] {
                let level = score * walk.deviation;
                let low = level.min(walk.mean) - 12.0 * walk.deviation;
                let way = integral(low, level, |end| walk.terminal_pdf(end) * walk.bridge_crossing(end, level));
                let sum = way + walk.end(level).above;
                assert!((sum / walk.max_tail(level) - 1.0).abs() < 1e-13, "{walk:?} {level}: {sum}");
            }
        }
    }

    #[test]
    fn a_level_reached_at_the_end_or_at_the_start_is_crossed() {
        let walk = Walk::new(0.1, 0.3, 2.0);
        for (terminal, level) in [(0.5, 0.5), (0.6, 0.5), (-0.5, -0.5), (-0.6, -0.5), (0.3, 0.0), (-0.3, 0.0)] {
            assert_eq!(walk.bridge_crossing(terminal, level), 1.0, "{terminal} {level}");
        }
        assert_eq!(walk.bridge_crossing(0.1, 0.5), walk.mirrored().bridge_crossing(-0.1, -0.5));
    }

    #[test]
    fn a_drawn_maximum_is_crossed_with_the_probability_that_drew_it() {
        let walk = Walk::new(-0.2, 0.3, 2.0);
        for terminal in [-2.0, -0.1, 0.0, 0.2, 3.0] {
            for uniform in [1e-300, 1e-9, 0.2, 0.9, 0.999] {
                let level = walk.bridge_max(terminal, crate::special::ln(uniform));
                assert!(level >= terminal && level >= 0.0);
                // How steep the crossing is in the level: what a rounding of the level does to it.
                let slope = (4.0 * level - 2.0 * terminal) * level / (walk.deviation * walk.deviation);
                let error = (walk.bridge_crossing(terminal, level) / uniform - 1.0).abs();
                assert!(error <= 8.0 * f64::EPSILON * (1.0 + slope.abs()), "{terminal} {uniform}: {error:e}");
            }
        }
    }

    #[test]
    fn the_weight_of_another_drift_has_mean_one() {
        for (drift, other) in [(0.1, 0.4), (-0.5, 0.5), (0.3, 0.3), (2.0, 0.0)] {
            let walk = Walk::new(drift, 0.4, 1.5);
            let middle = other * walk.horizon;
            let (low, high) = (middle - 12.0 * walk.deviation, middle + 12.0 * walk.deviation);
            let mean = integral(low, high, |end| walk.terminal_pdf(end) * walk.drift_weight(end, other));
            assert!((mean - 1.0).abs() < 1e-13, "{drift} {other}: {mean}");
            let shifted = Walk::new(other, 0.4, 1.5);
            let weighted = walk.terminal_pdf(0.7) * walk.drift_weight(0.7, other);
            assert!((weighted / shifted.terminal_pdf(0.7) - 1.0).abs() < 1e-13);
        }
    }
}
