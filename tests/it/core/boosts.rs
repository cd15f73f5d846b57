//! Boosts of displacements: invariants, composition, range, against arbitrary precision.

use conewright::geometry::{Angle, Boost, Displacement, GeometryError, Rapidity, Separation};
use conewright::num::EPS;
use proptest::prelude::*;

use super::exact::{Big, absolute, big, relative};
use super::generators::{boost, displacement, planar_displacement, rapidity, two_rapidities};

fn along_x(eta: f64) -> Boost {
    Boost::along_x(Rapidity::new(eta).unwrap())
}

fn exact_interval(d: Displacement) -> Big {
    big(d.u) * big(d.v) - big(d.y) * big(d.y)
}

/// t, x, y of a passive planar boost in arbitrary precision, by the textbook form for a unit vector n:
/// t' = t ch - (n.r) sh, r' = r + n [(n.r)(ch - 1) - t sh].
fn exact_boost(b: Boost, d: Displacement) -> [Big; 3] {
    let two = big(2.0);
    let (t, x) = ((big(d.u) + big(d.v)) / &two, (big(d.v) - big(d.u)) / &two);
    let eta = big(b.rapidity().value());
    let (sh, ch) = (eta.sinh(), eta.cosh());
    let (c, s) = (big(b.angle().cos()), big(b.angle().sin()));
    let size = (&c * &c + &s * &s).sqrt();
    let (c, s) = (c / &size, s / &size);
    let along = &x * &c + big(d.y) * &s;
    let push = &along * (&ch - big(1.0)) - &t * &sh;
    [&t * ch - along * sh, x + &c * &push, big(d.y) + s * push]
}

#[test]
fn what_leaves_the_range_is_an_error_and_never_inf_or_zero() {
    let cases = [
        (1e140, 1.0, 50.0),
        (1.0, 1e-140, 50.0),
        (1e-160, 1.0, 0.0),
        (1e160, 1.0, 0.0),
        (1.0, 1.0, 599.0),
        (f64::NAN, 1.0, 0.0),
        (f64::INFINITY, 1.0, 0.0),
    ];
    for (u, v, eta) in cases {
        let result = along_x(eta).apply(Displacement::new(u, v, 0.0));
        assert!(
            matches!(result, Err(GeometryError::Range { .. })),
            "{u} {v} {eta}: {result:?}"
        );
    }
    let light = along_x(300.0).apply(Displacement::new(0.0, 1.0, 0.0));
    assert_eq!(light.unwrap().u, 0.0);
}

#[test]
fn a_boost_along_x_is_normalised() {
    let eta = Rapidity::new(0.7).unwrap();
    let back = Boost::new(eta, Angle::from_degrees(180.0));
    assert_eq!(back, Boost::along_x(-eta));
    assert!(back.is_along_x());
    let down = Boost::new(-eta, Angle::from_degrees(90.0));
    assert_eq!(down.angle(), Angle::from_degrees(-90.0));
    assert_eq!(down.rapidity(), eta);
    assert_eq!(
        Boost::new(Rapidity::ZERO, Angle::from_degrees(30.0)),
        Boost::IDENTITY
    );
}

#[test]
fn the_wigner_angle_is_the_published_one_for_perpendicular_boosts() {
    // tan(omega) = g1 g2 b1 b2 / (g1 + g2) up to sign, for perpendicular boosts: Jackson, Classical Electrodynamics,
    // 3rd ed., section 11.8 in the small, and Ferraro & Thibeault, Eur. J. Phys. 20 (1999) 143 (from memory).
    let (b1, b2) = (0.6, 0.8);
    let (g1, g2) = (1.25, 5.0 / 3.0);
    let first = along_x(Rapidity::from_beta(b1).unwrap().value());
    let second = Boost::new(Rapidity::from_beta(b2).unwrap(), Angle::from_degrees(90.0));
    let (whole, omega) = first.then(second).unwrap();
    let want = libm::atan(g1 * g2 * b1 * b2 / (g1 + g2)) * 180.0 / std::f64::consts::PI;
    assert!((omega - want).abs() < 1e-13, "{omega} {want}");
    // gamma of the whole is g1 g2; its velocity is (b1, b2 / g1).
    assert!((whole.rapidity().gamma() - g1 * g2).abs() < 4e-15);
    let direction = libm::atan2(b2 / g1, b1) * 180.0 / std::f64::consts::PI;
    assert!((whole.angle().degrees() - direction).abs() < 1e-13);
}

