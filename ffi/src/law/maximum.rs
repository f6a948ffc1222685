//! The running maximum.

use crate::law::ask;

/// How dense is the running maximum M_T at level?
///
/// Formula: d/dlevel P(M_T <= level); 0 on the side of the start where the maximum cannot be.
///
/// Domain: level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_max_pdf(drift: f64, vol: f64, horizon: f64, level: f64, value: *mut f64) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.max_pdf(level)) }
}

/// How likely does the running maximum stay at or below level?
///
/// Formula: P(M_T <= level).
///
/// Domain: level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_max_cdf(drift: f64, vol: f64, horizon: f64, level: f64, value: *mut f64) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.max_cdf(level)) }
}

/// How likely does the running maximum reach or lie above level?
///
/// Formula: P(M_T >= level), not formed as 1 - P(M_T <= level).
///
/// Domain: level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_max_tail(drift: f64, vol: f64, horizon: f64, level: f64, value: *mut f64) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.max_tail(level)) }
}

/// Below which level does the running maximum stay with this probability?
///
/// Formula: the level for which P(M_T <= level) = probability; 0 at 0, infinite at 1.
///
/// Domain: probability from 0 to 1; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_max_quantile(
    drift: f64,
    vol: f64,
    horizon: f64,
    probability: f64,
    value: *mut f64,
) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.max_quantile(probability)) }
}
