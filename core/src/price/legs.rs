//! Which payoff, under which event, a contract is made of: the table that turns a term sheet into formulas.

use crate::price::event::{Event, Levels};
use crate::price::hit;
use crate::price::sensitivity::Sensitivity;
use crate::price::setting::Setting;
use crate::special::Functions;
use crate::terms::{Contract, Direction, Knock, Payoff, RebatePaid, TermSheet};

/// What one leg pays.
#[derive(Clone, Copy, Debug)]
pub(crate) enum Pays {
    /// A payoff at expiry, under an event.
    AtExpiry(Payoff, Event),
    /// Cash at the moment of touching.
    AtHit,
    /// Cash now.
    Now,
}

/// An amount of something paid.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Leg {
    pub(crate) amount: f64,
    pub(crate) pays: Pays,
}

/// Nothing.
const NONE: Leg = Leg { amount: 0.0, pays: Pays::Now };

/// Whether the barrier is touched as the spot stands.
pub(crate) fn touched_now(sheet: &TermSheet, spot: f64) -> bool {
    match sheet.contract.direction() {
        None => false,
        Some(Direction::Up) => spot >= sheet.barrier,
        Some(Direction::Down) => spot <= sheet.barrier,
    }
}

impl Leg {
    /// The legs of a contract: its payoff and its rebate.
    pub(crate) fn of(sheet: &TermSheet, spot: f64) -> [Leg; 2] {
        let paid = |event| Leg { amount: 1.0, pays: event };
        let rebate = |event| Leg { amount: sheet.rebate, pays: Pays::AtExpiry(Payoff::Cash, event) };
        let rebate_touched = match sheet.rebate_paid {
            RebatePaid::Hit => Leg { amount: sheet.rebate, pays: Pays::AtHit },
            RebatePaid::Expiry => rebate(Event::Touched),
        };
        let legs = match sheet.contract {
            Contract::Vanilla(payoff) => [paid(Pays::AtExpiry(payoff, Event::Always)), NONE],
            Contract::Knock(_, Knock::Out, payoff) => [paid(Pays::AtExpiry(payoff, Event::Untouched)), rebate_touched],
            Contract::Knock(_, Knock::In, payoff) => {
                [paid(Pays::AtExpiry(payoff, Event::Touched)), rebate(Event::Untouched)]
            }
            Contract::OneTouch(_) => [rebate_touched, NONE],
            Contract::NoTouch(_) => [rebate(Event::Untouched), NONE],
        };
        if touched_now(sheet, spot) { legs.map(Leg::once_touched) } else { legs }
    }

    /// What is left of a leg when the barrier has been touched.
    fn once_touched(self) -> Leg {
        match self.pays {
            Pays::AtExpiry(payoff, Event::Touched) => Leg { pays: Pays::AtExpiry(payoff, Event::Always), ..self },
            Pays::AtExpiry(_, Event::Untouched) => NONE,
            Pays::AtHit => Leg { pays: Pays::Now, ..self },
            Pays::AtExpiry(_, Event::Always) | Pays::Now => self,
        }
    }

    /// Value of the leg.
    pub(crate) fn value<R: Functions>(self, setting: &Setting<R>, levels: &Levels) -> R {
        if self.amount == 0.0 {
            return R::of(0.0);
        }
        let unit = match self.pays {
            Pays::AtExpiry(payoff, event) => levels.claim(setting, payoff, event).worth(setting).value,
            Pays::AtHit => hit::value(setting, levels),
            Pays::Now => R::of(1.0),
        };
        unit.times(self.amount)
    }

    /// Value and derivatives of the leg.
    pub(crate) fn sensitivity<R: Functions>(self, setting: &Setting<R>, levels: &Levels) -> Sensitivity<R> {
        if self.amount == 0.0 {
            return Sensitivity::none();
        }
        let unit = match self.pays {
            Pays::AtExpiry(payoff, event) => levels.claim(setting, payoff, event).sensitivity(setting),
            Pays::AtHit => hit::sensitivity(setting, levels),
            Pays::Now => Sensitivity { value: R::of(1.0), ..Sensitivity::none() },
        };
        unit.times(self.amount)
    }
}
