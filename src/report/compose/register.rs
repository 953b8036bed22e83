//! The register of entries.

use crate::analysis::Analysis;
use crate::plan::Role;
use crate::report::document::{Block, Column, Table};

pub(super) fn section(analysis: &Analysis) -> Vec<Block> {
    let mut blocks = vec![
        Block::Heading { level: 1, text: "Register of entries".into() },
        Block::Paragraph(
            "Each quantity that enters stands here once, as 'entry' and its number, however often it is used; what is used twice is one variable. \
             Values are in SI units with their standard uncertainty u; angles count anticlockwise from east (ISO \
             8855); grades are rise over run, + uphill in the direction of travel."
                .into(),
        ),
    ];
    for (role, title) in [
        (Role::Measured, "Measured"),
        (Role::Assumed, "Assumed"),
        (Role::MethodError, "Method error, on by default and to be changed only in the case with a reason"),
    ] {
        let rows: Vec<Vec<String>> = analysis
            .register
            .iter()
            .filter(|r| r.role == role)
            .map(|r| {
                vec![
                    r.number.to_string(),
                    r.symbol.clone(),
                    r.name.clone(),
                    r.entered.clone(),
                    r.value.clone(),
                    r.uncertainty.clone(),
                    r.source.clone(),
                ]
            })
            .collect();
        if !rows.is_empty() {
            blocks.push(Block::Heading { level: 2, text: title.into() });
            blocks.push(Block::Table(Table { columns: columns(), rows }));
        }
    }
    blocks
}

fn columns() -> Vec<Column> {
    vec![
        Column::numbers("No.", 0.5),
        Column::words("Symbol", 0.95),
        Column::words("Quantity", 2.2),
        Column::words("As entered", 1.7),
        Column::numbers("SI", 1.0),
        Column::words("Uncertainty", 1.3),
        Column::words("Source and remark", 2.1),
    ]
}
