//! The demo case worked by hand agrees line by line.
//!
//! The values come from `by_hand/quarry_road.py`: 50-digit arithmetic written
//! from the mechanics, in part by other formulas than the program's.
#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)]

mod common;

use common::{case_file, near, text};
use retrodict::uncertainty::Trials;

#[test]
fn every_line_of_the_demo_agrees_with_hand_arithmetic() {
    let table: toml::Table = text("tests/by_hand/quarry_road.toml").parse().unwrap();
    let outcome = case_file("quarry-road.toml", Trials::Look);
    let analysis = outcome.analysis.unwrap();
    let mut left: Vec<&String> = table.keys().collect();
    for line in &analysis.lines {
        let wanted = table.get(&line.title).unwrap_or_else(|| panic!("no hand value for '{}'", line.title));
        let wanted = wanted.as_float().unwrap();
        let got = analysis.evaluation.value(line.slot).unwrap();
        // 15 printed digits; differences of two large numbers lose a few.
        near(&line.title, got, wanted, 1e-11 * wanted.abs().max(1.0));
        left.retain(|title| **title != line.title);
    }
    assert!(left.is_empty(), "hand values without a line: {left:?}");
}
