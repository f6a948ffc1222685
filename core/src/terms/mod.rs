//! The words of the trade as types: what is written in the contract and what the market says today.

mod contract;
mod market;
mod rebate;
mod term_sheet;

pub use contract::{Contract, Direction, Knock, Payoff};
pub use market::{MAX_RATE, MAX_VOL, Market};
pub use rebate::RebatePaid;
pub use term_sheet::{MAX_EXPIRY, TermSheet};
