//! Questions about a limit: `[[question]]`.

use super::context::Context;
use super::quantity::{self, Field, Said};
use crate::case::model::Question;
use crate::case::raw::Section;
use crate::diag::Notice;
use crate::units::Kind;

/// All `[[question]]` tables.
pub(super) fn questions(root: &Section<'_>, cx: &mut Context) -> Vec<Question> {
    let sections = cx.sections(root, "question");
    sections.iter().filter_map(|section| question(section, cx)).collect()
}

fn question(section: &Section<'_>, cx: &mut Context) -> Option<Question> {
    section.only(&["of", "above", "asked"], &mut cx.notices);
    let of = cx.required_text(section, "of", "the name of a result, such as \"A.impact_speed\"")?;
    // Every other result is a speed; whether there is one of this name is
    // known when the case is planned.
    let kind = match of.as_str() {
        "energy_lost" => Kind::Energy,
        "restitution" => Kind::Ratio,
        name if name.ends_with(".pdof") => Kind::Angle,
        _ => Kind::Speed,
    };
    let field = Field { key: "above", kind, bounds: NONE, plausible: NONE };
    let above = quantity::required(section, field, &format!("limit for {of}"), &Said::default(), cx)?;
    if !above.dist.is_exact() {
        let notice = Notice::stop("CF-5", "a limit has no uncertainty of its own").at(above.place);
        cx.notices.push(notice.expected("a plain value, such as \"50 km/h\""));
        return None;
    }
    Some(Question { of, above, asked: cx.text_of(section, "asked") })
}

const NONE: (f64, f64) = (f64::NEG_INFINITY, f64::INFINITY);
