//! What the README says works as it says, and every language says the same.

mod c_library;

use std::fs;
use std::path::PathBuf;
use std::process::Command;

use floodmark::price::{Greeks, greeks};
use floodmark::terms::{Contract, Market, RebatePaid, TermSheet};
use floodmark_tests::python::python;
use floodmark_tests::{root, run, scratch};

/// The blocks of code of the README in this language.
fn blocks(language: &str) -> Vec<String> {
    let readme = fs::read_to_string(root().join("README.md")).unwrap();
    let fence = format!("```{language}\n");
    readme.split(&fence).skip(1).map(|rest| rest.split("```").next().unwrap().to_owned()).collect()
}

/// The one block in this language.
fn block(language: &str) -> String {
    let [block] = <[String; 1]>::try_from(blocks(language)).expect("one block of each language");
    block
}

fn file(name: &str, text: &str) -> PathBuf {
    let path = scratch("readme").join(name);
    fs::write(&path, text).unwrap();
    path
}

/// The contract that every language of the README prices.
fn expected() -> Greeks {
    let sheet = TermSheet::new(Contract::parse("up-and-out call").unwrap(), 0.5)
        .strike(100.0)
        .barrier(120.0)
        .rebate(3.0, RebatePaid::Hit);
    greeks(&sheet, &Market { spot: 105.0, vol: 0.2, rate: -0.01, dividend: 0.02 }).unwrap()
}

/// Checks a line `value …, delta …, vega …` to the bit.
fn check(line: &str) {
    let Greeks { value, delta, vega, .. } = expected();
    let numbers: Vec<f64> = line
        .trim()
        .split(", ")
        .zip(["value ", "delta ", "vega "])
        .map(|(part, name)| part.strip_prefix(name).unwrap().parse().unwrap())
        .collect();
    assert_eq!(numbers, [value, delta, vega], "{line}");
}

#[test]
fn the_first_two_commands_reprice_the_demo_book_and_run_every_test() {
    let commands = blocks("console");
    assert_eq!(commands[1], "cargo test --workspace\n");
    let words: Vec<&str> = commands[0].split_whitespace().collect();
    assert_eq!(words[0], "cargo");
    let repriced = run(Command::new(env!("CARGO"))
        .args(&words[1..])
        .current_dir(root())
        .env("CARGO_TARGET_DIR", scratch("reprice").join("build")));
    assert!(repriced.lines().count() > 300 && repriced.starts_with("id,value,delta"), "{repriced}");
}

#[test]
fn the_rust_prints_what_the_core_says() {
    let sources = scratch("readme").join("rust");
    fs::create_dir_all(sources.join("src")).unwrap();
    fs::write(sources.join("src/main.rs"), block("rust")).unwrap();
    let core = root().join("core");
    let manifest = format!(
        "[package]\nname = \"readme\"\nedition = \"2024\"\n[workspace]\n[dependencies]\nfloodmark = {{ path = {core:?} }}\n"
    );
    fs::write(sources.join("Cargo.toml"), manifest).unwrap();
    check(&run(Command::new(env!("CARGO"))
        .args(["run", "--quiet", "--offline", "--target-dir"])
        .arg(sources.join("build"))
        .current_dir(&sources)));
}

#[test]
fn the_c_prints_what_the_core_says() {
    let source = file("ten_lines.c", &block("c"));
    let program = c_library::compile(source.to_str().unwrap(), c_library::Link::Static, "readme", &[]);
    check(&run(&mut c_library::command(&program)));
}

#[test]
fn the_python_prints_what_the_core_says() {
    let said = run(python().arg(file("ten_lines.py", &block("python"))));
    let (first, second) = said.split_once('\n').unwrap();
    check(first);
    assert!(second.trim().parse::<f64>().unwrap() > expected().value, "{said}");
}
