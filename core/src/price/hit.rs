//! One unit of cash paid at the moment of touching.
//!
//! The value is [`DiscountedPassage`]'s. Its derivatives follow by the chain rule from those of the exponents
//! and scores of its two terms, or of the arguments of its integral where the terms would cancel.

use core::ops::Add;

use crate::brownian::{DiscountedPassage, Form};
use crate::price::event::Levels;
use crate::price::sensitivity::Sensitivity;
use crate::price::setting::Setting;
use crate::special::Functions;
use crate::terms::Direction;

/// A quantity with its derivatives in distance `h`, volatility `v`, rate and dividend yield: the first, and
/// the second in `hv`, `vv`. Time enters the passage only through the density and needs no entry.
#[derive(Clone, Copy, Debug)]
struct Chain<R> {
    h: R,
    v: R,
    rate: R,
    dividend: R,
    hv: R,
    vv: R,
}

impl<R: Functions> Add for Chain<R> {
    type Output = Chain<R>;

    fn add(self, other: Chain<R>) -> Chain<R> {
        Chain {
            h: self.h + other.h,
            v: self.v + other.v,
            rate: self.rate + other.rate,
            dividend: self.dividend + other.dividend,
            hv: self.hv + other.hv,
            vv: self.vv + other.vv,
        }
    }
}

impl<R: Functions> Chain<R> {
    /// The first derivatives of a pair of inputs, and the second in both.
    fn pair(self, pair: Pair) -> [R; 3] {
        match pair {
            Pair::Hv => [self.h, self.v, self.hv],
            Pair::Vv => [self.v, self.v, self.vv],
        }
    }
}

/// The derivatives of a term, or of the whole.
#[derive(Clone, Copy, Debug)]
struct Gradient<R> {
    first_and_mixed: Chain<R>,
    /// The second derivative in the logarithm of the spot less the first: gamma's.
    bend: R,
    /// The magnitude of what the second derivative in volatility is the sum of.
    vv_terms: R,
}

impl<R: Functions> Add for Gradient<R> {
    type Output = Gradient<R>;

    fn add(self, other: Gradient<R>) -> Gradient<R> {
        Gradient {
            first_and_mixed: self.first_and_mixed + other.first_and_mixed,
            bend: self.bend + other.bend,
            vv_terms: self.vv_terms + other.vv_terms,
        }
    }
}

#[derive(Clone, Copy, Debug)]
enum Pair {
    Hv,
    Vv,
}

/// Value of one unit of cash paid when the barrier is touched, for a spot on its live side.
pub(crate) fn value<R: Functions>(setting: &Setting<R>, levels: &Levels) -> R {
    if setting.still { still(setting, levels).value } else { passage(setting, levels).0.value }
}

/// Value and derivatives of one unit of cash paid when the barrier is touched.
pub(crate) fn sensitivity<R: Functions>(setting: &Setting<R>, levels: &Levels) -> Sensitivity<R> {
    if setting.still {
        return still(setting, levels);
    }
    let (passage, path) = passage(setting, levels);
    let Path { distance, drift, sign, score, .. } = path;
    let Gradient { first_and_mixed: gradient, bend, vv_terms } = match passage.form {
        Form::Closed { root, terms } => path.leg(&passage, root, terms[0]) + path.leg(&passage, -root, terms[1]),
        Form::Integral { moments } => path.integral(&passage, moments),
    };
    // The discounted density of the passage at expiry.
    let density = passage.density / (path.deviation * path.expiry);
    let density_h = density * (R::of(1.0) + score * ((distance - drift * path.expiry) / path.deviation));
    Sensitivity {
        value: passage.value,
        slope: gradient.h.times(-sign),
        bend,
        vol: gradient.v,
        vol_vol: gradient.vv,
        vol_vol_terms: vv_terms,
        slope_vol: gradient.hv.times(-sign),
        time: density * distance,
        slope_time: density_h.times(-sign),
        rate: gradient.rate,
        dividend: gradient.dividend,
        log_barrier: gradient.h.times(sign),
        ..Sensitivity::none()
    }
}

/// The way to the barrier.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Path<R> {
    /// `|ln(barrier / spot)|`
    pub(crate) distance: R,
    /// Drift of the logarithm towards the barrier.
    pub(crate) drift: R,
    /// 1 for a barrier above, -1 below.
    sign: f64,
    vol: R,
    variance: R,
    rate: R,
    dividend: R,
    carry: R,
    expiry: R,
    root_expiry: R,
    /// `vol sqrt(expiry)`
    deviation: R,
    /// `-distance / deviation`
    pub(crate) score: R,
}

impl<R: Functions> Path<R> {
    /// The drift's derivatives in volatility.
    fn drift_v(&self) -> [R; 2] {
        [self.vol.times(-self.sign), R::of(-self.sign)]
    }

    /// `n / vol^2` with its first two derivatives in volatility, from those of `n`.
    fn over_variance(&self, [n, n_v, n_vv]: [R; 3]) -> [R; 3] {
        let n = n / self.variance;
        let first = n_v / self.variance - n.times(2.0) / self.vol;
        [n, first, (n_vv - n_v.times(4.0) / self.vol) / self.variance + n.times(6.0) / self.variance]
    }

