//! What hangs on what: one bad object spoils exactly what depends on it.

use std::collections::BTreeSet;

use crate::program::{audit, ledger};

/// Everything of every kind, each depending on others.
const WEB: &str = r#"Scene(
    format: 1,
    base: "yard",
    units: (time: "ns", length: "m", energy: "MeV"),
    species: { "Q": (mass: "620 MeV", charge: 1) },
    events: {
        "start": At(t: 0, x: 0),
        "later": At(t: 30, x: 2),
        "moved": At(t: 1, x: 0, frame: "drift"),
        "noon": Along(line: "cart", clock: "60 ns"),
        "crossing": Meeting(of: ["cart", "rail"]),
        "seen": LightFrom(event: "later", meets: "cart"),
    },
    lines: {
        "cart": Free(through: "start", velocity: Beta("3/5"), until: "noon"),
        "rail": Free(through: "later", velocity: Beta(0)),
        "bent": Broken(through: ["start", "noon", "late"]),
        "flash": Light(through: "later", toward: Minus),
        "track": Follows(particle: "lump", through: "start"),
    },
    particles: {
        "beam": (species: "p", state: Kinetic("800 MeV")),
        "target": (species: "Q", state: AtRest),
        "lump": (state: Closing),
        "spare": (mass: 100, state: Beta("1/2"), frame: "drift"),
    },
    collisions: {
        "strike": (before: ["beam", "target"], after: ["lump"], closure: Merge, at: "noon"),
    },
    frames: {
        "drift": Moving(velocity: Beta("1/4")),
        "with cart": RestOf(line: "cart", origin: "start"),
        "balance": CentreOfMomentum(of: "strike"),
        "with lump": RestOf(particle: "lump"),
    },
)"#;

/// The scene with one thing changed; the late event of the bent line is added here.
fn web(from: &str, to: &str) -> String {
    let whole = WEB.replace(
        "\"start\": At(t: 0, x: 0),",
        "\"start\": At(t: 0, x: 0),\n        \"late\": At(t: 200, x: 0),",
    );
    assert!(from.is_empty() || whole.contains(from), "{from}");
    if from.is_empty() {
        whole
    } else {
        whole.replacen(from, to, 1)
    }
}

/// Every object that the ledger holds, as `event start`.
fn held(text: &str) -> BTreeSet<String> {
    let json = ledger(text, &[]);
    let mut held = BTreeSet::new();
    for (list, word) in [
        ("events", "event"),
        ("lines", "line"),
        ("particles", "particle"),
        ("collisions", "collision"),
    ] {
        for object in json[list].as_array().unwrap() {
            held.insert(format!("{word} {}", object["name"].as_str().unwrap()));
        }
    }
    held
}

fn fallen(from: &str, to: &str) -> (BTreeSet<String>, Vec<String>) {
    let whole = held(&web("", ""));
    let text = web(from, to);
    let left = held(&text);
    let (_, lines) = audit(&text);
    (whole.difference(&left).cloned().collect(), lines)
}

fn set(names: &[&str]) -> BTreeSet<String> {
    names.iter().map(|n| (*n).to_owned()).collect()
}

#[test]
fn the_whole_web_is_sound() {
    let (code, lines) = audit(&web("", ""));
    assert_eq!((code, lines), (0, Vec::<String>::new()));
    assert_eq!(held(&web("", "")).len(), 7 + 5 + 4 + 1);
}

#[test]
fn a_bad_event_takes_along_what_stands_on_it() {
    let (gone, lines) = fallen("\"later\": At(t: 30", "\"later\": At(t: \"30 kg\"");
    assert_eq!(
        gone,
        set(&[
            "event later",
            "event crossing",
            "event seen",
            "line rail",
            "line flash"
        ])
    );
    assert_eq!(lines.len(), 1, "{lines:?}");
    assert!(
        lines[0].contains("event later") && lines[0].contains("a time"),
        "{lines:?}"
    );
}

#[test]
fn a_bad_line_takes_along_its_events_and_their_lines() {
    let (gone, lines) = fallen("Beta(\"3/5\"), until", "Beta(\"8/5\"), until");
    assert_eq!(
        gone,
        set(&[
            "line cart",
            "event noon",
            "event crossing",
            "event seen",
            "line bent"
        ])
    );
    assert_eq!(lines.len(), 1, "{lines:?}");
}

#[test]
fn a_trim_makes_no_dependency() {
    let (gone, lines) = fallen("clock: \"60 ns\"", "clock: \"60 MeV\"");
    assert_eq!(gone, set(&["event noon", "line bent"]));
    assert_eq!(lines.len(), 1, "{lines:?}");
}

