//! Tests of `plate`: what is drawn is true, is cut at the field, and meets no label.

mod labels;
mod panels;

use conewright::fault::Fault;
use conewright::marks::{Ink, Paint, Shape, Sheet};
use conewright::num;
use conewright::plate::{Laid, Override};
use conewright::quantity::Typed;
use conewright::scene::When;
use conewright::task;
use kurbo::{Affine, BezPath, PathEl, PathSeg, Point, Rect, Vec2};

/// A light random generator (Marsaglia 2003, xorshift), so that every run draws the same scenes.
struct Draws(u64);

impl Draws {
    fn next(&mut self) -> u64 {
        self.0 ^= self.0 << 13;
        self.0 ^= self.0 >> 7;
        self.0 ^= self.0 << 17;
        self.0
    }
    fn between(&mut self, low: f64, high: f64) -> f64 {
        low + (high - low) * (self.next() >> 11) as f64 / (1_u64 << 53) as f64
    }
    fn below(&mut self, count: u32) -> u32 {
        u32::try_from(self.next() % u64::from(count)).expect("below a u32")
    }
}

fn laid(text: &str, plate: &str) -> Laid {
    laid_with(text, plate, &Override::default())
}

fn laid_with(text: &str, plate: &str, change: &Override) -> Laid {
    let opened = task::open_text(text).expect("the scene reads");
    task::lay_out(&opened, Some(plate), change).expect("the plate is there")
}

fn paths<'a>(sheet: &'a Sheet, title: &'a str) -> impl Iterator<Item = (&'a BezPath, &'a Paint)> {
    sheet
        .marks
        .iter()
        .filter(move |m| sheet.groups[m.group].title == title)
        .filter_map(|m| match &m.shape {
            Shape::Path { path, paint } => Some((path, paint)),
            Shape::Label { .. } => None,
        })
}

fn labels(sheet: &Sheet) -> Vec<(&str, String)> {
    let of = |m: &conewright::marks::Mark| match &m.shape {
        Shape::Label { label, .. } => Some(label.letters.clone()),
        Shape::Path { .. } => None,
    };
    sheet
        .marks
        .iter()
        .filter_map(|m| Some((&*sheet.groups[m.group].title, of(m)?)))
        .collect()
}

fn says(faults: &[Fault], what: &str) -> bool {
    faults.iter().any(|f| f.line("scene").contains(what))
}

/// The points of a path's ends and corners.
fn corners(path: &BezPath) -> Vec<Point> {
    path.elements()
        .iter()
        .filter_map(|e| match *e {
            PathEl::MoveTo(p)
            | PathEl::LineTo(p)
            | PathEl::CurveTo(_, _, p)
            | PathEl::QuadTo(_, p) => Some(p),
            PathEl::ClosePath => None,
        })
        .collect()
}

const VOYAGE: &str = r#"Scene(
    format: 1, title: "Skiff and mooring", base: "pier",
    units: (time: "ns", length: "m", energy: "GeV"),
    events: {
        "cast off": At(t: 2, x: 0, label: "A"),
        "rounding": At(t: 30, x: 5, label: "B"),
        "return": At(t: 58, x: 0, label: "C"),
        "flare": LightFrom(event: "cast off", meets: "far", label: "D"),
        "post": At(t: 0, x: 8),
    },
    lines: {
        "mooring": Free(through: "cast off", velocity: Beta(0)),
        "skiff": Broken(through: ["cast off", "rounding", "return"]),
        "far": Free(through: "post", velocity: Beta("-1/5")),
        "beam": Light(through: "cast off", toward: Plus, from: "cast off", until: "flare"),
    },
    particles: {
        "in": (species: "pi-", state: Momentum("2.1 GeV/c")),
        "rest": (species: "p", state: AtRest),
        "k": (species: "K0", state: Momentum("1.3 GeV/c")),
        "l": (state: Closing),
    },
    collisions: { "swap": (before: ["in", "rest"], after: ["k", "l"], closure: Remainder) },
    frames: { "skiff": RestOf(line: "far") },
    plates: {
        "pair": (panels: [
            (view: Spacetime, cones: ["cast off"], axes: ["skiff"], hyperbolas: true,
             simultaneity: [("flare", "skiff")]),
            (view: EnergyMomentum, collision: "swap"),
        ]),
        "fan": (panels: [(view: EnergyMomentum, collision: "swap", arrows: FromOrigin)]),
        "cut": (panels: [(view: Spacetime, range: (t: (10, 50), x: (-1, 7)), cones: ["rounding"], axes: ["skiff"])]),
    },
)"#;

