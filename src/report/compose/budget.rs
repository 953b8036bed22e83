//! Uncertainty budgets: which entry drives which result, and how much a unit
//! of it is worth.

use crate::analysis::{Analysis, Answered};
use crate::plan::Sought;
use crate::report::document::{Block, Column, Table};
use crate::uncertainty::Share;
use crate::units::{Kind, decimals_for, fixed, significant};

/// Contributors shown for each result; the rest is summed up.
const SHOWN: usize = 8;

pub(super) fn section(analysis: &Analysis) -> Vec<Block> {
    let mut blocks = vec![
        Block::Heading { level: 1, text: "Uncertainty budget".into() },
        Block::Paragraph(
            "By linear propagation with exact derivatives (JCGM 100). The bounding case adds up every entry at its \
             worst at once, limits or 95 %; it is not a 95 % band."
                .into(),
        ),
    ];
    for answered in &analysis.results {
        if !answered.band.linear.shares.is_empty() {
            blocks.push(Block::Heading { level: 2, text: answered.named.label.clone() });
            blocks.push(Block::Table(table(analysis, answered)));
            blocks.push(Block::Paragraph(summary(analysis, answered)));
        }
    }
    blocks.extend(per_degree(analysis));
    blocks
}

/// What a degree of every direction is worth, whether measured or computed.
fn per_degree(analysis: &Analysis) -> Vec<Block> {
    let Some(impact) = &analysis.plan.watch.momentum else { return Vec::new() };
    let directions: Vec<_> = impact.approach.iter().flatten().chain(&impact.course).copied().collect();
    let (unit, scale) = analysis.case.identity.system.unit(Kind::Speed);
    let degree = analysis.case.identity.system.unit(Kind::Angle).1;
    let rows: Vec<Vec<String>> = analysis
        .results
        .iter()
        .filter(|r| r.named.sought == Sought::ImpactSpeed)
        .map(|r| {
            let by = analysis.plan.adjoint(&analysis.evaluation, r.named.slot);
            let cells = directions.iter().map(|d| significant(by[d.0] * degree / scale, 2));
            std::iter::once(r.named.label.clone()).chain(cells).collect()
        })
        .collect();
    if rows.is_empty() {
        return Vec::new();
    }
    let mut columns = vec![Column::words(&format!("{unit} per degree of"), 2.0)];
    columns.extend(directions.iter().map(|d| Column::numbers(&analysis.plan.slot(*d).symbol, 1.0)));
    vec![
        Block::Heading { level: 2, text: "What a degree of each direction is worth".into() },
        Block::Table(Table { columns, rows }),
    ]
}

fn table(analysis: &Analysis, answered: &Answered) -> Table {
    let kind = analysis.plan.slot(answered.named.slot).kind;
    let (unit, scale) = analysis.case.identity.system.unit(kind);
    let shares = answered.band.linear.shares.iter().take(SHOWN);
    let rows = shares.map(|share| row(analysis, share, unit, scale)).collect();
    Table {
        columns: vec![
            Column::words("Symbol", 0.8),
            Column::words("Entry", 3.4),
            Column::numbers("u of it", 1.1),
            Column::numbers("Worth", 1.9),
            Column::numbers(
                &format!("Part of u{}", if unit.is_empty() { String::new() } else { format!(", {unit}") }),
                1.0,
            ),
            Column::numbers("Share", 0.8),
        ],
        rows,
    }
}

fn row(analysis: &Analysis, share: &Share, unit: &str, scale: f64) -> Vec<String> {
    let input = &analysis.plan.inputs[share.input];
    let slot = analysis.plan.slot(input.slot);
    let (own_unit, own_scale) = analysis.case.identity.system.unit(slot.kind);
    let per = if own_unit.is_empty() { "1".to_string() } else { own_unit.to_string() };
    let worth = share.slope * own_scale / scale;
    vec![
        slot.symbol.clone(),
        format!("{} (entry {})", input.name, share.input + 1),
        format!(
            "{}{}{own_unit}",
            significant(input.dist.u() / own_scale, 2),
            if own_unit == "°" { "" } else { " " }
        )
        .trim_end()
        .to_string(),
        format!("{}{}{unit} per {per}", significant(worth, 2), if unit == "°" { "" } else { " " }),
        significant(share.part.abs() / scale, 2),
        format!("{}\u{a0}%", fixed(share.of_variance * 100.0, 1)),
    ]
}

fn summary(analysis: &Analysis, answered: &Answered) -> String {
    let kind = analysis.plan.slot(answered.named.slot).kind;
    let (unit, scale) = analysis.case.identity.system.unit(kind);
    let l = &answered.band.linear;
    let s = &answered.band.sampled;
    let decimals = decimals_for(l.u / scale).unwrap_or(3);
    let unit = if matches!(unit, "" | "°") { unit.to_string() } else { format!(" {unit}") };
    let show = |v: f64| fixed(v / scale, decimals);
    if !l.u.is_finite() {
        return format!(
            "Linear propagation says nothing here: a quantity under a root is zero at its best estimate. Monte Carlo: \
             u = {}, 95 % from {} to {}{unit}.",
            significant(s.u / scale, 2),
            significant(s.low / scale, 3),
            significant(s.high / scale, 3)
        );
    }
    let dof = if l.dof > 1e4 { "∞".to_string() } else { fixed(l.dof, 0) };
    format!(
        "Linear: u = {}{unit}, effective degrees of freedom {dof}, k = {}, 95 % from {} to {}. Monte Carlo: u = {}, \
         95 % from {} to {}, shortest {} to {}. Bounding case: {} to {}{unit}.",
        show(l.u),
        fixed(l.k, 2),
        show(l.low()),
        show(l.high()),
        show(s.u),
        show(s.low),
        show(s.high),
        show(s.shortest.0),
        show(s.shortest.1),
        show(l.value - l.worst),
        show(l.value + l.worst),
    )
}
