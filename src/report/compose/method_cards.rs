//! Cards of the methods: formulas, symbols, limits, sources, method errors.

use crate::method::{About, Card, Method, MethodError, Node};
use crate::physics::{METHODS, formulas};
use crate::report::caution;
use crate::report::document::{Block, Column, Document, Table};
use crate::units::{Kind, System, significant};

/// All methods with the questions they answer.
pub fn method_list() -> Document {
    let rows =
        METHODS.iter().map(|m| vec![m.id.to_string(), m.title.to_string(), m.answers.to_string()]).collect();
    let columns =
        vec![Column::words("Name", 0.8), Column::words("Method", 1.6), Column::words("Answers", 2.6)];
    document(
        "Methods",
        vec![
            Block::Table(Table { columns, rows }),
            Block::Paragraph("retrodict methods NAME shows a method's formulas, limits and sources.".into()),
        ],
    )
}

/// One method in full; `None` when there is none of that name.
pub fn method_page(name: &str) -> Option<Document> {
    let method = METHODS.iter().find(|m| m.id == name)?;
    let mut blocks = head(method);
    for node in formulas().into_iter().filter(|n| n.card().method == name) {
        blocks.extend(formula(node));
    }
    Some(document(method.title, blocks))
}

fn document(title: &str, blocks: Vec<Block>) -> Document {
    Document { title: title.into(), running_head: title.into(), caution_short: caution::SHORT.into(), blocks }
}

fn head(method: &Method) -> Vec<Block> {
    let mut blocks = vec![
        Block::Paragraph(format!("Answers: {}.", method.answers)),
        Block::Paragraph(format!("Holds: {}", method.holds)),
        Block::Paragraph(format!("Source: {}.", method.source)),
    ];
    if !method.errors.is_empty() {
        blocks.push(Block::Heading { level: 1, text: "Method error, on by default".into() });
        let columns = vec![
            Column::words("Name", 1.4),
            Column::words("What", 2.0),
            Column::words("Value", 1.2),
            Column::words("Source", 2.0),
        ];
        let rows = method.errors.iter().map(error).collect();
        blocks.push(Block::Table(Table { columns, rows }));
    }
    blocks
}

fn error(e: &MethodError) -> Vec<String> {
    let show = |v: f64| {
        format!("{} {}", significant(v, 2), if e.kind == Kind::Ratio { "" } else { e.kind.si_unit() })
    };
    let value =
        format!("{}, u = {}, {}", show(e.dist.estimate()).trim(), show(e.dist.u()).trim(), e.dist.shape());
    vec![e.id.into(), e.title.into(), value, e.source.into()]
}

fn formula(node: &'static dyn Node) -> Vec<Block> {
    let card = node.card();
    let symbols: Vec<String> = card.inputs.iter().map(|p| p.symbol.to_string()).collect();
    let unit = |kind: Kind| if kind == Kind::Ratio { "pure number" } else { kind.si_unit() };
    let row = |p: &crate::method::Port| vec![p.symbol.into(), p.name.into(), unit(p.kind).into()];
    let rows = std::iter::once(&card.output).chain(card.inputs).map(row).collect();
    let columns =
        vec![Column::words("Symbol", 0.6), Column::words("Meaning", 3.0), Column::words("Unit", 1.0)];
    let mut blocks = vec![
        Block::Heading { level: 1, text: format!("{} ({})", card.title, card.id) },
        Block::Paragraph(format!("{} = {}", card.output.symbol, node.expression().in_symbols(&symbols))),
        Block::Table(Table { columns, rows }),
    ];
    blocks.extend(card.limits.iter().map(|limit| Block::Paragraph(limit_text(card, limit))));
    blocks.push(Block::Paragraph(format!("Source: {}.", card.source)));
    blocks
}

fn limit_text(card: &Card, limit: &crate::method::Limit) -> String {
    let port = match limit.about {
        About::Input(i) => card.inputs.get(i).unwrap_or(&card.output),
        About::Output => &card.output,
    };
    let show = |v: f64| significant(System::Metric.number(port.kind, v), 3);
    let range = match (limit.lo.is_finite(), limit.hi.is_finite()) {
        (true, true) => format!("{} to {}", show(limit.lo), show(limit.hi)),
        (true, false) => format!("{} or more", show(limit.lo)),
        _ => format!("at most {}", show(limit.hi)),
    };
    format!("Refuses unless {} is {range}: {}.", port.symbol, limit.reason)
}
