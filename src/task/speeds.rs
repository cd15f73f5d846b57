//! A rapidity in its other forms, and back from what is typed.

use crate::geometry::Rapidity;
use crate::quantity::Typed;
use crate::scene::{Toward, Velocity};
use crate::solve::typed_rapidity;

/// The forms in which a window's rail takes and shows a rapidity.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum SpeedForm {
    /// v/c.
    Beta,
    /// gamma.
    Gamma,
    /// Rapidity.
    Rapidity,
    /// k = e^rapidity.
    Doppler,
}

/// A rapidity in its forms.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Speeds {
    /// v/c, signed.
    pub beta: f64,
    /// gamma.
    pub gamma: f64,
    /// Rapidity, signed.
    pub rapidity: f64,
    /// k = e^rapidity.
    pub doppler: f64,
}

/// The forms of a rapidity; one beyond 600 in size counts as 600.
pub fn speeds(rapidity: f64) -> Speeds {
    let r = Rapidity::new(rapidity.clamp(-600.0, 600.0)).unwrap_or_default();
    Speeds {
        beta: r.beta(),
        gamma: r.gamma(),
        rapidity: r.value(),
        doppler: r.doppler(),
    }
}

/// The rapidity that a typed entry means (`0.6`, `3/5`, `0.5 c`). An entry of gamma keeps the sign of `now`.
///
/// # Errors
/// In words, where the entry does not read or lies outside what the form allows.
pub fn rapidity_from(form: SpeedForm, entry: &str, now: f64) -> Result<f64, String> {
    let typed = Typed::Text(entry.trim().to_owned());
    let (velocity, toward) = match form {
        SpeedForm::Beta => (Velocity::Beta(typed), None),
        SpeedForm::Rapidity => (Velocity::Rapidity(typed), None),
        SpeedForm::Doppler => (Velocity::Doppler(typed), None),
        SpeedForm::Gamma => (
            Velocity::Gamma(typed),
            Some(if now < 0.0 {
                Toward::Minus
            } else {
                Toward::Plus
            }),
        ),
    };
    typed_rapidity(&velocity, toward).map_err(|fault| format!("{}; {}", fault.what, fault.mend))
}
