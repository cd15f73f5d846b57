//! Scenes drawn by lot (from fixed seeds), each proved in every one of its frames.

use std::fmt::Write as _;

use super::prove;
use super::real::keep_660_digits;

/// Sebastiano Vigna's splitmix64 (public domain, 2015).
struct Lot(u64);

impl Lot {
    fn next(&mut self) -> u64 {
        self.0 = self.0.wrapping_add(0x9e37_79b9_7f4a_7c15);
        let mut z = self.0;
        z = (z ^ (z >> 30)).wrapping_mul(0xbf58_476d_1ce4_e5b9);
        z = (z ^ (z >> 27)).wrapping_mul(0x94d0_49bb_1331_11eb);
        z ^ (z >> 31)
    }

    fn below(&mut self, n: u64) -> u64 {
        self.next() % n
    }

    fn one_of<'a>(&mut self, choices: &[&'a str]) -> &'a str {
        let count = u64::try_from(choices.len()).unwrap();
        choices[usize::try_from(self.below(count)).unwrap()]
    }

    /// Between two numbers, with so many decimals.
    fn between(&mut self, low: f64, high: f64, decimals: usize) -> String {
        let share = self.below(1 << 40) as f64 / (1_u64 << 40) as f64;
        format!("{:.decimals$}", low + share * (high - low))
    }

    /// Of a size between two powers of ten, either sign.
    fn of_size(&mut self, low: i64, high: i64) -> String {
        let exponent = low + self.below((high - low + 1).cast_unsigned()).cast_signed();
        let sign = self.one_of(&["", "-"]);
        format!(
            "{sign}{}.{}e{exponent}",
            1 + self.below(9),
            self.below(1_000_000)
        )
    }
}

/// How fast things go in a scene.
#[derive(Clone, Copy, Debug, PartialEq)]
enum Pace {
    Slow,
    Usual,
    Fast,
    Utmost,
}

impl Pace {
    /// A rapidity, its sign included.
    fn rapidity(self, lot: &mut Lot) -> String {
        let sign = lot.one_of(&["", "-"]);
        match self {
            Self::Slow => lot.of_size(-10, -3),
            Self::Usual => format!("{sign}{}", lot.between(0.01, 3.0, 9)),
            Self::Fast => format!("{sign}{}", lot.between(3.0, 20.0, 7)),
            // One way, so that no two things part by more than is promised.
            Self::Utmost => lot.between(100.0, 300.0, 5),
        }
    }

    /// A velocity in some form that holds its digits.
    fn velocity(self, lot: &mut Lot) -> String {
        match (self, lot.below(6)) {
            (Self::Slow, 0) => format!("Beta({})", lot.of_size(-10, -3)),
            (Self::Slow | Self::Usual, 1) => {
                format!("Beta(\"{} km/s\")", lot.between(-299_000.0, 299_000.0, 3))
            }
            (Self::Slow, 2) => format!("Celerity({})", lot.of_size(-10, -3)),
            (Self::Usual, 0) => format!("Beta({})", lot.between(-0.999, 0.999, 8)),
            (Self::Usual, 2) => format!("Doppler({})", lot.between(0.05, 20.0, 8)),
            (Self::Usual | Self::Fast, 3) => format!("Celerity({})", lot.of_size(-1, 3)),
            (Self::Fast, 0) => format!("Gamma({})", lot.between(2.0, 1e6, 4)),
            (Self::Fast, 2) => format!(
                "BehindLight({})",
                lot.of_size(-15, -2).replace('-', "").replace('e', "e-")
            ),
            _ => format!("Rapidity({})", self.rapidity(lot)),
        }
    }
}

