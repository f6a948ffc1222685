//! The law of Brownian motion with drift and its running extremes: W_t = drift t + vol B_t on [0, horizon].

// In the order that the header has: rustfmt sorts what stands together.
pub mod terminal;

pub mod maximum;

pub mod minimum;

pub mod joint;

pub mod passage;

pub mod bridge;

pub mod sampling;

pub mod columns;

use floodmark::Result;
use floodmark::brownian::Law;

use crate::border::answer;

/// Puts a question to a law and writes the answer if there is one.
///
/// # Safety
///
/// `value` is null, or aligned and writable.
unsafe fn ask(value: *mut f64, drift: f64, vol: f64, horizon: f64, question: impl FnOnce(&Law) -> Result<f64>) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { answer(value, || question(&Law::new(drift, vol, horizon)?)) }
}
