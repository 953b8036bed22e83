//! House rules, run as a test: imports run one way, files and functions stay
//! small, each outside library has one home.
#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)]

mod common;

use std::path::{Path, PathBuf};

/// Layers from top to bottom; those in one entry are siblings and never import
/// each other.
const LAYERS: &[&[&str]] = &[
    &["cli"],
    &["report"],
    &["analysis"],
    &["rules"],
    &["sheet", "uncertainty"],
    &["plan"],
    &["case", "physics"],
    &["method"],
    &["scalar", "units", "stats"],
    &["diag"],
];

/// Outside libraries and the only place that may name them.
const HOMES: &[(&str, &str)] = &[
    ("toml::", "case/raw.rs"),
    ("csv::", "case/survey.rs"),
    ("uom::", "units/table.rs"),
    ("printpdf::", "report/pdf/"),
    ("lopdf::", "report/pdf/"),
    ("allsorts::", "report/pdf/"),
    ("annotate_snippets::", "report/terminal/notices.rs"),
    ("clap::", "cli/"),
    ("clap_complete::", "cli/"),
    ("tempfile::", "cli/"),
    ("std::fs", "cli/"),
    ("std::env", "cli/"),
    ("rayon::", "uncertainty/monte_carlo.rs"),
    ("statrs::", "stats/"),
    ("rand_xoshiro::", "stats/"),
];

fn sources(folder: &Path, found: &mut Vec<PathBuf>) {
    for entry in std::fs::read_dir(folder).unwrap() {
        let path = entry.unwrap().path();
        if path.is_dir() {
            sources(&path, found);
        } else if path.extension().is_some_and(|e| e == "rs") {
            found.push(path);
        }
    }
}

/// Every source file: its path below `src`, its text, and the text without
/// its tests.
fn files() -> Vec<(String, String, String)> {
    let src = common::root().join("src");
    let mut paths = Vec::new();
    sources(&src, &mut paths);
    paths.sort();
    paths
        .into_iter()
        .map(|path| {
            let text = std::fs::read_to_string(&path).unwrap();
            let code = text.split("#[cfg(test)]\nmod tests {").next().unwrap_or_default().to_string();
            (path.strip_prefix(&src).unwrap().to_string_lossy().replace('\\', "/"), text, code)
        })
        .collect()
}

fn rank(module: &str) -> Option<usize> {
    LAYERS.iter().position(|layer| layer.contains(&module))
}

fn is_test_support(path: &str) -> bool {
    path.starts_with("report/pdf/tests/") || path.ends_with("/read_back.rs") || path.ends_with("/sample.rs")
}

#[test]
fn imports_run_one_way() {
    let mut wrong = Vec::new();
    let mut seen = 0;
    for (path, _, code) in files() {
        let own = path.split('/').next().unwrap().trim_end_matches(".rs");
        if matches!(own, "lib" | "main") {
            continue;
        }
        let own_rank = rank(own).unwrap_or_else(|| panic!("{own} has no layer: add it to LAYERS"));
        for (at, _) in code.match_indices("crate::") {
            // `$crate::` in a macro and documentation links are no imports.
            let line_start = code[..at].rfind('\n').map_or(0, |n| n + 1);
            if code[..at].ends_with('$') || code[line_start..at].trim_start().starts_with("//") {
                continue;
            }
            let rest = &code[at + 7..];
            let end = rest.find(|c: char| !(c.is_alphanumeric() || c == '_')).unwrap_or(rest.len());
            let other = &rest[..end];
            let Some(other_rank) = rank(other) else { continue };
            seen += 1;
            if other != own && other_rank <= own_rank {
                wrong.push(format!("{path} imports {other}"));
            }
        }
    }
    assert!(wrong.is_empty(), "imports that do not run downwards:\n{}", wrong.join("\n"));
    assert!(seen > 100, "only {seen} imports were seen: this test no longer reads the code");
}

#[test]
fn every_outside_library_has_one_home() {
    let mut wrong = Vec::new();
    for (path, _, code) in files() {
        for (name, home) in HOMES {
            let uses = code.lines().any(|l| !l.trim_start().starts_with("//") && l.contains(name));
            if uses && !path.starts_with(home) && path != "main.rs" && !is_test_support(&path) {
                wrong.push(format!("{path} names {name}, whose home is {home}"));
            }
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
}

#[test]
fn files_and_functions_are_small() {
    let mut lengths = Vec::new();
    let mut wrong = Vec::new();
    for (path, text, code) in files() {
        let lines = text.lines().count();
        lengths.push(lines);
        if lines > 450 {
            wrong.push(format!("{path} has {lines} lines, at most 450"));
        }
        for (name, length) in functions(&code) {
            if length > 60 {
                wrong.push(format!("{path}: {name} has {length} lines, at most 60"));
            }
        }
    }
    lengths.sort_unstable();
    let median = lengths[lengths.len() / 2];
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
    assert!(median <= 200, "median file has {median} lines, at most 200");
}

/// Functions of a formatted file with their lengths: from a line that starts
/// with `fn` to the closing brace at the same depth.
fn functions(code: &str) -> Vec<(String, usize)> {
    let lines: Vec<&str> = code.lines().collect();
    let mut found = Vec::new();
    for (i, line) in lines.iter().enumerate() {
        let body = line.trim_start().trim_start_matches("pub(super) ").trim_start_matches("pub ");
        let Some(rest) = body.strip_prefix("fn ") else { continue };
        let depth = line.len() - line.trim_start().len();
        let close = format!("{}}}", " ".repeat(depth));
        if let Some(end) = lines[i..].iter().position(|l| *l == close) {
            let name = rest.split(['(', '<']).next().unwrap_or_default();
            found.push((name.to_string(), end + 1));
        }
    }
    found
}

#[test]
fn every_module_page_says_what_it_is() {
    for (path, text, _) in files() {
        if !is_test_support(&path) && !path.starts_with("report/pdf/tests") {
            assert!(text.starts_with("//!"), "{path} does not start with its page");
        }
    }
}

#[test]
fn no_unsafe_no_stub() {
    for (path, text, _) in files() {
        for word in ["unsafe ", "todo!(", "unimplemented!(", "#[ignore"] {
            assert!(!text.contains(word), "{path} contains {word}");
        }
    }
}
