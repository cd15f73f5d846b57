//! What the program prints against what the oracle knows, number by number.

use std::collections::BTreeMap;

use serde_json::Value;

use super::kinematics::{Event, Frame, eps, few};
use super::number::Kind;
use super::particle::Particle;
use super::real::Real;
use super::solved::Oracle;

/// A comparison: what was wrong, and how near to its bound the nearest number came.
#[derive(Debug)]
pub(crate) struct Findings {
    least: Real,
    pub(crate) wrong: Vec<String>,
    pub(crate) compared: usize,
    /// Every number found, with its bound, by what it is.
    pub(crate) numbers: BTreeMap<String, (f64, Real)>,
    /// The largest part of a bound that was used, and where.
    pub(crate) nearest: (f64, String),
}

impl Findings {
    /// The number is there and right to the bound.
    fn near(&mut self, what: &str, got: &Value, want: &Real, bound: &Real) {
        self.compared += 1;
        let Some(got) = got.as_f64() else {
            return self.fail(what, got, want);
        };
        self.numbers.insert(what.to_owned(), (got, bound.clone()));
        let off = (Real::of(got) - want).abs();
        // What is 0 comes out of the oracle as a speck.
        if off > *bound && off > self.least {
            let text = format!(
                "{what}: {got:e}, not {}; off by {} of {}",
                want.digits(20),
                off.digits(3),
                bound.digits(3)
            );
            self.wrong.push(text);
        } else if off > self.least {
            let share = (off / bound).f64();
            if share > self.nearest.0 {
                self.nearest = (share, what.to_owned());
            }
        }
    }

    fn fail(&mut self, what: &str, got: &Value, want: &Real) {
        self.wrong
            .push(format!("{what}: {got}, not {}", want.digits(20)));
    }

    pub(super) fn null(&mut self, what: &str, got: &Value) {
        self.compared += 1;
        if !got.is_null() {
            self.wrong
                .push(format!("{what}: {got}, where nothing exists"));
        }
    }

    fn same(&mut self, what: &str, got: &Value, want: &str) {
        self.compared += 1;
        if got.as_str() != Some(want) {
            self.wrong.push(format!("{what}: {got}, not {want}"));
        }
    }
}

/// Compares a printed ledger with a scene seen from a frame.
pub(crate) fn compare(oracle: &Oracle, frame: &Frame, json: &Value) -> Findings {
    let mut checks = Checks {
        oracle,
        frame,
        found: Findings {
            least: Real::speck(),
            wrong: Vec::new(),
            compared: 0,
            numbers: BTreeMap::new(),
            nearest: (0.0, String::new()),
        },
    };
    checks.frame(&json["frame"]);
    checks.units(&json["units"]);
    checks.rows("events", &json["events"], Checks::event);
    checks.rows("lines", &json["lines"], Checks::line);
    checks.rows("particles", &json["particles"], Checks::particle);
    checks.rows("collisions", &json["collisions"], Checks::collision);
    checks.intervals(&json["intervals"]);
    checks.found
}

pub(super) struct Checks<'a> {
    pub(super) oracle: &'a Oracle,
    pub(super) frame: &'a Frame,
    pub(super) found: Findings,
}

