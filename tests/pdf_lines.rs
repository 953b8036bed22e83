//! Every printed line of the PDF can be recomputed from the numbers on it.
//!
//! The text is taken out of the PDF, units are stripped, and a general
//! expression evaluator (exmex, crates.io) computes the numbers put in. Each
//! printed number stands for the interval of its rounding; the printed result
//! must be a rounding of the interval that follows. A changed digit must fail.
#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)]

mod common;
#[path = "../src/report/pdf/read_back.rs"]
#[allow(unreachable_pub)]
mod pdf_text;

use common::case_file;
use exmex::prelude::*;
use retrodict::report::{compose, pdf};
use retrodict::uncertainty::Trials;

const UNITS: [&str; 9] = [" kg·m/s", " m/s²", " m/s", " kg", " m", " s", " J", " N", "°"];

/// A printed number: its value and half the unit of its last digit, in the
/// unit of the evaluation (degrees become radians).
#[derive(Debug, Clone, Copy)]
struct Printed {
    value: f64,
    half: f64,
}

/// One worked line as it stands in the PDF.
#[derive(Debug, Clone)]
struct WorkedLine {
    title: String,
    substitution: String,
    result: String,
}

fn worked_lines(pdf: &[u8]) -> Vec<WorkedLine> {
    let rows = pdf_text::joined(pdf);
    let mut lines: Vec<WorkedLine> = Vec::new();
    let mut current: Option<(String, Vec<String>)> = None;
    let mut finish = |current: &mut Option<(String, Vec<String>)>| {
        if let Some((title, equals)) = current.take()
            && let [substitution, result] = equals.as_slice()
        {
            lines.push(WorkedLine { title, substitution: substitution.clone(), result: result.clone() });
        }
    };
    for row in rows {
        let numbered = row.starts_with('[') && row.contains("] ");
        if numbered {
            finish(&mut current);
            current = Some((row, Vec::new()));
        } else if let (Some((_, equals)), Some(rest)) = (&mut current, row.strip_prefix("= "))
            && equals.len() < 2
        {
            equals.push(rest.to_string());
        }
    }
    finish(&mut current);
    lines
}

/// Splits a leading number and its unit from a text.
fn number(text: &str) -> Option<(Printed, &str)> {
    let end = text.find(|c: char| !c.is_ascii_digit() && c != '.').unwrap_or(text.len());
    let digits = &text[..end];
    let value: f64 = digits.parse().ok()?;
    let decimals = digits.split_once('.').map_or(0, |(_, d)| d.len() as i32);
    let rest = &text[end..];
    let unit = UNITS.iter().find(|u| rest.starts_with(**u)).copied().unwrap_or("");
    let scale = if unit == "°" { std::f64::consts::PI / 180.0 } else { 1.0 };
    // Whole numbers and the half without a unit are constants of the formula
    // or exact entries, not roundings.
    let exact = unit.is_empty() && (decimals == 0 || digits == "0.5");
    let half = if exact { 0.0 } else { 0.5 * libm::pow(10.0, f64::from(-decimals)) };
    Some((Printed { value: value * scale, half: half * scale }, &rest[unit.len()..]))
}

/// Turns a printed expression into one for the evaluator, with the numbers as
/// variables.
fn translate(text: &str) -> (String, Vec<Printed>) {
    let mut expression = String::new();
    let mut numbers = Vec::new();
    let mut rest = text;
    while let Some(c) = rest.chars().next() {
        if c.is_ascii_digit() {
            let (printed, after) = number(rest).unwrap_or_else(|| panic!("no number: {rest}"));
            expression.push_str(&format!("{{x{:03}}}", numbers.len()));
            numbers.push(printed);
            rest = after;
            continue;
        }
        if let Some(after) = rest.strip_prefix("atan2(") {
            let (y, x, after) = arguments(after);
            let (fy, ny) = translate(y);
            let (fx, nx) = translate(x);
            expression.push_str(&format!(
                "(({}) atan2 ({}))",
                shift(&fy, numbers.len()),
                shift(&fx, numbers.len() + ny.len())
            ));
            numbers.extend(ny);
            numbers.extend(nx);
            rest = after;
            continue;
        }
        match c {
            '−' => expression.push('-'),
            '×' => expression.push('*'),
            '²' => expression.push_str("^2"),
            '√' => expression.push_str("sqrt"),
            other => expression.push(other),
        }
        rest = &rest[c.len_utf8()..];
    }
    (expression, numbers)
}

/// Renumbers the variables of a part.
fn shift(expression: &str, by: usize) -> String {
    let mut out = String::new();
    let mut rest = expression;
    while let Some(at) = rest.find("{x") {
        let index: usize = rest[at + 2..at + 5].parse().unwrap();
        out.push_str(&format!("{}{{x{:03}}}", &rest[..at], index + by));
        rest = &rest[at + 6..];
    }
    out + rest
}

/// The two arguments of a function and what follows its bracket.
fn arguments(text: &str) -> (&str, &str, &str) {
    let (mut depth, mut comma) = (0, None);
    for (at, c) in text.char_indices() {
        match c {
            '(' => depth += 1,
            ')' if depth == 0 => {
                let comma: usize = comma.expect("two arguments");
                return (&text[..comma], text[comma + 1..at].trim(), &text[at + 1..]);
            }
            ')' => depth -= 1,
            ',' if depth == 0 => comma = Some(at),
            _ => {}
        }
    }
    panic!("a bracket is not closed: {text}");
}

