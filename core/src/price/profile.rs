//! Where a contract stands against its barrier.

use crate::error::Result;
use crate::price::event::{Event, Levels};
use crate::price::legs::touched_now;
use crate::price::setting::Setting;
use crate::special::ln_ratio;
use crate::terms::{Contract, Knock, Market, Payoff, TermSheet};

/// Where a contract stands against its barrier.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct BarrierProfile {
    /// Probability, in the cash measure, that the barrier is touched by expiry; 1 if it is touched now,
    /// 0 for a contract without a barrier.
    pub touch_probability: f64,
    /// `|ln(barrier / spot)| / (vol sqrt(expiry))`: standard deviations from the spot to the barrier; 0 if
    /// touched now, infinite without a barrier or without volatility.
    pub distance: f64,
    /// The jump of value at the barrier at expiry, value touched minus value untouched: what a desk calls the
    /// gap. 0 for a contract without a barrier.
    pub gap: f64,
}

/// Where a contract stands against its barrier: how likely it is touched, how far it is, what is at stake there.
///
/// # Formula
///
/// `touch_probability = P(max X >= barrier)` for a barrier above, `P(min X <= barrier)` below, under the law of
/// [`crate::price::price`]; `gap`, with `f` the payoff at `X = barrier` (half, where a digital's strike is the
/// barrier): `rebate - f` for a knock-out, `f - rebate` for a knock-in, `rebate` for a one-touch, `-rebate` for a
/// no-touch.
///
/// # Errors
///
/// As [`crate::price::price`].
pub fn barrier_profile(sheet: &TermSheet, market: &Market) -> Result<BarrierProfile> {
    let (sheet, market) = (sheet.checked()?, market.checked()?);
    let Some(direction) = sheet.contract.direction() else {
        return Ok(BarrierProfile { touch_probability: 0.0, distance: f64::INFINITY, gap: 0.0 });
    };
    let gap = match sheet.contract {
        Contract::Knock(_, Knock::Out, payoff) => sheet.rebate - at_expiry(payoff, sheet.strike, sheet.barrier),
        Contract::Knock(_, Knock::In, payoff) => at_expiry(payoff, sheet.strike, sheet.barrier) - sheet.rebate,
        Contract::OneTouch(_) => sheet.rebate,
        Contract::NoTouch(_) => -sheet.rebate,
        Contract::Vanilla(_) => 0.0,
    };
    if touched_now(&sheet, market.spot) {
        return Ok(BarrierProfile { touch_probability: 1.0, distance: 0.0, gap });
    }
    let levels = Levels { direction, strike: sheet.barrier, barrier: sheet.barrier };
    let setting = Setting::<f64>::undiscounted(&market, sheet.expiry);
    let touch_probability = levels.claim(&setting, Payoff::Cash, Event::Touched).worth(&setting).value.min(1.0);
    let distance = ln_ratio(sheet.barrier, market.spot).abs() / (market.vol * libm::sqrt(sheet.expiry));
    Ok(BarrierProfile { touch_probability, distance, gap })
}

/// What a payoff pays at expiry with the spot at `spot`.
fn at_expiry(payoff: Payoff, strike: f64, spot: f64) -> f64 {
    let above = if spot > strike {
        1.0
    } else if spot < strike {
        0.0
    } else {
        0.5
    };
    match payoff {
        Payoff::Call => (spot - strike).max(0.0),
        Payoff::Put => (strike - spot).max(0.0),
        Payoff::CashCall => above,
        Payoff::CashPut => 1.0 - above,
        Payoff::AssetCall => spot * above,
        Payoff::AssetPut => spot * (1.0 - above),
        Payoff::Cash => 1.0,
        Payoff::Asset => spot,
    }
}
