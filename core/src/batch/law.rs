//! The law of Brownian motion over columns of arguments.
#![allow(unsafe_code)]

use crate::batch::{Column, ColumnMut};
use crate::brownian::{Law, Quantity};
use crate::error::{Result, Status};

/// The columns of a question to the law.
#[derive(Clone, Copy, Debug)]
pub struct LawColumns<'a> {
    /// How many rows there are.
    pub rows: usize,
    /// Drifts.
    pub drift: Column<'a, f64>,
    /// Volatilities.
    pub vol: Column<'a, f64>,
    /// Horizons.
    pub horizon: Column<'a, f64>,
    /// The first of [`Quantity::arguments`].
    pub first: Column<'a, f64>,
    /// The second, ignored where there is one only.
    pub second: Column<'a, f64>,
}

/// Answers one question: [`Quantity::value`] of the law with these numbers.
///
/// # Errors
///
/// As [`Law::new`] and [`Quantity::value`].
pub fn law_value(quantity: Quantity, drift: f64, vol: f64, horizon: f64, first: f64, second: f64) -> Result<f64> {
    quantity.value(&Law::new(drift, vol, horizon)?, first, second)
}

/// Answers a question in every row: [`law_value`] row by row.
///
/// Every row is written: a refused row gets NaN and its status and does not disturb the others.
/// Returns how many rows were refused.
///
/// # Errors
///
/// [`Status::ColumnLength`] if a column has fewer rows than the question; then nothing is written.
pub fn law(
    quantity: Quantity,
    columns: &LawColumns<'_>,
    value: &mut ColumnMut<'_, f64>,
    status: &mut ColumnMut<'_, i32>,
) -> Result<usize> {
    let LawColumns { rows, drift, vol, horizon, first, second } = columns;
    for column in [drift, vol, horizon, first, second] {
        column.covers(*rows)?;
    }
    value.covers(*rows)?;
    status.covers(*rows)?;
    let mut refused = 0;
    for row in 0..*rows {
        // SAFETY: every column covers the rows.
        let outcome = unsafe {
            law_value(quantity, drift.read(row), vol.read(row), horizon.read(row), first.read(row), second.read(row))
        };
        let (number, code) = match outcome {
            Ok(number) => (number, Status::Ok),
            Err(error) => {
                refused += 1;
                (f64::NAN, error.status)
            }
        };
        // SAFETY: value and status cover the rows.
        unsafe {
            value.write(row, number);
            status.write(row, code.code());
        }
    }
    Ok(refused)
}
