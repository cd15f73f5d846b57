//! Velocities and directions.

use crate::quantity::Typed;
use crate::scene::faults::Faults;
use crate::scene::tree::{Shape, Value};
use crate::scene::values::{number, one_of, unknown};
use crate::scene::{Toward, Velocity};

/// The forms of a velocity.
pub(super) const FORMS: [&str; 6] = [
    "Beta",
    "Gamma",
    "Celerity",
    "Rapidity",
    "Doppler",
    "BehindLight",
];

/// Reads a velocity.
pub(super) fn velocity<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<Velocity> {
    match form(value.word()) {
        Some(form) => one_number(value, faults).map(form),
        None => unknown(value, "a velocity", FORMS.into_iter(), faults),
    }
}

/// The form that a word begins.
pub(super) fn form(word: &str) -> Option<fn(Typed) -> Velocity> {
    Some(match word {
        "Beta" => Velocity::Beta,
        "Gamma" => Velocity::Gamma,
        "Celerity" => Velocity::Celerity,
        "Rapidity" => Velocity::Rapidity,
        "Doppler" => Velocity::Doppler,
        "BehindLight" => Velocity::BehindLight,
        _ => return None,
    })
}

/// Reads the one number of a form in which it stands bare.
pub(super) fn one_number<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<Typed> {
    if let Some(bare) = value.bare() {
        return number(bare, faults);
    }
    let word = value.word();
    let unit_apart = value.shape() == Shape::Round && value.len() == 2;
    let what = format!("`{word}` takes one number");
    let mend = if unit_apart {
        format!("write it alone, a unit in quotes with it: `{word}(\"..\")`")
    } else {
        format!("write it alone in the brackets: `{word}(..)`")
    };
    faults.add(value.start(), what, mend);
    None
}

/// Reads which way along x.
pub(super) fn toward<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<Toward> {
    one_of(
        value,
        faults,
        &[("Plus", Toward::Plus), ("Minus", Toward::Minus)],
    )
}
