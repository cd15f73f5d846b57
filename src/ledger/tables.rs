//! The ledger's rows as tables of text: one number of decimals a column.

use std::collections::BTreeMap;

use super::digits::Form;
use super::{CollisionRow, Ledger, ParticleRow, SumRow};
use crate::fault::{Kind, ObjectId};
use crate::quantity::significant;

/// How a column's text stands.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Align {
    /// Names.
    Left,
    /// Numbers with equal decimals.
    Right,
}

/// A column of a table.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Column {
    /// Its head, plain text: `E`, `px`.
    pub head: String,
    /// Its unit, plain text; empty for a plain number.
    pub unit: String,
    /// How it stands.
    pub align: Align,
    /// True for what every observer finds the same.
    pub invariant: bool,
}

/// One entry.
#[derive(Clone, Debug, PartialEq)]
pub struct Cell {
    /// The number, for other writers; none for words and for what does not exist.
    pub value: Option<f64>,
    /// As shown: ASCII digits with a dot, ungrouped; a centred dot for what does not exist; empty where nothing belongs.
    pub text: String,
}

/// A row of a table.
#[derive(Clone, Debug, PartialEq)]
pub struct Row {
    /// What it is about.
    pub object: Option<ObjectId>,
    /// A sum or difference, set semibold.
    pub is_sum: bool,
    /// A rule above it.
    pub rule_above: bool,
    /// Its cells, as many as there are columns; the first holds the name.
    pub cells: Vec<Cell>,
}

/// A table of the ledger.
#[derive(Clone, Debug, PartialEq)]
pub struct Table {
    /// `collisions`, `particles`, `events`, `lines`, `intervals`.
    pub name: &'static str,
    /// Columns; the first holds names.
    pub columns: Vec<Column>,
    /// Rows.
    pub rows: Vec<Row>,
    /// Sentences to stand under it.
    pub notes: Vec<String>,
}

/// What does not exist.
const NONE: &str = "\u{b7}";

/// The ledger as tables, in the order in which they are printed; a kind without objects has none.
pub fn tables(ledger: &Ledger) -> Vec<Table> {
    [
        collisions(ledger),
        particles(ledger),
        events(ledger),
        lines(ledger),
        intervals(ledger),
    ]
    .into_iter()
    .filter(|table| !table.rows.is_empty())
    .collect()
}

/// A row before its numbers are text.
struct Draft {
    object: Option<ObjectId>,
    words: Vec<String>,
    numbers: Vec<Entry>,
    is_sum: bool,
    rule_above: bool,
}

#[derive(Clone, Copy)]
enum Entry {
    Number(f64),
    /// A number and its standard deviation.
    Measured(f64, f64),
    Missing,
    Blank,
}

impl From<f64> for Entry {
    fn from(value: f64) -> Self {
        Self::Number(value)
    }
}

impl From<Option<f64>> for Entry {
    fn from(value: Option<f64>) -> Self {
        value.map_or(Self::Missing, Self::Number)
    }
}

impl Entry {
    fn value(self) -> Option<f64> {
        match self {
            Self::Number(value) | Self::Measured(value, _) => Some(value),
            Self::Missing | Self::Blank => None,
        }
    }
}

fn row(kind: Kind, name: &str, numbers: Vec<Entry>) -> Draft {
    Draft {
        object: Some(ObjectId::new(kind, name)),
        words: vec![name.to_owned()],
        numbers,
        is_sum: false,
        rule_above: false,
    }
}

/// Heads with their units; a star marks what is invariant.
fn set(name: &'static str, words: &[&str], heads: &[(&str, &str)], drafts: Vec<Draft>) -> Table {
    let mut columns: Vec<Column> = words
        .iter()
        .map(|head| Column {
            head: (*head).to_owned(),
            unit: String::new(),
            align: Align::Left,
            invariant: false,
        })
        .collect();
    columns.extend(heads.iter().map(|(head, unit)| Column {
        head: head.trim_end_matches('*').to_owned(),
        unit: (*unit).to_owned(),
        align: Align::Right,
        invariant: head.ends_with('*'),
    }));
    let forms: Vec<Form> = (0..heads.len())
        .map(|c| Form::of(drafts.iter().filter_map(|d| d.numbers.get(c)?.value())))
        .collect();
    let rows = drafts
        .into_iter()
        .map(|draft| {
            let words = draft
                .words
                .into_iter()
                .map(|text| Cell { value: None, text });
            let numbers = draft.numbers.iter().zip(&forms).map(|(entry, form)| Cell {
                value: entry.value(),
                text: match entry {
                    Entry::Number(value) => form.text(*value),
                    Entry::Measured(value, deviation) => form.measured(*value, *deviation),
                    Entry::Missing => NONE.to_owned(),
                    Entry::Blank => String::new(),
                },
            });
            Row {
                object: draft.object,
                is_sum: draft.is_sum,
                rule_above: draft.rule_above,
                cells: words.chain(numbers).collect(),
            }
        })
        .collect();
    Table {
        name,
        columns,
        rows,
        notes: Vec::new(),
    }
}

