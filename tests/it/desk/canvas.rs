//! The sheet on the desk.

use conewright::plate::Override;
use conewright::scene::When;
use conewright::task;
use egui::accesskit::Role;
use egui_kittest::kittest::{NodeT as _, Queryable as _};

use super::harness::{click, enter, relay, relay_window};
use conewright::quantity::Typed;

#[test]
fn the_marks_on_the_desk_are_those_a_file_would_hold() {
    let mut window = relay_window();
    let opened = task::open(&relay()).unwrap();
    let laid = task::lay_out(&opened, None, &Override::default()).unwrap();
    assert_eq!(window.state().sheet().unwrap(), &laid.sheet);
    enter(&mut window, "rapidity", "0.5");
    let change = Override {
        viewing: vec![Some(When::Rapidity(Typed::Bare("0.5".to_owned())))],
        only: None,
    };
    let laid = task::lay_out(&opened, None, &change).unwrap();
    assert_eq!(window.state().sheet().unwrap(), &laid.sheet);
}

#[test]
fn an_object_on_paper_carries_its_coordinates_and_can_be_selected() {
    let mut window = relay_window();
    // The courier's clock shows 40 at turn and its speed is 3/5: t = 50 ns, x = 30 c ns = 8.99377 m.
    let turn = window.get_by_role_and_label(Role::Button, "event turn");
    let value = turn.accesskit_node().value().unwrap();
    assert_eq!(value, "t 50 ns, x 8.993\u{2009}77 m");
    turn.click();
    window.run();
    let turn = window.get_by_role_and_label(Role::Button, "event turn");
    assert_eq!(turn.accesskit_node().is_selected(), Some(true));
    let listed = window.get_by_label("event turn in the list");
    assert_eq!(listed.accesskit_node().is_selected(), Some(true));
}

#[test]
fn coordinates_follow_the_viewing_frame() {
    let mut window = relay_window();
    enter(&mut window, "β", "3/5");
    let turn = window.get_by_role_and_label(Role::Button, "event turn");
    // In the courier's frame the event is on the courier: t' = 40 ns, x' = 0.
    let value = turn.accesskit_node().value().unwrap();
    assert!(value.starts_with("t 40 ns, x "), "{value}");
}

#[test]
fn selecting_in_the_list_marks_the_object_on_paper() {
    let mut window = relay_window();
    click(&mut window, "line courier in the list");
    let line = window.get_by_role_and_label(Role::Button, "line courier");
    assert_eq!(line.accesskit_node().is_selected(), Some(true));
}

#[test]
fn zoom_is_shown_and_true_size_is_a_hundred() {
    let mut window = relay_window();
    window.key_press_modifiers(egui::Modifiers::COMMAND, egui::Key::Num1);
    window.run();
    let before = window.state().zoom_percent();
    assert!((before - 100.0).abs() < 1e-3, "{before}");
    click(&mut window, "Zoom in");
    assert!((window.state().zoom_percent() - 125.0).abs() < 1e-3);
    click(&mut window, "Fit");
    assert!(window.state().zoom_percent() > 125.0);
}

#[test]
fn dragging_bare_paper_moves_it_and_selects_nothing() {
    let mut window = relay_window();
    let paper = window.get_by_role(Role::Canvas).rect();
    let from = paper.left_bottom() + egui::vec2(12.0, -8.0);
    let before = window
        .get_by_role_and_label(Role::Button, "event turn")
        .rect();
    window.hover_at(from);
    window.run();
    window.drag_at(from);
    window.run();
    window.hover_at(from + egui::vec2(40.0, -20.0));
    window.run();
    window.drop_at(from + egui::vec2(40.0, -20.0));
    window.run();
    let after = window
        .get_by_role_and_label(Role::Button, "event turn")
        .rect();
    let moved = after.center() - before.center();
    assert!(
        (moved - egui::vec2(40.0, -20.0)).length() < 1.5,
        "{moved:?}"
    );
}
