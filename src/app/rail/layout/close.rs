//! A close-up of a crowd: names in blocks of three, with leaders that never cross.

use std::ops::Range;

use super::axis::Scale;
use super::{EDGE, Measure, Name, Tick, spread};

const BLOCK_GAP: f32 = 10.0;
/// How much wider a block of three names is than the widest of them.
const BLOCK_EXTRA: f32 = 16.0;
const LEADER_STEP: f32 = 5.0;
const BAR_GAP: f32 = 2.0;

/// A name of a close-up.
#[derive(Clone, Debug, PartialEq)]
pub(in crate::app::rail) struct CloseName {
    pub(in crate::app::rail) tick: usize,
    pub(in crate::app::rail) text: String,
    pub(in crate::app::rail) left: f32,
    pub(in crate::app::rail) right: f32,
    /// Which of the three rows, from below.
    pub(in crate::app::rail) row: usize,
    /// Where its leader hangs.
    pub(in crate::app::rail) leader: f32,
    /// Where its tick stands.
    pub(in crate::app::rail) x: f32,
}

/// A stretch of the axis, drawn larger.
#[derive(Clone, Debug, PartialEq)]
pub(in crate::app::rail) struct CloseUp {
    pub(in crate::app::rail) scale: Scale,
    pub(in crate::app::rail) ticks: Range<usize>,
    pub(in crate::app::rail) names: Vec<CloseName>,
    /// Runs of ticks too close to tell apart, from and to.
    pub(in crate::app::rail) bars: Vec<(f32, f32)>,
}

/// The close-up of a bracket.
pub(in crate::app::rail) fn close_up(
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
pub(in crate::app::rail) fn bars(places: impl Iterator<Item = f32>) -> Vec<(f32, f32)> {
    let mut bars: Vec<(f32, f32)> = Vec::new();
    for x in places {
        match bars.last_mut() {
            Some(bar) if x - bar.1 < BAR_GAP => bar.1 = x,
            _ => bars.push((x, x)),
        }
    }
    bars
}
