//! The desk itself: its regions, and carrying out what they ask for.

use std::path::{Path, PathBuf};

use egui::{Rect, Sense, Ui, UiBuilder, Vec2, ViewportCommand, pos2, vec2};

use super::canvas::{self, Lie, MM_TRUE, Picture};
use super::chooser::{self, Chooser};
use super::command::{Command, Wishes};
use super::context::Context;
use super::document::Document;
use super::shown::Shown;
use super::view::{Camera, TableKind, View};
use super::{action, empty, help, list, menu, rail, status, table, widgets};

const MENU: f32 = 28.0;
const STATUS: f32 = 28.0;
const LIST: f32 = 208.0;
/// Windows lower than this have less high rows.
const LOW: f32 = 800.0;
/// What the sheet keeps at least.
const SHEET: Vec2 = vec2(320.0, 240.0);

/// The desk: a document, how it is looked at, and what follows from both.
#[derive(Debug)]
pub struct Desk {
    document: Document,
    view: View,
    shown: Shown,
    picture: Picture,
    /// Points to a mm of the sheet, as last shown.
    scale: f32,
}

/// Where the regions stand.
#[derive(Clone, Copy, Debug, PartialEq)]
struct Regions {
    menu: Rect,
    rail: Rect,
    list: Rect,
    sheet: Rect,
    ledger: Rect,
    status: Rect,
}

impl Regions {
    fn new(whole: Rect, rail: f32, ledger: Option<f32>) -> Self {
        let (left, right) = (whole.left(), whole.right());
        let strip =
            |top: f32, bottom: f32| Rect::from_min_max(pos2(left, top), pos2(right, bottom));
        let menu = strip(whole.top(), whole.top() + MENU);
        let rail = strip(menu.bottom(), menu.bottom() + rail);
        let status = strip(whole.bottom() - STATUS, whole.bottom());
        let usual = 172.0 + (whole.height() - 720.0).max(0.0) / 180.0 * 84.0;
        let most = (whole.height() / 2.0)
            .min(status.top() - rail.bottom() - SHEET.y)
            .max(120.0);
        let height = ledger
            .unwrap_or_else(|| usual.min(256.0))
            .clamp(120.0, most)
            .round();
        let split = left + LIST;
        let top = status.top() - height;
        Self {
            menu,
            rail,
            list: Rect::from_min_max(pos2(left, rail.bottom()), pos2(split, status.top())),
            sheet: Rect::from_min_max(pos2(split, rail.bottom()), pos2(right, top)),
            ledger: Rect::from_min_max(pos2(split, top), pos2(right, status.top())),
            status,
        }
    }
}

impl Desk {
    /// The desk with a scene, or with an empty one. A scene that does not open is said on the status line.
    pub fn new(scene: Option<PathBuf>) -> Self {
        let mut desk = Self {
            document: Document::empty(),
            view: View::default(),
            shown: Shown::default(),
            picture: Picture::default(),
            scale: MM_TRUE,
        };
        if let Some(path) = scene {
            desk.open(&path);
        }
        desk.shown.refresh(&desk.document, &desk.view);
        desk
    }

    /// The sheet as it is shown: what a writer would be given for a file.
    pub fn sheet(&self) -> Option<&crate::marks::Sheet> {
        self.shown.laid.as_ref().map(|laid| &laid.sheet)
    }

    /// The scale of the sheet as it was last shown, percent of true size.
    pub fn zoom_percent(&self) -> f32 {
        self.scale / MM_TRUE * 100.0
    }

    /// One frame.
    pub fn ui(&mut self, ui: &mut Ui) {
        let whole = ui.max_rect();
        let mut wishes = self.before(ui);
        self.carry_out(ui, &mut wishes);
        let height = rail::height(ui, whole.width(), &self.shown, &self.view);
        let mut regions = Regions::new(whole, height, self.view.ledger_height);
        // The rail's handle is read before anything is painted: what it drives follows within this frame.
        let mut strip = widgets::region(ui, "Rail", regions.rail);
        rail::sense(
            &mut strip,
            regions.rail,
            &self.shown,
            &self.view,
            &mut wishes,
        );
        self.carry_out(ui, &mut wishes);
        let height = rail::height(ui, whole.width(), &self.shown, &self.view);
        if height != regions.rail.height() {
            regions = Regions::new(whole, height, self.view.ledger_height);
            ui.ctx().request_repaint();
        }
        self.panels(ui, regions, &mut wishes);
        self.over(ui, &mut wishes);
        if !wishes.is_empty() {
            ui.ctx().request_repaint();
        }
        self.carry_out(ui, &mut wishes);
        self.scale = self.lie(ui).scale;
    }

