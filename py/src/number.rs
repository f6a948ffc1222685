//! A numeric argument as a call was given it.

use pyo3::prelude::*;
use pyo3::types::{PyFloat, PyInt};
use pyo3::{Borrowed, IntoPyObjectExt};

/// A numeric argument: a plain number, which the scalar shell takes; anything else is for the array shell.
pub(crate) enum Number<'a, 'py> {
    /// A `float` or an `int`.
    Plain(f64),
    /// `None`, or not given.
    Absent,
    /// An array, a list, a series, or no number at all.
    Other(Borrowed<'a, 'py, PyAny>),
}

impl<'a, 'py> FromPyObject<'a, 'py> for Number<'a, 'py> {
    type Error = PyErr;

    fn extract(given: Borrowed<'a, 'py, PyAny>) -> PyResult<Number<'a, 'py>> {
        if let Ok(number) = given.cast::<PyFloat>() {
            return Ok(Number::Plain(number.extract()?));
        }
        if given.is_none() {
            return Ok(Number::Absent);
        }
        if given.is_exact_instance_of::<PyInt>()
            && let Ok(number) = given.extract()
        {
            return Ok(Number::Plain(number));
        }
        Ok(Number::Other(given))
    }
}

impl<'py> Number<'_, 'py> {
    /// The number, if it is a plain one.
    pub(crate) const fn plain(&self) -> Option<f64> {
        if let Number::Plain(number) = self { Some(*number) } else { None }
    }

    /// The number, if it is a plain one, and NaN if it is absent.
    pub(crate) const fn plain_or_absent(&self) -> Option<f64> {
        match self {
            Number::Plain(number) => Some(*number),
            Number::Absent => Some(f64::NAN),
            Number::Other(_) => None,
        }
    }

    /// The argument as Python gave it.
    pub(crate) fn object(&self, py: Python<'py>) -> PyResult<Bound<'py, PyAny>> {
        match self {
            Number::Plain(number) => number.into_bound_py_any(py),
            Number::Absent => Ok(py.None().into_bound(py)),
            Number::Other(given) => Ok((**given).clone()),
        }
    }
}
