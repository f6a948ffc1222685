//! Random contracts for properties: everyday, broad and extreme ones in equal parts.
#![allow(dead_code)]

use std::fmt;

use floodmark::price::{Greeks, greeks, price};
use floodmark::terms::{Contract, Direction, Knock, Market, Payoff, RebatePaid, TermSheet};
use quickcheck::{Arbitrary, Gen, QuickCheck, Testable};

/// How many contracts each property is tried on.
const CASES: u64 = 30_000;

/// What each run starts from, so that a failure is seen again.
const SEED: u64 = 20240229;

/// Tries a property on random contracts.
pub(crate) fn holds(property: impl Testable) {
    QuickCheck::new().rng(Gen::from_size_and_seed(100, SEED)).tests(CASES).max_tests(20 * CASES).quickcheck(property);
}

/// How far from ordinary a case is.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) enum Domain {
    Everyday,
    Broad,
    Extreme,
}

/// One contract with its market; strike and barrier are always set, whatever the contract.
#[derive(Clone, Copy)]
pub(crate) struct Case {
    pub(crate) domain: Domain,
    pub(crate) sheet: TermSheet,
    pub(crate) market: Market,
}

impl fmt::Debug for Case {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        let Case { domain, sheet, market } = self;
        write!(f, "{domain:?} {} {:?} {:?}", sheet.contract, sheet, market)
    }
}

struct Dice<'a>(&'a mut Gen);

impl Dice<'_> {
    fn unit(&mut self) -> f64 {
        #[allow(clippy::cast_precision_loss)]
        let bits = (u64::arbitrary(self.0) >> 11) as f64;
        bits / 9007199254740992.0
    }

    fn between(&mut self, low: f64, high: f64) -> f64 {
        low + (high - low) * self.unit()
    }

    fn log_between(&mut self, low: f64, high: f64) -> f64 {
        (low.ln() + (high / low).ln() * self.unit()).exp()
    }

    fn below(&mut self, count: u8) -> u8 {
        u8::arbitrary(self.0) % count
    }
}

fn everyday(dice: &mut Dice, sign: f64) -> (TermSheet, Market) {
    let spot = dice.between(50.0, 200.0);
    let sheet = TermSheet::new(Contract::Vanilla(Payoff::Call), dice.log_between(1.0 / 365.0, 5.0))
        .strike(spot * dice.between(0.6, 1.5))
        .barrier(spot * (1.0 + sign * dice.log_between(0.001, 0.5)));
    let market = Market {
        spot,
        vol: dice.log_between(0.05, 1.0),
        rate: dice.between(-0.01, 0.1),
        dividend: dice.between(0.0, 0.08),
    };
    (sheet, market)
}

fn broad(dice: &mut Dice, sign: f64) -> (TermSheet, Market) {
    let spot = dice.log_between(1.0, 1e4);
    let (vol, expiry) = (dice.log_between(0.01, 2.0), dice.log_between(1.0 / 8760.0, 30.0));
    let spread = (vol * expiry.sqrt()).clamp(0.05, 1.5) * dice.between(-2.0, 2.0);
    let sheet = TermSheet::new(Contract::Vanilla(Payoff::Call), expiry)
        .strike(spot * spread.exp())
        .barrier(spot * (sign * dice.log_between(0.001, 1.5)).exp());
    (sheet, Market { spot, vol, rate: dice.between(-0.2, 0.2), dividend: dice.between(-0.2, 0.2) })
}

fn extreme(dice: &mut Dice, sign: f64) -> (TermSheet, Market) {
    let (mut sheet, mut market) = broad(dice, sign);
    let scale = dice.log_between(1e-12, 1e12) / market.spot;
    let by_deviation = |dice: &mut Dice, sheet: &mut TermSheet, market: &Market| {
        let deviation = market.vol * sheet.expiry.sqrt();
        sheet.barrier = market.spot * (sign * deviation * dice.between(0.0, 30.0)).exp();
        sheet.strike = market.spot * (deviation * dice.between(-30.0, 30.0)).exp();
    };
    for _ in 0..=dice.below(2) {
        match dice.below(8) {
            0 => sheet.barrier = market.spot * (1.0 + sign * dice.log_between(1e-16, 1e-4)),
            1 => sheet.strike = sheet.barrier * (1.0 + dice.between(-1.0, 1.0) * dice.log_between(1e-16, 1e-4)),
            2 => {
                market.vol = dice.log_between(1e-6, 1e-2);
                by_deviation(dice, &mut sheet, &market);
            }
            3 => market.vol = dice.log_between(2.0, 10.0),
            4 => {
                sheet.expiry = dice.log_between(1.0, 3600.0) / 31536000.0;
                by_deviation(dice, &mut sheet, &market);
            }
            5 => sheet.expiry = dice.between(30.0, 100.0),
            6 => (market.rate, market.dividend) = (dice.between(-1.0, 1.0), dice.between(-1.0, 1.0)),
            _ => {
                market.spot *= scale;
                sheet.strike *= scale;
                sheet.barrier *= scale;
            }
        }
    }
    (sheet, market)
}