    fn context(&self) -> Context<'_> {
        Context {
            document: &self.document,
            view: &self.view,
            shown: &self.shown,
        }
    }

    /// Keys, dropped files and what moves by itself.
    fn before(&mut self, ui: &Ui) -> Wishes {
        let over = self.view.chooser.is_some() || self.view.help.is_some();
        let mut wishes = if over {
            Wishes::new()
        } else {
            action::pressed(ui.ctx(), &self.context())
        };
        let dropped = ui.input(|i| i.raw.dropped_files.first().map(|f| f.path().to_owned()));
        wishes.extend(dropped.map(Command::Open));
        let now = ui.input(|i| i.time);
        if let Some(when) = self.view.rail.gliding(now) {
            wishes.push(Command::Frame(when));
            ui.ctx().request_repaint();
        }
        wishes
    }

    fn panels(&mut self, ui: &mut Ui, regions: Regions, wishes: &mut Wishes) {
        let low = ui.max_rect().height() < LOW;
        let context = Context {
            document: &self.document,
            view: &self.view,
            shown: &self.shown,
        };
        let mut part = |name: &str, rect: Rect| widgets::region(ui, name, rect);
        menu::bar(
            &mut part("Menus", regions.menu),
            regions.menu,
            &context,
            wishes,
        );
        rail::paint(
            &mut part("Viewing frame", regions.rail),
            regions.rail,
            &context,
            wishes,
        );
        let row = if low { 22.0 } else { 24.0 };
        list::list(
            &mut part("List", regions.list),
            regions.list,
            row,
            &context,
            wishes,
        );
        let mut sheet = part("Sheet", regions.sheet);
        if self.document.is_empty() && self.document.path.is_none() {
            empty::page(&mut sheet, regions.sheet, wishes);
        } else {
            canvas::canvas(
                &mut sheet,
                regions.sheet,
                &context,
                &mut self.picture,
                wishes,
            );
        }
        let row = if low { 21.0 } else { 23.0 };
        table::ledger(
            &mut part("Ledger", regions.ledger),
            regions.ledger,
            row,
            &context,
            wishes,
        );
        edge(ui, regions.ledger, wishes);
        let pointer = pointer(ui, regions.sheet, &context);
        let mut line = widgets::region(ui, "Status", regions.status);
        status::status(&mut line, regions.status, pointer, &context, wishes);
        let over = ui.input(|i| i.pointer.hover_pos()).is_some_and(|p| {
            [regions.list, regions.sheet, regions.ledger]
                .iter()
                .any(|r| r.contains(p))
        });
        if !over && self.view.hovered.is_some() {
            wishes.push(Command::Hover(None));
        }
    }

    /// What stands over the desk.
    fn over(&mut self, ui: &Ui, wishes: &mut Wishes) {
        if let Some(page) = self.view.help {
            help::page(ui, page, wishes);
        }
        if let Some(state) = &mut self.view.chooser {
            chooser::chooser(ui, state, self.document.refused.as_deref(), wishes);
        }
    }

    fn carry_out(&mut self, ui: &Ui, wishes: &mut Wishes) {
        for command in wishes.drain(..) {
            self.obey(ui, command);
        }
        self.shown.refresh(&self.document, &self.view);
    }

    fn obey(&mut self, ui: &Ui, command: Command) {
        match command {
            Command::Choose => self.choose(),
            Command::Browse(folder) => self.view.chooser = Some(Chooser::at(&folder)),
            Command::Dismiss => {
                self.view.chooser = None;
                self.view.help = None;
                self.document.refused = None;
            }
            Command::Open(path) => self.open(&path),
            Command::Close => {
                let revision = self.document.revision + 1;
                self.document = Document {
                    revision,
                    ..Document::empty()
                };
                self.view.fresh();
            }
            Command::Quit => ui.ctx().send_viewport_cmd(ViewportCommand::Close),
            Command::Plate(plate) => {
                self.view.plate = plate;
                self.view.panel = 0;
                self.view.frames.clear();
                self.view.camera = Camera::Fit;
            }
            Command::Panel(panel) => self.view.panel = panel,
            Command::Frame(when) => self.view.set_frame(when),
            Command::Select(object) => self.view.selected = object,
            Command::Hover(object) => self.view.hovered = object,
            Command::Table(kind) => self.view.table = kind,
            Command::Fold(kind) => toggle(&mut self.view.folded, kind),
            Command::Unfold(stem) => toggle(&mut self.view.unfolded, stem),
            Command::LedgerHeight(height) => self.view.ledger_height = Some(height),
            Command::Theme(theme) => ui.ctx().set_theme(theme),
            Command::Help(page) => self.view.help = Some(page),
            Command::Rail(command) => self.view.rail.apply(command),
            Command::Fit => self.view.camera = Camera::Fit,
            Command::Zoom { scale, about } => self.zoom(ui, scale, about),
            Command::ZoomBy(factor) => {
                let now = self.lie(ui).scale;
                self.zoom(ui, now * factor, Vec2::ZERO);
            }
            Command::TrueSize => self.zoom(ui, MM_TRUE, Vec2::ZERO),
            Command::Pan(by) => {
                let (scale, offset) = self.camera(ui);
                self.view.camera = Camera::At {
                    scale,
                    offset: offset + by,
                };
            }
        }
    }

    fn choose(&mut self) {
        let beside = self
            .document
            .path
            .as_deref()
            .and_then(Path::parent)
            .map(Path::to_owned);
        let folder = beside
            .filter(|p| p.is_dir())
            .or_else(|| std::env::current_dir().ok())
            .unwrap_or_default();
        self.document.refused = None;
        self.view.chooser = Some(Chooser::at(&folder));
    }

    fn open(&mut self, path: &Path) {
        if self.document.open(path) {
            self.view.fresh();
            self.view.table = first_table(&self.document);
        }
    }

    /// Where the paper lies now.
    fn lie(&self, ui: &Ui) -> Lie {
        let whole = ui.max_rect();
        let height = rail::height(ui, whole.width(), &self.shown, &self.view);
        let regions = Regions::new(whole, height, self.view.ledger_height);
        canvas::lie(regions.sheet, &self.context(), ui.pixels_per_point())
    }

    /// Scale and offset of the camera, whatever it is.
    fn camera(&self, ui: &Ui) -> (f32, Vec2) {
        match self.view.camera {
            Camera::At { scale, offset } => (scale, offset),
            Camera::Fit => (self.lie(ui).scale, Vec2::ZERO),
        }
    }

    fn zoom(&mut self, ui: &Ui, scale: f32, about: Vec2) {
        let (before, offset) = self.camera(ui);
        let scale = canvas::bounded(scale);
        let offset = about + (offset - about) * (scale / before);
        self.view.camera = Camera::At { scale, offset };
    }
}

