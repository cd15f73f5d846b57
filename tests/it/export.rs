//! Tests of `export`: what the writers make, read by other programs.

use std::collections::BTreeSet;
use std::path::Path as FilePath;
use std::sync::Arc;

use conewright::export::{Format, Lettering, Options, pdf, png, svg, tikz, write};
use conewright::label::{Label, commands, plain, typeset};
use conewright::marks::{Cap, Group, Ink, Join, Mark, Paint, Shape, Sheet, Stroke};
use kurbo::{BezPath, Circle, PathEl, Point, Rect, Shape as _};
use resvg::usvg;

use crate::label::sample;
use crate::tools::{latex_log, printed, tool};

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
        })
    });
    broken(&|sheet| {
        sheet.marks.push(Mark {
            group: 0,
            shape: line((f64::NAN, 0.0), (1.0, 1.0), solid(1.0)),
        })
    });
    broken(&|sheet| {
        sheet.marks.push(Mark {
            group: 0,
            shape: line((0.0, 0.0), (1.0, 1.0), solid(0.0)),
        })
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

// SVG

/// All points of an SVG's paths in the order they are drawn, as usvg reads them.
fn points_read(group: &usvg::Group, points: &mut Vec<(f32, f32)>) {
    use usvg::tiny_skia_path::PathSegment as Segment;
    for node in group.children() {
        match node {
            usvg::Node::Group(inner) => points_read(inner, points),
            usvg::Node::Path(path) => {
                for segment in path.data().segments() {
                    match segment {
                        Segment::MoveTo(end) | Segment::LineTo(end) => points.push((end.x, end.y)),
                        Segment::QuadTo(by, end) => points.extend([(by.x, by.y), (end.x, end.y)]),
                        Segment::CubicTo(by, and, end) => {
                            points.extend([(by.x, by.y), (and.x, and.y), (end.x, end.y)])
                        }
                        Segment::Close => {}
                    }
                }
            }
            _ => panic!("neither a group nor a path"),
        }
    }
}

fn points_of(path: &BezPath) -> Vec<(f64, f64)> {
    let mut points = Vec::new();
    for element in path.elements() {
        match *element {
            PathEl::MoveTo(end) | PathEl::LineTo(end) => points.push((end.x, end.y)),
            PathEl::QuadTo(by, end) => points.extend([(by.x, by.y), (end.x, end.y)]),
            PathEl::CurveTo(by, and, end) => {
                points.extend([(by.x, by.y), (and.x, and.y), (end.x, end.y)])
            }
            PathEl::ClosePath => {}
        }
    }
    points
}

#[test]
fn svg_is_read_back_at_its_coordinates() {
    let sheet = every_kind();
    let source = text(svg(&sheet, Lettering::Usual).unwrap());
    let tree = usvg::Tree::from_str(
        &source,
        &usvg::Options {
            dpi: 25.4,
            ..Default::default()
        },
    )
    .unwrap();
    assert!(
        (tree.size().width() - 86.0).abs() < 1e-4 && (tree.size().height() - 60.0).abs() < 1e-4
    );
    let mut read = Vec::new();
    points_read(tree.root(), &mut read);
    let drawn: Vec<(f64, f64)> = sheet
        .marks
        .iter()
        .flat_map(|mark| points_of(&mark.shape.outline()))
        .collect();
    assert_eq!(read.len(), drawn.len());
    for (read, drawn) in read.iter().zip(&drawn) {
        // Half a unit of the fourth decimal, and the reader's f32.
        let close = |a: f32, b: f64| (f64::from(a) - b).abs() < 0.5e-4 + 1e-5;
        assert!(
            close(read.0, drawn.0) && close(read.1, drawn.1),
            "{read:?} {drawn:?}"
        );
    }
}

#[test]
fn svg_says_what_it_shows() {
    let source = text(svg(&every_kind(), Lettering::Usual).unwrap());
    let document = usvg::roxmltree::Document::parse(&source).unwrap();
    let root = document.root_element();
    assert_eq!(root.attribute("role"), Some("img"));
    assert_eq!(
        (root.attribute("width"), root.attribute("height")),
        (Some("86mm"), Some("60mm"))
    );
    assert_eq!(root.attribute("viewBox"), Some("0 0 86 60"));
    let first = root.first_element_child().unwrap();
    assert_eq!(
        (first.tag_name().name(), first.text()),
        ("title", Some("Kinds of marks"))
    );
    let labels: Vec<&str> = document
        .descendants()
        .filter_map(|node| node.attribute("aria-label"))
        .collect();
    assert_eq!(labels.first(), Some(&"p sub a prime"));
    let groups: Vec<_> = document
        .descendants()
        .filter(|node| node.has_tag_name("g"))
        .collect();
    assert!(groups.iter().all(|group| {
        group
            .first_element_child()
            .is_some_and(|first| first.has_tag_name("title"))
    }));
}

#[test]
fn svg_ids_are_unique_and_follow_the_drawing_order() {
    let source = text(svg(&every_kind(), Lettering::Usual).unwrap());
    let document = usvg::roxmltree::Document::parse(&source).unwrap();
    let ids: Vec<&str> = document
        .descendants()
        .filter_map(|node| node.attribute("id"))
        .collect();
    assert_eq!(
        ids,
        [
            "a-axes",
            "a-event-turn",
            "a-axes.2",
            "a-event-turn.2",
            "a-axes.3"
        ]
    );
}

#[test]
fn svg_with_real_text_holds_the_letters() {
    let source = text(svg(&every_kind(), Lettering::Real).unwrap());
    let document = usvg::roxmltree::Document::parse(&source).unwrap();
    let letters: String = document
        .descendants()
        .filter(|node| node.has_tag_name("text"))
        .filter_map(|node| node.text())
        .collect();
    for letter in ['p', 'a', '\u{2032}', '\u{39B}', '\u{2212}', '\u{221A}'] {
        assert!(letters.contains(letter), "{letter} in {letters}");
    }
    assert!(source.contains("KaTeX_Math") && source.contains("font-style=\"italic\""));
}

#[test]
fn decimals_are_four_at_most_and_never_negative_zero() {
    let shape = line((-0.000_01, 1.0 / 3.0), (20_000.0 / 7.0, 1e-12), solid(0.1));
    let source = text(svg(&sheet_of(vec![(0, shape)]), Lettering::Usual).unwrap());
    assert!(source.contains("d=\"M0 0.3333L2857.1429 0\""), "{source}");
}

// Escaping

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

#[test]
fn hostile_names_do_not_break_svg() {
    for lettering in [Lettering::Usual, Lettering::Real] {
        let source = text(svg(&nasty(), lettering).unwrap());
        let document = usvg::roxmltree::Document::parse(&source).unwrap();
        let ids: Vec<&str> = document
            .descendants()
            .filter_map(|node| node.attribute("id"))
            .collect();
        assert_eq!(ids.len(), NASTY.len());
        assert_eq!(ids.iter().collect::<BTreeSet<_>>().len(), ids.len());
        let titles: Vec<&str> = document
            .descendants()
            .filter(|node| node.has_tag_name("title"))
            .filter_map(|node| node.text())
            .collect();
        assert!(
            titles.contains(&"<&>\"'") && titles.contains(&"]]>") && titles.contains(&"%$#_{}~^\\"),
            "{titles:?}"
        );
        assert!(
            document
                .descendants()
                .all(|node| !node.has_tag_name("script"))
        );
    }
}

#[test]
fn hostile_names_do_not_break_pdf_or_png() {
    let bytes = pdf(&nasty(), Lettering::Usual).unwrap();
    hayro::hayro_syntax::Pdf::new(bytes.clone()).unwrap();
    check_with_qpdf(&bytes);
    let bytes = png(&nasty(), 72.0).unwrap();
    image::load_from_memory(&bytes).unwrap();
}

// PNG

#[test]
fn png_records_its_size_its_words_and_no_alpha() {
    let bytes = png(&every_kind(), 300.0).unwrap();
    let reader = ::png::Decoder::new(std::io::Cursor::new(&bytes))
        .read_info()
        .unwrap();
    let info = reader.info();
    // 86 mm and 60 mm at 300 dots an inch; 300 / 0.0254 m.
    assert_eq!((info.width, info.height), (1016, 709));
    assert_eq!(
        info.pixel_dims.map(|dims| (dims.xppu, dims.yppu)),
        Some((11_811, 11_811))
    );
    assert_eq!(info.color_type, ::png::ColorType::Rgb);
    assert!(info.srgb.is_some());
    let texts: Vec<(String, String)> = info
        .utf8_text
        .iter()
        .map(|chunk| (chunk.keyword.clone(), chunk.get_text().unwrap()))
        .collect();
    assert!(
        texts.contains(&("Title".into(), "Kinds of marks".into())),
        "{texts:?}"
    );
    assert!(texts.contains(&("Description".into(), "One mark of every kind.".into())));
}

#[test]
fn png_refuses_what_is_too_fine_or_too_large_and_says_what_would_do() {
    for dpi in [f64::NAN, f64::INFINITY, 0.0, -300.0, 19.0, 1e6] {
        assert!(
            png(&every_kind(), dpi)
                .unwrap_err()
                .mend
                .contains("20 to 2400")
        );
    }
    let mut poster = every_kind();
    poster.width = 600.0;
    let fault = png(&poster, 2_400.0).unwrap_err();
    assert!(
        fault.mend.contains("1269 dpi") || fault.mend.contains("1270 dpi"),
        "{}",
        fault.mend
    );
}

/// Rows painted in bands must be the rows painted at once: a tall narrow sheet needs several bands only when large, so
/// this one compares a picture of over 16 million dots with the same drawing on a reader's own canvas.
#[test]
fn png_in_bands_agrees_with_another_painter() {
    let mut sheet = every_kind();
    (sheet.width, sheet.height) = (260.0, 260.0);
    let shift = kurbo::Vec2::new(100.0, 145.0);
    let copies: Vec<Mark> = sheet
        .marks
        .iter()
        .map(|mark| Mark {
            group: mark.group,
            shape: mark.shape.clone().moved(shift),
        })
        .collect();
    sheet.marks.extend(copies);
    let ours = Picture::png(&png(&sheet, 400.0).unwrap());
    assert!(ours.width * ours.height > 16_000_000);
    let theirs = Picture::svg(&text(svg(&sheet, Lettering::Usual).unwrap()), 400.0);
    ours.agrees(&theirs);
}

// Pictures

/// Grey levels, row by row.
struct Picture {
    width: usize,
    height: usize,
    grey: Vec<u8>,
}

impl Picture {
    fn png(bytes: &[u8]) -> Self {
        let picture = image::load_from_memory(bytes).unwrap().to_luma8();
        Self {
            width: picture.width() as usize,
            height: picture.height() as usize,
            grey: picture.into_raw(),
        }
    }
    fn rgba(width: usize, height: usize, data: &[u8]) -> Self {
        let grey = |dot: &[u8]| {
            u8::try_from(
                (u32::from(dot[0]) * 54 + u32::from(dot[1]) * 183 + u32::from(dot[2]) * 19) / 256,
            )
            .unwrap()
        };
        Self {
            width,
            height,
            grey: data.chunks_exact(4).map(grey).collect(),
        }
    }
    fn pdf(bytes: Vec<u8>, dpi: f32) -> Self {
        let pdf = hayro::hayro_syntax::Pdf::new(bytes).unwrap();
        let page = &pdf.pages()[0];
        let settings = hayro::PixmapSettings {
            x_scale: dpi / 72.0,
            y_scale: dpi / 72.0,
            bg_color: hayro::vello_cpu::color::palette::css::WHITE,
        };
        let map = hayro::render(
            page,
            &hayro::RenderCache::new(),
            &Default::default(),
            &Default::default(),
            &settings,
        );
        Self::rgba(
            map.width() as usize,
            map.height() as usize,
            map.data_as_u8_slice(),
        )
    }
    fn svg(source: &str, dpi: f32) -> Self {
        let tree = usvg::Tree::from_str(
            source,
            &usvg::Options {
                dpi,
                ..Default::default()
            },
        )
        .unwrap();
        let size = tree.size().to_int_size();
        let mut map = resvg::tiny_skia::Pixmap::new(size.width(), size.height()).unwrap();
        map.fill(resvg::tiny_skia::Color::WHITE);
        resvg::render(
            &tree,
            resvg::tiny_skia::Transform::identity(),
            &mut map.as_mut(),
        );
        Self::rgba(size.width() as usize, size.height() as usize, map.data())
    }
    /// Every dark dot of one has ink in the other within a dot.
    fn covered(&self, other: &Self) {
        let (width, height) = (self.width.min(other.width), self.height.min(other.height));
        let mut dark = 0;
        for y in 0..height {
            for x in 0..width {
                if self.grey[y * self.width + x] >= 100 {
                    continue;
                }
                dark += 1;
                let near = (y.saturating_sub(1)..(y + 2).min(height)).any(|y| {
                    (x.saturating_sub(1)..(x + 2).min(width))
                        .any(|x| other.grey[y * other.width + x] < 200)
                });
                assert!(near, "ink at {x}, {y} has none beside it in the other");
            }
        }
        assert!(dark > 100, "only {dark} dark dots");
    }
    fn agrees(&self, other: &Self) {
        assert!(self.width.abs_diff(other.width) <= 1 && self.height.abs_diff(other.height) <= 1);
        self.covered(other);
        other.covered(self);
    }
}

#[test]
fn pdf_svg_and_png_show_the_same_ink() {
    let sheet = every_kind();
    let ours = Picture::png(&png(&sheet, 200.0).unwrap());
    let drawn = Picture::svg(&text(svg(&sheet, Lettering::Usual).unwrap()), 200.0);
    ours.agrees(&drawn);
    for lettering in [Lettering::Usual, Lettering::Outline] {
        ours.agrees(&Picture::pdf(pdf(&sheet, lettering).unwrap(), 200.0));
    }
}

// PDF

fn with_pdf(bytes: &[u8], read: impl FnOnce(&FilePath) -> String) -> String {
    let file = tempfile::Builder::new().suffix(".pdf").tempfile().unwrap();
    std::fs::write(file.path(), bytes).unwrap();
    read(file.path())
}

fn check_with_qpdf(bytes: &[u8]) {
    let Some(mut qpdf) = tool("qpdf") else { return };
    let said = with_pdf(bytes, |path| printed(qpdf.arg("--check").arg(path)));
    assert!(
        said.contains("No syntax or stream encoding errors") && !said.contains("WARNING"),
        "{said}"
    );
}

#[test]
fn pdf_is_sound() {
    check_with_qpdf(&pdf(&every_kind(), Lettering::Usual).unwrap());
    check_with_qpdf(&pdf(&every_kind(), Lettering::Outline).unwrap());
}

#[test]
fn pdf_has_its_size_title_and_words() {
    let Some(mut info) = tool("pdfinfo") else {
        return;
    };
    let bytes = pdf(&every_kind(), Lettering::Usual).unwrap();
    let said = with_pdf(&bytes, |path| printed(info.arg(path)));
    assert!(
        said.lines()
            .any(|line| line.starts_with("Title:") && line.ends_with("Kinds of marks")),
        "{said}"
    );
    assert!(
        said.lines()
            .any(|line| line.starts_with("Tagged:") && line.ends_with("yes")),
        "{said}"
    );
    // 86 mm and 60 mm in points of 1/72 inch.
    assert!(said.contains("243.78 x 170.079 pts"), "{said}");
    assert!(!said.contains("CreationDate"));
    let structure = with_pdf(&bytes, |path| {
        printed(tool("pdfinfo").unwrap().arg("-struct").arg(path))
    });
    assert!(structure.contains("Figure"), "{structure}");
}

#[test]
fn pdf_embeds_subsets_of_true_type_faces() {
    let Some(mut fonts) = tool("pdffonts") else {
        return;
    };
    let said = with_pdf(&pdf(&every_kind(), Lettering::Usual).unwrap(), |path| {
        printed(fonts.arg(path))
    });
    let rows: Vec<&str> = said.lines().skip(2).collect();
    assert!(rows.len() >= 2, "{said}");
    for row in rows {
        assert!(
            row.contains("CID TrueType") && row.contains("yes yes yes") && !row.contains("Type 3"),
            "{row}"
        );
    }
    let said = with_pdf(&pdf(&every_kind(), Lettering::Outline).unwrap(), |path| {
        printed(tool("pdffonts").unwrap().arg(path))
    });
    assert_eq!(said.lines().skip(2).count(), 0, "{said}");
}

#[test]
fn pdf_text_can_be_found() {
    let Some(mut reader) = tool("pdftotext") else {
        return;
    };
    let bytes = pdf(&every_kind(), Lettering::Usual).unwrap();
    let said = with_pdf(&bytes, |path| printed(reader.arg(path).arg("-")));
    for found in ["pa\u{2032}", "\u{39B}", "ct / m", "event turn"] {
        assert!(said.contains(found), "{found} in {said}");
    }
    assert!(!said.contains('\\'), "{said}");
}

// TikZ

fn standalone(picture: &str) -> String {
    format!(
        "\\documentclass{{standalone}}\n\\usepackage{{amsmath,amssymb,tikz}}\n\\begin{{document}}\n{picture}\\end{{document}}\n"
    )
}

/// Sets a picture by pdflatex, without a warning.
fn set(picture: Vec<u8>) {
    let picture = text(picture);
    let Some(log) = latex_log(&standalone(&picture)) else {
        return;
    };
    let lines: Vec<&str> = log
        .lines()
        .filter(|line| {
            ["Warning", "Missing", "Overfull"]
                .iter()
                .any(|sign| line.contains(sign))
        })
        .collect();
    assert!(lines.is_empty(), "{lines:?}");
}

#[test]
fn tikz_is_set_without_a_warning() {
    let source = text(tikz(&every_kind()).unwrap());
    assert!(
        source.contains("amsmath")
            && source.contains("$p_a'$")
            && source.contains("dash pattern=on 2mm off 1mm")
    );
    set(tikz(&every_kind()).unwrap());
}

#[test]
fn hostile_names_do_not_break_tikz() {
    set(tikz(&nasty()).unwrap());
}

#[test]
fn every_allowed_command_is_set_by_tex() {
    let mut shapes = Vec::new();
    for (index, command) in commands().enumerate() {
        let (x, y) = (20.0 * (index % 10) as f64, 8.0 * (index / 10) as f64);
        let alone = sample(command);
        let as_script = format!("x_\\{command}\\sqrt\\{command}\\bar\\{command}");
        let source = if typeset(&as_script).is_ok() {
            format!("{alone}{as_script}")
        } else {
            alone
        };
        shapes.push((0, label(typeset(&source).unwrap(), x, y)));
    }
    set(tikz(&sheet_of(shapes)).unwrap());
}

#[test]
fn plain_names_of_all_signs_are_set_by_tex() {
    let latin: String = ('\u{20}'..='\u{17F}')
        .filter(|letter| !letter.is_control())
        .collect();
    let signs = "αβγΛ→−′°×·≤∞日-- --- ``''?`!`";
    let letters: Vec<char> = latin.chars().chain(signs.chars()).collect();
    let names = letters
        .chunks(12)
        .map(|chunk| chunk.iter().collect::<String>());
    let shapes = names
        .enumerate()
        .map(|(row, name)| (0, label(plain(&name), 2.0, 5.0 * row as f64)))
        .collect();
    set(tikz(&sheet_of(shapes)).unwrap());
}
