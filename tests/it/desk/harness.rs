//! A desk in a test: software painter, fixed size, no display.

use std::path::{Path, PathBuf};

use conewright::app::{
    self, Desk,
    paint::{Picture, SoftPainter},
};
use egui::accesskit::Role;
use egui_kittest::kittest::{NodeT as _, Queryable as _};
use egui_kittest::{Harness, SnapshotOptions, TestRenderer};

/// egui's test renderer over the desk's own painter.
#[derive(Default)]
struct Soft(SoftPainter);

impl TestRenderer for Soft {
    fn handle_delta(&mut self, delta: &mut egui::TexturesDelta) {
        self.0.set_textures(delta);
        self.0.free_textures(delta);
    }

    fn render(
        &mut self,
        ctx: &egui::Context,
        output: &egui::FullOutput,
    ) -> Result<image::RgbaImage, String> {
        let scale = ctx.pixels_per_point();
        let size = ctx.content_rect().size() * scale;
        let (width, height) = (pixels(size.x), pixels(size.y));
        let primitives = ctx.tessellate(output.shapes.clone(), scale);
        let mut picture = Picture::filled(width as usize, height as usize, [0, 0, 0, 255]);
        self.0.paint(&mut picture, &primitives, scale);
        let bytes = picture.pixels().concat();
        image::RgbaImage::from_raw(width, height, bytes).ok_or_else(|| "no picture".to_owned())
    }
}

#[expect(
    clippy::cast_possible_truncation,
    clippy::cast_sign_loss,
    reason = "a window's side in whole pixels"
)]
fn pixels(side: f32) -> u32 {
    side.round() as u32
}

pub(super) type Window = Harness<'static, Desk>;

/// How a test's desk is set up.
#[derive(Clone, Copy)]
pub(super) struct Setup {
    pub(super) size: [f32; 2],
    pub(super) scale: f32,
    pub(super) theme: egui::Theme,
}

impl Default for Setup {
    fn default() -> Self {
        Self {
            size: [1440.0, 900.0],
            scale: 1.0,
            theme: egui::Theme::Light,
        }
    }
}

pub(super) fn open(scene: Option<&Path>, setup: Setup) -> Window {
    let mut window = Harness::builder()
        .with_size(setup.size)
        .with_pixels_per_point(setup.scale)
        .with_theme(setup.theme)
        .with_render_cursor(false)
        .with_step_dt(1.0 / 60.0)
        .with_max_steps(40)
        .with_context_setup(app::install)
        .renderer(Soft::default())
        .with_options(
            SnapshotOptions::new()
                .threshold(0.8)
                .output_path(pictures()),
        )
        .build_ui_state(whole, Desk::new(scene.map(Path::to_owned)));
    window.run();
    window
}

/// The harness leaves a margin about what it shows; a window has none.
fn whole(ui: &mut egui::Ui, desk: &mut Desk) {
    let rect = ui.ctx().content_rect();
    let mut child = ui.new_child(egui::UiBuilder::new().max_rect(rect));
    child.set_clip_rect(rect);
    desk.ui(&mut child);
}

fn pictures() -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join("screenshots")
}

/// A scene of the repository by its path there.
pub(super) fn scene(path: &str) -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join(path)
}

/// The scene most tests look at.
pub(super) fn relay() -> PathBuf {
    scene("tests/data/relay.ron")
}

pub(super) fn relay_window() -> Window {
    open(Some(&relay()), Setup::default())
}

pub(super) fn click(window: &mut Window, name: &str) {
    window.get_by_label(name).click();
    window.run();
}

/// The rapidity the rail's handle stands at.
pub(super) fn rapidity(window: &Window) -> f64 {
    let handle = window.get_by_role_and_label(Role::Slider, "Viewing frame rapidity");
    handle.accesskit_node().numeric_value().unwrap()
}

/// What stands in an entry field, without thin spaces and with a plain minus.
pub(super) fn entry(window: &Window, name: &str) -> String {
    let field = window.get_by_role_and_label(Role::TextInput, name);
    let text = field.accesskit_node().value().unwrap_or_default();
    text.replace('\u{2009}', "").replace('\u{2212}', "-")
}

/// Types into an entry field and enters it.
pub(super) fn enter(window: &mut Window, name: &str, text: &str) {
    window.get_by_role_and_label(Role::TextInput, name).focus();
    window.run();
    window
        .get_by_role_and_label(Role::TextInput, name)
        .type_text(text);
    window.run();
    window.key_press(egui::Key::Enter);
    window.run();
}

/// Presses on the handle, moves it by some points and lets go.
pub(super) fn drag_handle(window: &mut Window, by: f32, release: bool) {
    let from = window
        .get_by_role_and_label(Role::Slider, "Viewing frame rapidity")
        .rect()
        .center();
    window.hover_at(from);
    window.run();
    window.drag_at(from);
    window.run();
    let to = from + egui::vec2(by, 0.0);
    window.hover_at(to);
    window.run();
    if release {
        window.drop_at(to);
        window.run();
    }
}
