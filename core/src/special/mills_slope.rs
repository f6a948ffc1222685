//! How fast Mills ratio falls.

use crate::num::integrate;
use crate::special::Functions;

/// Beyond this argument `1 - x R(x)` loses more than two bits, and the integral takes over.
const SEAM: f64 = 1.0;

/// `-R'(x) = 1 - x R(x)` of Mills ratio, as `integral over t > 0 of t exp(-x t - t^2 / 2)` where that would cancel.
pub(crate) fn mills_slope<R: Functions>(x: R) -> R {
    if x < R::of(SEAM) {
        return R::of(1.0) - x * x.mills();
    }
    let slope = x.nearest();
    let reach = 2.0 * R::NEGLIGIBLE / (slope + libm::sqrt(slope * slope + 2.0 * R::NEGLIGIBLE));
    let mut sum = R::of(0.0);
    integrate(R::of(0.0), R::of(reach), 4.0 / slope, 1.0, |t, weight| {
        sum = sum + weight * t * (-(x * t) - t.square().times(0.5)).exp();
    });
    sum
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::num::{DoubleDouble, Real};

    #[test]
    fn the_slope_is_seamless_between_its_two_forms() {
        let (mut below, mut above) = (SEAM, SEAM);
        for _ in 0..64 {
            below = below.next_down();
            for x in [below, above] {
                let (fast, exact) = (mills_slope(x), mills_slope(DoubleDouble::of(x)).nearest());
                assert!((fast / exact - 1.0).abs() <= 8.0 * f64::EPSILON, "{x}: {fast} and {exact}");
            }
            above = above.next_up();
        }
    }

    #[test]
    fn both_forms_are_exact_to_the_last_digits_everywhere() {
        for step in -120..=120 {
            let x = libm::exp2(f64::from(step) / 4.0);
            let (fast, exact) = (mills_slope(x), mills_slope(DoubleDouble::of(x)).nearest());
            assert!((fast / exact - 1.0).abs() <= 8.0 * f64::EPSILON, "{x}: {fast} and {exact}");
        }
    }
}
