//! Drawing the desk without a graphics card: egui's triangles on the CPU.

#![expect(
    clippy::iter_over_hash_type,
    reason = "each texture is taken in by itself: their order does not matter"
)]

mod raster;
pub(super) mod window;

use std::collections::BTreeMap;

use egui::epaint::{ClippedPrimitive, ImageData, Primitive};
use egui::{TextureId, TexturesDelta};

use raster::{Bounds, Texture, triangle};

/// A picture: rows of sRGB pixels with premultiplied alpha, from the top left.
#[derive(Clone, Debug, Default)]
pub struct Picture {
    width: usize,
    height: usize,
    pixels: Vec<[u8; 4]>,
}

impl Picture {
    /// A picture of one colour.
    pub fn filled(width: usize, height: usize, colour: [u8; 4]) -> Self {
        Self {
            width,
            height,
            pixels: vec![colour; width * height],
        }
    }

    /// Its width and height in pixels.
    pub fn size(&self) -> (usize, usize) {
        (self.width, self.height)
    }

    /// Its pixels, row by row.
    pub fn pixels(&self) -> &[[u8; 4]] {
        &self.pixels
    }
}

/// Paints what egui has tessellated. It keeps egui's textures from frame to frame.
#[derive(Debug, Default)]
pub struct SoftPainter {
    textures: BTreeMap<TextureId, Texture>,
}

impl SoftPainter {
    /// Takes in new and changed textures; call before painting.
    pub fn set_textures(&mut self, delta: &mut TexturesDelta) {
        for (id, changes) in delta.set.drain() {
            for change in changes {
                let ImageData::Color(image) = change.image;
                let whole = change.pos.is_none();
                let texture = self.textures.entry(id).or_default();
                if whole {
                    *texture = Texture::new(&image, change.options);
                } else if let Some(at) = change.pos {
                    texture.patch(at, &image);
                }
            }
        }
    }

    /// Drops textures that are no longer used; call after painting.
    pub fn free_textures(&mut self, delta: &mut TexturesDelta) {
        for id in delta.free.drain() {
            self.textures.remove(&id);
        }
    }

    /// Paints onto a picture.
    pub fn paint(
        &self,
        picture: &mut Picture,
        primitives: &[ClippedPrimitive],
        pixels_per_point: f32,
    ) {
        for ClippedPrimitive {
            clip_rect,
            primitive,
        } in primitives
        {
            let Primitive::Mesh(mesh) = primitive else {
                continue;
            };
            let Some(texture) = self.textures.get(&mesh.texture_id) else {
                continue;
            };
            let bounds = Bounds::new(*clip_rect, pixels_per_point, picture);
            if bounds.is_empty() {
                continue;
            }
            for [a, b, c] in mesh.triangles() {
                let corners = [a, b, c].map(|i| &mesh.vertices[i as usize]);
                triangle(picture, bounds, texture, corners, pixels_per_point);
            }
        }
    }
}
