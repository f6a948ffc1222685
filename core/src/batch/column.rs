//! A column: a view of numbers that lie a fixed stride apart, of which the caller keeps the memory.
#![allow(unsafe_code)]

use core::marker::PhantomData;

use crate::error::{Error, Result, Status};

const SHORT: Error = Error { status: Status::ColumnLength, value: 0.0 };

/// A column of inputs; with stride 0 one number stands in every row.
#[derive(Clone, Copy, Debug)]
pub struct Column<'a, T> {
    first: *const T,
    /// In elements, not in bytes.
    stride: isize,
    rows: usize,
    memory: PhantomData<&'a T>,
}

impl<'a, T: Copy> Column<'a, T> {
    /// One number in every row.
    pub const fn broadcast(value: &'a T) -> Column<'a, T> {
        Column { first: value, stride: 0, rows: usize::MAX, memory: PhantomData }
    }

    /// The elements of a slice, one a row.
    pub const fn from_slice(values: &'a [T]) -> Column<'a, T> {
        Column { first: values.as_ptr(), stride: 1, rows: values.len(), memory: PhantomData }
    }

    /// A column over foreign memory: row `i` is read from `first + i * stride`, in elements.
    ///
    /// # Safety
    ///
    /// For every `i` below `rows` that address must be aligned, readable and initialised for as long as the
    /// column lives, and no one may write there meanwhile.
    pub const unsafe fn from_raw(first: *const T, stride: isize, rows: usize) -> Column<'a, T> {
        Column { first, stride, rows, memory: PhantomData }
    }

    /// Refuses a column with fewer rows than a call needs.
    pub(crate) fn covers(&self, rows: usize) -> Result<()> {
        if self.rows >= rows { Ok(()) } else { Err(SHORT) }
    }

    /// The element of a row.
    ///
    /// # Safety
    ///
    /// `row` is below the count that [`Column::covers`] was asked for.
    #[inline]
    pub(crate) unsafe fn read(&self, row: usize) -> T {
        // SAFETY: the caller checked the row against `covers`, and the constructors' contracts make that
        // address readable.
        unsafe { self.first.wrapping_offset(self.stride.wrapping_mul(row.cast_signed())).read() }
    }
}

/// A column of results.
#[derive(Debug)]
pub struct ColumnMut<'a, T> {
    first: *mut T,
    /// In elements, not in bytes.
    stride: isize,
    rows: usize,
    memory: PhantomData<&'a mut T>,
}

impl<'a, T: Copy> ColumnMut<'a, T> {
    /// The elements of a slice, one a row.
    pub const fn from_slice(values: &'a mut [T]) -> ColumnMut<'a, T> {
        ColumnMut { first: values.as_mut_ptr(), stride: 1, rows: values.len(), memory: PhantomData }
    }

    /// A column over foreign memory: row `i` is written to `first + i * stride`, in elements.
    ///
    /// # Safety
    ///
    /// For every `i` below `rows` that address must be aligned and writable for as long as the column lives,
    /// and no one else may read or write there meanwhile.
    pub const unsafe fn from_raw(first: *mut T, stride: isize, rows: usize) -> ColumnMut<'a, T> {
        ColumnMut { first, stride, rows, memory: PhantomData }
    }

    /// Refuses a column with fewer rows than a call needs.
    pub(crate) fn covers(&self, rows: usize) -> Result<()> {
        if self.rows >= rows { Ok(()) } else { Err(SHORT) }
    }

    /// Writes the element of a row.
    ///
    /// # Safety
    ///
    /// `row` is below the count that [`ColumnMut::covers`] was asked for.
    #[inline]
    pub(crate) unsafe fn write(&mut self, row: usize, value: T) {
        // SAFETY: the caller checked the row against `covers`, and the constructors' contracts make that
        // address writable.
        unsafe { self.first.wrapping_offset(self.stride.wrapping_mul(row.cast_signed())).write(value) }
    }
}
