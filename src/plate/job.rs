//! What the panels of one plate share: the solved scene, the style, labels, inks, groups, faults.

use std::collections::BTreeSet;
use std::sync::Arc;

use indexmap::IndexMap;
use kurbo::Point;

use super::canvas::{Canvas, Rank};
use super::inks::Inks;
use super::names::Names;
use super::style::Style;
use super::window::Groups;
use crate::fault::{Fault, Kind, ObjectId, nearest};
use crate::geometry::{Boost, Displacement, Leg, Rapidity};
use crate::quantity::{Dimension, Typed, Unit, read};
use crate::solve::{Solved, SolvedLine, Viewing};

/// One plate being laid out.
#[derive(Debug)]
pub(super) struct Job<'a> {
    pub(super) solved: &'a Solved,
    /// What is left out for a fault of its own or of what it hangs on.
    pub(super) left_out: BTreeSet<(Kind, &'a str)>,
    pub(super) plate: ObjectId,
    pub(super) style: Style,
    pub(super) names: Names,
    pub(super) inks: Inks,
    pub(super) groups: Groups,
}

/// A frame (or a line's rest frame) whose axes or simultaneity are drawn.
#[derive(Clone, Debug)]
pub(super) struct Observer {
    /// `frame courier`, `line courier`.
    pub(super) object: ObjectId,
    /// From the base to it.
    pub(super) view: Viewing,
    /// True for the base frame itself.
    pub(super) is_base: bool,
}

/// Coordinates beyond this cannot be drawn.
const FARTHEST: f64 = 1e100;

impl Job<'_> {
    /// A fault of the plate.
    pub(super) fn fault(&mut self, field: &str, what: impl Into<String>, mend: impl Into<String>) {
        self.names
            .fault(Fault::new(self.plate.clone(), field, what, mend));
    }

    /// A remark that a panel shows something in projection.
    pub(super) fn projection(&mut self, field: &str, what: String) {
        let fault = Fault::new(self.plate.clone(), field, what, "say so in the caption");
        self.names.fault(fault.remark());
    }

    /// A finding of the plate.
    pub(super) fn finding(
        &mut self,
        field: &str,
        what: impl Into<String>,
        mend: impl Into<String>,
    ) {
        self.names
            .fault(Fault::new(self.plate.clone(), field, what, mend).finding());
    }

    /// True where an object is left out for a fault of its own or of what it hangs on.
    pub(super) fn is_left_out(&self, kind: Kind, name: &str) -> bool {
        self.left_out.contains(&(kind, name))
    }

    /// The names of a panel's list that are sound, each once, or all of them. A name that nothing has is a fault.
    pub(super) fn chosen<T>(
        &mut self,
        list: Option<&[String]>,
        kind: Kind,
        field: &str,
        known: &IndexMap<Arc<str>, T>,
    ) -> Vec<Arc<str>> {
        let Some(list) = list else {
            return known.keys().cloned().collect();
        };
        let mut found = Vec::new();
        let mut taken = BTreeSet::new();
        for (i, name) in list.iter().enumerate() {
            match known.get_key_value(name.as_str()) {
                Some((name, _)) if taken.insert(name) => found.push(name.clone()),
                Some(_) => {}
                None if self.is_left_out(kind, name) => {}
                None => {
                    let known: Vec<Arc<str>> = known.keys().cloned().collect();
                    self.unknown(kind.word(), name, &format!("{field}.{i}"), &known);
                }
            }
        }
        found
    }

    /// A name that nothing has.
    pub(super) fn unknown(&mut self, word: &str, name: &str, field: &str, known: &[Arc<str>]) {
        let mend = match nearest(name, known.iter().map(|k| &**k)) {
            Some(near) => format!("did you mean \"{near}\"?"),
            None => format!(
                "name {} that the scene has, or take it off the list",
                with_article(word)
            ),
        };
        self.fault(field, format!("there is no {word} named \"{name}\""), mend);
    }

    /// A range as typed, in a unit; a bad one is a fault and is fitted instead.
    pub(super) fn range(
        &mut self,
        range: Option<&(Typed, Typed)>,
        unit: &Unit,
        field: &str,
    ) -> Option<(f64, f64)> {
        let (low, high) = range?;
        let low = self.number(low, unit, &format!("{field}.0"))?;
        let high = self.number(high, unit, &format!("{field}.1"))?;
        let wide = high - low;
        if !(wide.is_finite() && low.abs().max(high.abs()) < FARTHEST) {
            self.fault(
                field,
                "the range is too large to draw",
                "give smaller bounds",
            );
            return None;
        }
        if wide <= 0.0 {
            self.fault(
                field,
                "the range does not rise",
                "give the lower bound first, then a larger upper one",
            );
            return None;
        }
        if wide < low.abs().max(high.abs()) * NARROWEST {
            self.fault(
                field,
                "the bounds differ by too little to be drawn",
                "give bounds farther apart",
            );
            return None;
        }
        Some((low, high))
    }

    /// A typed number in a unit.
    pub(super) fn number(&mut self, typed: &Typed, unit: &Unit, field: &str) -> Option<f64> {
        match read(typed, unit) {
            Ok(quantity) => Some(quantity.value.to_f64()),
            Err(wrong) => {
                let fault = Fault::new(self.plate.clone(), field, wrong.what, wrong.mend);
                self.names.fault(fault.at(wrong.column));
                None
            }
        }
    }

    /// The frame of some name, else the rest frame of the line of that name, where that line's clock reads 0.
    pub(super) fn observer(&mut self, name: &str, field: &str) -> Option<Observer> {
        let solved = self.solved;
        if *name == *solved.base {
            let view = solved.base_view();
            return Some(Observer {
                object: ObjectId::new(Kind::Frame, name),
                view,
                is_base: true,
            });
        }
        if let Some(view) = solved.viewing(&crate::scene::When::Frame(name.to_owned())) {
            return Some(Observer {
                object: ObjectId::new(Kind::Frame, name),
                view,
                is_base: false,
            });
        }
        if let Some(line) = solved.lines.get(name) {
            return match rest_frame(name, line) {
                Ok(view) => Some(Observer {
                    object: ObjectId::new(Kind::Line, name),
                    view,
                    is_base: false,
                }),
                Err((what, mend)) => {
                    self.fault(field, what, mend);
                    None
                }
            };
        }
        if !self.is_left_out(Kind::Frame, name) && !self.is_left_out(Kind::Line, name) {
            let known: Vec<Arc<str>> = solved
                .frames
                .keys()
                .chain(solved.lines.keys())
                .chain([&solved.base])
                .cloned()
                .collect();
            self.unknown("frame or line", name, field, &known);
        }
        None
    }

    /// Tells of labels that found no place.
    pub(super) fn unplaced(&mut self, index: usize, missing: Vec<(Rank, Option<ObjectId>)>) {
        let letter = letter(index);
        let plate = self.plate.clone();
        let panel = format!("panels.{index}");
        for (rank, blame) in missing {
            let is_title = match rank {
                Rank::Title => true,
                Rank::Number
                | Rank::Symbol
                | Rank::Event
                | Rank::Name
                | Rank::Curve
                | Rank::Word => false,
            };
            let wider = "make the panel wider, or show less";
            let fault = match blame {
                _ if is_title => Fault::new(
                    plate.clone(),
                    &panel,
                    format!("an axis' title has no free place on panel {letter}"),
                    wider,
                ),
                Some(object) if object.kind == Kind::Plate => Fault::new(
                    plate.clone(),
                    &panel,
                    format!(
                        "the words of an axis, a curve or a line of simultaneity have no free place on panel {letter}"
                    ),
                    wider,
                ),
                Some(object) => Fault::new(
                    object,
                    "label",
                    format!(
                        "its label has no free place on panel {letter} of {}",
                        self.plate
                    ),
                    "make the panel wider, show less, or choose a shorter label",
                ),
                None => continue,
            };
            self.names.fault(fault.remark());
        }
    }

    /// A small remark on a panel, at the first free place along its lower edge, then its upper one.
    pub(super) fn remark(&mut self, canvas: &mut Canvas<'_>, text: &str) {
        let group = canvas.group("remark");
        let label = self.names.word(text);
        canvas.remark(group, label);
    }
}

