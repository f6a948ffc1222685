//! The program that reprices a book, from outside.

use std::collections::HashMap;
use std::fs;
use std::io::{Read, Write};
use std::path::PathBuf;
use std::process::{Command, Output, Stdio};
use std::sync::LazyLock;

use floodmark_examples::{HEADER, demo_book::demo_book};
use floodmark_tests::{root, run, scratch};

/// The program, as the first command of the README builds it.
static PROGRAM: LazyLock<PathBuf> = LazyLock::new(|| {
    let build = scratch("reprice").join("build");
    run(Command::new(env!("CARGO"))
        .args(["build", "--quiet", "--release", "--package", "floodmark-examples", "--bin", "reprice", "--target-dir"])
        .arg(&build)
        .current_dir(root()));
    build.join("release/reprice")
});

const COLUMNS: &str = "id,contract,spot,strike,barrier,rebate,rebate_paid,expiry,vol,rate,dividend\n";

/// Runs the program on a book that it reads from standard input.
fn reprice(book: impl AsRef<[u8]>) -> Output {
    let mut child = Command::new(&*PROGRAM)
        .arg("-")
        .stdin(Stdio::piped())
        .stdout(Stdio::piped())
        .stderr(Stdio::piped())
        .spawn()
        .unwrap();
    let mut input = child.stdin.take().unwrap();
    let book = book.as_ref().to_vec();
    // A book that is refused at its header is not read to its end.
    let writer = std::thread::spawn(move || drop(input.write_all(&book)));
    let output = child.wait_with_output().unwrap();
    writer.join().unwrap();
    output
}

fn text(bytes: &[u8]) -> &str {
    str::from_utf8(bytes).unwrap()
}

/// The lines of the values, without the header.
fn values(output: &Output) -> Vec<&str> {
    let mut lines = text(&output.stdout).lines();
    assert_eq!(lines.next(), Some(HEADER));
    lines.collect()
}

fn file(name: &str) -> PathBuf {
    scratch("reprice").join(name)
}

#[test]
fn the_demo_book_is_valued_row_by_row_with_a_summary() {
    let output = Command::new(&*PROGRAM).output().unwrap();
    assert_eq!(output.status.code(), Some(0));
    let book = demo_book();
    let rows: Vec<&str> = book.lines().skip(1).collect();
    let values = values(&output);
    assert_eq!(values.len(), rows.len());
    for (row, value) in rows.iter().zip(values) {
        let fields: Vec<&str> = value.split(',').collect();
        assert_eq!(fields.len(), HEADER.split(',').count());
        assert_eq!(Some(fields[0]), row.split(',').next(), "order is kept");
        assert_eq!(fields[fields.len() - 2], "ok");
        let numbers: Vec<f64> = fields[1..14].iter().map(|field| field.parse().unwrap()).collect();
        assert!(numbers.iter().all(|number| number.is_finite()), "{value}");
        assert!(numbers[0] >= 0.0 && (0.0..=1.0).contains(&numbers[12]), "{value}");
    }
    let summary = text(&output.stderr);
    for part in ["308 valued, 0 refused", "Totals", "delta", "nearest their barrier", "In-out parity"] {
        assert!(summary.contains(part), "{part} is not in\n{summary}");
    }
}

#[test]
fn in_out_parity_of_the_demo_book_is_below_1e_14_of_spot() {
    let summary = floodmark_examples::reprice(demo_book().as_bytes(), std::io::sink(), |_| {}).unwrap();
    let residual = summary.worst_parity_residual().unwrap();
    assert!(residual < 1e-14, "{residual:e}");
    assert_eq!(summary.refused(), 0);
}

