//! Collisions and decays.

use std::collections::BTreeMap;
use std::fmt::Write as _;

use serde_json::Value;

use super::{Case, case, number, scaled, scene, value_of};
use crate::facts::Row;
use crate::program;

/// What goes in and what is known of what comes out, and what is asked of the closing particle, which is the first.
const COLLISIONS: [(&str, &str, &str, &str, i32); 16] = [
    (
        "TB186",
        "(mass: 1, state: AtRest)",
        "(mass: 0.25, state: Beta(\"3/5\"))",
        "mass",
        2,
    ),
    (
        "TB188",
        "(mass: 1, state: AtRest); (mass: 0, state: Energy(1))",
        "(mass: 0, state: Energy(0.25), toward: Minus)",
        "beta",
        1,
    ),
    (
        "TB190",
        "(mass: 1, state: Beta(\"12/13\"))",
        "(mass: 0, state: Energy(\"8/5\"))",
        "mass",
        1,
    ),
    (
        "TB191",
        "(mass: 1, state: Beta(\"12/13\"))",
        "(mass: \"3/5\", state: Beta(\"4/5\"))",
        "energy",
        1,
    ),
    (
        "TB192",
        "(mass: 1, state: Beta(\"1/2\")); (mass: 1, state: Beta(\"1/2\"), angle: 90)",
        "",
        "mass",
        2,
    ),
    (
        "TB196",
        "(mass: 1, state: Beta(\"4/5\")); (mass: 1, state: Beta(\"-4/5\"))",
        "",
        "mass",
        1,
    ),
    (
        "TB207",
        "(mass: 1, state: Beta(\"4/5\")); (mass: 1, state: AtRest)",
        "",
        "mass",
        2,
    ),
    (
        "TB208",
        "(mass: 1, state: Beta(\"4/5\")); (mass: 1, state: AtRest)",
        "",
        "beta",
        1,
    ),
    (
        "TB234",
        "(mass: 1, state: Beta(\"3/5\")); (mass: 1, state: Beta(\"-3/5\"))",
        "",
        "mass",
        1,
    ),
    (
        "KN164",
        "(mass: 139.57039, state: AtRest)",
        "(mass: 0, state: Energy(\"(139.57039^2 - 105.6583755^2)/(2*139.57039)\"))",
        "kinetic",
        1,
    ),
    (
        "KN166",
        "(mass: 105.6583755, state: AtRest)",
        "(mass: 0, state: Energy(\"(105.6583755^2 - 0.51099895069^2)/(2*105.6583755)\"))",
        "energy",
        1,
    ),
    (
        "KN169",
        "(mass: 139.6, state: AtRest)",
        "(mass: 0, state: Energy(\"(139.6^2 - 105.7^2)/(2*139.6)\"))",
        "kinetic",
        1,
    ),
    (
        "KN170",
        "(mass: 135.0, state: AtRest)",
        "(mass: 0, state: Energy(67.5))",
        "energy",
        1,
    ),
    (
        "KN183",
        "(mass: 938.27208943, state: AtRest); (mass: 938.27208943, state: AtRest)",
        "(mass: 0, state: Energy(938.27208943), angle: 40)",
        "energy",
        1,
    ),
    (
        "KN188",
        "(mass: 125.25, state: AtRest)",
        "(mass: 0, state: Energy(\"125.25/2\"), angle: 90)",
        "energy",
        1,
    ),
    (
        "KN189",
        "(mass: 125.10, state: AtRest)",
        "(mass: 0, state: Energy(\"125.10/2\"), angle: -10)",
        "energy",
        1,
    ),
];