    /// `(drift - root) / vol^2` with its first two derivatives in volatility, by its equals
    /// `-2 rate / (drift + root)` and `-2 dividend / (share_drift + root) - sign` where the root has the sign of the
    /// one drift or the other: what would cancel is gone from each.
    fn exponent(&self, root: R, [root_v, root_vv]: [R; 2]) -> [R; 3] {
        let [drift_v, drift_vv] = self.drift_v();
        let positive = |number: R| number > R::of(0.0);
        let quotient = |yield_: R, drift: R, drift_v: R, drift_vv: R| {
            let (sum, sum_v, sum_vv) = (drift + root, drift_v + root_v, drift_vv + root_vv);
            let value = yield_.times(-2.0) / sum;
            let first = -value * sum_v / sum;
            [value, first, -(first.times(2.0) * sum_v + value * sum_vv) / sum]
        };
        if positive(self.drift) == positive(root) {
            quotient(self.rate, self.drift, drift_v, drift_vv)
        } else if positive(self.share_drift()) == positive(root) {
            // In the measure of the share the drift moves the other way with the volatility.
            let [value, first, second] = quotient(self.dividend, self.share_drift(), -drift_v, -drift_vv);
            [value - R::of(self.sign), first, second]
        } else {
            self.over_variance([self.drift - root, drift_v - root_v, drift_vv - root_vv])
        }
    }

    /// The drift towards the barrier in the measure of the share.
    fn share_drift(&self) -> R {
        self.drift + self.variance.times(self.sign)
    }

    /// `(drift - root) / vol^2 + sign`, which is that exponent in the measure of the share, by whichever form keeps
    /// its digits: `root^2` is also `share_drift^2 + 2 dividend vol^2`.
    fn share_exponent(&self, root: R) -> R {
        let share_drift = self.share_drift();
        if (share_drift > R::of(0.0)) == (root > R::of(0.0)) {
            self.dividend.times(-2.0) / (share_drift + root)
        } else {
            (share_drift - root) / self.variance
        }
    }

    /// Derivatives of `exp((drift - root) distance / vol^2) N((root expiry - distance) / deviation)`; with the
    /// sign of `root` changed it is the other term.
    fn leg(&self, passage: &DiscountedPassage<R>, root: R, term: R) -> Gradient<R> {
        let Path { distance, drift, sign, vol, variance, rate, expiry, root_expiry, deviation, score, .. } = *self;
        let (zero, one) = (R::of(0.0), R::of(1.0));
        let [drift_v, drift_vv] = self.drift_v();
        let root_v = (drift * drift_v + (rate * vol).times(2.0)) / root;
        let root_vv = (drift_v.square() + drift * drift_vv + rate.times(2.0) - root_v.square()) / root;
        let [slope, slope_v, slope_vv] = self.exponent(root, [root_v, root_vv]);
        let by_share = self.share_exponent(root);
        let exponent = Chain {
            h: slope,
            v: distance * slope_v,
            rate: -distance * by_share.times(sign) / root,
            dividend: distance * slope.times(sign) / root,
            hv: slope_v,
            vv: distance * slope_vv,
        };
        let reach = root * expiry / deviation;
        let reach_v = root_v * root_expiry / vol - reach / vol;
        let reach_vv = (root_vv * root_expiry - reach_v.times(2.0)) / vol;
        let z = score + reach;
        let z_chain = Chain {
            h: -one / deviation,
            v: reach_v - score / vol,
            // In rate and yield the scores of the two terms move against each other.
            rate: zero,
            dividend: zero,
            hv: one / (deviation * vol),
            vv: score.times(2.0) / variance + reach_vv,
        };
        let parts = |pair: Pair| {
            let [e1, e2, e12] = exponent.pair(pair);
            let [z1, z2, z12] = z_chain.pair(pair);
            let density = passage.density;
            [term * (e1 * e2), term * e12, density * (e1 * z2 + e2 * z1 + z12), -density * (z * z1 * z2)]
        };
        let second = |pair: Pair| parts(pair).into_iter().fold(zero, |sum, part| sum + part);
        let chain = Chain {
            h: term * exponent.h + passage.density * z_chain.h,
            v: term * exponent.v + passage.density * z_chain.v,
            rate: term * exponent.rate,
            dividend: term * exponent.dividend,
            hv: second(Pair::Hv),
            vv: second(Pair::Vv),
        };
        Gradient {
            first_and_mixed: chain,
            bend: term * (slope * by_share) + passage.density * z_chain.h * (slope + by_share - z * z_chain.h),
            vv_terms: parts(Pair::Vv).into_iter().fold(zero, |sum, part| sum + part.magnitude()),
        }
    }

