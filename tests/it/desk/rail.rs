//! The rail: hand, keys and numbers all set the one viewing frame.

use conewright::num;
use egui::accesskit::Role;
use egui::{Key, Modifiers};
use egui_kittest::kittest::Queryable as _;

use super::harness::{click, drag_handle, enter, entry, rapidity, relay_window};

/// artanh(3/5) = ln 2.
const LN_2: f64 = std::f64::consts::LN_2;

#[test]
fn dragging_the_handle_changes_frame_fields_and_ledger_at_once() {
    let mut window = relay_window();
    click(&mut window, "Events");
    assert_eq!(rapidity(&window), 0.0);
    drag_handle(&mut window, 124.0, false);
    // The axis of this scene is -0.5 to 1.5 over 1240 points (extremes 0 and rapidity of the beam, 0.1 beyond,
    // outward to halves): 124 points are 0.2.
    let moved = rapidity(&window);
    assert!((moved - 0.2).abs() < 0.005, "{moved}");
    let beta: f64 = entry(&window, "β").parse().unwrap();
    assert!((beta - num::tanh(moved)).abs() < 1e-6);
    let k: f64 = entry(&window, "k").parse().unwrap();
    assert!((k - num::exp(moved)).abs() < 1e-6);
    // ping: t = 10 ns at x = 0, so t' = 10 cosh(eta).
    let row = window
        .get_by(|n| n.label().is_some_and(|l| l.starts_with("ping ")) && n.role() == Role::Row);
    let label = egui_kittest::kittest::NodeT::accesskit_node(&row)
        .label()
        .unwrap();
    let t: f64 = label.split(' ').nth(1).unwrap().parse().unwrap();
    assert!((t - 10.0 * num::cosh(moved)).abs() < 1e-4, "{label}");
}

#[test]
fn every_form_of_entry_sets_the_same_frame() {
    // beta 3/5, gamma 5/4, k 2 and rapidity ln 2 are one speed.
    for (name, text) in [
        ("β", "3/5"),
        ("γ", "5/4"),
        ("k", "2"),
        ("rapidity", "0.693147180559945309"),
    ] {
        let mut window = relay_window();
        enter(&mut window, name, text);
        let got = rapidity(&window);
        assert!((got - LN_2).abs() < 1e-14, "{name} {text}: {got}");
        assert_eq!(entry(&window, "β"), "0.600000");
        assert_eq!(entry(&window, "γ"), "1.250000");
        assert_eq!(entry(&window, "rapidity"), "0.693147");
        assert_eq!(entry(&window, "k"), "2.000000");
    }
}

#[test]
fn gamma_keeps_the_sign_there_is() {
    let mut window = relay_window();
    enter(&mut window, "β", "-0.1");
    enter(&mut window, "γ", "1.25");
    assert!((rapidity(&window) + LN_2).abs() < 1e-14);
}

#[test]
fn a_speed_of_light_is_refused_in_words_and_changes_nothing() {
    let mut window = relay_window();
    enter(&mut window, "β", "1");
    assert_eq!(rapidity(&window), 0.0);
    assert_eq!(entry(&window, "β"), "1");
    let words =
        window.query_all_by(|n| n.role() == Role::Label && n.value().is_some_and(|v| v.len() > 10));
    assert!(words.count() >= 1, "no reason is given");
    window.key_press(Key::Escape);
    window.run();
    assert_eq!(entry(&window, "β"), "0.000000");
}

#[test]
fn keys_move_the_handle_by_a_hundredth_and_home_to_the_base() {
    let mut window = relay_window();
    window
        .get_by_role_and_label(Role::Slider, "Viewing frame rapidity")
        .focus();
    window.run();
    window.key_press(Key::ArrowRight);
    window.run();
    // The span is 2: a hundredth is 0.02.
    assert_eq!(rapidity(&window), 0.02);
    window.key_press_modifiers(Modifiers::SHIFT, Key::ArrowLeft);
    window.run();
    assert_eq!(rapidity(&window), 0.018);
    window.key_press(Key::Home);
    window.run();
    assert_eq!(rapidity(&window), 0.0);
    window.key_press_modifiers(Modifiers::COMMAND, Key::ArrowRight);
    window.run();
    assert!(rapidity(&window) > 0.3, "went to the next tick");
}

#[test]
fn digits_open_the_rapidity_field() {
    let mut window = relay_window();
    window
        .get_by_role_and_label(Role::Slider, "Viewing frame rapidity")
        .focus();
    window.run();
    window.event(egui::Event::Text("1".to_owned()));
    window.run();
    assert_eq!(entry(&window, "rapidity"), "1");
    window.event(egui::Event::Text(".25".to_owned()));
    window.run();
    window.key_press(Key::Enter);
    window.run();
    assert_eq!(rapidity(&window), 1.25);
}

#[test]
fn a_click_on_a_tick_goes_there() {
    let mut window = relay_window();
    click(&mut window, "go to courier");
    assert!((rapidity(&window) - LN_2).abs() < 1e-14);
    assert!(window.query_by_label("(a)  Spacetime in courier").is_some());
    click(&mut window, "To base");
    assert_eq!(rapidity(&window), 0.0);
}

#[test]
fn a_screen_reader_can_set_the_handle() {
    let mut window = relay_window();
    window
        .get_by_role_and_label(Role::Slider, "Viewing frame rapidity")
        .set_value_accesskit(0.5);
    window.run();
    assert_eq!(rapidity(&window), 0.5);
}

#[test]
fn the_handle_drives_the_active_panel_alone() {
    let mut window = relay_window();
    click(&mut window, "(b)  Energy-momentum in balance");
    enter(&mut window, "rapidity", "0.25");
    assert!(window.query_by_label("(a)  Spacetime in station").is_some());
    assert!(
        window
            .query_by_label("(b)  Energy-momentum at rapidity 0.250")
            .is_some()
    );
}
