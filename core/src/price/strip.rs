//! A claim that pays a straight line in the spot at expiry, if the spot ends in a strip.
//!
//! On paper: `shares X - cash` if `lower < X < upper` is worth
//! `shares S e^(-qT) [N(d1)] - cash e^(-rT) [N(d2)]`, the brackets being differences between the two ends.
//! The code departs from it in taking each bracket on the side where its tails are small, and in writing every
//! derivative as what the slope of the line and its jump at each end contribute, so that the Gaussians of the
//! share and of the cash, equal on paper, never have to cancel. Where the value itself cancels, it is integrated
//! ([`crate::price::positive`]).

use crate::brownian::{Edge, density};
use crate::price::sensitivity::Sensitivity;
use crate::price::setting::Setting;
use crate::special::Functions;

/// `shares X - cash`, and how `cash` moves with the strike.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Line {
    pub(crate) shares: f64,
    pub(crate) cash: f64,
    /// d cash / d strike
    pub(crate) cash_strike: f64,
}

/// What an end of a strip moves with.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) enum Level {
    Strike,
    Barrier,
}

/// Where an end lies.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Place<R> {
    pub(crate) level: Level,
    pub(crate) at: f64,
    /// `ln(spot / at)`
    pub(crate) from_spot: R,
    /// `ln(barrier / at)`
    pub(crate) from_barrier: R,
}

/// One end of a strip: the worth of cash and of a share above and below it, and the density there.
#[derive(Clone, Copy, Debug)]
pub(crate) struct End<R> {
    pub(crate) level: Level,
    pub(crate) at: f64,
    pub(crate) cash: Edge<R>,
    pub(crate) share: Edge<R>,
    /// `e^(-rT) phi(d2)`; the share's is `at` times this.
    pub(crate) density: R,
    pub(crate) d1: R,
    pub(crate) d2: R,
    /// In the image law, the exponents of the weights of cash and of a share.
    mirrored: Option<[R; 2]>,
}

impl<R: Functions> End<R> {
    /// In the law of the spot at expiry; `tie` is the part of a mass lying exactly on the end that counts as above.
    pub(crate) fn plain(setting: &Setting<R>, place: Place<R>, tie: f64) -> End<R> {
        let distance = place.from_spot + setting.carry * setting.expiry;
        if setting.still {
            return End::still(setting, place, distance, tie);
        }
        let d2 = distance / setting.deviation - setting.deviation.times(0.5);
        let density = density(d2.square().times(-0.5) - setting.rate * setting.expiry);
        End::new(setting, place, d2, density, None)
    }

    /// In the image of that law which the barrier casts: the law from `barrier^2 / spot`, weighted by
    /// `(barrier / spot)^(2 carry / vol^2 - 1)`. The place is on the spot's side of the barrier or on it, and the
    /// barrier `to_barrier` from the spot.
    pub(crate) fn image(setting: &Setting<R>, place: Place<R>, to_barrier: R) -> End<R> {
        let Setting { rate, dividend, expiry, carry, variance, deviation, .. } = *setting;
        let half = deviation.times(0.5);
        let plain = (place.from_spot + carry * expiry) / deviation - half;
        let d2 = (to_barrier + place.from_barrier + carry * expiry) / deviation - half;
        let reflection = (to_barrier / deviation) * (place.from_barrier / deviation);
        let density = density(plain.square().times(-0.5) - rate * expiry - reflection.times(2.0));
        let power = carry.times(2.0) / variance;
        let one = R::of(1.0);
        let exponents = [to_barrier * (power - one) - rate * expiry, to_barrier * (power + one) - dividend * expiry];
        End::new(setting, place, d2, density, Some(exponents))
    }

    fn new(setting: &Setting<R>, place: Place<R>, d2: R, density: R, mirrored: Option<[R; 2]>) -> End<R> {
        let d1 = d2 + setting.deviation;
        let Place { level, at, .. } = place;
        let cash = Edge::new(d2, density);
        let share = Edge::new(d1, density.times(at));
        End { level, at, cash, share, density, d1, d2, mirrored }
    }

    /// Without volatility all mass is at the forward.
    fn still(setting: &Setting<R>, place: Place<R>, distance: R, tie: f64) -> End<R> {
        let zero = R::of(0.0);
        let above = if distance > zero {
            1.0
        } else if distance < zero {
            0.0
        } else {
            tie
        };
        let edge = |total: R| Edge { tail: total.times(above.min(1.0 - above)), low: above > 0.5 };
        let (cash, share) = (edge(setting.bond), edge(setting.share));
        End { level: place.level, at: place.at, cash, share, density: zero, d1: zero, d2: zero, mirrored: None }
    }

    /// Worth of cash wherever the spot ends.
    pub(crate) fn cash_weight(&self, setting: &Setting<R>) -> R {
        cash_weight(setting, self.mirrored)
    }

    /// Worth of a share wherever the spot ends.
    pub(crate) fn share_weight(&self, setting: &Setting<R>) -> R {
        share_weight(setting, self.mirrored)
    }
}

fn cash_weight<R: Functions>(setting: &Setting<R>, mirrored: Option<[R; 2]>) -> R {
    mirrored.map_or(setting.bond, |[cash, _]| cash.exp())
}

fn share_weight<R: Functions>(setting: &Setting<R>, mirrored: Option<[R; 2]>) -> R {
    mirrored.map_or(setting.share, |[_, share]| share.exp().times(setting.spot))
}

/// A strip by what its ends are.
pub(crate) type Ends = (Option<Level>, Option<Level>);

