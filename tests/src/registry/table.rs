//! The reference tables of `tests/reference`.

use std::collections::BTreeMap;

use floodmark::terms::{Contract, Market, RebatePaid, TermSheet};

use crate::root;

/// A row by column name.
pub(super) struct Row(BTreeMap<String, String>);

/// The rows of `tests/reference/<name>.csv`; no cell there is quoted.
pub(super) fn table(name: &str) -> Vec<Row> {
    let path = root().join("tests/reference").join(name).with_extension("csv");
    let text = std::fs::read_to_string(&path).unwrap_or_else(|error| panic!("{}: {error}", path.display()));
    let mut lines = text.lines().map(|line| line.split(',').map(str::to_owned));
    let header: Vec<String> = lines.next().expect("a header").collect();
    let rows: Vec<Row> = lines.map(|cells| Row(header.iter().cloned().zip(cells).collect())).collect();
    assert!(rows.len() > 50, "{} is cut short", path.display());
    rows
}

impl Row {
    /// A cell.
    pub(super) fn cell(&self, column: &str) -> &str {
        self.0.get(column).unwrap_or_else(|| panic!("no column {column}"))
    }

    /// A cell as the nearest binary number; NaN where it is empty.
    pub(super) fn number(&self, column: &str) -> f64 {
        match self.cell(column) {
            "" => f64::NAN,
            cell => cell.parse().unwrap_or_else(|error| panic!("{column} {cell}: {error}")),
        }
    }

    /// The contract and market of the row.
    pub(super) fn contract(&self) -> (TermSheet, Market) {
        let contract = Contract::parse(self.cell("contract")).expect("a contract");
        let paid = RebatePaid::parse(self.cell("rebate_paid")).expect("hit or expiry");
        let sheet = TermSheet::new(contract, self.number("expiry"))
            .strike(self.number("strike"))
            .barrier(self.number("barrier"))
            .rebate(self.number("rebate"), paid);
        let [spot, vol, rate, dividend] = ["spot", "vol", "rate", "dividend"].map(|column| self.number(column));
        (sheet, Market { spot, vol, rate, dividend })
    }
}
