//! Placing glyphs by the layout crate.

use kurbo::{Affine, BezPath, Rect, Shape};
use ratex_font::{FontId, katex_ttf_glyph_char};
use ratex_layout::{LayoutOptions, layout, to_display_list, validate_layout};
use ratex_types::{DisplayItem, DisplayList, MathStyle, PathCommand};

use super::{Face, reader, words};

/// One placed thing of a label, in em, y up.
#[derive(Clone, Debug, PartialEq)]
pub enum Piece {
    /// A glyph of a face.
    Glyph(Glyph),
    /// A filled outline that no glyph draws: fraction bars, radicals, accents.
    Outline(BezPath),
}

/// A placed glyph.
#[derive(Clone, Debug, PartialEq)]
pub struct Glyph {
    /// Its face.
    pub face: Face,
    /// Its index in the face.
    pub id: u16,
    /// What it stands for, for searching and copying.
    pub text: char,
    /// Left end of its origin, em.
    pub x: f64,
    /// Its baseline above the label's, em.
    pub y: f64,
    /// Its size relative to the label's.
    pub scale: f64,
}

/// A label set in type.
#[derive(Clone, Debug, PartialEq)]
pub struct Label {
    /// The LaTeX math as written, but with commands for characters beyond ASCII and braces round arguments that are
    /// commands.
    pub source: String,
    /// What is drawn, left to right.
    pub pieces: Vec<Piece>,
    /// For a screen reader: `p sub a prime`.
    pub words: String,
    /// For copying and searching: the letters, `pa′`.
    pub letters: String,
    /// Advance width, em.
    pub width: f64,
    /// Above the baseline, em.
    pub height: f64,
    /// Below the baseline, em, not negative.
    pub depth: f64,
    /// The box of the ink itself, em, y up.
    pub ink: Rect,
}

impl Label {
    /// All ink as one outline (non-zero winding), em, y up.
    pub fn outline(&self) -> BezPath {
        let mut all = BezPath::new();
        for piece in &self.pieces {
            match piece {
                Piece::Glyph(glyph) => all.extend(&glyph.outline()),
                Piece::Outline(path) => all.extend(path),
            }
        }
        all
    }
}

impl Glyph {
    /// Its outline where it stands, em, y up.
    pub fn outline(&self) -> BezPath {
        self.face
            .outline(self.id)
            .map(|found| self.place() * &found.0)
            .unwrap_or_default()
    }
    fn place(&self) -> Affine {
        Affine::new([self.scale, 0.0, 0.0, self.scale, self.x, self.y])
    }
    fn ink(&self) -> Option<Rect> {
        let ink = self.face.outline(self.id)?.1;
        (ink.area() > 0.0).then(|| self.place().transform_rect_bbox(ink))
    }
}

/// Why a label cannot be set.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
#[error("{what}")]
pub struct LabelFault {
    /// Characters from the start of the label.
    pub column: usize,
    /// What is wrong.
    pub what: String,
    /// What would mend it.
    pub mend: String,
}

/// The longest label, bytes.
const LONGEST: usize = 1_000;
/// The largest box, em.
const LARGEST: f64 = 200.0;

/// The accent of `\bar`.
const MACRON: char = '\u{2C9}';
/// How far the layout crate sets it above TeX's place, em: TeX raises an accent by what its base is higher than an x
/// (The TeXbook, appendix G, rule 12), the crate by the base's height less 0.338; an x is 0.431 high.
const MACRON_DROP: f64 = 0.0928;

/// Sets LaTeX math.
///
/// # Errors
/// A command that is not allowed, text that does not parse, a character no face has, over 1,000 bytes, a box over
/// 200 em.
pub fn typeset(source: &str) -> Result<Label, LabelFault> {
    if source.len() > LONGEST {
        let what = format!("the label is {} bytes long, over {LONGEST}", source.len());
        return Err(LabelFault {
            column: 0,
            what,
            mend: "shorten it".into(),
        });
    }
    let reading = reader::read(source)?;
    let words = words::words(&reading.nodes);
    let letters = words::letters(&reading.nodes);
    set(&reading.latex, words, letters).map_err(|fault| locate(fault, source, &reading.latex))
}

/// A column of the LaTeX that was set is a column of the source where the two are equal.
fn locate(fault: LabelFault, source: &str, latex: &str) -> LabelFault {
    let column = if source == latex { fault.column } else { 0 };
    LabelFault { column, ..fault }
}

