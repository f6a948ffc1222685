//! A book of contracts in columns.
#![allow(unsafe_code)]

use floodmark::batch::Book;
use numpy::{PyArray1, PyReadonlyArray1};
use pyo3::prelude::*;

use crate::column::{Results, Source, in_parts};
use crate::question::Question;

/// Columns of results, the statuses, and how many rows were refused.
type Answers<'py> = (Vec<Bound<'py, PyArray1<f64>>>, Bound<'py, PyArray1<i32>>, usize);

/// Answers a question for every row of a book. `numbers` are the columns of spot, strike, barrier, rebate, expiry,
/// vol, rate, dividend; a column has `rows` elements, or one that stands in every row.
#[pyfunction]
pub(crate) fn contract_columns<'py>(
    py: Python<'py>,
    question: Question,
    rows: usize,
    contract: PyReadonlyArray1<'py, u8>,
    rebate_paid: PyReadonlyArray1<'py, u8>,
    numbers: [PyReadonlyArray1<'py, f64>; 8],
) -> PyResult<Answers<'py>> {
    let (contract, rebate_paid) = (Source::of(&contract, rows)?, Source::of(&rebate_paid, rows)?);
    let mut sources = Vec::with_capacity(numbers.len());
    for column in &numbers {
        sources.push(Source::of(column, rows)?);
    }
    let results: Vec<Results<'py, f64>> = (0..question.width()).map(|_| Results::new(py, rows)).collect();
    let statuses = Results::new(py, rows);
    let (targets, status) = (results.iter().map(Results::target).collect::<Vec<_>>(), statuses.target());
    let refused = in_parts(py, rows, |start, rows| {
        // SAFETY: the arrays live in this call, `Source::of` counted their rows, and the results are known here only.
        unsafe {
            let number = |place: usize| sources[place].column(start, rows);
            let book = Book {
                rows,
                contract: contract.column(start, rows),
                spot: number(0),
                strike: number(1),
                barrier: number(2),
                rebate: number(3),
                rebate_paid: rebate_paid.column(start, rows),
                expiry: number(4),
                vol: number(5),
                rate: number(6),
                dividend: number(7),
            };
            let columns = targets.iter().map(|target| target.column(start, rows)).collect();
            question.answers(&book, columns, &mut status.column(start, rows))
        }
    })?;
    Ok((results.into_iter().map(|result| result.array).collect(), statuses.array, refused))
}