#[test]
fn a_bad_particle_takes_along_its_collision_and_what_that_makes() {
    let (gone, lines) = fallen("Kinetic(\"800 MeV\")", "Kinetic(\"-800 MeV\")");
    assert_eq!(
        gone,
        set(&[
            "particle beam",
            "particle lump",
            "collision strike",
            "line track"
        ])
    );
    assert_eq!(lines.len(), 1, "{lines:?}");
}

#[test]
fn a_bad_collision_takes_along_what_it_closes() {
    let (gone, lines) = fallen("closure: Merge", "closure: Given");
    assert_eq!(
        gone,
        set(&["particle lump", "collision strike", "line track"])
    );
    assert_eq!(lines.len(), 1, "{lines:?}");
}

#[test]
fn a_bad_frame_takes_along_what_is_typed_in_it() {
    let (gone, lines) = fallen(
        "Moving(velocity: Beta(\"1/4\"))",
        "Moving(velocity: Gamma(\"1/4\"))",
    );
    assert_eq!(gone, set(&["event moved", "particle spare"]));
    assert_eq!(lines.len(), 1, "{lines:?}");
}

#[test]
fn a_bad_species_takes_along_its_particles() {
    let (gone, lines) = fallen("mass: \"620 MeV\"", "mass: \"620 ns\"");
    assert_eq!(
        gone,
        set(&[
            "particle target",
            "particle lump",
            "collision strike",
            "line track"
        ])
    );
    assert_eq!(lines.len(), 1, "{lines:?}");
}

#[test]
fn an_object_that_does_not_read_spoils_the_same_as_one_at_fault() {
    let (gone, lines) = fallen("\"later\": At(t: 30, x: 2)", "\"later\": At(t: 30, y: 2)");
    assert_eq!(
        gone,
        set(&[
            "event later",
            "event crossing",
            "event seen",
            "line rail",
            "line flash"
        ])
    );
    assert_eq!(lines.len(), 1, "{lines:?}");
    assert!(lines[0].contains("event later"), "{lines:?}");
}

#[test]
fn a_missing_name_offers_the_nearest() {
    let (gone, lines) = fallen("meets: \"cart\"", "meets: \"cartt\"");
    assert_eq!(gone, set(&["event seen"]));
    assert!(lines[0].contains("perhaps \"cart\" is meant"), "{lines:?}");
    let column = lines[0]
        .split(':')
        .nth(2)
        .unwrap()
        .parse::<usize>()
        .unwrap();
    let text = web("meets: \"cart\"", "meets: \"cartt\"");
    let line = text.lines().find(|l| l.contains("cartt")).unwrap();
    assert_eq!(column, line.find("\"cartt\"").unwrap() + 1);
}

#[test]
fn a_cycle_is_named_as_the_cycle_it_is() {
    let (code, lines) = audit(
        r#"Scene(format: 1, base: "b",
    events: {
        "a": Along(line: "l", clock: 1),
        "free": At(t: 0, x: 0),
        "after": LightFrom(event: "a", meets: "m"),
    },
    lines: {
        "l": Free(through: "a", velocity: Beta(0)),
        "m": Free(through: "free", velocity: Beta(0)),
    },
)"#,
    );
    assert_eq!(code, 1);
    assert_eq!(lines.len(), 1, "{lines:?}");
    assert!(
        lines[0].contains("event a -> line l -> event a"),
        "{lines:?}"
    );
}

#[test]
fn a_long_chain_is_only_long() {
    use std::fmt::Write as _;
    const LINKS: usize = 49_999;
    let mut events = String::from("\"e0\": At(t: 0, x: 0),\n");
    let mut lines = String::new();
    for i in 0..LINKS {
        writeln!(
            lines,
            "\"l{i}\": Free(through: \"e{i}\", velocity: Beta(\"1/{}\")),",
            i % 7 + 2
        )
        .unwrap();
        writeln!(events, "\"e{}\": Along(line: \"l{i}\", clock: 1),", i + 1).unwrap();
    }
    let text =
        format!("Scene(format: 1, base: \"b\", events: {{\n{events}}}, lines: {{\n{lines}}})");
    let json = ledger(&text, &[]);
    assert_eq!(json["events"].as_array().unwrap().len(), LINKS + 1);
    assert_eq!(json["faults"].as_array().unwrap().len(), 0);
    assert!(json["events"][LINKS]["t"].as_f64().unwrap() > LINKS as f64);
}

