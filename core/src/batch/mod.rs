//! Columns in, columns out: the same functions over books of rows.

mod book;
mod column;

pub use book::{Book, GreekColumns, ProfileColumns, barrier_profile, greeks, price};
pub use column::{Column, ColumnMut};
