//! Every public numeric function of the core: where it is judged, the seams that it crosses, how far it is off.
//!
//! A function is judged against the reference path, and the reference path against tables made by ball arithmetic.
//! Contracts and laws are drawn at random, but the same ones on every machine, and all arithmetic has the same bits on
//! every machine: so have the errors.

mod budgets;
mod colour;
mod conditioning;
mod contracts;
mod errors;
mod law;
mod page;
mod picture;
mod prices;
mod profile;
mod random;
mod reference;
mod sources;
mod special;
mod table;

use std::collections::BTreeMap;
use std::sync::Mutex;
use std::sync::atomic::{AtomicUsize, Ordering};

use floodmark::brownian::Quantity;

pub use budgets::{Budget, budgets, promised, rewritten};
pub use errors::{Spread, difference, difference_to_decimal, ulp};
pub use page::{page, readme_section};
pub use picture::picture;
pub use prices::reference_times;
pub use sources::{named_constants, public_functions};

/// A part of the domain of a function.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Region {
    /// Its name in tables.
    pub name: &'static str,
    /// What lies in it.
    pub domain: &'static str,
}

/// A public numeric function, or one of the numbers that it answers with.
#[derive(Clone, Debug)]
pub struct Entry {
    /// The function by the end of its path: `price::greeks`, `Law::max_cdf`.
    pub function: String,
    /// Which of its numbers; empty if it has one only.
    pub answer: &'static str,
    /// Where it is judged.
    pub regions: &'static [Region],
    /// The thresholds between formulas that its regions cross, each by its file and its name.
    pub seams: &'static [&'static str],
}

/// The registry.
pub fn entries() -> Vec<Entry> {
    [special::entries(), law::entries(), prices::entries(), profile::entries(), reference::entries()].concat()
}

/// Function, answer and region.
pub type Key = (String, String, String);

impl Entry {
    /// The keys of its measurements.
    pub fn keys(&self) -> impl Iterator<Item = Key> {
        self.regions.iter().map(|region| (self.function.clone(), self.answer.to_owned(), region.name.to_owned()))
    }
}

/// One answer against the exact one.
#[derive(Clone, Debug)]
pub(crate) struct Sample {
    /// Magnitude of the difference.
    difference: f64,
    /// The unit in the last place of the exact answer.
    ulp: f64,
    /// What the inputs' own roundings could make of it, if known: the answer, and inputs times slopes, in magnitude.
    scale: Option<f64>,
    /// The inputs, to be copied from a failure.
    line: String,
}

impl Sample {
    fn new(found: f64, exact: f64, scale: f64, line: &str) -> Sample {
        let line = format!("{found:e} for {exact:e}: {line}");
        Sample { difference: difference(found, exact), ulp: ulp(exact), scale: Some(scale), line }
    }

    fn of_decimal(found: f64, exact: &str, line: &str) -> Sample {
        let ulp = ulp(exact.parse().unwrap_or(f64::NAN));
        let line = format!("{found:e} for {exact}: {line}");
        Sample { difference: difference_to_decimal(found, exact), ulp, scale: None, line }
    }

    fn conditioned(self, scale: f64) -> Sample {
        Sample { scale: Some(scale), ..self }
    }

    fn in_ulp(&self) -> f64 {
        if self.difference == 0.0 { 0.0 } else { self.difference / self.ulp }
    }

    fn in_conditioned_units(&self) -> f64 {
        self.scale
            .map_or(0.0, |scale| if self.difference == 0.0 { 0.0 } else { self.difference / scale / f64::EPSILON })
    }
}

/// How far a function is off in a region.
#[derive(Clone, Debug)]
pub struct Measurement {
    /// What was measured, and where.
    pub key: Key,
    /// In units of the last place of the answer; for a bound, how many times it exceeds error and one ulp.
    pub ulp: Spread,
    /// In units of 2^-52 of the answer and its inputs' shares, if they are known.
    pub conditioned: Option<Spread>,
    /// The rows that are worst off, in either unit.
    pub worst: [String; 2],
}

impl Measurement {
    fn of(function: &str, answer: &str, region: &Region, samples: &[Sample]) -> Measurement {
        let known = samples.iter().all(|sample| sample.scale.is_some());
        let worst = |unit: fn(&Sample) -> f64| {
            let sample = samples.iter().max_by(|a, b| unit(a).total_cmp(&unit(b)));
            sample.map_or(String::new(), |sample| sample.line.clone())
        };
        Measurement {
            key: (function.to_owned(), answer.to_owned(), region.name.to_owned()),
            worst: [worst(Sample::in_ulp), worst(Sample::in_conditioned_units)],
            ulp: Spread::of(samples.iter().map(Sample::in_ulp).collect()),
            conditioned: known.then(|| Spread::of(samples.iter().map(Sample::in_conditioned_units).collect())),
        }
    }

    fn of_ratios(function: &str, answer: &str, region: &Region, ratios: Vec<f64>) -> Measurement {
        let key = (function.to_owned(), answer.to_owned(), region.name.to_owned());
        Measurement { key, ulp: Spread::of(ratios), conditioned: None, worst: [String::new(), String::new()] }
    }
}

/// Measures every entry in every region.
///
/// # Panics
///
/// If an answer is refused or out of its bound.
pub fn measure() -> BTreeMap<Key, Measurement> {
    type Job = Box<dyn Fn() -> Vec<Measurement> + Sync + Send>;
    let mut jobs: Vec<Job> = Vec::new();
    for region in contracts::REGIONS {
        jobs.push(Box::new(|| prices::measure_greeks(region)));
        jobs.push(Box::new(|| prices::measure_prices(region)));
    }
    for quantity in Quantity::ALL {
        jobs.push(Box::new(move || law::measure(quantity)));
    }
    jobs.extend([Box::new(special::measure) as Job, Box::new(reference::measure), Box::new(profile::measure)]);
    let (next, measured) = (AtomicUsize::new(0), Mutex::new(BTreeMap::new()));
    let work = || {
        while let Some(job) = jobs.get(next.fetch_add(1, Ordering::Relaxed)) {
            let found = job();
            let mut measured = measured.lock().expect("no worker has panicked");
            measured.extend(found.into_iter().map(|measurement| (measurement.key.clone(), measurement)));
        }
    };
    let workers = std::thread::available_parallelism().map_or(1, std::num::NonZero::get);
    std::thread::scope(|scope| {
        for _ in 0..workers {
            scope.spawn(work);
        }
    });
    measured.into_inner().expect("no worker has panicked")
}
