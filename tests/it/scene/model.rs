//! What is written is what is read.

use std::sync::Arc;

use conewright::quantity::Typed;
use conewright::scene::{
    Arrows, Closure, Collision, Common, Event, Frame, FramePart, Line, LineOrParticle, List,
    Object, Panel, Particle, Plate, Range, Scene, SpeciesEntry, State, TimeAxis, Toward, Units,
    Velocity, View, When, Whole, read,
};
use proptest::prelude::*;

use super::{RELAY, sound, with};

fn bare(text: &str) -> Typed {
    Typed::Bare(text.to_owned())
}

fn quoted(text: &str) -> Typed {
    Typed::Text(text.to_owned())
}

fn names(all: &[&str]) -> Vec<String> {
    all.iter().map(|&name| name.to_owned()).collect()
}

fn list<T, const N: usize>(objects: [(&str, T); N]) -> List<T> {
    objects
        .into_iter()
        .map(|(name, form)| {
            let common = Common::default();
            (Arc::from(name), Arc::new(Object { form, common }))
        })
        .collect()
}

fn free(beta: Typed, until: Option<String>) -> Line {
    Line::Free {
        through: "depart".to_owned(),
        velocity: Velocity::Beta(beta),
        toward: None,
        when: When::Base,
        clock: None,
        from: None,
        until,
    }
}

fn particle(species: Option<&str>, state: State) -> Particle {
    Particle {
        species: species.map(str::to_owned),
        mass: None,
        state,
        angle: None,
        toward: None,
        when: When::Base,
    }
}

fn relay_events() -> List<Event> {
    list([
        (
            "depart",
            Event::At {
                t: bare("0"),
                x: bare("0"),
                when: When::Base,
            },
        ),
        (
            "turn",
            Event::Along {
                line: "courier".to_owned(),
                clock: quoted("40 ns"),
            },
        ),
        (
            "ping",
            Event::At {
                t: bare("10"),
                x: bare("0"),
                when: When::Frame("station".to_owned()),
            },
        ),
        (
            "heard",
            Event::LightFrom {
                event: "ping".to_owned(),
                meets: "courier".to_owned(),
            },
        ),
    ])
}

fn relay_particles() -> List<Particle> {
    let kinetic = State::Kinetic(quoted("800 MeV"));
    let beam = Particle {
        angle: Some(quoted("0 deg")),
        ..particle(Some("p"), kinetic)
    };
    list([
        ("beam", beam),
        ("target", particle(Some("p"), State::AtRest)),
        ("lump", particle(None, State::Closing)),
    ])
}

fn relay_plate() -> Plate {
    let first = Panel {
        view: View::Spacetime,
        when: When::Frame("station".to_owned()),
        events: Some(names(&["depart", "turn"])),
        lines: Some(names(&["courier"])),
        cones: names(&["depart"]),
        axes: names(&["courier"]),
        range: Range {
            t: Some((bare("0"), bare("60"))),
            x: Some((bare("-5"), bare("20"))),
            ..Range::default()
        },
        ..Panel::default()
    };
    let second = Panel {
        view: View::EnergyMomentum,
        when: When::Frame("balance".to_owned()),
        collision: Some("strike".to_owned()),
        ..Panel::default()
    };
    Plate {
        width: Some(quoted("86 mm")),
        panels: vec![first, second],
        ..Plate::default()
    }
}