fn events(lot: &mut Lot, pace: Pace) -> String {
    let mut text = String::new();
    for i in 0..4 {
        let (t, x) = (lot.between(-50.0, 50.0, 4), lot.between(-30.0, 30.0, 3));
        let _ = writeln!(text, "\"e{i}\": At(t: {t}, x: \"{x} m\"),");
    }
    let _ = writeln!(
        text,
        "\"tiny\": At(t: \"{} ns\", x: 0),",
        lot.of_size(-9, -3)
    );
    if pace != Pace::Utmost {
        let _ = writeln!(
            text,
            "\"moved\": At(t: 12.25, x: \"-3 c ns\", frame: \"f0\"),"
        );
        let _ = writeln!(
            text,
            "\"turned\": At(t: -7, x: 2.5, rapidity: {}),",
            pace.rapidity(lot)
        );
    }
    let clock = lot.between(-40.0, 40.0, 3);
    let _ = writeln!(
        text,
        "\"along\": Along(line: \"l0\", clock: \"{clock} ns\"),"
    );
    // Light overtakes what flees at rapidity y only after e^2y.
    let met = if pace == Pace::Utmost { "l1" } else { "l0" };
    let _ = writeln!(
        text,
        "\"seen\": LightFrom(event: \"e1\", meets: \"{met}\"),"
    );
    let _ = writeln!(
        text,
        "\"echo\": LightFrom(event: \"seen\", meets: \"rest\"),"
    );
    let _ = writeln!(text, "\"cross\": Meeting(of: [\"l0\", \"rest\"]),");
    let _ = writeln!(text, "\"flash\": Meeting(of: [\"ray\", \"l1\"]),");
    let _ = writeln!(
        text,
        "\"b0\": At(t: 0, x: \"{} m\"),",
        lot.between(-3.0, 3.0, 3)
    );
    let _ = writeln!(
        text,
        "\"b1\": At(t: 40, x: \"{} m\"),",
        lot.between(-3.0, 3.0, 3)
    );
    let _ = writeln!(
        text,
        "\"b2\": At(t: 75, x: \"{} m\"),",
        lot.between(-3.0, 3.0, 3)
    );
    let _ = writeln!(
        text,
        "\"on bent\": Along(line: \"bent\", clock: {}),",
        lot.between(-20.0, 90.0, 4)
    );
    text
}

fn lines(lot: &mut Lot, pace: Pace) -> String {
    let mut text = String::new();
    let _ = writeln!(
        text,
        "\"rest\": Free(through: \"e0\", velocity: Beta(0), clock: (\"e0\", 5)),"
    );
    let _ = writeln!(
        text,
        "\"l0\": Free(through: \"e2\", velocity: {}, from: \"e2\", until: \"along\"),",
        pace.velocity(lot)
    );
    let _ = writeln!(
        text,
        "\"l1\": Free(through: \"e3\", velocity: {}),",
        Pace::Usual.velocity(lot)
    );
    if pace != Pace::Utmost {
        let _ = writeln!(
            text,
            "\"in frame\": Free(through: \"e1\", velocity: {}, frame: \"f0\"),",
            pace.velocity(lot)
        );
    }
    let _ = writeln!(
        text,
        "\"ray\": Light(through: \"e0\", toward: {}, from: \"e0\"),",
        lot.one_of(&["Plus", "Minus"])
    );
    let _ = writeln!(text, "\"bent\": Broken(through: [\"b0\", \"b1\", \"b2\"]),");
    let _ = writeln!(
        text,
        "\"track\": Follows(particle: \"a\", through: \"tiny\"),"
    );
    text
}

/// The particle \"a\" and one of a part of its mass that goes with it: what is left is a particle, whatever they are.
fn pair(lot: &mut Lot, pace: Pace) -> String {
    let state = match lot.below(3) {
        0 if pace != Pace::Utmost => format!(
            "{}, angle: \"{} deg\"",
            pace.velocity(lot),
            lot.between(-179.0, 179.0, 4)
        ),
        _ => pace.velocity(lot),
    };
    let mass = lot.of_size(-4, 3).replace('-', "").replace('e', "e-");
    format!(
        "\"a\": (mass: {mass}, state: {state}),\n\"part\": (mass: \"{mass}*0.3\", state: {state}),\n"
    )
}

fn particles(lot: &mut Lot, pace: Pace) -> String {
    let mut text = pair(lot, pace);
    let mut add = |name: &str, mass: &str, state: String| {
        let _ = writeln!(text, "\"{name}\": (mass: {mass}, state: {state}),");
    };
    let mass = lot.between(0.001, 1000.0, 6);
    add("b", &mass, pace.velocity(lot));
    add(
        "c",
        "\"938.272 MeV/c^2\"",
        format!(
            "Kinetic(\"{} MeV\"), angle: {}",
            lot.of_size(-6, 6).trim_start_matches('-'),
            lot.between(-180.0, 180.0, 2)
        ),
    );
    add(
        "d",
        "0.14",
        format!(
            "Components(px: {}, py: {})",
            lot.of_size(-6, 4),
            lot.of_size(-6, 4)
        ),
    );
    add(
        "e",
        "\"0.511 MeV/c^2\"",
        format!(
            "Longitudinal(rapidity: {}, py: \"{} MeV/c\")",
            pace.rapidity(lot),
            lot.of_size(-3, 5)
        ),
    );
    add(
        "g",
        "0",
        format!(
            "Energy(\"{} keV\"), angle: {}",
            lot.of_size(-6, 12).trim_start_matches('-'),
            lot.one_of(&["0", "180", "90", "33.25", "-101", "0.001"])
        ),
    );
    add(
        "h",
        "0",
        format!(
            "Components(px: {}, py: {})",
            lot.of_size(-3, 3),
            lot.of_size(-6, 3)
        ),
    );
    add("rest", "1.25", "AtRest".to_owned());
    if pace != Pace::Utmost {
        add(
            "moved",
            "2",
            format!("{}, frame: \"f0\"", pace.velocity(lot)),
        );
        add(
            "far",
            "\"3 kg\"",
            format!(
                "Momentum(\"{} kg m/s\"), rapidity: {}",
                lot.of_size(-3, 12),
                pace.rapidity(lot)
            ),
        );
    }
    text.push_str(
        "\"sum\": (state: Closing),\n\"left\": (state: Closing),\n\"all\": (state: Closing),\n",
    );
    text
}

