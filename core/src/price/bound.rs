//! How far a price can be from the value of its exact binary inputs: a first-order account of every rounding.
//!
//! Each quantity carries its error in units of 2^-52. The roundings of scores are followed through the Gaussian
//! they enter; what share and cash have in common (the density at an end is one number for both) is followed
//! once, through the jump of the payoff at that end, so that the bound shrinks with the payoff as the error does.

use crate::brownian::Form;
use crate::error::Result;
use crate::price::event::{Event, Levels};
use crate::price::legs::Pays;
use crate::price::setting::Setting;
use crate::price::strip::{End, Strip};
use crate::price::valuation::{parts, price};
use crate::price::{hit, positive};
use crate::special::{ln_ratio, mills_ratio};
use crate::terms::{Market, Payoff, TermSheet};

/// The units of the account, with a tenth for what is of second order.
const UNIT: f64 = 1.1 * f64::EPSILON;
/// Roundings of a tail besides those of its score and exponent: the exponential, Mills ratio, three products.
const TAIL: f64 = 4.0;
/// Roundings of an integral with a positive integrand besides those of its Gaussian: payoff, survival, nodes, sum.
const INTEGRAL: f64 = 16.0;
/// The steepest that the logarithm of an integral can be in the place of its Gaussian: half the Gaussian's reach.
const STEEPEST: f64 = 10.0;
/// Nothing is known of a density below the smallest positive number, and amounts multiply it.
const UNDERFLOW: f64 = 8.0 * f64::MIN_POSITIVE * f64::EPSILON;

/// A value with a bound on its error.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct BoundedPrice {
    /// The value, bit for bit what [`price`](fn@crate::price::price) returns.
    pub value: f64,
    /// The value of the exact binary inputs lies within this of `value`.
    pub error_bound: f64,
}

/// What a contract is worth now, and how far that can be from the value of the exact binary inputs.
///
/// # Formula
///
/// The sum over the terms of the value of what their roundings can amount to, to first order, with a tenth added.
/// It speaks of arithmetic alone: not of the model, nor of how well the inputs are known.
///
/// # Errors
///
/// As [`crate::price::price`].
///
/// # Example
///
/// ```
/// use floodmark::price::{bounded_price, reference_price};
/// use floodmark::terms::{Contract, Direction, Knock, Market, Payoff, TermSheet};
///
/// let market = Market { spot: 100.0, vol: 0.25, rate: 0.08, dividend: 0.04 };
/// let sheet = TermSheet::new(Contract::Knock(Direction::Up, Knock::Out, Payoff::Call), 0.5).strike(90.0).barrier(105.0);
/// let bounded = bounded_price(&sheet, &market)?;
/// let exact = reference_price(&sheet, &market)?;
/// assert!((bounded.value - exact).abs() <= bounded.error_bound);
/// assert!(bounded.error_bound < 1e-13);
/// # Ok::<(), floodmark::Error>(())
/// ```
pub fn bounded_price(sheet: &TermSheet, market: &Market) -> Result<BoundedPrice> {
    let value = price(sheet, market)?;
    let (legs, setting, levels) = parts::<f64>(sheet, market)?;
    let mut error = 0.5 * value;
    for leg in legs {
        if leg.amount == 0.0 {
            continue;
        }
        error += leg.value(&setting, &levels);
        error += leg.amount
            * match leg.pays {
                Pays::AtExpiry(payoff, event) => claim(&setting, &levels, payoff, event),
                Pays::AtHit => hit(&setting, &levels),
                Pays::Now => 0.0,
            };
    }
    let used = |used: bool, amount: f64| if used { amount } else { 0.0 };
    let amounts = 1.0
        + market.spot
        + used(sheet.contract.has_strike(), sheet.strike)
        + used(sheet.contract.direction().is_some(), sheet.barrier + sheet.rebate);
    Ok(BoundedPrice { value, error_bound: UNIT * error + UNDERFLOW * amounts })
}

