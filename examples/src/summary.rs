//! What a trader wants to know of a whole book, kept in constant memory while its rows go by.

use std::collections::BTreeMap;
use std::fmt;

use floodmark::price::Greeks;

use crate::block::Valued;
use crate::refusal::Rule;

/// How many of the rows nearest their barrier are listed.
const NEAREST: usize = 8;
/// How many of the refused rows are listed one by one; the rest is counted by reason.
const LISTED: usize = 5;

/// The sums, extremes and refusals of a book.
#[derive(Debug, Default)]
pub struct Summary {
    /// How many rows the book has.
    pub rows: u64,
    /// Columns of the book that are not read.
    unread: Vec<String>,
    totals: [Total; Greeks::NAMES.len()],
    touched: u64,
    nearest: Vec<Standing>,
    refusals: BTreeMap<Rule, u64>,
    first_refused: Vec<(Place, String)>,
    knocks: u64,
    unchecked: u64,
    worst: Option<Worst>,
}

/// Where a row stands in the book.
#[derive(Debug)]
struct Place {
    line: u64,
    id: String,
}

/// A row against its barrier.
#[derive(Debug)]
struct Standing {
    place: Place,
    contract: String,
    spot: f64,
    barrier: f64,
    distance: f64,
    touch_probability: f64,
}

/// The row that keeps in-out parity worst.
#[derive(Debug)]
struct Worst {
    residual: f64,
    place: Place,
    contract: String,
}

/// A sum that does not lose small terms among large ones, however many there are (Neumaier, 1974).
#[derive(Clone, Copy, Debug, Default)]
struct Total {
    sum: f64,
    lost: f64,
}

impl Total {
    fn add(&mut self, term: f64) {
        let sum = self.sum + term;
        self.lost += if self.sum.abs() >= term.abs() { (self.sum - sum) + term } else { (term - sum) + self.sum };
        self.sum = sum;
    }

    fn value(self) -> f64 {
        // An infinite term leaves NaN among what was lost.
        if self.sum.is_finite() { self.sum + self.lost } else { self.sum }
    }
}

impl Summary {
    /// A summary of no rows yet, of a book that has these columns besides those that are read.
    pub(crate) fn of_book_with(unread: Vec<String>) -> Summary {
        Summary { unread, ..Summary::default() }
    }

    /// How many rows were refused.
    pub fn refused(&self) -> u64 {
        self.refusals.values().sum()
    }

    /// The worst `|knock-in + knock-out - vanilla| / spot`, if the book has a knock contract.
    pub fn worst_parity_residual(&self) -> Option<f64> {
        self.worst.as_ref().map(|worst| worst.residual)
    }

    /// Takes a row into account.
    pub(crate) fn add(&mut self, row: &Valued<'_>) {
        self.rows += 1;
        if let Some(refusal) = row.refusal {
            *self.refusals.entry(refusal.rule).or_default() += 1;
            if self.first_refused.len() < LISTED {
                self.first_refused.push((Place::of(row), refusal.to_string()));
            }
            return;
        }
        for (total, number) in self.totals.iter_mut().zip(row.greeks) {
            total.add(number);
        }
        if row.distance == 0.0 {
            self.touched += 1;
        } else if row.distance.is_finite() {
            self.keep_if_near(row);
        }
        if let Some(residual) = row.parity {
            self.knocks += 1;
            if residual.is_nan() {
                self.unchecked += 1;
            } else if self.worst.as_ref().is_none_or(|worst| residual > worst.residual) {
                self.worst = Some(Worst { residual, place: Place::of(row), contract: text(row.contract) });
            }
        }
    }

    fn keep_if_near(&mut self, row: &Valued<'_>) {
        let at = self.nearest.partition_point(|other| other.distance <= row.distance);
        if at == NEAREST {
            return;
        }
        let standing = Standing {
            place: Place::of(row),
            contract: text(row.contract),
            spot: row.spot,
            barrier: row.barrier,
            distance: row.distance,
            touch_probability: row.touch_probability,
        };
        self.nearest.insert(at, standing);
        self.nearest.truncate(NEAREST);
    }
}

impl Place {
    fn of(row: &Valued<'_>) -> Place {
        Place { line: row.line, id: text(row.id) }
    }
}

fn text(bytes: &[u8]) -> String {
    String::from_utf8_lossy(bytes).into_owned()
}

impl fmt::Display for Summary {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        let refused = self.refused();
        writeln!(f, "{} rows: {} valued, {refused} refused", self.rows, self.rows - refused)?;
        if !self.unread.is_empty() {
            writeln!(f, "columns not read: {}", self.unread.join(", "))?;
        }
        writeln!(f, "\nTotals of the rows valued")?;
        for (name, total) in Greeks::NAMES.into_iter().zip(self.totals) {
            writeln!(f, "  {name:<13} {:>20}", readable(total.value()))?;
        }
        self.write_nearest(f)?;
        self.write_parity(f)?;
        self.write_refusals(f)
    }
}

impl Summary {
    fn write_nearest(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        if self.touched > 0 {
            writeln!(f, "\nRows that stand at or beyond their barrier: {}", self.touched)?;
        }
        if self.nearest.is_empty() {
            return Ok(());
        }
        writeln!(f, "\nRows nearest their barrier, in standard deviations to expiry")?;
        writeln!(
            f,
            "  {:>8}  {:<16} {:<24} {:>12} {:>12} {:>9} {:>10}",
            "line", "id", "contract", "spot", "barrier", "distance", "P(touch)"
        )?;
        for row in &self.nearest {
            let Standing { place: Place { line, id }, contract, spot, barrier, distance, touch_probability } = row;
            writeln!(
                f,
                "  {line:>8}  {id:<16} {contract:<24} {spot:>12} {barrier:>12} {distance:>9.4} {touch_probability:>10.4}"
            )?;
        }
        Ok(())
    }

    fn write_parity(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        if let Some(Worst { residual, place: Place { line, id }, contract }) = &self.worst {
            writeln!(
                f,
                "\nIn-out parity of {} knock rows, each priced as knock-in, knock-out and vanilla",
                self.knocks
            )?;
            writeln!(f, "  worst residual {residual:.1e} of spot, on line {line}: {id}, {contract}")?;
        }
        if self.unchecked > 0 {
            writeln!(f, "  not checked for lack of range: {} rows", self.unchecked)?;
        }
        Ok(())
    }

    fn write_refusals(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        if self.refusals.is_empty() {
            return Ok(());
        }
        writeln!(f, "\nRefused")?;
        for (rule, count) in &self.refusals {
            writeln!(f, "  {count:>8}  {rule}")?;
        }
        writeln!(f, "the first of them")?;
        for (Place { line, id }, sentence) in &self.first_refused {
            writeln!(f, "  line {line}: {id}: {sentence}")?;
        }
        Ok(())
    }
}

/// Four decimals, or an exponent where those would be too many digits or too few.
fn readable(number: f64) -> String {
    let size = number.abs();
    if size == 0.0 || (1e-2..1e13).contains(&size) { format!("{number:.4}") } else { format!("{number:.4e}") }
}
