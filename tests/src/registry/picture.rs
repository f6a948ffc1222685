//! The fast path's error over the distance to the barrier and the total volatility, as a picture.

use std::sync::Mutex;
use std::sync::atomic::{AtomicUsize, Ordering};

use floodmark::special::exp;
use floodmark::terms::{Contract, Direction, Market, RebatePaid, TermSheet};

use crate::registry::colour::{colour, legend};
use crate::registry::prices;
use crate::registry::random::Random;

/// Powers of ten of the distance to the barrier in standard deviations, and of the total volatility.
const DISTANCE: [i32; 2] = [-8, 1];
const DEVIATION: [i32; 2] = [-6, 1];
const COLUMNS: u8 = 36;
const ROWS: u8 = 28;
/// Times that each contract comes in one cell.
const EACH: u8 = 1;
const CELL: f64 = 10.0;
const TOP: f64 = 64.0;

/// The largest error in a cell, in units of the last place and in conditioned units.
type Cell = (f64, f64);

/// The picture as SVG.
///
/// # Panics
///
/// If a price is refused or out of its bound.
pub fn picture() -> String {
    let cells = cells();
    let width = 2.0 * f64::from(COLUMNS) * CELL + 250.0;
    let height = f64::from(ROWS) * CELL + 124.0;
    let mut svg = format!(
        "<svg xmlns=\"http://www.w3.org/2000/svg\" viewBox=\"0 0 {width} {height}\" width=\"{width}\" height=\"{height}\" \
         font-family=\"sans-serif\" font-size=\"11\" fill=\"#222\">\n\
         <rect width=\"{width}\" height=\"{height}\" fill=\"#fff\"/>\n\
         <text x=\"60\" y=\"22\" font-size=\"14\">Largest error of the fast path's price among all contracts, by where \
         the spot stands</text>\n"
    );
    let second = 60.0 + f64::from(COLUMNS) * CELL + 60.0;
    panel(&mut svg, 60.0, "in units of the last place (ulp)", cells.iter().map(|cell| cell.0));
    panel(&mut svg, second, "in conditioned units", cells.iter().map(|cell| cell.1));
    legend(&mut svg, second + f64::from(COLUMNS) * CELL + 24.0, TOP);
    svg.push_str("</svg>\n");
    svg
}

/// Row by row from the largest total volatility.
fn cells() -> Vec<Cell> {
    let count = usize::from(ROWS) * usize::from(COLUMNS);
    let (next, found) = (AtomicUsize::new(0), Mutex::new(vec![(0.0, 0.0); count]));
    let work = || {
        loop {
            let index = next.fetch_add(1, Ordering::Relaxed);
            if index >= count {
                break;
            }
            let worst = cell(index / usize::from(COLUMNS), index % usize::from(COLUMNS));
            found.lock().expect("no worker has panicked")[index] = worst;
        }
    };
    std::thread::scope(|scope| {
        for _ in 0..std::thread::available_parallelism().map_or(1, std::num::NonZero::get) {
            scope.spawn(work);
        }
    });
    found.into_inner().expect("no worker has panicked")
}

#[allow(clippy::cast_precision_loss)]
fn cell(row: usize, column: usize) -> Cell {
    let mut random = Random::named(&format!("picture {row} {column}"));
    let within = |[low, high]: [i32; 2], place: f64, count: u8| {
        f64::from(low) + f64::from(high - low) * place / f64::from(count)
    };
    let mut worst = (0.0_f64, 0.0_f64);
    for code in (0..Contract::COUNT).cycle().take(usize::from(EACH) * usize::from(Contract::COUNT)) {
        let contract = Contract::from_code(code).expect("a code below the count");
        let Some(direction) = contract.direction() else { continue };
        let up = within(DEVIATION, (usize::from(ROWS) - 1 - row) as f64 + random.unit(), ROWS);
        let across = within(DISTANCE, column as f64 + random.unit(), COLUMNS);
        let (deviation, distance) = (power_of_ten(up), power_of_ten(across));
        let side = if direction == Direction::Up { 1.0 } else { -1.0 };
        let expiry = random.scale(0.02, 10.0);
        let spot = random.scale(1.0, 1000.0);
        let market = Market {
            spot,
            vol: deviation / expiry.sqrt(),
            // The drift is at most of the size of the motion.
            rate: random.between(-0.1, 0.1) * (deviation / expiry).min(1.0),
            dividend: random.between(-0.1, 0.1) * (deviation / expiry).min(1.0),
        };
        let sheet = TermSheet::new(contract, expiry)
            .strike(spot * exp(random.between(-2.0, 2.0) * deviation.min(1.0)))
            .barrier(spot * exp(side * distance * deviation))
            .rebate(0.1 * spot, if contract.pays_at_hit() { RebatePaid::Hit } else { RebatePaid::Expiry });
        if let Some((sample, _)) = prices::sample(&sheet, &market) {
            worst = (worst.0.max(sample.in_ulp()), worst.1.max(sample.in_conditioned_units()));
        }
    }
    worst
}

