//! The demo book: an invented desk that deals in options on river freight and water levels.
//!
//! Every contract, a week to three years, everyday volatilities, rates on both sides of zero, a few rows close to
//! their barrier and a few beyond it. Made by rule, so that the file in the repository need not be kept by hand.

use std::fmt::Write;

use floodmark::terms::{Contract, Direction, RebatePaid};

/// Rows for each contract.
const ROWS_EACH: u32 = 7;

/// An underlying of the desk; everything about it is invented.
struct Underlying {
    name: &'static str,
    /// Spot in units of its last decimal place, of which there are `places`.
    spot: u64,
    places: usize,
    /// In per mille.
    vol: i64,
    rate: &'static str,
    dividend: &'static str,
}

const UNDERLYINGS: [Underlying; 8] = [
    // Freight by barge, per tonne.
    Underlying { name: "BARGE", spot: 4250, places: 2, vol: 380, rate: "0.031", dividend: "0.012" },
    // Mean water level at a weir, in centimetres.
    Underlying { name: "WEIR", spot: 11840, places: 2, vol: 220, rate: "0.031", dividend: "0" },
    // Toll for a passage through a lock, in a currency with negative rates and a quiet price.
    Underlying { name: "LOCK", spot: 9850, places: 3, vol: 50, rate: "-0.0125", dividend: "-0.01" },
    // Gravel at the quay, per tonne.
    Underlying { name: "GRAVEL", spot: 2730, places: 2, vol: 310, rate: "0.031", dividend: "0.045" },
    // Index of ferry fares.
    Underlying { name: "FERRY", spot: 64000, places: 2, vol: 270, rate: "0.0275", dividend: "0.018" },
    // The upper river's currency in the lower river's.
    Underlying { name: "UPLOW", spot: 12345, places: 4, vol: 85, rate: "0.02", dividend: "0.035" },
    // Day rate of a dredger.
    Underlying { name: "DREDGE", spot: 187500, places: 2, vol: 450, rate: "0.0275", dividend: "0.06" },
    // Power from a sluice turbine, per megawatt hour.
    Underlying { name: "SLUICE", spot: 7360, places: 2, vol: 620, rate: "-0.005", dividend: "0" },
];

/// Years to expiry, from a week to three years.
const EXPIRIES: [&str; 10] = ["0.02", "0.04", "0.0833", "0.1667", "0.25", "0.5", "0.75", "1", "2", "3"];

/// The demo book, as CSV.
pub fn demo_book() -> String {
    let mut dice = Dice(2);
    let mut contracts: Vec<Contract> = (0..Contract::COUNT)
        .filter_map(|code| Contract::from_code(code).ok())
        .flat_map(|contract| (0..ROWS_EACH).map(move |_| contract))
        .collect();
    for last in (1..contracts.len()).rev() {
        contracts.swap(last, dice.up_to(last));
    }
    let mut book = "id,contract,spot,strike,barrier,rebate,rebate_paid,expiry,vol,rate,dividend\n".to_owned();
    for (number, contract) in contracts.into_iter().enumerate() {
        row(&mut book, number + 1, contract, &mut dice);
    }
    book
}

fn row(book: &mut String, number: usize, contract: Contract, dice: &mut Dice) {
    let Underlying { name, spot, places, vol, rate, dividend } = *dice.one_of(&UNDERLYINGS);
    let part = |per_mille: u64| decimal(spot * per_mille / 1000, places);
    let moved = |steps: i64| part(1000_u64.saturating_add_signed(steps));
    let strike = if contract.has_strike() {
        moved(vol * dice.one_of(&[-4, -3, -2, -1, 0, 1, 2, 3, 4]) / 10)
    } else {
        String::new()
    };
    let beyond = distance(vol, dice);
    let barrier = match contract.direction() {
        None => String::new(),
        Some(Direction::Up) => moved(beyond),
        Some(Direction::Down) => moved(-beyond),
    };
    let rebate = match contract {
        Contract::Vanilla(_) => String::new(),
        Contract::OneTouch(_) | Contract::NoTouch(_) => (*dice.one_of(&["1", "10", "25"])).to_owned(),
        Contract::Knock(..) if dice.below(2) == 0 => String::new(),
        Contract::Knock(..) => part(5 * (1 + dice.below(6))),
    };
    let rebate_paid = match dice.below(3) {
        0 if contract.pays_at_hit() => RebatePaid::Hit.to_string(),
        1 if contract.direction().is_some() => RebatePaid::Expiry.to_string(),
        _ => String::new(),
    };
    let expiry = dice.one_of(&EXPIRIES);
    let vol = decimal(vol.unsigned_abs() + 5 * dice.below(5), 3);
    let spot = decimal(spot, places);
    writeln!(
        book,
        "{name}-{number:03},{contract},{spot},{strike},{barrier},{rebate},{rebate_paid},{expiry},{vol},{rate},{dividend}"
    )
    .expect("a String takes whatever is written");
}

/// How far the barrier lies beyond the spot, in per mille: mostly some good part of a year's deviation, at times
/// close, now and then passed.
fn distance(vol: i64, dice: &mut Dice) -> i64 {
    match dice.below(40) {
        0 => -20,
        1..=4 => *dice.one_of(&[2, 3, 5, 8, 10]),
        _ => vol * dice.one_of(&[1, 2, 3, 4, 6, 8, 10]) / 10,
    }
}

/// A number of units of the last decimal place, written without idle zeros.
fn decimal(units: u64, places: usize) -> String {
    let digits = format!("{units:0>width$}", width = places + 1);
    let (whole, fraction) = digits.split_at(digits.len() - places);
    format!("{whole}.{fraction}").trim_end_matches('0').trim_end_matches('.').to_owned()
}

/// Always the same throws (splitmix64 of Steele, Lea and Flood, 2014).
struct Dice(u64);

impl Dice {
    fn below(&mut self, sides: u64) -> u64 {
        self.0 = self.0.wrapping_add(0x9E37_79B9_7F4A_7C15);
        let mut mixed = self.0;
        mixed = (mixed ^ (mixed >> 30)).wrapping_mul(0xBF58_476D_1CE4_E5B9);
        mixed = (mixed ^ (mixed >> 27)).wrapping_mul(0x94D0_49BB_1331_11EB);
        (mixed ^ (mixed >> 31)) % sides
    }

    fn up_to(&mut self, last: usize) -> usize {
        usize::try_from(self.below(last as u64 + 1)).expect("below a usize")
    }

    fn one_of<'t, T>(&mut self, things: &'t [T]) -> &'t T {
        &things[self.up_to(things.len() - 1)]
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_book_in_the_repository_is_what_the_rule_makes() {
        let kept = include_str!("../demo_book.csv");
        assert!(kept == demo_book(), "regenerate: cargo run -p floodmark-examples --bin demo_book");
    }

    #[test]
    fn decimals_have_no_idle_zeros() {
        for (units, places, text) in [(4250, 2, "42.5"), (7, 3, "0.007"), (12000, 2, "120"), (500, 3, "0.5")] {
            assert_eq!(decimal(units, places), text);
        }
    }

    #[test]
    fn the_book_holds_every_contract() {
        let book = demo_book();
        for contract in (0..Contract::COUNT).map(|code| Contract::from_code(code).unwrap()) {
            assert!(book.contains(&format!(",{contract},")), "{contract}");
        }
    }
}