#[test]
fn the_values_are_those_of_the_core_to_the_bit() {
    use floodmark::terms::{Contract, Market, RebatePaid, TermSheet};
    let book = demo_book();
    let output = reprice(&book);
    for (row, value) in book.lines().skip(1).zip(values(&output)) {
        let fields: Vec<&str> = row.split(',').collect();
        let number = |at: usize| fields[at].parse().unwrap_or(f64::NAN);
        let contract = Contract::parse(fields[1]).unwrap();
        let rebate = if fields[5].is_empty() { 0.0 } else { number(5) };
        let paid = RebatePaid::parse(fields[6]).unwrap_or(RebatePaid::natural(contract));
        let sheet = TermSheet::new(contract, number(7)).strike(number(3)).barrier(number(4)).rebate(rebate, paid);
        let market = Market { spot: number(2), vol: number(8), rate: number(9), dividend: number(10) };
        let ours = floodmark::price::greeks(&sheet, &market).unwrap().to_array();
        let touch = floodmark::price::barrier_profile(&sheet, &market).unwrap().touch_probability;
        let bound = floodmark::price::bounded_price(&sheet, &market).unwrap().error_bound;
        let bits = |number: f64| number.to_bits();
        let numbers = value.split(',').skip(1).filter(|&field| field != "ok");
        let theirs: Vec<u64> = numbers.map(|field| bits(field.parse().unwrap())).collect();
        let ours: Vec<u64> = ours.into_iter().chain([touch, bound]).map(bits).collect();
        assert_eq!(ours, theirs, "{row}");
    }
}

/// A row, and what is to be said of it.
const BAD_ROWS: [(&str, &str); 22] = [
    ("x,up-and-out call,NaN,100,120,3,,0.5,0.2,0.01,0", "spot must be positive and finite, got NaN"),
    ("x,up-and-out call,-1,100,120,3,,0.5,0.2,0.01,0", "spot must be positive and finite, got -1"),
    ("x,up-and-out call,100,inf,120,3,,0.5,0.2,0.01,0", "strike must be positive and finite, got inf"),
    ("x,up-and-out call,100,,120,3,,0.5,0.2,0.01,0", "strike is missing"),
    ("x,up-and-out call,100,100,,3,,0.5,0.2,0.01,0", "barrier is missing"),
    ("x,up-and-out call,100,100,0,3,,0.5,0.2,0.01,0", "barrier must be positive and finite, got 0"),
    ("x,up-and-out call,100,100,120,-3,,0.5,0.2,0.01,0", "rebate must be finite and at least 0, got -3"),
    ("x,up-and-out call,100,100,120,3,later,0.5,0.2,0.01,0", "rebate_paid must be hit or expiry, got later"),
    ("x,up-and-in call,100,100,120,3,hit,0.5,0.2,0.01,0", "rebate_paid is hit, but this contract has no hit to pay at"),
    ("x,up no-touch,100,,120,3,hit,0.5,0.2,0.01,0", "rebate_paid is hit, but this contract has no hit to pay at"),
    ("x,call,100,100,,,hit,0.5,0.2,0.01,0", "rebate_paid is hit, but this contract has no hit to pay at"),
    ("x,up-and-out call,100,100,120,3,,-0.5,0.2,0.01,0", "expiry must be from 0 to 10000 years, got -0.5"),
    ("x,up-and-out call,100,100,120,3,,0.5,-0.2,0.01,0", "vol must be from 0 to 1000, got -0.2"),
    ("x,up-and-out call,100,100,120,3,,0.5,20%,0.01,0", "vol must be a number, got 20%"),
    ("x,up-and-out call,100,100,120,3,,0.5,,0.01,0", "vol is missing"),
    ("x,up-and-out call,100,100,120,3,,0.5,0.2,1e5,0", "rate must be from -1000 to 1000, got 1e5"),
    ("x,up-and-out call,100,100,120,3,,0.5,0.2,0.01,\"0,02\"", "dividend must be a number, got 0,02"),
    ("x,up-and-over call,100,100,120,3,,0.5,0.2,0.01,0", "contract is not one that is known, got up-and-over call"),
    ("x,,100,100,120,3,,0.5,0.2,0.01,0", "contract is missing"),
    ("x,up-and-out call,100,100", "barrier is missing: the row has fewer fields than the header"),
    ("x,call,100,100,,,,0.5,0.2,0.01,0,7", "the row must have as many fields as the header, got 12"),
    ("x,call,\"100,100,,,,0.5,0.2,0.01,0", "a quote is opened and not closed in the same line"),
];

