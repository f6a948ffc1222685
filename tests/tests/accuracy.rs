//! Every public numeric function is as accurate as its budget says, and the published tables say how accurate.
//!
//! `FLOODMARK_BLESS=1` rewrites the tables and the picture; `FLOODMARK_BLESS=budgets` first rewrites the budgets, to a
//! quarter above what is measured and never above what is promised.

use std::collections::{BTreeMap, BTreeSet};
use std::fs;
use std::path::PathBuf;
use std::sync::LazyLock;

use floodmark_tests::registry::{
    Key, Measurement, budgets, entries, measure, named_constants, page, picture, promised, public_functions,
    readme_section, reference_times, rewritten,
};
use floodmark_tests::root;

static MEASURED: LazyLock<BTreeMap<Key, Measurement>> = LazyLock::new(measure);

/// Public functions that are not measured; a name that ends in `::` stands for all of a type or module.
const NOT_MEASURED: [(&str, &str); 20] = [
    ("batch::", "columns of measured functions, equal to them to the bit (tests/tests/parity.rs)"),
    ("Column::", "a view of memory"),
    ("ColumnMut::", "a view of memory"),
    ("Law::new", "keeps three numbers"),
    ("Law::drift", "a number that was given"),
    ("Law::vol", "a number that was given"),
    ("Law::horizon", "a number that was given"),
    ("Law::sample_terminal_max", "sample_terminal and sample_max in one call"),
    ("Quantity::value", "the methods of Law under one name"),
    ("Quantity::code", "a code"),
    ("Quantity::from_code", "a code"),
    ("Quantity::name", "a text"),
    ("Quantity::arguments", "texts"),
    ("Greeks::to_array", "the fields in order"),
    ("Market::", "keeps numbers, or refuses them"),
    ("TermSheet::", "keeps numbers, or refuses them"),
    ("Contract::", "codes and texts"),
    ("RebatePaid::", "codes and texts"),
    ("Payoff::", "texts"),
    ("Status::", "codes and texts"),
];

/// Constants that are no threshold between two formulas.
const NO_SEAM: [(&str, &str); 27] = [
    ("lane::SHIFT", "rounds to a whole number"),
    ("lane::BIAS", "of the exponent of binary64"),
    ("lane::CARRIER", "of the exponent of binary64"),
    ("bound::UNIT", "of the account of roundings"),
    ("bound::TAIL", "of the account of roundings"),
    ("bound::INTEGRAL", "of the account of roundings"),
    ("bound::STEEPEST", "of the account of roundings"),
    ("bound::UNDERFLOW", "of the account of roundings"),
    ("quantity::LARGEST", "edge of the domain"),
    ("law::SMALLEST", "edge of the domain"),
    ("term_sheet::MAX_EXPIRY", "edge of the domain"),
    ("market::MAX_VOL", "edge of the domain"),
    ("market::MAX_RATE", "edge of the domain"),
    ("mills::ROOT_TWO_PI", "a number of mathematics"),
    ("normal::INV_ROOT_TWO_PI", "a number of mathematics"),
    ("exponential::LN2_HIGH", "a number of mathematics"),
    ("exponential::LN2_LOW", "a number of mathematics"),
    ("logarithm::LN2_HIGH", "a number of mathematics"),
    ("logarithm::LN2_LOW", "a number of mathematics"),
    ("logarithm::TWO_54", "makes subnormal numbers normal"),
    ("extended::TWO_54", "makes subnormal numbers normal"),
    ("extended::DELICATE", "0: double-double has digits enough"),
    ("functions::NEGLIGIBLE", "where an integral ends"),
    ("extended::NEGLIGIBLE", "where an integral ends"),
    ("inverse::SHORTEST_STRIDE", "step of a search"),
    ("bell::WIDEST_PANEL", "step of an integral"),
    ("discounted::WIDEST_PANEL", "step of an integral"),
];

#[test]
fn every_public_numeric_function_is_in_the_registry() {
    let functions = public_functions(&root().join("core/src"), "floodmark");
    let measured: BTreeSet<String> = entries().into_iter().map(|entry| entry.function).collect();
    let excused = |function: &str| {
        let is = |name: &str| function == name || (name.ends_with("::") && function.starts_with(name));
        NOT_MEASURED.iter().any(|(name, _)| is(name))
    };
    let missing: Vec<&String> =
        functions.iter().filter(|function| !measured.contains(*function) && !excused(function)).collect();
    assert!(missing.is_empty(), "public, but not in the registry: {missing:#?}");
    let gone: Vec<&String> = measured.iter().filter(|function| !functions.contains(function)).collect();
    assert!(gone.is_empty(), "in the registry, but not public: {gone:#?}");
    let idle = |name: &str| {
        !functions.iter().any(|function| function == name || (name.ends_with("::") && function.starts_with(name)))
    };
    let excuses: Vec<&str> = NOT_MEASURED.iter().map(|(name, _)| *name).filter(|name| idle(name)).collect();
    assert!(excuses.is_empty(), "excused, but not there: {excuses:?}");
}

