//! Framed blocks: what must not be overlooked, and the boxes to sign.
//!
//! In: words. Out: strips with their share of the frame. Never breaks a box to
//! sign; a long framed text may go on, open, on the next page.

use super::fonts::Fonts;
use super::page::TEXT_WIDTH;
use super::strip::{Draw, FRAME, HAIR, Pen, Strip, hold_together, stack};
use super::style::{BODY, SMALL, STRONG, TABLE_HEAD};
use super::text::{Row, single, wrap};

/// White between frame and text.
const PAD: f64 = 9.0;
/// White between paragraphs inside a frame.
const BETWEEN: f64 = 4.0;
/// What a person fills in, one line each.
const FIELDS: [&str; 3] = ["Name", "Signature", "Date"];
const FIELD_HEIGHT: f64 = 25.0;
const BOX_GAP: f64 = 10.0;

/// A text in a frame.
pub fn boxed(fonts: &Fonts, title: &str, paragraphs: &[String]) -> Vec<Strip> {
    let width = TEXT_WIDTH - 2.0 * PAD;
    let mut strips = stack(PAD, STRONG, wrap(fonts, STRONG, title, width, 0.0));
    for text in paragraphs {
        let mut more = stack(PAD, BODY, wrap(fonts, BODY, text, width, 0.0));
        if let (false, Some(first)) = (strips.is_empty(), more.first_mut()) {
            lower(first, BETWEEN);
        }
        strips.append(&mut more);
    }
    enclose(&mut strips);
    hold_together(&mut strips);
    strips
}

/// Moves the text of a strip down and makes the strip that much higher.
fn lower(strip: &mut Strip, by: f64) {
    strip.height += by;
    for draw in &mut strip.draws {
        if let Draw::Text(spot, _) = draw {
            spot.1 += by;
        }
    }
}

/// Draws the frame: closed above and below, its sides along every strip.
fn enclose(strips: &mut [Strip]) {
    if let Some(first) = strips.first_mut() {
        lower(first, PAD - 2.0);
        first.draws.push(across(0.0));
    }
    if let Some(last) = strips.last_mut() {
        last.height += PAD - 1.0;
        let bottom = last.height;
        last.draws.push(across(bottom));
    }
    for strip in strips {
        for x in [0.0, TEXT_WIDTH] {
            strip.draws.push(Draw::Line((x, 0.0), (x, strip.height), FRAME));
        }
    }
}

fn across(y: f64) -> Draw {
    let half = FRAME.width / 2.0;
    Draw::Line((-half, y), (TEXT_WIDTH + half, y), FRAME)
}

/// A role with more rows than this stands above its box.
const ROLE_ROWS: usize = 6;

/// Boxes for name, signature and date, side by side, one for each role.
pub fn sign_off(fonts: &Fonts, roles: &[String]) -> Vec<Strip> {
    let across = match roles.len() {
        0..=2 | 4 => 2,
        _ => 3,
    };
    let mut strips = Vec::new();
    for some in roles.chunks(across) {
        let mut more = sign_row(fonts, some, across);
        if let (false, Some(first)) = (strips.is_empty(), more.first_mut()) {
            first.before = BOX_GAP;
        }
        strips.append(&mut more);
    }
    strips
}

/// The boxes that stand side by side; below one another if a role is very long.
fn sign_row(fonts: &Fonts, roles: &[String], across: usize) -> Vec<Strip> {
    let gaps = BOX_GAP * (across.saturating_sub(1)) as f64;
    let width = (TEXT_WIDTH - gaps) / across.max(1) as f64;
    let inside = |role: &String| wrap(fonts, TABLE_HEAD, role, width - 2.0 * PAD, 0.0);
    let titles: Vec<Vec<Row>> = roles.iter().map(inside).collect();
    if titles.iter().all(|rows| rows.len() <= ROLE_ROWS) {
        return vec![sign_boxes(fonts, titles, width)];
    }
    let mut strips = Vec::new();
    for role in roles {
        let rows = wrap(fonts, TABLE_HEAD, role, TEXT_WIDTH, 0.0);
        strips.extend(stack(0.0, TABLE_HEAD, rows));
        let mut below = sign_boxes(fonts, vec![Vec::new()], width);
        below.before = BETWEEN;
        strips.push(below);
    }
    strips
}

fn sign_boxes(fonts: &Fonts, titles: Vec<Vec<Row>>, width: f64) -> Strip {
    let rows = titles.iter().map(Vec::len).max().unwrap_or(0);
    let fields_top = PAD - 2.0 + rows as f64 * TABLE_HEAD.leading;
    let height = fields_top + FIELDS.len() as f64 * FIELD_HEIGHT + PAD;
    let mut draws = Vec::new();
    for (index, title) in titles.into_iter().enumerate() {
        let left = index as f64 * (width + BOX_GAP);
        for (line, row) in title.into_iter().enumerate() {
            let down = PAD - 2.0 + line as f64 * TABLE_HEAD.leading + TABLE_HEAD.baseline();
            draws.push(Draw::Text((left + PAD + row.indent, down), row));
        }
        fields(fonts, &mut draws, (left, fields_top), width);
        outline(&mut draws, left, width, height);
    }
    Strip { height, draws, ..Strip::default() }
}

fn fields(fonts: &Fonts, draws: &mut Vec<Draw>, (left, top): (f64, f64), width: f64) {
    let label_width = FIELDS.iter().map(|name| single(fonts, SMALL, name).width).fold(0.0, f64::max);
    let pen = Pen { grey: 0.3, ..HAIR };
    for (index, name) in FIELDS.iter().enumerate() {
        let base = top + (index as f64 + 1.0) * FIELD_HEIGHT;
        draws.push(Draw::Text((left + PAD, base - 1.0), single(fonts, SMALL, name)));
        draws.push(Draw::Line((left + PAD + label_width + 6.0, base), (left + width - PAD, base), pen));
    }
}

fn outline(draws: &mut Vec<Draw>, left: f64, width: f64, height: f64) {
    let pen = Pen { width: 0.6, ..FRAME };
    let half = pen.width / 2.0;
    for y in [0.0, height] {
        draws.push(Draw::Line((left - half, y), (left + width + half, y), pen));
    }
    for x in [left, left + width] {
        draws.push(Draw::Line((x, 0.0), (x, height), pen));
    }
}
