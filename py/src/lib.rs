//! The Python door: plain numbers, texts and NumPy arrays in, numbers and arrays out.
//!
//! This crate translates and never computes. A call of plain numbers is answered at once (the scalar shell); any
//! other goes to `python/floodmark/_arrays.py`, which makes columns of its arguments and comes back for them.

// Documentation of a Python function is a docstring; an argument that is extracted is the function's own.
#![allow(clippy::doc_markdown, clippy::doc_link_with_quotes, clippy::needless_pass_by_value)]

mod book;
mod column;
mod contract;
mod law;
mod number;
mod question;
mod sentence;
mod shell;
mod special;

use floodmark::price::Greeks;
use floodmark::terms::{Contract, RebatePaid};
use pyo3::prelude::*;
use pyo3::types::PyTuple;

/// What `floodmark` and its modules show of the core.
#[pymodule]
fn _native(module: &Bound<'_, PyModule>) -> PyResult<()> {
    let py = module.py();
    module.add("__version__", floodmark::VERSION)?;
    let contracts = (0..Contract::COUNT).filter_map(|code| Contract::from_code(code).ok());
    module.add("CONTRACTS", PyTuple::new(py, contracts.map(|contract| contract.to_string()).collect::<Vec<_>>())?)?;
    let choices = [RebatePaid::Hit, RebatePaid::Expiry].map(|paid| (paid.to_string(), paid.code()));
    module.add("REBATE_PAID", PyTuple::new(py, choices)?)?;
    module.add("NATURAL", RebatePaid::NATURAL_CODE)?;
    module.add("GREEKS", PyTuple::new(py, Greeks::NAMES)?)?;
    module.add_function(wrap_pyfunction!(contract::contract_row, module)?)?;
    module.add_function(wrap_pyfunction!(contract::price, module)?)?;
    module.add_function(wrap_pyfunction!(contract::greeks, module)?)?;
    module.add_function(wrap_pyfunction!(contract::barrier_profile, module)?)?;
    module.add_function(wrap_pyfunction!(contract::reference_price, module)?)?;
    module.add_function(wrap_pyfunction!(contract::reference_greeks, module)?)?;
    module.add_function(wrap_pyfunction!(book::contract_columns, module)?)?;
    module.add_function(wrap_pyfunction!(sentence::status_text, module)?)?;
    law::add(module)?;
    special::add(module)?;
    // What is public is said by the modules in Python.
    module.delattr("__all__")
}