#[test]
fn a_bad_row_gets_a_sentence_and_its_neighbours_are_unharmed() {
    let good: Vec<String> = demo_book().lines().skip(1).map(str::to_owned).collect();
    let clean = reprice(COLUMNS.to_owned() + &good.join("\n"));
    let clean = values(&clean);
    let mixed: Vec<&str> =
        good.iter().zip(BAD_ROWS.iter().cycle()).flat_map(|(row, (bad, _))| [row.as_str(), bad]).collect();
    let output = reprice(COLUMNS.to_owned() + &mixed.join("\n"));
    assert_eq!(output.status.code(), Some(1));
    let mut reader = csv::ReaderBuilder::new().from_reader(&output.stdout[..]);
    let rows: Vec<csv::StringRecord> = reader.records().map(Result::unwrap).collect();
    assert_eq!(rows.len(), 2 * good.len());
    for (place, pair) in rows.chunks(2).enumerate() {
        assert_eq!(pair[0].iter().collect::<Vec<_>>().join(","), clean[place], "a neighbour of a bad row");
        assert_eq!(&pair[1][0], "x");
        assert!((1..14).all(|at| &pair[1][at] == "NaN"));
        assert_eq!(&pair[1][14], BAD_ROWS[place % BAD_ROWS.len()].1);
    }
    let summary = text(&output.stderr);
    assert!(summary.contains("308 valued, 308 refused"), "{summary}");
    assert!(summary.contains("vol must be a number") && summary.contains("line 3: x: spot must be"), "{summary}");
}

#[test]
fn bytes_that_are_no_text_are_refused_in_their_row_only() {
    let mut book = COLUMNS.as_bytes().to_vec();
    book.extend(
        b"\xff\xfe,call,100,100,,,,1,0.2,0,0\ny,\xffcall,100,100,,,,1,0.2,0,0\nz,call,1\xff,100,,,,1,0.2,0,0\n",
    );
    book.extend(b"ok,call,100,100,,,,1,0.2,0,0\n");
    let output = reprice(&book);
    let values = values(&output);
    assert_eq!(values.len(), 4);
    for (value, part) in values.iter().zip(["id must be UTF-8 text", "contract is not", "spot must be a number", ",ok"])
    {
        assert!(value.contains(part), "{value}");
    }
}

#[test]
fn a_book_that_cannot_be_read_is_refused_as_a_whole() {
    for (book, sentence) in [
        ("", "the book is empty: it has no header"),
        ("id,contract\na,call\n", "column spot is missing from the header"),
        ("id,contract,spot,strike,barrier,expiry,rate,dividend\n", "column vol is missing from the header"),
        ("id,id\n", "column id stands twice in the header"),
    ] {
        let output = reprice(book);
        assert_eq!(output.status.code(), Some(2));
        assert!(output.stdout.is_empty());
        assert_eq!(text(&output.stderr), format!("reprice: {sentence}\n"));
    }
    for arguments in [vec!["no such book.csv"], vec!["--no-such-option"], vec!["a", "b"]] {
        let output = Command::new(&*PROGRAM).args(&arguments).output().unwrap();
        assert_eq!(output.status.code(), Some(2), "{arguments:?}");
        assert!(!output.stderr.is_empty());
    }
}

#[test]
fn columns_may_stand_in_any_order_among_others() {
    let straight = reprice(demo_book());
    let turned: String = demo_book()
        .lines()
        .enumerate()
        .map(|(place, row)| {
            let mut fields: Vec<&str> = row.split(',').collect();
            fields.reverse();
            fields.insert(4, if place == 0 { "desk" } else { "upper river" });
            fields.join(",") + "\r\n"
        })
        .collect();
    let turned = reprice(turned);
    assert_eq!(text(&turned.stdout), text(&straight.stdout));
    assert!(text(&turned.stderr).contains("columns not read: desk"));
}

