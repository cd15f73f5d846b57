//! Speeds, events, clocks and signals.

use std::collections::BTreeMap;

use serde_json::Value;

use super::{Case, case, number, scaled, value_of};

/// One thing that moves: its mass, its state, and what is asked of it.
const PARTICLES: [(&str, &str, &str, &str, f64); 29] = [
    ("TB002", "1", "Gamma(1.01)", "beta", 1.0),
    ("TB004", "1", "Beta(0.950)", "gamma", 1.0),
    (
        "TB025",
        "\"9.11e-31*3.00e8\"",
        "Beta(0.985)",
        "momentum/0",
        1.0,
    ),
    ("TB035", "1", "Beta(0.250)", "gamma", 1.0),
    (
        "TB045",
        "\"6.68e-27*3.00e8\"",
        "Beta(0.200)",
        "momentum/0",
        1.0,
    ),
    (
        "TB048",
        "\"9.11e-31*3.00e8\"",
        "Momentum(3.04e-21)",
        "beta",
        3e8,
    ),
    (
        "TB055",
        "\"1000*45.0^2\"",
        "Beta(\"30.0/45.0\")",
        "kinetic",
        1.0,
    ),
    ("TB056", "1", "Beta(\"30/45\")", "kinetic", 4.5),
    ("TB058", "1", "Gamma(2.00)", "beta", 1.0),
    ("TB063", "1", "Gamma(4.00)", "beta", 1.0),
    ("TB082", "938.3", "Kinetic(50.0)", "beta", 1.0),
    ("TB085", "1", "Gamma(1.50)", "beta", 1.0),
    ("TB086", "1", "Gamma(100)", "beta", 1.0),
    ("TB116", "938", "Beta(0.75)", "kinetic", 1.0),
    (
        "TB120",
        "\"1.67e-27*3.00e8^2\"",
        "Energy(1.60e-7)",
        "gamma",
        1.0,
    ),
    ("TB123", "1", "Beta(0.997)", "gamma", 1.0),
    ("TB128", "1", "Celerity(\"40/30\")", "beta", 1.0),
    ("TB202", "1", "Beta(0.98)", "gamma", 1.0),
    ("TB203", "1", "Beta(0.9999)", "gamma", 1.0),
    ("TB205", "1", "Beta(0.87)", "gamma", 1.0),
    ("TB211", "1", "Kinetic(1)", "beta", 1.0),
    ("TB225", "1", "Beta(0.99)", "gamma", 1.0),
    ("TB239", "105.6583755", "Momentum(3094)", "gamma", 1.0),
    ("KN177", "493.7", "Kinetic(500)", "gamma", 1.0),
    ("KN288", "0.93827208943", "Energy(7000)", "rapidity", 1.0),
    ("KN292", "140", "Energy(\"498/2\")", "momentum/0", 1.0),
    // In a frame: V, then the speed there, along x or across.
    (
        "TB133",
        "1",
        "Beta(\"4/5\"), angle: 90, frame: \"s\" 3/5",
        "across",
        1.0,
    ),
    (
        "TB176",
        "1",
        "Beta(\"40/41\"), frame: \"s\" 12/13",
        "gamma",
        1.0,
    ),
    (
        "TB178",
        "1",
        "Beta(\"40/41\"), angle: 90, frame: \"s\" 12/13",
        "beta_x",
        1.0,
    ),
];

pub(super) fn particles() -> BTreeMap<&'static str, Case> {
    let each = PARTICLES
        .into_iter()
        .map(|(id, mass, state, asked, factor)| {
            let (state, frame) = state
                .split_once(" \"s\" ")
                .map_or((state.to_owned(), ""), |(s, v)| (format!("{s} \"s\""), v));
            let frames = if frame.is_empty() {
                String::new()
            } else {
                format!("frames: {{ \"s\": Moving(velocity: Beta(\"{frame}\")) }}")
            };
            let lists = format!("particles: {{ \"a\": (mass: {mass}, state: {state}) }}, {frames}");
            if asked == "across" {
                let value = |json: &Value| {
                    number(json, "/particles/0/momentum/1") / number(json, "/particles/0/energy")
                };
                return (
                    id,
                    Case {
                        lists,
                        options: &[],
                        value: Box::new(value),
                    },
                );
            }
            (
                id,
                scaled(lists, &[], &format!("/particles/0/{asked}"), factor),
            )
        });
    each.collect()
}