/// A collision of which one particle that comes out is found.
fn closed(before: &str, after: &str) -> String {
    let mut particles = "\"x\": (state: Closing), ".to_owned();
    let mut names = |side: &str, prefix: &str| -> String {
        let forms = side.split("; ").filter(|form| !form.is_empty());
        let named: Vec<String> = forms
            .enumerate()
            .map(|(i, form)| {
                let _ = write!(particles, "\"{prefix}{i}\": {form}, ");
                format!("\"{prefix}{i}\"")
            })
            .collect();
        named.join(", ")
    };
    let (going_in, coming_out) = (names(before, "in"), names(after, "out"));
    let closure = if after.is_empty() {
        "Merge"
    } else {
        "Remainder"
    };
    format!(
        "particles: {{ {particles} }}, collisions: {{ \"c\": (before: [{going_in}], after: [\"x\", {coming_out}], closure: {closure}) }}, \
         frames: {{ \"balance\": CentreOfMomentum(of: \"c\") }}"
    )
}

pub(super) fn collisions() -> BTreeMap<&'static str, Case> {
    let each = COLLISIONS
        .into_iter()
        .map(|(id, before, after, asked, power)| {
            let pointer = format!("/particles/0/{asked}");
            let value = move |json: &Value| {
                let x = number(json, &pointer);
                if power == 2 { x * x } else { x }
            };
            let lists = closed(before, after);
            (
                id,
                Case {
                    lists,
                    options: &[],
                    value: Box::new(value),
                },
            )
        });
    let mut cases: BTreeMap<_, _> = each.collect();
    let eta = "particles: { \"eta\": (mass: 547.9, state: AtRest), \"1\": (mass: 135.0, state: AtRest), \"2\": (mass: 135.0, state: AtRest) }, \
               collisions: { \"c\": (before: [\"eta\"], after: [\"1\", \"2\"], closure: Given) }";
    cases.insert("KN171", case(eta.to_owned(), "/collisions/0/q_value"));
    cases
}

const PROTON: &str = "0.93827208943";
const ELECTRON: &str = "0.00051099895069";

/// A beam on another or on a target at rest: mass and state of each.
const BEAMS: [(&str, &str, &str, &str, &str); 15] = [
    ("KN001", "0.493677", "Momentum(0.80)", PROTON, "AtRest"),
    (
        "KN191",
        "0.938272e-3",
        "Kinetic(7.00)",
        "0.938272e-3",
        "Kinetic(7.00)",
    ),
    ("KN195", PROTON, "Energy(7000)", PROTON, "AtRest"),
    ("KN196", "0.9389", "Energy(2760)", "0.9389", "AtRest"),
    ("KN198", PROTON, "Momentum(31)", PROTON, "AtRest"),
    ("KN200", PROTON, "Momentum(80)", PROTON, "AtRest"),
    ("KN202", "0.9389", "Energy(158)", "0.9389", "AtRest"),
    ("KN204", ELECTRON, "Energy(27.5)", PROTON, "Energy(920)"),
    ("KN207", ELECTRON, "Energy(9.0)", ELECTRON, "Energy(3.1)"),
    ("KN210", PROTON, "Energy(980)", PROTON, "Energy(980)"),
    ("KN212", "0.93149", "Energy(100)", "0.93149", "Energy(100)"),
    ("KN213", PROTON, "Energy(31.4)", PROTON, "Energy(31.4)"),
    ("KN214", ELECTRON, "Energy(18)", PROTON, "Energy(275)"),
    ("KN217", PROTON, "Energy(400)", PROTON, "AtRest"),
    ("KN218", PROTON, "Energy(450)", PROTON, "AtRest"),
];

pub(super) fn beams() -> BTreeMap<&'static str, Case> {
    let strike = |m1: &str, state: &str, m2: &str, other: &str| {
        let toward = if other == "AtRest" {
            ""
        } else {
            ", toward: Minus"
        };
        closed(
            &format!("(mass: {m1}, state: {state}); (mass: {m2}, state: {other}{toward})"),
            "",
        )
    };
    let mut cases = BTreeMap::new();
    for (id, m1, state, m2, other) in BEAMS {
        cases.insert(
            id,
            case(strike(m1, state, m2, other), "/collisions/0/root_s"),
        );
    }
    let balance: &[&str] = &["--frame", "balance"];
    let kaon = || strike("0.493677", "Momentum(0.80)", PROTON, "AtRest");
    cases.insert(
        "KN002",
        scaled(kaon(), balance, "/particles/1/momentum/0", 1.0),
    );
    cases.insert("KN004", scaled(kaon(), balance, "/frame/gamma", 1.0));
    let lhc = strike(PROTON, "Energy(7000)", PROTON, "AtRest");
    cases.insert("KN289", scaled(lhc, balance, "/frame/rapidity", 1.0));
    cases
}