/// Puts in what is not there, takes out what is.
fn toggle<T: PartialEq>(list: &mut Vec<T>, item: T) {
    match list.iter().position(|known| *known == item) {
        Some(i) => {
            list.remove(i);
        }
        None => list.push(item),
    }
}

/// The first kind of row the scene has any of.
fn first_table(document: &Document) -> TableKind {
    let scene = &document.opened.scene;
    match () {
        () if !scene.collisions.is_empty() => TableKind::Collisions,
        () if !scene.events.is_empty() => TableKind::Events,
        () if !scene.particles.is_empty() => TableKind::Particles,
        () if !scene.lines.is_empty() => TableKind::Lines,
        () => TableKind::Collisions,
    }
}

/// The pointer over the sheet, and how the paper lies there.
fn pointer(ui: &Ui, sheet: Rect, context: &Context<'_>) -> Option<(egui::Pos2, Lie)> {
    let at = ui
        .input(|i| i.pointer.hover_pos())
        .filter(|p| sheet.contains(*p))?;
    Some((at, canvas::lie(sheet, context, ui.pixels_per_point())))
}

/// The ledger's top edge, dragged.
fn edge(ui: &mut Ui, ledger: Rect, wishes: &mut Wishes) {
    let grip = Rect::from_min_max(
        ledger.left_top() - vec2(0.0, 3.0),
        pos2(ledger.right(), ledger.top() + 4.0),
    );
    let child = ui.new_child(UiBuilder::new().max_rect(grip).id_salt("ledger edge"));
    let response = child
        .interact(grip, child.scope_id().with("edge"), Sense::drag())
        .on_hover_and_drag_cursor(egui::CursorIcon::ResizeVertical);
    if let (true, Some(at)) = (response.dragged(), response.interact_pointer_pos())
        && response.drag_delta().y != 0.0
    {
        wishes.push(Command::LedgerHeight(ledger.bottom() - at.y));
    }
    if response.hovered() || response.dragged() {
        let line = Rect::from_min_size(ledger.left_top(), vec2(ledger.width(), 2.0));
        child
            .painter()
            .rect_filled(line, 0, widgets::colours(&child).accent);
    }
}
