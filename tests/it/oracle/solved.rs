//! What a scene's text says, followed from object to object by name.

use std::cell::RefCell;
use std::collections::BTreeMap;

use super::kinematics::{Event, FEW, Frame, Vector, direction, eps, few};
use super::lines::Line;
use super::number::{Kind, read, unit};
use super::particle::Particle;
use super::real::Real;
use super::sums::Sum;
use super::text::Tree;

/// A scene, read and computed by the oracle alone.
pub(crate) struct Oracle {
    pub(crate) scene: Tree,
    events: RefCell<BTreeMap<String, Event>>,
    lines: RefCell<BTreeMap<String, Line>>,
    particles: RefCell<BTreeMap<String, Particle>>,
    frames: RefCell<BTreeMap<String, Frame>>,
}

/// Looks a name up among what is done, else does it.
fn once<T: Clone>(done: &RefCell<BTreeMap<String, T>>, name: &str, make: impl FnOnce() -> T) -> T {
    if let Some(found) = done.borrow().get(name) {
        return found.clone();
    }
    let made = make();
    done.borrow_mut().insert(name.to_owned(), made.clone());
    made
}

impl Oracle {
    pub(crate) fn of(text: &str) -> Self {
        Self {
            scene: Tree::read(text),
            events: RefCell::default(),
            lines: RefCell::default(),
            particles: RefCell::default(),
            frames: RefCell::default(),
        }
    }

    pub(crate) fn base_name(&self) -> &str {
        self.scene.need("base").str()
    }

    /// The symbol of a unit of the scene.
    pub(crate) fn symbol(&self, which: &str) -> String {
        let said = self.scene.get("units").and_then(|u| u.get(which));
        match (said, which) {
            (Some(symbol), _) => symbol.str().to_owned(),
            (None, "time") => "s".to_owned(),
            (None, "length") => format!("c {}", self.symbol("time")),
            (None, _) => "GeV".to_owned(),
        }
    }

    /// The size of the unit in which a kind of number is typed bare and printed.
    pub(crate) fn unit(&self, kind: Kind) -> Real {
        match kind {
            Kind::Plain | Kind::Angle => Real::one(),
            Kind::Time => unit(kind, &self.symbol("time")),
            Kind::Length => unit(kind, &self.symbol("length")),
            Kind::Energy | Kind::Mass | Kind::Momentum => {
                unit(Kind::Energy, &self.symbol("energy"))
            }
        }
    }

    pub(crate) fn number(&self, tree: &Tree, kind: Kind) -> Real {
        read(tree.str(), kind, &self.unit(kind))
    }

    pub(crate) fn find(&self, list: &str, name: &str) -> &Tree {
        let entries = self.scene.entries(list);
        let found = entries.iter().find(|(n, _)| n == name);
        &found.unwrap_or_else(|| panic!("no {name} in {list}")).1
    }

    /// The frame that `frame:` or `rapidity:` beside an object says; the base where nothing does.
    fn beside(&self, tree: &Tree) -> Frame {
        match (tree.get("frame"), tree.get("rapidity")) {
            (Some(name), _) => self.frame(name.str()),
            (None, Some(eta)) => Self::at_rapidity(&self.number(eta, Kind::Plain)),
            (None, None) => Frame::base(),
        }
    }

    pub(crate) fn at_rapidity(eta: &Real) -> Frame {
        let along = (Real::one(), Real::zero());
        Frame::new(Vector::moving(eta, &along), Event::origin(), Real::zero())
    }

    /// A velocity as a rapidity; `toward` for the forms without a sign.
    fn velocity(&self, form: &Tree, toward: Option<&Tree>) -> Real {
        let x = self.number(form.need(""), Kind::Plain);
        let one = Real::one();
        let sign = match toward.map(Tree::str) {
            Some("Minus") => Real::int(-1),
            _ => Real::one(),
        };
        match form.name() {
            "Beta" => x.atanh(),
            "Gamma" => sign * (&x + (x.squared() - one).sqrt()).ln(),
            "Celerity" => x.asinh(),
            "Rapidity" => x,
            "Doppler" => x.ln(),
            "BehindLight" => sign * ((Real::int(2) - &x) / x).ln() / Real::int(2),
            other => panic!("no velocity: {other}"),
        }
    }

