//! Ticks: steps of 1, 2, 5 times a power of ten, equal decimals on an axis, no number at 0.

use super::whole::integer;
use crate::quantity::{Decimals, fixed};

/// The distance between ticks: `mantissa` (1, 2 or 5) times ten to `exponent`.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) struct Step {
    mantissa: i64,
    exponent: i32,
}

/// One tick.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Tick {
    /// How many steps from 0.
    pub(super) count: i64,
    /// Where, in the axis' unit.
    pub(super) value: f64,
}

/// The ticks of an axis and how their numbers are written.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Ticks {
    /// The step.
    pub(super) step: Step,
    /// Inside the axis, ascending.
    pub(super) marks: Vec<Tick>,
    /// Numbers are in units of ten to this power.
    pub(super) power: i32,
}

/// More ticks than this are no help.
const MOST: i64 = 200;
/// Beyond this many steps from 0 neighbours are no longer told apart by their digits.
const FARTHEST: f64 = 1e13;
/// Numbers with more digits than this before or after the decimal sign are written with a power of ten.
const MOST_DIGITS: i32 = 4;

impl Step {
    /// The least step of at least `least`.
    pub(super) fn at_least(least: f64) -> Option<Self> {
        if !(least > 0.0 && least.is_finite()) {
            return None;
        }
        let exponent = leading_power(least);
        let choices = [
            (1, exponent),
            (2, exponent),
            (5, exponent),
            (1, exponent + 1),
        ];
        choices
            .into_iter()
            .map(|(mantissa, exponent)| Self { mantissa, exponent })
            .find(|step| step.times(1) >= least * (1.0 - 1e-12))
    }

    /// So many steps, correctly rounded.
    pub(super) fn times(self, count: i64) -> f64 {
        decimal(count * self.mantissa, self.exponent)
    }

    /// Half of so many steps.
    fn half(self, count: i64) -> f64 {
        decimal(count * self.mantissa * 5, self.exponent - 1)
    }

    /// Half steps strictly between two values.
    pub(super) fn halves(self, low: f64, high: f64) -> Vec<f64> {
        let (first, last) = self.counts(low, high);
        (first - 1..=last)
            .map(|count| self.half(2 * count + 1))
            .filter(|v| low < *v && *v < high)
            .collect()
    }

    fn counts(self, low: f64, high: f64) -> (i64, i64) {
        let step = self.times(1);
        let (first, last) = ((low / step).ceil(), (high / step).floor());
        if first.abs() > FARTHEST || last.abs() > FARTHEST {
            return (1, 0);
        }
        let (first, last) = (integer(first), integer(last));
        if last - first > MOST {
            (1, 0)
        } else {
            (first, last)
        }
    }
}

/// The power of ten of the leading digit of a finite number above 0.
fn leading_power(value: f64) -> i32 {
    let text = format!("{value:e}");
    text.split_once('e')
        .and_then(|(_, e)| e.parse().ok())
        .unwrap_or(0)
}

/// `digits` times ten to `exponent`, correctly rounded.
fn decimal(digits: i64, exponent: i32) -> f64 {
    format!("{digits}e{exponent}").parse().unwrap_or(f64::NAN)
}

impl Ticks {
    /// Those strictly inside an axis that runs from `low` to `high`, at least `apart` from each other.
    pub(super) fn between(low: f64, high: f64, apart: f64) -> Self {
        let step = Step::at_least(apart).unwrap_or(Step {
            mantissa: 1,
            exponent: 0,
        });
        let (first, last) = step.counts(low, high);
        let marks: Vec<Tick> = (first..=last)
            .map(|count| Tick {
                count,
                value: step.times(count),
            })
            .filter(|tick| low < tick.value && tick.value < high)
            .collect();
        let largest = marks.iter().map(|t| t.value.abs()).fold(0.0, f64::max);
        let leading = if largest > 0.0 {
            leading_power(largest)
        } else {
            0
        };
        let large = leading > MOST_DIGITS;
        let small = step.exponent < -MOST_DIGITS + 1 && leading < 0;
        let power = if large || small { leading } else { 0 };
        Self { step, marks, power }
    }

    /// A tick's number, plain ASCII.
    pub(super) fn text(&self, count: i64) -> String {
        let decimals = usize::try_from(self.power - self.step.exponent).unwrap_or(0);
        let value = decimal(count * self.step.mantissa, self.step.exponent - self.power);
        fixed(value, Decimals(decimals))
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn texts(low: f64, high: f64, apart: f64) -> Vec<String> {
        let ticks = Ticks::between(low, high, apart);
        ticks.marks.iter().map(|t| ticks.text(t.count)).collect()
    }

    #[test]
    fn steps_are_one_two_five() {
        assert_eq!(texts(-1.4, 4.0, 0.83), ["-1", "0", "1", "2", "3"]);
        assert_eq!(texts(0.0, 1.0, 0.11), ["0.2", "0.4", "0.6", "0.8"]);
        assert_eq!(texts(-12.0, 12.0, 3.0), ["-10", "-5", "0", "5", "10"]);
    }

    #[test]
    fn decimals_are_equal_on_an_axis() {
        assert_eq!(texts(0.0, 2.1, 0.3), ["0.5", "1.0", "1.5", "2.0"]);
    }

    #[test]
    fn far_and_small_values_take_a_power_of_ten() {
        let ticks = Ticks::between(0.0, 3.2e8, 1e8);
        assert_eq!((ticks.power, ticks.text(2)), (8, "2".to_owned()));
        let ticks = Ticks::between(0.0, 3.2e-7, 1e-7);
        assert_eq!((ticks.power, ticks.text(3)), (-7, "3".to_owned()));
    }

    #[test]
    fn an_axis_that_cannot_be_told_apart_has_no_ticks() {
        assert!(Ticks::between(1e20, 1e20 + 1e5, 1.0).marks.is_empty());
        assert!(Ticks::between(0.0, 1.0, f64::NAN).marks.len() < 2);
    }
}
