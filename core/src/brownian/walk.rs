//! Brownian motion with drift over a horizon, with the numbers that follow, and the law of where it ends.

use crate::brownian::{Edge, Sides, density};
use crate::special::{Functions, normal_quantile};

/// `W_t = drift t + vol B_t`, `W_0 = 0`, up to the horizon.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Walk<R> {
    pub(crate) drift: R,
    pub(crate) vol: R,
    pub(crate) horizon: R,
    /// `drift horizon`
    pub(crate) mean: R,
    /// `vol sqrt(horizon)`
    pub(crate) deviation: R,
}

impl<R: Functions> Walk<R> {
    pub(crate) fn new(drift: R, vol: R, horizon: R) -> Walk<R> {
        Walk { drift, vol, horizon, mean: drift * horizon, deviation: vol * horizon.sqrt() }
    }

    /// The same motion seen upside down.
    pub(crate) fn mirrored(self) -> Walk<R> {
        Walk { drift: -self.drift, mean: -self.mean, ..self }
    }

    /// The same motion up to another horizon.
    pub(crate) fn until(self, horizon: R) -> Walk<R> {
        Walk::new(self.drift, self.vol, horizon)
    }

    /// Standard deviations by which the mean exceeds a point.
    pub(crate) fn score(&self, at: R) -> R {
        (self.mean - at) / self.deviation
    }

    /// Mass of the end on either side of a point.
    pub(crate) fn end(&self, at: R) -> Sides<R> {
        let score = self.score(at);
        Edge::new(score, density(score.square().times(-0.5))).sides(R::of(1.0))
    }

    /// Density of the end.
    pub(crate) fn terminal_pdf(&self, terminal: R) -> R {
        from_exponent(self.score(terminal).square().times(-0.5), |gaussian| {
            R::inv_root_two_pi() * gaussian / self.deviation
        })
    }

    /// The end that is exceeded with probability `1 - probability`.
    pub(crate) fn terminal_quantile(&self, probability: R) -> R {
        let mut score = R::of(normal_quantile(probability.nearest()));
        if !score.nearest().is_finite() {
            return score;
        }
        if R::POLISHED {
            for _ in 0..2 {
                let density = density(score.square().times(-0.5));
                let below = Edge::new(-score, density).below(|| R::of(1.0));
                score = score - (below - probability) / density;
            }
        }
        self.mean + self.deviation * score
    }
}

/// What `rest`, which is proportional to its argument, makes of `exp(exponent)`.
///
/// In a tiny unit of length or time a density is an ordinary number although its Gaussian factor underflows: the
/// factor is then brought in by two halves.
pub(crate) fn from_exponent<R: Functions>(exponent: R, rest: impl Fn(R) -> R) -> R {
    let whole = exponent.exp();
    match half_of_underflow(exponent, whole) {
        Some(half) => rest(half) * half,
        None => rest(whole),
    }
}

/// `exp(exponent / 2)` where `whole = exp(exponent)`, or the lower part of its double-double, underflows.
pub(crate) fn half_of_underflow<R: Functions>(exponent: R, whole: R) -> Option<R> {
    (whole.nearest() < f64::MIN_POSITIVE / (f64::EPSILON * f64::EPSILON)).then(|| exponent.times(0.5).exp())
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::num::{DoubleDouble, Real};

    /// `2^-400`, and its logarithm.
    const TINY: f64 = f64::from_bits((1023 - 400) << 52);
    const LN_TINY: f64 = -400.0 * core::f64::consts::LN_2;

    /// A density in a unit so small that it is an ordinary number where the standard normal density underflows.
    fn met(name: &str, found: [f64; 2], log_in_deviations: f64) {
        let wanted = crate::special::exp(log_in_deviations - LN_TINY);
        for (path, found) in ["fast", "reference"].into_iter().zip(found) {
            assert!((found / wanted - 1.0).abs() < 1e-12, "{name}, {path}: {found:e} and {wanted:e}");
        }
    }

    #[test]
    fn a_density_outlives_its_gaussian_factor_in_a_tiny_unit() {
        let ln = crate::special::ln;
        let log_phi = |z: f64| -0.5 * z * z + ln(f64::inv_root_two_pi());
        for (drift, z) in [(0.0, 38.4), (0.0, 38.9), (1.0, 39.5), (-1.0, 38.0)] {
            let at = z * TINY;
            let walk = Walk::new(drift * TINY, TINY, 1.0);
            let exact = Walk::new(DoubleDouble::of(drift * TINY), DoubleDouble::of(TINY), DoubleDouble::of(1.0));
            let dd = DoubleDouble::of;

            let pair = [walk.terminal_pdf(at), exact.terminal_pdf(dd(at)).nearest()];
            met("terminal", pair, log_phi(z - drift));

            let pair = [walk.joint_max_pdf(0.0, 0.5 * at), exact.joint_max_pdf(dd(0.0), dd(0.5 * at)).nearest()];
            met("joint", pair.map(|pdf| pdf * TINY), log_phi(drift) + ln(2.0 * z) - 0.5 * z * z);

            let mills = crate::special::mills_ratio(z + drift);
            let pair = [walk.max_pdf(at), exact.max_pdf(dd(at)).nearest()];
            met("maximum", pair, log_phi(z - drift) + ln(2.0 * (1.0 - drift * mills)));

            // Here it is the unit of time that is tiny.
            let fast = Walk::new(drift, 1.0, 1.0);
            let way = z * libm::sqrt(TINY);
            let tilted = log_phi(z - drift * libm::sqrt(TINY));
            let exact = Walk::new(dd(drift), dd(1.0), dd(1.0));
            let pair = [fast.first_passage_pdf(way, TINY), exact.first_passage_pdf(dd(way), dd(TINY)).nearest()];
            met("passage", pair, tilted + ln(z));
        }
        // A drift away, with the level on its near side: the weight of the image underflows.
        for (drift, z) in [(-30.0, 12.2), (-37.0, 10.0)] {
            let walk = Walk::new(drift * TINY, TINY, 1.0);
            let exact = Walk::new(DoubleDouble::of(drift * TINY), DoubleDouble::of(TINY), DoubleDouble::of(1.0));
            let rest = crate::special::normal_pdf(z + drift) - drift * crate::special::normal_cdf(-(z + drift));
            let pair = [walk.max_pdf(z * TINY), exact.max_pdf(DoubleDouble::of(z * TINY)).nearest()];
            met("maximum", pair, 2.0 * drift * z + ln(2.0 * rest));
        }
    }
}
