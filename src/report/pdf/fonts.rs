//! The two faces: reading, measuring, reducing to what is printed.
//!
//! In: characters. Out: their widths, and a face that holds only them. Never
//! lays out and never substitutes one character for another.

use std::collections::BTreeSet;

use allsorts::binary::read::ReadScope;
use allsorts::font_data::FontData;
use allsorts::subset::{CmapTarget, SubsetProfile, subset};
use printpdf::{FontId, ParsedFont};

use super::error::PdfError;

/// One of the two faces of a report.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum Face {
    /// Running text.
    Body,
    /// Titles, headings and table heads.
    Bold,
}

/// Both faces, in reading order of use.
pub const FACES: [Face; 2] = [Face::Body, Face::Bold];

impl Face {
    /// The name under which pages call for the face.
    pub fn id(self) -> FontId {
        FontId(match self {
            Face::Body => "FBody".into(),
            Face::Bold => "FBold".into(),
        })
    }

    /// The name written into the file; the tag says that the face is reduced.
    fn tagged_name(self) -> &'static str {
        match self {
            Face::Body => "AAAAAA+DejaVuSansCondensed",
            Face::Bold => "AAAAAA+DejaVuSansCondensed-Bold",
        }
    }

    fn bytes(self) -> &'static [u8] {
        match self {
            Face::Body => dejavu::sans_condensed::regular(),
            Face::Bold => dejavu::sans_condensed::bold(),
        }
    }

    fn fault(self, what: impl std::fmt::Display) -> PdfError {
        PdfError::Font(format!("{}: {what}", self.tagged_name()))
    }

    fn read(self) -> Result<ParsedFont, PdfError> {
        parse(self.bytes()).ok_or_else(|| self.fault("not readable"))
    }
}

fn parse(bytes: &[u8]) -> Option<ParsedFont> {
    let mut warnings = Vec::new();
    let font = ParsedFont::from_bytes(bytes, 0, &mut warnings)?;
    (warnings.is_empty() && font.units_per_em > 0).then_some(font)
}

/// Both faces, complete, for measuring.
pub struct Fonts {
    body: ParsedFont,
    bold: ParsedFont,
}

impl Fonts {
    /// Reads the built-in faces.
    pub fn load() -> Result<Self, PdfError> {
        Ok(Fonts { body: Face::Body.read()?, bold: Face::Bold.read()? })
    }

    fn face(&self, face: Face) -> &ParsedFont {
        match face {
            Face::Body => &self.body,
            Face::Bold => &self.bold,
        }
    }

    fn glyph(&self, face: Face, character: char) -> Option<u16> {
        self.face(face).lookup_glyph_index(u32::from(character)).filter(|glyph| *glyph != 0)
    }

    /// Whether the face can show the character.
    pub fn has(&self, face: Face, character: char) -> bool {
        self.glyph(face, character).is_some()
    }

    /// Width of a character in points. Rounded down to thousandths of the size,
    /// as the PDF's own width table is, so that right-hand edges meet.
    pub fn width(&self, face: Face, size: f64, character: char) -> f64 {
        let font = self.face(face);
        let units = self.glyph(face, character).and_then(|glyph| font.get_glyph_width(glyph)).unwrap_or(0);
        let thousandths = (f64::from(units) * 1000.0 / f64::from(font.units_per_em)).floor();
        thousandths / 1000.0 * size
    }

    /// The face with the given characters only, each in a glyph slot of its own:
    /// characters that look alike (`µ`, `μ`) stay apart when the text is read back.
    pub fn reduced(&self, face: Face, characters: &BTreeSet<char>) -> Result<ParsedFont, PdfError> {
        let known: Vec<(char, u16)> =
            characters.iter().filter_map(|c| self.glyph(face, *c).map(|g| (*c, g))).collect();
        let mut glyphs = vec![0];
        glyphs.extend(known.iter().map(|(_, glyph)| *glyph));
        let mut font = reduce(face, &glyphs)?;
        font.codepoint_to_glyph = known.iter().zip(1..).map(|((c, _), slot)| (u32::from(*c), slot)).collect();
        font.font_name = Some(face.tagged_name().into());
        Ok(font)
    }
}

/// Cuts the face down to the glyphs, numbered as in the list.
fn reduce(face: Face, glyphs: &[u16]) -> Result<ParsedFont, PdfError> {
    let file = ReadScope::new(face.bytes()).read::<FontData<'_>>().map_err(|e| face.fault(e))?;
    let tables = file.table_provider(0).map_err(|e| face.fault(e))?;
    let bytes =
        subset(&tables, glyphs, &SubsetProfile::Pdf, CmapTarget::Unicode).map_err(|e| face.fault(e))?;
    parse(&bytes).ok_or_else(|| face.fault("not readable after reduction"))
}
