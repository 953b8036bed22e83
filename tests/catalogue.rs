//! Every formula of the catalogue: complete card, printed text, derivatives,
//! agreement of its three ways to compute, refusals, reference values.
//!
//! Nothing here knows a formula by name: a new one is tested by being listed.

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)]

mod common;

use common::{differs, none, printed};
use retrodict::method::{About, Column, Lanes, Limit, Node, WIDTH};
use retrodict::physics::{METHODS, formulas};
use retrodict::stats::Generator;
use retrodict::units::Kind;
use serde::Deserialize;
use std::collections::{BTreeMap, BTreeSet};

// ---- Random points -------------------------------------------------------

/// Where inputs of a kind are drawn from, SI: what crashes show, and its
/// opposite sense where a quantity has one.
fn range(kind: Kind) -> (f64, f64) {
    match kind {
        Kind::Length => (-60.0, 80.0),
        Kind::Mass => (150.0, 4000.0),
        Kind::Time => (-0.3, 0.3),
        Kind::Speed => (-40.0, 40.0),
        Kind::Acceleration => (9.7, 9.9),
        Kind::Angle => (-std::f64::consts::PI, std::f64::consts::PI),
        Kind::Ratio => (-1.5, 1.5),
        Kind::Energy => (-2e5, 5e5),
        Kind::Momentum => (-8e4, 8e4),
        Kind::Force => (-1e4, 1e4),
    }
}

/// The span of one input: that of its kind, cut to the formula's own limits.
fn span(node: &dyn Node, input: usize) -> (f64, f64) {
    let card = node.card();
    let own = card.limits.iter().filter(|l| l.about == About::Input(input));
    own.fold(range(card.inputs[input].kind), |(lo, hi), l| (lo.max(l.lo), hi.min(l.hi)))
}

fn spans(node: &dyn Node) -> Vec<(f64, f64)> {
    (0..node.card().inputs.len()).map(|i| span(node, i)).collect()
}

fn draw(spans: &[(f64, f64)], rng: &mut Generator) -> Vec<f64> {
    spans.iter().map(|(lo, hi)| lo + (hi - lo) * rng.uniform()).collect()
}

/// A stream of its own for every formula and purpose.
fn generator(node: &dyn Node, purpose: u64) -> Generator {
    let name = node.card().id.bytes().fold(purpose, |h, b| h.wrapping_mul(257).wrapping_add(u64::from(b)));
    Generator::new(20_260_309, name)
}

/// `count` points that the formula accepts.
fn accepted(node: &dyn Node, purpose: u64, count: usize) -> Vec<Vec<f64>> {
    let (spans, mut rng) = (spans(node), generator(node, purpose));
    let points: Vec<_> = (0..400 * count)
        .map(|_| draw(&spans, &mut rng))
        .filter(|x| node.value(x).is_ok())
        .take(count)
        .collect();
    assert_eq!(points.len(), count, "{}: too few accepted points", node.card().id);
    points
}

// ---- Cards ---------------------------------------------------------------

#[test]
fn every_card_is_complete() {
    let mut faults = Vec::new();
    let mut ids = BTreeSet::new();
    for node in formulas() {
        let card = node.card();
        let mut demand = |ok: bool, what: &str| {
            if !ok {
                faults.push(format!("{}: {what}", card.id));
            }
        };
        demand(!card.id.is_empty() && ids.insert(card.id), "its id is empty or not unique");
        let plain = |c: char| c.is_ascii_lowercase() || c.is_ascii_digit() || c == '-';
        demand(card.id.chars().all(plain), "its id is not of small letters, digits and -");
        demand(!card.title.trim().is_empty(), "no title");
        demand(!card.source.trim().is_empty(), "no source");
        demand(!card.undefined.trim().is_empty(), "no reason for 'no number at all'");
        demand(!card.inputs.is_empty(), "no inputs");
        for port in card.inputs.iter().chain([&card.output]) {
            demand(!port.symbol.trim().is_empty(), "a port without symbol");
            demand(!port.name.trim().is_empty(), "a port without name");
            let braces = |c| port.symbol.matches(c).count();
            demand(braces('{') == braces('}'), "a subscript that is not closed");
        }
        let mut symbols: Vec<_> = card.inputs.iter().chain([&card.output]).map(|p| p.symbol).collect();
        symbols.sort_unstable();
        symbols.dedup();
        demand(symbols.len() == card.inputs.len() + 1, "one symbol stands for two quantities");
        for limit in card.limits {
            demand(!limit.reason.trim().is_empty(), "a limit without its reason");
            demand(limit.lo < limit.hi, "a limit with nothing between its ends");
            demand(limit.lo.is_finite() || limit.hi.is_finite(), "a limit that limits nothing");
            let there = !matches!(limit.about, About::Input(i) if i >= card.inputs.len());
            demand(there, "a limit on an input that is not there");
        }
        demand(METHODS.iter().any(|m| m.id == card.method), "its method is not in METHODS");
    }
    assert!(!ids.is_empty(), "the catalogue is empty");
    none(&faults);
}

