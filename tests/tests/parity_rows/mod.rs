//! The inputs of the parity vectors: every contract and every quantity of the law, from everyday to extreme, and bad
//! rows among them.
//!
//! Only additions, products and table look-ups make them, so that every machine makes the same.

use floodmark::batch::Quantity;
use floodmark::terms::{Contract, RebatePaid};

/// One contract as plain numbers.
#[derive(Clone, Copy, Debug)]
pub(crate) struct ContractRow {
    pub(crate) code: u8,
    pub(crate) spot: f64,
    pub(crate) strike: f64,
    pub(crate) barrier: f64,
    pub(crate) rebate: f64,
    pub(crate) rebate_paid: u8,
    pub(crate) expiry: f64,
    pub(crate) vol: f64,
    pub(crate) rate: f64,
    pub(crate) dividend: f64,
}

impl ContractRow {
    /// The cells `name` … `dividend` of the file.
    pub(crate) fn cells(&self) -> String {
        let name = Contract::from_code(self.code).map_or_else(|_| String::new(), |contract| contract.to_string());
        format!(
            "{name},{},{:?},{:?},{:?},{:?},{},{:?},{:?},{:?},{:?}",
            self.code,
            self.spot,
            self.strike,
            self.barrier,
            self.rebate,
            self.rebate_paid,
            self.expiry,
            self.vol,
            self.rate,
            self.dividend
        )
    }
}

/// A small generator of numbers that look random (Marsaglia, Xorshift RNGs, 2003, from memory).
pub(crate) struct Dice(u64);

impl Dice {
    pub(crate) fn new(seed: u64) -> Dice {
        Dice(seed)
    }

    fn next(&mut self) -> u64 {
        self.0 ^= self.0 << 13;
        self.0 ^= self.0 >> 7;
        self.0 ^= self.0 << 17;
        self.0
    }

    /// One of these.
    pub(crate) fn pick<T: Copy>(&mut self, choices: &[T]) -> T {
        choices[usize::try_from(self.next() % choices.len() as u64).unwrap()]
    }

    /// A number of at most 5 digits between these.
    pub(crate) fn between(&mut self, low: f64, high: f64) -> f64 {
        let share = f64::from(u32::try_from(self.next() % 100_000).unwrap()) / 100_000.0;
        low + (high - low) * share
    }
}

/// Twelve rounds over all contracts: six everyday, three broad, three extreme; then the rows that are refused.
pub(crate) fn contract_rows() -> Vec<ContractRow> {
    let mut dice = Dice::new(0x5eed_f10d);
    let mut rows = Vec::new();
    for round in 0..12 {
        for code in 0..Contract::COUNT {
            let row = match round {
                0..6 => everyday(&mut dice),
                6..9 => broad(&mut dice),
                _ => extreme(&mut dice),
            };
            rows.push(fitted(row, code, &mut dice));
        }
    }
    let bad = refused(&rows[..44]);
    // Each bad row stands between good neighbours.
    for (place, row) in bad.into_iter().enumerate() {
        rows.insert(7 * place + 3, row);
    }
    rows
}

/// The row as this contract has it: an unused strike may be anything, a rebate is paid when it can be.
fn fitted(row: ContractRow, code: u8, dice: &mut Dice) -> ContractRow {
    let contract = Contract::from_code(code).unwrap();
    let strike = if contract.has_strike() { row.strike } else { dice.pick(&[f64::NAN, row.strike, -1.0]) };
    let paid = if contract.pays_at_hit() { &[0, 1, 2][..] } else { &[0, 2][..] };
    ContractRow { code, strike, rebate_paid: dice.pick(paid), ..row }
}

fn everyday(dice: &mut Dice) -> ContractRow {
    ContractRow {
        code: 0,
        spot: dice.between(80.0, 120.0),
        strike: dice.pick(&[80.0, 90.0, 95.0, 100.0, 105.0, 110.0, 125.0]),
        barrier: dice.between(60.0, 150.0),
        rebate: dice.pick(&[0.0, 1.5, 3.0, 10.0]),
        rebate_paid: 0,
        expiry: dice.between(0.01, 5.0),
        vol: dice.between(0.05, 1.0),
        rate: dice.between(-0.1, 0.1),
        dividend: dice.between(-0.1, 0.1),
    }
}

