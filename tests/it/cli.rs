//! The command line: what it writes, what it says, how it ends.

use std::fs;

use crate::program::{command, examples, run, written};

const SMALL: &str = r#"Scene(
    format: 1,
    base: "quay",
    units: (time: "ns", length: "m", energy: "MeV"),
    events: { "here": At(t: 1, x: "1/4") },
    lines: { "post": Free(through: "here", velocity: Beta(0)) },
    particles: { "p": (species: "p", state: Kinetic(800)) },
    frames: { "skiff": Moving(velocity: Beta("3/5")) },
    plates: {
        "one": (panels: [(view: Spacetime, range: (t: (-2, 8), x: (-2, 2))), (view: EnergyMomentum)]),
        "two": (width: "60 mm", panels: [(view: EnergyMomentum, frame: "skiff")]),
    },
)"#;

fn faulty() -> String {
    SMALL.replace(
        "\"here\": At(t: 1",
        "\"lost\": At(t: \"1 kg\", x: 0),\n        \"here\": At(t: 1",
    )
}

#[test]
fn every_example_is_drawn_in_every_format_and_audits_clean() {
    let folder = tempfile::tempdir().unwrap();
    for path in examples() {
        let scene = path.to_str().unwrap();
        let audit = run(&["audit", scene]);
        assert_eq!((audit.code, audit.text().as_str()), (0, ""), "{scene}");
        for ending in ["svg", "pdf", "png", "tex"] {
            let to = folder
                .path()
                .join(format!("{}.{ending}", path.file_stem().unwrap().display()));
            let ran = run(&["draw", scene, "--dpi", "100", "--to", to.to_str().unwrap()]);
            assert_eq!(
                (ran.code, ran.err.as_str(), ran.text().as_str()),
                (0, "", ""),
                "{scene}"
            );
            let bytes = fs::read(&to).unwrap();
            let starts: &[u8] = match ending {
                "svg" => b"<?xml",
                "pdf" => b"%PDF-",
                "png" => b"\x89PNG",
                _ => b"%",
            };
            assert!(
                bytes.starts_with(starts),
                "{scene} {ending}: {:?}",
                &bytes[..8]
            );
        }
    }
}

#[test]
fn an_existing_file_is_kept_unless_force_is_said() {
    let (folder, scene) = written(SMALL);
    let to = folder.path().join("figure.svg");
    let to = to.to_str().unwrap();
    fs::write(to, "mine").unwrap();
    let ran = run(&["draw", &scene, "--to", to]);
    assert_eq!(ran.code, 2);
    assert!(ran.err.contains("--force"), "{}", ran.err);
    assert_eq!(fs::read_to_string(to).unwrap(), "mine");
    assert_eq!(run(&["draw", &scene, "--to", to, "--force"]).code, 0);
    assert!(fs::read_to_string(to).unwrap().contains("<svg"));
}

#[test]
fn a_draw_that_fails_leaves_the_old_file_and_no_litter() {
    let (folder, scene) = written(SMALL);
    let to = folder.path().join("figure.png");
    let to = to.to_str().unwrap();
    fs::write(to, "mine").unwrap();
    for more in [
        ["--dpi", "1e9"],
        ["--plate", "three"],
        ["--frame", "skif"],
        ["--panel", "z"],
    ] {
        let mut args = vec!["draw", &scene, "--to", to, "--force"];
        args.extend(more);
        let ran = run(&args);
        assert_eq!(ran.code, 2, "{more:?}: {}", ran.err);
        assert!(!ran.err.is_empty());
        assert_eq!(fs::read_to_string(to).unwrap(), "mine", "{more:?}");
    }
    assert_eq!(fs::read_dir(folder.path()).unwrap().count(), 2);
}