#[test]
fn every_method_says_what_it_answers_where_it_holds_and_where_it_comes_from() {
    let mut faults = Vec::new();
    let mut ids = BTreeSet::new();
    let mut errors = BTreeSet::new();
    for method in METHODS {
        let texts = [method.id, method.title, method.answers, method.holds, method.source];
        if texts.iter().any(|t| t.trim().is_empty()) {
            faults.push(format!("method '{}' lacks a text", method.id));
        }
        if !ids.insert(method.id) {
            faults.push(format!("method '{}' is there twice", method.id));
        }
        if !formulas().iter().any(|n| n.card().method == method.id) {
            faults.push(format!("method '{}' has no formula", method.id));
        }
        for error in method.errors {
            if !errors.insert(error.id) || error.title.trim().is_empty() || error.source.trim().is_empty() {
                faults.push(format!("method error '{}' is there twice or lacks a text", error.id));
            }
            if !(error.dist.u() > 0.0 && error.dist.u().is_finite() && error.dist.estimate().is_finite()) {
                faults.push(format!("method error '{}': u = {}", error.id, error.dist.u()));
            }
        }
    }
    none(&faults);
}

// ---- Printed text --------------------------------------------------------

/// The words of a printed formula: what stands between its signs.
fn words(text: &str) -> BTreeSet<String> {
    let between = |c: char| matches!(c, ' ' | '(' | ')' | ',' | '+' | '−' | '/' | '√' | '²' | '×');
    text.split(between).filter(|w| !w.is_empty()).map(str::to_string).collect()
}

#[test]
fn the_printed_text_uses_every_declared_symbol_and_no_other() {
    let mut faults = Vec::new();
    for node in formulas() {
        let card = node.card();
        let symbols: Vec<String> = card.inputs.iter().map(|p| p.symbol.to_string()).collect();
        let text = node.expression().in_symbols(&symbols);
        let declared: BTreeSet<String> = symbols.into_iter().collect();
        let known = ["sin", "cos", "atan2", "½", "1", "2"];
        let used: BTreeSet<String> =
            words(&text).into_iter().filter(|w| !known.contains(&w.as_str())).collect();
        for symbol in used.difference(&declared) {
            faults.push(format!("{}: '{symbol}' in '{text}' is not declared", card.id));
        }
        for symbol in declared.difference(&used) {
            faults.push(format!("{}: '{symbol}' is declared, but not in '{text}'", card.id));
        }
    }
    none(&faults);
}

/// Rule U-4: no unit is hidden in a constant; and ½, 1, 2 are all that
/// mechanics in SI needs.
#[test]
fn the_constants_of_a_formula_are_a_half_one_and_two() {
    let mut faults = Vec::new();
    for node in formulas() {
        let strange: Vec<f64> =
            node.expression().constants().into_iter().filter(|c| ![0.5, 1.0, 2.0].contains(c)).collect();
        if !strange.is_empty() {
            faults.push(format!("{}: constants {strange:?}", node.card().id));
        }
    }
    none(&faults);
}

// ---- Derivatives ---------------------------------------------------------

/// A central difference quotient, extrapolated to step zero (Richardson), and
/// an estimate of its own error; `None` where the formula refuses nearby.
fn quotient(node: &dyn Node, x: &[f64], input: usize, step: f64) -> Option<(f64, f64)> {
    let at = |h: f64| {
        let mut moved = x.to_vec();
        moved[input] = x[input] + h;
        node.value(&moved).ok()
    };
    let mut best: Option<(f64, f64)> = None;
    let mut above: Vec<f64> = Vec::new();
    for row in 0..7 {
        let h = step / f64::from(1 << row);
        let mut line = vec![(at(h)? - at(-h)?) / (2.0 * h)];
        let mut weight = 1.0;
        for (column, old) in above.iter().enumerate() {
            weight *= 4.0;
            let better = line[column] + (line[column] - old) / (weight - 1.0);
            // How far the last extrapolation moved both of its parents.
            let error = (better - line[column]).abs().max((better - old).abs());
            if best.is_none_or(|(_, e)| error < e) {
                best = Some((better, error));
            }
            line.push(better);
        }
        above = line;
    }
    best
}

