//! Hyperbolas as a reader of the file has them: the SVG's path data, parsed, against the true curve.
//!
//! A mass shell is E^2 - p^2 = m^2 and a calibration arc is |t^2 - x^2| = s^2, in every frame. Both are compared in mm
//! on paper, both ways: what is written lies on the true curve, and what of the true curve lies in the field is written.

use std::collections::BTreeMap;
use std::fmt::Write as _;

use conewright::export::{Format, Options, write};
use conewright::plate::{Override, PanelPlace};
use conewright::task;
use kurbo::{BezPath, CubicBez, ParamCurve, ParamCurveNearest, PathSeg, Point, Rect, Shape as _};
use resvg::usvg::roxmltree;

/// The promised 0.002 mm, and the rounding of both coordinates to four decimals.
const BOUND: f64 = 0.002 + 0.5e-4 * std::f64::consts::SQRT_2;
/// Most cubic pieces of one curve in one field.
const MOST_PIECES: usize = 8;
/// Points compared on each true curve by each coordinate; on each written piece, half as many.
const POINTS: usize = 20;

/// A random generator (Marsaglia 2003, xorshift).
struct Draws(u64);

impl Draws {
    fn part(&mut self) -> f64 {
        self.0 ^= self.0 << 13;
        self.0 ^= self.0 >> 7;
        self.0 ^= self.0 << 17;
        (self.0 >> 11) as f64 / (1_u64 << 53) as f64
    }
    fn between(&mut self, low: f64, high: f64) -> f64 {
        low + (high - low) * self.part()
    }
    fn power_of_ten(&mut self, low: f64, high: f64) -> f64 {
        10_f64.powf(self.between(low, high))
    }
}

/// One branch of along^2 - across^2 = size^2, along > 0, where (x, y) of the plane are (across, along), or turned.
#[derive(Clone, Copy, Debug)]
struct Branch {
    size: f64,
    /// Quarter turns from the branch that opens upward.
    turns: u8,
}

impl Branch {
    /// (across, along) of a point of the plane.
    fn own(self, p: Point) -> Point {
        match self.turns {
            0 => p,
            1 => Point::new(p.y, p.x),
            2 => Point::new(p.x, -p.y),
            _ => Point::new(p.y, -p.x),
        }
    }
    /// The point of the plane at (across, along): each turn undoes itself but the third.
    fn plane(self, p: Point) -> Point {
        match self.turns {
            0 => p,
            1 => Point::new(p.y, p.x),
            2 => Point::new(p.x, -p.y),
            _ => Point::new(-p.y, p.x),
        }
    }
    /// Its distance from a point of the plane. The foot (a, h) has (a - x) + (h - y) a/h = 0; for x above 0 the left
    /// side is convex in a where y is above 0 and rises where it is not, so it has one root, found by bisection.
    fn distance(self, p: Point) -> f64 {
        let (x, y) = (self.own(p).x.abs(), self.own(p).y);
        let along = |across: f64| self.size.hypot(across);
        let (mut low, mut high) = (0.0, f64::midpoint(x, y.max(0.0)));
        for _ in 0..50 {
            let across = f64::midpoint(low, high);
            let here = along(across);
            if (across - x) + (here - y) * (across / here) < 0.0 {
                low = across;
            } else {
                high = across;
            }
        }
        (low - x).hypot(along(low) - y)
    }
    /// Points of it inside a rectangle of the plane, evenly across and evenly along.
    fn inside(self, plane: Rect) -> Vec<Point> {
        let (a, b) = (self.own(plane.origin()), self.own(Point::new(plane.x1, plane.y1)));
        let mut found = Vec::new();
        for i in 0..=POINTS {
            let part = i as f64 / POINTS as f64;
            let across = a.x + (b.x - a.x) * part;
            found.push(Point::new(across, self.size.hypot(across)));
            let along = a.y + (b.y - a.y) * part;
            if along >= self.size {
                let across = ((along - self.size) * (along + self.size)).sqrt();
                found.extend([Point::new(across, along), Point::new(-across, along)]);
            }
        }
        found.into_iter().map(|p| self.plane(p)).filter(|p| plane.contains(*p)).collect()
    }
}