/// Sets LaTeX that is known to hold allowed commands alone.
pub(super) fn set(latex: &str, words: String, letters: String) -> Result<Label, LabelFault> {
    let plain = |what: String, mend: &str| LabelFault {
        column: 0,
        what,
        mend: mend.into(),
    };
    let nodes = ratex_parser::parse(latex).map_err(|error| {
        let start = error.loc.map_or(0, |place| place.start);
        let column = latex
            .get(..start)
            .map_or(0, |before| before.chars().count());
        LabelFault {
            column,
            what: format!("the label does not read: {}", error.message),
            mend: "write it as LaTeX math".into(),
        }
    })?;
    let options = LayoutOptions {
        style: MathStyle::Text,
        ..LayoutOptions::default()
    };
    let placed = layout(&nodes, &options);
    validate_layout(&placed)
        .map_err(|what| plain(format!("the label cannot be set: {what}"), "simplify it"))?;
    let list = to_display_list(&placed);
    if !(list.width.abs() < LARGEST && list.height.abs() < LARGEST && list.depth.abs() < LARGEST) {
        return Err(plain(
            format!("the label is larger than {LARGEST} em"),
            "shorten it",
        ));
    }
    let pieces = list
        .items
        .iter()
        .map(|item| piece(item, &list))
        .collect::<Result<Vec<_>, _>>()?;
    let pieces: Vec<Piece> = pieces.into_iter().flatten().collect();
    let ink = pieces
        .iter()
        .filter_map(ink_of)
        .reduce(|all, next| all.union(next))
        .unwrap_or_default();
    let lowered = list.items.iter().any(|item| {
        matches!(item, DisplayItem::GlyphPath { char_code, .. } if *char_code == u32::from(MACRON))
    });
    let height = if lowered {
        (list.height - MACRON_DROP).max(ink.y1)
    } else {
        list.height
    };
    Ok(Label {
        source: latex.to_owned(),
        pieces,
        words,
        letters,
        width: list.width.max(0.0),
        height,
        depth: list.depth.max(0.0),
        ink,
    })
}

fn ink_of(piece: &Piece) -> Option<Rect> {
    match piece {
        Piece::Glyph(glyph) => glyph.ink(),
        Piece::Outline(path) => (!path.elements().is_empty()).then(|| path.bounding_box()),
    }
}

/// One item of the display list (y down from the top of the box) as a piece (y up from the baseline).
fn piece(item: &DisplayItem, list: &DisplayList) -> Result<Option<Piece>, LabelFault> {
    let bar = |x: f64, y: f64, width: f64, height: f64| {
        let bottom = list.height - y - height;
        Piece::Outline(turned(
            Rect::new(x, bottom, x + width, bottom + height).to_path(1e-6),
        ))
    };
    Ok(match item {
        DisplayItem::GlyphPath {
            x,
            y,
            scale,
            font,
            char_code,
            ..
        } => glyph(font, *char_code, *x, list.height - y, *scale)?,
        DisplayItem::Line {
            x,
            y,
            width,
            thickness,
            ..
        } => Some(bar(*x, y - thickness / 2.0, *width, *thickness)),
        DisplayItem::Rect {
            x,
            y,
            width,
            height,
            ..
        } => Some(bar(*x, *y, *width, *height)),
        DisplayItem::Path { x, y, commands, .. } => {
            Some(Piece::Outline(path(commands, *x, list.height - y)))
        }
    })
}

fn glyph(font: &str, code: u32, x: f64, y: f64, scale: f64) -> Result<Option<Piece>, LabelFault> {
    let text = char::from_u32(code).unwrap_or(char::REPLACEMENT_CHARACTER);
    let missing = || LabelFault {
        column: 0,
        what: format!("no face has a glyph for \"{text}\" (U+{code:04X})"),
        mend: "name the symbol by a command, or take it out".into(),
    };
    let id = FontId::parse(font).ok_or_else(missing)?;
    let face = Face::named(font).ok_or_else(missing)?;
    if text.is_whitespace() {
        return Ok(None);
    }
    let drawn = katex_ttf_glyph_char(id, code);
    let id = face.glyph(drawn).ok_or_else(missing)?;
    let y = if text == MACRON {
        y - MACRON_DROP * scale
    } else {
        y
    };
    let text = if ('\u{1D400}'..='\u{1D7FF}').contains(&text) {
        drawn
    } else {
        text
    };
    let glyph = Glyph {
        face,
        id,
        text,
        x,
        y,
        scale,
    };
    if is_letter(text) {
        return Ok(Some(Piece::Glyph(glyph)));
    }
    Ok(Some(Piece::Outline(glyph.outline())))
}

/// Accents, parts of tall brackets and glyphs of private codes are drawn, but no one would search for them.
fn is_letter(text: char) -> bool {
    !matches!(text,
        '^' | '~' | '\u{A8}' | '\u{AF}' | '\u{B4}' | '\u{2C6}'..='\u{2DD}' | '\u{300}'..='\u{36F}'
        | '\u{20D0}'..='\u{20FF}' | '\u{239B}'..='\u{23AE}' | '\u{E000}'..='\u{F8FF}')
}

fn path(commands: &[PathCommand], left: f64, top: f64) -> BezPath {
    let at = |x: f64, y: f64| (left + x, top - y);
    let mut path = BezPath::new();
    for command in commands {
        match *command {
            PathCommand::MoveTo { x, y } => path.move_to(at(x, y)),
            PathCommand::LineTo { x, y } if !path.elements().is_empty() => path.line_to(at(x, y)),
            PathCommand::QuadTo { x1, y1, x, y } if !path.elements().is_empty() => {
                path.quad_to(at(x1, y1), at(x, y));
            }
            PathCommand::CubicTo {
                x1,
                y1,
                x2,
                y2,
                x,
                y,
            } if !path.elements().is_empty() => {
                path.curve_to(at(x1, y1), at(x2, y2), at(x, y));
            }
            PathCommand::Close if !path.elements().is_empty() => path.close_path(),
            _ => {}
        }
    }
    turned(path)
}

/// The same outline, running clockwise as TrueType's do: where two pieces overlap their windings add.
pub(super) fn turned(path: BezPath) -> BezPath {
    if path.area() > 0.0 {
        path.reverse_subpaths()
    } else {
        path
    }
}