/// At points where the difference quotient knows its value to 1e-7, the exact
/// derivative agrees with it to 1e-6, both of the slope plus value over span.
#[test]
fn derivatives_equal_difference_quotients() {
    let mut faults = Vec::new();
    for node in formulas() {
        let card = node.card();
        let spans = spans(node);
        let mut compared = vec![0_usize; spans.len()];
        for x in accepted(node, 1, 200) {
            let (value, slopes) = node.gradient(&x).expect("gradient refuses where value does not");
            assert_eq!(slopes.len(), x.len(), "{}", card.id);
            for (i, slope) in slopes.iter().enumerate() {
                let width = spans[i].1 - spans[i].0;
                let Some((difference, error)) = quotient(node, &x, i, 0.01 * width) else { continue };
                let size = slope.abs() + value.abs() / width;
                let sharp = error <= 1e-7 * size;
                if slope.is_finite() && !sharp {
                    continue;
                }
                compared[i] += 1;
                let what = format!("{}: derivative by {} at {x:?}", card.id, card.inputs[i].symbol);
                faults.extend(differs(&what, *slope, difference, 1e-6 * size));
            }
        }
        for (i, count) in compared.iter().enumerate().filter(|(_, n)| **n < 50) {
            faults
                .push(format!("{}: only {count} derivatives by {} compared", card.id, card.inputs[i].symbol));
        }
    }
    none(&faults);
}

// ---- Three ways to compute ------------------------------------------------

/// Runs up to [`WIDTH`] points as one batch.
fn batch(node: &dyn Node, points: &[Vec<f64>]) -> Vec<f64> {
    let n = node.card().inputs.len();
    let mut values: Vec<Lanes> = vec![[f64::NAN; WIDTH]; n];
    let mut sines = values.clone();
    let mut cosines = values.clone();
    for (lane, x) in points.iter().enumerate() {
        for i in 0..n {
            values[i][lane] = x[i];
            (sines[i][lane], cosines[i][lane]) = libm::sincos(x[i]);
        }
    }
    let columns: Vec<Column<'_>> =
        (0..n).map(|i| Column { value: &values[i], sin: &sines[i], cos: &cosines[i] }).collect();
    let mut out = [0.0; WIDTH];
    node.batch(&columns, &mut out);
    out[..points.len()].to_vec()
}

/// Compares the three ways at some points. Values agree to 1e-12 of the value,
/// or, where terms cancel, of the change that each input's whole size makes.
fn compare_ways(node: &dyn Node, points: &[Vec<f64>], faults: &mut Vec<String>) -> (usize, usize) {
    let id = node.card().id;
    let (mut given, mut refused) = (0, 0);
    for chunk in points.chunks(WIDTH) {
        for (x, lane) in chunk.iter().zip(batch(node, chunk)) {
            match (node.value(x), node.gradient(x)) {
                (Ok(value), Ok((dual, slopes))) => {
                    given += 1;
                    let terms: f64 = slopes.iter().zip(x).map(|(s, x)| (s * x).abs()).sum();
                    let size = if terms.is_finite() { value.abs().max(terms) } else { value.abs() };
                    faults.extend(differs(
                        &format!("{id}: gradient's value at {x:?}"),
                        dual,
                        value,
                        1e-12 * size,
                    ));
                    faults.extend(differs(&format!("{id}: batch at {x:?}"), lane, value, 1e-12 * size));
                }
                (Err(a), Err(b)) => {
                    refused += 1;
                    if a.reason != b.reason || a.kind != b.kind {
                        faults.push(format!(
                            "{id}: value and gradient refuse differently at {x:?}: {a:?} {b:?}"
                        ));
                    }
                    // The plan takes any number that is not finite as refused.
                    if lane.is_finite() {
                        faults.push(format!("{id}: batch gives {lane} at {x:?}, value refuses: {a:?}"));
                    }
                }
                (value, gradient) => {
                    faults.push(format!("{id}: value {value:?} but gradient {gradient:?} at {x:?}"));
                }
            }
        }
    }
    (given, refused)
}

