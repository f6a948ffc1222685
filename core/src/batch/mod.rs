//! Columns in, columns out: the same functions over books of rows.

mod book;
mod column;
mod law;

pub use crate::brownian::Quantity;
pub use book::{
    Book, GreekColumns, ProfileColumns, barrier_profile, bounded_price, greeks, price, reference_greeks,
    reference_price,
};
pub use column::{Column, ColumnMut};
pub use law::{LawColumns, law, law_value};
