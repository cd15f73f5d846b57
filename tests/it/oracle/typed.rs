//! What was typed in the base frame comes back there as typed, to the last digit. The reader to compare with is the
//! standard library's, which rounds correctly.

use std::fmt::Write as _;

use serde_json::Value;

use crate::program;

/// Numbers that do not survive being split and put together again, among others.
const NUMBERS: [&str; 10] = [
    "0.1", "0.3", "1.1", "2.675", "9.95", "123.456", "0.007", "1e-9", "3.3e7", "0.99",
];

fn same(what: &str, got: &Value, typed: &str) {
    let typed: f64 = typed.parse().unwrap();
    assert_eq!(got.as_f64(), Some(typed), "{what}: {got}");
}

fn scene(lists: &str) -> String {
    format!(
        "Scene(format: 1, base: \"hall\", units: (time: \"ns\", length: \"m\", energy: \"MeV\"), {lists})"
    )
}

/// The ledger from the base, said in each of the three ways.
fn ledgers(lists: &str) -> [Value; 3] {
    let ways: [&[&str]; 3] = [&[], &["--frame", "hall"], &["--rapidity", "0"]];
    ways.map(|options| program::ledger(&scene(lists), options))
}

#[test]
fn events_come_back_as_typed() {
    let mut events = String::new();
    for (i, t) in NUMBERS.iter().enumerate() {
        for (k, x) in NUMBERS.iter().enumerate() {
            let _ = writeln!(events, "\"{i} {k}\": At(t: {t}, x: -{x}),");
            let _ = writeln!(
                events,
                "\"{i} {k} text\": At(t: \"-{t} ns\", x: \"{x} m\", frame: \"hall\"),"
            );
        }
    }
    for json in ledgers(&format!("events: {{ {events} }}")) {
        let mut rows = json["events"].as_array().unwrap().iter();
        for t in NUMBERS {
            for x in NUMBERS {
                let row = rows.next().unwrap();
                same("t", &row["t"], t);
                same("x", &row["x"], &format!("-{x}"));
                let row = rows.next().unwrap();
                same("t", &row["t"], &format!("-{t}"));
                same("x", &row["x"], x);
            }
        }
    }
}

#[test]
fn exact_conversions_of_units_come_back_as_typed() {
    let lists = "events: { \"a\": At(t: \"0.1 us\", x: \"2.3 km\"), \"b\": At(t: \"0.7 s\", x: \"0.3 ls\") }, \
                 particles: { \"p\": (species: \"p\", state: Kinetic(\"0.3 GeV\")), \"q\": (species: \"p\", state: Energy(\"1.7 TeV\")) }";
    for json in ledgers(lists) {
        let events = &json["events"];
        same("t", &events[0]["t"], "100");
        same("x", &events[0]["x"], "2300");
        same("t", &events[1]["t"], "7e8");
        same("x", &events[1]["x"], "89937737.4");
        same("kinetic", &json["particles"][0]["kinetic"], "300");
        same("energy", &json["particles"][1]["energy"], "1.7e6");
    }
}

/// A state with a number in it, the mass, and where the number comes back with which sign.
const STATES: [(&str, &str, &str, &str); 22] = [
    ("Kinetic(#)", "938.27", "/kinetic", ""),
    ("Kinetic(#), angle: 33", "938.27", "/kinetic", ""),
    ("Kinetic(#), toward: Minus", "938.27", "/kinetic", ""),
    ("Energy(#)", "1e-10", "/energy", ""),
    ("Energy(#), angle: -71.3", "1e-10", "/energy", ""),
    ("Energy(#)", "0", "/energy", ""),
    ("Energy(#), angle: 12.5", "0", "/energy", ""),
    ("Momentum(#)", "938.27", "/momentum/0", ""),
    ("Momentum(-#)", "938.27", "/momentum/0", "-"),
    ("Momentum(#), angle: 180", "938.27", "/momentum/0", "-"),
    ("Momentum(#), angle: 90", "938.27", "/momentum/1", ""),
    ("Momentum(#)", "0", "/momentum/0", ""),
    ("Components(px: #, py: 3)", "938.27", "/momentum/0", ""),
    ("Components(px: 3, py: -#)", "938.27", "/momentum/1", "-"),
    ("Components(px: #, py: 3)", "0", "/momentum/0", ""),
    ("Components(px: -3, py: #)", "0", "/momentum/1", ""),
    (
        "Longitudinal(rapidity: 3, py: #)",
        "938.27",
        "/momentum/1",
        "",
    ),
    ("Kinetic(5), angle: #", "938.27", "/angle", ""),
    ("Momentum(5), angle: -#", "0", "/angle", "-"),
    ("Celerity(#), angle: 12.3", "938.27", "/mass", "938.27"),
    ("AtRest", "#", "/mass", ""),
    ("AtRest", "\"# MeV/c^2\"", "/transverse_mass", ""),
];