fn events(ledger: &Ledger) -> Table {
    let (time, length) = (ledger.units.time.as_str(), ledger.units.length.as_str());
    let across = ledger.events.iter().any(|e| e.y != 0.0);
    let mut heads = vec![("t", time), ("x", length)];
    if across {
        heads.push(("y", length));
    }
    heads.extend([("u", time), ("v", time)]);
    let drafts = ledger
        .events
        .iter()
        .map(|e| {
            let mut numbers = vec![e.t.into(), e.x.into()];
            if across {
                numbers.push(e.y.into());
            }
            numbers.extend([e.u, e.v].map(Entry::from));
            row(Kind::Event, &e.name, numbers)
        })
        .collect();
    set("events", &["event"], &heads, drafts)
}

fn lines(ledger: &Ledger) -> Table {
    let drafts = ledger
        .lines
        .iter()
        .map(|l| {
            row(
                Kind::Line,
                &l.name,
                vec![l.beta.into(), l.rapidity.into(), l.proper_time.into()],
            )
        })
        .collect();
    let heads = [
        ("beta", ""),
        ("rapidity", ""),
        ("proper time*", ledger.units.time.as_str()),
    ];
    set("lines", &["line"], &heads, drafts)
}

fn mass(particle: &ParticleRow) -> Entry {
    match particle.mass_uncertainty {
        Some(deviation) if deviation > 0.0 => Entry::Measured(particle.mass, deviation),
        Some(_) | None => Entry::Number(particle.mass),
    }
}

fn particles(ledger: &Ledger) -> Table {
    let energy = ledger.units.energy.as_str();
    let (momentum, per_c2) = (format!("{energy}/c"), format!("{energy}/c^2"));
    let drafts = ledger
        .particles
        .iter()
        .map(|p| {
            let numbers = vec![
                p.energy.into(),
                p.momentum[0].into(),
                p.momentum[1].into(),
                p.kinetic.into(),
                p.beta.into(),
                p.gamma.into(),
                p.rapidity.into(),
                mass(p),
            ];
            row(Kind::Particle, &p.name, numbers)
        })
        .collect();
    let heads = [
        ("E", energy),
        ("px", &momentum),
        ("py", &momentum),
        ("T", energy),
        ("beta", ""),
        ("gamma", ""),
        ("rapidity", ""),
        ("m*", &per_c2),
    ];
    set("particles", &["particle"], &heads, drafts)
}

fn intervals(ledger: &Ledger) -> Table {
    let (time, length) = (ledger.units.time.as_str(), ledger.units.length.as_str());
    let squared = format!("{time}^2");
    let drafts = ledger
        .intervals
        .iter()
        .map(|i| {
            let timelike = i.kind != "spacelike";
            let (tau, sigma) = if timelike {
                (Entry::Number(i.length), Entry::Missing)
            } else {
                (Entry::Missing, Entry::Number(i.length))
            };
            Draft {
                object: None,
                words: vec![i.from.clone(), i.to.clone(), i.kind.to_owned()],
                numbers: vec![i.squared.into(), tau, sigma],
                is_sum: false,
                rule_above: false,
            }
        })
        .collect();
    let heads = [
        ("s^2*", squared.as_str()),
        ("proper time*", time),
        ("proper distance*", length),
    ];
    set("intervals", &["from", "to", "kind"], &heads, drafts)
}

