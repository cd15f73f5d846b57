//! Worldlines.

use super::velocity::{toward, velocity};
use crate::quantity::Typed;
use crate::scene::Line;
use crate::scene::faults::Faults;
use crate::scene::fields::Form;
use crate::scene::tree::Value;
use crate::scene::values::{number, pair, text, texts, unknown};

/// The forms of a line.
const FORMS: [&str; 4] = ["Free", "Broken", "Light", "Follows"];

const FREE: [&str; 8] = [
    "through", "velocity", "toward", "frame", "rapidity", "clock", "from", "until",
];

/// Reads a line.
pub(in crate::scene) fn line<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<Line> {
    match value.word() {
        "Free" => free(value, faults),
        "Broken" => {
            let form = Form::open(value, &["through", "clock"], Some("through"), faults);
            let through = form.need("through", faults, texts);
            let clock = form.may("clock", faults, clock)?;
            Some(Line::Broken {
                through: through?,
                clock,
            })
        }
        "Light" => {
            let names = &["through", "toward", "from", "until"];
            let form = Form::open(value, names, None, faults);
            let through = form.need("through", faults, text);
            let toward = form.need("toward", faults, toward);
            let from = form.may("from", faults, text);
            let until = form.may("until", faults, text)?;
            Some(Line::Light {
                through: through?,
                toward: toward?,
                from: from?,
                until,
            })
        }
        "Follows" => {
            let names = &["particle", "through", "clock", "from", "until"];
            let form = Form::open(value, names, None, faults);
            let particle = form.need("particle", faults, text);
            let through = form.need("through", faults, text);
            let clock = form.may("clock", faults, clock);
            let from = form.may("from", faults, text);
            let until = form.may("until", faults, text)?;
            Some(Line::Follows {
                particle: particle?,
                through: through?,
                clock: clock?,
                from: from?,
                until,
            })
        }
        _ => unknown(value, "a line", FORMS.into_iter(), faults),
    }
}

fn free<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<Line> {
    let form = Form::open(value, &FREE, None, faults);
    let through = form.need("through", faults, text);
    let velocity = form.need("velocity", faults, velocity);
    let toward = form.may("toward", faults, toward);
    let when = form.when(faults);
    let clock = form.may("clock", faults, clock);
    let from = form.may("from", faults, text);
    let until = form.may("until", faults, text)?;
    Some(Line::Free {
        through: through?,
        velocity: velocity?,
        toward: toward?,
        when: when?,
        clock: clock?,
        from: from?,
        until,
    })
}

/// An event and the clock's reading there.
fn clock<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<(String, Typed)> {
    pair(value, faults, text, number)
}
