//! Lettering stands free: on the examples and on invented scenes no label's outline meets other ink or another label.

use std::fmt::Write as _;

use conewright::marks::{Ink, Paint, Shape, Sheet};
use conewright::plate::Override;
use conewright::task;
use kurbo::{BezPath, Line, ParamCurveNearest, PathEl, PathSeg, Point, Rect, Shape as _};

use crate::draws::Draws;
use crate::program::examples;

/// The tint inside a light cone, and paper: grounds, on which lettering may stand.
const GROUNDS: [Ink; 2] = [Ink(0xFA, 0xF5, 0xE6), Ink(255, 255, 255)];
/// How closely curves are taken as chords, mm.
const FLATNESS: f64 = 0.002;

/// What a mark puts on paper.
struct Print {
    chords: Vec<Line>,
    /// Half the width of a stroke, mm; 0 for what is filled.
    half: f64,
    fill: Option<BezPath>,
    area: Rect,
}

/// A path as straight pieces; a filled one is closed.
fn chords(path: &BezPath, is_filled: bool) -> Vec<Line> {
    let mut flat = BezPath::new();
    kurbo::flatten(path, FLATNESS, |element| {
        if is_filled && matches!(element, PathEl::MoveTo(_)) && !flat.elements().is_empty() {
            flat.close_path();
        }
        flat.push(element);
    });
    if is_filled && !flat.elements().is_empty() {
        flat.close_path();
    }
    let line = |segment| match segment {
        PathSeg::Line(line) => line,
        other => panic!("flattened, yet {other:?}"),
    };
    flat.segments().map(line).collect()
}

impl Print {
    /// None for a ground.
    fn of(shape: &Shape) -> Option<Self> {
        let path = shape.outline();
        let stroke = match shape {
            Shape::Path {
                paint: Paint::Fill(ink),
                ..
            } if GROUNDS.contains(ink) => return None,
            Shape::Path {
                paint: Paint::Stroke(stroke),
                ..
            } => Some(stroke.width / 2.0),
            Shape::Path { .. } | Shape::Label { .. } => None,
        };
        let half = stroke.unwrap_or(0.0);
        Some(Self {
            chords: chords(&path, stroke.is_none()),
            half,
            area: path.bounding_box().inflate(half, half),
            fill: stroke.is_none().then_some(path),
        })
    }
    /// Whether ink of a label and of something else overlaps: their edges cross, a stroke reaches over, or one stands
    /// inside the other.
    fn meets(&self, other: &Self) -> bool {
        let reach = self.area.inflate(other.half, other.half);
        if !overlap(self.area, other.area) {
            return false;
        }
        let near: Vec<Line> = other
            .chords
            .iter()
            .copied()
            .filter(|chord| overlap(reach, chord.bounding_box()))
            .collect();
        let touch = |a: &Line| {
            near.iter()
                .any(|b| cross(*a, *b) || apart(*a, *b) < other.half)
        };
        let holds = |fill: &Option<BezPath>, chords: &[Line]| {
            fill.as_ref()
                .is_some_and(|fill| chords.iter().any(|chord| fill.winding(chord.p0) != 0))
        };
        self.chords.iter().any(touch)
            || holds(&other.fill, &self.chords)
            || holds(&self.fill, &other.chords)
    }
}

fn overlap(a: Rect, b: Rect) -> bool {
    a.x0 <= b.x1 && b.x0 <= a.x1 && a.y0 <= b.y1 && b.y0 <= a.y1
}

fn cross(a: Line, b: Line) -> bool {
    let side = |line: Line, p: Point| (line.p1 - line.p0).cross(p - line.p0);
    side(a, b.p0) * side(a, b.p1) < 0.0 && side(b, a.p0) * side(b, a.p1) < 0.0
}

/// The distance of two pieces that do not cross: an end of one is nearest to the other.
fn apart(a: Line, b: Line) -> f64 {
    let to = |line: Line, p: Point| line.nearest(p, 1e-9).distance_sq;
    to(a, b.p0)
        .min(to(a, b.p1))
        .min(to(b, a.p0))
        .min(to(b, a.p1))
        .sqrt()
}

