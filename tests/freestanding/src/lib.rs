//! A program of nothing but the core.
//!
//! Its panic handler calls a function that does not exist. The linker drops what cannot be reached, so that the
//! program links only if no panic can be reached from `_start`, and `_start` reaches every public function of
//! the core, with inputs that the compiler cannot know.
#![no_std]

mod machine;
mod reach;
mod values;

unsafe extern "C" {
    /// Nowhere defined.
    fn floodmark_can_panic() -> !;
}

#[panic_handler]
fn panic(_: &core::panic::PanicInfo<'_>) -> ! {
    // SAFETY: a program in which this call remains does not link.
    unsafe { floodmark_can_panic() }
}

/// Where `_start` goes once the stack is aligned.
#[unsafe(no_mangle)]
extern "C" fn program() -> ! {
    reach::everything();
    values::values(&mut |bits| machine::write(&bits.to_le_bytes()));
    machine::exit()
}