fn relay() -> Scene {
    let follows = Line::Follows {
        particle: "lump".to_owned(),
        through: "turn".to_owned(),
        clock: None,
        from: Some("turn".to_owned()),
        until: None,
    };
    let strike = Collision {
        before: names(&["beam", "target"]),
        after: names(&["lump"]),
        closure: Closure::Merge,
        at: Some("turn".to_owned()),
    };
    let rest = LineOrParticle::Line {
        line: "courier".to_owned(),
        at: Some("turn".to_owned()),
    };
    let of = Whole::Collision("strike".to_owned());
    Scene {
        format: 1,
        title: "Relay and courier".to_owned(),
        base: "station".to_owned(),
        units: Units {
            time: Some("ns".to_owned()),
            length: Some("m".to_owned()),
            energy: Some("MeV".to_owned()),
        },
        species: List::new(),
        events: relay_events(),
        lines: list([
            ("station", free(bare("0"), None)),
            ("courier", free(quoted("3/5"), Some("turn".to_owned()))),
            ("lump", follows),
        ]),
        particles: relay_particles(),
        collisions: list([("strike", strike)]),
        frames: list([
            (
                "courier",
                Frame {
                    part: FramePart::RestOf(rest),
                    origin: Some("depart".to_owned()),
                },
            ),
            (
                "balance",
                Frame {
                    part: FramePart::CentreOfMomentum { of },
                    origin: None,
                },
            ),
        ]),
        plates: list([("figure 1", relay_plate())]),
    }
}

#[test]
fn the_relay_reads_as_written() {
    assert_eq!(sound(RELAY).scene, relay());
    assert!(sound(RELAY).unread.is_empty());
}

#[test]
fn order_is_the_authors() {
    let scene = sound(RELAY).scene;
    let order: Vec<&str> = scene.events.keys().map(|name| &**name).collect();
    assert_eq!(order, ["depart", "turn", "ping", "heard"]);
}

#[test]
fn line_ends_and_a_byte_order_mark_change_nothing() {
    let windows = format!("\u{FEFF}{}", RELAY.replace('\n', "\r\n"));
    assert_eq!(sound(&windows).scene, relay());
    let old_mac = RELAY.replace('\n', "\r");
    assert_eq!(sound(&old_mac).scene, relay());
}

#[test]
fn blanks_and_comments_change_nothing() {
    let spread = RELAY
        .replace(',', " /* a, (b] /* \"c */ */ ,// ) \" \n")
        .replace(": ", " : ")
        .replace("At(", "At /* here */ (");
    assert_eq!(sound(&spread).scene, relay());
    let closed = RELAY
        .replace(",\n", ",")
        .replace(",)", ")")
        .replace("    ", "");
    assert_eq!(sound(&closed).scene, relay());
}

fn only_line(form: &str) -> Line {
    let text = with(&format!("lines: {{ \"a\": {form} }}"));
    sound(&text).scene.lines["a"].form.clone()
}

#[test]
fn lines_read_all_their_fields() {
    let full = "Free(through: \"e\", velocity: Gamma(2), toward: Minus, rapidity: \"1/2\", \
                clock: (\"f\", \"3 ns\"), from: \"g\", until: \"h\")";
    let expected = Line::Free {
        through: "e".to_owned(),
        velocity: Velocity::Gamma(bare("2")),
        toward: Some(Toward::Minus),
        when: When::Rapidity(quoted("1/2")),
        clock: Some(("f".to_owned(), quoted("3 ns"))),
        from: Some("g".to_owned()),
        until: Some("h".to_owned()),
    };
    assert_eq!(only_line(full), expected);
    let broken = Line::Broken {
        through: names(&["a", "b", "c"]),
        clock: None,
    };
    assert_eq!(only_line("Broken(through: [\"a\", \"b\", \"c\"])"), broken);
    assert_eq!(only_line("Broken([\"a\", \"b\", \"c\"])"), broken);
    let light = Line::Light {
        through: "e".to_owned(),
        toward: Toward::Plus,
        from: None,
        until: Some("f".to_owned()),
    };
    let text = "Light(through: \"e\", toward: Plus, until: \"f\")";
    assert_eq!(only_line(text), light);
}

#[test]
fn a_velocity_of_rapidity_is_no_frame() {
    let line = only_line("Free(through: \"e\", velocity: Rapidity(1), rapidity: 2)");
    let Line::Free { velocity, when, .. } = line else {
        panic!("{line:?}");
    };
    assert_eq!(velocity, Velocity::Rapidity(bare("1")));
    assert_eq!(when, When::Rapidity(bare("2")));
}

