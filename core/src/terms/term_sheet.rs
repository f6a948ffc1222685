//! A contract with its numbers.

use crate::error::{Error, Result, Status};
use crate::terms::{Contract, RebatePaid};

/// The longest expiry that is taken, in years.
pub const MAX_EXPIRY: f64 = 10000.0;

/// A contract with its numbers, as a term sheet states them.
///
/// # Units
///
/// `strike`, `barrier` and `rebate` in the currency of the spot, `expiry` in years from now.
///
/// # Domain
///
/// A number that the contract has no use for is ignored: the strike of a touch or of a bare cash or asset,
/// the barrier, rebate of a vanilla.
///
/// # Example
///
/// ```
/// use floodmark::terms::{Contract, Direction, Knock, Payoff, RebatePaid, TermSheet};
/// let sheet = TermSheet::new(Contract::Knock(Direction::Up, Knock::Out, Payoff::Call), 0.5)
///     .strike(100.0)
///     .barrier(120.0)
///     .rebate(3.0, RebatePaid::Hit);
/// assert_eq!(sheet.barrier, 120.0);
/// ```
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct TermSheet {
    /// What is paid, and what the barrier does.
    pub contract: Contract,
    /// Strike.
    pub strike: f64,
    /// Barrier, watched continuously from now to expiry.
    pub barrier: f64,
    /// Rebate of a knock-out or knock-in; the amount of a one-touch or no-touch.
    pub rebate: f64,
    /// When the rebate is paid.
    pub rebate_paid: RebatePaid,
    /// Time to expiry.
    pub expiry: f64,
}

impl TermSheet {
    /// A contract with its expiry; strike and barrier are to be given where it has them, the rebate is 0.
    pub const fn new(contract: Contract, expiry: f64) -> TermSheet {
        TermSheet {
            contract,
            strike: f64::NAN,
            barrier: f64::NAN,
            rebate: 0.0,
            rebate_paid: RebatePaid::natural(contract),
            expiry,
        }
    }

    /// With this strike.
    #[must_use]
    pub const fn strike(self, strike: f64) -> TermSheet {
        TermSheet { strike, ..self }
    }

    /// With this barrier.
    #[must_use]
    pub const fn barrier(self, barrier: f64) -> TermSheet {
        TermSheet { barrier, ..self }
    }

    /// With this rebate, or this amount of a touch.
    #[must_use]
    pub const fn rebate(self, rebate: f64, rebate_paid: RebatePaid) -> TermSheet {
        TermSheet { rebate, rebate_paid, ..self }
    }

    /// The sheet itself, if every number that the contract uses is within its domain.
    ///
    /// # Errors
    ///
    /// [`Status::Strike`], [`Status::Barrier`], [`Status::Rebate`], [`Status::RebateAtHit`] or
    /// [`Status::Expiry`] with the value.
    pub fn checked(self) -> Result<TermSheet> {
        let refuse = |status, value| Err(Error { status, value });
        if self.contract.has_strike() && !(self.strike > 0.0 && self.strike <= f64::MAX) {
            return refuse(Status::Strike, self.strike);
        }
        if self.contract.direction().is_some() {
            if !(self.barrier > 0.0 && self.barrier <= f64::MAX) {
                return refuse(Status::Barrier, self.barrier);
            }
            if !(self.rebate >= 0.0 && self.rebate <= f64::MAX) {
                return refuse(Status::Rebate, self.rebate);
            }
        }
        if self.rebate_paid == RebatePaid::Hit && !self.contract.pays_at_hit() {
            return refuse(Status::RebateAtHit, f64::from(self.rebate_paid.code()));
        }
        if !(self.expiry >= 0.0 && self.expiry <= MAX_EXPIRY) {
            return refuse(Status::Expiry, self.expiry);
        }
        Ok(self)
    }
}