#[test]
fn collisions_close_one_another_in_a_chain() {
    let json = ledger(
        r#"Scene(format: 1, base: "hall", units: (energy: "MeV"),
    particles: {
        "a": (mass: 500, state: Celerity("3/4")),
        "b": (mass: 500, state: Celerity("-3/4")),
        "ab": (state: Closing),
        "c": (mass: 200, state: AtRest),
        "d": (state: Closing),
    },
    collisions: {
        "second": (before: ["ab"], after: ["c", "d"], closure: Remainder),
        "first": (before: ["a", "b"], after: ["ab"], closure: Merge),
    },
)"#,
        &[],
    );
    // gamma = 5/4 for a celerity of 3/4, so the lump has 2 x 625 MeV, at rest; what is left of it too.
    assert_eq!(
        json["faults"].as_array().unwrap().len(),
        0,
        "{}",
        json["faults"]
    );
    let mass = |i: usize| json["particles"][i]["mass"].as_f64().unwrap();
    approx::assert_relative_eq!(mass(2), 1250.0, max_relative = 1e-14);
    approx::assert_relative_eq!(mass(4), 1050.0, max_relative = 1e-14);
}

#[test]
fn an_unbalanced_collision_is_a_finding_with_its_numbers() {
    let (code, lines) = audit(
        r#"Scene(format: 1, base: "hall", units: (energy: "MeV"),
    particles: {
        "in": (mass: 500, state: AtRest),
        "out": (mass: "499.5", state: AtRest),
    },
    collisions: { "slip": (before: ["in"], after: ["out"], closure: Given) },
)"#,
    );
    assert_eq!((code, lines.len()), (1, 1), "{lines:?}");
    assert!(
        lines[0].contains("collision slip") && lines[0].contains("-0.5"),
        "{lines:?}"
    );
}

#[test]
fn typed_digits_are_compared_within_half_the_last() {
    let scene = |out: &str| {
        format!(
            r#"Scene(format: 1, base: "hall", units: (energy: "MeV"),
    particles: {{
        "in": (mass: "500.0", state: AtRest),
        "out": (mass: "{out}", state: AtRest),
    }},
    collisions: {{ "slip": (before: ["in"], after: ["out"], closure: Given) }},
)"#
        )
    };
    assert_eq!(audit(&scene("500.1")).0, 0);
    assert_eq!(audit(&scene("500.11")).0, 1);
}

#[test]
fn an_end_off_its_line_is_a_fault_of_that_end() {
    let (code, lines) = audit(
        r#"Scene(format: 1, base: "b",
    events: { "o": At(t: 0, x: 0), "off": At(t: 5, x: 1) },
    lines: { "l": Free(through: "o", velocity: Beta(0), until: "off") },
)"#,
    );
    assert_eq!((code, lines.len()), (1, 1), "{lines:?}");
    assert!(
        lines[0].contains("line l") && lines[0].contains("does not lie on it"),
        "{lines:?}"
    );
}

#[test]
fn an_event_beyond_its_line_is_a_finding() {
    let (code, lines) = audit(
        r#"Scene(format: 1, base: "b",
    events: { "o": At(t: 0, x: 0), "end": At(t: 5, x: 0), "past": Along(line: "l", clock: 7) },
    lines: { "l": Free(through: "o", velocity: Beta(0), until: "end") },
)"#,
    );
    assert_eq!((code, lines.len()), (1, 1), "{lines:?}");
    assert!(
        lines[0].contains("event past") && lines[0].contains("ends at end"),
        "{lines:?}"
    );
}

#[test]
fn events_that_are_only_named_must_be_there() {
    for (from, to, gone) in [
        ("at: \"noon\"", "at: \"nowhere\"", "collision strike"),
        ("until: \"noon\"", "until: \"nowhere\"", "line cart"),
    ] {
        let (fallen, lines) = fallen(from, to);
        assert!(fallen.contains(gone), "{fallen:?}");
        assert_eq!(lines.len(), 1, "{lines:?}");
        assert!(lines[0].contains("no event named \"nowhere\""), "{lines:?}");
    }
}

#[test]
fn typed_digits_are_carried_through_a_closure() {
    // 939.5 is typed to 0.05; what is merged carries that on to where it is checked.
    let scene = |out: &str| {
        format!(
            r#"Scene(format: 1, base: "hall", units: (energy: "MeV"),
    particles: {{
        "a": (mass: "939.5", state: AtRest),
        "b": (mass: "1.0", state: AtRest),
        "ab": (state: Closing),
        "out": (mass: "{out}", state: AtRest),
    }},
    collisions: {{
        "merge": (before: ["a", "b"], after: ["ab"], closure: Merge),
        "check": (before: ["ab"], after: ["out"], closure: Given),
    }},
)"#
        )
    };
    assert_eq!(audit(&scene("940.6")).0, 0);
    assert_eq!(audit(&scene("940.7")).0, 1);
}

#[test]
fn a_species_of_the_scene_is_at_fault_itself() {
    let (_, lines) = fallen("mass: \"620 MeV\"", "mass: \"620 ns\"");
    assert!(lines[0].contains("species Q"), "{lines:?}");
}
