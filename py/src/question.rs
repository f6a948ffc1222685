//! What can be asked about a contract: one and the same list for single contracts and for columns.

use floodmark::batch::{self, Book, ColumnMut, GreekColumns, ProfileColumns};
use floodmark::price;
use floodmark::terms::{Market, TermSheet};
use floodmark::{Error, Result, Status};
use pyo3::exceptions::PyValueError;
use pyo3::prelude::*;

/// A question about a contract, answered by one or more numbers.
#[derive(Clone, Copy)]
pub(crate) enum Question {
    Price,
    BoundedPrice,
    Greeks,
    BarrierProfile,
    ReferencePrice,
    ReferenceGreeks,
}

/// The most numbers that an answer has.
pub(crate) const WIDEST: usize = 12;

const ALL: [Question; 6] = [
    Question::Price,
    Question::BoundedPrice,
    Question::Greeks,
    Question::BarrierProfile,
    Question::ReferencePrice,
    Question::ReferenceGreeks,
];

impl Question {
    /// The name that the array shell knows it by.
    pub(crate) const fn name(self) -> &'static str {
        match self {
            Question::Price => "price",
            Question::BoundedPrice => "bounded_price",
            Question::Greeks => "greeks",
            Question::BarrierProfile => "barrier_profile",
            Question::ReferencePrice => "reference_price",
            Question::ReferenceGreeks => "reference_greeks",
        }
    }

    /// How many numbers the answer has.
    pub(crate) const fn width(self) -> usize {
        match self {
            Question::Price | Question::ReferencePrice => 1,
            Question::BoundedPrice => 2,
            Question::BarrierProfile => 3,
            Question::Greeks | Question::ReferenceGreeks => WIDEST,
        }
    }

    /// The answer for one contract; what is beyond its width is 0.
    pub(crate) fn answer(self, sheet: &TermSheet, market: &Market) -> Result<[f64; WIDEST]> {
        let mut numbers = [0.0; WIDEST];
        match self {
            Question::Price => numbers[0] = price::price(sheet, market)?,
            Question::ReferencePrice => numbers[0] = price::reference_price(sheet, market)?,
            Question::BoundedPrice => {
                let found = price::bounded_price(sheet, market)?;
                numbers[..2].copy_from_slice(&[found.value, found.error_bound]);
            }
            Question::BarrierProfile => {
                let found = price::barrier_profile(sheet, market)?;
                numbers[..3].copy_from_slice(&[found.touch_probability, found.distance, found.gap]);
            }
            Question::Greeks => numbers = price::greeks(sheet, market)?.to_array(),
            Question::ReferenceGreeks => numbers = price::reference_greeks(sheet, market)?.to_array(),
        }
        Ok(numbers)
    }

    /// The answers for a book, each number in a column of its own; returns how many rows were refused.
    pub(crate) fn answers(
        self,
        book: &Book<'_>,
        columns: Vec<ColumnMut<'_, f64>>,
        status: &mut ColumnMut<'_, i32>,
    ) -> Result<usize> {
        let mut columns = columns.into_iter();
        let mut next = || columns.next();
        let short = Error { status: Status::ColumnLength, value: 0.0 };
        match self {
            Question::Price => batch::price(book, &mut next().ok_or(short)?, status),
            Question::ReferencePrice => batch::reference_price(book, &mut next().ok_or(short)?, status),
            Question::BoundedPrice => {
                batch::bounded_price(book, &mut next().ok_or(short)?, &mut next().ok_or(short)?, status)
            }
            Question::BarrierProfile => {
                let mut profile = ProfileColumns { touch_probability: next(), distance: next(), gap: next() };
                batch::barrier_profile(book, &mut profile, status)
            }
            Question::Greeks => {
                batch::greeks(book, &mut GreekColumns { columns: std::array::from_fn(|_| next()) }, status)
            }
            Question::ReferenceGreeks => {
                batch::reference_greeks(book, &mut GreekColumns { columns: std::array::from_fn(|_| next()) }, status)
            }
        }
    }
}

impl<'py> FromPyObject<'_, 'py> for Question {
    type Error = PyErr;

    fn extract(given: Borrowed<'_, 'py, PyAny>) -> PyResult<Question> {
        let name: String = given.extract()?;
        let unknown = || PyValueError::new_err(format!("question '{name}' is not one that is known"));
        ALL.into_iter().find(|question| question.name() == name).ok_or_else(unknown)
    }
}
