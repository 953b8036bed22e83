//! Text: subscripts, wrapping into rows.
//!
//! In: a sentence with subscript marks and a width. Out: rows of measured
//! pieces. Never breaks elsewhere than at a space, unless a word alone is wider
//! than the row. A row that goes on in the next keeps its space at the end, so
//! that reading the rows one after the other gives the sentence again.

use super::fonts::{Face, Fonts};
use super::style::Style;
use super::words::{Atom, SPACE, at_space, may_cut, words};

/// Subscripts: size as a share of the style's, and how far they are lowered.
const SUB_SIZE: f64 = 0.72;
const SUB_DROP: f64 = 0.17;
/// What rounding may add to a row.
const SLACK: f64 = 1e-6;

/// Characters of one face, size and height above the baseline.
#[derive(Debug, Clone, PartialEq)]
pub struct Piece {
    /// Which face.
    pub face: Face,
    /// Size in points.
    pub size: f64,
    /// Above (below, if negative) the baseline, points.
    pub rise: f64,
    /// The characters.
    pub text: String,
}

/// One printed row.
#[derive(Debug, Clone, Default, PartialEq)]
pub struct Row {
    /// From the left edge of its column, points.
    pub indent: f64,
    /// Printed width without the indent and without a space at the end.
    pub width: f64,
    /// 0 black, 1 white.
    pub grey: f64,
    /// What is printed.
    pub pieces: Vec<Piece>,
}

/// The text on one row, however long it is.
pub fn single(fonts: &Fonts, style: Style, text: &str) -> Row {
    wrap(fonts, style, text, f64::INFINITY, 0.0).into_iter().next().unwrap_or_default()
}

/// The text in rows no wider than `width`; rows after the first are indented by
/// `hang`. No text, no rows.
pub fn wrap(fonts: &Fonts, style: Style, text: &str, width: f64, hang: f64) -> Vec<Row> {
    let mut setter = Setter { fonts, style, width, hang, rows: Vec::new(), row: Vec::new(), used: 0.0 };
    for word in words(text) {
        setter.add(&word);
    }
    setter.end_row(false);
    setter.rows
}

/// Fills rows word by word.
struct Setter<'a> {
    fonts: &'a Fonts,
    style: Style,
    width: f64,
    hang: f64,
    rows: Vec<Row>,
    row: Vec<Atom>,
    used: f64,
}

impl Setter<'_> {
    fn room(&self) -> f64 {
        self.width - self.indent() + SLACK
    }

    fn indent(&self) -> f64 {
        if self.rows.is_empty() { 0.0 } else { self.hang }
    }

    fn add(&mut self, word: &[Atom]) {
        if !self.row.is_empty() {
            let with_word = self.used + self.measure(&[SPACE]) + self.measure(word);
            if with_word <= self.room() {
                self.row.push(SPACE);
                self.row.extend(word);
                self.used = with_word;
                return;
            }
            self.end_row(true);
        }
        self.start_row(word);
    }

    /// Puts a word on an empty row, cutting it while it is wider than a row.
    fn start_row(&mut self, mut word: &[Atom]) {
        while let Some(cut) = self.cut(word) {
            let (row, rest) = word.split_at(cut);
            self.fill(row);
            match rest.split_first() {
                Some((&SPACE, after)) => {
                    self.end_row(true);
                    word = after;
                }
                _ => {
                    self.end_row(false);
                    word = rest;
                }
            }
        }
        self.fill(word);
    }

    fn fill(&mut self, atoms: &[Atom]) {
        self.row = atoms.to_vec();
        self.used = self.measure(atoms);
    }

    /// Where to cut a word that is too wide: at a space if it has one; else as
    /// late as possible, but not within a number or before a subscript if there
    /// is another place. Nowhere if the word fits.
    fn cut(&self, word: &[Atom]) -> Option<usize> {
        let fitting = self.fitting(word);
        if fitting >= word.len() || word.len() < 2 {
            return None;
        }
        let latest = fitting.max(1);
        let last = |good: fn(&[Atom], usize) -> bool| (1..=latest).rev().find(|at| good(word, *at));
        let place = last(at_space).or_else(|| last(may_cut));
        Some(place.unwrap_or(latest))
    }

    /// How many characters of a word a row has room for.
    fn fitting(&self, word: &[Atom]) -> usize {
        let mut used = 0.0;
        let fits = |atom: &&Atom| {
            used += self.measure(std::slice::from_ref(*atom));
            used <= self.room()
        };
        word.iter().take_while(fits).count()
    }

    /// Closes the row; `goes_on` at a space, which is kept at its end.
    fn end_row(&mut self, goes_on: bool) {
        let mut atoms = std::mem::take(&mut self.row);
        if atoms.is_empty() {
            return;
        }
        let width = std::mem::take(&mut self.used);
        if goes_on {
            atoms.push(SPACE);
        }
        let row = Row { indent: self.indent(), width, grey: self.style.grey, pieces: self.pieces(&atoms) };
        self.rows.push(row);
    }

    fn measure(&self, atoms: &[Atom]) -> f64 {
        let Style { face, size, .. } = self.style;
        atoms
            .iter()
            .map(|(sub, c)| self.fonts.width(face, if *sub { size * SUB_SIZE } else { size }, *c))
            .sum()
    }

    fn pieces(&self, atoms: &[Atom]) -> Vec<Piece> {
        let Style { face, size, .. } = self.style;
        let mut pieces: Vec<Piece> = Vec::new();
        for run in atoms.chunk_by(|a, b| a.0 == b.0) {
            let subscript = run.first().is_some_and(|atom| atom.0);
            let (size, rise) = if subscript { (size * SUB_SIZE, -size * SUB_DROP) } else { (size, 0.0) };
            pieces.push(Piece { face, size, rise, text: run.iter().map(|atom| atom.1).collect() });
        }
        pieces
    }
}
