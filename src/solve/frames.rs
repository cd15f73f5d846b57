//! Named frames: moving, rest frames, centre of momentum, each with its origin.

use super::SolvedFrame;
use super::solver::{Solver, Spoiled, fault};
use super::velocity;
use crate::dynamics::{Momentum, Total};
use crate::fault::ObjectId;
use crate::geometry::{Angle, Boost, Displacement, Leg, Rapidity};
use crate::quantity::{Dimension, Typed, Unit};
use crate::scene::{FramePart, LineOrParticle, Toward, Velocity, When, Whole};

pub(super) fn solve(solver: &mut Solver<'_>, id: &ObjectId) -> Result<SolvedFrame, Spoiled> {
    let object = solver.scene.frames.get(&id.name).ok_or(None)?.clone();
    let boost = match &object.form.part {
        FramePart::Moving {
            velocity,
            toward,
            angle,
            when,
        } => moving(solver, id, (velocity, *toward), angle.as_ref(), when)?,
        FramePart::RestOf(LineOrParticle::Line { line, at }) => {
            rest_of_line(solver, id, line, at.as_deref())?
        }
        FramePart::RestOf(LineOrParticle::Particle(name)) => {
            let momentum = solver.particle(name)?.momentum;
            momentum
                .rest_frame()
                .map_err(|e| fault(id, "particle", e.to_string(), "name a particle with mass"))?
        }
        FramePart::CentreOfMomentum { of } => centre(solver, id, of)?,
    };
    let origin = object.form.origin.as_deref();
    let event = origin.map(|name| solver.event(name)).transpose()?;
    Ok(SolvedFrame {
        boost,
        origin: event.map_or_else(Displacement::default, |e| e.at),
        origin_rounding: event.map_or_else(Displacement::default, |e| e.rounding),
        origin_exact: event.and_then(|e| e.exact.clone()),
        origin_name: origin.map(Into::into),
        label: object.common.label.clone(),
    })
}

fn moving(
    solver: &mut Solver<'_>,
    id: &ObjectId,
    (form, toward): (&Velocity, Option<Toward>),
    angle: Option<&Typed>,
    when: &When,
) -> Result<Boost, Spoiled> {
    let typing = velocity::read(id, "velocity", form, toward)?;
    solver.faults.extend(typing.finding);
    let angle = match angle {
        Some(typed) => Angle::from_degrees(degrees(id, typed)?),
        None => Angle::ZERO,
    };
    let boost = Boost::new(typing.rapidity, angle);
    let Some(frame) = named(solver, id, when)? else {
        return Ok(boost);
    };
    let (whole, _rotation) = frame
        .boost
        .then(boost)
        .map_err(|e| fault(id, "velocity", e.to_string(), "choose a slower one"))?;
    Ok(whole)
}

fn rest_of_line(
    solver: &Solver<'_>,
    id: &ObjectId,
    name: &str,
    at: Option<&str>,
) -> Result<Boost, Spoiled> {
    let world = &solver.line(name)?.world;
    let leg = match (at, world.legs()) {
        (None, &[leg]) => leg,
        (None, _) => {
            let what = format!("line {name} bends, so it has a rest frame only at an event");
            return Err(fault(id, "line", what, "say at which event: at: \"..\""));
        }
        (Some(event), _) => {
            let place = solver.event(event)?.at;
            let (off, bound) = world.distance(place);
            if off > bound {
                let what = format!("event {event} does not lie on line {name}");
                return Err(fault(id, "at", what, "name an event on the line"));
            }
            world.leg_at(place)
        }
    };
    match leg {
        Leg::Free {
            rapidity,
            across: 0.0,
        } => Ok(Boost::along_x(rapidity)),
        Leg::Free { rapidity, across } => Momentum::longitudinal(1.0, rapidity, across)
            .and_then(|p| p.rest_frame())
            .map_err(|e| fault(id, "line", e.to_string(), "name a slower line")),
        Leg::Light(_) => Err(fault(
            id,
            "line",
            format!("line {name} is light, which has no rest frame"),
            "name a line slower than light",
        )),
    }
}

fn centre(solver: &Solver<'_>, id: &ObjectId, of: &Whole) -> Result<Boost, Spoiled> {
    let total = match of {
        Whole::Collision(name) => solver.collision(name)?.total_before,
        Whole::Particles(particles) => {
            let parts: Result<Vec<Momentum>, Spoiled> = particles
                .iter()
                .map(|name| Ok(solver.particle(name)?.momentum))
                .collect();
            Total::of(&parts?)
        }
    };
    total.centre_of_momentum().map_err(|e| {
        fault(
            id,
            "of",
            e.to_string(),
            "take more than parallel light, and at least one particle",
        )
    })
}

/// An angle in degrees.
pub(super) fn degrees(id: &ObjectId, typed: &Typed) -> Result<f64, Spoiled> {
    Ok(
        Solver::quantity(id, "angle", typed, &Unit::base(Dimension::Angle))?
            .value
            .to_f64(),
    )
}

/// The frame a thing is as typed in; none for the base. The graph has seen to it that a name is there.
pub(super) fn named(
    solver: &Solver<'_>,
    id: &ObjectId,
    when: &When,
) -> Result<Option<SolvedFrame>, Spoiled> {
    match when {
        When::Base => Ok(None),
        When::Frame(name) if *name == solver.scene.base => Ok(None),
        When::Frame(name) => solver.frame(name).map(|f| Some(f.clone())),
        When::Rapidity(typed) => {
            let value =
                Solver::quantity(id, "rapidity", typed, &Unit::base(Dimension::Plain))?.value;
            let rapidity = Rapidity::new(value.to_f64()).map_err(|e| {
                fault(
                    id,
                    "rapidity",
                    e.to_string(),
                    "a rapidity lies between -600 and 600",
                )
            })?;
            Ok(Some(SolvedFrame {
                boost: Boost::along_x(rapidity),
                origin: Displacement::default(),
                origin_rounding: Displacement::default(),
                origin_exact: None,
                origin_name: None,
                label: None,
            }))
        }
    }
}

/// The longitudinal rapidity of a frame, and its speed across in the frame that shares that rapidity.
pub(super) fn along_and_across(boost: Boost) -> (f64, f64) {
    if boost.is_along_x() {
        return (boost.rapidity().value(), 0.0);
    }
    let moving = Momentum::moving(1.0, boost.rapidity(), boost.angle());
    moving.map_or((0.0, 0.0), |p| {
        (p.rapidity().unwrap_or(0.0), p.py() / p.transverse_mass())
    })
}
