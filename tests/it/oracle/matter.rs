//! Particles and collisions, as printed and as known.

use serde_json::Value;

use super::compare::Checks;
use super::kinematics::{eps, few};
use super::number::Kind;
use super::particle::Particle;
use super::real::Real;
use super::sums::{Sum, promised};

impl Checks<'_> {
    pub(super) fn particle(&mut self, name: &str, row: &Value) {
        let seen = self.oracle.particle(name).seen(self.frame);
        let what = |field: &str| format!("particle {name} {field}");
        let (p, energy) = (&seen.p, Kind::Energy);
        self.near(
            &what("mass"),
            &row["mass"],
            energy,
            (&seen.mass, &seen.mass_doubt),
        );
        self.near(
            &what("energy"),
            &row["energy"],
            energy,
            (&p.t, &seen.energy_doubt()),
        );
        let momentum = &row["momentum"];
        self.near(&what("px"), &momentum[0], energy, (&p.x, &seen.px_doubt()));
        self.near(&what("py"), &momentum[1], energy, (&p.y, &seen.py_doubt));
        self.near(
            &what("p_minus"),
            &row["p_minus"],
            energy,
            (&p.u(), &seen.null_doubt.0),
        );
        self.near(
            &what("p_plus"),
            &row["p_plus"],
            energy,
            (&p.v(), &seen.null_doubt.1),
        );
        let kinetic = &p.t - &seen.mass;
        self.near(
            &what("kinetic"),
            &row["kinetic"],
            energy,
            (&kinetic, &seen.kinetic_doubt()),
        );
        let transverse = seen.transverse_mass();
        let lift = &p.y.abs() * &seen.py_doubt + &seen.mass * &seen.mass_doubt;
        let off = if transverse.is_zero() {
            lift
        } else {
            lift / &transverse
        };
        let off = off + few() * &transverse;
        self.near(
            &what("transverse_mass"),
            &row["transverse_mass"],
            energy,
            (&transverse, &off),
        );
        self.speeds(name, row, &seen);
        self.directions(name, row, &seen);
    }

    fn speeds(&mut self, name: &str, row: &Value, seen: &Particle) {
        let what = |field: &str| format!("particle {name} {field}");
        let (p, plain) = (&seen.p, Kind::Plain);
        self.beta_x(&what("beta_x"), &row["beta_x"], seen);
        if seen.mass.is_zero() {
            self.near(
                &what("beta"),
                &row["beta"],
                plain,
                (&Real::one(), &Real::zero()),
            );
            self.near(
                &what("one_minus_beta"),
                &row["one_minus_beta"],
                plain,
                (&Real::zero(), &Real::zero()),
            );
            self.found.null(&what("gamma"), &row["gamma"]);
            return;
        }
        let size = p.size();
        let beta = &size / &p.t;
        let rest = seen.mass.squared() / (&p.t * (&p.t + &size));
        self.near(
            &what("beta"),
            &row["beta"],
            plain,
            (&beta, &(seen.beta_doubt() + eps(4) * &beta)),
        );
        self.near(
            &what("one_minus_beta"),
            &row["one_minus_beta"],
            plain,
            (&rest, &(seen.beta_doubt() + few() * &rest)),
        );
        let gamma = &p.t / &seen.mass;
        let off =
            seen.energy_doubt() / &seen.mass + &gamma * (&seen.mass_doubt / &seen.mass + few());
        self.near(&what("gamma"), &row["gamma"], plain, (&gamma, &off));
    }

    fn directions(&mut self, name: &str, row: &Value, seen: &Particle) {
        let what = |field: &str| format!("particle {name} {field}");
        let p = &seen.p;
        match seen.rapidity() {
            None => self.found.null(&what("rapidity"), &row["rapidity"]),
            Some(y) => self.near(
                &what("rapidity"),
                &row["rapidity"],
                Kind::Plain,
                (&y, &(&seen.rapidity_doubt + eps(4) * y.abs())),
            ),
        }
        if p.size() <= &p.t * Real::speck() {
            // At rest as far as rounding goes: it points nowhere, or anywhere.
            return;
        }
        if p.y.is_zero() {
            self.found
                .null(&what("pseudorapidity"), &row["pseudorapidity"]);
        } else if p.y.abs() > seen.py_doubt {
            let eta = (&p.x / p.y.abs()).asinh();
            let off = seen.pseudorapidity_doubt() + few() * eta.abs();
            self.near(
                &what("pseudorapidity"),
                &row["pseudorapidity"],
                Kind::Plain,
                (&eta, &off),
            );
        }
        let degree = Real::int(180) / Real::pi();
        let angle = match (p.y.is_zero(), p.x > Real::zero()) {
            (true, true) => Real::zero(),
            (true, false) => Real::int(180),
            (false, _) => p.y.atan2(&p.x) * &degree,
        };
        let off = seen.angle_doubt() * degree + few() * angle.abs();
        // Where it may as well be at rest, or across the cut, an angle says nothing.
        if off < Real::one() && (&angle.abs() + &off < Real::int(180) || p.y.is_zero()) {
            self.near(&what("angle"), &row["angle"], Kind::Angle, (&angle, &off));
        }
    }

    pub(super) fn collision(&mut self, name: &str, row: &Value) {
        let energy = Kind::Energy;
        let [before, after] = ["before", "after"].map(|side| {
            let base = self.oracle.side(name, side);
            let seen: Vec<_> = base.iter().map(|p| p.seen(self.frame)).collect();
            (Sum::of(&base), Sum::of(&seen))
        });
        for (side, (base, seen)) in [("before", &before), ("after", &after)] {
            let what = |field: &str| format!("collision {name} {side} {field}");
            let row = &row[side];
            let allowed = promised() * &seen.scale;
            let t = &seen.total;
            self.near(
                &what("energy"),
                &row["energy"],
                energy,
                (&t.t, &(seen.energy_doubt() + &allowed)),
            );
            self.near(
                &what("px"),
                &row["momentum"][0],
                energy,
                (&t.x, &(seen.px_doubt() + &allowed)),
            );
            self.near(
                &what("py"),
                &row["momentum"][1],
                energy,
                (&t.y, &(seen.py_doubt() + &allowed)),
            );
            let masses = masses_doubt(base);
            self.near(
                &what("mass_sum"),
                &row["mass_sum"],
                energy,
                (&base.masses, &masses),
            );
            self.near(
                &what("invariant_mass"),
                &row["invariant_mass"],
                energy,
                (&base.mass(), &base.mass_doubt()),
            );
        }
        let what = |field: &str| format!("collision {name} {field}");
        let root_s = (&before.0.mass(), &before.0.mass_doubt());
        self.near(&what("root_s"), &row["root_s"], energy, root_s);
        let q = &before.0.masses - &after.0.masses;
        let off = masses_doubt(&before.0) + masses_doubt(&after.0);
        self.near(&what("q_value"), &row["q_value"], energy, (&q, &off));
        self.difference(name, row, &before, &after);
    }

    fn difference(&mut self, name: &str, row: &Value, before: &(Sum, Sum), after: &(Sum, Sum)) {
        let (a, b) = (&after.1, &before.1);
        let d = a.total.minus(&b.total);
        let allowed = promised() * (&a.scale + &b.scale);
        let what = |field: &str| format!("collision {name} difference {field}");
        let momentum = &row["difference"]["momentum"];
        let off = a.energy_doubt() + b.energy_doubt() + &allowed;
        self.near(
            &what("energy"),
            &row["difference"]["energy"],
            Kind::Energy,
            (&d.t, &off),
        );
        let off = a.px_doubt() + b.px_doubt() + &allowed;
        self.near(&what("px"), &momentum[0], Kind::Energy, (&d.x, &off));
        let off = a.py_doubt() + b.py_doubt() + &allowed;
        self.near(&what("py"), &momentum[1], Kind::Energy, (&d.y, &off));
        let base = after.0.total.minus(&before.0.total);
        let worst =
            base.t.abs().max(&base.x.abs()).max(&base.y.abs()) / self.oracle.unit(Kind::Energy);
        let tolerance = Real::of(row["tolerance"].as_f64().unwrap_or(0.0));
        let balanced = worst <= tolerance;
        if row["balanced"].as_bool() != Some(balanced) {
            self.found
                .wrong
                .push(format!("collision {name} balanced: {}", row["balanced"]));
        }
    }
}

/// Masses as typed are right to their last place, those found by a closure to their doubt.
fn masses_doubt(sum: &Sum) -> Real {
    sum.masses_doubt() + eps(4) * &sum.masses
}
