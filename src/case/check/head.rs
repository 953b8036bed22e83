//! The head of the case, changed method errors, answers to warnings.

use super::context::Context;
use super::quantity::{self, Field, GRAVITY, Said};
use crate::case::model::{Answer, Entry, ErrorChange, Identity};
use crate::case::notation::Spread;
use crate::case::raw::Section;
use crate::diag::Notice;
use crate::method::MethodError;
use crate::units::System;

/// `format = 1`, and what a bare ± means.
pub(super) fn format(root: &Section<'_>, cx: &mut Context) {
    match root.get("format") {
        None => root.missing("format", "1", &mut cx.notices),
        Some(item) => {
            if item.text_or_number().as_deref() != Some("1") || item.text().is_some() {
                let message = "this case file has a format that this version does not know";
                cx.notices.push(Notice::stop("CF-4", message).at(item.place()).expected("format = 1"));
            }
        }
    }
    let words = [("95 %", Spread::Cover95), ("1 sd", Spread::OneSd), ("limits", Spread::Limits)];
    cx.spread = cx.choice(root, "plus_minus", &words);
}

const KEYS: &[&str] = &["number", "title", "units", "prepared_by", "date", "question", "remarks", "gravity"];

/// Who, what, which units; and local gravity.
pub(super) fn identity(root: &Section<'_>, cx: &mut Context) -> (Option<Identity>, Option<Entry>) {
    let Some(head) = cx.section(root, "case") else {
        root.missing("[case]", "a table with number and title", &mut cx.notices);
        return (None, None);
    };
    head.only(KEYS, &mut cx.notices);
    let system = cx.choice(&head, "units", &[("metric", System::Metric), ("us", System::Us)]);
    let number = cx.required_text(&head, "number", "the case number, in quotation marks");
    let title = cx.required_text(&head, "title", "what the case is called, in quotation marks");
    let gravity = quantity::entry(&head, GRAVITY, "local gravity", &Said::default(), cx);
    let identity = Identity {
        number: number.unwrap_or_default(),
        title: title.unwrap_or_default(),
        system: system.unwrap_or_default(),
        prepared_by: cx.text_of(&head, "prepared_by"),
        date: cx.text_of(&head, "date"),
        question: cx.text_of(&head, "question"),
        remarks: remarks(&head, cx),
    };
    (Some(identity), gravity)
}

fn remarks(head: &Section<'_>, cx: &mut Context) -> Vec<String> {
    let Some(item) = head.get("remarks") else { return Vec::new() };
    match item.array() {
        Some(items) => items.iter().filter_map(|i| cx.text(i, "a text in quotation marks")).collect(),
        None => cx.text(&item, "a text, or a list of texts").into_iter().collect(),
    }
}

/// `[method_error.skid]`: value and reason.
pub(super) fn error_changes(root: &Section<'_>, known: &[MethodError], cx: &mut Context) -> Vec<ErrorChange> {
    let Some(table) = cx.section(root, "method_error") else { return Vec::new() };
    let mut changes = Vec::new();
    for (id, _, item) in table.items() {
        let Some(error) = known.iter().find(|e| e.id == id) else {
            let known: Vec<&str> = known.iter().map(|e| e.id).collect();
            cx.unknown_name(&item, id, &format!("'{id}' is not a method error of this program"), &known);
            continue;
        };
        let Some(section) = cx.table(&item, format!("method_error.{id}")) else { continue };
        section.only(&["value", "reason"], &mut cx.notices);
        let bounds = if error.dist.estimate() == 0.0 { UNLIMITED } else { (0.0, f64::INFINITY) };
        let field = Field { key: "value", kind: error.kind, bounds, plausible: UNLIMITED };
        let reason = cx.required_text(&section, "reason", "why the case changes this method error");
        let entry = quantity::required(&section, field, error.title, &Said::default(), cx);
        if let Some(expected) = entry.as_ref().and_then(|e| misfit(error, e.dist.estimate())) {
            let message = format!("{}: this value cannot be meant", error.title);
            cx.notices.push(Notice::stop("CF-8", message).at(item.place()).expected(expected));
        }
        if let (Some(entry), Some(reason)) = (entry, reason) {
            changes.push(ErrorChange { id: id.into(), entry, reason });
        }
    }
    changes
}

const UNLIMITED: (f64, f64) = (f64::NEG_INFINITY, f64::INFINITY);

/// What a method error's value must be like, if it is not: factors lie round
/// one, and the road has no direction of its own.
fn misfit(error: &MethodError, estimate: f64) -> Option<&'static str> {
    let standard = error.dist.estimate();
    if standard == 1.0 && !(0.5..=1.5).contains(&estimate) {
        return Some("a factor round one, such as \"1 ± 0.03 (1 sd)\": 0.5 to 1.5");
    }
    (standard == 0.0 && estimate != 0.0).then_some("zero on the average, such as \"0 ± 1 (1 sd)\"")
}

/// `[[answer]]`: what somebody says to a warning.
pub(super) fn answers(root: &Section<'_>, cx: &mut Context) -> Vec<Answer> {
    let mut answers = Vec::new();
    for section in cx.sections(root, "answer") {
        section.only(&["code", "about", "reason", "by"], &mut cx.notices);
        let code = cx.required_text(&section, "code", "the warning's code, such as M-2");
        let reason = cx.required_text(&section, "reason", "why the result stands all the same");
        let by = cx.required_text(&section, "by", "who says so");
        if let (Some(code), Some(reason), Some(by)) = (code, reason, by) {
            let about = match section.has("about") {
                true => cx.required_text(&section, "about", "words of the warning it is about"),
                false => None,
            };
            answers.push(Answer { code, about, reason, by, place: section.place });
        }
    }
    answers
}
