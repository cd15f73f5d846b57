//! Worked examples and published values, as scenes a person would write, through the printed JSON.
//!
//! The rows stand with their sources in `tests/facts/outside_textbook.csv` and `outside_kinematics.csv`; where the
//! provenance says `memory` the value was recalled and is a cross-check, not an authority. Rows of the collection
//! that are left out stand in `outside_skipped.csv`, each with its reason. Sources that round c to 3.00e8 m/s keep
//! theirs: lengths are then given in seconds of light's way.

mod matter;
mod motion;

use std::collections::{BTreeMap, BTreeSet};

use serde_json::Value;

use crate::facts::{self, Row};
use crate::program;

/// A scene's lists, the options, and how the number of the source is found in what is printed.
struct Case {
    lists: String,
    options: &'static [&'static str],
    value: Box<dyn Fn(&Value) -> f64>,
}

fn case(lists: String, pointer: &str) -> Case {
    scaled(lists, &[], pointer, 1.0)
}

fn scaled(lists: String, options: &'static [&'static str], pointer: &str, factor: f64) -> Case {
    let pointer = pointer.to_owned();
    let value = Box::new(move |json: &Value| number(json, &pointer) * factor);
    Case {
        lists,
        options,
        value,
    }
}

fn number(json: &Value, pointer: &str) -> f64 {
    let found = json.pointer(pointer).and_then(Value::as_f64);
    found.unwrap_or_else(|| panic!("{pointer} of {json}"))
}

/// `3/5`, `1.7e-3`.
fn value_of(text: &str) -> f64 {
    let (top, bottom) = text.split_once('/').unwrap_or((text, "1"));
    let number = |text: &str| {
        text.parse::<f64>()
            .unwrap_or_else(|e| panic!("{text}: {e}"))
    };
    number(top) / number(bottom)
}

fn scene(units: &str, lists: &str) -> String {
    format!("Scene(format: 1, base: \"lab\", {units} {lists})")
}

/// The published value within its tolerance (`exact`: to a few units in the last place), and what 60 digits made of
/// the same inputs to 1e-12.
fn check(row: &Row, got: f64) {
    let id = &row["id"];
    let computed = value_of(&row["computed_value"]);
    assert!(
        (got - computed).abs() <= 1e-12 * computed.abs(),
        "{id}: {got}, not {computed}"
    );
    if row["published_value"].is_empty() {
        return;
    }
    let published = value_of(&row["published_value"]);
    let tolerance = match row["tolerance"].parse::<f64>() {
        Ok(tolerance) if tolerance > 1e-30 => tolerance * 1.000_001,
        _ => 1e-14 * published.abs(),
    };
    assert!(
        (got - published).abs() <= tolerance,
        "{id}: {got}, published {published} ({})",
        row["source"]
    );
}

/// Checks a group; each case has its row.
fn prove(cases: BTreeMap<&'static str, Case>) {
    let mut rows = facts::rows("outside_textbook.csv");
    rows.extend(facts::rows("outside_kinematics.csv"));
    for (id, case) in cases {
        // This one asks for metres.
        let units = if id == "TB066" {
            "units: (length: \"m\"),"
        } else {
            ""
        };
        let json = program::ledger(&scene(units, &case.lists), case.options);
        check(facts::row(&rows, id), (case.value)(&json));
    }
}

#[test]
fn speeds_gammas_energies_and_momenta_agree_with_books() {
    prove(motion::particles());
}

#[test]
fn added_velocities_agree_with_books() {
    prove(motion::velocities());
}

#[test]
fn transformed_events_agree_with_books() {
    prove(motion::events());
}

#[test]
fn lives_lengths_and_journeys_agree_with_books() {
    prove(motion::clocks());
}

#[test]
fn signals_and_frequencies_agree_with_books() {
    prove(motion::signals());
}

#[test]
fn collisions_and_decays_agree_with_books() {
    prove(matter::collisions());
}

#[test]
fn centre_of_mass_energies_agree_with_published_ones() {
    prove(matter::beams());
}

#[test]
fn compton_scattering_agrees_with_published_energies() {
    prove(matter::compton());
}

#[test]
fn decay_momenta_agree_with_the_particle_data_group() {
    let rows = facts::rows("outside_kinematics.csv");
    let decays: Vec<&Row> = rows
        .iter()
        .filter(|row| row["category"] == "decay momentum")
        .collect();
    assert!(decays.len() > 60, "{}", decays.len());
    for row in decays {
        check(row, matter::decay(row));
    }
}

/// A published exercise sets a velocity of 1.20 c (TB042): that is refused, and what it hangs on is left out.
#[test]
fn more_than_the_speed_of_light_is_refused() {
    let lists = "particles: { \"a\": (mass: 1, state: Beta(1.20)) }";
    let json = program::ledger(&scene("", lists), &[]);
    assert_eq!(json["particles"].as_array().unwrap().len(), 0);
    assert_eq!(json["faults"][0]["object"], "particle a");
}

/// Every row that stands in the tables is checked and has a source; every row that is skipped has a reason.
#[test]
fn rows_are_checked_or_skipped_for_a_reason() {
    let mut rows = facts::rows("outside_textbook.csv");
    rows.extend(facts::rows("outside_kinematics.csv"));
    let groups = [
        motion::particles(),
        motion::velocities(),
        motion::events(),
        motion::clocks(),
        motion::signals(),
        matter::collisions(),
        matter::beams(),
        matter::compton(),
    ];
    let mut checked: BTreeSet<&str> = groups.iter().flat_map(BTreeMap::keys).copied().collect();
    let decays = rows
        .iter()
        .filter(|row| row["category"] == "decay momentum");
    checked.extend(decays.map(|row| row["id"].as_str()));
    let listed: BTreeSet<&str> = rows.iter().map(|row| row["id"].as_str()).collect();
    assert_eq!(checked, listed);
    assert!(rows.iter().all(|row| !row["source"].is_empty()));
    for row in facts::rows("outside_skipped.csv") {
        assert!(
            !row["reason"].is_empty() && !listed.contains(row["id"].as_str()),
            "{}",
            row["id"]
        );
    }
}
