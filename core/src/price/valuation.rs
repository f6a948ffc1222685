//! The value of a contract, and its Greeks.

use crate::error::{Error, Result, Status};
use crate::num::DoubleDouble;
use crate::price::event::Levels;
use crate::price::legs::Leg;
use crate::price::sensitivity::Sensitivity;
use crate::price::setting::Setting;
use crate::price::{Greeks, reference_price};
use crate::special::{Functions, ln_ratio};
use crate::terms::{Direction, Market, TermSheet};

/// What a contract is worth now.
///
/// # Formula
///
/// The expectation of what the contract pays, discounted at `rate`, under
/// `dX = (rate - dividend) X dt + vol X dW`, the barrier watched continuously.
///
/// # Domain
///
/// As [`Market::checked`] and [`TermSheet::checked`] say. The barrier is touched when the spot is at or beyond
/// it, now included: a knock-out is then worth its rebate (discounted from expiry if it is paid there), a
/// knock-in is the vanilla, a one-touch its amount (likewise), a no-touch nothing.
/// At `expiry = 0` the value is what is paid now; at `vol = 0` the spot follows its forward curve; with a strike
/// exactly at the forward, digitals are then worth half, the limit of small volatility. Below a `vol` or a
/// `vol sqrt(expiry)` of 1e-35 the limit is taken.
///
/// # Errors
///
/// The field that is out of its domain, with its value; [`Status::Overflow`] where the value is beyond binary64.
///
/// # Source
///
/// Merton, Theory of rational option pricing, 1973, eq. 55 ff.; Reiner and Rubinstein, Breaking down the barriers,
/// 1991 (both from memory); forms for evaluation derived here.
///
/// # Example
///
/// ```
/// use floodmark::price::price;
/// use floodmark::terms::{Contract, Direction, Knock, Market, Payoff, TermSheet};
///
/// let market = Market { spot: 100.0, vol: 0.25, rate: 0.08, dividend: 0.04 };
/// let sheet = |knock| {
///     TermSheet::new(Contract::Knock(Direction::Down, knock, Payoff::Call), 0.5).strike(90.0).barrier(95.0)
/// };
/// let vanilla = TermSheet::new(Contract::Vanilla(Payoff::Call), 0.5).strike(90.0);
/// let sum = price(&sheet(Knock::In), &market)? + price(&sheet(Knock::Out), &market)?;
/// assert!((sum - price(&vanilla, &market)?).abs() < 1e-13);
/// # Ok::<(), floodmark::Error>(())
/// ```
pub fn price(sheet: &TermSheet, market: &Market) -> Result<f64> {
    let (legs, setting, levels) = parts::<f64>(sheet, market)?;
    settled(sheet, market, &setting, legs[0].value(&setting, &levels) + legs[1].value(&setting, &levels))
}

/// What a contract is worth now, and every sensitivity of that worth, analytic and in one pass.
///
/// # Formula
///
/// The derivatives of [`price`]'s, see [`Greeks`]. Within a limit that the value takes (expiry 0, vol 0, barrier
/// touched) they are the derivatives of the limit; where that has a kink, the second ones are stated as 0.
/// A derivative whose magnitude is beyond binary64 is infinite.
///
/// # Errors
///
/// As [`price`].
pub fn greeks(sheet: &TermSheet, market: &Market) -> Result<Greeks> {
    let (legs, setting, levels) = parts::<f64>(sheet, market)?;
    let sums = legs.map(|leg| leg.sensitivity(&setting, &levels));
    let value = settled(sheet, market, &setting, sums[0].value + sums[1].value)?;
    let mut sum = Sensitivity::none();
    for (leg, fast) in legs.into_iter().zip(sums) {
        // Where the terms of the derivatives cancel, there are digits enough to lose in double-double.
        sum = sum + if fast.cancelled() { exact(leg, sheet, market, &levels) } else { fast };
    }
    let greeks = sum.greeks(market.spot, sheet.barrier);
    Ok(Greeks { value, ..greeks })
}

/// Value and derivatives of a leg in double-double, rounded.
fn exact(leg: Leg, sheet: &TermSheet, market: &Market, levels: &Levels) -> Sensitivity<f64> {
    leg.sensitivity(&Setting::<DoubleDouble>::new(market, sheet.expiry), levels).nearest()
}

/// The value itself, or the reference path's where the fast path has none that is good enough.
///
/// In a deep tail the rounding of the score is magnified by its square, which the conditioning of the value
/// allows; but near a barrier a value is asked to 1e-13 whatever its conditioning.
fn settled(sheet: &TermSheet, market: &Market, setting: &Setting<f64>, value: f64) -> Result<f64> {
    /// Distance to the barrier in standard deviations.
    const NEAR: f64 = 0.05;
    /// Of the amounts at stake.
    const DEEP: f64 = 1e-25;
    let deep = value > 0.0 && value < DEEP * (1.0 + market.spot + sheet.rebate);
    let near = |barrier: f64| ln_ratio(barrier, market.spot).abs() < NEAR * setting.deviation;
    if deep && sheet.contract.direction().is_some() && near(sheet.barrier) {
        return reference_price(sheet, market);
    }
    representable(value, value)
}

pub(crate) fn parts<R: Functions>(sheet: &TermSheet, market: &Market) -> Result<([Leg; 2], Setting<R>, Levels)> {
    let (sheet, market) = (sheet.checked()?, market.checked()?);
    let levels = Levels {
        direction: sheet.contract.direction().unwrap_or(Direction::Up),
        strike: sheet.strike,
        barrier: sheet.barrier,
    };
    Ok((Leg::of(&sheet, market.spot), Setting::new(&market, sheet.expiry), levels))
}

pub(crate) fn representable<V>(value: f64, answer: V) -> Result<V> {
    if value.is_finite() { Ok(answer) } else { Err(Error { status: Status::Overflow, value }) }
}
