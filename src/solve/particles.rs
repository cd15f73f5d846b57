//! Particles: mass and state to an energy-momentum vector.

use super::frames;
use super::solver::{Solver, Spoiled, fault};
use super::velocity;
use super::{SolvedParticle, Stated};
use crate::dynamics::{DynamicsError, Momentum};
use crate::fault::{Fault, Kind, ObjectId};
use crate::geometry::{Angle, Rapidity};
use crate::quantity::{Dimension, Number, Quantity, Typed, Unit, read, species};
use crate::scene::{Closure, Particle, State, Toward, Velocity, When};

/// A particle's mass: the number, its standard deviation and the half of its last digit, if the scene typed it.
#[derive(Clone, Debug)]
pub(super) struct Mass {
    value: Number,
    pub(super) uncertainty: Option<f64>,
    half_digit: f64,
    label: Option<String>,
}

impl Mass {
    /// Rounded.
    pub(super) fn to_f64(&self) -> f64 {
        self.value.to_f64()
    }
}

pub(super) fn solve(solver: &mut Solver<'_>, id: &ObjectId) -> Result<SolvedParticle, Spoiled> {
    let object = solver.scene.particles.get(&id.name).ok_or(None)?.clone();
    let form = &object.form;
    if form.state == State::Closing {
        return Err(unclosed(solver, id));
    }
    let mass = mass(solver, id, form)?.ok_or_else(|| {
        fault(
            id,
            "",
            "it has neither species nor mass",
            "give one of them",
        )
    })?;
    let (angle, degrees) = direction(id, form)?;
    let frame = frames::named(solver, id, &form.when)?;
    let inputs = inputs(solver, id, form)?;
    let make = |nudge: Nudge| {
        let momentum = vector(form, &mass, &inputs, angle, nudge)?;
        match &frame {
            Some(frame) => momentum.boosted(frame.boost.inverse()),
            None => Ok(momentum),
        }
    };
    let momentum = make(Nudge::None).map_err(|e| impossible(id, form, &e))?;
    let typed_error = typed_error(&momentum, &mass, &inputs, make);
    let stated = if frame.is_none() {
        stated(form, &inputs, (angle, degrees))
    } else {
        Stated::default()
    };
    solver.faults.extend(inputs.finding);
    Ok(SolvedParticle {
        momentum,
        species: form.species.clone(),
        mass_uncertainty: mass.uncertainty,
        stated,
        typed_error,
        label: object.common.label.clone().or(mass.label),
    })
}

/// Faults of the scene's own species: their masses and mean lives must read.
pub(super) fn species_faults(solver: &Solver<'_>) -> Vec<Fault> {
    let mut faults = Vec::new();
    for (name, object) in &solver.scene.species {
        let id = ObjectId {
            kind: Kind::Species,
            name: name.clone(),
        };
        let mut check = |field: &str, typed: &Typed, unit: &Unit| {
            if let Err(Some(fault)) = Solver::quantity(&id, field, typed, unit) {
                faults.push(*fault);
            }
        };
        check("mass", &object.form.mass, &solver.units.mass());
        if let Some(life) = &object.form.mean_life {
            check("mean_life", life, &Unit::base(Dimension::Time));
        }
    }
    faults
}

/// A closing particle that no collision closes.
fn unclosed(solver: &Solver<'_>, id: &ObjectId) -> Spoiled {
    let index = solver.scene.particles.get_index_of(&id.name);
    let first = index.and_then(|i| solver.closers[i].first);
    let holding = first.and_then(|c| solver.scene.collisions.get_index(c));
    let Some((name, collision)) = holding else {
        return fault(
            id,
            "state",
            "it is Closing, but stands in no collision",
            "name it in a collision whose closure is Merge or Remainder, or give its state",
        );
    };
    let form = &collision.form;
    let unknown: Vec<&str> = form
        .before
        .iter()
        .chain(&form.after)
        .filter_map(|name| solver.scene.particles.get_full(name.as_str()))
        .filter(|(i, _, p)| p.form.state == State::Closing && solver.closers[*i].by.is_none())
        .map(|(_, name, _)| &**name)
        .collect();
    let what = if form.closure == Closure::Given {
        format!("it is Closing, but the closure Given of collision {name} finds nothing")
    } else {
        let (count, names) = (unknown.len(), unknown.join(", "));
        format!(
            "collision {name} has {count} unknown particles ({names}), and {:?} finds one",
            form.closure
        )
    };
    fault(
        id,
        "state",
        what,
        "give the state of all but one of them, and the closure Merge or Remainder",
    )
}

