//! Checks a case file and reports all its faults at once.
//!
//! One file a table of the case; `context.rs` holds what they share.

mod context;
mod direction;
mod friction;
mod head;
mod impact;
mod phase;
mod quantity;
mod question;
mod stretch;
mod unit;

use super::model::Case;
use super::raw::{Section, parse};
use super::survey;
use crate::diag::{FileId, Notice, Notices, Place, SourceFile};
use crate::method::MethodError;
use crate::units::System;
use context::Context;

/// Largest case or points file that is read, bytes.
pub const LARGEST: usize = 4 << 20;

/// What reading a case gave.
#[derive(Debug)]
pub struct Checked {
    /// The case, unless a fault stops the work.
    pub case: Option<Case>,
    /// Everything there is to say about it.
    pub notices: Notices,
    /// The files it was read from; the case file first.
    pub files: Vec<SourceFile>,
}

/// Gives the text of another file that the case names, or a sentence that says
/// why not.
pub type Load<'a> = &'a dyn Fn(&str) -> Result<String, String>;

/// Reads a case file; `errors` are the method errors that a case may change.
///
/// Never panics; every fault of the file becomes a notice with its place.
pub fn read(name: &str, text: &str, errors: &[MethodError], load: Load<'_>) -> Checked {
    let mut files = vec![SourceFile { name: name.into(), text: text.into() }];
    let mut cx = Context::default();
    if text.len() > LARGEST {
        let message = format!("the file has {} bytes; a case file has at most {LARGEST}", text.len());
        cx.notices.push(Notice::stop("CF-1", message).hint("is this a case file?"));
        return Checked { case: None, notices: cx.notices, files };
    }
    let table = parse(text, &mut cx.notices);
    if cx.notices.any_stop() {
        // What a broken file seems to lack would only distract.
        return Checked { case: None, notices: cx.notices, files };
    }
    let root = Section::root(&table, text);
    let case = whole(&root, &mut cx, errors, load, &mut files);
    let notices = cx.notices.sorted();
    Checked { case: case.filter(|_| !notices.any_stop()), notices, files }
}

const KEYS: &[&str] = &[
    "format",
    "plus_minus",
    "case",
    "survey",
    "point",
    "friction_test",
    "unit",
    "impact",
    "method_error",
    "answer",
    "question",
];

fn whole(
    root: &Section<'_>,
    cx: &mut Context,
    errors: &[MethodError],
    load: Load<'_>,
    files: &mut Vec<SourceFile>,
) -> Option<Case> {
    root.only(KEYS, &mut cx.notices);
    head::format(root, cx);
    let (identity, gravity) = head::identity(root, cx);
    let before = cx.notices.len();
    let points = points(root, cx, load, files);
    cx.broken.points = cx.notices.len() > before;
    let survey = root.get("survey").and_then(|i| i.section("survey"));
    if let (Some(survey), Some(identity)) = (survey, &identity)
        && identity.system == System::Us
        && !survey.has("units")
    {
        let notice = Notice::note("CF-9", "the coordinates of the points file are read as metres");
        cx.notices.push(notice.at(survey.place).hint("say units = \"m\" or \"ft\" in [survey]"));
    }
    let before = cx.notices.len();
    let tests = friction::tests(root, cx);
    cx.broken.tests = cx.notices.len() > before;
    let names = unit::names(root, cx);
    let before = cx.notices.len();
    let impacts = impact::impacts(root, &names, cx);
    cx.broken.impacts = cx.notices.len() > before;
    let scope = phase::Scope { points: &points, tests: &tests, impacts: &impacts };
    let units = unit::units(root, &scope, cx);
    let error_changes = head::error_changes(root, errors, cx);
    let answers = head::answers(root, cx);
    let questions = question::questions(root, cx);
    let case = Case {
        identity: identity?,
        gravity,
        points,
        tests,
        units,
        impacts,
        error_changes,
        answers,
        questions,
    };
    Some(case)
}

fn points(
    root: &Section<'_>,
    cx: &mut Context,
    load: Load<'_>,
    files: &mut Vec<SourceFile>,
) -> Vec<super::Point> {
    let mut points = Vec::new();
    if let Some(survey) = cx.section(root, "survey") {
        survey.only(&["points", "units", "coordinate"], &mut cx.notices);
        let metre = cx.choice(&survey, "units", &[("m", ("m", 1.0)), ("ft", ("ft", 0.3048))]);
        let spread = quantity::spread(&survey, "coordinate", cx);
        if let (Some(item), Some(spread)) = (survey.get("points"), spread) {
            let name = cx.text(&item, "the name of a CSV file").unwrap_or_default();
            match load(&name) {
                Ok(text) if text.len() <= LARGEST => {
                    let file = FileId(files.len());
                    points =
                        survey::points(&text, file, spread, metre.unwrap_or(("m", 1.0)), &mut cx.notices);
                    files.push(SourceFile { name, text });
                }
                Ok(_) => {
                    cx.notices.push(Notice::stop("CF-9", format!("{name} is too large")).at(item.place()));
                }
                Err(why) => cx.notices.push(
                    Notice::stop("CF-9", format!("the survey points cannot be read: {why}"))
                        .at(item.place())
                        .expected("a CSV file beside the case file: number,east,north,code"),
                ),
            }
        }
    }
    if let Some(table) = cx.section(root, "point") {
        for (number, place, item) in table.items() {
            let Some(section) = cx.table(&item, format!("point.{number}")) else { continue };
            section.only(&["east", "north", "code", "source", "note"], &mut cx.notices);
            if let Some(point) = quantity::point(number, &section, cx) {
                report_twice(&points, number, place, cx);
                points.push(point);
            }
        }
    }
    points
}

fn report_twice(points: &[super::Point], number: &str, place: Place, cx: &mut Context) {
    if points.iter().any(|p| p.number == number) {
        let message = format!("point {number} is given twice: in the survey and here");
        cx.notices.push(Notice::stop("CF-7", message).at(place).expected("each point once"));
    }
}
