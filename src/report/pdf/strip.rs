//! Strips: what a page is stacked from.
//!
//! In: rows and lines placed by the layout of one block. Out: horizontal strips
//! of the page's width, with their height and how they hold together. Never
//! knows where on which page a strip will stand.

use std::rc::Rc;

use super::style::Style;
use super::text::Row;

/// How a line is drawn.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Pen {
    /// Width in points.
    pub width: f64,
    /// 0 black, 1 white.
    pub grey: f64,
    /// Dashed instead of solid.
    pub dashed: bool,
}

/// The thin grey line between table rows.
pub const HAIR: Pen = Pen { width: 0.3, grey: 0.65, dashed: false };
/// Rules at head, foot and beneath table heads.
pub const THIN: Pen = Pen { width: 0.6, grey: 0.0, dashed: false };
/// Frames.
pub const FRAME: Pen = Pen { width: 0.9, grey: 0.0, dashed: false };

/// A point: from the strip's left edge, and down from its top; points.
pub type Spot = (f64, f64);

/// Something printed, placed within its strip.
#[derive(Debug, Clone, PartialEq)]
pub enum Draw {
    /// A row of text with the left end of its baseline.
    Text(Spot, Row),
    /// A straight line.
    Line(Spot, Spot, Pen),
    /// A filled polygon with its grey.
    Fill(Vec<Spot>, f64),
    /// Not printed: the file's outline has an entry that leads here.
    Entry(String),
}

/// A part of the page that is never split.
#[derive(Debug, Clone, Default, PartialEq)]
pub struct Strip {
    /// White above it, left out at the top of a page.
    pub before: f64,
    /// Its own height.
    pub height: f64,
    /// Must stand on the same page as the strip after it.
    pub glued: bool,
    /// What is printed, in reading order.
    pub draws: Vec<Draw>,
    /// Repeated above it when it begins a page.
    pub head: Option<Rc<Strip>>,
}

impl Strip {
    /// A strip with one row of text, its column beginning at `x`.
    pub fn text(x: f64, style: Style, row: Row) -> Self {
        let spot = (x + row.indent, style.baseline());
        Strip { height: style.leading, draws: vec![Draw::Text(spot, row)], ..Strip::default() }
    }
}

/// A strip for each row, all in a column that begins at `x`.
pub fn stack(x: f64, style: Style, rows: Vec<Row>) -> Vec<Strip> {
    rows.into_iter().map(|row| Strip::text(x, style, row)).collect()
}

/// Glues the strips to one another, the last one not.
pub fn hold_together(strips: &mut [Strip]) {
    if let Some((_, others)) = strips.split_last_mut() {
        for strip in others {
            strip.glued = true;
        }
    }
}

/// Glues the first two and the last two strips, so that no single row is left
/// alone at the end or the start of a page.
pub fn no_single_rows(strips: &mut [Strip]) {
    let count = strips.len();
    for (index, strip) in strips.iter_mut().enumerate() {
        let first_of_two = index == 0 || index + 2 == count;
        strip.glued |= first_of_two && index + 1 < count;
    }
}
