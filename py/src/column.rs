//! NumPy arrays of one axis as columns of the core, read where they are.
#![allow(unsafe_code)]

use floodmark::batch::{Column, ColumnMut};
use numpy::{Element, PyArray1, PyArrayMethods, PyReadonlyArray1, PyUntypedArrayMethods};
use pyo3::exceptions::PyValueError;
use pyo3::prelude::*;

/// How many rows are valued between two looks at whether the user wants to interrupt.
const PART: usize = 4096;

/// Where the elements of an array are.
#[derive(Clone, Copy)]
pub(crate) struct Source<T> {
    first: *const T,
    /// In elements; 0 for an array of one element, which stands in every row.
    stride: isize,
}

// SAFETY: an address may be known to any thread; what is read there is promised to `Source::column`.
unsafe impl<T: Sync> Send for Source<T> {}
// SAFETY: as above.
unsafe impl<T: Sync> Sync for Source<T> {}

impl<T: Copy + Element> Source<T> {
    /// An array of `rows` elements, or of one that stands in every row.
    pub(crate) fn of(array: &PyReadonlyArray1<'_, T>, rows: usize) -> PyResult<Source<T>> {
        let (first, length, bytes) = (array.data().cast_const(), array.len(), array.strides()[0]);
        if length == 1 {
            return Source::aligned(first, 0);
        }
        if length != rows {
            return Err(PyValueError::new_err(format!("a column has {length} rows where {rows} are needed")));
        }
        Source::aligned(first, bytes)
    }

    fn aligned(first: *const T, bytes: isize) -> PyResult<Source<T>> {
        let size = size_of::<T>().cast_signed();
        if first.is_aligned() && bytes % size == 0 {
            Ok(Source { first, stride: bytes / size })
        } else {
            Err(PyValueError::new_err("the elements of a column are not aligned"))
        }
    }

    /// The rows from `start` on.
    ///
    /// # Safety
    ///
    /// The array lives and has `start + rows` rows or one element. (As everywhere in NumPy, a thread that writes to
    /// it meanwhile changes the results of those rows.)
    pub(crate) unsafe fn column<'a>(&self, start: usize, rows: usize) -> Column<'a, T> {
        let first = self.first.wrapping_offset(self.stride.wrapping_mul(start.cast_signed()));
        // SAFETY: the caller's promise; the address is aligned because the first one is and strides are whole.
        unsafe { Column::from_raw(first, self.stride, rows) }
    }

    /// The element of a row.
    ///
    /// # Safety
    ///
    /// The array lives and has the row, or one element.
    pub(crate) unsafe fn read(&self, row: usize) -> T {
        // SAFETY: the caller's promise, and aligned as above.
        unsafe { self.first.wrapping_offset(self.stride.wrapping_mul(row.cast_signed())).read() }
    }
}

/// A new array of results.
pub(crate) struct Results<'py, T> {
    pub(crate) array: Bound<'py, PyArray1<T>>,
}

/// Where its elements are.
#[derive(Clone, Copy)]
pub(crate) struct Target<T>(*mut T);

// SAFETY: an address may be known to any thread; what is written there is promised to `Target::column`.
unsafe impl<T: Send> Send for Target<T> {}
// SAFETY: as above.
unsafe impl<T: Send> Sync for Target<T> {}

impl<'py, T: Copy + Element> Results<'py, T> {
    pub(crate) fn new(py: Python<'py>, rows: usize) -> Results<'py, T> {
        Results { array: PyArray1::zeros(py, rows, false) }
    }

    pub(crate) fn target(&self) -> Target<T> {
        Target(self.array.data())
    }
}

impl<T: Copy> Target<T> {
    /// The rows from `start` on.
    ///
    /// # Safety
    ///
    /// The array lives, has `start + rows` rows, and no one else knows it yet.
    pub(crate) unsafe fn column<'a>(&self, start: usize, rows: usize) -> ColumnMut<'a, T> {
        // SAFETY: the caller's promise; NumPy aligns what it allocates.
        unsafe { ColumnMut::from_raw(self.0.wrapping_add(start), 1, rows) }
    }

    /// Writes the element of a row.
    ///
    /// # Safety
    ///
    /// As [`Target::column`], with this row.
    pub(crate) unsafe fn write(&self, row: usize, value: T) {
        // SAFETY: the caller's promise; NumPy aligns what it allocates.
        unsafe { self.0.wrapping_add(row).write(value) };
    }
}

/// Runs `call(start, rows)` over parts of all the rows without holding the interpreter, and adds up the rows that
/// were refused; between two parts an interrupt is let through.
pub(crate) fn in_parts(
    py: Python<'_>,
    rows: usize,
    call: impl Fn(usize, usize) -> floodmark::Result<usize> + Sync,
) -> PyResult<usize> {
    let mut refused = 0;
    for start in (0..rows).step_by(PART) {
        refused += py.detach(|| call(start, PART.min(rows - start))).map_err(crate::sentence::refusal)?;
        py.check_signals()?;
    }
    Ok(refused)
}
