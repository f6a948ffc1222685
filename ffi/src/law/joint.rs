//! The end point and an extreme together.

use crate::law::ask;

/// How likely does the motion end at or below terminal, its maximum at or below level?
///
/// Formula: P(W_T <= terminal, M_T <= level).
///
/// Domain: terminal and level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_joint_max_cdf(
    drift: f64,
    vol: f64,
    horizon: f64,
    terminal: f64,
    level: f64,
    value: *mut f64,
) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.joint_max_cdf(terminal, level)) }
}

/// How dense are the end point at terminal and the maximum at level together?
///
/// Formula: the joint density of (W_T, M_T); 0 where no path goes.
///
/// Domain: terminal and level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_joint_max_pdf(
    drift: f64,
    vol: f64,
    horizon: f64,
    terminal: f64,
    level: f64,
    value: *mut f64,
) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.joint_max_pdf(terminal, level)) }
}

/// How likely does the motion end at or below terminal, its minimum at or below level?
///
/// Formula: P(W_T <= terminal, m_T <= level).
///
/// Domain: terminal and level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_joint_min_cdf(
    drift: f64,
    vol: f64,
    horizon: f64,
    terminal: f64,
    level: f64,
    value: *mut f64,
) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.joint_min_cdf(terminal, level)) }
}

/// How dense are the end point at terminal and the minimum at level together?
///
/// Formula: the joint density of (W_T, m_T); 0 where no path goes.
///
/// Domain: terminal and level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
///
/// Errors: as floodmark_terminal_pdf.
///
/// # Safety
///
/// value is null, or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_joint_min_pdf(
    drift: f64,
    vol: f64,
    horizon: f64,
    terminal: f64,
    level: f64,
    value: *mut f64,
) -> i32 {
    // SAFETY: the caller's promise on `value`.
    unsafe { ask(value, drift, vol, horizon, |law| law.joint_min_pdf(terminal, level)) }
}
