//! Where everything on the rail stands: pure functions of rapidities, widths of names and the rail's width. Lengths
//! are points, x from the rail's left end.

use std::ops::Range;

use crate::fault::Kind;
use crate::num;
use crate::quantity::{Decimals, fixed, grouped};
use crate::solve::RapidityTick;

/// From the rail's end to its axis, where the dots lead to the end stops.
pub(super) const END: f32 = 100.0;
/// From the rail's end to its walls, and to a close-up.
pub(super) const EDGE: f32 = 16.0;
const NAME_GAP: f32 = 12.0;
const BLOCK_GAP: f32 = 10.0;
/// How much wider a block of three names is than the widest of them.
const BLOCK_EXTRA: f32 = 16.0;
const LEADER_STEP: f32 = 5.0;
const NUMBER_GAP: f32 = 64.0;
const BAR_GAP: f32 = 2.0;
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

/// The range of rapidity that holds all of these: 0.1 beyond, outward to halves, at least 2 wide.
pub(super) fn whole(rapidities: impl IntoIterator<Item = f64>) -> (f64, f64) {
    let (mut low, mut high) = (f64::INFINITY, f64::NEG_INFINITY);
    for rapidity in rapidities.into_iter().filter(|r| r.is_finite()) {
        low = low.min(rapidity);
        high = high.max(rapidity);
    }
    if low > high {
        return (-1.0, 1.0);
    }
    low = ((low - 0.1) * 2.0).floor() / 2.0;
    high = ((high + 0.1) * 2.0).ceil() / 2.0;
    let missing = (2.0 - (high - low)).max(0.0);
    (low - missing / 2.0, high + missing / 2.0)
}

/// Rapidity to x and back, linear.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Scale {
    pub(super) low: f64,
    pub(super) high: f64,
    pub(super) left: f32,
    pub(super) right: f32,
}

impl Scale {
    pub(super) fn x(&self, rapidity: f64) -> f32 {
        let part = (rapidity - self.low) / (self.high - self.low);
        self.left + (part * f64::from(self.right - self.left)) as f32
    }

    pub(super) fn rapidity(&self, x: f32) -> f64 {
        let part = f64::from(x - self.left) / f64::from(self.right - self.left);
        self.low + part * (self.high - self.low)
    }

    /// The rapidity at a point, no finer than a point is wide.
    pub(super) fn pointed(&self, x: f32) -> f64 {
        let grain = self.per_point();
        let step = nice_below(grain);
        let rapidity = self.rapidity(x).clamp(self.low, self.high);
        step.times((rapidity / step.value()).round())
    }

    fn per_point(&self) -> f64 {
        (self.high - self.low) / f64::from(self.right - self.left)
    }

    fn holds(&self, rapidity: f64) -> bool {
        let slack = (self.high - self.low) * 1e-9;
        (self.low - slack..=self.high + slack).contains(&rapidity)
    }
}

/// 1, 2 or 5 times a power of ten, kept so that multiples come out as their decimals.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Step {
    digit: f64,
    power: i32,
}

impl Step {
    pub(super) fn value(self) -> f64 {
        self.times(1.0)
    }

    /// A multiple of it.
    pub(super) fn times(self, count: f64) -> f64 {
        let scale = num::pow(10.0, f64::from(self.power.abs()));
        if self.power < 0 {
            count * self.digit / scale
        } else {
            count * self.digit * scale
        }
    }

    fn decimals(self) -> Decimals {
        Decimals(usize::try_from(-self.power).unwrap_or(0))
    }

    /// How many strokes stand to a number.
    fn parts(self) -> f64 {
        if self.digit == 2.0 { 4.0 } else { 5.0 }
    }
}

