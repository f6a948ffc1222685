//! The same vectors through Rust and C, one by one and in columns, equal to the bit; `tests/python` reads them too.
//!
//! `tests/vectors/parity.csv` is the one file that every language reads. After the header line each line is a row of
//! one of two kinds, and cells that its kind has no use for are empty:
//!
//! - `contract`: inputs `name` (the contract's text), `code`, `spot` … `dividend`; answers `status`, `value` …
//!   `strike_delta` of price and Greeks, then `profile_status`, `touch_probability`, `distance`, `gap`.
//! - `law`: inputs `name` (the quantity's), `code`, `vol`, `drift`, `horizon`, `first`, `second`; answers `status`,
//!   `value`. `second` is empty where the quantity has one argument only.
//!
//! Inputs are decimals that read back as the exact binary64, or `NaN`, `inf`, `-inf`. `name` is empty where the code
//! is deliberately unknown. Answers are the 16 hexadecimal digits of the binary64, of a NaN where the status is not 0.
//! A scalar call must instead leave its output alone, or raise.
//!
//! `FLOODMARK_BLESS=1 cargo test -p floodmark-tests --test parity` writes the file anew.

mod c_library;
mod parity_rows;

use std::fmt::Write;
use std::fs;
use std::path::PathBuf;
use std::sync::OnceLock;

use c_library::{Link, compile};
use floodmark::Status;
use floodmark::batch::{Book, Column, ColumnMut, GreekColumns, LawColumns, ProfileColumns, Quantity};
use floodmark::price::{BarrierProfile, Greeks};
use floodmark::terms::{Contract, Market, RebatePaid, TermSheet};
use floodmark::{Result, batch, price};
use floodmark_tests::{root, run};
use parity_rows::{ContractRow, LawRow, contract_rows, law_rows};

const COLUMNS: &str = "kind,name,code,spot,strike,barrier,rebate,rebate_paid,expiry,vol,rate,dividend,\
    drift,horizon,first,second,\
    status,value,delta,gamma,vega,theta,rho,dividend_rho,vanna,volga,charm,barrier_delta,strike_delta,\
    profile_status,touch_probability,distance,gap";

/// What a scalar call that refuses must leave in its output; `tests/c/vectors.c` has the same.
const UNTOUCHED: u64 = 0x0123_4567_89ab_cdef;

fn file() -> PathBuf {
    root().join("tests/vectors/parity.csv")
}

/// The text of the file, after it was written anew if that is asked for.
fn committed() -> &'static str {
    static TEXT: OnceLock<String> = OnceLock::new();
    TEXT.get_or_init(|| {
        if std::env::var_os("FLOODMARK_BLESS").is_some() {
            fs::write(file(), generate()).unwrap();
        }
        fs::read_to_string(file()).unwrap()
    })
}

/// One row's answers: the status and the bits of each number.
#[derive(Clone, Debug, PartialEq)]
struct Answers {
    greeks: (i32, [u64; 12]),
    profile: (i32, [u64; 3]),
}

impl Answers {
    fn of(greeks: Result<Greeks>, profile: Result<BarrierProfile>) -> Answers {
        let bits =
            |profile: BarrierProfile| [profile.touch_probability, profile.distance, profile.gap].map(f64::to_bits);
        Answers {
            greeks: (
                status(&greeks),
                greeks.map_or([f64::NAN.to_bits(); 12], |found| found.to_array().map(f64::to_bits)),
            ),
            profile: (status(&profile), profile.map_or([f64::NAN.to_bits(); 3], bits)),
        }
    }

    fn cells(&self) -> String {
        let mut text = String::new();
        write!(text, "{}", self.greeks.0).unwrap();
        push_bits(&mut text, &self.greeks.1);
        write!(text, ",{}", self.profile.0).unwrap();
        push_bits(&mut text, &self.profile.1);
        text
    }
}

fn push_bits(text: &mut String, numbers: &[u64]) {
    for bits in numbers {
        write!(text, ",{bits:016x}").unwrap();
    }
}

fn status<V>(outcome: &Result<V>) -> i32 {
    outcome.as_ref().map_or_else(|error| error.status, |_| Status::Ok).code()
}

