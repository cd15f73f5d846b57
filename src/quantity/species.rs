//! The particle table: Particle Data Group, edition named in the file.

/// One species.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Species {
    /// Name in the trade's plain text: `p`, `pi+`, `K0S`.
    pub name: &'static str,
    /// LaTeX math: `\pi^+`.
    pub label: &'static str,
    /// Mass in MeV/c^2 as printed, with uncertainty: `938.27208943(29)`; `0` for light.
    pub mass: &'static str,
    /// Electric charge in units of e.
    pub charge: i8,
    /// Mean life in s as printed, with uncertainty; `None` for stable or too short to be given as a life.
    pub mean_life: Option<&'static str>,
}

/// All of them.
pub const SPECIES: &[Species] = &[];

/// The species of that name.
pub fn species(name: &str) -> Option<&'static Species> {
    SPECIES.iter().find(|s| s.name == name)
}
