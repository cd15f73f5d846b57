//! What is wrong with one object is that object's fault, at the spot; the rest is read.

use conewright::fault::{Fault, Kind, Place, Weight, nearest};
use conewright::quantity::Typed;
use conewright::scene::{Event, read};

use super::{RELAY, id, lines, place_of, with};

/// One change to the relay: what is replaced (the n-th) by what; the object at fault; the field; the text at which the
/// fault points and words in it.
struct Broken {
    was: (&'static str, usize),
    is: &'static str,
    object: (Kind, &'static str),
    field: &'static str,
    at: &'static str,
    says: &'static str,
}

const fn broken(
    was: (&'static str, usize),
    is: &'static str,
    object: (Kind, &'static str),
    field: &'static str,
    at: &'static str,
    says: &'static str,
) -> Broken {
    Broken {
        was,
        is,
        object,
        field,
        at,
        says,
    }
}

#[rustfmt::skip]
const EVENTS: [Broken; 19] = [
    broken(("t: 10", 0), "t: ten", (Kind::Event, "ping"), "t", "ten", "`ten` is not a number"),
    broken(("t: 10", 0), "t: inf", (Kind::Event, "ping"), "t", "inf", "not a finite number"),
    broken(("t: 10", 0), "t: -NaN", (Kind::Event, "ping"), "t", "-NaN", "not a finite number"),
    broken(("t: 10", 0), "t: 1e999", (Kind::Event, "ping"), "t", "1e999", "range of numbers"),
    broken(("t: 10", 0), "t: 1e-999", (Kind::Event, "ping"), "t", "1e-999", "range of numbers"),
    broken(("t: 10", 0), "t: 1.2.3", (Kind::Event, "ping"), "t", "1.2.3", "in quotes: \"1.2.3\""),
    broken(("t: 10", 0), "t: 3/5", (Kind::Event, "ping"), "t", "3/5", "in quotes: \"3/5\""),
    broken(("t: 10", 0), "t: 5 ns", (Kind::Event, "ping"), "t", "5 ns", "in quotes: \"5 ns\""),
    broken(("t: 10", 0), "t: 5.1(2)", (Kind::Event, "ping"), "t", "5.1(2)", "in quotes: \"5.1(2)\""),
    broken(("t: 10", 0), "t: [10]", (Kind::Event, "ping"), "t", "[10]", "a number is wanted here, not a list"),
    broken(("t: 10", 0), "t: \"a\\q\"", (Kind::Event, "ping"), "t", "\\q", "`\\q` is no escape"),
    broken(("t: 10", 0), "t: ", (Kind::Event, "ping"), "t", "t: ,", "`t` has no value"),
    broken(("t: 10, ", 0), "", (Kind::Event, "ping"), "t", "At(x", "`t` is missing"),
    broken(("t: 10, ", 0), "t: 10 ", (Kind::Event, "ping"), "x", "x: 0, frame", "a comma is missing before this"),
    broken(("t: 10", 0), "t: 10, t: 11", (Kind::Event, "ping"), "t", "t: 11", "`t` stands here a second time"),
    broken(("clock: \"40", 0), "clok: \"40", (Kind::Event, "turn"), "clok", "clok", "did you mean `clock`?"),
    broken(("LightFrom(", 0), "LihgtFrom(", (Kind::Event, "heard"), "", "LihgtFrom", "did you mean `LightFrom`?"),
    broken(("frame: \"station\")", 0), "frame: \"station\", rapidity: 1)", (Kind::Event, "ping"), "rapidity", "1),\n", "`frame` and `rapidity`"),
    broken(("event: \"ping\"", 0), "event: ping", (Kind::Event, "heard"), "event", "ping, meets", "a string is wanted"),
];

#[rustfmt::skip]
const OTHERS: [Broken; 20] = [
    broken(("Beta(\"3/5\")", 0), "Betta(\"3/5\")", (Kind::Line, "courier"), "velocity", "Betta", "did you mean `Beta`?"),
    broken(("Beta(\"3/5\")", 0), "Beta", (Kind::Line, "courier"), "velocity", "Beta, until", "takes one number"),
    broken(("Beta(\"3/5\")", 0), "Beta(3 ns)", (Kind::Line, "courier"), "velocity", "Beta(3", "takes one number"),
    broken(("Beta(\"3/5\")", 0), "0.6", (Kind::Line, "courier"), "velocity", "0.6", "`0.6` is not known here"),
    broken(("until: \"turn\"", 0), "until: [\"turn\"]", (Kind::Line, "courier"), "until", "[\"turn\"]", "a string is wanted"),
    broken(("state: Closing", 0), "stat: Closing", (Kind::Particle, "lump"), "stat", "stat:", "did you mean `state`?"),
    broken(("state: Closing", 0), "state: Closing()", (Kind::Particle, "lump"), "state", "Closing()", "stands alone"),
    broken(("(state: Closing)", 0), "(species: \"p\")", (Kind::Particle, "lump"), "state", "(species: \"p\")", "`state` is missing"),
    broken(("(state: Closing)", 0), "Lump(state: Closing)", (Kind::Particle, "lump"), "", "Lump(", "without a word"),
    broken(("(state: Closing)", 0), "\"Closing\"", (Kind::Particle, "lump"), "", "\"Closing\"", "named fields"),
    broken(("Kinetic(\"800 MeV\")", 0), "Components(px: 1)", (Kind::Particle, "beam"), "state.py", "Components", "`py` is missing"),
    broken(("\"target\"], a", 0), "target], a", (Kind::Collision, "strike"), "before.1", "target], a", "a string is wanted"),
    broken(("\"beam\", \"t", 0), "\"beam\" \"t", (Kind::Collision, "strike"), "before.1", "\"target\"], a", "comma is missing"),
    broken(("closure: Merge", 0), "closure: \"Merge\"", (Kind::Collision, "strike"), "closure", "\"Merge\"", "without quotes"),
    broken(("of: \"strike\"", 0), "of: strike", (Kind::Frame, "balance"), "of", "strike)", "a string is wanted"),
    broken(("of: \"strike\"", 0), "off: \"strike\"", (Kind::Frame, "balance"), "off", "off", "did you mean `of`?"),
    broken(("line: \"courier\", at", 0), "particle: \"courier\", at", (Kind::Frame, "courier"), "", "RestOf", "`at` belongs to a line"),
    broken(("\"86 mm\"", 0), "86 mm", (Kind::Plate, "figure 1"), "width", "86 mm", "in quotes: \"86 mm\""),
    broken(("(0, 60)", 0), "(0, sixty)", (Kind::Plate, "figure 1"), "panels.0.range.t.1", "sixty", "`sixty` is not a number"),
    broken(("(0, 60)", 0), "(0, 30, 60)", (Kind::Plate, "figure 1"), "panels.0.range.t", "(0, 30", "a pair is wanted"),
];

fn change(case: &Broken) -> String {
    let (was, n) = case.was;
    let (at, _) = RELAY.match_indices(was).nth(n).expect(was);
    let mut text = RELAY.to_owned();
    text.replace_range(at..at + was.len(), case.is);
    text
}

#[test]
fn one_broken_object_is_its_own_fault_and_the_rest_is_read() {
    let all = read(RELAY).unwrap().scene;
    for case in EVENTS.iter().chain(&OTHERS) {
        let text = change(case);
        let reading = read(&text).unwrap();
        let [fault] = &reading.faults[..] else {
            panic!("{}\n{}", case.is, lines(&reading.faults));
        };
        let (kind, name) = case.object;
        let said = fault.line("scene.ron");
        assert_eq!(fault.object, id(kind, name), "{said}");
        assert_eq!(fault.field, case.field, "{said}");
        assert_eq!(fault.place, Some(place_of(&text, case.at, 0)), "{said}");
        assert!(said.contains(case.says), "{said}");
        assert_eq!(fault.weight, Weight::Fault);
        assert_eq!(reading.unread, [id(kind, name)], "{said}");
        let mut rest = all.clone();
        match kind {
            Kind::Event => drop(rest.events.shift_remove(name)),
            Kind::Line => drop(rest.lines.shift_remove(name)),
            Kind::Particle => drop(rest.particles.shift_remove(name)),
            Kind::Collision => drop(rest.collisions.shift_remove(name)),
            Kind::Frame => drop(rest.frames.shift_remove(name)),
            Kind::Plate => drop(rest.plates.shift_remove(name)),
            Kind::Species | Kind::Scene => {}
        }
        assert_eq!(reading.scene, rest, "{said}");
    }
}

#[test]
fn an_object_has_all_its_faults_at_once() {
    let text = with("events: { \"a\": At(t: x1, x: y1, frame: z1) }");
    let faults = read(&text).unwrap().faults;
    let fields: Vec<&str> = faults.iter().map(|f| &*f.field).collect();
    assert_eq!(fields, ["t", "x", "frame"]);
}

/// The one fault of a text, and its place.
fn one_fault(text: &str) -> (Fault, Place) {
    let faults = read(text).unwrap().faults;
    let [fault] = &faults[..] else {
        panic!("{text}\n{}", lines(&faults));
    };
    (fault.clone(), fault.place.unwrap())
}

#[test]
fn a_repeated_name_is_the_later_ones_fault() {
    let text = with(
        "events: { \"a\": At(t: 1, x: 0), \"b\": At(t: 2, x: 0),\n  \"a\": At(t: 3, x: 0) },
        lines: { \"a\": Broken([\"a\", \"b\"]) }",
    );
    let (fault, place) = one_fault(&text);
    assert_eq!(fault.object, id(Kind::Event, "a"));
    assert_eq!(place, place_of(&text, "\"a\": At", 1));
    let scene = read(&text).unwrap().scene;
    assert_eq!(scene.events.len(), 2);
    let Event::At { t, .. } = &scene.events["a"].form else {
        panic!();
    };
    assert_eq!(*t, Typed::Bare("1".to_owned()));
    let places = read(&text).unwrap().places;
    let first = place_of(&text, "At(t: 1", 0);
    assert_eq!(places.find(&id(Kind::Event, "a"), "", 0), Some(first));
    assert!(read(&text).unwrap().unread.is_empty());
}

#[test]
fn a_frame_may_not_take_the_name_of_the_base() {
    let text =
        "Scene(format: 1, frames: {\n \"station\": RestOf(line: \"a\") }, base: \"station\")";
    let (fault, place) = one_fault(text);
    assert_eq!(fault.object, id(Kind::Frame, "station"));
    assert_eq!(place, place_of(text, "\"station\": R", 0));
    assert!(read(text).unwrap().scene.frames.is_empty());
}

#[test]
fn barred_names_are_faults() {
    let long = "n".repeat(201);
    let bad = ["", "a/b", "a\\nb", "\\u{7f}", &long];
    for name in bad {
        let text = with(&format!("events: {{ \"{name}\": At(t: 0, x: 0) }}"));
        let (fault, place) = one_fault(&text);
        assert_eq!(fault.object.kind, Kind::Event);
        assert_eq!(place, place_of(&text, &format!("\"{name}\""), 0));
        assert!(read(&text).unwrap().scene.events.is_empty());
    }
    let (fault, place) = one_fault("Scene(format: 1, base: \"a/b\")");
    assert_eq!((&*fault.field, place.column), ("base", 24));
}

#[test]
fn a_name_stands_in_quotes() {
    let text = with("events: { depart: At(t: 0, x: 0), At(t: 1, x: 1), \"b\": At(t: 2, x: 2) }");
    let reading = read(&text).unwrap();
    let said = lines(&reading.faults);
    assert_eq!(reading.faults.len(), 2, "{said}");
    assert!(said.contains("a name stands in quotes; write \"depart\""));
    assert!(said.contains("this event has no name"));
    assert_eq!(reading.scene.events.len(), 1);
}

#[test]
fn what_this_version_does_not_read_is_said() {
    let text =
        with("signals: { \"radar\": Pulses(from: \"a\") }, events: { \"a\": At(t: 0, x: 0) }");
    let (fault, place) = one_fault(&text);
    assert_eq!(fault.object, conewright::fault::ObjectId::scene());
    assert_eq!(place, place_of(&text, "signals", 0));
    assert!(fault.what.contains("not read by this version"));
    assert_eq!(read(&text).unwrap().scene.events.len(), 1);

    let text = with("events: { \"a\": At(t: 0, x: 0, look: (ink: 2)) }");
    let (fault, place) = one_fault(&text);
    assert_eq!(fault.weight, Weight::Finding);
    assert_eq!(place, place_of(&text, "look", 0));
    assert_eq!(read(&text).unwrap().scene.events.len(), 1);
}

#[test]
fn a_bad_label_leaves_the_object() {
    let long = format!("\"{}\"", "x".repeat(1001));
    let cases = [&long, "3", "\"a\\q\"", "[\"a\"]"];
    for label in cases {
        let text = with(&format!(
            "events: {{ \"a\": At(t: 0, x: 0, label: {label}) }}"
        ));
        let (fault, _) = one_fault(&text);
        assert_eq!((fault.weight, &*fault.field), (Weight::Finding, "label"));
        let scene = read(&text).unwrap().scene;
        assert_eq!(scene.events["a"].common.label, None);
    }
    let most = "x".repeat(1000);
    let text = with(&format!(
        "events: {{ \"a\": At(t: 0, x: 0, label: \"{most}\") }}"
    ));
    assert!(read(&text).unwrap().faults.is_empty());
}

#[test]
fn the_scene_says_what_it_lacks() {
    let (fault, place) = one_fault("\n Scene(base: \"b\")");
    assert_eq!(
        (&*fault.field, &*fault.what),
        ("format", "`format` is missing")
    );
    assert_eq!(place, Place { line: 2, column: 2 });
    let (fault, _) = one_fault("Scene(format: 1)");
    assert_eq!(fault.field, "base");
    let text = "Scene(format: 1, base: \"b\", evnets: {})";
    let (fault, place) = one_fault(text);
    assert_eq!(place, place_of(text, "evnets", 0));
    assert_eq!(fault.mend, "did you mean `events`?");
    let text = "Scene(format: 1, base: \"b\", base: \"c\")";
    let (_, place) = one_fault(text);
    assert_eq!(place, place_of(text, "base", 1));
    assert_eq!(read(text).unwrap().scene.base, "b");
}

#[test]
fn odd_commas_between_objects_lose_none() {
    let text =
        with("events: { \"a\": At(t: 0, x: 0)\n \"b\": At(t: 1, x: 0),, \"c\": At(t: 1, x: 2) }");
    let reading = read(&text).unwrap();
    assert_eq!(reading.scene.events.len(), 3);
    assert_eq!(reading.faults.len(), 2);
    assert_eq!(reading.faults[0].place, Some(place_of(&text, "\"b\"", 0)));
    assert_eq!(reading.faults[1].place, Some(place_of(&text, ", \"c\"", 0)));
}

#[test]
fn a_list_of_the_wrong_shape_is_the_scenes_fault() {
    let text = with("events: [], lines: { \"a\": Broken([\"b\", \"c\"]) }");
    let (fault, place) = one_fault(&text);
    assert_eq!((&*fault.field, place), ("events", place_of(&text, "[]", 0)));
    assert_eq!(read(&text).unwrap().scene.lines.len(), 1);
}

#[test]
fn faults_come_in_the_order_of_the_text() {
    let text = with("lines: { \"z\": At() },\n bogus: 1,\n events: { \"a\": Free() }");
    let faults = read(&text).unwrap().faults;
    let places: Vec<_> = faults.iter().map(|fault| fault.place).collect();
    assert_eq!(places.len(), 3);
    assert!(places.is_sorted());
}

#[test]
fn a_fault_is_one_line_for_people() {
    let text = with("events: { \"turn\": Along(line: \"courier\", clok: \"40 ns\") }");
    let (fault, _) = one_fault(&text);
    assert_eq!(
        fault.line("a.ron"),
        "a.ron:2:42: event turn: there is no field `clok` here; did you mean `clock`?"
    );
}

#[test]
fn the_nearest_name_is_offered_only_when_near() {
    let names = ["depart", "turn", "heard"];
    assert_eq!(nearest("trun", names), Some("turn"));
    assert_eq!(nearest("tnru", names), None);
    assert_eq!(nearest("tur", names), Some("turn"));
    assert_eq!(nearest("Depart", names), Some("depart"));
    assert_eq!(nearest("dpeart", names), Some("depart"));
    assert_eq!(nearest("arrival", names), None);
    assert_eq!(nearest("", names), None);
    assert_eq!(nearest(&"x".repeat(1 << 20), names), None);
}
