//! The way from the scalar shell to the array shell, and to the types of results, which are written in Python.

use pyo3::prelude::*;
use pyo3::sync::PyOnceLock;
use pyo3::types::{PyTuple, PyType};

/// Hands a call over to a function of `floodmark._arrays`.
pub(crate) fn arrays<'py>(
    py: Python<'py>,
    function: &str,
    arguments: impl IntoPyObject<'py, Target = PyTuple, Output = Bound<'py, PyTuple>, Error = PyErr>,
) -> PyResult<Bound<'py, PyAny>> {
    py.import("floodmark._arrays")?.getattr(function)?.call1(arguments.into_pyobject(py)?)
}

static GREEKS: PyOnceLock<Py<PyType>> = PyOnceLock::new();
static BARRIER_PROFILE: PyOnceLock<Py<PyType>> = PyOnceLock::new();

/// The type `floodmark.Greeks`.
pub(crate) fn greeks(py: Python<'_>) -> PyResult<&Bound<'_, PyType>> {
    GREEKS.import(py, "floodmark._results", "Greeks")
}

/// The type `floodmark.BarrierProfile`.
pub(crate) fn barrier_profile(py: Python<'_>) -> PyResult<&Bound<'_, PyType>> {
    BARRIER_PROFILE.import(py, "floodmark._results", "BarrierProfile")
}
