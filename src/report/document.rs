//! The document model: what a report says, without how it looks.
//!
//! In: composed results. Out: an ordered list of blocks that every renderer
//! understands. Never computes, never measures text.
//!
//! Text may carry subscripts as `_{…}`; nothing else is marked up.

/// A whole report.
#[derive(Debug, Clone, Default)]
pub struct Document {
    /// Title, on the first page and in the file's properties.
    pub title: String,
    /// Stands at the head of every page, beside the page number.
    pub running_head: String,
    /// The caution in short, at the foot of every page.
    pub caution_short: String,
    /// The blocks in reading order.
    pub blocks: Vec<Block>,
}

/// One block of a report.
#[derive(Debug, Clone)]
pub enum Block {
    /// A section title; level 1 is the largest.
    Heading {
        /// 1 for a section, 2 within one.
        level: u8,
        /// The words.
        text: String,
    },
    /// Running text.
    Paragraph(String),
    /// Text in a frame, for what must not be overlooked.
    Boxed {
        /// Heading inside the frame.
        title: String,
        /// Its paragraphs.
        paragraphs: Vec<String>,
    },
    /// A table.
    Table(Table),
    /// One worked line of the calculation.
    Worked(Worked),
    /// A drawing.
    Figure(Figure),
    /// Boxes for name, signature and date, one for each role.
    SignOff(Vec<String>),
}

/// A table whose column widths share the page in the ratio of their weights.
#[derive(Debug, Clone)]
pub struct Table {
    /// The columns, left to right.
    pub columns: Vec<Column>,
    /// The cells, row by row; each row has one cell a column.
    pub rows: Vec<Vec<String>>,
}

/// A column of a table.
#[derive(Debug, Clone)]
pub struct Column {
    /// Its heading.
    pub head: String,
    /// Numbers stand to the right, words to the left.
    pub align: Align,
    /// Share of the width.
    pub weight: f64,
}

impl Column {
    /// A column of words.
    pub fn words(head: &str, weight: f64) -> Self {
        Column { head: head.into(), align: Align::Left, weight }
    }

    /// A column of numbers.
    pub fn numbers(head: &str, weight: f64) -> Self {
        Column { head: head.into(), align: Align::Right, weight }
    }
}

/// On which side a cell's text stands.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Align {
    /// Words.
    Left,
    /// Numbers.
    Right,
}

/// One worked line: everything a second expert needs to recompute it.
#[derive(Debug, Clone)]
pub struct Worked {
    /// Number of the line in the worksheet.
    pub number: usize,
    /// What it finds, in words.
    pub title: String,
    /// The method it belongs to.
    pub method: String,
    /// The formula in symbols: `v_{A} = …`.
    pub formula: String,
    /// The formula with the numbers put in.
    pub substitution: String,
    /// The result with its unit.
    pub result: String,
    /// Standard uncertainty and the result in the reader's units.
    pub aside: String,
    /// Where each symbol's value comes from.
    pub from: String,
}

/// A drawing in millimetres, origin at its lower left corner.
#[derive(Debug, Clone)]
pub struct Figure {
    /// Stands below the drawing.
    pub caption: String,
    /// Width in millimetres.
    pub width: f64,
    /// Height in millimetres.
    pub height: f64,
    /// What is drawn, first things lowest.
    pub marks: Vec<Mark>,
    /// The same in words, for renderers that cannot draw.
    pub in_words: Vec<String>,
}

/// Something drawn.
#[derive(Debug, Clone)]
pub enum Mark {
    /// A straight line.
    Line {
        /// Start, mm.
        from: (f64, f64),
        /// End, mm.
        to: (f64, f64),
        /// How it is drawn.
        stroke: Stroke,
    },
    /// A line with an arrow head at its end.
    Arrow {
        /// Start, mm.
        from: (f64, f64),
        /// Tip, mm.
        to: (f64, f64),
        /// How it is drawn.
        stroke: Stroke,
    },
    /// Words.
    Label {
        /// Where the text's baseline is anchored, mm.
        at: (f64, f64),
        /// −1: `at` is the left end; 0: the middle; 1: the right end.
        anchor: i8,
        /// Size in points.
        size: f64,
        /// The words.
        text: String,
    },
}

/// How a line is drawn; tells lines apart without colour.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Stroke {
    /// Width in millimetres.
    pub width: f64,
    /// Grey level: 0 black, 1 white.
    pub grey: f64,
    /// Dashed instead of solid.
    pub dashed: bool,
}

/// Text with its subscript marks taken out: `v_{A,1}` becomes `v_A,1`.
pub fn plain(text: &str) -> String {
    let mut out = String::with_capacity(text.len());
    for (subscript, part) in runs(text) {
        if subscript {
            out.push('_');
        }
        out.push_str(&part);
    }
    out
}

/// Cuts text into runs: `(true, …)` is a subscript, `(false, …)` is not.
/// An opening mark without its end is ordinary text.
pub fn runs(text: &str) -> Vec<(bool, String)> {
    let mut out = Vec::new();
    let mut rest = text;
    while let Some(start) = rest.find("_{") {
        let Some(length) = rest[start..].find('}') else { break };
        if start > 0 {
            out.push((false, rest[..start].to_string()));
        }
        out.push((true, rest[start + 2..start + length].to_string()));
        rest = &rest[start + length + 1..];
    }
    if !rest.is_empty() {
        out.push((false, rest.to_string()));
    }
    out
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn subscripts_are_cut_out_and_written_plainly() {
        assert_eq!(runs("v_{A} = 2"), vec![(false, "v".into()), (true, "A".into()), (false, " = 2".into())]);
        assert_eq!(plain("v_{A,1}² + d_{A}"), "v_A,1² + d_A");
        assert_eq!(plain("half_{open"), "half_{open");
    }
}
