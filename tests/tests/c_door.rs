//! The C library from outside: a C11 program that checks what the header claims, and a C++17 pricer that links it.

mod c_library;

use std::fmt::Write;
use std::fs;
use std::path::PathBuf;
use std::process::Command;

use c_library::{Link, compile};
use floodmark::Status;
use floodmark::batch::Quantity;
use floodmark::brownian::Law;
use floodmark::price::{Greeks, greeks};
use floodmark::terms::{Contract, Direction, Knock, Market, Payoff, RebatePaid, TermSheet};
use floodmark_tests::{run, scratch};

/// What `tests/c/conformance.c` must print about the header, in the words and numbers of the core.
///
/// Constants are written out from the core's texts; structures are in the order of the core's names.
fn expected_claims() -> Vec<String> {
    let mut claims = Vec::new();
    for status in Status::ALL {
        let mut name = String::new();
        for letter in format!("{status:?}").chars() {
            let gap = letter.is_uppercase() && !name.is_empty();
            name.push_str(if gap { "_" } else { "" });
            name.push(letter.to_ascii_uppercase());
        }
        claims.push(format!("FLOODMARK_STATUS_{name} {}", status.code()));
    }
    for code in 0..Contract::COUNT {
        let name = Contract::from_code(code).unwrap().to_string().to_uppercase().replace([' ', '-'], "_");
        claims.push(format!("FLOODMARK_CONTRACT_{name} {code}"));
    }
    claims.push(format!("FLOODMARK_REBATE_PAID_NATURAL {}", RebatePaid::NATURAL_CODE));
    for choice in [RebatePaid::Hit, RebatePaid::Expiry] {
        claims.push(format!("FLOODMARK_REBATE_PAID_{} {}", choice.to_string().to_uppercase(), choice.code()));
    }
    for quantity in Quantity::ALL {
        claims.push(format!("FLOODMARK_QUANTITY_{} {}", quantity.name().to_uppercase(), quantity.code()));
    }
    for (part, number) in ["MAJOR", "MINOR", "PATCH"].into_iter().zip(floodmark::VERSION.split('.')) {
        claims.push(format!("FLOODMARK_VERSION_{part} {number}"));
    }

    let number = size_of::<f64>();
    let column = size_of::<usize>() + size_of::<isize>();
    structure(&mut claims, "FloodmarkGreeks", 0, number, &Greeks::NAMES);
    structure(&mut claims, "FloodmarkGreekColumns", 0, column, &Greeks::NAMES);
    let profile = ["touch_probability", "distance", "gap"];
    structure(&mut claims, "FloodmarkBarrierProfile", 0, number, &profile);
    structure(&mut claims, "FloodmarkProfileColumns", 0, column, &profile);
    let book = ["contract", "spot", "strike", "barrier", "rebate", "rebate_paid", "expiry", "vol", "rate", "dividend"];
    structure(&mut claims, "FloodmarkBook", size_of::<usize>(), column, &book);
    structure(
        &mut claims,
        "FloodmarkLawColumns",
        size_of::<usize>(),
        column,
        &["drift", "vol", "horizon", "first", "second"],
    );
    for name in ["FloodmarkNumbers", "FloodmarkCodes", "FloodmarkResults", "FloodmarkStatuses"] {
        structure(&mut claims, name, 0, size_of::<usize>(), &["first", "stride"]);
    }
    claims
}

/// Members of one size after a head.
fn structure(claims: &mut Vec<String>, name: &str, head: usize, member: usize, members: &[&str]) {
    for (place, text) in members.iter().enumerate() {
        claims.push(format!("offsetof {name} {text} {}", head + place * member));
    }
    claims.push(format!("sizeof {name} {}", head + members.len() * member));
}

/// The questions to the C compiler that the claims answer, as a file for `conformance.c` to include.
fn questions(claims: &[String], name: &str) -> PathBuf {
    let mut text = String::new();
    for claim in claims {
        let words: Vec<&str> = claim.split(' ').collect();
        match words[..] {
            ["sizeof", name, _] => writeln!(text, "SIZE({name});"),
            ["offsetof", name, member, _] => writeln!(text, "MEMBER({name}, {member});"),
            [constant, _] => writeln!(text, "CONSTANT({constant});"),
            _ => panic!("{claim}"),
        }
        .unwrap();
    }
    let file = scratch("c-programs").join(format!("{name}.h"));
    fs::write(&file, text).unwrap();
    file
}

/// Runs the conformance program, linked and compiled in this way.
fn conform(name: &str, link: Link, flags: &[&str]) {
    let claims = expected_claims();
    let include = format!("-DCLAIMS=\"{}\"", questions(&claims, name).display());
    let program = compile("tests/c/conformance.c", link, name, &[&[include.as_str()], flags].concat());
    let said = run(&mut c_library::command(&program));
    let told: Vec<&str> = said.lines().take(claims.len()).collect();
    assert_eq!(told, claims);
    for version in ["FLOODMARK_VERSION", "floodmark_version"] {
        assert!(said.lines().any(|line| line == format!("{version} {}", floodmark::VERSION)), "{version}\n{said}");
    }
    for code in 0..Contract::COUNT {
        let line = format!("contract {code} {}", Contract::from_code(code).unwrap());
        assert!(said.lines().any(|said| said == line), "{line}\n{said}");
    }
    assert!(said.ends_with("broken promises 0\n"), "{said}");
}

