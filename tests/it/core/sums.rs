//! Sums of energy-momentum vectors: invariant mass, excess, the frame of balance, what is missing.

use conewright::dynamics::{DynamicsError, Momentum, Total, remainder};
use conewright::geometry::{Angle, Boost, Rapidity};
use conewright::num::EPS;
use proptest::prelude::*;

use super::exact::{Big, big, relative};
use super::generators::{boost, particle};

/// Invariant mass and excess of what is stored, in arbitrary precision, by E^2 - p^2 of the sums. Light is over-
/// determined by three numbers: its larger null component and py count.
fn exact_mass(parts: &[Momentum]) -> (Big, Big) {
    let large_plus = sum_of(parts, Momentum::p_plus) >= sum_of(parts, Momentum::p_minus);
    let (mut plus, mut minus, mut py, mut masses) = (big(0.0), big(0.0), big(0.0), big(0.0));
    for p in parts {
        let square = big(p.mass()) * big(p.mass()) + big(p.py()) * big(p.py());
        let (own_plus, own_minus) = match *p {
            Momentum::Massive { rapidity, .. } => {
                let k = big(rapidity.value()).exp();
                let m_t = square.sqrt();
                (&m_t * &k, m_t / k)
            }
            Momentum::Massless {
                p_minus, p_plus, ..
            } if large_plus && p_plus > 0.0 => (big(p_plus), square_over(&square, p_plus, p_minus)),
            Momentum::Massless {
                p_minus, p_plus, ..
            } if p_minus > 0.0 => (square_over(&square, p_minus, p_plus), big(p_minus)),
            Momentum::Massless {
                p_minus, p_plus, ..
            } => (big(p_plus), big(p_minus)),
        };
        plus += own_plus;
        minus += own_minus;
        py += big(p.py());
        masses += big(p.mass());
    }
    let mass = (plus * minus - &py * &py).sqrt();
    let excess = &mass - masses;
    (mass, excess)
}

fn square_over(square: &Big, by: f64, otherwise: f64) -> Big {
    if *square == Big::ZERO {
        big(otherwise)
    } else {
        square / big(by)
    }
}

fn sum_of(parts: &[Momentum], f: fn(&Momentum) -> f64) -> f64 {
    parts.iter().map(f).sum()
}

fn along_x(eta: f64) -> Boost {
    Boost::along_x(Rapidity::new(eta).unwrap())
}

fn boosted(parts: &[Momentum], boost: Boost) -> Vec<Momentum> {
    parts.iter().map(|p| p.boosted(boost).unwrap()).collect()
}

/// The worst relative error of the mass over the directions, and boosts along x, of a fan of `count` particles that
/// opens by `opening` radians; every third has the other mass, and every second goes backward if `head_on`.
fn worst_of_fan(count: usize, opening: f64, masses: [f64; 2], head_on: bool) -> f64 {
    let mut worst = 0.0_f64;
    for direction in [0.0, 45.0, 135.0, 180.0] {
        let parts: Vec<_> = (0..count)
            .map(|i| {
                let within = opening.to_degrees() * (i as f64 / (count - 1) as f64 - 0.5);
                let turn = if head_on && i % 2 == 1 { 180.0 } else { 0.0 };
                let angle = Angle::from_degrees(direction + within + turn);
                let mass = masses[usize::from(i % 3 == 1)];
                Momentum::from_momentum(mass, 1.0 + 0.37 * (i % 7) as f64, angle).unwrap()
            })
            .collect();
        let boosts: &[f64] = if count > 100 {
            &[0.0, -300.0]
        } else {
            &[0.0, 1.0, -20.0, 300.0, -300.0]
        };
        for &eta in boosts {
            let parts = boosted(&parts, along_x(eta));
            let (mass, _) = exact_mass(&parts);
            let got = Total::of(&parts).invariant_mass;
            worst = worst.max(relative(got, &mass));
        }
    }
    worst
}

#[test]
fn the_mass_of_two_is_right_for_any_opening_mass_direction_and_boost() {
    for masses in [[0.0, 0.0], [0.1, 0.1], [1e-9, 1e3], [0.0, 0.1]] {
        for opening in [1.0, 1e-3, 1e-6] {
            for head_on in [false, true] {
                let worst = worst_of_fan(2, opening, masses, head_on);
                assert!(worst <= 1e-12, "{masses:?} {opening} {head_on}: {worst:e}");
                assert!(worst <= 1e-14, "{masses:?} {opening} {head_on}: {worst:e}");
            }
        }
    }
}

