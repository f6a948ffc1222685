//! The value of a strip as one integral whose integrand is positive: nothing cancels, however near the spot is
//! to the barrier, the strike to the barrier, or however small the volatility.
//!
//! On paper, from the end `a` of the strip outwards, with `t` the distance from it in standard deviations:
//!
//! ```text
//! integral over t of e^(-rT) phi(d2) exp(+-d2 t - t^2 / 2) f(a e^(+-s t)) (1 - exp(-2 h y(t) / s))
//! ```
//!
//! the last factor only for an untouched barrier, `h` its distance from the spot, `y(t)` from the end, in standard
//! deviations. The code departs from it in writing each factor as what is left of it at `t = 0` plus an `expm1`,
//! and in taking payoffs that grow with the spot per share, so that their growth moves into the Gaussian.

use crate::num::integrate;
use crate::price::setting::Setting;
use crate::price::strip::{End, Level, Strip};
use crate::special::Functions;

/// The widest panel of the integral, in standard deviations.
const WIDEST_PANEL: f64 = 1.0;

/// Value of a strip, and, if `barrier` is given, of its part on paths that never touch it: then the strip lies on
/// the spot's side of the barrier.
pub(crate) fn value<R: Functions>(setting: &Setting<R>, strip: &Strip<R>, barrier: Option<f64>) -> R {
    let deviation = setting.deviation;
    let (end, upwards, length) = match (&strip.lower, &strip.upper) {
        (Some(lower), None) => (lower, true, None),
        (None, Some(upper)) => (upper, false, None),
        (Some(lower), Some(upper)) => {
            // Of the two ends, the strike is where a call or put vanishes.
            let upwards = lower.level == Level::Strike;
            let length = R::ln_ratio(upper.at, lower.at) / deviation;
            (if upwards { lower } else { upper }, upwards, Some(length))
        }
        // The whole line has no ends whose tails could cancel.
        (None, None) => return strip.closed(setting).value,
    };
    let payoff = Payoff::new(strip, end);
    let decay = if upwards { -payoff.score } else { payoff.score };
    let survival = barrier.map(|barrier| Survival::new(setting, end, barrier, length));
    let (from, to) = window(decay, length);
    let steepest = decay.magnitude().nearest() + survival.as_ref().map_or(0.0, |survival| survival.rate.nearest());
    let finest = 4.0 / (1.0 + steepest + deviation.nearest());
    let mut sum = R::of(0.0);
    integrate(from, to, finest, WIDEST_PANEL, |t, weight| {
        let gaussian = (-(decay * t) - t.square().times(0.5)).exp();
        let alive = survival.as_ref().map_or(R::of(1.0), |survival| survival.probability(t));
        sum = sum + weight * gaussian * payoff.at(deviation * t) * alive;
    });
    end.density * sum
}

/// What the strip pays at a distance from its end, in the measure that suits it.
struct Payoff<R> {
    /// Per share or in cash, at the end.
    at_end: R,
    /// By how much it grows from there to far away; 0 for a digital.
    growth: R,
    /// Whether it is counted per share, so that what it is worth at the end decays as the spot grows.
    per_share: bool,
    /// `d1` or `d2`, as the measure has it.
    score: R,
}

impl<R: Functions> Payoff<R> {
    fn new(strip: &Strip<R>, end: &End<R>) -> Payoff<R> {
        let at = R::of(end.at);
        let zero = R::of(0.0);
        let cash = R::of(strip.line.cash);
        if strip.line.shares == 0.0 {
            Payoff { at_end: -cash, growth: zero, per_share: false, score: end.d2 }
        } else if strip.line.cash == 0.0 {
            Payoff { at_end: at, growth: zero, per_share: false, score: end.d1 }
        } else if strip.line.shares > 0.0 {
            Payoff { at_end: at - cash, growth: at, per_share: true, score: end.d1 }
        } else {
            Payoff { at_end: -at - cash, growth: at, per_share: false, score: end.d2 }
        }
    }

    /// At the logarithmic distance `u` from the end: `X - cash` per share going up, `-cash - X` going down.
    fn at(&self, u: R) -> R {
        if self.growth == R::of(0.0) {
            return self.at_end;
        }
        let fallen = (-u).expm1();
        let at_end = if self.per_share { self.at_end * (R::of(1.0) + fallen) } else { self.at_end };
        at_end - self.growth * fallen
    }
}

/// The probability that a path which ends in the strip has not touched the barrier.
struct Survival<R> {
    /// Twice the barrier's distance from the spot, in standard deviations.
    rate: R,
    /// The barrier's distance from the end of the strip, in standard deviations.
    from_end: R,
    /// 1 if it grows outwards, -1 if it shrinks.
    outwards: f64,
}

impl<R: Functions> Survival<R> {
    fn new(setting: &Setting<R>, end: &End<R>, barrier: f64, length: Option<R>) -> Survival<R> {
        let distance = |from: f64| R::ln_ratio(barrier, from).magnitude() / setting.deviation;
        Survival {
            rate: distance(setting.spot).times(2.0),
            // A strip with two ends runs from the strike to the barrier.
            from_end: length.unwrap_or_else(|| distance(end.at)),
            outwards: if length.is_some() { -1.0 } else { 1.0 },
        }
    }

    fn probability(&self, t: R) -> R {
        -(-self.rate * (self.from_end + t.times(self.outwards))).expm1()
    }
}

/// Where an integrand that falls off as `exp(-decay t - t^2 / 2)` matters, within `0 < t < length`.
fn window<R: Functions>(decay: R, length: Option<R>) -> (R, R) {
    let slope = decay.nearest();
    let to = match length {
        Some(length) if length.nearest() <= reach::<R>(slope) => length,
        _ => R::of(reach::<R>(slope)),
    };
    let end = to.nearest();
    // With the peak beyond the strip the integrand falls off inwards from there.
    let from = if -slope > end { end - reach::<R>(-slope - end) } else { -slope - reach::<R>(0.0) };
    (R::of(from.max(0.0)), to)
}

/// How far `exp(-slope t - t^2 / 2)` reaches before it has lost all that matters from its maximum over `t > 0`.
fn reach<R: Functions>(slope: f64) -> f64 {
    let root = libm::sqrt(2.0 * R::NEGLIGIBLE);
    if slope > 0.0 {
        2.0 * R::NEGLIGIBLE / (slope + libm::sqrt(slope * slope + 2.0 * R::NEGLIGIBLE))
    } else {
        root - slope
    }
}
