//! What must hold for every contract, tried on random ones; no number here comes from another program.

mod cases;

use cases::{Case, Domain, UNDERFLOW, close, holds};
use floodmark::Status;
use floodmark::price::{barrier_profile, greeks, price};
use floodmark::terms::{Contract, Direction, Knock, Market, Payoff, RebatePaid, TermSheet};
use quickcheck::TestResult;

const EPS: f64 = f64::EPSILON;

/// Roundings, in units of what one rounding of the inputs does, that an identity between two or three values may
/// be off by.
const ROUNDINGS: f64 = 64.0;

type Verdict = Result<(), String>;

#[test]
fn knock_in_plus_knock_out_is_vanilla() {
    fn property(case: Case) -> Verdict {
        let Some((direction, _, payoff)) = case.knock() else { return Ok(()) };
        let case = case.without_rebate();
        let [inside, out] = [Knock::In, Knock::Out].map(|knock| case.with(Contract::Knock(direction, knock, payoff)));
        let vanilla = case.with(Contract::Vanilla(payoff));
        let (found, expected) = (inside.price() + out.price(), vanilla.price());
        if case.domain == Domain::Everyday {
            let per_share = if matches!(payoff, Payoff::Cash | Payoff::CashCall | Payoff::CashPut) {
                1.0
            } else {
                case.market.spot
            };
            close(found, expected, 1e-14 * per_share)?;
        }
        close(found, expected, ROUNDINGS * EPS * (inside.conditioned() + out.conditioned() + vanilla.conditioned()))
    }
    holds(property as fn(Case) -> Verdict);
}

#[test]
fn one_touch_plus_no_touch_is_the_discounted_amount() {
    fn property(case: Case) -> Verdict {
        let Some(direction) = case.sheet.contract.direction() else { return Ok(()) };
        let touch = case.with(Contract::OneTouch(direction));
        let expected = case.sheet.rebate * (-case.market.rate * case.sheet.expiry).exp();
        let found = touch.price() + case.with(Contract::NoTouch(direction)).price();
        close(
            found,
            expected,
            ROUNDINGS * EPS * (touch.conditioned() + expected * (1.0 + (case.market.rate * case.sheet.expiry).abs())),
        )
    }
    holds(property as fn(Case) -> Verdict);
}

#[test]
fn a_rebate_is_a_touch_of_the_same_amount() {
    fn property(case: Case) -> Verdict {
        let Some((direction, knock, _)) = case.knock() else { return Ok(()) };
        let touch = match knock {
            Knock::Out => Contract::OneTouch(direction),
            Knock::In => Contract::NoTouch(direction),
        };
        let touch = Case { sheet: TermSheet { contract: touch, ..case.sheet }, ..case };
        let sum = case.without_rebate().price() + touch.price();
        close(case.price(), sum, 2.0 * EPS * sum)
    }
    holds(property as fn(Case) -> Verdict);
}

#[test]
fn a_call_less_a_put_is_a_share_less_the_strike() {
    fn property(case: Case) -> Verdict {
        let Some((direction, knock, _)) = case.knock() else { return Ok(()) };
        let case = case.without_rebate();
        let of = |payoff| case.with(Contract::Knock(direction, knock, payoff));
        let (call, put, asset, cash) = (of(Payoff::Call), of(Payoff::Put), of(Payoff::Asset), of(Payoff::Cash));
        let strike = case.sheet.strike;
        let scale = call.conditioned() + put.conditioned() + asset.conditioned() + strike * cash.conditioned();
        close(call.price() - put.price(), asset.price() - strike * cash.price(), ROUNDINGS * EPS * scale)
    }
    holds(property as fn(Case) -> Verdict);
}

#[test]
fn a_digital_call_and_put_make_up_the_whole() {
    fn property(case: Case) -> Verdict {
        let Some((direction, knock, _)) = case.knock() else { return Ok(()) };
        let case = case.without_rebate();
        for [call, put, whole] in
            [[Payoff::CashCall, Payoff::CashPut, Payoff::Cash], [Payoff::AssetCall, Payoff::AssetPut, Payoff::Asset]]
        {
            let [call, put, whole] =
                [call, put, whole].map(|payoff| case.with(Contract::Knock(direction, knock, payoff)));
            let scale = call.conditioned() + put.conditioned() + whole.conditioned();
            close(call.price() + put.price(), whole.price(), ROUNDINGS * EPS * scale)?;
        }
        Ok(())
    }
    holds(property as fn(Case) -> Verdict);
}

