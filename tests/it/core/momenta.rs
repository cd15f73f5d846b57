//! Single energy-momentum vectors.

use conewright::dynamics::{DynamicsError, Momentum};
use conewright::geometry::{Angle, Boost, GeometryError, Rapidity};
use conewright::num::EPS;
use proptest::prelude::*;

use super::exact::{Big, absolute, big, relative};
use super::generators::{angle, boost, particle, rapidity};

fn squared(x: f64) -> Big {
    big(x) * big(x)
}

#[test]
fn a_walker_keeps_the_digits_of_his_kinetic_energy_in_any_direction() {
    let beta = 1.5 / 299_792_458.0;
    let one = big(1.0);
    let want = big(80.0) * (&one / (&one - squared(beta)).sqrt() - &one);
    let eta = Rapidity::from_beta(beta).unwrap();
    for degrees in [0.0, 30.0, 90.0, 135.0, 180.0] {
        let walker = Momentum::moving(80.0, eta, Angle::from_degrees(degrees)).unwrap();
        assert!(relative(walker.kinetic(), &want) < 1e-14, "{degrees}");
        let again = Momentum::from_kinetic(80.0, walker.kinetic(), walker.angle()).unwrap();
        assert!(relative(again.kinetic(), &want) < 1e-14, "{degrees}");
    }
}

#[test]
fn a_cosmic_ray_proton_keeps_its_one_minus_beta() {
    // 3e20 eV, mass 938.27208943 MeV (CODATA 2022), both in GeV; the difference is formed before rounding.
    let (mass, energy) = (0.93827208943, 3e11);
    for degrees in [0.0, 45.0, 90.0, 180.0] {
        let proton =
            Momentum::from_energy(mass, energy - mass, Angle::from_degrees(degrees)).unwrap();
        let e = big(energy - mass) + big(mass);
        let want = big(1.0) - (&e * &e - squared(mass)).sqrt() / &e;
        assert!(relative(proton.one_minus_beta(), &want) < 60.0 * EPS);
        assert_eq!(proton.beta(), 1.0);
        assert_eq!(proton.mass(), mass);
    }
}

#[test]
fn a_state_means_the_same_in_every_form() {
    // 3-4-5: mass 3, momentum 4, energy 5, kinetic 2.
    let way = Angle::from_degrees(30.0);
    let eta = Rapidity::from_beta(0.8).unwrap();
    let forms = [
        Momentum::moving(3.0, eta, way),
        Momentum::moving(3.0, -eta, way.opposite()),
        Momentum::from_kinetic(3.0, 2.0, way),
        Momentum::from_energy(3.0, 2.0, way),
        Momentum::from_momentum(3.0, 4.0, way),
        Momentum::from_momentum(3.0, -4.0, way.opposite()),
        Momentum::from_components(3.0, 4.0 * way.cos(), 4.0 * way.sin()),
    ];
    for form in forms {
        let p = form.unwrap();
        let near = |a: f64, b: f64| assert!((a - b).abs() <= 4e-15 * b.abs(), "{a} {b}: {p:?}");
        near(p.energy(), 5.0);
        near(p.momentum(), 4.0);
        near(p.kinetic(), 2.0);
        near(p.beta(), 0.8);
        near(p.one_minus_beta(), 0.2);
        near(p.gamma().unwrap(), 5.0 / 3.0);
        near(p.beta_x(), 0.8 * way.cos());
        near(p.angle().degrees(), 30.0);
        near(p.total_rapidity().unwrap(), libm::log(3.0));
        near(p.p_plus(), 5.0 + 4.0 * way.cos());
        near(p.p_minus(), 5.0 - 4.0 * way.cos());
        near(p.transverse_mass(), libm::sqrt(13.0));
        near(p.pseudorapidity().unwrap(), libm::asinh(way.cos() / 0.5));
    }
}

#[test]
fn right_angles_are_exact() {
    let up = Momentum::from_momentum(0.5, 2.0, Angle::from_degrees(90.0)).unwrap();
    assert_eq!((up.px(), up.py(), up.rapidity()), (0.0, 2.0, Some(0.0)));
    let back = Momentum::from_momentum(0.5, 2.0, Angle::from_degrees(180.0)).unwrap();
    assert_eq!(back.py(), 0.0);
    assert!(back.rest_frame().unwrap().is_along_x());
    let light = Momentum::from_energy(0.0, 2.0, Angle::from_degrees(180.0)).unwrap();
    assert_eq!(
        (light.p_minus(), light.p_plus(), light.py()),
        (4.0, 0.0, 0.0)
    );
    assert_eq!(light.rapidity(), None);
    let across = Momentum::from_momentum(0.0, 2.0, Angle::from_degrees(-90.0)).unwrap();
    assert_eq!(
        (across.px(), across.py(), across.rapidity()),
        (0.0, -2.0, Some(0.0))
    );
}

