//! Sums of momenta, closures and collisions.

use super::kinematics::{Vector, eps, few};
use super::particle::Particle;
use super::real::Real;
use super::solved::Oracle;
use super::text::Tree;

/// The promise for sums: 1e-12 of the sum of absolute terms.
pub(crate) fn promised() -> Real {
    Real::ten_to(-12)
}

/// A sum of momenta.
pub(crate) struct Sum {
    parts: Vec<Particle>,
    pub(crate) total: Vector,
    pub(crate) masses: Real,
    /// Sum of E, and of |px| + |py|.
    pub(crate) scale: Real,
}

impl Sum {
    pub(crate) fn of(parts: &[Particle]) -> Self {
        let add =
            |f: &dyn Fn(&Particle) -> Real| parts.iter().fold(Real::zero(), |sum, p| sum + f(p));
        Self {
            total: Vector::new(add(&|p| p.p.t.clone()), add(&|p| p.p.x.clone()), {
                let y = add(&|p| p.p.y.clone());
                let scale = add(&|p| p.p.y.abs());
                if y.vanishes_beside(&scale) {
                    Real::zero()
                } else {
                    y
                }
            }),
            masses: add(&|p| p.mass.clone()),
            scale: add(&|p| p.p.t.clone() + p.p.x.abs() + p.p.y.abs()),
            parts: parts.to_vec(),
        }
    }

    fn add(&self, f: impl Fn(&Particle) -> Real) -> Real {
        self.parts.iter().fold(Real::zero(), |sum, p| sum + f(p))
    }

    pub(crate) fn energy_doubt(&self) -> Real {
        self.add(Particle::energy_doubt)
    }

    pub(crate) fn px_doubt(&self) -> Real {
        self.add(Particle::px_doubt)
    }

    pub(crate) fn py_doubt(&self) -> Real {
        self.add(|p| p.py_doubt.clone())
    }

    pub(crate) fn masses_doubt(&self) -> Real {
        self.add(|p| p.mass_doubt.clone())
    }

    /// The mass of the sum.
    pub(crate) fn mass(&self) -> Real {
        match self.parts.as_slice() {
            [one] => one.mass.clone(),
            _ => self.total.square().sqrt(),
        }
    }

    /// 1e-12 of itself, and what the rounding of each stored number costs, by the derivatives of p.P.
    pub(crate) fn mass_doubt(&self) -> Real {
        let (mass, sum) = (self.mass(), &self.total);
        if self.parts.len() == 1 {
            return self.parts[0].mass_doubt.clone();
        }
        if mass.is_zero() {
            return eps(16) * &sum.t;
        }
        let by_parts = self.add(|p| {
            let turn = &sum.t * &p.p.x - &sum.x * &p.p.t;
            if p.is_endless() {
                return p.p.dot(sum).abs() * few();
            }
            let lift = &p.p.y / p.transverse_mass().squared();
            let raise = Vector::new(&p.p.t * &lift, &p.p.x * &lift, Real::one()).dot(sum);
            let heavy = if p.mass.is_zero() {
                Real::zero()
            } else {
                let weight = &p.mass / p.transverse_mass().squared();
                Vector::new(&p.p.t * &weight, &p.p.x * weight, Real::zero())
                    .dot(sum)
                    .abs()
            };
            turn.abs() * &p.rapidity_doubt + raise.abs() * &p.py_doubt + heavy * &p.mass_doubt
        });
        promised() * &mass + by_parts / mass
    }

    /// As one particle of the sum's mass.
    pub(crate) fn as_particle(&self) -> Particle {
        let minus = self.add(|p| p.null_doubt.0.clone());
        let plus = self.add(|p| p.null_doubt.1.clone());
        self.found(self.mass(), self.mass_doubt(), minus, plus)
    }

    fn found(&self, mass: Real, mass_doubt: Real, minus: Real, plus: Real) -> Particle {
        let py_doubt = self.py_doubt() + eps(2) * self.add(|p| p.p.y.abs());
        let p = self.total.clone();
        if mass.is_zero() && p.y.is_zero() {
            let mut light = Particle::closing(p, mass, Real::zero(), py_doubt, mass_doubt);
            light.null_doubt = (minus, plus);
            return light;
        }
        let relative = (&minus / p.u() + &plus / p.v()) / Real::int(2);
        let steep = (&p.x / &p.t).abs() * &mass_doubt * &mass / (mass.squared() + p.y.squared());
        let rapidity_doubt = relative + steep + few() * p.rapidity().abs();
        let mut found = Particle::closing(p, mass, rapidity_doubt, py_doubt, mass_doubt);
        found.null_doubt = (&found.null_doubt.0 + minus, &found.null_doubt.1 + plus);
        found
    }

    /// What is left of it without `parts`.
    fn less(&self, parts: &Self) -> Particle {
        let both: Vec<Particle> = self.parts.iter().chain(&parts.parts).cloned().collect();
        let all = Self::of(&both);
        let blur = |f: &dyn Fn(&Particle) -> (Real, Real)| {
            all.add(|p| {
                let y = p.rapidity().unwrap_or_else(Real::zero).abs();
                let (value, doubt) = f(p);
                value * (y * eps(1) + few()) + doubt
            })
        };
        let minus = blur(&|p| (p.p.u(), p.null_doubt.0.clone()));
        let plus = blur(&|p| (p.p.v(), p.null_doubt.1.clone()));
        let mut left = self.total.minus(&parts.total);
        if left.y.vanishes_beside(&all.scale) {
            left.y = Real::zero();
        }
        let square = left.dot(&left);
        let off =
            &left.u() * &plus + &left.v() * &minus + Real::int(2) * left.y.abs() * all.py_doubt();
        let light = square.vanishes_beside(&all.scale.squared());
        let mass = if light { Real::zero() } else { square.sqrt() };
        let mass_doubt = if light {
            Real::zero()
        } else {
            off / (Real::int(2) * &mass)
        };
        let whole = Self { total: left, ..all };
        whole.found(mass, mass_doubt, minus, plus)
    }
}

impl Oracle {
    /// The particles of one side of a collision.
    pub(crate) fn side(&self, collision: &str, side: &str) -> Vec<Particle> {
        let tree = self.find("collisions", collision);
        let names = tree.need(side).items();
        names.iter().map(|name| self.particle(name.str())).collect()
    }

    /// The particle that the collision naming it finds.
    pub(crate) fn closing(&self, name: &str) -> Particle {
        let names = |tree: &Tree, side: &str| -> Vec<String> {
            let items = tree.need(side).items();
            items.iter().map(|item| item.str().to_owned()).collect()
        };
        let collisions = self.scene.entries("collisions");
        let closes = |(_, tree): &&(String, Tree)| {
            tree.need("closure").str() != "Given"
                && ["before", "after"]
                    .iter()
                    .any(|side| names(tree, side).iter().any(|n| n == name))
        };
        let (_, tree) = collisions
            .iter()
            .find(closes)
            .expect("a collision that closes it");
        let sum = |side: &str| {
            let others = names(tree, side).into_iter().filter(|n| n != name);
            Sum::of(&others.map(|n| self.particle(&n)).collect::<Vec<_>>())
        };
        let (before, after) = (sum("before"), sum("after"));
        let (whole, parts) = if names(tree, "after").iter().any(|n| n == name) {
            (before, after)
        } else {
            (after, before)
        };
        if parts.parts.is_empty() {
            whole.as_particle()
        } else {
            whole.less(&parts)
        }
    }
}
