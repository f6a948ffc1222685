//! Gives the shared library the name under which programs ask for it when they start.
//!
//! `libfloodmark.so.0.1` before version 1, where a minor version may break the interface; `libfloodmark.so.N` from
//! version N on.

use std::env::var;

fn main() {
    let major = var("CARGO_PKG_VERSION_MAJOR").expect("cargo sets it");
    let minor = var("CARGO_PKG_VERSION_MINOR").expect("cargo sets it");
    let interface = if major == "0" { format!("0.{minor}") } else { major };
    if var("CARGO_CFG_TARGET_OS").is_ok_and(|system| system == "linux") {
        println!("cargo::rustc-cdylib-link-arg=-Wl,-soname,libfloodmark.so.{interface}");
    }
    println!("cargo::rerun-if-changed=build.rs");
}
