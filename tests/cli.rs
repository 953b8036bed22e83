//! The program as a user meets it: commands, exit statuses, files, JSON.
#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)]

mod common;

use assert_cmd::Command;
use common::root;
use std::path::Path;

fn retrodict(folder: &Path) -> Command {
    let mut command = Command::cargo_bin("retrodict").unwrap();
    command.current_dir(folder);
    command
}

fn text(bytes: &[u8]) -> String {
    String::from_utf8(bytes.to_vec()).unwrap()
}

fn demo() -> String {
    root().join("cases/quarry-road.toml").to_string_lossy().to_string()
}

/// The demo with unanswered warnings: A comes almost along the sum of both
/// momenta, so that B's small share hangs on A's direction.
fn with_warning() -> String {
    common::text("cases/quarry-road.toml").replace("bearing 0 ± 2 deg", "bearing 30 ± 2 deg")
}

fn folder_with(case: &str) -> tempfile::TempDir {
    let folder = tempfile::tempdir().unwrap();
    std::fs::write(folder.path().join("case.toml"), case).unwrap();
    std::fs::copy(root().join("cases/quarry-road-points.csv"), folder.path().join("quarry-road-points.csv"))
        .unwrap();
    folder
}

#[test]
fn print_writes_the_pdf_where_it_was_run_and_says_so() {
    let folder = tempfile::tempdir().unwrap();
    let output = retrodict(folder.path()).args(["print", &demo()]).output().unwrap();
    assert_eq!(output.status.code(), Some(0), "{}", text(&output.stderr));
    assert_eq!(text(&output.stdout), "wrote quarry-road.pdf\n");
    let pdf = std::fs::read(folder.path().join("quarry-road.pdf")).unwrap();
    assert!(pdf.starts_with(b"%PDF-"));
    assert_eq!(std::fs::read_dir(folder.path()).unwrap().count(), 1, "only the PDF is left behind");
}

#[test]
fn the_same_case_and_seed_give_the_same_bytes_on_one_thread_and_two() {
    let folder = tempfile::tempdir().unwrap();
    for (threads, name) in [("1", "a.pdf"), ("2", "b.pdf")] {
        let mut command = retrodict(folder.path());
        command.env("RAYON_NUM_THREADS", threads).args(["print", &demo(), "-o", name, "--seed", "7"]);
        command.assert().success();
    }
    let read = |name: &str| std::fs::read(folder.path().join(name)).unwrap();
    assert!(read("a.pdf") == read("b.pdf"), "the two PDF files differ");
    let json = |threads: &str| {
        let mut command = retrodict(folder.path());
        command.env("RAYON_NUM_THREADS", threads).args(["solve", &demo(), "--json"]);
        command.output().unwrap().stdout
    };
    assert!(json("1") == json("2"), "the two JSON objects differ");
}

#[test]
fn print_never_leaves_half_a_file_and_never_touches_an_input() {
    let folder = folder_with(&common::text("cases/quarry-road.toml"));
    let before = std::fs::read(folder.path().join("case.toml")).unwrap();
    for target in ["missing/x.pdf", "case.toml", "x.txt"] {
        let output = retrodict(folder.path()).args(["print", "case.toml", "-o", target]).output().unwrap();
        assert_eq!(output.status.code(), Some(2), "{target}");
        assert!(text(&output.stderr).contains("written"), "{}", text(&output.stderr));
    }
    assert_eq!(before, std::fs::read(folder.path().join("case.toml")).unwrap());
    assert_eq!(std::fs::read_dir(folder.path()).unwrap().count(), 2);
}

/// One block of trials knows no error of its own: it confirms nothing, and it
/// cannot say that the two propagations differ.
#[test]
fn a_single_block_is_not_said_to_confirm_or_to_differ() {
    let output =
        retrodict(root()).args(["solve", "cases/quarry-road.toml", "--trials", "10000", "--json"]).output();
    let json: serde_json::Value = serde_json::from_slice(&output.unwrap().stdout).unwrap();
    let codes: Vec<&str> =
        json["notices"].as_array().unwrap().iter().map(|n| n["code"].as_str().unwrap()).collect();
    assert!(codes.contains(&"S-2") && !codes.contains(&"S-1"), "{codes:?}");
    let methods = json["results"].as_object().unwrap().values().map(|r| r["method"].as_str().unwrap());
    assert!(methods.into_iter().all(|m| m == "Monte Carlo"));
}

