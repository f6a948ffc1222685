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

use crate::brownian::{Bell, Shoulder, Survival};
use crate::price::setting::Setting;
use crate::price::strip::{End, Level, Strip};
use crate::special::Functions;

/// Value of a strip, by whichever form keeps its digits.
pub(crate) fn worth<R: Functions>(setting: &Setting<R>, strip: &Strip<R>) -> R {
    let sum = strip.closed(setting);
    if !setting.still && sum.cancelled() { value(setting, strip, None) } else { sum.value }
}

/// Value of a strip by its integral, and, if `barrier` is given, of its part on paths that never touch it: then the strip lies on
/// the spot's side of the barrier.
pub(crate) fn value<R: Functions>(setting: &Setting<R>, strip: &Strip<R>, barrier: Option<f64>) -> R {
    let deviation = setting.deviation;
    let (start, upwards, far) = match (&strip.lower, &strip.upper) {
        (Some(lower), None) => (lower, true, None),
        (None, Some(upper)) => (upper, false, None),
        // Of two ends, the strike is where a call or put vanishes.
        (Some(lower), Some(upper)) if lower.level == Level::Strike => (lower, true, Some(upper)),
        (Some(lower), Some(upper)) => (upper, false, Some(lower)),
        // The whole line has no ends whose tails could cancel.
        (None, None) => return strip.closed(setting).value,
    };
    let payoff = Payoff::new(strip, start);
    let shoulder = |end: &End<R>| {
        let score = if payoff.by_share { end.d1 } else { end.d2 };
        let per_share = if payoff.by_share { R::of(end.at) / R::of(start.at) } else { R::of(1.0) };
        Shoulder { from_peak: if upwards { -score } else { score }, height: end.density * per_share }
    };
    let weight =
        if payoff.by_share { start.share_weight(setting) / R::of(start.at) } else { start.cash_weight(setting) };
    let way = |from: f64, to: f64| R::ln_ratio(to, from).magnitude() / deviation;
    let far = far.map(|far| (shoulder(far), way(start.at, far.at)));
    let survival = barrier.map(|barrier| Survival {
        rate: way(setting.spot, barrier).times(2.0),
        // A strip with two ends runs from the strike to the barrier.
        from_start: if far.is_some() { None } else { Some(way(start.at, barrier)) },
    });
    let bell = Bell::new(shoulder(start), weight, far);
    bell.integral(survival, deviation.nearest(), |t| payoff.at(deviation * t))
}

/// What the strip pays at a distance from its end, in the measure that suits it.
struct Payoff<R> {
    /// Per share or in cash, at the end.
    at_end: R,
    /// By how much it grows from there to far away; 0 for a digital.
    growth: R,
    /// Whether the measure is the share's, and the payoff counted in shares.
    by_share: bool,
    /// Whether what it is worth at the end decays, counted so, as the spot grows.
    fades: bool,
}

impl<R: Functions> Payoff<R> {
    fn new(strip: &Strip<R>, end: &End<R>) -> Payoff<R> {
        let at = R::of(end.at);
        let zero = R::of(0.0);
        let cash = R::of(strip.line.cash);
        if strip.line.shares == 0.0 {
            Payoff { at_end: -cash, growth: zero, by_share: false, fades: false }
        } else if strip.line.cash == 0.0 {
            Payoff { at_end: at, growth: zero, by_share: true, fades: false }
        } else if strip.line.shares > 0.0 {
            Payoff { at_end: at - cash, growth: at, by_share: true, fades: true }
        } else {
            Payoff { at_end: -at - cash, growth: at, by_share: false, fades: false }
        }
    }

    /// At the logarithmic distance `u` from the end: `X - cash` per share going up, `-cash - X` going down.
    fn at(&self, u: R) -> R {
        if self.growth == R::of(0.0) {
            return self.at_end;
        }
        let fallen = (-u).expm1();
        let at_end = if self.fades { self.at_end * (R::of(1.0) + fallen) } else { self.at_end };
        at_end - self.growth * fallen
    }
}
