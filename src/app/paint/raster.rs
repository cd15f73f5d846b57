//! One triangle: positions to 1/256 px, integer edge functions with the top-left rule, blending of premultiplied
//! colour in gamma space as egui's other painters do.

#![expect(
    clippy::cast_possible_truncation,
    clippy::cast_possible_wrap,
    clippy::cast_sign_loss,
    reason = "the screen is in f32 points and whole pixels"
)]

use egui::epaint::Vertex;
use egui::{Color32, ColorImage, Rect, TextureFilter, TextureOptions};

use super::Picture;

/// Sub-pixel steps of a position.
const SUB: f32 = 256.0;

/// A texture of egui's.
#[derive(Clone, Debug, Default)]
pub(super) struct Texture {
    width: usize,
    height: usize,
    pixels: Vec<Color32>,
    linear: bool,
}

impl Texture {
    pub(super) fn new(image: &ColorImage, options: TextureOptions) -> Self {
        Self {
            width: image.width(),
            height: image.height(),
            pixels: image.pixels.clone(),
            linear: options.magnification == TextureFilter::Linear,
        }
    }

    /// Replaces a part; what falls outside is left out.
    pub(super) fn patch(&mut self, at: [usize; 2], image: &ColorImage) {
        let width = image.width().min(self.width.saturating_sub(at[0]));
        for (row, source) in image.pixels.chunks_exact(image.width().max(1)).enumerate() {
            let start = (at[1] + row) * self.width + at[0];
            if let Some(target) = self.pixels.get_mut(start..start + width) {
                target.copy_from_slice(&source[..width]);
            }
        }
    }

    fn texel(&self, x: f32, y: f32) -> [f32; 4] {
        let x = (x.max(0.0) as usize).min(self.width.saturating_sub(1));
        let y = (y.max(0.0) as usize).min(self.height.saturating_sub(1));
        self.pixels
            .get(y * self.width + x)
            .map_or([0.0; 4], |c| c.to_array().map(f32::from))
    }

    /// The colour at (u, v), 0 to 255 a channel.
    fn sample(&self, u: f32, v: f32) -> [f32; 4] {
        let (x, y) = (u * self.width as f32, v * self.height as f32);
        if !self.linear {
            return self.texel(x.floor(), y.floor());
        }
        let (x, y) = (x - 0.5, y - 0.5);
        let (left, top) = ((x + 1e-3).floor(), (y + 1e-3).floor());
        let (right, down) = (x - left, y - top);
        let corner = self.texel(left, top);
        if right < 2e-3 && down < 2e-3 {
            return corner;
        }
        let (b, c, d) = (
            self.texel(left + 1.0, top),
            self.texel(left, top + 1.0),
            self.texel(left + 1.0, top + 1.0),
        );
        std::array::from_fn(|i| {
            let upper = corner[i] + (b[i] - corner[i]) * right;
            let lower = c[i] + (d[i] - c[i]) * right;
            upper + (lower - upper) * down
        })
    }
}

/// The pixels that may be painted: a clip rectangle within the picture.
#[derive(Clone, Copy, Debug)]
pub(super) struct Bounds {
    left: i64,
    top: i64,
    right: i64,
    bottom: i64,
}

impl Bounds {
    pub(super) fn new(clip: Rect, pixels_per_point: f32, picture: &Picture) -> Self {
        let px = |v: f32| (v * pixels_per_point).round() as i64;
        let (width, height) = picture.size();
        Self {
            left: px(clip.min.x).max(0),
            top: px(clip.min.y).max(0),
            right: px(clip.max.x).min(width as i64),
            bottom: px(clip.max.y).min(height as i64),
        }
    }

    pub(super) fn is_empty(self) -> bool {
        self.left >= self.right || self.top >= self.bottom
    }
}

/// An edge function: `at + column * across + row * down`, not negative inside.
#[derive(Clone, Copy, Debug)]
struct Edge {
    at: i64,
    across: i64,
    down: i64,
    bias: i64,
}

