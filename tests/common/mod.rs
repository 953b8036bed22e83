//! What several tests need.
#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic, dead_code)]

use retrodict::analysis::{Analysis, Options, Outcome, analyse};
use retrodict::uncertainty::Trials;
use std::path::Path;

/// The project's folder.
pub fn root() -> &'static Path {
    Path::new(env!("CARGO_MANIFEST_DIR"))
}

/// A file of the project as text.
pub fn text(path: &str) -> String {
    std::fs::read_to_string(root().join(path)).unwrap_or_else(|e| panic!("{path}: {e}"))
}

/// Analyses a case of the `cases` folder.
pub fn case_file(name: &str, trials: Trials) -> Outcome {
    let load = |file: &str| Ok(text(&format!("cases/{file}")));
    analyse(name, &text(&format!("cases/{name}")), &load, Options { seed: 1, trials })
}

/// Analyses a case given as text.
pub fn case_text(case: &str, trials: Trials) -> Outcome {
    analyse("case.toml", case, &|name| Err(format!("no {name} here")), Options { seed: 1, trials })
}

/// The value of a result; fails with the notices when there is none.
pub fn value(outcome: &Outcome, id: &str) -> f64 {
    let analysis = outcome.analysis.as_ref().unwrap_or_else(|| panic!("no analysis: {}", said(outcome)));
    let found = analysis.results.iter().find(|r| r.named.id == id);
    found.unwrap_or_else(|| panic!("no {id}: {}", said(outcome))).band.linear.value
}

/// Codes of the notices, with their severity: `WARN M-2`.
pub fn codes(outcome: &Outcome) -> Vec<String> {
    outcome.notices.iter().map(|n| format!("{} {}", n.severity.word(), n.code)).collect()
}

/// All notices as text.
pub fn said(outcome: &Outcome) -> String {
    retrodict::report::terminal::notices(&outcome.notices, &outcome.files, false)
}

/// The demo with its points written into the case, so that it stands alone.
pub fn demo() -> String {
    let mut case = text("cases/quarry-road.toml");
    let start = case.find("[survey]").unwrap();
    let end = case.find("[friction_test.F1]").unwrap();
    let mut points = String::new();
    for row in text("cases/quarry-road-points.csv").lines().skip(1) {
        let cells: Vec<&str> = row.split(',').collect();
        points.push_str(&format!(
            "[point.{}]\neast = \"{} ± 0.05 m (1 sd)\"\nnorth = \"{} ± 0.05 m (1 sd)\"\n",
            cells[0], cells[1], cells[2]
        ));
    }
    case.replace_range(start..end, &points);
    case
}

/// A figure as a source prints it: its value, and half a unit of its last
/// digit, which is all that the source claims.
#[derive(Debug, Clone, Copy)]
pub struct Printed {
    pub value: f64,
    pub half_unit: f64,
}

/// Reads `27.5`, `-7.2`, `1.7266e-5` or `2.7e5` as printed.
pub fn printed(text: &str) -> Printed {
    let (digits, exponent) = text.split_once('e').unwrap_or((text, "0"));
    let decimals = digits.split_once('.').map_or(0, |(_, d)| d.len());
    let exponent: i32 = exponent.parse().unwrap_or_else(|_| panic!("'{text}' has no whole exponent"));
    let last = exponent - i32::try_from(decimals).unwrap();
    let half_unit: f64 = format!("5e{}", last - 1).parse().unwrap();
    Printed { value: text.parse().unwrap_or_else(|_| panic!("'{text}' is no number")), half_unit }
}

/// What is wrong with a comparison, if anything is: both numbers, their
/// difference and the tolerance.
pub fn differs(what: &str, got: f64, expected: f64, tolerance: f64) -> Option<String> {
    let difference = got - expected;
    let close = difference.abs() <= tolerance && tolerance.is_finite();
    (!close).then(|| {
        format!(
            "{what}: got {got:e}, expected {expected:e}, difference {difference:e}, tolerance {tolerance:e}"
        )
    })
}

/// Fails unless `got` lies within `tolerance` of `expected`.
#[track_caller]
pub fn near(what: &str, got: f64, expected: f64, tolerance: f64) {
    if let Some(fault) = differs(what, got, expected, tolerance) {
        panic!("{fault}");
    }
}

/// Fails unless `got`, divided by `unit`, rounds to the figure as printed.
#[track_caller]
pub fn prints(what: &str, got: f64, unit: f64, figure: &str) {
    let p = printed(figure);
    // A few units in the last place of a double on top, for figures printed
    // to as many digits as a double holds.
    near(what, got / unit, p.value, p.half_unit + 4.0 * f64::EPSILON * p.value.abs());
}

/// Fails with all faults at once.
#[track_caller]
pub fn none(faults: &[String]) {
    assert!(faults.is_empty(), "{} fault(s):\n{}", faults.len(), faults.join("\n"));
}

/// One kilometre an hour, one mile an hour, one foot, one pound: exact by
/// definition (SI; international yard and pound agreement, 1959).
pub const KMH: f64 = 1.0 / 3.6;
pub const MPH: f64 = 0.44704;
pub const FT: f64 = 0.3048;
pub const LB: f64 = 0.453_592_37;
/// Standard gravity (CGPM 1901).
pub const G: f64 = 9.80665;
pub const DEG: f64 = std::f64::consts::PI / 180.0;

/// Runs a case text that names no other file, with few trials: for values.
pub fn outcome(text: &str) -> Outcome {
    let none = |name: &str| Err(format!("{name}: this case has no other file"));
    analyse("case.toml", text, &none, Options { seed: 1, trials: Trials::Fixed(10_000) })
}

/// The notices of an outcome, one a line.
pub fn notices(outcome: &Outcome) -> String {
    let line = |n: &retrodict::diag::Notice| format!("{:?} {} {}\n", n.severity, n.code, n.message);
    outcome.notices.iter().map(line).collect()
}

/// The analysis of a case that must not be stopped.
#[track_caller]
pub fn solved(text: &str) -> Analysis {
    let outcome = outcome(text);
    assert!(!outcome.notices.any_stop(), "stopped:\n{}", notices(&outcome));
    outcome.analysis.expect("an analysis")
}

/// A result at the best estimates, SI.
#[track_caller]
pub fn result(analysis: &Analysis, id: &str) -> f64 {
    let found = analysis.results.iter().find(|r| r.named.id == id);
    let Some(found) = found else {
        let all: Vec<&str> = analysis.results.iter().map(|r| r.named.id.as_str()).collect();
        panic!("no result {id}, only {all:?}; refused: {:?}", analysis.refused);
    };
    found.band.linear.value
}
