//! Particles.

use super::velocity::{self, one_number, toward};
use crate::scene::faults::Faults;
use crate::scene::fields::Form;
use crate::scene::tree::Value;
use crate::scene::values::{bare_word, number, text, unknown};
use crate::scene::{Particle, State};

const FIELDS: [&str; 7] = [
    "species", "mass", "state", "angle", "toward", "frame", "rapidity",
];

/// The forms of a state beside those of a velocity.
const STATES: [&str; 7] = [
    "Kinetic",
    "Energy",
    "Momentum",
    "Components",
    "Longitudinal",
    "AtRest",
    "Closing",
];

/// Reads a particle.
pub(in crate::scene) fn particle<'a>(
    value: Value<'a>,
    faults: &mut Faults<'a>,
) -> Option<Particle> {
    let form = Form::anonymous(value, &FIELDS, faults);
    let species = form.may("species", faults, text);
    let mass = form.may("mass", faults, number);
    let state = form.need("state", faults, state);
    let angle = form.may("angle", faults, number);
    let toward = form.may("toward", faults, toward);
    let when = form.when(faults)?;
    Some(Particle {
        species: species?,
        mass: mass?,
        state: state?,
        angle: angle?,
        toward: toward?,
        when,
    })
}

fn state<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<State> {
    match value.word() {
        "Kinetic" => one_number(value, faults).map(State::Kinetic),
        "Energy" => one_number(value, faults).map(State::Energy),
        "Momentum" => one_number(value, faults).map(State::Momentum),
        "Components" => {
            let form = Form::open(value, &["px", "py"], None, faults);
            let px = form.need("px", faults, number);
            let py = form.need("py", faults, number)?;
            Some(State::Components { px: px?, py })
        }
        "Longitudinal" => {
            let form = Form::open(value, &["rapidity", "py"], None, faults);
            let rapidity = form.need("rapidity", faults, number);
            let py = form.need("py", faults, number)?;
            Some(State::Longitudinal {
                rapidity: rapidity?,
                py,
            })
        }
        "AtRest" => bare_word(value, "AtRest", faults).map(|()| State::AtRest),
        "Closing" => bare_word(value, "Closing", faults).map(|()| State::Closing),
        word if velocity::form(word).is_some() => {
            velocity::velocity(value, faults).map(State::Velocity)
        }
        _ => {
            let words = STATES.into_iter().chain(velocity::FORMS);
            unknown(value, "a state", words, faults)
        }
    }
}
