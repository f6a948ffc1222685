//! What an operating system and a C library would otherwise bring along.

use core::arch::{asm, global_asm};

#[cfg(not(all(target_os = "linux", any(target_arch = "x86_64", target_arch = "aarch64"))))]
compile_error!("the freestanding program knows the system calls of Linux on x86-64 and aarch64 only");

#[cfg(target_arch = "x86_64")]
global_asm!(".globl _start", "_start:", "xor ebp, ebp", "and rsp, -16", "call program");

#[cfg(target_arch = "aarch64")]
global_asm!(".globl _start", "_start:", "mov x29, #0", "bl program");

/// Writes to standard output.
pub(crate) fn write(bytes: &[u8]) {
    const OUT: usize = 1;
    #[cfg(target_arch = "x86_64")]
    const WRITE: usize = 1;
    #[cfg(target_arch = "aarch64")]
    const WRITE: usize = 64;
    call(WRITE, OUT, bytes.as_ptr() as usize, bytes.len());
}

/// Ends the program well.
pub(crate) fn exit() -> ! {
    #[cfg(target_arch = "x86_64")]
    const EXIT: usize = 60;
    #[cfg(target_arch = "aarch64")]
    const EXIT: usize = 93;
    loop {
        call(EXIT, 0, 0, 0);
    }
}

#[cfg(target_arch = "x86_64")]
fn call(number: usize, first: usize, second: usize, third: usize) {
    // SAFETY: only `write` from a live slice and `exit` come here; the kernel keeps all registers but three.
    unsafe {
        asm!("syscall", inlateout("rax") number => _, in("rdi") first, in("rsi") second, in("rdx") third,
            out("rcx") _, out("r11") _, options(nostack));
    }
}

#[cfg(target_arch = "aarch64")]
fn call(number: usize, first: usize, second: usize, third: usize) {
    // SAFETY: only `write` from a live slice and `exit` come here.
    unsafe {
        asm!("svc 0", in("x8") number, inlateout("x0") first => _, in("x1") second, in("x2") third,
            options(nostack));
    }
}

// The compiler calls these by name to move memory about. They move byte by byte through volatile accesses,
// lest the compiler see a copy in the loop and call the function from within itself.

#[unsafe(no_mangle)]
unsafe extern "C" fn memcpy(to: *mut u8, from: *const u8, bytes: usize) -> *mut u8 {
    for at in 0..bytes {
        // SAFETY: the caller vouches for both stretches of memory.
        unsafe { to.add(at).write_volatile(from.add(at).read_volatile()) };
    }
    to
}

#[unsafe(no_mangle)]
unsafe extern "C" fn memset(to: *mut u8, value: i32, bytes: usize) -> *mut u8 {
    for at in 0..bytes {
        // SAFETY: the caller vouches for the stretch of memory.
        unsafe { to.add(at).write_volatile(value.to_le_bytes()[0]) };
    }
    to
}

#[unsafe(no_mangle)]
unsafe extern "C" fn memcmp(one: *const u8, other: *const u8, bytes: usize) -> i32 {
    for at in 0..bytes {
        // SAFETY: the caller vouches for both stretches of memory.
        let (a, b) = unsafe { (one.add(at).read_volatile(), other.add(at).read_volatile()) };
        if a != b {
            return i32::from(a) - i32::from(b);
        }
    }
    0
}

#[unsafe(no_mangle)]
unsafe extern "C" fn bcmp(one: *const u8, other: *const u8, bytes: usize) -> i32 {
    // SAFETY: the same promise.
    unsafe { memcmp(one, other, bytes) }
}
