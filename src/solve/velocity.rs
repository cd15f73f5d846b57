//! A typed velocity as a rapidity. Decimals are read exactly first, so that each form keeps all it can hold.

use super::solver::{Solver, Spoiled, fault};
use crate::fault::{Fault, ObjectId};
use crate::geometry::{GeometryError, Rapidity, Side};
use crate::num::log1p;
use crate::quantity::{Dimension, Number, Quantity, Typed, Unit};
use crate::scene::{Toward, Velocity};

/// Relative error of a rapidity beyond which its entry form is warned of: fewer than 8 digits kept.
const FEW_DIGITS: f64 = 1e-8;

/// A velocity as typed: its number, and the rapidity it makes.
#[derive(Debug)]
pub(super) struct Typing {
    /// The number as typed.
    pub(super) quantity: Quantity,
    /// Signed along the direction.
    pub(super) rapidity: Rapidity,
    /// A finding, where the form keeps fewer than 8 digits.
    pub(super) finding: Option<Fault>,
}

/// Reads a velocity that stands in a field of an object.
pub(super) fn read(
    id: &ObjectId,
    field: &str,
    velocity: &Velocity,
    toward: Option<Toward>,
) -> Result<Typing, Spoiled> {
    let unit = match velocity {
        Velocity::Beta(_) | Velocity::BehindLight(_) => Unit::base(Dimension::Speed),
        Velocity::Gamma(_)
        | Velocity::Celerity(_)
        | Velocity::Rapidity(_)
        | Velocity::Doppler(_) => Unit::base(Dimension::Plain),
    };
    let typed = typed_of(velocity);
    let quantity = Solver::quantity(id, field, typed, &unit)?;
    let side = side(id, velocity, toward)?;
    let wrong = |e: GeometryError| fault(id, field, e.to_string(), domain(velocity));
    let rapidity = rapidity_of(velocity, &quantity.value, side).map_err(wrong)?;
    let finding = few_digits(velocity, &quantity.value, side, rapidity).map(|better| {
        Fault::new(
            id.clone(),
            field,
            "this form keeps fewer than 8 digits of the velocity".to_owned(),
            format!("write it as {better}"),
        )
        .finding()
    });
    Ok(Typing {
        quantity,
        rapidity,
        finding,
    })
}

fn typed_of(velocity: &Velocity) -> &Typed {
    match velocity {
        Velocity::Beta(t)
        | Velocity::Gamma(t)
        | Velocity::Celerity(t)
        | Velocity::Rapidity(t)
        | Velocity::Doppler(t)
        | Velocity::BehindLight(t) => t,
    }
}

fn domain(velocity: &Velocity) -> &'static str {
    match velocity {
        Velocity::Beta(_) => "light is a line of its own, and nothing is faster",
        Velocity::Gamma(_) => "for 1 / gamma or gamma beta take another form",
        Velocity::Celerity(_) => "the celerity gamma beta is any number up to 1e250",
        Velocity::Rapidity(_) => "choose a slower one",
        Velocity::Doppler(_) => "k is e to the rapidity: below 1 toward -x",
        Velocity::BehindLight(_) => "0 would be light, 1 is rest",
    }
}

/// The side for forms without a sign; plus where none is said.
fn side(id: &ObjectId, velocity: &Velocity, toward: Option<Toward>) -> Result<Side, Spoiled> {
    let unsigned = matches!(velocity, Velocity::Gamma(_) | Velocity::BehindLight(_));
    match toward {
        Some(_) if !unsigned => Err(fault(
            id,
            "toward",
            "this form of a velocity carries its own sign",
            "leave toward out and give the number its sign",
        )),
        Some(Toward::Minus) => Ok(Side::Minus),
        Some(Toward::Plus) | None => Ok(Side::Plus),
    }
}

pub(super) fn rapidity_of(
    velocity: &Velocity,
    value: &Number,
    side: Side,
) -> Result<Rapidity, GeometryError> {
    let number = value.to_f64();
    let one = Number::integer(1);
    match velocity {
        Velocity::Beta(_) if number.abs() > 0.5 && number.abs() < 1.5 => {
            let (size, side) = if number < 0.0 {
                (Number::zero().minus(value), Side::Minus)
            } else {
                (value.clone(), Side::Plus)
            };
            let behind = one.minus(&size).to_f64();
            if behind <= 0.0 {
                return Rapidity::from_beta(number);
            }
            Rapidity::from_one_minus_beta(behind, side)
        }
        Velocity::Beta(_) => Rapidity::from_beta(number),
        Velocity::Gamma(_) => {
            let excess = value.minus(&one).to_f64();
            if excess < 0.0 {
                return Rapidity::from_gamma(number, side);
            }
            Rapidity::from_kinetic_per_rest(excess, side)
        }
        Velocity::Celerity(_) => Rapidity::from_celerity(number),
        Velocity::Rapidity(_) => Rapidity::new(number),
        Velocity::Doppler(_) if (number - 1.0).abs() < 0.5 => {
            Rapidity::new(log1p(value.minus(&one).to_f64()))
        }
        Velocity::Doppler(_) => Rapidity::from_doppler(number),
        Velocity::BehindLight(_) => Rapidity::from_one_minus_beta(number, side),
    }
}

/// The better form, where rounding the number itself costs more than the eighth digit of the rapidity. Exact numbers
/// have lost nothing.
fn few_digits(
    velocity: &Velocity,
    value: &Number,
    side: Side,
    rapidity: Rapidity,
) -> Option<&'static str> {
    if value.is_exact() {
        return None;
    }
    let nudged = Number::Real(value.to_f64() * (1.0 + 2.0 * f64::EPSILON));
    let other = rapidity_of(velocity, &nudged, side).map_or(f64::INFINITY, Rapidity::value);
    let lost = (other - rapidity.value()).abs() > FEW_DIGITS * rapidity.value().abs();
    lost.then_some(match velocity {
        Velocity::Gamma(_) | Velocity::Doppler(_) => "Celerity",
        Velocity::Beta(_) => "BehindLight, with toward for the sign",
        Velocity::BehindLight(_) => "Beta",
        Velocity::Celerity(_) | Velocity::Rapidity(_) => return None,
    })
}

/// The rapidity that a velocity on its own means, as the rail's fields take it.
///
/// # Errors
/// Where the number does not read, or lies outside what the form allows.
pub fn typed_rapidity(velocity: &Velocity, toward: Option<Toward>) -> Result<f64, Box<Fault>> {
    let id = ObjectId::scene();
    match read(&id, "", velocity, toward) {
        Ok(typing) => Ok(typing.rapidity.value()),
        Err(Some(fault)) => Err(fault),
        Err(None) => Err(Box::new(Fault::new(
            id,
            "",
            "it does not read",
            "type a number",
        ))),
    }
}
