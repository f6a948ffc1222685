//! The running minimum.

use crate::law::ask;

/// How dense is the running minimum m_T at level?
///
/// Formula: d/dlevel P(m_T <= level); 0 on the side of the start where the minimum cannot be.
///
/// Domain: level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_min_pdf(drift: f64, vol: f64, horizon: f64, level: f64, value: *mut f64) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.min_pdf(level)) }
}

/// How likely does the running minimum stay at or below level?
///
/// Formula: P(m_T <= level).
///
/// Domain: level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_min_cdf(drift: f64, vol: f64, horizon: f64, level: f64, value: *mut f64) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.min_cdf(level)) }
}

/// How likely does the running minimum stay at or above level?
///
/// Formula: P(m_T >= level), not formed as 1 - P(m_T <= level).
///
/// Domain: level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_min_tail(drift: f64, vol: f64, horizon: f64, level: f64, value: *mut f64) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.min_tail(level)) }
}

/// Below which level does the running minimum stay with this probability?
///
/// Formula: the level for which P(m_T <= level) = probability; minus infinity at 0, 0 at 1.
///
/// Domain: probability from 0 to 1; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_min_quantile(
    drift: f64,
    vol: f64,
    horizon: f64,
    probability: f64,
    value: *mut f64,
) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.min_quantile(probability)) }
}
