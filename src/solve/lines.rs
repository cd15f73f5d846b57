//! Worldlines.

use super::frames;
use super::solver::{Solver, Spoiled, difference, fault};
use super::velocity;
use super::{SolvedEvent, SolvedLine};
use crate::dynamics::Momentum;
use crate::fault::ObjectId;
use crate::geometry::{Angle, Displacement, Leg, Side, Worldline};
use crate::quantity::Typed;
use crate::scene::{Line, Toward, Velocity, When};

/// Trims are set once everything is solved: they make no dependency.
pub(super) fn solve(solver: &mut Solver<'_>, id: &ObjectId) -> Result<SolvedLine, Spoiled> {
    let object = solver.scene.lines.get(&id.name).ok_or(None)?.clone();
    let mut follows = None;
    let mut stated_beta = None;
    let world = match &object.form {
        Line::Free {
            through,
            velocity,
            toward,
            when,
            clock,
            from: _,
            until: _,
        } => {
            let (leg, stated) = free(solver, id, (velocity, *toward), when)?;
            stated_beta = stated;
            straight(solver, id, leg, through, clock.as_ref())?
        }
        Line::Broken { through, clock } => broken(solver, id, through, clock.as_ref())?,
        Line::Light {
            through,
            toward,
            from: _,
            until: _,
        } => {
            let side = match toward {
                Toward::Plus => Side::Plus,
                Toward::Minus => Side::Minus,
            };
            Worldline::straight(Leg::Light(side), solver.event(through)?.at, 0.0)
        }
        Line::Follows {
            particle,
            through,
            clock,
            from: _,
            until: _,
        } => {
            let momentum = solver.particle(particle)?.momentum;
            follows = Some(particle.as_str().into());
            let leg = leg_of(&momentum).ok_or_else(|| {
                let what = format!("particle {particle} is light that moves across x");
                fault(id, "particle", what, "follow light along x only")
            })?;
            straight(solver, id, leg, through, clock.as_ref())?
        }
    };
    let label = object.common.label.clone();
    Ok(SolvedLine {
        world,
        from: None,
        until: None,
        follows,
        stated_beta,
        label,
    })
}

/// The rapidities of a line's legs, each with its celerity across; light has none.
pub(super) fn rapidities(line: &SolvedLine) -> Vec<(f64, f64)> {
    let mut found: Vec<(f64, f64)> = Vec::new();
    for leg in line.world.legs() {
        if let Leg::Free { rapidity, across } = *leg
            && !found.iter().any(|f| f.0 == rapidity.value())
        {
            found.push((rapidity.value(), across));
        }
    }
    found
}

fn free(
    solver: &mut Solver<'_>,
    id: &ObjectId,
    (form, toward): (&Velocity, Option<Toward>),
    when: &When,
) -> Result<(Leg, Option<f64>), Spoiled> {
    let typing = velocity::read(id, "velocity", form, toward)?;
    solver.faults.extend(typing.finding);
    let Some(frame) = frames::named(solver, id, when)? else {
        let stated = matches!(form, Velocity::Beta(_)).then(|| typing.quantity.value.to_f64());
        return Ok((
            Leg::Free {
                rapidity: typing.rapidity,
                across: 0.0,
            },
            stated,
        ));
    };
    let seen = Momentum::moving(1.0, typing.rapidity, Angle::ZERO)
        .and_then(|p| p.boosted(frame.boost.inverse()));
    let leg = seen.ok().as_ref().and_then(leg_of).ok_or_else(|| {
        fault(
            id,
            "velocity",
            "the velocity leaves the range of rapidity",
            "choose a slower one",
        )
    })?;
    Ok((leg, None))
}

/// How a particle moves; none for light across x.
fn leg_of(momentum: &Momentum) -> Option<Leg> {
    match *momentum {
        Momentum::Massive { mass, rapidity, py } => Some(Leg::Free {
            rapidity,
            across: py / mass,
        }),
        Momentum::Massless {
            p_minus: 0.0,
            p_plus: _,
            py: 0.0,
        } => Some(Leg::Light(Side::Plus)),
        Momentum::Massless {
            p_minus: _,
            p_plus: 0.0,
            py: 0.0,
        } => Some(Leg::Light(Side::Minus)),
        Momentum::Massless { .. } => None,
    }
}

/// One leg through an event, its clock set at another event of the line if that is asked for.
fn straight(
    solver: &Solver<'_>,
    id: &ObjectId,
    leg: Leg,
    through: &str,
    clock: Option<&(String, Typed)>,
) -> Result<Worldline, Spoiled> {
    let anchor = solver.event(through)?.at;
    let Some((event, typed)) = clock else {
        return Ok(Worldline::straight(leg, anchor, 0.0));
    };
    let reading = reading(solver, id, typed)?;
    let world = Worldline::straight(leg, anchor, 0.0);
    let place = on_line(solver, id, &world, event)?;
    let offset = world.clock_at(place).map_err(|e| {
        fault(
            id,
            "clock",
            e.to_string(),
            "leave the clock out: light has none",
        )
    })?;
    Ok(Worldline::straight(leg, anchor, reading - offset))
}

fn broken(
    solver: &Solver<'_>,
    id: &ObjectId,
    through: &[String],
    clock: Option<&(String, Typed)>,
) -> Result<Worldline, Spoiled> {
    let events: Result<Vec<&SolvedEvent>, Spoiled> =
        through.iter().map(|name| solver.event(name)).collect();
    let events = events?;
    let places: Vec<Displacement> = events.iter().map(|event| event.at).collect();
    let steps: Vec<Displacement> = events
        .windows(2)
        .map(|pair| difference(pair[1], pair[0]))
        .collect();
    let (at, reading) = match clock {
        None => (0, 0.0),
        Some((event, typed)) => {
            let index = through
                .iter()
                .position(|name| name == event)
                .ok_or_else(|| {
                    fault(
                        id,
                        "clock.0",
                        format!("event {event} is none of those the line goes through"),
                        "set the clock at one of those",
                    )
                })?;
            (index, reading(solver, id, typed)?)
        }
    };
    Worldline::broken_by_steps(&places, &steps, at, reading).map_err(|e| {
        fault(
            id,
            "through",
            e.to_string(),
            "name at least two events, each in the future of the one before",
        )
    })
}

fn reading(solver: &Solver<'_>, id: &ObjectId, typed: &Typed) -> Result<f64, Spoiled> {
    Ok(
        Solver::quantity(id, "clock.1", typed, &solver.units.solved.time)?
            .value
            .to_f64(),
    )
}

fn on_line(
    solver: &Solver<'_>,
    id: &ObjectId,
    world: &Worldline,
    event: &str,
) -> Result<Displacement, Spoiled> {
    let place = solver.event(event)?.at;
    let (off, bound) = world.distance(place);
    if off > bound {
        let what = format!("event {event} does not lie on the line");
        return Err(fault(
            id,
            "clock.0",
            what,
            "set the clock at an event on it",
        ));
    }
    Ok(place)
}
