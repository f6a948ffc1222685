//! From a book to its values: read a block, value it, write it, sum it up, until the book ends.

use std::fmt;
use std::io::{self, Read, Write};

use crate::block::Block;
use crate::field::Layout;
use crate::rows::{Row, Rows};
use crate::summary::Summary;

/// The header of the output.
pub const HEADER: &str = "id,value,delta,gamma,vega,theta,rho,dividend_rho,vanna,volga,charm,barrier_delta,strike_delta,\
                          touch_probability,status,error_bound";

/// Why a book could not be repriced to its end.
#[derive(Debug)]
pub enum Failure {
    /// The book has no header, or one that lacks a column.
    Header(String),
    /// The book could not be read on.
    Read(io::Error),
    /// The values could not be written.
    Write(io::Error),
    /// The columns of a block do not fit each other: a fault of this program.
    Columns(floodmark::Error),
}

impl fmt::Display for Failure {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Failure::Header(sentence) => f.write_str(sentence),
            Failure::Read(error) => write!(f, "the book cannot be read: {error}"),
            Failure::Write(error) => write!(f, "the values cannot be written: {error}"),
            Failure::Columns(error) => error.fmt(f),
        }
    }
}

impl std::error::Error for Failure {}

/// Reprices a book; `progress` is told after each block how many rows are done.
///
/// The memory in use depends on the longest row, not on how many there are.
///
/// # Errors
///
/// [`Failure`] if the book or its header cannot be read, or the output cannot be written.
/// A bad row is not a failure: it gets NaN and a sentence.
pub fn reprice(book: impl Read, mut out: impl Write, mut progress: impl FnMut(u64)) -> Result<Summary, Failure> {
    let mut book = Rows::new(book);
    let mut header = Row::default();
    if !book.next(&mut header).map_err(Failure::Read)? {
        return Err(Failure::Header("the book is empty: it has no header".to_owned()));
    }
    let mut layout = Layout::from_header(&header).map_err(Failure::Header)?;
    let mut summary = Summary::of_book_with(std::mem::take(&mut layout.unread));
    let mut block = Block::new();
    let mut text = Vec::from(HEADER);
    text.push(b'\n');
    loop {
        let rows = block.read(&mut book, &layout).map_err(Failure::Read)?;
        block.value(&layout).map_err(Failure::Columns)?;
        block.write(&layout, &mut text);
        out.write_all(&text).map_err(Failure::Write)?;
        text.clear();
        if rows == 0 {
            out.flush().map_err(Failure::Write)?;
            return Ok(summary);
        }
        for row in 0..rows {
            summary.add(&block.row(&layout, row));
        }
        progress(summary.rows);
    }
}
