//! Every form of a velocity, as well as that form can hold it.

use conewright::geometry::{Angle, GeometryError, Rapidity, Side};
use conewright::num::EPS;
use proptest::prelude::*;

use super::exact::{big, f64_of, relative};
use super::generators::{rapidity, two_rapidities};

/// The speed of light in m/s, exact by definition of the metre (SI Brochure, 9th edition).
const C: f64 = 299_792_458.0;

#[test]
fn a_walker_has_the_right_kinetic_energy_to_fourteen_digits() {
    // m c^2 (gamma - 1) in arbitrary precision, gamma from v/c as f64 has it.
    let beta = 1.5 / C;
    let walker = Rapidity::from_beta(beta).unwrap();
    let one = big(1.0);
    let gamma = &one / (&one - big(beta) * big(beta)).sqrt();
    let want = big(80.0) * (gamma - &one) * big(C) * big(C);
    let got = 80.0 * walker.kinetic_per_rest() * C * C;
    assert!(relative(got, &want) < 1e-14, "{got} J");
    assert!((got - 90.0).abs() < 1e-12, "90 J to first order");
}

#[test]
fn a_cosmic_ray_proton_has_the_right_one_minus_beta() {
    // 3e20 eV on 938.27208943 MeV (CODATA 2022).
    let k = 3e20 / 938.27208943e6;
    let eta = Rapidity::from_kinetic_per_rest(k, Side::Plus).unwrap();
    let one = big(1.0);
    let gamma = big(k) + &one;
    let want = &one - (&one - &one / (&gamma * &gamma)).sqrt();
    assert!(relative(eta.one_minus_beta(), &want) < 30.0 * EPS);
}

#[test]
fn every_form_reads_to_the_rapidity_that_arbitrary_precision_gives() {
    let one = big(1.0);
    for &beta in &[1e-15, 5e-9, 1e-3, 0.1, 0.6, 0.9, 0.999999, 1.0 - EPS / 2.0] {
        let want = big(beta).atanh();
        let got = Rapidity::from_beta(beta).unwrap().value();
        assert!(relative(got, &want) < 2.0 * EPS, "beta {beta}");
    }
    for &d in &[
        1.0 - 1e-12,
        0.9,
        0.51,
        0.5,
        0.1,
        1e-5,
        1e-20,
        1e-200,
        1e-300,
    ] {
        let want = ((big(2.0) - big(d)) / big(d)).ln() / big(2.0);
        let got = Rapidity::from_one_minus_beta(d, Side::Plus).unwrap();
        assert!(relative(got.value(), &want) < 2.0 * EPS, "1 - beta {d}");
    }
    for &k in &[1e-20, 1e-9, 1e-3, 0.25, 1.0, 7.0, 1e6, 3e11, 1e200] {
        let want = (big(k) / big(2.0)).sqrt().asinh() * big(2.0);
        let got = Rapidity::from_kinetic_per_rest(k, Side::Plus).unwrap();
        assert!(relative(got.value(), &want) < 3.0 * EPS, "gamma - 1 {k}");
        let gamma = big(k) + &one;
        if f64_of(&gamma) - 1.0 == k {
            let got = Rapidity::from_gamma(1.0 + k, Side::Minus).unwrap();
            assert!(relative(-got.value(), &want) < 3.0 * EPS, "gamma {k}");
        }
    }
    for &p in &[-1e-20, 1e-9, 0.75, -4.0, 1e10, 1e200] {
        let got = Rapidity::from_celerity(p).unwrap().value();
        assert!(relative(got, &big(p).asinh()) < 2.0 * EPS, "celerity {p}");
    }
    for &k in &[1e-200, 0.5, 1.0 + 1e-12, 2.0, 1e200] {
        let got = Rapidity::from_doppler(k).unwrap().value();
        assert!(relative(got, &big(k).ln()) < 2.0 * EPS, "k {k}");
    }
}