impl Arbitrary for Case {
    fn arbitrary(g: &mut Gen) -> Case {
        let contract = Contract::from_code(u8::arbitrary(g) % Contract::COUNT).expect("a known code");
        let sign = if contract.direction() == Some(Direction::Down) { -1.0 } else { 1.0 };
        let mut dice = Dice(g);
        let (domain, (sheet, market)) = match dice.below(3) {
            0 => (Domain::Everyday, everyday(&mut dice, sign)),
            1 => (Domain::Broad, broad(&mut dice, sign)),
            _ => (Domain::Extreme, extreme(&mut dice, sign)),
        };
        let touch = matches!(contract, Contract::OneTouch(_) | Contract::NoTouch(_));
        let rebate = if touch || dice.below(3) > 0 { market.spot * dice.log_between(0.001, 0.3) } else { 0.0 };
        let paid = if contract.pays_at_hit() && dice.below(2) == 0 { RebatePaid::Hit } else { RebatePaid::Expiry };
        Case { domain, sheet: TermSheet { contract, ..sheet }.rebate(rebate, paid), market }
    }

    /// The same with one number rounded to few digits, so that a failure is easy to copy.
    fn shrink(&self) -> Box<dyn Iterator<Item = Case>> {
        type Number = fn(&mut Case) -> &mut f64;
        const NUMBERS: [Number; 8] = [
            |case| &mut case.market.spot,
            |case| &mut case.sheet.strike,
            |case| &mut case.sheet.barrier,
            |case| &mut case.sheet.rebate,
            |case| &mut case.sheet.expiry,
            |case| &mut case.market.vol,
            |case| &mut case.market.rate,
            |case| &mut case.market.dividend,
        ];
        let case = *self;
        Box::new(NUMBERS.into_iter().flat_map(move |number| {
            [1, 2, 4].into_iter().filter_map(move |digits| {
                let mut rounder = case;
                let value = number(&mut rounder);
                let rounded: f64 = format!("{:.*e}", digits, *value).parse().expect("a number");
                let differs = rounded != *value;
                *value = rounded;
                differs.then_some(rounder)
            })
        }))
    }
}

impl Case {
    pub(crate) fn price(&self) -> f64 {
        price(&self.sheet, &self.market).unwrap_or_else(|error| panic!("{self:?}: {error}"))
    }

    pub(crate) fn greeks(&self) -> Greeks {
        greeks(&self.sheet, &self.market).unwrap_or_else(|error| panic!("{self:?}: {error}"))
    }

    /// The same terms and market under another contract, its rebate paid at expiry.
    pub(crate) fn with(&self, contract: Contract) -> Case {
        Case { sheet: TermSheet { contract, rebate_paid: RebatePaid::Expiry, ..self.sheet }, ..*self }
    }

    pub(crate) fn without_rebate(&self) -> Case {
        Case { sheet: self.sheet.rebate(0.0, self.sheet.rebate_paid), ..*self }
    }

    /// Direction and payoff of a knock; the property does not speak of other contracts.
    pub(crate) fn knock(&self) -> Option<(Direction, Knock, Payoff)> {
        match self.sheet.contract {
            Contract::Knock(direction, knock, payoff) => Some((direction, knock, payoff)),
            _ => None,
        }
    }

    pub(crate) fn touched(&self) -> bool {
        match self.sheet.contract.direction() {
            Some(Direction::Up) => self.market.spot >= self.sheet.barrier,
            Some(Direction::Down) => self.market.spot <= self.sheet.barrier,
            None => false,
        }
    }

    /// `|V| + sum |x dV/dx|` over the inputs: a relative change of each input by eps moves the value by eps times
    /// this, and no formula in binary64 can do much better.
    pub(crate) fn conditioned(&self) -> f64 {
        let (risk, sheet, market) = (self.greeks(), &self.sheet, &self.market);
        let term = |input: f64, slope: f64| if slope == 0.0 { 0.0 } else { (input * slope).abs() };
        risk.value
            + term(market.spot, risk.delta)
            + term(market.vol, risk.vega)
            + term(sheet.expiry, risk.theta)
            + term(market.rate, risk.rho)
            + term(market.dividend, risk.dividend_rho)
            + term(sheet.barrier, risk.barrier_delta)
            + term(sheet.strike, risk.strike_delta)
    }
}

/// What is lost when a number, or a factor of it, underflows.
pub(crate) const UNDERFLOW: f64 = 1e-290;

/// `Ok` if the numbers differ by at most the tolerance, underflow aside; the sentence otherwise.
pub(crate) fn close(found: f64, expected: f64, tolerance: f64) -> Result<(), String> {
    let tolerance = tolerance + UNDERFLOW;
    let error = (found - expected).abs();
    if error <= tolerance {
        Ok(())
    } else {
        Err(format!("{found:e} for {expected:e}, off by {error:e} > {tolerance:e}"))
    }
}
