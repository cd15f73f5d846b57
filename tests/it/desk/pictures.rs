//! Pictures of the desk, painted in software: `UPDATE_SNAPSHOTS=1` accepts what is painted now.

use egui_kittest::kittest::Queryable as _;

use super::harness::{Setup, click, drag_handle, enter, open, relay, scene};

const SMALL: Setup = Setup {
    size: [1280.0, 720.0],
    scale: 1.0,
    theme: egui::Theme::Light,
};

#[test]
fn at_rest() {
    let mut window = open(Some(&scene("scenes/kaon-on-proton.ron")), Setup::default());
    click(&mut window, "particle beam in the list");
    window.snapshot("at-rest");
}

#[test]
fn mid_drag() {
    let mut window = open(Some(&scene("scenes/tug-and-beacon.ron")), Setup::default());
    drag_handle(&mut window, 130.0, false);
    window.snapshot("mid-drag");
}

#[test]
fn in_the_dark() {
    let setup = Setup {
        theme: egui::Theme::Dark,
        ..Setup::default()
    };
    let mut window = open(Some(&relay()), setup);
    click(&mut window, "go to courier");
    click(&mut window, "Events");
    let from = window.get_by_label("go to courier").rect();
    window.hover_at(from.center_bottom() - egui::vec2(30.0, 4.0));
    window.run();
    window.snapshot("in-the-dark");
}

#[test]
fn extreme_rapidity() {
    let mut window = open(Some(&scene("scenes/far-proton.ron")), Setup::default());
    enter(&mut window, "rapidity", "18");
    window.snapshot("extreme-rapidity");
}

#[test]
fn with_a_fault_and_a_crowd() {
    let mut window = open(Some(&scene("tests/data/desk/crowd.ron")), SMALL);
    click(&mut window, "40 lines within 0.1");
    click(&mut window, "go to buoy 17");
    click(&mut window, "Events");
    click(&mut window, "event recall in the list");
    window.snapshot("fault-and-crowd");
}

#[test]
fn empty() {
    let mut window = open(None, Setup::default());
    window.snapshot("empty");
}
