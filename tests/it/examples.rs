//! Every plate of every example, drawn by the program into files and read by other programs.

use std::collections::BTreeMap;
use std::path::{Path, PathBuf};
use std::sync::OnceLock;

use conewright::marks::{Shape, Sheet};
use conewright::plate::Override;
use conewright::quantity::Typed;
use conewright::task;
use resvg::usvg;

use crate::picture::Picture;
use crate::program::{examples, run};
use crate::tools::{latex_log, printed, tool};

/// Dots per inch of the pictures: 10 dots a millimetre, 10 000 a metre.
const DPI: f32 = 254.0;
/// The plate of `tests/data/scripts.ron`.
const SCRIPTS: &str = "scripts: labels";

/// A plate as laid out, and the four files that `draw` made of it.
struct Figure {
    name: String,
    sheet: Sheet,
    /// The width that the scene's author wrote, mm.
    width: f64,
    /// Where its files are, without their endings.
    files: PathBuf,
}

impl Figure {
    fn path(&self, ending: &str) -> PathBuf {
        self.files.with_extension(ending)
    }
    fn bytes(&self, ending: &str) -> Vec<u8> {
        std::fs::read(self.path(ending)).unwrap()
    }
    fn svg(&self) -> String {
        String::from_utf8(self.bytes("svg")).unwrap()
    }
    /// The letters of every label, spaces left out.
    fn letters(&self) -> Vec<String> {
        self.sheet
            .marks
            .iter()
            .filter_map(|mark| match &mark.shape {
                Shape::Label { label, .. } => Some(without_spaces(&label.letters)),
                Shape::Path { .. } => None,
            })
            .collect()
    }
}

fn without_spaces(text: &str) -> String {
    text.chars().filter(|c| !c.is_whitespace()).collect()
}

/// All plates of all examples, and one with labels of every shape, each drawn once into all four formats.
fn figures() -> &'static [Figure] {
    static FIGURES: OnceLock<Vec<Figure>> = OnceLock::new();
    FIGURES.get_or_init(|| {
        let own = Path::new(env!("CARGO_MANIFEST_DIR")).join("tests/data/scripts.ron");
        let figures: Vec<Figure> = examples()
            .into_iter()
            .chain([own])
            .flat_map(|scene| drawn(&scene))
            .collect();
        assert!(figures.len() > 4, "a scene has lost its plates");
        figures
    })
}

fn drawn(scene: &Path) -> Vec<Figure> {
    let opened = task::open(scene).unwrap();
    assert!(!opened.scene.plates.is_empty(), "{}", scene.display());
    let folder = Path::new(env!("CARGO_TARGET_TMPDIR")).join("examples");
    std::fs::create_dir_all(&folder).unwrap();
    let stem = scene.file_stem().unwrap().display();
    let plates = opened.scene.plates.iter().enumerate();
    plates
        .map(|(index, (plate, object))| {
            let laid = task::lay_out(&opened, Some(plate), &Override::default()).unwrap();
            let width = match &object.form.width {
                Some(Typed::Text(text)) => text,
                other => panic!("{plate}: {other:?} is no width in mm"),
            };
            let figure = Figure {
                name: format!("{stem}: {plate}"),
                sheet: laid.sheet,
                width: width.trim_end_matches(" mm").parse().unwrap(),
                files: folder.join(format!("{stem}-{index}")),
            };
            for ending in ["svg", "pdf", "png", "tex"] {
                let (scene, to) = (scene.to_str().unwrap(), figure.path(ending));
                let (to, dpi) = (to.to_str().unwrap(), DPI.to_string());
                let ran = run(&[
                    "draw", scene, "--plate", plate, "--dpi", &dpi, "--force", "--to", to,
                ]);
                assert_eq!(ran.code, 0, "{}: {}", figure.name, ran.err);
            }
            figure
        })
        .collect()
}

#[test]
fn every_pdf_is_sound() {
    for figure in figures() {
        let Some(mut qpdf) = tool("qpdf") else { return };
        let said = printed(qpdf.arg("--check").arg(figure.path("pdf")));
        let is_clean = said.contains("No syntax or stream encoding errors");
        assert!(
            is_clean && !said.contains("WARNING"),
            "{}: {said}",
            figure.name
        );
    }
}

