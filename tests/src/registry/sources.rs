//! What the sources of the core declare.

use std::fs;
use std::path::Path;

/// The public functions below a folder as `Type::method`, or `module::function` with the folder as the module.
///
/// # Panics
///
/// If the folder cannot be read.
pub fn public_functions(folder: &Path, module: &str) -> Vec<String> {
    let mut found = Vec::new();
    for (owner_file, text) in files(folder) {
        let module = owner_file.0.as_deref().unwrap_or(module);
        let mut owner = module.to_owned();
        for line in text.lines() {
            if line.starts_with("impl") && !line.contains(" for ") {
                owner = implemented(line);
            } else if line == "}" {
                module.clone_into(&mut owner);
            }
            let words: Vec<&str> = line.split_whitespace().take_while(|word| !word.starts_with("//")).collect();
            if let (Some(&"pub"), Some(at)) = (words.first(), words.iter().position(|word| *word == "fn")) {
                let name = words[at + 1].split(['(', '<']).next().expect("a split has a first part");
                found.push(format!("{owner}::{name}"));
            }
        }
    }
    found
}

/// The constants of type binary64 outside of tests, each as `file::NAME`.
///
/// # Panics
///
/// If the folder cannot be read.
pub fn named_constants(folder: &Path) -> Vec<String> {
    let mut found = Vec::new();
    for ((_, stem), text) in files(folder) {
        let code = text.split("#[cfg(test)]").next().unwrap_or_default();
        for line in code.lines().map(str::trim_start).filter(|line| line.contains(": f64 = ")) {
            let declared = line.trim_start_matches("pub ").trim_start_matches("pub(crate) ");
            let declared = declared.trim_start_matches("pub(super) ").strip_prefix("const ");
            found.extend(declared.and_then(|rest| rest.split(':').next()).map(|name| format!("{stem}::{name}")));
        }
    }
    found
}

/// Folder below the first one (if it lies in one), stem and text of every file that is not of tests alone.
fn files(folder: &Path) -> Vec<((Option<String>, String), String)> {
    let mut found = Vec::new();
    let name = |path: &Path| path.file_stem().and_then(|name| name.to_str()).expect("a plain name").to_owned();
    let mut entries: Vec<_> =
        fs::read_dir(folder).expect("a folder").map(|entry| entry.expect("a file").path()).collect();
    entries.sort();
    for path in entries {
        if path.ends_with("tests") {
            continue;
        }
        if path.is_dir() {
            let inner = files(&path).into_iter();
            found.extend(inner.map(|((module, stem), text)| ((module.or_else(|| Some(name(&path))), stem), text)));
        } else {
            found.push(((None, name(&path)), fs::read_to_string(&path).expect("text")));
        }
    }
    found
}

/// The type of an `impl` line: `impl<'a, T: Copy> Column<'a, T> {` is of `Column`.
fn implemented(line: &str) -> String {
    let mut depth = 0;
    let outside: String = line
        .chars()
        .filter(|letter| {
            depth += i32::from(*letter == '<');
            let kept = depth == 0;
            depth -= i32::from(*letter == '>');
            kept
        })
        .collect();
    outside.trim_start_matches("impl").trim_end_matches('{').trim().to_owned()
}
