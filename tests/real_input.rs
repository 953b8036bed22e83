//! Cases from real input: simulated crashes, whose truth is known, and staged
//! crashes with real cars, from published figures.
//!
//! 'Simulated' means computed in a general rigid-body library; `real_input/`
//! holds what was measured there (truth with noise) and the truth, which only
//! this test reads. The entries are held against the measured block, so that
//! none can be chosen by its outcome.

#![allow(clippy::unwrap_used, clippy::panic, reason = "a test fails this way, its helpers included")]

#[path = "real_input/braking_share.rs"]
mod braking_share;

use retrodict::analysis::{Analysis, Options, Outcome, analyse};
use retrodict::case::{Direction, Drag, Entry, PointId, StretchLength, Unit};
use retrodict::uncertainty::Trials;
use serde_json::Value;

const SIMULATED: [(&str, &str); 3] = [
    ("pg-11", include_str!("../cases/sim-pg-11.toml")),
    ("pg-16", include_str!("../cases/sim-pg-16.toml")),
    ("pg-49", include_str!("../cases/sim-pg-49.toml")),
];
const STAGED_8: &str = include_str!("../cases/staged-8.toml");
const STAGED_11: &str = include_str!("../cases/staged-11.toml");

/// Trials behind each band.
const TRIALS: u64 = 200_000;

/// Results whose band misses the truth, and words of the case that say why.
const MISSES: [(&str, &str, &str); 1] =
    [("pg-11", "B.impact_speed", "band of B's speed before impact misses the computed truth")];

fn solved(text: &str, trials: u64) -> Outcome {
    let options = Options { seed: 1, trials: Trials::Fixed(trials) };
    analyse("case.toml", text, &|name| Err(format!("no file {name}")), options)
}

fn analysis(outcome: &Outcome) -> &Analysis {
    outcome.analysis.as_ref().unwrap_or_else(|| panic!("refused: {:?}", outcome.notices))
}

fn copied(text: &str, id: &str) -> Value {
    let whole: Value = serde_json::from_str(text).unwrap();
    whole["cases"][id].clone()
}

/// Low and high end of a result's 95 % band.
fn band(analysis: &Analysis, id: &str) -> (f64, f64) {
    let result = analysis.results.iter().find(|r| r.named.id == id);
    let result = result.unwrap_or_else(|| panic!("no result {id}"));
    (result.band.low, result.band.high)
}

#[test]
fn bands_of_simulated_cases_hold_the_truth_or_the_case_says_why_not() {
    for (id, text) in SIMULATED {
        let outcome = solved(text, TRIALS);
        let analysis = analysis(&outcome);
        let truth = copied(include_str!("real_input/truth.json"), id);
        for (result, value) in truth.as_object().unwrap() {
            let (low, high) = band(analysis, result);
            let value = value.as_f64().unwrap();
            let holds = low <= value && value <= high;
            println!("{id} {result}: truth {value:.2} m/s, band {low:.2} to {high:.2}, holds: {holds}");
            let miss = MISSES.iter().find(|m| (m.0, m.1) == (id, result.as_str()));
            match miss {
                None => assert!(holds, "{id} {result}: {value} lies outside {low} to {high}"),
                Some((.., words)) => {
                    assert!(!holds, "{id} {result} is listed as a miss, but the band holds the truth");
                    let said = analysis.case.identity.remarks.iter().any(|r| r.contains(words));
                    assert!(said, "{id}: the remarks do not say '{words}'");
                }
            }
        }
    }
}

/// `entry` has this estimate and standard uncertainty, to half a last digit.
fn same(entry: &Entry, value: f64, u: f64, half: f64) {
    let (is, is_u) = (entry.dist.estimate(), entry.dist.u());
    let near = |a: f64, b: f64| (a - b).abs() <= half * 1.001;
    assert!(near(is, value) && near(is_u, u), "{}: {is} ± {is_u}, measured {value} ± {u}", entry.name);
}

