//! Results with their bands and what drives them.

use crate::analysis::{Analysis, Answered, Outcome};
use crate::diag::Severity;
use crate::plan::Sought;
use crate::report::document::{Block, Column, Table};
use crate::uncertainty::{Band, Basis};
use crate::units::{Kind, System, clock, compass, decimals_for, fixed, significant};

pub(super) fn section(outcome: &Outcome, analysis: &Analysis) -> Vec<Block> {
    let mut blocks = vec![Block::Heading { level: 1, text: "Results".into() }];
    blocks.extend(open_questions(outcome));
    if analysis.results.is_empty() {
        blocks.push(Block::Paragraph("No result stands.".into()));
    } else {
        blocks.push(Block::Table(table(analysis)));
        blocks.push(Block::Paragraph(reading(analysis)));
    }
    for answered in &analysis.results {
        if let Some(remark) = answered.named.remark {
            blocks.push(Block::Paragraph(format!("{}: {remark}.", answered.named.label)));
        }
    }
    blocks.extend(directions(analysis));
    blocks.extend(refused(analysis));
    blocks
}

/// What must be known before a result is read.
fn open_questions(outcome: &Outcome) -> Option<Block> {
    let codes = |wanted: &dyn Fn(&crate::diag::Notice) -> bool| -> Vec<&str> {
        outcome.notices.iter().filter(|n| wanted(n)).map(|n| n.code).collect()
    };
    let stops = codes(&|n| n.severity == Severity::Stop);
    let open = codes(&crate::diag::Notice::is_open_warning);
    let mut parts = Vec::new();
    if !stops.is_empty() {
        parts.push(format!("Part of this case was refused: {}.", stops.join(", ")));
    }
    if !open.is_empty() {
        parts.push(format!("Warnings that nobody has answered: {}.", open.join(", ")));
    }
    (!parts.is_empty()).then(|| Block::Paragraph(format!("{} See Notices.", parts.join(" "))))
}

fn table(analysis: &Analysis) -> Table {
    let system = analysis.case.identity.system;
    let rows = analysis
        .results
        .iter()
        .map(|a| {
            let kind = analysis.plan.slot(a.named.slot).kind;
            let text = BandText::new(&a.band, kind, system);
            vec![
                label(a),
                text.value,
                match (a.band.u > 0.0, a.line) {
                    (true, _) => format!("{} to {}", text.low, text.high),
                    (false, Some(_)) => "exact".into(),
                    (false, None) => "as entered".into(),
                },
                text.u,
                contributors(analysis, a),
                a.line.map_or_else(|| "entry".into(), |n| format!("[{n}]")),
            ]
        })
        .collect();
    Table {
        columns: vec![
            Column::words("Result", 2.6),
            Column::numbers("Value", 1.3),
            Column::numbers("95 % band", 1.7),
            Column::numbers("u", 0.8),
            Column::words("Biggest contributors (share of variance)", 3.4),
            Column::numbers("Line", 0.75),
        ],
        rows,
    }
}

/// A direction of force always goes with words: a mistaken sign of 30° is a
/// mistake of 60°.
fn label(a: &Answered) -> String {
    if a.named.sought == Sought::ForceDirection {
        format!("{}: {}", a.named.label, clock(a.band.value))
    } else {
        a.named.label.clone()
    }
}

/// A band in the reader's units, at the digits u deserves.
pub(super) struct BandText {
    pub(super) value: String,
    pub(super) low: String,
    pub(super) high: String,
    pub(super) u: String,
}

impl BandText {
    pub(super) fn new(band: &Band, kind: Kind, system: System) -> Self {
        let (unit, scale) = system.unit(kind);
        let gap = if unit.is_empty() || kind == Kind::Angle { "" } else { "\u{a0}" };
        let show = |v: f64| match decimals_for(band.u / scale) {
            Some(decimals) => fixed(v / scale, decimals),
            None => significant(v / scale, 5),
        };
        let u = if band.u > 0.0 { show(band.u) } else { "exact".into() };
        let line = show(band.linear.value);
        let mut value = format!("{}{gap}{unit}", show(band.value));
        if line != show(band.value) {
            // A mean of trials that is not what the worked line gives says so.
            value.push_str(&format!(" (line: {line})"));
        }
        BandText { value, low: show(band.low), high: show(band.high), u }
    }
}