#[test]
fn value_gradient_and_batch_agree_inside_the_limits() {
    let mut faults = Vec::new();
    for node in formulas() {
        let points = accepted(node, 2, 3 * WIDTH);
        let (given, _) = compare_ways(node, &points, &mut faults);
        assert_eq!(given, points.len(), "{}", node.card().id);
    }
    none(&faults);
}

/// Beyond the limits, at zero and at the limits themselves, where refusals are
/// decided: every way decides alike.
#[test]
fn value_gradient_and_batch_refuse_alike() {
    let mut faults = Vec::new();
    let mut refusals = 0;
    for node in formulas() {
        let card = node.card();
        let wide: Vec<_> = card.inputs.iter().map(|p| range(p.kind)).collect();
        let mut rng = generator(node, 3);
        let mut points: Vec<_> = (0..3 * WIDTH).map(|_| draw(&wide, &mut rng)).collect();
        for i in 0..wide.len() {
            let ends = card.limits.iter().filter(|l| l.about == About::Input(i)).flat_map(|l| [l.lo, l.hi]);
            for special in ends.filter(|e| e.is_finite()).chain([0.0, -0.0, 1.0]) {
                let mut x = draw(&spans(node), &mut rng);
                x[i] = special;
                points.push(x);
            }
        }
        points.push(vec![0.0; wide.len()]);
        points.push(vec![1.0; wide.len()]);
        refusals += compare_ways(node, &points, &mut faults).1;
    }
    assert!(refusals > 1000, "only {refusals} refusals seen");
    none(&faults);
}

/// A derivative that is no number would drop out of the band unseen.
#[test]
fn a_derivative_is_a_number_wherever_the_value_is() {
    let mut faults = Vec::new();
    for node in formulas() {
        let mut rng = generator(node, 4);
        let spans = spans(node);
        let mut points = accepted(node, 4, 100);
        for i in 0..spans.len() {
            for j in 0..spans.len() {
                // Two inputs equal, or both zero: coincident points, no change.
                let mut x = draw(&spans, &mut rng);
                x[j] = x[i];
                points.push(x.clone());
                (x[i], x[j]) = (0.0, 0.0);
                points.push(x);
            }
        }
        points.push(vec![0.0; spans.len()]);
        points.push(vec![1.0; spans.len()]);
        for x in points {
            if let Ok((value, slopes)) = node.gradient(&x)
                && slopes.iter().any(|s| s.is_nan())
            {
                faults.push(format!("{}: value {value}, derivatives {slopes:?} at {x:?}", node.card().id));
            }
        }
    }
    none(&faults);
}

// ---- Limits and impossible inputs ------------------------------------------

/// A step just beyond an end of a limit.
fn beyond(end: f64, sign: f64) -> f64 {
    end + sign * (1e-9 * end.abs()).max(1e-12)
}

fn input_limit(node: &dyn Node, input: usize, limit: &Limit, faults: &mut Vec<String>) {
    let card = node.card();
    for (end, sign) in [(limit.lo, -1.0), (limit.hi, 1.0)].into_iter().filter(|(end, _)| end.is_finite()) {
        for mut x in accepted(node, 5, 20) {
            x[input] = beyond(end, sign);
            match node.value(&x) {
                Err(r)
                    if r.reason == limit.reason
                        && r.value == x[input]
                        && r.kind == card.inputs[input].kind => {}
                other => faults.push(format!(
                    "{}: {} = {:e} beyond {end}: {other:?}",
                    card.id, card.inputs[input].symbol, x[input]
                )),
            }
            if batch(node, &[x.clone()])[0].is_finite() {
                faults.push(format!("{}: batch accepts {x:?}", card.id));
            }
        }
    }
}

/// Halves the way from an accepted point to one that this limit refuses until
/// the result stands on the limit's edge; true if it does.
fn reaches_edge(
    node: &dyn Node,
    inside: &[f64],
    outside: &[f64],
    limit: &Limit,
    end: f64,
    size: f64,
) -> bool {
    let (mut a, mut b) = (inside.to_vec(), outside.to_vec());
    for _ in 0..200 {
        let middle: Vec<f64> = a.iter().zip(&b).map(|(a, b)| 0.5 * (a + b)).collect();
        match node.value(&middle) {
            Ok(_) => a = middle,
            Err(r) if r.reason == limit.reason && r.value.is_finite() => b = middle,
            Err(_) => return false,
        }
    }
    let (Ok(last), Err(refused)) = (node.value(&a), node.value(&b)) else { return false };
    let out = if end == limit.lo { refused.value < end } else { refused.value > end };
    let edge = 1e-9 * size;
    out && (last - end).abs() <= edge
        && (refused.value - end).abs() <= edge
        && !batch(node, &[b])[0].is_finite()
}

