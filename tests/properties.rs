//! What must stay the same when a case is written another way (derived from
//! the mechanics; common practice as self-checks).
#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)]

mod common;

use common::{case_text, value};
use proptest::prelude::*;
use retrodict::uncertainty::Trials;

/// One unit of a crossing.
#[derive(Debug, Clone)]
struct One {
    name: &'static str,
    mass: f64,
    came: f64,
    left: f64,
    friction: f64,
    distance: f64,
}

/// Two units whose momentum closes: both leave with nearly the common velocity.
#[derive(Debug, Clone)]
struct Scene {
    a: One,
    b: One,
}

fn scene() -> impl Strategy<Value = Scene> {
    let masses = (800.0..3000.0f64, 800.0..3000.0f64);
    let speeds = (8.0..30.0f64, 8.0..30.0f64);
    (masses, speeds, 0.0..360.0f64, 45.0..135.0f64, 0.3..0.9f64, 0.3..0.9f64).prop_map(
        |((ma, mb), (va, vb), a0, turn, fa, fb)| {
            let (ra, rb) = (a0.to_radians(), (a0 + turn).to_radians());
            let px = ma * va * libm::cos(ra) + mb * vb * libm::cos(rb);
            let py = ma * va * libm::sin(ra) + mb * vb * libm::sin(rb);
            let common = (px * px + py * py).sqrt() / (ma + mb);
            let course = libm::atan2(py, px).to_degrees();
            let d = |f: f64| common * common / (2.0 * 9.80665 * f);
            let one = |name, mass, came, friction| One {
                name,
                mass,
                came,
                left: course,
                friction,
                distance: d(friction),
            };
            Scene { a: one("A", ma, a0, fa), b: one("B", mb, a0 + turn, fb) }
        },
    )
}

fn unit(o: &One, travel: &str) -> String {
    let n = o.name;
    format!(
        "[friction_test.F{n}]\nsurface = \"s\"\nbraking = \"locked\"\ndrag_factor = \"{:?}\"\nstands_for = \"this vehicle\"\n\
         [unit.{n}]\nmass = \"{:?} kg\"\n[unit.{n}.pre_impact]\ndirection = \"angle {:?} deg\"\n\
         [[unit.{n}.pre_impact.travel]]\ndistance = \"10 m\"\nwheels = \"all locked\"\nfriction = \"F{n}\"\n\
         [unit.{n}.post_impact]\ndirection = \"angle {:?} deg\"\n{travel}",
        o.friction, o.mass, o.came, o.left
    )
}

fn stretch(o: &One, distance: f64) -> String {
    let n = o.name;
    format!(
        "[[unit.{n}.post_impact.travel]]\ndistance = \"{distance:?} m\"\nwheels = \"all locked\"\nfriction = \"F{n}\"\n"
    )
}

fn case(s: &Scene) -> String {
    with_travel(s, &stretch(&s.a, s.a.distance), &stretch(&s.b, s.b.distance))
}

fn with_travel(s: &Scene, a: &str, b: &str) -> String {
    format!(
        "format = 1\n[case]\nnumber = \"1\"\ntitle = \"x\"\n{}{}[[impact]]\nunits = [\"A\", \"B\"]\nmethod = \"momentum\"\n",
        unit(&s.a, a),
        unit(&s.b, b)
    )
}

const SPEEDS: [&str; 7] = [
    "A.impact_speed",
    "B.impact_speed",
    "A.post_impact_speed",
    "B.post_impact_speed",
    "A.delta_v",
    "B.delta_v",
    "closing_speed",
];

fn results(case: &str, ids: &[&str]) -> Vec<f64> {
    let outcome = case_text(case, Trials::Look);
    ids.iter().map(|id| value(&outcome, id)).collect()
}

