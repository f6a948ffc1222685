//! The Python package as a user has it: installed by pip, tested in Python, seen by a type checker.

use std::path::Path;

use floodmark_tests::python::python;
use floodmark_tests::{root, run, scratch};

fn tests() -> String {
    root().join("tests/python").to_str().unwrap().to_owned()
}

#[test]
fn the_tests_in_python_pass() {
    let said = run(python()
        .args(["-m", "pytest", "-q", "-p", "no:cacheprovider", &tests()])
        .env("HYPOTHESIS_STORAGE_DIRECTORY", scratch("python").join("hypothesis")));
    let closing = said.lines().last().unwrap();
    println!("{closing}");
    assert!(closing.contains(" passed"), "{said}");
    for other in ["skipped", "xfailed", "deselected"] {
        assert!(!closing.contains(other), "not a pass: {said}");
    }
}

#[test]
fn the_stubs_say_what_is_there() {
    let said = run(python().args(["-m", "mypy.stubtest", "floodmark"]));
    assert!(said.contains("no issues found"), "{said}");
}

#[test]
fn a_strict_type_checker_accepts_the_package_and_its_use_and_refuses_misuse() {
    let cache = scratch("python").join("mypy");
    for what in [&["-p", "floodmark"][..], &["typed_usage.py", "typed_misuse.py"]] {
        let said = run(python()
            .args(["-m", "mypy", "--strict", "--cache-dir", cache.to_str().unwrap()])
            .args(what)
            .current_dir(Path::new(&tests())));
        assert!(said.contains("no issues found"), "{said}");
    }
}

#[test]
fn what_the_type_checker_saw_runs() {
    run(python().arg(root().join("tests/python/typed_usage.py")));
}