fn output_limit(node: &dyn Node, limit: &Limit, faults: &mut Vec<String>) {
    let card = node.card();
    let good = accepted(node, 6, 60);
    let size = good.iter().filter_map(|x| node.value(x).ok()).fold(0.0, |m: f64, v| m.max(v.abs()));
    let (spans, mut rng) = (spans(node), generator(node, 7));
    let bad: Vec<_> = (0..20_000)
        .map(|_| draw(&spans, &mut rng))
        .filter_map(|x| node.value(&x).err().filter(|r| r.reason == limit.reason).map(|r| (x, r)))
        .take(200)
        .collect();
    for (x, r) in &bad {
        if (r.value >= limit.lo && r.value <= limit.hi) || r.kind != card.output.kind {
            faults.push(format!("{}: refused for no reason at {x:?}: {r:?}", card.id));
        }
    }
    for end in [limit.lo, limit.hi].into_iter().filter(|end| end.is_finite()) {
        let pairs = good.iter().flat_map(|g| bad.iter().map(move |(b, r)| (g, b, r)));
        let mut beyond =
            pairs.filter(|(_, _, r)| if end == limit.lo { r.value < end } else { r.value > end });
        if !beyond.any(|(g, b, _)| reaches_edge(node, g, b, limit, end, size)) {
            faults.push(format!("{}: no refusal just beyond {end} of the result", card.id));
        }
    }
}

#[test]
fn every_limit_refuses_just_outside_and_says_so() {
    let mut faults = Vec::new();
    let mut seen = 0;
    for node in formulas() {
        for limit in node.card().limits {
            seen += 1;
            match limit.about {
                About::Input(input) => input_limit(node, input, limit, &mut faults),
                About::Output => output_limit(node, limit, &mut faults),
            }
        }
    }
    assert!(seen > 0, "no formula has a limit");
    none(&faults);
}

#[test]
fn a_wrong_number_of_inputs_is_refused() {
    let mut faults = Vec::new();
    for node in formulas() {
        let card = node.card();
        let x = &accepted(node, 8, 1)[0];
        let mut longer = x.clone();
        longer.push(1.0);
        for wrong in [&[][..], &x[..x.len() - 1], &longer] {
            if node.value(wrong).is_ok() || node.gradient(wrong).is_ok() {
                faults.push(format!("{}: accepts {} inputs", card.id, wrong.len()));
            }
            let lanes = [1.0; WIDTH];
            let columns = vec![Column { value: &lanes, sin: &lanes, cos: &lanes }; wrong.len()];
            let mut out = [0.0; WIDTH];
            node.batch(&columns, &mut out);
            if !out.iter().all(|y| y.is_nan()) {
                faults.push(format!("{}: batch accepts {} inputs", card.id, wrong.len()));
            }
        }
    }
    none(&faults);
}

/// One input at a time replaced by each of `strange`.
fn refuses_everywhere(strange: &[f64]) {
    let mut faults = Vec::new();
    for node in formulas() {
        for (i, port) in node.card().inputs.iter().enumerate() {
            for value in strange {
                let mut x = accepted(node, 9, 1).remove(0);
                x[i] = *value;
                let what = format!("{}: {} = {value}", node.card().id, port.symbol);
                if let Ok(y) = node.value(&x) {
                    faults.push(format!("{what}: value gives {y}"));
                }
                if let Ok(y) = node.gradient(&x) {
                    faults.push(format!("{what}: gradient gives {y:?}"));
                }
                // Trials with an infinite value are refused by the plan's block.
                let lane = batch(node, &[x])[0];
                if value.is_nan() && lane.is_finite() {
                    faults.push(format!("{what}: batch gives {lane}"));
                }
            }
        }
    }
    none(&faults);
}

#[test]
fn an_input_that_is_no_number_is_refused() {
    refuses_everywhere(&[f64::NAN]);
}

#[test]
fn an_infinite_input_is_refused() {
    refuses_everywhere(&[f64::INFINITY, f64::NEG_INFINITY]);
}

// ---- Reference values ------------------------------------------------------

/// A file of `tests/reference`.
#[derive(Deserialize)]
#[serde(deny_unknown_fields)]
struct Reference {
    method: String,
    row: Vec<Row>,
}