    pub(crate) fn event(&self, name: &str) -> Event {
        once(&self.events, name, || {
            let tree = self.find("events", name);
            match tree.name() {
                "At" => {
                    let t = self.number(tree.need("t"), Kind::Time);
                    let x = self.number(tree.need("x"), Kind::Length);
                    let given = Event::typed(Vector::new(t, x, Real::zero()));
                    if self.is_base(tree) {
                        given
                    } else {
                        given.unseen(&self.beside(tree))
                    }
                }
                "Along" => {
                    let clock = self.number(tree.need("clock"), Kind::Time);
                    self.line(tree.need("line").str()).at_clock(&clock)
                }
                "Meeting" => {
                    let of = tree.need("of").items();
                    self.line(of[0].str()).meeting(&self.line(of[1].str()))
                }
                "LightFrom" => {
                    let from = self.event(tree.need("event").str());
                    self.line(tree.need("meets").str()).light_from(&from)
                }
                other => panic!("no event: {other}"),
            }
        })
    }

    pub(crate) fn is_base(&self, tree: &Tree) -> bool {
        let named = tree.get("frame").map(Tree::str);
        tree.get("rapidity").is_none() && named.is_none_or(|name| name == self.base_name())
    }

    pub(crate) fn line(&self, name: &str) -> Line {
        once(&self.lines, name, || {
            let tree = self.find("lines", name);
            let anchor = |field: &str| self.event(tree.need(field).str());
            let line = match tree.name() {
                "Free" => {
                    let rapidity = self.velocity(tree.need("velocity"), tree.get("toward"));
                    let motion = Self::moving(&rapidity, &Real::zero(), Real::one());
                    let motion = motion.unseen(&self.beside(tree));
                    Line::straight(anchor("through"), motion)
                }
                "Light" => {
                    let way = if tree.need("toward").str() == "Plus" {
                        1
                    } else {
                        -1
                    };
                    let p = Vector::new(Real::one(), Real::int(way), Real::zero());
                    let motion = Particle::new(p, Real::zero(), Real::zero(), Real::zero());
                    Line::straight(anchor("through"), motion)
                }
                "Follows" => {
                    let p = self.particle(tree.need("particle").str());
                    Line::straight(anchor("through"), p.per_mass())
                }
                "Broken" => {
                    let through = tree.need("through").items();
                    let events = through.iter().map(|name| self.event(name.str()));
                    Line::broken(&events.collect::<Vec<_>>())
                }
                other => panic!("no line: {other}"),
            };
            let Some(clock) = tree.get("clock") else {
                return line;
            };
            let event = self.event(clock.items()[0].str());
            line.set_clock(&event, &self.number(&clock.items()[1], Kind::Time))
        })
    }

    /// Something of a mass and a total rapidity in a direction.
    fn moving(rapidity: &Real, degrees: &Real, mass: Real) -> Particle {
        let way = direction(degrees);
        let p = Vector::moving(rapidity, &way).times(&mass);
        let along_x = way.1.is_zero();
        Self::stored(p, mass, along_x)
    }

    /// With the doubts of storing mass, rapidity and py.
    fn stored(p: Vector, mass: Real, along_x: bool) -> Particle {
        let slanted = if along_x { Real::zero() } else { p.size() };
        let py_doubt = few() * (p.y.abs() + slanted.clone());
        if mass.is_zero() && p.y.is_zero() {
            return Particle::new(p, mass, Real::zero(), Real::zero());
        }
        let light = if mass.is_zero() { few() } else { Real::zero() };
        let rapidity_doubt = few() * (p.rapidity().abs() + slanted / &p.t) + light;
        Particle::new(p, mass, rapidity_doubt, py_doubt)
    }

    /// A mass as typed; 0 and none where nothing says it.
    pub(crate) fn mass(&self, tree: &Tree) -> Option<Real> {
        if let Some(mass) = tree.get("mass") {
            return Some(self.number(mass, Kind::Mass));
        }
        let species = tree.get("species")?.str();
        let own = self.scene.entries("species");
        if let Some((_, entry)) = own.iter().find(|(name, _)| name == species) {
            return Some(self.number(entry.need("mass"), Kind::Mass));
        }
        let mega = Real::int(1_000_000);
        Some(Real::decimal(&super::known_mass(species)) * mega)
    }

