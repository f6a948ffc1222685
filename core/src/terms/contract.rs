//! The kind of contract: what it pays, and what touching the barrier does to it.

use core::fmt;

use crate::error::{Error, Result, Status};

/// Which side of the spot the barrier lies on.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Direction {
    /// The barrier is above; it is touched when the spot is at or over it.
    Up,
    /// The barrier is below; it is touched when the spot is at or under it.
    Down,
}

/// What touching the barrier does.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Knock {
    /// The payoff comes to life when the barrier is touched.
    In,
    /// The payoff dies when the barrier is touched.
    Out,
}

/// What is paid at expiry, if it is paid, with `X` the spot at expiry.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Payoff {
    /// `max(X - strike, 0)`
    Call,
    /// `max(strike - X, 0)`
    Put,
    /// 1 if `X > strike`
    CashCall,
    /// 1 if `X < strike`
    CashPut,
    /// One share, `X`, if `X > strike`
    AssetCall,
    /// One share, `X`, if `X < strike`
    AssetPut,
    /// 1, whatever `X`
    Cash,
    /// One share, `X`, whatever it is worth
    Asset,
}

impl Payoff {
    /// Every payoff, in the order of the contract codes.
    pub const ALL: [Payoff; 8] = [
        Payoff::Call,
        Payoff::Put,
        Payoff::CashCall,
        Payoff::CashPut,
        Payoff::AssetCall,
        Payoff::AssetPut,
        Payoff::Cash,
        Payoff::Asset,
    ];

    /// Whether the payoff has a strike.
    pub const fn has_strike(self) -> bool {
        !matches!(self, Payoff::Cash | Payoff::Asset)
    }

    /// The payoff in the words of a book: `call`, `cash put`, `asset`, …
    pub const fn name(self) -> &'static str {
        match self {
            Payoff::Call => "call",
            Payoff::Put => "put",
            Payoff::CashCall => "cash call",
            Payoff::CashPut => "cash put",
            Payoff::AssetCall => "asset call",
            Payoff::AssetPut => "asset put",
            Payoff::Cash => "cash",
            Payoff::Asset => "asset",
        }
    }
}

/// A contract, without its numbers.
///
/// # Example
///
/// ```
/// use floodmark::terms::{Contract, Direction, Knock, Payoff};
/// let contract = Contract::Knock(Direction::Up, Knock::Out, Payoff::Call);
/// assert_eq!(contract.to_string(), "up-and-out call");
/// assert_eq!(Contract::parse("up-and-out call"), Some(contract));
/// assert_eq!(Contract::from_code(contract.code()), Ok(contract));
/// ```
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Contract {
    /// No barrier.
    Vanilla(Payoff),
    /// A payoff that a barrier knocks in or out.
    Knock(Direction, Knock, Payoff),
    /// Pays the rebate amount if the barrier is touched.
    OneTouch(Direction),
    /// Pays the rebate amount at expiry if the barrier was never touched.
    NoTouch(Direction),
}

impl Contract {
    /// How many contracts there are; the codes are `0 .. COUNT`.
    pub const COUNT: u8 = 44;

    /// The number that stands for the contract in columns and in C.
    ///
    /// # Formula
    ///
    /// `code = 8 * watch + payoff`, with payoff 0 … 7 in the order of [`Payoff::ALL`] and watch
    /// 0 none, 1 up-and-out, 2 up-and-in, 3 down-and-out, 4 down-and-in;
    /// then 40 up one-touch, 41 down one-touch, 42 up no-touch, 43 down no-touch.
    pub const fn code(self) -> u8 {
        match self {
            Contract::Vanilla(payoff) => payoff as u8,
            Contract::Knock(Direction::Up, Knock::Out, payoff) => 8 + payoff as u8,
            Contract::Knock(Direction::Up, Knock::In, payoff) => 16 + payoff as u8,
            Contract::Knock(Direction::Down, Knock::Out, payoff) => 24 + payoff as u8,
            Contract::Knock(Direction::Down, Knock::In, payoff) => 32 + payoff as u8,
            Contract::OneTouch(Direction::Up) => 40,
            Contract::OneTouch(Direction::Down) => 41,
            Contract::NoTouch(Direction::Up) => 42,
            Contract::NoTouch(Direction::Down) => 43,
        }
    }

