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

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn codes_and_names_lead_back_to_their_quantity() {
        for (code, quantity) in (0..).zip(Quantity::ALL) {
            assert_eq!(quantity.code(), code);
            assert_eq!(Quantity::from_code(code), Ok(quantity));
            assert_eq!(Quantity::ALL.iter().filter(|other| other.name() == quantity.name()).count(), 1);
            assert!((1..=2).contains(&quantity.arguments().len()));
        }
        assert_eq!(Quantity::from_code(25), Err(Error { status: Status::Quantity, value: 25.0 }));
    }

    #[test]
    fn what_is_out_of_its_domain_is_refused_by_its_name_and_value() {
        let law = Law::new(0.1, 0.3, 2.0).unwrap();
        for quantity in Quantity::ALL {
            for (place, name) in quantity.arguments().iter().enumerate() {
                let (status, bad): (Status, &[f64]) = match *name {
                    "level" => (Status::Level, &[f64::INFINITY, -1.1e75]),
                    "terminal" => (Status::Terminal, &[f64::NEG_INFINITY, 1.1e75]),
                    "time" => (Status::Time, &[-1e-300, f64::NEG_INFINITY]),
                    "probability" => (Status::Probability, &[-5e-324, 1.0 + f64::EPSILON]),
                    "uniform" => (Status::Uniform, &[0.0, 1.0, -0.5]),
                    "discount_rate" => (Status::DiscountRate, &[f64::INFINITY, -1.1e75]),
                    "other_drift" => (Status::OtherDrift, &[f64::INFINITY, 1.1e75]),
                    other => panic!("{other}"),
                };
                for &value in bad.iter().chain(&[f64::NAN]) {
                    let mut arguments = [0.5, 0.5];
                    arguments[place] = value;
                    for refused in [
                        quantity.value(&law, arguments[0], arguments[1]),
                        quantity.reference(&law, arguments[0], arguments[1]),
                    ] {
                        let error = refused.unwrap_err();
                        assert_eq!(error.status, status, "{quantity:?} {name} {value}");
                        assert_eq!(error.value.to_bits(), value.to_bits());
                        assert_eq!(error.status.field(), *name);
                    }
                }
            }
        }
        assert_eq!(law.first_passage_pdf(0.0, 1.0).unwrap_err().status, Status::Level);
        for bad in [f64::NAN, f64::INFINITY, -1.1e75] {
            assert_eq!(Law::new(bad, 0.3, 2.0).unwrap_err().status, Status::Drift);
        }
        for bad in [f64::NAN, f64::INFINITY, 0.0, -0.3, 0.9e-75] {
            assert_eq!(Law::new(0.1, bad, 2.0).unwrap_err().status, Status::LawVol);
            assert_eq!(Law::new(0.1, 0.3, bad).unwrap_err().status, Status::Horizon);
        }
    }

    #[test]
    fn the_second_argument_is_ignored_where_there_is_one_only() {
        let law = Law::new(0.1, 0.3, 2.0).unwrap();
        for quantity in Quantity::ALL.into_iter().filter(|quantity| quantity.arguments().len() == 1) {
            assert_eq!(quantity.value(&law, 0.5, f64::NAN), quantity.value(&law, 0.5, 0.0));
        }
    }

    #[test]
    fn the_minimum_is_the_mirrored_maximum() {
        let law = Law::new(0.1, 0.3, 2.0).unwrap();
        let mirrored = Law::new(-0.1, 0.3, 2.0).unwrap();
        for level in [1e-9, 0.05, 0.4, 2.0] {
            assert_eq!(law.min_pdf(-level), mirrored.max_pdf(level));
            assert_eq!(law.min_cdf(-level), mirrored.max_tail(level));
            assert_eq!(law.min_tail(-level), mirrored.max_cdf(level));
            assert_eq!(law.survival(-level), mirrored.survival(level));
            assert_eq!(law.survival(level), law.max_cdf(level));
            assert_eq!(law.survival(-level), law.min_tail(-level));
            assert_eq!(law.joint_min_pdf(0.1, -level), mirrored.joint_max_pdf(-0.1, level));
            // P(W <= x, m <= a) + P(W <= x, m > a) = P(W <= x)
            let untouched = mirrored.max_cdf(level).unwrap() - mirrored.joint_max_cdf(-0.1, level).unwrap();
            let sum = law.joint_min_cdf(0.1, -level).unwrap() + untouched;
            let end = law.terminal_cdf(0.1).unwrap();
            assert!((sum - end).abs() <= 4.0 * f64::EPSILON, "{level}: {sum} {end}");
        }
        for probability in [0.125, 0.5, 0.75] {
            let level = law.min_quantile(probability).unwrap();
            assert_eq!(level, -mirrored.max_quantile(1.0 - probability).unwrap());
        }
        assert_eq!([0.0, 1.0].map(|p| law.min_quantile(p).unwrap()), [f64::NEG_INFINITY, 0.0]);
        assert_eq!(law.sample_min(0.2, 0.3).unwrap(), -mirrored.sample_max(-0.2, 0.3).unwrap());
    }

    #[test]
    fn drawn_ends_and_maxima_have_their_joint_law() {
        const SIDE: u32 = 256;
        for (drift, vol, horizon) in [(0.1, 0.3, 2.0), (-0.7, 0.4, 0.5), (0.0, 1.0, 1.0)] {
            let law = Law::new(drift, vol, horizon).unwrap();
            let spread = vol * libm::sqrt(horizon);
            for (terminal, level) in [(0.0, 0.5), (-0.5, 0.2), (1.0, 1.0), (0.7, 2.0)] {
                let (terminal, level) = (drift * horizon + terminal * spread, level * spread);
                let uniform = |index: u32| (f64::from(index) + 0.5) / f64::from(SIDE);
                let mut count = 0;
                for first in 0..SIDE {
                    for second in 0..SIDE {
                        let (end, maximum) = law.sample_terminal_max(uniform(first), uniform(second)).unwrap();
                        assert!(maximum >= end && maximum >= 0.0);
                        count += u32::from(end <= terminal && maximum <= level);
                    }
                }
                let share = f64::from(count) / f64::from(SIDE * SIDE);
                let wanted = law.joint_max_cdf(terminal, level).unwrap();
                // A grid misses by its mesh along the border of the event.
                assert!((share - wanted).abs() < 2.0 / f64::from(SIDE), "{law:?} {terminal} {level}: {share} {wanted}");
            }
        }
    }

    /// Whether an answer is one that the quantity can have.
    fn possible(quantity: Quantity, answer: f64) -> bool {
        match quantity {
            Quantity::TerminalQuantile | Quantity::SampleTerminal | Quantity::SampleMin => !answer.is_nan(),
            Quantity::MinQuantile => answer <= 0.0,
            Quantity::TerminalCdf
            | Quantity::MaxCdf
            | Quantity::MaxTail
            | Quantity::MinCdf
            | Quantity::MinTail
            | Quantity::JointMaxCdf
            | Quantity::JointMinCdf
            | Quantity::Survival
            | Quantity::FirstPassageCdf
            | Quantity::BridgeCrossing => (0.0..=1.0).contains(&answer),
            _ => answer >= 0.0,
        }
    }

    #[test]
    fn a_wild_input_has_a_possible_answer_or_a_status() {
        const WILD: [f64; 11] = [-1e75, -1e30, -2.0, -1e-30, -1e-75, 0.0, 1e-75, 1e-30, 0.5, 1e30, 1e75];
        const WILD_POSITIVE: [f64; 5] = [1e-75, 1e-30, 0.5, 1e30, 1e75];
        let mut answers = [0; 25];
        for drift in WILD {
            for vol in WILD_POSITIVE {
                for horizon in WILD_POSITIVE {
                    let law = Law::new(drift, vol, horizon).unwrap();
                    for quantity in Quantity::ALL {
                        for first in WILD {
                            for second in WILD {
                                match quantity.value(&law, first, second) {
                                    Ok(answer) => {
                                        assert!(
                                            possible(quantity, answer),
                                            "{quantity:?} of {law:?} at {first:e}, {second:e} is {answer:e}"
                                        );
                                        answers[usize::from(quantity.code())] += 1;
                                    }
                                    Err(error) => assert_ne!(error.status, Status::Ok),
                                }
                                if quantity.arguments().len() == 1 {
                                    break;
                                }
                            }
                        }
                    }
                }
            }
        }
        assert!(answers.iter().all(|&count| count > 100), "{answers:?}");
    }
}
