//! Scenes made for what is hard about them.

use std::fmt::Write as _;

use super::prove;
use crate::program;

/// Everything of the vocabulary once, in mixed units.
const YARD: &str = r#"Scene(
    format: 1,
    base: "yard",
    units: (time: "ns", length: "m", energy: "MeV"),
    species: { "Q": (mass: "620.5 MeV/c^2", charge: 1) },
    events: {
        "start": At(t: 0, x: 0),
        "later": At(t: "0.03 us", x: "2.5e-3 km"),
        "early": At(t: -12.75, x: "-4 c ns"),
        "far": At(t: 1, x: 1000),
        "moved": At(t: 7, x: 0.3, frame: "drift"),
        "turned": At(t: 20, x: -1.5, rapidity: "-0.8"),
        "noon": Along(line: "cart", clock: "12 ns"),
        "before": Along(line: "cart", clock: -5),
        "crossing": Meeting(of: ["cart", "rail"]),
        "touch": Meeting(of: ["flash", "cart"]),
        "seen": LightFrom(event: "later", meets: "cart"),
        "bend": At(t: 60, x: 3),
        "end": At(t: 90, x: -1.25),
        "on bent": Along(line: "bent", clock: "70.5 ns"),
        "light on bent": LightFrom(event: "later", meets: "bent"),
        "bent meets": Meeting(of: ["bent", "by celerity"]),
    },
    lines: {
        "cart": Free(through: "start", velocity: Beta("3/5"), until: "noon"),
        "rail": Free(through: "later", velocity: Beta(0), from: "later", until: "crossing"),
        "slow": Free(through: "early", velocity: Beta("75 km/s")),
        "fast": Free(through: "early", velocity: BehindLight(1e-9), toward: Minus),
        "by gamma": Free(through: "start", velocity: Gamma(1.25), toward: Minus, frame: "drift"),
        "by k": Free(through: "start", velocity: Doppler("5/2"), rapidity: 1.5),
        "by celerity": Free(through: "far", velocity: Celerity(-3.25), clock: ("far", "3 ns")),
        "bent": Broken(through: ["start", "bend", "end"], clock: ("bend", 50)),
        "flash": Light(through: "later", toward: Minus),
        "ray": Light(through: "start", toward: Plus, from: "start"),
        "track": Follows(particle: "lump", through: "start"),
        "slant": Follows(particle: "aside", through: "start", clock: ("start", 4)),
    },
    particles: {
        "beam": (species: "p", state: Kinetic("0.8 GeV")),
        "target": (species: "Q", state: AtRest),
        "lump": (state: Closing),
        "spare": (mass: 100, state: Beta("1/2"), frame: "drift"),
        "aside": (mass: "1.25 GeV", state: Celerity(2), angle: "30 deg"),
        "back": (species: "pi-", state: Energy(1000), toward: Minus),
        "up": (species: "K-", state: Momentum("0.9 GeV/c"), angle: 90),
        "down": (species: "mu-", state: Gamma(7), angle: "-120.5 deg"),
        "parts": (mass: 0.511, state: Components(px: -35.5, py: "0.002 GeV/c")),
        "stored": (mass: 938, state: Longitudinal(rapidity: -3, py: 250)),
        "light": (species: "gamma", state: Energy("1.5 GeV")),
        "light back": (mass: 0, state: Momentum(-40)),
        "light across": (mass: 0, state: Kinetic(3), angle: 90),
        "light slanted": (mass: 0, state: Components(px: 3, py: -4)),
        "light seen": (mass: 0, state: Energy(10), angle: 135, rapidity: 2),
        "behind": (mass: 5, state: BehindLight("1e-20"), toward: Minus),
        "by k": (mass: 5, state: Doppler(0.125)),
        "missing": (state: Closing),
        "gone": (species: "p", state: Kinetic("300 MeV"), angle: "20 deg"),
    },
    collisions: {
        "strike": (before: ["beam", "target"], after: ["lump"], closure: Merge, at: "noon"),
        "loss": (before: ["aside", "stored", "light"], after: ["gone", "missing"], closure: Remainder),
        "false": (before: ["beam", "up"], after: ["down", "light"], closure: Given),
        "pair": (before: ["light", "light back"], after: ["light across", "light slanted"], closure: Given),
    },
    frames: {
        "drift": Moving(velocity: Beta("1/4")),
        "back": Moving(velocity: Gamma(10), toward: Minus, origin: "later"),
        "slanted": Moving(velocity: Beta(0.6), angle: "50 deg"),
        "upward": Moving(velocity: Celerity(0.75), angle: 90, origin: "noon"),
        "further": Moving(velocity: Rapidity(1.25), frame: "drift", origin: "crossing"),
        "turned": Moving(velocity: Beta(0.5), angle: 75, frame: "slanted"),
        "with cart": RestOf(line: "cart", origin: "start"),
        "on bend": RestOf(line: "bent", at: "end"),
        "with slant": RestOf(line: "slant"),
        "with lump": RestOf(particle: "lump"),
        "with aside": RestOf(particle: "aside", origin: "early"),
        "balance": CentreOfMomentum(of: "strike"),
        "all": CentreOfMomentum(of: ["beam", "back", "down", "light slanted"]),
        "two photons": CentreOfMomentum(of: ["light", "light back"]),
    },
)"#;

