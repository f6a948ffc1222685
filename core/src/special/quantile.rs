//! The normal quantile.

/// Quantile of the standard normal law.
pub fn normal_quantile(probability: f64) -> f64 {
    probability
}
