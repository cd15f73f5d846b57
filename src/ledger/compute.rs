//! From a solved scene and a frame to the rows.

use std::sync::Arc;

use super::{
    CollisionRow, DifferenceRow, EventRow, FaultRow, FrameRow, IntervalRow, Ledger, LineRow,
    ParticleRow, SumRow, UnitsRow,
};
use crate::dynamics::{Momentum, Total};
use crate::geometry::{Boost, Leg, Separation, Side};
use crate::scene::Closure;
use crate::solve::{Solved, SolvedCollision, SolvedLine, SolvedParticle, Stated, Viewing};

/// Most events for which every pair's interval is listed.
const ALL_PAIRS: usize = 50;

/// The ledger of a solved scene in a frame. Its faults are those that the frame itself makes; whoever knows the
/// places adds the scene's.
pub fn ledger(solved: &Solved, from: &Viewing) -> Ledger {
    let mut faults = Vec::new();
    let mut outside = |object: String| {
        faults.push(FaultRow {
            object,
            line: None,
            column: None,
            what: "seen from this frame its components leave the range 1e-150 to 1e150".to_owned(),
            mend: "look from a frame of smaller rapidity".to_owned(),
        });
    };
    Ledger {
        frame: frame_row(from),
        units: UnitsRow {
            time: solved.units.time.symbol.clone(),
            length: solved.units.length.symbol.clone(),
            energy: solved.units.energy.symbol.clone(),
        },
        events: events(solved, from, &mut outside),
        lines: lines(solved, from, &mut outside),
        particles: particles(solved, from, &mut outside),
        collisions: collisions(solved, from),
        intervals: intervals(solved),
        faults,
    }
}

fn frame_row(from: &Viewing) -> FrameRow {
    let rapidity = from.boost.rapidity();
    FrameRow {
        name: from.name.as_deref().map(str::to_owned),
        rapidity: rapidity.value(),
        direction: from.boost.angle().degrees(),
        beta: rapidity.beta(),
        gamma: rapidity.gamma(),
    }
}

/// Whether a frame is the base as far as numbers go.
fn is_base(from: &Viewing) -> bool {
    from.boost == Boost::IDENTITY && from.origin == crate::geometry::Displacement::default()
}

fn events(solved: &Solved, from: &Viewing, outside: &mut dyn FnMut(String)) -> Vec<EventRow> {
    let way = solved.units.light_way;
    let mut rows = Vec::new();
    for (name, event) in &solved.events {
        let Some(d) = solved.seen(event, from) else {
            outside(format!("event {name}"));
            continue;
        };
        let stated = event.stated.filter(|_| is_base(from));
        let (t, x) = stated.unwrap_or_else(|| (d.t(), d.x() * way));
        rows.push(EventRow {
            name: name.to_string(),
            t,
            x,
            y: d.y * way,
            u: d.u,
            v: d.v,
        });
    }
    rows
}

fn lines(solved: &Solved, from: &Viewing, outside: &mut dyn FnMut(String)) -> Vec<LineRow> {
    let mut rows = Vec::new();
    for (name, line) in &solved.lines {
        let proper_time = proper_time(line);
        let row = |beta, rapidity| LineRow {
            name: name.to_string(),
            beta,
            rapidity,
            proper_time,
        };
        let [leg] = line.world.legs() else {
            rows.push(row(None, None));
            continue;
        };
        let Some(seen) = velocity_vector(*leg).and_then(|p| p.boosted(from.boost).ok()) else {
            outside(format!("line {name}"));
            continue;
        };
        let stated = line.stated_beta.filter(|_| from.boost == Boost::IDENTITY);
        rows.push(row(
            Some(stated.unwrap_or_else(|| seen.beta_x())),
            seen.rapidity(),
        ));
    }
    rows
}

/// The energy-momentum of a unit mass, or of light, that moves as the leg does.
fn velocity_vector(leg: Leg) -> Option<Momentum> {
    match leg {
        Leg::Free { rapidity, across } => Momentum::longitudinal(1.0, rapidity, across).ok(),
        Leg::Light(Side::Plus) => Some(Momentum::Massless {
            p_minus: 0.0,
            p_plus: 2.0,
            py: 0.0,
        }),
        Leg::Light(Side::Minus) => Some(Momentum::Massless {
            p_minus: 2.0,
            p_plus: 0.0,
            py: 0.0,
        }),
    }
}

fn proper_time(line: &SolvedLine) -> Option<f64> {
    let ((_, from), (_, until)) = (line.from.as_ref()?, line.until.as_ref()?);
    line.world.proper_time(*from, *until).ok()
}

