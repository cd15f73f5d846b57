//! Pages of help, over the desk.

use egui::{Align, Layout, RichText, ScrollArea, Ui, vec2};

use super::action::ACTIONS;
use super::command::{Command, Wishes};
use super::theme::Type;
use super::view::Help;
use super::widgets::{self, colours};

/// Width of the words at the left.
const COLUMN: f32 = 230.0;

/// Keys that belong to a place rather than to the whole desk.
const PLACES: &[(&str, &str)] = &[
    ("Rail: a hundredth of the span", "Left, Right"),
    ("Rail: a tenth of that", "Shift+Left, Shift+Right"),
    ("Rail: previous or next tick", "Ctrl+Left, Ctrl+Right"),
    ("Rail: the base frame", "Home"),
    ("Rail: type a rapidity", "any digit"),
    ("Sheet or rail: zoom at the pointer", "wheel"),
    ("Sheet: move it", "drag bare paper"),
];

/// What the desk's words mean.
const WORDS: &[(&str, &str)] = &[
    (
        "base frame",
        "The frame in which a scene's plain coordinates are given.",
    ),
    (
        "viewing frame",
        "The frame a panel is drawn in, given by its rapidity relative to the base frame.",
    ),
    (
        "rapidity",
        "artanh of v/c along x. Rapidities along one line add; equal lengths on the rail are equal relative rapidities.",
    ),
    (
        "β, γ, k",
        "Speed over c, the Lorentz factor, and the Doppler factor e to the rapidity.",
    ),
    (
        "line",
        "A worldline: of a clock, an observer, a particle, a light pulse.",
    ),
    (
        "collision",
        "An event with particles before and particles after. A decay is one.",
    ),
    (
        "conserved",
        "The same before and after, in one frame: two upright strokes between the sums.",
    ),
    ("invariant", "The same for every observer."),
    (
        "finding",
        "What is to be mended or known, with the object it is about.",
    ),
];

/// Shows a page.
pub(super) fn page(ui: &Ui, page: Help, wishes: &mut Wishes) {
    let modal = widgets::modal(ui, "help").show(ui.ctx(), |ui| {
        ui.set_width(560.0);
        match page {
            Help::Shortcuts => shortcuts(ui),
            Help::Words => words(ui),
            Help::About => about(ui),
        }
        ui.add_space(12.0);
        if ui.button("Done").clicked() {
            wishes.push(Command::Dismiss);
        }
    });
    if modal.should_close() {
        wishes.push(Command::Dismiss);
    }
}

/// Words at the left, what they stand for at the right.
fn rows<'a>(ui: &mut Ui, rows: impl Iterator<Item = (&'a str, String)>) {
    let quiet = colours(ui).quiet;
    ScrollArea::vertical().max_height(420.0).show(ui, |ui| {
        for (first, second) in rows {
            ui.horizontal_top(|ui| {
                let size = vec2(COLUMN, 18.0);
                ui.allocate_ui_with_layout(size, Layout::left_to_right(Align::Min), |ui| {
                    ui.set_min_width(COLUMN);
                    ui.label(first);
                });
                ui.add(egui::Label::new(RichText::new(second).color(quiet)).wrap());
            });
        }
    });
}

fn shortcuts(ui: &mut Ui) {
    ui.heading("Shortcuts");
    ui.add_space(8.0);
    let ctx = ui.ctx().clone();
    let actions = ACTIONS.iter().filter_map(|a| {
        Some((
            a.words,
            ctx.format_shortcut(&a.keys?).replace("Questionmark", "?"),
        ))
    });
    let places = PLACES
        .iter()
        .map(|(what, keys)| (*what, (*keys).to_owned()));
    rows(ui, actions.chain(places));
}

fn words(ui: &mut Ui) {
    ui.heading("Words used here");
    ui.add_space(8.0);
    rows(
        ui,
        WORDS
            .iter()
            .map(|(word, meaning)| (*word, (*meaning).to_owned())),
    );
}

fn about(ui: &mut Ui) {
    ui.heading("Conewright");
    ui.add_space(4.0);
    ui.label(format!("Version {}", env!("CARGO_PKG_VERSION")));
    ui.add_space(8.0);
    ui.label(
        "Drafts numerically exact spacetime and energy-momentum figures, with the conserved sums and the invariants \
         beside them.",
    );
    ui.add_space(8.0);
    ui.label(RichText::new("Kinematics only").font(Type::BodyStrong.font()));
    ui.label(
        "It knows energies, momenta and times, but no rates, no cross sections, no dose and no shielding. Nothing \
         here says whether work with radiation is safe: that is for licensed people and local rules to decide.",
    );
}
