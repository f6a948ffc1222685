//! The reference path, against the tables made by ball arithmetic and mpmath.

use floodmark::brownian::{Law, Quantity};
use floodmark::price::{Greeks, bounded_price, reference_greeks, reference_price};

use crate::registry::errors::difference_to_decimal;
use crate::registry::table::table;
use crate::registry::{Entry, Measurement, Region, Sample};

const PRICES: &[Region] = &[
    Region { name: "everyday", domain: "the rows of tests/reference/price_everyday.csv" },
    Region { name: "broad", domain: "the rows of tests/reference/price_broad.csv" },
    Region { name: "extreme", domain: "the rows of tests/reference/price_extreme.csv" },
];
const GREEKS: &[Region] = &[
    Region { name: "everyday and broad", domain: "the rows of tests/reference/greeks.csv" },
    Region { name: "extreme", domain: "the rows of tests/reference/greeks_extreme.csv" },
];
const LAW: &[Region] = &[Region { name: "everyday and extreme", domain: "the rows of tests/reference/law.csv" }];

pub(super) fn entries() -> Vec<Entry> {
    let of = |function: &str, answer, regions| Entry { function: function.to_owned(), answer, regions, seams: SEAMS };
    let mut entries = vec![of("price::reference_price", "value", PRICES)];
    entries.extend(Greeks::NAMES[1..].iter().map(|name| of("price::reference_greeks", name, GREEKS)));
    entries.extend(Quantity::ALL.map(|quantity| of("Quantity::reference", quantity.name(), LAW)));
    entries
}

const SEAMS: &[&str] = &["setting::STILL", "extended::CANCELLED", "discounted::SEAM_ROOT", "mills_slope::SEAM"];

pub(super) fn measure() -> Vec<Measurement> {
    let mut measured = Vec::new();
    for (region, file) in PRICES.iter().zip(["price_everyday", "price_broad", "price_extreme"]) {
        let samples = table(file).into_iter().map(|row| {
            let ((sheet, market), exact) = (row.contract(), row.cell("value"));
            let line = format!("{sheet:?} {market:?}");
            let bounded = bounded_price(&sheet, &market).unwrap_or_else(|error| panic!("{error}: {line}"));
            let error = difference_to_decimal(bounded.value, exact);
            assert!(error <= bounded.error_bound, "bound {:e}, error {error:e}: {line}", bounded.error_bound);
            let found = reference_price(&sheet, &market).unwrap_or_else(|error| panic!("{error}: {line}"));
            Sample::of_decimal(found, exact, &line)
        });
        let samples: Vec<_> = samples.collect();
        measured.push(Measurement::of("price::reference_price", "value", region, &samples));
    }
    for (region, file) in GREEKS.iter().zip(["greeks", "greeks_extreme"]) {
        let rows = table(file);
        for (place, name) in Greeks::NAMES.into_iter().enumerate().skip(1) {
            // Correct to the last place where the answer is a normal number.
            let normal = rows.iter().filter(|row| row.number(name) == 0.0 || row.number(name).is_normal());
            let samples = normal.map(|row| {
                let (sheet, market) = row.contract();
                let line = format!("{sheet:?} {market:?}");
                let found = reference_greeks(&sheet, &market).unwrap_or_else(|error| panic!("{error}: {line}"));
                Sample::of_decimal(found.to_array()[place], row.cell(name), &line)
            });
            measured.push(Measurement::of("price::reference_greeks", name, region, &samples.collect::<Vec<_>>()));
        }
    }
    let rows = table("law");
    for quantity in Quantity::ALL {
        let samples = rows.iter().filter(|row| row.cell("quantity") == quantity.name()).map(|row| {
            let [drift, vol, horizon, first, second] =
                ["drift", "vol", "horizon", "first", "second"].map(|column| row.number(column));
            let line = format!("{quantity:?} {drift:e} {vol:e} {horizon:e} {first:e} {second:e}");
            let found = Law::new(drift, vol, horizon).and_then(|law| quantity.reference(&law, first, second));
            Sample::of_decimal(found.unwrap_or_else(|error| panic!("{error}: {line}")), row.cell("value"), &line)
        });
        measured.push(Measurement::of("Quantity::reference", quantity.name(), &LAW[0], &samples.collect::<Vec<_>>()));
    }
    measured
}
