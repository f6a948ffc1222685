//! A million random contracts in one run: none is NaN or negative, none breaks the bounds of no-arbitrage, and no
//! pair is out of order. Fixed seed, two threads.

use floodmark::price::{bounded_price, greeks};
use floodmark::terms::{Contract, Direction, Knock, Market, Payoff, RebatePaid, TermSheet};

const CONTRACTS: u64 = 1_000_000;
const SEED: u64 = 0x9e37_79b9_7f4a_7c15;

/// Marsaglia's xorshift generator (2003).
struct Dice(u64);

impl Dice {
    #[allow(clippy::cast_precision_loss)]
    fn unit(&mut self) -> f64 {
        self.0 ^= self.0 << 13;
        self.0 ^= self.0 >> 7;
        self.0 ^= self.0 << 17;
        ((self.0 >> 11) as f64 + 0.5) / 9007199254740992.0
    }
    fn between(&mut self, low: f64, high: f64) -> f64 {
        low + (high - low) * self.unit()
    }
    fn log_between(&mut self, low: f64, high: f64) -> f64 {
        self.between(low.ln(), high.ln()).exp()
    }
    fn below(&mut self, count: u8) -> u8 {
        #[allow(clippy::cast_possible_truncation, clippy::cast_sign_loss)]
        let drawn = (self.unit() * f64::from(count)) as u8;
        drawn
    }
}

/// Log distances of strike and barrier, and the rest: everyday, broad, barrier near, strike near barrier, extreme.
fn draw(dice: &mut Dice) -> (TermSheet, Market) {
    let contract = Contract::from_code(dice.below(Contract::COUNT)).unwrap();
    let up = contract.direction() != Some(Direction::Down);
    let region = dice.below(5);
    let (spot, vol, expiry, yields) = match region {
        0 => (dice.log_between(1.0, 1e3), dice.between(0.05, 1.0), dice.log_between(1.0 / 365.0, 5.0), 0.1),
        4 => (dice.log_between(1e-12, 1e12), dice.log_between(1e-6, 10.0), dice.log_between(3e-8, 100.0), 1.0),
        _ => (dice.log_between(0.1, 1e4), dice.log_between(0.01, 2.0), dice.log_between(1.0 / 8760.0, 30.0), 0.2),
    };
    let deviation = vol * expiry.sqrt();
    let way = match region {
        0 => dice.log_between(1e-3, 0.5),
        2 => deviation * dice.log_between(1e-8, 1e-2),
        4 => dice.log_between(1e-12, 10.0),
        _ => dice.log_between(3e-4, 1.5),
    };
    let to_strike = match region {
        3 => way - dice.log_between(1e-14, 1e-2),
        4 => dice.between(-1.0, 1.0) * dice.log_between(1e-6, 10.0),
        _ => dice.between(-1.0, 1.0),
    };
    let side = if up { 1.0 } else { -1.0 };
    let sheet = TermSheet::new(contract, expiry)
        .strike(spot * (if region == 3 { side * to_strike } else { to_strike }).exp())
        .barrier(spot * (side * way).exp());
    let market = Market { spot, vol, rate: dice.between(-yields, yields), dividend: dice.between(-yields, yields) };
    (sheet, market)
}

