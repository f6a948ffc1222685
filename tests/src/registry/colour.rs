//! The colours of errors.

use std::fmt::Write;

use floodmark::special::ln;

/// Where the colours begin and end, in powers of two of the error.
const COLOURS: [i32; 2] = [-2, 9];

/// What the colours mean, by powers of two.
pub(super) fn legend(svg: &mut String, left: f64, top: f64) {
    writeln!(svg, "<text x=\"{left}\" y=\"{}\" font-size=\"12\">error</text>", top - 10.0).expect("a String takes it");
    let height = 18.0;
    for power in COLOURS[0]..=COLOURS[1] {
        let error = 2.0_f64.powi(power);
        let y = top + f64::from(COLOURS[1] - power) * height;
        let colour = colour(error);
        let less = if power == COLOURS[0] { "≤ " } else { "" };
        writeln!(
            svg,
            "<rect x=\"{left}\" y=\"{y}\" width=\"14\" height=\"{height}\" fill=\"{colour}\"/>\
             <text x=\"{}\" y=\"{}\">{less}{error}</text>",
            left + 20.0,
            y + 13.0
        )
        .expect("a String takes it");
    }
}

/// From pale over orange to dark, evenly in the logarithm of the error.
pub(super) fn colour(error: f64) -> String {
    const STOPS: [[f64; 3]; 5] =
        [[255.0, 250.0, 230.0], [253.0, 205.0, 120.0], [240.0, 120.0, 60.0], [180.0, 35.0, 70.0], [50.0, 10.0, 60.0]];
    let share = (ln(error.max(f64::MIN_POSITIVE)) / std::f64::consts::LN_2 - f64::from(COLOURS[0]))
        / f64::from(COLOURS[1] - COLOURS[0]);
    let place = share.clamp(0.0, 1.0) * 4.0;
    let below = (1..4).filter(|stop| place >= f64::from(*stop)).count();
    let part = place - place.floor().min(3.0);
    let mixed: [String; 3] =
        std::array::from_fn(|i| format!("{:.0}", STOPS[below][i] * (1.0 - part) + STOPS[below + 1][i] * part));
    format!("rgb({})", mixed.join(","))
}