#[test]
fn what_no_particle_can_be_is_an_error_in_words() {
    let rest = Rapidity::ZERO;
    assert!(matches!(
        Momentum::at_rest(0.0),
        Err(DynamicsError::Massless(_))
    ));
    assert!(matches!(
        Momentum::moving(0.0, rest, Angle::ZERO),
        Err(DynamicsError::Massless(_))
    ));
    let domains = [
        Momentum::at_rest(-1.0),
        Momentum::at_rest(f64::NAN),
        Momentum::from_kinetic(1.0, -1e-9, Angle::ZERO),
        Momentum::from_energy(1.0, -0.5, Angle::ZERO),
        Momentum::from_energy(0.0, 0.0, Angle::ZERO),
        Momentum::from_momentum(0.0, 0.0, Angle::ZERO),
        Momentum::from_components(0.0, 0.0, 0.0),
    ];
    for result in domains {
        assert!(
            matches!(
                result,
                Err(DynamicsError::Geometry(GeometryError::Domain { .. }))
            ),
            "{result:?}"
        );
    }
    let ranges = [
        Momentum::at_rest(1e-151),
        Momentum::at_rest(1e151),
        Momentum::from_components(1.0, 0.0, 1e160),
        Momentum::from_components(0.0, f64::INFINITY, 0.0),
        Momentum::from_components(1.0, 0.0, f64::NAN),
        Momentum::longitudinal(1.0, Rapidity::new(500.0).unwrap(), 0.0),
        Momentum::from_momentum(0.0, f64::MAX, Angle::from_degrees(20.0)),
    ];
    for result in ranges {
        assert!(
            matches!(result, Err(DynamicsError::Geometry(_))),
            "{result:?}"
        );
    }
    let light = Momentum::from_energy(0.0, 1.0, Angle::ZERO).unwrap();
    assert!(light.rest_frame().is_err());
    assert_eq!((light.gamma(), light.total_rapidity()), (None, None));
    assert_eq!((light.beta(), light.one_minus_beta()), (1.0, 0.0));
}

