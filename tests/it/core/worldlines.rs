//! Worldlines: clocks, meetings and light.

use conewright::dynamics::Momentum;
use conewright::geometry::{
    Angle, Boost, Displacement, GeometryError, Leg, Rapidity, Side, Worldline,
};
use conewright::num::EPS;
use proptest::prelude::*;

use super::exact::{absolute, big, relative};
use super::generators::{displacement, rapidity, two_rapidities};

fn event(t: f64, x: f64) -> Displacement {
    Displacement::from_tx(t, x)
}

fn free(eta: f64, through: Displacement) -> Worldline {
    Worldline::straight(Leg::free(Rapidity::new(eta).unwrap()), through, 0.0)
}

fn moving(beta: f64, through: Displacement) -> Worldline {
    free(Rapidity::from_beta(beta).unwrap().value(), through)
}

fn light(side: Side, through: Displacement) -> Worldline {
    Worldline::straight(Leg::Light(side), through, 0.0)
}

/// The line of a particle with py.
fn followed(p: Momentum, through: Displacement) -> Worldline {
    let leg = Leg::Free {
        rapidity: Rapidity::new(p.rapidity().unwrap()).unwrap(),
        across: p.py() / p.mass(),
    };
    Worldline::straight(leg, through, 0.0)
}

fn there_and_back() -> Worldline {
    Worldline::broken(
        &[event(0.0, 0.0), event(5.0, 4.0), event(10.0, 0.0)],
        0,
        100.0,
    )
    .unwrap()
}

fn words(result: Result<Displacement, GeometryError>) -> String {
    result.unwrap_err().to_string()
}

#[test]
fn a_free_clock_runs_slow_by_gamma() {
    // 3/5: 40 on the clock is t = 50, x = 30.
    let courier = moving(0.6, event(0.0, 0.0));
    let turn = courier.at_clock(40.0).unwrap();
    assert!((turn.t() - 50.0).abs() < 2e-14 && (turn.x() - 30.0).abs() < 2e-14);
    assert!((courier.clock_at(turn).unwrap() - 40.0).abs() < 1e-14);
    assert!(courier.passes(turn) && !courier.passes(event(50.0, 30.1)));
    assert!((courier.proper_time(event(0.0, 0.0), turn).unwrap() - 40.0).abs() < 1e-14);
    assert!((courier.proper_time(turn, event(0.0, 0.0)).unwrap() + 40.0).abs() < 1e-14);
}

#[test]
fn a_clock_across_the_picture_reads_the_whole_motion() {
    // beta 0.8 at 60 degrees: the ruler in (t, x) alone would say 0.917 t, the clock says 0.6 t.
    let eta = Rapidity::from_beta(0.8).unwrap();
    let p = Momentum::moving(2.0, eta, Angle::from_degrees(60.0)).unwrap();
    let line = followed(p, event(0.0, 0.0));
    let at = line.at_time(10.0);
    assert!((line.clock_at(at).unwrap() - 6.0).abs() < 1e-14);
    assert!((at.length() - 6.0).abs() < 1e-14);
    assert!((at.y - 8.0 * libm::sqrt(0.75)).abs() < 1e-14);
    assert!((at.x() - 4.0).abs() < 1e-14);
    assert!((line.legs()[0].beta_y() - p.py() / p.energy()).abs() < 4e-16);
    assert!(((at.t() * at.t() - at.x() * at.x()).sqrt() - 9.17).abs() < 0.005);
}

#[test]
fn a_broken_line_passes_through_its_events_exactly() {
    let line = there_and_back();
    assert_eq!(line.legs().len(), 2);
    assert_eq!(line.corners(), [event(5.0, 4.0)]);
    assert_eq!(line.at_clock(103.0), Ok(event(5.0, 4.0)));
    assert_eq!(line.at_clock(106.0), Ok(event(10.0, 0.0)));
    assert_eq!(line.clock_at(event(10.0, 0.0)), Ok(106.0));
    assert_eq!(line.proper_time(event(0.0, 0.0), event(10.0, 0.0)), Ok(6.0));
    assert_eq!(line.at_time(2.5), event(2.5, 2.0));
    // Beyond its ends it runs on, and at a corner the later leg counts.
    assert_eq!(line.at_time(-5.0), event(-5.0, -4.0));
    assert_eq!(line.at_time(15.0), event(15.0, -4.0));
    assert!(line.leg_at(event(5.0, 4.0)).beta_x() < 0.0);
    assert!(line.leg_at(event(4.9, 3.92)).beta_x() > 0.0);
    // The clock may be set at any of the events.
    let events = [event(0.0, 0.0), event(5.0, 4.0), event(10.0, 0.0)];
    for (at, reading) in [(0, 0.0), (1, 3.0), (2, 6.0)] {
        let line = Worldline::broken(&events, at, reading).unwrap();
        assert_eq!(line.clock_at(events[0]), Ok(0.0), "{at}");
        assert_eq!(line.clock_at(events[1]), Ok(3.0), "{at}");
        assert_eq!(line.clock_at(events[2]), Ok(6.0), "{at}");
    }
}

