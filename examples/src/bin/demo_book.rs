//! Writes the demo book to its place in the repository.

use std::path::Path;
use std::{fs, io};

fn main() -> io::Result<()> {
    fs::write(Path::new(env!("CARGO_MANIFEST_DIR")).join("demo_book.csv"), floodmark_examples::demo_book::demo_book())
}