#[test]
fn exit_statuses_are_0_1_and_2() {
    let folder = folder_with(&with_warning());
    let status = |args: &[&str]| retrodict(folder.path()).args(args).output().unwrap().status.code();
    assert_eq!(status(&["check", &demo()]), Some(0));
    assert_eq!(status(&["check", "case.toml"]), Some(1));
    assert_eq!(status(&["solve", "case.toml"]), Some(1));
    assert_eq!(status(&["print", "case.toml"]), Some(1));
    std::fs::write(folder.path().join("bad.toml"), "format = 1\n[case\n").unwrap();
    for command in ["check", "solve", "print"] {
        assert_eq!(status(&[command, "bad.toml"]), Some(2), "{command}");
        assert_eq!(status(&[command, "none.toml"]), Some(2), "{command}");
    }
    assert_eq!(status(&["prnit", "bad.toml"]), Some(2));
    assert_eq!(status(&["--help"]), Some(0));
}

#[test]
fn an_answered_warning_is_printed_and_no_longer_open() {
    let answer = "\n[[answer]]\ncode = \"M-2\"\nreason = \"B's direction is fixed by a kerb scrape\"\nby = \"J. Example\"\n";
    let m14 = answer.replace("M-2", "M-14");
    let folder = folder_with(&(with_warning() + answer + &m14));
    let output = retrodict(folder.path()).args(["solve", "case.toml"]).output().unwrap();
    let page = text(&output.stdout).split_whitespace().collect::<Vec<_>>().join(" ");
    assert!(page.contains("Answered: B's direction is fixed by a kerb scrape (J. Example)"), "{page}");
    assert_eq!(output.status.code(), Some(0), "{page}");
}

#[test]
fn json_is_one_object_with_the_agreed_keys() {
    let output = retrodict(root()).args(["solve", "cases/quarry-road.toml", "--json"]).output().unwrap();
    assert_eq!(output.status.code(), Some(0));
    let json: serde_json::Value = serde_json::from_slice(&output.stdout).unwrap();
    for key in ["format", "version", "case", "case_sha256", "seed", "trials", "results", "notices"] {
        assert!(json.get(key).is_some(), "{key} is missing");
    }
    assert_eq!(json["format"], 1);
    assert_eq!(json["case"], "QR-114");
    assert!(json["caution"].as_str().unwrap().contains("not a finding of fault"));
    let results = json["results"].as_object().unwrap();
    for id in [
        "A.speed_at_start_of_marks",
        "A.impact_speed",
        "B.impact_speed",
        "A.post_impact_speed",
        "B.post_impact_speed",
        "A.delta_v",
        "B.delta_v",
        "A.pdof",
        "B.pdof",
        "closing_speed",
        "energy_lost",
        "restitution",
    ] {
        let result = results.get(id).unwrap_or_else(|| panic!("{id} is missing"));
        for key in ["label", "unit", "value", "u", "low", "high", "coverage", "method"] {
            assert!(result.get(key).is_some(), "{id} lacks {key}");
        }
        let number = |key: &str| result[key].as_f64().unwrap();
        assert!(number("low") <= number("value") && number("value") <= number("high"), "{id}");
        assert_eq!(number("coverage"), 0.95);
    }
    for notice in json["notices"].as_array().unwrap() {
        for key in ["code", "severity", "message", "line"] {
            assert!(notice.get(key).is_some(), "a notice lacks {key}");
        }
    }
}

