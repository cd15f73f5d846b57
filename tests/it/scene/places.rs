//! Every object and field is found where it stands.

use conewright::fault::{Fault, Kind, ObjectId, Place};
use conewright::scene::{Places, read};
use proptest::prelude::*;

use super::{RELAY, further, id, place_of, sound, with};

/// Kind, name, field, and the n-th text at which it stands.
const RELAY_PLACES: [(Kind, &str, &str, &str, usize); 34] = [
    (Kind::Scene, "", "", "Scene(", 0),
    (Kind::Scene, "", "format", "1", 0),
    (Kind::Scene, "", "base", "\"station\"", 0),
    (Kind::Scene, "", "title", "\"Relay", 0),
    (Kind::Scene, "", "units.energy", "\"MeV\"", 0),
    (Kind::Scene, "", "events", "{", 0),
    (Kind::Event, "depart", "", "At(", 0),
    (Kind::Event, "ping", "", "At(", 1),
    (Kind::Event, "ping", "t", "10", 0),
    (Kind::Event, "ping", "frame", "\"station\"", 1),
    (Kind::Event, "turn", "clock", "\"40 ns\"", 0),
    (Kind::Event, "heard", "event", "\"ping\"", 1),
    (Kind::Line, "courier", "", "Free(", 1),
    (Kind::Line, "station", "velocity", "0))", 0),
    (Kind::Line, "courier", "velocity", "\"3/5\"", 0),
    (Kind::Line, "courier", "velocity.beta", "\"3/5\"", 0),
    (Kind::Line, "courier", "until", "\"turn\"", 1),
    (Kind::Particle, "beam", "state", "\"800 MeV\"", 0),
    (Kind::Particle, "beam", "", "(species", 0),
    (Kind::Particle, "beam", "angle", "\"0 deg\"", 0),
    (Kind::Particle, "target", "state", "AtRest", 0),
    (Kind::Particle, "lump", "state", "Closing", 0),
    (Kind::Collision, "strike", "before.1", "\"target\"", 1),
    (Kind::Collision, "strike", "before", "[\"beam\"", 0),
    (Kind::Collision, "strike", "closure", "Merge", 0),
    (Kind::Frame, "courier", "line", "\"courier\"", 4),
    (Kind::Frame, "balance", "of", "\"strike\"", 1),
    (Kind::Plate, "figure 1", "width", "\"86 mm\"", 0),
    (Kind::Plate, "figure 1", "panels.0", "(view", 0),
    (Kind::Plate, "figure 1", "panels.0.range.t", "(0, 60)", 0),
    (Kind::Plate, "figure 1", "panels.0.range.t.1", "60", 0),
    (Kind::Plate, "figure 1", "panels.0.range.x.0", "-5", 0),
    (Kind::Plate, "figure 1", "panels.0.events.1", "\"turn\"", 6),
    (
        Kind::Plate,
        "figure 1",
        "panels.1.collision",
        "\"strike\"",
        2,
    ),
];

fn holds_everywhere(text: &str) {
    let places = sound(text).places;
    for (kind, name, field, needle, n) in RELAY_PLACES {
        let found = places.find(&id(kind, name), field, 0);
        let expected = place_of(text, needle, n);
        assert_eq!(found, Some(expected), "{} {name} {field}", kind.word());
    }
}

#[test]
fn fields_stand_where_they_are_written() {
    holds_everywhere(RELAY);
}

#[test]
fn windows_line_ends_move_nothing() {
    holds_everywhere(&RELAY.replace('\n', "\r\n"));
}

#[test]
fn comments_in_odd_places_move_fields_by_their_length() {
    let text = RELAY
        .replace("Scene(", "/* \u{20ac} [ */ Scene(")
        .replace(": ", " /*\u{1F680} \" */ : // ]]\n   /* /* */ */ ");
    holds_everywhere(&text);
}

#[test]
fn one_long_line_has_columns_too() {
    holds_everywhere(&RELAY.replace('\n', " "));
    let far = "x".repeat(5000);
    let text = format!("Scene(format: 1, title: \"{far}\u{e9}\", base: \"b\")");
    let faults = read(&text).unwrap().faults;
    assert_eq!(faults[0].place, Some(place_of(&text, "\"x", 0)));
    let text = format!("Scene(format: 1, /*{far}\u{e9}{far}*/ base: \"b\")");
    let found = sound(&text).places.find(&ObjectId::scene(), "base", 0);
    assert_eq!(found, Some(place_of(&text, "\"b\"", 0)));
}

#[test]
fn a_lone_carriage_return_ends_a_line() {
    let text = "Scene(format: 1,\r // dear \" \r\n\r base: \"b\")";
    let found = sound(text).places.find(&ObjectId::scene(), "base", 0);
    assert_eq!(found, Some(Place { line: 4, column: 8 }));
}

#[test]
fn columns_count_characters() {
    let text = with("events: { \"\u{e9}t\u{e9} \u{1F680}\": At(t: 0, x: \"\u{3b2}\") }");
    let places = sound(&text).places;
    let event = id(Kind::Event, "\u{e9}t\u{e9} \u{1F680}");
    let x = place_of(&text, "\"\u{3b2}\"", 0);
    assert_eq!(places.find(&event, "x", 0), Some(x));
    // 10 characters to the name, 7 of the name, 14 to x.
    assert_eq!(x.column, 1 + 10 + 7 + 14);
}

