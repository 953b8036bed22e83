//! Turns an analysis into a document.
//!
//! One file a section; this page is the table of contents.

mod budget;
mod diagram;
mod method_cards;
mod notices;
mod questions;
mod register;
mod results;
mod worked;

pub use method_cards::{method_list, method_page};

use super::caution;
use super::document::{Block, Document};
use crate::analysis::{Analysis, Outcome};

/// The worksheet of an analysis; `None` when the case file itself has faults.
pub fn compose(outcome: &Outcome) -> Option<Document> {
    let analysis = outcome.analysis.as_ref()?;
    let id = &analysis.case.identity;
    let mut blocks = identity(analysis);
    blocks.push(Block::Boxed {
        title: "Caution".into(),
        paragraphs: caution::FULL.iter().map(|p| (*p).to_string()).collect(),
    });
    blocks.extend(results::section(outcome, analysis));
    blocks.extend(questions::section(analysis));
    blocks.extend(diagram::section(analysis));
    blocks.extend(notices::section(outcome));
    blocks.extend(register::section(analysis));
    blocks.extend(worked::section(analysis));
    blocks.extend(budget::section(analysis));
    blocks.extend(signing(outcome, analysis));
    Some(Document {
        title: format!("{}: {}", id.number, id.title),
        running_head: format!("Case {} · {}", id.number, id.title),
        caution_short: caution::SHORT.into(),
        blocks,
    })
}

/// Who asked, who prepared, what was reconstructed.
fn identity(analysis: &Analysis) -> Vec<Block> {
    let id = &analysis.case.identity;
    let mut lines = Vec::new();
    let mut say = |label: &str, text: &Option<String>| {
        if let Some(text) = text {
            lines.push(Block::Paragraph(format!("{label}: {text}")));
        }
    };
    say("Question", &id.question);
    say("Prepared by", &id.prepared_by);
    say("Date", &id.date);
    for unit in &analysis.case.units {
        lines.push(Block::Paragraph(format!("Unit {}: {}", unit.id, unit.label)));
    }
    for remark in &id.remarks {
        lines.push(Block::Paragraph(format!("Remark: {remark}")));
    }
    lines
}

fn signing(outcome: &Outcome, analysis: &Analysis) -> Vec<Block> {
    let files: Vec<String> = outcome
        .files
        .iter()
        .enumerate()
        .map(|(i, f)| format!("{} (SHA-256 {})", file_name(&f.name), outcome.sha256(i)))
        .collect();
    vec![
        Block::Heading { level: 1, text: "Record and sign-off".into() },
        Block::SignOff(vec!["Prepared by".into(), "Reviewed by (recomputed independently)".into()]),
        Block::Paragraph(format!("Made with retrodict {}, case file format 1.", env!("CARGO_PKG_VERSION"))),
        Block::Paragraph(format!("Files: {}", files.join("; "))),
        Block::Paragraph(format!(
            "Seed {}; {} trials in blocks of {}; the same program, case and seed give the same numbers.",
            analysis.seed,
            analysis.sampling.trials,
            crate::uncertainty::BLOCK
        )),
    ]
}

/// A path's last part: where a file lay is not the reader's business.
fn file_name(path: &str) -> &str {
    path.rsplit(['/', '\\']).next().unwrap_or(path)
}
