//! A quantity of the law over columns.

use floodmark::batch::{self, Column, LawColumns, Quantity};

use crate::border::NULL;
use crate::column::{FloodmarkNumbers, FloodmarkResults, FloodmarkStatuses, counted, input, output};

/// The inputs of a quantity of the law of W_t = drift t + vol B_t on [0, horizon], one law a row.
#[repr(C)]
#[derive(Clone, Copy, Debug)]
pub struct FloodmarkLawColumns {
    /// How many rows there are.
    pub rows: usize,
    /// Drifts.
    pub drift: FloodmarkNumbers,
    /// Volatilities.
    pub vol: FloodmarkNumbers,
    /// Horizons.
    pub horizon: FloodmarkNumbers,
    /// What the quantity's own function takes after the horizon.
    pub first: FloodmarkNumbers,
    /// What it takes after that; ignored, and may be null, where it takes nothing more.
    pub second: FloodmarkNumbers,
}

/// What is this quantity of the law in each row?
///
/// Formula: floodmark_max_cdf for FLOODMARK_QUANTITY_MAX_CDF and so on, row by row. Every row is written; a refused
/// row gets NaN and its status. refused, unless null, receives how many rows were refused.
///
/// Domain: drift from -1e75 to 1e75; vol and horizon from 1e-75 to 1e75; the rest as the quantity's own function
/// says.
///
/// Errors of the call: FLOODMARK_STATUS_QUANTITY if quantity is no FLOODMARK_QUANTITY code;
/// FLOODMARK_STATUS_NULL_POINTER if law is null, or an input column, value or status is null while there are rows;
/// then nothing is written.
///
/// # Safety
///
/// As floodmark_price_columns; law is null or aligned.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_law_columns(
    quantity: u8,
    law: *const FloodmarkLawColumns,
    value: FloodmarkResults,
    status: FloodmarkStatuses,
    refused: *mut usize,
) -> i32 {
    // SAFETY: the caller's promise on `refused`, `law` and its columns.
    unsafe {
        counted(refused, || {
            let quantity = Quantity::from_code(quantity)?;
            let law = law.as_ref().ok_or(NULL)?;
            let numbers = |column: FloodmarkNumbers| input(column.first, column.stride, law.rows);
            let inputs = LawColumns {
                rows: law.rows,
                drift: numbers(law.drift)?,
                vol: numbers(law.vol)?,
                horizon: numbers(law.horizon)?,
                first: numbers(law.first)?,
                second: if quantity.arguments().len() < 2 {
                    Column::broadcast(&f64::NAN)
                } else {
                    numbers(law.second)?
                },
            };
            let mut value = output(value.first, value.stride, law.rows)?;
            let mut status = output(status.first, status.stride, law.rows)?;
            batch::law(quantity, &inputs, &mut value, &mut status)
        })
    }
}