/// A velocity, and one stated in the frame that has it: the whole.
const ADDED: [(&str, &str, &str); 10] = [
    ("TB020", "0.500", "0.750"),
    ("TB074", "-0.750", "0.500"),
    ("TB075", "-0.750", "-0.500"),
    ("TB091", "0.750", "-0.500"),
    ("TB132", "-4/5", "3/5"),
    ("TB138", "-3/4", "-3/4"),
    ("TB199", "0.8", "0.8"),
    ("TB201", "0.8", "-0.1"),
    ("TB227", "1/2", "1/2"),
    ("TB238", "0.9", "-0.85"),
];

pub(super) fn velocities() -> BTreeMap<&'static str, Case> {
    let moving = |v: &str| format!("frames: {{ \"s\": Moving(velocity: Beta(\"{v}\")) }}");
    let line =
        |form: &str| format!("events: {{ \"o\": At(t: 0, x: 0) }}, lines: {{ \"w\": {form} }}");
    let mut cases = BTreeMap::new();
    for (id, v, u) in ADDED {
        let free = format!("Free(through: \"o\", velocity: Beta(\"{u}\"), frame: \"s\")");
        cases.insert(
            id,
            case(format!("{}, {}", line(&free), moving(v)), "/lines/0/beta"),
        );
    }
    // Of what moves at the second, seen by who moves at the first.
    for (id, v, u) in [("TB044", "0.750", "0.950"), ("TB095", "0.950", "0.750")] {
        let free = format!("Free(through: \"o\", velocity: Beta({u}))");
        let lists = format!("{}, {}", line(&free), moving(v));
        cases.insert(id, scaled(lists, &["--frame", "s"], "/lines/0/beta", 1.0));
    }
    let light = line("Light(through: \"o\", toward: Plus)");
    let lists = format!("{light}, {}", moving("0.500"));
    cases.insert(
        "TB019",
        scaled(lists, &["--frame", "s"], "/lines/0/beta", 1.0),
    );
    cases
}

/// An event, the velocity of a frame, and what the frame has for it.
const EVENTS: [(&str, &str, &str, &str, &str, f64); 13] = [
    ("TB018", "0", "26/3.00e8*sqrt(3)/2", "1/2", "t", 1.0),
    // The book leaves the sign out.
    ("TB065", "0", "1.00 m", "1/2", "t", -1.0),
    ("TB066", "0", "1.00", "1/2", "x", 1.0),
    ("TB067", "4.5e-4", "150e3/3.00e8", "0.6", "t", 1.0),
    ("TB139", "1", "0", "12/13", "t", 1.0),
    ("TB142", "0", "1", "12/13", "x", 1.0),
    ("TB143", "1", "3", "12/13", "t", 1.0),
    ("TB144", "1", "3", "12/13", "x", 1.0),
    ("TB147", "1", "2", "12/13", "t", 1.0),
    ("TB149", "3", "4", "12/13", "t", 1.0),
    ("TB153", "5", "0", "4/5", "x", 1.0),
    ("TB155", "0", "4", "4/5", "x", 1.0),
    ("TB156", "3", "3", "12/13", "t", 1.0),
];

/// An event given in a frame of velocity 3/5, and what the base has for it.
const GIVEN: [(&str, &str, &str, &str); 5] = [
    ("TB160", "1", "0", "t"),
    ("TB161", "1", "0", "x"),
    ("TB162", "2", "1", "t"),
    ("TB163", "2", "1", "x"),
    ("TB165", "3", "1", "x"),
];

