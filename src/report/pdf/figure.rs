//! Drawings: at their size in millimetres, centred, with the caption beneath.
//!
//! In: a figure and the height of a page. Out: one strip for the drawing and one
//! for each row of its caption, glued. Shrinks what is too large, labels
//! included, so that nothing reaches into the margins; never enlarges, never
//! cuts off, never draws a coordinate that is not a number.

use super::super::document::{Figure, Mark, Stroke};
use super::error::PdfError;
use super::fonts::Fonts;
use super::page::{MM, TEXT_WIDTH};
use super::strip::{Draw, Pen, Spot, Strip, hold_together};
use super::style::{BODY, Style, TABLE};
use super::text::{Row, single, wrap};

/// White between drawing and caption.
const GAP: f64 = 5.0;
/// Arrow heads: length, and half width as a share of it.
const HEAD_LENGTH: f64 = 2.3 * MM;
const HEAD_HALF: f64 = 0.32;

/// The strips of a figure.
pub fn lay_out(fonts: &Fonts, figure: &Figure, page_height: f64) -> Result<Vec<Strip>, PdfError> {
    let caption = wrap(fonts, TABLE, &figure.caption, TEXT_WIDTH * 0.86, 0.0);
    let caption_height = GAP + caption.len() as f64 * TABLE.leading;
    let room = f64::max(page_height - caption_height, page_height / 2.0);
    let extent =
        extent(fonts, figure).ok_or_else(|| PdfError::Drawing { caption: figure.caption.clone() })?;
    let scale = [1.0, TEXT_WIDTH / extent.width(), room / extent.height()].into_iter().fold(1.0, f64::min);
    let view = View { scale, left: (TEXT_WIDTH - extent.width() * scale) / 2.0, extent };
    let mut drawing = Strip { height: view.extent.height() * scale, ..Strip::default() };
    for mark in &figure.marks {
        view.draw(fonts, mark, &mut drawing.draws);
    }
    let mut strips = vec![drawing];
    strips.extend(caption.into_iter().map(centred));
    if let Some(first) = strips.get_mut(1) {
        first.before = GAP;
    }
    hold_together(&mut strips);
    Ok(strips)
}

fn centred(row: Row) -> Strip {
    Strip::text((TEXT_WIDTH - row.width) / 2.0, TABLE, row)
}

/// The rectangle that a drawing takes, points, upwards from its origin.
struct Extent {
    low: Spot,
    high: Spot,
}

impl Extent {
    fn take_in(&mut self, (x, y): Spot) {
        self.low = (self.low.0.min(x), self.low.1.min(y));
        self.high = (self.high.0.max(x), self.high.1.max(y));
    }

    fn width(&self) -> f64 {
        (self.high.0 - self.low.0).max(1.0)
    }

    fn height(&self) -> f64 {
        (self.high.1 - self.low.1).max(1.0)
    }
}

/// The figure's own rectangle and all its marks; none if a number is not finite.
fn extent(fonts: &Fonts, figure: &Figure) -> Option<Extent> {
    let mut extent = Extent { low: (0.0, 0.0), high: (0.0, 0.0) };
    extent.take_in(points((figure.width, figure.height))?);
    for mark in &figure.marks {
        match mark {
            Mark::Line { from, to, stroke } | Mark::Arrow { from, to, stroke } => {
                points((stroke.width, stroke.grey))?;
                extent.take_in(points(*from)?);
                extent.take_in(points(*to)?);
            }
            Mark::Label { at, anchor, size, text } => {
                let (x, y) = points(*at)?;
                let size = points((*size, 0.0)).map(|_| label_size(*size))?;
                let row = single(fonts, label_style(size), text);
                let left = x - shift(*anchor) * row.width;
                extent.take_in((left, y - 0.25 * size));
                extent.take_in((left + row.width, y + 0.78 * size));
            }
        }
    }
    Some(extent)
}

/// Millimetres to points, if both are finite and of a size that paper may have.
fn points((x, y): (f64, f64)) -> Option<Spot> {
    let usable = |value: f64| value.is_finite() && value.abs() < 1e6;
    (usable(x) && usable(y)).then_some((x * MM, y * MM))
}

fn label_size(size: f64) -> f64 {
    size.clamp(1.0, 72.0)
}

fn label_style(size: f64) -> Style {
    Style { size, leading: size * 1.3, ..BODY }
}

/// Which share of the label's width lies left of its anchor.
fn shift(anchor: i8) -> f64 {
    match anchor {
        i8::MIN..=-1 => 0.0,
        0 => 0.5,
        1.. => 1.0,
    }
}

/// How a drawing's points come onto its strip.
struct View {
    scale: f64,
    left: f64,
    extent: Extent,
}

impl View {
    fn spot(&self, (x, y): (f64, f64)) -> Spot {
        let across = self.left + (x * MM - self.extent.low.0) * self.scale;
        (across, (self.extent.high.1 - y * MM) * self.scale)
    }

    fn pen(&self, stroke: &Stroke) -> Pen {
        let width = (stroke.width * MM * self.scale).clamp(0.1, 20.0);
        Pen { width, grey: stroke.grey.clamp(0.0, 1.0), dashed: stroke.dashed }
    }

    fn draw(&self, fonts: &Fonts, mark: &Mark, draws: &mut Vec<Draw>) {
        match mark {
            Mark::Line { from, to, stroke } => {
                draws.push(Draw::Line(self.spot(*from), self.spot(*to), self.pen(stroke)));
            }
            Mark::Arrow { from, to, stroke } => {
                arrow(self.spot(*from), self.spot(*to), self.pen(stroke), draws);
            }
            Mark::Label { at, anchor, size, text } => {
                let row = single(fonts, label_style(label_size(*size) * self.scale), text);
                let (x, y) = self.spot(*at);
                draws.push(Draw::Text((x - shift(*anchor) * row.width, y), row));
            }
        }
    }
}

/// A shaft and a filled head whose tip is the end.
fn arrow(from: Spot, to: Spot, pen: Pen, draws: &mut Vec<Draw>) {
    let (dx, dy) = (to.0 - from.0, to.1 - from.1);
    let length = libm::hypot(dx, dy);
    if length < 1e-3 {
        return draws.push(Draw::Line(from, to, pen));
    }
    let head = f64::min(f64::max(HEAD_LENGTH, 4.0 * pen.width), 0.6 * length);
    let (ux, uy) = (dx / length, dy / length);
    let base = (to.0 - ux * head, to.1 - uy * head);
    let half = head * HEAD_HALF;
    draws.push(Draw::Line(from, base, pen));
    let left = (base.0 - uy * half, base.1 + ux * half);
    let right = (base.0 + uy * half, base.1 - ux * half);
    draws.push(Draw::Fill(vec![to, left, right], pen.grey));
}
