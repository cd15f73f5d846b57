//! From text to a scene: a scanner makes a tree of spans of the whole text, then each object is read from its own
//! part of the tree, so that one that does not read is a fault of its own and the rest is kept.

use std::sync::Arc;

use super::faults::{Faults, Source};
use super::fields::{Form, common};
use super::lines::Lines;
use super::places::Index;
use super::scanner::{Broken, scan};
use super::tree::{Entry, Shape, Value};
use super::values::{number, punctuation, short_text, text, with_next};
use super::{List, Object, Places, Scene, Units, forms};
use crate::disk::LIMIT;
use crate::fault::{Fault, Kind, ObjectId, Place, nearest};
use crate::quantity::Typed;

/// The newest format this version reads.
const FORMAT: u32 = 1;
/// The most objects a scene may hold.
const OBJECTS: usize = 100_000;
/// The longest name, bytes.
const NAME: usize = 200;

/// The fields of a scene.
const FIELDS: [&str; 12] = [
    "format",
    "title",
    "base",
    "units",
    "species",
    "events",
    "lines",
    "particles",
    "collisions",
    "frames",
    "signals",
    "plates",
];

/// A scene as read: what could be read of it, where it stands, and what could not be read.
#[derive(Clone, Debug)]
pub struct Reading {
    /// Everything that could be read.
    pub scene: Scene,
    /// Where things stand.
    pub places: Places,
    /// What does not read, each with its place, in the order of the text; up to 16 faults of one object.
    pub faults: Vec<Fault>,
    /// Objects that stand in the file and could not be read; what refers to them hangs on a fault, not on a missing name.
    pub unread: Vec<ObjectId>,
}

/// A text that is no scene at all: brackets or strings that do not match, too large, too deep, no `Scene(..)`, a
/// format above ours.
#[derive(Clone, Debug, PartialEq, thiserror::Error)]
#[error("{what}")]
pub struct Unreadable {
    /// Where.
    pub place: Option<Place>,
    /// What is wrong.
    pub what: String,
    /// What would mend it.
    pub mend: String,
}

/// Reads a scene's text (at most 16 MB, with or without a byte-order mark, LF or CRLF).
///
/// # Errors
/// Only where nothing can be made of the text; everything smaller is a fault of its object.
pub fn read(text: &str) -> Result<Reading, Unreadable> {
    let text = text.strip_prefix('\u{FEFF}').unwrap_or(text);
    if text.len() as u64 > LIMIT {
        return Err(Unreadable {
            place: None,
            what: format!("the text is larger than {} MB", LIMIT >> 20),
            mend: "split the scene".to_owned(),
        });
    }
    let unreadable = |broken: Broken| Unreadable {
        place: Some(Lines::new(text).place(text, broken.at)),
        what: broken.what,
        mend: broken.mend,
    };
    let source = Arc::new(Source {
        text: text.to_owned(),
        tree: scan(text).map_err(unreadable)?,
        lines: Lines::new(text),
    });
    let root = root(&source).map_err(unreadable)?;
    let mut reader = Reader::new(&source, root);
    reader.read().map_err(unreadable)?;
    let (scene, index, mut faults, unread) = reader.finish();
    faults.sort_by_key(|fault| fault.place);
    let places = Places::new(Arc::clone(&source), root.id, index);
    Ok(Reading {
        scene,
        places,
        faults,
        unread,
    })
}

/// The one `Scene( .. )` of a text.
fn root(source: &Source) -> Result<Value<'_>, Broken> {
    const MEND: &str = "a scene is `Scene(format: 1, base: \"..\", ..)`";
    let mut top = Entry::top(&source.text, &source.tree);
    let Some(first) = top.next() else {
        return Err(Broken::new(
            0,
            "there is no `Scene( .. )` in the text",
            MEND,
        ));
    };
    let scene = first.value().filter(|value| {
        value.shape() == Shape::Round && value.word() == "Scene" && first.key().is_none()
    });
    let Some(scene) = scene else {
        let what = "the text does not begin with `Scene(`";
        return Err(Broken::new(first.start(), what, MEND));
    };
    let after = top.next().map(Entry::start);
    if let Some(at) = first.item.comma.map(|at| at as usize).or(after) {
        let what = "something stands behind the bracket that closes `Scene(`";
        return Err(Broken::new(at, what, "delete it"));
    }
    Ok(scene)
}

struct Reader<'a> {
    source: &'a Source,
    root: Value<'a>,
    scene: Scene,
    index: Index,
    faults: Vec<Fault>,
    /// Faults of the scene itself.
    own: Faults<'a>,
    unread: Vec<ObjectId>,
    objects: usize,
}

impl<'a> Reader<'a> {
    fn new(source: &'a Source, root: Value<'a>) -> Self {
        Self {
            source,
            root,
            scene: Scene {
                format: FORMAT,
                ..Scene::default()
            },
            index: Index::new(),
            faults: Vec::new(),
            own: Faults::new(source, ObjectId::scene(), Some(root)),
            unread: Vec::new(),
            objects: 0,
        }
    }

