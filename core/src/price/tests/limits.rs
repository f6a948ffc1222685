//! Rows of the table of limits: touched, expired, still, and the far ends of the domain.

use super::{DIRECTIONS, NATURAL, exact, knock};
use crate::error::Status;
use crate::price::{greeks, price};
use crate::terms::{Contract, Direction, Knock, Market, Payoff, RebatePaid, TermSheet};

const MARKET: Market = Market { spot: 100.0, vol: 0.25, rate: 0.04, dividend: 0.01 };

fn value(sheet: &TermSheet, market: &Market) -> f64 {
    let value = price(sheet, market).unwrap();
    assert_eq!(value.to_bits(), greeks(sheet, market).unwrap().value.to_bits());
    value
}

#[test]
fn a_barrier_at_or_behind_the_spot_is_touched() {
    for direction in DIRECTIONS {
        for behind in [0.0, 1e-9, 7.0] {
            let barrier = if direction == Direction::Up { 100.0 - behind } else { 100.0 + behind };
            for payoff in Payoff::ALL {
                let vanilla = TermSheet::new(Contract::Vanilla(payoff), 0.5).strike(97.0);
                let alive = knock(direction, Knock::In, payoff, 0.5).strike(97.0).barrier(barrier).rebate(3.0, NATURAL);
                assert_eq!(value(&alive, &MARKET).to_bits(), value(&vanilla, &MARKET).to_bits());
                let dead = knock(direction, Knock::Out, payoff, 0.5).strike(97.0).barrier(barrier);
                assert_eq!(value(&dead, &MARKET), 0.0);
                assert_eq!(value(&dead.rebate(3.0, RebatePaid::Hit), &MARKET), 3.0);
                let later = value(&dead.rebate(3.0, RebatePaid::Expiry), &MARKET);
                assert!((later / (3.0 * libm::exp(-0.02)) - 1.0).abs() < 4.0 * f64::EPSILON);
            }
            let touch = TermSheet::new(Contract::OneTouch(direction), 0.5).barrier(barrier);
            assert_eq!(value(&touch.rebate(5.0, RebatePaid::Hit), &MARKET), 5.0);
            let never = TermSheet::new(Contract::NoTouch(direction), 0.5).barrier(barrier).rebate(5.0, NATURAL);
            assert_eq!(value(&never, &MARKET), 0.0);
        }
    }
}

#[test]
fn at_expiry_a_contract_is_worth_what_it_pays() {
    for (spot, paid) in [
        (110.0, [10.0, 0.0, 1.0, 0.0, 110.0, 0.0, 1.0, 110.0]),
        (90.0, [0.0, 10.0, 0.0, 1.0, 0.0, 90.0, 1.0, 90.0]),
        (100.0, [0.0, 0.0, 0.5, 0.5, 50.0, 50.0, 1.0, 100.0]),
    ] {
        let market = Market { spot, ..MARKET };
        for (payoff, paid) in Payoff::ALL.into_iter().zip(paid) {
            let out = knock(Direction::Up, Knock::Out, payoff, 0.0).strike(100.0).barrier(150.0);
            assert_eq!(value(&out, &market), paid, "{payoff:?} at {spot}");
            let never = knock(Direction::Up, Knock::In, payoff, 0.0).strike(100.0).barrier(150.0).rebate(2.0, NATURAL);
            assert_eq!(value(&never, &market), 2.0);
        }
    }
}

