//! PDF with embedded fonts.

use std::collections::BTreeMap;

use krilla::color::rgb;
use krilla::configure::{ConfigurationBuilder, PdfVersion};
use krilla::geom::{Path, PathBuilder, Point as PagePoint, Rect as PageRect};
use krilla::metadata::Metadata;
use krilla::num::NormalizedF32;
use krilla::page::PageSettings;
use krilla::paint::{Fill, FillRule, LineCap, LineJoin, Stroke as Line, StrokeDash};
use krilla::surface::Surface;
use krilla::tagging::{BBox, ContentTag, Identifier, SpanTag, Tag, TagGroup, TagTree};
use krilla::text::{Font, GlyphId, KrillaGlyph};
use krilla::{Document, SerializeSettings};
use kurbo::{Affine, BezPath, PathEl, Point};

use super::{ExportFault, Lettering, PROGRAM, check, clean, goes_anywhere, one_run};
use crate::label::{Face, Glyph, Label, Piece};
use crate::marks::{Cap, Ink, Join, Paint, Shape, Sheet, Stroke};

/// Points in a mm.
const PT: f64 = 72.0 / 25.4;

/// Writes a sheet as PDF: one page of the sheet's size, a tagged figure with the sheet's words as its alternative text.
///
/// # Errors
/// A sheet without a size, a mark without a place, a face that cannot be embedded.
pub fn pdf(sheet: &Sheet, lettering: Lettering) -> Result<Vec<u8>, ExportFault> {
    check(sheet)?;
    let failed = |cause: String| {
        ExportFault::new(
            format!("the PDF cannot be written: {cause}"),
            "write an SVG instead",
        )
    };
    // TeX embeds up to this version without a warning.
    let configuration = ConfigurationBuilder::new()
        .with_version(PdfVersion::Pdf15)
        .finish()
        .map_err(|cause| failed(format!("{cause:?}")))?;
    let settings = SerializeSettings {
        configuration,
        ..SerializeSettings::default()
    };
    let mut document = Document::new_with(settings);
    let (width, height) = (narrow(sheet.width * PT), narrow(sheet.height * PT));
    let page = PageSettings::from_wh(width, height)
        .ok_or_else(|| failed("the page has no size".into()))?;
    let mut page = document.start_page_with(page);
    let tagged = draw(page.surface(), sheet, lettering).map_err(failed)?;
    page.finish();
    let title = if sheet.title.trim().is_empty() {
        "Figure".to_owned()
    } else {
        clean(&sheet.title)
    };
    let words = if sheet.words.trim().is_empty() {
        title.clone()
    } else {
        clean(&sheet.words)
    };
    let area = PageRect::from_ltrb(0.0, 0.0, width, height).map(|area| BBox::new(0, area));
    let mut figure = TagGroup::new(Tag::Figure(Some(words.clone())).with_bbox(area));
    for part in tagged {
        figure.push(part);
    }
    let mut tree = TagTree::new().with_lang(Some("en".into()));
    tree.push(figure);
    document.set_tag_tree(tree);
    document.set_metadata(
        Metadata::new()
            .title(title)
            .description(words)
            .language("en".into())
            .creator(PROGRAM.into()),
    );
    document
        .finish()
        .map_err(|cause| failed(format!("{cause:?}")))
}

/// Draws all marks; the pieces of tagged content, in order.
fn draw(
    surface: Surface<'_>,
    sheet: &Sheet,
    lettering: Lettering,
) -> Result<Vec<Identifier>, String> {
    let mut writer = Writer {
        surface,
        fonts: BTreeMap::new(),
        tagged: Vec::new(),
    };
    for run in sheet
        .marks
        .chunk_by(|a, b| is_path(&a.shape) && is_path(&b.shape))
    {
        let shapes: Vec<&Shape> = run.iter().map(|mark| &mark.shape).collect();
        writer.run(&shapes, lettering == Lettering::Outline)?;
    }
    let Writer {
        surface, tagged, ..
    } = writer;
    surface.finish();
    Ok(tagged)
}

fn is_path(shape: &Shape) -> bool {
    matches!(shape, Shape::Path { .. })
}

#[expect(
    clippy::cast_possible_truncation,
    reason = "a PDF's numbers are f32 here; f64 until this call"
)]
fn narrow(value: f64) -> f32 {
    value as f32
}

fn colour(Ink(red, green, blue): Ink) -> rgb::Color {
    rgb::Color::new(red, green, blue)
}

fn fill(ink: Ink) -> Fill {
    Fill {
        paint: colour(ink).into(),
        opacity: NormalizedF32::ONE,
        rule: FillRule::NonZero,
    }
}

fn line(stroke: &Stroke) -> Line {
    let dash = stroke
        .dash
        .iter()
        .map(|length| narrow(length * PT))
        .collect();
    Line {
        paint: colour(stroke.ink).into(),
        width: narrow(stroke.width * PT),
        miter_limit: 10.0,
        line_cap: if stroke.cap == Cap::Round {
            LineCap::Round
        } else {
            LineCap::Butt
        },
        line_join: if stroke.join == Join::Round {
            LineJoin::Round
        } else {
            LineJoin::Miter
        },
        opacity: NormalizedF32::ONE,
        dash: (!stroke.dash.is_empty()).then_some(StrokeDash {
            array: dash,
            offset: 0.0,
        }),
    }
}

