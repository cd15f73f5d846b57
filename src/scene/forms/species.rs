//! Species of the scene's own.

use crate::scene::SpeciesEntry;
use crate::scene::faults::Faults;
use crate::scene::fields::Form;
use crate::scene::tree::Value;
use crate::scene::values::{number, whole};

/// Reads a species. Without a charge it is neutral.
pub(in crate::scene) fn species<'a>(
    value: Value<'a>,
    faults: &mut Faults<'a>,
) -> Option<SpeciesEntry> {
    let form = Form::anonymous(value, &["mass", "charge", "mean_life"], faults);
    let mass = form.need("mass", faults, number);
    let charge = form.may("charge", faults, whole);
    let mean_life = form.may("mean_life", faults, number)?;
    Some(SpeciesEntry {
        mass: mass?,
        charge: charge?.unwrap_or(0),
        mean_life,
    })
}
