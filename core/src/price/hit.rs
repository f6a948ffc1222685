//! One unit of cash paid at the moment of touching.
//!
//! The value is [`DiscountedPassage`]'s. Its derivatives follow by the chain rule from those of the exponents
//! and scores of its two terms, or of the arguments of its integral where the terms would cancel.

use crate::brownian::{DiscountedPassage, Form};
use crate::price::event::Levels;
use crate::price::sensitivity::Sensitivity;
use crate::price::setting::Setting;
use crate::special::{exp, ln_ratio};
use crate::terms::Direction;

/// A quantity with its derivatives in distance `h`, volatility `v`, rate and dividend yield: the first, and
/// the second in `hh`, `hv`, `vv`. Time enters the passage only through the density and needs no entry.
#[derive(Clone, Copy, Debug, Default)]
struct Chain {
    h: f64,
    v: f64,
    rate: f64,
    dividend: f64,
    hh: f64,
    hv: f64,
    vv: f64,
}

impl Chain {
    /// The first derivatives of a pair of inputs, and the second in both.
    const fn pair(self, pair: Pair) -> [f64; 3] {
        match pair {
            Pair::Hh => [self.h, self.h, self.hh],
            Pair::Hv => [self.h, self.v, self.hv],
            Pair::Vv => [self.v, self.v, self.vv],
        }
    }
}

#[derive(Clone, Copy, Debug)]
enum Pair {
    Hh,
    Hv,
    Vv,
}

/// Value of one unit of cash paid when the barrier is touched, for a spot on its live side.
pub(crate) fn value(setting: &Setting, levels: &Levels) -> f64 {
    if setting.still { still(setting, levels).value } else { passage(setting, levels).0.value }
}