/// A shell drawn alone in a given window of a given frame: its mark's curve and where it stands.
fn shell(
    mass: f64,
    rapidity: f64,
    px: (f64, f64),
    energy: (f64, f64),
) -> (Vec<BezPath>, Affine, Rect) {
    let text = format!(
        r#"Scene(format: 1, base: "b", units: (energy: "GeV"),
        particles: {{ "q": (mass: "{mass:e}", state: Rapidity({rapidity:?})) }},
        plates: {{ "p": (panels: [(view: EnergyMomentum, range: (px: ("{:e}", "{:e}"), energy: ("{:e}", "{:e}")))]) }})"#,
        px.0, px.1, energy.0, energy.1
    );
    let laid = laid(&text, "p");
    let found = paths(&laid.sheet, "shell of particle q")
        .map(|(path, _)| path.clone())
        .collect();
    (found, laid.panels[0].from_plane, laid.panels[0].field)
}

/// How far a point (mm) is from E^2 - p^2 = m^2 (the definition of the mass shell): the nearest point by Newton's
/// method on the squared distance, in units of the plane about that point.
fn off_shell(mass: f64, at: Point, scale: f64) -> f64 {
    let energy = |p: f64| num::hypot(mass, p);
    let mut p = at.x;
    for _ in 0..60 {
        let (e, slope) = (energy(p), p / energy(p));
        let curve = mass * mass / (e * e * e);
        let first = (p - at.x) + (e - at.y) * slope;
        let second = 1.0 + slope * slope + (e - at.y) * curve;
        p -= first / second.max(0.5);
    }
    num::hypot(p - at.x, energy(p) - at.y) * scale
}

#[test]
fn shells_lie_within_two_micrometres_of_the_true_curve_both_ways() {
    const BOUND: f64 = 0.002;
    let mut draws = Draws(0x5eed_0001);
    let mut seen = 0;
    for round in 0..120 {
        let mass = num::pow(10.0, draws.between(-6.0, 2.0));
        let middle = draws.between(-20.0, 20.0);
        let vertex = if round % 3 == 0 { 0.0 } else { middle };
        let centre = Point::new(mass * num::sinh(vertex), mass * num::cosh(vertex));
        let half = mass * num::pow(10.0, draws.between(-1.0, 2.0)) * num::exp(0.3 * vertex.abs());
        let shift = Vec2::new(draws.between(-0.8, 0.8), draws.between(-0.8, 0.8)) * half;
        let c = centre + shift;
        let (curves, plane, field) = shell(
            mass,
            0.5,
            (c.x - half, c.x + half),
            (c.y - 0.8 * half, c.y + 0.8 * half),
        );
        let scale = plane.as_coeffs()[0];
        let back = plane.inverse();
        let pieces: usize = curves.iter().map(|c| c.segments().count()).sum();
        assert!(pieces <= 8, "{pieces} pieces");
        let mut drawn = Vec::new();
        for segment in curves.iter().flat_map(BezPath::segments) {
            let PathSeg::Cubic(cubic) = segment else {
                panic!("a shell is made of cubics")
            };
            for i in 0..=400 {
                let p = kurbo::ParamCurve::eval(&cubic, f64::from(i) / 400.0);
                drawn.push(p);
                assert!(off_shell(mass, back * p, scale) <= BOUND, "round {round}");
            }
        }
        // The other way: every point of the true curve inside the field is near some drawn chord.
        for i in 0..=300 {
            let p = (c.x - half).mul_add(
                1.0 - f64::from(i) / 300.0,
                (c.x + half) * f64::from(i) / 300.0,
            );
            let at = plane * Point::new(p, num::hypot(mass, p));
            if !field.contains(at) {
                continue;
            }
            seen += 1;
            let near = drawn
                .windows(2)
                .map(|w| to_chord(at, w[0], w[1]))
                .fold(f64::INFINITY, f64::min);
            assert!(near <= BOUND, "round {round}: {near} mm");
        }
    }
    assert!(seen > 3000, "the windows must show the shells: {seen}");
}

fn to_chord(p: Point, a: Point, b: Point) -> f64 {
    let d = b - a;
    let s = if d.hypot2() > 0.0 {
        ((p - a).dot(d) / d.hypot2()).clamp(0.0, 1.0)
    } else {
        0.0
    };
    (p - (a + d * s)).hypot()
}

