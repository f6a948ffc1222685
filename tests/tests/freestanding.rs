//! The core alone, without a standard library, an allocator or a C library, and no way to panic.
//!
//! `tests/freestanding` is a program that reaches every public function of the core and that links only if no
//! panic can be reached. Here it is built, linked and run, and its results are compared with ours to the bit.

use std::fs;
use std::path::PathBuf;
use std::process::{Command, Output};

use floodmark_tests::registry::public_functions;
use floodmark_tests::{root, run, scratch};

#[path = "../freestanding/src/values.rs"]
mod values;

/// The function that the panic handler calls and that does not exist.
const NOWHERE: &str = "floodmark_can_panic";

fn folder() -> PathBuf {
    root().join("tests/freestanding")
}

/// Builds the program with these features and tries to link it.
fn link(name: &str, features: &[&str]) -> (PathBuf, Output) {
    let build = scratch("freestanding").join(name);
    run(Command::new(env!("CARGO"))
        .args(["build", "--quiet", "--release", "--features", &features.join(",")])
        .arg("--manifest-path")
        .arg(folder().join("Cargo.toml"))
        .arg("--target-dir")
        .arg(&build)
        .env_remove("RUSTFLAGS")
        .env_remove("CARGO_ENCODED_RUSTFLAGS"));
    let program = build.join("program");
    let linked = Command::new("cc")
        .args(["-nostdlib", "-static", "-Wl,--gc-sections", "-o"])
        .arg(&program)
        .arg(build.join("release/libfloodmark_freestanding.a"))
        .args(["-Wl,--undefined=_start"])
        .output()
        .unwrap();
    (program, linked)
}

#[test]
fn the_core_links_without_a_panic_path_and_has_the_same_bits() {
    let (program, linked) = link("clean", &[]);
    assert!(linked.status.success(), "{}", String::from_utf8_lossy(&linked.stderr));
    let output = Command::new(program).output().unwrap();
    assert!(output.status.success(), "{}", output.status);
    let theirs: Vec<u64> = output.stdout.chunks(8).map(|bytes| u64::from_le_bytes(bytes.try_into().unwrap())).collect();
    let mut ours = Vec::new();
    values::values(&mut |bits| ours.push(bits));
    assert!(ours.len() > 1000);
    assert_eq!(ours, theirs);
}

#[test]
fn a_planted_index_does_not_link() {
    let (_, linked) = link("planted", &["planted"]);
    let said = String::from_utf8_lossy(&linked.stderr);
    assert!(!linked.status.success() && said.contains(NOWHERE), "{}: {said}", linked.status);
}

#[test]
fn every_public_function_is_reached() {
    let reached = fs::read_to_string(folder().join("src/reach.rs")).unwrap();
    let functions = public_functions(&root().join("core/src"), "floodmark");
    for known in ["price::greeks", "batch::greeks", "special::exp", "Contract::parse", "ColumnMut::from_raw"] {
        assert!(functions.iter().any(|function| function == known), "{known} was not found in the sources");
    }
    let forgotten: Vec<&String> = functions.iter().filter(|function| !mentions(&reached, function)).collect();
    assert!(forgotten.is_empty(), "not reached from tests/freestanding/src/reach.rs: {forgotten:#?}");
}

#[test]
fn a_function_counts_as_reached_under_its_whole_name_only() {
    assert!(mentions("keep(price::greeks(&sheet));", "price::greeks"));
    assert!(mentions("map(Greeks::to_array)", "Greeks::to_array"));
    assert!(!mentions("batch::greeks(&book)", "price::greeks"));
    assert!(!mentions("Column::from_slice(&codes)", "ColumnMut::from_slice"));
    assert!(!mentions("special::log1p(x)", "special::log1"));
}

/// Whether a text has this path, not as a part of a longer one.
fn mentions(text: &str, path: &str) -> bool {
    let word = |c: char| c.is_alphanumeric() || c == '_' || c == ':';
    text.match_indices(path).any(|(at, _)| !text[..at].ends_with(word) && !text[at + path.len()..].starts_with(word))
}