/// SHA-256 by another program than ours: coreutils.
#[test]
fn the_hash_is_that_of_the_case_file() {
    let Ok(sum) = std::process::Command::new("sha256sum").arg(demo()).output() else { return };
    let wanted = text(&sum.stdout).split(' ').next().unwrap().to_string();
    let output = retrodict(root()).args(["solve", &demo(), "--json"]).output().unwrap();
    let json: serde_json::Value = serde_json::from_slice(&output.stdout).unwrap();
    assert_eq!(json["case_sha256"], wanted.as_str());
}

#[test]
fn a_refused_case_still_gives_json_with_its_reasons() {
    let folder = folder_with("format = 1\nunti = 3\n");
    let output = retrodict(folder.path()).args(["solve", "case.toml", "--json"]).output().unwrap();
    assert_eq!(output.status.code(), Some(2));
    let json: serde_json::Value = serde_json::from_slice(&output.stdout).unwrap();
    assert!(json["results"].as_object().unwrap().is_empty());
    let notices = json["notices"].as_array().unwrap();
    assert!(notices.iter().any(|n| n["severity"] == "STOP" && n["line"] == 2), "{notices:?}");
}

#[test]
fn nothing_piped_carries_colour() {
    for args in [["solve", "cases/quarry-road.toml"], ["check", "cases/quarry-road.toml"]] {
        let output = retrodict(root()).args(args).output().unwrap();
        assert!(!output.stdout.contains(&0x1b) && !output.stderr.contains(&0x1b), "{args:?}");
    }
}

#[test]
fn every_page_of_help_has_an_example() {
    for args in [
        &["--help"][..],
        &["check", "--help"],
        &["solve", "--help"],
        &["print", "--help"],
        &["new", "--help"],
        &["methods", "--help"],
        &["completions", "--help"],
        &["changes", "--help"],
    ] {
        let output = retrodict(root()).args(args).output().unwrap();
        let help = text(&output.stdout);
        assert!(help.contains("Example") && help.contains("cases/quarry-road.toml"), "{args:?}: {help}");
    }
}

#[test]
fn the_terminal_and_the_pdf_carry_the_caution() {
    let output = retrodict(root()).args(["solve", "cases/quarry-road.toml"]).output().unwrap();
    let page =
        text(&output.stdout).replace(['|', '\n'], " ").split_whitespace().collect::<Vec<_>>().join(" ");
    for paragraph in retrodict::report::caution::FULL {
        assert!(page.contains(paragraph), "missing: {paragraph}");
    }
    assert!(page.ends_with(retrodict::report::caution::SHORT));
}

#[test]
fn every_starter_is_valid_as_written_and_never_overwrites() {
    let folder = tempfile::tempdir().unwrap();
    for kind in ["crossing", "in-line", "to-rest"] {
        let file = format!("{kind}.toml");
        let output = retrodict(folder.path()).args(["new", kind]).output().unwrap();
        assert_eq!(output.status.code(), Some(0), "{}", text(&output.stderr));
        assert!(text(&output.stdout).starts_with(&format!("wrote {file}\n")));
        for command in ["check", "solve", "print"] {
            let output = retrodict(folder.path()).args([command, &file]).output().unwrap();
            assert_eq!(output.status.code(), Some(0), "{command} {file}: {}", text(&output.stderr));
        }
        std::fs::write(folder.path().join(&file), "mine").unwrap();
        let output = retrodict(folder.path()).args(["new", kind]).output().unwrap();
        assert_eq!(output.status.code(), Some(2));
        assert_eq!(std::fs::read_to_string(folder.path().join(&file)).unwrap(), "mine");
    }
    let output = retrodict(folder.path()).args(["new", "crosing"]).output().unwrap();
    assert!(text(&output.stderr).contains("did you mean crossing?"));
    let output = retrodict(folder.path()).arg("new").output().unwrap();
    assert_eq!(output.status.code(), Some(2), "nothing is asked when piped");
    assert!(text(&output.stderr).contains("to-rest"));
}