#[test]
fn light_is_at_45_degrees_in_every_panel() {
    const OCHRE: Ink = Ink(0xA6, 0x83, 0x1A);
    for plate in ["pair", "fan", "cut"] {
        let laid = laid(VOYAGE, plate);
        let mut count = 0;
        for mark in &laid.sheet.marks {
            if let Shape::Path {
                path,
                paint: Paint::Stroke(stroke),
            } = &mark.shape
                && stroke.ink == OCHRE
            {
                let ends = corners(path);
                let d = ends[1] - ends[0];
                assert!((d.x.abs() - d.y.abs()).abs() < 1e-9, "{d:?}");
                count += 1;
            }
        }
        assert!(count >= 2);
        for panel in &laid.panels {
            let [a, b, c, d, ..] = panel.from_plane.as_coeffs();
            assert!(a == -d && b == 0.0 && c == 0.0);
        }
    }
}

#[test]
fn all_but_axes_is_cut_at_the_field() {
    for plate in ["pair", "fan", "cut"] {
        let laid = laid(VOYAGE, plate);
        for mark in &laid.sheet.marks {
            let group = &laid.sheet.groups[mark.group];
            let Shape::Path { path, .. } = &mark.shape else {
                continue;
            };
            if group.title == "axes" || group.title == "frame skiff" {
                continue;
            }
            let panel = laid
                .panels
                .iter()
                .find(|p| group.id.starts_with(p.letter))
                .unwrap();
            // A disc at the edge may pass it by its radius; nothing else does.
            let past = if group.title.starts_with("event ") {
                0.8
            } else {
                1e-9
            };
            let field = panel.field.inflate(past, past);
            for p in corners(path) {
                assert!(
                    p.x >= field.x0 && p.x <= field.x1 && p.y >= field.y0 && p.y <= field.y1,
                    "{} {p:?}",
                    group.id
                );
            }
        }
    }
}

#[test]
fn arrows_end_on_their_points_and_chains_close() {
    let laid = laid(VOYAGE, "pair");
    let panel = &laid.panels[1];
    let opened = task::open_text(VOYAGE).unwrap();
    let tips: Vec<Vec<Point>> = ["in", "rest", "k", "l"]
        .map(|name| {
            let title = format!("particle {name}");
            paths(&laid.sheet, &title)
                .flat_map(|(path, _)| corners(path))
                .collect()
        })
        .to_vec();
    let of = |name: &str| {
        let p = &opened.solved.particles[name].momentum;
        Vec2::new(p.px(), p.energy())
    };
    let total = (of("in") + of("rest")).to_point();
    let ends = |points: &Vec<Point>, at: Point| {
        let at = panel.from_plane * at;
        points.iter().any(|p| (*p - at).hypot() < 1e-9)
    };
    // The proton at rest has the smaller slope, so the chain begins with it; of the products the one that rises less
    // steeply to the right begins.
    assert!(ends(&tips[1], Point::ORIGIN) && ends(&tips[1], of("rest").to_point()));
    assert!(ends(&tips[0], of("rest").to_point()) && ends(&tips[0], total));
    let (first, last) = if of("k").x / of("k").y > of("l").x / of("l").y {
        (2, 3)
    } else {
        (3, 2)
    };
    let middle = of(if first == 2 { "k" } else { "l" }).to_point();
    assert!(ends(&tips[first], Point::ORIGIN) && ends(&tips[first], middle));
    assert!(ends(&tips[last], middle) && ends(&tips[last], total));
    let meet = |points: &[Point]| {
        let at = panel.from_plane * total;
        points
            .iter()
            .copied()
            .min_by(|a, b| (*a - at).hypot().total_cmp(&(*b - at).hypot()))
            .unwrap()
    };
    assert_eq!(
        meet(&tips[0]),
        meet(&tips[last]),
        "both chains close on one tip, to the last bit"
    );
}

#[test]
fn before_is_filled_and_after_is_hollow() {
    let laid = laid(VOYAGE, "pair");
    let fills = |name: &str| {
        paths(&laid.sheet, name)
            .map(|(_, paint)| paint.clone())
            .collect::<Vec<_>>()
    };
    assert_eq!(fills("particle in"), [Paint::Fill(Ink(0xA3, 0x14, 0x2A))]);
    assert_eq!(
        fills("particle k"),
        [
            Paint::Fill(Ink(0x1B, 0x7D, 0x7E)),
            Paint::Fill(Ink(255, 255, 255))
        ]
    );
}

