//! Tests of `export`: what the writers make, read by other programs.

use std::path::Path as FilePath;
use std::sync::Arc;

use conewright::export::{self, Format, Lettering, Options, write};
use conewright::label::{Label, commands, plain, typeset};
use conewright::marks::{Cap, Group, Ink, Join, Mark, Paint, Shape, Sheet, Stroke};
use kurbo::{BezPath, Circle, PathEl, Point, Rect, Shape as _};
use resvg::usvg;

use crate::tools::printed;

mod paper;
mod png;
mod svg;

const BLACK: Ink = Ink(0, 0, 0);
const BLUE: Ink = Ink(0x23, 0x30, 0x7C);
/// 9 points of 1/72 inch.
const EM: f64 = 3.175;

fn label(label: Label, x: f64, y: f64) -> Shape {
    Shape::Label {
        label: Arc::new(label),
        at: Point::new(x, y),
        em: EM,
        ink: BLACK,
    }
}

fn line(from: (f64, f64), to: (f64, f64), stroke: Stroke) -> Shape {
    let mut path = BezPath::new();
    path.move_to(from);
    path.line_to(to);
    Shape::Path {
        path,
        paint: Paint::Stroke(stroke),
    }
}

fn solid(width: f64) -> Stroke {
    Stroke {
        ink: BLUE,
        width,
        dash: Vec::new(),
        cap: Cap::Butt,
        join: Join::Mitre,
    }
}

fn sheet_of(shapes: Vec<(usize, Shape)>) -> Sheet {
    let group = |id: &str, title: &str| Group {
        id: id.into(),
        title: title.into(),
    };
    Sheet {
        width: 86.0,
        height: 60.0,
        title: "Kinds of marks".into(),
        words: "One mark of every kind.".into(),
        groups: vec![group("a-axes", "axes"), group("a-event-turn", "event turn")],
        marks: shapes
            .into_iter()
            .map(|(group, shape)| Mark { group, shape })
            .collect(),
    }
}

/// Every kind of mark: fills with and without a hole, strokes of every cap, join and dash, curves, labels.
fn every_kind() -> Sheet {
    let mut curve = BezPath::new();
    curve.move_to((5.0, 50.0));
    curve.quad_to((20.0, 30.0), (35.123_45, 50.0));
    curve.curve_to((45.0, 60.0), (60.0, 20.0), (80.0, 50.0));
    let mut corner = BezPath::new();
    corner.move_to((50.0, 10.0));
    corner.line_to((60.0, 12.0));
    corner.line_to((50.5, 18.0));
    let mut ring = Circle::new((70.0, 12.0), 4.0).to_path(1e-4);
    ring.extend(
        Circle::new((70.0, 12.0), 2.5)
            .to_path(1e-4)
            .reverse_subpaths(),
    );
    let dashed = Stroke {
        dash: vec![2.0, 1.0],
        ..solid(0.265)
    };
    let dotted = Stroke {
        dash: vec![0.0, 1.0],
        cap: Cap::Round,
        join: Join::Round,
        ..solid(0.5)
    };
    sheet_of(vec![
        (
            0,
            Shape::Path {
                path: Rect::new(2.0, 2.0, 20.0, 25.0).to_path(0.1),
                paint: Paint::Fill(Ink(0xFA, 0xF5, 0xE6)),
            },
        ),
        (0, line((3.0, 55.0), (83.0, 55.0), solid(0.265))),
        (
            0,
            Shape::Path {
                path: curve,
                paint: Paint::Stroke(Stroke {
                    join: Join::Round,
                    ..solid(0.529)
                }),
            },
        ),
        (
            1,
            Shape::Path {
                path: ring,
                paint: Paint::Fill(BLACK),
            },
        ),
        (1, line((25.0, 5.0), (45.0, 25.0), dashed)),
        (0, line((25.0, 25.0), (45.0, 25.0), dotted)),
        (
            1,
            Shape::Path {
                path: corner,
                paint: Paint::Stroke(solid(0.6)),
            },
        ),
        (1, label(typeset(r"p_a'").unwrap(), 4.0, 10.0)),
        (1, label(typeset(r"\bar\Lambda").unwrap(), 12.0, 10.0)),
        (0, label(typeset(r"ct\,/\,\mathrm{m}").unwrap(), 4.0, 18.0)),
        (
            0,
            label(typeset(r"\frac{p^-}{p^+} = \sqrt{s}").unwrap(), 4.0, 35.0),
        ),
        (0, label(plain("event turn"), 60.0, 35.0)),
    ])
}