#[test]
fn a_broken_line_that_no_clock_can_follow_is_an_error_that_names_the_step() {
    let broken =
        |events: &[Displacement]| Worldline::broken(events, 0, 0.0).unwrap_err().to_string();
    let origin = event(0.0, 0.0);
    let says = |events: &[Displacement], what: &str| {
        let text = broken(events);
        assert!(text.contains(what), "{text}");
    };
    says(
        &[origin, event(1.0, 0.5), event(2.0, 3.0)],
        "event 2 of the line to event 3",
    );
    says(&[origin, event(1.0, 1.0)], "lightlike");
    says(&[origin, event(-1.0, 0.5)], "earlier");
    says(&[origin, origin], "one event");
    says(&[origin], "at least two events");
    says(&[origin, event(1e160, 0.0)], "range");
}

#[test]
fn light_keeps_its_null_coordinate_bit_for_bit() {
    let start = event(0.1, 0.7);
    let pulse = light(Side::Plus, start);
    let clock = free(-1.3, event(2.2, 9.1));
    let met = pulse.meeting(&clock).unwrap();
    assert_eq!(met.u, start.u);
    assert_eq!(clock.meeting(&pulse).unwrap().u, start.u);
    assert_eq!(
        (pulse.at_time(1e5).u, pulse.at_time(-3.3).u),
        (start.u, start.u)
    );
    let back = light(Side::Minus, met);
    assert_eq!(back.meeting(&free(0.4, start)).unwrap().v, met.v);
    // Two pulses cross where each keeps its own.
    let other = light(Side::Minus, event(0.3, 5.0));
    let crossing = pulse.meeting(&other).unwrap();
    assert_eq!((crossing.u, crossing.v), (start.u, event(0.3, 5.0).v));
    assert!(pulse.clock_at(met).is_err() && pulse.at_clock(1.0).is_err());
    assert!(pulse.proper_time(start, met).is_err());
    let heard = clock.light_from(start).unwrap();
    assert_eq!(heard.u, start.u);
    assert!(pulse.passes(heard));
}

#[test]
fn lines_that_never_meet_or_meet_everywhere_say_so() {
    let a = moving(0.6, event(0.0, 0.0));
    let beside = moving(0.6, event(0.0, 1.0));
    assert!(words(a.meeting(&beside)).contains("side by side"));
    let same = moving(0.6, event(5.0, 3.0));
    assert!(words(a.meeting(&same)).contains("one and the same"));
    let start = event(0.0, 0.0);
    assert!(
        words(light(Side::Plus, start).meeting(&light(Side::Plus, event(1.0, 0.0))))
            .contains("side by side")
    );
    assert!(
        words(light(Side::Plus, start).meeting(&light(Side::Plus, event(1.0, 1.0))))
            .contains("one and the same")
    );
    // Home meets the traveller twice; a bent one that turns away before it would meet never does.
    let home = moving(0.0, event(0.0, 0.0));
    assert!(words(home.meeting(&there_and_back())).contains("more than once"));
    let far = moving(0.0, event(0.0, 4.5));
    assert!(words(far.meeting(&there_and_back())).contains("never meet"));
    let along = moving(0.8, event(0.0, 0.0));
    assert!(words(along.meeting(&there_and_back())).contains("along a stretch"));
    // It touches at the corner, found there exactly and once.
    let corner = moving(0.0, event(0.0, 4.0));
    assert_eq!(corner.meeting(&there_and_back()), Ok(event(5.0, 4.0)));
    // Light that flees.
    let ahead = light(Side::Plus, event(0.0, 1.0));
    assert!(words(ahead.light_from(start)).contains("never reaches"));
    let behind = light(Side::Plus, event(0.0, -1.0));
    assert_eq!(behind.light_from(start), Ok(event(0.5, -0.5)));
}

#[test]
fn lines_of_two_products_meet_where_they_were_made() {
    let made = Displacement::new(1.5, 3.25, 0.75);
    let p = |degrees| {
        let eta = Rapidity::new(1.1).unwrap();
        Momentum::moving(1.0, eta, Angle::from_degrees(degrees)).unwrap()
    };
    for (a, b) in [(60.0, -45.0), (90.0, -90.0), (60.0, -60.0), (0.0, 180.0)] {
        let met = followed(p(a), made).meeting(&followed(p(b), made));
        assert_eq!(met, Ok(made), "{a} {b}");
    }
    // Made at different places they pass each other in (t, x), or never do.
    let other = Displacement::new(1.5, 3.25, 2.0);
    let passed = followed(p(60.0), made).meeting(&followed(p(-45.0), other));
    assert!(words(passed).contains("at different y"));
    // Of one dx/dt, but toward each other across: they meet above the middle.
    let met = followed(p(60.0), made)
        .meeting(&followed(p(-60.0), other))
        .unwrap();
    assert!((met.y - 1.375).abs() < 1e-14, "{met:?}");
    let clock = free(0.0, event(3.0, 9.0));
    assert!(words(clock.light_from(made)).contains("another y"));
}