#[test]
fn the_mass_of_a_thousand_is_right_for_any_opening_and_boost() {
    for (opening, masses, head_on) in [
        (1.0, [0.0, 0.0], true),
        (1e-3, [0.1, 0.0], false),
        (1e-6, [0.0, 0.0], false),
    ] {
        let worst = worst_of_fan(1000, opening, masses, head_on);
        assert!(worst <= 1e-13, "{masses:?} {opening} {head_on}: {worst:e}");
    }
}

#[test]
fn the_excess_of_two_slow_lumps_has_all_its_digits() {
    // Two lumps of 1 kg at +-1.5 m/s: 2.50346e-17 kg, as 2 (gamma - 1) in arbitrary precision.
    let beta = 1.5 / 299_792_458.0;
    let eta = Rapidity::from_beta(beta).unwrap();
    let lumps = [
        Momentum::moving(1.0, eta, Angle::ZERO).unwrap(),
        Momentum::moving(1.0, -eta, Angle::ZERO).unwrap(),
    ];
    let one = big(1.0);
    let want = big(2.0) * (&one / (&one - big(beta) * big(beta)).sqrt() - &one);
    let total = Total::of(&lumps);
    assert!(relative(total.excess, &want) < 4.0 * EPS);
    assert!((total.excess - 2.50346e-17).abs() < 5e-23);
    // The same from any frame, and across.
    for boost in [along_x(0.5), along_x(-12.0)] {
        let seen = Total::of(&boosted(&lumps, boost));
        let bound = 1e-16 / beta * 32.0;
        assert!(relative(seen.excess, &want) < bound, "{}", seen.excess);
    }
    let across = lumps.map(|p| Momentum::from_components(1.0, 0.0, p.px()).unwrap());
    assert!(relative(Total::of(&across).excess, &want) < 4.0 * EPS);
}

#[test]
fn a_total_of_one_is_that_one_and_of_none_is_nothing() {
    let one = Momentum::from_components(0.3, 1.0, -2.0).unwrap();
    let total = Total::of(&[one]);
    assert_eq!((total.invariant_mass, total.excess), (0.3, 0.0));
    let none = Total::of(&[]);
    assert_eq!((none.energy, none.invariant_mass), (0.0, 0.0));
    assert!(matches!(none.to_momentum(), Err(DynamicsError::Nothing(_))));
    assert!(none.centre_of_momentum().is_err());
}

#[test]
fn parallel_light_has_no_mass_and_no_frame_of_balance() {
    for degrees in [0.0, 20.0, 90.0, 135.0, 180.0, -60.0] {
        let light =
            |energy| Momentum::from_energy(0.0, energy, Angle::from_degrees(degrees)).unwrap();
        let total = Total::of(&[light(1.0), light(0.3), light(7.7)]);
        assert_eq!(total.invariant_mass, 0.0, "{degrees}");
        assert!(total.centre_of_momentum().is_err());
        let one = total.to_momentum().unwrap();
        assert_eq!(one.mass(), 0.0);
        assert!((one.energy() - 9.0).abs() < 4e-15);
    }
}

#[test]
fn what_goes_along_x_balances_along_x_exactly() {
    let parts = [
        Momentum::from_momentum(0.9, 5.0, Angle::ZERO).unwrap(),
        Momentum::from_momentum(0.1, 2.0, Angle::from_degrees(180.0)).unwrap(),
        Momentum::from_energy(0.0, 3.0, Angle::from_degrees(180.0)).unwrap(),
    ];
    assert!(Total::of(&parts).centre_of_momentum().unwrap().is_along_x());
    // Across, 0.1 + 0.2 - 0.3 is rounding.
    let fan = [0.1, 0.2, -0.3].map(|py| Momentum::from_components(1.0, 0.5, py).unwrap());
    let total = Total::of(&fan);
    assert_eq!(total.py, 0.0);
    assert!(total.centre_of_momentum().unwrap().is_along_x());
    assert!(
        total
            .to_momentum()
            .unwrap()
            .rest_frame()
            .unwrap()
            .is_along_x()
    );
}

