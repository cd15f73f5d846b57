//! The document, its reading and its places; files on disk.

mod disk;
mod faults;
mod hostile;
mod model;
mod places;

use conewright::fault::{Fault, Kind, ObjectId, Place};
use conewright::scene::{Reading, read};

/// A scene with objects of every kind.
const RELAY: &str = include_str!("../data/relay.ron");

/// Line and column of the n-th occurrence (from 0) of some text, by counting line feeds and characters.
fn place_of(text: &str, needle: &str, n: usize) -> Place {
    let (at, _) = text.match_indices(needle).nth(n).expect(needle);
    let before = &text[..at];
    Place {
        line: 1 + before.matches('\n').count(),
        column: 1 + before.rsplit('\n').next().unwrap_or("").chars().count(),
    }
}

/// The place some characters further on in the same line.
fn further(place: Place, characters: usize) -> Place {
    Place {
        column: place.column + characters,
        ..place
    }
}

fn sound(text: &str) -> Reading {
    let reading = read(text).unwrap();
    assert_eq!(lines(&reading.faults), "", "{text}");
    reading
}

fn lines(faults: &[Fault]) -> String {
    let lines: Vec<String> = faults.iter().map(|f| f.line("scene.ron")).collect();
    lines.join("\n")
}

/// A scene of some lists beside what is required.
fn with(lists: &str) -> String {
    format!("Scene(format: 1, base: \"station\",\n{lists})")
}

fn id(kind: Kind, name: &str) -> ObjectId {
    ObjectId::new(kind, name)
}
