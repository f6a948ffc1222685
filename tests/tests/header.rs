//! The committed C header is what the sources say, and declares what the library exports.
//!
//! Functions and structures come from `ffi/` by cbindgen; versions and codes come from the core itself, so that no
//! number has a second home. `FLOODMARK_BLESS=1 cargo test -p floodmark-tests --test header` rewrites the header.

mod c_library;

use std::collections::BTreeSet;
use std::fmt::Write;
use std::fs;
use std::process::Command;
use std::sync::OnceLock;

use floodmark::Status;
use floodmark::batch::Quantity;
use floodmark::terms::{Contract, RebatePaid};
use floodmark_tests::{root, run};

/// The committed header, after it was written anew if that is asked for.
fn committed() -> &'static str {
    static TEXT: OnceLock<String> = OnceLock::new();
    TEXT.get_or_init(|| {
        if std::env::var_os("FLOODMARK_BLESS").is_some() {
            fs::write(c_library::include().join("floodmark.h"), generate()).unwrap();
        }
        c_library::header()
    })
}

#[test]
fn the_committed_header_is_what_the_sources_say() {
    let (committed, made) = (committed(), generate());
    let drift = made.lines().zip(committed.lines()).position(|(ours, theirs)| ours != theirs);
    assert!(
        made == committed,
        "ffi/include/floodmark.h has drifted, first in line {}; if that is meant, run\n\
         FLOODMARK_BLESS=1 cargo test -p floodmark-tests --test header",
        drift.map_or(made.lines().count().min(committed.lines().count()), |line| line) + 1
    );
}

#[test]
fn the_library_exports_what_the_header_declares_and_nothing_else() {
    let names = run(Command::new("nm")
        .args(["-D", "--defined-only", "--format=posix"])
        .arg(c_library::folder().join("libfloodmark.so")));
    let exported: BTreeSet<&str> = names.lines().filter_map(|line| line.split_whitespace().next()).collect();
    let declared = declared(committed());
    assert!(declared.contains("floodmark_price") && declared.contains("floodmark_version"));
    assert_eq!(exported, declared);
    for quantity in Quantity::ALL {
        assert!(declared.contains(format!("floodmark_{}", quantity.name()).as_str()), "{quantity:?}");
    }
}

/// The functions that a header declares: the words before an opening parenthesis, comments and macros aside.
fn declared(header: &str) -> BTreeSet<&str> {
    header
        .lines()
        .filter(|line| !line.starts_with([' ', '#', '/']))
        .filter_map(|line| line.split_once('('))
        .map(|(before, _)| before.rsplit([' ', '*']).next().unwrap())
        .collect()
}

fn generate() -> String {
    let ffi = root().join("ffi");
    let mut config = cbindgen::Config::from_file(ffi.join("cbindgen.toml")).unwrap();
    config.after_includes = Some(constants());
    let mut made = Vec::new();
    cbindgen::Builder::new().with_crate(ffi).with_config(config).generate().unwrap().write(&mut made);
    let made = String::from_utf8(made).unwrap();
    // What Rust's own documentation calls safety is for a C reader what must hold of the memory.
    made.replace(" * # Safety\n *\n * ", " * Memory: ")
}

/// The version and every code, in the words of the core.
fn constants() -> String {
    let mut text = String::from("\n/* The version of this header; floodmark_version() is that of the library. */\n");
    let version = floodmark::VERSION;
    writeln!(text, "#define FLOODMARK_VERSION \"{version}\"").unwrap();
    for (part, number) in ["MAJOR", "MINOR", "PATCH"].into_iter().zip(version.split('.')) {
        writeln!(text, "#define FLOODMARK_VERSION_{part} {number}").unwrap();
    }
    enumeration(
        &mut text,
        "Status",
        "The outcome of a call or of a row. Numbers are never reused; from 100 on they speak of a whole call.",
        Status::ALL.map(|status| (camel_to_snake(&format!("{status:?}")), status.code(), status.rule().to_owned())),
    );
    enumeration(
        &mut text,
        "Contract",
        "What is paid, and what touching the barrier does. Calls take these as uint8_t.",
        (0..Contract::COUNT).map(|code| {
            let contract = Contract::from_code(code).unwrap().to_string();
            (contract.replace([' ', '-'], "_"), i32::from(code), contract)
        }),
    );
    let natural = "hit for knock-outs and one-touches, expiry for the rest".to_owned();
    enumeration(
        &mut text,
        "RebatePaid",
        "When a rebate, or the amount of a touch, is paid. Calls take these as uint8_t.",
        [
            ("natural".to_owned(), RebatePaid::NATURAL_CODE, natural),
            ("hit".to_owned(), RebatePaid::Hit.code(), "when the barrier is touched".to_owned()),
            ("expiry".to_owned(), RebatePaid::Expiry.code(), "at expiry".to_owned()),
        ]
        .map(|(name, code, meaning)| (name, i32::from(code), meaning)),
    );
    enumeration(
        &mut text,
        "Quantity",
        "What floodmark_law_columns can be asked, each with the function that answers the same for one law.",
        Quantity::ALL.map(|quantity| {
            let arguments = quantity.arguments().join(", ");
            let meaning = format!("floodmark_{}(drift, vol, horizon, {arguments}, value)", quantity.name());
            (quantity.name().to_owned(), i32::from(quantity.code()), meaning)
        }),
    );
    text
}

/// One C enumeration: `FLOODMARK_<NAME>_<CONSTANT> = number`, each with its meaning.
fn enumeration(
    text: &mut String,
    name: &str,
    purpose: &str,
    constants: impl IntoIterator<Item = (String, i32, String)>,
) {
    write!(text, "\n/**\n * {purpose}\n */\nenum Floodmark{name} {{\n").unwrap();
    let prefix = camel_to_snake(name);
    for (constant, number, meaning) in constants {
        let constant = format!("FLOODMARK_{prefix}_{constant}").to_uppercase();
        writeln!(text, "    /** {meaning} */\n    {constant} = {number},").unwrap();
    }
    text.push_str("};\n");
}

/// `RebateAtHit` is `rebate_at_hit`.
fn camel_to_snake(name: &str) -> String {
    let mut snake = String::new();
    for letter in name.chars() {
        if letter.is_uppercase() && !snake.is_empty() {
            snake.push('_');
        }
        snake.extend(letter.to_lowercase());
    }
    snake
}
