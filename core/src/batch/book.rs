//! A book: one contract a row, of any mix of types.
#![allow(unsafe_code)]

use crate::batch::{Column, ColumnMut};
use crate::error::{Result, Status};
use crate::price::{self, BarrierProfile, BoundedPrice, Greeks};
use crate::terms::{Contract, Market, RebatePaid, TermSheet};

/// The columns of a book. Codes as in [`Contract::code`] and [`RebatePaid::from_code`].
#[derive(Clone, Copy, Debug)]
pub struct Book<'a> {
    /// How many rows the book has.
    pub rows: usize,
    /// Contract codes.
    pub contract: Column<'a, u8>,
    /// Spots.
    pub spot: Column<'a, f64>,
    /// Strikes; ignored in rows without a strike.
    pub strike: Column<'a, f64>,
    /// Barriers; ignored in rows without a barrier.
    pub barrier: Column<'a, f64>,
    /// Rebates, or amounts of touches.
    pub rebate: Column<'a, f64>,
    /// When the rebate is paid: 0 as is natural, 1 hit, 2 expiry.
    pub rebate_paid: Column<'a, u8>,
    /// Years to expiry.
    pub expiry: Column<'a, f64>,
    /// Volatilities.
    pub vol: Column<'a, f64>,
    /// Interest rates.
    pub rate: Column<'a, f64>,
    /// Dividend yields.
    pub dividend: Column<'a, f64>,
}

impl Book<'_> {
    fn covered(&self) -> Result<()> {
        self.contract.covers(self.rows)?;
        self.rebate_paid.covers(self.rows)?;
        for column in
            [&self.spot, &self.strike, &self.barrier, &self.rebate, &self.expiry, &self.vol, &self.rate, &self.dividend]
        {
            column.covers(self.rows)?;
        }
        Ok(())
    }

    /// # Safety
    ///
    /// `row` is below `rows`, and [`Book::covered`] said yes.
    unsafe fn row(&self, row: usize) -> Result<(TermSheet, Market)> {
        // SAFETY: the caller's promise is that of `Column::read`.
        unsafe {
            let contract = Contract::from_code(self.contract.read(row))?;
            let sheet = TermSheet {
                contract,
                strike: self.strike.read(row),
                barrier: self.barrier.read(row),
                rebate: self.rebate.read(row),
                rebate_paid: RebatePaid::from_code(self.rebate_paid.read(row), contract)?,
                expiry: self.expiry.read(row),
            };
            let market = Market {
                spot: self.spot.read(row),
                vol: self.vol.read(row),
                rate: self.rate.read(row),
                dividend: self.dividend.read(row),
            };
            Ok((sheet, market))
        }
    }

    /// Values every row with `value` and hands the outcome to `keep`; returns how many rows were refused.
    fn each<V>(
        &self,
        status: &mut ColumnMut<'_, i32>,
        value: impl Fn(&TermSheet, &Market) -> Result<V>,
        mut keep: impl FnMut(usize, Option<V>),
    ) -> Result<usize> {
        self.covered()?;
        status.covers(self.rows)?;
        let mut refused = 0;
        for row in 0..self.rows {
            // SAFETY: `covered` said yes and `row` is below `rows`.
            let outcome = unsafe { self.row(row) }.and_then(|(sheet, market)| value(&sheet, &market));
            let code = match outcome {
                Ok(_) => Status::Ok,
                Err(error) => {
                    refused += 1;
                    error.status
                }
            };
            keep(row, outcome.ok());
            // SAFETY: `status` covers the rows.
            unsafe { status.write(row, code.code()) };
        }
        Ok(refused)
    }
}

/// Where the Greeks of a book go; a column that is not wanted is left out.
#[derive(Debug, Default)]
pub struct GreekColumns<'a> {
    /// One column for each of [`Greeks::NAMES`], in that order.
    pub columns: [Option<ColumnMut<'a, f64>>; 12],
}

/// Where the barrier profiles of a book go; a column that is not wanted is left out.
#[derive(Debug, Default)]
pub struct ProfileColumns<'a> {
    /// [`BarrierProfile::touch_probability`]
    pub touch_probability: Option<ColumnMut<'a, f64>>,
    /// [`BarrierProfile::distance`]
    pub distance: Option<ColumnMut<'a, f64>>,
    /// [`BarrierProfile::gap`]
    pub gap: Option<ColumnMut<'a, f64>>,
}

/// Values a book: [`price::price`] row by row.
///
/// Every row is written: a refused row gets NaN and its status and does not disturb the others.
/// Returns how many rows were refused.
///
/// # Errors
///
/// [`Status::ColumnLength`] if a column has fewer rows than the book; then nothing is written.
pub fn price(book: &Book<'_>, value: &mut ColumnMut<'_, f64>, status: &mut ColumnMut<'_, i32>) -> Result<usize> {
    values(book, price::price, value, status)
}

