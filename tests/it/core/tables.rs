//! The oracle tables: binary64 inputs in exact hexadecimal, outputs to 40 digits by two formulas (mpmath).

use conewright::dynamics::{Momentum, Total};
use conewright::geometry::{Angle, Boost, Displacement, GeometryError, Leg, Rapidity, Worldline};
use conewright::num::EPS;

use super::exact::{absolute, decimal, f64_of, relative};
use crate::facts::{Row, hex, rows};

fn number(row: &Row, column: &str) -> f64 {
    row[column].parse().expect("a number")
}

/// The numbers of an input such as `beta=0x1.8p-1 te=0x1.0p+0`, in order.
fn inputs(row: &Row) -> Vec<f64> {
    let words = row["inputs_hex"].split(' ');
    // A count such as N=8 stands in the decimal column alone.
    let hexes = words.filter_map(|w| w.split_once('=')).map(|(_, h)| hex(h));
    hexes.collect()
}

fn decimals(text: &str) -> Vec<f64> {
    text.split(' ').map(|word| f64_of(&decimal(word))).collect()
}

#[test]
fn boosts_agree_with_the_table() {
    let (mut beyond, mut checked) = (Vec::new(), 0);
    for row in rows("oracle_boost.csv") {
        let id = row["id"].clone();
        let event = Displacement::from_tx(hex(&row["t_hex"]), hex(&row["x_hex"]));
        let parameter = hex(&row["param_hex"]);
        let eta = match row["param_kind"].as_str() {
            "rapidity" => Rapidity::new(parameter).unwrap(),
            "beta" => Rapidity::from_beta(parameter).unwrap(),
            other => panic!("{other}"),
        };
        // A rapidity made from beta is rounded, and with it its exponential.
        let units = match row["param_kind"].as_str() {
            "beta" => 4.0 + eta.value().abs(),
            _ => 4.0,
        };
        assert!(
            absolute(eta.beta(), &decimal(&row["beta"])) <= units * EPS,
            "{id}"
        );
        assert!(
            relative(eta.gamma(), &decimal(&row["gamma"])) <= units * EPS,
            "{id}"
        );
        assert!(
            relative(eta.value(), &decimal(&row["rapidity"])) <= 2.0 * EPS,
            "{id}"
        );
        let boosted = match Boost::along_x(eta).apply(event) {
            Ok(boosted) => boosted,
            Err(GeometryError::Range { .. }) => {
                beyond.push(id);
                continue;
            }
            Err(error) => panic!("{id}: {error}"),
        };
        let bound = units * EPS * number(&row, "abs_scale_lightcone");
        assert!(
            absolute(boosted.t(), &decimal(&row["t_prime"])) <= bound,
            "{id} t"
        );
        assert!(
            absolute(boosted.x(), &decimal(&row["x_prime"])) <= bound,
            "{id} x"
        );
        let kept = (boosted.interval() - event.interval()).abs();
        assert!(kept <= 4.0 * EPS * event.interval().abs(), "{id}");
        checked += 1;
    }
    // A component of 2e300, and e^350 on one of about 1 or less.
    assert_eq!(
        beyond,
        ["OB029", "OB044", "OB073", "OB074", "OB076", "OB077"]
    );
    assert_eq!(checked, 68);
}

