//! A value with its derivatives in the logarithm of the spot: the bundle that legs add up in.

use core::ops::{Add, Sub};

use crate::price::Greeks;
use crate::price::setting::Setting;
use crate::special::Functions;

/// A value and its derivatives; `x` is the logarithm of the spot, `T` the time to expiry.
///
/// In `x` the reflection of a claim at a barrier is linear (see [`Sensitivity::reflected`]) and the spot's
/// scale drops out. `bend` is kept instead of the second derivative, as it is gamma's without cancellation.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Sensitivity<R> {
    pub(crate) value: R,
    /// dV/dx
    pub(crate) slope: R,
    /// d²V/dx² - dV/dx, which is spot² gamma
    pub(crate) bend: R,
    /// dV/dvol
    pub(crate) vol: R,
    /// d²V/dvol²
    pub(crate) vol_vol: R,
    /// The magnitude of the terms that `vol_vol` is the sum of.
    pub(crate) vol_vol_terms: R,
    /// d²V/dx dvol
    pub(crate) slope_vol: R,
    /// dV/dT
    pub(crate) time: R,
    /// d²V/dx dT
    pub(crate) slope_time: R,
    /// dV/drate
    pub(crate) rate: R,
    /// dV/ddividend
    pub(crate) dividend: R,
    /// dV/dln(barrier)
    pub(crate) log_barrier: R,
    /// dV/dstrike
    pub(crate) strike: R,
    /// Of a strip: the worth of its shares and of its cash, whose difference the value is, and the part of the slope
    /// that the jumps at its ends make.
    pub(crate) share: R,
    pub(crate) cash: R,
    pub(crate) jumps: R,
    /// Whether the terms of the value cancelled, and with them those of the derivatives.
    pub(crate) delicate: bool,
}

impl<R: Functions> Sensitivity<R> {
    /// A sum with nothing in it.
    pub(crate) fn none() -> Sensitivity<R> {
        let zero = R::of(0.0);
        Sensitivity {
            value: zero,
            slope: zero,
            bend: zero,
            vol: zero,
            vol_vol: zero,
            vol_vol_terms: zero,
            slope_vol: zero,
            time: zero,
            slope_time: zero,
            rate: zero,
            dividend: zero,
            log_barrier: zero,
            strike: zero,
            share: zero,
            cash: zero,
            jumps: zero,
            delicate: false,
        }
    }

    /// A claim `U` seen in the mirror of the barrier: `(spot / barrier)^p U(barrier^2 / spot)` with
    /// `p = 1 - 2 carry / vol^2`, which solves the Black-Scholes equation wherever `U` does.
    ///
    /// `self` is `U` with its derivatives at the reflected spot, every number already multiplied by the power:
    /// the product exists where the power alone overflows. Shares and cash are mirrored each with its own power,
    /// `p - 1` and `p`, as what a share loses by one it gains by the spot.
    pub(crate) fn reflected(self, setting: &Setting<R>, barrier: f64) -> Sensitivity<R> {
        let Setting { spot, vol, rate, dividend, expiry, carry, variance, .. } = *setting;
        let Sensitivity { share, cash, jumps, .. } = self;
        let y = R::ln_ratio(spot, barrier);
        let one = R::of(1.0);
        let by_share = carry.times(-2.0) / variance;
        let by_cash = one + by_share;
        let tilt_rate = y.times(-2.0) / variance;
        let power_vol = carry.times(4.0) / (variance * vol);
        let tilt = power_vol * y;
        let slope = by_share * share - by_cash * cash - jumps;
        let vol_vol = [(tilt - R::of(3.0) / vol) * tilt * self.value, tilt.times(2.0) * self.vol, self.vol_vol];
        let bend = by_share * ((by_share - one) * share - by_cash * cash - jumps.times(2.0)) + self.bend;
        let spread = (vol / expiry * self.slope_vol).times(0.5);
        let half_variance = variance.times(0.5);
        Sensitivity {
            value: self.value,
            slope,
            bend,
            vol: tilt * self.value + self.vol,
            vol_vol: vol_vol[0] + vol_vol[1] + vol_vol[2],
            vol_vol_terms: vol_vol[0].magnitude() + vol_vol[1].magnitude() + self.vol_vol_terms,
            slope_vol: power_vol * self.value + tilt * slope + by_cash * self.vol - self.slope_vol,
            time: self.time,
            slope_time: by_cash * (rate * cash) - by_share * (dividend * share)
                + (by_cash * carry + dividend) * jumps
                + (by_cash * half_variance - carry) * self.bend
                - spread,
            rate: tilt_rate * self.value + self.rate,
            dividend: self.dividend - tilt_rate * self.value,
            log_barrier: (one - by_share) * share + by_cash * cash + jumps.times(2.0) + self.log_barrier,
            strike: self.strike,
            share,
            cash,
            jumps,
            delicate: self.delicate,
        }
    }

