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
    let (end, upwards, far) = match (&strip.lower, &strip.upper) {
        (Some(lower), None) => (lower, true, None),
        (None, Some(upper)) => (upper, false, None),
        // Of two ends, the strike is where a call or put vanishes.
        (Some(lower), Some(upper)) if lower.level == Level::Strike => (lower, true, Some(upper)),
        (Some(lower), Some(upper)) => (upper, false, Some(lower)),
        // The whole line has no ends whose tails could cancel.
        (None, None) => return strip.closed(setting).value,
    };
    let length = far.map(|far| R::ln_ratio(far.at, end.at).magnitude() / deviation);
    let payoff = Payoff::new(strip, end);
    let bell = Bell::new(&payoff, end, upwards, far.zip(length));
    let survival = barrier.map(|barrier| Survival::new(setting, end, barrier, length));
    let rate = survival.as_ref().map_or(0.0, |survival| survival.rate.nearest());
    let finest = 4.0 / (1.0 + bell.slope.nearest() + rate + deviation.nearest());
    let mut sum = R::of(0.0);
    integrate(bell.from, bell.to, finest, WIDEST_PANEL, |u, weight| {
        let alive = survival.as_ref().map_or(R::of(1.0), |survival| survival.probability(&bell, u));
        sum = sum + weight * bell.at(u) * payoff.at(deviation * (bell.origin + u.times(bell.step))) * alive;
    });
    bell.height * sum
}

/// The Gaussian of the integral, `height exp(-slope u - u^2 / 2)` at the distance `origin + step u` from the end of
/// the strip, told from where it is highest: neither factor can overflow or lose digits to the other.
struct Bell<R> {
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
    fn new(payoff: &Payoff<R>, end: &End<R>, upwards: bool, far: Option<(&End<R>, R)>) -> Bell<R> {
        let zero = R::of(0.0);
        // Standard deviations from the peak to an end, outwards; the peak is within the strip where it is negative.
        let decay = |end: &End<R>| {
            let score = if payoff.by_share { end.d1 } else { end.d2 };
            if upwards { -score } else { score }
        };
        let per_share = |at: f64| if payoff.by_share { R::of(at) / R::of(end.at) } else { R::of(1.0) };
        let within = |reach: f64, length: Option<R>| match length {
            Some(length) if length.nearest() <= reach => length,
            _ => R::of(reach),
        };
        let length = far.map(|(_, length)| length);
        let whole = length.unwrap_or(zero);
        let slope = decay(end);
        if slope >= zero {
            let to = within(reach::<R>(slope.nearest()), length);
            return Bell { height: end.density, slope, origin: zero, to_far: whole, step: 1.0, from: zero, to };
        }
        if let Some((far, length)) = far {
            let slope = -decay(far);
            if slope >= zero {
                let to = within(reach::<R>(slope.nearest()), Some(length));
                let height = far.density * per_share(far.at);
                return Bell { height, slope, origin: length, to_far: zero, step: -1.0, from: zero, to };
            }
        }
        let half = reach::<R>(0.0);
        // By the far end's own score: the difference of two long ways would lose the short one between them.
        let to_far = far.map_or(zero, |(far, _)| decay(far));
        let weight = if payoff.by_share { end.share_weight / R::of(end.at) } else { end.cash_weight };
        Bell {
            height: R::inv_root_two_pi() * weight,
            slope: zero,
            origin: -slope,
            to_far,
            step: 1.0,
            from: slope.larger(R::of(-half)),
            to: within(half, far.map(|_| to_far)),
        }
    }

    fn at(&self, u: R) -> R {
        (-(self.slope * u) - u.square().times(0.5)).exp()
    }
}

/// How far `exp(-slope u - u^2 / 2)` reaches before it has lost all that matters.
fn reach<R: Functions>(slope: f64) -> f64 {
    2.0 * R::NEGLIGIBLE / (slope + libm::sqrt(slope * slope + 2.0 * R::NEGLIGIBLE))
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

/// The probability that a path which ends in the strip has not touched the barrier.
struct Survival<R> {
    /// Twice the barrier's distance from the spot, in standard deviations.
    rate: R,
    /// The barrier's distance from the end of the strip, in standard deviations.
    from_end: R,
    /// Whether it is the far end of the strip.
    far: bool,
}

impl<R: Functions> Survival<R> {
    fn new(setting: &Setting<R>, end: &End<R>, barrier: f64, length: Option<R>) -> Survival<R> {
        let distance = |from: f64| R::ln_ratio(barrier, from).magnitude() / setting.deviation;
        Survival { rate: distance(setting.spot).times(2.0), from_end: distance(end.at), far: length.is_some() }
    }

    fn probability(&self, bell: &Bell<R>, u: R) -> R {
        // A strip with two ends runs from the strike to the barrier.
        let step = u.times(bell.step);
        let way = if self.far { bell.to_far - step } else { self.from_end + bell.origin + step };
        -(-self.rate * way).expm1()
    }
}
