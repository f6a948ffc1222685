//! A way from here to every public function of the core. Written out as `Type::method` and `module::function`,
//! because the test compares these names with the sources of the core.
//!
//! Not here: `Display` and `Debug`, since the formatting machinery of the language itself can panic.

use core::ptr;

use floodmark::batch::{Book, Column, ColumnMut, GreekColumns, LawColumns, ProfileColumns};
use floodmark::brownian::{Law, Quantity};
use floodmark::price::Greeks;
use floodmark::terms::{Contract, Market, Payoff, RebatePaid, TermSheet};
use floodmark::{Status, batch, price, special};

/// A value of which the compiler knows nothing.
fn any<T: Copy>(value: T) -> T {
    // SAFETY: a reference can be read from.
    unsafe { ptr::read_volatile(&raw const value) }
}

/// Takes a result, so that it must be computed.
fn keep<T: Copy>(value: T) {
    let mut kept = core::mem::MaybeUninit::<T>::uninit();
    // SAFETY: the place is our own.
    unsafe { ptr::write_volatile(kept.as_mut_ptr(), value) };
}

pub(crate) fn everything() {
    statuses();
    terms();
    special_functions();
    one_contract();
    columns();
    law();
    law_columns();
    #[cfg(feature = "planted")]
    keep([1.0, 2.0, 3.0][any(1_usize)]);
}

fn statuses() {
    let status = any(Status::Vol);
    keep(Status::code(status));
    keep(Status::from_code(any(7)));
    keep(Status::field(status));
    keep(Status::rule(status));
}

fn terms() {
    let contract = any(Contract::Vanilla(Payoff::Call));
    keep(Contract::from_code(any(9)));
    keep(Contract::parse(any("up-and-out call")));
    keep(Contract::code(contract));
    keep(Contract::direction(contract));
    keep(Contract::has_strike(contract));
    keep(Contract::pays_at_hit(contract));
    let payoff = any(Payoff::Put);
    keep(Payoff::has_strike(payoff));
    keep(Payoff::name(payoff));
    keep(RebatePaid::code(any(RebatePaid::Hit)));
    keep(RebatePaid::from_code(any(1), contract));
    keep(RebatePaid::natural(contract));
    keep(RebatePaid::parse(any("hit")));
}

fn special_functions() {
    let x = any(0.5);
    keep(special::exp(x));
    keep(special::expm1(x));
    keep(special::ln(x));
    keep(special::ln_ratio(x, any(0.25)));
    keep(special::log1p(x));
    keep(special::mills_ratio(x));
    keep(special::normal_cdf(x));
    keep(special::normal_log_tail(x));
    keep(special::normal_pdf(x));
    keep(special::normal_quantile(x));
    keep(special::normal_tail(x));
}

fn one_contract() {
    let sheet = TermSheet::new(any(Contract::Vanilla(Payoff::Call)), any(0.5));
    let sheet = TermSheet::strike(sheet, any(100.0));
    let sheet = TermSheet::barrier(sheet, any(120.0));
    let sheet = TermSheet::rebate(sheet, any(3.0), any(RebatePaid::Hit));
    let market = any(Market { spot: 100.0, vol: 0.2, rate: 0.01, dividend: 0.02 });
    keep(TermSheet::checked(sheet));
    keep(Market::checked(market));
    keep(price::price(&sheet, &market));
    keep(price::greeks(&sheet, &market).map(Greeks::to_array));
    keep(price::barrier_profile(&sheet, &market));
    keep(price::bounded_price(&sheet, &market));
    keep(price::reference_price(&sheet, &market));
    keep(price::reference_greeks(&sheet, &market).map(Greeks::to_array));
}