#[test]
fn everything_of_the_vocabulary_is_right_in_every_frame() {
    let (used, count) = prove("yard", YARD, &["0.5", "-3", "1e-9", "12"]);
    assert!(count > 10_000, "{count}");
    assert!(used < 1.0);
}

/// A walker has a kinetic energy, and two of them meeting gain it as mass; far below what E^2 - p^2 can show.
#[test]
fn a_walker_keeps_the_digits_of_his_kinetic_energy() {
    let text = r#"Scene(
        format: 1, base: "street", units: (energy: "J"),
        particles: {
            "walker": (mass: "80 kg", state: Beta("1.5 m/s")),
            "a": (mass: "1 kg", state: Beta("1.5 m/s")),
            "b": (mass: "1 kg", state: Beta("-1.5 m/s")),
            "both": (state: Closing),
        },
        collisions: { "meet": (before: ["a", "b"], after: ["both"], closure: Merge) },
        frames: { "with him": RestOf(particle: "walker") },
    )"#;
    prove("walker", text, &["1e-9", "-2"]);
    let json = program::ledger(text, &[]);
    let q = json["collisions"][0]["q_value"].as_f64().unwrap();
    // In the frame of the sum the two bring 2 (gamma - 1) m c^2: 2.25 J and a part in 1e17.
    assert!((q + 2.25).abs() < 1e-14, "{q}");
    // 80 kg * (1.5 m/s)^2 / 2 = 90 J.
    let kinetic = json["particles"][0]["kinetic"].as_f64().unwrap();
    assert!((kinetic - 90.0).abs() < 1e-12, "{kinetic}");
}

/// The largest energy of a cosmic ray that was measured: 3.2e20 eV (D. J. Bird et al., Astrophys. J. 441, 144 (1995);
/// cited from memory).
#[test]
fn a_proton_of_3e20_ev_keeps_its_mass_and_its_delay() {
    let text = r#"Scene(
        format: 1, base: "ground", units: (time: "us", length: "km", energy: "GeV"),
        events: {
            "top": At(t: 0, x: 0),
            "station": At(t: 0, x: 30),
            "flash seen": LightFrom(event: "top", meets: "ground"),
            "impact": Meeting(of: ["proton", "ground"]),
        },
        lines: {
            "ground": Free(through: "station", velocity: Beta(0)),
            "proton": Follows(particle: "proton", through: "top", from: "top", until: "impact"),
        },
        particles: {
            "proton": (species: "p", state: Energy("3e20 eV")),
            "nucleon": (species: "p", state: AtRest),
            "slanted": (species: "p", state: Kinetic("3e20 eV"), angle: "0.5 deg"),
            "lump": (state: Closing),
        },
        collisions: { "blow": (before: ["proton", "nucleon"], after: ["lump"], closure: Merge) },
        frames: {
            "proton": RestOf(particle: "proton", origin: "top"),
            "balance": CentreOfMomentum(of: "blow"),
        },
    )"#;
    prove("proton", text, &["27", "-20"]);
}

