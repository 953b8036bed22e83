//! The page: its geometry, its head and its foot.
//!
//! In: a document's running head and caution, and the sheets to frame. Out: the
//! finished pages. Never lets text reach into head or foot.

use printpdf::{Mm, Op, PdfPage};

use super::super::document::Document;
use super::error::PdfError;
use super::flow::Sheet;
use super::fonts::Fonts;
use super::ink::Ink;
use super::outline::Entry;
use super::strip::{Draw, THIN};
use super::style::SMALL;
use super::text::{Row, single, wrap};

/// Points in a millimetre.
pub const MM: f64 = 72.0 / 25.4;
/// Width of the text, points.
pub const TEXT_WIDTH: f64 = 170.0 * MM;
/// Height of the paper, points.
pub const PAPER_HEIGHT: f64 = 297.0 * MM;
/// Left margin, points.
pub const LEFT: f64 = 20.0 * MM;

/// From the paper's edge to the first row of the head, and below the foot.
const EDGE: f64 = 11.5 * MM;
/// Between head or foot and its rule.
const TO_RULE: f64 = 3.0;
/// Between a rule and the text.
const TO_TEXT: f64 = 13.0;
/// With less room for text than this, a document is refused.
const LEAST_BODY: f64 = 120.0 * MM;

/// Pages and the places the file's outline leads to.
pub struct Pages {
    /// The pages in order.
    pub pages: Vec<PdfPage>,
    /// The outline's entries in order.
    pub entries: Vec<Entry>,
}

/// What all pages have in common.
pub struct PageFrame<'a> {
    fonts: &'a Fonts,
    head: Vec<Row>,
    foot: Vec<Row>,
}

impl<'a> PageFrame<'a> {
    /// Sets the head and the foot of the document's pages.
    pub fn new(fonts: &'a Fonts, document: &Document) -> Result<Self, PdfError> {
        let number_width = single(fonts, SMALL, "Page 9999 of 9999").width;
        let head = wrap(fonts, SMALL, &document.running_head, TEXT_WIDTH - number_width - 20.0, 0.0);
        let foot = wrap(fonts, SMALL, &document.caution_short, TEXT_WIDTH, 0.0);
        let frame = PageFrame { fonts, head, foot };
        if frame.body_height() < LEAST_BODY {
            return Err(PdfError::HeadAndFoot);
        }
        Ok(frame)
    }

    /// From the paper's top to the rule below the head.
    fn head_rule(&self) -> f64 {
        EDGE + self.head.len().max(1) as f64 * SMALL.leading + TO_RULE
    }

    /// From the paper's top to the rule above the foot.
    fn foot_rule(&self) -> f64 {
        PAPER_HEIGHT - EDGE - self.foot.len().max(1) as f64 * SMALL.leading - TO_RULE
    }

    fn body_top(&self) -> f64 {
        self.head_rule() + TO_TEXT
    }

    /// Height of the text on each page.
    pub fn body_height(&self) -> f64 {
        self.foot_rule() - TO_TEXT - self.body_top()
    }

    /// Prints all sheets.
    pub fn draw_all(&self, ink: &mut Ink<'_>, sheets: &[Sheet]) -> Pages {
        let mut out = Pages { pages: Vec::new(), entries: Vec::new() };
        for (index, sheet) in sheets.iter().enumerate() {
            let ops = self.draw_page(ink, sheet, index, sheets.len());
            out.entries.extend(self.entries(sheet, index));
            out.pages.push(PdfPage::new(Mm(210.0), Mm(297.0), ops));
        }
        out
    }

    fn draw_page(&self, ink: &mut Ink<'_>, sheet: &Sheet, index: usize, count: usize) -> Vec<Op> {
        ink.artifact(0.0, &self.head_draws(&format!("Page {} of {count}", index + 1)));
        for (down, draws) in sheet {
            ink.draw(self.body_top() + down, draws);
        }
        ink.artifact(0.0, &self.foot_draws());
        ink.take_page()
    }

    fn head_draws(&self, number: &str) -> Vec<Draw> {
        let mut draws = rows_from(EDGE, &self.head);
        let number = single(self.fonts, SMALL, number);
        draws.push(Draw::Text((TEXT_WIDTH - number.width, EDGE + SMALL.baseline()), number));
        draws.push(Draw::Line((0.0, self.head_rule()), (TEXT_WIDTH, self.head_rule()), THIN));
        draws
    }

    fn foot_draws(&self) -> Vec<Draw> {
        let rule = Draw::Line((0.0, self.foot_rule()), (TEXT_WIDTH, self.foot_rule()), THIN);
        let mut draws = vec![rule];
        draws.extend(rows_from(self.foot_rule() + TO_RULE, &self.foot));
        draws
    }

    fn entries(&self, sheet: &Sheet, page: usize) -> Vec<Entry> {
        let mut entries = Vec::new();
        for (down, draws) in sheet {
            for draw in draws {
                if let Draw::Entry(title) = draw {
                    let top = PAPER_HEIGHT - self.body_top() - down + TO_RULE;
                    entries.push(Entry { title: title.clone(), page, top });
                }
            }
        }
        entries
    }
}

fn rows_from(top: f64, rows: &[Row]) -> Vec<Draw> {
    let place = |(index, row): (usize, &Row)| {
        let down = top + index as f64 * SMALL.leading + SMALL.baseline();
        Draw::Text((row.indent, down), row.clone())
    };
    rows.iter().enumerate().map(place).collect()
}
