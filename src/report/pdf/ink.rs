//! Ink: turns what is to be printed into the operators of a page.
//!
//! In: rows, lines and polygons with their places. Out: operators, and which
//! characters each face had to show. Each row becomes one text object with one
//! absolute position. Never measures, never leaves out a character unnoticed.

use std::collections::{BTreeMap, BTreeSet};

use printpdf::{
    Color, Greyscale, Line, LineDashPattern, LinePoint, Op, PaintMode, PdfFontHandle, Point, Polygon,
    PolygonRing, Pt, TextItem, TextMatrix, WindingOrder,
};

use super::error::PdfError;
use super::fonts::{Face, Fonts};
use super::page::{LEFT, PAPER_HEIGHT};
use super::strip::{Draw, Pen, Spot};
use super::text::{Piece, Row};

/// The characters that each face has to show.
pub type Used = BTreeMap<Face, BTreeSet<char>>;

/// Writes pages, one after the other.
pub struct Ink<'a> {
    fonts: &'a Fonts,
    ops: Vec<Op>,
    used: Used,
    missing: Option<PdfError>,
}

/// What is needed to close the file.
pub struct Printed<'a> {
    /// The complete faces.
    pub fonts: &'a Fonts,
    /// What of them is needed.
    pub used: Used,
}

impl<'a> Ink<'a> {
    /// Starts with an empty page.
    pub fn new(fonts: &'a Fonts) -> Self {
        Ink { fonts, ops: Vec::new(), used: Used::new(), missing: None }
    }

    /// Prints, the strip's top being `top` points below the paper's.
    pub fn draw(&mut self, top: f64, draws: &[Draw]) {
        for draw in draws {
            match draw {
                Draw::Text(spot, row) => self.row(on_paper(top, *spot), row),
                Draw::Line(from, to, pen) => {
                    self.line([on_paper(top, *from), on_paper(top, *to)], pen);
                }
                Draw::Fill(spots, grey) => {
                    self.fill(spots.iter().map(|spot| on_paper(top, *spot)).collect(), *grey);
                }
                Draw::Entry(_) => {}
            }
        }
    }

    /// Prints what is no part of the text: reading machines may skip it.
    pub fn artifact(&mut self, top: f64, draws: &[Draw]) {
        self.ops.push(Op::BeginMarkedContent { tag: "Artifact".into() });
        self.draw(top, draws);
        self.ops.push(Op::EndMarkedContent);
    }

    /// Ends the page and starts another.
    pub fn take_page(&mut self) -> Vec<Op> {
        std::mem::take(&mut self.ops)
    }

    /// Which characters were printed, or the first one that could not be.
    pub fn finish(self) -> Result<Printed<'a>, PdfError> {
        match self.missing {
            Some(error) => Err(error),
            None => Ok(Printed { fonts: self.fonts, used: self.used }),
        }
    }

    fn row(&mut self, at: Point, row: &Row) {
        self.ops.push(Op::StartTextSection);
        self.ops.push(Op::SetFillColor { col: grey(row.grey) });
        self.ops.push(Op::SetTextMatrix { matrix: TextMatrix::Raw([1.0, 0.0, 0.0, 1.0, at.x.0, at.y.0]) });
        let mut rise = 0.0;
        for piece in &row.pieces {
            self.note(piece, row);
            if piece.rise != rise {
                rise = piece.rise;
                self.ops.push(Op::SetLineOffset { multiplier: rounded(rise) });
            }
            self.ops.push(Op::SetFont {
                font: PdfFontHandle::External(piece.face.id()),
                size: pt(piece.size.max(0.01)),
            });
            self.ops.push(Op::ShowText { items: vec![TextItem::Text(piece.text.clone())] });
        }
        if rise != 0.0 {
            self.ops.push(Op::SetLineOffset { multiplier: 0.0 });
        }
        self.ops.push(Op::EndTextSection);
    }

    /// Remembers the characters, and the first one that the face lacks.
    fn note(&mut self, piece: &Piece, row: &Row) {
        for character in piece.text.chars() {
            if !self.fonts.has(piece.face, character) && self.missing.is_none() {
                let row = row.pieces.iter().map(|piece| piece.text.as_str()).collect::<String>();
                self.missing = Some(PdfError::MissingCharacter { character, row: row.trim_end().into() });
            }
        }
        self.used.entry(piece.face).or_default().extend(piece.text.chars());
    }

    fn line(&mut self, ends: [Point; 2], pen: &Pen) {
        self.ops.push(Op::SaveGraphicsState);
        self.ops.push(Op::SetOutlineColor { col: grey(pen.grey) });
        self.ops.push(Op::SetOutlineThickness { pt: pt(pen.width) });
        if pen.dashed {
            let dash = f64::max(3.5, 2.5 * pen.width);
            let pattern = LineDashPattern::new(0.0, &[rounded(dash), rounded(0.7 * dash)]);
            self.ops.push(Op::SetLineDashPattern { dash: pattern });
        }
        let line = Line { points: corners(ends), is_closed: false };
        self.ops.push(Op::DrawLine { line });
        self.ops.push(Op::RestoreGraphicsState);
    }

    fn fill(&mut self, points: Vec<Point>, level: f64) {
        let rings = vec![PolygonRing { points: corners(points) }];
        self.ops.push(Op::SaveGraphicsState);
        self.ops.push(Op::SetFillColor { col: grey(level) });
        let polygon = Polygon { rings, mode: PaintMode::Fill, winding_order: WindingOrder::NonZero };
        self.ops.push(Op::DrawPolygon { polygon });
        self.ops.push(Op::RestoreGraphicsState);
    }
}

fn on_paper(top: f64, (x, down): Spot) -> Point {
    Point { x: pt(LEFT + x), y: pt(PAPER_HEIGHT - top - down) }
}

fn corners(points: impl IntoIterator<Item = Point>) -> Vec<LinePoint> {
    points.into_iter().map(|p| LinePoint { p, bezier: false }).collect()
}

fn grey(level: f64) -> Color {
    Color::Greyscale(Greyscale::new(rounded(level.clamp(0.0, 1.0)), None))
}

fn pt(value: f64) -> Pt {
    Pt(rounded(value))
}

/// To a hundredth of a point: finer than any printer, and short to write.
fn rounded(value: f64) -> f32 {
    ((value * 100.0).round() / 100.0) as f32
}