#[test]
fn a_tick_of_a_moving_axis_lies_on_the_invariant_hyperbola() {
    // t^2 - x^2 is the same in every frame: the tick of 5 m on the tilted time axis is where the arc from 5 m on the
    // base axis meets it, and the tick lies along that arc.
    let laid = laid(VOYAGE, "pair");
    let panel = &laid.panels[0];
    let back = panel.from_plane.inverse();
    let light_way = 0.299_792_458; // m/ns, exact by the definition of the metre.
    let beta = -0.2;
    let mut found = 0;
    for (path, paint) in paths(&laid.sheet, "frame skiff") {
        let ends = corners(path);
        let Paint::Stroke(_) = paint else { continue };
        if ends.len() != 2 || (ends[1] - ends[0]).hypot() > 3.0 {
            continue;
        }
        let middle = back * ends[0].midpoint(ends[1]);
        let squared = middle.y * middle.y - middle.x * middle.x;
        let units = squared.abs().sqrt() * light_way / 5.0;
        assert!(
            (units - units.round()).abs() < 1e-9 && units > 0.5,
            "{units}"
        );
        let (along, across) = if squared > 0.0 {
            (middle.y, middle.x)
        } else {
            (middle.x, middle.y)
        };
        assert!((across / along - beta).abs() < 1e-9);
        found += 1;
    }
    assert!(found >= 3, "{found} ticks");
}

#[test]
fn equal_input_gives_equal_marks() {
    for plate in ["pair", "fan", "cut"] {
        assert_eq!(laid(VOYAGE, plate).sheet, laid(VOYAGE, plate).sheet);
    }
}

#[test]
fn groups_have_one_id_each_that_xml_allows() {
    let laid = laid(VOYAGE, "pair");
    let mut ids: Vec<&str> = laid.sheet.groups.iter().map(|g| &*g.id).collect();
    // XML 1.0, production 4 (Name), its ASCII part.
    for id in &ids {
        assert!(id.chars().next().unwrap().is_ascii_alphabetic());
        assert!(
            id.chars()
                .all(|c| c.is_ascii_alphanumeric() || "-_.".contains(c)),
            "{id}"
        );
    }
    ids.sort_unstable();
    ids.dedup();
    assert_eq!(ids.len(), laid.sheet.groups.len());
    assert!(
        laid.sheet
            .groups
            .iter()
            .any(|g| g.id == "a-event-cast-off" && g.title == "event cast off")
    );
}

#[test]
fn measures_are_those_of_two_columns() {
    let laid = laid(VOYAGE, "pair");
    assert!((laid.sheet.width - 178.0).abs() < 1e-12, "86 + 6 + 86");
    let [a, b] = [&laid.panels[0], &laid.panels[1]];
    assert_eq!((a.letter, b.letter), ('a', 'b'));
    assert_eq!((a.field.y0, a.field.y1), (b.field.y0, b.field.y1));
    assert!((a.field.width() - 78.3).abs() < 1e-9);
    let origin = |p: &conewright::plate::PanelPlace| (p.from_plane * Point::ORIGIN).y;
    assert!(
        (origin(a) - origin(b)).abs() < 0.7,
        "origins stand at about one height"
    );
    assert!(laid.sheet.words.contains("Panel a") && laid.sheet.words.contains("skiff"));
}

