//! Ledger, list and status line.

use egui::accesskit::Role;
use egui_kittest::kittest::{NodeT as _, Queryable as _};

use super::harness::{Setup, click, open, relay_window, scene};

#[test]
fn each_kind_of_row_is_shown_when_it_is_chosen() {
    let mut window = relay_window();
    for (kind, row) in [
        ("Events", "turn "),
        ("Particles", "beam "),
        ("Lines", "courier "),
        ("Collisions", "before beam"),
    ] {
        click(&mut window, kind);
        let rows = window.query_all_by_role(Role::Row);
        let found = rows
            .filter_map(|r| r.accesskit_node().label())
            .any(|l| l.starts_with(row));
        assert!(found, "{kind}");
    }
}

#[test]
fn a_row_of_the_ledger_selects_its_object() {
    let mut window = relay_window();
    click(&mut window, "Events");
    window
        .get_by(|n| n.role() == Role::Row && n.label().is_some_and(|l| l.starts_with("turn ")))
        .click();
    window.run();
    let listed = window.get_by_label("event turn in the list");
    assert_eq!(listed.accesskit_node().is_selected(), Some(true));
}

#[test]
fn the_status_line_says_that_collisions_balance() {
    let window = open(Some(&scene("tests/data/desk/sound.ron")), Setup::default());
    assert!(window.query_by_label("1 collision, balanced").is_some());
    // Two masses of 3 at speeds of 4/5 (gamma 5/3) make a lump of 10: 2 (5/3) 3.
    let sum = window.query_by(|n| {
        n.role() == Role::Row
            && n.label()
                .is_some_and(|l| l.starts_with("clap sum before 10.0"))
    });
    assert!(sum.is_some());
}

#[test]
fn a_fault_is_found_named_and_gone_to() {
    let mut window = open(Some(&scene("tests/data/desk/fault.ron")), Setup::default());
    let status = "1 finding: event recall";
    click(&mut window, status);
    let listed = window.get_by_label("event recall in the list");
    assert_eq!(listed.accesskit_node().is_selected(), Some(true));
    let finding = window.get_by(|n| {
        n.label()
            .is_some_and(|l| l.starts_with("finding: event recall"))
    });
    let words = finding.accesskit_node().label().unwrap();
    assert!(words.contains("buoy 7"), "{words}");
    click(&mut window, "Events");
    let row = window
        .query_by(|n| n.role() == Role::Row && n.label().is_some_and(|l| l.starts_with("recall ")));
    assert!(row.is_some(), "a faulty row keeps its place");
}

#[test]
fn only_the_rows_in_sight_are_painted() {
    use std::fmt::Write as _;
    let mut text = String::from("Scene(format: 1, base: \"b\", events: { ");
    for i in 0..600 {
        let _ = write!(text, "\"e{i}\": At(t: {i}, x: 0), ");
    }
    text.push_str("}, plates: { \"p\": (panels: [(view: Spacetime, events: [\"e0\"])]) })");
    let folder = tempfile::tempdir().unwrap();
    let path = folder.path().join("many.ron");
    std::fs::write(&path, text).unwrap();
    let mut window = open(Some(&path), Setup::default());
    click(&mut window, "Events");
    let rows = window.query_all_by_role(Role::Row);
    let rows = rows
        .filter(|r| {
            r.accesskit_node()
                .label()
                .is_some_and(|l| l.starts_with('e'))
        })
        .count();
    assert!(rows > 3 && rows < 60, "{rows} rows");
}