/// Values a book and bounds the error of each value: [`price::bounded_price`] row by row.
///
/// Rows are refused as in [`price`](fn@price); a refused row has NaN in both columns.
///
/// # Errors
///
/// As [`price`](fn@price).
pub fn bounded_price(
    book: &Book<'_>,
    value: &mut ColumnMut<'_, f64>,
    error_bound: &mut ColumnMut<'_, f64>,
    status: &mut ColumnMut<'_, i32>,
) -> Result<usize> {
    value.covers(book.rows)?;
    error_bound.covers(book.rows)?;
    book.each(status, price::bounded_price, |row, outcome| {
        let found = outcome.unwrap_or(BoundedPrice { value: f64::NAN, error_bound: f64::NAN });
        // SAFETY: `value` and `error_bound` cover the rows.
        unsafe {
            value.write(row, found.value);
            error_bound.write(row, found.error_bound);
        }
    })
}

/// Values a book by the reference path: [`price::reference_price`] row by row.
///
/// Rows are refused as in [`price`](fn@price).
///
/// # Errors
///
/// As [`price`](fn@price).
pub fn reference_price(
    book: &Book<'_>,
    value: &mut ColumnMut<'_, f64>,
    status: &mut ColumnMut<'_, i32>,
) -> Result<usize> {
    values(book, price::reference_price, value, status)
}

/// Values a book with its Greeks: [`price::greeks`] row by row, into the columns that are wanted.
///
/// Rows are refused as in [`price`](fn@price).
///
/// # Errors
///
/// As [`price`](fn@price).
pub fn greeks(book: &Book<'_>, greeks: &mut GreekColumns<'_>, status: &mut ColumnMut<'_, i32>) -> Result<usize> {
    sensitivities(book, price::greeks, greeks, status)
}

/// Values a book with its Greeks by the reference path: [`price::reference_greeks`] row by row, into the columns
/// that are wanted.
///
/// Rows are refused as in [`price`](fn@price).
///
/// # Errors
///
/// As [`price`](fn@price).
pub fn reference_greeks(
    book: &Book<'_>,
    greeks: &mut GreekColumns<'_>,
    status: &mut ColumnMut<'_, i32>,
) -> Result<usize> {
    sensitivities(book, price::reference_greeks, greeks, status)
}

/// One number a row.
fn values(
    book: &Book<'_>,
    of: impl Fn(&TermSheet, &Market) -> Result<f64>,
    value: &mut ColumnMut<'_, f64>,
    status: &mut ColumnMut<'_, i32>,
) -> Result<usize> {
    value.covers(book.rows)?;
    book.each(status, of, |row, outcome| {
        // SAFETY: `value` covers the rows.
        unsafe { value.write(row, outcome.unwrap_or(f64::NAN)) };
    })
}

/// Greeks, into the columns that are wanted.
fn sensitivities(
    book: &Book<'_>,
    of: impl Fn(&TermSheet, &Market) -> Result<Greeks>,
    greeks: &mut GreekColumns<'_>,
    status: &mut ColumnMut<'_, i32>,
) -> Result<usize> {
    for column in greeks.columns.iter().flatten() {
        column.covers(book.rows)?;
    }
    book.each(status, of, |row, outcome| {
        let numbers = outcome.map_or([f64::NAN; 12], Greeks::to_array);
        for (column, number) in greeks.columns.iter_mut().zip(numbers) {
            if let Some(column) = column {
                // SAFETY: every wanted column covers the rows.
                unsafe { column.write(row, number) };
            }
        }
    })
}

/// Barrier profiles of a book: [`price::barrier_profile`] row by row, into the columns that are wanted.
///
/// Rows are refused as in [`price`](fn@price).
///
/// # Errors
///
/// As [`price`](fn@price).
pub fn barrier_profile(
    book: &Book<'_>,
    profile: &mut ProfileColumns<'_>,
    status: &mut ColumnMut<'_, i32>,
) -> Result<usize> {
    let ProfileColumns { touch_probability, distance, gap } = profile;
    let mut columns = [touch_probability, distance, gap];
    for column in columns.iter().filter_map(|column| column.as_ref()) {
        column.covers(book.rows)?;
    }
    book.each(status, price::barrier_profile, |row, outcome| {
        let nan = BarrierProfile { touch_probability: f64::NAN, distance: f64::NAN, gap: f64::NAN };
        let found = outcome.unwrap_or(nan);
        for (column, number) in columns.iter_mut().zip([found.touch_probability, found.distance, found.gap]) {
            if let Some(column) = column {
                // SAFETY: every wanted column covers the rows.
                unsafe { column.write(row, number) };
            }
        }
    })
}
