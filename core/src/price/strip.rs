//! A claim that pays a straight line in the spot at expiry, if the spot ends in a strip.
//!
//! On paper: `shares X - cash` if `lower < X < upper` is worth
//! `shares S e^(-qT) [N(d1)] - cash e^(-rT) [N(d2)]`, the brackets being differences between the two ends.
//! The code departs from it in taking each bracket on the side where its tails are small, and in writing every
//! derivative as what the slope of the line and its jump at each end contribute, so that the Gaussians of the
//! share and of the cash, equal on paper, never have to cancel.

use crate::brownian::{Edge, density};
use crate::price::sensitivity::Sensitivity;
use crate::price::setting::Setting;
use crate::special::{exp, ln_ratio};

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

/// One end of a strip: the worth of cash and of a share above and below it, and the density there.
#[derive(Clone, Copy, Debug)]
pub(crate) struct End {
    level: Level,
    at: f64,
    cash: Edge<f64>,
    share: Edge<f64>,
    /// `e^(-rT) phi(d2)`; the share's is `at` times this.
    density: f64,
    d1: f64,
    d2: f64,
}

impl End {
    /// In the law of the spot at expiry; `tie` is the part of a mass lying exactly on the end that counts as above.
    pub(crate) fn plain(setting: &Setting, level: Level, at: f64, tie: f64) -> End {
        let distance = ln_ratio(setting.spot, at) + setting.carry * setting.expiry;
        if setting.still {
            return End::still(setting, level, at, distance, tie);
        }
        let d2 = distance / setting.deviation - 0.5 * setting.deviation;
        let density = density(-0.5 * d2 * d2 - setting.rate * setting.expiry);
        End::new(setting, level, at, d2, density, [setting.bond, setting.share])
    }

    /// In the image of that law which the barrier casts: the law from `barrier^2 / spot`, weighted by
    /// `(barrier / spot)^(2 carry / vol^2 - 1)`. `at` lies on the spot's side of the barrier or on it.
    pub(crate) fn image(setting: &Setting, barrier: f64, level: Level, at: f64) -> End {
        let Setting { spot, vol, rate, dividend, expiry, carry, deviation, .. } = *setting;
        let to_barrier = ln_ratio(barrier, spot);
        let beyond = ln_ratio(barrier, at);
        let plain = (ln_ratio(spot, at) + carry * expiry) / deviation - 0.5 * deviation;
        let d2 = (to_barrier + beyond + carry * expiry) / deviation - 0.5 * deviation;
        let density =
            density(-0.5 * plain * plain - rate * expiry - 2.0 * (to_barrier / deviation) * (beyond / deviation));
        let power = 2.0 * carry / (vol * vol);
        let bond = exp(to_barrier * (power - 1.0) - rate * expiry);
        let share = spot * exp(to_barrier * (power + 1.0) - dividend * expiry);
        End::new(setting, level, at, d2, density, [bond, share])
    }

    fn new(setting: &Setting, level: Level, at: f64, d2: f64, density: f64, [bond, share]: [f64; 2]) -> End {
        let d1 = d2 + setting.deviation;
        End {
            level,
            at,
            cash: Edge::new(d2, density, bond),
            share: Edge::new(d1, at * density, share),
            density,
            d1,
            d2,
        }
    }

    /// Without volatility all mass is at the forward.
    fn still(setting: &Setting, level: Level, at: f64, distance: f64, tie: f64) -> End {
        let above = if distance > 0.0 {
            1.0
        } else if distance < 0.0 {
            0.0
        } else {
            tie
        };
        let edge = |total: f64| Edge { above: total * above, below: total * (1.0 - above) };
        End { level, at, cash: edge(setting.bond), share: edge(setting.share), density: 0.0, d1: 0.0, d2: 0.0 }
    }
}

/// A straight line paid in a strip; an end that is not there is at 0 or at infinity.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Strip {
    pub(crate) line: Line,
    pub(crate) lower: Option<End>,
    pub(crate) upper: Option<End>,
}

impl Strip {
    /// Worth of the shares and of the cash.
    fn legs(&self, setting: &Setting) -> (f64, f64) {
        let (share, cash) = match (&self.lower, &self.upper) {
            (None, None) => (setting.share, setting.bond),
            (Some(lower), None) => (lower.share.above, lower.cash.above),
            (None, Some(upper)) => (upper.share.below, upper.cash.below),
            (Some(lower), Some(upper)) => {
                (Edge::between(lower.share, upper.share), Edge::between(lower.cash, upper.cash))
            }
        };
        // A leg that is not held must not turn an overflow of its worth into NaN.
        let held = |amount: f64, worth: f64| if amount == 0.0 { 0.0 } else { amount * worth };
        (held(self.line.shares, share), held(self.line.cash, cash))
    }

    pub(crate) fn value(&self, setting: &Setting) -> f64 {
        let (share, cash) = self.legs(setting);
        share - cash
    }

    pub(crate) fn sensitivity(&self, setting: &Setting) -> Sensitivity {
        let Setting { vol, rate, dividend, expiry, carry, root_expiry, deviation, .. } = *setting;
        let (share, cash) = self.legs(setting);
        let mut sum = Sensitivity { value: share - cash, ..Sensitivity::default() };
        let mut jumps = 0.0;
        for (end, sign) in [(&self.lower, 1.0), (&self.upper, -1.0)] {
            let Some(end) = end else { continue };
            if end.density == 0.0 {
                continue;
            }
            let held = self.line.shares * end.at;
            let jump = held - self.line.cash;
            let per_deviation = sign * end.density / deviation;
            let per_vol = sign * end.density * root_expiry;
            let curve = held - jump * end.d1 / deviation;
            jumps += per_deviation * jump;
            sum.bend += per_deviation * curve;
            sum.slope_vol -= per_vol * (end.d2 / deviation * curve + jump / (deviation * deviation));
            sum.vol_vol += per_vol * (end.d1 * end.d2 * curve + jump * (end.d1 + end.d2) / deviation) / vol;
            match end.level {
                Level::Strike => sum.strike -= per_deviation * jump / end.at,
                Level::Barrier => sum.log_barrier -= per_deviation * jump,
            }
        }
        sum.slope = share + jumps;
        sum.vol = vol * expiry * sum.bend;
        sum.time = 0.5 * vol * vol * sum.bend + rate * cash - dividend * share + carry * jumps;
        let spread = if setting.still { 0.0 } else { 0.5 * vol / expiry * sum.slope_vol };
        sum.slope_time = spread + carry * sum.bend - dividend * sum.slope;
        sum.rate = expiry * (cash + jumps);
        sum.dividend = -expiry * sum.slope;
        if self.line.cash_strike != 0.0 {
            sum.strike -= self.line.cash_strike * (cash / self.line.cash);
        }
        sum
    }
}