/// A straight line paid in a strip; an end that is not there is at 0 or at infinity.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Strip<R> {
    pub(crate) line: Line,
    pub(crate) lower: Option<End<R>>,
    pub(crate) upper: Option<End<R>>,
}

/// A value from a closed form, and the magnitude of the terms that it is the sum of.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Sum<R> {
    pub(crate) value: R,
    pub(crate) terms: R,
}

impl<R: Functions> Sum<R> {
    /// Whether the terms have cancelled so far that the value needs another form.
    pub(crate) fn cancelled(self) -> bool {
        self.value < self.terms.times(R::CANCELLED)
    }

    /// Whether they have cancelled so far that what is derived from them needs more digits.
    pub(crate) fn delicate(self) -> bool {
        self.value.magnitude() < self.terms.times(R::DELICATE)
    }
}

impl<R: Functions> Strip<R> {
    pub(crate) fn cut(line: Line, ends: Ends, end: impl Fn(Level) -> End<R>) -> Strip<R> {
        Strip { line, lower: ends.0.map(&end), upper: ends.1.map(&end) }
    }

    /// Worth of the shares and of the cash, each with the magnitude of its terms.
    fn legs(&self, setting: &Setting<R>) -> [Sum<R>; 2] {
        let one = |worth: R| (worth, worth);
        let share_weight = |end: &End<R>| end.share_weight(setting);
        let cash_weight = |end: &End<R>| end.cash_weight(setting);
        let (share, cash) = match (&self.lower, &self.upper) {
            (None, None) => (one(setting.share), one(setting.bond)),
            (Some(end), None) => (one(end.share.above(|| share_weight(end))), one(end.cash.above(|| cash_weight(end)))),
            (None, Some(end)) => (one(end.share.below(|| share_weight(end))), one(end.cash.below(|| cash_weight(end)))),
            (Some(lower), Some(upper)) => {
                // The roundings of two scores in one tail differ, and weigh with the scores' squares.
                let weighed = |(worth, terms): (R, R), a: R, b: R| {
                    let nearer = a.square().smaller(b.square()).times(0.5);
                    (worth, if a * b > R::of(0.0) { terms * (R::of(1.0) + nearer) } else { terms })
                };
                let shares = Edge::between(lower.share, upper.share, || share_weight(lower));
                let cash = Edge::between(lower.cash, upper.cash, || cash_weight(lower));
                (weighed(shares, lower.d1, upper.d1), weighed(cash, lower.d2, upper.d2))
            }
        };
        // A leg that is not held must not turn an overflow of its worth into NaN.
        let held = |amount: f64, (value, terms): (R, R)| {
            if amount == 0.0 {
                Sum { value: R::of(0.0), terms: R::of(0.0) }
            } else {
                Sum { value: value.times(amount), terms: terms.times(amount.abs()) }
            }
        };
        [held(self.line.shares, share), held(self.line.cash, cash)]
    }

    /// The value by the closed form.
    pub(crate) fn closed(&self, setting: &Setting<R>) -> Sum<R> {
        let [share, cash] = self.legs(setting);
        Sum { value: share.value - cash.value, terms: share.terms + cash.terms }
    }

    /// The derivatives, with the value by the closed form.
    pub(crate) fn sensitivity(&self, setting: &Setting<R>) -> Sensitivity<R> {
        let Setting { vol, rate, dividend, expiry, carry, variance, root_expiry, deviation, .. } = *setting;
        let [share, cash] = self.legs(setting);
        // Share and cash may cancel each other in the value, but not in its derivatives; the ends of a narrow strip
        // cancel in both.
        let delicate = share.delicate() || cash.delicate();
        let (share, cash) = (share.value, cash.value);
        let zero = R::of(0.0);
        let mut sum = Sensitivity { value: share - cash, delicate, ..Sensitivity::none() };
        let mut jumps = zero;
        for (end, sign) in [(&self.lower, 1.0), (&self.upper, -1.0)] {
            let Some(end) = end else { continue };
            if end.density == zero {
                continue;
            }
            let held = R::of(end.at).times(self.line.shares);
            let jump = held - R::of(self.line.cash);
            let density = end.density.times(sign);
            let per_deviation = density / deviation;
            let per_vol = density * root_expiry;
            let curve = held - jump * end.d1 / deviation;
            jumps = jumps + per_deviation * jump;
            sum.bend = sum.bend + per_deviation * curve;
            sum.slope_vol = sum.slope_vol - per_vol * (end.d2 / deviation * curve + jump / deviation.square());
            let vol_vol = per_vol * (end.d1 * end.d2 * curve + jump * (end.d1 + end.d2) / deviation) / vol;
            sum.vol_vol = sum.vol_vol + vol_vol;
            sum.vol_vol_terms = sum.vol_vol_terms + vol_vol.magnitude();
            match end.level {
                Level::Strike => sum.strike = sum.strike - per_deviation * jump / R::of(end.at),
                Level::Barrier => sum.log_barrier = sum.log_barrier - per_deviation * jump,
            }
        }
        (sum.share, sum.cash, sum.jumps) = (share, cash, jumps);
        sum.slope = share + jumps;
        sum.vol = vol * expiry * sum.bend;
        sum.time = (variance * sum.bend).times(0.5) + rate * cash - dividend * share + carry * jumps;
        let spread = if setting.still { zero } else { (vol / expiry * sum.slope_vol).times(0.5) };
        sum.slope_time = spread + carry * sum.bend - dividend * sum.slope;
        sum.rate = expiry * (cash + jumps);
        sum.dividend = -expiry * sum.slope;
        if self.line.cash_strike != 0.0 {
            sum.strike = sum.strike - cash.times(self.line.cash_strike) / R::of(self.line.cash);
        }
        sum
    }
}
