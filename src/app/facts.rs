//! Short facts of objects, from the ledger, as people read them.

use super::context::Context;
use crate::fault::{Kind, ObjectId};
use crate::quantity::{grouped, significant};

fn number(value: f64) -> String {
    let text = significant(value, 6);
    let text = if text.contains('.') && !text.contains('e') {
        text.trim_end_matches('0').trim_end_matches('.')
    } else {
        &text
    };
    grouped(text)
}

/// An object's coordinates in the viewing frame: "t 35.0 ns, x 0 c ns".
pub(super) fn coordinates(object: &ObjectId, context: &Context<'_>) -> Option<String> {
    let ledger = context.shown.ledger.as_ref()?;
    let units = &ledger.units;
    let name = &*object.name;
    match object.kind {
        Kind::Event => ledger.events.iter().find(|e| e.name == name).map(|e| {
            let (t, x) = (number(e.t), number(e.x));
            format!("t {t} {}, x {x} {}", units.time, units.length)
        }),
        Kind::Line => ledger
            .lines
            .iter()
            .find(|l| l.name == name)
            .map(|l| match l.beta {
                Some(beta) => format!("β {}", number(beta)),
                None => "bends".to_owned(),
            }),
        Kind::Particle => ledger.particles.iter().find(|p| p.name == name).map(|p| {
            let (e, px) = (number(p.energy), number(p.momentum[0]));
            format!("E {e} {0}, px {px} {0}/c", units.energy)
        }),
        Kind::Collision => ledger.collisions.iter().find(|c| c.name == name).map(|c| {
            let balance = if c.balanced {
                "balances"
            } else {
                "does not balance"
            };
            format!("{balance}, root s {} {}", number(c.root_s), units.energy)
        }),
        Kind::Frame | Kind::Plate | Kind::Scene | Kind::Species => None,
    }
}

/// One quiet fact beside an object's name in the list.
pub(super) fn aside(object: &ObjectId, context: &Context<'_>) -> String {
    let scene = &context.document.opened.scene;
    let name = &*object.name;
    match object.kind {
        Kind::Event => scene.events.get(name).map(|o| event(&o.form)),
        Kind::Line => scene.lines.get(name).map(|o| line(name, &o.form, context)),
        Kind::Particle => scene.particles.get(name).map(|o| {
            o.form
                .species
                .as_deref()
                .unwrap_or_default()
                .replace('-', "\u{2212}")
        }),
        Kind::Collision => scene
            .collisions
            .get(name)
            .map(|o| format!("{} in, {} out", o.form.before.len(), o.form.after.len())),
        Kind::Frame if scene.base == name => Some("base".to_owned()),
        Kind::Frame => scene.frames.get(name).map(|o| frame(&o.form)),
        Kind::Plate => scene.plates.get(name).map(|o| match o.form.panels.len() {
            1 => "1 panel".to_owned(),
            count => format!("{count} panels"),
        }),
        Kind::Scene | Kind::Species => None,
    }
    .unwrap_or_default()
}

fn typed(value: &crate::quantity::Typed) -> String {
    match value {
        crate::quantity::Typed::Bare(text) | crate::quantity::Typed::Text(text) => {
            text.replace('-', "\u{2212}")
        }
    }
}

fn event(event: &crate::scene::Event) -> String {
    use crate::scene::Event;
    match event {
        Event::At { t, x, .. } => format!("{}, {}", typed(t), typed(x)),
        Event::Along { line, clock } => format!("{line}, {}", typed(clock)),
        Event::Meeting { of: [a, b] } => format!("{a} meets {b}"),
        Event::LightFrom { event, .. } => format!("light from {event}"),
    }
}

fn line(name: &str, line: &crate::scene::Line, context: &Context<'_>) -> String {
    use crate::scene::{Line, Toward, Velocity};
    match line {
        Line::Free { velocity, .. } => match velocity {
            _ if name == context.document.opened.scene.base => "base".to_owned(),
            Velocity::Beta(v) => format!("β {}", typed(v)),
            Velocity::Gamma(v) => format!("γ {}", typed(v)),
            Velocity::Celerity(v) => format!("βγ {}", typed(v)),
            Velocity::Rapidity(v) => format!("rapidity {}", typed(v)),
            Velocity::Doppler(v) => format!("k {}", typed(v)),
            Velocity::BehindLight(v) => format!("1 \u{2212} β {}", typed(v)),
        },
        Line::Broken { through, .. } => format!("through {}", through.len()),
        Line::Light {
            toward: Toward::Plus,
            ..
        } => "light, +x".to_owned(),
        Line::Light {
            toward: Toward::Minus,
            ..
        } => "light, \u{2212}x".to_owned(),
        Line::Follows { particle, .. } => format!("of {particle}"),
    }
}

fn frame(frame: &crate::scene::Frame) -> String {
    use crate::scene::{FramePart, LineOrParticle};
    match &frame.part {
        FramePart::Moving { .. } => "moving".to_owned(),
        FramePart::RestOf(LineOrParticle::Line { line, .. }) => format!("rest of {line}"),
        FramePart::RestOf(LineOrParticle::Particle(particle)) => format!("rest of {particle}"),
        FramePart::CentreOfMomentum { .. } => "centre of momentum".to_owned(),
    }
}