#[test]
fn every_state_reads() {
    let states = [
        ("Beta(0.5)", State::Velocity(Velocity::Beta(bare("0.5")))),
        ("Gamma(2)", State::Velocity(Velocity::Gamma(bare("2")))),
        (
            "Celerity(2)",
            State::Velocity(Velocity::Celerity(bare("2"))),
        ),
        (
            "Rapidity(2)",
            State::Velocity(Velocity::Rapidity(bare("2"))),
        ),
        ("Doppler(2)", State::Velocity(Velocity::Doppler(bare("2")))),
        (
            "BehindLight(1e-9)",
            State::Velocity(Velocity::BehindLight(bare("1e-9"))),
        ),
        ("Kinetic(\"1 GeV\")", State::Kinetic(quoted("1 GeV"))),
        ("Energy(5)", State::Energy(bare("5"))),
        ("Momentum(-5)", State::Momentum(bare("-5"))),
        (
            "Components(px: 1, py: 2)",
            State::Components {
                px: bare("1"),
                py: bare("2"),
            },
        ),
        (
            "Longitudinal(rapidity: 1, py: 2)",
            State::Longitudinal {
                rapidity: bare("1"),
                py: bare("2"),
            },
        ),
        ("AtRest", State::AtRest),
        ("Closing", State::Closing),
    ];
    for (written, state) in states {
        let text = with(&format!("particles: {{ \"a\": (state: {written}) }}"));
        assert_eq!(sound(&text).scene.particles["a"].form.state, state);
    }
}

#[test]
fn the_other_forms_read() {
    let text = with(
        r#"species: { "C12": (mass: "11.1779 GeV", charge: 6), "N*": (mass: 1.44, charge: "0", mean_life: "2e-24 s") },
        events: { "m": Meeting(of: ["a", "b"]), "n": Meeting(["a", "b"]) },
        collisions: { "c": (before: [], after: ["x",], closure: Remainder), "d": (before: ["x"], after: []) },
        frames: {
            "f": Moving(velocity: Beta(0.6), angle: "90 deg", frame: "g", toward: Minus, origin: "m"),
            "g": Moving(Doppler(2)),
            "h": RestOf(particle: "x"),
            "i": CentreOfMomentum(of: ["x", "y"]),
            "j": CentreOfMomentum("c"),
        },
        plates: { "p": (title: "T", height: 50, text: "8 pt", panels: [
            (hyperbolas: true, simultaneity: [("m", "f")], arrows: TipToTail, time_axis: LightWay,
             rapidity: -0.5, particles: [], range: (energy: (0, 1), px: (-1, "1 GeV"))),
        ]) }"#,
    );
    let scene = sound(&text).scene;
    let carbon = SpeciesEntry {
        mass: quoted("11.1779 GeV"),
        charge: 6,
        mean_life: None,
    };
    assert_eq!(scene.species["C12"].form, carbon);
    assert_eq!(scene.species["N*"].form.charge, 0);
    let of = ["a".to_owned(), "b".to_owned()];
    assert_eq!(scene.events["m"].form, Event::Meeting { of });
    assert_eq!(scene.events["m"].form, scene.events["n"].form);
    assert_eq!(scene.collisions["c"].form.closure, Closure::Remainder);
    assert_eq!(scene.collisions["d"].form.closure, Closure::Given);
    let moving = FramePart::Moving {
        velocity: Velocity::Beta(bare("0.6")),
        toward: Some(Toward::Minus),
        angle: Some(quoted("90 deg")),
        when: When::Frame("g".to_owned()),
    };
    assert_eq!(scene.frames["f"].form.part, moving);
    let of = Whole::Particles(names(&["x", "y"]));
    assert_eq!(
        scene.frames["i"].form.part,
        FramePart::CentreOfMomentum { of }
    );
    let panel = Panel {
        when: When::Rapidity(bare("-0.5")),
        particles: Some(Vec::new()),
        hyperbolas: Some(true),
        simultaneity: vec![("m".to_owned(), "f".to_owned())],
        arrows: Some(Arrows::TipToTail),
        time_axis: Some(TimeAxis::LightWay),
        range: Range {
            energy: Some((bare("0"), bare("1"))),
            px: Some((bare("-1"), quoted("1 GeV"))),
            ..Range::default()
        },
        ..Panel::default()
    };
    assert_eq!(scene.plates["p"].form.panels, [panel]);
}

