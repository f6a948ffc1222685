//! Errors in units of the last place against decimals with more digits than a binary64 holds.

/// How many digits of a decimal count.
const DIGITS: usize = 26;

/// The first digits of a decimal as a whole number, and the power of ten that it is to be multiplied by.
fn whole(text: &str) -> (i128, i32) {
    let (mantissa, exponent) = text.split_once('e').unwrap_or((text, "0"));
    let (sign, mantissa) = mantissa.strip_prefix('-').map_or((1, mantissa), |rest| (-1, rest));
    let (before, after) = mantissa.split_once('.').unwrap_or((mantissa, ""));
    let mut digits = format!("{before}{after}").trim_start_matches('0').to_owned();
    let mut scale = exponent.parse::<i32>().expect(text) - i32::try_from(after.len()).unwrap();
    while digits.len() < DIGITS {
        digits.push('0');
        scale -= 1;
    }
    scale += i32::try_from(digits.len() - DIGITS).unwrap();
    (sign * digits[..DIGITS].parse::<i128>().expect(text), scale)
}

/// The error of a number against a decimal, as a share of the decimal.
pub(crate) fn relative_error(found: f64, decimal: &str) -> f64 {
    let nearest: f64 = decimal.parse().expect(decimal);
    if nearest == 0.0 || !nearest.is_finite() {
        return if found == nearest { 0.0 } else { f64::INFINITY };
    }
    // The nearest number is close to both, so that differences from it are small or exact.
    let (wanted, scale) = whole(decimal);
    let (mut near, near_scale) = whole(&format!("{nearest:.40e}"));
    match near_scale - scale {
        0 => {}
        1 => near *= 10,
        -1 => near /= 10,
        _ => panic!("{nearest:e} is not near {decimal}"),
    }
    #[allow(clippy::cast_precision_loss)]
    let rounding = (near - wanted) as f64 / wanted as f64;
    let difference = if found.is_finite() { (found - nearest) / nearest } else { f64::INFINITY };
    (difference + rounding).abs()
}

/// The error in units of the last place of the number that is nearest to the decimal; in the subnormal range that
/// unit stays what it is.
pub(crate) fn ulps(found: f64, decimal: &str) -> f64 {
    let nearest = decimal.parse::<f64>().expect(decimal).abs();
    if nearest == 0.0 {
        return found.abs() / f64::from_bits(1);
    }
    if !nearest.is_finite() {
        return relative_error(found, decimal);
    }
    let relative = relative_error(found, decimal);
    let up = f64::from_bits(nearest.to_bits() + 1) - nearest;
    relative * (nearest / up)
}
