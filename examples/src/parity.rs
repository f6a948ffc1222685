//! In-out parity: a knock-in and a knock-out of the same payoff are together the payoff without a barrier.

use floodmark::batch::{self, Book, Column, ColumnMut};
use floodmark::terms::{Contract, Knock, RebatePaid};

use crate::block::{ROWS, book};
use crate::field::Field;

/// The knock contracts of a block once more, each three times: as it is, as its mirror, and without a barrier,
/// all without a rebate, and each priced for itself.
#[derive(Default)]
pub(crate) struct Parity {
    /// For each row of the block, its place below.
    places: Vec<Option<usize>>,
    contract: [Vec<u8>; 3],
    numbers: [Vec<f64>; Field::NUMBERS.len()],
    value: [Vec<f64>; 3],
    status: Vec<i32>,
}

impl Parity {
    /// Prices the knock contracts among these rows of a block.
    pub(crate) fn check(
        &mut self,
        rows: impl Iterator<Item = usize>,
        contract: &[u8],
        numbers: &[Vec<f64>; Field::NUMBERS.len()],
    ) -> floodmark::Result<()> {
        self.take(rows, contract, numbers);
        let rows = self.numbers[0].len();
        self.status.resize(rows, 0);
        let natural = Column::broadcast(&RebatePaid::NATURAL_CODE);
        for (contract, value) in self.contract.iter().zip(&mut self.value) {
            value.resize(rows, 0.0);
            let book = Book { rebate: Column::broadcast(&0.0), ..book(contract, natural, &self.numbers, rows) };
            batch::price(&book, &mut ColumnMut::from_slice(value), &mut ColumnMut::from_slice(&mut self.status))?;
        }
        Ok(())
    }

    fn take(&mut self, rows: impl Iterator<Item = usize>, contract: &[u8], numbers: &[Vec<f64>]) {
        self.places.clear();
        self.places.resize(ROWS, None);
        self.contract.iter_mut().for_each(Vec::clear);
        self.numbers.iter_mut().for_each(Vec::clear);
        for row in rows {
            let Some(three) = three_of(contract[row]) else { continue };
            self.places[row] = Some(self.numbers[0].len());
            for (column, contract) in self.contract.iter_mut().zip(three) {
                column.push(contract.code());
            }
            for (column, source) in self.numbers.iter_mut().zip(numbers) {
                column.push(source[row]);
            }
        }
    }

    /// `|knock-in + knock-out - vanilla| / spot` of a row of the block, if it is a knock contract.
    /// NaN where one of the three is beyond the range of binary64.
    pub(crate) fn residual(&self, row: usize) -> Option<f64> {
        let place = self.places[row]?;
        let [this, mirror, vanilla] = self.value.each_ref().map(|value| value[place]);
        Some((this + mirror - vanilla).abs() / self.numbers[0][place])
    }
}

/// A knock contract, its mirror, and its payoff without a barrier.
fn three_of(code: u8) -> Option<[Contract; 3]> {
    let Ok(contract @ Contract::Knock(direction, knock, payoff)) = Contract::from_code(code) else { return None };
    let mirror = match knock {
        Knock::In => Knock::Out,
        Knock::Out => Knock::In,
    };
    Some([contract, Contract::Knock(direction, mirror, payoff), Contract::Vanilla(payoff)])
}