fn particles(solved: &Solved, from: &Viewing, outside: &mut dyn FnMut(String)) -> Vec<ParticleRow> {
    let mut rows = Vec::new();
    for (name, particle) in &solved.particles {
        match particle.momentum.boosted(from.boost) {
            Ok(momentum) => {
                let stated = if from.boost == Boost::IDENTITY {
                    particle.stated
                } else {
                    Stated::default()
                };
                rows.push(particle_row(name, particle, &momentum, &stated));
            }
            Err(_range) => outside(format!("particle {name}")),
        }
    }
    rows
}

fn particle_row(
    name: &Arc<str>,
    particle: &SolvedParticle,
    p: &Momentum,
    stated: &Stated,
) -> ParticleRow {
    let or = |typed: Option<f64>, derived: f64| typed.unwrap_or(derived);
    let moves = p.px() != 0.0 || p.py() != 0.0;
    ParticleRow {
        name: name.to_string(),
        mass_uncertainty: particle.mass_uncertainty,
        mass: p.mass(),
        energy: or(stated.energy, p.energy()),
        momentum: [or(stated.px, p.px()), or(stated.py, p.py())],
        p_minus: p.p_minus(),
        p_plus: p.p_plus(),
        kinetic: or(stated.kinetic, p.kinetic()),
        beta: or(stated.beta, p.beta()),
        beta_x: or(stated.beta_x, p.beta_x()),
        one_minus_beta: or(stated.one_minus_beta, p.one_minus_beta()),
        gamma: stated.gamma.or_else(|| p.gamma()),
        rapidity: p.rapidity(),
        pseudorapidity: p.pseudorapidity(),
        transverse_mass: p.transverse_mass(),
        angle: moves.then(|| or(stated.angle, p.angle().degrees())),
    }
}

/// Sums in the frame; the invariants are those of the base frame, so that they read the same from everywhere.
fn collisions(solved: &Solved, from: &Viewing) -> Vec<CollisionRow> {
    let mut rows = Vec::new();
    for (name, collision) in &solved.collisions {
        let sum = |names: &[Arc<str>]| -> Option<Total> {
            let parts: Option<Vec<Momentum>> = names
                .iter()
                .map(|n| {
                    solved
                        .particles
                        .get(n)
                        .and_then(|p| p.momentum.boosted(from.boost).ok())
                })
                .collect();
            Some(Total::of(&parts?))
        };
        let (Some(before), Some(after)) = (sum(&collision.before), sum(&collision.after)) else {
            continue;
        };
        let row = |seen: &Total, base: &Total| SumRow {
            energy: seen.energy,
            momentum: [seen.px, seen.py],
            mass_sum: base.mass_sum,
            invariant_mass: base.invariant_mass,
        };
        let names = |list: &[Arc<str>]| list.iter().map(ToString::to_string).collect();
        rows.push(CollisionRow {
            name: name.to_string(),
            before: row(&before, &collision.total_before),
            after: row(&after, &collision.total_after),
            difference: DifferenceRow {
                energy: after.energy - before.energy,
                momentum: [after.px - before.px, after.py - before.py],
            },
            balanced: collision.balanced(),
            tolerance: collision.tolerance,
            root_s: collision.total_before.invariant_mass,
            q_value: q_value(solved, collision),
            going_in: names(&collision.before),
            coming_out: names(&collision.after),
        });
    }
    rows
}

/// Sum of masses before less after. Where a mass was found by the closure, the difference of the excesses (which are
/// summed, not subtracted) keeps its digits; else equal masses cancel one another first.
fn q_value(solved: &Solved, collision: &SolvedCollision) -> f64 {
    if collision.closure != Closure::Given {
        return collision.total_after.excess - collision.total_before.excess;
    }
    let masses = |names: &[Arc<str>]| -> Vec<f64> {
        names
            .iter()
            .filter_map(|n| solved.particles.get(n))
            .map(|p| p.momentum.mass())
            .collect()
    };
    let mut after = masses(&collision.after);
    let mut before = masses(&collision.before);
    before.retain(|mass| match after.iter().position(|m| m == mass) {
        Some(i) => {
            after.swap_remove(i);
            false
        }
        None => true,
    });
    before.iter().sum::<f64>() - after.iter().sum::<f64>()
}

fn intervals(solved: &Solved) -> Vec<IntervalRow> {
    let mut rows = Vec::new();
    if solved.events.len() > ALL_PAIRS {
        return rows;
    }
    for (i, (from, a)) in solved.events.iter().enumerate() {
        for (to, b) in solved.events.iter().skip(i + 1) {
            let (d, separation) = solved.between(a, b);
            let (kind, squared, length) = match separation {
                Separation::Timelike => ("timelike", d.interval(), d.length()),
                Separation::Lightlike => ("lightlike", 0.0, 0.0),
                Separation::Spacelike => (
                    "spacelike",
                    d.interval(),
                    d.length() * solved.units.light_way,
                ),
            };
            let (from, to) = (from.to_string(), to.to_string());
            rows.push(IntervalRow {
                from,
                to,
                kind,
                squared,
                length,
            });
        }
    }
    rows
}
