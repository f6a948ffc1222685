//! What the tests of every language share: where things are, and how to run a program.

pub mod python;
pub mod registry;

use std::path::{Path, PathBuf};
use std::process::Command;

/// The root of the workspace.
///
/// # Panics
///
/// If this crate does not lie one folder below the root.
pub fn root() -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).parent().expect("tests/ lies in the workspace").to_path_buf()
}

/// A folder of this name below the build folder, made if it is not there: scratch that git ignores.
///
/// # Panics
///
/// If the folder cannot be made.
pub fn scratch(name: &str) -> PathBuf {
    let build = std::env::var_os("CARGO_TARGET_DIR").map_or_else(|| root().join("target"), PathBuf::from);
    let folder = build.join("floodmark-tests").join(name);
    std::fs::create_dir_all(&folder).unwrap_or_else(|error| panic!("{}: {error}", folder.display()));
    folder
}

/// Runs a program to its end and returns what it printed; a failure shows all of its output.
///
/// # Panics
///
/// If the program cannot be started or does not exit with 0.
pub fn run(command: &mut Command) -> String {
    let output = command.output().unwrap_or_else(|error| panic!("{command:?}: {error}"));
    let (out, err) = (String::from_utf8_lossy(&output.stdout), String::from_utf8_lossy(&output.stderr));
    assert!(output.status.success(), "{command:?}: {}\n{out}\n{err}", output.status);
    out.into_owned()
}