#[test]
fn every_threshold_is_a_seam_of_an_entry() {
    let constants: BTreeSet<String> = named_constants(&root().join("core/src")).into_iter().collect();
    let crossed: BTreeSet<String> =
        entries().iter().flat_map(|entry| entry.seams.iter().map(|seam| (*seam).to_owned())).collect();
    let excused: BTreeSet<String> = NO_SEAM.iter().map(|(name, _)| (*name).to_owned()).collect();
    let known: BTreeSet<String> = crossed.union(&excused).cloned().collect();
    let unknown: Vec<&String> = constants.difference(&known).collect();
    assert!(unknown.is_empty(), "constants that are neither a seam of an entry nor excused: {unknown:?}");
    let gone: Vec<&String> = known.difference(&constants).collect();
    assert!(gone.is_empty(), "seams and excuses that are not in the sources: {gone:?}");
}

#[test]
fn budgets_are_kept_and_close_and_the_published_tables_are_true() {
    let bless = std::env::var("FLOODMARK_BLESS").unwrap_or_default();
    if bless == "budgets" {
        fs::write(root().join("tests/src/registry/budgets.csv"), rewritten(&MEASURED)).unwrap();
        println!("budgets are rewritten: now FLOODMARK_BLESS=1");
        return;
    }
    let declared: BTreeSet<Key> = entries().iter().flat_map(|entry| entry.keys().collect::<Vec<_>>()).collect();
    assert_eq!(declared, MEASURED.keys().cloned().collect(), "what is declared, and what is measured");
    assert_eq!(declared, budgets().into_keys().collect(), "what is declared, and what has a budget");
    let failures: Vec<String> = MEASURED.iter().flat_map(|(key, measurement)| beyond(key, measurement)).collect();
    let stale: Vec<PathBuf> =
        published().into_iter().filter(|(path, text)| !said(path, text, &bless)).map(|it| it.0).collect();
    assert!(failures.is_empty(), "{} budgets are not kept or not close:\n{}", failures.len(), failures.join("\n"));
    assert!(stale.is_empty(), "not what is measured today, FLOODMARK_BLESS=1 rewrites them: {stale:?}");
}

#[test]
fn the_reference_path_typically_takes_less_than_a_millisecond() {
    let times = reference_times();
    let [median, most, worst] = [times.within(0.5), times.within(0.99), times.worst()];
    println!("reference price, microseconds: median {median:.0}, 99 % {most:.0}, max {worst:.0}");
    assert!(median < 1000.0, "{median}");
}

/// What is wrong with the budgets of one measurement.
fn beyond(key: &Key, measurement: &Measurement) -> Vec<String> {
    let (budget, promise) = (budgets()[key], promised(key));
    let units = [
        ("ulp", budget.ulp, promise.ulp, measurement.judged_ulp(), &measurement.worst[0]),
        (
            "conditioned units",
            budget.conditioned,
            promise.conditioned,
            measurement.judged_conditioned(),
            &measurement.worst[1],
        ),
    ];
    let mut failures = Vec::new();
    if measurement.ulp.rows() < 30 {
        failures.push(format!("{key:?} has {} rows only", measurement.ulp.rows()));
    }
    for (unit, budget, promise, found, worst) in units {
        let mut fail = |text: String| failures.push(format!("{key:?} {text} {unit}, measured {found:.3}: {worst}"));
        match (budget, promise) {
            (None, None) => {}
            (Some(budget), Some(promise)) => {
                if budget > promise {
                    fail(format!("budget {budget} above the promise of {promise}"));
                }
                // Budgets have two decimals.
                if budget > 2.0 * found + 0.01 {
                    fail(format!("more than twice too generous budget of {budget}"));
                }
                if found.is_nan() || found > budget {
                    fail(format!("beyond the budget of {budget}"));
                }
            }
            _ => fail("budget without promise, or promise without budget, in".to_owned()),
        }
    }
    failures
}

const BEGIN: &str = "<!-- accuracy: written by tests/tests/accuracy.rs -->\n";
const END: &str = "<!-- end of accuracy -->\n";

/// The files that this test writes, with what they should say.
fn published() -> Vec<(PathBuf, String)> {
    let readme = fs::read_to_string(root().join("README.md")).unwrap();
    let (before, rest) = readme.split_once(BEGIN).expect("the README has a place for the accuracy");
    let (_, after) = rest.split_once(END).expect("the README says where the accuracy ends");
    vec![
        (root().join("core/ACCURACY.md"), page(&MEASURED)),
        (root().join("core/accuracy.svg"), picture()),
        (root().join("README.md"), format!("{before}{BEGIN}{}{END}{after}", readme_section(&MEASURED))),
    ]
}

/// Whether a file says so; in report mode it is made to.
fn said(path: &PathBuf, text: &str, bless: &str) -> bool {
    if bless == "1" {
        fs::write(path, text).unwrap();
    }
    fs::read_to_string(path).is_ok_and(|found| found == text)
}
