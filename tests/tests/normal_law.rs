//! The normal law against three sources: a table of 25 digits (`tests/reference/normal.py`), the crate statrs, and
//! lines of a published handbook.

mod common;
mod decimal;

use common::{Distribution, number, table};
use decimal::ulps;
use floodmark::special::{mills_ratio, normal_cdf, normal_log_tail, normal_pdf, normal_quantile, normal_tail};
use statrs::distribution::{ContinuousCDF, Normal};

/// A function of one number.
type Function = fn(f64) -> f64;

/// Every function, and how many units in the last place it may be off: what its page says, measured on more
/// arguments than the table has, rounded up.
const FUNCTIONS: [(&str, Function, f64); 6] = [
    ("normal_pdf", normal_pdf, 2.0),
    ("normal_cdf", normal_cdf, 7.0),
    ("normal_tail", normal_tail, 7.0),
    ("normal_log_tail", normal_log_tail, 8.0),
    ("normal_quantile", normal_quantile, 7.5),
    ("mills_ratio", mills_ratio, 6.0),
];

#[test]
fn every_function_is_within_its_units_in_the_last_place() {
    let rows = table("normal");
    let mut failures = Vec::new();
    for (name, function, budget) in FUNCTIONS {
        let mut errors = Distribution::default();
        let mut seen = 0;
        for row in rows.iter().filter(|row| row["function"] == name) {
            let argument = number(row, "argument");
            let found = function(argument);
            let error = ulps(found, &row["value"]);
            errors.add(error);
            seen += 1;
            if error.is_nan() || error > budget {
                failures.push(format!("{name}({argument:e}) = {found:e}, {} is right: {error:.3} ulp", row["value"]));
            }
        }
        assert!(seen > 400, "{name}: {seen} rows");
        println!("{name:16} {errors} ulp");
    }
    assert!(failures.is_empty(), "{} rows beyond their budget:\n{}", failures.len(), failures.join("\n"));
}

/// statrs is an implementation of its own, and the looser of the two: its distribution function is off by up to
/// 1e-10 relative (near -0.8), so this bound speaks of blunders only.
#[test]
fn an_independent_implementation_agrees_as_far_as_its_own_digits_go() {
    let normal = Normal::new(0.0, 1.0).unwrap();
    let mut worst = [0.0_f64; 3];
    for step in -800..=800 {
        let x = f64::from(step) / 100.0;
        worst[0] = worst[0].max((normal_cdf(x) / normal.cdf(x) - 1.0).abs());
        worst[1] = worst[1].max((normal_tail(x) / normal.sf(x) - 1.0).abs());
    }
    for step in 1..1000 {
        let p = f64::from(step) / 1000.0;
        worst[2] = worst[2].max((normal_quantile(p) - normal.inverse_cdf(p)).abs());
    }
    println!(
        "statrs is off by {:.2e} in its cdf, {:.2e} in its tail, {:.2e} in its quantile",
        worst[0], worst[1], worst[2]
    );
    assert!(worst.iter().all(|&worst| worst < 2e-10), "{worst:?}");
}

/// Abramowitz and Stegun, Handbook of Mathematical Functions, 1964, Table 26.1: `x`, `P(x)` and, in some lines,
/// `Z(x)`, to 15 decimals. From memory; each figure was confirmed in 50-digit arithmetic before it was put down.
const HANDBOOK: [(f64, f64, Option<f64>); 15] = [
    (0.0, 0.500000000000000, Some(0.398942280401433)),
    (0.1, 0.539827837277029, None),
    (0.2, 0.579259709439103, None),
    (0.3, 0.617911422188953, None),
    (0.4, 0.655421741610324, None),
    (0.5, 0.691462461274013, None),
    (0.7, 0.758036347776927, None),
    (0.9, 0.815939874653241, None),
    (1.0, 0.841344746068543, Some(0.241970724519143)),
    (1.2, 0.884930329778292, None),
    (1.5, 0.933192798731142, Some(0.129517595665892)),
    (1.96, 0.975002104851780, None),
    (2.0, 0.977249868051821, Some(0.053990966513188)),
    (2.5, 0.993790334674224, None),
    (3.0, 0.998650101968370, Some(0.004431848411938)),
];

#[test]
fn the_handbook_is_met_in_every_printed_digit() {
    // Half a unit of the fifteenth decimal, and one rounding of our own.
    const PRINTED: f64 = 0.5e-15 + f64::EPSILON / 2.0;
    for (x, below, density) in HANDBOOK {
        assert!((normal_cdf(x) - below).abs() <= PRINTED, "P({x}) = {below}, not {}", normal_cdf(x));
        assert!((normal_tail(-x) - below).abs() <= PRINTED, "{x}");
        if let Some(density) = density {
            assert!((normal_pdf(x) - density).abs() <= PRINTED, "Z({x}) = {density}, not {}", normal_pdf(x));
        }
    }
}