#[test]
fn axes_say_quantity_over_unit() {
    let seen = laid(VOYAGE, "pair");
    let found = labels(&seen.sheet);
    for title in ["ct/m", "x/m", "E/GeV", "pc/GeV"] {
        let has = found
            .iter()
            .any(|(_, l)| l.replace([' ', '\u{2009}'], "") == title);
        assert!(has, "{title} in {found:?}");
    }
    let time = VOYAGE.replace(r#"length: "m", "#, "");
    let seen = laid(&time, "cut");
    let found = labels(&seen.sheet);
    for title in ["t/ns", "x/(cns)"] {
        let has = found
            .iter()
            .any(|(_, l)| l.replace([' ', '\u{2009}'], "") == title);
        assert!(has, "{title} in {found:?}");
    }
}

#[test]
fn one_panel_alone_keeps_its_width_and_letter() {
    let change = Override {
        viewing: vec![],
        only: Some(1),
    };
    let laid = laid_with(VOYAGE, "pair", &change);
    assert!((laid.sheet.width - 86.0).abs() < 1e-12);
    assert_eq!(laid.panels[0].letter, 'b');
    assert!(!labels(&laid.sheet).iter().any(|(_, l)| l.contains("(b)")));
}

#[test]
fn the_frame_can_be_overridden() {
    let change = Override {
        viewing: vec![Some(When::Rapidity(Typed::Bare("0.5".into())))],
        only: None,
    };
    let laid = laid_with(VOYAGE, "cut", &change);
    assert!((laid.panels[0].viewing.boost.rapidity().value() - 0.5).abs() < 1e-15);
    assert!(laid.panels[0].viewing.name.is_none());
}

#[test]
fn what_is_wrong_with_a_plate_is_said() {
    let scene = |plate: &str| {
        format!(
            r#"Scene(format: 1, base: "b", units: (time: "s"),
            events: {{ "turn": At(t: 0, x: 0, label: "\\frac{{1"), "late": At(t: 9, x: 0) }},
            lines: {{ "clock": Free(through: "turn", velocity: Beta(0)) }},
            frames: {{ "aslant": Moving(velocity: Beta(0.5), angle: "30 deg") }},
            plates: {{ "p": {plate} }})"#
        )
    };
    for (plate, what) in [
        (
            r#"(panels: [(view: Spacetime, events: ["turm"])])"#,
            "did you mean \"turn\"?",
        ),
        (
            r#"(panels: [(view: Spacetime, axes: ["clok"])])"#,
            "did you mean \"clock\"?",
        ),
        (
            r#"(panels: [(view: EnergyMomentum, collision: "hit")])"#,
            "there is no collision named \"hit\"",
        ),
        (
            r"(panels: [(view: Spacetime, range: (t: (5, 2)))])",
            "does not rise",
        ),
        (
            r"(panels: [(view: Spacetime, range: (t: (2, 2)))])",
            "does not rise",
        ),
        (
            r"(panels: [(view: Spacetime, range: (x: (-1, 1), t: (-1, 1)))])",
            "event late: it lies outside",
        ),
        (
            r#"(width: "600 cm", panels: [(view: Spacetime)])"#,
            "over 5 m",
        ),
        (
            r#"(width: "2 mm", panels: [(view: Spacetime)])"#,
            "too little",
        ),
        (
            r#"(text: "400 pt", panels: [(view: Spacetime)])"#,
            "no size that can be printed",
        ),
        (
            r#"(panels: [(view: Spacetime, frame: "aslant")])"#,
            "a spacetime panel takes a boost along x",
        ),
        (
            r#"(panels: [(view: Spacetime, axes: ["aslant"])])"#,
            "also moves across x",
        ),
        (r"(panels: [(view: Spacetime)])", "event turn:"),
    ] {
        let laid = laid(&scene(plate), "p");
        assert!(says(&laid.faults, what), "{plate}: {:?}", laid.faults);
        assert!(!laid.panels.is_empty());
    }
}

#[test]
fn extreme_frames_are_drawn_sanely() {
    for rapidity in ["5", "-5", "18", "-18", "40", "300"] {
        let change = Override {
            viewing: vec![Some(When::Rapidity(Typed::Bare(rapidity.into()))); 2],
            only: None,
        };
        let laid = laid_with(VOYAGE, "pair", &change);
        for mark in &laid.sheet.marks {
            let b = mark.shape.ink_box();
            assert!(b.x0.is_finite() && b.y1.is_finite());
            assert!(
                b.x0 >= -1.0
                    && b.x1 <= laid.sheet.width + 1.0
                    && b.y0 >= -1.0
                    && b.y1 <= laid.sheet.height + 1.0
            );
        }
        assert!(laid.sheet.marks.len() > 20);
    }
}

#[test]
fn a_scene_without_plates_shows_everything() {
    let start = VOYAGE.find("plates:").unwrap();
    let text = format!("{})", &VOYAGE[..start]);
    let opened = task::open_text(&text).unwrap();
    let laid = task::lay_out(&opened, None, &Override::default()).unwrap();
    assert_eq!(laid.panels.len(), 2);
    for title in ["event rounding", "line skiff", "line beam", "particle k"] {
        assert!(paths(&laid.sheet, title).count() > 0, "{title}");
    }
}

#[test]
fn what_hangs_on_an_unread_object_is_no_second_fault() {
    let text = r#"Scene(format: 1, base: "b",
        events: { "bad": Nowhere(t: 0), "good": At(t: 1, x: 0) },
        plates: { "p": (panels: [(view: Spacetime, events: ["bad", "good"], cones: ["bad"])]) })"#;
    let laid = laid(text, "p");
    assert_eq!(laid.faults, []);
    assert!(paths(&laid.sheet, "event good").count() > 0);
}
