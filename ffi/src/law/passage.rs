//! The first time at a level.

use crate::law::ask;

/// How likely is level not touched by the horizon?
///
/// Formula: P(tau > horizon), with tau the first time at level; a level above 0 is watched from below, one below 0
/// from above; 0 for the level 0.
///
/// Domain: level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_survival(drift: f64, vol: f64, horizon: f64, level: f64, value: *mut f64) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.survival(level)) }
}

/// How dense is the first passage through level at time?
///
/// Formula: d/dtime P(tau <= time); the horizon plays no part.
///
/// Domain: level from -1e75 to 1e75, not 0; time at least 0, infinite allowed; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_first_passage_pdf(
    drift: f64,
    vol: f64,
    horizon: f64,
    level: f64,
    time: f64,
    value: *mut f64,
) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.first_passage_pdf(level, time)) }
}

/// How likely is level touched by time?
///
/// Formula: P(tau <= time); the horizon plays no part.
///
/// Domain: level from -1e75 to 1e75; time at least 0, infinite allowed; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_first_passage_cdf(
    drift: f64,
    vol: f64,
    horizon: f64,
    level: f64,
    time: f64,
    value: *mut f64,
) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.first_passage_cdf(level, time)) }
}

/// By when is level touched with this probability?
///
/// Formula: the time for which P(tau <= time) = probability; infinite where that is never reached.
///
/// Domain: level from -1e75 to 1e75; probability from 0 to 1; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_first_passage_quantile(
    drift: f64,
    vol: f64,
    horizon: f64,
    level: f64,
    probability: f64,
    value: *mut f64,
) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.first_passage_quantile(level, probability)) }
}

/// What is one unit worth that is paid when level is touched, if that is by the horizon?
///
/// Formula: E[exp(-discount_rate tau); tau <= horizon], for a discount_rate of any sign.
///
/// Domain: level and discount_rate from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_discounted_first_passage(
    drift: f64,
    vol: f64,
    horizon: f64,
    level: f64,
    discount_rate: f64,
    value: *mut f64,
) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.discounted_first_passage(level, discount_rate)) }
}
