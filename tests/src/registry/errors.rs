//! How far a number is off, and how errors are spread.

/// The distance from a number to the next larger one.
pub fn ulp(number: f64) -> f64 {
    let magnitude = number.abs();
    magnitude.next_up() - magnitude
}

/// The magnitude of a difference; none between equals, infinite if one is not a number.
pub fn difference(found: f64, exact: f64) -> f64 {
    let difference = (found - exact).abs();
    if found == exact {
        0.0
    } else if difference.is_nan() {
        f64::INFINITY
    } else {
        difference
    }
}

/// The same against a decimal number: the digits of both are subtracted, so a quarter of an ulp is seen.
///
/// # Panics
///
/// If the cell is not a number.
pub fn difference_to_decimal(found: f64, cell: &str) -> f64 {
    let exact: f64 = cell.parse().unwrap_or_else(|error| panic!("{cell}: {error}"));
    let whole = |number: f64| number == 0.0 || !number.is_finite();
    if whole(found) || whole(exact) || (found < 0.0) != (exact < 0.0) {
        return difference(found, exact);
    }
    let [(mine, mine_exponent), (theirs, theirs_exponent)] = [&format!("{found:.31e}"), cell].map(digits);
    // One unit of the last of DIGITS digits, of the number with the larger exponent.
    let exponent = mine_exponent.max(theirs_exponent);
    let aligned = |digits: u128, own: i32| match u32::try_from(exponent - own) {
        Ok(shift @ 0..=30) => digits / 10_u128.pow(shift),
        _ => 0,
    };
    let apart = aligned(mine, mine_exponent).abs_diff(aligned(theirs, theirs_exponent));
    #[allow(clippy::cast_precision_loss)]
    let relative = apart as f64 / aligned(theirs, theirs_exponent).max(1) as f64;
    relative * exact.abs()
}

const DIGITS: usize = 32;

/// The first `DIGITS` digits of a decimal number as an integer, and the power of ten of the first of them.
fn digits(text: &str) -> (u128, i32) {
    let (number, power) = text.split_once('e').unwrap_or((text, "0"));
    let power: i32 = power.parse().expect("an exponent");
    let number = number.trim_start_matches('-');
    let (whole, fraction) = number.split_once('.').unwrap_or((number, ""));
    let all = format!("{whole}{fraction}");
    let leading = all.len() - all.trim_start_matches('0').len();
    let significant: String = all[leading..].chars().chain("0".repeat(DIGITS).chars()).take(DIGITS).collect();
    let place = i32::try_from(whole.len()).expect("a short number") - i32::try_from(leading).expect("a short number");
    (significant.parse().expect("digits"), place - 1 + power)
}

/// Errors in order.
#[derive(Clone, Debug, Default)]
pub struct Spread(Vec<f64>);

impl Spread {
    /// Of errors in any order.
    pub fn of(mut errors: Vec<f64>) -> Spread {
        errors.sort_by(f64::total_cmp);
        Spread(errors)
    }

    /// How many errors there are.
    pub fn rows(&self) -> usize {
        self.0.len()
    }

    /// The largest.
    pub fn worst(&self) -> f64 {
        self.0.last().copied().unwrap_or(0.0)
    }

    /// The smallest that this share of them does not exceed.
    #[allow(clippy::cast_precision_loss, clippy::cast_possible_truncation, clippy::cast_sign_loss)]
    pub fn within(&self, share: f64) -> f64 {
        let rank = (share * self.0.len() as f64).ceil() as usize;
        self.0.get(rank.saturating_sub(1)).copied().unwrap_or(0.0)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_difference_to_a_decimal_number_sees_parts_of_an_ulp() {
        for (found, cell, ulps) in [
            (1.0, "1.0000000000000001110223024625156540423631668090820312", 0.5),
            (0.1, "0.1", 0.4),
            (-0.1, "-1e-1", 0.4),
            (1.0, "0.99999999999999988897769753748434595763683319091796875", 1.0),
            (-250.5, "-250.5", 0.0),
            (1e300, "1e300", 0.3531),
            (2.0, "1", 4503599627370496.0),
            (0.0, "0", 0.0),
        ] {
            let exact: f64 = cell.parse().unwrap();
            let measured = difference_to_decimal(found, cell) / ulp(exact);
            assert!((measured - ulps).abs() < 1e-3, "{found} and {cell}: {measured}");
        }
        assert_eq!(difference_to_decimal(f64::NAN, "1"), f64::INFINITY);
        assert_eq!(difference_to_decimal(f64::INFINITY, "inf"), 0.0);
        assert_eq!(difference_to_decimal(1.0, "-1"), 2.0);
    }

    #[test]
    fn a_spread_tells_its_largest_and_its_quantiles() {
        let spread = Spread::of((1..=1000).rev().map(f64::from).collect());
        assert_eq!([spread.worst(), spread.within(0.999), spread.within(0.5)], [1000.0, 999.0, 500.0]);
    }
}
