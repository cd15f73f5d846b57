//! Looking at a solved scene from a frame.

use super::solver::{difference, exact_difference, ticks};
use super::{RapidityTick, Solved, SolvedCollision, SolvedEvent, SolvedFrame, Viewing};
use crate::dynamics::Total;
use crate::geometry::{Boost, Displacement, Rapidity, Separation};
use crate::quantity::{Dimension, Unit, read};
use crate::scene::When;

/// Rounding allowed of a sum, relative to the sum of absolute terms.
const ROUNDING: f64 = 1e-12;

/// The rounding allowed of the difference of two sums.
pub(super) fn rounding(before: &Total, after: &Total) -> f64 {
    let scale = |t: &Total| t.energy_scale + t.momentum_scale;
    ROUNDING * (scale(before) + scale(after))
}

impl SolvedCollision {
    /// After less before: E, px, py.
    pub fn difference(&self) -> [f64; 3] {
        let (a, b) = (&self.total_after, &self.total_before);
        [a.energy - b.energy, a.px - b.px, a.py - b.py]
    }

    /// Whether E, px and py agree within the tolerance.
    pub fn balanced(&self) -> bool {
        self.difference().iter().all(|d| d.abs() <= self.tolerance)
    }
}

impl Solved {
    /// The base frame.
    pub fn base_view(&self) -> Viewing {
        Viewing {
            name: Some(self.base.clone()),
            boost: Boost::IDENTITY,
            origin: Displacement::default(),
            origin_exact: Some(zero_pair()),
        }
    }

    /// The frame that a panel or a command asks for; `None` if it names none that is sound, or a rapidity that is none.
    pub fn viewing(&self, when: &When) -> Option<Viewing> {
        match when {
            When::Base => Some(self.base_view()),
            When::Frame(name) if **name == *self.base => Some(self.base_view()),
            When::Frame(name) => {
                let (name, frame) = self.frames.get_key_value(name.as_str())?;
                Some(Viewing {
                    name: Some(name.clone()),
                    ..view_of(frame)
                })
            }
            When::Rapidity(typed) => {
                let value = read(typed, &Unit::base(Dimension::Plain))
                    .ok()?
                    .value
                    .to_f64();
                Some(self.viewing_at(Rapidity::new(value).ok()?))
            }
        }
    }

    /// A frame moving along x at a rapidity relative to the base, with the base's origin.
    pub fn viewing_at(&self, rapidity: Rapidity) -> Viewing {
        Viewing {
            name: None,
            boost: Boost::along_x(rapidity),
            ..self.base_view()
        }
    }

    /// An event as a frame has it, from that frame's origin, in time units; numbers known exactly are subtracted
    /// before rounding. None where it leaves the range of sizes that keeps every digit.
    pub fn seen(&self, event: &SolvedEvent, from: &Viewing) -> Option<Displacement> {
        let base = match (&event.exact, &from.origin_exact) {
            (Some(a), Some(b)) => exact_difference(a, b),
            _ => event.at - from.origin,
        };
        from.boost.apply(base).ok()
    }

    /// The displacement from one event to another in the base frame, and its kind within rounding: numbers known
    /// exactly are subtracted before rounding, so the kind of typed events is exact.
    pub fn between(&self, a: &SolvedEvent, b: &SolvedEvent) -> (Displacement, Separation) {
        let d = difference(b, a);
        if a.exact.is_some() && b.exact.is_some() {
            return (d, d.separation());
        }
        let off = a.rounding + b.rounding;
        let bound = d.u.abs() * off.v + d.v.abs() * off.u + 2.0 * d.y.abs() * off.y;
        (d, d.separation_within(bound))
    }

    /// Everything that has a rapidity along x relative to the base: the base itself, lines, massive particles and
    /// named frames, in the scene's order.
    pub fn rapidities(&self) -> Vec<RapidityTick> {
        ticks(self)
    }
}

fn view_of(frame: &SolvedFrame) -> Viewing {
    Viewing {
        name: None,
        boost: frame.boost,
        origin: frame.origin,
        origin_exact: frame
            .origin_exact
            .clone()
            .or_else(|| frame.origin_name.is_none().then(zero_pair)),
    }
}

fn zero_pair() -> (crate::quantity::Number, crate::quantity::Number) {
    (
        crate::quantity::Number::zero(),
        crate::quantity::Number::zero(),
    )
}