/// The answers of the scalar functions of Rust; the value alone must be the first of the Greeks.
fn scalar(row: &ContractRow) -> Answers {
    let sheet = || -> Result<TermSheet> {
        let contract = Contract::from_code(row.code)?;
        Ok(TermSheet {
            contract,
            strike: row.strike,
            barrier: row.barrier,
            rebate: row.rebate,
            rebate_paid: RebatePaid::from_code(row.rebate_paid, contract)?,
            expiry: row.expiry,
        })
    };
    let market = Market { spot: row.spot, vol: row.vol, rate: row.rate, dividend: row.dividend };
    let value = sheet().and_then(|sheet| price::price(&sheet, &market));
    let greeks = sheet().and_then(|sheet| price::greeks(&sheet, &market));
    assert_eq!(
        value.map(f64::to_bits).map_err(|e| e.status),
        greeks.map(|g| g.value.to_bits()).map_err(|e| e.status),
        "{row:?}"
    );
    Answers::of(greeks, sheet().and_then(|sheet| price::barrier_profile(&sheet, &market)))
}

/// The answers of Rust's columns.
fn columns(rows: &[ContractRow]) -> Vec<Answers> {
    let numbers = |member: fn(&ContractRow) -> f64| rows.iter().map(member).collect::<Vec<f64>>();
    let codes = |member: fn(&ContractRow) -> u8| rows.iter().map(member).collect::<Vec<u8>>();
    let (contract, rebate_paid) = (codes(|row| row.code), codes(|row| row.rebate_paid));
    let (spot, strike) = (numbers(|row| row.spot), numbers(|row| row.strike));
    let (barrier, rebate) = (numbers(|row| row.barrier), numbers(|row| row.rebate));
    let (expiry, vol) = (numbers(|row| row.expiry), numbers(|row| row.vol));
    let (rate, dividend) = (numbers(|row| row.rate), numbers(|row| row.dividend));
    let book = Book {
        rows: rows.len(),
        contract: Column::from_slice(&contract),
        spot: Column::from_slice(&spot),
        strike: Column::from_slice(&strike),
        barrier: Column::from_slice(&barrier),
        rebate: Column::from_slice(&rebate),
        rebate_paid: Column::from_slice(&rebate_paid),
        expiry: Column::from_slice(&expiry),
        vol: Column::from_slice(&vol),
        rate: Column::from_slice(&rate),
        dividend: Column::from_slice(&dividend),
    };
    let mut numbers = vec![vec![0.0; rows.len()]; 15];
    let mut statuses = vec![vec![-1; rows.len()]; 2];
    let [greek_status, profile_status] = &mut statuses[..] else { unreachable!() };
    let (greeks, profile) = numbers.split_at_mut(12);
    let mut wanted = greeks.iter_mut().map(|column| Some(ColumnMut::from_slice(column)));
    let mut greeks = GreekColumns { columns: std::array::from_fn(|_| wanted.next().unwrap()) };
    let mut wanted = profile.iter_mut().map(|column| Some(ColumnMut::from_slice(column)));
    let mut next = || wanted.next().unwrap();
    let mut profile = ProfileColumns { touch_probability: next(), distance: next(), gap: next() };
    let refused = batch::greeks(&book, &mut greeks, &mut ColumnMut::from_slice(greek_status)).unwrap();
    batch::barrier_profile(&book, &mut profile, &mut ColumnMut::from_slice(profile_status)).unwrap();
    let mut value = vec![0.0; rows.len()];
    let mut value_status = vec![-1; rows.len()];
    let alone =
        batch::price(&book, &mut ColumnMut::from_slice(&mut value), &mut ColumnMut::from_slice(&mut value_status));
    assert_eq!(alone, Ok(refused));
    assert_eq!(value_status, statuses[0]);
    (0..rows.len())
        .map(|row| {
            let bits = |column: usize| numbers[column][row].to_bits();
            assert_eq!(value[row].to_bits(), bits(0), "{:?}", rows[row]);
            Answers {
                greeks: (statuses[0][row], std::array::from_fn(bits)),
                profile: (statuses[1][row], std::array::from_fn(|column| bits(12 + column))),
            }
        })
        .collect()
}

/// The file as the Rust library of today would have it.
fn generate() -> String {
    let mut text = format!("{COLUMNS}\n");
    for row in contract_rows() {
        writeln!(text, "contract,{},,,,,{}", row.cells(), scalar(&row).cells()).unwrap();
    }
    for row in law_rows() {
        writeln!(text, "law,{},{}{}", row.cells(), law_cells(law_scalar(&row)), ",".repeat(15)).unwrap();
    }
    text
}

/// The status and the bits that the law gives for a row.
fn law_scalar(row: &LawRow) -> (i32, u64) {
    let found = batch::law_value(row.quantity, row.drift, row.vol, row.horizon, row.first, row.second);
    (status(&found), found.unwrap_or(f64::NAN).to_bits())
}

fn law_cells((status, bits): (i32, u64)) -> String {
    format!("{status},{bits:016x}")
}