#[test]
fn a_muon_at_sixty_degrees_still_moves_in_the_frame_that_takes_only_its_px_away() {
    // Pion of 200 MeV/c decaying, muon at 60 degrees in the pion's rest frame with p* = 29.79 MeV/c (PDG): moving
    // at 0.237 c across, by p* sin 60 over the transverse mass. Masses: PDG.
    let (pion, muon) = (139.57039, 105.6583755);
    let flight = Momentum::from_momentum(pion, 200.0, Angle::ZERO).unwrap();
    let star = Momentum::from_momentum(muon, 29.79, Angle::from_degrees(60.0)).unwrap();
    let lab = star
        .boosted(flight.rest_frame().unwrap().inverse())
        .unwrap();
    let along = Rapidity::new(lab.rapidity().unwrap()).unwrap();
    let x_only = lab.boosted(Boost::along_x(along)).unwrap();
    assert!((x_only.beta() - 0.237).abs() < 5e-4, "{}", x_only.beta());
    let rest = lab.boosted(lab.rest_frame().unwrap()).unwrap();
    assert!(rest.beta() < 1e-14);
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(256))]

    #[test]
    fn components_agree_with_arbitrary_precision(
        m in -9.0..3.0_f64, y in rapidity(100.0), q in -6.0..6.0_f64, down in any::<bool>(),
    ) {
        let mass = libm::pow(10.0, m);
        let py = libm::pow(10.0, q) * mass * if down { -1.0 } else { 1.0 };
        let p = Momentum::longitudinal(mass, Rapidity::new(y).unwrap(), py).unwrap();
        let m_t = (squared(mass) + squared(py)).sqrt();
        let (sh, ch) = (big(y).sinh(), big(y).cosh());
        let energy = &m_t * &ch;
        let px = &m_t * &sh;
        let size = (&px * &px + squared(py)).sqrt();
        prop_assert!(relative(p.energy(), &energy) < 4.0 * EPS);
        prop_assert!(relative(p.px(), &px) < 4.0 * EPS);
        prop_assert!(relative(p.momentum(), &size) < 5.0 * EPS);
        prop_assert!(relative(p.p_plus(), &(&m_t * big(y).exp())) < 4.0 * EPS);
        prop_assert!(relative(p.p_minus(), &(&m_t * (-big(y)).exp())) < 4.0 * EPS);
        prop_assert!(relative(p.kinetic(), &(&energy - big(mass))) < 8.0 * EPS);
        prop_assert!(relative(p.beta(), &(&size / &energy)) < 8.0 * EPS);
        prop_assert!(relative(p.one_minus_beta(), &(big(1.0) - &size / &energy)) < 12.0 * EPS);
        prop_assert!(relative(p.beta_x(), &(&px / &energy)) < 4.0 * EPS);
        prop_assert!(relative(p.gamma().unwrap(), &(&energy / big(mass))) < 6.0 * EPS);
        let total = (&size / big(mass)).asinh();
        prop_assert!(relative(p.total_rapidity().unwrap(), &total) < 8.0 * EPS);
    }

    #[test]
    fn masses_are_kept_bit_for_bit_by_any_boost(p in particle(20.0), b in boost(20.0)) {
        let seen = p.boosted(b).unwrap();
        prop_assert_eq!(seen.mass(), p.mass());
        if p.mass() == 0.0 {
            let gap = big(seen.p_plus()) * big(seen.p_minus()) - squared(seen.py());
            prop_assert!(absolute(0.0, &gap) <= 4.0 * EPS * seen.py() * seen.py());
        }
    }

    #[test]
    fn planar_boosts_agree_with_the_textbook_form(p in particle(12.0), b in boost(12.0)) {
        let seen = p.boosted(b).unwrap();
        let eta = big(b.rapidity().value());
        let (sh, ch) = (eta.sinh(), eta.cosh());
        let (c, s) = (big(b.angle().cos()), big(b.angle().sin()));
        let size = (&c * &c + &s * &s).sqrt();
        let (c, s) = (c / &size, s / &size);
        let (e, px, py) = (big(p.energy()), big(p.px()), big(p.py()));
        let along = &px * &c + &py * &s;
        let push = &along * (&ch - big(1.0)) - &e * &sh;
        let bound = 32.0 * EPS * p.energy() * libm::exp(b.rapidity().value().abs());
        prop_assert!(absolute(seen.energy(), &(&e * ch - &along * sh)) <= bound);
        prop_assert!(absolute(seen.px(), &(px + &c * &push)) <= bound);
        prop_assert!(absolute(seen.py(), &(py + s * push)) <= bound);
    }

    #[test]
    fn a_particle_is_at_rest_in_its_rest_frame(m in -3.0..3.0_f64, y in rapidity(8.0), way in angle()) {
        let mass = libm::pow(10.0, m);
        let p = Momentum::moving(mass, Rapidity::new(y).unwrap(), way).unwrap();
        let frame = p.rest_frame().unwrap();
        let rest = p.boosted(frame).unwrap();
        prop_assert!(rest.momentum() <= 32.0 * EPS * p.momentum());
        let again = Momentum::at_rest(mass).unwrap().boosted(frame.inverse()).unwrap();
        prop_assert!((again.px() - p.px()).abs() <= 32.0 * EPS * p.momentum());
        prop_assert!((again.py() - p.py()).abs() <= 32.0 * EPS * p.momentum());
    }

    #[test]
    fn along_x_a_boost_shifts_the_rapidity_and_keeps_py(p in particle(20.0), eta in rapidity(100.0)) {
        let boost = Boost::along_x(Rapidity::new(eta).unwrap());
        let seen = p.boosted(boost).unwrap();
        prop_assert_eq!(seen.py(), p.py());
        if let Momentum::Massive { rapidity, .. } = p {
            prop_assert_eq!(seen.rapidity(), Some(rapidity.value() - eta));
        }
        let back = seen.boosted(boost.inverse()).unwrap();
        let bound = (eta.abs() + 8.0) * 4.0 * EPS;
        prop_assert!((back.p_plus() - p.p_plus()).abs() <= bound * p.p_plus());
        prop_assert!((back.p_minus() - p.p_minus()).abs() <= bound * p.p_minus());
    }
}