/// Of a payoff under an event.
fn claim(setting: &Setting<f64>, levels: &Levels, payoff: Payoff, event: Event) -> f64 {
    let claim = levels.claim(setting, payoff, event);
    let worth = claim.worth(setting);
    if setting.still {
        let terms = |strip: &Strip<f64>| strip.closed(setting).terms;
        let exponent = (setting.rate.abs() + setting.dividend.abs()) * setting.expiry;
        return (2.0 + exponent) * claim.plain.as_ref().map_or(0.0, terms);
    }
    let (plain, mirror) = (Law::plain(setting), Law::image(setting, levels.barrier));
    if worth.integrated {
        return claim.plain.as_ref().map_or(0.0, |strip| plain.integral(setting, strip, worth.value, true));
    }
    let of = |strip: &Option<Strip<f64>>, law: &Law| {
        strip.as_ref().map_or(0.0, |strip| {
            let closed = strip.closed(setting);
            if event != Event::Untouched && closed.cancelled() {
                law.integral(setting, strip, positive::worth(setting, strip), false)
            } else {
                law.closed(setting, strip) + closed.terms
            }
        })
    };
    of(&claim.plain, &plain) + of(&claim.image, &mirror)
}

/// The law that a strip is taken in.
struct Law {
    /// For the image, the way from the spot to the barrier.
    to_barrier: Option<(f64, f64)>,
    /// Error of the exponents of the worth of cash and of a share.
    weight: f64,
}

/// Errors of what a tail at an end of a strip is made of.
struct EndError {
    /// Of its score, absolute.
    score: f64,
    /// Of its density, relative, besides that of the score.
    density: f64,
}

impl Law {
    fn plain(setting: &Setting<f64>) -> Law {
        let weight = 1.0 + 0.5 * (setting.rate.abs() + setting.dividend.abs()) * setting.expiry;
        Law { to_barrier: None, weight }
    }

    fn image(setting: &Setting<f64>, barrier: f64) -> Law {
        let to_barrier = ln_ratio(barrier, setting.spot);
        let plain = Law::plain(setting).weight;
        let power = 2.0 * setting.carry.abs() / setting.variance;
        let weight = 2.0 * plain + to_barrier.abs() * (4.0 * power + 3.0);
        Law { to_barrier: Some((to_barrier, barrier)), weight }
    }

    /// Of the score and the density at an end.
    fn end(&self, setting: &Setting<f64>, end: &End<f64>) -> EndError {
        let Setting { spot, rate, expiry, carry, deviation, .. } = *setting;
        let drift = (carry * expiry).abs();
        let discount = (rate * expiry).abs();
        // Logarithms and sum are good to 1, the deviation to 1, its reciprocal and the difference to a half.
        let score_of =
            |ways: f64, score: f64| (1.5 * ways + drift + 2.0 * score.abs() * deviation) / deviation + 1.5 * deviation;
        let spot_way = ln_ratio(spot, end.at).abs();
        match self.to_barrier {
            None => {
                let square = end.d2 * end.d2;
                EndError { score: score_of(spot_way, end.d2), density: square + 0.5 * discount }
            }
            Some((to_barrier, barrier)) => {
                let beyond = ln_ratio(barrier, end.at);
                let plain = (ln_ratio(spot, end.at) + carry * expiry) / deviation - 0.5 * deviation;
                let reflection = 2.0 * (to_barrier / deviation) * (beyond / deviation);
                let density =
                    plain.abs() * score_of(spot_way, plain) + plain * plain + 0.5 * discount + 6.0 * reflection;
                EndError { score: score_of(to_barrier.abs() + beyond.abs(), end.d2), density }
            }
        }
    }

    /// Of a strip by its closed form, besides the sum of its terms.
    fn closed(&self, setting: &Setting<f64>, strip: &Strip<f64>) -> f64 {
        let line = &strip.line;
        let mut error = 0.0;
        if strip.lower.is_none() && strip.upper.is_none() {
            return self.weight * strip.closed(setting).terms;
        }
        for end in [&strip.lower, &strip.upper].into_iter().flatten() {
            let errors = self.end(setting, end);
            let shares = line.shares.abs() * end.share.tail;
            let cash = line.cash.abs() * end.cash.tail;
            let tails = shares + cash;
            let jump = (line.shares * end.at - line.cash).abs();
            error += (errors.density + TAIL) * tails;
            error += if self.to_barrier.is_none() {
                // One density serves share and cash: a shift of the score moves them together.
                errors.score * (jump * end.density + setting.deviation * shares)
            } else {
                errors.score * tails
            };
        }
        // The weight takes part where a larger side does.
        let bulk = |score: fn(&End<f64>) -> f64, weight: fn(&End<f64>, &Setting<f64>) -> f64| match (
            &strip.lower,
            &strip.upper,
        ) {
            (Some(lower), None) if score(lower) > 0.0 => weight(lower, setting),
            (None, Some(upper)) if score(upper) <= 0.0 => weight(upper, setting),
            (Some(lower), Some(upper)) if score(lower) > 0.0 && score(upper) < 0.0 => weight(lower, setting),
            _ => 0.0,
        };
        error += self.weight * line.shares.abs() * bulk(|end| end.d1, End::share_weight);
        error += self.weight * line.cash.abs() * bulk(|end| end.d2, End::cash_weight);
        error
    }

