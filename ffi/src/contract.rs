//! One contract a call.

use floodmark::price;
use floodmark::terms::{Contract, Market, RebatePaid, TermSheet};
use floodmark::{Result, price::BarrierProfile, price::Greeks};

use crate::border::answer;

/// The value of a contract and its analytic sensitivities.
///
/// Units: in the currency of the spot; per 1.00 of spot, vol, rate and dividend, per year of time. theta and charm
/// run with the calendar: they are minus the derivative in expiry.
#[repr(C)]
#[derive(Clone, Copy, Debug)]
pub struct FloodmarkGreeks {
    /// The value V, bit for bit what floodmark_price gives.
    pub value: f64,
    /// dV / d spot
    pub delta: f64,
    /// d2V / d spot2
    pub gamma: f64,
    /// dV / d vol
    pub vega: f64,
    /// -dV / d expiry
    pub theta: f64,
    /// dV / d rate
    pub rho: f64,
    /// dV / d dividend
    pub dividend_rho: f64,
    /// d2V / d spot d vol
    pub vanna: f64,
    /// d2V / d vol2
    pub volga: f64,
    /// -d2V / d spot d expiry
    pub charm: f64,
    /// dV / d barrier
    pub barrier_delta: f64,
    /// dV / d strike
    pub strike_delta: f64,
}

impl From<Greeks> for FloodmarkGreeks {
    fn from(greeks: Greeks) -> FloodmarkGreeks {
        FloodmarkGreeks {
            value: greeks.value,
            delta: greeks.delta,
            gamma: greeks.gamma,
            vega: greeks.vega,
            theta: greeks.theta,
            rho: greeks.rho,
            dividend_rho: greeks.dividend_rho,
            vanna: greeks.vanna,
            volga: greeks.volga,
            charm: greeks.charm,
            barrier_delta: greeks.barrier_delta,
            strike_delta: greeks.strike_delta,
        }
    }
}

/// Where a contract stands against its barrier.
#[repr(C)]
#[derive(Clone, Copy, Debug)]
pub struct FloodmarkBarrierProfile {
    /// Probability, in the cash measure, that the barrier is touched by expiry: 1 if it is touched now, 0 for a
    /// contract without a barrier.
    pub touch_probability: f64,
    /// |ln(barrier / spot)| / (vol sqrt(expiry)), in standard deviations: 0 if touched now, infinite without a
    /// barrier or without volatility.
    pub distance: f64,
    /// The jump of value at the barrier at expiry, touched minus untouched: what a desk calls the gap. 0 for a
    /// contract without a barrier.
    pub gap: f64,
}

impl From<BarrierProfile> for FloodmarkBarrierProfile {
    fn from(profile: BarrierProfile) -> FloodmarkBarrierProfile {
        FloodmarkBarrierProfile {
            touch_probability: profile.touch_probability,
            distance: profile.distance,
            gap: profile.gap,
        }
    }
}

/// What is a contract worth now?
///
/// Formula: the expectation of what the contract pays, discounted at rate, under
/// dX = (rate - dividend) X dt + vol X dW, the barrier watched continuously.
///
/// Domain: contract is a FLOODMARK_CONTRACT code and rebate_paid a FLOODMARK_REBATE_PAID code (hit only for
/// knock-outs and one-touches); spot, strike and barrier positive and finite; rebate (the amount of a touch) finite
/// and at least 0; expiry from 0 to 10000; vol from 0 to 1000; rate and dividend from -1000 to 1000. A number that
/// the contract has no use for is ignored, NaN included: the strike of a touch, the barrier and rebate of a
/// vanilla. The barrier is touched when the spot is at or beyond it, now included. expiry 0 and vol 0 are limits.
///
/// Errors: the status of the first input out of its domain; FLOODMARK_STATUS_OVERFLOW where the answer is beyond
/// binary64; FLOODMARK_STATUS_NULL_POINTER if value is null. value is then left alone.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_price(
    contract: u8,
    spot: f64,
    strike: f64,
    barrier: f64,
    rebate: f64,
    rebate_paid: u8,
    expiry: f64,
    vol: f64,
    rate: f64,
    dividend: f64,
    value: *mut f64,
) -> i32 {
    let market = Market { spot, vol, rate, dividend };
    // SAFETY: the caller's promise on `value`.
    unsafe { answer(value, || price::price(&sheet(contract, strike, barrier, rebate, rebate_paid, expiry)?, &market)) }
}

/// What is a contract worth now, and how does that change with each input?
///
/// Formula: the derivatives of floodmark_price, analytic, in one pass with the value; see FloodmarkGreeks. A
/// derivative whose magnitude is beyond binary64 is infinite.
///
/// Domain and errors: as floodmark_price.
///
/// # Safety
///
/// greeks is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_greeks(
    contract: u8,
    spot: f64,
    strike: f64,
    barrier: f64,
    rebate: f64,
    rebate_paid: u8,
    expiry: f64,
    vol: f64,
    rate: f64,
    dividend: f64,
    greeks: *mut FloodmarkGreeks,
) -> i32 {
    let market = Market { spot, vol, rate, dividend };
    let call = || Ok(price::greeks(&sheet(contract, strike, barrier, rebate, rebate_paid, expiry)?, &market)?.into());
    // SAFETY: the caller's promise on `greeks`.
    unsafe { answer(greeks, call) }
}

/// How likely is the barrier touched, how far is it, and what is at stake there?
///
/// Formula: see FloodmarkBarrierProfile; the gap, with f the payoff at a final spot equal to the barrier (half,
/// where a digital's strike is the barrier), is rebate - f for a knock-out, f - rebate for a knock-in, rebate for a
/// one-touch, -rebate for a no-touch.
///
/// Domain and errors: as floodmark_price.
///
/// # Safety
///
/// profile is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_barrier_profile(
    contract: u8,
    spot: f64,
    strike: f64,
    barrier: f64,
    rebate: f64,
    rebate_paid: u8,
    expiry: f64,
    vol: f64,
    rate: f64,
    dividend: f64,
    profile: *mut FloodmarkBarrierProfile,
) -> i32 {
    let market = Market { spot, vol, rate, dividend };
    let call =
        || Ok(price::barrier_profile(&sheet(contract, strike, barrier, rebate, rebate_paid, expiry)?, &market)?.into());
    // SAFETY: the caller's promise on `profile`.
    unsafe { answer(profile, call) }
}

pub(crate) fn sheet(
    contract: u8,
    strike: f64,
    barrier: f64,
    rebate: f64,
    rebate_paid: u8,
    expiry: f64,
) -> Result<TermSheet> {
    let contract = Contract::from_code(contract)?;
    let rebate_paid = RebatePaid::from_code(rebate_paid, contract)?;
    Ok(TermSheet { contract, strike, barrier, rebate, rebate_paid, expiry })
}
