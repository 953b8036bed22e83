//! Worked lines: one step of the calculation, set to be read and recomputed.
//!
//! In: a worked line. Out: its rows in the order title, method, formula,
//! substitution, result, aside, source; the method and the aside share a printed
//! line with the row before them where there is room, but stay rows of their
//! own. Never evaluates anything.

use super::super::document::Worked;
use super::fonts::Fonts;
use super::page::TEXT_WIDTH;
use super::strip::{Draw, Strip, hold_together, stack};
use super::style::{BODY, SMALL, STRONG, Style, TABLE};
use super::text::{Row, single, wrap};

/// Indent of everything below the title.
const INDENT: f64 = 18.0;
/// Further indent of the rows that carry on a formula.
const CARRY: f64 = 14.0;
/// White between two rows that share a printed line.
const WIDE_GAP: f64 = 28.0;

/// The strips of a worked line; they hold together.
pub fn lay_out(fonts: &Fonts, line: &Worked) -> Vec<Strip> {
    let mut strips = title(fonts, line);
    for text in [&line.formula, &line.substitution] {
        strips.extend(stack(INDENT, BODY, wrap(fonts, BODY, text, TEXT_WIDTH - INDENT, CARRY)));
    }
    strips.extend(result(fonts, line));
    let mut from = stack(INDENT, SMALL, wrap(fonts, SMALL, &line.from, TEXT_WIDTH - INDENT, 0.0));
    if let Some(first) = from.first_mut() {
        first.before = 1.0;
    }
    strips.append(&mut from);
    hold_together(&mut strips);
    strips
}

fn title(fonts: &Fonts, line: &Worked) -> Vec<Strip> {
    let number = format!("[{}] ", line.number);
    let hang = single(fonts, STRONG, &format!("{number}.")).width - single(fonts, STRONG, ".").width;
    let rows = wrap(fonts, STRONG, &format!("{number}{}", line.title), TEXT_WIDTH, hang);
    let method = single(fonts, SMALL, &line.method);
    let at = TEXT_WIDTH - method.width;
    let fits = |end: f64| end + WIDE_GAP <= at;
    beside_or_below(rows, STRONG, 0.0, Beside { row: method, at, fits: &fits }, || {
        stack(INDENT, SMALL, wrap(fonts, SMALL, &line.method, TEXT_WIDTH - INDENT, 0.0))
    })
}

fn result(fonts: &Fonts, line: &Worked) -> Vec<Strip> {
    let rows = wrap(fonts, BODY, &line.result, TEXT_WIDTH - INDENT, CARRY);
    let aside = single(fonts, TABLE, &line.aside);
    let width = aside.width;
    let at = rows.last().map_or(0.0, |row| INDENT + row.indent + row.width + WIDE_GAP);
    let fits = |end: f64| end + WIDE_GAP + width <= TEXT_WIDTH;
    beside_or_below(rows, BODY, INDENT, Beside { row: aside, at, fits: &fits }, || {
        stack(INDENT, TABLE, wrap(fonts, TABLE, &line.aside, TEXT_WIDTH - INDENT, 0.0))
    })
}

/// A row to stand on the same printed line as another, if it fits after its end.
struct Beside<'a> {
    row: Row,
    at: f64,
    fits: &'a dyn Fn(f64) -> bool,
}

/// The rows, with the other one beside the only row if it fits, else below all.
fn beside_or_below(
    rows: Vec<Row>,
    style: Style,
    x: f64,
    beside: Beside<'_>,
    below: impl FnOnce() -> Vec<Strip>,
) -> Vec<Strip> {
    let end = rows.last().map_or(f64::INFINITY, |row| x + row.indent + row.width);
    let alone = rows.len() == 1;
    let mut strips = stack(x, style, rows);
    match strips.last_mut() {
        Some(last) if alone && (beside.fits)(end) => {
            if !beside.row.pieces.is_empty() {
                last.draws.push(Draw::Text((beside.at, style.baseline()), beside.row));
            }
        }
        _ => strips.extend(below()),
    }
    strips
}
