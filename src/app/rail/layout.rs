//! Where everything on the rail stands: pure functions of rapidities, widths of names and the rail's width. Lengths
//! are points, x from the rail's left end.

mod axis;
mod close;

use std::ops::Range;

use crate::fault::Kind;
use crate::num;
use crate::quantity::{Decimals, fixed};
use crate::solve::RapidityTick;

pub(super) use axis::{Graduation, Scale, Step, graduate, key_step, whole};
pub(super) use close::{CloseName, CloseUp, bars, close_up};

/// From the rail's end to its axis, where the dots lead to the end stops.
pub(super) const END: f32 = 100.0;
/// From the rail's end to its walls, and to a close-up.
pub(super) const EDGE: f32 = 16.0;
const NAME_GAP: f32 = 12.0;
/// Rapidities closer than this are one.
const SAME: f64 = 1e-11;
/// Stands for the sign of motion across, which the typeface lacks: it is painted.
pub(crate) const ACROSS: char = '\u{27C2}';

/// What a tick looks like.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub(super) enum TickKind {
    /// The base frame.
    Base,
    /// A named frame.
    Frame,
    /// A line.
    Line,
    /// A particle.
    Particle,
}

/// Things at one rapidity.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Tick {
    pub(super) rapidity: f64,
    pub(super) kind: TickKind,
    /// Indices of what stands here: the base first, then in the scene's order.
    pub(super) members: Vec<usize>,
    /// Their names, each once.
    pub(super) names: Vec<String>,
}

impl Tick {
    /// Its name on the rail.
    pub(super) fn text(&self) -> String {
        match self.names.as_slice() {
            [first, rest @ ..] if rest.len() > 2 => format!("{first} and {} more", rest.len()),
            names => names.join(", "),
        }
    }

    /// The same for a screen reader.
    pub(super) fn words(&self) -> String {
        self.text().replace(ACROSS, "across")
    }
}

/// Gathers things into ticks, from the lowest rapidity up.
pub(super) fn gather(things: &[RapidityTick]) -> Vec<Tick> {
    let mut order: Vec<usize> = (0..things.len())
        .filter(|&i| things[i].rapidity.is_finite())
        .collect();
    order.sort_by(|&a, &b| things[a].rapidity.total_cmp(&things[b].rapidity));
    let mut groups: Vec<Vec<usize>> = Vec::new();
    for i in order {
        let joins = groups.last().and_then(|g| g.last()).is_some_and(|&last| {
            let (low, high) = (things[last].rapidity, things[i].rapidity);
            high - low <= SAME * high.abs().max(1.0)
        });
        match groups.last_mut() {
            Some(group) if joins => group.push(i),
            _ => groups.push(vec![i]),
        }
    }
    groups.into_iter().map(|g| tick(things, g)).collect()
}

fn tick(things: &[RapidityTick], mut members: Vec<usize>) -> Tick {
    members.sort_by_key(|&i| (!things[i].is_base, i));
    let mut names: Vec<String> = Vec::new();
    for &i in &members {
        let name = name(&things[i]);
        if !names.contains(&name) {
            names.push(name);
        }
    }
    let kind = members.iter().map(|&i| kind(&things[i])).min();
    Tick {
        rapidity: members.first().map_or(0.0, |&i| things[i].rapidity),
        kind: kind.unwrap_or(TickKind::Line),
        members,
        names,
    }
}

fn name(thing: &RapidityTick) -> String {
    if thing.across.abs() < 0.005 {
        return thing.object.name.to_string();
    }
    let across = fixed(thing.across.abs(), Decimals(2));
    format!("{} {ACROSS} {across} c", thing.object.name)
}

fn kind(thing: &RapidityTick) -> TickKind {
    match thing.object.kind {
        Kind::Frame if thing.is_base => TickKind::Base,
        Kind::Frame => TickKind::Frame,
        Kind::Particle => TickKind::Particle,
        Kind::Line | Kind::Scene | Kind::Species | Kind::Event | Kind::Collision | Kind::Plate => {
            TickKind::Line
        }
    }
}

/// Places boxes as near as can be (by least squares) to where they want to be, in their order, with gaps between
/// them: pool adjacent violators. All within `bounds` as long as they fit.
pub(super) fn spread(want: &[f32], widths: &[f32], gap: f32, bounds: (f32, f32)) -> Vec<f32> {
    let mut offsets = vec![0.0_f32; want.len()];
    for i in 1..want.len() {
        offsets[i] = offsets[i - 1] + f32::midpoint(widths[i - 1], widths[i]) + gap;
    }
    let mut blocks: Vec<(f32, usize)> = Vec::new();
    for (wanted, offset) in want.iter().zip(&offsets) {
        let mut block = (wanted - offset, 1);
        while let Some(&(mean, count)) = blocks.last() {
            if mean <= block.0 {
                break;
            }
            blocks.pop();
            let total = count + block.1;
            block = (
                (mean * count as f32 + block.0 * block.1 as f32) / total as f32,
                total,
            );
        }
        blocks.push(block);
    }
    let (Some(first), Some(last), Some(end)) = (widths.first(), widths.last(), offsets.last())
    else {
        return Vec::new();
    };
    let low = bounds.0 + first / 2.0;
    let high = (bounds.1 - last / 2.0 - end).max(low);
    blocks
        .iter()
        .flat_map(|&(mean, count)| std::iter::repeat_n(mean.clamp(low, high), count))
        .zip(&offsets)
        .map(|(mean, offset)| mean + offset)
        .collect()
}

