//! What the market says today.

use crate::error::{Error, Result, Status};

/// The largest volatility that is taken, per square root of a year (100,000 %).
pub const MAX_VOL: f64 = 1000.0;
/// The largest magnitude of a rate or a dividend yield that is taken, per year.
pub const MAX_RATE: f64 = 1000.0;

/// Spot, volatility and yields; the underlying follows
/// `dX = (rate - dividend) X dt + vol X dW`, the model of Black, Scholes (1973) and Merton (1973).
///
/// # Units
///
/// `vol` per square root of a year; `rate` and `dividend` per year, continuously compounded.
/// `dividend` is the foreign rate for a currency pair.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Market {
    /// Price of the underlying now.
    pub spot: f64,
    /// Volatility.
    pub vol: f64,
    /// Interest rate.
    pub rate: f64,
    /// Dividend yield.
    pub dividend: f64,
}

impl Market {
    /// The market itself, if every number is within its domain.
    ///
    /// # Errors
    ///
    /// [`Status::Spot`], [`Status::Vol`], [`Status::Rate`], [`Status::Dividend`] with the value.
    pub fn checked(self) -> Result<Market> {
        let refuse = |status, value| Err(Error { status, value });
        if !(self.spot > 0.0 && self.spot <= f64::MAX) {
            return refuse(Status::Spot, self.spot);
        }
        if !(self.vol >= 0.0 && self.vol <= MAX_VOL) {
            return refuse(Status::Vol, self.vol);
        }
        if !(self.rate >= -MAX_RATE && self.rate <= MAX_RATE) {
            return refuse(Status::Rate, self.rate);
        }
        if !(self.dividend >= -MAX_RATE && self.dividend <= MAX_RATE) {
            return refuse(Status::Dividend, self.dividend);
        }
        Ok(self)
    }
}