/// In units of the share instead of cash, `1 / X` is the underlying: calls become puts, up becomes down, rate and
/// dividend change places. By homogeneity the mirror is written with spot `K`, strike `S`, barrier `S K / L`.
#[test]
fn a_change_of_numeraire_turns_up_into_down() {
    fn property(case: Case) -> Verdict {
        let Some((direction, knock, payoff)) = case.knock() else { return Ok(()) };
        let case = case.without_rebate();
        let strike = case.sheet.strike;
        let (mirrored, factor) = match payoff {
            Payoff::Call => (Payoff::Put, 1.0),
            Payoff::Put => (Payoff::Call, 1.0),
            Payoff::CashCall => (Payoff::AssetPut, 1.0 / strike),
            Payoff::CashPut => (Payoff::AssetCall, 1.0 / strike),
            Payoff::AssetCall => (Payoff::CashPut, case.market.spot),
            Payoff::AssetPut => (Payoff::CashCall, case.market.spot),
            Payoff::Cash => (Payoff::Asset, 1.0 / strike),
            Payoff::Asset => (Payoff::Cash, case.market.spot),
        };
        let other = match direction {
            Direction::Up => Direction::Down,
            Direction::Down => Direction::Up,
        };
        let mut mirror = case.with(Contract::Knock(other, knock, mirrored));
        mirror.market = Market { spot: strike, rate: case.market.dividend, dividend: case.market.rate, ..case.market };
        mirror.sheet.strike = case.market.spot;
        mirror.sheet.barrier = case.market.spot * (strike / case.sheet.barrier);
        let tolerance = ROUNDINGS * EPS * (case.conditioned() + factor * mirror.conditioned());
        close(factor * mirror.price(), case.price(), tolerance)
    }
    holds(property as fn(Case) -> Verdict);
}

#[test]
fn doubling_every_amount_doubles_the_price_to_the_bit() {
    fn property(case: Case) -> Verdict {
        let mut double = case;
        double.market.spot *= 2.0;
        for amount in [&mut double.sheet.strike, &mut double.sheet.barrier, &mut double.sheet.rebate] {
            *amount *= 2.0;
        }
        let (one, two) = (case.price(), double.price());
        let cash = matches!(case.knock(), Some((_, _, Payoff::Cash | Payoff::CashCall | Payoff::CashPut)))
            || matches!(case.sheet.contract, Contract::Vanilla(Payoff::Cash | Payoff::CashCall | Payoff::CashPut));
        if one < 1e-290 || (cash && case.sheet.rebate > 0.0 && case.knock().is_some()) {
            return Ok(());
        }
        close(two, if cash { one } else { 2.0 * one }, 0.0)
    }
    holds(property as fn(Case) -> Verdict);
}

#[test]
fn a_farther_barrier_never_takes_from_a_knock_out_nor_gives_to_a_knock_in() {
    fn property((case, farther): (Case, u16)) -> Verdict {
        let Some((direction, knock, _)) = case.knock() else { return Ok(()) };
        let case = case.without_rebate();
        let mut far = case;
        let step = f64::from(farther) / f64::from(u16::MAX);
        far.sheet.barrier *= 1.0 + if direction == Direction::Up { step } else { -0.9 * step };
        let (here, there) = (case.price(), far.price());
        let slack = ROUNDINGS * EPS * (case.conditioned() + far.conditioned()) + UNDERFLOW;
        let gain = if knock == Knock::Out { there - here } else { here - there };
        if gain >= -slack { Ok(()) } else { Err(format!("{here:e} then {there:e}, slack {slack:e}")) }
    }
    holds(property as fn((Case, u16)) -> Verdict);
}