/// A name over the axis: of one tick, or of a bracket over several.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Name {
    /// The ticks it names.
    pub(super) ticks: Range<usize>,
    pub(super) text: String,
    /// Its middle.
    pub(super) at: f32,
    pub(super) width: f32,
    /// Where its ticks begin and end.
    pub(super) from: f32,
    pub(super) to: f32,
}

impl Name {
    pub(super) fn is_bracket(&self) -> bool {
        self.ticks.len() > 1
    }

    fn want(&self) -> f32 {
        f32::midpoint(self.from, self.to)
    }

    /// Whether it still stands over what it names.
    fn covers(&self) -> bool {
        let half = self.width / 2.0;
        self.at - half <= self.to && self.at + half >= self.from
    }
}

/// Measures a name's width.
pub(super) type Measure<'a> = &'a dyn Fn(&str) -> f32;

/// Names of the ticks on the axis; runs that crowd become brackets.
pub(super) fn names(
    ticks: &[Tick],
    things: &[RapidityTick],
    scale: &Scale,
    width: f32,
    measure: Measure<'_>,
) -> Vec<Name> {
    let mut names: Vec<Name> = ticks
        .iter()
        .enumerate()
        .filter(|(_, tick)| scale.holds(tick.rapidity))
        .map(|(i, tick)| {
            let (text, x) = (tick.text(), scale.x(tick.rapidity));
            Name {
                ticks: i..i + 1,
                width: measure(&text),
                text,
                at: x,
                from: x,
                to: x,
            }
        })
        .collect();
    loop {
        let want: Vec<f32> = names.iter().map(Name::want).collect();
        let widths: Vec<f32> = names.iter().map(|n| n.width).collect();
        let placed = spread(&want, &widths, NAME_GAP, (8.0, width - 8.0));
        for (name, at) in names.iter_mut().zip(placed) {
            name.at = at;
        }
        let Some(run) = crowded(&names) else {
            return names;
        };
        let bracket = bracket(&names[run.clone()], ticks, things, measure);
        names.splice(run, [bracket]);
    }
}

/// The crowd to be bracketed next: in the first run of touching names of which one no longer stands over its tick,
/// the names that would collide where they belong.
fn crowded(names: &[Name]) -> Option<Range<usize>> {
    let apart = |i: usize| f32::midpoint(names[i].width, names[i + 1].width) + NAME_GAP;
    let touches = |i: usize| names[i + 1].at - names[i].at < apart(i) + 0.01;
    let collides = |i: usize| names[i + 1].want() - names[i].want() < apart(i) - 0.01;
    let run = runs(0..names.len(), touches)
        .into_iter()
        .find(|run| run.len() > 1 && !names[run.clone()].iter().all(Name::covers))?;
    let crowds = runs(run.clone(), collides);
    let failing = |crowd: &&Range<usize>| {
        crowd.len() > 1 && !names[(*crowd).clone()].iter().all(Name::covers)
    };
    crowds
        .iter()
        .find(failing)
        .or_else(|| {
            crowds
                .iter()
                .filter(|c| c.len() > 1)
                .max_by_key(|c| c.len())
        })
        .cloned()
        .or(Some(run))
}

/// Cuts a range wherever a name and the next are not joined.
fn runs(range: Range<usize>, joined: impl Fn(usize) -> bool) -> Vec<Range<usize>> {
    let mut runs: Vec<Range<usize>> = Vec::new();
    for i in range {
        match runs.last_mut() {
            Some(run) if joined(i - 1) => run.end = i + 1,
            _ => runs.push(i..i + 1),
        }
    }
    runs
}

fn bracket(run: &[Name], ticks: &[Tick], things: &[RapidityTick], measure: Measure<'_>) -> Name {
    let first = run.first().map_or(0, |n| n.ticks.start);
    let last = run.last().map_or(first, |n| n.ticks.end);
    let text = crowd_text(&ticks[first..last], things);
    let (from, to) = (
        run.first().map_or(0.0, |n| n.from),
        run.last().map_or(0.0, |n| n.to),
    );
    Name {
        ticks: first..last,
        width: measure(&text),
        text,
        at: f32::midpoint(from, to),
        from,
        to,
    }
}

/// "40 lines within 0.1"
fn crowd_text(ticks: &[Tick], things: &[RapidityTick]) -> String {
    let count: usize = ticks.iter().map(|t| t.names.len()).sum();
    let mut kinds: Vec<Kind> = ticks
        .iter()
        .flat_map(|t| &t.members)
        .map(|&i| things[i].object.kind)
        .collect();
    kinds.sort_unstable();
    kinds.dedup();
    let word = match kinds.as_slice() {
        [Kind::Line] => "lines",
        [Kind::Particle] => "particles",
        [Kind::Frame] => "frames",
        _ => "names",
    };
    let spread = match ticks {
        [first, .., last] => last.rapidity - first.rapidity,
        _ => 0.0,
    };
    format!("{count} {word} within {}", upward(spread))
}

/// A positive number rounded up to one digit, as text.
fn upward(value: f64) -> String {
    if value <= 0.0 {
        return "0".to_owned();
    }
    let power = num::log10(value).floor() as i32;
    let unit = Step { digit: 1.0, power };
    let count = (value / unit.value() - 1e-6).ceil();
    if (-6..0).contains(&power) {
        let text = fixed(unit.times(count), unit.decimals());
        text.trim_end_matches('0').trim_end_matches('.').to_owned()
    } else {
        crate::quantity::shortest(unit.times(count))
    }
}

#[cfg(test)]
mod tests;