/// A panel's stroked paths as written, by the title of their group, mm.
fn written(text: &str) -> (BTreeMap<String, Vec<BezPath>>, PanelPlace) {
    let opened = task::open_text(text).unwrap();
    let laid = task::lay_out(&opened, None, &Override::default()).unwrap();
    let bytes = write(&laid.sheet, Format::Svg, &Options::default()).unwrap();
    let source = String::from_utf8(bytes).unwrap();
    let document = roxmltree::Document::parse(&source).unwrap();
    let mut paths: BTreeMap<String, Vec<BezPath>> = BTreeMap::new();
    for group in document.descendants().filter(|node| node.has_tag_name("g")) {
        let title = group.first_element_child().and_then(|title| title.text()).unwrap();
        let strokes = group.children().filter(|node| node.has_attribute("stroke"));
        let read = strokes.map(|node| BezPath::from_svg(node.attribute("d").unwrap()).unwrap());
        paths.entry(title.to_owned()).or_default().extend(read);
    }
    (paths, laid.panels.into_iter().next().unwrap())
}

fn cubics(paths: &[BezPath]) -> Vec<CubicBez> {
    let cubic = |segment| match segment {
        PathSeg::Cubic(cubic) => cubic,
        other => panic!("a hyperbola is written as cubics, not as {other:?}"),
    };
    paths.iter().flat_map(BezPath::segments).map(cubic).collect()
}

/// The farthest that points of the pieces are from the true curve, mm.
fn farthest_off(pieces: &[CubicBez], branch: Branch, panel: &PanelPlace) -> f64 {
    let (scale, back) = (panel.from_plane.as_coeffs()[0], panel.from_plane.inverse());
    let points = pieces.iter().flat_map(|piece| (0..=10).map(|i| piece.eval(f64::from(i) / 10.0)));
    points.map(|p| branch.distance(back * p) * scale).fold(0.0, f64::max)
}

/// The farthest that some points of the plane are from what is written, mm.
fn farthest_missing(truth: &[Point], pieces: &[CubicBez], panel: &PanelPlace) -> f64 {
    let boxes: Vec<Rect> =
        pieces.iter().map(|piece| piece.bounding_box().inflate(2.0 * BOUND, 2.0 * BOUND)).collect();
    let nearest = |p: Point| {
        let near = pieces.iter().zip(&boxes).filter(|(_, reach)| reach.contains(p));
        near.map(|(piece, _)| piece.nearest(p, 1e-6).distance_sq.sqrt()).fold(f64::INFINITY, f64::min)
    };
    truth.iter().map(|p| nearest(panel.from_plane * *p)).fold(0.0, f64::max)
}

/// What of the plane the panel's field shows.
fn plane_of(panel: &PanelPlace) -> Rect {
    panel.from_plane.inverse().transform_rect_bbox(panel.field)
}

/// A window of the plane at a rapidity on a shell of some mass: near its vertex or up to rapidity 20, tight or wide.
fn window(draws: &mut Draws, round: usize) -> (Rect, f64) {
    let mass = draws.power_of_ten(-6.0, 3.0);
    let rapidity = if round.is_multiple_of(3) { 0.0 } else { draws.between(-20.0, 20.0) };
    let (p, energy) = (mass * rapidity.sinh(), mass * rapidity.cosh());
    let half = mass * draws.power_of_ten(-1.0, 2.0) * (0.3 * rapidity.abs()).exp();
    let upright = half * draws.between(0.4, 1.5);
    let (p, energy) = (p + half * draws.between(-0.8, 0.8), energy + upright * draws.between(-0.8, 0.8));
    (Rect::new(p - half, energy - upright, p + half, energy + upright), mass)
}

/// A mass whose shell goes through the window, or a small one whose shell is nearly light.
fn mass_in(draws: &mut Draws, window: Rect) -> f64 {
    loop {
        let p = draws.between(window.x0, window.x1);
        let energy = draws.between(window.y0, window.y1);
        let mass = ((energy - p) * (energy + p)).sqrt();
        if energy > 0.0 && mass > 0.0 {
            return if draws.part() < 0.2 { mass * draws.power_of_ten(-6.0, 0.0) } else { mass };
        }
    }
}