/// Value and derivatives of one unit of cash paid when the barrier is touched.
pub(crate) fn sensitivity(setting: &Setting, levels: &Levels) -> Sensitivity {
    if setting.still {
        return still(setting, levels);
    }
    let Setting { vol, rate, expiry, deviation, .. } = *setting;
    let (passage, distance, drift, sign) = passage(setting, levels);
    let variance = vol * vol;
    let score = -distance / deviation;
    // The drift moves with the volatility, the rate and the yield.
    let (drift_v, drift_vv) = (-sign * vol, -sign);
    // d/d theta of n / vol^2 given those of n.
    let over_variance = |n: f64, n_v: f64, n_vv: f64| {
        [n / variance, (n_v - 2.0 * n / vol) / variance, (n_vv - 4.0 * n_v / vol + 6.0 * n / variance) / variance]
    };
    let gradient = match passage.form {
        Form::Closed { root, exponents, terms } => {
            let root_v = (drift * drift_v + 2.0 * rate * vol) / root;
            let root_vv = (drift_v * drift_v + drift * drift_vv + 2.0 * rate - root_v * root_v) / root;
            let reach = root * expiry / deviation;
            let reach_v = root_v * setting.root_expiry / vol - reach / vol;
            let reach_vv = (root_vv * setting.root_expiry - 2.0 * reach_v) / vol;
            let leg = |side: f64, exponent_h: f64, term: f64| {
                let [_, slope_v, slope_vv] =
                    over_variance(drift - side * root, drift_v - side * root_v, drift_vv - side * root_vv);
                let exponent = Chain {
                    h: exponent_h,
                    v: distance * slope_v,
                    rate: distance * (sign - side * (drift * sign + variance) / root) / variance,
                    dividend: distance * (-sign + side * drift * sign / root) / variance,
                    hh: 0.0,
                    hv: slope_v,
                    vv: distance * slope_vv,
                };
                let z = score + side * reach;
                let z_chain = Chain {
                    h: -1.0 / deviation,
                    v: -score / vol + side * reach_v,
                    // In rate and yield the scores of the two terms move against each other.
                    rate: 0.0,
                    dividend: 0.0,
                    hh: 0.0,
                    hv: 1.0 / (deviation * vol),
                    vv: 2.0 * score / variance + side * reach_vv,
                };
                let second = |pair: Pair| {
                    let [e1, e2, e12] = exponent.pair(pair);
                    let [z1, z2, z12] = z_chain.pair(pair);
                    term * (e1 * e2 + e12) + passage.density * (e1 * z2 + e2 * z1 + z12 - z * z1 * z2)
                };
                Chain {
                    h: term * exponent.h + passage.density * z_chain.h,
                    v: term * exponent.v + passage.density * z_chain.v,
                    rate: term * exponent.rate,
                    dividend: term * exponent.dividend,
                    hh: second(Pair::Hh),
                    hv: second(Pair::Hv),
                    vv: second(Pair::Vv),
                }
            };
            let (near, far) = (leg(1.0, exponents[0], terms[0]), leg(-1.0, exponents[1], terms[1]));
            Chain {
                h: near.h + far.h,
                v: near.v + far.v,
                rate: near.rate + far.rate,
                dividend: near.dividend + far.dividend,
                hh: near.hh + far.hh,
                hv: near.hv + far.hv,
                vv: near.vv + far.vv,
            }
        }
        Form::Integral { moments: [first, second_moment] } => {
            // The integral's arguments: prefactor exp(a), start y, and c = (h w / v^2)^2 / 2.
            let [a_h, a_hv, a_hvv] = over_variance(drift, drift_v, drift_vv);
            let a = Chain {
                h: a_h,
                v: distance * a_hv,
                rate: distance * sign / variance,
                dividend: -distance * sign / variance,
                hh: 0.0,
                hv: a_hv,
                vv: distance * a_hvv,
            };
            let square = drift * drift + 2.0 * rate * variance;
            let square_v = 2.0 * drift * drift_v + 4.0 * rate * vol;
            let square_vv = 2.0 * (drift_v * drift_v + drift * drift_vv) + 4.0 * rate;
            let fourth = variance * variance;
            let ratio = square / fourth;
            let ratio_v = (square_v - 4.0 * square / vol) / fourth;
            let ratio_vv = (square_vv - 8.0 * square_v / vol + 20.0 * square / variance) / fourth;
            let half_square = 0.5 * distance * distance;
            let c = Chain {
                h: distance * ratio,
                v: half_square * ratio_v,
                rate: half_square * (2.0 * drift * sign + 2.0 * variance) / fourth,
                dividend: -half_square * 2.0 * drift * sign / fourth,
                hh: ratio,
                hv: distance * ratio_v,
                vv: half_square * ratio_vv,
            };
            let y = -score;
            let start = Chain {
                h: 1.0 / deviation,
                v: -y / vol,
                hv: -1.0 / (deviation * vol),
                vv: 2.0 * y / variance,
                ..Chain::default()
            };
            // 2 c / y^2, which stays finite as the distance closes.
            let bend = square * expiry / variance;
            let edge = 2.0 * passage.density;
            let one = |a: f64, c: f64, y: f64| a * passage.value - c * first - edge * y;
            let second = |pair: Pair| {
                let [a1, a2, a12] = a.pair(pair);
                let [c1, c2, c12] = c.pair(pair);
                let [y1, y2, y12] = start.pair(pair);
                (a1 * a2 + a12) * passage.value - (a1 * c2 + a2 * c1 + c12) * first + c1 * c2 * second_moment
                    - edge * (a1 * y2 + a2 * y1 + y12 + y1 * y2 * (bend / y - y) - (c1 * y2 + c2 * y1) / (y * y))
            };
            Chain {
                h: one(a.h, c.h, start.h),
                v: one(a.v, c.v, start.v),
                rate: one(a.rate, c.rate, 0.0),
                dividend: one(a.dividend, c.dividend, 0.0),
                hh: second(Pair::Hh),
                hv: second(Pair::Hv),
                vv: second(Pair::Vv),
            }
        }
    };
    // The discounted density of the passage at expiry.
    let time = passage.density * distance / (deviation * expiry);
    let time_h = passage.density / (deviation * expiry) * (1.0 + score * ((distance - drift * expiry) / deviation));
    Sensitivity {
        value: passage.value,
        slope: -sign * gradient.h,
        bend: gradient.hh + sign * gradient.h,
        vol: gradient.v,
        vol_vol: gradient.vv,
        slope_vol: -sign * gradient.hv,
        time,
        slope_time: -sign * time_h,
        rate: gradient.rate,
        dividend: gradient.dividend,
        log_barrier: sign * gradient.h,
        strike: 0.0,
    }
}

/// The passage, its distance, the drift towards the barrier, and the sign of the barrier's side.
fn passage(setting: &Setting, levels: &Levels) -> (DiscountedPassage, f64, f64, f64) {
    let Setting { spot, vol, rate, expiry, carry, .. } = *setting;
    let (distance, sign) = match levels.direction {
        Direction::Up => (ln_ratio(levels.barrier, spot), 1.0),
        Direction::Down => (ln_ratio(spot, levels.barrier), -1.0),
    };
    let drift = sign * (carry - 0.5 * vol * vol);
    (DiscountedPassage::new(distance, drift, vol, expiry, rate), distance, drift, sign)
}

/// Without volatility the spot runs along its forward curve and touches at `ln(barrier / spot) / carry`, if
/// that is within the life of the contract.
fn still(setting: &Setting, levels: &Levels) -> Sensitivity {
    let Setting { spot, rate, expiry, carry, .. } = *setting;
    let to_barrier = ln_ratio(levels.barrier, spot);
    let reaches = match levels.direction {
        Direction::Up => carry * expiry >= to_barrier,
        Direction::Down => carry * expiry <= to_barrier,
    };
    if !reaches {
        return Sensitivity::default();
    }
    let hit = to_barrier / carry;
    let value = exp(-rate * hit);
    let power = rate / carry;
    Sensitivity {
        value,
        slope: power * value,
        bend: power * (power - 1.0) * value,
        rate: -hit * (1.0 - power) * value,
        dividend: -hit * power * value,
        log_barrier: -power * value,
        ..Sensitivity::default()
    }
}
