//! The law of Brownian motion with drift, of its extremes and of its passage times.

use crate::brownian::Quantity;
use crate::brownian::quantity::LARGEST;
use crate::error::{Error, Result, Status};

/// The smallest volatility and horizon.
const SMALLEST: f64 = 1e-75;

/// The law of `W_t = drift t + vol B_t`, `B` a standard Brownian motion, `W_0 = 0`, watched continuously on
/// `[0, horizon]`; `M` is its running maximum, `m` its running minimum.
///
/// A building block for Monte Carlo of your own: paths by their ends, extremes exactly given the ends, crossings of
/// a level between two observations, weights between drifts. For a path from `a` to `b` subtract `a` from every
/// level and end.
///
/// # Domain
///
/// `vol` and `horizon` from 1e-75 to 1e75; magnitudes of drifts, levels and ends up to 1e75. Units are the caller's.
///
/// # Accuracy
///
/// Every method within 16 units of 2^-52 times (1 + conditioning) of the exact value, conditioning being what a
/// relative change of the inputs does to the answer. Measured on the 825 rows of `tests/reference/law.csv`, everyday
/// and extreme: at most 2.8 such units, 99 % within 1.5; [`Quantity::reference`] at most 0.5 ulp.
///
/// # Source
///
/// Borodin and Salminen, Handbook of Brownian Motion, 2nd ed. 2002, part II, chapter 2 (from memory); forms for
/// evaluation derived here.
///
/// # Example
///
/// ```
/// use floodmark::brownian::Law;
///
/// let law = Law::new(0.1, 0.3, 2.0)?;
/// let touched = law.max_tail(0.5)?;
/// assert!((touched + law.max_cdf(0.5)? - 1.0).abs() < 1e-15);
/// let (end, maximum) = law.sample_terminal_max(0.3, 0.9)?;
/// assert!(maximum >= end && maximum >= 0.0);
/// # Ok::<(), floodmark::Error>(())
/// ```
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Law {
    drift: f64,
    vol: f64,
    horizon: f64,
}

impl Law {
    /// The law with this drift and volatility up to this horizon.
    ///
    /// # Errors
    ///
    /// [`Status::Drift`], [`Status::LawVol`] or [`Status::Horizon`] with the value.
    pub fn new(drift: f64, vol: f64, horizon: f64) -> Result<Law> {
        let refuse = |status, value| Err(Error { status, value });
        if drift.is_nan() || drift.abs() > LARGEST {
            return refuse(Status::Drift, drift);
        }
        if !(SMALLEST..=LARGEST).contains(&vol) {
            return refuse(Status::LawVol, vol);
        }
        if !(SMALLEST..=LARGEST).contains(&horizon) {
            return refuse(Status::Horizon, horizon);
        }
        Ok(Law { drift, vol, horizon })
    }

    /// The drift, per unit of time.
    pub const fn drift(&self) -> f64 {
        self.drift
    }

    /// The volatility, per square root of a unit of time.
    pub const fn vol(&self) -> f64 {
        self.vol
    }

    /// The horizon.
    pub const fn horizon(&self) -> f64 {
        self.horizon
    }

    /// An end and the running maximum of the same path, drawn exactly from two independent uniform numbers.
    ///
    /// # Errors
    ///
    /// [`Status::Uniform`] with the value.
    pub fn sample_terminal_max(&self, first_uniform: f64, second_uniform: f64) -> Result<(f64, f64)> {
        let terminal = self.sample_terminal(first_uniform)?;
        Ok((terminal, self.sample_max(terminal, second_uniform)?))
    }

    /// Density of the end `W_T` at `terminal`.
    ///
    /// # Formula
    ///
    /// `phi((terminal - drift horizon) / s) / s`, `s = vol sqrt(horizon)`
    ///
    /// # Errors
    ///
    /// [`Status::Terminal`] with the value.
    pub fn terminal_pdf(&self, terminal: f64) -> Result<f64> {
        Quantity::TerminalPdf.value(self, terminal, 0.0)
    }

