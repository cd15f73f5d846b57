//! PNG with its physical size.

use png::{BitDepth, ColorType, Encoder, PixelDimensions, SrgbRenderingIntent, Unit};
use tiny_skia::Pixmap;

use super::{ExportFault, PROGRAM, Raster, check, clean};
use crate::marks::Sheet;

/// Fewest and most dots per inch.
const DPI: std::ops::RangeInclusive<f64> = 20.0..=2_400.0;
/// The longest side, dots.
const LONGEST: f64 = 30_000.0;
/// Dots that are painted at a time: 64 MB.
const BAND: usize = 16_000_000;

/// Writes a sheet as PNG at some dots per inch, on white.
///
/// # Errors
/// A sheet without a size; under 20 or over 2,400 dpi; over 30,000 dots a side.
pub fn png(sheet: &Sheet, dpi: f64) -> Result<Vec<u8>, ExportFault> {
    check(sheet)?;
    if !DPI.contains(&dpi) {
        let what = format!("a picture of {dpi} dots per inch was asked for");
        return Err(ExportFault::new(
            what,
            format!("ask for {} to {} dpi", DPI.start(), DPI.end()),
        ));
    }
    let scale = dpi / 25.4;
    let (width, height) = (
        dots(sheet.width * scale, dpi)?,
        dots(sheet.height * scale, dpi)?,
    );
    let raster = Raster::new(sheet, scale);
    picture(sheet, &raster, (width, height), dpi).map_err(|cause| {
        ExportFault::new(
            format!("the picture cannot be written: {cause}"),
            "ask for fewer dots per inch",
        )
    })
}

#[expect(
    clippy::cast_possible_truncation,
    clippy::cast_sign_loss,
    reason = "between 1 and 30,000"
)]
fn dots(side: f64, dpi: f64) -> Result<u32, ExportFault> {
    if side > LONGEST {
        let what = format!("at {dpi} dpi the picture is {side:.0} dots long, over {LONGEST}");
        let mend = format!("ask for at most {:.0} dpi", (dpi * LONGEST / side).floor());
        return Err(ExportFault::new(what, mend));
    }
    Ok(side.round().max(1.0) as u32)
}

fn picture(
    sheet: &Sheet,
    raster: &Raster,
    (width, height): (u32, u32),
    dpi: f64,
) -> Result<Vec<u8>, png::EncodingError> {
    let mut bytes = Vec::new();
    let mut encoder = Encoder::new(&mut bytes, width, height);
    encoder.set_color(ColorType::Rgb);
    encoder.set_depth(BitDepth::Eight);
    encoder.set_source_srgb(SrgbRenderingIntent::RelativeColorimetric);
    encoder.set_pixel_dims(Some(per_metre(dpi)));
    let texts = [
        ("Title", &*sheet.title),
        ("Description", &sheet.words),
        ("Software", PROGRAM),
    ];
    for (keyword, text) in texts {
        encoder.add_itxt_chunk(keyword.into(), clean(text))?;
    }
    let mut writer = encoder.write_header()?;
    let mut stream = writer.stream_writer()?;
    let rows = u32::try_from((BAND / width as usize).max(1)).unwrap_or(u32::MAX);
    let mut top = 0;
    while top < height {
        let band = rows.min(height - top);
        std::io::Write::write_all(&mut stream, &painted(raster, width, top, band))?;
        top += band;
    }
    stream.finish()?;
    writer.finish()?;
    Ok(bytes)
}

#[expect(
    clippy::cast_possible_truncation,
    clippy::cast_sign_loss,
    reason = "at most 94,489"
)]
fn per_metre(dpi: f64) -> PixelDimensions {
    let dots = (dpi / 0.0254).round() as u32;
    PixelDimensions {
        xppu: dots,
        yppu: dots,
        unit: Unit::Meter,
    }
}

/// Some rows of the picture, three bytes a dot.
fn painted(raster: &Raster, width: u32, top: u32, rows: u32) -> Vec<u8> {
    let Some(mut band) = Pixmap::new(width, rows) else {
        return Vec::new();
    };
    band.fill(tiny_skia::Color::WHITE);
    raster.paint(&mut band, 0, top);
    band.data()
        .chunks_exact(4)
        .flat_map(|dot| dot.iter().take(3).copied())
        .collect()
}