fn all_formats(sheet: &Sheet) -> Vec<u8> {
    let options = Options {
        dpi: 150.0,
        ..Options::default()
    };
    [Format::Svg, Format::Pdf, Format::Png, Format::Tikz]
        .into_iter()
        .flat_map(|format| write(sheet, format, &options).unwrap())
        .collect()
}

fn text(bytes: Vec<u8>) -> String {
    String::from_utf8(bytes).unwrap()
}

#[test]
fn endings_name_formats() {
    for (name, format) in [
        ("a.svg", Format::Svg),
        ("a.PDF", Format::Pdf),
        ("x/b.png", Format::Png),
        ("c.tex", Format::Tikz),
    ] {
        assert_eq!(Format::of(FilePath::new(name)), Ok(format));
    }
    assert!(
        Format::of(FilePath::new("a.eps"))
            .unwrap_err()
            .what
            .contains(".eps")
    );
    assert!(Format::of(FilePath::new("svg")).is_err());
}

#[test]
fn the_same_sheet_gives_the_same_bytes_in_two_processes() {
    let bytes = all_formats(&every_kind());
    if let Some(path) = std::env::var_os("SHEET_BYTES_TO") {
        return std::fs::write(path, bytes).unwrap();
    }
    assert!(bytes == all_formats(&every_kind()), "two writings differ");
    let file = tempfile::NamedTempFile::new().unwrap();
    let this = "export::the_same_sheet_gives_the_same_bytes_in_two_processes";
    printed(
        std::process::Command::new(std::env::current_exe().unwrap())
            .args(["--exact", this])
            .env("SHEET_BYTES_TO", file.path()),
    );
    assert!(
        bytes == std::fs::read(file.path()).unwrap(),
        "two processes differ"
    );
}

#[test]
fn what_no_file_can_hold_is_a_fault() {
    let broken = |change: &dyn Fn(&mut Sheet)| {
        let mut sheet = every_kind();
        change(&mut sheet);
        for format in [Format::Svg, Format::Pdf, Format::Png, Format::Tikz] {
            let fault = write(&sheet, format, &Options::default()).unwrap_err();
            assert!(!fault.what.is_empty() && !fault.mend.is_empty());
        }
    };
    broken(&|sheet| sheet.width = 0.0);
    broken(&|sheet| sheet.height = f64::NAN);
    broken(&|sheet| sheet.width = 1e9);
    broken(&|sheet| {
        sheet.marks.push(Mark {
            group: 9,
            shape: line((0.0, 0.0), (1.0, 1.0), solid(1.0)),
        });
    });
    broken(&|sheet| {
        sheet.marks.push(Mark {
            group: 0,
            shape: line((f64::NAN, 0.0), (1.0, 1.0), solid(1.0)),
        });
    });
    broken(&|sheet| {
        sheet.marks.push(Mark {
            group: 0,
            shape: line((0.0, 0.0), (1.0, 1.0), solid(0.0)),
        });
    });
}

#[test]
fn an_empty_sheet_and_empty_marks_are_written() {
    let empty = |shape: Shape| all_formats(&sheet_of(vec![(0, shape)]));
    assert!(!all_formats(&sheet_of(Vec::new())).is_empty());
    empty(Shape::Path {
        path: BezPath::new(),
        paint: Paint::Fill(BLACK),
    });
    empty(Shape::Path {
        path: BezPath::from_vec(vec![PathEl::MoveTo(Point::ZERO)]),
        paint: Paint::Stroke(solid(1.0)),
    });
    empty(line((1.0, 1.0), (1.0, 1.0), solid(1.0)));
    empty(label(typeset("").unwrap(), 1.0, 1.0));
}

const NASTY: [&str; 6] = [
    "<&>\"'",
    "]]>",
    "%$#_{}~^\\",
    "\u{0}\u{1}\u{1B}\u{FFFE}",
    "\\input{x}\n\\end{tikzpicture}",
    "--><script>^^M\r\n\n",
];

fn nasty() -> Sheet {
    let mut sheet = sheet_of(Vec::new());
    sheet.title = NASTY.concat();
    sheet.words = NASTY.concat();
    sheet.groups = NASTY
        .iter()
        .map(|name| Group {
            id: (*name).into(),
            title: (*name).into(),
        })
        .collect();
    for (index, name) in NASTY.iter().enumerate() {
        sheet.marks.push(Mark {
            group: index,
            shape: label(plain(name), 5.0, 5.0 + 8.0 * index as f64),
        });
    }
    sheet
}