/// The mass of a particle by its species or as typed; none where neither is said.
pub(super) fn mass(
    solver: &Solver<'_>,
    id: &ObjectId,
    form: &Particle,
) -> Result<Option<Mass>, Spoiled> {
    let unit = solver.units.mass();
    let (quantity, typed, label) = match (&form.species, &form.mass) {
        (Some(_), Some(_)) => {
            return Err(fault(
                id,
                "mass",
                "it has a species and a mass",
                "leave one of them out; a mass belongs to the species",
            ));
        }
        (None, None) => return Ok(None),
        (None, Some(typed)) => (Solver::quantity(id, "mass", typed, &unit)?, true, None),
        (Some(name), None) => {
            if let Some(own) = solver.scene.species.get(name.as_str()) {
                // A fault of the species is told of it once, for all its particles.
                let quantity = read(&own.form.mass, &unit).map_err(|_told| None)?;
                (quantity, true, own.common.label.clone())
            } else if let Some(known) = species(name) {
                let text = Typed::Text(format!("{} MeV/c^2", known.mass));
                let quantity = Solver::quantity(id, "species", &text, &unit)?;
                (quantity, false, Some(known.label.to_owned()))
            } else {
                return Err(unknown_species(solver, id, name));
            }
        }
    };
    let mass = quantity.value.to_f64();
    if mass < 0.0 || !crate::num::in_range(mass) {
        let what = format!("its mass is {mass}");
        return Err(fault(
            id,
            "mass",
            what,
            "a mass is 0, or between 1e-150 and 1e150",
        ));
    }
    Ok(Some(Mass {
        value: quantity.value,
        uncertainty: quantity.uncertainty,
        half_digit: if typed { quantity.half_digit } else { 0.0 },
        label,
    }))
}

fn unknown_species(solver: &Solver<'_>, id: &ObjectId, name: &str) -> Spoiled {
    let own = solver.scene.species.keys().map(|n| &**n);
    let known = crate::quantity::SPECIES.iter().map(|s| s.name);
    let mend = match crate::fault::nearest(name, own.chain(known)) {
        Some(near) => format!("perhaps \"{near}\" is meant"),
        None => {
            "give its mass in place of the species, or add it to the scene's species".to_owned()
        }
    };
    fault(
        id,
        "species",
        format!("there is no species named \"{name}\""),
        mend,
    )
}

/// Direction of the motion, and the same in degrees as typed.
fn direction(id: &ObjectId, form: &Particle) -> Result<(Angle, f64), Spoiled> {
    let whole = matches!(
        form.state,
        State::Components { .. } | State::Longitudinal { .. }
    );
    if whole && (form.angle.is_some() || form.toward.is_some()) {
        let field = if form.angle.is_some() {
            "angle"
        } else {
            "toward"
        };
        return Err(fault(
            id,
            field,
            "its state already says which way it moves",
            "leave the angle out, or give the state by its size alone",
        ));
    }
    let unsigned = match &form.state {
        State::Velocity(Velocity::Gamma(_) | Velocity::BehindLight(_))
        | State::Kinetic(_)
        | State::Energy(_) => true,
        State::Velocity(_)
        | State::Momentum(_)
        | State::Components { .. }
        | State::Longitudinal { .. }
        | State::AtRest
        | State::Closing => false,
    };
    if form.toward.is_some() && !unsigned {
        return Err(fault(
            id,
            "toward",
            "this state carries its own sign",
            "leave toward out and give the number its sign",
        ));
    }
    let turn = if form.toward == Some(Toward::Minus) {
        180.0
    } else {
        0.0
    };
    let typed = form
        .angle
        .as_ref()
        .map(|typed| frames::degrees(id, typed))
        .transpose()?;
    let degrees = typed.unwrap_or(0.0) + turn;
    Ok((Angle::from_degrees(degrees), degrees))
}

