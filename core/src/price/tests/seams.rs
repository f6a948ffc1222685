//! Where one form of a value hands over to another, both are right and nothing jumps.

use super::std::vec::Vec;

use super::{DIRECTIONS, conditioning, exact, knock};
use crate::brownian::Form;
use crate::price::event::{Event, Levels};
use crate::price::hit;
use crate::price::setting::Setting;
use crate::price::{greeks, price};
use crate::terms::{Direction, Knock, Market, Payoff, TermSheet};

/// How far a value may be off near a barrier, whatever its conditioning.
const NEAR_BARRIER: f64 = 1e-13;

fn levels(sheet: &TermSheet) -> Levels {
    let direction = sheet.contract.direction().unwrap();
    Levels { direction, strike: sheet.strike, barrier: sheet.barrier }
}

/// The neighbouring numbers at which a property changes, found between one that has it and one that has not.
fn flip(mut with: f64, mut without: f64, has: impl Fn(f64) -> bool) -> (f64, f64) {
    assert!(has(with) && !has(without), "{with} {without}");
    loop {
        let middle = 0.5 * (with + without);
        if middle == with || middle == without {
            return (with, without);
        }
        if has(middle) {
            with = middle;
        } else {
            without = middle;
        }
    }
}

/// 64 doubles on either side of a positive number.
fn around(at: f64) -> impl Iterator<Item = f64> {
    (0..128_u64).map(move |step| f64::from_bits(at.to_bits() - 64 + step))
}

/// The value and its Greeks against the reference path at every neighbour of a seam.
fn walk(seam: f64, question: impl Fn(f64) -> (TermSheet, Market)) {
    for input in around(seam) {
        let (sheet, market) = question(input);
        let (found, exact) = (greeks(&sheet, &market).unwrap(), exact(&sheet, &market));
        assert_eq!(found.value.to_bits(), price(&sheet, &market).unwrap().to_bits());
        let kappa = conditioning(&sheet, &market, &exact);
        let error = (found.value - exact.value).abs() / exact.value;
        let allowed = (16.0 * f64::EPSILON * (1.0 + kappa)).min(NEAR_BARRIER);
        assert!(error <= allowed, "{error:e} beyond {allowed:e} at {input}: {sheet:?} {market:?}");
        for (found, exact) in found.to_array().into_iter().zip(exact.to_array()) {
            // Their own scale is no smaller than the value's conditioning makes it.
            let scale = exact.abs() * (1.0 + kappa);
            assert!((found - exact).abs() <= 64.0 * f64::EPSILON * scale, "{found} for {exact}: {sheet:?} {market:?}");
        }
    }
}

/// Knock-outs whose value cancels as the spot nears the barrier.
fn vanishing() -> Vec<(TermSheet, f64)> {
    let mut all = Vec::new();
    for direction in DIRECTIONS {
        let barrier = if direction == Direction::Up { 120.0 } else { 80.0 };
        for payoff in Payoff::ALL {
            let strike = if direction == Direction::Up { 60.0 } else { 150.0 };
            all.push((knock(direction, Knock::Out, payoff, 0.5).strike(strike).barrier(barrier), barrier));
        }
    }
    all
}

#[test]
fn a_difference_hands_over_to_an_integral_as_the_spot_nears_the_barrier() {
    for (sheet, barrier) in vanishing() {
        let market = |spot: f64| Market { spot, vol: 0.3, rate: 0.03, dividend: 0.01 };
        let crate::terms::Contract::Knock(_, _, payoff) = sheet.contract else { unreachable!() };
        let integrated = |spot: f64| {
            let setting = Setting::<f64>::new(&market(spot), sheet.expiry);
            levels(&sheet).claim(&setting, payoff, Event::Untouched).worth(&setting).integrated
        };
        let near = barrier * if barrier > 100.0 { 1.0 - 1e-9 } else { 1.0 + 1e-9 };
        let (with, _) = flip(near, 101.0, integrated);
        walk(with, |spot| (sheet, market(spot)));
    }
}