#[test]
fn every_pdf_embeds_all_its_fonts_and_none_is_type_3() {
    for figure in figures() {
        let Some(mut fonts) = tool("pdffonts") else {
            return;
        };
        let said = printed(fonts.arg(figure.path("pdf")));
        let rows: Vec<Vec<&str>> = said
            .lines()
            .skip_while(|line| !line.starts_with("---"))
            .skip(1)
            .map(|line| line.split_whitespace().collect())
            .collect();
        assert!(!rows.is_empty(), "{}: {said}", figure.name);
        for row in rows {
            // Name, type, encoding, then: emb sub uni object generation.
            let (kind, last) = row.split_at(row.len() - 5);
            assert_eq!(last[..3], ["yes", "yes", "yes"], "{}: {said}", figure.name);
            assert!(
                !kind.join(" ").contains("Type 3"),
                "{}: {said}",
                figure.name
            );
        }
    }
}

#[test]
fn every_pdf_has_the_width_its_author_wrote() {
    for figure in figures() {
        let Some(mut info) = tool("pdfinfo") else {
            return;
        };
        let said = printed(info.arg(figure.path("pdf")));
        let size = said
            .lines()
            .find_map(|line| line.strip_prefix("Page size:"))
            .unwrap();
        let sides: Vec<f64> = size
            .split_whitespace()
            .filter_map(|s| s.parse().ok())
            .collect();
        // Points of 1/72 inch; pdfinfo prints six digits.
        for (side, mm) in sides.iter().zip([figure.width, figure.sheet.height]) {
            assert!(
                (side / 72.0 * 25.4 - mm).abs() < 1e-3,
                "{}: {size}",
                figure.name
            );
        }
        assert_eq!(sides.len(), 2, "{}: {size}", figure.name);
    }
}

/// How often each character stands in a text.
fn counted<'a>(texts: impl IntoIterator<Item = &'a str>) -> BTreeMap<char, usize> {
    let mut counts = BTreeMap::new();
    for c in texts.into_iter().flat_map(str::chars) {
        *counts.entry(c).or_insert(0) += 1;
    }
    counts
}

/// What pdftotext finds in a PDF in the order of its content, spaces left out.
fn found(figure: &Figure) -> Option<String> {
    let mut reader = tool("pdftotext")?;
    Some(without_spaces(&printed(
        reader.arg("-raw").arg(figure.path("pdf")).arg("-"),
    )))
}

#[test]
fn every_label_is_found_in_the_pdf_by_its_letters() {
    for figure in figures() {
        let Some(found) = found(figure) else { return };
        assert!(!found.contains('\\'), "{}: {found}", figure.name);
        let labels = figure.letters();
        assert!(labels.len() > 10, "{}: {labels:?}", figure.name);
        for label in &labels {
            // A fraction's bar is ink, no letter.
            for part in label.split('/').filter(|part| !part.is_empty()) {
                assert!(
                    found.contains(part),
                    "{}: {part} of {label} in {found}",
                    figure.name
                );
            }
        }
        let wanted = counted(labels.iter().map(String::as_str));
        let there = counted([&*found]);
        for (letter, count) in wanted.iter().filter(|(letter, _)| **letter != '/') {
            let seen = there.get(letter).copied().unwrap_or(0);
            assert!(
                seen >= *count,
                "{}: {count} of {letter} in {found}",
                figure.name
            );
        }
    }
}

#[test]
fn scripts_bars_and_fractions_are_found_as_unicode_has_them() {
    let figure = figures()
        .iter()
        .find(|figure| figure.name == SCRIPTS)
        .unwrap();
    let Some(found) = found(figure) else { return };
    // Unicode 15: prime, Greek capital lambda, minus sign. An event and a particle are labelled p_a'.
    assert!(found.matches("pa\u{2032}").count() >= 2, "{found}");
    assert!(found.contains('\u{39B}'), "{found}");
    assert!(
        found.contains("p\u{2212}") && found.contains("p+"),
        "{found}"
    );
    // One event's label, and the title of the upright axis.
    assert!(found.matches("ct/m").count() >= 2, "{found}");
}

