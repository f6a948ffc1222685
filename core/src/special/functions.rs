//! The functions that the formulas need, in both precisions.

use crate::num::Real;
use crate::special::{self, INV_ROOT_TWO_PI};

/// A real number with the functions of this layer.
pub(crate) trait Functions: Real {
    /// A sum below this fraction of its terms' magnitude has lost too many digits to cancellation; a form with
    /// positive terms only takes over. The seam is this low because the other form costs some microseconds, and
    /// this high because above it the loss stays within 5e-14 (binary64) or 1e-18 (double-double) relative.
    const CANCELLED: f64;
    /// The same for derivatives, which go by double-double below it.
    const DELICATE: f64;
    /// An integrand is negligible where its exponent has lost this many units.
    const NEGLIGIBLE: f64;

    /// Whether an answer found in binary64 is to be polished by Newton's method.
    const POLISHED: bool;

    /// Exponential.
    fn exp(self) -> Self;
    /// Exponential less 1.
    fn expm1(self) -> Self;
    /// `ln(a / b)`
    fn ln_ratio(a: f64, b: f64) -> Self;
    /// Mills ratio of the normal law, for `self >= 0`.
    fn mills(self) -> Self;
    /// `1 / sqrt(2 pi)`
    fn inv_root_two_pi() -> Self;
}

impl Functions for f64 {
    const CANCELLED: f64 = 1.0 / 128.0;
    const DELICATE: f64 = 1.0 / 32.0;
    const NEGLIGIBLE: f64 = 45.0;
    const POLISHED: bool = false;

    fn exp(self) -> f64 {
        special::exp_sum(self, 0.0)
    }
    fn expm1(self) -> f64 {
        special::expm1(self)
    }
    fn ln_ratio(a: f64, b: f64) -> f64 {
        special::ln_ratio(a, b)
    }
    fn mills(self) -> f64 {
        special::mills_ratio_lane(self)
    }
    fn inv_root_two_pi() -> f64 {
        INV_ROOT_TWO_PI
    }
}