#[test]
fn masses_of_sums_agree_with_the_table() {
    let rows = rows("oracle_mass.csv");
    assert_eq!(rows.len(), 46);
    for row in rows {
        let id = &row["id"];
        let parts: Vec<_> = row["particles_hex_m:px:py"]
            .split(' ')
            .map(|particle| {
                let n: Vec<_> = particle.split(':').map(hex).collect();
                Momentum::from_components(n[0], n[1], n[2]).unwrap()
            })
            .collect();
        let total = Total::of(&parts);
        let scale = |scale: f64| 1e-14 * scale;
        for (got, column, scale) in [
            (total.energy, "E_sum", scale(total.energy_scale)),
            (total.px, "px_sum", scale(total.momentum_scale)),
            (total.py, "py_sum", scale(total.momentum_scale)),
        ] {
            assert!(
                absolute(got, &decimal(&row[column])) <= scale,
                "{id} {column}"
            );
        }
        let off = relative(total.invariant_mass, &decimal(&row["mass"]));
        assert!(off <= 1e-12, "{id} mass {off:e}");
        // The storing of rapidities moves the excess by EPS of the energies in the balance.
        let excess = decimal(&row["mass_minus_sum_of_masses"]);
        let off = absolute(total.excess, &excess);
        let bound = 1e-12 * f64_of(&excess).abs();
        assert!(off <= bound, "{id} excess {off:e}");
        if let Ok(frame) = total.centre_of_momentum() {
            let want = decimal(&row["rapidity_cm"]);
            let bound = 1e-12 * f64_of(&want).abs().max(1.0);
            assert!(
                absolute(frame.rapidity().value().abs(), &want) <= bound,
                "{id} frame"
            );
        }
    }
}

#[test]
fn proper_times_of_broken_lines_agree_with_the_table() {
    let (mut checked, mut skipped) = (0, Vec::new());
    for row in rows("oracle_propertime.csv") {
        let id = &row["id"];
        if !row["kind"].starts_with("polyline") {
            skipped.push(row["kind"].split(':').next().unwrap_or_default().to_owned());
            continue;
        }
        let points: Vec<_> = row["inputs_hex"]
            .split(' ')
            .map(|point| point.split_once(',').expect("t,x"))
            .map(|(t, x)| (hex(t), hex(x)))
            .collect();
        let events: Vec<_> = points
            .iter()
            .map(|&(t, x)| Displacement::from_tx(t, x))
            .collect();
        // Differences of binary64 t and x are exact in these rows, or rounded once.
        let steps: Vec<_> = points
            .windows(2)
            .map(|w| Displacement::from_tx(w[1].0 - w[0].0, w[1].1 - w[0].1))
            .collect();
        let line = Worldline::broken_by_steps(&events, &steps, 0, 0.0);
        if row["kind"] == "polyline: tiny" {
            // t of 1e-200.
            assert!(matches!(line, Err(GeometryError::Range { .. })), "{id}");
            checked += 1;
            continue;
        }
        let line = line.unwrap();
        let (first, last) = (events[0], *events.last().unwrap());
        let want = decimal(&row["tau"]);
        let tau = line.proper_time(first, last).unwrap();
        assert!(relative(tau, &want) <= 8.0 * EPS, "{id} {tau}");
        assert!(
            relative(line.clock_at(last).unwrap(), &want) <= 8.0 * EPS,
            "{id}"
        );
        let end = line.leg_at(last);
        assert!(
            absolute(end.beta_x(), &decimal(&row["beta_end"])) <= 4.0 * EPS,
            "{id}"
        );
        assert_eq!(line.at_time(last.t()), last, "{id}");
        checked += 1;
    }
    let count = |kind: &str| skipped.iter().filter(|s| s.starts_with(kind)).count();
    assert_eq!(checked, 8);
    assert_eq!(count("accelerated legs"), 9);
    assert_eq!(count("hyperbola from rest"), 5);
    assert_eq!(count("oscillator"), 3);
    assert_eq!(count("circular motion"), 4);
    assert_eq!(count("constant coordinate acceleration"), 1);
    assert_eq!(skipped.len(), 22);
}

fn traveller(beta: f64, through: Displacement) -> Worldline {
    let leg = Leg::free(Rapidity::from_beta(beta).unwrap());
    Worldline::straight(leg, through, 0.0)
}

fn home() -> Worldline {
    traveller(0.0, Displacement::ZERO)
}

/// In units of EPS: a rapidity made from beta is rounded, and an echo has two meetings.
fn bound(beta: f64) -> f64 {
    10.0 + 2.0 * libm::atanh(beta.abs())
}

