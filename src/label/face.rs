//! The open math faces that labels are set in.

use std::borrow::Cow;
use std::collections::BTreeMap;
use std::sync::OnceLock;

use kurbo::{BezPath, Rect, Shape};
use skrifa::instance::{LocationRef, Size};
use skrifa::outline::{DrawSettings, OutlinePen};
use skrifa::{FontRef, GlyphId, MetadataProvider};

/// One of the bundled faces.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Face(usize);

const NAMES: [&str; 20] = [
    "KaTeX_AMS-Regular",
    "KaTeX_Caligraphic-Bold",
    "KaTeX_Caligraphic-Regular",
    "KaTeX_Fraktur-Bold",
    "KaTeX_Fraktur-Regular",
    "KaTeX_Main-Bold",
    "KaTeX_Main-BoldItalic",
    "KaTeX_Main-Italic",
    "KaTeX_Main-Regular",
    "KaTeX_Math-BoldItalic",
    "KaTeX_Math-Italic",
    "KaTeX_SansSerif-Bold",
    "KaTeX_SansSerif-Italic",
    "KaTeX_SansSerif-Regular",
    "KaTeX_Script-Regular",
    "KaTeX_Size1-Regular",
    "KaTeX_Size2-Regular",
    "KaTeX_Size3-Regular",
    "KaTeX_Size4-Regular",
    "KaTeX_Typewriter-Regular",
];

/// A face, read once.
#[derive(Debug, Default)]
struct Read {
    bytes: Cow<'static, [u8]>,
    glyphs: BTreeMap<char, u16>,
    /// Outline in em, y up, and its box, by glyph.
    outlines: Vec<(BezPath, Rect)>,
}

static READ: [OnceLock<Read>; NAMES.len()] = [const { OnceLock::new() }; NAMES.len()];

impl Face {
    /// The face of a name as the layout crate gives it: `Math-Italic`.
    pub(super) fn named(short: &str) -> Option<Self> {
        NAMES
            .iter()
            .position(|name| name.strip_prefix("KaTeX_") == Some(short))
            .map(Self)
    }
    /// The file's name without its ending: `KaTeX_Main-Regular`.
    pub fn name(self) -> &'static str {
        NAMES.get(self.0).copied().unwrap_or_default()
    }
    /// The TrueType bytes.
    pub fn bytes(self) -> &'static [u8] {
        &self.read().bytes
    }
    /// The glyph of a character.
    pub(super) fn glyph(self, character: char) -> Option<u16> {
        self.read().glyphs.get(&character).copied()
    }
    /// A glyph's outline in em, y up, and its box; nothing for a glyph it does not have.
    pub(super) fn outline(self, glyph: u16) -> Option<&'static (BezPath, Rect)> {
        self.read().outlines.get(usize::from(glyph))
    }
    fn read(self) -> &'static Read {
        static EMPTY: Read = Read {
            bytes: Cow::Borrowed(&[]),
            glyphs: BTreeMap::new(),
            outlines: Vec::new(),
        };
        READ.get(self.0)
            .map_or(&EMPTY, |face| face.get_or_init(|| read(self.name())))
    }
}

fn read(name: &str) -> Read {
    let Some(bytes) = ratex_katex_fonts::ttf_bytes(&format!("{name}.ttf")) else {
        return Read::default();
    };
    let Ok(font) = FontRef::new(&bytes) else {
        return Read::default();
    };
    let glyphs = font
        .charmap()
        .mappings()
        .filter_map(|(code, glyph)| {
            Some((char::from_u32(code)?, u16::try_from(glyph.to_u32()).ok()?))
        })
        .collect();
    let metrics = font.metrics(Size::unscaled(), LocationRef::default());
    let em = f64::from(metrics.units_per_em).max(1.0);
    let outlines = (0..u32::from(metrics.glyph_count))
        .map(|glyph| outline(&font, glyph, em))
        .collect();
    Read {
        bytes,
        glyphs,
        outlines,
    }
}

fn outline(font: &FontRef<'_>, glyph: u32, em: f64) -> (BezPath, Rect) {
    let mut pen = Pen {
        path: BezPath::new(),
        em,
    };
    if let Some(found) = font.outline_glyphs().get(GlyphId::new(glyph)) {
        let unhinted = DrawSettings::unhinted(Size::unscaled(), LocationRef::default());
        if found.draw(unhinted, &mut pen).is_err() {
            pen.path = BezPath::new();
        }
    }
    let path = super::layout::turned(pen.path);
    let ink = if path.elements().is_empty() {
        Rect::ZERO
    } else {
        path.bounding_box()
    };
    (path, ink)
}

struct Pen {
    path: BezPath,
    em: f64,
}

impl Pen {
    fn at(&self, x: f32, y: f32) -> (f64, f64) {
        (f64::from(x) / self.em, f64::from(y) / self.em)
    }
}

impl OutlinePen for Pen {
    fn move_to(&mut self, x: f32, y: f32) {
        self.path.move_to(self.at(x, y));
    }
    fn line_to(&mut self, x: f32, y: f32) {
        self.path.line_to(self.at(x, y));
    }
    fn quad_to(&mut self, cx0: f32, cy0: f32, x: f32, y: f32) {
        self.path.quad_to(self.at(cx0, cy0), self.at(x, y));
    }
    fn curve_to(&mut self, cx0: f32, cy0: f32, cx1: f32, cy1: f32, x: f32, y: f32) {
        self.path
            .curve_to(self.at(cx0, cy0), self.at(cx1, cy1), self.at(x, y));
    }
    fn close(&mut self) {
        self.path.close_path();
    }
}
