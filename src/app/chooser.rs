//! Choosing a scene's file within the window: a path and a list of the folder.

use std::path::{Path, PathBuf};

use egui::{Id, Key, ScrollArea, TextEdit, Ui};

use super::command::{Command, Wishes};
use super::theme::Type;
use super::widgets::{self, colours};

/// At most this many entries of a folder are listed.
const LISTED: usize = 2000;

/// The chooser's state.
#[derive(Clone, Debug)]
pub(super) struct Chooser {
    /// What stands in the path field.
    pub(super) path: String,
    folder: PathBuf,
    entries: Vec<Entry>,
    /// Why the folder cannot be listed.
    fault: Option<String>,
    fresh: bool,
}

#[derive(Clone, Debug, PartialEq, Eq, PartialOrd, Ord)]
struct Entry {
    is_file: bool,
    name: String,
}

impl Chooser {
    /// Lists a folder.
    pub(super) fn at(folder: &Path) -> Self {
        let folder = &std::path::absolute(folder).unwrap_or_else(|_| folder.to_owned());
        let (entries, fault) = match list(folder) {
            Ok(entries) => (entries, None),
            Err(fault) => (
                Vec::new(),
                Some(format!("{} cannot be listed: {fault}", folder.display())),
            ),
        };
        Self {
            path: format!("{}{}", folder.display(), std::path::MAIN_SEPARATOR),
            folder: folder.to_owned(),
            entries,
            fault,
            fresh: true,
        }
    }
}

/// Folders first, then scenes, by name.
fn list(folder: &Path) -> std::io::Result<Vec<Entry>> {
    let mut entries = Vec::new();
    for entry in std::fs::read_dir(folder)?.take(LISTED) {
        let entry = entry?;
        let name = entry.file_name().to_string_lossy().into_owned();
        let is_file = !entry.path().is_dir();
        let is_scene = Path::new(&name)
            .extension()
            .is_some_and(|e| e.eq_ignore_ascii_case("ron"));
        if !name.starts_with('.') && (!is_file || is_scene) {
            entries.push(Entry { is_file, name });
        }
    }
    entries.sort();
    Ok(entries)
}

/// Shows the chooser over the desk.
pub(super) fn chooser(ui: &Ui, state: &mut Chooser, refused: Option<&str>, wishes: &mut Wishes) {
    let modal = widgets::modal(ui, "chooser").show(ui.ctx(), |ui| {
        ui.set_width(560.0);
        ui.heading("Open a scene");
        ui.add_space(8.0);
        field(ui, state, wishes);
        let fault = state.fault.as_deref().or(refused);
        if let Some(fault) = fault {
            let c = colours(ui);
            ui.label(
                egui::RichText::new(fault)
                    .font(Type::Caption.font())
                    .color(c.fault),
            );
        }
        ui.add_space(8.0);
        folder(ui, state, wishes);
        ui.add_space(12.0);
        buttons(ui, state, wishes);
    });
    if modal.should_close() {
        wishes.push(Command::Dismiss);
    }
}

fn field(ui: &mut Ui, state: &mut Chooser, wishes: &mut Wishes) {
    let label = ui.label("Path");
    let edit = TextEdit::singleline(&mut state.path)
        .id(Id::unique("chooser path"))
        .desired_width(f32::INFINITY)
        .margin(egui::Margin::symmetric(8, 4));
    let response = ui.add(edit).labelled_by(label.id).accessible_name("Path");
    if state.fresh {
        response.request_focus();
        state.fresh = false;
    }
    if response.lost_focus() && ui.input(|i| i.key_pressed(Key::Enter)) {
        // Where the path does not open it is there to be mended.
        response.request_focus();
        wishes.push(chosen(&state.path));
    }
}

/// A folder is gone to, anything else is opened.
fn chosen(path: &str) -> Command {
    let path = PathBuf::from(path.trim());
    if path.is_dir() {
        Command::Browse(path)
    } else {
        Command::Open(path)
    }
}

fn folder(ui: &mut Ui, state: &Chooser, wishes: &mut Wishes) {
    ScrollArea::vertical()
        .max_height(300.0)
        .min_scrolled_height(120.0)
        .auto_shrink([false, true])
        .show(ui, |ui| {
            ui.spacing_mut().item_spacing.y = 2.0;
            if let Some(parent) = state.folder.parent()
                && ui.selectable_label(false, "Folder above").clicked()
            {
                wishes.push(Command::Browse(parent.to_owned()));
            }
            for entry in &state.entries {
                let path = state.folder.join(&entry.name);
                let words = if entry.is_file {
                    entry.name.clone()
                } else {
                    format!("{}/", entry.name)
                };
                if ui.selectable_label(false, words).clicked() {
                    wishes.push(if entry.is_file {
                        Command::Open(path)
                    } else {
                        Command::Browse(path)
                    });
                }
            }
            if state.entries.is_empty() && state.fault.is_none() {
                ui.weak("No scenes (.ron) and no folders here.");
            }
        });
}

fn buttons(ui: &mut Ui, state: &Chooser, wishes: &mut Wishes) {
    ui.horizontal(|ui| {
        if ui.button("Open").clicked() {
            wishes.push(chosen(&state.path));
        }
        if ui.button("Cancel").clicked() {
            wishes.push(Command::Dismiss);
        }
    });
}