/// Particles with some masses in one panel of a given range, seen from a frame of some rapidity.
fn shells_scene(masses: &[f64], window: Rect, draws: &mut Draws) -> String {
    let mut particles = String::new();
    for (i, mass) in masses.iter().enumerate() {
        let rapidity = draws.between(-20.0, 20.0);
        let _ = write!(particles, "\"q{i}\": (mass: \"{mass:e}\", state: Rapidity({rapidity:?})), ");
    }
    format!(
        r#"Scene(format: 1, base: "b", units: (energy: "GeV"), particles: {{ {particles} }},
        frames: {{ "f": Moving(velocity: Rapidity({:?})) }},
        plates: {{ "p": (width: "{:.1} mm", panels: [(view: EnergyMomentum, frame: "f",
            range: (px: ("{:e}", "{:e}"), energy: ("{:e}", "{:e}")))]) }})"#,
        draws.between(-20.0, 20.0),
        draws.between(40.0, 180.0),
        window.x0, window.x1, window.y0, window.y1,
    )
}

/// Compares the shells of one scene; gives back how many of them the field shows.
fn compare_shells(draws: &mut Draws, round: usize) -> usize {
    const MASSES: usize = 30;
    let (window, first) = window(draws, round);
    let mut masses = vec![first];
    masses.extend((1..MASSES).map(|_| mass_in(draws, window)));
    let text = shells_scene(&masses, window, draws);
    let (paths, panel) = written(&text);
    let plane = plane_of(&panel);
    let mut shown = 0;
    for (i, &size) in masses.iter().enumerate() {
        let branch = Branch { size, turns: 0 };
        let pieces = cubics(paths.get(&format!("shell of particle q{i}")).map_or(&[][..], Vec::as_slice));
        let truth = branch.inside(plane);
        assert!(pieces.len() <= MOST_PIECES, "round {round}, q{i}: {} pieces\n{text}", pieces.len());
        let off = farthest_off(&pieces, branch, &panel);
        assert!(off <= BOUND, "round {round}, q{i}: {off} mm off of {size}, {} pieces\n{text}", pieces.len());
        let missing = farthest_missing(&truth, &pieces, &panel);
        assert!(missing <= BOUND, "round {round}, q{i}: {missing} mm from what is written\n{text}");
        shown += usize::from(!truth.is_empty());
    }
    shown
}

/// Runs rounds on two threads, each of its own seed; the sum of what they give.
fn rounds(count: usize, seed: u64, round: fn(&mut Draws, usize) -> usize) -> usize {
    std::thread::scope(|scope| {
        let half = |seed: u64| {
            move || {
                let mut draws = Draws(seed);
                (0..count / 2).map(|i| round(&mut draws, i)).sum::<usize>()
            }
        };
        let (one, two) = (scope.spawn(half(seed)), scope.spawn(half(seed ^ 0x9E37_79B9_7F4A_7C15)));
        one.join().unwrap() + two.join().unwrap()
    })
}

#[test]
fn mass_shells_as_written_are_the_true_curves() {
    let shown = rounds(320, 0x5eed_0011, compare_shells);
    assert!(shown >= 8_500, "only {shown} shells were in their fields");
}

/// A spacetime panel of whole light seconds with all its hyperbolas, and with the axes of one frame where there is one.
fn arcs_scene(draws: &mut Draws, frame: Option<f64>) -> String {
    let half = draws.power_of_ten(-4.0, 6.0);
    let (x, t) = (half * draws.between(-2.0, 2.0), half * draws.between(-2.0, 2.0));
    let (x, t) = if frame.is_some() { (x / 4.0, t / 4.0) } else { (x, t) };
    let upright = half * draws.between(0.4, 1.5);
    let axes = if frame.is_some() { "axes: [\"f\"]," } else { "" };
    format!(
        r#"Scene(format: 1, base: "b", units: (time: "s"),
        frames: {{ "f": Moving(velocity: Rapidity({:?})), "g": Moving(velocity: Rapidity({:?})) }},
        plates: {{ "p": (width: "{:.1} mm", panels: [(view: Spacetime, {axes} hyperbolas: true, frame: "{}",
            range: (x: ("{:e}", "{:e}"), t: ("{:e}", "{:e}")))]) }})"#,
        frame.unwrap_or(1.0),
        draws.between(-20.0, 20.0),
        draws.between(40.0, 180.0),
        if frame.is_some() { "b" } else { "g" },
        x - half, x + half, t - upright, t + upright,
    )
}

