//! The questions that the law answers, by code, so that columns of answers need one door only.

use crate::brownian::{Law, Walk};
use crate::error::{Error, Result, Status};
use crate::num::DoubleDouble;
use crate::special::Functions;

/// A quantity of the law of Brownian motion; each is a method of [`Law`] with the arguments that
/// [`Quantity::arguments`] names.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
#[repr(u8)]
pub enum Quantity {
    /// Density of the end.
    TerminalPdf = 0,
    /// `P(W_T <= terminal)`
    TerminalCdf = 1,
    /// The end that is not exceeded with `probability`.
    TerminalQuantile = 2,
    /// Density of the maximum.
    MaxPdf = 3,
    /// `P(M_T <= level)`
    MaxCdf = 4,
    /// `P(M_T >= level)`
    MaxTail = 5,
    /// The level that the maximum does not exceed with `probability`.
    MaxQuantile = 6,
    /// Density of the minimum.
    MinPdf = 7,
    /// `P(m_T <= level)`
    MinCdf = 8,
    /// `P(m_T >= level)`
    MinTail = 9,
    /// The level that the minimum does not exceed with `probability`.
    MinQuantile = 10,
    /// `P(W_T <= terminal, M_T <= level)`
    JointMaxCdf = 11,
    /// Joint density of end and maximum.
    JointMaxPdf = 12,
    /// `P(W_T <= terminal, m_T <= level)`
    JointMinCdf = 13,
    /// Joint density of end and minimum.
    JointMinPdf = 14,
    /// Probability that a level is not touched by the horizon.
    Survival = 15,
    /// Density of the time at which a level is first touched.
    FirstPassagePdf = 16,
    /// Probability that a level is touched by a time.
    FirstPassageCdf = 17,
    /// The time by which a level is touched with `probability`.
    FirstPassageQuantile = 18,
    /// `E[exp(-discount_rate tau); tau <= horizon]`
    DiscountedFirstPassage = 19,
    /// Probability that a level was touched, given the end.
    BridgeCrossing = 20,
    /// An end drawn by a uniform number.
    SampleTerminal = 21,
    /// A maximum drawn by a uniform number, given the end.
    SampleMax = 22,
    /// A minimum drawn by a uniform number, given the end.
    SampleMin = 23,
    /// The density of another drift's law against this one's, on paths with this end.
    DriftWeight = 24,
}

impl Quantity {
    /// Every quantity, in the order of the codes.
    pub const ALL: [Quantity; 25] = [
        Quantity::TerminalPdf,
        Quantity::TerminalCdf,
        Quantity::TerminalQuantile,
        Quantity::MaxPdf,
        Quantity::MaxCdf,
        Quantity::MaxTail,
        Quantity::MaxQuantile,
        Quantity::MinPdf,
        Quantity::MinCdf,
        Quantity::MinTail,
        Quantity::MinQuantile,
        Quantity::JointMaxCdf,
        Quantity::JointMaxPdf,
        Quantity::JointMinCdf,
        Quantity::JointMinPdf,
        Quantity::Survival,
        Quantity::FirstPassagePdf,
        Quantity::FirstPassageCdf,
        Quantity::FirstPassageQuantile,
        Quantity::DiscountedFirstPassage,
        Quantity::BridgeCrossing,
        Quantity::SampleTerminal,
        Quantity::SampleMax,
        Quantity::SampleMin,
        Quantity::DriftWeight,
    ];

    /// The number that stands for the quantity in columns and in C.
    pub const fn code(self) -> u8 {
        self as u8
    }

    /// The quantity with this code.
    ///
    /// # Errors
    ///
    /// [`Status::Quantity`] if there is none.
    pub fn from_code(code: u8) -> Result<Quantity> {
        let unknown = Error { status: Status::Quantity, value: f64::from(code) };
        Quantity::ALL.get(usize::from(code)).copied().ok_or(unknown)
    }

