//! The scene's units.

use super::SolvedUnits;
use crate::fault::{Fault, ObjectId};
use crate::quantity::{Dimension, Unit};
use crate::scene::Scene;

/// The scene's units as read; where one is no unit, its default stands and what needs it is left out.
#[derive(Debug)]
pub(super) struct ReadUnits {
    pub(super) solved: SolvedUnits,
    pub(super) spacetime_sound: bool,
    pub(super) energy_sound: bool,
    /// The length unit in light's way of a time unit.
    pub(super) light_way: crate::quantity::Number,
}

impl ReadUnits {
    pub(super) fn of(scene: &Scene) -> (Self, Vec<Fault>) {
        let mut faults = Vec::new();
        let mut named =
            |symbol: &Option<String>, field: &str, dimension: Dimension, usual: Option<Unit>| {
                let Some(symbol) = symbol else {
                    return (usual, true);
                };
                let unit = Unit::named(symbol, dimension);
                let sound = unit.is_some();
                if !sound {
                    faults.push(Fault::new(
                        ObjectId::scene(),
                        field,
                        format!("\"{symbol}\" does not measure {}", dimension.words()),
                        format!("take {}", dimension.choices()),
                    ));
                }
                (unit.or(usual), sound)
            };
        let second = Unit::base(Dimension::Time);
        let (time, time_sound) = named(
            &scene.units.time,
            "units.time",
            Dimension::Time,
            Some(second.clone()),
        );
        let time = time.unwrap_or(second);
        let way = time.light_way();
        let (length, length_sound) = named(
            &scene.units.length,
            "units.length",
            Dimension::Length,
            way.clone(),
        );
        let length = length.unwrap_or_else(|| Unit::base(Dimension::Length));
        let gev = Unit::named("GeV", Dimension::Energy);
        let (energy, energy_sound) =
            named(&scene.units.energy, "units.energy", Dimension::Energy, gev);
        let energy = energy.unwrap_or_else(|| Unit::base(Dimension::Energy));
        let light_way = way.map_or_else(
            || crate::quantity::Number::integer(1),
            |w| w.in_terms_of(&length),
        );
        let solved = SolvedUnits {
            time,
            length,
            energy,
            light_way: light_way.to_f64(),
        };
        let units = Self {
            solved,
            spacetime_sound: time_sound && length_sound,
            energy_sound,
            light_way,
        };
        (units, faults)
    }

    /// The mass unit: the energy unit over c^2.
    pub(super) fn mass(&self) -> Unit {
        self.solved.energy.for_dimension(Dimension::Mass)
    }

    /// The momentum unit: the energy unit over c.
    pub(super) fn momentum(&self) -> Unit {
        self.solved.energy.for_dimension(Dimension::Momentum)
    }
}