/// The unit that the arcs count: the distance of the base axes' ticks, a short stroke across each, as written.
fn unit(axes: &[BezPath], panel: &PanelPlace) -> f64 {
    let back = panel.from_plane.inverse();
    let mut places: Vec<f64> = axes
        .iter()
        .map(|path| path.bounding_box())
        .filter(|tick| tick.width() < 1e-6 && tick.height() < 3.0)
        .map(|tick| (back * tick.center()).x)
        .collect();
    places.sort_by(f64::total_cmp);
    let gaps = places.windows(2).map(|pair| pair[1] - pair[0]);
    let gap = gaps.fold(f64::INFINITY, f64::min);
    // Ticks stand at 1, 2 or 5 times a power of ten.
    let power = 10_f64.powf(gap.log10().floor());
    [1.0, 2.0, 5.0, 10.0].map(|m| m * power).into_iter().min_by(|a, b| (a - gap).abs().total_cmp(&(b - gap).abs())).unwrap()
}

/// The hyperbola of whole units that a written path is nearest to.
fn branch_of(path: &BezPath, unit: f64, panel: &PanelPlace) -> Branch {
    let first = path.segments().next().unwrap();
    let p = panel.from_plane.inverse() * first.end();
    let square = (p.y - p.x) * (p.y + p.x);
    let turns = match (square > 0.0, p.y > 0.0, p.x > 0.0) {
        (true, true, _) => 0,
        (false, _, true) => 1,
        (true, false, _) => 2,
        (false, _, false) => 3,
    };
    Branch { size: (square.abs().sqrt() / unit).round() * unit, turns }
}

/// Compares the arcs of one scene; gives back how many there are.
fn compare_arcs(draws: &mut Draws, round: usize) -> usize {
    let frame = (!round.is_multiple_of(3)).then(|| draws.between(-3.0, 3.0));
    let text = arcs_scene(draws, frame);
    let (paths, panel) = written(&text);
    let none = Vec::new();
    let arcs = paths.get("calibration hyperbolas").unwrap_or(&none);
    let unit = unit(&paths["axes"], &panel);
    let plane = plane_of(&panel);
    let mut drawn: BTreeMap<(u8, u64), Vec<CubicBez>> = BTreeMap::new();
    for path in arcs {
        let branch = branch_of(path, unit, &panel);
        let pieces = cubics(std::slice::from_ref(path));
        let off = farthest_off(&pieces, branch, &panel);
        assert!(branch.size > 0.0 && off <= BOUND, "round {round}: {off} mm off {branch:?}\n{text}");
        drawn.entry((branch.turns, (branch.size / unit).round() as u64)).or_default().extend(pieces);
    }
    for (arc, pieces) in &drawn {
        assert!(pieces.len() <= MOST_PIECES, "round {round}: {} pieces of {arc:?}\n{text}", pieces.len());
    }
    let far = [plane.x0, plane.x1, plane.y0, plane.y1].into_iter().fold(0.0, |m: f64, v| m.max(v.abs()));
    let turns: &[u8] = if frame.is_some() { &[0, 1] } else { &[0, 1, 2, 3] };
    for count in 1..=(far / unit).floor().min(60.0) as u64 {
        for &turns in turns {
            let branch = Branch { size: count as f64 * unit, turns };
            let mut truth = branch.inside(plane);
            if let Some(rapidity) = frame {
                carried(&mut truth, branch, rapidity, plane);
            }
            let pieces = drawn.get(&(turns, count)).map_or(&[][..], Vec::as_slice);
            let missing = farthest_missing(&truth, pieces, &panel);
            assert!(missing <= BOUND, "round {round}: {missing} mm from what is written of {branch:?}\n{text}");
        }
    }
    drawn.len()
}

/// Of a frame's arc only what joins the two ticks of one size must be there: from rapidity 0 to the frame's, where the
/// frame's own tick is in the field.
fn carried(truth: &mut Vec<Point>, branch: Branch, rapidity: f64, plane: Rect) {
    let at = |r: f64| branch.plane(Point::new(branch.size * r.sinh(), branch.size * r.cosh()));
    if !plane.contains(at(rapidity)) {
        truth.clear();
    }
    let (low, high) = (rapidity.min(0.0), rapidity.max(0.0));
    truth.retain(|p| {
        let own = branch.own(*p);
        let r = (own.x / branch.size).asinh();
        low <= r && r <= high
    });
}

#[test]
fn calibration_arcs_as_written_are_the_true_curves() {
    let drawn = rounds(400, 0x5eed_0012, compare_arcs);
    assert!(drawn >= 1_500, "only {drawn} arcs were drawn");
}
