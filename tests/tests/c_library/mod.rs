//! The C library as a user has it, and programs that are compiled against it.
#![allow(dead_code, reason = "each test uses a part")]

use std::fs;
use std::path::{Path, PathBuf};
use std::process::Command;
use std::sync::OnceLock;

use floodmark_tests::{root, run, scratch};

/// The folder of `libfloodmark.a` and `libfloodmark.so`, built once with optimisation.
pub(crate) fn folder() -> PathBuf {
    static FOLDER: OnceLock<PathBuf> = OnceLock::new();
    FOLDER
        .get_or_init(|| {
            // A target folder of its own: cargo holds the lock of the usual one while tests are built.
            let build = scratch("c-library");
            run(Command::new(env!("CARGO"))
                .args(["build", "--quiet", "--release", "-p", "floodmark-ffi", "--target-dir"])
                .arg(&build)
                .current_dir(root())
                .env_remove("RUSTFLAGS")
                .env_remove("CARGO_ENCODED_RUSTFLAGS"));
            build.join("release")
        })
        .clone()
}

/// The folder of `floodmark.h`.
pub(crate) fn include() -> PathBuf {
    root().join("ffi/include")
}

/// The text of the committed header.
pub(crate) fn header() -> String {
    fs::read_to_string(include().join("floodmark.h")).unwrap()
}

/// How a program is linked with the library.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) enum Link {
    /// The library becomes a part of the program.
    Static,
    /// The program asks for the library when it starts.
    Shared,
}

/// Compiles a C or C++ source of this workspace with every warning an error, links it and returns the program.
pub(crate) fn compile(source: &str, link: Link, name: &str, flags: &[&str]) -> PathBuf {
    let source = root().join(source);
    let programs = scratch("c-programs");
    let program = programs.join(name);
    let (compiler, standard) = match source.extension().and_then(|extension| extension.to_str()) {
        Some("c") => ("cc", "-std=c11"),
        Some("cpp") => ("c++", "-std=c++17"),
        other => panic!("{other:?} is no language of ours"),
    };
    let mut command = Command::new(compiler);
    command
        .args([standard, "-O1", "-Wall", "-Wextra", "-Wpedantic", "-Werror", "-I"])
        .arg(include())
        .args(flags)
        .arg(source)
        .arg("-o")
        .arg(&program);
    match link {
        // The rest is what Rust's standard library asks of a Linux system.
        Link::Static => command.arg(folder().join("libfloodmark.a")).args(["-lpthread", "-ldl", "-lm"]),
        Link::Shared => command.arg("-L").arg(installed(&programs)).args(["-lfloodmark", "-lm"]),
    };
    run(&mut command);
    program
}

/// A run of a program, which finds the shared library where [`compile`] put it.
pub(crate) fn command(program: &Path) -> Command {
    let mut command = Command::new(program);
    command.env("LD_LIBRARY_PATH", installed(&scratch("c-programs"))).env_remove("RUST_BACKTRACE");
    command
}

/// A folder where the shared library stands under the name that the linker looks for and the name that programs ask
/// for when they start, as an installation has it.
fn installed(programs: &Path) -> PathBuf {
    static LAID_OUT: OnceLock<PathBuf> = OnceLock::new();
    LAID_OUT
        .get_or_init(|| {
            let place = programs.join("lib");
            fs::create_dir_all(&place).unwrap();
            for name in ["libfloodmark.so".to_owned(), soname()] {
                fs::copy(folder().join("libfloodmark.so"), place.join(name)).unwrap();
            }
            place
        })
        .clone()
}

/// The name that the shared library of this version must have inside: the part of the version that a program may
/// depend on.
pub(crate) fn soname() -> String {
    let parts: Vec<&str> = floodmark::VERSION.split('.').collect();
    let interface = if parts[0] == "0" { format!("0.{}", parts[1]) } else { parts[0].to_owned() };
    format!("libfloodmark.so.{interface}")
}