#[test]
fn methods_are_listed_and_shown_with_formula_symbols_limits_and_source() {
    let list = text(&retrodict(root()).arg("methods").output().unwrap().stdout);
    for method in retrodict::physics::METHODS {
        assert!(list.contains(method.id), "{}", method.id);
        let output = retrodict(root()).args(["methods", method.id]).output().unwrap();
        let page = text(&output.stdout).split_whitespace().collect::<Vec<_>>().join(" ");
        for node in retrodict::physics::formulas().into_iter().filter(|n| n.card().method == method.id) {
            assert!(page.contains(node.card().id) && page.contains(node.card().source), "{}", node.card().id);
        }
        for error in method.errors {
            assert!(page.contains(error.id), "{}", error.id);
        }
        assert!(page.contains("not a finding of fault"));
    }
    let page = text(&retrodict(root()).args(["methods", "braking"]).output().unwrap().stdout);
    assert!(page.contains("v_0 = √(v_1² + 2 g f d)"), "{page}");
    let output = retrodict(root()).args(["methods", "brakin"]).output().unwrap();
    assert!(output.status.code() == Some(2) && text(&output.stderr).contains("did you mean braking?"));
}

#[test]
fn changes_are_told_entry_by_entry() {
    let folder = tempfile::tempdir().unwrap();
    let new = common::text("cases/quarry-road.toml")
        .replace("\"12.4 ± 0.3 m (95 %)\"", "\"12.9 ± 0.3 m (95 %)\"")
        .replace("date = \"2026-03-09\"\n", "")
        .replace("method = \"momentum\"", "method = \"momentum\"\nnote = \"seen by two\"");
    std::fs::write(folder.path().join("new.toml"), new).unwrap();
    let output = retrodict(folder.path()).args(["changes", &demo(), "new.toml"]).output().unwrap();
    assert_eq!(output.status.code(), Some(0));
    let wanted = "unit.A.pre_impact.travel 1.distance was \"12.4 ± 0.3 m (95 %)\" and is now \"12.9 ± 0.3 m (95 %)\"\n\
                  impact 1.note is new: \"seen by two\"\ncase.date is gone; it was \"2026-03-09\"\n3 entries differ.";
    assert!(text(&output.stdout).starts_with(wanted), "{}", text(&output.stdout));
    let output = retrodict(folder.path()).args(["changes", "new.toml", "new.toml"]).output().unwrap();
    assert_eq!(text(&output.stdout), "No entry differs.\n");
    std::fs::write(folder.path().join("bad.toml"), "[x").unwrap();
    let output = retrodict(folder.path()).args(["changes", "bad.toml", "none.toml"]).output().unwrap();
    assert_eq!(output.status.code(), Some(2));
    assert_eq!(text(&output.stderr).matches("STOP").count(), 2);
}

#[test]
fn completion_scripts_name_the_commands() {
    for shell in ["bash", "zsh", "fish", "powershell"] {
        let script = text(&retrodict(root()).args(["completions", shell]).output().unwrap().stdout);
        assert!(script.contains("print") && script.contains("seed"), "{shell}");
    }
}

/// Every command in the README's code blocks runs; `cargo run` and `cargo
/// test` are what runs them.
#[test]
fn the_commands_of_the_readme_are_true() {
    let readme = common::text("README.md");
    let folder = tempfile::tempdir().unwrap();
    let cases = folder.path().join("cases");
    std::fs::create_dir(&cases).unwrap();
    for entry in std::fs::read_dir(root().join("cases")).unwrap() {
        let entry = entry.unwrap();
        std::fs::copy(entry.path(), cases.join(entry.file_name())).unwrap();
    }
    let mut tried = 0;
    for line in readme.lines() {
        let words = match (line.strip_prefix("cargo run --release -- "), line.strip_prefix("retrodict ")) {
            (Some(words), _) | (_, Some(words)) => words,
            _ => continue,
        };
        let words = words.split(" > ").next().unwrap();
        let output = retrodict(folder.path()).args(words.split_whitespace()).output().unwrap();
        assert_eq!(output.status.code(), Some(0), "{line}: {}", text(&output.stderr));
        tried += 1;
    }
    assert!(tried >= 4, "only {tried} commands were found in the README");
    assert!(readme.contains("\ncargo run --release -- print cases/quarry-road.toml\n"));
    assert!(readme.contains("\ncargo test\n"));
}