/// E1 E2 (1 - cos a) with a = 1e-6 has no digits left in E^2 - p^2; from components typed to 30 digits it must have
/// those that doubles keep of a direction.
#[test]
fn two_photons_opened_by_a_millionth_have_a_mass() {
    let text = r#"Scene(
        format: 1, base: "lab", units: (energy: "GeV"),
        particles: {
            "a": (mass: 0, state: Energy(2), angle: 45),
            "b": (mass: 0, state: Energy(3), angle: "45 + 0.00005729577951308232"),
            "c": (mass: 0, state: Components(px: 1, py: 1)),
            "d": (mass: 0, state: Components(px: 1, py: "1.000002000002000001333334")),
            "ab": (state: Closing),
            "cd": (state: Closing),
        },
        collisions: {
            "first": (before: ["a", "b"], after: ["ab"], closure: Merge),
            "second": (before: ["c", "d"], after: ["cd"], closure: Merge),
        },
        frames: { "balance": CentreOfMomentum(of: "second") },
    )"#;
    prove("photons", text, &["3"]);
}

/// c is exact: light goes n x 0.299792458 m in n ns, for every n, and neither a little more nor a little less.
#[test]
fn n_ns_and_n_times_the_way_of_light_are_lightlike() {
    let mut events = String::from("\"o\": At(t: 0, x: 0),\n");
    for n in 1..=40_u64 {
        let way = n * 299_792_458;
        let _ = writeln!(
            events,
            "\"{n}\": At(t: {n}, x: {}{}.{:09}),",
            if n % 2 == 0 { "-" } else { "" },
            way / 1_000_000_000,
            way % 1_000_000_000,
        );
    }
    let scene = |events: &str| {
        format!(
            "Scene(format: 1, base: \"lab\", units: (time: \"ns\", length: \"m\"), events: {{ {events} }})"
        )
    };
    prove("light", &scene(&events), &["0.7", "-15"]);
    let json = program::ledger(&scene(&events), &[]);
    let from_origin = json["intervals"].as_array().unwrap().iter().take(40);
    let null = from_origin.filter(|row| row["kind"] == "lightlike").count();
    assert_eq!(null, 40);
    // A part in 1e15 off, either way, shows.
    let near = "\"o\": At(t: 0, x: 0), \"slower\": At(t: 7, x: 2.098547205999999),\n\
                \"faster\": At(t: 7, x: 2.098547206000001),";
    prove("near light", &scene(near), &[]);
    let json = program::ledger(&scene(near), &[]);
    assert_eq!(json["intervals"][0]["kind"], "timelike");
    assert_eq!(json["intervals"][1]["kind"], "spacelike");
}

