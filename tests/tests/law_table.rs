//! The law of Brownian motion and its extremes against the reference table of `tests/reference/law.py`: two
//! independent high-precision routes that agree to 25 digits on every row, for the exact binary inputs in the row.

mod common;
mod decimal;

use common::{Distribution, Row, number, table};
use decimal::{relative_error, ulps};
use floodmark::brownian::{Law, Quantity};

/// How many `eps (1 + kappa) |V|` the fast path may be off.
const FAST_BUDGET: f64 = 16.0;

/// How many units in the last place the reference path may be off.
const REFERENCE_BUDGET: f64 = 1.0;

struct Question {
    quantity: Quantity,
    law: Law,
    first: f64,
    second: f64,
}

impl Question {
    fn of(row: &Row) -> Question {
        let named = |quantity: &Quantity| quantity.name() == row["quantity"];
        let quantity = Quantity::ALL.into_iter().find(named).unwrap_or_else(|| panic!("{row:?}"));
        let law = Law::new(number(row, "drift"), number(row, "vol"), number(row, "horizon"));
        let law = law.unwrap_or_else(|error| panic!("{row:?}: {error}"));
        let second = if row["second"].is_empty() { 0.0 } else { number(row, "second") };
        Question { quantity, law, first: number(row, "first"), second }
    }
}

/// Asserts the error of every row, and prints how the errors of each quantity are spread.
fn within_budget(unit: &str, budget: f64, error: impl Fn(&Row, &Question) -> f64) {
    let rows = table("law");
    let mut failures = Vec::new();
    let mut all = Distribution::default();
    for quantity in Quantity::ALL {
        let mut errors = Distribution::default();
        let mut count = 0;
        for row in rows.iter().filter(|row| row["quantity"] == quantity.name()) {
            let error = error(row, &Question::of(row));
            count += 1;
            errors.add(error);
            all.add(error);
            if error.is_nan() || error > budget {
                failures.push(format!("{error:.3e} {row:?}"));
            }
        }
        assert!(count >= 30, "{}: {count} rows", quantity.name());
        println!("{:24} {errors} {unit}", quantity.name());
    }
    println!("{:24} {all} {unit}", "all");
    assert!(failures.is_empty(), "{} rows beyond {budget}:\n{}", failures.len(), failures.join("\n"));
}

#[test]
fn the_fast_path_is_within_its_budget() {
    within_budget("eps (1 + kappa)", FAST_BUDGET, |row, question| {
        let found = question.quantity.value(&question.law, question.first, question.second);
        let found = found.unwrap_or_else(|error| panic!("{row:?}: {error}"));
        relative_error(found, &row["value"]) / (f64::EPSILON * (1.0 + number(row, "kappa")))
    });
}

#[test]
fn the_reference_path_is_right_to_the_last_place() {
    within_budget("ulp", REFERENCE_BUDGET, |row, question| {
        let found = question.quantity.reference(&question.law, question.first, question.second);
        ulps(found.unwrap_or_else(|error| panic!("{row:?}: {error}")), &row["value"])
    });
}
