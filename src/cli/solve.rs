//! `solve`: the worksheet on the terminal, or as JSON.

use super::args::SolveArgs;
use super::load::{load, put, show_notices, styled};
use crate::report::{compose, json, terminal};
use std::io::IsTerminal;

pub(super) fn run(args: &SolveArgs) -> u8 {
    let Some(outcome) = load(&args.case, args.draws.options()) else { return 2 };
    if args.json {
        put(&json::render(&outcome));
        put("\n");
        return outcome.status();
    }
    // The worksheet holds the notices; without one they are all there is.
    match compose(&outcome) {
        Some(document) => put(&terminal::render(&document, styled(std::io::stdout().is_terminal()))),
        None => show_notices(&outcome),
    }
    outcome.status()
}