#[test]
fn a_strip_hands_over_to_an_integral_as_it_closes_or_as_the_volatility_falls() {
    let market = Market { spot: 100.0, vol: 0.3, rate: 0.03, dividend: 0.01 };
    let sheet = |strike: f64| knock(Direction::Up, Knock::Out, Payoff::Call, 0.5).strike(strike).barrier(120.0);
    let integrated = |strike: f64| {
        let setting = Setting::<f64>::new(&market, 0.5);
        levels(&sheet(strike)).claim(&setting, Payoff::Call, Event::Untouched).worth(&setting).integrated
    };
    let (with, _) = flip(119.9999, 60.0, integrated);
    walk(with, |strike| (sheet(strike), market));

    let vanilla = TermSheet::new(crate::terms::Contract::Vanilla(Payoff::Call), 0.25).strike(100.0);
    let market = |vol: f64| Market { spot: 100.0, vol, rate: 0.0, dividend: 0.0 };
    let cancelled = |vol: f64| {
        let setting = Setting::<f64>::new(&market(vol), 0.25);
        let levels = Levels { direction: Direction::Up, strike: 100.0, barrier: f64::NAN };
        levels.claim(&setting, Payoff::Call, Event::Always).plain.unwrap().closed(&setting).cancelled()
    };
    let (with, _) = flip(1e-3, 0.5, cancelled);
    walk(with, |vol| (vanilla, market(vol)));
}

#[test]
fn the_double_root_of_the_hit_is_crossed_smoothly() {
    let sheet = TermSheet::new(crate::terms::Contract::OneTouch(Direction::Up), 2.0)
        .barrier(103.0)
        .rebate(10.0, crate::terms::RebatePaid::Hit);
    // The carry makes the drift so small that a negative rate takes the root through nothing.
    let market = |rate: f64| Market { spot: 100.0, vol: 0.2, rate, dividend: rate - 0.021 };
    let integral = |rate: f64| {
        let setting = Setting::<f64>::new(&market(rate), 2.0);
        matches!(hit::passage(&setting, &levels(&sheet)).0.form, Form::Integral { .. })
    };
    let (with, _) = flip(-0.03, 0.1, integral);
    walk(with, |rate| (sheet, market(rate)));
    let mut last = f64::INFINITY;
    for step in 0..2000 {
        let market = market(-0.04 + 5e-5 * f64::from(step));
        let (found, exact) = (greeks(&sheet, &market).unwrap(), exact(&sheet, &market));
        assert!((found.value / exact.value - 1.0).abs() <= 1e-14);
        assert!(found.value < last, "a later payment is worth less at a higher rate");
        last = found.value;
    }
}

#[test]
fn a_deep_tail_beside_the_barrier_hands_over_to_the_reference() {
    let market = |spot: f64| Market { spot, vol: 0.1, rate: 0.02, dividend: 0.01 };
    for (strike, spot) in [(110.0, 119.999), (108.0, 119.9999), (112.0, 119.99)] {
        let sheet = knock(Direction::Up, Knock::Out, Payoff::CashPut, 1e-3).strike(strike).barrier(120.0);
        walk(spot, |spot| (sheet, market(spot)));
    }
    // From a value worth having into the tail.
    for days in 5..60 {
        let sheet = knock(Direction::Up, Knock::Out, Payoff::Put, 0.002 * f64::from(days)).strike(100.0).barrier(120.0);
        let market = market(119.99);
        let (found, exact) = (price(&sheet, &market).unwrap(), exact(&sheet, &market).value);
        assert!(found > 0.0 && (found / exact - 1.0).abs() <= NEAR_BARRIER, "{days}: {found:e} {exact:e}");
    }
}

#[test]
fn the_still_limit_is_met_from_above() {
    for payoff in Payoff::ALL {
        let sheet = knock(Direction::Up, Knock::Out, payoff, 1.0).strike(95.0).barrier(130.0);
        let value = |vol: f64| price(&sheet, &Market { spot: 100.0, vol, rate: 0.03, dividend: 0.01 }).unwrap();
        for input in around(crate::price::setting::STILL) {
            assert_eq!(value(input).to_bits(), value(0.0).to_bits(), "{payoff:?} {input:e}");
        }
        for vol in [1e-30, 1e-20, 1e-12, 1e-9, 1e-6] {
            assert!(
                (value(vol) / value(0.0).max(1e-300) - 1.0).abs() < 1e-14 || value(0.0) == 0.0,
                "{payoff:?} {vol:e}"
            );
        }
    }
}
