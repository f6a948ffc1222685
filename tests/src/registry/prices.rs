//! Prices, their bounds and their Greeks, on random contracts, against the reference path.

use std::time::Instant;

use floodmark::price::{Greeks, bounded_price, greeks, price, reference_greeks, reference_price};
use floodmark::terms::{Market, TermSheet};

use crate::registry::contracts::{REGIONS, contract};
use crate::registry::random::Random;
use crate::registry::{Entry, Measurement, Region, Sample, Spread, conditioning};

/// Values below this are not judged: their parts may be subnormal numbers.
const FLOOR: f64 = 1e-290;
const PRICES: usize = 4000;
const GREEKS: usize = 2000;

const SEAMS: &[&str] = &[
    "valuation::NEAR",
    "valuation::DEEP",
    "setting::STILL",
    "functions::CANCELLED",
    "discounted::SEAM_ROOT",
    "mills_slope::SEAM",
    "bell::BESIDE",
];

pub(super) fn entries() -> Vec<Entry> {
    let of = |function: &str, answer| Entry { function: function.to_owned(), answer, regions: REGIONS, seams: SEAMS };
    let mut entries = vec![of("price::price", "value"), of("price::bounded_price", "bound / error")];
    entries.extend(Greeks::NAMES[1..].iter().map(|name| Entry {
        seams: &["functions::DELICATE", "sensitivity::DEEP", "discounted::SEAM_ROOT", "mills_slope::SEAM"],
        ..of("price::greeks", name)
    }));
    entries
}

/// The error of one price, and how many times the bound exceeds it; none where it is not judged.
pub(super) fn sample(sheet: &TermSheet, market: &Market) -> Option<(Sample, f64)> {
    let line = || format!("{sheet:?} {market:?}");
    let exact = reference_price(sheet, market).ok()?;
    let found = price(sheet, market).unwrap_or_else(|error| panic!("{error}: {}", line()));
    if exact < FLOOR {
        assert!((0.0..=2.0 * FLOOR).contains(&found), "{found:e} for {exact:e}: {}", line());
        return None;
    }
    let bounded = bounded_price(sheet, market).unwrap_or_else(|error| panic!("{error}: {}", line()));
    assert_eq!(bounded.value.to_bits(), found.to_bits(), "{}", line());
    let sample = Sample::new(found, exact, conditioning::of_price(sheet, market)?, &line());
    assert!(sample.difference <= bounded.error_bound, "bound {:e}: {}", bounded.error_bound, sample.line);
    let tightness = bounded.error_bound / (sample.difference + sample.ulp);
    Some((sample, tightness))
}

pub(super) fn measure_prices(region: &'static Region) -> Vec<Measurement> {
    let mut random = Random::named(&format!("price {}", region.name));
    let (samples, tightness): (Vec<Sample>, Vec<f64>) = (0..PRICES)
        .filter_map(|_| {
            let (sheet, market) = contract(region, &mut random);
            sample(&sheet, &market)
        })
        .unzip();
    vec![
        Measurement::of("price::price", "value", region, &samples),
        Measurement::of_ratios("price::bounded_price", "bound / error", region, tightness),
    ]
}

/// How long the reference path takes for a price, in microseconds, on this machine now.
pub fn reference_times() -> Spread {
    let mut random = Random::named("times");
    let contracts = (0..700).map(|place| contract(&REGIONS[place % REGIONS.len()], &mut random));
    let time = |(sheet, market): (TermSheet, Market)| {
        let start = Instant::now();
        // What is beyond binary64 takes its time too.
        let _ = std::hint::black_box(reference_price(&sheet, &market));
        start.elapsed().as_secs_f64() * 1e6
    };
    Spread::of(contracts.map(time).collect())
}

pub(super) fn measure_greeks(region: &'static Region) -> Vec<Measurement> {
    let mut random = Random::named(&format!("greeks {}", region.name));
    let mut samples = vec![Vec::new(); Greeks::NAMES.len()];
    for _ in 0..GREEKS {
        let (sheet, market) = contract(region, &mut random);
        let Ok(exact) = reference_greeks(&sheet, &market) else { continue };
        let line = || format!("{sheet:?} {market:?}");
        let found = greeks(&sheet, &market).unwrap_or_else(|error| panic!("{error}: {}", line()));
        assert_eq!(price(&sheet, &market).map(f64::to_bits), Ok(found.value.to_bits()), "{}", line());
        let Some(scales) = conditioning::of_greeks(&sheet, &market) else { continue };
        for (index, samples) in samples.iter_mut().enumerate().skip(1) {
            let (found, exact) = (found.to_array()[index], exact.to_array()[index]);
            // What is infinite in both is told by its own rows.
            if scales[index] > FLOOR && exact.is_finite() {
                samples.push(Sample::new(found, exact, scales[index], &line()));
            }
        }
    }
    let named = Greeks::NAMES.into_iter().zip(samples).skip(1);
    named.map(|(name, samples)| Measurement::of("price::greeks", name, region, &samples)).collect()
}
