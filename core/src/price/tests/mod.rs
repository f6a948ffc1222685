//! What holds of prices wherever they are computed by whichever form: seams and limits.

extern crate std;

mod limits;
mod seams;

use crate::price::{Greeks, reference_greeks};
use crate::terms::{Contract, Direction, Knock, Market, Payoff, RebatePaid, TermSheet};

const DIRECTIONS: [Direction; 2] = [Direction::Up, Direction::Down];

fn knock(direction: Direction, knock: Knock, payoff: Payoff, expiry: f64) -> TermSheet {
    TermSheet::new(Contract::Knock(direction, knock, payoff), expiry)
}

/// `sum |x dV/dx| / |V|` over the inputs; the rebate's share is that of the rest of the value at most.
fn conditioning(sheet: &TermSheet, market: &Market, exact: &Greeks) -> f64 {
    let strike = if sheet.contract.has_strike() { sheet.strike * exact.strike_delta } else { 0.0 };
    let barrier = if sheet.contract.direction().is_some() { sheet.barrier * exact.barrier_delta } else { 0.0 };
    let parts = [
        market.spot * exact.delta,
        strike,
        barrier,
        sheet.expiry * exact.theta,
        market.vol * exact.vega,
        market.rate * exact.rho,
        market.dividend * exact.dividend_rho,
    ];
    parts.into_iter().map(f64::abs).sum::<f64>() / exact.value.abs()
}

fn exact(sheet: &TermSheet, market: &Market) -> Greeks {
    reference_greeks(sheet, market).unwrap_or_else(|error| panic!("{sheet:?} {market:?}: {error}"))
}

const NATURAL: RebatePaid = RebatePaid::Expiry;
