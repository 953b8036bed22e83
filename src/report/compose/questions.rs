//! Questions about a limit, answered with a probability.

use crate::analysis::{Analysis, Asked};
use crate::report::document::Block;
use crate::units::{decimals_for, fixed, significant};

/// A value is stated to be above a limit from this probability on (guarded
/// rejection, JCGM 106, 8.3.3).
const STATED_FROM: f64 = 0.95;

pub(super) fn section(analysis: &Analysis) -> Vec<Block> {
    if analysis.questions.is_empty() {
        return Vec::new();
    }
    let mut blocks = vec![Block::Heading { level: 1, text: "Questions".into() }];
    for asked in &analysis.questions {
        blocks.extend(question(analysis, asked));
    }
    blocks.push(Block::Paragraph(
        "A probability here says how the listed entries and method errors spread the result. It is not a probability of \
         fault, intent or guilt, and it knows nothing of what is not listed."
            .into(),
    ));
    blocks
}

fn question(analysis: &Analysis, asked: &Asked) -> Vec<Block> {
    let q = &asked.question;
    let Some(named) = &asked.about else {
        let words = q.asked.clone().unwrap_or_else(|| format!("Was {} above {}?", q.of, q.above.entered));
        return vec![Block::Paragraph(format!("{words} There is no answer: the result was refused."))];
    };
    let words =
        q.asked.clone().unwrap_or_else(|| format!("{}: was it above {}?", named.label, q.above.entered));
    let (p, error) = asked.probability;
    let decision = match p {
        p if p >= STATED_FROM => format!("it may be stated to have been above {}", q.above.entered),
        p if p <= 1.0 - STATED_FROM => format!("it may be stated not to have been above {}", q.above.entered),
        _ => "neither may be stated".to_string(),
    };
    vec![
        Block::Heading { level: 2, text: words },
        Block::Paragraph(format!(
            "{}: probability of more than {}: {} (Monte Carlo standard error {}). By the rule that a limit is stated \
             to be exceeded, or kept, only at a probability of 95 % or more (JCGM 106, 8.3), {decision}.",
            named.label,
            q.above.entered,
            probability(p, error),
            if error > 0.0 { significant(error, 1) } else { "0, no trial on the other side".into() }
        )),
        Block::Paragraph(format!(
            "{}: at least {}, one-sided at 95 %.",
            named.label,
            least(analysis, asked, named)
        )),
    ]
}

/// To the digit that its error allows, never a bare 0 or 1 from counting.
fn probability(p: f64, error: f64) -> String {
    match decimals_for(error) {
        Some(decimals) => fixed(p, (decimals - 1).clamp(2, 3)),
        None if p > 0.5 => "more than 0.9999".into(),
        None => "less than 0.0001".into(),
    }
}

/// The lower bound, rounded down at the digits of u.
fn least(analysis: &Analysis, asked: &Asked, named: &crate::plan::Named) -> String {
    let kind = analysis.plan.slot(named.slot).kind;
    let (unit, scale) = analysis.case.identity.system.unit(kind);
    let band = analysis.results.iter().find(|r| r.named.id == named.id).map(|r| r.band.u);
    let decimals = band.and_then(|u| decimals_for(u / scale)).unwrap_or(3);
    let step = libm::pow(10.0, f64::from(-decimals));
    let down = libm::floor(asked.least / scale / step) * step;
    format!("{} {unit}", fixed(down, decimals)).trim_end().to_string()
}