    /// Every number rounded to binary64.
    pub(crate) fn nearest(self) -> Sensitivity<f64> {
        Sensitivity {
            value: self.value.nearest(),
            slope: self.slope.nearest(),
            bend: self.bend.nearest(),
            vol: self.vol.nearest(),
            vol_vol: self.vol_vol.nearest(),
            vol_vol_terms: self.vol_vol_terms.nearest(),
            slope_vol: self.slope_vol.nearest(),
            time: self.time.nearest(),
            slope_time: self.slope_time.nearest(),
            rate: self.rate.nearest(),
            dividend: self.dividend.nearest(),
            log_barrier: self.log_barrier.nearest(),
            strike: self.strike.nearest(),
            share: self.share.nearest(),
            cash: self.cash.nearest(),
            jumps: self.jumps.nearest(),
            delicate: self.delicate,
        }
    }

    /// The sum with another, or the difference.
    fn combined(self, other: Sensitivity<R>, with: impl Fn(R, R) -> R) -> Sensitivity<R> {
        Sensitivity {
            value: with(self.value, other.value),
            slope: with(self.slope, other.slope),
            bend: with(self.bend, other.bend),
            vol: with(self.vol, other.vol),
            vol_vol: with(self.vol_vol, other.vol_vol),
            vol_vol_terms: self.vol_vol_terms + other.vol_vol_terms,
            slope_vol: with(self.slope_vol, other.slope_vol),
            time: with(self.time, other.time),
            slope_time: with(self.slope_time, other.slope_time),
            rate: with(self.rate, other.rate),
            dividend: with(self.dividend, other.dividend),
            log_barrier: with(self.log_barrier, other.log_barrier),
            strike: with(self.strike, other.strike),
            share: with(self.share, other.share),
            cash: with(self.cash, other.cash),
            jumps: with(self.jumps, other.jumps),
            delicate: self.delicate || other.delicate,
        }
    }

    /// With every number multiplied by an amount, which is not negative.
    pub(crate) fn times(self, amount: f64) -> Sensitivity<R> {
        let scaled = self.combined(self, |number, _| number.times(amount));
        Sensitivity { vol_vol_terms: self.vol_vol_terms.times(amount), ..scaled }
    }

    /// Whether the derivatives have lost digits: with the value's, or (the one that does so alone, where the
    /// forward nears the barrier under a small volatility) volga's.
    pub(crate) fn cancelled(&self) -> bool {
        /// Volga passes through 0 on its way; only a deep loss shows that its terms cancel for another reason.
        const DEEP: f64 = 1.0 / 128.0;
        self.delicate || self.vol_vol.magnitude() < self.vol_vol_terms.times(DEEP)
    }

    /// In the trade's units.
    pub(crate) fn greeks(self, spot: f64, barrier: f64) -> Greeks {
        let [spot, barrier, zero] = [spot, barrier, 0.0].map(R::of);
        let per_barrier = if self.log_barrier == zero { self.log_barrier } else { self.log_barrier / barrier };
        Greeks {
            value: self.value.nearest(),
            delta: (self.slope / spot).nearest(),
            gamma: (self.bend / spot / spot).nearest(),
            vega: self.vol.nearest(),
            theta: (zero - self.time).nearest(),
            rho: self.rate.nearest(),
            dividend_rho: self.dividend.nearest(),
            vanna: (self.slope_vol / spot).nearest(),
            volga: self.vol_vol.nearest(),
            charm: ((zero - self.slope_time) / spot).nearest(),
            barrier_delta: per_barrier.nearest(),
            strike_delta: self.strike.nearest(),
        }
    }
}

impl<R: Functions> Add for Sensitivity<R> {
    type Output = Sensitivity<R>;

    fn add(self, other: Sensitivity<R>) -> Sensitivity<R> {
        self.combined(other, |a, b| a + b)
    }
}

impl<R: Functions> Sub for Sensitivity<R> {
    type Output = Sensitivity<R>;

    fn sub(self, other: Sensitivity<R>) -> Sensitivity<R> {
        self.combined(other, |a, b| a - b)
    }
}