    /// The contract with this code.
    ///
    /// # Errors
    ///
    /// [`Status::Contract`] if there is none.
    pub fn from_code(code: u8) -> Result<Contract> {
        let unknown = Error { status: Status::Contract, value: f64::from(code) };
        let payoff = *Payoff::ALL.get(usize::from(code % 8)).ok_or(unknown)?;
        match code {
            0..=7 => Ok(Contract::Vanilla(payoff)),
            8..=15 => Ok(Contract::Knock(Direction::Up, Knock::Out, payoff)),
            16..=23 => Ok(Contract::Knock(Direction::Up, Knock::In, payoff)),
            24..=31 => Ok(Contract::Knock(Direction::Down, Knock::Out, payoff)),
            32..=39 => Ok(Contract::Knock(Direction::Down, Knock::In, payoff)),
            40 => Ok(Contract::OneTouch(Direction::Up)),
            41 => Ok(Contract::OneTouch(Direction::Down)),
            42 => Ok(Contract::NoTouch(Direction::Up)),
            43 => Ok(Contract::NoTouch(Direction::Down)),
            _ => Err(unknown),
        }
    }

    /// The contract with this text, as in a book: `put`, `up-and-out cash call`, `down one-touch`, …
    pub fn parse(text: &str) -> Option<Contract> {
        // Codes of one way to watch the barrier stand together, save for the touches: most are passed by in eights.
        let promising = |first: &u8| {
            *first == Contract::OneTouch(Direction::Up).code()
                || Contract::from_code(*first).is_ok_and(|contract| text.starts_with(contract.words().0))
        };
        let same = |contract: &Contract| {
            let (watch, payoff) = contract.words();
            text.strip_prefix(watch) == Some(payoff)
        };
        let eights = (0..Contract::COUNT).step_by(8).filter(promising);
        eights.flat_map(|first| first..first + 8).filter_map(|code| Contract::from_code(code).ok()).find(same)
    }

    /// Which side the barrier lies on, if there is one.
    pub const fn direction(self) -> Option<Direction> {
        match self {
            Contract::Vanilla(_) => None,
            Contract::Knock(direction, _, _) | Contract::OneTouch(direction) | Contract::NoTouch(direction) => {
                Some(direction)
            }
        }
    }

    /// Whether the contract has a strike.
    pub const fn has_strike(self) -> bool {
        match self {
            Contract::Vanilla(payoff) | Contract::Knock(_, _, payoff) => payoff.has_strike(),
            Contract::OneTouch(_) | Contract::NoTouch(_) => false,
        }
    }

    /// Whether a rebate can be paid at the hit: knock-outs and one-touches only.
    pub const fn pays_at_hit(self) -> bool {
        matches!(self, Contract::Knock(_, Knock::Out, _) | Contract::OneTouch(_))
    }

    /// What touching the barrier does, and the payoff, as the two halves of the text.
    const fn words(self) -> (&'static str, &'static str) {
        match self {
            Contract::Vanilla(payoff) => ("", payoff.name()),
            Contract::Knock(Direction::Up, Knock::Out, payoff) => ("up-and-out ", payoff.name()),
            Contract::Knock(Direction::Up, Knock::In, payoff) => ("up-and-in ", payoff.name()),
            Contract::Knock(Direction::Down, Knock::Out, payoff) => ("down-and-out ", payoff.name()),
            Contract::Knock(Direction::Down, Knock::In, payoff) => ("down-and-in ", payoff.name()),
            Contract::OneTouch(Direction::Up) => ("up ", "one-touch"),
            Contract::OneTouch(Direction::Down) => ("down ", "one-touch"),
            Contract::NoTouch(Direction::Up) => ("up ", "no-touch"),
            Contract::NoTouch(Direction::Down) => ("down ", "no-touch"),
        }
    }
}

impl fmt::Display for Contract {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        let (watch, payoff) = self.words();
        f.write_str(watch)?;
        f.write_str(payoff)
    }
}

#[cfg(test)]
mod tests {
    extern crate std;
    use std::collections::HashSet;
    use std::string::{String, ToString};

    use super::*;

    #[test]
    fn every_code_is_a_contract_with_a_text_of_its_own() {
        let texts: HashSet<String> = (0..Contract::COUNT)
            .map(|code| {
                let contract = Contract::from_code(code).unwrap();
                assert_eq!(contract.code(), code);
                assert_eq!(Contract::parse(&contract.to_string()), Some(contract));
                contract.to_string()
            })
            .collect();
        assert_eq!(texts.len(), usize::from(Contract::COUNT));
    }

    #[test]
    fn no_other_code_or_text_is_a_contract() {
        for code in Contract::COUNT..=u8::MAX {
            assert_eq!(Contract::from_code(code), Err(Error { status: Status::Contract, value: f64::from(code) }));
        }
        for text in ["", "up-and-out", "up-and-out ", "Call", "call ", "up-and-over call", "up one-touch call"] {
            assert_eq!(Contract::parse(text), None, "{text}");
        }
    }
}
