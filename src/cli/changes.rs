//! `changes`: what differs between two versions of a case.

use super::args::ChangesArgs;
use super::load::{put, read, say};
use crate::case::{Flat, flat};
use std::path::Path;

pub(super) fn run(args: &ChangesArgs) -> u8 {
    match (entries(&args.old), entries(&args.new)) {
        (Ok(old), Ok(new)) => {
            let lines = differences(&old, &new);
            if lines.is_empty() {
                put("No entry differs.\n");
            } else {
                put(&lines.concat());
                put(&format!(
                    "{} entries differ. What that does to the results: retrodict solve, on both.\n",
                    lines.len()
                ));
            }
            0
        }
        (old, new) => {
            for why in [old.err(), new.err()].into_iter().flatten() {
                say(&format!("STOP: {why}\n"));
            }
            2
        }
    }
}

fn entries(path: &Path) -> Result<Vec<Flat>, String> {
    let text = read(path)?;
    flat(&text).map_err(|why| format!("{}: {why}", path.display()))
}

/// One sentence for each entry that differs: in the order of the new version,
/// then what is gone.
fn differences(old: &[Flat], new: &[Flat]) -> Vec<String> {
    let in_old = |path: &str| old.iter().find(|(p, _)| p == path).map(|(_, text)| text);
    let mut lines = Vec::new();
    for (path, text) in new {
        match in_old(path) {
            None => lines.push(format!("{path} is new: {text}\n")),
            Some(before) if before != text => lines.push(format!("{path} was {before} and is now {text}\n")),
            Some(_) => {}
        }
    }
    let gone = old.iter().filter(|(path, _)| !new.iter().any(|(p, _)| p == path));
    lines.extend(gone.map(|(path, text)| format!("{path} is gone; it was {text}\n")));
    lines
}
