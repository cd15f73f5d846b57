//! Published worked examples and answers, each with its source and tolerance in `tests/facts/textbook.csv`. Rows of
//! provenance `memory` are cross-checks only.

use conewright::dynamics::{Momentum, Total, remainder};
use conewright::geometry::{Angle, Boost, Displacement, Leg, Rapidity, Side, Worldline};

use crate::facts::{row, rows};

/// The published number: a decimal, or an exact quotient.
fn published(text: &str) -> f64 {
    match text.split_once('/') {
        Some((a, b)) => a.parse::<f64>().unwrap() / b.parse::<f64>().unwrap(),
        None => text.parse().unwrap(),
    }
}

fn check(values: &[(&str, f64)]) {
    let rows = rows("textbook.csv");
    for &(id, got) in values {
        let row = row(&rows, id);
        let want = published(&row["published_value"]);
        let tolerance = match row["tolerance"].as_str() {
            "exact" => 4e-15 * want.abs(),
            text => text.parse().unwrap(),
        };
        // A published digit that ends on a five rounds either way.
        let tolerance = tolerance * (1.0 + 1e-9);
        assert!(
            (got - want).abs() <= tolerance,
            "{id} {}: {got}, published {want} ({})",
            row["quantity"],
            row["source"]
        );
    }
}

fn eta(beta: f64) -> Rapidity {
    Rapidity::from_beta(beta).unwrap()
}

/// What moves at `b` in a frame that moves at `a`.
fn added(a: f64, b: f64) -> f64 {
    eta(a).then(eta(b)).unwrap().beta()
}

fn seen(beta: f64, t: f64, x: f64) -> Displacement {
    let frame = Boost::along_x(eta(beta));
    frame.apply(Displacement::from_tx(t, x)).unwrap()
}

#[test]
fn velocities_add_as_published() {
    check(&[
        ("TB020", added(0.5, 0.75)),
        ("TB044", eta(0.95).relative_to(eta(0.75)).unwrap().beta()),
        ("TB074", added(-0.75, 0.5)),
        ("TB075", added(-0.75, -0.5)),
        ("TB091", added(0.75, -0.5)),
        ("TB095", eta(0.75).relative_to(eta(0.95)).unwrap().beta()),
        ("TB132", added(-4.0 / 5.0, 3.0 / 5.0)),
        ("TB138", added(-0.75, -0.75)),
        ("TB199", added(0.8, 0.8)),
        ("TB201", added(0.8, -0.1)),
        ("TB227", added(0.5, 0.5)),
        ("TB238", added(0.9, -0.85)),
    ]);
    // TB042 has a velocity beyond light on purpose.
    assert!(Rapidity::from_beta(1.2).is_err());
}

#[test]
fn velocities_add_in_the_plane_as_published() {
    let up = |frame: f64, beta: f64| {
        let first = Boost::along_x(eta(frame));
        let second = Boost::new(eta(beta), Angle::from_degrees(90.0));
        let (whole, _) = first.then(second).unwrap();
        whole.angle().unit() * whole.rapidity().beta()
    };
    check(&[
        ("TB133", up(3.0 / 5.0, 4.0 / 5.0).y),
        ("TB178", up(12.0 / 13.0, 40.0 / 41.0).x),
    ]);
}

#[test]
fn gammas_are_as_published() {
    let beta = |gamma| Rapidity::from_gamma(gamma, Side::Plus).unwrap().beta();
    check(&[
        ("TB004", eta(0.95).gamma()),
        ("TB035", eta(0.25).gamma()),
        ("TB058", beta(2.0)),
        ("TB085", beta(1.5)),
        ("TB086", beta(100.0)),
        ("TB123", eta(0.997).gamma()),
        ("TB202", eta(0.98).gamma()),
        ("TB203", eta(0.9999).gamma()),
        ("TB205", eta(0.87).gamma()),
        ("TB017", 100.0 / eta(0.2).gamma()),
        ("TB037", 2.6e-8 * eta(2.7 / 3.0).gamma()),
        (
            "TB055",
            1000.0 * 45.0 * 45.0 * eta(30.0 / 45.0).kinetic_per_rest(),
        ),
        ("TB116", 938.0 * eta(0.75).kinetic_per_rest()),
        (
            "TB082",
            Momentum::from_kinetic(938.3, 50.0, Angle::ZERO)
                .unwrap()
                .beta(),
        ),
    ]);
}