fn broad(dice: &mut Dice) -> ContractRow {
    let spot = dice.pick(&[0.001, 0.7, 13.0, 1234.5, 80_000.0]);
    ContractRow {
        code: 0,
        spot,
        strike: spot * dice.between(0.3, 3.0),
        barrier: spot * dice.between(0.5, 2.0),
        rebate: spot * dice.pick(&[0.0, 0.01, 1.0]),
        rebate_paid: 0,
        expiry: dice.pick(&[0.0001, 0.003, 0.02, 0.3, 2.0, 11.0, 30.0]),
        vol: dice.pick(&[0.01, 0.03, 0.1, 0.35, 0.8, 2.0]),
        rate: dice.between(-0.2, 0.2),
        dividend: dice.between(-0.2, 0.2),
    }
}

fn extreme(dice: &mut Dice) -> ContractRow {
    let spot = dice.pick(&[1e-300, 1e-9, 1.0, 100.0, 1e12, 1e300]);
    let near = [1.0, 1.0 + 1e-15, 1.0 - 1e-15, 1.0 + 1e-9, 1.0 - 1e-9, 0.99, 1.01, 0.5, 2.0, 1e-5, 1e5];
    ContractRow {
        code: 0,
        spot,
        strike: spot * dice.pick(&near),
        barrier: spot * dice.pick(&near),
        rebate: spot * dice.pick(&[0.0, 0.03, 1.0]),
        rebate_paid: 0,
        expiry: dice.pick(&[0.0, 1e-12, 1e-4, 0.25, 1.0, 100.0, 10_000.0]),
        vol: dice.pick(&[0.0, 1e-40, 1e-12, 1e-3, 0.05, 0.2, 1.0, 40.0, 1000.0]),
        rate: dice.pick(&[-3.0, -0.5, -0.03, 0.0, 0.03, 0.5, 3.0]),
        dividend: dice.pick(&[-3.0, -0.5, -0.02, 0.0, 0.02, 0.5, 3.0]),
    }
}

/// Good rows spoilt, each in one place.
fn refused(good: &[ContractRow]) -> Vec<ContractRow> {
    let knock_out = good[8];
    let knock_in = good[16];
    let hit = RebatePaid::Hit.code();
    let mut rows = vec![
        ContractRow { code: 44, ..knock_out },
        ContractRow { code: 255, ..knock_out },
        ContractRow { rebate_paid: 3, ..knock_out },
        ContractRow { rebate_paid: hit, ..knock_in },
        ContractRow { rebate_paid: hit, ..good[0] },
        ContractRow { rebate_paid: hit, ..good[43] },
        ContractRow { expiry: 10_000.0, vol: 0.2, dividend: -900.0, ..good[7] },
    ];
    for number in [f64::NAN, f64::INFINITY, f64::NEG_INFINITY, -1.5] {
        rows.push(ContractRow { spot: number, ..knock_out });
        rows.push(ContractRow { strike: number, ..knock_in });
        rows.push(ContractRow { barrier: number, ..good[40] });
        rows.push(ContractRow { rebate: number, ..good[42] });
        rows.push(ContractRow { expiry: number, ..good[24] });
        rows.push(ContractRow { vol: number, ..good[33] });
    }
    for number in [f64::NAN, f64::INFINITY, f64::NEG_INFINITY, -1000.5] {
        rows.push(ContractRow { rate: number, ..good[14] });
        rows.push(ContractRow { dividend: number, ..good[31] });
    }
    for number in [0.0, -0.0] {
        rows.push(ContractRow { spot: number, ..knock_in });
        rows.push(ContractRow { strike: number, ..knock_out });
        rows.push(ContractRow { barrier: number, ..good[41] });
    }
    rows
}

