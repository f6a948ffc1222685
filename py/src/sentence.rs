//! What is said about an input that is refused.

use floodmark::{Error, Status};
use pyo3::exceptions::PyValueError;
use pyo3::prelude::*;
use pyo3::types::PyString;

/// The core's sentence as a `ValueError`.
pub(crate) fn refusal(error: Error) -> PyErr {
    PyValueError::new_err(error.to_string())
}

/// The core's sentence about a text that it does not know.
pub(crate) fn unknown_text(status: Status, text: &Bound<'_, PyString>) -> PyErr {
    let (field, text) = (status.field(), text.repr().map_or_else(|_| String::new(), |text| text.to_string()));
    let rule = status.rule();
    PyValueError::new_err(match status {
        Status::Contract => rule.replacen(field, &format!("{field} {text}"), 1),
        _ => format!("{rule}, got {text}"),
    })
}

/// What a status says, as a sentence: "vol must be from 0 to 1000".
///
/// >>> floodmark.status_text(15)
/// 'vol must be from 0 to 1000'
/// >>> floodmark.status_text(0)
/// 'ok'
#[pyfunction]
pub(crate) fn status_text(code: i32) -> String {
    Status::from_code(code)
        .map_or_else(|| format!("status {code} is not one that is known"), |status| status.rule().to_owned())
}
