//! The law of Brownian motion with drift and of its extremes.

mod bell;
mod discounted;
mod strip;

pub(crate) use bell::{Bell, Shoulder, Survival};
pub(crate) use discounted::{DiscountedPassage, Form};
pub(crate) use strip::{Edge, density};