#[test]
fn what_is_not_written_falls_back() {
    let places = sound(RELAY).places;
    let find = |kind, name, field| places.find(&id(kind, name), field, 3);
    let strike = place_of(RELAY, "(before", 0);
    assert_eq!(find(Kind::Collision, "strike", "nothing"), Some(strike));
    let range = place_of(RELAY, "(t: (0", 0);
    let path = "panels.0.range.energy.1";
    assert_eq!(find(Kind::Plate, "figure 1", path), Some(range));
    let panels = place_of(RELAY, "[\n            (view", 0);
    assert_eq!(find(Kind::Plate, "figure 1", "panels.7"), Some(panels));
    assert_eq!(find(Kind::Event, "nobody", "t"), None);
    let unread = Places::default();
    assert_eq!(unread.find(&ObjectId::scene(), "base", 0), None);
}

#[test]
fn a_bare_list_has_the_name_of_its_field() {
    let text =
        with("events: { \"a\": Meeting([\"l\", \"m\"]) }, frames: { \"f\": Moving(Beta(0.5)) }");
    let places = sound(&text).places;
    let find = |kind, name, field| places.find(&id(kind, name), field, 0);
    let m = place_of(&text, "\"m\"", 0);
    assert_eq!(find(Kind::Event, "a", "of.1"), Some(m));
    let beta = place_of(&text, "0.5", 0);
    assert_eq!(find(Kind::Frame, "f", "velocity"), Some(beta));
}

#[test]
fn faults_are_marked_once() {
    let places = sound(RELAY).places;
    let elsewhere = Place { line: 7, column: 7 };
    let turn = id(Kind::Event, "turn");
    let mut placed = Fault::new(turn.clone(), "clock", "a", "");
    placed.place = Some(elsewhere);
    let unplaced = Fault::new(turn, "clock", "b", "").at(3);
    let stranger = Fault::new(id(Kind::Event, "nobody"), "", "c", "");
    let mut faults = [placed, unplaced, stranger];
    places.mark(&mut faults);
    let spot = further(place_of(RELAY, "\"40 ns\"", 0), 4);
    let marked = faults.map(|fault| fault.place);
    assert_eq!(marked, [Some(elsewhere), Some(spot), None]);
}

/// Characters of a string's contents, each as RON writes it. From RON's grammar: single escapes, `\x` of UTF-8 bytes,
/// `\u{..}` of code points.
fn written() -> impl Strategy<Value = Vec<(char, &'static str)>> {
    let units = vec![
        ('a', "a"),
        ('\u{e9}', "\u{e9}"),
        ('\u{1F680}', "\u{1F680}"),
        ('\\', "\\\\"),
        ('"', "\\\""),
        ('\n', "\\n"),
        ('A', "\\x41"),
        ('\u{e9}', "\\xC3\\xA9"),
        ('\u{20ac}', "\\xE2\\x82\\xAC"),
        ('\u{1F680}', "\\xF0\\x9F\\x9A\\x80"),
        ('\u{3b2}', "\\u{3b2}"),
        ('\u{1F680}', "\\u{01F680}"),
    ];
    prop::collection::vec(prop::sample::select(units), 1..12)
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(200))]

    #[test]
    fn a_character_within_a_string_is_found_behind_escapes(units in written(), n in 1..12_usize) {
        let contents: String = units.iter().map(|(_, text)| *text).collect();
        let text = with(&format!("events: {{ \"a\": At(t: 0, x: 0, note: \"{contents}\") }}"));
        let reading = sound(&text);
        let meant: String = units.iter().map(|(c, _)| *c).collect();
        prop_assert_eq!(reading.scene.events["a"].common.note.as_deref(), Some(&*meant));
        let n = n.min(units.len());
        let before: usize = units[..n].iter().map(|(_, text)| text.chars().count()).sum();
        let expected = further(place_of(&text, &format!("\"{contents}\") }}"), 0), 1 + before);
        prop_assert_eq!(reading.places.find(&id(Kind::Event, "a"), "note", n), Some(expected));
    }
}

#[test]
fn a_character_within_a_raw_string_is_found() {
    let text = with("events: { \"a\": At(t: 0, x: 12.5, label: r#\"\\b\"\u{e9}\"x\"#) }");
    let places = sound(&text).places;
    let event = id(Kind::Event, "a");
    let label = place_of(&text, "r#\"", 0);
    assert_eq!(places.find(&event, "label", 0), Some(label));
    assert_eq!(places.find(&event, "label", 4), Some(further(label, 7)));
    let x = place_of(&text, "12.5", 0);
    assert_eq!(places.find(&event, "x", 3), Some(further(x, 3)));
}

#[test]
fn a_label_whose_backslash_was_eaten_is_pointed_at() {
    let text = with("events: { \"a\": At(t: 0, x: 0, label: \"\\tau\") }");
    let reading = read(&text).unwrap();
    let [fault] = &reading.faults[..] else {
        panic!("{:?}", reading.faults)
    };
    assert!(fault.what.contains("control character"), "{fault:?}");
    assert_eq!(fault.place, Some(place_of(&text, "\"\\tau\"", 0)));
    assert!(reading.scene.events.contains_key("a"));
}
