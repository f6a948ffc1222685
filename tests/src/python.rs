//! A virtual environment with the Python package of this workspace and what its tests need.

use std::fs::{self, File};
use std::hash::{DefaultHasher, Hash, Hasher};
use std::path::{Path, PathBuf};
use std::process::Command;
use std::sync::OnceLock;

use crate::{root, run, scratch};

/// The interpreter of the environment, to be run in a folder where it may leave things. The environment is made, or
/// brought up to date with the sources, when it is first asked for.
///
/// # Panics
///
/// If the environment cannot be made: that takes python3 with its venv module, cargo, and the package index.
pub fn python() -> Command {
    static INTERPRETER: OnceLock<PathBuf> = OnceLock::new();
    let interpreter = INTERPRETER.get_or_init(|| {
        let folder = scratch("python");
        // Another run of the tests may be making it: wait for that.
        let lock = File::create(folder.join("lock")).expect("the lock can be made");
        lock.lock().expect("the lock can be taken");
        up_to_date(&folder)
    });
    quiet(Command::new(interpreter))
}

/// A command that no Python setting of the user's reaches, and that leaves nothing beside the sources.
fn quiet(mut command: Command) -> Command {
    for setting in ["PYTHONPATH", "PYTHONHOME", "PYTHONSTARTUP", "PIP_TARGET", "PIP_USER"] {
        command.env_remove(setting);
    }
    command.current_dir(scratch("python")).env("PYTHONDONTWRITEBYTECODE", "1");
    command
}

/// Makes of the environment what is missing or was made of other sources.
fn up_to_date(folder: &Path) -> PathBuf {
    let environment = folder.join("environment");
    let interpreter = environment.join("bin/python");
    let requirements = root().join("tests/python/requirements.txt");
    let version = run(&mut quiet(python3(&["--version"])));
    let needs = format!("{version}{}", fs::read_to_string(&requirements).expect("the requirements can be read"));
    let sources = format!("{needs}{}", digest(&["py", "core", "Cargo.toml", "Cargo.lock"]));
    let pip = |arguments: &[&str]| {
        let mut command = quiet(Command::new(&interpreter));
        command.args(["-m", "pip", "install", "--quiet", "--disable-pip-version-check"]).args(arguments);
        // Cargo and pip build the same crate with different settings: in one folder each would undo the other's work.
        run(command.env("CARGO_TARGET_DIR", folder.join("build")));
    };
    in_step(&folder.join("requirements-stamp"), &needs, &interpreter, || {
        run(&mut quiet(python3(&["-m", "venv", "--clear", environment.to_str().expect("a path in UTF-8")])));
        pip(&["--requirement", requirements.to_str().expect("a path in UTF-8")]);
        let _ = fs::remove_file(folder.join("package-stamp"));
    });
    in_step(&folder.join("package-stamp"), &sources, &interpreter, || {
        pip(&["--force-reinstall", "--no-deps", root().join("py").to_str().expect("a path in UTF-8")]);
    });
    interpreter
}

fn python3(arguments: &[&str]) -> Command {
    let mut command = Command::new("python3");
    command.args(arguments);
    command
}

/// Does the work unless the stamp says that it was done for the same things; then stamps. Work that fails half way
/// leaves no stamp, so that the next run does not take it for done.
fn in_step(stamp: &Path, things: &str, interpreter: &Path, work: impl FnOnce()) {
    if interpreter.exists() && fs::read_to_string(stamp).is_ok_and(|done| done == things) {
        return;
    }
    let _ = fs::remove_file(stamp);
    work();
    fs::write(stamp, things).expect("the stamp can be written");
}

/// One number for the names and contents of these files and folders below the root.
fn digest(places: &[&str]) -> u64 {
    let mut hasher = DefaultHasher::new();
    for place in places {
        add(&root().join(place), &mut hasher);
    }
    hasher.finish()
}

fn add(place: &Path, hasher: &mut DefaultHasher) {
    if place.is_dir() {
        let entries = fs::read_dir(place).expect("a folder of sources can be read");
        let mut entries: Vec<PathBuf> = entries.map(|entry| entry.expect("an entry").path()).collect();
        entries.sort();
        entries.iter().filter(|entry| !entry.ends_with("__pycache__")).for_each(|entry| add(entry, hasher));
    } else {
        place.hash(hasher);
        fs::read(place).expect("a source can be read").hash(hasher);
    }
}
