//! Quantiles that have no formula: Newton's method, kept within a bracket.

use crate::brownian::Walk;
use crate::special::{Functions, exp, ln};

/// The factor by which the search first steps towards an open end of its bracket.
const SHORTEST_STRIDE: f64 = 8.0;

/// A distribution on the positive half-line, with both of its tails and its density.
struct Law<F: Fn(f64) -> [f64; 3]> {
    below_above_density: F,
}

impl<F: Fn(f64) -> [f64; 3]> Law<F> {
    /// The point below which `probability` lies; `complement` is what lies above.
    ///
    /// Newton's method in the logarithms of point and probability, in which tails are straight; a step that leaves
    /// the bracket is replaced by one that halves it, so the search ends whatever the shape. While the bracket has
    /// an open end, steps towards it grow: the answer may be three hundred decades from the guess.
    fn quantile(&self, probability: f64, complement: f64, guess: f64) -> f64 {
        let (mut low, mut high) = (0.0, f64::INFINITY);
        let (mut at, mut stride) = (guess, SHORTEST_STRIDE);
        for _ in 0..300 {
            let [below, above, density] = (self.below_above_density)(at);
            // The smaller tail carries the digits.
            let (ratio, steepness) = if probability <= complement {
                (below / probability, at * density / below)
            } else {
                (complement / above, at * density / above)
            };
            if ratio < 1.0 {
                low = at;
            } else {
                high = at;
            }
            let step = -ln(ratio) / steepness;
            let mut next = at * exp(step);
            if !(next > low && next < high && step.abs() < 3.0) {
                // A long stride must not leap over the end of binary64.
                if (at * stride).is_infinite() || at / stride == 0.0 {
                    stride = SHORTEST_STRIDE;
                }
                next = if high.is_infinite() {
                    at * stride
                } else if low == 0.0 {
                    at / stride
                } else {
                    libm::sqrt(low) * libm::sqrt(high)
                };
                stride *= stride;
            }
            if (next - at).abs() <= f64::EPSILON * at || next == 0.0 || next.is_infinite() {
                return next;
            }
            at = next;
        }
        at
    }
}

impl<R: Functions> Walk<R> {
    fn rough(&self) -> Walk<f64> {
        Walk::new(self.drift.nearest(), self.vol.nearest(), self.horizon.nearest())
    }

    /// The level that the maximum stays below with `probability`; `complement` is `1 - probability`.
    pub(crate) fn max_quantile(&self, probability: R, complement: R) -> R {
        let zero = R::of(0.0);
        if probability <= zero {
            return zero;
        }
        if complement <= zero {
            return R::of(f64::INFINITY);
        }
        let walk = self.rough();
        let law = Law { below_above_density: |a| [walk.max_cdf(a), walk.max_tail(a), walk.max_pdf(a)] };
        let guess = walk.deviation + walk.mean.max(0.0);
        let mut level = R::of(law.quantile(probability.nearest(), complement.nearest(), guess));
        if R::POLISHED {
            // In deviations, since in a huge unit of length a density underflows.
            let unit = Walk::new(self.mean / self.deviation, R::of(1.0), R::of(1.0));
            for _ in 0..2 {
                let excess = if probability < complement {
                    self.max_cdf(level) - probability
                } else {
                    complement - self.max_tail(level)
                };
                let slope = unit.max_pdf(level / self.deviation).larger(R::of(f64::MIN_POSITIVE));
                level = level - excess / slope * self.deviation;
            }
        }
        level
    }

