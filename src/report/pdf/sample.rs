//! A sample document with every kind of block; for tests only.

use super::super::document::{Block, Column, Document, Figure, Mark, Stroke, Table, Worked};

/// Every kind of block, about five pages.
pub fn sample() -> Document {
    let mut blocks = opening();
    blocks.push(heading(1, "Measurements and sources"));
    blocks.push(Block::Paragraph(
        "The values below were taken from the case file; each carries its band:".into(),
    ));
    blocks.push(Block::Table(long_table(60)));
    blocks.push(heading(1, "Worksheet"));
    blocks.push(heading(2, "Sliding to rest"));
    blocks.extend((1..=9).map(|number| Block::Worked(worked(number))));
    blocks.push(heading(1, "Momentum"));
    blocks.push(Block::Figure(figure()));
    blocks.push(heading(1, "Responsibility"));
    blocks.push(Block::SignOff(vec!["Prepared by".into(), "Checked by".into(), "Approved by".into()]));
    Document {
        title: "Speed before impact: junction of Mill Lane and Station Road".into(),
        running_head: "Case 2026-0417 · retrodict 0.1.0 · input 3f9a 11c2".into(),
        caution_short: "Computed from the measurements given. It does not replace the judgement of a qualified \
            investigator, who answers for the choice of method, for every input and for the conclusion drawn from it."
            .into(),
        blocks,
    }
}

fn opening() -> Vec<Block> {
    let long = "Vehicle A slid from the point of impact to rest on dry asphalt. Its speed after impact, v_{A}′, \
        follows from the length of the marks d_{A} and the drag factor f_{A} = μ·cos θ ± sin θ; the angle Δψ and the \
        yaw rate ω_{z} play no part here. Distances ≥ 40 m were measured twice (→ appendix), 0.5² − 0.3² = 0.16.";
    vec![
        Block::Boxed {
            title: "Caution".into(),
            paragraphs: vec![
                "These results hold only as far as the measurements and assumptions do. Read the flags first, and \
                    have a second expert recompute each line of the worksheet."
                    .into(),
                "Nobody should be charged or cleared on the strength of this paper alone.".into(),
            ],
        },
        heading(1, "Summary"),
        Block::Paragraph(long.into()),
        heading(2, "Result"),
        Block::Table(Table {
            columns: vec![Column::words("Quantity", 3.0), Column::numbers("Best", 1.0), Column::numbers("Band", 2.0)],
            rows: vec![
                vec!["Speed of A before impact, v_{A}".into(), "61.4 km/h".into(), "57.2 to 65.9 km/h".into()],
                vec!["Speed of B before impact, v_{B}".into(), "33.0 km/h".into(), "29.8 to 36.1 km/h".into()],
            ],
        }),
    ]
}

fn heading(level: u8, text: &str) -> Block {
    Block::Heading { level, text: text.into() }
}

/// A table with that many rows, some of them wrapped.
pub fn long_table(count: usize) -> Table {
    let row = |index: usize| {
        let source = if index.is_multiple_of(7) {
            "measured by tape along the outer edge of the mark, twice, by two persons; the longer value kept"
        } else {
            "scene plan"
        };
        let value = format!("{}.{:02}", 10 + index, index * 37 % 100);
        vec![format!("d_{{{index}}}"), format!("Mark no. {index}"), value, "± 0.15 m".into(), source.into()]
    };
    let columns = vec![
        Column::words("Symbol", 1.0),
        Column::words("Meaning", 2.0),
        Column::numbers("Value, m", 1.2),
        Column::numbers("Half band", 1.3),
        Column::words("Source", 4.0),
    ];
    Table { columns, rows: (1..=count).map(row).collect() }
}

/// A worked line; every third is long.
pub fn worked(number: usize) -> Worked {
    let long = number.is_multiple_of(3);
    let tail =
        " + 0.000125 · (18.4000 + 2.7500) · 9.80665 − 0.0625 · 1.125²".repeat(if long { 3 } else { 0 });
    let more =
        if long { " + k_{1} · (d_{A} + d_{B}) · g − k_{2} · s²".repeat(3) } else { String::new() };
    Worked {
        number,
        title: format!("Speed of vehicle A at the start of slide {number}"),
        method: "M-3 sliding with constant drag".into(),
        formula: format!("v_{{A,{number}}} = √(v_{{end}}² + 2 · μ_{{A}} · g · d_{{A}}{more})"),
        substitution: format!("= √(4.2000² + 2 · 0.7200 · 9.80665 · 18.4000{tail})"),
        result: format!("= 16.6{number}43 m/s"),
        aside: format!("u = 0.62 m/s;  59.{number} km/h"),
        from: "v_{end}: line [2]; μ_{A}: drag sled, case.toml line 14; d_{A}: scene plan, case.toml line 21"
            .into(),
    }
}

/// A drawing with all kinds of marks.
pub fn figure() -> Figure {
    let solid = Stroke { width: 0.4, grey: 0.0, dashed: false };
    let dashed = Stroke { width: 0.25, grey: 0.4, dashed: true };
    let label = |x, y, anchor, text: &str| Mark::Label { at: (x, y), anchor, size: 8.0, text: text.into() };
    Figure {
        caption: "Momentum before and after impact; arrows to scale, 1 mm for 400 kg·m/s.".into(),
        width: 110.0,
        height: 62.0,
        marks: vec![
            Mark::Line { from: (0.0, 10.0), to: (110.0, 10.0), stroke: dashed },
            Mark::Arrow { from: (10.0, 10.0), to: (70.0, 10.0), stroke: solid },
            Mark::Arrow { from: (70.0, 10.0), to: (95.0, 52.0), stroke: solid },
            Mark::Arrow { from: (10.0, 10.0), to: (95.0, 52.0), stroke: Stroke { dashed: true, ..solid } },
            label(40.0, 5.5, 0, "m_{A}·v_{A}"),
            label(85.0, 29.0, -1, "m_{B}·v_{B}"),
            label(48.0, 34.0, 1, "p′ after impact"),
        ],
        in_words: Vec::new(),
    }
}
