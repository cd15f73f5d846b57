//! The fields of a form, and those any object may carry. A reader returns `None` when it has noted a fault.

use super::faults::Faults;
use super::literal::{self, is_string, shorten};
use super::tree::{Entry, Shape, Value};
use super::values::{LABEL, listed, number, punctuation, text, with_next};
use super::{Common, When};
use crate::fault::nearest;

/// Fields any object may carry.
const COMMON: [&str; 3] = ["label", "look", "note"];

/// The fields of a form, by name.
pub(super) struct Form<'a> {
    value: Value<'a>,
    names: &'static [&'static str],
    found: Vec<Option<Value<'a>>>,
    sound: bool,
}

impl<'a> Form<'a> {
    /// Finds the fields of a form; `alone` is the one whose value may stand bare.
    pub(super) fn open(
        value: Value<'a>,
        names: &'static [&'static str],
        alone: Option<&'static str>,
        faults: &mut Faults<'a>,
    ) -> Self {
        let mut form = Self {
            value,
            names,
            found: vec![None; names.len()],
            sound: true,
        };
        match value.shape() {
            Shape::Leaf if !is_string(value.raw()) => return form,
            Shape::Round => {}
            Shape::Leaf | Shape::Square | Shape::Curly => {
                let mend = format!("write `( .. )` with {}", listed(names.iter().copied()));
                faults.unlike(value, "a form with named fields", mend);
                form.sound = false;
                return form;
            }
        }
        if let (Some(alone), Some(bare)) = (alone, value.bare()) {
            form.put(alone, bare);
            return form;
        }
        let object = faults.root.is_some_and(|root| root.id == value.id);
        let mut torn_off = false;
        for (entry, next) in with_next(value) {
            form.sound &= punctuation(entry, next, faults).is_some();
            // What follows a value without a comma is its fault, not one of its own.
            if !torn_off || entry.key().is_some() {
                form.field(entry, object, faults);
            }
            torn_off = entry.item.comma.is_none();
        }
        form
    }

    /// An anonymous form, without a word.
    pub(super) fn anonymous(
        value: Value<'a>,
        names: &'static [&'static str],
        faults: &mut Faults<'a>,
    ) -> Self {
        let mut form = Self::open(value, names, None, faults);
        if form.sound && !value.word().is_empty() {
            let mend = format!("write `( .. )` with {}", listed(names.iter().copied()));
            faults.unlike(value, "a form without a word before it", mend);
            form.sound = false;
        }
        form
    }

    fn put(&mut self, name: &str, value: Value<'a>) -> bool {
        let slot = self.names.iter().position(|known| *known == name);
        match slot {
            Some(i) if self.found[i].is_none() => self.found[i] = Some(value),
            _ => self.sound = false,
        }
        slot.is_some()
    }

    fn field(&mut self, entry: Entry<'a>, object: bool, faults: &mut Faults<'a>) {
        let Some(value) = entry.value() else {
            return;
        };
        let names = self.names.iter().copied();
        let Some(key) = entry.key() else {
            let mend = format!("write it behind its name: {}", listed(names));
            faults.add(value.start(), "a field without its name", mend);
            self.sound = false;
            return;
        };
        let name = key.raw();
        if object && COMMON.contains(&name) {
            return;
        }
        let before = self.names.iter().position(|known| *known == name);
        if before.is_some_and(|i| self.found[i].is_some()) {
            let what = format!("`{name}` stands here a second time");
            faults.add(key.start(), what, "delete one of them");
        }
        if !self.put(name, value) && !faults.full() {
            let common = COMMON.iter().copied().filter(|_| object);
            let mend = match nearest(name, names.clone().chain(common)) {
                Some(near) => format!("did you mean `{near}`?"),
                None => format!("the fields here are {}", listed(names)),
            };
            let what = format!("there is no field `{}` here", shorten(name));
            faults.add(key.start(), what, mend);
        }
    }

    fn get(&self, name: &str) -> Option<Value<'a>> {
        let slot = self.names.iter().position(|known| *known == name)?;
        self.found[slot]
    }

    /// Whether a field is there.
    pub(super) fn has(&self, name: &str) -> bool {
        self.get(name).is_some()
    }

    /// A field that must be there.
    pub(super) fn need<T>(
        &self,
        name: &str,
        faults: &mut Faults<'a>,
        read: impl Fn(Value<'a>, &mut Faults<'a>) -> Option<T>,
    ) -> Option<T> {
        let field = self.get(name);
        if field.is_none() && self.sound {
            faults.missing(self.value, name, format!("write `{name}: ..`"));
        }
        read(field?, faults)
    }

    /// A field that may be left out.
    #[expect(clippy::option_option, reason = "outer: sound; inner: there")]
    pub(super) fn may<T>(
        &self,
        name: &str,
        faults: &mut Faults<'a>,
        read: impl Fn(Value<'a>, &mut Faults<'a>) -> Option<T>,
    ) -> Option<Option<T>> {
        match self.get(name) {
            Some(value) => read(value, faults).map(Some),
            None => Some(None),
        }
    }

    /// `frame: ".."` or `rapidity: ..`, which say in which frame a thing is so.
    pub(super) fn when(&self, faults: &mut Faults<'a>) -> Option<When> {
        match (self.get("frame"), self.get("rapidity")) {
            (None, None) => Some(When::Base),
            (Some(frame), None) => text(frame, faults).map(When::Frame),
            (None, Some(rapidity)) => number(rapidity, faults).map(When::Rapidity),
            (Some(frame), Some(rapidity)) => {
                let later = frame.start().max(rapidity.start());
                let what = "`frame` and `rapidity` both say in which frame this is so";
                faults.add(later, what, "delete one of them");
                None
            }
        }
    }
}

/// Takes the fields any object may carry. What is wrong with them is a finding: the object is used without.
pub(super) fn common<'a>(root: Value<'a>, faults: &mut Faults<'a>) -> Common {
    let mut common = Common::default();
    if root.shape() != Shape::Round || root.bare().is_some() {
        return common;
    }
    for entry in root.items() {
        let (Some(key), Some(value)) = (entry.key(), entry.value()) else {
            continue;
        };
        let slot = match key.raw() {
            "label" => &mut common.label,
            "note" => &mut common.note,
            "look" => {
                let what = "`look` is not read by this version";
                faults.find(key.start(), what, "it is drawn as if it were not there");
                continue;
            }
            _ => continue,
        };
        if slot.is_some() {
            let what = format!("`{}` stands here a second time", key.raw());
            faults.find(key.start(), what, "delete one of them");
            continue;
        }
        let limit = if key.raw() == "label" {
            LABEL
        } else {
            usize::MAX
        };
        let contents = match value.shape() {
            Shape::Leaf if is_string(value.raw()) => literal::string(value.raw()),
            _ => Err(literal::LiteralFault {
                at: 0,
                what: format!("`{}` is a string", key.raw()),
                mend: "write it in quotes: \"..\"".to_owned(),
            }),
        };
        match contents {
            Ok(contents) if key.raw() == "label" && contents.contains(char::is_control) => {
                let what = "the label holds a control character: in quotes, `\\t`, `\\n` and `\\r` are white space";
                faults.find(
                    value.start(),
                    what,
                    "double the backslash (\"\\\\tau\"), or write r\"\\tau\"",
                );
            }
            Ok(contents) if contents.len() <= limit => *slot = Some(contents),
            Ok(contents) => {
                let what = format!("it has {} bytes, {limit} are the most", contents.len());
                faults.find(value.start(), what, "shorten it");
            }
            Err(fault) => faults.find(value.start() + fault.at, fault.what, fault.mend),
        }
    }
    common
}
