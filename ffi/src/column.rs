//! Columns: the first element and the stride to the next.

use floodmark::Result;
use floodmark::batch::{Column, ColumnMut};

use crate::border::{NULL, guarded};

/// A column of input numbers: row i is first[i * stride]. A stride of 0 puts one number in every row, a negative
/// one reads backwards.
#[repr(C)]
#[derive(Clone, Copy, Debug)]
pub struct FloodmarkNumbers {
    /// The number of row 0; null only if there are no rows.
    pub first: *const f64,
    /// From one row to the next, in elements (not bytes).
    pub stride: isize,
}

/// A column of input codes: row i is first[i * stride]. A stride of 0 puts one code in every row.
#[repr(C)]
#[derive(Clone, Copy, Debug)]
pub struct FloodmarkCodes {
    /// The code of row 0; null only if there are no rows.
    pub first: *const u8,
    /// From one row to the next, in elements (here also bytes).
    pub stride: isize,
}

/// A column of results: row i goes to first[i * stride].
#[repr(C)]
#[derive(Clone, Copy, Debug)]
pub struct FloodmarkResults {
    /// Where the result of row 0 goes. Among Greeks and barrier profiles null means that the column is not wanted.
    pub first: *mut f64,
    /// From one row to the next, in elements (not bytes).
    pub stride: isize,
}

/// A column of statuses: row i goes to first[i * stride].
#[repr(C)]
#[derive(Clone, Copy, Debug)]
pub struct FloodmarkStatuses {
    /// Where the status of row 0 goes; null only if there are no rows.
    pub first: *mut i32,
    /// From one row to the next, in elements (not bytes).
    pub stride: isize,
}

/// The core's view of a column of inputs.
///
/// # Safety
///
/// `first` is null, or each of the rows is aligned, readable and unwritten by others during `'a`.
pub(crate) unsafe fn input<'a, T: Copy>(first: *const T, stride: isize, rows: usize) -> Result<Column<'a, T>> {
    if first.is_null() && rows > 0 {
        return Err(NULL);
    }
    // SAFETY: the caller's promise; without rows nothing is promised or read.
    Ok(unsafe { Column::from_raw(first, stride, rows) })
}

/// The core's view of a column of results.
///
/// # Safety
///
/// `first` is null, or each of the rows is aligned, writable and used by no one else during `'a`.
pub(crate) unsafe fn output<'a, T: Copy>(first: *mut T, stride: isize, rows: usize) -> Result<ColumnMut<'a, T>> {
    if first.is_null() && rows > 0 {
        return Err(NULL);
    }
    // SAFETY: the caller's promise; without rows nothing is promised or written.
    Ok(unsafe { ColumnMut::from_raw(first, stride, rows) })
}

/// Runs a call over columns and writes its count of refused rows where that is wanted.
///
/// # Safety
///
/// `refused` is null, or aligned and writable.
pub(crate) unsafe fn counted(refused: *mut usize, call: impl FnOnce() -> Result<usize>) -> i32 {
    guarded(|| {
        let count = call()?;
        if !refused.is_null() {
            // SAFETY: not null, so aligned and writable by the caller's promise.
            unsafe { refused.write(count) };
        }
        Ok(())
    })
}