/// The smallest 1-2-5 step that is not below `value`.
fn nice_above(value: f64) -> Step {
    let power = num::log10(value).floor();
    let lead = value / num::pow(10.0, power);
    let power = power as i32;
    match lead {
        l if l <= 1.0 + 1e-9 => Step { digit: 1.0, power },
        l if l <= 2.0 + 1e-9 => Step { digit: 2.0, power },
        l if l <= 5.0 + 1e-9 => Step { digit: 5.0, power },
        _ => Step {
            digit: 1.0,
            power: power + 1,
        },
    }
}

/// The largest 1-2-5 step that is not above `value`.
fn nice_below(value: f64) -> Step {
    let power = num::log10(value).floor();
    let lead = value / num::pow(10.0, power);
    let digit = match lead {
        l if l < 2.0 => 1.0,
        l if l < 5.0 => 2.0,
        _ => 5.0,
    };
    Step {
        digit,
        power: power as i32,
    }
}

/// What an arrow key moves the handle by on a span: a hundredth, rounded to 1-2-5; with Shift a tenth of that.
pub(super) fn key_step(span: f64) -> f64 {
    nice_below(span / 100.0 * 1.000_001).value()
}

/// Numbers and strokes under an axis.
#[derive(Clone, Debug, PartialEq, Default)]
pub(super) struct Graduation {
    pub(super) numbers: Vec<(f32, String)>,
    pub(super) strokes: Vec<f32>,
}

/// Numbers every half and strokes every tenth; by 1-2-5 where that would crowd or leave the axis bare.
pub(super) fn graduate(scale: &Scale) -> Graduation {
    let span = scale.high - scale.low;
    let fitting = nice_above(f64::from(NUMBER_GAP) * scale.per_point());
    let half = Step {
        digit: 5.0,
        power: -1,
    };
    let step = if span >= 2.0 && fitting.value() < half.value() {
        half
    } else {
        fitting
    };
    let count = |per: f64| {
        let low = (scale.low / per - 1e-6).ceil();
        let high = (scale.high / per + 1e-6).floor();
        (low as i64)..=(high as i64)
    };
    let minor = step.value() / step.parts();
    Graduation {
        numbers: count(step.value())
            .map(|i| step.times(i as f64))
            .map(|r| (scale.x(r), grouped(&fixed(r, step.decimals()))))
            .collect(),
        strokes: count(minor).map(|i| scale.x(i as f64 * minor)).collect(),
    }
}

/// Places boxes as near as can be (by least squares) to where they want to be, in their order, with gaps between
/// them: pool adjacent violators. All within `bounds` as long as they fit.
pub(super) fn spread(want: &[f32], widths: &[f32], gap: f32, bounds: (f32, f32)) -> Vec<f32> {
    let mut offsets = vec![0.0_f32; want.len()];
    for i in 1..want.len() {
        offsets[i] = offsets[i - 1] + (widths[i - 1] + widths[i]) / 2.0 + gap;
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

/// A name of a close-up.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct CloseName {
    pub(super) tick: usize,
    pub(super) text: String,
    pub(super) left: f32,
    pub(super) right: f32,
    /// Which of the three rows, from below.
    pub(super) row: usize,
    /// Where its leader hangs.
    pub(super) leader: f32,
    /// Where its tick stands.
    pub(super) x: f32,
}

/// A stretch of the axis, drawn larger.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct CloseUp {
    pub(super) scale: Scale,
    pub(super) ticks: Range<usize>,
    pub(super) names: Vec<CloseName>,
    /// Runs of ticks too close to tell apart, from and to.
    pub(super) bars: Vec<(f32, f32)>,
}