/// A photon on an electron at rest: its energy in MeV, the cosine of its angle and the angle.
const COMPTON: [(&str, &str, &str, &str); 6] = [
    ("KN246", "0.6617", "-1", "180"),
    ("KN247", "0.6617", "-1", "180"),
    ("KN250", "0.51099895069", "-1", "180"),
    ("KN253", "0.01", "sqrt(3)/2", "30"),
    ("KN254", "0.1", "1/2", "60"),
    ("KN255", "1", "0", "90"),
];

/// The scattered photon has the energy of Compton's formula; what is left over must then have the electron's mass.
pub(super) fn compton() -> BTreeMap<&'static str, Case> {
    let mass = 0.51099895069;
    let each = COMPTON.into_iter().map(move |(id, energy, cos, angle)| {
        let out = format!("{energy}/(1 + {energy}/{mass}*(1 - ({cos})))");
        let lists = closed(
            &format!("(mass: 0, state: Energy({energy})); (mass: {mass}, state: AtRest)"),
            &format!("(mass: 0, state: Energy(\"{out}\"), angle: {angle})"),
        );
        let value = move |json: &Value| {
            let left = number(json, "/particles/0/mass");
            assert!(
                (left - mass).abs() < 1e-12,
                "{id}: what is left weighs {left}"
            );
            match id {
                "KN247" => number(json, "/particles/0/kinetic"),
                "KN250" => 1e3 * number(json, "/particles/3/energy"),
                _ => number(json, "/particles/3/energy"),
            }
        };
        (
            id,
            Case {
                lists,
                options: &[],
                value: Box::new(value),
            },
        )
    });
    each.collect()
}

/// A decay at rest into one daughter and all the others together, for each daughter: `M=3; m=1,1 MeV`. The daughter
/// has the energy (M^2 + m^2 - rest^2) / 2M, and what is left must then weigh as the rest does; of the momenta the
/// largest is the one that the tables give.
pub(super) fn decay(row: &Row) -> f64 {
    let inputs = row["inputs"].replace([' ', ';'], "").replace("MeV", "");
    // The masses of proton and electron are printed cut to ten digits, once that of the neutron; once the neutrinos
    // are left out.
    let mut inputs = inputs
        .replace("938.2720894", "938.27208943")
        .replace("0.5109989507", "0.51099895069")
        .replace("m_e=", "m=0,");
    if row["id"] == "KN157" {
        inputs = inputs.replace("939.5654219", "939.56542194");
    }
    let (parent, daughters) = inputs.trim_start_matches("M=").split_once("m=").unwrap();
    let masses: Vec<&str> = daughters.split(',').collect();
    let mut largest = 0.0_f64;
    for (i, mass) in masses.iter().enumerate() {
        let mut rest = masses.clone();
        rest.remove(i);
        let rest_mass: f64 = rest.iter().map(|m| m.parse::<f64>().unwrap()).sum();
        let rest = rest.join(" + ");
        let energy = format!("({parent}^2 + {mass}^2 - ({rest})^2)/(2*{parent})");
        let lists = closed(
            &format!("(mass: {parent}, state: AtRest)"),
            &format!("(mass: {mass}, state: Energy(\"{energy}\"))"),
        );
        let json = program::ledger(&scene("", &lists), &[]);
        let left = number(&json, "/particles/0/mass");
        // Where the rest is light beside its energy, its mass is the root of a difference.
        let bound = 1e-12 * value_of(parent) * value_of(parent) / rest_mass.max(1e-6);
        assert!(
            (left - rest_mass).abs() <= bound,
            "{}: {left} is left, not {rest_mass}",
            row["id"]
        );
        largest = largest.max(number(&json, "/particles/2/momentum/0"));
    }
    largest
}
