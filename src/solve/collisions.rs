//! Collisions: what a closure finds, the sums before and after, and whether they balance.

use super::particles;
use super::solver::{Solver, Spoiled, fault};
use super::views::rounding;
use super::{SolvedCollision, SolvedParticle};
use crate::dynamics::{Momentum, Total, remainder};
use crate::fault::{Fault, Kind, ObjectId};
use crate::scene::{Closure, Collision};

/// Rounding allowed of a mass that a balance gives, relative to the mass of all it is found from.
const MASS_ROUNDING: f64 = 1e-9;

/// The collision, and the particle its closure has found.
pub(super) fn solve(
    solver: &mut Solver<'_>,
    id: &ObjectId,
    index: usize,
) -> Result<(SolvedCollision, Option<(usize, SolvedParticle)>), Spoiled> {
    let object = solver.scene.collisions.get(&id.name).ok_or(None)?.clone();
    let form = &object.form;
    sane(id, form)?;
    let closes = closing(solver, form, index);
    let mut typed_error = 0.0;
    let mut known = |names: &[String]| -> Result<Vec<Momentum>, Spoiled> {
        let mut parts = Vec::new();
        for name in names {
            if closes.as_ref().is_some_and(|(_, closing)| closing == name) {
                continue;
            }
            let particle = solver.particle(name)?;
            typed_error += particle.typed_error;
            parts.push(particle.momentum);
        }
        Ok(parts)
    };
    let mut before = known(&form.before)?;
    let mut after = known(&form.after)?;
    let found = match &closes {
        None => None,
        Some((particle, name)) => {
            let stands_after = form.after.contains(name);
            let momentum = find(id, form, (&before, &after), stands_after)?;
            if stands_after {
                after.push(momentum);
            } else {
                before.push(momentum);
            }
            let own = ObjectId::new(Kind::Particle, name);
            let closed = particles::closed(solver, &own, momentum, typed_error)?;
            compare_mass(
                solver,
                &own,
                (*particle, &closed),
                &Total::of(if stands_after { &before } else { &after }),
            )?;
            Some((*particle, closed))
        }
    };
    if let (None, true) = (&found, form.closure != Closure::Given) {
        return Err(fault(
            id,
            "closure",
            format!("its closure {:?} has nothing to find", form.closure),
            "let one particle be Closing, or use the closure Given",
        ));
    }
    let (total_before, total_after) = (Total::of(&before), Total::of(&after));
    // What a closure has found balances by construction: typed digits move it along.
    let typed_error = if found.is_some() { 0.0 } else { typed_error };
    let tolerance = rounding(&total_before, &total_after) + typed_error;
    let names = |list: &[String]| list.iter().map(|n| n.as_str().into()).collect();
    let collision = SolvedCollision {
        before: names(&form.before),
        after: names(&form.after),
        closure: form.closure,
        at: form.at.as_deref().map(Into::into),
        total_before,
        total_after,
        tolerance,
        label: object.common.label.clone(),
    };
    solver.faults.extend(imbalance(solver, id, &collision));
    Ok((collision, found))
}

fn sane(id: &ObjectId, form: &Collision) -> Result<(), Spoiled> {
    for (side, names) in [("before", &form.before), ("after", &form.after)] {
        if names.is_empty() {
            let what = format!("nothing stands {side}");
            return Err(fault(id, side, what, "name at least one particle"));
        }
    }
    let mut seen = std::collections::BTreeSet::new();
    for (side, names) in [("before", &form.before), ("after", &form.after)] {
        for (i, name) in names.iter().enumerate() {
            if !seen.insert(name) {
                let what = format!("particle {name} stands in it twice");
                return Err(fault(
                    id,
                    &format!("{side}.{i}"),
                    what,
                    "a particle goes in once or comes out once; give the other one a name of its own",
                ));
            }
        }
    }
    Ok(())
}

/// The particle this collision closes.
fn closing(solver: &Solver<'_>, form: &Collision, index: usize) -> Option<(usize, String)> {
    form.before.iter().chain(&form.after).find_map(|name| {
        let particle = solver.scene.particles.get_index_of(name.as_str())?;
        (solver.closers[particle].by == Some(index)).then(|| (particle, name.clone()))
    })
}

/// The one unknown vector: what the other side has more than its own.
fn find(
    id: &ObjectId,
    form: &Collision,
    (before, after): (&[Momentum], &[Momentum]),
    stands_after: bool,
) -> Result<Momentum, Spoiled> {
    let (whole, parts) = if stands_after {
        (before, after)
    } else {
        (after, before)
    };
    if form.closure == Closure::Merge && !parts.is_empty() {
        return Err(fault(
            id,
            "closure",
            "Merge makes one particle of all that goes in, but others stand beside it",
            "use the closure Remainder, or leave the others out",
        ));
    }
    let found = if parts.is_empty() {
        Total::of(whole).to_momentum()
    } else {
        remainder(whole, parts)
    };
    found.map_err(|e| {
        fault(
            id,
            "closure",
            e.to_string(),
            "check the particles that are given: energy must be left over",
        )
    })
}

/// A finding where a closing particle's stated mass is not the one the balance gives.
/// A finding where a closing particle's stated mass is not the one the balance gives, within three standard deviations,
/// rounding, and what typed digits do to a mass: its square moves by twice the energy times their error.
fn compare_mass(
    solver: &mut Solver<'_>,
    id: &ObjectId,
    (particle, found): (usize, &SolvedParticle),
    whole: &Total,
) -> Result<(), Spoiled> {
    let Some((_, object)) = solver.scene.particles.get_index(particle) else {
        return Ok(());
    };
    let Some(stated) = particles::mass(solver, id, &object.form)? else {
        return Ok(());
    };
    let mass = found.momentum.mass();
    let (off, sum) = (mass - stated.to_f64(), mass + stated.to_f64());
    let known = 3.0 * stated.uncertainty.unwrap_or(0.0) + MASS_ROUNDING * whole.invariant_mass;
    let typed = 4.0 * found.momentum.energy() * found.typed_error;
    if off.abs() * sum <= known * sum + typed {
        return Ok(());
    }
    let unit = solver.units.mass().symbol;
    let field = if object.form.species.is_some() {
        "species"
    } else {
        "mass"
    };
    let finding = Fault::new(
        id.clone(),
        field,
        format!(
            "its mass by the balance is {} {unit}, {} {} than stated",
            crate::quantity::significant(mass, 7),
            crate::quantity::significant(off.abs(), 3),
            if off > 0.0 { "more" } else { "less" },
        ),
        "leave the mass to the closure, or mend the other particles",
    );
    solver.faults.push(finding.finding());
    Ok(())
}

fn imbalance(solver: &Solver<'_>, id: &ObjectId, collision: &SolvedCollision) -> Option<Fault> {
    if collision.balanced() {
        return None;
    }
    let unit = &solver.units.solved.energy.symbol;
    let text = |x: f64| crate::quantity::significant(x, 4);
    let [de, dx, dy] = collision.difference();
    Some(
        Fault::new(
            id.clone(),
            "",
            format!(
                "it does not balance: after less before is E {}, px {}, py {} {unit}, where {} is allowed",
                text(de),
                text(dx),
                text(dy),
                text(collision.tolerance),
            ),
            "mend a particle, or let one be Closing and the closure find it",
        )
        .finding(),
    )
}
