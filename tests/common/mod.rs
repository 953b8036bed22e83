//! What several tests need.
#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic, dead_code)]

use retrodict::analysis::{Options, Outcome, analyse};
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

/// Fails with both numbers when they differ by more than `tolerance`.
pub fn close(what: &str, got: f64, wanted: f64, tolerance: f64) {
    let difference = (got - wanted).abs();
    assert!(
        difference <= tolerance,
        "{what}: {got} instead of {wanted}, off by {difference}, allowed {tolerance}"
    );
}