#[test]
fn quotes_make_no_difference() {
    let quoted: String = demo_book()
        .lines()
        .map(|row| row.split(',').map(|field| format!("\"{field}\"")).collect::<Vec<_>>().join(",") + "\n")
        .collect();
    assert_eq!(reprice(quoted).stdout, reprice(demo_book()).stdout);
    let output = reprice(COLUMNS.to_owned() + "\"desk 1, \"\"upper\"\"\",call,100,100,,,,1,0.2,0,0\n");
    assert!(values(&output)[0].starts_with("\"desk 1, \"\"upper\"\"\",7.96"), "{:?}", values(&output));
}

#[test]
fn a_file_goes_to_a_file_and_the_summary_to_the_terminal() {
    let (book, out) = (file("book.csv"), file("values.csv"));
    fs::write(&book, demo_book()).unwrap();
    let output = Command::new(&*PROGRAM).arg(&book).arg("--out").arg(&out).output().unwrap();
    assert_eq!(output.status.code(), Some(0));
    let piped = reprice(demo_book());
    assert_eq!(fs::read(&out).unwrap(), piped.stdout);
    assert_eq!(text(&output.stdout), text(&piped.stderr));
    assert!(output.stderr.is_empty());
    let over = Command::new(&*PROGRAM).arg(&book).arg("--out").arg(&book).output().unwrap();
    assert_eq!(over.status.code(), Some(2));
    assert_eq!(fs::read_to_string(&book).unwrap(), demo_book(), "the book is not overwritten");
}

#[test]
fn who_reads_the_values_may_stop_early() {
    let book = file("for-a-glance.csv");
    let rows = demo_book().split_off(COLUMNS.len());
    fs::write(&book, COLUMNS.to_owned() + &rows.repeat(20)).unwrap();
    let mut child = Command::new(&*PROGRAM).arg(&book).stdout(Stdio::piped()).stderr(Stdio::piped()).spawn().unwrap();
    let mut first = [0; 2];
    child.stdout.take().unwrap().read_exact(&mut first).unwrap();
    assert_eq!(&first, b"id");
    let output = child.wait_with_output().unwrap();
    assert_eq!((output.status.code(), text(&output.stderr)), (Some(0), ""));
}

/// The peak of memory in KiB that the program comes to while it reprices the demo book so many times over. The
/// system is asked before the book ends, when no more of it is left than a pipe holds.
fn peak(times: usize) -> u64 {
    let mut child = Command::new(&*PROGRAM)
        .arg("-")
        .stdin(Stdio::piped())
        .stdout(Stdio::null())
        .stderr(Stdio::null())
        .spawn()
        .unwrap();
    let mut input = child.stdin.take().unwrap();
    let book = demo_book();
    let (header, rows) = book.split_once('\n').unwrap();
    writeln!(input, "{header}").unwrap();
    for _ in 0..times {
        input.write_all(rows.as_bytes()).unwrap();
    }
    let status = fs::read_to_string(format!("/proc/{}/status", child.id())).unwrap();
    drop(input);
    assert!(child.wait().unwrap().success());
    let facts: HashMap<&str, &str> = status.lines().filter_map(|line| line.split_once(':')).collect();
    facts["VmHWM"].trim().trim_end_matches(" kB").parse().unwrap()
}

#[test]
fn a_long_book_takes_no_more_memory_than_a_short_one() {
    let (short, long) = (peak(100), peak(600));
    assert!(long < short + 2048, "30,800 rows: {short} KiB, 184,800 rows: {long} KiB");
}

#[test]
fn help_and_version_are_said() {
    let help = run(Command::new(&*PROGRAM).arg("--help"));
    for part in ["reprice [BOOK|-] [--out FILE|-]", "rebate_paid", "Exit status"] {
        assert!(help.contains(part), "{part}");
    }
    assert_eq!(run(Command::new(&*PROGRAM).arg("--version")), format!("reprice {}\n", floodmark::VERSION));
}
