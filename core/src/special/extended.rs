//! The functions in double-double, by the series that the binary64 ones were fitted to.

use crate::num::{DoubleDouble, Lane, Real, horner_extended};
use crate::special::Functions;
use crate::special::extended_tables::{ATANH, INV_ROOT_TWO_PI, INVERSE_FACTORIAL, LN_2, MILLS};

/// `exp(x) = 2^exponent (1 + fraction)`.
fn reduced(x: DoubleDouble) -> (f64, DoubleDouble) {
    let exponent = Lane::round(x.high() * core::f64::consts::LOG2_E);
    let r = x - DoubleDouble::new(LN_2).times(exponent);
    (exponent, r + r.square() * horner_extended(r, &INVERSE_FACTORIAL))
}

fn scaled(x: DoubleDouble, exponent: f64) -> DoubleDouble {
    let half = Lane::round(0.5 * exponent);
    x.scaled(f64::two_to(half)).scaled(f64::two_to(exponent - half))
}

/// `ln((1 + f) / (1 - f))`
fn twice_atanh(f: DoubleDouble) -> DoubleDouble {
    let square = f.square();
    f.times(2.0) + f * square * horner_extended(square, &ATANH)
}

impl Functions for DoubleDouble {
    const CANCELLED: f64 = 1e-12;
    const DELICATE: f64 = 0.0;
    const NEGLIGIBLE: f64 = 60.0;
    const POLISHED: bool = true;

    fn exp(self) -> DoubleDouble {
        if self.high() > 710.0 {
            return DoubleDouble::of(f64::INFINITY);
        }
        if self.high() < -750.0 {
            return DoubleDouble::of(0.0);
        }
        let (exponent, fraction) = reduced(self);
        scaled(DoubleDouble::of(1.0) + fraction, exponent)
    }

    fn expm1(self) -> DoubleDouble {
        if self.high().abs() > 100.0 {
            return self.exp() - DoubleDouble::of(1.0);
        }
        let (exponent, fraction) = reduced(self);
        if exponent == 0.0 {
            return fraction;
        }
        let scale = f64::two_to(exponent);
        fraction.scaled(scale) + DoubleDouble::sum(scale, -1.0)
    }

    fn ln_ratio(a: f64, b: f64) -> DoubleDouble {
        let (a, a_exponent) = parts(a);
        let (b, b_exponent) = parts(b);
        let (mut top, mut bottom, mut exponent) = (a, b, a_exponent - b_exponent);
        if a > b * core::f64::consts::SQRT_2 {
            bottom *= 2.0;
            exponent += 1.0;
        } else if a * core::f64::consts::SQRT_2 < b {
            top *= 2.0;
            exponent -= 1.0;
        }
        let f = DoubleDouble::sum(top, -bottom) / DoubleDouble::sum(top, bottom);
        DoubleDouble::new(LN_2).times(exponent) + twice_atanh(f)
    }

    fn mills(self) -> DoubleDouble {
        let six = DoubleDouble::of(6.0);
        let scale = DoubleDouble::of(1.0) / (self + six);
        horner_extended((self - six) * scale, &MILLS) * scale
    }

    fn inv_root_two_pi() -> DoubleDouble {
        DoubleDouble::new(INV_ROOT_TWO_PI)
    }
}

/// Significand and exponent of a positive number.
fn parts(x: f64) -> (f64, f64) {
    const TWO_54: f64 = 18014398509481984.0;
    if x < f64::MIN_POSITIVE {
        let (significand, exponent) = (x * TWO_54).significand_exponent();
        (significand, exponent - 54.0)
    } else {
        x.significand_exponent()
    }
}