fn power_of_ten(power: f64) -> f64 {
    exp(power * std::f64::consts::LN_10)
}

/// One heat map with its title and axes.
fn panel(svg: &mut String, left: f64, title: &str, errors: impl Iterator<Item = f64>) {
    let (width, height) = (f64::from(COLUMNS) * CELL, f64::from(ROWS) * CELL);
    let bottom = TOP + height;
    let mut put = |text: String| svg.push_str(&text);
    put(format!("<text x=\"{left}\" y=\"{}\" font-size=\"12\">{title}</text>\n<g stroke=\"none\">\n", TOP - 10.0));
    let places = (0..ROWS).flat_map(|row| (0..COLUMNS).map(move |column| (row, column)));
    for ((row, column), error) in places.zip(errors) {
        let (x, y) = (left + f64::from(column) * CELL, TOP + f64::from(row) * CELL);
        put(format!("<rect x=\"{x}\" y=\"{y}\" width=\"10\" height=\"10\" fill=\"{}\"/>\n", colour(error)));
    }
    put("</g>\n".to_owned());
    put(format!(
        "<rect x=\"{left}\" y=\"{TOP}\" width=\"{width}\" height=\"{height}\" fill=\"none\" stroke=\"#222\"/>\n"
    ));
    for power in DISTANCE[0]..=DISTANCE[1] {
        let x = left + width * f64::from(power - DISTANCE[0]) / f64::from(DISTANCE[1] - DISTANCE[0]);
        put(tick(x, bottom, x, bottom + 5.0));
        put(label(x, bottom + 18.0, "middle", power));
    }
    for power in DEVIATION[0]..=DEVIATION[1] {
        let y = bottom - height * f64::from(power - DEVIATION[0]) / f64::from(DEVIATION[1] - DEVIATION[0]);
        put(tick(left - 5.0, y, left, y));
        put(label(left - 8.0, y + 4.0, "end", power));
    }
    put(format!(
        "<text x=\"{}\" y=\"{}\" text-anchor=\"middle\">distance to the barrier, in standard deviations</text>\n",
        left + width / 2.0,
        bottom + 40.0
    ));
    let middle = TOP + height / 2.0;
    put(format!(
        "<text transform=\"translate({} {middle}) rotate(-90)\" text-anchor=\"middle\">total volatility, vol × √expiry\
         </text>\n",
        left - 40.0
    ));
}

fn tick(x: f64, y: f64, to_x: f64, to_y: f64) -> String {
    format!("<line x1=\"{x:.1}\" y1=\"{y:.1}\" x2=\"{to_x:.1}\" y2=\"{to_y:.1}\" stroke=\"#222\"/>\n")
}

fn label(x: f64, y: f64, anchor: &str, power: i32) -> String {
    let text = match power {
        0 => "1".to_owned(),
        1 => "10".to_owned(),
        power => format!("10⁻{}", ['⁰', '¹', '²', '³', '⁴', '⁵', '⁶', '⁷', '⁸', '⁹'][power.unsigned_abs() as usize]),
    };
    format!("<text x=\"{x:.1}\" y=\"{y:.1}\" text-anchor=\"{anchor}\">{text}</text>\n")
}
