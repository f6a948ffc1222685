//! How exact a price is: its bound, and the reference path it can be held against.

use floodmark::batch;
use floodmark::price::{self, BoundedPrice};
use floodmark::terms::Market;

use crate::book::{FloodmarkBook, read};
use crate::border::answer;
use crate::column::{FloodmarkResults, FloodmarkStatuses, counted, output};
use crate::contract::{FloodmarkGreeks, sheet};

/// A value with a bound on its error.
#[repr(C)]
#[derive(Clone, Copy, Debug)]
pub struct FloodmarkBoundedPrice {
    /// The value, bit for bit what floodmark_price returns.
    pub value: f64,
    /// The value of the exact binary inputs lies within this of value.
    pub error_bound: f64,
}

impl From<BoundedPrice> for FloodmarkBoundedPrice {
    fn from(bounded: BoundedPrice) -> FloodmarkBoundedPrice {
        FloodmarkBoundedPrice { value: bounded.value, error_bound: bounded.error_bound }
    }
}

/// What is a contract worth now, and how far can that be from the value of the exact binary inputs?
///
/// Formula: floodmark_price, with the sum of what the roundings of its terms can amount to. The bound speaks of
/// arithmetic alone, not of the model.
///
/// Domain and errors: as floodmark_price.
///
/// # Safety
///
/// bounded is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_bounded_price(
    contract: u8,
    spot: f64,
    strike: f64,
    barrier: f64,
    rebate: f64,
    rebate_paid: u8,
    expiry: f64,
    vol: f64,
    rate: f64,
    dividend: f64,
    bounded: *mut FloodmarkBoundedPrice,
) -> i32 {
    let market = Market { spot, vol, rate, dividend };
    let call =
        || Ok(price::bounded_price(&sheet(contract, strike, barrier, rebate, rebate_paid, expiry)?, &market)?.into());
    // SAFETY: the caller's promise on `bounded`.
    unsafe { answer(bounded, call) }
}

/// What is a contract worth now, correct to the last place?
///
/// Formula: floodmark_price in some 31 digits, rounded once: the oracle for audits and tests, at some microseconds
/// to milliseconds a call.
///
/// Domain and errors: as floodmark_price.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_reference_price(
    contract: u8,
    spot: f64,
    strike: f64,
    barrier: f64,
    rebate: f64,
    rebate_paid: u8,
    expiry: f64,
    vol: f64,
    rate: f64,
    dividend: f64,
    value: *mut f64,
) -> i32 {
    let market = Market { spot, vol, rate, dividend };
    let call = || price::reference_price(&sheet(contract, strike, barrier, rebate, rebate_paid, expiry)?, &market);
    // SAFETY: the caller's promise on `value`.
    unsafe { answer(value, call) }
}

/// What is a contract worth now, and how does that change with each input, from the reference path?
///
/// Formula: floodmark_greeks in some 31 digits, rounded once.
///
/// Domain and errors: as floodmark_price.
///
/// # Safety
///
/// greeks is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_reference_greeks(
    contract: u8,
    spot: f64,
    strike: f64,
    barrier: f64,
    rebate: f64,
    rebate_paid: u8,
    expiry: f64,
    vol: f64,
    rate: f64,
    dividend: f64,
    greeks: *mut FloodmarkGreeks,
) -> i32 {
    let market = Market { spot, vol, rate, dividend };
    let call = || {
        Ok(price::reference_greeks(&sheet(contract, strike, barrier, rebate, rebate_paid, expiry)?, &market)?.into())
    };
    // SAFETY: the caller's promise on `greeks`.
    unsafe { answer(greeks, call) }
}

/// What is each contract of a book worth now, and how exact is each value?
///
/// Formula and domain: floodmark_bounded_price, row by row. Rows are refused as in floodmark_price_columns.
///
/// Errors of the call: FLOODMARK_STATUS_NULL_POINTER if book is null, or an input column, value, error_bound or
/// status is null while there are rows; then nothing is written.
///
/// # Safety
///
/// As floodmark_price_columns.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_bounded_price_columns(
    book: *const FloodmarkBook,
    value: FloodmarkResults,
    error_bound: FloodmarkResults,
    status: FloodmarkStatuses,
    refused: *mut usize,
) -> i32 {
    // SAFETY: the caller's promise on `refused`, `book` and its columns.
    unsafe {
        counted(refused, || {
            let book = read(book)?;
            let mut value = output(value.first, value.stride, book.rows)?;
            let mut error_bound = output(error_bound.first, error_bound.stride, book.rows)?;
            let mut status = output(status.first, status.stride, book.rows)?;
            batch::bounded_price(&book, &mut value, &mut error_bound, &mut status)
        })
    }
}