fn frames(lot: &mut Lot, pace: Pace) -> String {
    let mut text = String::new();
    let _ = writeln!(
        text,
        "\"f0\": Moving(velocity: {}, origin: \"e1\"),",
        pace.velocity(lot)
    );
    let _ = writeln!(
        text,
        "\"with l0\": RestOf(line: \"l0\", origin: \"along\"),"
    );
    let _ = writeln!(text, "\"with b\": RestOf(particle: \"b\"),");
    let _ = writeln!(text, "\"on bent\": RestOf(line: \"bent\", at: \"b1\"),");
    if pace != Pace::Utmost {
        let _ = writeln!(
            text,
            "\"f1\": Moving(velocity: {}, frame: \"f0\", origin: \"cross\"),",
            pace.velocity(lot)
        );
        let _ = writeln!(text, "\"balance\": CentreOfMomentum(of: \"merge\"),");
        let _ = writeln!(
            text,
            "\"some\": CentreOfMomentum(of: [\"b\", \"c\", \"h\"]),"
        );
    }
    if pace == Pace::Usual {
        let angle = lot.between(-180.0, 180.0, 3);
        let _ = writeln!(
            text,
            "\"slant\": Moving(velocity: {}, angle: \"{angle} deg\", origin: \"e0\"),",
            pace.velocity(lot)
        );
        let _ = writeln!(
            text,
            "\"turn\": Moving(velocity: {}, angle: 90, frame: \"slant\"),",
            pace.velocity(lot)
        );
        let _ = writeln!(text, "\"with d\": RestOf(particle: \"d\"),");
    }
    text
}

fn scene(lot: &mut Lot, pace: Pace) -> String {
    format!(
        "Scene(\nformat: 1, base: \"hall\", units: (time: \"ns\", {}energy: \"{}\"),\nevents: {{\n{}}},\nlines: {{\n{}}},\nparticles: {{\n{}}},\n\
         collisions: {{\n\"merge\": (before: [\"a\", \"b\"], after: [\"sum\"], closure: Merge),\n\
         \"loss\": (before: [\"a\", \"h\", \"b\"], after: [\"part\", \"left\"], closure: Remainder),\n\
         \"many\": (before: [\"b\", \"c\", \"d\", \"e\", \"g\", \"h\", \"rest\"], after: [\"all\"], closure: Merge),\n\
         \"given\": (before: [\"c\", \"d\"], after: [\"e\", \"rest\"], closure: Given),\n}},\nframes: {{\n{}}},\n)",
        lot.one_of(&["", "length: \"m\", ", "length: \"c ns\", "]),
        lot.one_of(&["GeV", "MeV", "eV", "TeV"]),
        events(lot, pace),
        lines(lot, pace),
        particles(lot, pace),
        frames(lot, pace),
    )
}

fn draw(pace: Pace, seeds: std::ops::Range<u64>, more: &[&str]) {
    for seed in seeds {
        let text = scene(&mut Lot(seed), pace);
        prove(&format!("{pace:?} {seed}"), &text, more);
    }
}

#[test]
fn slow_scenes_are_right() {
    draw(Pace::Slow, 100..108, &["1e-8"]);
}

#[test]
fn usual_scenes_are_right() {
    draw(Pace::Usual, 200..210, &["-1.7"]);
}

#[test]
fn fast_scenes_are_right() {
    draw(Pace::Fast, 300..308, &["18.5"]);
}

#[test]
fn scenes_at_rapidities_of_hundreds_are_right() {
    keep_660_digits();
    draw(Pace::Utmost, 400..404, &["250"]);
}
