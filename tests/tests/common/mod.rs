//! Reading the reference tables, and telling how errors are spread.
#![allow(dead_code)]

use std::collections::BTreeMap;
use std::fmt;

use floodmark::terms::{Contract, Market, RebatePaid, TermSheet};

/// A row by column name.
pub(crate) type Row = BTreeMap<String, String>;

/// The rows of `tests/reference/<name>.csv`; no cell there is quoted.
pub(crate) fn table(name: &str) -> Vec<Row> {
    let path = floodmark_tests::root().join("tests/reference").join(name).with_extension("csv");
    let text = std::fs::read_to_string(&path).unwrap_or_else(|error| panic!("{}: {error}", path.display()));
    let mut lines = text.lines().map(|line| line.split(',').map(str::to_owned).collect::<Vec<_>>());
    let header = lines.next().expect("a header");
    let rows: Vec<Row> = lines
        .map(|cells| {
            assert_eq!(cells.len(), header.len(), "{}: {cells:?}", path.display());
            header.iter().cloned().zip(cells).collect()
        })
        .collect();
    assert!(rows.len() > 50, "{} is cut short", path.display());
    rows
}

/// A cell as the nearest binary number; NaN where it is empty.
pub(crate) fn number(row: &Row, column: &str) -> f64 {
    match row[column].as_str() {
        "" => f64::NAN,
        cell => cell.parse().unwrap_or_else(|error| panic!("{column} {cell}: {error}")),
    }
}

/// The contract and market of a row.
pub(crate) fn contract_row(row: &Row) -> (TermSheet, Market) {
    let contract = Contract::parse(&row["contract"]).unwrap_or_else(|| panic!("{row:?}"));
    let paid = RebatePaid::parse(&row["rebate_paid"]).unwrap_or_else(|| panic!("{row:?}"));
    let sheet = TermSheet::new(contract, number(row, "expiry"))
        .strike(number(row, "strike"))
        .barrier(number(row, "barrier"))
        .rebate(number(row, "rebate"), paid);
    let market = Market {
        spot: number(row, "spot"),
        vol: number(row, "vol"),
        rate: number(row, "rate"),
        dividend: number(row, "dividend"),
    };
    (sheet, market)
}

/// The inputs and the value of a row, to be copied from a failure.
pub(crate) fn line(row: &Row) -> String {
    const COLUMNS: [&str; 12] = [
        "contract",
        "rebate_paid",
        "spot",
        "strike",
        "barrier",
        "rebate",
        "expiry",
        "vol",
        "rate",
        "dividend",
        "value",
        "kappa",
    ];
    COLUMNS
        .iter()
        .filter_map(|&column| row.get(column).map(|cell| format!("{column}={cell}")))
        .collect::<Vec<_>>()
        .join(" ")
}

/// Errors seen, shown by their largest, their 99 % quantile and their median.
#[derive(Clone, Debug, Default)]
pub(crate) struct Distribution(Vec<f64>);

impl Distribution {
    pub(crate) fn add(&mut self, error: f64) {
        self.0.push(error);
    }

    fn quantile(&self, share: f64) -> f64 {
        let mut sorted = self.0.clone();
        sorted.sort_by(f64::total_cmp);
        #[allow(clippy::cast_precision_loss, clippy::cast_possible_truncation, clippy::cast_sign_loss)]
        let place = (share * (sorted.len() - 1) as f64).ceil() as usize;
        sorted[place]
    }
}

impl fmt::Display for Distribution {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        let [half, most, all] = [0.5, 0.99, 1.0].map(|share| self.quantile(share));
        write!(f, "{} rows, median {half:.2e}, 99 % {most:.2e}, max {all:.2e}", self.0.len())
    }
}
