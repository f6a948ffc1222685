//! What can be wrong with an input, as a number that never changes its meaning and as a sentence.

use core::fmt;

/// The numbered outcome of one valuation: [`Status::Ok`], or which input was refused.
///
/// The numbers are part of every door (Rust, Python, C) and are never reused.
/// Numbers below 100 speak of one row, numbers from 100 on of a whole call.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
#[repr(i32)]
pub enum Status {
    /// The row was valued.
    Ok = 0,
    /// The contract code is not one of [`crate::terms::Contract`]'s.
    Contract = 1,
    /// The `rebate_paid` code is not one of [`crate::terms::RebatePaid`]'s.
    RebatePaid = 2,
    /// `rebate_paid` is `hit`, but the contract has no hit to pay at.
    RebateAtHit = 3,
    /// `spot` must be positive and finite.
    Spot = 10,
    /// `strike` must be positive and finite.
    Strike = 11,
    /// `barrier` must be positive and finite.
    Barrier = 12,
    /// `rebate` must be finite and at least 0.
    Rebate = 13,
    /// `expiry` must be from 0 to [`crate::terms::MAX_EXPIRY`] years.
    Expiry = 14,
    /// `vol` must be from 0 to [`crate::terms::MAX_VOL`].
    Vol = 15,
    /// `rate` must be within plus and minus [`crate::terms::MAX_RATE`].
    Rate = 16,
    /// `dividend` must be within plus and minus [`crate::terms::MAX_RATE`].
    Dividend = 17,
    /// The inputs are valid, but the answer is beyond the range of binary64.
    Overflow = 20,
    /// The code of a law of Brownian motion is not one of [`crate::batch::Quantity`]'s.
    Quantity = 30,
    /// `drift` must be within plus and minus 1e75.
    Drift = 31,
    /// `horizon` must be from 1e-75 to 1e75.
    Horizon = 32,
    /// `level` must be within plus and minus 1e75, and not 0 where its density is asked for.
    Level = 33,
    /// `terminal` must be within plus and minus 1e75.
    Terminal = 34,
    /// `time` must be at least 0.
    Time = 35,
    /// `probability` must be from 0 to 1.
    Probability = 36,
    /// `discount_rate` must be within plus and minus 1e75.
    DiscountRate = 37,
    /// `uniform` must be strictly between 0 and 1.
    Uniform = 38,
    /// `vol` of a law of Brownian motion must be from 1e-75 to 1e75.
    LawVol = 39,
    /// `other_drift` must be within plus and minus 1e75.
    OtherDrift = 40,
    /// A required pointer is null.
    NullPointer = 100,
    /// A column is shorter than the call needs.
    ColumnLength = 101,
    /// A fault of the library itself was caught at its border; please report it.
    Internal = 102,
}

impl Status {
    /// Every status, in the order of the numbers.
    pub const ALL: [Status; 27] = [
        Status::Ok,
        Status::Contract,
        Status::RebatePaid,
        Status::RebateAtHit,
        Status::Spot,
        Status::Strike,
        Status::Barrier,
        Status::Rebate,
        Status::Expiry,
        Status::Vol,
        Status::Rate,
        Status::Dividend,
        Status::Overflow,
        Status::Quantity,
        Status::Drift,
        Status::Horizon,
        Status::Level,
        Status::Terminal,
        Status::Time,
        Status::Probability,
        Status::DiscountRate,
        Status::Uniform,
        Status::LawVol,
        Status::OtherDrift,
        Status::NullPointer,
        Status::ColumnLength,
        Status::Internal,
    ];

    /// The number that crosses the C and Python doors.
    pub const fn code(self) -> i32 {
        self as i32
    }

    /// The status with this number, if there is one.
    pub fn from_code(code: i32) -> Option<Status> {
        Status::ALL.into_iter().find(|status| status.code() == code)
    }

    /// The input that the status speaks of, by the name it has in every door; empty where it is none.
    pub const fn field(self) -> &'static str {
        match self {
            Status::Ok | Status::Overflow | Status::NullPointer | Status::ColumnLength | Status::Internal => "",
            Status::Contract => "contract",
            Status::RebatePaid | Status::RebateAtHit => "rebate_paid",
            Status::Spot => "spot",
            Status::Strike => "strike",
            Status::Barrier => "barrier",
            Status::Rebate => "rebate",
            Status::Expiry => "expiry",
            Status::Vol | Status::LawVol => "vol",
            Status::Rate => "rate",
            Status::Dividend => "dividend",
            Status::Quantity => "quantity",
            Status::Drift => "drift",
            Status::Horizon => "horizon",
            Status::Level => "level",
            Status::Terminal => "terminal",
            Status::Time => "time",
            Status::Probability => "probability",
            Status::DiscountRate => "discount_rate",
            Status::Uniform => "uniform",
            Status::OtherDrift => "other_drift",
        }
    }

    /// The rule that was broken, as the sentence that [`Error`] completes with the value.
    pub const fn rule(self) -> &'static str {
        match self {
            Status::Ok => "ok",
            Status::Contract => "contract is not one that is known",
            Status::RebatePaid => "rebate_paid must be hit or expiry",
            Status::RebateAtHit => "rebate_paid is hit, but this contract has no hit to pay at",
            Status::Spot => "spot must be positive and finite",
            Status::Strike => "strike must be positive and finite",
            Status::Barrier => "barrier must be positive and finite",
            Status::Rebate => "rebate must be finite and at least 0",
            Status::Expiry => "expiry must be from 0 to 10000 years",
            Status::Vol => "vol must be from 0 to 1000",
            Status::Rate => "rate must be from -1000 to 1000",
            Status::Dividend => "dividend must be from -1000 to 1000",
            Status::Overflow => "the answer is beyond the range of a binary64 number",
            Status::Quantity => "quantity is not one that is known",
            Status::Drift => "drift must be from -1e75 to 1e75",
            Status::Horizon => "horizon must be from 1e-75 to 1e75",
            Status::Level => "level must be from -1e75 to 1e75, and not 0 for a density of its time",
            Status::Terminal => "terminal must be from -1e75 to 1e75",
            Status::Time => "time must be at least 0",
            Status::Probability => "probability must be from 0 to 1",
            Status::DiscountRate => "discount_rate must be from -1e75 to 1e75",
            Status::Uniform => "uniform must be strictly between 0 and 1",
            Status::LawVol => "vol must be from 1e-75 to 1e75",
            Status::OtherDrift => "other_drift must be from -1e75 to 1e75",
            Status::NullPointer => "a required pointer is null",
            Status::ColumnLength => "a column is shorter than the call needs",
            Status::Internal => "a fault inside the library was caught at its border",
        }
    }
}

/// Why an input was refused: the [`Status`] names the field and its rule, `value` is what was given.
///
/// # Example
///
/// ```
/// use floodmark::{Error, Status};
/// let error = Error { status: Status::Vol, value: -0.2 };
/// assert_eq!(error.to_string(), "vol must be from 0 to 1000, got -0.2");
/// ```
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Error {
    /// Which rule was broken.
    pub status: Status,
    /// The value that broke it.
    pub value: f64,
}

impl fmt::Display for Error {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(self.status.rule())?;
        match self.status {
            Status::Ok
            | Status::RebateAtHit
            | Status::Overflow
            | Status::NullPointer
            | Status::ColumnLength
            | Status::Internal => Ok(()),
            _ => write!(f, ", got {}", self.value),
        }
    }
}

impl core::error::Error for Error {}

/// What a valuation returns.
pub type Result<T> = core::result::Result<T, Error>;
