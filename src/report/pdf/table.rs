//! Tables: columns by weight, cells wrapped, the head repeated.
//!
//! In: a table and the height of a page. Out: a strip for the head and one for
//! each row. Never drops a cell: a row longer than the head makes the table
//! wider. A row is split only if it is higher than a page.

use std::rc::Rc;

use super::super::document::{Align, Table};
use super::fonts::Fonts;
use super::page::TEXT_WIDTH;
use super::strip::{Draw, HAIR, Pen, Strip, THIN, no_single_rows};
use super::style::{Style, TABLE, TABLE_HEAD};
use super::text::{Row, wrap};

/// White at the left and right of a cell's text.
const SIDE: f64 = 4.5;
/// White above and below a cell's text.
const ABOVE: f64 = 2.0;
/// No column is narrower, points.
const NARROWEST: f64 = 18.0;

/// Where a column stands and how its text does.
struct Place {
    left: f64,
    width: f64,
    align: Align,
}

/// The strips of a table.
pub fn lay_out(fonts: &Fonts, table: &Table, page_height: f64) -> Vec<Strip> {
    let places = places(table);
    let heads: Vec<&str> = table.columns.iter().map(|column| column.head.as_str()).collect();
    let head = row_strip(fonts, &places, &heads, TABLE_HEAD, THIN);
    let has_head = head.draws.len() > 1;
    let repeated = (has_head && head.height <= page_height / 3.0).then(|| Rc::new(head.clone()));
    let room = page_height - repeated.as_ref().map_or(0.0, |head| head.height);
    let mut rows = Vec::new();
    for cells in &table.rows {
        let cells: Vec<&str> = cells.iter().map(String::as_str).collect();
        rows.extend(split_if_higher(row_strip(fonts, &places, &cells, TABLE, HAIR), TABLE, room));
    }
    no_single_rows(&mut rows);
    for row in &mut rows {
        row.head.clone_from(&repeated);
    }
    let mut strips = if has_head { split_if_higher(head, TABLE_HEAD, page_height) } else { Vec::new() };
    if !rows.is_empty() {
        strips.iter_mut().for_each(|strip| strip.glued = true);
    }
    strips.extend(rows);
    strips
}

/// Shares the width among the columns in the ratio of their weights.
fn places(table: &Table) -> Vec<Place> {
    let count = table.rows.iter().map(Vec::len).fold(table.columns.len(), usize::max);
    let usable = |weight: f64| {
        if weight.is_finite() && weight > 0.0 { weight.clamp(1e-6, 1e6) } else { 0.0 }
    };
    let given: Vec<f64> = table.columns.iter().map(|column| usable(column.weight)).collect();
    let sum: f64 = given.iter().sum();
    let mean = if sum > 0.0 { sum / given.len().max(1) as f64 } else { 1.0 };
    let weights: Vec<f64> =
        (0..count).map(|i| given.get(i).copied().filter(|w| *w > 0.0).unwrap_or(mean)).collect();
    let least = f64::min(NARROWEST, TEXT_WIDTH / count.max(1) as f64);
    let all: f64 = weights.iter().sum();
    let wanted: Vec<f64> = weights.iter().map(|weight| f64::max(weight / all * TEXT_WIDTH, least)).collect();
    let scale = TEXT_WIDTH / wanted.iter().sum::<f64>();
    let mut left = 0.0;
    let mut places = Vec::new();
    for (index, width) in wanted.iter().map(|width| width * scale).enumerate() {
        let align = table.columns.get(index).map_or(Align::Left, |column| column.align);
        places.push(Place { left, width, align });
        left += width;
    }
    places
}

/// One row of the table with the rule beneath it.
fn row_strip(fonts: &Fonts, places: &[Place], cells: &[&str], style: Style, rule: Pen) -> Strip {
    let mut draws = Vec::new();
    let mut most = 1;
    for (place, text) in places.iter().zip(cells) {
        let rows = wrap(fonts, style, text, f64::max(place.width - 2.0 * SIDE, 1.0), 0.0);
        most = most.max(rows.len());
        for (index, row) in rows.into_iter().enumerate() {
            let down = ABOVE + index as f64 * style.leading + style.baseline();
            draws.push(Draw::Text((place.text_left(&row), down), row));
        }
    }
    let height = 2.0 * ABOVE + most as f64 * style.leading;
    draws.push(Draw::Line((0.0, height), (TEXT_WIDTH, height), rule));
    Strip { height, draws, ..Strip::default() }
}

impl Place {
    fn text_left(&self, row: &Row) -> f64 {
        match self.align {
            Align::Left => self.left + SIDE,
            Align::Right => self.left + self.width - SIDE - row.width,
        }
    }
}

/// A strip that is higher than the room is cut between its printed lines.
fn split_if_higher(strip: Strip, style: Style, room: f64) -> Vec<Strip> {
    if strip.height <= room {
        return vec![strip];
    }
    let lines = ((strip.height - 2.0 * ABOVE) / style.leading).round().max(1.0) as usize;
    let mut parts: Vec<Strip> = vec![Strip { height: style.leading, ..Strip::default() }; lines];
    for draw in strip.draws {
        let down = match &draw {
            Draw::Text(spot, _) | Draw::Line(spot, ..) => spot.1,
            _ => 0.0,
        };
        let index = ((down / style.leading) as usize).min(lines.saturating_sub(1));
        if let Some(part) = parts.get_mut(index) {
            part.draws.push(moved_up(draw, index as f64 * style.leading));
        }
    }
    if let Some(last) = parts.last_mut() {
        last.height += 2.0 * ABOVE;
    }
    parts
}

fn moved_up(draw: Draw, by: f64) -> Draw {
    match draw {
        Draw::Text((x, y), row) => Draw::Text((x, y - by), row),
        Draw::Line(from, to, pen) => Draw::Line((from.0, from.1 - by), (to.0, to.1 - by), pen),
        other => other,
    }
}
