//! The normal law and its tails, for numbers and arrays.
#![allow(unsafe_code)]

use floodmark::special;
use numpy::{PyArray1, PyReadonlyArray1, PyUntypedArrayMethods};
use pyo3::IntoPyObjectExt;
use pyo3::prelude::*;

use crate::column::{Results, Source, in_parts};
use crate::number::Number;
use crate::shell;

/// A function of one number.
#[derive(Clone, Copy)]
pub(crate) struct Function {
    name: &'static str,
    argument: &'static str,
    call: fn(f64) -> f64,
}

impl Function {
    fn ask<'py>(self, x: &Number<'_, 'py>, py: Python<'py>) -> PyResult<Bound<'py, PyAny>> {
        match x.plain() {
            Some(x) => (self.call)(x).into_bound_py_any(py),
            None => shell::arrays(py, "special", (self.name, self.argument, x.object(py)?)),
        }
    }
}

impl<'py> FromPyObject<'_, 'py> for Function {
    type Error = PyErr;

    fn extract(given: Borrowed<'_, 'py, PyAny>) -> PyResult<Function> {
        let name: String = given.extract()?;
        let unknown = || pyo3::exceptions::PyValueError::new_err(format!("function '{name}' is not one that is known"));
        FUNCTIONS.into_iter().find(|function| function.name == name).ok_or_else(unknown)
    }
}

/// A function for every element of an array of one axis.
#[pyfunction]
pub(crate) fn special_column<'py>(
    py: Python<'py>,
    function: Function,
    x: PyReadonlyArray1<'py, f64>,
) -> PyResult<Bound<'py, PyArray1<f64>>> {
    let rows = x.len();
    let source = Source::of(&x, rows)?;
    let result = Results::new(py, rows);
    let target = result.target();
    in_parts(py, rows, |start, rows| {
        for row in start..start + rows {
            // SAFETY: both arrays live in this call and have the row, and the result is known here only.
            unsafe { target.write(row, (function.call)(source.read(row))) };
        }
        Ok(0)
    })?;
    Ok(result.array)
}

/// The functions: how Python sees them, and the list by name.
macro_rules! functions {
    ($($(#[$documentation:meta])* $name:ident($argument:ident);)*) => {
        $(
            $(#[$documentation])*
            #[pyfunction]
            pub(crate) fn $name<'py>(py: Python<'py>, $argument: Number<'_, 'py>) -> PyResult<Bound<'py, PyAny>> {
                Function { name: stringify!($name), argument: stringify!($argument), call: special::$name }
                    .ask(&$argument, py)
            }
        )*

        const FUNCTIONS: [Function; [$(stringify!($name)),*].len()] = [
            $(Function { name: stringify!($name), argument: stringify!($argument), call: special::$name }),*
        ];

        /// Adds the functions to the module.
        pub(crate) fn add(module: &Bound<'_, PyModule>) -> PyResult<()> {
            module.add_function(wrap_pyfunction!(special_column, module)?)?;
            $(module.add_function(wrap_pyfunction!($name, module)?)?;)*
            Ok(())
        }
    };
}

functions! {
    /// Density of the standard normal law, exp(-x^2 / 2) / sqrt(2 pi); at most 2 ulp off.
    ///
    /// >>> from floodmark import special
    /// >>> special.normal_pdf(0.0)
    /// 0.3989422804014327
    normal_pdf(x);
    /// Distribution function of the standard normal law, P(X <= x); at most 4 ulp off, tails included.
    ///
    /// >>> from floodmark import special
    /// >>> special.normal_cdf([-1.0, 0.0, 1.0]).round(4)
    /// array([0.1587, 0.5   , 0.8413])
    normal_cdf(x);
    /// Upper tail of the standard normal law, P(X > x); at most 4 ulp off.
    ///
    /// >>> from floodmark import special
    /// >>> special.normal_tail(2.0) == special.normal_cdf(-2.0)
    /// True
    normal_tail(x);
    /// Logarithm of the upper tail, ln P(X > x), finite long after the tail has underflowed; at most 4 ulp off.
    ///
    /// >>> from floodmark import special
    /// >>> special.normal_tail(100.0), round(special.normal_log_tail(100.0), 4)
    /// (0.0, -5005.5242)
    normal_log_tail(x);
    /// Mills ratio of the normal law, P(X > x) over its density; at most 3 ulp off.
    ///
    /// Infinite below -37.6, where the answer exceeds binary64.
    ///
    /// >>> from floodmark import special
    /// >>> special.mills_ratio(0.0)
    /// 1.2533141373155003
    mills_ratio(x);
    /// Quantile of the standard normal law: the x with P(X <= x) = probability; at most 5 ulp off.
    ///
    /// Minus and plus infinity at 0 and 1, NaN outside.
    ///
    /// >>> from floodmark import special
    /// >>> round(special.normal_quantile(0.975), 6)
    /// 1.959964
    normal_quantile(probability);
}
