//! The JSON object: a contract for other programs.
//!
//! One object: `format`, `version`, `caution`, `case`, `case_sha256`,
//! `points_sha256`, `seed`, `trials`, `impossible_trials`, `results` (a map from
//! a stable id), `refused`, `questions`, `notices`. Values are in SI units,
//! angles in radians. Keys are never renamed within a format.

use super::caution;
use crate::analysis::Outcome;
use crate::plan::Sought;
use crate::uncertainty::Basis;
use crate::units::clock;
use serde::Serialize;
use std::collections::BTreeMap;

#[derive(Serialize)]
struct Export<'a> {
    format: u32,
    version: &'a str,
    caution: &'a str,
    case: &'a str,
    case_sha256: String,
    points_sha256: Option<String>,
    seed: Option<u64>,
    trials: u64,
    impossible_trials: u64,
    results: BTreeMap<&'a str, Exported<'a>>,
    refused: BTreeMap<&'a str, &'a str>,
    questions: Vec<ExportedQuestion<'a>>,
    notices: Vec<ExportedNotice<'a>>,
}

#[derive(Serialize)]
struct Exported<'a> {
    label: &'a str,
    unit: &'static str,
    value: f64,
    u: f64,
    low: f64,
    high: f64,
    coverage: f64,
    method: Basis,
    #[serde(skip_serializing_if = "Option::is_none")]
    remark: Option<String>,
}

#[derive(Serialize)]
struct ExportedQuestion<'a> {
    of: &'a str,
    above: f64,
    /// `None` where the result was refused.
    probability: Option<f64>,
    standard_error: Option<f64>,
    at_least: Option<f64>,
    remark: &'static str,
}

#[derive(Serialize)]
struct ExportedNotice<'a> {
    code: &'a str,
    severity: crate::diag::Severity,
    message: &'a str,
    line: Option<usize>,
    #[serde(skip_serializing_if = "Option::is_none")]
    hint: Option<&'a str>,
    #[serde(skip_serializing_if = "Option::is_none")]
    answer: Option<&'a str>,
}

/// Renders an outcome, refused or not.
pub fn render(outcome: &Outcome) -> String {
    let analysis = outcome.analysis.as_ref();
    let results =
        analysis.map(|a| a.results.iter().map(|r| (r.named.id.as_str(), exported(outcome, r))).collect());
    let export = Export {
        format: 1,
        version: env!("CARGO_PKG_VERSION"),
        caution: caution::SHORT,
        case: analysis.map_or("", |a| a.case.identity.number.as_str()),
        case_sha256: outcome.sha256(0),
        points_sha256: outcome.files.get(1).map(|_| outcome.sha256(1)),
        seed: analysis.map(|a| a.seed),
        trials: analysis.map_or(0, |a| a.sampling.trials),
        impossible_trials: analysis.map_or(0, |a| a.sampling.impossible),
        results: results.unwrap_or_default(),
        refused: analysis
            .map(|a| a.refused.iter().map(|(n, why)| (n.id.as_str(), why.as_str())).collect())
            .unwrap_or_default(),
        questions: analysis.map(|a| a.questions.iter().map(question).collect()).unwrap_or_default(),
        notices: outcome.notices.iter().map(|n| notice(outcome, n)).collect(),
    };
    // Only numbers that are not finite could fail, and bands hold none.
    serde_json::to_string_pretty(&export).unwrap_or_default()
}

fn exported<'a>(outcome: &'a Outcome, r: &'a crate::analysis::Answered) -> Exported<'a> {
    let kind = outcome.analysis.as_ref().map(|a| a.plan.slot(r.named.slot).kind);
    Exported {
        label: &r.named.label,
        unit: kind.map_or("", |k| k.si_unit()),
        value: r.band.value,
        u: r.band.u,
        low: r.band.low,
        high: r.band.high,
        coverage: 0.95,
        method: r.band.basis,
        remark: if r.named.sought == Sought::ForceDirection {
            Some(clock(r.band.value))
        } else {
            r.named.remark.map(Into::into)
        },
    }
}

fn question(asked: &crate::analysis::Asked) -> ExportedQuestion<'_> {
    let known = asked.about.is_some();
    ExportedQuestion {
        of: &asked.question.of,
        above: asked.question.above.dist.estimate(),
        probability: known.then_some(asked.probability.0),
        standard_error: known.then_some(asked.probability.1),
        at_least: known.then_some(asked.least),
        remark: "at_least: one-sided, 95 %; a probability is not a finding of fault",
    }
}

fn notice<'a>(outcome: &Outcome, n: &'a crate::diag::Notice) -> ExportedNotice<'a> {
    let line = n.place.and_then(|p| outcome.files.get(p.file.0).map(|f| f.line_column(p.start).0));
    ExportedNotice {
        code: n.code,
        severity: n.severity,
        message: &n.message,
        line,
        hint: n.hint.as_deref(),
        answer: n.answer.as_deref(),
    }
}