/// The typed numbers of a state, read.
#[derive(Debug)]
struct Inputs {
    /// One or two numbers, in the order of the form.
    numbers: Vec<Quantity>,
    /// The rapidity of a velocity.
    rapidity: Option<Rapidity>,
    finding: Option<Fault>,
}

fn inputs(solver: &Solver<'_>, id: &ObjectId, form: &Particle) -> Result<Inputs, Spoiled> {
    let energy = solver.units.solved.energy.clone();
    let momentum = solver.units.momentum();
    let plain = Unit::base(Dimension::Plain);
    let mut numbers = Vec::new();
    let mut push = |field: &str, typed: &Typed, unit: &Unit| -> Result<(), Spoiled> {
        numbers.push(Solver::quantity(id, field, typed, unit)?);
        Ok(())
    };
    match &form.state {
        State::Velocity(velocity) => {
            // The toward of a particle turns its direction; the number itself stays positive.
            let typing = velocity::read(id, "state", velocity, None)?;
            let numbers = vec![typing.quantity];
            let rapidity = Some(typing.rapidity);
            return Ok(Inputs {
                numbers,
                rapidity,
                finding: typing.finding,
            });
        }
        State::Kinetic(typed) | State::Energy(typed) => push("state", typed, &energy)?,
        State::Momentum(typed) => push("state", typed, &momentum)?,
        State::Components { px, py } => {
            push("state.px", px, &momentum)?;
            push("state.py", py, &momentum)?;
        }
        State::Longitudinal { rapidity, py } => {
            push("state.rapidity", rapidity, &plain)?;
            push("state.py", py, &momentum)?;
        }
        State::AtRest | State::Closing => {}
    }
    Ok(Inputs {
        numbers,
        rapidity: None,
        finding: None,
    })
}

/// Which typed number is moved by half its last digit.
#[derive(Clone, Copy, Debug, PartialEq)]
enum Nudge {
    None,
    Number(usize),
    Mass,
}

fn vector(
    form: &Particle,
    mass: &Mass,
    inputs: &Inputs,
    angle: Angle,
    nudge: Nudge,
) -> Result<Momentum, DynamicsError> {
    let m_exact = moved(&mass.value, mass.half_digit, nudge == Nudge::Mass);
    let m = m_exact.to_f64();
    let number = |i: usize| {
        let q = &inputs.numbers[i];
        moved(&q.value, q.half_digit, nudge == Nudge::Number(i))
    };
    match &form.state {
        State::Velocity(velocity) => {
            let rapidity = match (inputs.rapidity, nudge) {
                (Some(rapidity), Nudge::None | Nudge::Mass) => rapidity,
                _ => nudged_rapidity(velocity, &number(0))?,
            };
            Momentum::moving(m, rapidity, angle)
        }
        State::Kinetic(_) => Momentum::from_kinetic(m, number(0).to_f64(), angle),
        State::Energy(_) => Momentum::from_energy(m, number(0).minus(&m_exact).to_f64(), angle),
        State::Momentum(_) => Momentum::from_momentum(m, number(0).to_f64(), angle),
        State::Components { .. } => {
            Momentum::from_components(m, number(0).to_f64(), number(1).to_f64())
        }
        State::Longitudinal { .. } => {
            Momentum::longitudinal(m, Rapidity::new(number(0).to_f64())?, number(1).to_f64())
        }
        State::AtRest | State::Closing => Momentum::at_rest(m),
    }
}

fn nudged_rapidity(velocity: &Velocity, number: &Number) -> Result<Rapidity, DynamicsError> {
    Ok(velocity::rapidity_of(
        velocity,
        number,
        crate::geometry::Side::Plus,
    )?)
}

fn moved(value: &Number, by: f64, yes: bool) -> Number {
    if yes {
        value.plus(&Number::Real(by))
    } else {
        value.clone()
    }
}

