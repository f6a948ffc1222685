//! A block of rows: the unit in which a book is read, valued and written, its memory used again and again.

use std::collections::HashMap;
use std::io::{self, Read};

use floodmark::Status;
use floodmark::batch::{self, Book, Column, ColumnMut, GreekColumns, ProfileColumns};
use floodmark::price::Greeks;
use floodmark::terms::{Contract, RebatePaid};

use crate::field::{Field, Layout};
use crate::number::{write_number, write_text};
use crate::parity::Parity;
use crate::refusal::{Refusal, Rule};
use crate::rows::{Row, Rows};

/// Rows in a block: enough to pay for a call, few enough to stay in the cache.
pub(crate) const ROWS: usize = 1024;

/// The code of no contract: the core refuses such a row, so that all its results are NaN.
const NO_CONTRACT: u8 = u8::MAX;

/// The columns of a block, and the rows they were read from.
pub(crate) struct Block {
    /// The codes of the contracts by their text.
    codes: HashMap<String, u8>,
    texts: Vec<Row>,
    rows: usize,
    contract: Vec<u8>,
    rebate_paid: Vec<u8>,
    /// One column for each of [`Field::NUMBERS`].
    numbers: [Vec<f64>; Field::NUMBERS.len()],
    /// Why a row was refused.
    refusals: Vec<Option<Refusal>>,
    greeks: [Vec<f64>; Greeks::NAMES.len()],
    touch_probability: Vec<f64>,
    distance: Vec<f64>,
    value: Vec<f64>,
    error_bound: Vec<f64>,
    status: Vec<i32>,
    parity: Parity,
}

/// A row with its results, for whoever sums up.
pub(crate) struct Valued<'b> {
    /// The line of the book it stands on.
    pub(crate) line: u64,
    pub(crate) id: &'b [u8],
    pub(crate) contract: &'b [u8],
    /// Why there are no results.
    pub(crate) refusal: Option<&'b Refusal>,
    pub(crate) greeks: [f64; Greeks::NAMES.len()],
    pub(crate) spot: f64,
    pub(crate) barrier: f64,
    pub(crate) touch_probability: f64,
    pub(crate) distance: f64,
    /// For a knock contract, `|knock-in + knock-out - vanilla| / spot`.
    pub(crate) parity: Option<f64>,
}

impl Block {
    pub(crate) fn new() -> Block {
        let contracts = (0..Contract::COUNT).filter_map(|code| Contract::from_code(code).ok());
        let column = || vec![0.0; ROWS];
        Block {
            codes: contracts.map(|contract| (contract.to_string(), contract.code())).collect(),
            texts: vec![Row::default(); ROWS],
            rows: 0,
            contract: vec![NO_CONTRACT; ROWS],
            rebate_paid: vec![RebatePaid::NATURAL_CODE; ROWS],
            numbers: std::array::from_fn(|_| column()),
            refusals: vec![None; ROWS],
            greeks: std::array::from_fn(|_| column()),
            touch_probability: column(),
            distance: column(),
            value: column(),
            error_bound: column(),
            status: vec![0; ROWS],
            parity: Parity::default(),
        }
    }

    /// Reads the next rows, as many as there are up to a block; returns how many.
    pub(crate) fn read(&mut self, book: &mut Rows<impl Read>, layout: &Layout) -> io::Result<usize> {
        self.rows = 0;
        while self.rows < ROWS && book.next(&mut self.texts[self.rows])? {
            let taken = self.take(self.rows, layout);
            if taken.is_err() {
                self.contract[self.rows] = NO_CONTRACT;
            }
            self.refusals[self.rows] = taken.err();
            self.rows += 1;
        }
        Ok(self.rows)
    }

