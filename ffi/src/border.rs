//! What every function does at the border: refuse null, write on success only, let no unwinding out.

use std::panic::{AssertUnwindSafe, catch_unwind};

use floodmark::{Error, Result, Status};

/// What a call that was handed a null pointer says.
pub(crate) const NULL: Error = Error { status: Status::NullPointer, value: 0.0 };

/// The status number of a call. A panic, of which none is known, becomes [`Status::Internal`].
pub(crate) fn guarded(call: impl FnOnce() -> Result<()>) -> i32 {
    match catch_unwind(AssertUnwindSafe(call)) {
        Ok(Ok(())) => Status::Ok.code(),
        Ok(Err(error)) => error.status.code(),
        Err(fault) => {
            // Dropping a foreign payload could panic anew, this time through the border.
            std::mem::forget(fault);
            Status::Internal.code()
        }
    }
}

/// Writes the answer of a call if there is one.
///
/// # Safety
///
/// `out` is null, or aligned and writable.
pub(crate) unsafe fn answer<T>(out: *mut T, call: impl FnOnce() -> Result<T>) -> i32 {
    guarded(|| {
        if out.is_null() {
            return Err(NULL);
        }
        let found = call()?;
        // SAFETY: `out` is not null, so by the caller's promise it is aligned and writable.
        unsafe { out.write(found) };
        Ok(())
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_panic_becomes_a_status_and_leaves_the_output_alone() {
        let mut out = 7.0;
        // SAFETY: `out` is a local variable.
        let status = unsafe { answer(&raw mut out, || panic!("planted")) };
        assert_eq!((status, out), (102, 7.0));
    }

    #[test]
    fn an_error_leaves_the_output_alone_and_null_is_refused_before_the_call() {
        let mut out = 7.0;
        // SAFETY: `out` is a local variable.
        let status = unsafe { answer(&raw mut out, || Err(Error { status: Status::Vol, value: -1.0 })) };
        assert_eq!((status, out), (15, 7.0));
        // SAFETY: null is allowed.
        let status = unsafe { answer(std::ptr::null_mut::<f64>(), || unreachable!()) };
        assert_eq!(status, 100);
    }
}