    /// Probability that the end is at most `terminal`.
    ///
    /// # Formula
    ///
    /// `N((terminal - drift horizon) / s)`
    ///
    /// # Errors
    ///
    /// [`Status::Terminal`] with the value.
    pub fn terminal_cdf(&self, terminal: f64) -> Result<f64> {
        Quantity::TerminalCdf.value(self, terminal, 0.0)
    }

    /// The end that is not exceeded with `probability`; infinite at 0 and 1.
    ///
    /// # Formula
    ///
    /// `drift horizon + s N^-1(probability)`
    ///
    /// # Errors
    ///
    /// [`Status::Probability`] with the value.
    pub fn terminal_quantile(&self, probability: f64) -> Result<f64> {
        Quantity::TerminalQuantile.value(self, probability, 0.0)
    }

    /// Density of the running maximum at `level`; 0 below 0.
    ///
    /// # Formula
    ///
    /// `2 phi((level - m) / s) / s - (2 m / s^2) exp(2 m level / s^2) N((-level - m) / s)`, `m = drift horizon`
    ///
    /// # Errors
    ///
    /// [`Status::Level`] with the value.
    pub fn max_pdf(&self, level: f64) -> Result<f64> {
        Quantity::MaxPdf.value(self, level, 0.0)
    }

    /// Probability that the running maximum is at most `level`.
    ///
    /// # Formula
    ///
    /// `N((level - m) / s) - exp(2 m level / s^2) N((-level - m) / s)` for `level > 0`, else 0
    ///
    /// # Errors
    ///
    /// [`Status::Level`] with the value.
    pub fn max_cdf(&self, level: f64) -> Result<f64> {
        Quantity::MaxCdf.value(self, level, 0.0)
    }

    /// Probability that the running maximum reaches `level`.
    ///
    /// # Formula
    ///
    /// `N((m - level) / s) + exp(2 m level / s^2) N((-level - m) / s)` for `level > 0`, else 1
    ///
    /// # Errors
    ///
    /// [`Status::Level`] with the value.
    pub fn max_tail(&self, level: f64) -> Result<f64> {
        Quantity::MaxTail.value(self, level, 0.0)
    }

    /// The level that the running maximum does not exceed with `probability`; 0 at 0, infinite at 1.
    ///
    /// # Formula
    ///
    /// `max_cdf(level) = probability`, by Newton's method within a bracket
    ///
    /// # Errors
    ///
    /// [`Status::Probability`] with the value.
    pub fn max_quantile(&self, probability: f64) -> Result<f64> {
        Quantity::MaxQuantile.value(self, probability, 0.0)
    }

    /// Density of the running minimum at `level`; 0 above 0.
    ///
    /// # Formula
    ///
    /// `max_pdf(-level)` of the motion with the opposite drift
    ///
    /// # Errors
    ///
    /// [`Status::Level`] with the value.
    pub fn min_pdf(&self, level: f64) -> Result<f64> {
        Quantity::MinPdf.value(self, level, 0.0)
    }

    /// Probability that the running minimum is at most `level`.
    ///
    /// # Formula
    ///
    /// `max_tail(-level)` of the motion with the opposite drift
    ///
    /// # Errors
    ///
    /// [`Status::Level`] with the value.
    pub fn min_cdf(&self, level: f64) -> Result<f64> {
        Quantity::MinCdf.value(self, level, 0.0)
    }

    /// Probability that the running minimum stays at or above `level`.
    ///
    /// # Formula
    ///
    /// `max_cdf(-level)` of the motion with the opposite drift
    ///
    /// # Errors
    ///
    /// [`Status::Level`] with the value.
    pub fn min_tail(&self, level: f64) -> Result<f64> {
        Quantity::MinTail.value(self, level, 0.0)
    }

