//! Momentum arrows of an energy-momentum panel: where each begins and ends, and their sum.

use std::sync::Arc;

use kurbo::{Point, Vec2};

use super::arrow::Form;
use super::job::Job;
use super::style::{CLARET, OWNERS, TEAL};
use crate::dynamics::{Momentum, Total};
use crate::fault::{Fault, Kind, ObjectId};
use crate::marks::Ink;
use crate::num::hypot;
use crate::scene::{Arrows, Panel};
use crate::solve::Viewing;

/// One momentum arrow in the plane: x is px, y is E.
#[derive(Clone, Debug)]
pub(super) struct Vector {
    pub(super) object: ObjectId,
    pub(super) form: Form,
    pub(super) ink: Ink,
    pub(super) tail: Point,
    pub(super) tip: Point,
    pub(super) transverse_mass: f64,
    pub(super) has_across: bool,
}

/// The sum of all vectors before (or of all).
#[derive(Clone, Debug)]
pub(super) struct Sum {
    pub(super) object: ObjectId,
    pub(super) tip: Point,
    /// Its vertex: the transverse mass of the sum.
    pub(super) mass: f64,
    pub(super) has_across: bool,
    /// Its arrow is drawn: it is none of the others.
    pub(super) has_arrow: bool,
}

/// The arrows of a collision, and its sum before.
pub(super) fn of_collision(
    job: &mut Job<'_>,
    name: &Arc<str>,
    from: &Viewing,
    arrows: Arrows,
) -> (Vec<Vector>, Option<Sum>) {
    let Some(collision) = job.solved.collisions.get(name) else {
        return (Vec::new(), None);
    };
    let before = boosted(job, &collision.before, from);
    let after = boosted(job, &collision.after, from);
    let total = Total::of(&before.iter().map(|p| p.1).collect::<Vec<_>>());
    let tip = Point::new(total.px, total.energy);
    let mut vectors = Vec::new();
    for (form, ink, parts) in [(Form::Before, CLARET, &before), (Form::After, TEAL, &after)] {
        let whole = form == Form::Before || collision.balanced();
        chain(
            &mut vectors,
            parts,
            (form, |_| ink),
            arrows,
            whole.then_some(tip),
        );
    }
    let object = ObjectId {
        kind: Kind::Collision,
        name: name.clone(),
    };
    let has_arrow = before.len() != 1
        && (after.len() != 1 || arrows == Arrows::FromOrigin && !collision.balanced());
    let sum = (!before.is_empty()).then(|| sum_of(object, &total, has_arrow));
    (vectors, sum)
}

/// The arrows of the particles a panel lists, and their sum where they are chained.
pub(super) fn of_particles(
    job: &mut Job<'_>,
    field: &str,
    panel: &Panel,
    from: &Viewing,
    arrows: Arrows,
) -> (Vec<Vector>, Option<Sum>) {
    let list = if panel.collision.is_some() {
        Some(&[][..])
    } else {
        panel.particles.as_deref()
    };
    let known = &job.solved.particles;
    let names = job.chosen(list, Kind::Particle, &format!("{field}.particles"), known);
    let parts = boosted(job, &names, from);
    let total = Total::of(&parts.iter().map(|p| p.1).collect::<Vec<_>>());
    let tip = Point::new(total.px, total.energy);
    let mut vectors = Vec::new();
    let owner = |i: usize| OWNERS[i % OWNERS.len()];
    chain(
        &mut vectors,
        &parts,
        (Form::Before, owner),
        arrows,
        Some(tip),
    );
    let has_sum = arrows == Arrows::TipToTail && parts.len() > 1;
    let sum = has_sum.then(|| sum_of(job.plate.clone(), &total, true));
    (vectors, sum)
}

fn sum_of(object: ObjectId, total: &Total, has_arrow: bool) -> Sum {
    Sum {
        object,
        tip: Point::new(total.px, total.energy),
        mass: hypot(total.invariant_mass, total.py),
        has_across: total.py.abs() > ACROSS * total.momentum_scale.max(total.energy),
        has_arrow,
    }
}

/// Momentum across that is more than rounding, relative to the whole.
const ACROSS: f64 = 1e-12;

/// Particles as a frame has them; those that leave the range are left out.
fn boosted(job: &mut Job<'_>, names: &[Arc<str>], from: &Viewing) -> Vec<(ObjectId, Momentum)> {
    let mut found = Vec::new();
    for name in names {
        let Some(particle) = job.solved.particles.get(name) else {
            continue;
        };
        let id = ObjectId {
            kind: Kind::Particle,
            name: name.clone(),
        };
        match particle.momentum.boosted(from.boost) {
            Ok(momentum) => found.push((id, momentum)),
            Err(wrong) => job.names.fault(
                Fault::new(
                    id,
                    "",
                    format!("it cannot be drawn from this frame: {wrong}"),
                    "choose a slower frame",
                )
                .finding(),
            ),
        }
    }
    found
}

/// Arrows of some particles, all from the origin or each from the tip of the one before. Chained, those of `before`
/// go by rising slope and those of `after` by falling slope, so that the closed figure is convex and no two of its
/// sides cross; the last tip is put on the common one.
fn chain(
    vectors: &mut Vec<Vector>,
    parts: &[(ObjectId, Momentum)],
    (form, ink): (Form, impl Fn(usize) -> Ink),
    arrows: Arrows,
    whole: Option<Point>,
) {
    let mut order: Vec<usize> = (0..parts.len()).collect();
    if arrows == Arrows::TipToTail {
        order.sort_by(|&i, &j| {
            let slopes = parts[i].1.beta_x().total_cmp(&parts[j].1.beta_x());
            if form == Form::After {
                slopes.reverse()
            } else {
                slopes
            }
        });
    }
    let mut at = Point::ORIGIN;
    for (i, &k) in order.iter().enumerate() {
        let (object, momentum) = &parts[k];
        let step = Vec2::new(momentum.px(), momentum.energy());
        let (tail, tip) = match arrows {
            Arrows::FromOrigin => (Point::ORIGIN, step.to_point()),
            Arrows::TipToTail => {
                let last = i + 1 == order.len();
                (at, whole.filter(|_| last).unwrap_or(at + step))
            }
        };
        at = tip;
        vectors.push(Vector {
            object: object.clone(),
            form,
            ink: ink(k),
            tail,
            tip,
            transverse_mass: momentum.transverse_mass(),
            has_across: momentum.py().abs() > ACROSS * momentum.energy(),
        });
    }
}
