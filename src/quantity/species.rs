//! The particle table.
//!
//! Masses and mean lives are the averages and fits of the Particle Data Group's Review of Particle Physics, edition
//! 2026 (F. Takahashi et al., Int. J. Mod. Phys. A 41, 2630011; CC BY 4.0), in the digits in which its listings show
//! them; the W, Z and H are given there in GeV. The masses of e, mu, p, n, d, t, helion and alpha are those of CODATA
//! 2022, in MeV. An antiparticle has the mass and the mean life of its particle.
//!
//! Neutrinos are massless here: of their masses only limits are known (below 0.45 eV, same edition), which no figure
//! of relativistic kinematics shows. So is the photon.

/// One species.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Species {
    /// Name in the trade's plain text: `p`, `pi+`, `K0S`.
    pub name: &'static str,
    /// LaTeX math, the letters of particles upright: `\mathrm{K}^{+}`.
    pub label: &'static str,
    /// Mass in MeV/c^2 as printed, with uncertainty: `938.27208943(29)`; `0` for light.
    pub mass: &'static str,
    /// Electric charge in units of e.
    pub charge: i8,
    /// Mean life in s as printed, with uncertainty: `2.1969811(22)e-6`; `None` for what is stable and for what is so
    /// short that the listings give a width instead.
    pub mean_life: Option<&'static str>,
}

const fn stable(
    name: &'static str,
    label: &'static str,
    charge: i8,
    mass: &'static str,
) -> Species {
    Species {
        name,
        label,
        mass,
        charge,
        mean_life: None,
    }
}

/// Given by its width in the listings.
const fn resonance(
    name: &'static str,
    label: &'static str,
    charge: i8,
    mass: &'static str,
) -> Species {
    stable(name, label, charge, mass)
}

const fn decaying(
    name: &'static str,
    label: &'static str,
    charge: i8,
    mass: &'static str,
    mean_life: &'static str,
) -> Species {
    Species {
        name,
        label,
        mass,
        charge,
        mean_life: Some(mean_life),
    }
}

