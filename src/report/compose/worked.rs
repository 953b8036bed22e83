//! The worked lines.

use crate::analysis::Analysis;
use crate::physics::METHODS;
use crate::report::document::{Block, Worked};

pub(super) fn section(analysis: &Analysis) -> Vec<Block> {
    let mut blocks = vec![
        Block::Heading { level: 1, text: "Worked lines".into() },
        Block::Paragraph(
            "Every line can be recomputed from the numbers printed on it, in SI units with angles in degrees: the \
             result agrees within one unit of its last digit. Numbers put in carry guard digits, so the same quantity \
             may show more digits on one line than on another. g stands explicitly in every formula that needs it."
                .into(),
        ),
    ];
    for (index, title) in analysis.plan.sections.iter().enumerate() {
        let mut lines = analysis.lines.iter().filter(|l| l.section == index).peekable();
        if lines.peek().is_some() {
            blocks.push(Block::Heading { level: 2, text: title.clone() });
        }
        blocks.extend(lines.map(|l| {
            Block::Worked(Worked {
                number: l.number,
                title: l.title.clone(),
                method: METHODS
                    .iter()
                    .find(|m| m.id == l.card.method)
                    .map_or(l.card.method, |m| m.title)
                    .into(),
                formula: l.formula.clone(),
                substitution: l.substitution.clone(),
                result: l.result.clone(),
                aside: l.aside.clone(),
                from: l.from.clone(),
            })
        }));
    }
    blocks.extend(methods(analysis));
    blocks
}

/// Cards of the methods used.
fn methods(analysis: &Analysis) -> Vec<Block> {
    let mut blocks = vec![Block::Heading { level: 1, text: "Methods used".into() }];
    for method in METHODS {
        if analysis.lines.iter().any(|l| l.card.method == method.id) {
            blocks.push(Block::Heading { level: 2, text: method.title.into() });
            blocks.push(Block::Paragraph(format!("Answers: {}.", method.answers)));
            blocks.push(Block::Paragraph(format!("Holds: {}", method.holds)));
            blocks.push(Block::Paragraph(format!("Source: {}.", method.source)));
        }
    }
    blocks
}
