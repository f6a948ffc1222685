//! The scripts that made the reference tables, asked to make a few rows anew.

use std::fs;
use std::path::PathBuf;

use floodmark_tests::python::python;
use floodmark_tests::{root, run};

#[test]
fn each_script_of_a_table_makes_the_same_rows_again() {
    let folder = root().join("tests/reference");
    let scripts = fs::read_dir(folder).unwrap().map(|entry| entry.unwrap().path());
    let can_check = |script: &PathBuf| {
        script.extension().is_some_and(|extension| extension == "py")
            && fs::read_to_string(script).unwrap().contains("add_argument(\"--check\"")
    };
    let scripts: Vec<PathBuf> = scripts.filter(can_check).collect();
    assert!(scripts.iter().any(|script| script.ends_with("barrier.py")));
    for script in scripts {
        println!("{}", run(python().arg(&script).args(["--check", "5"])));
    }
}