/// Whose labels meet what, on a sheet, and which leave it; and how many labels there are.
fn met(sheet: &Sheet) -> (Vec<String>, usize) {
    let prints: Vec<(bool, String, Print)> = sheet
        .marks
        .iter()
        .filter_map(|mark| {
            let (is_label, name) = match &mark.shape {
                Shape::Label { label, .. } => (true, format!("label {}", label.letters)),
                Shape::Path { .. } => (false, sheet.groups[mark.group].id.clone()),
            };
            Some((is_label, name, Print::of(&mark.shape)?))
        })
        .collect();
    let paper = Rect::new(0.0, 0.0, sheet.width, sheet.height);
    let mut found = Vec::new();
    let mut labels = 0;
    for (i, (_, name, label)) in prints.iter().enumerate().filter(|(_, print)| print.0) {
        labels += 1;
        if label.area.union(paper) != paper {
            found.push(format!("{name} leaves the sheet"));
        }
        for (j, (is_label, other, print)) in prints.iter().enumerate() {
            let is_twin = j == i || (*is_label && j < i);
            if !is_twin && label.meets(print) {
                found.push(format!("{name} meets {other}"));
            }
        }
    }
    (found, labels)
}

#[test]
fn the_comparer_sees_every_way_to_meet() {
    let plain = |path: BezPath, paint: Paint| Print::of(&Shape::Path { path, paint }).unwrap();
    let square = |x: f64, y: f64, side: f64| Rect::new(x, y, x + side, y + side).to_path(0.1);
    let black = || Paint::Fill(Ink(0, 0, 0));
    let label = plain(square(10.0, 10.0, 2.0), black());
    for (x, y, side, is_met) in [
        (11.0, 11.0, 4.0, true),
        (10.5, 10.5, 0.5, true),
        (5.0, 5.0, 20.0, true),
        (12.1, 10.0, 2.0, false),
    ] {
        assert_eq!(
            label.meets(&plain(square(x, y, side), black())),
            is_met,
            "{x} {y} {side}"
        );
    }
    let ring = |width: f64| {
        let stroke = conewright::marks::Stroke {
            ink: Ink(0, 0, 0),
            width,
            dash: Vec::new(),
            cap: conewright::marks::Cap::Butt,
            join: conewright::marks::Join::Mitre,
        };
        plain(square(9.0, 9.0, 4.0), Paint::Stroke(stroke))
    };
    assert!(!label.meets(&ring(1.9)) && label.meets(&ring(2.1)));
}

#[test]
fn no_label_meets_ink_in_any_example() {
    for path in examples() {
        let opened = task::open(&path).unwrap();
        for plate in opened.scene.plates.keys() {
            let laid = task::lay_out(&opened, Some(plate), &Override::default()).unwrap();
            let (found, labels) = met(&laid.sheet);
            assert!(found.is_empty(), "{} {plate}: {found:#?}", path.display());
            assert!(labels > 10, "{} {plate}: {labels} labels", path.display());
        }
    }
}

#[test]
fn the_event_at_the_origin_keeps_its_label_amid_axes_and_a_cone() {
    let path = examples()
        .into_iter()
        .find(|path| path.ends_with("tug-and-beacon.ron"))
        .unwrap();
    let text = std::fs::read_to_string(path)
        .unwrap()
        .replace("At(t: 0, x: 0)", "At(t: 0, x: 0, label: \"O\")")
        .replace("events: [\"hail\", \"reply\", \"heard\"], ", "");
    let opened = task::open_text(&text).unwrap();
    for (plate, panels) in [("timing", 1), ("both frames", 2)] {
        let laid = task::lay_out(&opened, Some(plate), &Override::default()).unwrap();
        let named = laid
            .sheet
            .marks
            .iter()
            .filter(|mark| laid.sheet.groups[mark.group].title == "event passing")
            .filter(|mark| matches!(mark.shape, Shape::Label { .. }))
            .count();
        assert_eq!(named, panels, "{plate}: {:?}", laid.faults);
        let (found, _) = met(&laid.sheet);
        assert!(found.is_empty(), "{plate}: {found:#?}");
    }
}