#[test]
fn a_knock_is_worth_between_nothing_and_the_vanilla() {
    fn property(case: Case) -> Verdict {
        let Some((_, _, payoff)) = case.knock() else { return Ok(()) };
        let case = case.without_rebate();
        let vanilla = case.with(Contract::Vanilla(payoff));
        let (value, most) = (case.price(), vanilla.price());
        let slack = ROUNDINGS * EPS * vanilla.conditioned() + UNDERFLOW;
        if value >= 0.0 && value <= most + slack { Ok(()) } else { Err(format!("{value:e} beyond {most:e}")) }
    }
    holds(property as fn(Case) -> Verdict);
}

#[test]
fn price_is_the_value_of_greeks_to_the_bit_never_negative_and_no_greek_is_nan() {
    fn property((case, limit): (Case, u8)) -> Verdict {
        let mut case = case;
        match limit % 16 {
            0 => case.market.vol = 0.0,
            1 => case.sheet.expiry = 0.0,
            2 => case.sheet.barrier = case.market.spot,
            3 => case.sheet.strike = case.sheet.barrier,
            4 => case.sheet.strike = case.market.spot,
            5 => (case.market.rate, case.market.dividend) = (0.0, 0.0),
            6 => case.market.dividend = case.market.rate,
            7 => case.market.spot = case.sheet.barrier * case.sheet.barrier / case.market.spot,
            8 => (case.market.vol, case.sheet.strike) = (0.0, case.market.spot),
            _ => {}
        }
        let (value, risk) = (case.price(), case.greeks());
        if value.is_nan() || value < 0.0 || value.to_bits() != risk.value.to_bits() {
            return Err(format!("{value:e} and {:e}", risk.value));
        }
        match risk.to_array().iter().position(|greek| greek.is_nan()) {
            None => Ok(()),
            Some(_) => Err(format!("{risk:?}")),
        }
    }
    holds(property as fn((Case, u8)) -> Verdict);
}

#[test]
fn the_greeks_satisfy_the_black_scholes_equation() {
    fn property(case: Case) -> Verdict {
        let (risk, Market { spot, vol, rate, dividend }) = (case.greeks(), case.market);
        if case.touched() {
            return Ok(());
        }
        let terms = [
            risk.theta,
            rate * spot * risk.delta,
            -dividend * spot * risk.delta,
            0.5 * vol * vol * spot * spot * risk.gamma,
            -rate * risk.value,
        ];
        let scale: f64 = terms.iter().map(|term| term.abs()).sum();
        // Each Greek is conditioned at least as badly as the value, relative to its own size and to the value's per time.
        let kappa = case.conditioned() / risk.value.max(UNDERFLOW);
        let size = scale + risk.value * (1.0 / case.sheet.expiry + rate.abs() + dividend.abs());
        // Greeks of a knock-out that lives in a strip of a billionth of the spot have digits left for their budget only.
        let budget = if case.domain == Domain::Extreme { 1e-8 } else { ROUNDINGS * EPS };
        close(terms.iter().sum(), 0.0, 1e-12 * scale + budget * kappa * size)
    }
    holds(property as fn(Case) -> Verdict);
}