    pub(crate) fn particle(&self, name: &str) -> Particle {
        once(&self.particles, name, || {
            let tree = self.find("particles", name);
            let state = tree.need("state");
            if state.name() == "Closing" {
                return self.closing(name);
            }
            let mass = self.mass(tree).expect("a mass");
            self.state(tree, state, mass).unseen(&self.beside(tree))
        })
    }

    fn state(&self, tree: &Tree, state: &Tree, mass: Real) -> Particle {
        let energy = |field: &str| self.number(state.need(field), Kind::Energy);
        let momentum = |field: &str| self.number(state.need(field), Kind::Momentum);
        let degrees = tree
            .get("angle")
            .map_or_else(Real::zero, |a| self.number(a, Kind::Angle));
        let degrees = match tree.get("toward").map(Tree::str) {
            Some("Minus") => degrees + Real::int(180),
            _ => degrees,
        };
        let way = direction(&degrees);
        let of_size = |p: Real| {
            let e = (p.squared() + mass.squared()).sqrt();
            let v = Vector::new(e, &p * &way.0, p * &way.1);
            Self::stored(v, mass.clone(), way.1.is_zero())
        };
        match state.name() {
            "AtRest" => Self::moving(&Real::zero(), &degrees, mass),
            "Kinetic" => {
                let kinetic = energy("");
                of_size((&kinetic * (&kinetic + Real::int(2) * &mass)).sqrt())
            }
            "Energy" => {
                let e = energy("");
                of_size(((&e - &mass) * (e + &mass)).sqrt())
            }
            "Momentum" => of_size(momentum("")),
            "Components" => {
                let (px, py) = (momentum("px"), momentum("py"));
                let e = (px.squared() + py.squared() + mass.squared()).sqrt();
                Self::stored(Vector::new(e, px, py), mass, true)
            }
            "Longitudinal" => {
                let y = self.number(state.need("rapidity"), Kind::Plain);
                let py = momentum("py");
                let transverse = (mass.squared() + py.squared()).sqrt();
                let p = Vector::new(&transverse * y.cosh(), &transverse * y.sinh(), py);
                Self::stored(p, mass, true)
            }
            _ => Self::moving(&self.velocity(state, None), &degrees, mass),
        }
    }

    pub(crate) fn frame(&self, name: &str) -> Frame {
        if name == self.base_name() {
            return Frame::base();
        }
        once(&self.frames, name, || {
            let tree = self.find("frames", name);
            let origin = tree
                .get("origin")
                .map_or_else(Event::origin, |event| self.event(event.str()));
            let moving = match tree.name() {
                "Moving" => {
                    let rapidity = self.velocity(tree.need("velocity"), tree.get("toward"));
                    let degrees = tree
                        .get("angle")
                        .map_or_else(Real::zero, |a| self.number(a, Kind::Angle));
                    let motion = Self::moving(&rapidity, &degrees, Real::one());
                    motion.unseen(&self.beside(tree))
                }
                "RestOf" => match (tree.get("line"), tree.get("particle")) {
                    (Some(line), _) => {
                        let at = tree.get("at").map(|event| self.event(event.str()));
                        self.line(line.str()).motion_at(at.as_ref())
                    }
                    (None, Some(particle)) => self.particle(particle.str()).per_mass(),
                    (None, None) => panic!("whose rest frame?"),
                },
                "CentreOfMomentum" => match tree.need("of") {
                    Tree::List(names) => {
                        let parts: Vec<_> = names.iter().map(|n| self.particle(n.str())).collect();
                        Sum::of(&parts).as_particle().per_mass()
                    }
                    collision => Sum::of(&self.side(collision.str(), "before"))
                        .as_particle()
                        .per_mass(),
                },
                other => panic!("no frame: {other}"),
            };
            let celerity = moving.p.size();
            let doubt = if moving.p.y.is_zero() {
                moving.rapidity_doubt.clone()
            } else {
                moving.px_doubt() + &moving.py_doubt + eps(FEW) * celerity
            };
            Frame::new(moving.p, origin, doubt)
        })
    }
}