#[test]
fn names_that_are_not_there_offer_what_is() {
    let (folder, scene) = written(SMALL);
    let to = folder.path().join("figure.svg");
    let to = to.to_str().unwrap();
    let ran = run(&["draw", &scene, "--to", to, "--frame", "skif"]);
    assert!(
        ran.err.contains("perhaps \"skiff\" is meant"),
        "{}",
        ran.err
    );
    let ran = run(&["draw", &scene, "--to", to, "--plate", "nine"]);
    assert!(ran.err.contains("\"one\", \"two\""), "{}", ran.err);
    let ran = run(&["draw", &scene, "--to", "figure.gif"]);
    assert_eq!(ran.code, 2);
    assert!(ran.err.contains(".svg"), "{}", ran.err);
}

#[test]
fn a_faulty_scene_is_drawn_as_far_as_it_goes_and_ends_with_1() {
    let (folder, scene) = written(&faulty());
    let to = folder.path().join("figure.svg");
    let ran = run(&["draw", &scene, "--to", to.to_str().unwrap()]);
    assert_eq!(ran.code, 1);
    assert!(ran.err.contains("event lost"), "{}", ran.err);
    assert!(to.exists());
    let ran = run(&["ledger", &scene, "--as", "json"]);
    assert_eq!(ran.code, 1);
    let json = ran.json();
    assert_eq!(json["events"].as_array().unwrap().len(), 1);
    assert_eq!(json["faults"][0]["object"], "event lost");
    let line = json["faults"][0]["line"].as_u64().unwrap();
    assert_eq!(
        faulty()
            .lines()
            .nth(usize::try_from(line).unwrap() - 1)
            .unwrap()
            .trim(),
        "events: { \"lost\": At(t: \"1 kg\", x: 0),"
    );
    let ran = run(&["audit", &scene]);
    assert_eq!(ran.code, 1);
    assert_eq!(ran.text().lines().count(), 1);
    assert!(
        ran.text().starts_with(&format!("{scene}:{line}:")),
        "{}",
        ran.text()
    );
}

#[test]
fn an_audit_ends_as_its_worst_scene() {
    let (_a, sound) = written(SMALL);
    let (_b, faults) = written(&faulty());
    let (_c, broken) = written("Scene(format: 1, base: \"b\", events: {");
    assert_eq!(run(&["audit", &sound]).code, 0);
    assert_eq!(run(&["audit", &sound, &faults]).code, 1);
    let ran = run(&["audit", &broken, &sound, &faults]);
    assert_eq!(ran.code, 2);
    assert!(
        ran.text().starts_with(&format!("{broken}:1:")),
        "{}",
        ran.text()
    );
    assert_eq!(run(&["audit", "nowhere.ron"]).code, 2);
}

#[test]
fn what_cannot_be_read_ends_with_2_and_words() {
    let folder = tempfile::tempdir().unwrap();
    let fifo = folder.path().join("fifo");
    let made = std::process::Command::new("mkfifo").arg(&fifo).status();
    let mut paths = vec![folder.path().to_path_buf(), folder.path().join("none.ron")];
    if made.is_ok_and(|s| s.success()) {
        paths.push(fifo);
    }
    for path in paths {
        let ran = run(&["ledger", path.to_str().unwrap()]);
        assert_eq!(ran.code, 2, "{}", path.display());
        assert_eq!(ran.err.lines().count(), 1, "{}", ran.err);
        assert!(ran.out.is_empty());
    }
}

#[test]
fn the_same_scene_gives_the_same_bytes_anywhere() {
    for path in examples() {
        let name = path.file_name().unwrap();
        for ending in ["svg", "pdf", "png", "tex"] {
            let drawn = |folder: &std::path::Path, variables: &[(&str, &str)]| {
                fs::copy(&path, folder.join(name)).unwrap();
                let to = format!("f.{ending}");
                let scene = name.to_str().unwrap();
                let status = command(&["draw", scene, "--dpi", "72", "--to", &to])
                    .current_dir(folder)
                    .envs(variables.iter().copied())
                    .status()
                    .unwrap();
                assert!(status.success());
                fs::read(folder.join(&to)).unwrap()
            };
            let (a, b) = (tempfile::tempdir().unwrap(), tempfile::tempdir().unwrap());
            let one = drawn(a.path(), &[]);
            let two = drawn(
                b.path(),
                &[
                    ("TZ", "Asia/Tokyo"),
                    ("LANG", "de_DE.UTF-8"),
                    ("LC_ALL", "C"),
                    ("HOME", "/nonexistent"),
                ],
            );
            assert!(one == two, "{} {ending}", path.display());
        }
    }
}

