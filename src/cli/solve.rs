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
    show_notices(&outcome);
    if let Some(document) = compose(&outcome) {
        put(&terminal::render(&document, styled(std::io::stdout().is_terminal())));
    }
    outcome.status()
}