    /// The name of the method that answers it.
    pub const fn name(self) -> &'static str {
        match self {
            Quantity::TerminalPdf => "terminal_pdf",
            Quantity::TerminalCdf => "terminal_cdf",
            Quantity::TerminalQuantile => "terminal_quantile",
            Quantity::MaxPdf => "max_pdf",
            Quantity::MaxCdf => "max_cdf",
            Quantity::MaxTail => "max_tail",
            Quantity::MaxQuantile => "max_quantile",
            Quantity::MinPdf => "min_pdf",
            Quantity::MinCdf => "min_cdf",
            Quantity::MinTail => "min_tail",
            Quantity::MinQuantile => "min_quantile",
            Quantity::JointMaxCdf => "joint_max_cdf",
            Quantity::JointMaxPdf => "joint_max_pdf",
            Quantity::JointMinCdf => "joint_min_cdf",
            Quantity::JointMinPdf => "joint_min_pdf",
            Quantity::Survival => "survival",
            Quantity::FirstPassagePdf => "first_passage_pdf",
            Quantity::FirstPassageCdf => "first_passage_cdf",
            Quantity::FirstPassageQuantile => "first_passage_quantile",
            Quantity::DiscountedFirstPassage => "discounted_first_passage",
            Quantity::BridgeCrossing => "bridge_crossing",
            Quantity::SampleTerminal => "sample_terminal",
            Quantity::SampleMax => "sample_max",
            Quantity::SampleMin => "sample_min",
            Quantity::DriftWeight => "drift_weight",
        }
    }

    /// The names of its one or two arguments.
    pub const fn arguments(self) -> &'static [&'static str] {
        match self {
            Quantity::TerminalPdf | Quantity::TerminalCdf => &["terminal"],
            Quantity::TerminalQuantile | Quantity::MaxQuantile | Quantity::MinQuantile => &["probability"],
            Quantity::MaxPdf
            | Quantity::MaxCdf
            | Quantity::MaxTail
            | Quantity::MinPdf
            | Quantity::MinCdf
            | Quantity::MinTail
            | Quantity::Survival => &["level"],
            Quantity::JointMaxCdf
            | Quantity::JointMaxPdf
            | Quantity::JointMinCdf
            | Quantity::JointMinPdf
            | Quantity::BridgeCrossing => &["terminal", "level"],
            Quantity::FirstPassagePdf | Quantity::FirstPassageCdf => &["level", "time"],
            Quantity::FirstPassageQuantile => &["level", "probability"],
            Quantity::DiscountedFirstPassage => &["level", "discount_rate"],
            Quantity::SampleTerminal => &["uniform"],
            Quantity::SampleMax | Quantity::SampleMin => &["terminal", "uniform"],
            Quantity::DriftWeight => &["terminal", "other_drift"],
        }
    }

    /// The answer for a law; `second` is ignored where there is one argument only.
    ///
    /// # Errors
    ///
    /// The argument that is out of its domain, with its value; [`Status::Overflow`] where the answer is not a
    /// number that binary64 can hold. A quantile may be infinite.
    pub fn value(self, law: &Law, first: f64, second: f64) -> Result<f64> {
        self.evaluate::<f64>(law, first, second)
    }

    /// The same, correct to the last place: the law's own reference path, in double-double.
    ///
    /// # Errors
    ///
    /// As [`Quantity::value`].
    pub fn reference(self, law: &Law, first: f64, second: f64) -> Result<f64> {
        self.evaluate::<DoubleDouble>(law, first, second)
    }

    fn evaluate<R: Functions>(self, law: &Law, first: f64, second: f64) -> Result<f64> {
        let names = self.arguments();
        checked(names.first(), first)?;
        checked(names.get(1), second)?;
        let walk = Walk::new(R::of(law.drift()), R::of(law.vol()), R::of(law.horizon()));
        let [a, b] = [first, second].map(R::of);
        let one = R::of(1.0);
        let value = match self {
            Quantity::TerminalPdf => walk.terminal_pdf(a),
            Quantity::TerminalCdf => walk.end(a).below,
            Quantity::TerminalQuantile | Quantity::SampleTerminal => walk.terminal_quantile(a),
            Quantity::MaxPdf => walk.max_pdf(a),
            Quantity::MaxCdf => walk.max_cdf(a),
            Quantity::MaxTail => walk.max_tail(a),
            Quantity::MaxQuantile => walk.max_quantile(a, one - a),
            Quantity::MinPdf => walk.mirrored().max_pdf(-a),
            Quantity::MinCdf => walk.mirrored().max_tail(-a),
            Quantity::MinTail => walk.mirrored().max_cdf(-a),
            Quantity::MinQuantile => -walk.mirrored().max_quantile(one - a, a),
            Quantity::JointMaxCdf => walk.joint_max_cdf(a, b),
            Quantity::JointMaxPdf => walk.joint_max_pdf(a, b),
            Quantity::JointMinCdf => walk.mirrored().joint_max_tail(-a, -b),
            Quantity::JointMinPdf => walk.mirrored().joint_max_pdf(-a, -b),
            Quantity::Survival => {
                let (walk, distance) = walk.towards(a);
                walk.max_cdf(distance)
            }
            Quantity::FirstPassagePdf if first == 0.0 => return Err(Error { status: Status::Level, value: first }),
            Quantity::FirstPassagePdf => walk.first_passage_pdf(a, b),
            Quantity::FirstPassageCdf => walk.first_passage_cdf(a, b),
            Quantity::FirstPassageQuantile => walk.first_passage_quantile(a, b),
            Quantity::DiscountedFirstPassage => walk.discounted_first_passage(a, b),
            Quantity::BridgeCrossing => walk.bridge_crossing(a, b),
            Quantity::SampleMax => walk.bridge_max(a, R::ln_ratio(second, 1.0)),
            Quantity::SampleMin => -walk.mirrored().bridge_max(-a, R::ln_ratio(second, 1.0)),
            Quantity::DriftWeight => walk.drift_weight(a, b),
        };
        let value = value.nearest();
        let quantile = matches!(
            self,
            Quantity::TerminalQuantile | Quantity::MaxQuantile | Quantity::MinQuantile | Quantity::FirstPassageQuantile
        );
        if value.is_finite() || (quantile && !value.is_nan()) {
            Ok(value)
        } else {
            Err(Error { status: Status::Overflow, value })
        }
    }
}

/// The largest magnitude of an argument.
pub(crate) const LARGEST: f64 = 1e75;

/// Refuses an argument that is out of the domain that its name has.
fn checked(name: Option<&&str>, value: f64) -> Result<()> {
    let moderate = value.abs() <= LARGEST;
    let (status, valid) = match name {
        None => return Ok(()),
        Some(&"level") => (Status::Level, moderate),
        Some(&"terminal") => (Status::Terminal, moderate),
        Some(&"discount_rate") => (Status::DiscountRate, moderate),
        Some(&"other_drift") => (Status::OtherDrift, moderate),
        Some(&"time") => (Status::Time, value >= 0.0),
        Some(&"uniform") => (Status::Uniform, value > 0.0 && value < 1.0),
        Some(_) => (Status::Probability, (0.0..=1.0).contains(&value)),
    };
    if valid { Ok(()) } else { Err(Error { status, value }) }
}
