//! The house holds: rooms use only lower floors, outside crates stay in their rooms, and the build is what it claims.

use std::collections::BTreeSet;
use std::fs;
use std::path::{Path, PathBuf};
use std::process::Command;

/// The rooms of the house by floor, as DEVELOPERS.md draws them.
const FLOORS: [(&str, usize); 18] = [
    ("num", 0),
    ("fault", 0),
    ("disk", 1),
    ("geometry", 1),
    ("quantity", 1),
    ("label", 1),
    ("dynamics", 2),
    ("marks", 2),
    ("scene", 3),
    ("solve", 4),
    ("ledger", 5),
    ("plate", 6),
    ("export", 7),
    ("draft", 7),
    ("task", 8),
    ("app", 9),
    ("cli", 9),
    ("main", 10),
];

/// Outside crates that only some rooms may name.
const CONFINED: [(&str, &[&str]); 12] = [
    ("egui", &["app"]),
    ("eframe", &["app"]),
    ("winit", &["app"]),
    ("softbuffer", &["app"]),
    ("clap", &["cli"]),
    ("ron", &["scene"]),
    ("krilla", &["export"]),
    ("png", &["export"]),
    ("serde_json", &["export"]),
    ("ratex_layout", &["label"]),
    ("skrifa", &["label"]),
    ("tempfile", &["disk"]),
];

fn floor(room: &str) -> Option<usize> {
    FLOORS
        .iter()
        .find(|(name, _)| *name == room)
        .map(|(_, floor)| *floor)
}

fn root() -> &'static Path {
    Path::new(env!("CARGO_MANIFEST_DIR"))
}

fn rust_files(folder: &Path, into: &mut Vec<PathBuf>) {
    let mut entries: Vec<PathBuf> = fs::read_dir(folder)
        .unwrap()
        .map(|e| e.unwrap().path())
        .collect();
    entries.sort();
    for path in entries {
        if path.is_dir() {
            rust_files(&path, into);
        } else if path.extension().is_some_and(|e| e == "rs") {
            into.push(path);
        }
    }
}

/// Each source file with its room and its code, comments left out.
fn sources() -> Vec<(PathBuf, String, String)> {
    let src = root().join("src");
    let mut files = Vec::new();
    rust_files(&src, &mut files);
    files
        .into_iter()
        .filter(|path| path.file_name().is_some_and(|n| n != "lib.rs"))
        .map(|path| {
            let inside = path.strip_prefix(&src).unwrap();
            let first = inside
                .components()
                .next()
                .unwrap()
                .as_os_str()
                .to_string_lossy();
            let room = first.trim_end_matches(".rs").to_owned();
            let text = fs::read_to_string(&path).unwrap();
            let code: Vec<&str> = text
                .lines()
                .map(|l| l.split("//").next().unwrap_or_default())
                .collect();
            (path, room, code.join("\n"))
        })
        .collect()
}

/// Every room that a piece of code names, by `crate::room`, by a grouped `use crate::{..}`, or from the binary.
fn rooms_named(code: &str) -> BTreeSet<String> {
    let mut rooms = BTreeSet::new();
    let word = |text: &str| -> String {
        text.chars()
            .take_while(|c| c.is_alphanumeric() || *c == '_')
            .collect()
    };
    for key in ["crate::", "conewright::"] {
        for (at, _) in code.match_indices(key) {
            let rest = &code[at + key.len()..];
            let Some(group) = rest.strip_prefix('{') else {
                rooms.insert(word(rest));
                continue;
            };
            let mut depth = 0;
            let mut item = true;
            for (i, c) in group.char_indices() {
                match c {
                    '{' => depth += 1,
                    '}' if depth == 0 => break,
                    '}' => depth -= 1,
                    ',' if depth == 0 => item = true,
                    c if item && depth == 0 && c.is_alphabetic() => {
                        rooms.insert(word(&group[i..]));
                        item = false;
                    }
                    _ => {}
                }
            }
        }
    }
    rooms
}

#[test]
fn every_room_stands_on_a_floor() {
    for (path, room, _) in sources() {
        assert!(
            floor(&room).is_some(),
            "{} is in no room of the house",
            path.display()
        );
    }
}

#[test]
fn rooms_use_only_lower_floors() {
    for (path, room, code) in sources() {
        for named in rooms_named(&code) {
            if named == room {
                continue;
            }
            let Some(below) = floor(&named) else { continue };
            assert!(
                below < floor(&room).unwrap(),
                "{} is in {room} (floor {:?}) and uses {named} (floor {below})",
                path.display(),
                floor(&room),
            );
        }
    }
}