#[test]
fn parallel_boosts_add_their_rapidities_and_leave_no_rotation() {
    let way = Angle::from_degrees(37.0);
    let b = |eta: f64| Boost::new(Rapidity::new(eta).unwrap(), way);
    let (whole, omega) = b(0.25).then(b(-1.75)).unwrap();
    assert_eq!((whole, omega), (b(-1.5), 0.0));
    let (none, omega) = b(0.25).then(b(0.25).inverse()).unwrap();
    assert_eq!((none, omega), (Boost::IDENTITY, 0.0));
}

#[test]
fn kinds_are_exact_and_may_be_given_a_bound() {
    let step = |t, x| Displacement::from_tx(t, x);
    assert_eq!(step(1.0, 1.0).separation(), Separation::Lightlike);
    assert_eq!(step(1.0, 1.0 - EPS).separation(), Separation::Timelike);
    assert_eq!(step(1.0, 1.0 + EPS).separation(), Separation::Spacelike);
    let near = step(1.0, 1.0 + EPS);
    assert_eq!(near.separation_within(1e-15), Separation::Lightlike);
    // 3-4-5: on the cone of the plane to the last digit, and just off it.
    assert_eq!(Displacement::new(2.0, 8.0, 4.0).interval(), 0.0);
    let off = Displacement::new(2.0, 8.0, 4.0 * (1.0 + EPS));
    assert_eq!(off.separation(), Separation::Spacelike);
    assert_eq!(step(5.0, 3.0).length(), 4.0);
    assert_eq!(step(3.0, 5.0).length(), 4.0);
    assert_eq!(step(3.0, 5.0).rapidity(), None);
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(256))]

    #[test]
    fn the_interval_survives_a_boost_to_four_units(d in displacement(), eta in rapidity(280.0)) {
        let boosted = along_x(eta).apply(d).unwrap();
        prop_assert!(relative(boosted.interval(), &exact_interval(d)) <= 4.0 * EPS);
        prop_assert_eq!(boosted.separation(), d.separation());
    }

    #[test]
    fn the_interval_of_stored_components_keeps_its_digits(d in planar_displacement()) {
        prop_assert!(relative(d.interval(), &exact_interval(d)) <= 1.5 * EPS);
    }

    #[test]
    fn boosts_compose_to_the_stated_bound(d in displacement(), (a, b) in two_rapidities(140.0)) {
        let twice = along_x(b).apply(along_x(a).apply(d).unwrap()).unwrap();
        let once = along_x(a + b).apply(d).unwrap();
        // |a + b| EPS is the rounding of a + b itself.
        let bound = ((a + b).abs() + 6.0) * EPS;
        prop_assert!((twice.u - once.u).abs() <= bound * once.u.abs());
        prop_assert!((twice.v - once.v).abs() <= bound * once.v.abs());
        let exact = big(d.u) * (big(a) + big(b)).exp();
        prop_assert!(relative(twice.u, &exact) <= 6.0 * EPS);
    }

    #[test]
    fn a_boost_and_its_inverse_bring_a_displacement_back(d in displacement(), eta in rapidity(280.0)) {
        let there = along_x(eta).apply(d).unwrap();
        let back = along_x(eta).inverse().apply(there).unwrap();
        prop_assert!((back.u - d.u).abs() <= 6.0 * EPS * d.u.abs());
        prop_assert!((back.v - d.v).abs() <= 6.0 * EPS * d.v.abs());
    }

    #[test]
    fn planar_boosts_agree_with_the_textbook_form(d in planar_displacement(), b in boost(20.0)) {
        let got = b.apply(d).unwrap();
        let want = exact_boost(b, d);
        let bound = 8.0 * EPS * d.scale() * libm::exp(b.rapidity().value().abs());
        prop_assert!(absolute(got.t(), &want[0]) <= bound);
        prop_assert!(absolute(got.x(), &want[1]) <= bound);
        prop_assert!(absolute(got.y, &want[2]) <= bound);
    }

    #[test]
    fn two_planar_boosts_are_one_and_a_rotation(d in planar_displacement(), a in boost(6.0), b in boost(6.0)) {
        let twice = b.apply(a.apply(d).unwrap()).unwrap();
        let (whole, omega) = a.then(b).unwrap();
        let once = whole.apply(d).unwrap();
        let turned = Angle::from_degrees(omega).join(once.x(), once.y);
        let sizes = a.rapidity().value().abs() + b.rapidity().value().abs();
        let bound = 64.0 * EPS * d.scale() * libm::exp(sizes);
        prop_assert!((twice.t() - once.t()).abs() <= bound, "t");
        prop_assert!((twice.x() - turned.x).abs() <= bound, "x");
        prop_assert!((twice.y - turned.y).abs() <= bound, "y");
    }
}
