//! The picture of the marks: the sheet painted by the same code that writes it as PNG, at the screen's scale, kept
//! until view or sheet change. What is selected gets its band in it, under the ink; what the pointer is over, a line.

#![expect(
    clippy::cast_possible_truncation,
    clippy::cast_sign_loss,
    reason = "the screen is in f32 points and whole pixels"
)]

use egui::{Color32, ColorImage, Painter, Rect, TextureHandle, TextureOptions, Ui, pos2, vec2};
use tiny_skia::{BlendMode, FillRule, LineCap, LineJoin, Paint, Pixmap, Stroke, Transform};

use super::Lie;
use crate::app::context::Context;
use crate::app::theme::{BAND, ON_PAPER, PAPER, SELECTION};
use crate::export::{Raster, raster_path};
use crate::fault::ObjectId;
use crate::marks::{Mark, Paint as Ink, Shape, Sheet};

/// What a kept picture shows.
#[derive(Clone, Debug, PartialEq)]
struct Key {
    version: u64,
    scale: f32,
    pixels_per_point: f32,
    /// First pixel of the paper that is shown, and how many.
    part: [u32; 4],
    selected: Option<ObjectId>,
    hovered: Option<ObjectId>,
}

/// The kept picture.
#[derive(Default)]
pub(in crate::app) struct Picture {
    key: Option<Key>,
    raster: Option<(u64, f64, Raster)>,
    texture: Option<TextureHandle>,
}

impl std::fmt::Debug for Picture {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        f.debug_struct("Picture")
            .field("key", &self.key)
            .finish_non_exhaustive()
    }
}

impl Picture {
    /// Paints the part of the paper that lies in the region.
    pub(super) fn paint(
        &mut self,
        ui: &Ui,
        painter: &Painter,
        rect: Rect,
        lie: &Lie,
        context: &Context<'_>,
    ) {
        let Some(laid) = &context.shown.laid else {
            return;
        };
        let ppp = ui.pixels_per_point();
        let visible = lie.paper.intersect(rect);
        if visible.width() < 1.0 || visible.height() < 1.0 {
            return;
        }
        let px = |v: f32| (v * ppp).round().max(0.0) as u32;
        let from = (visible.min - lie.paper.min) * ppp;
        let (left, top) = (
            from.x.floor().max(0.0) as u32,
            from.y.floor().max(0.0) as u32,
        );
        let (width, height) = (px(visible.width()).max(1), px(visible.height()).max(1));
        let key = Key {
            version: context.shown.version,
            scale: lie.scale,
            pixels_per_point: ppp,
            part: [left, top, width, height],
            selected: context.view.selected.clone(),
            hovered: context.view.hovered.clone(),
        };
        if self.key.as_ref() != Some(&key) {
            let scale = f64::from(lie.scale * ppp);
            if let Some(pixmap) = self.draw(&laid.sheet, scale, &key, context) {
                self.keep(ui, &pixmap);
                self.key = Some(key);
            }
        }
        if let Some(texture) = &self.texture {
            let corner = lie.paper.min + vec2(left as f32, top as f32) / ppp;
            let size = vec2(width as f32, height as f32) / ppp;
            let uv = Rect::from_min_max(pos2(0.0, 0.0), pos2(1.0, 1.0));
            painter.image(
                texture.id(),
                Rect::from_min_size(corner, size),
                uv,
                Color32::WHITE,
            );
        }
    }

    fn draw(
        &mut self,
        sheet: &Sheet,
        scale: f64,
        key: &Key,
        context: &Context<'_>,
    ) -> Option<Pixmap> {
        let fresh = self
            .raster
            .as_ref()
            .is_none_or(|(version, at, _)| *version != key.version || *at != scale);
        if fresh {
            self.raster = Some((key.version, scale, Raster::new(sheet, scale)));
        }
        let (_, _, raster) = self.raster.as_ref()?;
        let [left, top, width, height] = key.part;
        let mut pixmap = Pixmap::new(width, height)?;
        let [r, g, b] = PAPER;
        pixmap.fill(tiny_skia::Color::from_rgba8(r, g, b, 255));
        raster.paint(&mut pixmap, left, top);
        let chosen = |object: &Option<ObjectId>| {
            let shows = |mark: &&Mark| {
                object.is_some() && context.shown.objects.get(mark.group) == Some(object)
            };
            Chosen {
                marks: sheet.marks.iter().filter(shows).collect(),
                scale,
                place: Transform::from_translate(-(left as f32), -(top as f32)),
            }
        };
        let ppp = f64::from(key.pixels_per_point);
        if key.selected.is_some() {
            chosen(&key.selected).band(&mut pixmap, ppp);
        }
        if key.hovered.is_some() {
            chosen(&key.hovered).outline(&mut pixmap, ppp);
        }
        Some(pixmap)
    }

