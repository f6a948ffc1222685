//! The law of the running maximum, and of the maximum together with the end.
//!
//! On paper, with `m` the mean and `s` the deviation of the end, for a level `a` above 0 and `x` at most `a`:
//!
//! ```text
//! P(W_T <= x, M_T <= a) = N((x - m) / s) - exp(2 m a / s^2) N((x - 2 a - m) / s)
//! ```
//!
//! The code departs from it in forming the second term as density times Mills ratio, and, where the difference
//! cancels, in integrating the density of the end times the probability that the path stayed below,
//! `1 - exp(-2 a (a - x) / s^2)`.

use crate::brownian::{Bell, Edge, Shoulder, Survival, Walk, density};
use crate::special::{Functions, mills_slope};

impl<R: Functions> Walk<R> {
    /// The image law that a level above casts, at a point at most the level.
    fn image(&self, level: R, at: R) -> Edge<R> {
        let weight = (level.times(2.0) * (self.drift / self.vol.square())).exp();
        Edge::new(self.score(at - level.times(2.0)), self.image_density(level, at), weight)
    }

    /// Standard normal density of the image law at a point.
    fn image_density(&self, level: R, at: R) -> R {
        let reflection = (level / self.deviation) * ((level - at) / self.deviation);
        density(self.score(at).square().times(-0.5) - reflection.times(2.0))
    }

    /// `P(M_T >= level)`
    pub(crate) fn max_tail(&self, level: R) -> R {
        if level > R::of(0.0) {
            (self.end(level).above + self.image(level, level).below).smaller(R::of(1.0))
        } else {
            R::of(1.0)
        }
    }

    /// `P(M_T <= level)`
    pub(crate) fn max_cdf(&self, level: R) -> R {
        self.joint_max_cdf(level, level)
    }

    /// Density of the maximum.
    pub(crate) fn max_pdf(&self, level: R) -> R {
        let zero = R::of(0.0);
        if level < zero {
            return zero;
        }
        let score = (level + self.mean) / self.deviation;
        let drift = self.mean / self.deviation;
        let density = self.image_density(level, level);
        if self.mean > zero {
            // 1 - drift R(score), as a sum of positive terms.
            let far = level / self.deviation * score.mills() + mills_slope(score);
            density.times(2.0) * far / self.deviation
        } else {
            (density - drift * self.image(level, level).below).times(2.0) / self.deviation
        }
    }

    /// `P(W_T <= terminal, M_T <= level)`
    pub(crate) fn joint_max_cdf(&self, terminal: R, level: R) -> R {
        let zero = R::of(0.0);
        if level <= zero {
            return zero;
        }
        let at = terminal.smaller(level);
        let (plain, image) = (self.end(at), self.image(level, at));
        let difference = plain.below - image.below;
        // Probabilities are conditioned better than prices are: the integral takes over four times earlier.
        if difference >= (plain.below + image.below).times(4.0 * R::CANCELLED) {
            return difference;
        }
        let start = Shoulder { from_peak: self.score(at), height: density(self.score(at).square().times(-0.5)) };
        let survival =
            Survival { rate: level.times(2.0) / self.deviation, from_start: Some((level - at) / self.deviation) };
        Bell::new(start, R::of(1.0), None).integral(Some(survival), 0.0, |_| R::of(1.0))
    }

    /// Joint density of end and maximum.
    pub(crate) fn joint_max_pdf(&self, terminal: R, level: R) -> R {
        let zero = R::of(0.0);
        if level < zero || level < terminal {
            return zero;
        }
        let way = (level.times(2.0) - terminal) / self.deviation;
        self.image_density(level, terminal).times(2.0) * way / self.deviation / self.deviation
    }

    /// `P(W_T >= terminal, M_T >= level)`
    pub(crate) fn joint_max_tail(&self, terminal: R, level: R) -> R {
        if level <= R::of(0.0) || terminal >= level {
            return self.end(terminal).above;
        }
        // From the level on plainly, and between end and level by way of the level.
        let image = Edge::between(self.image(level, terminal), self.image(level, level)).0;
        self.end(level).above + image
    }
}
