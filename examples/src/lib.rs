//! Repricing a book of contracts: from CSV to CSV, with a summary that a trader can read.
//!
//! The programs are in `src/bin`; here are their parts, in the order in which a row passes through them.

pub mod demo_book;

mod block;
mod field;
mod number;
mod parity;
mod refusal;
mod reprice;
mod rows;
mod summary;

pub use reprice::{Failure, HEADER, reprice};
pub use summary::Summary;