/// All of them: light and leptons, mesons, baryons, nuclei, heavy bosons.
pub const SPECIES: &[Species] = &[
    stable("gamma", r"\gamma", 0, "0"),
    stable("nu_e", r"\nu_{\mathrm{e}}", 0, "0"),
    stable("nubar_e", r"\bar{\nu}_{\mathrm{e}}", 0, "0"),
    stable("nu_mu", r"\nu_{\mu}", 0, "0"),
    stable("nubar_mu", r"\bar{\nu}_{\mu}", 0, "0"),
    stable("nu_tau", r"\nu_{\tau}", 0, "0"),
    stable("nubar_tau", r"\bar{\nu}_{\tau}", 0, "0"),
    stable("e-", r"\mathrm{e}^{-}", -1, "0.51099895069(16)"),
    stable("e+", r"\mathrm{e}^{+}", 1, "0.51099895069(16)"),
    decaying("mu-", r"\mu^{-}", -1, "105.6583755(23)", "2.1969811(22)e-6"),
    decaying("mu+", r"\mu^{+}", 1, "105.6583755(23)", "2.1969811(22)e-6"),
    decaying("tau-", r"\tau^{-}", -1, "1776.93(9)", "290.3(5)e-15"),
    decaying("tau+", r"\tau^{+}", 1, "1776.93(9)", "290.3(5)e-15"),
    decaying("pi+", r"\pi^{+}", 1, "139.57039(18)", "2.6033(5)e-8"),
    decaying("pi-", r"\pi^{-}", -1, "139.57039(18)", "2.6033(5)e-8"),
    decaying("pi0", r"\pi^{0}", 0, "134.9768(5)", "8.43(13)e-17"),
    resonance("eta", r"\eta", 0, "547.862(17)"),
    resonance("etaprime", r"\eta'", 0, "957.78(6)"),
    resonance("rho0", r"\rho^{0}", 0, "775.26(23)"),
    resonance("omega", r"\omega", 0, "782.66(13)"),
    resonance("phi", r"\phi", 0, "1019.460(16)"),
    decaying("K+", r"\mathrm{K}^{+}", 1, "493.677(15)", "1.2380(20)e-8"),
    decaying("K-", r"\mathrm{K}^{-}", -1, "493.677(15)", "1.2380(20)e-8"),
    // As produced; what decays with one mean life is K0S or K0L.
    stable("K0", r"\mathrm{K}^{0}", 0, "497.611(13)"),
    stable("K0bar", r"\bar{\mathrm{K}}^{0}", 0, "497.611(13)"),
    decaying(
        "K0S",
        r"\mathrm{K}^{0}_{\mathrm{S}}",
        0,
        "497.611(13)",
        "0.8954(4)e-10",
    ),
    decaying(
        "K0L",
        r"\mathrm{K}^{0}_{\mathrm{L}}",
        0,
        "497.611(13)",
        "5.116(21)e-8",
    ),
    decaying("D0", r"\mathrm{D}^{0}", 0, "1864.84(4)", "410.3(1.0)e-15"),
    decaying(
        "D0bar",
        r"\bar{\mathrm{D}}^{0}",
        0,
        "1864.84(4)",
        "410.3(1.0)e-15",
    ),
    decaying("D+", r"\mathrm{D}^{+}", 1, "1869.66(5)", "1033(5)e-15"),
    decaying("D-", r"\mathrm{D}^{-}", -1, "1869.66(5)", "1033(5)e-15"),
    resonance("Jpsi", r"\mathrm{J}/\psi", 0, "3096.900(6)"),
    stable("p", r"\mathrm{p}", 1, "938.27208943(29)"),
    stable("pbar", r"\bar{\mathrm{p}}", -1, "938.27208943(29)"),
    decaying("n", r"\mathrm{n}", 0, "939.56542194(48)", "878.3(4)"),
    decaying(
        "nbar",
        r"\bar{\mathrm{n}}",
        0,
        "939.56542194(48)",
        "878.3(4)",
    ),
    decaying("Lambda", r"\Lambda", 0, "1115.683(6)", "2.617(10)e-10"),
    decaying(
        "Lambdabar",
        r"\bar{\Lambda}",
        0,
        "1115.683(6)",
        "2.617(10)e-10",
    ),
    decaying("Sigma+", r"\Sigma^{+}", 1, "1189.37(7)", "0.8018(26)e-10"),
    decaying("Sigma0", r"\Sigma^{0}", 0, "1192.642(24)", "7.4(7)e-20"),
    decaying("Sigma-", r"\Sigma^{-}", -1, "1197.449(29)", "1.479(11)e-10"),
    decaying("Xi0", r"\Xi^{0}", 0, "1314.86(20)", "2.90(9)e-10"),
    decaying("Xi-", r"\Xi^{-}", -1, "1321.71(7)", "1.639(15)e-10"),
    decaying("Omega-", r"\Omega^{-}", -1, "1672.45(29)", "0.821(11)e-10"),
    stable("d", r"\mathrm{d}", 1, "1875.61294500(58)"),
    // The triton's half-life is years: no figure follows its decay.
    stable("t", r"\mathrm{t}", 1, "2808.92113668(88)"),
    stable("He3", r"{}^{3}\mathrm{He}", 2, "2808.39161112(88)"),
    stable("alpha", r"\alpha", 2, "3727.3794118(12)"),
    resonance("W+", r"\mathrm{W}^{+}", 1, "80362.5(7.7)"),
    resonance("W-", r"\mathrm{W}^{-}", -1, "80362.5(7.7)"),
    resonance("Z", r"\mathrm{Z}", 0, "91187.9(2.0)"),
    resonance("H", r"\mathrm{H}", 0, "125130(110)"),
];

/// The species of that name.
pub fn species(name: &str) -> Option<&'static Species> {
    SPECIES.iter().find(|s| s.name == name)
}