#[test]
fn every_constant_of_the_header_is_asked_about() {
    let claims = expected_claims();
    let header = c_library::header();
    let constants: Vec<&str> = header
        .lines()
        .filter_map(|line| line.trim().strip_suffix(',')?.split_once(" = "))
        .map(|(constant, _)| constant)
        .collect();
    assert_eq!(constants.len(), usize::from(Contract::COUNT) + Status::ALL.len() + 3 + Quantity::ALL.len());
    for constant in constants {
        assert!(claims.iter().any(|claim| claim.starts_with(&format!("{constant} "))), "{constant}");
    }
}

#[test]
fn a_c_program_finds_what_the_header_claims_linked_statically() {
    conform("conformance-static", Link::Static, &[]);
}

#[test]
fn a_c_program_finds_what_the_header_claims_in_the_shared_library() {
    conform("conformance-shared", Link::Shared, &[]);
}

#[test]
fn a_c_program_stays_within_its_memory() {
    let sanitizers = ["-fsanitize=address,undefined", "-fno-sanitize-recover=all", "-g"];
    let probe = scratch("c-programs").join("probe.c");
    fs::write(&probe, "int main(void) { return 0; }\n").unwrap();
    let works = Command::new("cc").args(sanitizers).arg(&probe).arg("-o").arg(probe.with_extension("")).output();
    if !works.is_ok_and(|output| output.status.success()) {
        // Not a pass: the two tests above still run the same program, but without anyone watching its memory.
        eprintln!("this compiler has no address and undefined-behaviour sanitizers: memory was not watched");
        return;
    }
    conform("conformance-sanitized", Link::Static, &sanitizers);
}

#[test]
fn a_read_beyond_a_column_is_seen_by_the_sanitizers() {
    let source = "int main(int count, char **words) { double two[2] = {0.0, 1.0}; (void)words; \
                  return two[count + 1] > 0.0; }\n";
    let folder = scratch("c-programs");
    fs::write(folder.join("beyond.c"), source).unwrap();
    let program = folder.join("beyond");
    let built = Command::new("cc")
        .args(["-fsanitize=address,undefined", "-fno-sanitize-recover=all", "-o"])
        .arg(&program)
        .arg(folder.join("beyond.c"))
        .output();
    if built.is_ok_and(|output| output.status.success()) {
        assert!(!Command::new(program).output().unwrap().status.success());
    }
}

#[test]
fn the_shared_library_says_which_interface_it_has() {
    let program = compile("examples/cpp/legacy_pricer.cpp", Link::Shared, "asks", &[]);
    let needed = run(Command::new("objdump").arg("-p").arg(program));
    assert!(needed.contains(&format!("NEEDED               {}\n", c_library::soname())), "{needed}");
}

#[test]
fn a_pricer_in_cpp_quotes_and_manages_its_book() {
    let linked = compile("examples/cpp/legacy_pricer.cpp", Link::Static, "legacy-static", &[]);
    let loaded = compile("examples/cpp/legacy_pricer.cpp", Link::Shared, "legacy-shared", &[]);
    let said = run(&mut c_library::command(&linked));
    assert_eq!(said, run(&mut c_library::command(&loaded)));

    let market = Market { spot: 41.5, vol: 0.34, rate: 0.031, dividend: 0.012 };
    let contract = Contract::Knock(Direction::Up, Knock::Out, Payoff::Call);
    let risk = greeks(&TermSheet::new(contract, 0.75).strike(40.0).barrier(55.0), &market).unwrap();
    assert!(said.contains(&format!("quote {:.6}\n", risk.value)), "{said}");
    assert!(said.contains("quote refused: barrier must be positive and finite\n"), "{said}");
    let row = |id: &str| {
        let line = said.lines().find(|line| line.starts_with(id)).unwrap_or_else(|| panic!("{id}\n{said}"));
        line.split_whitespace().map(str::to_owned).collect::<Vec<_>>()
    };
    let numbers = [risk.value, risk.delta, risk.gamma, risk.vega].map(|number| format!("{number:.6}"));
    assert_eq!(row("lock-upper")[4..8], numbers);
    assert_eq!(row("typing-error")[4..9], ["nan"; 5]);
    assert!(said.contains("vol must be from 0 to 1000, got -0.2\n"), "{said}");
    let crossing =
        Law::new(0.019 - 0.34 * 0.34 / 2.0, 0.34, 0.25).unwrap().bridge_crossing(0.05, (55.0_f64 / 41.5).ln());
    assert!(said.contains(&format!("over the barrier between two dates {:.6}\n", crossing.unwrap())), "{said}");
    for id in ["lock-lower", "gauge-flood", "gauge-drought", "barge-hire"] {
        assert_eq!(row(id).last().unwrap(), "ok", "{said}");
    }
    assert!(said.ends_with("1 of 6 refused\n"), "{said}");
}
