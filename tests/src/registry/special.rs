//! Special functions, against the tables of `tests/reference/elementary.py` and `tests/reference/normal.py`.

use floodmark::special;

use crate::registry::table::table;
use crate::registry::{Entry, Measurement, Region, Sample};

const ONE: Region = Region { name: "all", domain: "the rows of the table, over the whole domain" };
const BELOW: Region = Region { name: "below 0", domain: "negative arguments of the table" };
const ABOVE: Region = Region { name: "from 0", domain: "the other arguments of the table" };
const WHOLE: &[Region] = &[ONE];
const HALVES: &[Region] = &[BELOW, ABOVE];

/// Name, function, table, name of the argument's column, regions.
type Function = (&'static str, fn(f64) -> f64, &'static str, &'static str, &'static [Region]);

/// Of one argument.
const FUNCTIONS: [Function; 10] = [
    ("exp", special::exp, "elementary", "a", WHOLE),
    ("expm1", special::expm1, "elementary", "a", WHOLE),
    ("ln", special::ln, "elementary", "a", WHOLE),
    ("log1p", special::log1p, "elementary", "a", WHOLE),
    ("mills_ratio", special::mills_ratio, "normal", "argument", HALVES),
    ("normal_pdf", special::normal_pdf, "normal", "argument", WHOLE),
    ("normal_cdf", special::normal_cdf, "normal", "argument", HALVES),
    ("normal_tail", special::normal_tail, "normal", "argument", HALVES),
    ("normal_log_tail", special::normal_log_tail, "normal", "argument", HALVES),
    ("normal_quantile", special::normal_quantile, "normal", "argument", WHOLE),
];

pub(super) fn entries() -> Vec<Entry> {
    let of = |name: &str, regions| Entry {
        function: format!("special::{name}"),
        answer: "",
        regions,
        seams: if name == "normal_quantile" { &["quantile::CENTRE_HALF_WIDTH", "quantile::SHOULDER_END"] } else { &[] },
    };
    let mut entries: Vec<Entry> = FUNCTIONS.iter().map(|(name, _, _, _, regions)| of(name, regions)).collect();
    entries.push(of("ln_ratio", WHOLE));
    entries
}

pub(super) fn measure() -> Vec<Measurement> {
    let mut measured = Vec::new();
    for (name, function, file, column, regions) in FUNCTIONS {
        let rows = table(file);
        for region in regions {
            let wanted = |argument: f64| match *region {
                BELOW => argument < 0.0,
                ABOVE => argument >= 0.0,
                _ => true,
            };
            let samples = rows.iter().filter(|row| row.cell("function") == name && wanted(row.number(column)));
            let samples = samples.map(|row| {
                let argument = row.number(column);
                Sample::of_decimal(function(argument), row.cell("value"), &format!("{name}({argument:e})"))
            });
            measured.push(Measurement::of(&format!("special::{name}"), "", region, &samples.collect::<Vec<_>>()));
        }
    }
    let samples = table("elementary").into_iter().filter(|row| row.cell("function") == "ln_ratio").map(|row| {
        let (a, b) = (row.number("a"), row.number("b"));
        Sample::of_decimal(special::ln_ratio(a, b), row.cell("value"), &format!("ln_ratio({a:e}, {b:e})"))
    });
    let samples: Vec<_> = samples.collect();
    measured.push(Measurement::of("special::ln_ratio", "", &ONE, &samples));
    measured
}