#[test]
fn simulated_entries_are_those_of_the_measured_block() {
    for (id, text) in SIMULATED {
        let outcome = solved(text, 1); // only the entries are wanted
        let case = &analysis(&outcome).case;
        let measured = copied(include_str!("real_input/measured.json"), id);
        let u = |key: &str| measured["standard_uncertainty"][key].as_f64().unwrap();
        let friction = measured["friction"].as_f64().unwrap();
        same(&case.tests[0].drag, friction, u("friction"), 0.0005);
        for (unit, car) in case.units.iter().zip(measured["units"].as_array().unwrap()) {
            let mass = car["mass"].as_f64().unwrap();
            same(unit.mass.as_ref().unwrap(), mass, mass * u("mass_rel"), 0.5);
            approach(unit, car, u("course_deg"));
            let path = path(car);
            let points: Vec<PointId> = unit.phases[1].path.clone();
            assert_eq!(points.len(), path.len(), "{id} {}: points of the path", unit.id);
            for (i, (point, [east, north])) in points.iter().zip(&path).enumerate() {
                let point = &case.points[point.0];
                let [u_east, u_north] =
                    if i == 0 { impact_u(car, u) } else { [u("position"), u("position")] };
                same(&point.east, *east, u_east, 0.0005);
                same(&point.north, *north, u_north, 0.0005);
            }
            let [stretch] = unit.phases[1].travel.as_slice() else { panic!("{id}: one stretch to rest") };
            let Drag::Friction { share, .. } = &stretch.drag else { panic!("{id}: a share of a friction") };
            let (least, greatest) = braking_share::limits(car, &path, friction);
            let (low, high) = (libm::floor(least * 100.0) / 100.0, libm::ceil(greatest * 100.0) / 100.0);
            let half = libm::sqrt(3.0) * share.dist.u();
            let (is_low, is_high) = (share.dist.estimate() - half, share.dist.estimate() + half);
            let agrees = (is_low - low).abs() < 1e-6 && (is_high - high).abs() < 1e-6;
            assert!(agrees, "{}: {is_low}..{is_high}, by the rule {low}..{high}", share.name);
        }
    }
}

/// Centres of gravity from impact to rest.
fn path(car: &Value) -> Vec<[f64; 2]> {
    let at = |p: &Value| [p["x"].as_f64().unwrap(), p["y"].as_f64().unwrap()];
    let impact = &car["cg_at_impact_derived"];
    let mut path = vec![[impact[0].as_f64().unwrap(), impact[1].as_f64().unwrap()]];
    path.extend(car.get("points_on_the_way").and_then(Value::as_array).into_iter().flatten().map(at));
    path.push(at(&car["rest"]));
    path
}

/// Standard uncertainties of the impact position: contact point, its place in
/// the car, and the course about which that place is turned.
fn impact_u(car: &Value, u: impl Fn(&str) -> f64) -> [f64; 2] {
    let course = car["course_before_deg"].as_f64().unwrap().to_radians();
    let [x, y] = [0, 1].map(|i| car["contact_point_body"][i].as_f64().unwrap());
    let (c, s) = (libm::cos(course), libm::sin(course));
    let turned = u("course_deg").to_radians();
    let both = libm::hypot(u("position"), u("contact_body"));
    [libm::hypot(both, (x * s + y * c) * turned), libm::hypot(both, (x * c - y * s) * turned)]
}

/// Course (or heading of a standing car) and skid before impact.
fn approach(unit: &Unit, car: &Value, u: f64) {
    let before = &unit.phases[0];
    let stood = car["standing_before"].as_bool().unwrap();
    assert_eq!(before.standing, stood, "{}: standing", unit.id);
    let direction = if stood { &before.heading } else { &before.direction };
    let Some(Direction::Angle(entry)) = direction else { panic!("{}: a typed angle", unit.id) };
    let course = car["course_before_deg"].as_f64().unwrap();
    same(entry, course.to_radians(), u.to_radians(), 0.005_f64.to_radians());
    match (before.travel.as_slice(), car.get("locked_skid_before")) {
        ([], None) => {}
        ([skid], Some(measured)) => {
            let StretchLength::Entered(length) = &skid.length else { panic!("{}: a typed length", unit.id) };
            let (value, u) = (measured["length"].as_f64().unwrap(), measured["u"].as_f64().unwrap());
            same(length, value, u, 0.005);
        }
        _ => panic!("{}: skid before impact", unit.id),
    }
}

/// Staged test 11, real cars: 20.4 mph each, velocities 170° apart (recalled,
/// high confidence). The closing speed |V1 − V2| is 2 · 20.4 · sin 85° =
/// 40.64 mph; along the course of either car it is 20.4 (1 + cos 10°) = 40.49.
#[test]
fn staged_11_holds_the_closing_speed_whichever_line_is_meant() {
    let outcome = solved(STAGED_11, TRIALS);
    let (low, high) = band(analysis(&outcome), "closing_speed");
    let (a, b) = (170_f64.to_radians(), 10_f64.to_radians());
    for mph in [2.0 * 20.4 * libm::sin(a / 2.0), 20.4 * (1.0 + libm::cos(b))] {
        let value = mph * 0.44704;
        assert!(low <= value && value <= high, "{value} m/s lies outside {low} to {high}");
    }
    assert!(!outcome.notices.iter().any(|n| n.code == "M-12"), "momentum closes here");
}

/// Staged test 8, real cars: nearly equal weights, delta-Vs 1.43 to 1.
#[test]
fn staged_8_is_told_that_momentum_does_not_close() {
    let outcome = solved(STAGED_8, TRIALS);
    let warned = outcome.notices.iter().any(|n| n.code == "M-12" && n.is_open_warning());
    assert!(warned, "no open warning M-12: {:?}", outcome.notices);
    assert_eq!(outcome.status(), 1, "done, with an unanswered warning");
}