impl Checks<'_> {
    /// Every object of the list is there, in its order, and right.
    fn rows(&mut self, list: &str, rows: &Value, check: impl Fn(&mut Self, &str, &Value)) {
        let wanted: Vec<&str> = self
            .oracle
            .scene
            .entries(list)
            .iter()
            .map(|e| e.0.as_str())
            .collect();
        let rows = rows.as_array().map_or(&[][..], |rows| rows);
        let names: Vec<&str> = rows.iter().filter_map(|row| row["name"].as_str()).collect();
        if names != wanted {
            return self
                .found
                .wrong
                .push(format!("{list}: {names:?}, not {wanted:?}"));
        }
        for (name, row) in names.into_iter().zip(rows) {
            check(self, name, row);
        }
    }

    /// A number with a dimension, printed in the scene's unit.
    pub(super) fn near(
        &mut self,
        what: &str,
        got: &Value,
        kind: Kind,
        (want, bound): (&Real, &Real),
    ) {
        let unit = self.oracle.unit(kind);
        let want = want / &unit;
        // The number's own rounding, once.
        let bound = bound / &unit + eps(1) * want.abs();
        self.found.near(what, got, &want, &bound);
    }

    fn frame(&mut self, row: &Value) {
        let w = &self.frame.velocity;
        let doubt = &self.frame.doubt + few() * self.frame.rapidity.abs();
        let rapidity = self.frame.rapidity.clone();
        let plain = Kind::Plain;
        self.near(
            "frame rapidity",
            &row["rapidity"],
            plain,
            (&rapidity, &doubt),
        );
        let speed = if self.frame.is_along_x() {
            &w.x / &w.t
        } else {
            w.size() / &w.t
        };
        let steep = Real::one() / w.t.squared();
        self.near(
            "frame beta",
            &row["beta"],
            plain,
            (&speed, &(&doubt * steep + eps(2))),
        );
        let gamma_doubt = w.size() * &doubt + few() * &w.t;
        self.near("frame gamma", &row["gamma"], plain, (&w.t, &gamma_doubt));
        let degree = Real::int(180) / Real::pi();
        let (angle, off) = if self.frame.is_along_x() {
            (Real::zero(), Real::zero())
        } else {
            (
                w.y.atan2(&w.x) * &degree,
                (&self.frame.doubt / w.size() + few()) * &degree,
            )
        };
        self.near(
            "frame direction",
            &row["direction"],
            plain,
            (&angle, &(&off + few() * angle.abs())),
        );
    }

    fn units(&mut self, row: &Value) {
        for which in ["time", "length", "energy"] {
            let symbol = self.oracle.symbol(which);
            self.found
                .same(&format!("unit of {which}"), &row[which], &symbol);
        }
    }

    fn event(&mut self, name: &str, row: &Value) {
        let seen = self.oracle.event(name).seen(self.frame);
        let what = |field: &str| format!("event {name} {field}");
        let both = (&seen.u_doubt + &seen.v_doubt) / Real::int(2);
        let sum = |x: &Real| &both + eps(4) * x.abs();
        let at = &seen.at;
        self.near(&what("t"), &row["t"], Kind::Time, (&at.t, &sum(&at.t)));
        self.near(&what("x"), &row["x"], Kind::Length, (&at.x, &sum(&at.x)));
        self.near(
            &what("y"),
            &row["y"],
            Kind::Length,
            (&at.y, &(&seen.y_doubt + eps(4) * at.y.abs())),
        );
        self.near(&what("u"), &row["u"], Kind::Time, (&at.u(), &seen.u_doubt));
        self.near(&what("v"), &row["v"], Kind::Time, (&at.v(), &seen.v_doubt));
    }

    fn line(&mut self, name: &str, row: &Value) {
        let line = self.oracle.line(name);
        let what = |field: &str| format!("line {name} {field}");
        if line.bends() {
            self.found.null(&what("beta"), &row["beta"]);
            self.found.null(&what("rapidity"), &row["rapidity"]);
        } else {
            let seen = line.motion_at(None).seen(self.frame);
            self.beta_x(&what("beta"), &row["beta"], &seen);
            match seen.rapidity() {
                None => self.found.null(&what("rapidity"), &row["rapidity"]),
                Some(y) => self.near(
                    &what("rapidity"),
                    &row["rapidity"],
                    Kind::Plain,
                    (&y, &(&seen.rapidity_doubt + eps(2) * y.abs())),
                ),
            }
        }
        let tree = self.oracle.find("lines", name);
        let ends = match tree.name() {
            "Broken" => {
                let through = tree.need("through").items();
                through.first().zip(through.last())
            }
            _ => tree.get("from").zip(tree.get("until")),
        };
        let Some((from, until)) = ends else {
            return self.found.null(&what("proper_time"), &row["proper_time"]);
        };
        if tree.name() == "Light" {
            // Light has no clock: null or nothing.
            if row["proper_time"].as_f64().is_some_and(|tau| tau != 0.0) {
                self.found.wrong.push(what("proper_time"));
            }
            return;
        }
        let ends = (
            self.oracle.event(from.str()),
            self.oracle.event(until.str()),
        );
        let (tau, off) = line.proper_time(&ends.0, &ends.1);
        self.near(
            &what("proper_time"),
            &row["proper_time"],
            Kind::Time,
            (&tau, &off),
        );
    }

    pub(super) fn beta_x(&mut self, what: &str, got: &Value, seen: &Particle) {
        let p = &seen.p;
        let beta = &p.x / &p.t;
        let flat = if seen.is_endless() {
            Real::zero()
        } else {
            (seen.transverse_mass() / &p.t).squared() * &seen.rapidity_doubt
        };
        self.near(
            what,
            got,
            Kind::Plain,
            (&beta, &(flat + eps(4) * beta.abs())),
        );
    }

    fn intervals(&mut self, rows: &Value) {
        let entries = self.oracle.scene.entries("events");
        let mut rows = rows.as_array().into_iter().flatten();
        for (i, (from, _)) in entries.iter().enumerate() {
            for (to, _) in &entries[i + 1..] {
                let Some(row) = rows.next() else {
                    return self
                        .found
                        .wrong
                        .push(format!("no interval from {from} to {to}"));
                };
                self.found.same("interval from", &row["from"], from);
                self.found.same("interval to", &row["to"], to);
                let d = self.oracle.event(to).since(&self.oracle.event(from));
                self.interval(&format!("interval {from} - {to}"), row, &d);
            }
        }
        if rows.next().is_some() {
            self.found.wrong.push("too many intervals".to_owned());
        }
    }

    fn interval(&mut self, what: &str, row: &Value, d: &Event) {
        let square = d.at.square();
        let off = d.square_doubt();
        let null = row["kind"].as_str() == Some("lightlike");
        let kind = if square.is_zero() {
            "lightlike"
        } else if square > Real::zero() {
            "timelike"
        } else {
            "spacelike"
        };
        // What lies within its doubt may as well be of another kind; called null, it is printed as 0.
        let unsure = !d.exact && square.abs() <= &off * Real::int(4);
        if !unsure {
            self.found.same(&format!("{what} kind"), &row["kind"], kind);
        }
        let off = if null { off.max(&square.abs()) } else { off };
        let time = self.oracle.unit(Kind::Time);
        let bound = &off / time.squared() + eps(1) * (&square / time.squared()).abs();
        self.found.near(
            &format!("{what} squared"),
            &row["squared"],
            &(&square / time.squared()),
            &bound,
        );
        if unsure {
            return;
        }
        let length = square.abs().sqrt();
        let off = if square.is_zero() {
            Real::zero()
        } else {
            off / &length
        };
        let kind = if square < Real::zero() {
            Kind::Length
        } else {
            Kind::Time
        };
        self.near(
            &format!("{what} length"),
            &row["length"],
            kind,
            (&length, &(off + eps(4) * &length)),
        );
    }
}

/// Names of the named frames of a scene, the base first.
pub(crate) fn frame_names(oracle: &Oracle) -> Vec<String> {
    let named = oracle
        .scene
        .entries("frames")
        .iter()
        .map(|(name, _)| name.clone());
    std::iter::once(oracle.base_name().to_owned())
        .chain(named)
        .collect()
}
