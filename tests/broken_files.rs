//! Files that are wrong in every way: never a panic, always a message with its
//! place.
#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)]

mod common;

use assert_cmd::Command;
use common::{case_text, codes, demo, said, text};
use proptest::prelude::*;
use retrodict::uncertainty::Trials;

/// Reads a broken case: it must be refused or flagged, with a message.
fn refused(case: &str) -> String {
    let outcome = case_text(case, Trials::Look);
    let said = said(&outcome);
    assert_eq!(outcome.status(), 2, "not refused:\n{said}");
    said
}

/// The demo with one text replaced, which must be there.
fn changed(from: &str, to: &str) -> String {
    let case = demo();
    assert!(case.contains(from), "{from} is not in the demo");
    case.replacen(from, to, 1)
}

#[test]
fn the_demo_alone_is_fine() {
    let outcome = case_text(&demo(), Trials::Look);
    assert_eq!(outcome.status(), 0, "{}", said(&outcome));
}

#[test]
fn a_file_cut_anywhere_is_refused_or_read_never_a_panic() {
    let case = demo();
    for at in (0..case.len()).filter(|at| case.is_char_boundary(*at)).step_by(7) {
        let outcome = case_text(&case[..at], Trials::Look);
        if outcome.status() == 2 {
            assert!(!said(&outcome).is_empty());
        }
    }
}

#[test]
fn binary_huge_and_missing_files_are_refused_by_the_program() {
    let folder = tempfile::tempdir().unwrap();
    let binary: Vec<u8> = (0..5000u32).map(|i| (i * 7919 % 256) as u8).collect();
    std::fs::write(folder.path().join("binary.toml"), &binary).unwrap();
    std::fs::write(folder.path().join("huge.toml"), "# x\n".repeat(3 << 20)).unwrap();
    std::fs::write(folder.path().join("empty.toml"), "").unwrap();
    std::fs::create_dir(folder.path().join("folder.toml")).unwrap();
    for (name, words) in [
        ("binary.toml", "not UTF-8"),
        ("huge.toml", "bytes"),
        ("empty.toml", "lacks format"),
        ("folder.toml", "is a folder"),
        ("none.toml", "cannot be read"),
    ] {
        let mut command = Command::cargo_bin("retrodict").unwrap();
        let output = command.current_dir(folder.path()).args(["solve", name]).output().unwrap();
        let stderr = String::from_utf8_lossy(&output.stderr).to_string();
        assert_eq!(output.status.code(), Some(2), "{name}: {stderr}");
        assert!(stderr.contains(words), "{name}: {stderr}");
    }
}

#[test]
fn deep_nesting_is_refused() {
    for (open, close) in [("[", "]"), ("{ a = ", " }")] {
        let case = format!("format = 1\nx = {}1{}\n", open.repeat(20_000), close.repeat(20_000));
        let said = refused(&case);
        assert!(said.contains("case.toml:2"), "{said}");
    }
    let deep = format!("format = 1\n[{}]\n", vec!["a"; 20_000].join("."));
    refused(&deep);
}

