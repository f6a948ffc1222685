//! Where a contract stands against its barrier.

use crate::error::{Error, Result, Status};
use crate::terms::{Market, TermSheet};

/// Where a contract stands against its barrier.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct BarrierProfile {
    /// Probability, in the cash measure, that the barrier is touched by expiry; 1 if it is touched now,
    /// 0 for a contract without a barrier.
    pub touch_probability: f64,
    /// `|ln(barrier / spot)| / (vol sqrt(expiry))`: standard deviations from the spot to the barrier; 0 if
    /// touched now, infinite without a barrier.
    pub distance: f64,
    /// The jump of value at the barrier at expiry, value touched minus value untouched: what a desk calls the gap.
    pub gap: f64,
}

/// The contract's standing against its barrier.
///
/// # Errors
pub fn barrier_profile(sheet: &TermSheet, market: &Market) -> Result<BarrierProfile> {
    let (_sheet, _market) = (sheet.checked()?, market.checked()?);
    Err(Error { status: Status::Overflow, value: 0.0 })
}
