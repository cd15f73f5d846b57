//! Opening, menus and help.

use std::path::{Path, PathBuf};
use std::sync::Arc;

use egui::accesskit::Role;
use egui::{Key, Modifiers};
use egui_kittest::kittest::{NodeT as _, Queryable as _};

use super::harness::{Setup, Window, click, open, relay};

fn empty() -> Window {
    open(None, Setup::default())
}

fn is_open(window: &Window) -> bool {
    window.query_by_label("event turn in the list").is_some()
}

#[test]
fn the_desk_begins_empty_and_says_how_to_begin() {
    let window = empty();
    assert!(window.query_by_label("Open a scene").is_some());
    assert!(window.query_by_label("no collisions").is_some());
}

#[test]
fn a_scene_opens_by_its_path() {
    let mut window = empty();
    click(&mut window, "Open a scene");
    let path = relay();
    let field = window.get_by_role_and_label(Role::TextInput, "Path");
    field.focus();
    window.run();
    window.key_press_modifiers(Modifiers::COMMAND, Key::A);
    window.run();
    window
        .get_by_role_and_label(Role::TextInput, "Path")
        .type_text(path.to_str().unwrap());
    window.run();
    window.key_press(Key::Enter);
    window.run();
    assert!(is_open(&window));
    assert!(
        window
            .query_by_role_and_label(Role::TextInput, "Path")
            .is_none(),
        "the chooser is put away"
    );
}

#[test]
fn a_path_that_does_not_open_is_said_and_keeps_the_chooser() {
    let mut window = empty();
    window.key_press_modifiers(Modifiers::COMMAND, Key::O);
    window.run();
    window.key_press_modifiers(Modifiers::COMMAND, Key::A);
    window.run();
    window
        .get_by_role_and_label(Role::TextInput, "Path")
        .type_text("/nowhere/none.ron");
    window.run();
    window.key_press(Key::Enter);
    window.run();
    assert!(
        window
            .query_by_role_and_label(Role::TextInput, "Path")
            .is_some()
    );
    assert!(window.query_all_by_label_contains("none.ron").count() >= 1);
    let field = window.get_by_role_and_label(Role::TextInput, "Path");
    assert!(
        field.accesskit_node().is_focused(),
        "the path can be mended at once"
    );
}

#[test]
fn the_folder_is_listed_and_a_scene_in_it_opens_by_a_click() {
    let mut window = open(Some(&relay()), Setup::default());
    click(&mut window, "File");
    window
        .get_by(|n| n.label().is_some_and(|l| l.starts_with("Open…")))
        .click();
    window.run();
    click(&mut window, "relay.ron");
    assert!(is_open(&window));
}

#[derive(Debug)]
struct Dropped(PathBuf);

impl egui::DroppedFile for Dropped {
    fn path(&self) -> &Path {
        &self.0
    }

    fn bytes(&self) -> Result<Vec<u8>, String> {
        std::fs::read(&self.0).map_err(|e| e.to_string())
    }
}

#[test]
fn a_dropped_file_opens() {
    let mut window = empty();
    window
        .input_mut()
        .dropped_files
        .push(Arc::new(Dropped(relay())));
    window.run();
    assert!(is_open(&window));
}

#[test]
fn closing_the_scene_leaves_an_empty_desk() {
    let mut window = open(Some(&relay()), Setup::default());
    window.key_press_modifiers(Modifiers::COMMAND, Key::W);
    window.run();
    assert!(!is_open(&window));
    assert!(window.query_by_label("Open a scene").is_some());
}

#[test]
fn help_says_that_this_is_kinematics_only() {
    let mut window = empty();
    click(&mut window, "Help");
    click(&mut window, "About Conewright");
    assert!(window.query_all_by_label_contains("no dose").count() == 1);
    click(&mut window, "Done");
    assert!(window.query_all_by_label_contains("no dose").count() == 0);
}

#[test]
fn the_view_menu_changes_the_theme() {
    let mut window = empty();
    click(&mut window, "View");
    click(&mut window, "Dark");
    assert_eq!(window.ctx.theme(), egui::Theme::Dark);
}

#[test]
fn at_rest_no_frame_is_asked_for() {
    let mut window = open(Some(&relay()), Setup::default());
    window.run();
    let steps = window.try_run().unwrap();
    assert!(steps <= 1, "{steps} frames at rest");
}