#[test]
fn states_come_back_as_typed() {
    for (state, mass, pointer, sign) in STATES {
        let mut particles = String::new();
        let wanted: Vec<&str> = NUMBERS
            .into_iter()
            .filter(|n| pointer != "/angle" || *n != "3.3e7")
            .collect();
        for number in &wanted {
            let fields = format!("mass: {mass}, state: {state}").replace('#', number);
            let _ = writeln!(particles, "\"{number}\": ({fields}),");
        }
        for json in ledgers(&format!("particles: {{ {particles} }}")) {
            for (row, number) in json["particles"].as_array().unwrap().iter().zip(&wanted) {
                let typed = match sign {
                    "" | "-" => format!("{sign}{number}"),
                    other => other.to_owned(),
                };
                let got = row.pointer(pointer).unwrap();
                same(&format!("{state} {mass} {pointer}"), got, &typed);
            }
        }
    }
}

#[test]
fn velocities_come_back_as_typed() {
    let betas = [
        "0.1",
        "0.3",
        "0.6",
        "0.95",
        "0.999",
        "0.123456789",
        "1e-9",
        "0.99999999",
    ];
    for beta in betas {
        let gamma = format!(
            "1{}",
            beta.trim_start_matches('0').replace("1e-9", ".000000001")
        );
        let lists = format!(
            "events: {{ \"o\": At(t: 0, x: 0) }}, lines: {{ \"l\": Free(through: \"o\", velocity: Beta(-{beta})), \
             \"r\": Free(through: \"o\", velocity: Rapidity({beta})) }}, particles: {{ \
             \"a\": (mass: 5, state: Beta({beta})), \"b\": (mass: 5, state: Beta(-{beta})), \
             \"c\": (mass: 5, state: Beta({beta}), angle: 47.1), \"d\": (mass: 5, state: BehindLight({beta}), toward: Minus), \
             \"e\": (mass: 5, state: Gamma({gamma})), \"f\": (mass: 5, state: Rapidity(-{beta})) }}"
        );
        for json in ledgers(&lists) {
            same("line", &json["lines"][0]["beta"], &format!("-{beta}"));
            same("line", &json["lines"][1]["rapidity"], beta);
            let particle = |i: usize, field: &str| json["particles"][i][field].clone();
            same("a", &particle(0, "beta"), beta);
            same("a", &particle(0, "beta_x"), beta);
            same("b", &particle(1, "beta"), beta);
            same("b", &particle(1, "beta_x"), &format!("-{beta}"));
            same("c", &particle(2, "beta"), beta);
            same("c", &particle(2, "angle"), "47.1");
            same("d", &particle(3, "one_minus_beta"), beta);
            same("e", &particle(4, "gamma"), &gamma);
            same("f", &particle(5, "rapidity"), &format!("-{beta}"));
        }
    }
}

/// The direction is where it goes, also where a negative number turns the motion round.
#[test]
fn a_negative_number_turns_the_direction_round() {
    for state in [
        "Beta(-0.5)",
        "Celerity(-2)",
        "Rapidity(-1)",
        "Momentum(-5)",
        "Doppler(0.5)",
    ] {
        let lists = format!("particles: {{ \"a\": (mass: 5, state: {state}, angle: 30) }}");
        let json = program::ledger(&scene(&lists), &[]);
        let row = &json["particles"][0];
        let angle = row["angle"].as_f64().unwrap();
        assert!((angle + 150.0).abs() < 1e-12, "{state}: {angle}");
        assert!(row["momentum"][1].as_f64().unwrap() < 0.0);
    }
}