/// How far half a last typed digit of each input moves the energy or the momentum, added up.
fn typed_error(
    momentum: &Momentum,
    mass: &Mass,
    inputs: &Inputs,
    make: impl Fn(Nudge) -> Result<Momentum, DynamicsError>,
) -> f64 {
    let mut nudges: Vec<Nudge> = (0..inputs.numbers.len())
        .filter(|&i| inputs.numbers[i].half_digit > 0.0)
        .map(Nudge::Number)
        .collect();
    if mass.half_digit > 0.0 {
        nudges.push(Nudge::Mass);
    }
    nudges
        .into_iter()
        .filter_map(|nudge| make(nudge).ok())
        .map(|other| {
            let de = (other.energy() - momentum.energy()).abs();
            let dx = (other.px() - momentum.px()).abs();
            de.max(dx).max((other.py() - momentum.py()).abs())
        })
        .sum()
}

/// What was typed and what follows from it without arithmetic, to be shown in the base frame as typed.
fn stated(form: &Particle, inputs: &Inputs, (angle, degrees): (Angle, f64)) -> Stated {
    let number = |i: usize| inputs.numbers.get(i).map(|q| q.value.to_f64());
    let mut stated = Stated::default();
    // What goes backward (a negative size, a k below 1) points the other way, and an angle beyond half a turn is
    // another angle.
    let signed = inputs.rapidity.map(Rapidity::value).or(number(0));
    let is_as_typed = signed.is_none_or(|n| n >= 0.0) && degrees > -180.0 && degrees <= 180.0;
    if form.angle.is_some() && is_as_typed {
        stated.angle = Some(degrees);
    }
    let along = (angle.sin() == 0.0).then(|| angle.cos());
    match &form.state {
        State::Velocity(velocity) => match velocity {
            Velocity::Beta(_) => {
                stated.beta = number(0).map(f64::abs);
                stated.beta_x = along.and_then(|s| number(0).map(|b| s * b));
            }
            Velocity::Gamma(_) => stated.gamma = number(0),
            Velocity::BehindLight(_) => stated.one_minus_beta = number(0),
            Velocity::Celerity(_) | Velocity::Rapidity(_) | Velocity::Doppler(_) => {}
        },
        State::Kinetic(_) => stated.kinetic = number(0),
        State::Energy(_) => stated.energy = number(0),
        State::Momentum(_) => {
            stated.px = along.and_then(|s| number(0).map(|p| s * p));
        }
        State::Components { .. } => {
            stated.px = number(0);
            stated.py = number(1);
        }
        State::Longitudinal { .. } => stated.py = number(1),
        State::AtRest | State::Closing => {}
    }
    stated
}

fn impossible(id: &ObjectId, form: &Particle, error: &DynamicsError) -> Spoiled {
    let mend = match &form.state {
        State::Energy(_) => "a total energy is at least the mass",
        State::Kinetic(_) => "give it in the direction of the motion, which angle or toward turns",
        State::AtRest | State::Velocity(_) => {
            "light needs an energy or a momentum; a mass needs a velocity below that of light"
        }
        State::Momentum(_) | State::Components { .. } | State::Longitudinal { .. } => {
            "give numbers of ordinary size in the scene's units"
        }
        State::Closing => "give its state",
    };
    fault(id, "state", error.to_string(), mend)
}

/// A particle that a collision has found.
pub(super) fn closed(
    solver: &Solver<'_>,
    id: &ObjectId,
    momentum: Momentum,
    typed_error: f64,
) -> Result<SolvedParticle, Spoiled> {
    let object = solver.scene.particles.get(&id.name).ok_or(None)?;
    let form = &object.form;
    if form.angle.is_some() || form.toward.is_some() || form.when != When::Base {
        return Err(fault(
            id,
            "state",
            "it is Closing, so its collision finds its motion",
            "leave angle, toward and frame out",
        ));
    }
    let mass = mass(solver, id, form)?;
    Ok(SolvedParticle {
        momentum,
        species: form.species.clone(),
        mass_uncertainty: None,
        stated: Stated::default(),
        typed_error,
        label: object
            .common
            .label
            .clone()
            .or_else(|| mass.and_then(|m| m.label)),
    })
}
