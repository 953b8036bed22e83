//! The momentum diagram, to scale: what both units brought and what they took
//! away add up to the same momentum.

use crate::analysis::Analysis;
use crate::plan::{MomentumSlots, Sought};
use crate::report::document::{Block, Figure, Mark, Stroke};
use crate::units::{System, clock, fixed};

const WIDTH: f64 = 150.0;
const HEIGHT: f64 = 82.0;
const MARGIN: f64 = 16.0;

type Point = (f64, f64);

/// A vector with its name and how it is drawn.
struct Arrow {
    from: Point,
    to: Point,
    name: String,
    stroke: Stroke,
}

pub(super) fn section(analysis: &Analysis) -> Vec<Block> {
    let stands = analysis.results.iter().any(|r| r.named.sought == Sought::ClosingSpeed);
    match &analysis.plan.watch.momentum {
        Some(impact) if stands => figure(analysis, impact).map(Block::Figure).into_iter().collect(),
        _ => Vec::new(),
    }
}

fn figure(analysis: &Analysis, impact: &MomentumSlots) -> Option<Figure> {
    let arrows = arrows(analysis, impact)?;
    let points: Vec<Point> = arrows.iter().flat_map(|a| [a.from, a.to]).collect();
    let bounds = |of: fn(&Point) -> f64| {
        let values = points.iter().map(of);
        (values.clone().fold(f64::INFINITY, f64::min), values.fold(f64::NEG_INFINITY, f64::max))
    };
    let ((x0, x1), (y0, y1)) = (bounds(|p| p.0), bounds(|p| p.1));
    let span = ((x1 - x0) / (WIDTH - 2.0 * MARGIN)).max((y1 - y0) / (HEIGHT - 2.0 * MARGIN));
    if !(span.is_finite() && span > 0.0) {
        return None;
    }
    let per_mm = round_up(span);
    let middle = ((x0 + x1) / 2.0, (y0 + y1) / 2.0);
    let place =
        |p: Point| (WIDTH / 2.0 + (p.0 - middle.0) / per_mm, HEIGHT / 2.0 + (p.1 - middle.1) / per_mm);
    let mut marks = Vec::new();
    for arrow in &arrows {
        marks.extend(drawn(arrow, place(arrow.from), place(arrow.to)));
    }
    marks.extend(scale_bar(per_mm));
    Some(Figure {
        caption: "Momentum diagram, to scale; north is up. Solid: before impact. Dashed: after impact, the other unit's \
                  appended. Grey: the sum of both, the same before and after."
            .into(),
        width: WIDTH,
        height: HEIGHT,
        marks,
        in_words: in_words(analysis, &arrows),
    })
}

/// Before: the first's momentum, then the second's. After: likewise, from the
/// same start to the same end.
fn arrows(analysis: &Analysis, impact: &MomentumSlots) -> Option<Vec<Arrow>> {
    let value = |slot| analysis.evaluation.value(slot);
    let vector = |mass, xy: [crate::plan::SlotId; 2]| {
        let m: f64 = value(mass)?;
        Some((m * value(xy[0])?, m * value(xy[1])?))
    };
    let mut all = Vec::new();
    let sum = {
        let mut end: Point = (0.0, 0.0);
        for i in [0, 1] {
            let v = vector(impact.mass[i], impact.after_xy[i])?;
            let to = (end.0 + v.0, end.1 + v.1);
            all.push(arrow(end, to, format!("m v′ of {}", impact.names[i]), 0.35, 0.0, true));
            end = to;
        }
        end
    };
    let mut end: Point = (0.0, 0.0);
    for i in [0, 1] {
        let v = vector(impact.mass[i], impact.before_xy[i])?;
        let to = (end.0 + v.0, end.1 + v.1);
        if impact.approach[i].is_some() {
            all.push(arrow(end, to, format!("m v of {}", impact.names[i]), 0.5, 0.0, false));
        }
        end = to;
    }
    all.insert(0, arrow((0.0, 0.0), sum, "sum".into(), 1.1, 0.7, false));
    Some(all)
}

fn arrow(from: Point, to: Point, name: String, width: f64, grey: f64, dashed: bool) -> Arrow {
    Arrow { from, to, name, stroke: Stroke { width, grey, dashed } }
}

fn drawn(arrow: &Arrow, from: Point, to: Point) -> Vec<Mark> {
    let (dx, dy) = (to.0 - from.0, to.1 - from.1);
    let length = libm::hypot(dx, dy);
    if length < 1.0 {
        return Vec::new();
    }
    // The name stands beside the middle, to the right of the arrow's way; that
    // of the sum, on which others may lie, at its tip.
    let away = (dy / length, -dx / length);
    let (mut at, mut anchor) = (
        ((from.0 + to.0) / 2.0 + 2.5 * away.0, (from.1 + to.1) / 2.0 + 2.5 * away.1 - 1.0),
        match away.0 {
            x if x > 0.3 => -1,
            x if x < -0.3 => 1,
            _ => 0,
        },
    );
    if arrow.stroke.grey > 0.0 {
        (at, anchor) = ((to.0 + 2.0, to.1 + 1.5), -1);
    }
    vec![
        Mark::Arrow { from, to, stroke: arrow.stroke },
        Mark::Label { at, anchor, size: 7.5, text: arrow.name.clone() },
    ]
}

/// 1, 2 or 5 times a power of ten, at least `x`.
fn round_up(x: f64) -> f64 {
    let power = libm::pow(10.0, libm::floor(libm::log10(x)));
    [1.0, 2.0, 5.0, 10.0].into_iter().map(|m| m * power).find(|v| *v >= x).unwrap_or(x)
}

fn scale_bar(per_mm: f64) -> Vec<Mark> {
    let stroke = Stroke { width: 0.3, grey: 0.0, dashed: false };
    let (x, y) = (4.0, 5.0);
    let north = Mark::Arrow { from: (WIDTH - 6.0, 4.0), to: (WIDTH - 6.0, 14.0), stroke };
    vec![
        Mark::Line { from: (x, y), to: (x + 20.0, y), stroke },
        Mark::Line { from: (x, y - 1.0), to: (x, y + 1.0), stroke },
        Mark::Line { from: (x + 20.0, y - 1.0), to: (x + 20.0, y + 1.0), stroke },
        Mark::Label {
            at: (x + 22.0, y - 1.0),
            anchor: -1,
            size: 7.0,
            text: format!("{} kg·m/s", fixed(20.0 * per_mm, 0)),
        },
        north,
        Mark::Label { at: (WIDTH - 6.0, 15.0), anchor: 0, size: 7.0, text: "N".into() },
    ]
}

fn in_words(analysis: &Analysis, arrows: &[Arrow]) -> Vec<String> {
    let mut words: Vec<String> = arrows
        .iter()
        .map(|a| {
            let (x, y) = (a.to.0 - a.from.0, a.to.1 - a.from.1);
            format!(
                "{}: {} kg·m/s towards {}° (anticlockwise from east)",
                a.name,
                fixed(libm::hypot(x, y), -1),
                fixed(System::Metric.number(crate::units::Kind::Angle, libm::atan2(y, x)), 0)
            )
        })
        .collect();
    for r in analysis.results.iter().filter(|r| r.named.sought == Sought::ForceDirection) {
        words.push(format!("{}: {}", r.named.label, clock(r.band.value)));
    }
    words
}
