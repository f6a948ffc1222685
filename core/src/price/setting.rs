//! What every leg of one valuation shares: the log-normal law of the spot at expiry.

use crate::special::Functions;
use crate::terms::Market;

/// Below this volatility, and below this total volatility `vol sqrt(expiry)`, the spot moves along its forward
/// curve: the formulas' squares of `1 / vol` would leave the range of binary64, while the only prices that
/// could tell the difference are those of a strike equal to the forward in every digit.
pub(crate) const STILL: f64 = 1e-35;

/// Market and horizon of one valuation, with the numbers that follow from them.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Setting<R> {
    pub(crate) spot: f64,
    pub(crate) vol: R,
    pub(crate) rate: R,
    pub(crate) dividend: R,
    pub(crate) expiry: R,
    /// `rate - dividend`
    pub(crate) carry: R,
    /// `vol^2`
    pub(crate) variance: R,
    /// `sqrt(expiry)`
    pub(crate) root_expiry: R,
    /// `vol sqrt(expiry)`
    pub(crate) deviation: R,
    /// Whether the spot only moves along its forward curve.
    pub(crate) still: bool,
    /// What one unit of cash at expiry is worth now.
    pub(crate) bond: R,
    /// What one share at expiry is worth now.
    pub(crate) share: R,
}

impl<R: Functions> Setting<R> {
    pub(crate) fn new(market: &Market, expiry: f64) -> Setting<R> {
        let [rate, dividend] = [market.rate, market.dividend].map(R::of);
        Setting::with(market, expiry, rate, dividend, rate - dividend)
    }

    /// The same law of the spot without discounting, so that a price of cash is a probability.
    pub(crate) fn undiscounted(market: &Market, expiry: f64) -> Setting<R> {
        let carry = R::of(market.rate) - R::of(market.dividend);
        Setting::with(market, expiry, R::of(0.0), -carry, carry)
    }

    fn with(market: &Market, expiry: f64, rate: R, dividend: R, carry: R) -> Setting<R> {
        let [vol, expiry] = [market.vol, expiry].map(R::of);
        let root_expiry = expiry.sqrt();
        let deviation = vol * root_expiry;
        let still = R::of(STILL);
        Setting {
            spot: market.spot,
            vol,
            rate,
            dividend,
            expiry,
            carry,
            variance: vol.square(),
            root_expiry,
            deviation,
            still: vol < still || deviation < still,
            bond: (-rate * expiry).exp(),
            share: (-dividend * expiry).exp().times(market.spot),
        }
    }
}
