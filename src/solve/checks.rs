//! What is looked at once everything is solved: trims of lines, and events that lie beyond them.

use std::sync::Arc;

use super::solver::Solver;
use crate::fault::{Fault, Kind, ObjectId};
use crate::geometry::Displacement;
use crate::scene::{Event, Line};

/// Sets the ends of lines, and tells of ends that do not lie on their line and of events beyond them.
pub(super) fn trims(solver: &mut Solver<'_>) {
    let scene = solver.scene;
    for (i, (name, object)) in scene.lines.iter().enumerate() {
        let id = ObjectId {
            kind: Kind::Line,
            name: name.clone(),
        };
        let (from, until) = match &object.form {
            Line::Free { from, until, .. }
            | Line::Light { from, until, .. }
            | Line::Follows { from, until, .. } => (from.as_deref(), until.as_deref()),
            Line::Broken { through, clock: _ } => (
                through.first().map(String::as_str),
                through.last().map(String::as_str),
            ),
        };
        let from = end(solver, &id, i, ("from", from));
        let until = end(solver, &id, i, ("until", until));
        if let (Some((_, a)), Some((_, b))) = (&from, &until)
            && b.t() < a.t()
        {
            let what = "it ends before it begins";
            let finding = Fault::new(
                id,
                "until",
                what,
                "exchange from and until, or name other events",
            );
            solver.faults.push(finding.finding());
        }
        if let Some(line) = &mut solver.lines[i] {
            (line.from, line.until) = (from, until);
        }
    }
    for (i, (name, object)) in scene.events.iter().enumerate() {
        let id = ObjectId {
            kind: Kind::Event,
            name: name.clone(),
        };
        let lines: &[&String] = match &object.form {
            Event::At { .. } => &[],
            Event::Along { line, clock: _ } => &[line],
            Event::Meeting { of } => &[&of[0], &of[1]],
            Event::LightFrom { event: _, meets } => &[meets],
        };
        for line in lines {
            beyond(solver, &id, i, line);
        }
    }
}

fn end(
    solver: &mut Solver<'_>,
    id: &ObjectId,
    line: usize,
    (field, name): (&str, Option<&str>),
) -> Option<(Arc<str>, Displacement)> {
    let name = name?;
    let index = solver.scene.events.get_index_of(name)?;
    let at = solver.events[index].as_ref()?.at;
    let (off, bound) = solver.lines[line].as_ref()?.world.distance(at);
    if off > bound {
        let unit = &solver.units.solved.time.symbol;
        let off = crate::quantity::significant(off, 3);
        let what = format!(
            "event {name} does not lie on it (it is {off} {unit} off), so it has no such end"
        );
        let finding = Fault::new(id.clone(), field, what, "name an event on the line");
        solver.faults.push(finding.finding());
        return None;
    }
    Some((name.into(), at))
}

/// A finding where an event made on a line lies outside its ends.
fn beyond(solver: &mut Solver<'_>, id: &ObjectId, index: usize, name: &str) {
    let Some(event) = &solver.events[index] else {
        return;
    };
    let Ok(line) = solver.line(name) else { return };
    let t = event.at.t();
    let slack = 16.0 * f64::EPSILON * event.at.u.abs().max(event.at.v.abs());
    let which = match (&line.from, &line.until) {
        (Some((end, at)), _) if t < at.t() - slack => Some(("before", "begins", end)),
        (_, Some((end, at))) if t > at.t() + slack => Some(("after", "ends", end)),
        _ => None,
    };
    if let Some((side, verb, end)) = which {
        let what = format!("it lies on line {name}, but {side} the line {verb} at {end}");
        let finding = Fault::new(
            id.clone(),
            "",
            what,
            "let the line run further, or move the event",
        );
        solver.faults.push(finding.finding());
    }
}