    fn finish(self) -> (Scene, Index, Vec<Fault>, Vec<ObjectId>) {
        let mut faults = self.own.into_list();
        faults.extend(self.faults);
        (self.scene, self.index, faults, self.unread)
    }

    fn read(&mut self) -> Result<(), Broken> {
        self.format()?;
        self.base();
        let mut seen: Vec<&str> = Vec::new();
        for (entry, next) in with_next(self.root) {
            punctuation(entry, next, &mut self.own);
            let (Some(key), Some(value)) = (entry.key(), entry.value()) else {
                if let Some(value) = entry.value() {
                    let what = "a field of the scene without its name";
                    self.own.add(value.start(), what, "write `name: ..`");
                }
                continue;
            };
            let name = key.raw();
            let again = seen.contains(&name);
            if again {
                let what = format!("`{name}` stands here a second time");
                self.own.add(key.start(), what, "make one of the two");
            } else if FIELDS.contains(&name) {
                seen.push(name);
            }
            self.field(key, value, again)?;
        }
        for name in ["format", "base"] {
            if !seen.contains(&name) {
                self.own
                    .missing(self.root, name, format!("write `{name}: ..`"));
            }
        }
        Ok(())
    }

    /// Reads a field of the scene. The lists of a second `events` and the like are read too.
    fn field(&mut self, key: Value<'a>, value: Value<'a>, again: bool) -> Result<(), Broken> {
        match key.raw() {
            "species" => self.list(Kind::Species, value, forms::species, |s| &mut s.species),
            "events" => self.list(Kind::Event, value, forms::event, |s| &mut s.events),
            "lines" => self.list(Kind::Line, value, forms::line, |s| &mut s.lines),
            "particles" => self.list(Kind::Particle, value, forms::particle, |s| &mut s.particles),
            "collisions" => self.list(Kind::Collision, value, forms::collision, |s| {
                &mut s.collisions
            }),
            "frames" => self.list(Kind::Frame, value, forms::frame, |s| &mut s.frames),
            "plates" => self.list(Kind::Plate, value, forms::plate, |s| &mut s.plates),
            "signals" => {
                let what = "`signals` are not read by this version";
                let mend = "the rest of the scene is drawn without them";
                self.own.add(key.start(), what, mend);
                Ok(())
            }
            "title" if !again => {
                let title = short_text(value, &mut self.own);
                self.scene.title = title.unwrap_or_default();
                Ok(())
            }
            "units" if !again => {
                let units = units(value, &mut self.own);
                self.scene.units = units.unwrap_or_default();
                Ok(())
            }
            name => {
                if !FIELDS.contains(&name) {
                    self.unknown_field(key);
                }
                Ok(())
            }
        }
    }

    fn unknown_field(&mut self, key: Value<'a>) {
        if self.own.full() {
            return;
        }
        let mend = match nearest(key.raw(), FIELDS) {
            Some(near) => format!("did you mean `{near}`?"),
            None => format!("the fields of a scene are {}", FIELDS.join(", ")),
        };
        let name = super::literal::shorten(key.raw());
        let what = format!("a scene has no field `{name}`");
        self.own.add(key.start(), what, mend);
    }

