//! How many digits a column shows: one number of decimals for all of it, or one power-of-ten form for all of it; a
//! measured number never more than its uncertainty allows.

use crate::num::log10;
use crate::quantity::{Decimals, decimals_allowed, fixed, scientific};

/// Significant digits that the smallest entry of a column gets.
const DIGITS: i32 = 6;
/// Most figures of the largest entry, before and after the decimal sign.
const FIGURES: i32 = 9;

/// How a column's numbers are written.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Form {
    Fixed(Decimals),
    Scientific,
}

impl Form {
    /// The form for a column of numbers.
    pub(super) fn of(values: impl Iterator<Item = f64>) -> Self {
        let orders: Vec<i32> = values
            .filter(|v| *v != 0.0 && v.is_finite())
            .map(order)
            .collect();
        let Some(&high) = orders.iter().max() else {
            return Self::Fixed(Decimals(0));
        };
        if !(-4..FIGURES).contains(&high) {
            return Self::Scientific;
        }
        // What is too small to show beside the largest entry (rounding, most often) asks for no decimals.
        let shown = orders.into_iter().filter(|order| *order > high - FIGURES);
        let low = shown.min().unwrap_or(high);
        let wanted = DIGITS - 1 - low;
        let room = FIGURES - 1 - high.max(0);
        let decimals = wanted.min(room).max(0);
        let decimals = usize::try_from(decimals).unwrap_or(0);
        Self::Fixed(Decimals(decimals))
    }

    /// A number in this form, or with fewer decimals where its standard deviation allows no more.
    pub(super) fn measured(self, value: f64, deviation: f64) -> String {
        match (self, decimals_allowed(deviation)) {
            (Self::Fixed(Decimals(usual)), Some(Decimals(allowed))) => {
                fixed(value, Decimals(usual.min(allowed)))
            }
            (Self::Fixed(_) | Self::Scientific, _) => self.text(value),
        }
    }

    /// A number in this form.
    pub(super) fn text(self, value: f64) -> String {
        match self {
            Self::Fixed(decimals) => fixed(value, decimals),
            Self::Scientific => scientific(value, 6),
        }
    }
}

/// The power of ten of the first digit.
fn order(value: f64) -> i32 {
    #[expect(
        clippy::cast_possible_truncation,
        reason = "an order of magnitude is small"
    )]
    let order = log10(value.abs()).floor() as i32;
    order
}
