//! Values and Greeks of single contracts, watched continuously.
//!
//! A contract is a short sum of legs (`legs`); a leg is a payoff under an event (`event`) or cash at the hit
//! (`hit`); a payoff under an event is one or two straight lines paid in strips (`strip`), plain or mirrored
//! at the barrier (`sensitivity`).

mod bound;
mod event;
mod greeks;
mod hit;
mod legs;
mod positive;
mod profile;
mod reference;
mod sensitivity;
mod setting;
mod strip;
mod valuation;

#[cfg(test)]
mod tests;

pub use bound::{BoundedPrice, bounded_price};
pub use greeks::Greeks;
pub use profile::{BarrierProfile, barrier_profile};
pub use reference::{reference_greeks, reference_price};
pub use valuation::{greeks, price};