/// One reference value, or one refusal.
#[derive(Deserialize)]
#[serde(deny_unknown_fields)]
struct Row {
    formula: String,
    inputs: Vec<Number>,
    /// As the source prints it; its last digit sets the tolerance.
    printed: Option<String>,
    /// SI units in one of what is printed.
    unit: Option<Number>,
    /// Instead of `printed`: a part of the reason for which it is refused.
    refuses: Option<String>,
    source: String,
    provenance: String,
}

/// A number, or its arithmetic.
#[derive(Deserialize, Debug)]
#[serde(untagged)]
enum Number {
    Plain(f64),
    Worked(String),
}

impl Number {
    fn value(&self) -> f64 {
        match self {
            Number::Plain(value) => *value,
            Number::Worked(text) => exmex::eval_str(text).unwrap_or_else(|e| panic!("'{text}': {e}")),
        }
    }
}

/// All reference files by name.
fn references() -> BTreeMap<String, Reference> {
    let folder = concat!(env!("CARGO_MANIFEST_DIR"), "/tests/reference");
    let mut files = BTreeMap::new();
    for entry in std::fs::read_dir(folder).unwrap() {
        let path = entry.unwrap().path();
        if path.extension().is_some_and(|e| e == "toml") {
            let name = path.file_name().unwrap().to_string_lossy().into_owned();
            let text = std::fs::read_to_string(&path).unwrap();
            files.insert(name.clone(), toml::from_str(&text).unwrap_or_else(|e| panic!("{name}: {e}")));
        }
    }
    files
}

/// Runs `check` on every row with its formula; it gives a fault or none.
fn each_row(check: impl Fn(&dyn Node, &[f64], &Row) -> Option<String>) {
    let mut faults = Vec::new();
    for (file, reference) in references() {
        for (number, row) in reference.row.iter().enumerate() {
            let place = format!("{file}, row {} ({}; {})", number + 1, row.formula, row.source);
            match formulas().into_iter().find(|n| n.card().id == row.formula) {
                None => faults.push(format!("{place}: no such formula")),
                Some(node) => {
                    let x: Vec<f64> = row.inputs.iter().map(Number::value).collect();
                    faults.extend(check(node, &x, row).map(|fault| format!("{place}: {fault}")));
                }
            }
        }
    }
    none(&faults);
}

#[test]
fn every_formula_has_reference_values_with_their_origin() {
    let mut faults = Vec::new();
    let files = references();
    for node in formulas() {
        let card = node.card();
        let rows = files.values().filter(|f| f.method == card.method).flat_map(|f| &f.row);
        if !rows.filter(|r| r.formula == card.id).any(|r| r.printed.is_some()) {
            faults.push(format!("{}: no reference value of method {}", card.id, card.method));
        }
    }
    let marks = ["found", "memory", "common practice", "derived", "verified"];
    for (file, reference) in &files {
        for row in &reference.row {
            let origin = row.source.trim().len() >= 8 && marks.iter().any(|m| row.provenance.starts_with(m));
            if !origin || row.printed.is_some() == row.refuses.is_some() {
                faults.push(format!("{file}: a row of {} lacks its origin or its figure", row.formula));
            }
        }
    }
    none(&faults);
}

#[test]
fn formulas_give_the_reference_values() {
    each_row(|node, x, row| {
        let figure = printed(row.printed.as_deref()?);
        let unit = row.unit.as_ref().map_or(1.0, Number::value);
        let (value, lane) = match node.value(x) {
            Ok(value) => (value / unit, batch(node, &[x.to_vec()])[0] / unit),
            Err(refusal) => return Some(format!("refused: {refusal:?}")),
        };
        // A few units in the last place of a double for figures with all digits.
        let tolerance = figure.half_unit + 4.0 * f64::EPSILON * figure.value.abs();
        differs("value", value, figure.value, tolerance)
            .or_else(|| differs("batch", lane, figure.value, tolerance))
    });
}

#[test]
fn formulas_refuse_what_the_references_call_impossible() {
    each_row(|node, x, row| {
        let wanted = row.refuses.as_deref()?;
        match (node.value(x), batch(node, &[x.to_vec()])[0]) {
            (Ok(value), _) => Some(format!("gives {value} instead of refusing: {wanted}")),
            (_, lane) if lane.is_finite() => Some(format!("batch gives {lane}")),
            (Err(r), _) if r.reason.contains(wanted) => None,
            (Err(r), _) => Some(format!("refused for another reason: {r:?}")),
        }
    });
}