#[test]
fn columns_of_the_law_have_the_bits_of_its_scalars() {
    let rows = law_rows();
    for quantity in Quantity::ALL {
        let rows: Vec<&LawRow> = rows.iter().filter(|row| row.quantity == quantity).collect();
        let column = |member: fn(&LawRow) -> f64| rows.iter().map(|row| member(row)).collect::<Vec<f64>>();
        let (drift, vol, horizon) = (column(|row| row.drift), column(|row| row.vol), column(|row| row.horizon));
        let (first, second) = (column(|row| row.first), column(|row| row.second));
        let inputs = LawColumns {
            rows: rows.len(),
            drift: Column::from_slice(&drift),
            vol: Column::from_slice(&vol),
            horizon: Column::from_slice(&horizon),
            first: Column::from_slice(&first),
            second: Column::from_slice(&second),
        };
        let (mut values, mut statuses) = (vec![0.0; rows.len()], vec![-1; rows.len()]);
        batch::law(
            quantity,
            &inputs,
            &mut ColumnMut::from_slice(&mut values),
            &mut ColumnMut::from_slice(&mut statuses),
        )
        .unwrap();
        for (place, row) in rows.iter().enumerate() {
            assert_eq!((statuses[place], values[place].to_bits()), law_scalar(row), "{row:?}");
        }
    }
}

#[test]
fn rust_gives_the_bits_of_the_file() {
    let (committed, made) = (committed(), generate());
    for (ours, theirs) in made.lines().zip(committed.lines()) {
        assert_eq!(
            ours, theirs,
            "if new bits are meant, run FLOODMARK_BLESS=1 cargo test -p floodmark-tests --test parity"
        );
    }
    assert_eq!(made.lines().count(), committed.lines().count());
}

#[test]
fn columns_of_rust_have_the_bits_of_its_scalars() {
    let rows = contract_rows();
    for (row, found) in rows.iter().zip(columns(&rows)) {
        assert_eq!(found, scalar(row), "{row:?}");
    }
}

#[test]
fn every_contract_and_every_status_of_a_row_is_in_the_file() {
    let text = committed();
    let rows: Vec<Vec<&str>> = text.lines().skip(1).map(|line| line.split(',').collect()).collect();
    let names: Vec<&str> = COLUMNS.split(',').collect();
    let place = |name: &str| names.iter().position(|known| *known == name).unwrap();
    assert!(rows.iter().all(|row| row.len() == names.len()));
    let answered = |kind: &str, code: u8| {
        let good =
            |row: &&Vec<&str>| row[0] == kind && row[place("code")] == code.to_string() && row[place("status")] == "0";
        rows.iter().filter(good).count()
    };
    for code in 0..Contract::COUNT {
        assert!(answered("contract", code) >= 6, "contract {code}: {}", answered("contract", code));
    }
    for quantity in Quantity::ALL {
        assert!(answered("law", quantity.code()) >= 4, "{quantity:?}: {}", answered("law", quantity.code()));
    }
    // No row can ask an unknown quantity: a call over columns asks the same of every row.
    let of_a_row = |status: &Status| status.code() < 100 && *status != Status::Quantity;
    for status in Status::ALL.into_iter().filter(of_a_row) {
        assert!(rows.iter().any(|row| row[place("status")] == status.code().to_string()), "{status:?}");
    }
    assert!(rows.iter().all(|row| (row[place("status")] == "0") == (row[place("value")] != "7ff8000000000000")));
}

#[test]
fn c_gives_the_bits_of_the_file() {
    let program = compile("tests/c/vectors.c", Link::Shared, "vectors", &[]);
    let said = run(c_library::command(&program).arg(file()));
    let mut said = said.lines();
    let text = committed();
    for line in text.lines().skip(1) {
        let cells: Vec<&str> = line.split(',').collect();
        let answers: Vec<&str> = cells[16..].iter().copied().filter(|cell| !cell.is_empty()).collect();
        let expected = answers.join(",");
        // Of what is refused a scalar call writes nothing.
        let refused = |status: &str| status != "0";
        let alone: Vec<String> = answers
            .iter()
            .scan(false, |untouched, cell| {
                if cell.len() != 16 {
                    *untouched = refused(cell);
                    return Some((*cell).to_owned());
                }
                Some(if *untouched { format!("{UNTOUCHED:016x}") } else { (*cell).to_owned() })
            })
            .collect();
        assert_eq!(said.next(), Some(format!("scalar,{}", alone.join(",")).as_str()), "{line}");
        assert_eq!(said.next(), Some(format!("column,{expected}").as_str()), "{line}");
    }
    assert_eq!(said.next(), None);
}