/// Equal to a billionth of the larger, or of 1 m/s.
fn same(what: &str, a: &[f64], b: &[f64]) -> Result<(), TestCaseError> {
    for (x, y) in a.iter().zip(b) {
        prop_assert!((x - y).abs() <= 1e-9 * x.abs().max(1.0), "{what}: {x} and {y}");
    }
    Ok(())
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 40, failure_persistence: None, ..ProptestConfig::default() })]

    #[test]
    fn turning_the_whole_scene_changes_no_speed_and_no_direction_of_force(s in scene(), by in 0.0..360.0f64) {
        let mut turned = s.clone();
        for o in [&mut turned.a, &mut turned.b] {
            o.came += by;
            o.left += by;
        }
        same("turned", &results(&case(&s), &SPEEDS), &results(&case(&turned), &SPEEDS))?;
        let pdof = ["A.pdof", "B.pdof"];
        same("force", &results(&case(&s), &pdof), &results(&case(&turned), &pdof))?;
    }

    #[test]
    fn the_mirror_image_turns_the_force_to_the_other_side(s in scene()) {
        let mut mirror = s.clone();
        for o in [&mut mirror.a, &mut mirror.b] {
            o.came = -o.came;
            o.left = -o.left;
        }
        same("mirrored", &results(&case(&s), &SPEEDS), &results(&case(&mirror), &SPEEDS))?;
        let pdof = ["A.pdof", "B.pdof"];
        let turned: Vec<f64> = results(&case(&mirror), &pdof).iter().map(|p| -p).collect();
        same("force", &results(&case(&s), &pdof), &turned)?;
    }

    #[test]
    fn scaling_all_masses_changes_no_speed(s in scene(), k in 0.5..2.0f64) {
        let mut scaled = s.clone();
        scaled.a.mass *= k;
        scaled.b.mass *= k;
        same("scaled", &results(&case(&s), &SPEEDS), &results(&case(&scaled), &SPEEDS))?;
        let energy = ["energy_lost"];
        let more: Vec<f64> = results(&case(&s), &energy).iter().map(|e| e * k).collect();
        same("energy", &more, &results(&case(&scaled), &energy))?;
    }

    #[test]
    fn scaling_all_friction_scales_speeds_by_its_root(s in scene(), k in 0.5..2.0f64) {
        let mut scaled = s.clone();
        scaled.a.friction *= k;
        scaled.b.friction *= k;
        let expected: Vec<f64> = results(&case(&s), &SPEEDS).iter().map(|v| v * k.sqrt()).collect();
        same("rougher", &expected, &results(&case(&scaled), &SPEEDS))?;
    }

    #[test]
    fn swapping_the_labels_swaps_the_results(s in scene()) {
        let swapped = Scene { a: One { name: "A", ..s.b.clone() }, b: One { name: "B", ..s.a.clone() } };
        let ids = ["B.impact_speed", "A.impact_speed", "B.post_impact_speed", "A.post_impact_speed", "B.delta_v", "A.delta_v", "closing_speed"];
        same("swapped", &results(&case(&s), &SPEEDS), &results(&case(&swapped), &ids))?;
        same("force", &results(&case(&s), &["A.pdof", "B.pdof"]), &results(&case(&swapped), &["B.pdof", "A.pdof"]))?;
    }

    #[test]
    fn splitting_a_stretch_or_adding_one_without_length_changes_nothing(s in scene(), part in 0.05..0.95f64) {
        let d = s.a.distance;
        let split = stretch(&s.a, d * part) + &stretch(&s.a, d - d * part) + &stretch(&s.a, 0.0);
        let other = stretch(&s.b, 0.0) + &stretch(&s.b, s.b.distance);
        same("split", &results(&case(&s), &SPEEDS), &results(&with_travel(&s, &split, &other), &SPEEDS))?;
    }

    #[test]
    fn forward_and_backward_on_one_line_undo_each_other(
        m1 in 600.0..3000.0f64, m2 in 600.0..3000.0f64, v2 in 0.0..15.0f64, closing in 2.0..20.0f64, e in 0.05..0.95f64,
    ) {
        let head = "format = 1\n[case]\nnumber = \"1\"\ntitle = \"x\"\n";
        let unit = |n: &str, m: f64, before: &str, after: &str| {
            format!("[unit.{n}]\nmass = \"{m:?} kg\"\n[unit.{n}.pre_impact]\n{before}[unit.{n}.post_impact]\n{after}")
        };
        let impact = format!("[[impact]]\nunits = [\"A\", \"B\"]\nmethod = \"in-line\"\nrestitution = \"{e:?}\"\n");
        let speed = |v: f64| {
            let way = if v < 0.0 { "against the line" } else { "along the line" };
            format!("direction = \"{way}\"\nspeed = \"{:?} m/s\"\n", v.abs())
        };
        let forward = head.to_string() + &unit("A", m1, &speed(v2 + closing), "") + &unit("B", m2, &speed(v2), "") + &impact;
        let after = results(&forward, &["A.post_impact_speed", "B.post_impact_speed"]);
        let way = "direction = \"along the line\"\n";
        let backward = head.to_string() + &unit("A", m1, way, &speed(after[0])) + &unit("B", m2, way, &speed(after[1])) + &impact;
        let before = results(&backward, &["A.impact_speed", "B.impact_speed", "closing_speed", "restitution"]);
        same("undone", &before, &[v2 + closing, v2, closing, e])?;
    }
}