#[test]
fn what_leaves_the_range_is_an_error() {
    let line = free(300.0, event(0.0, 0.0));
    assert!(line.at_clock(1.0).is_ok());
    assert!(matches!(
        line.at_clock(1e30),
        Err(GeometryError::Range { .. })
    ));
    assert!(matches!(
        line.at_clock(f64::NAN),
        Err(GeometryError::Range { .. })
    ));
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(256))]

    #[test]
    fn a_clock_reads_what_it_was_asked_for(d in displacement(), eta in rapidity(15.0), reading in -50.0..50.0_f64) {
        let line = free(eta, d);
        let at = line.at_clock(reading).unwrap();
        prop_assert!(line.passes(at));
        let k = libm::exp(eta.abs());
        let bound = 16.0 * EPS * (reading.abs() + at.scale().max(d.scale()) / k);
        prop_assert!((line.clock_at(at).unwrap() - reading).abs() <= bound);
        let want = big(d.v) + big(reading) * big(eta).exp();
        prop_assert!(absolute(at.v, &want) <= 4.0 * EPS * at.scale().max(d.scale()));
    }

    #[test]
    fn meetings_agree_with_arbitrary_precision(
        a in displacement(), b in displacement(), (y, z) in two_rapidities(12.0),
    ) {
        let met = free(y, a).meeting(&free(z, b));
        if y == z {
            prop_assert!(met.is_err());
            return Ok(());
        }
        // u - a.u = s e^-y, v - a.v = s e^y, and so for b: solved for the clock s.
        let (ky, kz) = (big(y).exp(), big(z).exp());
        let (du, dv) = (big(b.u) - big(a.u), big(b.v) - big(a.v));
        let turn = &kz / &ky - &ky / &kz;
        if let Ok(met) = met {
            let s = (&du * &kz - &dv / &kz) / &turn;
            let (u, v) = (big(a.u) + &s / &ky, big(a.v) + &s * &ky);
            // |dbeta| of the two: near parallel lines meet as far off as that.
            let apart = (big(y).tanh() - big(z).tanh()).to_f64().value().abs();
            let scale = a.scale().max(b.scale()).max(met.scale());
            let bound = 8.0 * EPS * scale / apart.min(1.0);
            prop_assert!(absolute(met.u, &u) <= bound);
            prop_assert!(absolute(met.v, &v) <= bound);
        } else {
            let turn = turn.to_f64().value().abs();
            prop_assert!(turn < 1e-14 || a.scale().max(b.scale()) / turn > 1e140, "{met:?}");
        }
    }

    #[test]
    fn light_from_an_event_reaches_every_clock_once(
        sent in displacement(), through in displacement(), eta in rapidity(12.0),
    ) {
        let line = free(eta, through);
        let met = line.light_from(sent).unwrap();
        prop_assert!(met.u == sent.u || met.v == sent.v);
        let tolerance = 8.0 * EPS * met.scale().max(sent.scale()).max(through.scale());
        prop_assert!(met.t() - sent.t() >= -tolerance);
        // On the line: (v - v0) = (u - u0) e^(2 eta).
        let along = (big(met.u) - big(through.u)) * (big(2.0) * big(eta)).exp() + big(through.v);
        let k = libm::exp(2.0 * eta).max(1.0);
        prop_assert!(absolute(met.v, &along) <= 8.0 * EPS * k * met.scale().max(through.scale()).max(sent.scale()));
    }

    #[test]
    fn proper_time_is_the_same_for_every_observer(eta in rapidity(5.0), frame in rapidity(5.0), reading in 0.1..50.0_f64) {
        let line = free(eta, event(1.0, 2.0));
        let at = line.at_clock(reading).unwrap();
        let boost = Boost::along_x(Rapidity::new(frame).unwrap());
        let seen = free(eta - frame, boost.apply(event(1.0, 2.0)).unwrap());
        let read = seen.clock_at(boost.apply(at).unwrap()).unwrap();
        prop_assert!((read - reading).abs() <= 1e-13 * (reading + 1.0) * libm::exp((eta - frame).abs().min(4.0)));
        let direct = (at - event(1.0, 2.0)).length();
        prop_assert!(relative(direct, &big(reading)) <= 32.0 * EPS * libm::exp(2.0 * eta.abs()));
    }
}
