//! What every leg of one valuation shares: the log-normal law of the spot at expiry.

use crate::special::exp;
use crate::terms::Market;

/// Below this volatility, and below this total volatility `vol sqrt(expiry)`, the spot moves along its forward
/// curve: the formulas' squares of `1 / vol` would leave the range of binary64, while the only prices that
/// could tell the difference are those of a strike equal to the forward in every digit.
pub(crate) const STILL: f64 = 1e-35;

/// Market and horizon of one valuation, with the numbers that follow from them.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Setting {
    pub(crate) spot: f64,
    pub(crate) vol: f64,
    pub(crate) rate: f64,
    pub(crate) dividend: f64,
    pub(crate) expiry: f64,
    /// `rate - dividend`
    pub(crate) carry: f64,
    /// `sqrt(expiry)`
    pub(crate) root_expiry: f64,
    /// `vol sqrt(expiry)`
    pub(crate) deviation: f64,
    /// Whether the spot only moves along its forward curve.
    pub(crate) still: bool,
    /// What one unit of cash at expiry is worth now.
    pub(crate) bond: f64,
    /// What one share at expiry is worth now.
    pub(crate) share: f64,
}

impl Setting {
    pub(crate) fn new(market: &Market, expiry: f64) -> Setting {
        let Market { spot, vol, rate, dividend } = *market;
        let root_expiry = libm::sqrt(expiry);
        let deviation = vol * root_expiry;
        Setting {
            spot,
            vol,
            rate,
            dividend,
            expiry,
            carry: rate - dividend,
            root_expiry,
            deviation,
            still: vol < STILL || deviation < STILL,
            bond: exp(-rate * expiry),
            share: spot * exp(-dividend * expiry),
        }
    }

    /// The same law of the spot without discounting, so that a price of cash is a probability.
    pub(crate) fn undiscounted(market: &Market, expiry: f64) -> Setting {
        let carry = market.rate - market.dividend;
        Setting { carry, ..Setting::new(&Market { rate: 0.0, dividend: -carry, ..*market }, expiry) }
    }
}