#[test]
fn what_no_velocity_can_be_is_a_domain_error() {
    let wrong = [
        Rapidity::new(600.1),
        Rapidity::new(f64::NAN),
        Rapidity::from_beta(1.0),
        Rapidity::from_beta(-1.2),
        Rapidity::from_beta(f64::NAN),
        Rapidity::from_one_minus_beta(0.0, Side::Plus),
        Rapidity::from_one_minus_beta(1.1, Side::Plus),
        Rapidity::from_gamma(0.99, Side::Plus),
        Rapidity::from_gamma(f64::INFINITY, Side::Plus),
        Rapidity::from_kinetic_per_rest(-1e-9, Side::Plus),
        Rapidity::from_celerity(f64::INFINITY),
        Rapidity::from_doppler(0.0),
        Rapidity::from_doppler(-2.0),
        Rapidity::new(400.0)
            .unwrap()
            .then(Rapidity::new(300.0).unwrap()),
    ];
    for result in wrong {
        assert!(
            matches!(result, Err(GeometryError::Domain { .. })),
            "{result:?}"
        );
    }
    assert!(Rapidity::new(600.0).is_ok() && Rapidity::new(-600.0).is_ok());
}

#[test]
fn an_error_says_what_the_number_may_be() {
    let error = Rapidity::from_beta(1.2).unwrap_err();
    assert_eq!(error.to_string(), "beta must be between -1 and 1, not 1.2");
}

#[test]
fn multiples_of_ninety_degrees_are_exact() {
    let exact = [
        (0.0, 1.0, 0.0),
        (90.0, 0.0, 1.0),
        (180.0, -1.0, 0.0),
        (-90.0, 0.0, -1.0),
        (-180.0, -1.0, 0.0),
        (270.0, 0.0, -1.0),
        (360.0, 1.0, 0.0),
        (-450.0, 0.0, -1.0),
        (3690.0, 0.0, 1.0),
    ];
    for (degrees, cos, sin) in exact {
        let angle = Angle::from_degrees(degrees);
        assert_eq!((angle.cos(), angle.sin()), (cos, sin), "{degrees}");
    }
    assert_eq!(Angle::from_degrees(-180.0).degrees(), 180.0);
    assert_eq!(Angle::from_degrees(60.0).cos(), 0.5);
    let diagonal = Angle::from_degrees(-135.0);
    assert_eq!(diagonal.cos(), diagonal.sin());
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(256))]

    #[test]
    fn every_form_gives_back_what_arbitrary_precision_gives(y in rapidity(300.0)) {
        let eta = Rapidity::new(y).unwrap();
        let y = big(y);
        let two = big(2.0);
        let half = (&y / &two).sinh();
        let size = if y < big(0.0) { -y.clone() } else { y.clone() };
        let rest = &two / ((&two * &size).exp() + big(1.0));
        prop_assert!(relative(eta.beta(), &y.tanh()) < 2.0 * EPS);
        prop_assert!(relative(eta.gamma(), &y.cosh()) < 2.0 * EPS);
        prop_assert!(relative(eta.celerity(), &y.sinh()) < 2.0 * EPS);
        prop_assert!(relative(eta.doppler(), &y.exp()) < 2.0 * EPS);
        prop_assert!(relative(eta.kinetic_per_rest(), &(&two * &half * &half)) < 4.0 * EPS);
        prop_assert!(relative(eta.one_minus_beta(), &rest) < 3.0 * EPS);
    }

    #[test]
    fn velocities_of_mixed_forms_compose_by_adding_rapidities((a, b) in two_rapidities(18.0)) {
        let (first, second) = (Rapidity::new(a).unwrap(), Rapidity::new(b).unwrap());
        let by_form = Rapidity::from_one_minus_beta(first.one_minus_beta(), first.side());
        let (p, q) = (by_form.unwrap(), Rapidity::from_celerity(second.celerity()).unwrap());
        let sum = p.then(q).unwrap().value();
        // 1 - beta holds a rapidity near rest to EPS absolutely.
        prop_assert!((sum - (a + b)).abs() <= 4.0 * EPS * (1.0 + a.abs() + b.abs()));
        prop_assert_eq!(first.then(second).unwrap(), second.then(first).unwrap());
    }

    #[test]
    fn an_angle_comes_back_in_degrees(d in -180.0..180.0_f64) {
        let back = Angle::from_degrees(d).degrees();
        prop_assert!((back - d).abs() <= 2.0 * EPS * d.abs().max(1e-3) + 1e-13 * f64::from(d.abs() > 44.0));
        let turned = Angle::from_degrees(d).plus(Angle::from_degrees(45.0)).degrees();
        let gap = (turned - (d + 45.0)).rem_euclid(360.0);
        prop_assert!(gap.min(360.0 - gap) < 1e-12);
    }
}