/// Home's signal to a traveller and its echo: when it meets him, on his clock, and when it is back.
fn check_echo(row: &Row, line: &Worldline, sent: f64, beta: f64) {
    let met = line.light_from(Displacement::from_tx(sent, 0.0)).unwrap();
    let back = home().light_from(met).unwrap();
    for (got, column) in [
        (met.t(), "t_receive"),
        (line.clock_at(met).unwrap(), "tau_receive"),
        (back.t(), "t_return"),
    ] {
        let off = relative(got, &decimal(&row[column]));
        assert!(off <= bound(beta) * EPS, "{} {column} {off:e}", row["id"]);
    }
    let factor = Rapidity::from_beta(beta).unwrap().doppler();
    assert!(relative(factor, &decimal(&row["k_factor"])) <= bound(beta) * EPS);
    // The null coordinates are the event's own.
    assert!(met.u == sent || met == Displacement::from_tx(sent, 0.0));
    assert_eq!(back.v, met.v);
}

fn out_and_back(beta: f64, turn: f64) -> Worldline {
    let way = Displacement::from_tx(turn, beta * turn);
    let whole = Displacement::from_tx(2.0 * turn, 0.0);
    Worldline::broken(&[Displacement::ZERO, way, whole], 0, 0.0).unwrap()
}

fn check_times(row: &Row, got: &[f64]) {
    let want = decimals(&row["extra"]);
    assert_eq!(got.len(), want.len(), "{}", row["id"]);
    for (got, want) in got.iter().zip(want) {
        assert!(
            (got - want).abs() <= 8.0 * EPS * want,
            "{} {got}",
            row["id"]
        );
    }
}

#[test]
fn echoes_pulses_and_doppler_factors_agree_with_the_table() {
    let (mut checked, mut skipped) = (0, 0);
    for row in rows("oracle_doppler.csv") {
        let kind = row["kind"].as_str();
        if kind.starts_with("accelerated traveller") {
            skipped += 1;
            continue;
        }
        let n = inputs(&row);
        if kind.starts_with("home emits at te to receding") {
            check_echo(&row, &traveller(n[0], Displacement::ZERO), n[1], n[0]);
        } else if kind.starts_with("home emits at te to approaching") {
            let line = traveller(-n[0], Displacement::from_tx(0.0, n[1]));
            check_echo(&row, &line, n[2], -n[0]);
        } else if kind.starts_with("twin out at beta") {
            let count: u32 = row["inputs"].rsplit('=').next().unwrap().parse().unwrap();
            let gamma = Rapidity::from_beta(n[0]).unwrap().gamma();
            let line = out_and_back(n[0], gamma * f64::from(count) / 2.0);
            let heard = (1..=count).map(|i| {
                let sent = line.at_clock(f64::from(i)).unwrap();
                home().light_from(sent).unwrap().t()
            });
            check_times(&row, &heard.collect::<Vec<_>>());
        } else if kind.starts_with("twin round trip") {
            let duration: u32 = row["inputs"].rsplit('=').next().unwrap().parse().unwrap();
            let line = out_and_back(n[0], f64::from(duration) / 2.0);
            let heard = (1..=duration).map(|i| {
                let sent = Displacement::from_tx(f64::from(i), 0.0);
                line.clock_at(line.light_from(sent).unwrap()).unwrap()
            });
            check_times(&row, &heard.collect::<Vec<_>>());
        } else if kind.starts_with("Doppler f_obs/f_src") {
            // A photon of frequency 1 as the source has it, which moves along +x.
            let (cos, sin) = (n[1], (1.0 - n[1] * n[1]).sqrt());
            let light = Momentum::from_momentum(0.0, 1.0, Angle::of(cos, sin)).unwrap();
            let source = Boost::along_x(Rapidity::from_beta(n[0]).unwrap());
            let ratio = 1.0 / light.boosted(source).unwrap().energy();
            let off = relative(ratio, &decimal(&row["k_factor"]));
            assert!(off <= bound(n[0]) * EPS, "{} {off:e}", row["id"]);
        } else {
            panic!("{kind}");
        }
        checked += 1;
    }
    assert_eq!((checked, skipped), (28, 5));
}
