//! How far off each function may be in each region: what is promised, and the closer budgets of `budgets.csv`.

use std::collections::BTreeMap;
use std::fmt::Write;

use crate::registry::{Key, Measurement, entries};

/// The largest error in each unit that is judged.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Budget {
    /// In units of the last place; for a bound, its median ratio to error and one ulp.
    pub ulp: Option<f64>,
    /// In conditioned units.
    pub conditioned: Option<f64>,
}

/// What is promised of a function in a region.
///
/// # Panics
///
/// If the function is not in the registry.
pub fn promised((function, answer, region): &Key) -> Budget {
    /// A relative error of 1e-13: a unit of the last place is at most 2^-52 of the answer.
    const CLOSE: f64 = 1e-13 / f64::EPSILON;
    let units = |ulp, conditioned| Budget { ulp, conditioned };
    let near = region.contains("near barrier");
    match (function.as_str(), answer.as_str()) {
        ("price::reference_price" | "price::reference_greeks" | "Quantity::reference", _) => units(Some(1.0), None),
        ("price::bounded_price", _) => units(Some(100.0), None),
        ("price::greeks", _) => units(None, Some(64.0)),
        ("price::barrier_profile", "distance") => units(Some(8.0), None),
        ("price::price" | "price::barrier_profile", _) => units(near.then_some(CLOSE), Some(16.0)),
        (function, _) if function.starts_with("Law::") => units(None, Some(16.0)),
        (function, _) if function.starts_with("special::") => units(Some(8.0), None),
        _ => panic!("nothing is promised of {function}"),
    }
}

/// The budgets of `budgets.csv`.
///
/// # Panics
///
/// If the file is not as [`rewritten`] writes it.
pub fn budgets() -> BTreeMap<Key, Budget> {
    let cell = |text: &str| (!text.is_empty()).then(|| text.parse().expect("a number"));
    let row = |line: &str| {
        let cells: Vec<&str> = line.split(',').collect();
        let [function, answer, region, ulp, conditioned] = cells[..] else { panic!("{line}") };
        let key = [function, answer, region].map(str::to_owned);
        (key.into(), Budget { ulp: cell(ulp), conditioned: cell(conditioned) })
    };
    include_str!("budgets.csv").lines().skip(1).map(row).collect()
}

impl Measurement {
    /// What the budget in units of the last place is held against.
    pub fn judged_ulp(&self) -> f64 {
        if self.key.0 == "price::bounded_price" { self.ulp.within(0.5) } else { self.ulp.worst() }
    }

    /// What the budget in conditioned units is held against.
    pub fn judged_conditioned(&self) -> f64 {
        self.conditioned.as_ref().map_or(f64::INFINITY, super::Spread::worst)
    }
}

/// The text of `budgets.csv` with a quarter more than what was measured, but never more than what is promised.
pub fn rewritten(measured: &BTreeMap<Key, Measurement>) -> String {
    let mut text = "function,answer,region,ulp,conditioned\n".to_owned();
    for key in entries().iter().flat_map(|entry| entry.keys().collect::<Vec<_>>()) {
        let Some(measurement) = measured.get(&key) else { continue };
        let promise = promised(&key);
        let cell = |promise: Option<f64>, found: f64| {
            promise.map_or(String::new(), |promise| format!("{:.2}", (1.25 * found).min(promise.floor())))
        };
        let ulp = cell(promise.ulp, measurement.judged_ulp());
        let conditioned = cell(promise.conditioned, measurement.judged_conditioned());
        let (function, answer, region) = &key;
        writeln!(text, "{function},{answer},{region},{ulp},{conditioned}").expect("a String takes it");
    }
    text
}