    /// Of a strip by its integral, `survives` where only paths count that never touch.
    fn integral(&self, setting: &Setting<f64>, strip: &Strip<f64>, value: f64, survives: bool) -> f64 {
        let shares = strip.line.shares.abs();
        let score = |end: &End<f64>| if strip.line.shares > 0.0 { end.d1 } else { end.d2 };
        let ends = || {
            [(&strip.lower, 1.0), (&strip.upper, -1.0)]
                .into_iter()
                .filter_map(|(end, side)| Some((end.as_ref()?, side)))
        };
        let errors = || ends().map(|(end, side)| (end, side, self.end(setting, end)));
        let within = ends().all(|(end, side)| side * score(end) > 0.0);
        let mut relative = INTEGRAL + TAIL + self.weight;
        let mut absolute = 0.0;
        if within {
            let whole = strip.closed(setting).value;
            for (end, side, error) in errors() {
                // A shift of the Gaussian moves the shares' worth, and what is paid at the ends.
                let jump = (strip.line.shares * end.at - strip.line.cash).abs();
                let weight = || end.share_weight(setting);
                let share = if side > 0.0 { end.share.above(weight) } else { end.share.below(weight) };
                let moved = error.score * (jump * end.density + setting.deviation * shares * share);
                if !survives {
                    absolute += moved;
                } else if score(end).abs() < STEEPEST || whole <= 0.0 {
                    relative += STEEPEST * error.score;
                } else {
                    relative += moved / whole;
                }
            }
        } else {
            // The Gaussian's height is that of the density at the end nearer to its peak.
            relative += errors()
                .map(|(end, _, error)| error.density + (1.0 + score(end).abs()) * error.score)
                .fold(f64::INFINITY, f64::min);
        }
        value * relative + absolute
    }
}

/// Of cash at the hit.
fn hit(setting: &Setting<f64>, levels: &Levels) -> f64 {
    let Setting { variance, rate, expiry, carry, deviation, .. } = *setting;
    if setting.still {
        let value = hit::value(setting, levels);
        return value * (1.0 + 4.0 * rate.abs() * expiry);
    }
    let (passage, path) = hit::passage(setting, levels);
    let drift = path.drift;
    let drift_error = 0.5 * carry.abs() + 0.5 * variance + 0.5 * drift.abs();
    let square_error = 2.0 * drift.abs() * drift_error + drift * drift + 2.5 * rate.abs() * variance;
    let z = (path.distance - drift * expiry) / deviation;
    let z_error = (1.5 * path.distance + drift.abs() * expiry + drift_error * expiry) / deviation + 2.0 * z.abs();
    let density_error = z.abs() * z_error + z * z + 0.5 * (rate * expiry).abs();
    match passage.form {
        Form::Integral { .. } => {
            let tilt_error = (square_error + (drift * drift + 2.0 * rate * variance).abs()) * expiry / variance;
            let start = path.score * path.score;
            passage.value * (INTEGRAL + TAIL + density_error + tilt_error + 3.0 * (1.0 + start))
        }
        Form::Closed { root, terms: [near, far] } => {
            let root_error = 0.5 * square_error / root + root;
            let reach_error = (1.5 * path.distance + root * expiry + root_error * expiry) / deviation;
            let exponent = if drift > 0.0 {
                2.0 * rate.abs() / (drift + root) * (2.0 + (drift_error + root_error) / (drift + root))
            } else {
                (drift_error + root_error + root) / variance
            };
            // Mills ratio changes by at most 0.8 of its argument's change.
            let tail_error = density_error + TAIL + 0.8 * reach_error;
            let reach = (root * expiry - path.distance) / deviation;
            if reach > 0.0 {
                let tail = passage.density * mills_ratio(reach);
                near * (exponent * path.distance + 1.5) + (tail + far) * tail_error
            } else {
                (near + far) * tail_error
            }
        }
    }
}