/// One question to the law as plain numbers.
#[derive(Clone, Copy, Debug)]
pub(crate) struct LawRow {
    pub(crate) quantity: Quantity,
    pub(crate) drift: f64,
    pub(crate) vol: f64,
    pub(crate) horizon: f64,
    pub(crate) first: f64,
    pub(crate) second: f64,
}

impl LawRow {
    /// The cells `name` … `second` of the file.
    pub(crate) fn cells(&self) -> String {
        let second = if self.quantity.arguments().len() < 2 { String::new() } else { format!("{:?}", self.second) };
        format!(
            "{},{},,,,,,,{:?},,,{:?},{:?},{:?},{second}",
            self.quantity.name(),
            self.quantity.code(),
            self.vol,
            self.drift,
            self.horizon,
            self.first
        )
    }
}

/// Ten rows of each quantity: four everyday, three extreme, three that are refused.
pub(crate) fn law_rows() -> Vec<LawRow> {
    let mut dice = Dice::new(0x1a3_f10d);
    let mut rows = Vec::new();
    for quantity in Quantity::ALL {
        for place in 0..10 {
            let mut row = if place < 4 { everyday_law(&mut dice) } else { extreme_law(&mut dice) };
            let mut arguments = quantity.arguments().iter().map(|name| argument(name, place < 4, &mut dice));
            row = LawRow {
                quantity,
                first: arguments.next().unwrap(),
                second: arguments.next().unwrap_or(f64::NAN),
                ..row
            };
            match place {
                7 => spoil(&mut row, &mut dice),
                8 => row.first = f64::NAN,
                9 => spoil_last(&mut row),
                _ => {}
            }
            rows.push(row);
        }
    }
    rows
}

fn everyday_law(dice: &mut Dice) -> LawRow {
    LawRow {
        quantity: Quantity::ALL[0],
        drift: dice.between(-0.5, 0.5),
        vol: dice.between(0.05, 1.0),
        horizon: dice.between(0.05, 4.0),
        first: f64::NAN,
        second: f64::NAN,
    }
}

fn extreme_law(dice: &mut Dice) -> LawRow {
    LawRow {
        drift: dice.pick(&[-40.0, -1.0, -1e-9, 0.0, 1e-9, 1.0, 40.0]),
        vol: dice.pick(&[1e-3, 0.05, 1.0, 30.0]),
        horizon: dice.pick(&[1e-9, 1e-3, 1.0, 100.0, 1e4]),
        ..everyday_law(dice)
    }
}

/// A number that an argument of this name may be.
fn argument(name: &str, everyday: bool, dice: &mut Dice) -> f64 {
    match (name, everyday) {
        ("probability" | "uniform", true) => dice.between(0.01, 0.99),
        ("probability" | "uniform", false) => dice.pick(&[1e-300, 1e-17, 0.3, 0.5, 1.0 - 1e-16]),
        ("time", true) => dice.between(0.01, 4.0),
        ("time", false) => dice.pick(&[0.0, 1e-12, 0.5, 1e5]),
        (_, true) => dice.between(-1.0, 1.0),
        (_, false) => dice.pick(&[-100.0, -3.0, -1e-12, 0.0, 1e-12, 0.2, 3.0, 100.0]),
    }
}

/// Puts a number of the law out of its domain.
fn spoil(row: &mut LawRow, dice: &mut Dice) {
    match row.quantity.code() % 3 {
        0 => row.drift = dice.pick(&[f64::NAN, f64::INFINITY]),
        1 => row.vol = dice.pick(&[f64::NAN, -0.2]),
        _ => row.horizon = dice.pick(&[f64::NAN, -1.0, 0.0]),
    }
}

/// Puts the last argument out of its domain.
fn spoil_last(row: &mut LawRow) {
    let arguments = row.quantity.arguments();
    let bad = match arguments[arguments.len() - 1] {
        "probability" => 1.5,
        "uniform" => 0.0,
        "time" => -1.0,
        _ => f64::NAN,
    };
    if arguments.len() < 2 {
        row.first = bad;
    } else {
        row.second = bad;
    }
}
