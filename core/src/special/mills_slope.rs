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
