//! The reference path: the same formulas in double-double, rounded once at the end.

use crate::error::Result;
use crate::num::{DoubleDouble, Real};
use crate::price::Greeks;
use crate::price::valuation::{parts, representable};
use crate::terms::{Market, TermSheet};

/// What a contract is worth now, correct to the last place: the oracle for audits and tests.
///
/// # Formula
///
/// As [`crate::price::price`], for the exact binary inputs: every operation in double-double (some 31 digits),
/// and where a sum of terms would still lose too many of those, an integral with a positive integrand.
///
/// # Errors
///
/// As [`crate::price::price`].
pub fn reference_price(sheet: &TermSheet, market: &Market) -> Result<f64> {
    let (legs, setting, levels) = parts::<DoubleDouble>(sheet, market)?;
    let value = (legs[0].value(&setting, &levels) + legs[1].value(&setting, &levels)).nearest();
    representable(value, value)
}

/// What a contract is worth now and every sensitivity of that worth, from the reference path.
///
/// # Errors
///
/// As [`crate::price::price`].
pub fn reference_greeks(sheet: &TermSheet, market: &Market) -> Result<Greeks> {
    let (legs, setting, levels) = parts::<DoubleDouble>(sheet, market)?;
    let sum = legs[0].sensitivity(&setting, &levels) + legs[1].sensitivity(&setting, &levels);
    let greeks = sum.greeks(market.spot, sheet.barrier);
    representable(greeks.value, greeks)
}
