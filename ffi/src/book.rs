//! A book a call: one contract a row, of any mix of types.

use floodmark::Result;
use floodmark::batch::{self, Book, ColumnMut, GreekColumns, ProfileColumns};

use crate::border::NULL;
use crate::column::{FloodmarkCodes, FloodmarkNumbers, FloodmarkResults, FloodmarkStatuses, counted, input, output};

/// The inputs of a book of contracts, one a row, each as in floodmark_price. Every column must be given; a number
/// that is the same in all rows is a column with stride 0.
#[repr(C)]
#[derive(Clone, Copy, Debug)]
pub struct FloodmarkBook {
    /// How many rows the book has.
    pub rows: usize,
    /// FLOODMARK_CONTRACT codes.
    pub contract: FloodmarkCodes,
    /// Spots.
    pub spot: FloodmarkNumbers,
    /// Strikes; ignored, NaN included, in rows without a strike.
    pub strike: FloodmarkNumbers,
    /// Barriers; ignored, NaN included, in rows without a barrier.
    pub barrier: FloodmarkNumbers,
    /// Rebates, or the amounts of touches; ignored, NaN included, in rows without a barrier.
    pub rebate: FloodmarkNumbers,
    /// FLOODMARK_REBATE_PAID codes.
    pub rebate_paid: FloodmarkCodes,
    /// Years to expiry.
    pub expiry: FloodmarkNumbers,
    /// Volatilities.
    pub vol: FloodmarkNumbers,
    /// Interest rates.
    pub rate: FloodmarkNumbers,
    /// Dividend yields.
    pub dividend: FloodmarkNumbers,
}

/// Where the Greeks of a book go, each as in FloodmarkGreeks; a column whose first is null is not wanted.
#[repr(C)]
#[derive(Clone, Copy, Debug)]
pub struct FloodmarkGreekColumns {
    /// Values.
    pub value: FloodmarkResults,
    /// Deltas.
    pub delta: FloodmarkResults,
    /// Gammas.
    pub gamma: FloodmarkResults,
    /// Vegas.
    pub vega: FloodmarkResults,
    /// Thetas.
    pub theta: FloodmarkResults,
    /// Rhos.
    pub rho: FloodmarkResults,
    /// Rhos of the dividend yield.
    pub dividend_rho: FloodmarkResults,
    /// Vannas.
    pub vanna: FloodmarkResults,
    /// Volgas.
    pub volga: FloodmarkResults,
    /// Charms.
    pub charm: FloodmarkResults,
    /// Barrier deltas.
    pub barrier_delta: FloodmarkResults,
    /// Strike deltas.
    pub strike_delta: FloodmarkResults,
}

/// Where the barrier profiles of a book go, each as in FloodmarkBarrierProfile; a column whose first is null is not
/// wanted.
#[repr(C)]
#[derive(Clone, Copy, Debug)]
pub struct FloodmarkProfileColumns {
    /// Probabilities of touching.
    pub touch_probability: FloodmarkResults,
    /// Distances in standard deviations.
    pub distance: FloodmarkResults,
    /// Gaps.
    pub gap: FloodmarkResults,
}

/// What is each contract of a book worth now?
///
/// Formula and domain: floodmark_price, row by row. Every row is written; a refused row gets NaN and its status.
/// refused, unless null, receives how many rows were refused.
///
/// Errors of the call: FLOODMARK_STATUS_NULL_POINTER if book is null, or an input column, value or status is null
/// while there are rows; then nothing is written.
///
/// # Safety
///
/// Every address that the columns name must be aligned and readable or writable for as long as the call lasts; no
/// column of results may overlap another column. book and refused are null or aligned.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_price_columns(
    book: *const FloodmarkBook,
    value: FloodmarkResults,
    status: FloodmarkStatuses,
    refused: *mut usize,
) -> i32 {
    // SAFETY: the caller's promise on `refused`, `book` and its columns.
    unsafe {
        counted(refused, || {
            let book = read(book)?;
            let mut value = output(value.first, value.stride, book.rows)?;
            let mut status = output(status.first, status.stride, book.rows)?;
            batch::price(&book, &mut value, &mut status)
        })
    }
}