    /// The level that the running minimum does not exceed with `probability`; minus infinity at 0, 0 at 1.
    ///
    /// # Formula
    ///
    /// minus the quantile of the maximum of the motion with the opposite drift, from the other side
    ///
    /// # Errors
    ///
    /// [`Status::Probability`] with the value.
    pub fn min_quantile(&self, probability: f64) -> Result<f64> {
        Quantity::MinQuantile.value(self, probability, 0.0)
    }

    /// Probability that the end is at most `terminal` and the running maximum at most `level`.
    ///
    /// # Formula
    ///
    /// `N((x - m) / s) - exp(2 m level / s^2) N((x - 2 level - m) / s)`, `x = min(terminal, level)`; 0 for `level <= 0`
    ///
    /// # Errors
    ///
    /// [`Status::Terminal`] or [`Status::Level`] with the value.
    pub fn joint_max_cdf(&self, terminal: f64, level: f64) -> Result<f64> {
        Quantity::JointMaxCdf.value(self, terminal, level)
    }

    /// Joint density of the end at `terminal` and the running maximum at `level`.
    ///
    /// # Formula
    ///
    /// `2 (2 level - terminal) / s^3 phi((terminal - m) / s) exp(-2 level (level - terminal) / s^2)` for `level >= max(terminal, 0)`, else 0
    ///
    /// # Errors
    ///
    /// [`Status::Terminal`] or [`Status::Level`] with the value.
    pub fn joint_max_pdf(&self, terminal: f64, level: f64) -> Result<f64> {
        Quantity::JointMaxPdf.value(self, terminal, level)
    }

    /// Probability that the end is at most `terminal` and the running minimum at most `level`.
    ///
    /// # Formula
    ///
    /// `P(-W_T >= -terminal, max(-W) >= -level)`, two positive terms
    ///
    /// # Errors
    ///
    /// [`Status::Terminal`] or [`Status::Level`] with the value.
    pub fn joint_min_cdf(&self, terminal: f64, level: f64) -> Result<f64> {
        Quantity::JointMinCdf.value(self, terminal, level)
    }

    /// Joint density of the end at `terminal` and the running minimum at `level`.
    ///
    /// # Formula
    ///
    /// `joint_max_pdf(-terminal, -level)` of the motion with the opposite drift
    ///
    /// # Errors
    ///
    /// [`Status::Terminal`] or [`Status::Level`] with the value.
    pub fn joint_min_pdf(&self, terminal: f64, level: f64) -> Result<f64> {
        Quantity::JointMinPdf.value(self, terminal, level)
    }

    /// Probability that `level` is not touched by the horizon: watched above the start if positive, below if negative; 0 at 0.
    ///
    /// # Formula
    ///
    /// `max_cdf(level)` or `min_tail(level)`
    ///
    /// # Errors
    ///
    /// [`Status::Level`] with the value.
    pub fn survival(&self, level: f64) -> Result<f64> {
        Quantity::Survival.value(self, level, 0.0)
    }

    /// Density at `time` of the moment at which `level` is first touched; `level` is not 0.
    ///
    /// # Formula
    ///
    /// `|level| / (vol sqrt(2 pi time^3)) exp(-(level - drift time)^2 / (2 vol^2 time))`
    ///
    /// # Errors
    ///
    /// [`Status::Level`] or [`Status::Time`] with the value.
    pub fn first_passage_pdf(&self, level: f64, time: f64) -> Result<f64> {
        Quantity::FirstPassagePdf.value(self, level, time)
    }

    /// Probability that `level` is touched by `time`, which may be infinite; the law's horizon plays no part.
    ///
    /// # Formula
    ///
    /// `max_tail(level)` with `horizon = time`
    ///
    /// # Errors
    ///
    /// [`Status::Level`] or [`Status::Time`] with the value.
    pub fn first_passage_cdf(&self, level: f64, time: f64) -> Result<f64> {
        Quantity::FirstPassageCdf.value(self, level, time)
    }

