//! Styles: face, size, leading and grey of every kind of text.
//!
//! In: nothing. Out: the handful of styles that a report is set in. Never
//! measures and never lays out.

use super::fonts::Face;

/// How a text is set.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Style {
    /// Which face.
    pub face: Face,
    /// Size in points.
    pub size: f64,
    /// From baseline to baseline, points.
    pub leading: f64,
    /// 0 black, 1 white.
    pub grey: f64,
}

impl Style {
    const fn new(face: Face, size: f64, leading: f64) -> Self {
        Style { face, size, leading, grey: 0.0 }
    }

    /// From the top of a row to its baseline: capitals stand in the middle.
    pub fn baseline(&self) -> f64 {
        0.5 * self.leading + 0.36 * self.size
    }
}

/// The title of the report.
pub const TITLE: Style = Style::new(Face::Bold, 16.0, 21.0);
/// A section's heading.
pub const HEADING_1: Style = Style::new(Face::Bold, 13.0, 17.0);
/// A heading within a section.
pub const HEADING_2: Style = Style::new(Face::Bold, 10.5, 14.0);
/// Running text.
pub const BODY: Style = Style::new(Face::Body, 9.5, 13.0);
/// Running text, bold.
pub const STRONG: Style = Style::new(Face::Bold, 9.5, 13.0);
/// Table cells and captions.
pub const TABLE: Style = Style::new(Face::Body, 8.0, 10.5);
/// Table heads.
pub const TABLE_HEAD: Style = Style::new(Face::Bold, 8.0, 10.5);
/// Head, foot, sources.
pub const SMALL: Style = Style { grey: 0.25, ..Style::new(Face::Body, 7.0, 9.5) };