fn columns() {
    const ROWS: usize = 3;
    let numbers = any([100.0; ROWS]);
    let codes = any([8_u8; ROWS]);
    let natural = any(RebatePaid::NATURAL_CODE);
    // SAFETY: the memory outlives the book, and nothing writes to it.
    let raw = unsafe { Column::from_raw(numbers.as_ptr(), any(1), ROWS) };
    let book = Book {
        rows: any(ROWS),
        contract: Column::from_slice(&codes),
        rebate_paid: Column::broadcast(&natural),
        spot: raw,
        strike: raw,
        barrier: raw,
        rebate: raw,
        expiry: raw,
        vol: raw,
        rate: raw,
        dividend: raw,
    };
    let (mut value, mut more, mut status) = ([0.0; ROWS], [[0.0; ROWS]; 12], [0; ROWS]);
    // SAFETY: the memory outlives the column, and nothing else touches it meanwhile.
    let mut status_column = unsafe { ColumnMut::from_raw(status.as_mut_ptr(), 1, ROWS) };
    keep(batch::price(&book, &mut ColumnMut::from_slice(&mut value), &mut status_column));
    keep(batch::reference_price(&book, &mut ColumnMut::from_slice(&mut value), &mut status_column));
    let [bounded, error_bound, ..] = more.each_mut().map(|column| ColumnMut::from_slice(column));
    keep(batch::bounded_price(&book, &mut { bounded }, &mut { error_bound }, &mut status_column));
    let mut greeks = GreekColumns { columns: more.each_mut().map(|column| Some(ColumnMut::from_slice(column))) };
    keep(batch::greeks(&book, &mut greeks, &mut status_column));
    keep(batch::reference_greeks(&book, &mut greeks, &mut status_column));
    let [touch_probability, distance, gap, ..] = more.each_mut().map(|column| Some(ColumnMut::from_slice(column)));
    let mut profile = ProfileColumns { touch_probability, distance, gap };
    keep(batch::barrier_profile(&book, &mut profile, &mut status_column));
    keep((value, more, status));
}

fn law() {
    let Ok(law) = Law::new(any(0.05), any(0.2), any(1.5)) else { return };
    let (terminal, level, time) = (any(0.1), any(0.3), any(0.7));
    let (probability, uniform) = (any(0.4), any(0.6));
    keep([Law::drift(&law), Law::vol(&law), Law::horizon(&law)]);
    keep(Law::terminal_pdf(&law, terminal));
    keep(Law::terminal_cdf(&law, terminal));
    keep(Law::terminal_quantile(&law, probability));
    keep(Law::max_pdf(&law, level));
    keep(Law::max_cdf(&law, level));
    keep(Law::max_tail(&law, level));
    keep(Law::max_quantile(&law, probability));
    keep(Law::min_pdf(&law, level));
    keep(Law::min_cdf(&law, level));
    keep(Law::min_tail(&law, level));
    keep(Law::min_quantile(&law, probability));
    keep(Law::joint_max_cdf(&law, terminal, level));
    keep(Law::joint_max_pdf(&law, terminal, level));
    keep(Law::joint_min_cdf(&law, terminal, level));
    keep(Law::joint_min_pdf(&law, terminal, level));
    keep(Law::survival(&law, level));
    keep(Law::first_passage_pdf(&law, level, time));
    keep(Law::first_passage_cdf(&law, level, time));
    keep(Law::first_passage_quantile(&law, level, probability));
    keep(Law::discounted_first_passage(&law, level, any(0.03)));
    keep(Law::bridge_crossing(&law, terminal, level));
    keep(Law::sample_terminal(&law, uniform));
    keep(Law::sample_max(&law, terminal, uniform));
    keep(Law::sample_min(&law, terminal, uniform));
    keep(Law::sample_terminal_max(&law, uniform, probability));
    keep(Law::drift_weight(&law, terminal, any(-0.1)));
}

fn law_columns() {
    const ROWS: usize = 3;
    let Ok(quantity) = Quantity::from_code(any(11)) else { return };
    keep(Quantity::code(quantity));
    keep(Quantity::name(quantity));
    keep(Quantity::arguments(quantity));
    let (drift, vol, horizon, first, second) = (any(0.05), any(0.2), any(1.5), any(0.1), any(0.3));
    keep(batch::law_value(quantity, drift, vol, horizon, first, second));
    if let Ok(law) = Law::new(drift, vol, horizon) {
        keep(Quantity::value(quantity, &law, first, second));
        keep(Quantity::reference(quantity, &law, first, second));
    }
    let numbers = any([0.5; ROWS]);
    let column = Column::from_slice(&numbers);
    let columns =
        LawColumns { rows: any(ROWS), drift: column, vol: column, horizon: column, first: column, second: column };
    let (mut value, mut status) = ([0.0; ROWS], [0; ROWS]);
    let refused =
        batch::law(quantity, &columns, &mut ColumnMut::from_slice(&mut value), &mut ColumnMut::from_slice(&mut status));
    keep((refused, value, status));
}