/// Central differences with Richardson's extrapolation, in everyday cases where a step fits before the barrier.
#[test]
fn the_greeks_are_the_derivatives_of_the_price() {
    type Input = fn(&mut Case) -> &mut f64;
    const INPUTS: [(&str, Input); 7] = [
        ("spot", |case| &mut case.market.spot),
        ("vol", |case| &mut case.market.vol),
        ("expiry", |case| &mut case.sheet.expiry),
        ("rate", |case| &mut case.market.rate),
        ("dividend", |case| &mut case.market.dividend),
        ("barrier", |case| &mut case.sheet.barrier),
        ("strike", |case| &mut case.sheet.strike),
    ];
    fn derivative(case: &Case, input: Input, step: f64, of: impl Fn(&Case) -> f64) -> f64 {
        let difference = |step: f64| {
            let at = |shift: f64| {
                let mut moved = *case;
                *input(&mut moved) += shift;
                of(&moved)
            };
            (at(step) - at(-step)) / (2.0 * step)
        };
        let [one, half, quarter] = [step, 0.5 * step, 0.25 * step].map(difference);
        let [first, second] = [(4.0 * half - one) / 3.0, (4.0 * quarter - half) / 3.0];
        (16.0 * second - first) / 15.0
    }
    fn property(case: Case) -> TestResult {
        let Market { spot, vol, .. } = case.market;
        let TermSheet { strike, barrier, expiry, .. } = case.sheet;
        let deviation = vol * expiry.sqrt();
        let away = |level: f64| (level / spot).ln().abs() / deviation;
        let between = (strike / barrier).ln().abs() / deviation;
        let tame = case.domain == Domain::Everyday && away(barrier) > 0.3 && away(barrier) < 4.0 && away(strike) < 4.0;
        if !tame || deviation < 0.02 || between < 0.1 {
            return TestResult::discard();
        }
        let risk = case.greeks();
        let scale = case.market.spot.max(strike);
        for (name, input) in INPUTS {
            let mut probe = case;
            let size = *input(&mut probe);
            let step = match name {
                "rate" | "dividend" => 0.01 * (vol / expiry.sqrt()).min(1.0),
                "vol" | "expiry" => 0.02 * size,
                _ => 0.02 * deviation * size,
            };
            let checks: Vec<(&str, f64, f64)> = match name {
                "spot" => vec![
                    ("delta", risk.delta, derivative(&case, input, step, Case::price)),
                    ("gamma", risk.gamma, derivative(&case, input, step, |at| at.greeks().delta)),
                ],
                "vol" => vec![
                    ("vega", risk.vega, derivative(&case, input, step, Case::price)),
                    ("vanna", risk.vanna, derivative(&case, input, step, |at| at.greeks().delta)),
                    ("volga", risk.volga, derivative(&case, input, step, |at| at.greeks().vega)),
                ],
                "expiry" => vec![
                    ("theta", -risk.theta, derivative(&case, input, step, Case::price)),
                    ("charm", -risk.charm, derivative(&case, input, step, |at| at.greeks().delta)),
                ],
                "rate" => vec![("rho", risk.rho, derivative(&case, input, step, Case::price))],
                "dividend" => vec![("dividend_rho", risk.dividend_rho, derivative(&case, input, step, Case::price))],
                "barrier" => vec![("barrier_delta", risk.barrier_delta, derivative(&case, input, step, Case::price))],
                _ => vec![("strike_delta", risk.strike_delta, derivative(&case, input, step, Case::price))],
            };
            for (greek, found, expected) in checks {
                let order = match greek {
                    "gamma" | "vanna" | "charm" => scale / spot / (0.02 * deviation),
                    "volga" => scale / (0.02 * vol),
                    _ => scale,
                };
                let tolerance = 1e-5 * found.abs() + 1e-11 * order / step;
                if let Err(sentence) = close(found, expected, tolerance) {
                    return TestResult::error(format!("{greek}: {sentence}"));
                }
            }
        }
        TestResult::passed()
    }
    holds(property as fn(Case) -> TestResult);
}

#[test]
fn the_profile_is_the_undiscounted_one_touch() {
    fn property(case: Case) -> Verdict {
        let Some(direction) = case.sheet.contract.direction() else { return Ok(()) };
        let profile = barrier_profile(&case.sheet, &case.market).map_err(|error| error.to_string())?;
        let touch =
            Case { sheet: case.sheet.rebate(1.0, RebatePaid::Expiry), ..case }.with(Contract::OneTouch(direction));
        let bond = (-case.market.rate * case.sheet.expiry).exp();
        if !(0.0..=1.0).contains(&profile.touch_probability) {
            return Err(format!("{profile:?}"));
        }
        close(profile.touch_probability * bond, touch.price(), ROUNDINGS * EPS * (touch.conditioned() + touch.price()))
    }
    holds(property as fn(Case) -> Verdict);
}

#[test]
fn a_vanishing_volatility_leads_to_the_limit_that_is_stated() {
    fn property(case: Case) -> Verdict {
        if case.domain == Domain::Extreme {
            return Ok(());
        }
        let Market { spot, rate, dividend, .. } = case.market;
        let drift = (rate - dividend) * case.sheet.expiry;
        let off = |level: f64| ((level / spot).ln() - drift).abs();
        // At a level that the forward just meets, the limit is a jump.
        if off(case.sheet.strike) < 1e-6 || off(case.sheet.barrier) < 1e-6 {
            return Ok(());
        }
        let with = |vol: f64| Case { market: Market { vol, ..case.market }, ..case }.price();
        let (still, quiet) = (with(0.0), with(1e-9));
        close(quiet, still, 1e-8 * (still + spot * (drift.abs()).exp()).min(still * 1e3 + 1e-300))
    }
    holds(property as fn(Case) -> Verdict);
}

