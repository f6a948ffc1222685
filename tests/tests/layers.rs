//! Imports of the core go to the left only: each layer knows those before it and nothing of those after it.

use std::fs;
use std::path::{Path, PathBuf};

use floodmark_tests::root;

/// The layers, from the one that knows nothing to the one that may know all.
const LAYERS: [&str; 9] = ["error", "num", "special", "brownian", "terms", "price", "stages", "batch", "audit"];

/// Layers to the left that a layer must not know all the same: the words of the trade know no formulas.
const FORBIDDEN: [(&str, &[&str]); 1] = [("terms", &["num", "special", "brownian"])];

/// Every step that a source of this layer takes and must not take.
fn wrong_steps(layer: &str, source: &str) -> Vec<String> {
    let rank = |name: &str| LAYERS.iter().position(|layer| *layer == name);
    let own = rank(layer);
    let code: Vec<&str> = source.lines().map(|line| line.split("//").next().unwrap_or_default()).collect();
    let code = code.join("\n");
    let mut wrong = Vec::new();
    for path in code.split("crate::").skip(1) {
        for name in first_names(path) {
            let right = rank(&name).is_some_and(|rank| Some(rank) > own);
            let forbidden = FORBIDDEN.iter().any(|(from, to)| *from == layer && to.contains(&name.as_str()));
            if right || forbidden {
                wrong.push(format!("{layer} -> {name}"));
            }
        }
    }
    if code.contains("super::super::") {
        wrong.push(format!("{layer} -> super::super hides where it goes; write crate::"));
    }
    wrong
}

/// What follows `crate::`: one name, or those that a pair of braces opens with.
fn first_names(path: &str) -> Vec<String> {
    let name = |text: &str| text.trim().chars().take_while(|c| c.is_alphanumeric() || *c == '_').collect::<String>();
    let Some(group) = path.trim_start().strip_prefix('{') else { return vec![name(path)] };
    let (mut names, mut depth, mut start) = (Vec::new(), 0, 0);
    for (at, letter) in group.char_indices() {
        match letter {
            '{' => depth += 1,
            '}' if depth > 0 => depth -= 1,
            ',' | '}' if depth == 0 => {
                names.push(name(&group[start..at]));
                start = at + 1;
                if letter == '}' {
                    break;
                }
            }
            _ => {}
        }
    }
    names
}

fn sources(folder: &Path) -> Vec<PathBuf> {
    let mut found = Vec::new();
    for entry in fs::read_dir(folder).unwrap() {
        let path = entry.unwrap().path();
        if path.is_dir() {
            found.extend(sources(&path));
        } else {
            found.push(path);
        }
    }
    found
}

#[test]
fn no_layer_knows_what_lies_to_its_right() {
    let folder = root().join("core/src");
    let mut seen = Vec::new();
    let mut wrong = Vec::new();
    for path in sources(&folder) {
        let inside = path.strip_prefix(&folder).unwrap();
        let layer = inside.iter().next().unwrap().to_str().unwrap().trim_end_matches(".rs").to_owned();
        if layer == "lib" {
            continue;
        }
        assert!(LAYERS.contains(&layer.as_str()), "{}: no layer of this name", path.display());
        let steps = wrong_steps(&layer, &fs::read_to_string(&path).unwrap());
        wrong.extend(steps.into_iter().map(|step| format!("{}: {step}", inside.display())));
        seen.push(layer);
    }
    for layer in ["error", "num", "special", "brownian", "terms", "price", "batch"] {
        assert!(seen.iter().any(|other| other == layer), "nothing was read of {layer}");
    }
    assert!(wrong.is_empty(), "{wrong:#?}");
}

#[test]
fn a_planted_step_to_the_right_is_found() {
    let cases: [(&str, &str, &[&str]); 7] = [
        ("special", "use crate::price::price;", &["special -> price"]),
        ("num", "fn f() { crate::batch::greeks() }", &["num -> batch"]),
        (
            "price",
            "use crate::{\n    error::{Error, Status},\n    batch::Book, terms::Market,\n};",
            &["price -> batch"],
        ),
        ("terms", "use crate::special::exp;", &["terms -> special"]),
        ("price", "use super::super::batch;", &["price -> super::super hides where it goes; write crate::"]),
        ("error", "/// See [`crate::terms::Contract`].\nfn f() {} // not crate::batch", &[]),
        ("audit", "use crate::{error::Error, batch::Book};", &[]),
    ];
    for (layer, source, wanted) in cases {
        assert_eq!(wrong_steps(layer, source), wanted, "{source}");
    }
}