    /// The time by which a level is touched with `probability`; infinite if that never comes.
    pub(crate) fn first_passage_quantile(&self, level: R, probability: R) -> R {
        let (zero, one) = (R::of(0.0), R::of(1.0));
        if probability <= zero || level == zero {
            return zero;
        }
        let (walk, distance) = self.towards(level);
        let ever = walk.ever(distance);
        if probability >= ever {
            return R::of(f64::INFINITY);
        }
        // Given that the level is ever touched, the time has the law that belongs to a drift towards it.
        let walk = Walk { drift: walk.drift.magnitude(), ..walk };
        let probability = probability / ever;
        let complement = one - probability;
        let rough = walk.rough();
        let way = distance.nearest();
        let law = Law {
            below_above_density: |time| {
                let walk = rough.until(time);
                [walk.max_tail(way), walk.max_cdf(way), walk.first_passage_pdf(way, time)]
            },
        };
        let guess = if rough.drift * way > rough.vol * rough.vol {
            way / rough.drift
        } else {
            (way / rough.vol) * (way / rough.vol)
        };
        let mut time = R::of(law.quantile(probability.nearest(), complement.nearest(), guess));
        if R::POLISHED {
            for _ in 0..2 {
                let then = walk.until(time);
                let excess = if probability < complement {
                    then.max_tail(distance) - probability
                } else {
                    complement - then.max_cdf(distance)
                };
                let unit = Walk::new(then.mean / then.deviation, R::of(1.0), R::of(1.0));
                let slope = unit.first_passage_pdf(distance / then.deviation, R::of(1.0));
                time = time - excess / slope.larger(R::of(f64::MIN_POSITIVE)) * time;
            }
        }
        time
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::num::{DoubleDouble, Real};

    const PROBABILITIES: [f64; 11] = [1e-305, 1e-275, 1e-250, 1e-30, 1e-6, 0.01, 0.3, 0.5, 0.9, 0.99, 1.0 - 1e-12];

    /// A cdf at a quantile is right to the rounding of the quantile and of what the cdf itself makes of it.
    fn inverts(probability: f64, below: f64, above: f64, steepness: f64) -> bool {
        let complement = 1.0 - probability;
        let (found, wanted) = if probability < complement { (below, probability) } else { (above, complement) };
        (found - wanted).abs() <= 64.0 * f64::EPSILON * (wanted + steepness)
    }

    #[test]
    fn quantiles_invert_their_distributions() {
        for (drift, vol, horizon) in [(0.1, 0.3, 2.0), (-0.7, 0.4, 0.5), (0.0, 1.0, 1.0), (3.0, 0.2, 1.0)] {
            let walk = Walk::new(drift, vol, horizon);
            for probability in PROBABILITIES {
                let level = walk.max_quantile(probability, 1.0 - probability);
                let steepness = level * walk.max_pdf(level);
                let (below, above) = (walk.max_cdf(level), walk.max_tail(level));
                assert!(
                    inverts(probability, below, above, steepness),
                    "{walk:?} {probability}: {level} {below} {above}"
                );

                let end = walk.terminal_quantile(probability);
                let law = walk.end(end);
                let steepness = (end.abs() + walk.mean.abs() + walk.deviation) * walk.terminal_pdf(end);
                // Where the score is large the tail is that much steeper.
                assert!(inverts(probability, law.below, law.above, 8.0 * steepness), "{walk:?} {probability}: {end}");

                for level in [-0.4, 0.4] {
                    let ever = walk.first_passage_cdf(level, f64::INFINITY);
                    let time = walk.first_passage_quantile(level, probability);
                    if probability >= ever {
                        assert_eq!(time, f64::INFINITY);
                        continue;
                    }
                    let (towards, distance) = walk.until(time).towards(level);
                    let steepness = time * walk.first_passage_pdf(level, time);
                    let (below, above) = (towards.max_tail(distance), towards.max_cdf(distance));
                    let slack = if ever < 1.0 { probability } else { 0.0 };
                    assert!(
                        inverts(probability, below, above, steepness + slack),
                        "{walk:?} {level} {probability}: {time}"
                    );
                }
            }
        }
    }

    #[test]
    fn quantiles_at_the_ends() {
        let walk = Walk::new(-0.2, 0.3, 2.0);
        assert_eq!(walk.max_quantile(0.0, 1.0), 0.0);
        assert_eq!(walk.max_quantile(1.0, 0.0), f64::INFINITY);
        assert_eq!([0.0, 1.0].map(|p| walk.terminal_quantile(p)), [f64::NEG_INFINITY, f64::INFINITY]);
        assert_eq!([0.0, 1.0].map(|p| walk.first_passage_quantile(0.5, p)), [0.0, f64::INFINITY]);
        assert_eq!(walk.first_passage_quantile(0.0, 0.7), 0.0);
    }

    /// The reference quantile does not depend on the unit of length or of time, however large.
    #[test]
    fn a_reference_quantile_keeps_its_digits_in_a_huge_unit() {
        let huge = f64::from_bits((1023 + 240) << 52);
        let walk = |unit: f64, time: f64| {
            let [drift, vol] = [-0.3 * unit / time, 0.7 * unit / libm::sqrt(time)].map(DoubleDouble::of);
            Walk::new(drift, vol, DoubleDouble::of(2.0 * time))
        };
        for exponent in [230, 250, 270] {
            let small = DoubleDouble::of(libm::ldexp(1.0, -3 * exponent));
            let whole = DoubleDouble::of(1.0);
            let level = |unit: f64| walk(unit, 1.0).max_quantile(whole - small, small).nearest() / unit;
            assert_eq!(level(huge), level(1.0), "2^-{exponent}");
            let time = |time: f64| walk(1.0, time).first_passage_quantile(whole, small).nearest() / time;
            assert_eq!(time(huge), time(1.0), "2^-{exponent}");
        }
    }
}