#[test]
fn labels_and_notes_are_taken_off_any_object() {
    let text = with(
        r##"events: { "a": At(label: "\\beta_1", t: 0, note: r"as \is", x: 0) },
        particles: { "b": (state: AtRest, label: r#"\text{"q"}"#) },
        plates: { "c": (panels: [], note: "two
lines") }"##,
    );
    let scene = sound(&text).scene;
    let event = &scene.events["a"].common;
    assert_eq!(event.label.as_deref(), Some("\\beta_1"));
    assert_eq!(event.note.as_deref(), Some("as \\is"));
    let label = scene.particles["b"].common.label.as_deref();
    assert_eq!(label, Some("\\text{\"q\"}"));
    assert_eq!(scene.plates["c"].common.note.as_deref(), Some("two\nlines"));
}

#[test]
fn a_bare_number_keeps_every_digit() {
    for digits in [
        "9007199254740993",
        "-0.10",
        "+1",
        "1.",
        ".5",
        "6.02e+23",
        "0",
    ] {
        let text = with(&format!("events: {{ \"a\": At(t: {digits}, x: 0) }}"));
        let Event::At { t, .. } = sound(&text).scene.events["a"].form.clone() else {
            panic!();
        };
        assert_eq!(t, bare(digits));
    }
}

/// Whether the ron crate takes the text as RON.
fn is_ron(text: &str) -> bool {
    let options = ron::Options::default();
    options.from_str::<serde::de::IgnoredAny>(text).is_ok()
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(256))]

    /// The ron crate as an independent printer.
    #[test]
    fn a_title_reads_back_from_what_ron_prints(title in any::<String>()) {
        let text = format!("Scene(format: 1, base: \"b\", title: {})", ron::to_string(&title).unwrap());
        prop_assert_eq!(sound(&text).scene.title, title);
    }

    /// The ron crate as an independent reader: what reads without a fault is RON for everyone.
    #[test]
    fn what_reads_without_faults_is_ron(
        cut in 0..RELAY.len(),
        length in 0..3_usize,
        put in prop::sample::select(vec!["", ",", "(", ")", "0", ".", "e", "-", "\"", " ", "a", ":", "//\n", "\\"]),
    ) {
        let mut text = RELAY.to_owned();
        text.replace_range(cut..(cut + length).min(RELAY.len()), put);
        if read(&text).is_ok_and(|reading| reading.faults.is_empty()) {
            prop_assert!(is_ron(&text), "{}", text);
        }
    }

    /// f64's own reading of decimals as the other view of what a number is.
    #[test]
    fn finite_decimals_read_and_nothing_else_does(digits in "[+-]?[0-9]{0,3}[.]?[0-9]{0,3}(e[+-]?[0-9]{1,4})?") {
        let text = with(&format!("events: {{ \"a\": At(t: {digits}, x: 0) }}"));
        let mantissa = digits.split('e').next().unwrap_or("");
        let zero = !mantissa.contains(|c| ('1'..='9').contains(&c));
        let sound = digits.parse::<f64>().is_ok_and(|v| v.is_finite() && (zero || v != 0.0));
        let faults = read(&text).unwrap().faults;
        prop_assert_eq!(faults.is_empty(), sound, "{}: {:?}", digits, faults);
        prop_assert!(!sound || is_ron(&text), "{}", digits);
    }
}
