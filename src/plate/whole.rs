//! Whole numbers of f64, saturating: the one place where the plate casts.

/// A count; 0 for what is negative or no number.
#[expect(
    clippy::cast_possible_truncation,
    clippy::cast_sign_loss,
    reason = "the cast saturates, which is what is wanted"
)]
pub(super) fn count(value: f64) -> usize {
    value as usize
}

/// An integer; 0 for what is no number.
#[expect(
    clippy::cast_possible_truncation,
    reason = "the cast saturates, which is what is wanted"
)]
pub(super) fn integer(value: f64) -> i64 {
    value as i64
}
