//! Where a contract stands against its barrier.
//!
//! The touch probability is a one-touch at rate 0 that pays 1 at expiry, so the reference path knows it, as long as
//! `rate - dividend` is exact; distance and gap are in the table of `tests/reference/elementary.py`.

use floodmark::price::barrier_profile;
use floodmark::terms::{Contract, Direction, Knock, Market, Payoff, RebatePaid, TermSheet};

use crate::registry::contracts::{BROAD, EVERYDAY, EXTREME, NEAR, contract};
use crate::registry::random::Random;
use crate::registry::table::table;
use crate::registry::{Entry, Measurement, Region, Sample, conditioning};

const REGIONS: &[Region] = &[EVERYDAY, BROAD, NEAR, EXTREME];
const TABLE: &[Region] = &[Region { name: "all", domain: "the rows of the table, over the whole domain" }];
const FLOOR: f64 = 1e-290;
const ROWS: usize = 1500;
const FUNCTION: &str = "price::barrier_profile";

pub(super) fn entries() -> Vec<Entry> {
    let of = |answer, regions| Entry { function: FUNCTION.to_owned(), answer, regions, seams: &["setting::STILL"] };
    vec![of("touch_probability", REGIONS), of("distance", TABLE), of("gap", TABLE)]
}

pub(super) fn measure() -> Vec<Measurement> {
    let touch = REGIONS.iter().map(|region| Measurement::of(FUNCTION, "touch_probability", region, &touches(region)));
    let rows = table("elementary");
    let profile = |sheet, market| barrier_profile(&sheet, &market).expect("valid inputs");
    let call = Contract::Knock(Direction::Up, Knock::Out, Payoff::Call);
    let of = |function: &'static str| rows.iter().filter(move |row| row.cell("function") == function);
    let distances = of("distance").map(|row| {
        let [barrier, spot, vol, expiry] = ["a", "b", "c", "d"].map(|column| row.number(column));
        let direction = if barrier > spot { Direction::Up } else { Direction::Down };
        let sheet = TermSheet::new(Contract::OneTouch(direction), expiry).barrier(barrier).rebate(1.0, RebatePaid::Hit);
        let found = profile(sheet, Market { spot, vol, rate: 0.0, dividend: 0.0 }).distance;
        Sample::of_decimal(found, row.cell("value"), &format!("{barrier:e} {spot:e} {vol:e} {expiry:e}"))
    });
    let distance = Measurement::of(FUNCTION, "distance", &TABLE[0], &distances.collect::<Vec<_>>());
    let gaps = of("gap").map(|row| {
        let [rebate, barrier, strike] = ["a", "b", "c"].map(|column| row.number(column));
        let sheet = TermSheet::new(call, 1.0).strike(strike).barrier(barrier).rebate(rebate, RebatePaid::Hit);
        let found = profile(sheet, Market { spot: 0.5 * barrier, vol: 0.2, rate: 0.0, dividend: 0.0 }).gap;
        let sample = Sample::of_decimal(found, row.cell("value"), &format!("{rebate:e} {barrier:e} {strike:e}"));
        sample.conditioned(row.number("value").abs() + rebate + barrier + strike)
    });
    let gap = Measurement::of(FUNCTION, "gap", &TABLE[0], &gaps.collect::<Vec<_>>());
    touch.chain([distance, gap]).collect()
}

fn touches(region: &Region) -> Vec<Sample> {
    let mut random = Random::named(&format!("profile {}", region.name));
    let rounded = |rate: f64| (rate * 1048576.0).round() / 1048576.0;
    (0..ROWS)
        .filter_map(|_| {
            let (sheet, market) = contract(region, &mut random);
            let direction = sheet.contract.direction()?;
            let market = Market { rate: rounded(market.rate), dividend: rounded(market.dividend), ..market };
            let carry = market.rate - market.dividend;
            let touch = TermSheet::new(Contract::OneTouch(direction), sheet.expiry)
                .barrier(sheet.barrier)
                .rebate(1.0, RebatePaid::Expiry);
            let plain = Market { rate: 0.0, dividend: -carry, ..market };
            let exact = floodmark::price::reference_price(&touch, &plain).ok()?;
            let line = format!("{sheet:?} {market:?}");
            let found = barrier_profile(&sheet, &market).unwrap_or_else(|error| panic!("{error}: {line}"));
            let scale = conditioning::of_price(&touch, &plain)?;
            (exact > FLOOR).then(|| Sample::new(found.touch_probability, exact, scale, &line))
        })
        .collect()
}
