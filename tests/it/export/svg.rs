//! SVG, read by another program.

use std::collections::BTreeSet;

use super::*;

/// All points of an SVG's paths in the order they are drawn, as usvg reads them.
fn points_read(group: &usvg::Group, points: &mut Vec<(f32, f32)>) {
    use usvg::tiny_skia_path::PathSegment as Segment;
    for node in group.children() {
        match node {
            usvg::Node::Group(inner) => points_read(inner, points),
            usvg::Node::Path(path) => {
                for segment in path.data().segments() {
                    match segment {
                        Segment::MoveTo(end) | Segment::LineTo(end) => points.push((end.x, end.y)),
                        Segment::QuadTo(by, end) => points.extend([(by.x, by.y), (end.x, end.y)]),
                        Segment::CubicTo(by, and, end) => {
                            points.extend([(by.x, by.y), (and.x, and.y), (end.x, end.y)]);
                        }
                        Segment::Close => {}
                    }
                }
            }
            _ => panic!("neither a group nor a path"),
        }
    }
}

fn points_of(path: &BezPath) -> Vec<(f64, f64)> {
    let mut points = Vec::new();
    for element in path.elements() {
        match *element {
            PathEl::MoveTo(end) | PathEl::LineTo(end) => points.push((end.x, end.y)),
            PathEl::QuadTo(by, end) => points.extend([(by.x, by.y), (end.x, end.y)]),
            PathEl::CurveTo(by, and, end) => {
                points.extend([(by.x, by.y), (and.x, and.y), (end.x, end.y)]);
            }
            PathEl::ClosePath => {}
        }
    }
    points
}

#[test]
fn svg_is_read_back_at_its_coordinates() {
    let sheet = every_kind();
    let source = text(export::svg(&sheet, Lettering::Usual).unwrap());
    let tree = usvg::Tree::from_str(
        &source,
        &usvg::Options {
            dpi: 25.4,
            ..Default::default()
        },
    )
    .unwrap();
    assert!(
        (tree.size().width() - 86.0).abs() < 1e-4 && (tree.size().height() - 60.0).abs() < 1e-4
    );
    let mut read = Vec::new();
    points_read(tree.root(), &mut read);
    let drawn: Vec<(f64, f64)> = sheet
        .marks
        .iter()
        .flat_map(|mark| points_of(&mark.shape.outline()))
        .collect();
    assert_eq!(read.len(), drawn.len());
    for (read, drawn) in read.iter().zip(&drawn) {
        // Half a unit of the fourth decimal, and the reader's f32.
        let close = |a: f32, b: f64| (f64::from(a) - b).abs() < 0.5e-4 + 1e-5;
        assert!(
            close(read.0, drawn.0) && close(read.1, drawn.1),
            "{read:?} {drawn:?}"
        );
    }
}

#[test]
fn svg_says_what_it_shows() {
    let source = text(export::svg(&every_kind(), Lettering::Usual).unwrap());
    let document = usvg::roxmltree::Document::parse(&source).unwrap();
    let root = document.root_element();
    assert_eq!(root.attribute("role"), Some("img"));
    assert_eq!(
        (root.attribute("width"), root.attribute("height")),
        (Some("86mm"), Some("60mm"))
    );
    assert_eq!(root.attribute("viewBox"), Some("0 0 86 60"));
    let first = root.first_element_child().unwrap();
    assert_eq!(
        (first.tag_name().name(), first.text()),
        ("title", Some("Kinds of marks"))
    );
    let labels: Vec<&str> = document
        .descendants()
        .filter_map(|node| node.attribute("aria-label"))
        .collect();
    assert_eq!(labels.first(), Some(&"p sub a prime"));
    let groups: Vec<_> = document
        .descendants()
        .filter(|node| node.has_tag_name("g"))
        .collect();
    assert!(groups.iter().all(|group| {
        group
            .first_element_child()
            .is_some_and(|first| first.has_tag_name("title"))
    }));
}

#[test]
fn svg_ids_are_unique_and_follow_the_drawing_order() {
    let source = text(export::svg(&every_kind(), Lettering::Usual).unwrap());
    let document = usvg::roxmltree::Document::parse(&source).unwrap();
    let ids: Vec<&str> = document
        .descendants()
        .filter_map(|node| node.attribute("id"))
        .collect();
    assert_eq!(
        ids,
        [
            "a-axes",
            "a-event-turn",
            "a-axes.2",
            "a-event-turn.2",
            "a-axes.3"
        ]
    );
}

#[test]
fn svg_with_real_text_holds_the_letters() {
    let source = text(export::svg(&every_kind(), Lettering::Real).unwrap());
    let document = usvg::roxmltree::Document::parse(&source).unwrap();
    let letters: String = document
        .descendants()
        .filter(|node| node.has_tag_name("text"))
        .filter_map(|node| node.text())
        .collect();
    for letter in ['p', 'a', '\u{2032}', '\u{39B}', '\u{2212}', '\u{221A}'] {
        assert!(letters.contains(letter), "{letter} in {letters}");
    }
    assert!(source.contains("KaTeX_Math") && source.contains("font-style=\"italic\""));
}

#[test]
fn decimals_are_four_at_most_and_never_negative_zero() {
    let shape = line((-0.000_01, 1.0 / 3.0), (20_000.0 / 7.0, 1e-12), solid(0.1));
    let source = text(export::svg(&sheet_of(vec![(0, shape)]), Lettering::Usual).unwrap());
    assert!(source.contains("d=\"M0 0.3333L2857.1429 0\""), "{source}");
}

#[test]
fn hostile_names_do_not_break_svg() {
    for lettering in [Lettering::Usual, Lettering::Real] {
        let source = text(export::svg(&nasty(), lettering).unwrap());
        let document = usvg::roxmltree::Document::parse(&source).unwrap();
        let ids: Vec<&str> = document
            .descendants()
            .filter_map(|node| node.attribute("id"))
            .collect();
        assert_eq!(ids.len(), NASTY.len());
        assert_eq!(ids.iter().collect::<BTreeSet<_>>().len(), ids.len());
        let titles: Vec<&str> = document
            .descendants()
            .filter(|node| node.has_tag_name("title"))
            .filter_map(|node| node.text())
            .collect();
        assert!(
            titles.contains(&"<&>\"'") && titles.contains(&"]]>") && titles.contains(&"%$#_{}~^\\"),
            "{titles:?}"
        );
        assert!(
            document
                .descendants()
                .all(|node| !node.has_tag_name("script"))
        );
    }
}