/// The interval of a printed expression over all its roundings.
fn interval(text: &str) -> (f64, f64) {
    let (expression, numbers) = translate(text);
    let parsed = exmex::parse::<f64>(&expression).unwrap_or_else(|e| panic!("{text}\n{expression}\n{e}"));
    let values: Vec<f64> = numbers.iter().map(|n| n.value).collect();
    let middle = parsed.eval(&values).unwrap();
    let mut reach = 0.0;
    for (i, n) in numbers.iter().enumerate() {
        let mut worst: f64 = 0.0;
        for side in [-n.half, n.half] {
            let mut moved = values.clone();
            moved[i] += side;
            worst = worst.max((parsed.eval(&moved).unwrap() - middle).abs());
        }
        reach += worst;
    }
    (middle - reach, middle + reach)
}

/// The printed result and half the unit of its last digit. Trailing zeros of
/// a whole number may be no digits: 19200 stands for its hundreds.
fn result(line: &WorkedLine) -> (f64, f64) {
    let text = line.result.trim_start_matches('−');
    let (printed, _) = number(text).expect("a result");
    let digits = &text[..text.find(|c: char| !c.is_ascii_digit() && c != '.').unwrap_or(text.len())];
    let zeros = if digits.contains('.') { 0 } else { digits.len() - digits.trim_end_matches('0').len() };
    let half = if printed.half == 0.0 { 0.5 } else { printed.half } * libm::pow(10.0, zeros.min(3) as f64);
    let sign = if line.result.starts_with('−') { -1.0 } else { 1.0 };
    (sign * printed.value, half)
}

/// Whether the printed result is a rounding of what the numbers give.
fn closes(line: &WorkedLine) -> Result<(), String> {
    let (value, half) = result(line);
    let (lo, hi) = interval(&line.substitution);
    if value >= lo - half && value <= hi + half && hi - lo < 2.0 * half {
        return Ok(());
    }
    let WorkedLine { title, substitution, result } = line;
    Err(format!("{title}\n  = {substitution}\n  = {result}\n  the numbers give {lo} to {hi}"))
}

fn demo(name: &str) -> Vec<WorkedLine> {
    let outcome = case_file(name, Trials::Look);
    let document = compose(&outcome).expect("a document");
    worked_lines(&pdf::render(&document).expect("a PDF"))
}

#[test]
fn every_line_of_the_printed_demo_closes() {
    let outcome = case_file("quarry-road.toml", Trials::Look);
    let count = outcome.analysis.as_ref().unwrap().lines.len();
    let lines = demo("quarry-road.toml");
    assert_eq!(lines.len(), count, "lines were lost between the worksheet and the PDF");
    let open: Vec<String> = lines.iter().filter_map(|l| closes(l).err()).collect();
    assert!(open.is_empty(), "{} lines do not close:\n{}", open.len(), open.join("\n"));
}

#[test]
fn every_line_of_every_case_closes() {
    for entry in std::fs::read_dir(common::root().join("cases")).unwrap() {
        let name = entry.unwrap().file_name().to_string_lossy().to_string();
        if name.ends_with(".toml") {
            let open: Vec<String> = demo(&name).iter().filter_map(|l| closes(l).err()).collect();
            assert!(open.is_empty(), "{name}: {} lines do not close:\n{}", open.len(), open.join("\n"));
        }
    }
}

/// Each digit of the result in turn becomes another: the line must not close.
#[test]
fn a_changed_digit_of_a_result_is_found() {
    let mut tried = 0;
    for line in demo("quarry-road.toml") {
        let digits: Vec<usize> =
            line.result.char_indices().filter(|(_, c)| c.is_ascii_digit()).map(|(i, _)| i).collect();
        let zeros = significant_end(&line.result, &digits);
        for at in &digits[..zeros] {
            let digit = line.result.as_bytes()[*at] - b'0';
            let mut changed = line.clone();
            let other = char::from(b'0' + (digit + 2) % 10).to_string();
            changed.result.replace_range(*at..*at + 1, &other);
            assert!(closes(&changed).is_err(), "still closes: {changed:?}");
            tried += 1;
        }
    }
    assert!(tried > 100, "only {tried} digits were tried");
}

/// How many of a result's digits count: not the zeros of a rounded whole
/// number.
fn significant_end(result: &str, digits: &[usize]) -> usize {
    let number_end = result.find([' ', '°']).unwrap_or(result.len());
    let own: Vec<usize> = digits.iter().copied().filter(|d| *d < number_end).collect();
    let text = &result[..number_end];
    if text.contains('.') { own.len() } else { own.len() - (text.len() - text.trim_end_matches('0').len()) }
}

/// The first digit of each number put in becomes another: wherever that moves
/// the result by more than its last digit, the line must not close.
#[test]
fn a_changed_number_is_found() {
    let mut tried = 0;
    for line in demo("quarry-road.toml") {
        let text = &line.substitution;
        for (at, c) in text.char_indices() {
            let starts =
                c.is_ascii_digit() && !text[..at].ends_with(|p: char| p.is_ascii_digit() || p == '.');
            let is_name = text[..at].ends_with("atan");
            if !starts || is_name || c == '0' {
                continue;
            }
            let other = if c == '9' { '8' } else { char::from(c as u8 + 1) };
            let mut changed = line.clone();
            changed.substitution.replace_range(at..at + 1, &other.to_string());
            let (lo, hi) = interval(&changed.substitution);
            let (was_lo, was_hi) = interval(text);
            let moved = ((lo + hi) - (was_lo + was_hi)).abs() / 2.0;
            if moved > 3.0 * result(&line).1 {
                assert!(closes(&changed).is_err(), "still closes: {changed:?}");
                tried += 1;
            }
        }
    }
    assert!(tried > 60, "only {tried} numbers were tried");
}
