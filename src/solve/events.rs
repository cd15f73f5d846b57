//! Events: by coordinates, along a line, where lines meet, where light meets a line.

use super::SolvedEvent;
use super::frames;
use super::solver::{Solver, Spoiled, fault};
use crate::fault::{Fault, ObjectId};
use crate::geometry::{Displacement, GeometryError};
use crate::num::exp;
use crate::quantity::Typed;
use crate::scene::{Event, When};

pub(super) fn solve(solver: &mut Solver<'_>, id: &ObjectId) -> Result<SolvedEvent, Spoiled> {
    let object = solver.scene.events.get(&id.name).ok_or(None)?.clone();
    let label = object.common.label.clone();
    let derived = |at: Displacement| SolvedEvent {
        at,
        rounding: everywhere(DERIVED * largest(at)),
        exact: None,
        stated: None,
        label: label.clone(),
    };
    match &object.form {
        Event::At { t, x, when } => {
            at(solver, id, (t, x), when).map(|event| SolvedEvent { label, ..event })
        }
        Event::Along { line, clock } => {
            let world = &solver.line(line)?.world;
            let reading = Solver::quantity(id, "clock", clock, &solver.units.solved.time)?;
            let at = world
                .at_clock(reading.value.to_f64())
                .map_err(|e| no_event(id, "line", &e))?;
            Ok(derived(at))
        }
        Event::Meeting { of } => {
            let (a, b) = (&solver.line(&of[0])?.world, &solver.line(&of[1])?.world);
            Ok(derived(a.meeting(b).map_err(|e| no_event(id, "of", &e))?))
        }
        Event::LightFrom { event, meets } => {
            let from = solver.event(event)?;
            let world = &solver.line(meets)?.world;
            let met = world.light_from(from.at);
            let mut found = derived(met.map_err(|e| no_event(id, "meets", &e))?);
            // The null coordinate that the light keeps is as good as that of the event it leaves from.
            if found.at.u == from.at.u {
                found.rounding.u = from.rounding.u;
            }
            if found.at.v == from.at.v {
                found.rounding.v = from.rounding.v;
            }
            if found.at == from.at {
                let what = format!(
                    "event {event} lies on line {meets} itself, so the light meets it at once"
                );
                let finding = Fault::new(
                    id.clone(),
                    "meets",
                    what,
                    "name the line that the light goes to",
                );
                solver.faults.push(finding.finding());
            }
            Ok(found)
        }
    }
}

fn no_event(id: &ObjectId, field: &str, error: &GeometryError) -> Spoiled {
    fault(
        id,
        field,
        error.to_string(),
        "name another line, or give the event by its coordinates",
    )
}

/// An event by its coordinates in a frame. In the base they are kept exact.
fn at(
    solver: &Solver<'_>,
    id: &ObjectId,
    (t, x): (&Typed, &Typed),
    when: &When,
) -> Result<SolvedEvent, Spoiled> {
    let units = &solver.units;
    let t = Solver::quantity(id, "t", t, &units.solved.time)?.value;
    let x = Solver::quantity(id, "x", x, &units.solved.length)?.value;
    let way = x.over(&units.light_way);
    let (u, v) = (t.minus(&way).to_f64(), t.plus(&way).to_f64());
    let given = Displacement::new(u, v, 0.0);
    if let Some(far) = [u, v].into_iter().find(|c| !crate::num::in_range(*c)) {
        let what = format!("its coordinates leave the range 1e-150 to 1e150 ({far:e})");
        return Err(fault(
            id,
            "",
            what,
            "choose units in which they are of ordinary size",
        ));
    }
    let frame = frames::named(solver, id, when)?;
    let Some(frame) = frame else {
        let stated = Some((t.to_f64(), x.to_f64()));
        return Ok(SolvedEvent {
            at: given,
            rounding: scaled(given, f64::EPSILON),
            exact: Some((t, way)),
            stated,
            label: None,
        });
    };
    let outside = |e: GeometryError| fault(id, "frame", e.to_string(), "choose a slower frame");
    let moved = frame.boost.inverse().apply(given).map_err(outside)?;
    let turn = frame.boost.rapidity().value().abs();
    let rounding = if frame.boost.is_along_x() {
        scaled(moved, (turn + 8.0) * f64::EPSILON)
    } else {
        everywhere(16.0 * f64::EPSILON * largest(given) * exp(turn))
    };
    let at = moved + frame.origin;
    Ok(SolvedEvent {
        at,
        rounding: rounding + frame.origin_rounding + scaled(at, f64::EPSILON),
        exact: None,
        stated: None,
        label: None,
    })
}

/// Relative rounding of a derived event's coordinates: 8 units in the last place of the largest one.
const DERIVED: f64 = 8.0 * f64::EPSILON;

fn everywhere(bound: f64) -> Displacement {
    Displacement::new(bound, bound, bound)
}

fn scaled(d: Displacement, k: f64) -> Displacement {
    Displacement::new(k * d.u.abs(), k * d.v.abs(), k * d.y.abs())
}

fn largest(d: Displacement) -> f64 {
    d.u.abs().max(d.v.abs()).max(d.y.abs())
}
