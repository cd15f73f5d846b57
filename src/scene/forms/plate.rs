//! Plates and their panels.

use crate::quantity::Typed;
use crate::scene::faults::Faults;
use crate::scene::fields::Form;
use crate::scene::tree::Value;
use crate::scene::values::{list, number, one_of, pair, short_text, text, texts, truth};
use crate::scene::{Arrows, Panel, Plate, Range, TimeAxis, View};

const PANEL: [&str; 14] = [
    "view",
    "frame",
    "rapidity",
    "events",
    "lines",
    "particles",
    "collision",
    "cones",
    "axes",
    "hyperbolas",
    "simultaneity",
    "arrows",
    "time_axis",
    "range",
];

/// Reads a plate.
pub(in crate::scene) fn plate<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<Plate> {
    let names = &["title", "width", "height", "text", "panels"];
    let form = Form::anonymous(value, names, faults);
    let title = form.may("title", faults, short_text);
    let width = form.may("width", faults, number);
    let height = form.may("height", faults, number);
    let lettering = form.may("text", faults, number);
    let panels = form.need("panels", faults, |v, f| list(v, f, panel))?;
    Some(Plate {
        title: title?,
        width: width?,
        height: height?,
        text: lettering?,
        panels,
    })
}

fn panel<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<Panel> {
    let form = Form::anonymous(value, &PANEL, faults);
    let view = form.may("view", faults, view);
    let when = form.when(faults);
    let events = form.may("events", faults, texts);
    let lines = form.may("lines", faults, texts);
    let particles = form.may("particles", faults, texts);
    let collision = form.may("collision", faults, text);
    let cones = form.may("cones", faults, texts);
    let axes = form.may("axes", faults, texts);
    let hyperbolas = form.may("hyperbolas", faults, truth);
    let simultaneity = form.may("simultaneity", faults, |v, f| {
        list(v, f, |v, f| pair(v, f, text, text))
    });
    let arrows = form.may("arrows", faults, arrows);
    let time_axis = form.may("time_axis", faults, time_axis);
    let range = form.may("range", faults, range)?;
    Some(Panel {
        view: view?.unwrap_or_default(),
        when: when?,
        events: events?,
        lines: lines?,
        particles: particles?,
        collision: collision?,
        cones: cones?.unwrap_or_default(),
        axes: axes?.unwrap_or_default(),
        hyperbolas: hyperbolas?,
        simultaneity: simultaneity?.unwrap_or_default(),
        arrows: arrows?,
        time_axis: time_axis?,
        range: range.unwrap_or_default(),
    })
}

fn view<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<View> {
    let words = [
        ("Spacetime", View::Spacetime),
        ("EnergyMomentum", View::EnergyMomentum),
    ];
    one_of(value, faults, &words)
}

fn arrows<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<Arrows> {
    let words = [
        ("FromOrigin", Arrows::FromOrigin),
        ("TipToTail", Arrows::TipToTail),
    ];
    one_of(value, faults, &words)
}

fn time_axis<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<TimeAxis> {
    let words = [("Time", TimeAxis::Time), ("LightWay", TimeAxis::LightWay)];
    one_of(value, faults, &words)
}

fn range<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<Range> {
    let form = Form::anonymous(value, &["t", "x", "energy", "px"], faults);
    let t = form.may("t", faults, ends);
    let x = form.may("x", faults, ends);
    let energy = form.may("energy", faults, ends);
    let px = form.may("px", faults, ends)?;
    Some(Range {
        t: t?,
        x: x?,
        energy: energy?,
        px,
    })
}

fn ends<'a>(value: Value<'a>, faults: &mut Faults<'a>) -> Option<(Typed, Typed)> {
    pair(value, faults, number, number)
}