    /// The time by which `level` is touched with `probability`; infinite if that never comes.
    ///
    /// # Formula
    ///
    /// `first_passage_cdf(level, time) = probability`, by Newton's method within a bracket
    ///
    /// # Errors
    ///
    /// [`Status::Level`] or [`Status::Probability`] with the value.
    pub fn first_passage_quantile(&self, level: f64, probability: f64) -> Result<f64> {
        Quantity::FirstPassageQuantile.value(self, level, probability)
    }

    /// What one unit paid at the moment of touching `level` is worth, if it is touched by the horizon.
    ///
    /// # Formula
    ///
    /// `E[exp(-discount_rate tau); tau <= horizon]`: two exponentials times tails with the root `w = sqrt(drift^2 + 2 discount_rate vol^2)`, or, where `w` is imaginary or small, `2 exp(drift level / vol^2)` times the integral over `y > |level| / s` of `phi(y) exp(-(level w / vol^2)^2 / (2 y^2))`
    ///
    /// # Errors
    ///
    /// [`Status::Level`] or [`Status::DiscountRate`] with the value.
    pub fn discounted_first_passage(&self, level: f64, discount_rate: f64) -> Result<f64> {
        Quantity::DiscountedFirstPassage.value(self, level, discount_rate)
    }

    /// Probability that `level` was touched on the way, given that the path ends at `terminal`.
    ///
    /// # Formula
    ///
    /// `exp(-2 level (level - terminal) / s^2)`, and 1 where the end is at or beyond the level
    ///
    /// # Errors
    ///
    /// [`Status::Terminal`] or [`Status::Level`] with the value.
    pub fn bridge_crossing(&self, terminal: f64, level: f64) -> Result<f64> {
        Quantity::BridgeCrossing.value(self, terminal, level)
    }

    /// An end, drawn by the inverse of its distribution from a number between 0 and 1.
    ///
    /// # Formula
    ///
    /// `drift horizon + s N^-1(uniform)`
    ///
    /// # Errors
    ///
    /// [`Status::Uniform`] with the value.
    pub fn sample_terminal(&self, uniform: f64) -> Result<f64> {
        Quantity::SampleTerminal.value(self, uniform, 0.0)
    }

    /// The running maximum of a path that ends at `terminal`, drawn exactly from a number between 0 and 1.
    ///
    /// # Formula
    ///
    /// `(terminal + sqrt(terminal^2 - 2 s^2 ln(uniform))) / 2`
    ///
    /// # Errors
    ///
    /// [`Status::Terminal`] or [`Status::Uniform`] with the value.
    pub fn sample_max(&self, terminal: f64, uniform: f64) -> Result<f64> {
        Quantity::SampleMax.value(self, terminal, uniform)
    }

    /// The running minimum of a path that ends at `terminal`, drawn exactly from a number between 0 and 1.
    ///
    /// # Formula
    ///
    /// `(terminal - sqrt(terminal^2 - 2 s^2 ln(uniform))) / 2`
    ///
    /// # Errors
    ///
    /// [`Status::Terminal`] or [`Status::Uniform`] with the value.
    pub fn sample_min(&self, terminal: f64, uniform: f64) -> Result<f64> {
        Quantity::SampleMin.value(self, terminal, uniform)
    }

    /// The weight that turns an expectation under this law into one under another drift, on a path that ends at `terminal`.
    ///
    /// # Formula
    ///
    /// `exp((other_drift - drift) (terminal - (other_drift + drift) horizon / 2) / vol^2)`
    ///
    /// # Errors
    ///
    /// [`Status::Terminal`] or [`Status::OtherDrift`] with the value.
    pub fn drift_weight(&self, terminal: f64, other_drift: f64) -> Result<f64> {
        Quantity::DriftWeight.value(self, terminal, other_drift)
    }
}
