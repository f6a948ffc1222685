//! Functions that know nothing of Brownian motion: exponentials, logarithms, the normal law and its tails.

mod exponential;
mod extended;
mod extended_tables;
mod functions;
mod logarithm;
mod mills;
mod mills_slope;
mod normal;
mod quantile;

pub(crate) use exponential::exp_sum;
pub use exponential::{exp, expm1};
pub(crate) use functions::Functions;
pub use logarithm::{ln, ln_ratio, log1p};
pub use mills::mills_ratio;
pub(crate) use mills::mills_ratio_lane;
pub(crate) use mills_slope::mills_slope;
pub(crate) use normal::INV_ROOT_TWO_PI;
pub use normal::{normal_cdf, normal_log_tail, normal_pdf, normal_tail};
pub use quantile::normal_quantile;
