//! `new`: a starter case to fill in.

use super::args::NewArgs;
use super::load::{put, say};
use super::save::{Existing, save};
use std::io::{BufRead, IsTerminal, Write};
use std::path::PathBuf;

/// Kinds of starter case: name, what it is for, the file.
pub(super) const STARTERS: &[(&str, &str, &str)] = &[
    (
        "crossing",
        "two vehicles that met from different directions",
        include_str!("../../templates/case/crossing.toml"),
    ),
    ("in-line", "two vehicles that met on one line", include_str!("../../templates/case/in-line.toml")),
    ("to-rest", "one vehicle that skidded to rest", include_str!("../../templates/case/to-rest.toml")),
];

pub(super) fn run(args: &NewArgs) -> u8 {
    let Some(kind) = args.kind.clone().or_else(asked) else {
        say(&format!("which kind of case?\n{}for example: retrodict new crossing\n", kinds()));
        return 2;
    };
    let Some((name, _, text)) = STARTERS.iter().find(|(name, ..)| *name == kind) else {
        let near = crate::diag::nearest(&kind, STARTERS.iter().map(|s| s.0));
        let hint = near.map_or(String::new(), |n| format!("did you mean {n}?\n"));
        say(&format!("'{kind}' is no kind of starter case\n{hint}{}", kinds()));
        return 2;
    };
    let file = args.file.clone().unwrap_or_else(|| PathBuf::from(format!("{name}.toml")));
    match save(&file, text.as_bytes(), Existing::Keep) {
        Ok(()) => {
            let shown = file.display();
            put(&format!("wrote {shown}\nfill it in, then: retrodict check {shown}\n"));
            0
        }
        Err(why) => {
            say(&format!("{} was not written: {why}\n", file.display()));
            2
        }
    }
}

/// The kinds, one a line.
fn kinds() -> String {
    STARTERS
        .iter()
        .enumerate()
        .map(|(i, (name, what, _))| format!("  {}  {name:<9} {what}\n", i + 1))
        .collect()
}

/// At a terminal the kinds are offered; the answer is a number or a name.
fn asked() -> Option<String> {
    if !(std::io::stdin().is_terminal() && std::io::stdout().is_terminal()) {
        return None;
    }
    put(&format!("Which kind of case?\n{}number or name: ", kinds()));
    let _ = std::io::stdout().flush();
    let mut line = String::new();
    std::io::stdin().lock().read_line(&mut line).ok()?;
    let answer = line.trim();
    let by_number = answer.parse::<usize>().ok().and_then(|n| STARTERS.get(n.checked_sub(1)?));
    let chosen = by_number.map_or(answer, |(name, ..)| name);
    (!chosen.is_empty()).then(|| chosen.to_string())
}
