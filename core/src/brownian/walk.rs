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
        density(self.score(terminal).square().times(-0.5)) / self.deviation
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
