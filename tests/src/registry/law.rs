//! The law of Brownian motion, on random inputs, against the reference path.

use floodmark::brownian::{Law, Quantity};

use crate::registry::random::Random;
use crate::registry::{Entry, Measurement, Region, Sample, conditioning};

/// Magnitudes below this are not judged: their parts may be subnormal numbers.
const FLOOR: f64 = 1e-290;
const ROWS: usize = 1500;

const EVERYDAY: Region = Region {
    name: "everyday",
    domain: "drift -0.3 … 0.3, vol 5 … 100 %, horizon a day … 5 years, level 0.05 … 4 s, end within 3 s of its mean, \
             probabilities 0.001 … 0.999, s the deviation of the end",
};
const EXTREME: Region = Region {
    name: "extreme",
    domain: "drift 0 or up to 10 s / horizon, vol 1e-6 … 10, horizon 1e-8 … 100, level 1e-8 … 20 s, end within 8 s of \
             its mean or near 0, probabilities 1e-100 … 1 - 1e-14",
};
pub(super) const REGIONS: &[Region] = &[EVERYDAY, EXTREME];

pub(super) fn entries() -> Vec<Entry> {
    let entry = |quantity: Quantity| Entry {
        function: format!("Law::{}", quantity.name()),
        answer: "",
        regions: REGIONS,
        seams: seams(quantity),
    };
    Quantity::ALL.into_iter().map(entry).collect()
}

fn seams(quantity: Quantity) -> &'static [&'static str] {
    match quantity {
        Quantity::DiscountedFirstPassage => &["discounted::SEAM_ROOT"],
        Quantity::TerminalQuantile | Quantity::SampleTerminal => {
            &["quantile::CENTRE_HALF_WIDTH", "quantile::SHOULDER_END"]
        }
        Quantity::MaxCdf | Quantity::MinTail | Quantity::Survival | Quantity::JointMaxCdf | Quantity::JointMinCdf => {
            &["functions::CANCELLED", "maximum::SEAM", "bell::BESIDE"]
        }
        _ => &[],
    }
}

pub(super) fn measure(quantity: Quantity) -> Vec<Measurement> {
    let samples = |region: &Region| {
        let mut random = Random::named(&format!("{} {}", quantity.name(), region.name));
        (0..ROWS).filter_map(|_| sample(quantity, inputs(quantity, region, &mut random))).collect::<Vec<_>>()
    };
    let function = format!("Law::{}", quantity.name());
    REGIONS.iter().map(|region| Measurement::of(&function, "", region, &samples(region))).collect()
}

fn sample(quantity: Quantity, inputs: [f64; 5]) -> Option<Sample> {
    let [drift, vol, horizon, first, second] = inputs;
    let law = Law::new(drift, vol, horizon).ok()?;
    let line = || format!("{quantity:?} {inputs:?}");
    let exact = quantity.reference(&law, first, second).ok()?;
    let found = quantity.value(&law, first, second).unwrap_or_else(|error| panic!("{error}: {}", line()));
    if exact.abs() < FLOOR || exact.is_infinite() {
        assert!(found.abs() < 2.0 * FLOOR || found == exact, "{found:e} for {exact:e}: {}", line());
        return None;
    }
    Some(Sample::new(found, exact, conditioning::of_law(quantity, inputs)?, &line()))
}

fn inputs(quantity: Quantity, region: &Region, random: &mut Random) -> [f64; 5] {
    let everyday = *region == EVERYDAY;
    let (vol, horizon) = if everyday {
        (random.scale(0.05, 1.0), random.scale(1.0 / 365.0, 5.0))
    } else {
        (random.scale(1e-6, 10.0), random.scale(1e-8, 100.0))
    };
    let deviation = vol * horizon.sqrt();
    let drift = if everyday {
        random.between(-0.3, 0.3)
    } else if random.chance(0.15) {
        0.0
    } else {
        random.sign() * random.scale(1e-3, 10.0) * deviation / horizon
    };
    let mut argument = |name: &str| match (name, everyday) {
        ("level", true) => deviation * random.scale(0.05, 4.0) * random.sign(),
        ("level", false) => deviation * random.scale(1e-8, 20.0) * random.sign(),
        ("terminal", true) => drift * horizon + deviation * random.between(-3.0, 3.0),
        ("terminal", false) if random.chance(0.2) => deviation * random.scale(1e-8, 1.0) * random.sign(),
        ("terminal", false) => drift * horizon + deviation * random.between(-8.0, 8.0),
        ("time", true) => horizon * random.scale(0.1, 3.0),
        ("time", false) => horizon * random.scale(1e-3, 1e3),
        ("probability" | "uniform", true) => random.between(0.001, 0.999),
        ("probability" | "uniform", false) if random.chance(0.5) => 1.0 - random.scale(1e-14, 0.5),
        ("probability" | "uniform", false) => random.scale(1e-100, 0.5),
        ("discount_rate", true) => random.between(-0.1, 0.1),
        ("discount_rate", false) => random.sign() * random.scale(1e-3, 10.0) / horizon,
        ("other_drift", true) => random.between(-0.3, 0.3),
        ("other_drift", false) => random.sign() * random.scale(1e-3, 10.0) * deviation / horizon,
        _ => 0.0,
    };
    let names = quantity.arguments();
    let side = |place: usize, value: f64| match (names.get(place), quantity.name()) {
        (Some(&"level"), name) if name.contains("max") => value.abs(),
        (Some(&"level"), name) if name.contains("min_") => -value.abs(),
        _ => value,
    };
    let first = side(0, argument(names[0]));
    let second = side(1, argument(names.get(1).unwrap_or(&"")));
    [drift, vol, horizon, first, second]
}