pub(super) fn events() -> BTreeMap<&'static str, Case> {
    let mut cases = BTreeMap::new();
    for (id, t, x, v, asked, factor) in EVENTS
        .into_iter()
        .chain([("TB157", "4", "5", "12/13", "t", 1.0)])
    {
        let lists = format!(
            "events: {{ \"e\": At(t: \"{t}\", x: \"{x}\") }}, frames: {{ \"s\": Moving(velocity: Beta(\"{v}\")) }}"
        );
        cases.insert(
            id,
            scaled(
                lists,
                &["--frame", "s"],
                &format!("/events/0/{asked}"),
                factor,
            ),
        );
    }
    for (id, t, x, asked) in GIVEN {
        let lists = format!(
            "events: {{ \"e\": At(t: {t}, x: {x}, frame: \"s\") }}, frames: {{ \"s\": Moving(velocity: Beta(\"3/5\")) }}"
        );
        cases.insert(id, case(lists, &format!("/events/0/{asked}")));
    }
    let two = "events: { \"1\": At(t: 3, x: 3), \"2\": At(t: 4, x: 5) }".to_owned();
    cases.insert("TB159", case(two, "/intervals/0/squared"));
    // A moving clock reads dt / gamma between two of its events.
    let two =
        "events: { \"1\": At(t: 0, x: 0), \"2\": At(t: 3.33e-9, x: \"3.33e-9*6.00e7/3.00e8\") }"
            .to_owned();
    cases.insert("TB006", case(two, "/intervals/0/length"));
    cases
}

/// A life as the clock that lives it has it, a velocity, and the laboratory's time.
const LIVES: [(&str, &str, &str, f64); 3] = [
    ("TB003", "0.950", "2.20e-6 s", 1e6),
    ("TB008", "1.90/3.00", "2.10e-8 s", 1.0),
    ("TB037", "2.70/3.00", "2.60e-8 s", 1.0),
];

/// A length at rest and the speed of who passes along it: it takes him length / beta gamma.
const LENGTHS: [(&str, &str, &str); 5] = [
    ("TB015", "2.50", "0.750"),
    ("TB017", "100", "0.20"),
    ("TB040", "200", "0.970"),
    ("TB100", "1000.0", "0.6"),
    ("TB175", "10", "12/13"),
];

/// A way, a velocity, and what is asked of the journey: the time at home or on board.
const JOURNEYS: [(&str, &str, &str, &str, f64, f64); 5] = [
    ("TB204", "12", "Beta(0.87)", "t", 1.0, 0.0),
    ("TB206", "12", "Beta(0.87)", "proper_time", 1.0, 0.0),
    ("TB219", "42.2", "Beta(0.9910)", "t", 1.0, 19.0),
    ("TB221", "4", "Gamma(2)", "proper_time", 2.0, 0.0),
    ("TB222", "4", "Gamma(2)", "t", 2.0, 0.0),
];

fn journey(way: &str, velocity: &str) -> String {
    format!(
        "events: {{ \"start\": At(t: 0, x: 0), \"there\": At(t: 0, x: {way}), \"arrival\": Meeting(of: [\"ship\", \"goal\"]) }}, \
         lines: {{ \"ship\": Free(through: \"start\", velocity: {velocity}, from: \"start\", until: \"arrival\"), \
         \"goal\": Free(through: \"there\", velocity: Beta(0)) }}"
    )
}

pub(super) fn clocks() -> BTreeMap<&'static str, Case> {
    let mut cases = BTreeMap::new();
    for (id, v, life, factor) in LIVES {
        let lists = format!(
            "events: {{ \"o\": At(t: 0, x: 0), \"end\": Along(line: \"w\", clock: \"{life}\") }}, \
             lines: {{ \"w\": Free(through: \"o\", velocity: Beta(\"{v}\")) }}"
        );
        cases.insert(id, scaled(lists, &[], "/events/1/t", factor));
    }
    for (id, length, v) in LENGTHS {
        let lists = journey(length, &format!("Beta(\"{v}\")"));
        cases.insert(id, scaled(lists, &[], "/lines/0/proper_time", value_of(v)));
    }
    for (id, way, velocity, asked, factor, offset) in JOURNEYS {
        let pointer = if asked == "t" {
            "/events/2/t"
        } else {
            "/lines/0/proper_time"
        };
        let value = move |json: &Value| offset + factor * number(json, pointer);
        let lists = journey(way, velocity);
        cases.insert(
            id,
            Case {
                lists,
                options: &[],
                value: Box::new(value),
            },
        );
    }
    let chase = "events: { \"o\": At(t: 0, x: 0), \"far\": At(t: 0, x: \"12.0e9\"), \"caught\": Meeting(of: [\"probe\", \"galaxy\"]) }, \
                 lines: { \"probe\": Free(through: \"o\", velocity: Beta(0.99947)), \"galaxy\": Free(through: \"far\", velocity: Beta(0.900)) }";
    cases.insert("TB072", case(chase.to_owned(), "/events/2/t"));
    cases
}