/// Each row: what is changed, to what, the code, and words of the message.
#[test]
fn wrong_values_are_named_with_their_line() {
    let rows = [
        ("\"1480 ± 15 kg (limits)\"", "\"nan kg\"", "CF-5", "does not start with a number"),
        ("\"1480 ± 15 kg (limits)\"", "nan", "CF-5", "does not start with a number"),
        ("\"1480 ± 15 kg (limits)\"", "\"inf kg\"", "CF-5", "does not start with a number"),
        ("\"1480 ± 15 kg (limits)\"", "\"1e999 kg\"", "CF-5", "does not start with a number"),
        ("\"1480 ± 15 kg (limits)\"", "\"0 kg\"", "CF-8", "not possible"),
        ("\"1480 ± 15 kg (limits)\"", "\"-1480 kg\"", "CF-8", "not possible"),
        ("\"1480 ± 15 kg (limits)\"", "\"1480\"", "CF-6", "a number without its unit"),
        ("\"1480 ± 15 kg (limits)\"", "\"1480 m\"", "CF-6", "m is a length, not a mass"),
        ("\"1480 ± 15 kg (limits)\"", "\"14500 N\"", "U-2", "N is a force, not a mass"),
        ("\"1480 ± 15 kg (limits)\"", "\"1480 ± 15 kg\"", "B-1", "can mean three things"),
        ("\"1480 ± 15 kg (limits)\"", "\"1480 ± 15 kg (2 sigma)\"", "B-1", "does not say what the ± means"),
        ("\"1480 ± 15 kg (limits)\"", "\"1,480 kg\"", "CF-5", "a comma inside a number"),
        ("\"1480 ± 15 kg (limits)\"", "\"1495..1465 kg\"", "CF-5", "lower end to its upper"),
        ("\"1480 ± 15 kg (limits)\"", "\"1480 ± -15 kg (limits)\"", "CF-5", "not below zero"),
        ("\"1480 ± 15 kg (limits)\"", "\"\"", "CF-5", "a number is missing"),
        ("\"1480 ± 15 kg (limits)\"", "true", "CF-4", "true or false"),
        ("\"12.4 ± 0.3 m (95 %)\"", "\"-12.4 m\"", "CF-8", "not possible"),
        ("\"12.4 ± 0.3 m (95 %)\"", "\"12.4 kgg\"", "CF-6", "not a unit"),
        ("\"up 1.5 ± 0.3 % (95 %)\"", "\"-1.5 %\"", "D-2", "up or down"),
        ("\"up 1.5 ± 0.3 % (95 %)\"", "\"up 1.5\"", "U-3", "needs its unit"),
        ("\"up 1.5 ± 0.3 % (95 %)\"", "\"up 40 %\"", "U-3", "steeper than any road"),
        ("\"bearing 0 ± 2 deg (95 %)\"", "\"0 deg\"", "CF-5", "bearing or an angle"),
        ("\"bearing 0 ± 2 deg (95 %)\"", "\"bearing 0 ± 2 m (95 %)\"", "CF-6", "m is a length, not an angle"),
        ("\"bearing 0 ± 2 deg (95 %)\"", "\"from point 1 to point 31\"", "CF-7", "not a surveyed point"),
        ("wheels = \"all locked\"", "wheels = \"al locked\"", "CF-7", "did you mean all locked?"),
        ("wheels = \"all locked\"", "whels = \"all locked\"", "CF-2", "did you mean wheels?"),
        ("friction = \"F2\"", "friction = \"F9\"", "CF-7", "did you mean"),
        ("units = [\"A\", \"B\"]", "units = [\"A\", \"A\"]", "CF-7", "collide with itself"),
        ("units = [\"A\", \"B\"]", "units = [\"A\", \"C\"]", "CF-7", "not a unit of this case"),
        ("units = [\"A\", \"B\"]", "units = \"A\"", "CF-4", "a list of the two units"),
        ("method = \"momentum\"", "method = \"momentun\"", "CF-7", "did you mean momentum?"),
        ("stands_for = \"this vehicle\"", "", "B-2", "what its drag factor stands for"),
        (
            "drag_factor = [0.71, 0.74, 0.69, 0.73, 0.72, 0.70, 0.74, 0.72]",
            "drag_factor = [0.71, 0.74]",
            "B-3",
            "too few",
        ),
        ("drag_factor = [0.71, 0.74, 0.69", "drag_factor = [-0.71, 0.74, 0.69", "CF-8", "not possible"),
        ("format = 1", "format = 2", "CF-4", "does not know"),
        ("separation = \"point 31\"", "", "CF-3", "starts at separation"),
    ];
    for (from, to, code, words) in rows {
        let said = refused(&changed(from, to));
        assert!(said.contains(&format!("STOP[{code}]")), "{to}: no {code} in\n{said}");
        assert!(said.contains(words), "{to}: no '{words}' in\n{said}");
        assert!(said.contains("case.toml:"), "{to}: no place in\n{said}");
    }
}

#[test]
fn all_faults_are_reported_at_once_in_the_order_of_the_file() {
    let case = changed("wheels = \"all locked\"", "whels = \"all locked\"")
        .replacen("\"1480 ± 15 kg (limits)\"", "\"1480 ± 15 kg\"", 1)
        .replacen("friction = \"F2\"", "friction = \"F3\"", 1);
    let outcome = case_text(&case, Trials::Look);
    let codes = codes(&outcome);
    for code in ["STOP CF-2", "STOP CF-3", "STOP B-1", "STOP CF-7"] {
        assert!(codes.iter().any(|c| c == code), "no {code} in {codes:?}");
    }
    let places: Vec<usize> = outcome.notices.iter().filter_map(|n| n.place).map(|p| p.start).collect();
    assert!(places.is_sorted(), "{places:?}");
}

