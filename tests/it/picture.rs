//! Pictures of one sheet, painted by the program and by others, and whether their ink agrees.

use resvg::{tiny_skia, usvg};

/// Grey levels, row by row.
pub(crate) struct Picture {
    pub(crate) width: usize,
    pub(crate) height: usize,
    grey: Vec<u8>,
}

impl Picture {
    pub(crate) fn png(bytes: &[u8]) -> Self {
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
    pub(crate) fn pdf(bytes: Vec<u8>, dpi: f32) -> Self {
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
            &hayro::hayro_interpret::InterpreterSettings::default(),
            &hayro::RenderSettings::default(),
            &settings,
        );
        Self::rgba(
            map.width() as usize,
            map.height() as usize,
            map.data_as_u8_slice(),
        )
    }
    pub(crate) fn svg(source: &str, dpi: f32) -> Self {
        let tree = usvg::Tree::from_str(
            source,
            &usvg::Options {
                dpi,
                ..Default::default()
            },
        )
        .unwrap();
        let size = tree.size().to_int_size();
        let mut map = tiny_skia::Pixmap::new(size.width(), size.height()).unwrap();
        map.fill(tiny_skia::Color::WHITE);
        resvg::render(&tree, tiny_skia::Transform::identity(), &mut map.as_mut());
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
    /// Each has ink where the other has, within a dot.
    pub(crate) fn agrees(&self, other: &Self) {
        assert!(self.width.abs_diff(other.width) <= 1 && self.height.abs_diff(other.height) <= 1);
        self.covered(other);
        other.covered(self);
    }
}
