//! Where a panel stands and what it shows of the plane; the groups its marks belong to.

use std::collections::BTreeMap;

use kurbo::{Affine, BezPath, PathEl, Point, Rect};

use crate::marks::Group;

/// Where a panel stands on its sheet and what part of the plane it shows.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Window {
    /// The whole panel, mm.
    pub(super) outer: Rect,
    /// The field, mm.
    pub(super) field: Rect,
    /// What of the plane it shows: x right, t or E up.
    pub(super) plane: Rect,
}

impl Window {
    /// mm per unit of the plane, the same both ways.
    pub(super) fn scale(&self) -> f64 {
        self.field.width() / self.plane.width()
    }

    /// From the plane to mm.
    pub(super) fn affine(&self) -> Affine {
        let s = self.scale();
        let (x, y) = (
            self.field.x0 - s * self.plane.x0,
            self.field.y1 + s * self.plane.y0,
        );
        Affine::new([s, 0.0, 0.0, -s, x, y])
    }

    /// A point of the plane, mm. Differences are formed before scaling, so that far-off ranges keep their digits.
    pub(super) fn mm(&self, p: Point) -> Point {
        let s = self.scale();
        Point::new(
            s.mul_add(p.x - self.plane.x0, self.field.x0),
            s.mul_add(self.plane.y0 - p.y, self.field.y1),
        )
    }

    /// A path of the plane, mm.
    pub(super) fn path(&self, path: &BezPath) -> BezPath {
        path.elements()
            .iter()
            .map(|&element| match element {
                PathEl::MoveTo(p) => PathEl::MoveTo(self.mm(p)),
                PathEl::LineTo(p) => PathEl::LineTo(self.mm(p)),
                PathEl::QuadTo(p, q) => PathEl::QuadTo(self.mm(p), self.mm(q)),
                PathEl::CurveTo(p, q, r) => PathEl::CurveTo(self.mm(p), self.mm(q), self.mm(r)),
                PathEl::ClosePath => PathEl::ClosePath,
            })
            .collect()
    }
}

/// The groups of a sheet, one for each object and panel, with ids fit for XML.
#[derive(Clone, Debug, Default)]
pub(super) struct Groups {
    /// In order of first use.
    pub(super) list: Vec<Group>,
    known: BTreeMap<(char, String), usize>,
    ids: BTreeMap<String, usize>,
}

impl Groups {
    /// The group of a title on a panel.
    pub(super) fn of(&mut self, letter: char, title: &str) -> usize {
        if let Some(&index) = self.known.get(&(letter, title.to_owned())) {
            return index;
        }
        let plain: String = title
            .chars()
            .map(|c| {
                if c.is_ascii_alphanumeric() || c == '_' || c == '.' {
                    c
                } else {
                    '-'
                }
            })
            .collect();
        let stem = format!("{letter}-{plain}");
        let mut id = stem.clone();
        let mut count = 1;
        while self.ids.contains_key(&id) {
            count += 1;
            id = format!("{stem}-{count}");
        }
        let index = self.list.len();
        self.ids.insert(id.clone(), index);
        self.known.insert((letter, title.to_owned()), index);
        self.list.push(Group {
            id,
            title: title.to_owned(),
        });
        index
    }
}
