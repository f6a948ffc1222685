//! Discounted first passage against the reference tables of `tests/reference/barrier.py` (complex ball arithmetic and
//! quadrature of the first-passage density): negative rates with an imaginary root, the double root, ordinary cases.

mod common;

use common::{Distribution, Row, contract_row, line, number, table};
use floodmark::brownian::Law;
use floodmark::price::price;

const BUDGET: f64 = 1e-12;

fn within_budget(name: &str, value: impl Fn(&Row) -> f64) {
    let mut errors = Distribution::default();
    let mut failures = Vec::new();
    for row in table(name) {
        let expected = number(&row, "value");
        let found = value(&row);
        let error = (found / expected - 1.0).abs();
        errors.add(error);
        if error.is_nan() || error > BUDGET {
            failures.push(format!("{error:.3e}: {found:e} in {row:?}"));
        }
    }
    println!("{name}: {errors}");
    assert!(failures.is_empty(), "{} rows beyond {BUDGET:e}:\n{}", failures.len(), failures.join("\n"));
}

#[test]
fn discounted_first_passage_is_right_to_twelve_digits() {
    within_budget("passage", |row| {
        Law::new(number(row, "drift"), number(row, "vol"), number(row, "horizon"))
            .and_then(|law| law.discounted_first_passage(number(row, "level"), number(row, "discount_rate")))
            .unwrap_or_else(|error| panic!("{row:?}: {error}"))
    });
}

#[test]
fn a_one_touch_at_a_negative_rate_is_right_to_twelve_digits() {
    within_budget("one_touch", |row| {
        let (sheet, market) = contract_row(row);
        price(&sheet, &market).unwrap_or_else(|error| panic!("{}: {error}", line(row)))
    });
}
