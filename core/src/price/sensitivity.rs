//! A value with its derivatives in the logarithm of the spot: the bundle that legs add up in.

use core::ops::{Add, Mul};

use crate::price::Greeks;
use crate::price::setting::Setting;
use crate::special::ln_ratio;

/// A value and its derivatives; `x` is the logarithm of the spot, `T` the time to expiry.
///
/// In `x` the reflection of a claim at a barrier is linear (see [`Sensitivity::reflected`]) and the spot's
/// scale drops out. `bend` is kept instead of the second derivative, as it is gamma's without cancellation.
#[derive(Clone, Copy, Debug, Default)]
pub(crate) struct Sensitivity {
    pub(crate) value: f64,
    /// dV/dx
    pub(crate) slope: f64,
    /// d²V/dx² - dV/dx, which is spot² gamma
    pub(crate) bend: f64,
    /// dV/dvol
    pub(crate) vol: f64,
    /// d²V/dvol²
    pub(crate) vol_vol: f64,
    /// d²V/dx dvol
    pub(crate) slope_vol: f64,
    /// dV/dT
    pub(crate) time: f64,
    /// d²V/dx dT
    pub(crate) slope_time: f64,
    /// dV/drate
    pub(crate) rate: f64,
    /// dV/ddividend
    pub(crate) dividend: f64,
    /// dV/dln(barrier)
    pub(crate) log_barrier: f64,
    /// dV/dstrike
    pub(crate) strike: f64,
}

impl Sensitivity {
    /// A claim `U` seen in the mirror of the barrier: `(spot / barrier)^p U(barrier^2 / spot)` with
    /// `p = 1 - 2 carry / vol^2`, which solves the Black-Scholes equation wherever `U` does.
    ///
    /// `self` is `U` with its derivatives at the reflected spot, every number already multiplied by the power:
    /// the product exists where the power alone overflows.
    pub(crate) fn reflected(self, setting: &Setting, barrier: f64) -> Sensitivity {
        let Setting { spot, vol, carry, .. } = *setting;
        let y = ln_ratio(spot, barrier);
        let variance = vol * vol;
        let power = 1.0 - 2.0 * carry / variance;
        let power_rate = -2.0 / variance;
        let power_vol = 4.0 * carry / (variance * vol);
        let tilt = power_vol * y;
        Sensitivity {
            value: self.value,
            slope: power * self.value - self.slope,
            bend: power * (power - 1.0) * self.value + 2.0 * (1.0 - power) * self.slope + self.bend,
            vol: tilt * self.value + self.vol,
            vol_vol: (tilt - 3.0 / vol) * tilt * self.value + 2.0 * tilt * self.vol + self.vol_vol,
            slope_vol: power_vol * self.value + power * (tilt * self.value + self.vol)
                - tilt * self.slope
                - self.slope_vol,
            time: self.time,
            slope_time: power * self.time - self.slope_time,
            rate: power_rate * y * self.value + self.rate,
            dividend: self.dividend - power_rate * y * self.value,
            log_barrier: 2.0 * self.slope - power * self.value + self.log_barrier,
            strike: self.strike,
        }
    }

    /// In the trade's units.
    pub(crate) fn greeks(self, spot: f64, barrier: f64) -> Greeks {
        Greeks {
            value: self.value,
            delta: self.slope / spot,
            gamma: self.bend / spot / spot,
            vega: self.vol,
            theta: -self.time,
            rho: self.rate,
            dividend_rho: self.dividend,
            vanna: self.slope_vol / spot,
            volga: self.vol_vol,
            charm: -self.slope_time / spot,
            barrier_delta: if self.log_barrier == 0.0 { 0.0 } else { self.log_barrier / barrier },
            strike_delta: self.strike,
        }
    }
}

impl Add for Sensitivity {
    type Output = Sensitivity;

    fn add(self, other: Sensitivity) -> Sensitivity {
        Sensitivity {
            value: self.value + other.value,
            slope: self.slope + other.slope,
            bend: self.bend + other.bend,
            vol: self.vol + other.vol,
            vol_vol: self.vol_vol + other.vol_vol,
            slope_vol: self.slope_vol + other.slope_vol,
            time: self.time + other.time,
            slope_time: self.slope_time + other.slope_time,
            rate: self.rate + other.rate,
            dividend: self.dividend + other.dividend,
            log_barrier: self.log_barrier + other.log_barrier,
            strike: self.strike + other.strike,
        }
    }
}

impl Mul<f64> for Sensitivity {
    type Output = Sensitivity;

    fn mul(self, factor: f64) -> Sensitivity {
        Sensitivity {
            value: self.value * factor,
            slope: self.slope * factor,
            bend: self.bend * factor,
            vol: self.vol * factor,
            vol_vol: self.vol_vol * factor,
            slope_vol: self.slope_vol * factor,
            time: self.time * factor,
            slope_time: self.slope_time * factor,
            rate: self.rate * factor,
            dividend: self.dividend * factor,
            log_barrier: self.log_barrier * factor,
            strike: self.strike * factor,
        }
    }
}
