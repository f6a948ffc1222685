//! Barrier options, touches and the running maximum of Brownian motion.
//!
//! Values and analytic Greeks of contracts that live or die by whether the underlying ever touches a
//! barrier, under constant rate, dividend yield and volatility with continuous watching; the law of
//! Brownian motion and its extremes beneath them; and calls over columns of contracts.
//! No standard library, no allocation, no panic, no global state.
//!
//! # Example
//!
//! ```
//! use floodmark::price::{greeks, price};
//! use floodmark::terms::{Contract, Direction, Knock, Market, Payoff, RebatePaid, TermSheet};
//!
//! let sheet = TermSheet::new(Contract::Knock(Direction::Up, Knock::Out, Payoff::Call), 0.5)
//!     .strike(100.0)
//!     .barrier(120.0)
//!     .rebate(3.0, RebatePaid::Hit);
//! let market = Market { spot: 105.0, vol: 0.2, rate: -0.01, dividend: 0.02 };
//! let value = price(&sheet, &market)?;
//! let risk = greeks(&sheet, &market)?;
//! assert_eq!(value, risk.value);
//! # Ok::<(), floodmark::Error>(())
//! ```
//!
//! # Cautions
//!
//! Model values, not advice. Validate independently before use. Local rules and licensed practice decide.
#![no_std]
#![deny(unsafe_code)]

#[doc = include_str!("../ACCURACY.md")]
#[doc = include_str!("../accuracy.svg")]
pub mod accuracy {}
pub mod batch;
pub mod brownian;
mod error;
mod num;
pub mod price;
pub mod special;
pub mod terms;

pub use error::{Error, Result, Status};

/// The version of this library, as in its manifest.
pub const VERSION: &str = env!("CARGO_PKG_VERSION");
