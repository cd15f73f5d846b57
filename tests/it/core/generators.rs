//! Random inputs that favour what goes wrong: near equal, near rest, near light.

use conewright::dynamics::Momentum;
use conewright::geometry::{Angle, Boost, Displacement, Rapidity};
use proptest::prelude::*;

/// A size from 1e-12 to 1, with a sign.
fn small() -> impl Strategy<Value = f64> {
    (-12.0..0.0_f64, any::<bool>()).prop_map(|(e, minus)| {
        let size = libm::pow(10.0, e);
        if minus { -size } else { size }
    })
}

/// A rapidity up to `limit` in size: near 0, everyday, or large.
pub(super) fn rapidity(limit: f64) -> impl Strategy<Value = f64> {
    prop_oneof![
        1 => Just(0.0),
        3 => small(),
        4 => -3.0..3.0_f64,
        3 => -limit..limit,
    ]
}

/// Two rapidities, often nearly equal or nearly opposite.
pub(super) fn two_rapidities(limit: f64) -> impl Strategy<Value = (f64, f64)> {
    prop_oneof![
        (rapidity(limit), rapidity(limit)),
        (rapidity(limit * 0.99), small()).prop_map(|(a, d)| (a, a + d)),
        (rapidity(limit * 0.99), small()).prop_map(|(a, d)| (a, d - a)),
    ]
}

/// A null component: 0, everyday, or of any size from 1e-12 to 1e12.
fn component() -> impl Strategy<Value = f64> {
    prop_oneof![
        1 => Just(0.0),
        4 => -10.0..10.0_f64,
        3 => (small(), 0.0..12.0_f64).prop_map(|(s, e)| s * libm::pow(10.0, e)),
    ]
}

/// A displacement without motion across.
pub(super) fn displacement() -> impl Strategy<Value = Displacement> {
    (component(), component()).prop_map(|(u, v)| Displacement::new(u, v, 0.0))
}

/// A displacement of the plane.
pub(super) fn planar_displacement() -> impl Strategy<Value = Displacement> {
    (component(), component(), component()).prop_map(|(u, v, y)| Displacement::new(u, v, y))
}

/// A direction: the axes, near the axes, or any.
pub(super) fn angle() -> impl Strategy<Value = Angle> {
    prop_oneof![
        2 => (-2..3_i32).prop_map(|q| Angle::from_degrees(90.0 * f64::from(q))),
        2 => (-2..3_i32, small()).prop_map(|(q, d)| Angle::from_degrees(90.0 * f64::from(q) + d)),
        4 => (-180.0..180.0_f64).prop_map(Angle::from_degrees),
    ]
}

/// A planar boost up to a rapidity.
pub(super) fn boost(limit: f64) -> impl Strategy<Value = Boost> {
    (rapidity(limit), angle())
        .prop_map(|(eta, angle)| Boost::new(Rapidity::new(eta).expect("in range"), angle))
}

/// A particle: massive (1e-9 to 1e3) or light, in any direction, up to a rapidity.
pub(super) fn particle(limit: f64) -> impl Strategy<Value = Momentum> {
    let massive = (-9.0..3.0_f64, rapidity(limit), angle()).prop_map(|(e, eta, angle)| {
        Momentum::moving(
            libm::pow(10.0, e),
            Rapidity::new(eta).expect("in range"),
            angle,
        )
        .expect("a particle")
    });
    let light = (-9.0..9.0_f64, angle()).prop_map(|(e, angle)| {
        Momentum::from_momentum(0.0, libm::pow(10.0, e), angle).expect("light")
    });
    prop_oneof![3 => massive, 1 => light]
}
