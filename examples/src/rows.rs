//! The rows of a book, one a line.
//!
//! A field of a CSV file may hold a line break between quotes. A book has no use for that, and one quote that is
//! opened and not closed would then swallow all rows after it. So a row ends where its line ends, and quotes are
//! read within the line only.

use std::io::{self, BufRead, BufReader, Read};

use csv_core::ReadRecordResult;

/// How much of a book is read at once, in bytes.
const BUFFER: usize = 1 << 18;

/// A book, from which rows are taken one after the other.
pub(crate) struct Rows<R> {
    book: BufReader<R>,
    fields: csv_core::Reader,
    line: Vec<u8>,
    /// How many lines were read.
    lines: u64,
}

/// The fields of a row.
#[derive(Clone, Debug, Default)]
pub(crate) struct Row {
    /// The line of the book it stands on, from 1.
    pub(crate) line: u64,
    text: Vec<u8>,
    /// Where each field ends in the text; the first `len` are in use.
    ends: Vec<usize>,
    len: usize,
    /// Whether every quote that is opened is closed.
    pub(crate) closed: bool,
}

impl Row {
    /// How many fields there are.
    pub(crate) fn len(&self) -> usize {
        self.len
    }

    /// A field, from 0.
    pub(crate) fn get(&self, field: usize) -> Option<&[u8]> {
        let ends = &self.ends[..self.len];
        let start = if field == 0 { 0 } else { *ends.get(field - 1)? };
        self.text.get(start..*ends.get(field)?)
    }

    /// All fields.
    pub(crate) fn iter(&self) -> impl Iterator<Item = &[u8]> {
        (0..self.len).filter_map(|field| self.get(field))
    }
}

impl<R: Read> Rows<R> {
    pub(crate) fn new(book: R) -> Rows<R> {
        let fields = csv_core::Reader::new();
        Rows { book: BufReader::with_capacity(BUFFER, book), fields, line: Vec::new(), lines: 0 }
    }

    /// Reads the next row that is not blank into the memory of an old one; false at the end of the book.
    pub(crate) fn next(&mut self, row: &mut Row) -> io::Result<bool> {
        loop {
            self.line.clear();
            if self.book.read_until(b'\n', &mut self.line)? == 0 {
                return Ok(false);
            }
            self.lines += 1;
            if !self.line.trim_ascii().is_empty() {
                self.split(row);
                return Ok(true);
            }
        }
    }

    /// Splits the line into its fields.
    fn split(&mut self, row: &mut Row) {
        if self.line.last() != Some(&b'\n') {
            self.line.push(b'\n');
        }
        let most = self.line.split(|byte| *byte == b',').count();
        row.text.resize(self.line.len(), 0);
        row.ends.resize(most, 0);
        row.line = self.lines;
        self.fields.reset();
        let (found, _, written, ended) = self.fields.read_record(&self.line, &mut row.text, &mut row.ends);
        row.closed = found == ReadRecordResult::Record;
        row.len = ended;
        if !row.closed && ended < most {
            row.ends[ended] = written;
            row.len = ended + 1;
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn quotes_are_read_within_their_line() {
        let book =
            "\u{feff}\"a\",b\r\n1,\"2,5\"\r\n\"say \"\"so\"\"\",\n1,\"open,4\n5,6\n\r\n  \n7,in\"side\n8,\"\n\"9\"";
        let wanted: [(bool, &[&str], u64); 8] = [
            (true, &["a", "b"], 1),
            (true, &["1", "2,5"], 2),
            (true, &["say \"so\"", ""], 3),
            (false, &["1", "open,4\n"], 4),
            (true, &["5", "6"], 5),
            (true, &["7", "in\"side"], 8),
            (false, &["8", "\n"], 9),
            (true, &["9"], 10),
        ];
        let mut rows = Rows::new(book.as_bytes());
        let mut row = Row::default();
        for (closed, fields, line) in wanted {
            assert!(rows.next(&mut row).unwrap());
            let found: Vec<&str> = row.iter().map(|field| str::from_utf8(field).unwrap()).collect();
            assert_eq!((row.closed, &found[..], row.line), (closed, fields, line));
            assert_eq!((row.len(), row.get(row.len())), (fields.len(), None));
        }
        assert!(!rows.next(&mut row).unwrap());
    }
}
