//! What follows from the scene and the view: the plate laid out, the ledger, the rail's ticks. Made anew only when
//! either has changed.

use super::document::Document;
use super::view::View;
use crate::fault::{Fault, ObjectId};
use crate::ledger::{Ledger, Table, tables};
use crate::plate::{Laid, Override, PanelPlace};
use crate::scene::When;
use crate::solve::RapidityTick;
use crate::task;

/// What the desk shows.
#[derive(Debug, Default)]
pub(super) struct Shown {
    key: Option<Key>,
    /// Counts layouts, so that pictures of them can be kept.
    pub(super) version: u64,
    pub(super) laid: Option<Laid>,
    /// The frame of the active panel.
    pub(super) when: When,
    /// That frame's ledger.
    pub(super) ledger: Option<Ledger>,
    pub(super) tables: Vec<Table>,
    pub(super) things: Vec<RapidityTick>,
    /// Faults and findings of the scene and of the plate shown.
    pub(super) faults: Vec<Fault>,
    /// The object behind each of the sheet's groups.
    pub(super) objects: Vec<Option<ObjectId>>,
}

#[derive(Clone, Debug, PartialEq)]
struct Key {
    revision: u64,
    plate: usize,
    panel: usize,
    frames: Vec<Option<When>>,
}

impl Shown {
    /// Brings everything up to date.
    pub(super) fn refresh(&mut self, document: &Document, view: &View) {
        let key = Key {
            revision: document.revision,
            plate: view.plate,
            panel: view.panel,
            frames: view.frames.clone(),
        };
        if self.key.as_ref() == Some(&key) {
            return;
        }
        let opened = &document.opened;
        let name = opened
            .scene
            .plates
            .get_index(view.plate)
            .map(|(name, _)| &**name);
        let change = Override {
            viewing: view.frames.clone(),
            only: None,
        };
        self.laid = task::lay_out(opened, name, &change);
        self.when = frame_of(document, view);
        self.ledger = task::ledger(opened, &self.when)
            .or_else(|_| task::ledger(opened, &When::Base))
            .ok();
        self.tables = self.ledger.as_ref().map(tables).unwrap_or_default();
        self.tables.iter_mut().for_each(tidy);
        self.things = opened.solved.rapidities();
        self.faults.clone_from(&opened.faults);
        if let Some(laid) = &self.laid {
            self.faults.extend(laid.faults.iter().cloned());
            let ids = laid
                .sheet
                .groups
                .iter()
                .map(|g| object_of(document, &g.title));
            self.objects = ids.collect();
        }
        self.version += 1;
        self.key = Some(key);
    }

    /// The panels of the plate shown.
    pub(super) fn panels(&self) -> &[PanelPlace] {
        self.laid.as_ref().map_or(&[], |laid| &laid.panels)
    }

    /// The rapidity of the viewing frame along x, relative to the base.
    pub(super) fn rapidity(&self) -> f64 {
        let Some(frame) = self.ledger.as_ref().map(|l| &l.frame) else {
            return 0.0;
        };
        // A named frame may move across too; the rail has its part along x.
        let named = frame.name.as_deref().and_then(|name| {
            self.things
                .iter()
                .find(|t| t.object.kind == crate::fault::Kind::Frame && &*t.object.name == name)
        });
        named.map_or(frame.rapidity, |tick| tick.rapidity)
    }

    /// The faults of an object.
    pub(super) fn faults_of<'a>(&'a self, object: &'a ObjectId) -> impl Iterator<Item = &'a Fault> {
        self.faults.iter().filter(move |f| f.object == *object)
    }
}

/// Leaves out what only repeats: momentum across where there is none, a collision's name beside its second sum.
fn tidy(table: &mut Table) {
    let across = table.columns.iter().position(|c| c.head == "py");
    let blank = |i: usize| {
        table
            .rows
            .iter()
            .all(|r| r.cells[i].value.is_none_or(|v| v == 0.0))
    };
    if let Some(i) = across.filter(|&i| blank(i)) {
        table.columns.remove(i);
        for row in &mut table.rows {
            row.cells.remove(i);
        }
    }
    for i in (1..table.rows.len()).rev() {
        let repeats = table.rows[i].is_sum
            && table.rows[i - 1].is_sum
            && table.rows[i].cells[0] == table.rows[i - 1].cells[0];
        if repeats {
            table.rows[i].cells[0].text.clear();
        }
    }
}

/// The frame the active panel is seen from: as set on the desk, else the plate's own.
fn frame_of(document: &Document, view: &View) -> When {
    if let Some(Some(when)) = view.frames.get(view.panel) {
        return when.clone();
    }
    document
        .opened
        .scene
        .plates
        .get_index(view.plate)
        .and_then(|(_, plate)| plate.form.panels.get(view.panel))
        .map(|panel| panel.when.clone())
        .unwrap_or_default()
}

/// The object that a group's title names, as in `event turn`.
fn object_of(document: &Document, title: &str) -> Option<ObjectId> {
    let (word, name) = title.split_once(' ')?;
    let kind = crate::fault::Kind::ALL
        .into_iter()
        .find(|k| k.word() == word)?;
    let id = ObjectId::new(kind, name);
    exists(document, &id).then_some(id)
}

/// Whether the scene has that object.
fn exists(document: &Document, id: &ObjectId) -> bool {
    use crate::fault::Kind;
    let scene = &document.opened.scene;
    let name = &*id.name;
    match id.kind {
        Kind::Event => {
            scene.events.contains_key(name) || document.opened.solved.events.contains_key(name)
        }
        Kind::Line => scene.lines.contains_key(name),
        Kind::Particle => scene.particles.contains_key(name),
        Kind::Collision => scene.collisions.contains_key(name),
        Kind::Frame => scene.frames.contains_key(name) || scene.base == name,
        Kind::Plate => scene.plates.contains_key(name),
        Kind::Scene | Kind::Species => false,
    }
}
