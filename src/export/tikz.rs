//! TikZ: a picture to `\input`.

use std::collections::BTreeSet;

use kurbo::{BezPath, PathEl, Point};

use super::{ExportFault, PROGRAM, check, clean, fixed, goes_anywhere};
use crate::marks::{Cap, Ink, Join, Paint, Shape, Sheet, Stroke};

/// Writes a sheet as a TikZ picture: mm, y down; labels as LaTeX, set by the document's own fonts at the sheet's size.
///
/// The document needs tikz, amsmath and amssymb.
///
/// # Errors
/// A sheet without a size, a mark without a place.
pub fn tikz(sheet: &Sheet) -> Result<Vec<u8>, ExportFault> {
    check(sheet)?;
    let mut lines = vec![
        format!("% {PROGRAM}"),
        r"% Needs \usepackage{amsmath,amssymb,tikz}; \input this file where the figure belongs."
            .into(),
    ];
    lines.extend(
        [&sheet.title, &sheet.words]
            .into_iter()
            .map(|text| comment(text)),
    );
    lines.push(r"\begin{tikzpicture}[x=1mm,y=-1mm,miter limit=10,".into());
    lines.push(r"  plate label/.style={anchor=base,inner sep=0pt,outer sep=0pt}]".into());
    let inks: BTreeSet<Ink> = sheet.marks.iter().map(|mark| ink(&mark.shape)).collect();
    for Ink(red, green, blue) in inks {
        let name = colour(Ink(red, green, blue));
        lines.push(format!(
            "\\definecolor{{{name}}}{{RGB}}{{{red},{green},{blue}}}"
        ));
    }
    let corner = pair(Point::new(sheet.width, sheet.height));
    lines.push(format!(
        "\\path[use as bounding box] (0,0) rectangle {corner};"
    ));
    for run in sheet.marks.chunk_by(|a, b| a.group == b.group) {
        let group = run.first().and_then(|mark| sheet.groups.get(mark.group));
        lines.push(comment(group.map_or("", |group| &group.title)));
        lines.extend(run.iter().filter_map(|mark| drawn(&mark.shape)));
    }
    lines.push("\\end{tikzpicture}%\n".into());
    Ok(lines.join("\n").into_bytes())
}

/// One line that TeX skips; its signs are left out all the same.
fn comment(text: &str) -> String {
    let plain = |letter: char| {
        if r"\{}$&#^_~%".contains(letter) {
            ' '
        } else {
            letter
        }
    };
    format!(
        "% {}",
        clean(text).chars().map(plain).collect::<String>().trim()
    )
    .trim_end()
    .to_owned()
}

fn ink(shape: &Shape) -> Ink {
    match shape {
        Shape::Path {
            paint: Paint::Fill(ink),
            ..
        }
        | Shape::Label { ink, .. } => *ink,
        Shape::Path {
            paint: Paint::Stroke(stroke),
            ..
        } => stroke.ink,
    }
}

fn colour(Ink(red, green, blue): Ink) -> String {
    format!("ink{red:02X}{green:02X}{blue:02X}")
}

fn pair(point: Point) -> String {
    format!("({},{})", fixed(point.x), fixed(point.y))
}

fn drawn(shape: &Shape) -> Option<String> {
    match shape {
        Shape::Path { path, .. } if !goes_anywhere(path) => None,
        Shape::Path {
            path,
            paint: Paint::Fill(ink),
        } => Some(format!("\\fill[{}]{};", colour(*ink), data(path))),
        Shape::Path {
            path,
            paint: Paint::Stroke(stroke),
        } => Some(format!("\\draw[{}]{};", stroked(stroke), data(path))),
        Shape::Label { label, .. } if label.source.trim().is_empty() => None,
        Shape::Label { label, at, em, ink } => Some(format!(
            "\\node[plate label,text={},font={}] at {} {{${}$}};",
            colour(*ink),
            font(*em),
            pair(Point::new(at.x + em * label.width / 2.0, at.y)),
            label.source
        )),
    }
}

fn stroked(stroke: &Stroke) -> String {
    let mut out = format!(
        "{},line width={}mm",
        colour(stroke.ink),
        fixed(stroke.width)
    );
    if !stroke.dash.is_empty() {
        let part = |(index, length): (usize, &f64)| {
            let kind = if index % 2 == 0 { "on" } else { "off" };
            format!("{kind} {}mm", fixed(*length))
        };
        let pattern: Vec<String> = stroke.dash.iter().enumerate().map(part).collect();
        out.push_str(",dash pattern=");
        out.push_str(&pattern.join(" "));
    }
    if stroke.cap == Cap::Round {
        out.push_str(",line cap=round");
    }
    if stroke.join == Join::Round {
        out.push_str(",line join=round");
    }
    out
}

/// A path; one segment a line, so that no line outgrows TeX's buffer.
fn data(path: &BezPath) -> String {
    let mut out = String::new();
    let mut last = Point::ZERO;
    for element in path.elements() {
        match *element {
            PathEl::MoveTo(end) => out.extend([" ", &pair(end)]),
            PathEl::LineTo(end) => out.extend(["\n  -- ", &pair(end)]),
            PathEl::QuadTo(by, end) => {
                let (first, second) = (last.lerp(by, 2.0 / 3.0), end.lerp(by, 2.0 / 3.0));
                out.push_str(&curve(first, second, end));
            }
            PathEl::CurveTo(by, and, end) => out.push_str(&curve(by, and, end)),
            PathEl::ClosePath => out.push_str(" -- cycle"),
        }
        last = element.end_point().unwrap_or(last);
    }
    out
}

fn curve(by: Point, and: Point, end: Point) -> String {
    format!(
        "\n  .. controls {} and {} .. {}",
        pair(by),
        pair(and),
        pair(end)
    )
}

/// Sizes that Computer Modern is cut in, TeX points.
const CUT: [f64; 12] = [
    5.0, 6.0, 7.0, 8.0, 9.0, 10.0, 10.95, 12.0, 14.4, 17.28, 20.74, 24.88,
];

/// The document's font at a size; the nearest size that is cut, where it is nearer than one in a hundred.
fn font(em: f64) -> String {
    let size = em / 25.4 * 72.27;
    let near = |cut: &&f64| (size / **cut - 1.0).abs() < 0.01;
    let size = CUT.iter().find(near).copied().unwrap_or(size);
    format!(
        "\\fontsize{{{}}}{{{}}}\\selectfont",
        fixed(size),
        fixed(size * 1.2)
    )
}
