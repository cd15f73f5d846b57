//! Whose ink: a line at rest in the base frame is ink, further owners are blue, claret, teal in the scene's order; a
//! frame wears its line's. Further lines of one ink are dashed. Frames other than the base have primes.

use std::collections::BTreeMap;
use std::sync::Arc;

use super::style::{INK, OWNERS, Style};
use crate::geometry::{Leg, Rapidity};
use crate::marks::Ink;
use crate::solve::{Solved, SolvedLine};

/// Inks of the lines and frames of one plate, the same on every panel.
#[derive(Clone, Debug, Default)]
pub(super) struct Inks {
    lines: BTreeMap<Arc<str>, (Ink, usize)>,
    /// Inks of the rapidities met.
    rapidities: BTreeMap<Order, Ink>,
    owners: usize,
    /// Frames that are not the base, in order of appearance.
    primed: BTreeMap<(Order, String), usize>,
}

/// Bits that stand in the order of the numbers they are of.
type Order = u64;

fn order(value: f64) -> Order {
    let bits = value.to_bits();
    if value.is_sign_negative() {
        !bits
    } else {
        bits | 1 << 63
    }
}

/// Rapidities closer than this are one.
const SAME: f64 = 1e-9;

impl Inks {
    /// For a plate that shows some lines.
    pub(super) fn of(solved: &Solved, shown: impl Fn(&str) -> bool) -> Self {
        let mut inks = Self::default();
        let mut used: BTreeMap<Ink, usize> = BTreeMap::new();
        for (name, line) in &solved.lines {
            if !shown(name) || is_light(line) {
                continue;
            }
            let ink = if is_at_rest(line) {
                INK
            } else {
                inks.next_owner()
            };
            for leg in line.world.legs() {
                if let Leg::Free {
                    rapidity,
                    across: _,
                } = leg
                    && inks.known(rapidity.value()).is_none()
                {
                    inks.rapidities.insert(order(rapidity.value()), ink);
                }
            }
            let count = used.entry(ink).or_insert(0);
            inks.lines.insert(name.clone(), (ink, *count));
            *count += 1;
        }
        inks
    }

    fn next_owner(&mut self) -> Ink {
        self.owners += 1;
        OWNERS[(self.owners - 1) % OWNERS.len()]
    }

    fn known(&self, rapidity: f64) -> Option<Ink> {
        self.rapidities
            .range(order(rapidity - SAME)..=order(rapidity + SAME))
            .next()
            .map(|(_, ink)| *ink)
    }

    /// A line's ink and dash.
    pub(super) fn line(&self, name: &str, style: &Style) -> (Ink, Option<[f64; 2]>) {
        let (ink, count) = self.lines.get(name).copied().unwrap_or((INK, 0));
        let dashes = style.line_dashes;
        (
            ink,
            count
                .checked_sub(1)
                .map(|i| dashes[i.min(dashes.len() - 1)]),
        )
    }

    /// The ink of a frame at some rapidity relative to the base.
    pub(super) fn frame(&mut self, rapidity: Rapidity) -> Ink {
        let rapidity = rapidity.value();
        if rapidity.abs() <= SAME {
            return INK;
        }
        self.known(rapidity).unwrap_or_else(|| {
            let ink = self.next_owner();
            self.rapidities.insert(order(rapidity), ink);
            ink
        })
    }

    /// How many primes a frame's symbols have: none for the base, then one more for each further frame of the plate.
    pub(super) fn primes(&mut self, name: &str, rapidity: Rapidity, is_base: bool) -> usize {
        if is_base {
            return 0;
        }
        let next = self.primed.len() + 1;
        let key = (order(rapidity.value()), name.to_owned());
        *self.primed.entry(key).or_insert(next)
    }
}

/// True for a light pulse.
pub(super) fn is_light(line: &SolvedLine) -> bool {
    line.world
        .legs()
        .iter()
        .any(|leg| matches!(leg, Leg::Light(_)))
}

fn is_at_rest(line: &SolvedLine) -> bool {
    line.world.legs().iter().all(|leg| match leg {
        Leg::Free {
            rapidity,
            across: _,
        } => rapidity.value() == 0.0,
        Leg::Light(_) => false,
    })
}