    /// Takes a row's texts into the columns. What is empty becomes NaN, which the core refuses where it is needed.
    fn take(&mut self, row: usize, layout: &Layout) -> Result<(), Refusal> {
        let texts = &self.texts[row];
        if !texts.closed {
            return Err(Refusal::new(Rule::Quotes));
        }
        if texts.len() != layout.width {
            let beyond = layout.first_beyond(texts.len()).map(|field| Refusal::new(Rule::Reach(field)));
            return Err(beyond.unwrap_or_else(|| Refusal::given(Rule::Width, texts.len().to_string().as_bytes())));
        }
        let text = |field| layout.text(texts, field);
        if str::from_utf8(text(Field::Id)).is_err() {
            return Err(Refusal::given(Rule::Text, text(Field::Id)));
        }
        self.contract[row] = match text(Field::Contract) {
            b"" => return Err(Refusal::new(Rule::Present(Field::Contract))),
            words => str::from_utf8(words)
                .ok()
                .and_then(|words| self.codes.get(words).copied())
                .ok_or_else(|| Refusal::given(Rule::Core(Status::Contract.code()), words))?,
        };
        self.rebate_paid[row] = match text(Field::RebatePaid) {
            b"" => RebatePaid::NATURAL_CODE,
            word => str::from_utf8(word)
                .ok()
                .and_then(RebatePaid::parse)
                .ok_or_else(|| Refusal::given(Rule::Core(Status::RebatePaid.code()), word))?
                .code(),
        };
        for (column, field) in self.numbers.iter_mut().zip(Field::NUMBERS) {
            column[row] = match text(field) {
                b"" if field == Field::Rebate => 0.0,
                b"" => f64::NAN,
                digits => str::from_utf8(digits)
                    .ok()
                    .and_then(|digits| digits.parse().ok())
                    .ok_or_else(|| Refusal::given(Rule::Number(field), digits))?,
            };
        }
        Ok(())
    }

    /// Values the rows.
    pub(crate) fn value(&mut self, layout: &Layout) -> floodmark::Result<()> {
        let book = book(&self.contract, Column::from_slice(&self.rebate_paid), &self.numbers, self.rows);
        let mut status = ColumnMut::from_slice(&mut self.status);
        let mut profile = ProfileColumns {
            touch_probability: Some(ColumnMut::from_slice(&mut self.touch_probability)),
            distance: Some(ColumnMut::from_slice(&mut self.distance)),
            gap: None,
        };
        batch::barrier_profile(&book, &mut profile, &mut status)?;
        let (mut value, mut error_bound) =
            (ColumnMut::from_slice(&mut self.value), ColumnMut::from_slice(&mut self.error_bound));
        batch::bounded_price(&book, &mut value, &mut error_bound, &mut status)?;
        let columns = self.greeks.each_mut().map(|column| Some(ColumnMut::from_slice(column)));
        batch::greeks(&book, &mut GreekColumns { columns }, &mut status)?;
        for row in 0..self.rows {
            let code = self.status[row];
            if code != Status::Ok.code() && self.refusals[row].is_none() {
                self.refusals[row] = Some(Refusal::by_core(code, |field| layout.text(&self.texts[row], field)));
            }
        }
        let valued = (0..self.rows).filter(|&row| self.refusals[row].is_none());
        self.parity.check(valued, &self.contract, &self.numbers)
    }

    /// Appends a line for each row to the output.
    pub(crate) fn write(&self, layout: &Layout, out: &mut Vec<u8>) {
        for row in 0..self.rows {
            write_text(out, String::from_utf8_lossy(layout.text(&self.texts[row], Field::Id)).as_bytes());
            for column in self.greeks.iter().chain([&self.touch_probability]) {
                out.push(b',');
                write_number(out, column[row]);
            }
            out.push(b',');
            match &self.refusals[row] {
                None => out.extend_from_slice(Status::Ok.rule().as_bytes()),
                Some(refusal) => write_text(out, refusal.to_string().as_bytes()),
            }
            out.push(b',');
            write_number(out, self.error_bound[row]);
            out.push(b'\n');
        }
    }

    /// A row with its results.
    pub(crate) fn row<'b>(&'b self, layout: &Layout, row: usize) -> Valued<'b> {
        let texts = &self.texts[row];
        let [spot, _, barrier, ..] = self.numbers.each_ref().map(|column| column[row]);
        Valued {
            line: texts.line,
            id: layout.text(texts, Field::Id),
            contract: layout.text(texts, Field::Contract),
            refusal: self.refusals[row].as_ref(),
            greeks: self.greeks.each_ref().map(|column| column[row]),
            spot,
            barrier,
            touch_probability: self.touch_probability[row],
            distance: self.distance[row],
            parity: self.parity.residual(row),
        }
    }
}

/// The columns of [`Field::NUMBERS`] as a book.
pub(crate) fn book<'a>(
    contract: &'a [u8],
    rebate_paid: Column<'a, u8>,
    numbers: &'a [Vec<f64>; Field::NUMBERS.len()],
    rows: usize,
) -> Book<'a> {
    let [spot, strike, barrier, rebate, expiry, vol, rate, dividend] =
        numbers.each_ref().map(|column| Column::from_slice(column));
    let contract = Column::from_slice(contract);
    Book { rows, contract, spot, strike, barrier, rebate, rebate_paid, expiry, vol, rate, dividend }
}