/// What went wrong over some contracts, by kind, with an example of each.
#[derive(Default)]
struct Findings {
    contracts: u64,
    /// Pairs out of order by no more than what both values' error bounds allow.
    within_bounds: u64,
    wrong: Vec<(&'static str, String)>,
}

fn value(sheet: &TermSheet, market: &Market, findings: &mut Findings) -> (f64, f64) {
    let bounded = bounded_price(sheet, market).unwrap_or_else(|error| panic!("{sheet:?} {market:?}: {error}"));
    if bounded.value.is_nan() || bounded.value < 0.0 {
        findings.wrong.push(("NaN or negative", format!("{} {sheet:?} {market:?}", bounded.value)));
    }
    (bounded.value, bounded.error_bound)
}

/// Whether one value is at most another; rounding may blur values that exact arithmetic tells apart by less.
fn ordered(what: &'static str, low: (f64, f64), high: (f64, f64), findings: &mut Findings, case: &(TermSheet, Market)) {
    if low.0 > high.0 {
        if low.0 - high.0 > low.1 + high.1 {
            findings.wrong.push((what, format!("{low:?} above {high:?}: {case:?}")));
        } else {
            findings.within_bounds += 1;
        }
    }
}

fn examine(dice: &mut Dice, findings: &mut Findings) {
    let case = draw(dice);
    let (sheet, market) = case;
    findings.contracts += 1;
    let found = value(&sheet, &market, findings);
    let outwards = if sheet.contract.direction() == Some(Direction::Down) { -1.0 } else { 1.0 };
    let step = outwards * dice.log_between(1e-15, 0.1);
    let further = TermSheet { barrier: sheet.barrier * (1.0 + step), ..sheet };
    match sheet.contract {
        Contract::Vanilla(payoff) => {
            if payoff == Payoff::Call {
                let ceiling = (market.spot * (-market.dividend * sheet.expiry).exp() * (1.0 + 1e-14), 0.0);
                ordered("a call is at most the share", found, ceiling, findings, &case);
            }
        }
        Contract::Knock(_, knock, payoff) => {
            let vanilla = TermSheet { contract: Contract::Vanilla(payoff), rebate_paid: RebatePaid::Expiry, ..sheet };
            let vanilla = value(&vanilla, &market, findings);
            ordered("a knock is at most the vanilla", found, vanilla, findings, &case);
            let moved = value(&further, &market, findings);
            match knock {
                Knock::Out => ordered("a further barrier kills less", found, moved, findings, &case),
                Knock::In => ordered("a further barrier is touched less", moved, found, findings, &case),
            }
        }
        Contract::OneTouch(_) | Contract::NoTouch(_) => {
            let paid = [RebatePaid::Hit, RebatePaid::Expiry][usize::from(dice.below(2))];
            let paid = if sheet.contract.pays_at_hit() { paid } else { RebatePaid::Expiry };
            let (here, there) = (sheet.rebate(1.0, paid), further.rebate(1.0, paid));
            let (near, far) = (value(&here, &market, findings), value(&there, &market, findings));
            if market.rate >= 0.0 {
                ordered("a touch is at most its amount", near, (1.0 + 1e-15, 0.0), findings, &case);
            }
            match sheet.contract {
                Contract::OneTouch(_) if paid == RebatePaid::Expiry || market.rate >= 0.0 => {
                    ordered("a further barrier is touched less", far, near, findings, &case);
                }
                Contract::NoTouch(_) => ordered("a further barrier is missed more", near, far, findings, &case),
                _ => {}
            }
        }
    }
    // Every sixteenth with its Greeks, whose value must be the price's to the bit.
    if findings.contracts.is_multiple_of(16) {
        let risk = greeks(&sheet, &market).unwrap();
        if risk.value.to_bits() != found.0.to_bits() || risk.to_array().into_iter().any(f64::is_nan) {
            findings.wrong.push(("Greeks disagree or are NaN", format!("{risk:?} {sheet:?} {market:?}")));
        }
    }
}

#[test]
fn a_million_contracts_are_never_nan_negative_or_out_of_order() {
    let halves: Vec<Findings> = std::thread::scope(|scope| {
        let half = |seed: u64| {
            scope.spawn(move || {
                let (mut dice, mut findings) = (Dice(seed), Findings::default());
                for _ in 0..CONTRACTS / 2 {
                    examine(&mut dice, &mut findings);
                }
                findings
            })
        };
        let threads = [half(SEED), half(SEED.rotate_left(32))];
        threads.into_iter().map(|thread| thread.join().unwrap()).collect()
    });
    let contracts: u64 = halves.iter().map(|half| half.contracts).sum();
    let blurred: u64 = halves.iter().map(|half| half.within_bounds).sum();
    let wrong: Vec<_> = halves.iter().flat_map(|half| &half.wrong).collect();
    println!("{contracts} contracts, seed {SEED:#x}; {blurred} pairs told apart by less than their error bounds");
    assert_eq!(contracts, CONTRACTS);
    assert!(wrong.is_empty(), "{} wrong, the first of them {:#?}", wrong.len(), &wrong[..wrong.len().min(5)]);
}