/// The three biggest contributors with their shares.
fn contributors(analysis: &Analysis, answered: &Answered) -> String {
    let shares = answered.band.linear.shares.iter().take(3);
    let parts: Vec<String> = shares
        .filter(|s| s.of_variance >= 0.01)
        .map(|s| {
            let slot = analysis.plan.inputs[s.input].slot;
            let symbol = &analysis.plan.slot(slot).symbol;
            format!("{symbol} {}\u{a0}%", fixed(s.of_variance * 100.0, 0))
        })
        .collect();
    if parts.is_empty() { "none".into() } else { parts.join(", ") }
}

const MEAN: &str = "There the value is the mean of the trials; where it prints otherwise than the worked line, the \
                    line's value stands beside it.";

/// How the bands are to be read.
fn reading(analysis: &Analysis) -> String {
    let of = |basis: Basis| analysis.results.iter().filter(|r| r.band.basis == basis).count();
    let how = match (of(Basis::Linear), of(Basis::MonteCarlo)) {
        (0, 0) => "Nothing that enters has an uncertainty, so there are no bands.".to_string(),
        (_, 0) => "Bands are by linear propagation, confirmed by Monte Carlo.".to_string(),
        (0, _) => format!("Bands are by Monte Carlo; linear propagation is not confirmed by it. {MEAN}"),
        (_, _) => {
            let names: Vec<&str> = analysis
                .results
                .iter()
                .filter(|r| r.band.basis == Basis::MonteCarlo)
                .map(|r| r.named.label.as_str())
                .collect();
            format!(
                "Bands are by linear propagation, confirmed by Monte Carlo; but by Monte Carlo itself, where it does \
                 not confirm linear propagation, for: {}. {MEAN}",
                names.join("; ")
            )
        }
    };
    format!(
        "A 95 % band is probabilistically symmetric; u is the standard uncertainty. Both hold the listed entries and \
         the stated method errors only. {how} Symbols are those of the register and of the worked lines."
    )
}

/// Courses by the compass: a mistaken direction is easier to see in words.
fn directions(analysis: &Analysis) -> Vec<Block> {
    let mut blocks = Vec::new();
    if let Some(impact) = &analysis.plan.watch.momentum {
        if let Some(k) = impact.condition.and_then(|slot| analysis.evaluation.value(slot)) {
            blocks.push(Block::Paragraph(format!(
                "Condition of the momentum solution: K = {}. Errors of the directions weigh on both speeds in this \
                 proportion; 1 is best, 2 at 30 degrees between the approach lines, 5.8 at 10 degrees.",
                fixed(k.abs(), 2)
            )));
        }
        for i in [0, 1] {
            let word = |slot| analysis.evaluation.value(slot).map(compass);
            let before = impact.approach[i].and_then(word);
            if let Some(after) = word(impact.course[i]) {
                let came =
                    before.map_or("stood before impact".to_string(), |d| format!("came travelling {d}"));
                blocks.push(Block::Paragraph(format!(
                    "{} {came} and left travelling {after}.",
                    impact.names[i]
                )));
            }
        }
    }
    blocks
}

fn refused(analysis: &Analysis) -> Vec<Block> {
    if analysis.refused.is_empty() {
        return Vec::new();
    }
    let mut rows: Vec<Vec<String>> = Vec::new();
    for (named, why) in &analysis.refused {
        match rows.iter_mut().find(|row| row[1] == *why) {
            Some(row) => row[0].push_str(&format!("; {}", named.label)),
            None => rows.push(vec![named.label.clone(), why.clone()]),
        }
    }
    vec![
        Block::Heading { level: 2, text: "Refused results".into() },
        Block::Table(Table {
            columns: vec![Column::words("Result", 1.0), Column::words("Why there is none", 2.4)],
            rows,
        }),
    ]
}
