//! SVG in mm.

use std::collections::BTreeSet;
use std::fmt::Write as _;
use std::sync::Arc;

use kurbo::{Affine, BezPath, PathEl, Point};

use super::{ExportFault, Lettering, PROGRAM, check, clean, fixed, goes_anywhere, one_run};
use crate::label::{Face, Glyph, Label, Piece};
use crate::marks::{Cap, Ink, Join, Paint, Shape, Sheet, Stroke};

/// Writes a sheet as SVG, mm with 4 decimals.
///
/// Marks of one group that follow one another stand in one `g` with the group's id and title; where the drawing order
/// parts them, the later ones have `.2`, `.3` .. after the id.
///
/// # Errors
/// A sheet without a size, a mark without a place.
pub fn svg(sheet: &Sheet, lettering: Lettering) -> Result<Vec<u8>, ExportFault> {
    check(sheet)?;
    let (width, height) = (fixed(sheet.width), fixed(sheet.height));
    let mut out = format!(
        "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n<!-- {PROGRAM} -->\n\
         <svg xmlns=\"http://www.w3.org/2000/svg\" width=\"{width}mm\" height=\"{height}mm\" \
         viewBox=\"0 0 {width} {height}\" role=\"img\">\n<title>{}</title>\n<desc>{}</desc>\n",
        escaped(if sheet.title.trim().is_empty() {
            "Figure"
        } else {
            &sheet.title
        }),
        escaped(&sheet.words),
    );
    let mut ids = Ids::new(sheet);
    for run in sheet.marks.chunk_by(|a, b| a.group == b.group) {
        let Some(group) = run.first().map(|mark| mark.group) else {
            continue;
        };
        let title = sheet.groups.get(group).map_or("", |group| &group.title);
        line(
            &mut out,
            &format!(
                "<g id=\"{}\"><title>{}</title>",
                ids.next(group),
                escaped(title)
            ),
        );
        for mark in run {
            shape(&mut out, &mark.shape, lettering);
        }
        line(&mut out, "</g>");
    }
    line(&mut out, "</svg>");
    Ok(out.into_bytes())
}

fn line(out: &mut String, text: &str) {
    out.push_str(text);
    out.push('\n');
}

/// Ids of groups: fit for XML and used once each.
struct Ids {
    groups: Vec<(String, usize)>,
    used: BTreeSet<String>,
}

impl Ids {
    fn new(sheet: &Sheet) -> Self {
        let mut ids = Self {
            groups: Vec::new(),
            used: BTreeSet::new(),
        };
        for group in &sheet.groups {
            let id = ids.free(&name(&group.id), 1);
            ids.used.insert(id.clone());
            ids.groups.push((id, 0));
        }
        ids
    }
    /// The id of the group's next run.
    fn next(&mut self, group: usize) -> String {
        let Some((id, runs)) = self.groups.get_mut(group) else {
            return String::new();
        };
        *runs += 1;
        if *runs == 1 {
            return id.clone();
        }
        let (id, run) = (id.clone(), *runs);
        let next = self.free(&id, run);
        self.used.insert(next.clone());
        next
    }
    /// The id with the lowest number from one on that nothing has yet; 1 is not written.
    fn free(&self, id: &str, from: usize) -> String {
        let mut number = from;
        loop {
            let candidate = if number == 1 {
                id.to_owned()
            } else {
                format!("{id}.{number}")
            };
            if !self.used.contains(&candidate) {
                return candidate;
            }
            number += 1;
        }
    }
}

/// An XML name of the ASCII kind.
fn name(id: &str) -> String {
    let fit = |letter: char| {
        if letter.is_ascii_alphanumeric() || "-_.".contains(letter) {
            letter
        } else {
            '_'
        }
    };
    let name: String = id.chars().map(fit).collect();
    if name.starts_with(|first: char| first.is_ascii_alphabetic()) {
        name
    } else {
        format!("g{name}")
    }
}

fn escaped(text: &str) -> String {
    let mut out = String::new();
    for letter in clean(text).chars() {
        match letter {
            '&' => out.push_str("&amp;"),
            '<' => out.push_str("&lt;"),
            '>' => out.push_str("&gt;"),
            '"' => out.push_str("&quot;"),
            '\'' => out.push_str("&#39;"),
            other => out.push(other),
        }
    }
    out
}

