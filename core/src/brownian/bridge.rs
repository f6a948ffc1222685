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
