//! What relative changes of the inputs do to an answer: `|V| + sum over the inputs of |x dV/dx|`, the scale on which
//! a rounding of the inputs alone would show.

use floodmark::brownian::{Law, Quantity};
use floodmark::price::{Greeks, reference_greeks, reference_price};
use floodmark::terms::{Direction, Market, TermSheet};

/// The relative step of differences.
const STEP: f64 = 1.0 / 1048576.0;
/// The smallest: 64 units of the last place.
const SMALLEST_STEP: f64 = 64.0 * f64::EPSILON;

/// Of a price, by its own Greeks.
pub(super) fn of_price(sheet: &TermSheet, market: &Market) -> Option<f64> {
    let risk = reference_greeks(sheet, market).ok()?;
    let without_rebate = reference_price(&TermSheet { rebate: 0.0, ..*sheet }, market).ok()?;
    let terms = [
        (1.0, risk.value),
        (market.spot, risk.delta),
        (sheet.strike, risk.strike_delta),
        (sheet.barrier, risk.barrier_delta),
        (1.0, risk.value - without_rebate),
        (sheet.expiry, risk.theta),
        (market.vol, risk.vega),
        (market.rate, risk.rho),
        (market.dividend, risk.dividend_rho),
    ];
    Some(terms.iter().filter(|(_, slope)| *slope != 0.0).map(|(input, slope)| (input * slope).abs()).sum())
}

/// Of each of the Greeks, by differences of the reference path, away from the barrier.
pub(super) fn of_greeks(sheet: &TermSheet, market: &Market) -> Option<[f64; 12]> {
    let greeks = |sheet: &TermSheet, market: &Market| reference_greeks(sheet, market).ok().map(Greeks::to_array);
    let base = greeks(sheet, market)?;
    let mut scale = base.map(f64::abs);
    let mut add = |moved: Option<[f64; 12]>, relative: f64| {
        for ((scale, moved), base) in scale.iter_mut().zip(moved?).zip(base) {
            let share = ((moved - base) / relative).abs();
            *scale += if share.is_finite() { share } else { 0.0 };
        }
        Some(())
    };
    // Answers bend on the scale of the total volatility.
    let step = (STEP * (market.vol * sheet.expiry.sqrt()).min(1.0)).max(SMALLEST_STEP);
    let outward = if sheet.contract.direction() == Some(Direction::Down) { -step } else { step };
    let beyond = (sheet.strike - sheet.barrier) * outward > 0.0;
    let aside = if beyond { outward } else { -outward };
    // The step that the rounding of the moved input has left.
    let moved = |input: f64, step: f64| (input * (1.0 + step), (input * (1.0 + step) - input) / input);
    let (spot, by) = moved(market.spot, -outward);
    add(greeks(sheet, &Market { spot, ..*market }), by)?;
    let (vol, by) = moved(market.vol, step);
    add(greeks(sheet, &Market { vol, ..*market }), by)?;
    let (rate, by) = moved(market.rate, step);
    add(greeks(sheet, &Market { rate, ..*market }), by)?;
    let (dividend, by) = moved(market.dividend, step);
    add(greeks(sheet, &Market { dividend, ..*market }), by)?;
    let (expiry, by) = moved(sheet.expiry, step);
    add(greeks(&TermSheet { expiry, ..*sheet }, market), by)?;
    add(greeks(&TermSheet { rebate: 0.0, ..*sheet }, market), 1.0)?;
    if sheet.contract.has_strike() {
        let (strike, by) = moved(sheet.strike, aside);
        add(greeks(&TermSheet { strike, ..*sheet }, market), by)?;
    }
    if sheet.contract.direction().is_some() {
        let (barrier, by) = moved(sheet.barrier, outward);
        add(greeks(&TermSheet { barrier, ..*sheet }, market), by)?;
    }
    Some(scale)
}

/// Of a quantity of the law, by differences of the reference path.
pub(super) fn of_law(quantity: Quantity, inputs: [f64; 5]) -> Option<f64> {
    let answer = |[drift, vol, horizon, first, second]: [f64; 5]| {
        Law::new(drift, vol, horizon).and_then(|law| quantity.reference(&law, first, second)).ok()
    };
    let base = answer(inputs)?;
    let names = ["drift", "vol", "horizon"].iter().chain(quantity.arguments());
    let mut scale = base.abs();
    for (place, name) in names.enumerate() {
        let input = inputs[place];
        let mut moved = inputs;
        // Down, away from 1, and on the scale of the smaller side.
        let down = |share: f64| input - (STEP * input * share).max(8.0 * f64::EPSILON);
        moved[place] = match *name {
            "probability" | "uniform" if input > 0.5 => down(1.0 - input),
            _ => input * (1.0 - STEP),
        };
        if moved[place] != input {
            let slope = (answer(moved)? - base) / (moved[place] - input);
            scale += if slope.is_finite() { (slope * input).abs() } else { 0.0 };
        }
    }
    Some(scale)
}
