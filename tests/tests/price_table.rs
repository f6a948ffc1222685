//! Prices against the reference tables of `tests/reference/barrier.py`: two independent high-precision routes that
//! agree to 25 digits on every row, for the exact binary inputs in the row.

mod common;

use common::{Distribution, contract_row, number, table};
use floodmark::price::{greeks, price};

/// How many `eps (1 + kappa) |V|` a price may be off.
const BUDGET: f64 = 16.0;

fn within_budget(name: &str) {
    let mut errors = Distribution::default();
    let mut failures = Vec::new();
    for row in table(name) {
        let (sheet, market) = contract_row(&row);
        let (expected, kappa) = (number(&row, "value"), number(&row, "kappa"));
        let value = price(&sheet, &market).unwrap_or_else(|error| panic!("{row:?}: {error}"));
        assert!(value >= 0.0, "{value} in {row:?}");
        assert_eq!(value.to_bits(), greeks(&sheet, &market).unwrap().value.to_bits(), "{row:?}");
        let error = (value - expected).abs() / (f64::EPSILON * (1.0 + kappa) * expected);
        errors.add(error);
        if error.is_nan() || error > BUDGET {
            failures.push(format!("{error:.3e}: {value:e} for {}", common::line(&row)));
        }
    }
    println!("{name}: {errors} eps (1 + kappa)");
    assert!(failures.is_empty(), "{} rows beyond {BUDGET}:\n{}", failures.len(), failures.join("\n"));
}

#[test]
fn everyday_prices_are_within_budget() {
    within_budget("price_everyday");
}

#[test]
fn broad_prices_are_within_budget() {
    within_budget("price_broad");
}

#[test]
fn extreme_prices_are_within_budget() {
    within_budget("price_extreme");
}