/// The frame in which a line is at rest, its origin where the line's clock reads 0; else why there is none that a
/// spacetime panel can show, and what would mend it.
fn rest_frame(name: &str, line: &SolvedLine) -> Result<Viewing, (String, String)> {
    let rapidity = match line.world.legs() {
        [
            Leg::Free {
                rapidity,
                across: 0.0,
            },
        ] => *rapidity,
        [Leg::Free { .. }] => {
            return Err((
                format!("line {name} also moves across x; a spacetime panel shows boosts along x"),
                "name a frame or a line that moves along x alone".to_owned(),
            ));
        }
        [Leg::Light(_)] => {
            return Err((
                format!("line {name} is light, which has no axes"),
                "name a frame or a clock's line".to_owned(),
            ));
        }
        _ => {
            return Err((
                format!("line {name} bends, so it is at rest in no one frame"),
                format!("name a frame RestOf(line: \"{name}\", at: ..) that says where"),
            ));
        }
    };
    let origin = line.world.at_clock(0.0).map_err(|_range| {
        (
            format!("the event where the clock of line {name} reads 0 is too far off"),
            format!("name a frame RestOf(line: \"{name}\", origin: ..)"),
        )
    })?;
    Ok(Viewing {
        origin,
        origin_exact: None,
        name: None,
        boost: Boost::along_x(rapidity),
    })
}

/// The least width of a range relative to its bounds.
const NARROWEST: f64 = 1e-9;

fn with_article(word: &str) -> String {
    let article = if word.starts_with(['a', 'e', 'i', 'o', 'u']) {
        "an"
    } else {
        "a"
    };
    format!("{article} {word}")
}

/// The letter of a panel, counted from 0.
pub(super) fn letter(index: usize) -> char {
    u8::try_from(index)
        .ok()
        .filter(|i| *i < 26)
        .map_or('z', |i| char::from(b'a' + i))
}

/// A base-frame displacement from the base's origin as a point of a viewing frame's plane: x right, t up.
pub(super) fn seen(at: Displacement, from: &Viewing) -> Option<Point> {
    drawable(from.boost.apply(at - from.origin).ok()?)
}

/// A displacement as a point of the plane, where it is not too far to draw.
pub(super) fn drawable(d: Displacement) -> Option<Point> {
    let p = Point::new(d.x(), d.t());
    (p.x.abs() < FARTHEST && p.y.abs() < FARTHEST).then_some(p)
}

/// The rapidity along x of a boost; `None` for motion across.
pub(super) fn along_x(boost: Boost) -> Option<Rapidity> {
    boost.is_along_x().then(|| boost.rapidity())
}

/// A unit on paper by its symbol; mm where there is none such.
pub(super) fn paper(symbol: &str) -> Unit {
    Unit::named(symbol, Dimension::Paper).unwrap_or_else(|| Unit::base(Dimension::Paper))
}