/// A path, mm on the page, in points.
fn path(outline: &BezPath) -> Option<Path> {
    if !goes_anywhere(outline) {
        return None;
    }
    let at = |point: Point| (narrow(point.x * PT), narrow(point.y * PT));
    let mut path = PathBuilder::new();
    for element in outline.elements() {
        match *element {
            PathEl::MoveTo(end) => {
                let (x, y) = at(end);
                path.move_to(x, y);
            }
            PathEl::LineTo(end) => {
                let (x, y) = at(end);
                path.line_to(x, y);
            }
            PathEl::QuadTo(by, end) => {
                let ((x1, y1), (x, y)) = (at(by), at(end));
                path.quad_to(x1, y1, x, y);
            }
            PathEl::CurveTo(by, and, end) => {
                let ((x1, y1), (x2, y2), (x, y)) = (at(by), at(and), at(end));
                path.cubic_to(x1, y1, x2, y2, x, y);
            }
            PathEl::ClosePath => path.close(),
        }
    }
    path.finish()
}

struct Writer<'a> {
    surface: Surface<'a>,
    fonts: BTreeMap<Face, Font>,
    tagged: Vec<Identifier>,
}

impl Writer<'_> {
    /// Paths that follow one another are one piece of tagged content, a label is one for itself.
    fn run(&mut self, shapes: &[&Shape], outlines: bool) -> Result<(), String> {
        if let [shape @ Shape::Label { label, at, em, ink }] = shapes {
            if label.pieces.is_empty() {
                return Ok(());
            }
            let span = SpanTag::empty()
                .with_alt_text(Some(&label.words))
                .with_actual_text(Some(&label.letters));
            self.tagged
                .push(self.surface.start_tagged(ContentTag::Span(span)));
            let drawn = if outlines {
                self.outline(&shape.outline(), *ink);
                Ok(())
            } else {
                self.label(label, *at, *em, *ink)
            };
            self.surface.end_tagged();
            return drawn;
        }
        self.tagged
            .push(self.surface.start_tagged(ContentTag::Other));
        for shape in shapes {
            match shape {
                Shape::Path {
                    path,
                    paint: Paint::Fill(ink),
                } => self.outline(path, *ink),
                Shape::Path {
                    path: outline,
                    paint: Paint::Stroke(stroke),
                } => {
                    self.surface.set_fill(None);
                    self.surface.set_stroke(Some(line(stroke)));
                    if let Some(path) = path(outline) {
                        self.surface.draw_path(&path);
                    }
                }
                Shape::Label { .. } => {}
            }
        }
        self.surface.end_tagged();
        Ok(())
    }

    fn outline(&mut self, outline: &BezPath, ink: Ink) {
        if let Some(path) = path(outline) {
            self.surface.set_stroke(None);
            self.surface.set_fill(Some(fill(ink)));
            self.surface.draw_path(&path);
        }
    }

    fn label(&mut self, label: &Label, at: Point, em: f64, ink: Ink) -> Result<(), String> {
        let page = Affine::new([em, 0.0, 0.0, -em, at.x, at.y]);
        for run in label.pieces.chunk_by(one_run) {
            let glyphs: Vec<&Glyph> = run
                .iter()
                .filter_map(|piece| match piece {
                    Piece::Glyph(glyph) => Some(glyph),
                    Piece::Outline(_) => None,
                })
                .collect();
            match (run.first(), glyphs.as_slice()) {
                (_, [first, ..]) => self.glyphs(first, &glyphs, page, em * PT, ink)?,
                (Some(Piece::Outline(path)), _) => self.outline(&(page * path.clone()), ink),
                _ => {}
            }
        }
        Ok(())
    }

    /// Glyphs of one face, size and baseline.
    fn glyphs(
        &mut self,
        first: &Glyph,
        run: &[&Glyph],
        page: Affine,
        em: f64,
        ink: Ink,
    ) -> Result<(), String> {
        let font = self.font(first.face)?;
        let mut letters = String::new();
        let mut placed = Vec::new();
        for (index, glyph) in run.iter().enumerate() {
            let next = run.get(index + 1).map_or(glyph.x, |next| next.x);
            let start = letters.len();
            letters.push(glyph.text);
            let advance = narrow((next - glyph.x) / glyph.scale);
            let id = GlyphId::new(u32::from(glyph.id));
            placed.push(KrillaGlyph::new(
                id,
                advance,
                0.0,
                0.0,
                0.0,
                start..letters.len(),
                None,
            ));
        }
        let at = page * Point::new(first.x, first.y);
        let at = PagePoint::from_xy(narrow(at.x * PT), narrow(at.y * PT));
        self.surface.set_stroke(None);
        self.surface.set_fill(Some(fill(ink)));
        self.surface
            .draw_glyphs(at, &placed, font, &letters, narrow(em * first.scale), false);
        Ok(())
    }

    fn font(&mut self, face: Face) -> Result<Font, String> {
        if let Some(font) = self.fonts.get(&face) {
            return Ok(font.clone());
        }
        let font = Font::new(face.bytes().into(), 0)
            .ok_or_else(|| format!("the face {} does not read", face.name()))?;
        self.fonts.insert(face, font.clone());
        Ok(font)
    }
}
