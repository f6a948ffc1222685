//! Texts: contracts as a book writes them, statuses as sentences, the version.

use std::ffi::{CStr, c_char};

use floodmark::terms::{Contract, RebatePaid};
use floodmark::{Error, Result, Status};

use crate::border::{NULL, answer, guarded};

/// The version of the library that is linked, as MAJOR.MINOR.PATCH; to be compared with FLOODMARK_VERSION, the
/// version of the header. Never null, never to be freed.
#[unsafe(no_mangle)]
pub extern "C" fn floodmark_version() -> *const c_char {
    concat!(env!("CARGO_PKG_VERSION"), "\0").as_ptr().cast()
}

/// Which contract is this text? "call", "up-and-out cash put", "down one-touch", ... as in a book.
///
/// Errors: FLOODMARK_STATUS_CONTRACT if the text is no contract; FLOODMARK_STATUS_NULL_POINTER.
///
/// # Safety
///
/// text is null or ends in a NUL; contract is null or writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_contract_code(text: *const c_char, contract: *mut u8) -> i32 {
    // SAFETY: the caller's promise on `text` and `contract`.
    unsafe {
        answer(contract, || {
            let unknown = Error { status: Status::Contract, value: f64::NAN };
            read(text)?.and_then(Contract::parse).map(Contract::code).ok_or(unknown)
        })
    }
}

/// When is the rebate paid, by this text? "hit", "expiry", or "" for what is natural.
///
/// Errors: FLOODMARK_STATUS_REBATE_PAID if the text is none of these; FLOODMARK_STATUS_NULL_POINTER.
///
/// # Safety
///
/// text is null or ends in a NUL; rebate_paid is null or writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_rebate_paid_code(text: *const c_char, rebate_paid: *mut u8) -> i32 {
    // SAFETY: the caller's promise on `text` and `rebate_paid`.
    unsafe {
        answer(rebate_paid, || {
            let unknown = Error { status: Status::RebatePaid, value: f64::NAN };
            match read(text)?.ok_or(unknown)? {
                "" => Ok(RebatePaid::NATURAL_CODE),
                choice => RebatePaid::parse(choice).map(RebatePaid::code).ok_or(unknown),
            }
        })
    }
}

/// What is the text of this contract? buffer receives it with a NUL at its end, needed the size of both.
///
/// Either of buffer and needed may be null: to ask for the size alone, or where the size is known.
///
/// Errors: FLOODMARK_STATUS_CONTRACT if the code is no contract; FLOODMARK_STATUS_COLUMN_LENGTH if capacity is less
/// than the size (needed is then written, buffer is not); FLOODMARK_STATUS_NULL_POINTER if both are null.
///
/// # Safety
///
/// buffer is null or has capacity writable bytes; needed is null or aligned and writable.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_contract_text(
    contract: u8,
    buffer: *mut c_char,
    capacity: usize,
    needed: *mut usize,
) -> i32 {
    // SAFETY: the caller's promise on `buffer` and `needed`.
    guarded(|| unsafe { hand_over(&Contract::from_code(contract)?.to_string(), buffer, capacity, needed) })
}

/// What does this status say? The rule alone: "vol must be from 0 to 1000".
///
/// A number that is no status has a sentence too. buffer, capacity, needed and the errors about them: as
/// floodmark_contract_text.
///
/// # Safety
///
/// As floodmark_contract_text.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_status_text(
    status: i32,
    buffer: *mut c_char,
    capacity: usize,
    needed: *mut usize,
) -> i32 {
    let sentence = || Status::from_code(status).map_or_else(|| unknown(status), |known| known.rule().to_owned());
    // SAFETY: the caller's promise on `buffer` and `needed`.
    guarded(|| unsafe { hand_over(&sentence(), buffer, capacity, needed) })
}

/// What does this status say about the value that was given? "vol must be from 0 to 1000, got -0.2".
///
/// The value is left out where the status does not speak of one. buffer, capacity, needed and the errors about them:
/// as floodmark_contract_text.
///
/// # Safety
///
/// As floodmark_contract_text.
#[unsafe(no_mangle)]
pub unsafe extern "C" fn floodmark_status_sentence(
    status: i32,
    value: f64,
    buffer: *mut c_char,
    capacity: usize,
    needed: *mut usize,
) -> i32 {
    let sentence = || match Status::from_code(status) {
        Some(status) => Error { status, value }.to_string(),
        None => unknown(status),
    };
    // SAFETY: the caller's promise on `buffer` and `needed`.
    guarded(|| unsafe { hand_over(&sentence(), buffer, capacity, needed) })
}

fn unknown(status: i32) -> String {
    format!("status {status} is not one that is known")
}

/// The text at an address; none if it is not UTF-8, which no text of ours is without.
///
/// # Safety
///
/// `text` is null or ends in a NUL.
unsafe fn read<'a>(text: *const c_char) -> Result<Option<&'a str>> {
    if text.is_null() {
        return Err(NULL);
    }
    // SAFETY: not null, so it ends in a NUL by the caller's promise.
    Ok(unsafe { CStr::from_ptr(text) }.to_str().ok())
}

/// Copies a text and its NUL into a buffer of the caller's, if it fits.
///
/// # Safety
///
/// As [`floodmark_contract_text`].
unsafe fn hand_over(text: &str, buffer: *mut c_char, capacity: usize, needed: *mut usize) -> Result<()> {
    let size = text.len() + 1;
    if buffer.is_null() && needed.is_null() {
        return Err(NULL);
    }
    if !needed.is_null() {
        // SAFETY: not null, so aligned and writable by the caller's promise.
        unsafe { needed.write(size) };
    }
    if buffer.is_null() {
        return Ok(());
    }
    if capacity < size {
        return Err(Error { status: Status::ColumnLength, value: 0.0 });
    }
    // SAFETY: `buffer` has `capacity` writable bytes, at least `size`; `text` is memory of ours and apart from it.
    unsafe {
        buffer.copy_from_nonoverlapping(text.as_ptr().cast(), text.len());
        buffer.add(text.len()).write(0);
    }
    Ok(())
}