    fn named(&self, name: &str) -> Option<Value<'a>> {
        let mut entries = self.root.items();
        entries.find(|e| e.key_text() == Some(name))?.value()
    }

    fn format(&mut self) -> Result<(), Broken> {
        let Some(value) = self.named("format") else {
            return Ok(());
        };
        let Some(typed) = number(value, &mut self.own) else {
            return Ok(());
        };
        let digits = match &typed {
            Typed::Bare(digits) if digits.bytes().all(|b| b.is_ascii_digit()) => digits,
            Typed::Bare(_) | Typed::Text(_) => {
                let mend = format!("write `format: {FORMAT}`");
                self.own.unlike(value, "a bare whole number", mend);
                return Ok(());
            }
        };
        match digits.parse() {
            Ok(0) => {
                let mend = format!("write `format: {FORMAT}`");
                self.own.add(value.start(), "there is no format 0", mend);
            }
            Ok(FORMAT) => {}
            Ok(_) | Err(_) => {
                let digits = super::literal::shorten(digits);
                return Err(Broken::new(
                    value.start(),
                    format!("the scene is of format {digits}, this version reads up to {FORMAT}"),
                    "open it with a newer version",
                ));
            }
        }
        Ok(())
    }

    fn base(&mut self) {
        let value = self.named("base");
        let name = value.and_then(|value| text(value, &mut self.own));
        if let (Some(value), Some(name)) = (value, name) {
            match bad_name(&name) {
                Some((what, mend)) => self.own.add(value.start(), what, mend),
                None => self.scene.base = name,
            }
        }
    }

    fn list<T>(
        &mut self,
        kind: Kind,
        value: Value<'a>,
        read: fn(Value<'a>, &mut Faults<'a>) -> Option<T>,
        of: fn(&mut Scene) -> &mut List<T>,
    ) -> Result<(), Broken> {
        if value.shape() != Shape::Curly {
            let mend = "write `{ \"name\": .., }`";
            self.own.unlike(value, "a list of named objects", mend);
            return Ok(());
        }
        let room = OBJECTS - self.objects;
        if let Some(excess) = value.items().nth(room) {
            return Err(Broken::new(
                excess.start(),
                format!("the scene has more than {OBJECTS} objects"),
                "split the scene",
            ));
        }
        self.objects += value.len();
        for (entry, next) in with_next(value) {
            match (entry.key(), entry.value()) {
                (Some(key), Some(value)) => {
                    punctuation(entry, next, &mut self.own);
                    self.object(kind, (key, value), read, of);
                }
                (Some(key), None) => self.valueless(kind, key),
                (None, Some(value)) => {
                    let what = format!("this {} has no name", kind.word());
                    self.own.add(value.start(), what, "write `\"name\": ..`");
                }
                (None, None) => {
                    punctuation(entry, next, &mut self.own);
                }
            }
        }
        Ok(())
    }

    /// An object's name as its key has it; what is no string goes by its text.
    fn name(&self, kind: Kind, key: Value<'a>) -> (ObjectId, Faults<'a>) {
        let quoted = key.shape() == Shape::Leaf && super::literal::is_string(key.raw());
        let read = if quoted {
            super::literal::string(key.raw())
        } else {
            Ok(key.raw().to_owned())
        };
        let shown = super::literal::shorten(key.raw());
        let name = read.as_deref().unwrap_or(&shown);
        let id = ObjectId::new(kind, name);
        let mut faults = Faults::new(self.source, id.clone(), None);
        match &read {
            Err(fault) => faults.add(key.start() + fault.at, &fault.what, &fault.mend),
            Ok(name) => {
                if let Some((what, mend)) = bad_name(name) {
                    faults.add(key.start(), what, mend);
                }
            }
        }
        if !quoted {
            let mend = format!("write \"{shown}\"");
            faults.add(key.start(), "a name stands in quotes", mend);
        }
        (id, faults)
    }

    fn valueless(&mut self, kind: Kind, key: Value<'a>) {
        let (id, mut faults) = self.name(kind, key);
        faults.add(key.start(), "it has no value", "write one behind the colon");
        self.faults.extend(faults.into_list());
        if !self.index.contains_key(&id) {
            self.unread.push(id.clone());
            self.index.insert(id, key.id);
        }
    }

    fn object<T>(
        &mut self,
        kind: Kind,
        (key, value): (Value<'a>, Value<'a>),
        read: fn(Value<'a>, &mut Faults<'a>) -> Option<T>,
        of: fn(&mut Scene) -> &mut List<T>,
    ) {
        let (id, mut faults) = self.name(kind, key);
        if self.index.contains_key(&id) {
            let what = format!("there is a {} of this name before", kind.word());
            faults.add(key.start(), what, "give it another name");
            self.faults.extend(faults.into_list());
            return;
        }
        if kind == Kind::Frame && *id.name == *self.scene.base && !id.name.is_empty() {
            let what = "the base frame has this name";
            faults.add(key.start(), what, "give it another name");
            self.faults.extend(faults.into_list());
            return;
        }
        faults.root = Some(value);
        let form = read(value, &mut faults);
        let common = common(value, &mut faults);
        match form.filter(|_| !faults.broken()) {
            Some(form) => {
                let object = Arc::new(Object { form, common });
                of(&mut self.scene).insert(Arc::clone(&id.name), object);
            }
            None => self.unread.push(id.clone()),
        }
        self.index.insert(id, value.id);
        self.faults.extend(faults.into_list());
    }
}

fn units<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<Units> {
    let form = Form::anonymous(value, &["time", "length", "energy"], faults);
    let time = form.may("time", faults, text);
    let length = form.may("length", faults, text);
    let energy = form.may("energy", faults, text)?;
    Some(Units {
        time: time?,
        length: length?,
        energy,
    })
}

/// What is wrong with a name, and what would mend it.
fn bad_name(name: &str) -> Option<(String, &'static str)> {
    if name.is_empty() {
        return Some(("the name is empty".to_owned(), "write one"));
    }
    if name.len() > NAME {
        let what = format!("the name has {} bytes, {NAME} are the most", name.len());
        return Some((what, "shorten it"));
    }
    if name.contains('/') {
        let what = "a name may not have \"/\" in it: it sets off the names of what is derived";
        return Some((what.to_owned(), "write another character"));
    }
    if name.contains(char::is_control) {
        let what = "a name may not have control characters in it";
        return Some((what.to_owned(), "delete them"));
    }
    None
}