#[test]
fn every_tikz_picture_is_set_at_its_size_without_a_warning() {
    for figure in figures() {
        let document = format!(
            "\\documentclass{{standalone}}\n\\usepackage{{amsmath,amssymb,tikz}}\n\\begin{{document}}\n\
             \\setbox0\\hbox{{\\input{{\"{}\"}}}}\\typeout{{SIDES \\the\\wd0 \\space\\the\\dimexpr\\ht0+\\dp0\\relax}}\
             \\box0\n\\end{{document}}\n",
            figure.path("tex").display()
        );
        let Some(log) = latex_log(&document) else {
            return;
        };
        let signs = ["Warning", "Missing", "Overfull", "Underfull"];
        let said: Vec<&str> = log
            .lines()
            .filter(|line| signs.iter().any(|sign| line.contains(sign)))
            .collect();
        assert!(said.is_empty(), "{}: {said:?}", figure.name);
        let sides = log
            .lines()
            .find_map(|line| line.strip_prefix("SIDES "))
            .unwrap();
        let sides = sides
            .split_whitespace()
            .map(|s| s.trim_end_matches("pt").parse::<f64>().unwrap());
        // TeX's points: 72.27 in an inch (The TeXbook, chapter 10).
        for (side, mm) in sides.zip([figure.width, figure.sheet.height]) {
            assert!(
                (side / 72.27 * 25.4 - mm).abs() < 0.01,
                "{}: {side} pt, {mm} mm",
                figure.name
            );
        }
    }
}

#[test]
fn every_png_has_the_dots_and_the_size_asked_for() {
    for figure in figures() {
        let bytes = figure.bytes("png");
        let reader = png::Decoder::new(std::io::Cursor::new(&bytes))
            .read_info()
            .unwrap();
        let info = reader.info();
        let dims = info.pixel_dims.unwrap();
        assert!(matches!(dims.unit, png::Unit::Meter));
        // 254 dots in 25.4 mm.
        assert_eq!((dims.xppu, dims.yppu), (10_000, 10_000), "{}", figure.name);
        for (dots, mm) in [
            (info.width, figure.width),
            (info.height, figure.sheet.height),
        ] {
            let stated = f64::from(dots) / f64::from(dims.xppu) * 1000.0;
            assert!(
                (stated - mm).abs() <= 0.05 + 1e-9,
                "{}: {stated} mm of {mm} mm",
                figure.name
            );
        }
    }
}

#[test]
fn every_svg_is_read_at_its_size_in_mm() {
    for figure in figures() {
        let source = figure.svg();
        let document = usvg::roxmltree::Document::parse(&source).unwrap();
        let root = document.root_element();
        let side = |name: &str| {
            root.attribute(name)
                .and_then(|s| s.strip_suffix("mm")?.parse::<f64>().ok())
        };
        let (width, height) = (side("width").unwrap(), side("height").unwrap());
        assert!(
            (width - figure.width).abs() < 1e-4,
            "{}: {width} mm",
            figure.name
        );
        assert!(
            (height - figure.sheet.height).abs() < 1e-4,
            "{}: {height} mm",
            figure.name
        );
        let options = usvg::Options {
            dpi: 25.4,
            ..Default::default()
        };
        let size = usvg::Tree::from_str(&source, &options).unwrap().size();
        assert!(
            (f64::from(size.width()) - width).abs() < 1e-4,
            "{}",
            figure.name
        );
        assert!(
            (f64::from(size.height()) - height).abs() < 1e-4,
            "{}",
            figure.name
        );
    }
}

#[test]
fn every_png_shows_the_ink_of_its_svg_and_pdf() {
    for figure in figures() {
        let ours = Picture::png(&figure.bytes("png"));
        ours.agrees(&Picture::svg(&figure.svg(), DPI));
        ours.agrees(&Picture::pdf(figure.bytes("pdf"), DPI));
    }
}