/// The close-up of a bracket.
pub(super) fn close_up(
    bracket: &Name,
    ticks: &[Tick],
    width: f32,
    measure: Measure<'_>,
) -> CloseUp {
    let shown = &ticks[bracket.ticks.clone()];
    let (low, high) = match shown {
        [first, .., last] => (first.rapidity, last.rapidity),
        [one] => (one.rapidity, one.rapidity),
        [] => (0.0, 0.0),
    };
    let margin = ((high - low) * 0.065).max(1e-12);
    let scale = Scale {
        low: low - margin,
        high: high + margin,
        left: EDGE,
        right: width - EDGE,
    };
    let texts: Vec<String> = shown.iter().map(Tick::text).collect();
    let widths: Vec<f32> = texts.iter().map(|t| measure(t)).collect();
    let every = every_nth(&widths, width - 2.0 * EDGE - 16.0);
    let chosen: Vec<usize> = (0..shown.len()).step_by(every).collect();
    CloseUp {
        names: threes(&chosen, shown, &texts, &widths, &scale)
            .into_iter()
            .map(|mut name| {
                name.tick += bracket.ticks.start;
                name
            })
            .collect(),
        bars: bars(shown.iter().map(|t| scale.x(t.rapidity))),
        ticks: bracket.ticks.clone(),
        scale,
    }
}

/// Every how many names fit in.
fn every_nth(widths: &[f32], room: f32) -> usize {
    let needed = |every: usize| {
        let chosen: Vec<f32> = widths.iter().step_by(every).copied().collect();
        let blocks = chosen
            .chunks(3)
            .map(|c| widest(c) + BLOCK_EXTRA + BLOCK_GAP);
        blocks.sum::<f32>() - BLOCK_GAP
    };
    (1..=widths.len().max(1))
        .find(|&every| needed(every) <= room)
        .unwrap_or(widths.len().max(1))
}

fn widest(widths: &[f32]) -> f32 {
    widths.iter().copied().fold(0.0, f32::max)
}

/// Blocks of three names; within a block the second and third stand above the first and carry a leader at their end.
fn threes(
    chosen: &[usize],
    ticks: &[Tick],
    texts: &[String],
    widths: &[f32],
    scale: &Scale,
) -> Vec<CloseName> {
    let blocks: Vec<&[usize]> = chosen.chunks(3).collect();
    let core: Vec<f32> = blocks
        .iter()
        .map(|b| widest(&b.iter().map(|&i| widths[i]).collect::<Vec<_>>()))
        .collect();
    let boxes: Vec<f32> = core.iter().map(|w| w + BLOCK_EXTRA).collect();
    let hang = |block: usize, row: usize, i: usize| match row {
        0 => core[block] - widths[i] / 2.0,
        row => core[block] + 1.0 + LEADER_STEP * row as f32,
    };
    let x = |i: usize| scale.x(ticks[i].rapidity);
    let want: Vec<f32> = blocks
        .iter()
        .enumerate()
        .map(|(k, block)| {
            let sum: f32 = block
                .iter()
                .enumerate()
                .map(|(row, &i)| x(i) - hang(k, row, i))
                .sum();
            sum / block.len() as f32 + boxes[k] / 2.0
        })
        .collect();
    let bounds = (scale.left + 8.0, scale.right - 8.0);
    let placed = spread(&want, &boxes, BLOCK_GAP, bounds);
    let mut names = Vec::new();
    for (k, block) in blocks.iter().enumerate() {
        let left = placed[k] - boxes[k] / 2.0;
        for (row, &i) in block.iter().enumerate() {
            let leader = left + hang(k, row, i);
            let right = match row {
                0 => left + core[k],
                _ => leader + 2.0,
            };
            names.push(CloseName {
                tick: i,
                text: texts[i].clone(),
                left: right - widths[i],
                right,
                row,
                leader,
                x: x(i),
            });
        }
    }
    names
}

/// Runs of ticks less than two points apart.
pub(super) fn bars(places: impl Iterator<Item = f32>) -> Vec<(f32, f32)> {
    let mut bars: Vec<(f32, f32)> = Vec::new();
    for x in places {
        match bars.last_mut() {
            Some(bar) if x - bar.1 < BAR_GAP => bar.1 = x,
            _ => bars.push((x, x)),
        }
    }
    bars
}

#[cfg(test)]
mod tests;
