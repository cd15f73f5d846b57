//! A scene does not know its base frame: written anew in another one, it says the same in every named frame.

use super::compare::frame_names;
use super::kinematics::{Frame, Vector};
use super::number::Kind;
use super::real::Real;
use super::seen;
use super::solved::Oracle;
use super::text::Tree;

/// Digits with which coordinates and states are written anew.
const DIGITS: usize = 40;

/// Things in the base, in frames, and at rapidities, some of them going across; frames go along x.
const RELAY: &str = r#"Scene(
    format: 1, base: "hall", units: (time: "ns", length: "m", energy: "MeV"),
    events: {
        "start": At(t: 0, x: 0),
        "later": At(t: 31.25, x: -4.5),
        "moved": At(t: 7, x: 0.3, frame: "drift"),
        "turned": At(t: 20, x: -1.5, rapidity: "-0.8"),
        "noon": Along(line: "cart", clock: "12 ns"),
        "crossing": Meeting(of: ["cart", "rail"]),
        "seen": LightFrom(event: "later", meets: "cart"),
        "bend": At(t: 60, x: 3),
        "end": At(t: 90, x: -1.25),
        "on bent": Along(line: "bent", clock: "70.5 ns"),
    },
    lines: {
        "cart": Free(through: "start", velocity: Beta("3/5"), from: "start", until: "noon"),
        "rail": Free(through: "later", velocity: Beta(0), clock: ("later", 3)),
        "by gamma": Free(through: "start", velocity: Gamma(1.25), toward: Minus, frame: "drift"),
        "by k": Free(through: "start", velocity: Doppler("5/2"), rapidity: 1.5),
        "bent": Broken(through: ["start", "bend", "end"], clock: ("bend", 50)),
        "flash": Light(through: "later", toward: Minus),
        "track": Follows(particle: "lump", through: "start"),
        "slant": Follows(particle: "aside", through: "start"),
    },
    particles: {
        "beam": (species: "p", state: Kinetic("0.8 GeV")),
        "target": (mass: 620.5, state: AtRest),
        "lump": (state: Closing),
        "spare": (mass: 100, state: Beta("1/2"), frame: "drift"),
        "aside": (mass: "1.25 GeV", state: Celerity(2), angle: "30 deg"),
        "back": (species: "pi-", state: Energy(1000), toward: Minus),
        "light": (species: "gamma", state: Energy("1.5 GeV")),
        "light slanted": (mass: 0, state: Components(px: 3, py: -4)),
        "light seen": (mass: 0, state: Energy(10), angle: 135, rapidity: 2),
        "missing": (state: Closing),
        "gone": (species: "p", state: Kinetic("300 MeV"), angle: "20 deg"),
    },
    collisions: {
        "strike": (before: ["beam", "target"], after: ["lump"], closure: Merge),
        "loss": (before: ["aside", "beam", "light"], after: ["gone", "missing"], closure: Remainder),
        "false": (before: ["beam", "back"], after: ["light", "spare"], closure: Given),
    },
    frames: {
        "drift": Moving(velocity: Beta("1/4"), origin: "noon"),
        "back": Moving(velocity: Gamma(10), toward: Minus, origin: "later"),
        "further": Moving(velocity: Rapidity(1.25), frame: "drift", origin: "crossing"),
        "with cart": RestOf(line: "cart", origin: "start"),
        "on bend": RestOf(line: "bent", at: "end"),
        "with lump": RestOf(particle: "lump"),
        "balance": CentreOfMomentum(of: "strike"),
    },
)"#;

fn text(value: &str, unit: &str) -> Tree {
    Tree::Text(format!("{value} {unit}").trim().to_owned())
}

fn number(value: &Real, unit: &str) -> Tree {
    text(&value.digits(DIGITS), unit)
}

fn form(name: &str, fields: Vec<(&str, Tree)>) -> Tree {
    let fields = fields.into_iter().map(|(n, v)| (n.to_owned(), v));
    Tree::Form(name.to_owned(), fields.collect())
}

/// Writes a scene anew in a base that moves at a rapidity along x; the old base becomes a frame of its name.
struct Writer<'a> {
    old: &'a Oracle,
    rapidity: Real,
    base: Frame,
}

