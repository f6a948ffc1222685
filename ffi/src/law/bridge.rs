//! Given the end point.

use crate::law::ask;

/// How likely was level touched on the way to a known end point?
///
/// Formula: exp(-2 level (level - terminal) / (vol^2 horizon)); 1 where the end is at or beyond the level.
///
/// Domain: terminal and level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_bridge_crossing(
    drift: f64,
    vol: f64,
    horizon: f64,
    terminal: f64,
    level: f64,
    value: *mut f64,
) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.bridge_crossing(terminal, level)) }
}

/// How much more likely is a path to terminal under another drift?
///
/// Formula: dP_other/dP = exp(((other_drift - drift) terminal - (other_drift^2 - drift^2) horizon / 2) / vol^2).
///
/// Domain: terminal and other_drift from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_drift_weight(
    drift: f64,
    vol: f64,
    horizon: f64,
    terminal: f64,
    other_drift: f64,
    value: *mut f64,
) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.drift_weight(terminal, other_drift)) }
}