/// What is each contract of a book worth now, and how does that change with each input?
///
/// Formula and domain: floodmark_greeks, row by row, into the columns that are wanted. Rows are refused as in
/// floodmark_price_columns.
///
/// Errors of the call: FLOODMARK_STATUS_NULL_POINTER if book or greeks is null, or an input column or status is
/// null while there are rows; then nothing is written.
///
/// # Safety
///
/// As floodmark_price_columns; greeks is null or aligned.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_greeks_columns(
    book: *const FloodmarkBook,
    greeks: *const FloodmarkGreekColumns,
    status: FloodmarkStatuses,
    refused: *mut usize,
) -> i32 {
    // SAFETY: the caller's promise on `refused`, `book`, `greeks` and their columns.
    unsafe {
        counted(refused, || {
            let book = read(book)?;
            let to = greeks.as_ref().ok_or(NULL)?;
            let mut status = output(status.first, status.stride, book.rows)?;
            let wanted = [
                to.value,
                to.delta,
                to.gamma,
                to.vega,
                to.theta,
                to.rho,
                to.dividend_rho,
                to.vanna,
                to.volga,
                to.charm,
                to.barrier_delta,
                to.strike_delta,
            ];
            let mut greeks = GreekColumns { columns: wanted.map(|column| optional(column, book.rows)) };
            batch::greeks(&book, &mut greeks, &mut status)
        })
    }
}

/// Where does each contract of a book stand against its barrier?
///
/// Formula and domain: floodmark_barrier_profile, row by row, into the columns that are wanted. Rows are refused as
/// in floodmark_price_columns.
///
/// Errors of the call: FLOODMARK_STATUS_NULL_POINTER if book or profile is null, or an input column or status is
/// null while there are rows; then nothing is written.
///
/// # Safety
///
/// As floodmark_price_columns; profile is null or aligned.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_barrier_profile_columns(
    book: *const FloodmarkBook,
    profile: *const FloodmarkProfileColumns,
    status: FloodmarkStatuses,
    refused: *mut usize,
) -> i32 {
    // SAFETY: the caller's promise on `refused`, `book`, `profile` and their columns.
    unsafe {
        counted(refused, || {
            let book = read(book)?;
            let to = profile.as_ref().ok_or(NULL)?;
            let mut status = output(status.first, status.stride, book.rows)?;
            let mut profile = ProfileColumns {
                touch_probability: optional(to.touch_probability, book.rows),
                distance: optional(to.distance, book.rows),
                gap: optional(to.gap, book.rows),
            };
            batch::barrier_profile(&book, &mut profile, &mut status)
        })
    }
}

/// The core's view of a book.
///
/// # Safety
///
/// `book` is null or aligned and readable, and its columns are as [`input`] asks.
pub(crate) unsafe fn read<'a>(book: *const FloodmarkBook) -> Result<Book<'a>> {
    // SAFETY: the caller's promise.
    unsafe {
        let book = book.as_ref().ok_or(NULL)?;
        let rows = book.rows;
        let numbers = |column: FloodmarkNumbers| input(column.first, column.stride, rows);
        let codes = |column: FloodmarkCodes| input(column.first, column.stride, rows);
        Ok(Book {
            rows,
            contract: codes(book.contract)?,
            spot: numbers(book.spot)?,
            strike: numbers(book.strike)?,
            barrier: numbers(book.barrier)?,
            rebate: numbers(book.rebate)?,
            rebate_paid: codes(book.rebate_paid)?,
            expiry: numbers(book.expiry)?,
            vol: numbers(book.vol)?,
            rate: numbers(book.rate)?,
            dividend: numbers(book.dividend)?,
        })
    }
}

/// The core's view of a column of results, if it is wanted.
///
/// # Safety
///
/// As [`output`].
unsafe fn optional<'a>(column: FloodmarkResults, rows: usize) -> Option<ColumnMut<'a, f64>> {
    if column.first.is_null() {
        return None;
    }
    // SAFETY: the caller's promise.
    unsafe { output(column.first, column.stride, rows) }.ok()
}