const LABELS: [&str; 8] = [
    "A",
    "B'",
    r"p_a'",
    r"\bar\Lambda",
    r"\frac{p^-}{p^+}",
    r"x_{\mathrm{max}}",
    r"\gamma\beta",
    r"Q^{2}",
];

/// 3 to 8 events, 2 to 6 lines, a frame, cones, axes, hyperbolas and a line of simultaneity by chance.
fn spacetime(draws: &mut Draws) -> String {
    let mut text = String::from(
        "Scene(format: 1, base: \"b\", units: (time: \"us\", length: \"km\"), events: { ",
    );
    let events = draws.from(3, 8);
    for (i, label) in LABELS.iter().enumerate().take(events) {
        let (t, x) = (draws.between(-5.0, 40.0), draws.between(-9.0, 9.0));
        let label = if draws.part() < 0.7 {
            format!(", label: r\"{label}\"")
        } else {
            String::new()
        };
        let _ = write!(text, "\"e{i}\": At(t: {t:.3}, x: {x:.3}{label}), ");
    }
    text.push_str("}, lines: { ");
    for i in 0..draws.from(2, 6) {
        let through = draws.from(0, events - 1);
        let toward = draws.one(&["Plus", "Minus"]);
        let beta = draws.between(-0.95, 0.95);
        let line = if draws.part() < 0.25 {
            format!("Light(through: \"e{through}\", toward: {toward})")
        } else {
            format!("Free(through: \"e{through}\", velocity: Beta({beta:.3}))")
        };
        let _ = write!(text, "\"line {i}\": {line}, ");
    }
    let (beta, width) = (draws.between(-0.9, 0.9), draws.between(70.0, 180.0));
    let size = draws.one(&["", "text: \"7 pt\",", "text: \"12 pt\","]);
    let frame = draws.one(&["", "", "frame: \"f\","]);
    let [cones, axes, arcs, cut, range] = [
        "cones: [\"e0\", \"e1\"],",
        "axes: [\"f\"],",
        "hyperbolas: true,",
        "simultaneity: [(\"e1\", \"f\"), (\"e2\", \"b\")],",
        "range: (t: (-8, 45), x: (-12, 12)),",
    ]
    .map(|choice| draws.one(&["", choice]));
    let _ = write!(
        text,
        "}}, frames: {{ \"f\": Moving(velocity: Beta({beta:.3})) }}, plates: {{ \"p\": ({size} width: \"{width:.0} mm\",
        panels: [(view: Spacetime, {frame} {cones} {axes} {arcs} {cut} {range})]) }})"
    );
    text
}

/// 2 to 5 particles with momenta by chance, some across, alone or before and after a merger.
fn energy_momentum(draws: &mut Draws) -> String {
    let mut text =
        String::from("Scene(format: 1, base: \"b\", units: (energy: \"GeV\"), particles: { ");
    let count = draws.from(2, 5);
    for (i, label) in LABELS.iter().enumerate().take(count) {
        let species = draws.one(&["p", "pi+", "K-", "gamma", "e-", "n"]);
        let (px, py) = (
            draws.between(-4.0, 4.0),
            if draws.part() < 0.2 { 0.4 } else { 0.0 },
        );
        let label = if draws.part() < 0.5 {
            format!(", label: r\"{label}\"")
        } else {
            String::new()
        };
        let _ = write!(
            text,
            "\"q{i}\": (species: \"{species}\", state: Components(px: {px:.3}, py: {py}){label}), "
        );
    }
    let merger = draws.one(&["", "collision: \"x\","]);
    if !merger.is_empty() {
        let before: Vec<String> = (0..count).map(|i| format!("\"q{i}\"")).collect();
        let _ = write!(
            text,
            "\"all\": (state: Closing, label: \"M\") }}, collisions: {{ \"x\": (before: [{}], after: [\"all\"], closure: Merge) ",
            before.join(", ")
        );
    }
    let arrows = draws.one(&["arrows: TipToTail,", "arrows: FromOrigin,", ""]);
    let frame = draws.one(&["", "", "frame: \"f\","]);
    let shells = draws.one(&["", "", "hyperbolas: false,"]);
    let (beta, width) = (draws.between(-0.8, 0.8), draws.between(70.0, 180.0));
    let _ = write!(
        text,
        "}}, frames: {{ \"f\": Moving(velocity: Beta({beta:.3})) }}, plates: {{ \"p\": (width: \"{width:.0} mm\",
        panels: [(view: EnergyMomentum, {merger} {arrows} {frame} {shells})]) }})"
    );
    text
}