#[test]
fn the_reader_of_uses_sees_groups() {
    let named = rooms_named(
        "use crate::{num::{exp, ln}, fault::Fault,\n    scene};\nfn f() { crate::disk::x() }",
    );
    let wanted: BTreeSet<String> = ["num", "fault", "scene", "disk"].map(str::to_owned).into();
    assert_eq!(named, wanted);
}

#[test]
fn the_desk_does_no_physics() {
    for (path, room, code) in sources() {
        let named = rooms_named(&code);
        if room == "app" {
            assert!(
                !named.contains("geometry") && !named.contains("dynamics"),
                "{}",
                path.display()
            );
        }
        if room == "export" {
            assert!(
                !named.contains("scene") && !named.contains("solve"),
                "{}",
                path.display()
            );
        }
    }
}

#[test]
fn outside_crates_stay_in_their_rooms() {
    for (path, room, code) in sources() {
        for (outside, homes) in CONFINED {
            let used = code.contains(&format!("use {outside}::"))
                || code.contains(&format!(" {outside}::"))
                || code.contains(&format!("({outside}::"));
            assert!(
                !used || homes.contains(&room.as_str()),
                "{} names {outside}",
                path.display()
            );
        }
    }
}

#[test]
fn paths_named_for_developers_exist() {
    let guide = fs::read_to_string(root().join("DEVELOPERS.md")).unwrap();
    for (at, _) in guide.match_indices("`src/") {
        let path: String = guide[at + 1..].chars().take_while(|c| *c != '`').collect();
        assert!(root().join(&path).exists(), "DEVELOPERS.md names {path}");
    }
}

#[test]
fn the_scene_in_the_readme_is_the_one_that_is_shipped() {
    let readme = fs::read_to_string(root().join("README.md")).unwrap();
    let scene = fs::read_to_string(root().join("scenes/tug-and-beacon.ron")).unwrap();
    assert!(readme.contains(&format!("```ron\n{scene}```")));
    for (at, _) in readme.match_indices("](screenshots/") {
        let path: String = readme[at + 2..].chars().take_while(|c| *c != ')').collect();
        assert!(root().join(&path).exists(), "README.md shows {path}");
    }
}

fn cargo(args: &[&str]) -> String {
    let out = Command::new(env!("CARGO"))
        .args(args)
        .current_dir(root())
        .output()
        .unwrap();
    assert!(
        out.status.success(),
        "{}",
        String::from_utf8_lossy(&out.stderr)
    );
    String::from_utf8(out.stdout).unwrap()
}

fn crates_in(tree: &str) -> BTreeSet<&str> {
    tree.lines()
        .filter_map(|l| l.split_whitespace().next())
        .collect()
}

#[test]
fn the_core_knows_no_window() {
    let tree = cargo(&[
        "tree",
        "--offline",
        "--locked",
        "-e",
        "no-dev",
        "--no-default-features",
        "--prefix",
        "none",
    ]);
    for crate_name in ["egui", "eframe", "winit", "egui-winit", "softbuffer"] {
        assert!(!crates_in(&tree).contains(crate_name), "{crate_name}");
    }
}

#[test]
fn nothing_needs_wgpu() {
    let tree = cargo(&["tree", "--offline", "--locked", "--prefix", "none"]);
    for name in crates_in(&tree) {
        assert!(!name.starts_with("wgpu") && name != "naga", "{name}");
    }
}

/// True where every way to take the licence is of the GPL family.
fn only_gpl(licence: &str) -> bool {
    licence
        .replace('/', " OR ")
        .split(" OR ")
        .all(|choice| choice.contains("GPL"))
}

#[test]
fn no_crate_is_only_under_a_gpl() {
    let version = Command::new("rustc").arg("-vV").output().unwrap();
    let version = String::from_utf8(version.stdout).unwrap();
    let host = version
        .lines()
        .find_map(|l| l.strip_prefix("host: "))
        .unwrap();
    let text = cargo(&[
        "metadata",
        "--offline",
        "--locked",
        "--format-version",
        "1",
        "--filter-platform",
        host,
    ]);
    let metadata: serde_json::Value = serde_json::from_str(&text).unwrap();
    let used: BTreeSet<&str> = metadata["resolve"]["nodes"]
        .as_array()
        .unwrap()
        .iter()
        .filter_map(|node| node["id"].as_str())
        .collect();
    for package in metadata["packages"].as_array().unwrap() {
        if used.contains(package["id"].as_str().unwrap()) {
            let licence = package["license"].as_str().unwrap_or_default();
            assert!(!only_gpl(licence), "{}: {licence}", package["name"]);
        }
    }
    assert!(only_gpl("GPL-3.0 OR LGPL-2.1"));
    assert!(!only_gpl("MIT OR GPL-3.0"));
}
