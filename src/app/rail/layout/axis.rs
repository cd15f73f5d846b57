//! An axis of rapidity: its range, its scale, its numbers and strokes.
#![expect(
    clippy::cast_possible_truncation,
    reason = "the screen is in f32 points"
)]

use crate::num;
use crate::quantity::{Decimals, fixed, grouped};

const NUMBER_GAP: f32 = 64.0;

/// The range of rapidity that holds all of these: 0.1 beyond, outward to halves, at least 2 wide.
pub(in crate::app::rail) fn whole(rapidities: impl IntoIterator<Item = f64>) -> (f64, f64) {
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
pub(in crate::app::rail) struct Scale {
    pub(in crate::app::rail) low: f64,
    pub(in crate::app::rail) high: f64,
    pub(in crate::app::rail) left: f32,
    pub(in crate::app::rail) right: f32,
}

impl Scale {
    pub(in crate::app::rail) fn x(&self, rapidity: f64) -> f32 {
        let part = (rapidity - self.low) / (self.high - self.low);
        self.left + (part * f64::from(self.right - self.left)) as f32
    }

    pub(in crate::app::rail) fn rapidity(&self, x: f32) -> f64 {
        let part = f64::from(x - self.left) / f64::from(self.right - self.left);
        self.low + part * (self.high - self.low)
    }

    /// The rapidity at a point, no finer than a point is wide.
    pub(in crate::app::rail) fn pointed(&self, x: f32) -> f64 {
        let grain = self.per_point();
        let step = nice_below(grain);
        let rapidity = self.rapidity(x).clamp(self.low, self.high);
        step.times((rapidity / step.value()).round())
    }

    fn per_point(&self) -> f64 {
        (self.high - self.low) / f64::from(self.right - self.left)
    }

    pub(super) fn holds(&self, rapidity: f64) -> bool {
        let slack = (self.high - self.low) * 1e-9;
        (self.low - slack..=self.high + slack).contains(&rapidity)
    }
}

/// 1, 2 or 5 times a power of ten, kept so that multiples come out as their decimals.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(in crate::app::rail) struct Step {
    pub(super) digit: f64,
    pub(super) power: i32,
}

impl Step {
    pub(in crate::app::rail) fn value(self) -> f64 {
        self.times(1.0)
    }

    /// A multiple of it.
    pub(in crate::app::rail) fn times(self, count: f64) -> f64 {
        let scale = num::pow(10.0, f64::from(self.power.abs()));
        if self.power < 0 {
            count * self.digit / scale
        } else {
            count * self.digit * scale
        }
    }

    pub(super) fn decimals(self) -> Decimals {
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
pub(in crate::app::rail) fn key_step(span: f64) -> f64 {
    nice_below(span / 100.0 * 1.000_001).value()
}

/// Numbers and strokes under an axis.
#[derive(Clone, Debug, PartialEq, Default)]
pub(in crate::app::rail) struct Graduation {
    pub(in crate::app::rail) numbers: Vec<(f32, String)>,
    pub(in crate::app::rail) strokes: Vec<f32>,
}

/// Numbers every half and strokes every tenth; by 1-2-5 where that would crowd or leave the axis bare.
pub(in crate::app::rail) fn graduate(scale: &Scale) -> Graduation {
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