#[test]
fn without_volatility_the_spot_runs_along_its_forward() {
    let still = Market { vol: 0.0, ..MARKET };
    let forward = 100.0 * libm::exp(0.03);
    let discount = libm::exp(-0.04);
    let call = |barrier: f64| knock(Direction::Up, Knock::Out, Payoff::Call, 1.0).strike(95.0).barrier(barrier);
    assert!((value(&call(110.0), &still) / (discount * (forward - 95.0)) - 1.0).abs() < 1e-14);
    assert_eq!(value(&call(102.0), &still), 0.0);
    // Touched after ln(1.02) / 0.03 years.
    let rebate = greeks(&call(102.0).rebate(7.0, RebatePaid::Hit), &still).unwrap();
    let when = libm::log(1.02) / 0.03;
    assert!((rebate.value / (7.0 * libm::exp(-0.04 * when)) - 1.0).abs() < 1e-14);
    assert!((rebate.delta / (rebate.value * 0.04 / 0.03 / 100.0) - 1.0).abs() < 1e-14);
    assert_eq!((rebate.theta, rebate.vega), (0.0, 0.0));
    // Not within a shorter life.
    let short = TermSheet { expiry: 0.9 * when, ..call(102.0).rebate(7.0, RebatePaid::Hit) };
    assert!(value(&short, &still) > 0.0);
    assert_eq!(greeks(&TermSheet { contract: Contract::OneTouch(Direction::Up), ..short }, &still).unwrap().value, 0.0);
}

#[test]
fn a_strike_beyond_the_barrier_leaves_a_knock_out_nothing() {
    for strike in [120.0, 120.0 + 1e-12, 150.0] {
        for payoff in [Payoff::Call, Payoff::CashCall, Payoff::AssetCall] {
            let out = knock(Direction::Up, Knock::Out, payoff, 0.5).strike(strike).barrier(120.0);
            assert_eq!(value(&out, &MARKET), 0.0);
            let vanilla = TermSheet::new(Contract::Vanilla(payoff), 0.5).strike(strike);
            let sum = value(&knock(Direction::Up, Knock::In, payoff, 0.5).strike(strike).barrier(120.0), &MARKET);
            assert_eq!(sum.to_bits(), value(&vanilla, &MARKET).to_bits());
        }
    }
}

#[test]
fn a_value_stays_positive_until_it_underflows() {
    let mut last = f64::INFINITY;
    let mut underflows = 0;
    for step in 0..400 {
        let sheet = TermSheet::new(Contract::OneTouch(Direction::Up), 0.1)
            .barrier(100.0 * libm::exp(0.1 + 0.01 * f64::from(step)))
            .rebate(1.0, RebatePaid::Hit);
        let market = Market { vol: 0.2, ..MARKET };
        let found = value(&sheet, &market);
        assert!(found >= 0.0 && (found < last || found == 0.0), "{step}: {found:e} after {last:e}");
        assert_eq!(found == 0.0, exact(&sheet, &market).value == 0.0, "{step}: {found:e}");
        underflows += i32::from(found == 0.0);
        last = found;
    }
    assert!(underflows > 10);
}

#[test]
fn the_far_ends_of_the_domain_have_an_answer_or_a_status() {
    let beyond = Market { rate: -1000.0, dividend: -1000.0, ..MARKET };
    let sheet = TermSheet::new(Contract::Vanilla(Payoff::Cash), 10000.0);
    assert_eq!(price(&sheet, &beyond).unwrap_err().status, Status::Overflow);
    for vol in [0.0, 1e-300, 1e-6, 10.0, 1000.0] {
        for expiry in [0.0, 1e-300, 3e-8, 100.0, 10000.0] {
            for (rate, dividend) in [(0.0, 0.0), (1.0, -1.0), (-1.0, 1.0), (1000.0, 1000.0)] {
                for spot in [1e-300, 1e-12, 100.0, 1e12, 1e300] {
                    let market = Market { spot, vol, rate, dividend };
                    for code in 0..Contract::COUNT {
                        let contract = Contract::from_code(code).unwrap();
                        let sheet = TermSheet::new(contract, expiry).strike(spot).barrier(spot * 1.25);
                        let sheet = TermSheet { rebate: 1.0, ..sheet };
                        match greeks(&sheet, &market) {
                            Ok(greeks) => assert!(greeks.value >= 0.0, "{sheet:?} {market:?}"),
                            Err(error) => assert_eq!(error.status, Status::Overflow, "{sheet:?} {market:?}"),
                        }
                    }
                }
            }
        }
    }
}