/// Out and back at 3/5, with a pulse of light home after every 1.456 years of his own.
const TWIN: &str = "events: { \"start\": At(t: 0, x: 0), \"turn\": Along(line: \"out\", clock: \"4*1.456\"), \
    \"home again\": Meeting(of: [\"in\", \"home\"]), \"first\": Along(line: \"out\", clock: 1.456), \
    \"first heard\": LightFrom(event: \"first\", meets: \"home\"), \"fifth\": Along(line: \"in\", clock: 1.456), \
    \"fifth heard\": LightFrom(event: \"fifth\", meets: \"home\") }, \
    lines: { \"home\": Free(through: \"start\", velocity: Beta(0)), \"out\": Free(through: \"start\", velocity: Beta(0.6)), \
    \"in\": Free(through: \"turn\", velocity: Beta(-0.6)) }";

pub(super) fn signals() -> BTreeMap<&'static str, Case> {
    let mut cases = BTreeMap::new();
    for (id, event) in [("TB212", 2), ("TB214", 4), ("TB216", 6)] {
        cases.insert(id, case(TWIN.to_owned(), &format!("/events/{event}/t")));
    }
    for (id, v) in [("TB130", "4/5"), ("TB198", "0.6")] {
        let lists = format!(
            "events: {{ \"o\": At(t: 0, x: 0), \"sent\": Along(line: \"ship\", clock: 1), \"heard\": LightFrom(event: \"sent\", meets: \"home\") }}, \
             lines: {{ \"ship\": Free(through: \"o\", velocity: Beta(\"{v}\")), \"home\": Free(through: \"o\", velocity: Beta(0)) }}"
        );
        cases.insert(id, case(lists, "/events/2/t"));
    }
    let seen = "events: { \"o\": At(t: 0, x: 0), \"impact\": At(t: \"-23/30\", x: \"4/3\"), \"seen\": LightFrom(event: \"impact\", meets: \"ship\") }, \
                lines: { \"ship\": Free(through: \"o\", velocity: Beta(0)) }";
    cases.insert("TB172", case(seen.to_owned(), "/events/2/t"));
    // A photon's energy goes as its frequency.
    let photon = |energy: &str, angle: &str, v: &str| {
        format!(
            "particles: {{ \"a\": (mass: 0, state: Energy(\"{energy}\"), angle: {angle}) }}, frames: {{ \"s\": Moving(velocity: Beta(\"{v}\")) }}"
        )
    };
    for (id, energy, v) in [
        ("TB077", "1000", "0.250"),
        ("TB135", "10", "-40/41"),
        ("TB181", "1", "3/5"),
    ] {
        let lists = photon(energy, "0", v);
        cases.insert(
            id,
            scaled(lists, &["--frame", "s"], "/particles/0/energy", 1.0),
        );
    }
    // A wavelength goes as one over it; one that comes straight across has gamma times less than it was sent with.
    for (id, energy, angle, v, over) in [
        ("TB093", "1/656", "0", "1000e3/3.00e8", 1.0),
        ("TB137", "1", "90", "40/41", 10.0),
    ] {
        let lists = photon(energy, angle, v);
        let value = move |json: &Value| over / number(json, "/particles/0/energy");
        cases.insert(
            id,
            Case {
                lists,
                options: &["--frame", "s"],
                value: Box::new(value),
            },
        );
    }
    cases
}