fn shape(out: &mut String, shape: &Shape, lettering: Lettering) {
    match shape {
        Shape::Path { path, paint } if goes_anywhere(path) => {
            let paint = match paint {
                Paint::Fill(ink) => format!("fill=\"{}\"", colour(*ink)),
                Paint::Stroke(stroke) => stroked(stroke),
            };
            line(out, &format!("<path {paint} d=\"{}\"/>", data(path)));
        }
        Shape::Path { .. } => {}
        Shape::Label { label, at, em, ink } if lettering == Lettering::Real => {
            text(out, label, *at, *em, *ink);
        }
        Shape::Label { label, ink, .. } => {
            let outline = shape.outline();
            if goes_anywhere(&outline) {
                let (words, ink) = (escaped(&label.words), colour(*ink));
                let data = data(&outline);
                line(
                    out,
                    &format!(
                        "<path role=\"img\" aria-label=\"{words}\" fill=\"{ink}\" d=\"{data}\"/>"
                    ),
                );
            }
        }
    }
}

fn colour(Ink(red, green, blue): Ink) -> String {
    format!("#{red:02x}{green:02x}{blue:02x}")
}

fn stroked(stroke: &Stroke) -> String {
    let mut out = format!(
        "fill=\"none\" stroke=\"{}\" stroke-width=\"{}\"",
        colour(stroke.ink),
        fixed(stroke.width)
    );
    if stroke.cap == Cap::Round {
        out.push_str(" stroke-linecap=\"round\"");
    }
    out.push_str(match stroke.join {
        Join::Round => " stroke-linejoin=\"round\"",
        Join::Mitre => " stroke-miterlimit=\"10\"",
    });
    if !stroke.dash.is_empty() {
        let dash: Vec<String> = stroke.dash.iter().map(|length| fixed(*length)).collect();
        let _ = write!(out, " stroke-dasharray=\"{}\"", dash.join(" "));
    }
    out
}

fn pair(point: Point) -> String {
    format!("{} {}", fixed(point.x), fixed(point.y))
}

fn data(path: &BezPath) -> String {
    let each = |element: &PathEl| match *element {
        PathEl::MoveTo(end) => format!("M{}", pair(end)),
        PathEl::LineTo(end) => format!("L{}", pair(end)),
        PathEl::QuadTo(by, end) => format!("Q{} {}", pair(by), pair(end)),
        PathEl::CurveTo(by, and, end) => format!("C{} {} {}", pair(by), pair(and), pair(end)),
        PathEl::ClosePath => "Z".into(),
    };
    path.elements().iter().map(each).collect()
}

/// A label as text: every character at its own place, so that the setting is kept where the font is there.
fn text(out: &mut String, label: &Arc<Label>, at: Point, em: f64, ink: Ink) {
    let page = Affine::new([em, 0.0, 0.0, -em, at.x, at.y]);
    let (words, ink) = (escaped(&label.words), colour(ink));
    line(
        out,
        &format!("<g role=\"img\" aria-label=\"{words}\" fill=\"{ink}\">"),
    );
    for run in label.pieces.chunk_by(one_run) {
        match run.first() {
            Some(Piece::Outline(path)) => line(
                out,
                &format!("<path d=\"{}\"/>", data(&(page * path.clone()))),
            ),
            Some(Piece::Glyph(first)) => glyphs(out, first, run, page, em),
            None => {}
        }
    }
    line(out, "</g>");
}

fn glyphs(out: &mut String, first: &Glyph, run: &[Piece], page: Affine, em: f64) {
    let mut places = Vec::new();
    let mut letters = String::new();
    for piece in run {
        if let Piece::Glyph(glyph) = piece {
            places.push(fixed((page * Point::new(glyph.x, glyph.y)).x));
            letters.push(glyph.text);
        }
    }
    let y = fixed((page * Point::new(first.x, first.y)).y);
    let size = fixed(em * first.scale);
    let (places, letters) = (places.join(" "), escaped(&letters));
    let font = font(first.face);
    line(
        out,
        &format!("<text x=\"{places}\" y=\"{y}\" font-size=\"{size}\" {font}>{letters}</text>"),
    );
}

/// The face's family, slant and weight, with what to fall back on.
fn font(face: Face) -> String {
    let name = face.name();
    let family = name.split('-').next().unwrap_or(name);
    let mut out = format!("font-family=\"{family}, 'Latin Modern Math', 'STIX Two Math', serif\"");
    if name.contains("Italic") {
        out.push_str(" font-style=\"italic\"");
    }
    if name.contains("Bold") {
        out.push_str(" font-weight=\"bold\"");
    }
    out
}