#[test]
fn frame_and_rapidity_say_the_same() {
    let (_folder, scene) = written(SMALL);
    let named = run(&["ledger", &scene, "--as", "json", "--frame", "skiff"]).json();
    let bare = run(&["ledger", &scene, "--as", "json", "--rapidity", "atanh(3/5)"]).json();
    assert_eq!(named["frame"]["name"], "skiff");
    assert!(bare["frame"]["name"].is_null());
    let energy = |j: &serde_json::Value| j["particles"][0]["energy"].as_f64().unwrap();
    approx::assert_relative_eq!(energy(&named), energy(&bare), max_relative = 1e-15);
    let both = run(&["ledger", &scene, "--frame", "skiff", "--rapidity", "1"]);
    assert_eq!(both.code, 2);
    assert_eq!(run(&["ledger", &scene, "--rapidity", "fast"]).code, 2);
}

#[test]
fn what_a_frame_cannot_see_is_said() {
    let far = SMALL.replace("At(t: 1, x: \"1/4\")", "At(t: 1e149, x: 0)");
    let (_folder, scene) = written(&far);
    let ran = run(&["ledger", &scene, "--rapidity", "10"]);
    assert_eq!(ran.code, 1);
    assert!(
        ran.err.contains("event here") && ran.err.contains("range"),
        "{}",
        ran.err
    );
}

#[test]
fn a_plate_with_nothing_to_draw_is_not_written() {
    let across = SMALL.replace(
        "Moving(velocity: Beta(\"3/5\"))",
        "Moving(velocity: Beta(\"3/5\"), angle: 90)",
    );
    let (folder, scene) = written(&across);
    let to = folder.path().join("f.png");
    let args = [
        "draw",
        &scene,
        "--panel",
        "A",
        "--frame",
        "skiff",
        "--to",
        to.to_str().unwrap(),
    ];
    let ran = run(&args);
    assert_eq!(ran.code, 2, "{}", ran.err);
    assert!(ran.err.contains("takes a boost along x"), "{}", ran.err);
    assert!(!to.exists());
}

#[test]
fn the_ledger_as_text_has_units_in_its_heads() {
    let (_folder, scene) = written(SMALL);
    let ran = run(&["ledger", &scene]);
    let text = ran.text();
    assert_eq!((ran.code, ran.err.as_str()), (0, ""));
    for words in [
        "frame quay: rapidity 0",
        "t / ns",
        "px / (MeV/c)",
        "938.272",
    ] {
        assert!(text.contains(words), "{words} in\n{text}");
    }
}

#[test]
fn without_a_display_the_desk_says_so_and_ends_with_2() {
    let (_folder, scene) = written(SMALL);
    let ran = run(&[&scene]);
    assert_eq!(ran.code, 2, "{}", ran.err);
    assert_eq!(ran.err.lines().count(), 1, "{}", ran.err);
}

#[test]
fn a_scene_that_does_not_read_opens_no_window() {
    let (_folder, broken) = written("Scene(format: 1, base: \"b\", events: {");
    let ran = run(&[&broken]);
    assert_eq!(ran.code, 2);
    assert!(ran.err.starts_with(&format!("{broken}:1:")), "{}", ran.err);
    assert_eq!(run(&["nowhere.ron"]).code, 2);
}

#[test]
fn help_carries_the_caution() {
    let ran = run(&["--help"]);
    assert_eq!(ran.code, 0);
    assert!(
        ran.text().contains("no rates, no dose, no shielding"),
        "{}",
        ran.text()
    );
}