impl Writer<'_> {
    fn velocity(&self, old: &Vector) -> Tree {
        form(
            "Rapidity",
            vec![("", number(&self.base.see(old).rapidity(), ""))],
        )
    }

    /// The other fields of an object, with a `rapidity` beside it as the new base has it.
    fn rest(&self, tree: &Tree, but: &[&str]) -> Vec<(String, Tree)> {
        let Tree::Form(_, fields) = tree else {
            panic!("no form")
        };
        let kept = fields
            .iter()
            .filter(|(name, _)| !but.contains(&name.as_str()));
        kept.map(|(name, value)| {
            if name == "rapidity" {
                let old = self.old.number(value, Kind::Plain);
                (name.clone(), number(&(old - &self.rapidity), ""))
            } else {
                (name.clone(), value.clone())
            }
        })
        .collect()
    }

    fn anew(&self, tree: &Tree, but: &[&str], with: Vec<(&str, Tree)>) -> Tree {
        let mut fields: Vec<_> = with.into_iter().map(|(n, v)| (n.to_owned(), v)).collect();
        fields.extend(self.rest(tree, but));
        Tree::Form(tree.name().to_owned(), fields)
    }

    fn object(&self, list: &str, name: &str, tree: &Tree) -> Tree {
        let in_base = tree.get("frame").is_none() && tree.get("rapidity").is_none();
        match (list, tree.name()) {
            ("events", "At") if in_base => {
                let at = self.base.see(&self.old.event(name).at);
                let with = vec![("t", number(&at.t, "s")), ("x", number(&at.x, "ls"))];
                self.anew(tree, &["t", "x"], with)
            }
            ("lines", "Free") if in_base => {
                let old = self.old.line(name).motion_at(None).p;
                let with = vec![("velocity", self.velocity(&old))];
                self.anew(tree, &["velocity", "toward"], with)
            }
            ("frames", "Moving") if in_base => {
                let with = vec![("velocity", self.velocity(&self.old.frame(name).velocity))];
                self.anew(tree, &["velocity", "toward"], with)
            }
            ("particles", _) if in_base && tree.need("state").name() != "Closing" => {
                let old = self.old.particle(name);
                let p = self.base.see(&old.p);
                let state = if old.mass.is_zero() {
                    let with = vec![("px", number(&p.x, "eV/c")), ("py", number(&p.y, "eV/c"))];
                    form("Components", with)
                } else {
                    let y = number(&p.rapidity(), "");
                    form(
                        "Longitudinal",
                        vec![("rapidity", y), ("py", number(&p.y, "eV/c"))],
                    )
                };
                self.anew(tree, &["state", "angle", "toward"], vec![("state", state)])
            }
            _ if in_base => tree.clone(),
            _ => self.anew(tree, &[], Vec::new()),
        }
    }

    fn scene(&self) -> String {
        let Tree::Form(_, fields) = &self.old.scene else {
            panic!("no scene")
        };
        let mut anew = Vec::new();
        for (list, value) in fields {
            let value = match value {
                Tree::Map(entries) => {
                    let each = entries.iter();
                    let mut entries: Vec<_> = each
                        .map(|(name, tree)| (name.clone(), self.object(list, name, tree)))
                        .collect();
                    if list == "frames" {
                        let at_rest = Frame::base().velocity;
                        let with = vec![("velocity", self.velocity(&at_rest))];
                        let old = form("Moving", with);
                        entries.push((self.old.base_name().to_owned(), old));
                    }
                    Tree::Map(entries)
                }
                _ if list == "base" => Tree::Text("new base".to_owned()),
                other => other.clone(),
            };
            anew.push((list.clone(), value));
        }
        Tree::Form("Scene".to_owned(), anew).to_string()
    }
}

fn says_the_same(rapidity: &str) {
    let old = Oracle::of(RELAY);
    let rapidity = Real::decimal(rapidity);
    let base = Oracle::at_rapidity(&rapidity);
    let writer = Writer {
        old: &old,
        rapidity,
        base,
    };
    let anew = writer.scene();
    let new = Oracle::of(&anew);
    for frame in frame_names(&old) {
        let options = ["--frame", frame.as_str()];
        let here = seen("old", RELAY, &old, &old.frame(&frame), &options).numbers;
        let there = seen("new", &anew, &new, &new.frame(&frame), &options).numbers;
        let mut both = 0;
        for (what, (number, bound)) in &here {
            // The frame itself is told from its base.
            if what.starts_with("frame ") {
                continue;
            }
            // A length or an angle that rounding hides from one of the two bases.
            let Some((other, other_bound)) = there.get(what) else {
                continue;
            };
            both += 1;
            let off = (Real::of(*number) - Real::of(*other)).abs();
            assert!(
                off <= bound + other_bound + Real::speck(),
                "{what} in {frame}: {number:e}, written anew {other:e}\n{anew}"
            );
        }
        assert!(both * 8 > here.len() * 7, "{both} of {}", here.len());
    }
}

#[test]
fn a_base_frame_at_rapidity_a_third_changes_nothing() {
    says_the_same("0.3");
}

#[test]
fn a_base_frame_at_rapidity_5_changes_nothing() {
    says_the_same("5");
}

#[test]
fn a_base_frame_at_rapidity_18_changes_nothing() {
    says_the_same("18");
}
