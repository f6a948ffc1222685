//! When a rebate is paid.

use core::fmt;

use crate::error::{Error, Result, Status};
use crate::terms::Contract;

/// When the rebate (or the amount of a touch) is paid.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum RebatePaid {
    /// At the moment the barrier is touched.
    Hit,
    /// At expiry.
    Expiry,
}

impl RebatePaid {
    /// The code in columns and in C that leaves the choice to [`RebatePaid::natural`].
    pub const NATURAL_CODE: u8 = 0;

    /// The number in columns and in C: 1 hit, 2 expiry.
    pub const fn code(self) -> u8 {
        match self {
            RebatePaid::Hit => 1,
            RebatePaid::Expiry => 2,
        }
    }

    /// The choice with this code for this contract: 0 the natural one, 1 hit, 2 expiry.
    ///
    /// # Errors
    ///
    /// [`Status::RebatePaid`] for any other code.
    pub fn from_code(code: u8, contract: Contract) -> Result<RebatePaid> {
        match code {
            RebatePaid::NATURAL_CODE => Ok(RebatePaid::natural(contract)),
            1 => Ok(RebatePaid::Hit),
            2 => Ok(RebatePaid::Expiry),
            _ => Err(Error { status: Status::RebatePaid, value: f64::from(code) }),
        }
    }

    /// What a term sheet means when it is silent: hit for knock-outs and one-touches, expiry for the rest.
    pub const fn natural(contract: Contract) -> RebatePaid {
        if contract.pays_at_hit() { RebatePaid::Hit } else { RebatePaid::Expiry }
    }

    /// The choice with this text: `hit` or `expiry`.
    pub fn parse(text: &str) -> Option<RebatePaid> {
        match text {
            "hit" => Some(RebatePaid::Hit),
            "expiry" => Some(RebatePaid::Expiry),
            _ => None,
        }
    }
}

impl fmt::Display for RebatePaid {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(match self {
            RebatePaid::Hit => "hit",
            RebatePaid::Expiry => "expiry",
        })
    }
}