    /// Derivatives of the integral, through its prefactor `exp(a)`, its start `y` and `c`.
    fn integral(&self, passage: &DiscountedPassage<R>, [first, second_moment]: [R; 2]) -> Gradient<R> {
        let Path { distance, drift, sign, vol, variance, rate, expiry, deviation, score, .. } = *self;
        let (zero, one) = (R::of(0.0), R::of(1.0));
        let fourth = variance.square();
        let [drift_v, drift_vv] = self.drift_v();
        let [a_h, a_hv, a_hvv] = self.over_variance([drift, drift_v, drift_vv]);
        let per_variance = distance.times(sign) / variance;
        let a = Chain {
            h: a_h,
            v: distance * a_hv,
            rate: per_variance,
            dividend: -per_variance,
            hv: a_hv,
            vv: distance * a_hvv,
        };
        // c = distance^2 / 2 times this ratio.
        let square = drift.square() + (rate * variance).times(2.0);
        let square_v = (drift * drift_v).times(2.0) + (rate * vol).times(4.0);
        let square_vv = (drift_v.square() + drift * drift_vv).times(2.0) + rate.times(4.0);
        let ratio = square / fourth;
        let ratio_v = square_v / fourth - ratio.times(4.0) / vol;
        let ratio_vv = (square_vv - square_v.times(8.0) / vol) / fourth + ratio.times(20.0) / variance;
        let half_square = distance.square().times(0.5);
        let c = Chain {
            h: distance * ratio,
            v: half_square * ratio_v,
            rate: distance.square() * (drift.times(sign) + variance) / fourth,
            dividend: -(distance.square() * drift.times(sign)) / fourth,
            hv: distance * ratio_v,
            vv: half_square * ratio_vv,
        };
        let y = -score;
        let start = Chain {
            h: one / deviation,
            v: -y / vol,
            rate: zero,
            dividend: zero,
            hv: -one / (deviation * vol),
            vv: y.times(2.0) / variance,
        };
        // 2 c / y^2, which stays finite as the distance closes.
        let bend = square * expiry / variance;
        let edge = passage.density.times(2.0);
        let derivative = |a: R, c: R, y: R| a * passage.value - c * first - edge * y;
        let second = |pair: Pair| {
            let [a1, a2, a12] = a.pair(pair);
            let [c1, c2, c12] = c.pair(pair);
            let [y1, y2, y12] = start.pair(pair);
            (a1 * a2 + a12) * passage.value - (a1 * c2 + a2 * c1 + c12) * first + c1 * c2 * second_moment
                - edge * (a1 * y2 + a2 * y1 + y12 + y1 * y2 * (bend / y - y) - (c1 * y2 + c2 * y1) / y.square())
        };
        let h = derivative(a.h, c.h, start.h);
        // From the backward equation: the chain rule's own terms grow as 1 / y and cancel near the barrier.
        let time = passage.density * distance / (deviation * expiry);
        let bend = (time + self.carry.times(sign) * h + rate * passage.value).times(2.0) / variance;
        let chain = Chain {
            h,
            v: derivative(a.v, c.v, start.v),
            rate: derivative(a.rate, c.rate, zero),
            dividend: derivative(a.dividend, c.dividend, zero),
            hv: second(Pair::Hv),
            vv: second(Pair::Vv),
        };
        Gradient { first_and_mixed: chain, bend, vv_terms: zero }
    }
}

/// The passage, and the way to it.
pub(crate) fn passage<R: Functions>(setting: &Setting<R>, levels: &Levels) -> (DiscountedPassage<R>, Path<R>) {
    let Setting { spot, vol, variance, rate, dividend, expiry, carry, root_expiry, deviation, .. } = *setting;
    let (distance, sign) = match levels.direction {
        Direction::Up => (R::ln_ratio(levels.barrier, spot), 1.0),
        Direction::Down => (R::ln_ratio(spot, levels.barrier), -1.0),
    };
    let drift = (carry - variance.times(0.5)).times(sign);
    let score = -distance / deviation;
    let path =
        Path { distance, drift, sign, vol, variance, rate, dividend, carry, expiry, root_expiry, deviation, score };
    (DiscountedPassage::new(distance, drift, vol, expiry, rate), path)
}

/// Without volatility the spot runs along its forward curve and touches at `ln(barrier / spot) / carry`, if
/// that is within the life of the contract.
fn still<R: Functions>(setting: &Setting<R>, levels: &Levels) -> Sensitivity<R> {
    let Setting { spot, rate, expiry, carry, .. } = *setting;
    let to_barrier = R::ln_ratio(levels.barrier, spot);
    let reaches = match levels.direction {
        Direction::Up => carry * expiry >= to_barrier,
        Direction::Down => carry * expiry <= to_barrier,
    };
    if !reaches {
        return Sensitivity::none();
    }
    let one = R::of(1.0);
    let hit = to_barrier / carry;
    let value = (-rate * hit).exp();
    let power = rate / carry;
    Sensitivity {
        value,
        slope: power * value,
        bend: power * (power - one) * value,
        rate: hit * (power - one) * value,
        dividend: -hit * power * value,
        log_barrier: -power * value,
        ..Sensitivity::none()
    }
}
