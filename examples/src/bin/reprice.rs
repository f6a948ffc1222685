//! Reprices a book of contracts: CSV in, CSV out, a summary on the terminal.

use std::ffi::OsString;
use std::fs::{self, File};
use std::io::{self, Read, Write};
use std::path::Path;
use std::process::ExitCode;
use std::time::{Duration, Instant};

use floodmark_examples::{Failure, Summary, reprice};

const HELP: &str = "\
Reprices a book of contracts with its Greeks: CSV in, CSV out.

reprice [BOOK|-] [--out FILE|-]

  BOOK        the book, or - for standard input; without it, a demo book
  --out FILE  where the values go, or - for standard output, as without it
  --help      this text
  --version   the version

A book has the columns, by name and in any order,
  id, contract, spot, strike, barrier, rebate, rebate_paid, expiry, vol, rate, dividend
of which rebate (0 where empty) and rebate_paid (as is natural where empty) may be left out; others are not read.
  contract     call, put, cash call, cash put, asset call, asset put, cash, asset;
               up-and-out, up-and-in, down-and-out, down-and-in and one of these: up-and-out call;
               up one-touch, down one-touch, up no-touch, down no-touch
  rebate_paid  hit or expiry
  expiry in years, vol per square root of a year, rate and dividend per year and continuously compounded
Each row gets its value, its Greeks, its probability of touching, a status (ok, or what is wrong with the row, whose
numbers are then NaN) and a bound on how far arithmetic has taken the value from the exact one.

The summary goes to standard output when the values go to a file, and to standard error otherwise.
Exit status: 0 all rows valued, 1 some rows refused, 2 the book cannot be read or the values cannot be written.
Model values, not advice.
";

/// The book that is repriced where none is named.
const DEMO_BOOK: &[u8] = include_bytes!("../../demo_book.csv");

/// How long a book may take before it is said how far it is, and again after each such time.
const PATIENCE: Duration = Duration::from_secs(2);

/// What the command line asks for.
enum Request {
    Say(String),
    Reprice { book: Option<OsString>, out: Option<OsString> },
}

fn main() -> ExitCode {
    match request().and_then(carry_out) {
        Ok(code) => code,
        Err(sentence) => {
            // Nothing can be done if standard error is closed.
            let _ = writeln!(io::stderr(), "reprice: {sentence}");
            ExitCode::from(2)
        }
    }
}

fn request() -> Result<Request, String> {
    use lexopt::prelude::{Long, Short, Value};
    let (mut book, mut out) = (None, None);
    let mut arguments = lexopt::Parser::from_env();
    while let Some(argument) = arguments.next().map_err(|error| error.to_string())? {
        match argument {
            Short('h') | Long("help") => return Ok(Request::Say(HELP.to_owned())),
            Short('V') | Long("version") => return Ok(Request::Say(format!("reprice {}\n", floodmark::VERSION))),
            Long("out") if out.is_none() => out = Some(arguments.value().map_err(|error| error.to_string())?),
            Value(path) if book.is_none() => book = Some(path),
            other => return Err(format!("{}; see --help", other.unexpected())),
        }
    }
    Ok(Request::Reprice { book, out: out.filter(|path| path != "-") })
}

fn carry_out(request: Request) -> Result<ExitCode, String> {
    let (book, out) = match request {
        Request::Say(text) => return said(io::stdout().write_all(text.as_bytes())),
        Request::Reprice { book, out } => (book, out),
    };
    let source: Box<dyn Read> = match &book {
        None => Box::new(DEMO_BOOK),
        Some(dash) if dash == "-" => Box::new(io::stdin().lock()),
        Some(path) => Box::new(File::open(path).map_err(|error| about(path, &error))?),
    };
    match &out {
        None => match reprice(source, io::stdout().lock(), progress()) {
            Err(Failure::Write(error)) => said(Err(error)),
            outcome => finish(outcome, io::stderr()),
        },
        Some(path) => {
            if book.as_ref().is_some_and(|book| same_file(book.as_ref(), path.as_ref())) {
                return Err(about(path, &"the values would overwrite the book"));
            }
            let file = File::create(path).map_err(|error| about(path, &error))?;
            finish(reprice(source, file, progress()), io::stdout())
        }
    }
}

fn about(path: &OsString, what: &dyn std::fmt::Display) -> String {
    format!("{}: {what}", path.display())
}

/// Shows the summary, and says by the exit status whether all rows were valued.
fn finish(outcome: Result<Summary, Failure>, mut terminal: impl Write) -> Result<ExitCode, String> {
    let summary = outcome.map_err(|failure| failure.to_string())?;
    // The values are written; a terminal that went away does not undo that.
    let _ = write!(terminal, "{summary}");
    Ok(ExitCode::from(u8::from(summary.refused() > 0)))
}

/// Whoever reads standard output may stop when he has seen enough.
fn said(written: io::Result<()>) -> Result<ExitCode, String> {
    match written {
        Err(error) if error.kind() != io::ErrorKind::BrokenPipe => Err(Failure::Write(error).to_string()),
        _ => Ok(ExitCode::SUCCESS),
    }
}

fn same_file(one: &Path, other: &Path) -> bool {
    matches!((fs::canonicalize(one), fs::canonicalize(other)), (Ok(one), Ok(other)) if one == other)
}

/// Says on the terminal from time to time how many rows are done.
fn progress() -> impl FnMut(u64) {
    let (start, mut said) = (Instant::now(), Instant::now());
    move |rows| {
        if said.elapsed() >= PATIENCE {
            said = Instant::now();
            let seconds = start.elapsed().as_secs();
            let _ = writeln!(io::stderr(), "{rows} rows in {seconds} s");
        }
    }
}
