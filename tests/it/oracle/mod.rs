//! The numbers, proved from outside: what `ledger --as json` prints against the plainest formulas in 660 digits.
//!
//! The oracle shares no code with the program: the text of a scene is read by a reader of its own, and events and
//! momenta are carried as plain (t, x, y) and (E, px, py).

mod compare;
mod drawn;
mod examples;
mod handmade;
mod kinematics;
mod lines;
mod matter;
mod number;
mod particle;
mod real;
mod rebased;
mod solved;
mod sums;
mod text;
mod typed;

use compare::{Findings, compare, frame_names};
use kinematics::Frame;
use real::Real;
use solved::Oracle;

use crate::{facts, program};

/// The mass of a species in MeV, from the Particle Data Group's table of 2026 (rows with their source in the file).
/// An antiparticle has the mass of its particle.
fn known_mass(species: &str) -> String {
    let rows = facts::rows("oracle_masses.csv");
    let plus = species.replace('-', "+");
    let row = rows
        .iter()
        .find(|row| row["species"] == species)
        .or_else(|| rows.iter().find(|row| row["species"] == plus));
    row.unwrap_or_else(|| panic!("no mass of {species}"))["mass_mev"].clone()
}

/// What the program prints of a scene in a frame, compared with what the oracle knows; nothing may be wrong.
fn seen(name: &str, text: &str, oracle: &Oracle, frame: &Frame, options: &[&str]) -> Findings {
    let json = program::ledger(text, options);
    let found = compare(oracle, frame, &json);
    assert!(
        found.wrong.is_empty(),
        "{name} {options:?}: {} of {} wrong\n{}\n{text}\nfaults: {}",
        found.wrong.len(),
        found.compared,
        found.wrong.join("\n"),
        json["faults"],
    );
    found
}

/// Compares all that the program prints of a scene, from the base, from each of its named frames and from frames of
/// the given rapidities; the part of the allowed error that was used at most, and how many numbers there were.
fn prove(name: &str, text: &str, rapidities: &[&str]) -> (f64, usize) {
    let oracle = Oracle::of(text);
    let mut all = vec![seen(name, text, &oracle, &Frame::base(), &[])];
    for frame in frame_names(&oracle) {
        let options = ["--frame", frame.as_str()];
        all.push(seen(name, text, &oracle, &oracle.frame(&frame), &options));
    }
    for eta in rapidities {
        let frame = Oracle::at_rapidity(&Real::decimal(eta));
        all.push(seen(name, text, &oracle, &frame, &["--rapidity", eta]));
    }
    let used = all.iter().map(|found| found.nearest.0).fold(0.0, f64::max);
    (used, all.iter().map(|found| found.compared).sum())
}