#[test]
fn the_very_part_that_is_wrong_is_underlined() {
    let said = refused(&changed("\"12.4 ± 0.3 m (95 %)\"", "\"12.4 ± 0.3 mm² (95 %)\""));
    let mut lines = said.lines().skip_while(|l| !l.contains("0.3 mm²"));
    let (text, marks) = (lines.next().unwrap(), lines.next().unwrap());
    let at = text.chars().position(|c| c == 'm' && text.contains("mm²")).unwrap();
    let start = text.find("mm²").map(|b| text[..b].chars().count()).unwrap();
    assert!(at <= start);
    let underlined: String =
        text.chars().zip(marks.chars()).filter(|(_, m)| *m == '^').map(|(c, _)| c).collect();
    assert_eq!(underlined, "mm²", "{said}");
}

#[test]
fn faults_of_the_points_file_have_their_place_too() {
    let case = text("cases/quarry-road.toml");
    for (points, words) in [
        ("number,east,north\n31,1,2\n31,3,4\n", "point 31 stands twice"),
        ("number,east,north\n31,1,x\n", "a coordinate is not a number"),
        ("number,east\n31,1\n", "lacks a column"),
        ("", "lacks a column"),
        ("number,east,north\n,1,2\n", "a point without a number"),
        ("number,east,north\n31,nan,2\n", "a coordinate is not a number"),
    ] {
        let load = |_: &str| Ok(points.to_string());
        let options = retrodict::analysis::Options { seed: 1, trials: Trials::Look };
        let outcome = retrodict::analysis::analyse("case.toml", &case, &load, options);
        let said = said(&outcome);
        assert_eq!(outcome.status(), 2);
        assert!(said.contains(words), "{points}: {said}");
        assert!(said.contains("quarry-road-points.csv:"), "{said}");
    }
}

#[test]
fn a_case_may_not_read_files_elsewhere() {
    let folder = tempfile::tempdir().unwrap();
    let case = text("cases/quarry-road.toml");
    for name in ["../secret.csv", "/etc/hostname", "a/../../b.csv"] {
        let case = case.replace("quarry-road-points.csv", name);
        std::fs::write(folder.path().join("case.toml"), case).unwrap();
        let mut command = Command::cargo_bin("retrodict").unwrap();
        let output = command.current_dir(folder.path()).args(["check", "case.toml"]).output().unwrap();
        assert_eq!(output.status.code(), Some(2));
        let stderr = String::from_utf8_lossy(&output.stderr).to_string();
        assert!(stderr.contains("beside the case file"), "{stderr}");
    }
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 400, failure_persistence: None, ..ProptestConfig::default() })]

    /// Any text where a quantity is expected.
    #[test]
    fn no_quantity_text_makes_it_panic(junk in "\\PC{0,24}") {
        for kind in [retrodict::units::Kind::Length, retrodict::units::Kind::Ratio] {
            if let Err(fault) = retrodict::case::quantity(&junk, kind, None) {
                prop_assert!(fault.from <= junk.len());
                prop_assert!(!fault.message.is_empty());
            }
        }
    }

    /// Texts made of the notation's own pieces.
    #[test]
    fn no_mixture_of_the_notation_makes_it_panic(
        pieces in proptest::collection::vec(
            proptest::sample::select(vec![
                "1", "2.5", "-", "±", "+/-", "..", "(", ")", "(95 %)", "(1 sd)", "(3)", " ", "m", "%", "e", "1e9", ",", "−", "deg", "ft",
            ]),
            0..10,
        )
    ) {
        let text = pieces.concat();
        let _ = retrodict::case::quantity(&text, retrodict::units::Kind::Length, None);
        let case = demo().replacen("12.4 ± 0.3 m (95 %)", &text, 1);
        let _ = said(&case_text(&case, Trials::Look));
    }

    /// A byte of the demo becomes another character.
    #[test]
    fn no_slip_of_a_finger_makes_it_panic(at in 0usize..3000, c in "[ -~±\n\"]") {
        let mut case = demo();
        let at = at % case.len();
        if case.is_char_boundary(at) && case.is_char_boundary(at + 1) {
            case.replace_range(at..at + 1, &c);
            let outcome = case_text(&case, Trials::Look);
            let _ = said(&outcome);
            let _ = retrodict::report::json::render(&outcome);
            let _ = retrodict::report::compose(&outcome).map(|d| retrodict::report::terminal::render(&d, false));
        }
    }
}