impl Edge {
    /// From p to q, for a triangle that turns clockwise on the screen; at the centre of pixel (0, 0).
    fn new(p: [i64; 2], q: [i64; 2]) -> Self {
        let (dx, dy) = (q[0] - p[0], q[1] - p[1]);
        let centre = SUB as i64 / 2;
        let top_left = dy < 0 || (dy == 0 && dx > 0);
        Self {
            at: dx * (centre - p[1]) - dy * (centre - p[0]),
            across: -dy * SUB as i64,
            down: dx * SUB as i64,
            bias: if top_left { 0 } else { -1 },
        }
    }

    /// Narrows the columns of a row to those inside.
    fn narrow(self, row: i64, span: &mut (i64, i64)) {
        let start = self.at + row * self.down + self.bias;
        match self.across {
            0 if start < 0 => span.1 = span.0,
            0 => {}
            // Rounded up: the first column that is not outside.
            step if step > 0 => span.0 = span.0.max(-start.div_euclid(step)),
            step => span.1 = span.1.min(start.div_euclid(-step) + 1),
        }
    }
}

/// What varies over a triangle: red, green, blue, alpha, u, v.
type Values = [f32; 6];

fn values(vertex: &Vertex) -> Values {
    let [r, g, b, a] = vertex.color.to_array().map(f32::from);
    [r, g, b, a, vertex.uv.x, vertex.uv.y]
}

/// Paints one triangle.
pub(super) fn triangle(
    picture: &mut Picture,
    bounds: Bounds,
    texture: &Texture,
    corners: [&Vertex; 3],
    pixels_per_point: f32,
) {
    let fixed = |v: f32| (v * pixels_per_point * SUB).round() as i64;
    let [mut a, mut b, mut c] = corners;
    let point = |v: &Vertex| [fixed(v.pos.x), fixed(v.pos.y)];
    let area = cross(point(a), point(b), point(c));
    if area == 0 {
        return;
    }
    if area < 0 {
        (a, b, c) = (a, c, b);
    }
    let (pa, pb, pc) = (point(a), point(b), point(c));
    let edges = [Edge::new(pb, pc), Edge::new(pc, pa), Edge::new(pa, pb)];
    let paint = Gradient::new([values(a), values(b), values(c)], edges, area.abs());
    let flat = a.color == b.color && b.color == c.color && a.uv == b.uv && b.uv == c.uv;
    let low = pa[1].min(pb[1]).min(pc[1]).div_euclid(SUB as i64);
    let high = pa[1].max(pb[1]).max(pc[1]).div_euclid(SUB as i64) + 1;
    for row in low.max(bounds.top)..high.min(bounds.bottom) {
        let mut span = (bounds.left, bounds.right);
        for edge in edges {
            edge.narrow(row, &mut span);
        }
        if span.0 >= span.1 {
            continue;
        }
        let start = row as usize * picture.width;
        let line = &mut picture.pixels[start + span.0 as usize..start + span.1 as usize];
        let (first, step) = paint.row(row, span.0);
        if flat {
            fill(line, shade(texture, &first));
        } else {
            sweep(line, texture, first, step);
        }
    }
}

fn cross(a: [i64; 2], b: [i64; 2], c: [i64; 2]) -> i64 {
    (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0])
}

/// Values as affine functions of column and row.
#[derive(Debug)]
struct Gradient {
    origin: [f64; 6],
    across: [f64; 6],
    down: [f64; 6],
}

impl Gradient {
    fn new(corners: [Values; 3], edges: [Edge; 3], area: i64) -> Self {
        let mix = |part: fn(&Edge) -> i64| -> [f64; 6] {
            std::array::from_fn(|i| {
                let sum: f64 = (0..3)
                    .map(|k| part(&edges[k]) as f64 * f64::from(corners[k][i]))
                    .sum();
                sum / area as f64
            })
        };
        Self {
            origin: mix(|e| e.at),
            across: mix(|e| e.across),
            down: mix(|e| e.down),
        }
    }

