//! PNG, and whether pictures of one sheet agree.

use super::*;
use crate::picture::Picture;

#[test]
fn png_records_its_size_its_words_and_no_alpha() {
    let bytes = export::png(&every_kind(), 300.0).unwrap();
    let reader = ::png::Decoder::new(std::io::Cursor::new(&bytes))
        .read_info()
        .unwrap();
    let info = reader.info();
    // 86 mm and 60 mm at 300 dots an inch; 300 / 0.0254 m.
    assert_eq!((info.width, info.height), (1016, 709));
    assert_eq!(
        info.pixel_dims.map(|dims| (dims.xppu, dims.yppu)),
        Some((11_811, 11_811))
    );
    assert_eq!(info.color_type, ::png::ColorType::Rgb);
    assert!(info.srgb.is_some());
    let texts: Vec<(String, String)> = info
        .utf8_text
        .iter()
        .map(|chunk| (chunk.keyword.clone(), chunk.get_text().unwrap()))
        .collect();
    assert!(
        texts.contains(&("Title".into(), "Kinds of marks".into())),
        "{texts:?}"
    );
    assert!(texts.contains(&("Description".into(), "One mark of every kind.".into())));
}

#[test]
fn png_refuses_what_is_too_fine_or_too_large_and_says_what_would_do() {
    for dpi in [f64::NAN, f64::INFINITY, 0.0, -300.0, 19.0, 1e6] {
        assert!(
            export::png(&every_kind(), dpi)
                .unwrap_err()
                .mend
                .contains("20 to 2400")
        );
    }
    let mut poster = every_kind();
    poster.width = 600.0;
    let fault = export::png(&poster, 2_400.0).unwrap_err();
    assert!(
        fault.mend.contains("1269 dpi") || fault.mend.contains("1270 dpi"),
        "{}",
        fault.mend
    );
}

/// A picture of over 16 million dots is painted in bands; ink lies on both sides of the seam, 248 mm down.
#[test]
fn png_in_bands_agrees_with_another_painter() {
    let mut sheet = every_kind();
    (sheet.width, sheet.height) = (260.0, 260.0);
    let shift = kurbo::Vec2::new(100.0, 203.0);
    let copies: Vec<Mark> = sheet
        .marks
        .iter()
        .map(|mark| Mark {
            group: mark.group,
            shape: mark.shape.clone().moved(shift),
        })
        .collect();
    sheet.marks.extend(copies);
    let ours = Picture::png(&export::png(&sheet, 400.0).unwrap());
    assert!(ours.width * ours.height > 16_000_000);
    let theirs = Picture::svg(&text(export::svg(&sheet, Lettering::Usual).unwrap()), 400.0);
    ours.agrees(&theirs);
}

#[test]
fn pdf_svg_and_png_show_the_same_ink() {
    let sheet = every_kind();
    let ours = Picture::png(&export::png(&sheet, 200.0).unwrap());
    let drawn = Picture::svg(&text(export::svg(&sheet, Lettering::Usual).unwrap()), 200.0);
    ours.agrees(&drawn);
    for lettering in [Lettering::Usual, Lettering::Outline] {
        ours.agrees(&Picture::pdf(
            export::pdf(&sheet, lettering).unwrap(),
            200.0,
        ));
    }
}
