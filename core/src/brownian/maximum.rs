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

use crate::brownian::{Bell, Edge, Shoulder, Sides, Survival, Walk, density, from_exponent, half_of_underflow};
use crate::special::{Functions, mills_slope};

/// Probabilities are conditioned better than prices are: the integral takes over this much earlier.
const SEAM: f64 = 16.0;

impl<R: Functions> Walk<R> {
    /// The image law that a level above casts, at a point at most the level.
    fn image_edge(&self, level: R, at: R) -> Edge<R> {
        Edge::new(self.score(at - level.times(2.0)), self.image_density(level, at))
    }

    /// All the mass of the image law.
    fn image_weight(&self, level: R) -> R {
        self.image_weight_exponent(level).exp()
    }

    fn image_weight_exponent(&self, level: R) -> R {
        level.times(2.0) * (self.drift / self.vol.square())
    }

    /// The mass of the image law on both sides of a point.
    fn image(&self, level: R, at: R) -> Sides<R> {
        self.image_edge(level, at).sides(self.image_weight(level))
    }

    /// Standard normal density of the image law at a point.
    fn image_density(&self, level: R, at: R) -> R {
        density(self.image_exponent(level, at))
    }

    /// The exponent of that density.
    fn image_exponent(&self, level: R, at: R) -> R {
        let reflection = (level / self.deviation) * ((level - at) / self.deviation);
        self.score(at).square().times(-0.5) - reflection.times(2.0)
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
        let exponent = self.image_exponent(level, level);
        if self.mean > zero {
            // 1 - drift R(score), as a sum of positive terms.
            let far = level / self.deviation * score.mills() + mills_slope(score);
            return from_exponent(exponent, |gaussian| {
                (R::inv_root_two_pi() * gaussian).times(2.0) * far / self.deviation
            });
        }
        if score > zero {
            return from_exponent(exponent, |gaussian| {
                let density = R::inv_root_two_pi() * gaussian;
                (density - drift * (density * score.mills())).times(2.0) / self.deviation
            });
        }
        // Most of the image lies below.
        let sum = |weight: R, density: R| {
            (density - drift * (weight - density * score.magnitude().mills())).times(2.0) / self.deviation
        };
        let weight = self.image_weight(level);
        match half_of_underflow(self.image_weight_exponent(level), weight) {
            Some(half) => sum(half, half * density(score.square().times(-0.5))) * half,
            None => sum(weight, density(exponent)),
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
        if difference >= (plain.below + image.below).times(SEAM * R::CANCELLED) {
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
        from_exponent(self.image_exponent(level, terminal), |gaussian| {
            (R::inv_root_two_pi() * gaussian).times(2.0) * way / self.deviation / self.deviation
        })
    }

    /// `P(W_T >= terminal, M_T >= level)`
    pub(crate) fn joint_max_tail(&self, terminal: R, level: R) -> R {
        if level <= R::of(0.0) || terminal >= level {
            return self.end(terminal).above;
        }
        // From the level on plainly, and between end and level by way of the level.
        let (near, far) = (self.image_edge(level, terminal), self.image_edge(level, level));
        let image = Edge::between(near, far, || self.image_weight(level)).0;
        (self.end(level).above + image).smaller(R::of(1.0))
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::num::{DoubleDouble, Real, integrate};

    const WALKS: [[f64; 3]; 4] = [[0.1, 0.3, 2.0], [-0.7, 0.4, 0.5], [0.0, 1.0, 1.0], [2.0, 0.5, 1.0]];

    fn walks() -> impl Iterator<Item = Walk<f64>> {
        WALKS.into_iter().map(|[drift, vol, horizon]| Walk::new(drift, vol, horizon))
    }

    fn integral(from: f64, to: f64, function: impl Fn(f64) -> f64) -> f64 {
        let mut sum = 0.0;
        let width = (to - from) / 24.0;
        integrate(from, to, width, width, |node, weight| sum += weight * function(node));
        sum
    }

    /// Farther from 0 and from the mean than anything counts.
    fn reach(walk: &Walk<f64>) -> f64 {
        10.0 * walk.deviation + 2.0 * walk.mean.abs()
    }

    fn close(found: f64, wanted: f64) -> bool {
        (found / wanted - 1.0).abs() < 1e-12
    }

    #[test]
    fn the_joint_density_integrates_to_both_marginals() {
        for walk in walks() {
            for shift in [-1.5, -0.3, 0.2, 1.0] {
                let terminal = walk.mean + shift * walk.deviation;
                let low = terminal.max(0.0);
                let sum = integral(low, low + reach(&walk), |level| walk.joint_max_pdf(terminal, level));
                assert!(close(sum, walk.terminal_pdf(terminal)), "{walk:?} {terminal}: {sum}");
            }
            for score in [0.05, 0.4, 1.0, 2.5] {
                let level = score * walk.deviation;
                let sum = integral(level - reach(&walk), level, |terminal| walk.joint_max_pdf(terminal, level));
                assert!(close(sum, walk.max_pdf(level)), "{walk:?} {level}: {sum}");
            }
        }
    }

    #[test]
    fn the_joint_density_integrates_to_the_joint_distribution() {
        for walk in walks() {
            for (shift, score) in [(-1.0, 0.3), (0.5, 1.5), (0.2, 3.0)] {
                let (terminal, level) = (walk.mean + shift * walk.deviation, score * walk.deviation);
                let below = |level: f64| {
                    let end = terminal.min(level);
                    integral(end - reach(&walk), end, |x| walk.joint_max_pdf(x, level))
                };
                // The end of the inner integral has a kink where the level passes the terminal.
                let kink = terminal.clamp(0.0, level);
                let sum = integral(0.0, kink, below) + integral(kink, level, below);
                let wanted = walk.joint_max_cdf(terminal, level);
                assert!(close(sum, wanted), "{walk:?} {terminal} {level}: {sum} and {wanted}");
            }
        }
    }

    #[test]
    fn a_far_level_leaves_the_law_of_the_end() {
        for walk in walks() {
            for shift in [-6.0, -1.0, 0.0, 2.0] {
                let terminal = walk.mean + shift * walk.deviation;
                let level = 2.0 * reach(&walk);
                assert!(close(walk.joint_max_cdf(terminal, level), walk.end(terminal).below));
                let tail = walk.joint_max_tail(terminal, 0.0);
                assert!(close(tail, walk.end(terminal).above));
            }
        }
    }

    #[test]
    fn what_is_below_and_what_is_above_make_up_the_whole() {
        for walk in walks() {
            for score in [1e-6, 0.01, 0.5, 1.0, 3.0] {
                let level = score * walk.deviation;
                let whole = walk.max_cdf(level) + walk.max_tail(level);
                assert!((whole - 1.0).abs() <= 4.0 * f64::EPSILON, "{walk:?} {level}: {whole}");
                let terminal = 0.3 * level;
                // P(W <= x, M <= a) + P(W <= x, M > a) + P(W > x, M <= a) + P(W > x, M > a)
                let quarter = walk.joint_max_tail(terminal, level);
                let rest = walk.end(terminal).below + (walk.max_cdf(level) - walk.joint_max_cdf(terminal, level));
                assert!((quarter + rest - 1.0).abs() <= 8.0 * f64::EPSILON, "{walk:?} {level}");
            }
        }
    }

    #[test]
    fn the_density_is_the_slope_of_the_distribution() {
        for walk in walks() {
            for score in [0.01, 0.3, 1.0, 4.0] {
                let level = score * walk.deviation;
                let step = 1e-4 * level;
                let slope = (walk.max_tail(level - step) - walk.max_tail(level + step)) / (2.0 * step);
                assert!((slope / walk.max_pdf(level) - 1.0).abs() < 1e-6, "{walk:?} {level}: {slope}");
            }
        }
    }

    #[test]
    fn below_the_start_the_maximum_never_is() {
        for walk in walks() {
            for level in [0.0, -0.1, -1e75] {
                assert_eq!(
                    [walk.max_cdf(level), walk.max_tail(level), walk.joint_max_cdf(0.5, level)],
                    [0.0, 1.0, 0.0]
                );
            }
            assert_eq!(walk.max_pdf(-0.1), 0.0);
            assert_eq!(walk.joint_max_pdf(0.2, 0.1), 0.0);
            assert!(walk.max_pdf(0.0) > 0.0);
        }
    }

    /// Whether the difference of two terms is what the distribution is made of.
    fn by_difference(walk: &Walk<f64>, terminal: f64, level: f64) -> bool {
        let (plain, image) = (walk.end(terminal), walk.image(level, terminal));
        plain.below - image.below >= (plain.below + image.below) * (SEAM * <f64 as Functions>::CANCELLED)
    }

    #[test]
    fn the_difference_meets_the_integral_where_it_cancels() {
        for walk in walks() {
            for depth in [0.0, 0.5, 2.0] {
                // The level at which one form hands over to the other, by halving; the end lies deeper.
                let end = |level: f64| level - depth * walk.deviation;
                let (mut low, mut high) = (1e-9 * walk.deviation, 4.0 * walk.deviation);
                assert!(!by_difference(&walk, end(low), low) && by_difference(&walk, end(high), high));
                for _ in 0..80 {
                    let middle = 0.5 * (low + high);
                    if by_difference(&walk, end(middle), middle) {
                        high = middle;
                    } else {
                        low = middle;
                    }
                }
                let [drift, vol, horizon] = [walk.drift, walk.vol, walk.horizon].map(DoubleDouble::of);
                let exact = Walk::new(drift, vol, horizon);
                let (mut below, mut above, mut forms) = (low, high, [false; 2]);
                for _ in 0..64 {
                    for level in [below, above] {
                        let fast = walk.joint_max_cdf(end(level), level);
                        let wanted = exact.joint_max_cdf(DoubleDouble::of(end(level)), DoubleDouble::of(level));
                        let error = (fast / wanted.nearest() - 1.0).abs();
                        // Eight times the rounding of either term, at most, and what the scores lose in their tails.
                        assert!(error <= 64.0 * f64::EPSILON, "{walk:?} {depth} {level}: {error:e}");
                        forms[usize::from(by_difference(&walk, end(level), level))] = true;
                    }
                    below = below.next_down();
                    above = above.next_up();
                }
                assert_eq!(forms, [true; 2]);
            }
        }
    }
}