#[test]
fn the_missing_neutrino_of_a_pion_decay_is_light() {
    // pi+ -> mu+ nu with the muon in any direction of the pion's flight; masses of PDG, p* from the two-body formula.
    let (pion, muon) = (139.57039_f64, 105.6583755_f64);
    let p_star = (pion - muon) * (pion + muon) / (2.0 * pion);
    for flight in [0.0, 200.0, 1e6] {
        let whole = Momentum::from_momentum(pion, flight, Angle::ZERO).unwrap();
        let lab = whole.rest_frame().unwrap().inverse();
        for degrees in [0.0, 60.0, 90.0, 150.0, 180.0] {
            let star = Momentum::from_momentum(muon, p_star, Angle::from_degrees(degrees)).unwrap();
            let missing = remainder(&[whole], &[star.boosted(lab).unwrap()]).unwrap();
            assert_eq!(missing.mass(), 0.0, "{flight} {degrees}");
            let back = missing.boosted(whole.rest_frame().unwrap()).unwrap();
            assert!(
                (back.energy() - p_star).abs() < 1e-9 * p_star,
                "{flight} {degrees}"
            );
        }
    }
}

#[test]
fn a_missing_vector_that_no_particle_has_is_an_error_that_states_it() {
    let at_rest = |m| Momentum::at_rest(m).unwrap();
    let light = Momentum::from_energy(0.0, 2.0, Angle::ZERO).unwrap();
    let nothing = remainder(&[at_rest(1.0)], &[at_rest(1.0)]);
    assert!(
        matches!(nothing, Err(DynamicsError::Nothing(_))),
        "{nothing:?}"
    );
    let negative = remainder(&[at_rest(1.0)], &[at_rest(2.0)]);
    assert!(
        matches!(negative, Err(DynamicsError::NegativeEnergy { energy }) if energy == -1.0),
        "{negative:?}"
    );
    // (2.5, 0) - (2, 2) = (0.5, -2): 0.25 - 4.
    let spacelike = remainder(&[at_rest(2.5)], &[light]);
    assert!(
        matches!(spacelike, Err(DynamicsError::Spacelike { mass_squared })
            if (mass_squared + 3.75).abs() < 1e-14),
        "{spacelike:?}"
    );
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(256))]

    #[test]
    fn sums_agree_with_arbitrary_precision(parts in prop::collection::vec(particle(12.0), 2..7)) {
        let total = Total::of(&parts);
        let (mass, excess) = exact_mass(&parts);
        // Parallel light is 0 within the rounding of its directions.
        if total.invariant_mass > 0.0 {
            prop_assert!(relative(total.invariant_mass, &mass) < 1e-12);
            prop_assert!(relative(total.excess, &excess) < 1e-10, "{} {excess}", total.excess);
        }
        let gap = total.invariant_mass - total.mass_sum - total.excess;
        prop_assert!(gap.abs() <= 1e-12 * total.invariant_mass);
    }

    #[test]
    fn sums_commute_with_boosts(parts in prop::collection::vec(particle(6.0), 1..6), b in boost(6.0)) {
        let then_boosted = Total::of(&parts);
        let seen = Total::of(&boosted(&parts, b));
        if then_boosted.invariant_mass > 1e-6 * then_boosted.energy {
            let one = then_boosted.to_momentum().unwrap().boosted(b).unwrap();
            let scale = 1e-12 * then_boosted.energy_scale * libm::exp(b.rapidity().value().abs());
            prop_assert!((one.energy() - seen.energy).abs() <= scale);
            prop_assert!((one.px() - seen.px).abs() <= scale);
            prop_assert!((one.py() - seen.py).abs() <= scale);
        }
    }

    #[test]
    fn momenta_balance_in_the_centre_of_momentum(parts in prop::collection::vec(particle(4.0), 2..6)) {
        let total = Total::of(&parts);
        if total.invariant_mass > 1e-6 * total.energy {
            let frame = total.centre_of_momentum().unwrap();
            let seen = Total::of(&boosted(&parts, frame));
            let scale = 1e-12 * total.energy_scale * frame.rapidity().gamma();
            prop_assert!(seen.px.abs() <= scale && seen.py.abs() <= scale);
            prop_assert!((seen.energy - total.invariant_mass).abs() <= scale);
        }
    }

    #[test]
    fn a_remainder_adds_up(a in particle(4.0), b in particle(4.0), c in particle(4.0)) {
        let whole = [a, b, c];
        let missing = remainder(&whole, &[a, b]);
        let scale = 1e-12 * Total::of(&whole).energy_scale;
        if let Ok(missing) = missing {
            prop_assert!((missing.energy() - c.energy()).abs() <= scale);
            prop_assert!((missing.px() - c.px()).abs() <= scale);
            prop_assert!((missing.py() - c.py()).abs() <= scale);
        } else {
            // Too little beside the others to be seen.
            let beside = a.energy() + b.energy();
            prop_assert!(c.energy() < 1e-6 * beside, "{missing:?}");
        }
    }
}