#[test]
fn doppler_factors_are_as_published() {
    let light = |degrees| Momentum::from_energy(0.0, 10.0, Angle::from_degrees(degrees)).unwrap();
    let source = |beta| Boost::along_x(eta(beta));
    // The frequency at home of 10 GHz light sent along +x, then one seen across.
    let forward = light(0.0).boosted(source(40.0 / 41.0).inverse()).unwrap();
    let frame = source(40.0 / 41.0);
    let across = 10.0 * 10.0 / light(90.0).boosted(frame).unwrap().energy();
    check(&[
        ("TB077", 1000.0 / eta(0.25).doppler()),
        ("TB130", eta(0.8).doppler()),
        ("TB135", forward.energy()),
        ("TB137", across),
        ("TB181", 1.0 / eta(0.6).doppler()),
        ("TB198", eta(0.6).doppler()),
    ]);
}

#[test]
fn coordinates_transform_as_published() {
    let twelve = 12.0 / 13.0;
    check(&[
        // 3.00e8 m/s and metres and seconds, as the source has them.
        ("TB018", seen(0.5, 0.0, 26.0 / 3e8 / eta(0.5).gamma()).t()),
        ("TB066", seen(0.5, 0.0, 1.0).x()),
        ("TB067", seen(0.6, 4.5e-4, 150e3 / 3e8).t()),
        ("TB139", seen(twelve, 1.0, 0.0).t()),
        ("TB142", seen(twelve, 0.0, 1.0).x()),
        ("TB143", seen(twelve, 1.0, 3.0).t()),
        ("TB144", seen(twelve, 1.0, 3.0).x()),
        ("TB147", seen(twelve, 1.0, 2.0).t()),
        ("TB149", seen(twelve, 3.0, 4.0).t()),
        ("TB157", seen(twelve, 4.0, 5.0).t()),
        ("TB160", seen(-0.6, 1.0, 0.0).t()),
        ("TB161", seen(-0.6, 1.0, 0.0).x()),
        ("TB162", seen(-0.6, 2.0, 1.0).t()),
        ("TB163", seen(-0.6, 2.0, 1.0).x()),
        (
            "TB159",
            -(Displacement::from_tx(4.0, 5.0) - Displacement::from_tx(3.0, 3.0))
                .interval()
                .abs(),
        ),
    ]);
}

#[test]
fn fused_masses_and_speeds_are_as_published() {
    let unit = |beta: f64, degrees| {
        Momentum::moving(1.0, eta(beta), Angle::from_degrees(degrees)).unwrap()
    };
    let still = Momentum::at_rest(1.0).unwrap();
    let perpendicular = Total::of(&[unit(0.5, 0.0), unit(0.5, 90.0)]);
    let struck = Total::of(&[unit(0.8, 0.0), still]);
    let fragment = Momentum::moving(0.25, eta(0.6), Angle::ZERO).unwrap();
    let other = remainder(&[still], &[fragment]).unwrap();
    check(&[
        (
            "TB192",
            perpendicular.invariant_mass * perpendicular.invariant_mass,
        ),
        (
            "TB196",
            Total::of(&[unit(0.8, 0.0), unit(-0.8, 0.0)]).invariant_mass,
        ),
        ("TB207", struck.invariant_mass * struck.invariant_mass),
        (
            "TB208",
            struck.centre_of_momentum().unwrap().rapidity().beta(),
        ),
        (
            "TB234",
            Total::of(&[unit(0.6, 0.0), unit(0.6, 180.0)]).invariant_mass,
        ),
        ("TB186", other.mass() * other.mass()),
    ]);
}

#[test]
fn a_bent_line_ages_less_as_in_any_text_on_the_twins() {
    // Out and back at 4/5 for 10: 6. (oracle_propertime.csv OP003 has the same.)
    let line = Worldline::broken(
        &[
            Displacement::ZERO,
            Displacement::from_tx(5.0, 4.0),
            Displacement::from_tx(10.0, 0.0),
        ],
        0,
        0.0,
    )
    .unwrap();
    assert_eq!(line.clock_at(Displacement::from_tx(10.0, 0.0)), Ok(6.0));
    let home = Worldline::straight(Leg::free(Rapidity::ZERO), Displacement::ZERO, 0.0);
    assert_eq!(home.clock_at(Displacement::from_tx(10.0, 0.0)), Ok(10.0));
}
