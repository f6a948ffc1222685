//! The law of Brownian motion with drift and of its extremes.
//!
//! [`Law`] answers questions, each of which is also a [`Quantity`] for columns. Inside, `walk` holds the motion
//! in either precision; `maximum`, `passage`, `bridge` and `inverse` its laws; `strip`, `bell` and
//! `discounted` are what the prices share with them.

mod bell;
mod bridge;
mod discounted;
mod inverse;
mod law;
mod maximum;
mod passage;
mod quantity;
mod strip;
mod walk;

pub(crate) use bell::{Bell, Shoulder, Survival};
pub(crate) use discounted::{DiscountedPassage, Form};
pub use law::Law;
pub use quantity::Quantity;
pub(crate) use strip::{Edge, Sides, density};
pub(crate) use walk::{Walk, from_exponent, half_of_underflow};
