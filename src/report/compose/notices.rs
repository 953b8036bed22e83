//! Notices: rules raised, and what was answered.

use crate::analysis::Outcome;
use crate::report::document::{Block, Column, Table};

pub(super) fn section(outcome: &Outcome) -> Vec<Block> {
    let mut blocks = vec![Block::Heading { level: 1, text: "Notices".into() }];
    if outcome.notices.is_empty() {
        blocks.push(Block::Paragraph("No rule has anything to say about this case.".into()));
        return blocks;
    }
    let rows = outcome
        .notices
        .iter()
        .map(|n| {
            let place = n.place.and_then(|p| {
                let file = outcome.files.get(p.file.0)?;
                Some(format!("line {}", file.line_column(p.start).0))
            });
            let mut text = n.message.clone();
            if let Some(hint) = &n.hint {
                text.push_str(&format!(". What helps: {hint}"));
            }
            match &n.answer {
                Some(answer) => text.push_str(&format!(". Answered: {answer}")),
                None if n.is_open_warning() => text.push_str(". Not answered"),
                None => {}
            }
            vec![n.severity.word().into(), n.code.into(), place.unwrap_or_default(), format!("{text}.")]
        })
        .collect();
    blocks.push(Block::Table(Table {
        columns: vec![
            Column::words("", 0.5),
            Column::words("Rule", 0.5),
            Column::words("Case file", 0.7),
            Column::words("What it says", 5.0),
        ],
        rows,
    }));
    blocks
}
