//! Named frames.

use super::velocity::{toward, velocity};
use crate::scene::faults::Faults;
use crate::scene::fields::Form;
use crate::scene::tree::{Shape, Value};
use crate::scene::values::{number, text, texts, unknown};
use crate::scene::{Frame, FramePart, LineOrParticle, Whole};

/// The forms of a frame.
const FORMS: [&str; 3] = ["Moving", "RestOf", "CentreOfMomentum"];

const MOVING: [&str; 6] = ["velocity", "toward", "angle", "frame", "rapidity", "origin"];

/// Reads a frame.
pub(in crate::scene) fn frame<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<Frame> {
    match value.word() {
        "Moving" => {
            let form = Form::open(value, &MOVING, Some("velocity"), faults);
            let velocity = form.need("velocity", faults, velocity);
            let toward = form.may("toward", faults, toward);
            let angle = form.may("angle", faults, number);
            let when = form.when(faults);
            let origin = form.may("origin", faults, text)?;
            let part = FramePart::Moving {
                velocity: velocity?,
                toward: toward?,
                angle: angle?,
                when: when?,
            };
            Some(Frame { part, origin })
        }
        "RestOf" => {
            let names = &["line", "particle", "at", "origin"];
            let form = Form::open(value, names, None, faults);
            let whose = rest_of(value, &form, faults);
            let origin = form.may("origin", faults, text)?;
            let part = FramePart::RestOf(whose?);
            Some(Frame { part, origin })
        }
        "CentreOfMomentum" => {
            let form = Form::open(value, &["of", "origin"], Some("of"), faults);
            let of = form.need("of", faults, name_or_names);
            let origin = form.may("origin", faults, text)?;
            let part = FramePart::CentreOfMomentum { of: of? };
            Some(Frame { part, origin })
        }
        _ => unknown(value, "a frame", FORMS.into_iter(), faults),
    }
}

fn rest_of<'a>(
    value: Value<'a>,
    form: &Form<'a>,
    faults: &mut Faults<'a>,
) -> Option<LineOrParticle> {
    let (line, particle) = (form.has("line"), form.has("particle"));
    if line && particle {
        let what = "a frame is the rest frame of a line or of a particle, not of both";
        faults.add(value.start(), what, "delete `line` or `particle`");
        return None;
    }
    if particle && form.has("at") {
        let what = "`at` belongs to a line, not to a particle";
        faults.add(value.start(), what, "delete `at`");
        return None;
    }
    if particle {
        let particle = form.need("particle", faults, text)?;
        return Some(LineOrParticle::Particle(particle));
    }
    let line = form.need("line", faults, text);
    let at = form.may("at", faults, text)?;
    Some(LineOrParticle::Line { line: line?, at })
}

/// The name of a collision, or a list of particles.
fn name_or_names<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<Whole> {
    if value.shape() == Shape::Square {
        texts(value, faults).map(Whole::Particles)
    } else {
        text(value, faults).map(Whole::Collision)
    }
}