fn collisions(ledger: &Ledger) -> Table {
    let mut drafts = Vec::new();
    let mut notes = Vec::new();
    let by_name: BTreeMap<&str, &ParticleRow> = ledger
        .particles
        .iter()
        .map(|p| (p.name.as_str(), p))
        .collect();
    for (i, collision) in ledger.collisions.iter().enumerate() {
        drafts.extend(collision_rows(&by_name, collision, i > 0));
        notes.extend(collision_notes(ledger, collision));
    }
    let energy = ledger.units.energy.as_str();
    let (momentum, per_c2) = (format!("{energy}/c"), format!("{energy}/c^2"));
    let heads = [
        ("E", energy),
        ("px", &momentum),
        ("py", &momentum),
        ("sum of m*", &per_c2),
        ("mass of sum*", &per_c2),
    ];
    let mut table = set("collisions", &["collision", ""], &heads, drafts);
    table.notes = notes;
    table
}

fn collision_rows(
    particles: &BTreeMap<&str, &ParticleRow>,
    collision: &CollisionRow,
    rule_above: bool,
) -> Vec<Draft> {
    let object = ObjectId::new(Kind::Collision, &collision.name);
    let mut drafts = Vec::new();
    for (side, names) in [
        ("before", &collision.going_in),
        ("after", &collision.coming_out),
    ] {
        for (i, name) in names.iter().enumerate() {
            let Some(p) = particles.get(name.as_str()) else {
                continue;
            };
            drafts.push(Draft {
                object: Some(ObjectId::new(Kind::Particle, name)),
                words: vec![
                    if i == 0 {
                        side.to_owned()
                    } else {
                        String::new()
                    },
                    name.clone(),
                ],
                numbers: vec![
                    p.energy.into(),
                    p.momentum[0].into(),
                    p.momentum[1].into(),
                    mass(p),
                    Entry::Blank,
                ],
                is_sum: false,
                rule_above: rule_above && side == "before" && i == 0,
            });
        }
    }
    let sum = |words: &str, s: &SumRow, rule_above| Draft {
        object: Some(object.clone()),
        words: vec![collision.name.clone(), words.to_owned()],
        numbers: vec![
            s.energy.into(),
            s.momentum[0].into(),
            s.momentum[1].into(),
            s.mass_sum.into(),
            s.invariant_mass.into(),
        ],
        is_sum: true,
        rule_above,
    };
    drafts.push(sum("sum before", &collision.before, true));
    drafts.push(sum("sum after", &collision.after, false));
    let d = &collision.difference;
    drafts.push(Draft {
        object: Some(object.clone()),
        words: vec![String::new(), "difference".to_owned()],
        numbers: vec![
            within(d.energy, collision),
            within(d.momentum[0], collision),
            within(d.momentum[1], collision),
            (-collision.q_value).into(),
            Entry::Blank,
        ],
        is_sum: true,
        rule_above: false,
    });
    drafts
}

/// A difference within rounding of the sums is shown as 0, so that it does not widen its column.
fn within(difference: f64, collision: &CollisionRow) -> Entry {
    let rounding = 1e-12 * (collision.before.energy + collision.after.energy);
    Entry::Number(if difference.abs() <= rounding {
        0.0
    } else {
        difference
    })
}

fn collision_notes(ledger: &Ledger, collision: &CollisionRow) -> Vec<String> {
    let unit = &ledger.units.energy;
    let d = &collision.difference;
    let allowed = significant(collision.tolerance, 2);
    let parts = [
        ("E", d.energy),
        ("px", d.momentum[0]),
        ("py", d.momentum[1]),
    ];
    let is_kept = |off: f64| collision.balanced || off.abs() <= collision.tolerance;
    let (kept, lost): (Vec<_>, Vec<_>) = parts.into_iter().partition(|(_, off)| is_kept(*off));
    let names = |list: &[(&str, f64)]| list.iter().map(|p| p.0).collect::<Vec<_>>().join(", ");
    let mut notes = Vec::new();
    if collision.balanced {
        notes.push(format!(
            "{}: conserved (the same before and after): {}, within {allowed} {unit}.",
            collision.name,
            names(&kept),
        ));
    } else {
        let off: Vec<String> = lost
            .iter()
            .map(|(name, off)| format!("{name} by {}", significant(*off, 6)))
            .collect();
        notes.push(format!(
            "{}: does not balance: off {} {unit}, where the base frame allows {allowed}.",
            collision.name,
            off.join(", "),
        ));
    }
    notes.push(format!(
        "{}: invariant (the same for every observer): each m, each mass of sum; root s = {} {unit}, Q = {} {unit}.",
        collision.name,
        significant(collision.root_s, 6),
        significant(collision.q_value, 6),
    ));
    notes
}
