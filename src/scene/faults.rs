//! What is found wrong while one object is read.

use super::lines::Lines;
use super::literal::{LiteralFault, shorten};
use super::tree::{Shape, Tree, Value};
use crate::fault::{Fault, ObjectId, Weight};

/// The most faults kept of one object.
const MOST: usize = 16;

/// A text, its tree and its lines.
pub(super) struct Source {
    pub(super) text: String,
    pub(super) tree: Tree,
    pub(super) lines: Lines,
}

/// The faults of one object, each with its field and place.
pub(super) struct Faults<'a> {
    source: &'a Source,
    object: ObjectId,
    /// The object's value, from which fields are counted.
    pub(super) root: Option<Value<'a>>,
    list: Vec<Fault>,
    broken: bool,
}

impl<'a> Faults<'a> {
    pub(super) fn new(source: &'a Source, object: ObjectId, root: Option<Value<'a>>) -> Self {
        Self {
            source,
            object,
            root,
            list: Vec::new(),
            broken: false,
        }
    }

    /// Whether there is anything for which the object cannot be used.
    pub(super) fn broken(&self) -> bool {
        self.broken
    }

    /// Whether any further fault would not be kept, so that its words need not be found.
    pub(super) fn full(&self) -> bool {
        self.list.len() >= MOST
    }

    pub(super) fn into_list(self) -> Vec<Fault> {
        self.list
    }

    /// A fault at a byte of the text.
    pub(super) fn add(&mut self, at: usize, what: impl Into<String>, mend: impl Into<String>) {
        self.broken = true;
        let field = self.path(at);
        self.put(Weight::Fault, &field, at, (what.into(), mend.into()));
    }

    /// A finding at a byte of the text: the object is used all the same.
    pub(super) fn find(&mut self, at: usize, what: impl Into<String>, mend: impl Into<String>) {
        let field = self.path(at);
        self.put(Weight::Finding, &field, at, (what.into(), mend.into()));
    }

    /// A fault of a field that is not there, at the form that lacks it.
    pub(super) fn missing(&mut self, form: Value<'a>, name: &str, mend: impl Into<String>) {
        self.broken = true;
        let mut field = self.path(form.start());
        if !field.is_empty() {
            field.push('.');
        }
        field.push_str(name);
        let what = format!("`{name}` is missing");
        self.put(Weight::Fault, &field, form.start(), (what, mend.into()));
    }

    /// A fault within a string or a number.
    pub(super) fn literal(&mut self, value: Value<'a>, fault: LiteralFault) {
        self.add(value.start() + fault.at, fault.what, fault.mend);
    }

    /// A fault of a value that is not what is wanted there.
    pub(super) fn unlike(&mut self, value: Value<'a>, wanted: &str, mend: impl Into<String>) {
        let what = format!("{wanted} is wanted here, not {}", described(value));
        self.add(value.start(), what, mend);
    }

    fn path(&self, at: usize) -> String {
        if self.full() {
            return String::new();
        }
        self.root.map_or_else(String::new, |root| root.path_to(at))
    }

    fn put(&mut self, weight: Weight, field: &str, at: usize, (what, mend): (String, String)) {
        if self.full() {
            return;
        }
        let place = self.source.lines.place(&self.source.text, at);
        let mut fault = Fault::new(self.object.clone(), field, what, mend);
        fault.weight = weight;
        fault.place = Some(place);
        if self.list.len() == MOST - 1 {
            fault.what.push_str(" (more is wrong here than is listed)");
        }
        self.list.push(fault);
    }
}

/// A value in a few words.
fn described(value: Value<'_>) -> String {
    let shown = shorten(value.word());
    match value.shape() {
        Shape::Leaf => format!("`{shown}`"),
        Shape::Square => "a list `[ .. ]`".to_owned(),
        Shape::Curly => "braces `{ .. }`".to_owned(),
        Shape::Round if shown.is_empty() => "brackets `( .. )`".to_owned(),
        Shape::Round => format!("`{shown}( .. )`"),
    }
}
