//! The end point.

use crate::law::ask;

/// How dense is the end point W_T at terminal?
///
/// Formula: the density of the normal law with mean drift horizon and deviation vol sqrt(horizon).
///
/// Domain: terminal from -1e75 to 1e75; drift from -1e75 to 1e75; vol and horizon from 1e-75 to 1e75.
///
/// Errors: the status of the first input out of its domain; FLOODMARK_STATUS_OVERFLOW where the answer is beyond
/// binary64; FLOODMARK_STATUS_NULL_POINTER if value is null. value is then left alone.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_terminal_pdf(
    drift: f64,
    vol: f64,
    horizon: f64,
    terminal: f64,
    value: *mut f64,
) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.terminal_pdf(terminal)) }
}

/// How likely does the motion end at or below terminal?
///
/// Formula: P(W_T <= terminal).
///
/// Domain: terminal from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_terminal_cdf(
    drift: f64,
    vol: f64,
    horizon: f64,
    terminal: f64,
    value: *mut f64,
) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.terminal_cdf(terminal)) }
}

/// Below which point does the motion end with this probability?
///
/// Formula: the terminal for which P(W_T <= terminal) = probability; infinite for 0 and 1.
///
/// Domain: probability from 0 to 1; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_terminal_quantile(
    drift: f64,
    vol: f64,
    horizon: f64,
    probability: f64,
    value: *mut f64,
) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.terminal_quantile(probability)) }
}
