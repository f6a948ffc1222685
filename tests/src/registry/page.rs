//! The tables of errors, as text.

use std::collections::BTreeMap;
use std::fmt::Write;

use crate::registry::{Key, Measurement, Region, Spread, budgets, contracts, entries, law};

const INTRODUCTION: &str = "\
# Accuracy

Measured by `tests/tests/accuracy.rs`, which writes this page and fails if the page is not what it measures. Random
contracts and laws are the same on every machine, and so are the errors. Every answer is compared with the reference path
for the same binary inputs; special functions and the reference path itself are compared with tables of 25 digits and more
made by ball arithmetic and mpmath (`tests/reference`).

- **ulp**: error over the distance of the exact answer to the next binary64.
- **conditioned units**: error over `2^-52 (|V| + sum over the inputs of |x dV/dx|)`, what a rounding of the inputs alone
  could do to the answer `V`; the slopes by the reference path.
- **99.9 %**: the smallest error that 99.9 % of the rows do not exceed.
- **budget**: the test fails if the largest error is above it, or below half of it.

Answers of magnitude below 1e-290 are not judged by their digits, only required to be as small.
";

/// The page `core/ACCURACY.md`.
///
/// # Panics
///
/// If an entry of the registry was not measured.
pub fn page(measured: &BTreeMap<Key, Measurement>) -> String {
    let mut text = INTRODUCTION.to_owned();
    regions(&mut text, "Regions of contracts", contracts::REGIONS);
    regions(&mut text, "Regions of laws", law::REGIONS);
    let fast = |function: &str| matches!(function, "price::price" | "price::barrier_profile");
    let reference = |function: &str| function.contains("reference");
    let chapters: [Chapter; 5] = [
        ("Prices and barrier profile", &fast),
        ("Greeks", &|function| function == "price::greeks"),
        ("The law of Brownian motion", &|function| function.starts_with("Law::")),
        ("Special functions", &|function| function.starts_with("special::")),
        ("Reference path", &reference),
    ];
    for (title, belongs) in chapters {
        write!(text, "\n## {title}\n\n").expect(TAKES);
        text.push_str("| function | region | rows | max ulp | 99.9 % | budget | max conditioned | 99.9 % | budget |\n");
        text.push_str("|---|---|--:|--:|--:|--:|--:|--:|--:|\n");
        for entry in entries().iter().filter(|entry| belongs(&entry.function)) {
            for key in entry.keys() {
                row(&mut text, &key, &measured[&key]);
            }
        }
    }
    bounds(&mut text, measured);
    text
}

/// Title, and which functions belong there.
type Chapter<'a> = (&'a str, &'a dyn Fn(&str) -> bool);

const TAKES: &str = "a String takes it";

fn regions(text: &mut String, title: &str, regions: &[Region]) {
    write!(text, "\n## {title}\n\n| region | domain |\n|---|---|\n").expect(TAKES);
    for Region { name, domain } in regions {
        writeln!(text, "| {name} | {domain} |").expect(TAKES);
    }
}

fn row(text: &mut String, key: &Key, measurement: &Measurement) {
    let (function, answer, region) = key;
    let name = match answer.as_str() {
        "" | "value" => format!("`{function}`"),
        answer => format!("`{function}` `{answer}`"),
    };
    let budget = budgets().get(key).copied();
    let of = |spread: &Spread, budget: Option<f64>| {
        let budget = budget.map_or(String::new(), number);
        format!("{} | {} | {budget}", number(spread.worst()), number(spread.within(0.999)))
    };
    let ulp = of(&measurement.ulp, budget.and_then(|budget| budget.ulp));
    let conditioned = measurement
        .conditioned
        .as_ref()
        .map_or("| | ".to_owned(), |spread| of(spread, budget.and_then(|budget| budget.conditioned)));
    writeln!(text, "| {name} | {region} | {} | {ulp} | {conditioned} |", measurement.ulp.rows()).expect(TAKES);
}

fn bounds(text: &mut String, measured: &BTreeMap<Key, Measurement>) {
    text.push_str(
        "\n## Error bound\n\n`price::bounded_price`: the bound holds in every row of prices; how many times it \
                   exceeds the error and one ulp:\n\n| region | rows | median | 99.9 % |\n|---|--:|--:|--:|\n",
    );
    for (key, measurement) in contracts::REGIONS.iter().map(|region| bound(measured, region)) {
        let Spreads { rows, median, most } = Spreads::of(&measurement.ulp);
        writeln!(text, "| {} | {rows} | {median} | {most} |", key.2).expect(TAKES);
    }
}

fn bound<'a>(measured: &'a BTreeMap<Key, Measurement>, region: &Region) -> (&'a Key, &'a Measurement) {
    let key = ("price::bounded_price".to_owned(), "bound / error".to_owned(), region.name.to_owned());
    measured.get_key_value(&key).expect("every region has bounds")
}

struct Spreads {
    rows: usize,
    median: String,
    most: String,
}

impl Spreads {
    fn of(spread: &Spread) -> Spreads {
        Spreads { rows: spread.rows(), median: number(spread.within(0.5)), most: number(spread.within(0.999)) }
    }
}

/// The accuracy section of the README.
///
/// # Panics
///
/// If an entry of the registry was not measured.
pub fn readme_section(measured: &BTreeMap<Key, Measurement>) -> String {
    let mut text = "## Accuracy\n\nLargest errors, measured against the reference path (double-double, itself checked \
                    against ball\narithmetic); the tests write this section and `core/ACCURACY.md`, which has every \
                    function. In ulp, and in conditioned\nunits: multiples of what a rounding of the inputs alone \
                    could do.\n\n| region | price, ulp | price, conditioned | 99.9 % | Greeks, conditioned | bound / error, \
                    median |\n|---|--:|--:|--:|--:|--:|\n"
        .to_owned();
    for region in contracts::REGIONS {
        let find =
            |function: &str, answer: &str| &measured[&(function.to_owned(), answer.to_owned(), region.name.to_owned())];
        let price = find("price::price", "value");
        let conditioned = price.conditioned.as_ref().expect("prices have a conditioning");
        let greeks = entries()
            .iter()
            .filter(|entry| entry.function == "price::greeks")
            .map(|entry| find("price::greeks", entry.answer).judged_conditioned())
            .fold(0.0, f64::max);
        let (_, bound) = bound(measured, region);
        writeln!(
            text,
            "| {} | {} | {} | {} | {} | {} |",
            region.name,
            number(price.ulp.worst()),
            number(conditioned.worst()),
            number(conditioned.within(0.999)),
            number(greeks),
            number(bound.ulp.within(0.5)),
        )
        .expect(TAKES);
    }
    text.push_str("\n![The fast path's error over distance to the barrier and total volatility](core/accuracy.svg)\n");
    text
}

/// Three digits.
fn number(value: f64) -> String {
    if value == 0.0 {
        "0".to_owned()
    } else if !(1e-2..1e4).contains(&value) {
        format!("{value:.1e}")
    } else if value < 9.995 {
        format!("{value:.2}")
    } else if value < 99.95 {
        format!("{value:.1}")
    } else {
        format!("{value:.0}")
    }
}