#[test]
fn a_vanishing_expiry_leads_to_what_is_paid_now() {
    fn property(case: Case) -> Verdict {
        let spot = case.market.spot;
        let off = |level: f64| (level / spot).ln().abs();
        if case.domain == Domain::Extreme || off(case.sheet.strike) < 1e-6 || off(case.sheet.barrier) < 1e-6 {
            return Ok(());
        }
        let with = |expiry: f64| Case { sheet: TermSheet { expiry, ..case.sheet }, ..case }.price();
        let (now, soon) = (with(0.0), with(1e-18));
        close(soon, now, 1e-12 * now)
    }
    holds(property as fn(Case) -> Verdict);
}

#[test]
fn a_contract_touched_now_is_the_limit_of_the_spot_nearing_its_barrier() {
    fn property(case: Case) -> Verdict {
        let Some(direction) = case.sheet.contract.direction() else { return Ok(()) };
        if case.domain == Domain::Extreme {
            return Ok(());
        }
        let mut near = case;
        near.market.spot = match direction {
            Direction::Up => case.sheet.barrier.next_down(),
            Direction::Down => case.sheet.barrier.next_up(),
        };
        let mut at = case;
        at.market.spot = case.sheet.barrier;
        // One ulp moves the value by that much times delta; the rest is rounding.
        let slack = 4.0 * EPS * case.sheet.barrier * near.greeks().delta.abs();
        close(near.price(), at.price(), slack + ROUNDINGS * EPS * (at.conditioned() + case.sheet.barrier))
    }
    holds(property as fn(Case) -> Verdict);
}

#[test]
fn a_knock_out_paying_only_beyond_its_barrier_is_worth_nothing() {
    fn property(case: Case) -> Verdict {
        let case = case.without_rebate();
        let dead = match case.knock() {
            Some((Direction::Up, Knock::Out, Payoff::Call | Payoff::CashCall | Payoff::AssetCall)) => {
                case.sheet.strike >= case.sheet.barrier
            }
            Some((Direction::Down, Knock::Out, Payoff::Put | Payoff::CashPut | Payoff::AssetPut)) => {
                case.sheet.strike <= case.sheet.barrier
            }
            _ => false,
        };
        if dead { close(case.price(), 0.0, 0.0) } else { Ok(()) }
    }
    holds(property as fn(Case) -> Verdict);
}

#[test]
fn what_is_out_of_the_domain_is_refused_by_name() {
    fn property((case, which, value): (Case, u8, f64)) -> Verdict {
        let (mut sheet, mut market) = (case.sheet, case.market);
        let bad = |least: f64, most: f64| if value >= least && value <= most { f64::NAN } else { value };
        let positive = if value > 0.0 && value < f64::INFINITY { -value } else { value };
        let status = match which % 6 {
            0 => {
                market.spot = positive;
                Status::Spot
            }
            1 => {
                market.vol = bad(0.0, 1000.0);
                Status::Vol
            }
            2 => {
                market.rate = bad(-1000.0, 1000.0);
                Status::Rate
            }
            3 => {
                market.dividend = bad(-1000.0, 1000.0);
                Status::Dividend
            }
            4 => {
                sheet.expiry = bad(0.0, 10000.0);
                Status::Expiry
            }
            _ => {
                if sheet.contract.direction().is_none() {
                    return Ok(());
                }
                sheet.barrier = positive;
                Status::Barrier
            }
        };
        for refused in [price(&sheet, &market).err(), greeks(&sheet, &market).err()] {
            let found = refused.map(|error| error.status);
            if found != Some(status) {
                return Err(format!("{found:?} for {status:?}"));
            }
        }
        Ok(())
    }
    holds(property as fn((Case, u8, f64)) -> Verdict);
}
