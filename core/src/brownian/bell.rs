//! A Gaussian over a strip, told from where it is highest, for integrals whose integrand must stay positive.

use crate::num::integrate;
use crate::special::Functions;

/// The widest panel of the integral, in standard deviations.
const WIDEST_PANEL: f64 = 1.0;

/// A peak that lies within the strip, but no further than this from an end, is told from that end all the same:
/// the ends' own distances from the peak would not tell a narrow strip's width.
const BESIDE: f64 = -1.0;

/// The Gaussian at one end of a strip.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Shoulder<R> {
    /// Standard deviations from the peak to this end, counted away from the strip's start; at the start it is
    /// negative where the peak lies within, at the far end where it lies beyond.
    pub(crate) from_peak: R,
    /// `phi(from_peak)` times the weight.
    pub(crate) height: R,
}

/// `height exp(-slope u - u^2 / 2)` at the distance `origin + step u` from the start of the strip, in standard
/// deviations: neither factor can overflow or lose digits to the other.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Bell<R> {
    height: R,
    slope: R,
    origin: R,
    /// From the origin to the far end, if there is one.
    to_far: R,
    step: f64,
    from: R,
    to: R,
}

impl<R: Functions> Bell<R> {
    /// Over a strip that starts at `start` and, if it ends, ends at `far`, a `length` away.
    pub(crate) fn new(start: Shoulder<R>, weight: R, far: Option<(Shoulder<R>, R)>) -> Bell<R> {
        let zero = R::of(0.0);
        let within = |reach: f64, length: Option<R>| match length {
            Some(length) if length.nearest() <= reach => length,
            _ => R::of(reach),
        };
        let length = far.map(|(_, length)| length);
        let slope = start.from_peak;
        if slope >= R::of(BESIDE) {
            let to = within(reach::<R>(slope.nearest()), length);
            let to_far = length.unwrap_or(zero);
            return Bell { height: start.height, slope, origin: zero, to_far, step: 1.0, from: zero, to };
        }
        if let Some((far, length)) = far {
            let slope = -far.from_peak;
            if slope >= R::of(BESIDE) {
                let to = within(reach::<R>(slope.nearest()), Some(length));
                return Bell { height: far.height, slope, origin: length, to_far: zero, step: -1.0, from: zero, to };
            }
        }
        let half = reach::<R>(zero.nearest());
        // By the far end's own score: the difference of two long ways would lose the short one between them.
        let to_far = far.map(|(far, _)| far.from_peak);
        Bell {
            height: R::inv_root_two_pi() * weight,
            slope: zero,
            origin: -slope,
            to_far: to_far.unwrap_or(zero),
            step: 1.0,
            from: slope.larger(R::of(-half)),
            to: within(half, to_far),
        }
    }

    /// The integral of the Gaussian times a factor of the distance from the start, times the probability of
    /// survival if there is one. `growth` is the rate at which the factor changes.
    pub(crate) fn integral(&self, survival: Option<Survival<R>>, growth: f64, factor: impl Fn(R) -> R) -> R {
        let rate = survival.map_or(0.0, |survival| survival.rate.nearest());
        let finest = 4.0 / (1.0 + self.slope.magnitude().nearest() + rate + growth);
        let mut sum = R::of(0.0);
        integrate(self.from, self.to, finest, WIDEST_PANEL, |u, weight| {
            let gaussian = (-(self.slope * u) - u.square().times(0.5)).exp();
            let alive = survival.map_or(R::of(1.0), |survival| survival.probability(self, u));
            sum = sum + weight * gaussian * factor(self.origin + u.times(self.step)) * alive;
        });
        self.height * sum
    }
}

/// How far `exp(-slope u - u^2 / 2)` reaches before it has lost all that matters.
fn reach<R: Functions>(slope: f64) -> f64 {
    2.0 * R::NEGLIGIBLE / (slope + libm::sqrt(slope * slope + 2.0 * R::NEGLIGIBLE))
}

/// The probability that a path which ends in the strip has not touched the level: `1 - exp(-rate way)`, `way` its
/// distance from the level in standard deviations.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Survival<R> {
    /// Twice the level's distance from the start of the path, in standard deviations.
    pub(crate) rate: R,
    /// The level's distance from the start of the strip, in standard deviations; none if it is the strip's far end.
    pub(crate) from_start: Option<R>,
}

impl<R: Functions> Survival<R> {
    fn probability(self, bell: &Bell<R>, u: R) -> R {
        let step = u.times(bell.step);
        let way = match self.from_start {
            Some(from_start) => from_start + bell.origin + step,
            None => bell.to_far - step,
        };
        -(-self.rate * way).expm1()
    }
}