/// One clock after another handed on by light and by meetings, seen from far and fast.
#[test]
fn long_chains_of_constructions_stay_within_their_bound() {
    let mut events = String::from("\"e0\": At(t: 0, x: 0), \"far\": At(t: 0, x: 700),\n");
    let mut lines = String::from(
        "\"l0\": Free(through: \"e0\", velocity: Beta(0)),\n\"l1\": Free(through: \"far\", velocity: Beta(\"-2/7\")),\n",
    );
    for i in 1..12 {
        let (line, last) = (i % 2, i - 1);
        let _ = writeln!(
            events,
            "\"e{i}\": LightFrom(event: \"e{last}\", meets: \"l{line}\"),"
        );
        let _ = writeln!(events, "\"a{i}\": Along(line: \"l{line}\", clock: {i}1.5),");
        let _ = writeln!(
            lines,
            "\"x{i}\": Free(through: \"e{i}\", velocity: Rapidity({}0.{i})),",
            if i % 3 == 0 { "-" } else { "" },
        );
    }
    let _ = writeln!(events, "\"m\": Meeting(of: [\"x2\", \"x3\"]),");
    let text = format!(
        "Scene(format: 1, base: \"hall\", units: (time: \"yr\", length: \"ly\"), events: {{ {events} }}, lines: {{ {lines} }}, frames: {{ \"x3\": RestOf(line: \"x3\", origin: \"m\") }})"
    );
    prove("chain", &text, &["5", "-9"]);
}

/// Two events given in a frame at rapidity 20 are as far apart as given, though in the base both are nearly null.
#[test]
fn events_given_in_a_fast_frame_keep_their_interval() {
    for eta in ["20", "-35", "300"] {
        let text = format!(
            "Scene(format: 1, base: \"hall\", events: {{ \
             \"a\": At(t: 2, x: 1, frame: \"far\"), \"b\": At(t: 9, x: 4, frame: \"far\"), \
             \"c\": At(t: 3, x: 5.5, frame: \"far\"), \"d\": At(t: 4, x: 3, frame: \"far\"), \
             \"o\": At(t: 0.125, x: 0), }}, \
             frames: {{ \"far\": Moving(velocity: Rapidity({eta})) }})"
        );
        let json = program::ledger(&text, &["--frame", "far"]);
        let rows = json["intervals"].as_array().unwrap();
        let wanted = [
            ("a", "b", "timelike", 40.0),
            ("a", "c", "spacelike", -19.25),
            ("a", "d", "lightlike", 0.0),
            ("b", "c", "timelike", 33.75),
        ];
        for (from, to, kind, squared) in wanted {
            let row = rows
                .iter()
                .find(|r| r["from"] == from && r["to"] == to)
                .unwrap();
            assert_eq!(row["kind"], kind, "{eta}: {row}");
            let got = row["squared"].as_f64().unwrap();
            assert!((got - squared).abs() <= 1e-11, "{eta}: {row}");
        }
    }
}

/// What is typed with few digits balances within half a last digit of each number: a kaon at rest gives two pions of
/// 205.97 MeV/c (497.611 and 139.57039 MeV, Particle Data Group 2026). 206.0 does for two of them, 206.2 does not.
#[test]
fn typed_digits_balance_within_half_the_last_one() {
    let text = r#"Scene(
        format: 1, base: "lab", units: (energy: "MeV"),
        particles: {
            "kaon": (mass: "497.611", state: AtRest),
            "plus": (species: "pi+", state: Momentum("206.0 MeV/c")),
            "minus": (species: "pi-", state: Momentum("-206.0 MeV/c")),
            "other": (species: "pi-", state: Momentum("-206.2 MeV/c")),
        },
        collisions: {
            "right": (before: ["kaon"], after: ["plus", "minus"], closure: Given),
            "wrong": (before: ["kaon"], after: ["plus", "other"], closure: Given),
        },
    )"#;
    prove("kaon", text, &["1.5"]);
    let json = program::ledger(text, &[]);
    let [right, wrong] = [0, 1].map(|i| json["collisions"][i].clone());
    // Half a digit of each pion's momentum, 0.05 MeV/c, moves px by as much; of the kaon's mass, 0.0005 MeV, E.
    for collision in [&right, &wrong] {
        let tolerance = collision["tolerance"].as_f64().unwrap();
        assert!((tolerance - 0.1005).abs() < 1e-8, "{tolerance}");
    }
    assert_eq!(right["balanced"], true);
    assert_eq!(wrong["balanced"], false);
}