    fn keep(&mut self, ui: &Ui, pixmap: &Pixmap) {
        let size = [pixmap.width() as usize, pixmap.height() as usize];
        let image = ColorImage::from_rgba_premultiplied(size, pixmap.data());
        let options = TextureOptions::NEAREST;
        if let Some(texture) = &mut self.texture {
            texture.set(image, options);
        } else {
            self.texture = Some(ui.ctx().load_texture("sheet", image, options));
        }
    }
}

/// Marks of chosen groups, to be painted wider than they are. Labels are left out.
struct Chosen<'a> {
    marks: Vec<&'a Mark>,
    scale: f64,
    place: Transform,
}

impl Chosen<'_> {
    /// Paints every chosen mark `more` dots wider on both sides, and at least `least` dots wide.
    fn paint(&self, layer: &mut Pixmap, paint: &Paint<'_>, more: f64, least: f64) {
        for mark in &self.marks {
            let Shape::Path { path, paint: ink } = &mark.shape else {
                continue;
            };
            let Some(path) = raster_path(path, self.scale) else {
                continue;
            };
            let width = match ink {
                Ink::Stroke(stroke) => (stroke.width * self.scale + 2.0 * more).max(least),
                Ink::Fill(_) => {
                    layer.fill_path(&path, paint, FillRule::Winding, self.place, None);
                    2.0 * more
                }
            };
            let stroke = Stroke {
                width: width as f32,
                line_cap: LineCap::Round,
                line_join: LineJoin::Round,
                ..Stroke::default()
            };
            layer.stroke_path(&path, paint, &stroke, self.place, None);
        }
    }

    /// A band under all ink: a dot takes as much of the band's colour as paper shines through it, which for the
    /// plate's dark inks is its lightest possible share, the least of its channels.
    fn band(&self, pixmap: &mut Pixmap, pixels_per_point: f64) {
        let Some(mut layer) = Pixmap::new(pixmap.width(), pixmap.height()) else {
            return;
        };
        let wide = f64::from(BAND) * pixels_per_point;
        self.paint(&mut layer, &Paint::default(), 2.5 * pixels_per_point, wide);
        for (dot, over) in pixmap
            .data_mut()
            .chunks_exact_mut(4)
            .zip(layer.data().chunks_exact(4))
        {
            let [r, g, b, _] = *dot else { continue };
            let paper = u32::from(r.min(g).min(b)) * u32::from(over[3]);
            for (channel, band) in dot.iter_mut().zip(SELECTION) {
                let taken = (paper * (255 - u32::from(band)) + 32_512) / 65_025;
                *channel = channel.saturating_sub(taken.min(255) as u8);
            }
        }
    }

    /// A line along the ink's edge, a little off it.
    fn outline(&self, pixmap: &mut Pixmap, pixels_per_point: f64) {
        let Some(mut layer) = Pixmap::new(pixmap.width(), pixmap.height()) else {
            return;
        };
        let mut paint = Paint::default();
        let [r, g, b, _] = ON_PAPER.to_array();
        paint.set_color_rgba8(r, g, b, 255);
        self.paint(&mut layer, &paint, 3.5 * pixels_per_point, 0.0);
        paint.blend_mode = BlendMode::DestinationOut;
        self.paint(&mut layer, &paint, 2.0 * pixels_per_point, 0.0);
        let plain = tiny_skia::PixmapPaint::default();
        pixmap.draw_pixmap(0, 0, layer.as_ref(), &plain, Transform::identity(), None);
    }
}
