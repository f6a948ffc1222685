//! Exact draws from uniform numbers of the caller's.

use crate::law::ask;

/// Which end point does this uniform number draw?
///
/// Formula: drift horizon + vol sqrt(horizon) N^-1(uniform).
///
/// Domain: uniform strictly between 0 and 1; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_sample_terminal(
    drift: f64,
    vol: f64,
    horizon: f64,
    uniform: f64,
    value: *mut f64,
) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.sample_terminal(uniform)) }
}

/// Which maximum does this uniform number draw, given the end point?
///
/// Formula: (terminal + sqrt(terminal^2 - 2 s^2 ln(uniform))) / 2, s = vol sqrt(horizon).
///
/// Domain: terminal from -1e75 to 1e75; uniform strictly between 0 and 1; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_sample_max(
    drift: f64,
    vol: f64,
    horizon: f64,
    terminal: f64,
    uniform: f64,
    value: *mut f64,
) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.sample_max(terminal, uniform)) }
}

/// Which minimum does this uniform number draw, given the end point?
///
/// Formula: (terminal - sqrt(terminal^2 - 2 s^2 ln(uniform))) / 2, s = vol sqrt(horizon).
///
/// Domain: terminal from -1e75 to 1e75; uniform strictly between 0 and 1; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_sample_min(
    drift: f64,
    vol: f64,
    horizon: f64,
    terminal: f64,
    uniform: f64,
    value: *mut f64,
) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.sample_min(terminal, uniform)) }
}