    /// The values at a pixel and their step to the next column.
    fn row(&self, row: i64, column: i64) -> (Values, Values) {
        let first = std::array::from_fn(|i| {
            (self.origin[i] + row as f64 * self.down[i] + column as f64 * self.across[i]) as f32
        });
        (first, self.across.map(|v| v as f32))
    }
}

fn shade(texture: &Texture, at: &Values) -> [u8; 4] {
    let texel = texture.sample(at[4], at[5]);
    std::array::from_fn(|i| (at[i] * texel[i] / 255.0 + 0.5) as u8)
}

fn fill(line: &mut [[u8; 4]], colour: [u8; 4]) {
    match colour[3] {
        255 => line.fill(colour),
        _ if colour == [0; 4] => {}
        _ => line.iter_mut().for_each(|pixel| blend(pixel, colour)),
    }
}

fn sweep(line: &mut [[u8; 4]], texture: &Texture, mut at: Values, step: Values) {
    for pixel in line {
        blend(pixel, shade(texture, &at));
        for (value, by) in at.iter_mut().zip(step) {
            *value += by;
        }
    }
}

fn blend(pixel: &mut [u8; 4], over: [u8; 4]) {
    let rest = 255 - u32::from(over[3]);
    for (under, over) in pixel.iter_mut().zip(over) {
        let kept = (u32::from(*under) * rest + 127) / 255;
        *under = (u32::from(over) + kept).min(255) as u8;
    }
}

#[cfg(test)]
mod tests {
    use egui::{Color32, ColorImage, Pos2, Rect, TextureOptions, epaint::Vertex, pos2};

    use super::{Bounds, Texture, triangle};
    use crate::app::paint::Picture;

    fn white() -> Texture {
        Texture::new(
            &ColorImage::filled([1, 1], Color32::WHITE),
            TextureOptions::LINEAR,
        )
    }

    fn painted(points: &[[Pos2; 3]], colour: Color32) -> Picture {
        let mut picture = Picture::filled(16, 16, [0, 0, 0, 255]);
        let clip = Rect::from_min_max(Pos2::ZERO, pos2(16.0, 16.0));
        let bounds = Bounds::new(clip, 1.0, &picture);
        for corners in points {
            let v = corners.map(|p| Vertex::untextured(p, colour));
            triangle(&mut picture, bounds, &white(), [&v[0], &v[1], &v[2]], 1.0);
        }
        picture
    }

    #[test]
    fn triangles_that_share_an_edge_cover_each_pixel_once() {
        let half = Color32::from_rgba_premultiplied(100, 0, 0, 100);
        let (a, b, c, d) = (
            pos2(1.3, 2.1),
            pos2(14.2, 1.7),
            pos2(13.1, 14.6),
            pos2(2.4, 13.3),
        );
        let picture = painted(&[[a, b, c], [a, c, d]], half);
        let reds: std::collections::BTreeSet<u8> = picture.pixels().iter().map(|p| p[0]).collect();
        assert_eq!(reds.into_iter().collect::<Vec<_>>(), [0, 100]);
    }

    #[test]
    fn a_square_on_whole_pixels_fills_just_these() {
        let (a, b, c, d) = (
            pos2(3.0, 4.0),
            pos2(7.0, 4.0),
            pos2(7.0, 9.0),
            pos2(3.0, 9.0),
        );
        let picture = painted(&[[a, b, c], [a, c, d]], Color32::WHITE);
        for (i, pixel) in picture.pixels().iter().enumerate() {
            let inside = (3..7).contains(&(i % 16)) && (4..9).contains(&(i / 16));
            assert_eq!(pixel[0] == 255, inside, "pixel {i}");
        }
    }

    #[test]
    fn either_winding_paints_the_same() {
        let (a, b, c) = (pos2(1.0, 1.0), pos2(12.0, 3.0), pos2(5.0, 13.0));
        let one = painted(&[[a, b, c]], Color32::WHITE);
        let other = painted(&[[a, c, b]], Color32::WHITE);
        assert_eq!(one.pixels(), other.pixels());
    }
}
