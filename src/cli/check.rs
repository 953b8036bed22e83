//! `check`: faults and rules, no worksheet.

use super::args::CheckArgs;
use super::load::{load, put, say, show_notices};
use crate::analysis::Options;
use crate::diag::Severity;
use crate::report::{compose, pdf};
use crate::uncertainty::Trials;

pub(super) fn run(args: &CheckArgs) -> u8 {
    let options = Options { trials: Trials::Look, ..Options::default() };
    let Some(outcome) = load(&args.case, options) else { return 2 };
    show_notices(&outcome);
    // A character outside the typeface would only be found when printing.
    if let Some(Err(error)) = compose(&outcome).map(|d| pdf::render(&d)) {
        say(&format!("NOTE: the worksheet cannot be printed as it is: {error}\n"));
    }
    let count =
        |s: Severity| outcome.notices.iter().filter(|n| n.severity == s && n.answer.is_none()).count();
    let answered = outcome.notices.iter().filter(|n| n.answer.is_some()).count();
    let (stops, warnings, notes) = (count(Severity::Stop), count(Severity::Warn), count(Severity::Note));
    let verdict = match outcome.status() {
        0 => "ready to solve",
        1 => "can be solved; each WARN wants an answer: [[answer]] with code, reason and by",
        _ => "refused until each STOP is mended",
    };
    put(&format!(
        "{}: {stops} STOP, {warnings} WARN, {notes} NOTE, {answered} answered: {verdict}\n",
        args.case.display()
    ));
    outcome.status()
}
