//! Pages: stacks strips and decides where a page ends.
//!
//! In: strips in reading order and the height of a page. Out: for each page its
//! strips with their distance from the top. Never splits a strip, never parts
//! glued strips unless together they are higher than a page.

use super::strip::{Draw, Strip};

/// What rounding may add to a page.
const SLACK: f64 = 1e-6;

/// The strips of one page: distance from the top of the text, what is printed.
pub type Sheet = Vec<(f64, Vec<Draw>)>;

/// Distributes the strips over pages of the given height. At least one page.
pub fn paginate(strips: Vec<Strip>, height: f64) -> Vec<Sheet> {
    let mut stacker = Stacker { height, done: Vec::new(), sheet: Vec::new(), used: 0.0 };
    let mut group = Vec::new();
    for strip in strips {
        let more = strip.glued;
        group.push(strip);
        if !more {
            stacker.group(std::mem::take(&mut group));
        }
    }
    stacker.group(group);
    stacker.done.push(stacker.sheet);
    stacker.done
}

/// Height of strips that stand below each other, at the top of a page or not.
fn total(group: &[Strip], at_top: bool) -> f64 {
    let sum: f64 = group.iter().map(|strip| strip.before + strip.height).sum();
    match group.first() {
        Some(first) if at_top => sum - first.before + first.head.as_ref().map_or(0.0, |head| head.height),
        _ => sum,
    }
}

struct Stacker {
    height: f64,
    done: Vec<Sheet>,
    sheet: Sheet,
    used: f64,
}

impl Stacker {
    fn at_top(&self) -> bool {
        self.sheet.is_empty()
    }

    fn fits(&self, group: &[Strip]) -> bool {
        self.used + total(group, self.at_top()) <= self.height + SLACK
    }

    /// Places glued strips: here if they fit, else on a new page; one by one if
    /// they are higher than a page.
    fn group(&mut self, group: Vec<Strip>) {
        if !self.at_top() && !self.fits(&group) {
            self.turn_page();
        }
        for strip in group {
            if !self.at_top() && !self.fits(std::slice::from_ref(&strip)) {
                self.turn_page();
            }
            self.place(strip);
        }
    }

    fn turn_page(&mut self) {
        self.done.push(std::mem::take(&mut self.sheet));
        self.used = 0.0;
    }

    fn place(&mut self, strip: Strip) {
        if self.at_top() {
            if let Some(head) = &strip.head {
                self.sheet.push((0.0, head.draws.clone()));
                self.used = head.height;
            }
        } else {
            self.used += strip.before;
        }
        self.sheet.push((self.used, strip.draws));
        self.used += strip.height;
    }
}
