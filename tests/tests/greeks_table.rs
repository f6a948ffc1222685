//! Greeks against the reference table of `tests/reference/barrier.py`: differences of the reflection formula in
//! hundreds of digits, at two step sizes that agree to 30 digits and satisfy the Black-Scholes equation.

mod common;

use common::{Distribution, contract_row, line, number, table};
use floodmark::price::{Greeks, greeks};

/// How far a Greek may be off, in units of its own magnitude plus what relative changes of the inputs do to it.
const BUDGET: f64 = 1e-12;

/// Below this a Greek is not distinguished from 0: its last digits are those of a subnormal number.
const FLOOR: f64 = 1e-290;

fn within_budget(table_name: &str) {
    let mut errors = vec![Distribution::default(); Greeks::NAMES.len()];
    let mut all = Distribution::default();
    let mut failures = Vec::new();
    for row in table(table_name) {
        let (sheet, market) = contract_row(&row);
        let risk = greeks(&sheet, &market).unwrap_or_else(|error| panic!("{}: {error}", line(&row)));
        for (index, (name, found)) in Greeks::NAMES.into_iter().zip(risk.to_array()).enumerate().skip(1) {
            let (expected, scale) = (number(&row, name), number(&row, &format!("{name}_scale")));
            let error = (found - expected).abs() / (expected.abs() + scale + FLOOR);
            errors[index].add(error);
            all.add(error);
            if error.is_nan() || error > BUDGET {
                failures.push(format!("{name} {error:.3e}: {found:e} for {expected:e}, {}", line(&row)));
            }
        }
    }
    for (name, spread) in Greeks::NAMES.iter().zip(&errors).skip(1) {
        println!("{table_name} {name}: {spread}");
    }
    println!("{table_name}, all: {all}");
    assert!(failures.is_empty(), "{} beyond {BUDGET:e}:\n{}", failures.len(), failures.join("\n"));
}

#[test]
fn everyday_and_broad_greeks_are_within_budget_of_their_own_conditioning() {
    within_budget("greeks");
}

#[test]
fn extreme_greeks_are_within_budget_of_their_own_conditioning() {
    within_budget("greeks_extreme");
}
