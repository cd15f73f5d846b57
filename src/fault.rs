//! What is wrong, where it stands, and what would mend it.

use std::fmt;
use std::sync::Arc;

/// A place in a file: line and column, both counted from 1; columns count characters.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub struct Place {
    /// Line, from 1.
    pub line: usize,
    /// Column in characters, from 1.
    pub column: usize,
}

/// The kinds of object a scene holds.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Kind {
    /// The scene itself (its `format`, `base`, `units`, `title`).
    Scene,
    /// A species of the scene's own.
    Species,
    /// An event.
    Event,
    /// A worldline.
    Line,
    /// A particle.
    Particle,
    /// A collision.
    Collision,
    /// A named frame.
    Frame,
    /// A plate.
    Plate,
}

impl Kind {
    /// Every kind, in the order in which a scene lists them.
    pub const ALL: [Self; 8] = [
        Self::Scene,
        Self::Species,
        Self::Event,
        Self::Line,
        Self::Particle,
        Self::Collision,
        Self::Frame,
        Self::Plate,
    ];

    /// The kind's word, as in `event turn`.
    pub const fn word(self) -> &'static str {
        match self {
            Self::Scene => "scene",
            Self::Species => "species",
            Self::Event => "event",
            Self::Line => "line",
            Self::Particle => "particle",
            Self::Collision => "collision",
            Self::Frame => "frame",
            Self::Plate => "plate",
        }
    }
}

/// One object of a scene: its kind and its name. Prints as `event turn`.
#[derive(Clone, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct ObjectId {
    /// The kind.
    pub kind: Kind,
    /// The name, unique within its kind; empty for the scene itself.
    pub name: Arc<str>,
}

impl ObjectId {
    /// An object by kind and name.
    pub fn new(kind: Kind, name: &str) -> Self {
        Self {
            kind,
            name: name.into(),
        }
    }

    /// The scene itself.
    pub fn scene() -> Self {
        Self::new(Kind::Scene, "")
    }
}

impl fmt::Display for ObjectId {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        if self.name.is_empty() {
            f.write_str(self.kind.word())
        } else {
            write!(f, "{} {}", self.kind.word(), self.name)
        }
    }
}

/// How grave a fault is.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Weight {
    /// The object cannot be used; what depends on it is left out.
    Fault,
    /// The object is used, but the author should know.
    Finding,
    /// The scene is sound; a drawing of it leaves something out for want of room, or shows it in projection.
    Remark,
}

/// What is wrong with one object, in words.
#[derive(Clone, Debug, PartialEq)]
pub struct Fault {
    /// How grave it is.
    pub weight: Weight,
    /// The object it is about.
    pub object: ObjectId,
    /// The field within the object, as a path of names and, in lists and pairs, of numbers from 0: `state`, `clock.1`,
    /// `panels.1.range.t.0`; empty for the whole object. The one value that stands bare in a form has the form's own
    /// path: of `velocity: Beta("3/5")` the value is at `velocity`.
    pub field: String,
    /// Where it stands in the file, once looked up.
    pub place: Option<Place>,
    /// Characters from the start of the field's value (of a string's contents) to the very spot; 0 is the value as a
    /// whole.
    pub offset: usize,
    /// What is wrong.
    pub what: String,
    /// What would mend it.
    pub mend: String,
}

impl Fault {
    /// A fault of one field of an object.
    pub fn new(
        object: ObjectId,
        field: &str,
        what: impl Into<String>,
        mend: impl Into<String>,
    ) -> Self {
        Self {
            weight: Weight::Fault,
            object,
            field: field.to_owned(),
            place: None,
            offset: 0,
            what: what.into(),
            mend: mend.into(),
        }
    }

    /// The same, as a finding.
    pub fn finding(mut self) -> Self {
        self.weight = Weight::Finding;
        self
    }

    /// The same, as a remark on a drawing.
    pub fn remark(mut self) -> Self {
        self.weight = Weight::Remark;
        self
    }

    /// The same, at some characters after the start of the field's value.
    pub fn at(mut self, offset: usize) -> Self {
        self.offset = offset;
        self
    }

    /// One line for people: `file:line:column: object: what; mend`.
    pub fn line(&self, file: &str) -> String {
        let place = match self.place {
            Some(Place { line, column }) => format!("{file}:{line}:{column}"),
            None => file.to_owned(),
        };
        let mend = if self.mend.is_empty() {
            String::new()
        } else {
            format!("; {}", self.mend)
        };
        format!("{place}: {}: {}{mend}", self.object, self.what)
    }
}

/// The candidate nearest to `name` by edit distance, if one is near enough to be meant.
pub fn nearest<'a>(name: &str, candidates: impl IntoIterator<Item = &'a str>) -> Option<&'a str> {
    let length = name.chars().count();
    let limit = (length / 3).max(1);
    candidates
        .into_iter()
        .filter(|c| c.chars().count().abs_diff(length) <= limit)
        .map(|c| (edit_distance(name, c), c))
        .filter(|&(d, _)| d <= limit)
        .min_by_key(|&(d, _)| d)
        .map(|(_, c)| c)
}

/// How many characters are put in, left out, changed or swapped with their neighbour (optimal string alignment).
fn edit_distance(a: &str, b: &str) -> usize {
    let b: Vec<char> = b.chars().collect();
    let mut rows: [Vec<usize>; 2] = [vec![0; b.len() + 1], (0..=b.len()).collect()];
    let mut last = None;
    for (i, ca) in a.chars().enumerate() {
        let [before, above] = &rows;
        let mut row = vec![i + 1];
        for (j, &cb) in b.iter().enumerate() {
            let mut steps = (above[j] + usize::from(ca != cb))
                .min(above[j + 1] + 1)
                .min(row[j] + 1);
            if j > 0 && last == Some(cb) && b[j - 1] == ca {
                steps = steps.min(before[j - 1] + 1);
            }
            row.push(steps);
        }
        last = Some(ca);
        rows.swap(0, 1);
        rows[1] = row;
    }
    rows[1][b.len()]
}
