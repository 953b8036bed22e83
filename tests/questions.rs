//! Questions about a limit: probability, least value, decision.
#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)]

mod common;

use common::{case_text, demo, near, said, text};
use retrodict::report::{compose, json, terminal};
use retrodict::uncertainty::Trials;

/// A crossing in which A leaves the impact with a stated speed: that speed is
/// a result whose distribution is known in closed form.
fn crossing(speed: &str, limit: &str) -> String {
    format!(
        "format = 1\n[case]\nnumber = \"1\"\ntitle = \"x\"\n\
         [unit.A]\nmass = \"1500 kg\"\n[unit.A.pre_impact]\ndirection = \"angle 0 deg\"\n\
         [unit.A.post_impact]\ndirection = \"angle 40 deg\"\nspeed = \"{speed}\"\n\
         [unit.B]\nmass = \"1500 kg\"\n[unit.B.pre_impact]\ndirection = \"angle 90 deg\"\n\
         [unit.B.post_impact]\ndirection = \"angle 45 deg\"\nspeed = \"54 ± 1 km/h (1 sd)\"\n\
         [[impact]]\nunits = [\"A\", \"B\"]\nmethod = \"momentum\"\n\
         [[question]]\nof = \"A.post_impact_speed\"\nabove = \"{limit}\"\n"
    )
}

/// Closed form: Φ((v − L)/u). 55 ± 3 km/h against 48.3 gives 0.987, 52 ± 3
/// 0.891, 50 ± 3 0.715 (JCGM 106, normal case; recomputed with erfc).
#[test]
fn the_normal_case_has_its_closed_form() {
    for (speed, figure, expected) in [
        ("55 ± 3 km/h (1 sd)", 0.987, 55.0),
        ("52 ± 3 km/h (1 sd)", 0.891, 52.0),
        ("50 ± 3 km/h (1 sd)", 0.715, 50.0),
    ] {
        let outcome = case_text(&crossing(speed, "48.3 km/h"), Trials::Fixed(1_000_000));
        let asked = &outcome.analysis.as_ref().unwrap_or_else(|| panic!("{}", said(&outcome))).questions[0];
        let exact = 0.5 * libm::erfc((48.3 - expected) / 3.0 * std::f64::consts::FRAC_1_SQRT_2);
        near("printed", exact, figure, 0.0005);
        near(speed, asked.probability.0, exact, 4.0 * asked.probability.1);
        // One-sided: v − 1.644854 u (Φ⁻¹(0.95), standard tables).
        near("at least", asked.least * 3.6, expected - 1.644_854 * 3.0, 0.03);
    }
}

/// A rectangular quantity: the probability is a ratio of lengths.
#[test]
fn a_rectangular_quantity_has_its_closed_form() {
    let outcome = case_text(&crossing("40..60 km/h", "45 km/h"), Trials::Fixed(1_000_000));
    let asked = &outcome.analysis.unwrap().questions[0];
    near("p", asked.probability.0, 0.75, 4.0 * asked.probability.1);
    near("at least", asked.least * 3.6, 41.0, 0.03);
}

#[test]
fn the_worksheet_and_the_json_answer_with_all_that_belongs_to_it() {
    let case = demo()
        + "\n[[question]]\nof = \"A.impact_speed\"\nabove = \"50 km/h\"\nasked = \"Was A above 50 km/h at impact?\"\n\
                         [[question]]\nof = \"A.impact_speed\"\nabove = \"30 km/h\"\n";
    let outcome = case_text(&case, Trials::Fixed(200_000));
    let page = terminal::render(&compose(&outcome).unwrap(), false);
    let page = page.split_whitespace().collect::<Vec<_>>().join(" ");
    for words in [
        "Was A above 50 km/h at impact?",
        "Monte Carlo standard error",
        "one-sided at 95 %",
        "JCGM 106",
        "neither may be stated",
        "may be stated to have been above 30 km/h",
        "not a probability of fault",
    ] {
        assert!(page.contains(words), "{words}: {page}");
    }
    let json: serde_json::Value = serde_json::from_str(&json::render(&outcome)).unwrap();
    let questions = json["questions"].as_array().unwrap();
    assert_eq!(questions.len(), 3);
    let [first, second] = [1, 2].map(|i| questions[i]["probability"].as_f64().unwrap());
    assert!(first > 0.8 && first < 0.9 && second > 0.999, "{first} {second}");
    assert!(questions[0]["remark"].as_str().unwrap().contains("not a finding of fault"));
}

#[test]
fn a_question_about_nothing_is_refused_with_a_suggestion() {
    let ask =
        |of: &str, above: &str| demo() + &format!("\n[[question]]\nof = \"{of}\"\nabove = \"{above}\"\n");
    for (case, words) in [
        (ask("A.impct_speed", "50 km/h"), "did you mean A.impact_speed?"),
        (ask("A.impact_speed", "50"), "a number without its unit"),
        (ask("A.impact_speed", "50 kJ"), "kJ is an energy, not a speed"),
        (ask("A.impact_speed", "50 ± 2 km/h (95 %)"), "no uncertainty of its own"),
    ] {
        let outcome = case_text(&case, Trials::Look);
        assert_eq!(outcome.status(), 2);
        assert!(said(&outcome).contains(words), "{words}: {}", said(&outcome));
    }
}

#[test]
fn a_refused_result_gives_no_probability() {
    let case = demo().replace("bearing 0 ± 2 deg", "bearing 84 ± 2 deg")
        + "\n[[question]]\nof = \"A.impact_speed\"\nabove = \"50 km/h\"\n";
    let outcome = case_text(&case, Trials::Fixed(20_000));
    let page = terminal::render(&compose(&outcome).unwrap(), false);
    assert!(page.contains("There is no answer"), "{page}");
    let json: serde_json::Value = serde_json::from_str(&json::render(&outcome)).unwrap();
    assert!(json["questions"][1]["probability"].is_null());
}

/// The impact is refused in planning: that is the fault, not the question.
#[test]
fn a_question_is_not_blamed_for_an_impact_that_was_not_planned() {
    let wall = demo().replace("label = \"eastbound van\"", "label = \"pier\"\nfixed = true");
    let outcome = case_text(&wall, Trials::Look);
    let page = terminal::render(&compose(&outcome).unwrap(), false);
    assert!(page.contains("There is no answer"), "{page}");
    let json: serde_json::Value = serde_json::from_str(&json::render(&outcome)).unwrap();
    assert!(json["questions"][0]["probability"].is_null());
    let codes = common::codes(&outcome);
    assert!(codes.iter().any(|c| c == "STOP M-8") && !codes.iter().any(|c| c == "STOP CF-7"), "{codes:?}");
}

#[test]
fn the_demo_of_the_readme_knows_the_key() {
    assert!(text("README.md").contains("[[question]]"));
}