/// Lays out invented scenes, none of whose labels may meet ink; few may find no place.
fn all_stand_free(count: usize, seed: u64, invented: fn(&mut Draws) -> String) {
    let mut draws = Draws::new(seed);
    let (mut placed, mut missing) = (0, 0);
    for round in 0..count {
        let text = invented(&mut draws);
        let opened = task::open_text(&text).unwrap_or_else(|fault| panic!("{fault:?}\n{text}"));
        assert!(
            opened.faults.is_empty(),
            "round {round}: {:?}\n{text}",
            opened.faults
        );
        let laid = task::lay_out(&opened, None, &Override::default()).unwrap();
        let (found, labels) = met(&laid.sheet);
        assert!(found.is_empty(), "round {round}: {found:#?}\n{text}");
        placed += labels;
        missing += laid
            .faults
            .iter()
            .filter(|fault| fault.what.contains("no free place"))
            .count();
    }
    println!("{placed} labels placed, {missing} without a place");
    assert!(placed > 15 * count, "{placed} labels");
    assert!(
        missing * 20 < placed,
        "{missing} of {placed} labels found no place"
    );
}

#[test]
fn a_shells_label_is_nearest_to_its_own_shell() {
    let mut draws = Draws::new(0x5eed_0023);
    let mut seen = 0;
    for _ in 0..80 {
        let text = energy_momentum(&mut draws);
        let opened = task::open_text(&text).unwrap();
        let sheet = task::lay_out(&opened, None, &Override::default())
            .unwrap()
            .sheet;
        // A shell is the one stroked curve of its group; its label is the one that names a mass.
        let (mut shells, mut named) = (Vec::new(), Vec::new());
        for mark in &sheet.marks {
            let title = &sheet.groups[mark.group].title;
            if !(title.starts_with("shell of") || title.starts_with("total of")) {
                continue;
            }
            match &mark.shape {
                Shape::Path {
                    path,
                    paint: Paint::Stroke(_),
                } => shells.push((mark.group, chords(path, false))),
                Shape::Label { label, .. } if label.letters != "total" => {
                    named.push((mark.group, mark.shape.outline().bounding_box()));
                }
                Shape::Path { .. } | Shape::Label { .. } => {}
            }
        }
        let far = |area: Rect, chords: &[Line]| {
            chords
                .iter()
                .flat_map(|line| (0..=16).map(|i| line.p0.lerp(line.p1, f64::from(i) / 16.0)))
                .map(|p| {
                    let x = (area.x0 - p.x).max(p.x - area.x1).max(0.0);
                    let y = (area.y0 - p.y).max(p.y - area.y1).max(0.0);
                    conewright::num::hypot(x, y)
                })
                .fold(f64::INFINITY, f64::min)
        };
        for (group, area) in named {
            let of = |is_own: bool| {
                shells
                    .iter()
                    .filter(|shell| (shell.0 == group) == is_own)
                    .map(|shell| far(area, &shell.1))
                    .fold(f64::INFINITY, f64::min)
            };
            assert!(
                of(true) < of(false) + 0.05,
                "{} {}\n{text}",
                of(true),
                of(false)
            );
            seen += 1;
        }
    }
    assert!(seen > 80, "{seen} labels of shells");
}

#[test]
fn no_label_meets_ink_in_invented_spacetime_scenes() {
    all_stand_free(110, 0x5eed_0021, spacetime);
}

#[test]
fn no_label_meets_ink_in_invented_energy_momentum_scenes() {
    all_stand_free(110, 0x5eed_0022, energy_momentum);
}
