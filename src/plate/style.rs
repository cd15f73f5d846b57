//! The tokens of a printed plate: inks, strokes, dashes, arrowheads, distances. Every drawing number stands here.
//!
//! Lengths are mm on paper. They are stated for lettering of 9 pt and scale with it; strokes keep their weight for
//! smaller lettering and grow for larger.

use crate::marks::Ink;

/// One PostScript point, mm.
pub(super) const POINT: f64 = 25.4 / 72.0;
/// Lettering for which the tokens are stated, pt.
pub(super) const USUAL_TEXT: f64 = 9.0;
/// Smallest and largest lettering, pt.
pub(super) const TEXT_RANGE: (f64, f64) = (4.0, 48.0);
/// Width of a panel that is not told otherwise, mm.
pub(super) const COLUMN: f64 = 86.0;
/// Widest and highest sheet, mm.
pub(super) const LARGEST: f64 = 5000.0;
/// Most panels of a plate, `a` to `z`; at any size of lettering so many of the usual width stay below the largest sheet.
pub(super) const MOST_PANELS: usize = 26;
/// Smallest field, mm.
pub(super) const SMALLEST_FIELD: f64 = 8.0;
/// Largest deviation of a drawn curve from the true one that the pieces are chosen for, mm.
pub(super) const CURVE_TOLERANCE: f64 = 0.0004;
/// Lengths that differ by less are equal, mm.
pub(super) const HAIR: f64 = 1e-9;

/// Text, base axes, lines at rest in the base frame, events, totals.
pub(super) const INK: Ink = Ink(0, 0, 0);
/// First owner.
pub(super) const BLUE: Ink = Ink(0x23, 0x30, 0x7C);
/// Second owner; `before`.
pub(super) const CLARET: Ink = Ink(0xA3, 0x14, 0x2A);
/// Third owner; `after`.
pub(super) const TEAL: Ink = Ink(0x1B, 0x7D, 0x7E);
/// Arcs and mass shells.
pub(super) const GUIDE: Ink = Ink(0x80, 0x80, 0x80);
/// Light.
pub(super) const OCHRE: Ink = Ink(0xA6, 0x83, 0x1A);
/// Inside of a light cone.
pub(super) const TINT: Ink = Ink(0xFA, 0xF5, 0xE6);
/// Paper, inside hollow things.
pub(super) const PAPER: Ink = Ink(255, 255, 255);
/// Inks of owners, in order.
pub(super) const OWNERS: [Ink; 3] = [BLUE, CLARET, TEAL];

/// Size of an arrowhead, mm.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Head {
    /// Along the arrow.
    pub(super) length: f64,
    /// Across it.
    pub(super) width: f64,
    /// How far its back is hollowed.
    pub(super) notch: f64,
}

/// Widths of strokes, mm.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Strokes {
    /// Arc, shell, cone edge, light line, half tick.
    pub(super) fine: f64,
    /// Axis, tick, total's shell, simultaneity, ring of a reading.
    pub(super) axis: f64,
    /// Light signal.
    pub(super) signal: f64,
    /// Worldline.
    pub(super) world: f64,
    /// Shaft of a filled momentum arrow.
    pub(super) shaft: f64,
    /// Shaft of a hollow one, rims included.
    pub(super) hollow_shaft: f64,
    /// Rim of a hollow one.
    pub(super) rim: f64,
    /// Shaft of the total.
    pub(super) total: f64,
}

/// Everything a panel is drawn by. Fields without a word of their own are mm.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Style {
    /// Lettering relative to the usual 9 pt.
    pub(super) scale: f64,
    /// One em of the lettering.
    pub(super) em: f64,
    /// Stroke widths.
    pub(super) stroke: Strokes,
    /// Heads of axes.
    pub(super) axis_head: Head,
    /// Head in the middle of a signal.
    pub(super) signal_head: Head,
    /// Head of `before`, filled.
    pub(super) before_head: Head,
    /// Head of `after`, hollow.
    pub(super) after_head: Head,
    /// Head of a total, narrow.
    pub(super) total_head: Head,
    /// Taper of an arrow's tail.
    pub(super) taper: f64,
    /// Arrows shorter than this have no head.
    pub(super) headless: f64,
    /// Radius of the dot at a short filled arrow's tip.
    pub(super) dot: f64,
    /// Radius of the ring at a short hollow arrow's tip, to the middle of its rim.
    pub(super) ring: f64,
    /// How far a total's head stands back where it would cover another.
    pub(super) head_back: f64,
    /// Radius of an event's disc.
    pub(super) event: f64,
    /// Across the axis.
    pub(super) tick: f64,
    /// Across the axis, half units.
    pub(super) half_tick: f64,
    /// Half ticks stand where a unit exceeds this; none in large lettering.
    pub(super) half_from: f64,
    /// Ticks closer than this are thinned out.
    pub(super) tick_apart: f64,
    /// Panel's edge to field: left, right, top, bottom.
    pub(super) margins: [f64; 4],
    /// How far an axis passes the field.
    pub(super) past_field: f64,
    /// Between panels.
    pub(super) gutter: f64,
    /// From the level axis down to a fitted field's lower edge.
    pub(super) below_axis: f64,
    /// From the level axis down to the panel's edge, where numbers stand below it.
    pub(super) number_room: f64,
    /// Between what is shown and a fitted field's edge.
    pub(super) air: f64,
    /// Dash of simultaneity: on, off.
    pub(super) dash: [f64; 2],
    /// Dashes of an ink's second and third line.
    pub(super) line_dashes: [[f64; 2]; 2],
    /// An arc's overhang past the base axis and past the tilted one.
    pub(super) overhang: [f64; 2],
    /// From a tilted axis along its arc to the number's middle.
    pub(super) arc_number: f64,
    /// Base numbers with arcs: left of and below an upright axis' tick.
    pub(super) upright_number: [f64; 2],
    /// Base numbers with arcs: left of and below a level axis' tick.
    pub(super) level_number: [f64; 2],
    /// Left of an upright axis, where numbers are centred on their ticks.
    pub(super) centred_number: f64,
    /// How far a number may slide along its axis.
    pub(super) slide: f64,
    /// Axis title: right end left of the upright axis, baseline below its tip.
    pub(super) upright_title: [f64; 2],
    /// Axis title: right end past the level axis' tip, baseline below the axis.
    pub(super) level_title: [f64; 2],
    /// Symbol of a tilted axis: clear of the head's tip, and how far it passes the tip the other way.
    pub(super) symbol_at: [f64; 2],
    /// Least distance of a label to ink.
    pub(super) clear_ink: f64,
    /// Least distance of a label to a label.
    pub(super) clear_label: f64,
    /// Least distance of a label to its panel's edge.
    pub(super) clear_edge: f64,
    /// An event's letter from the event's centre: nearest, step, farthest.
    pub(super) letter: [f64; 3],
    /// A name from its stroke: nearest, farthest wished, farthest.
    pub(super) name: [f64; 3],
    /// A line's name below its upper end.
    pub(super) name_below_end: f64,
    /// Steps between tried places along a stroke.
    pub(super) name_step: f64,
    /// Panel letter: ink below the panel's upper edge.
    pub(super) panel_letter: f64,
    /// Most lengthening of a tilted axis' tick.
    pub(super) tick_stretch: f64,
    /// Where a signal's head stands, as part of its leg, in order of preference.
    pub(super) head_at: [f64; 9],
}

impl Style {
    /// The style of some lettering, pt.
    pub(super) fn new(text: f64) -> Self {
        let k = text / USUAL_TEXT;
        let head = |length: f64, width: f64, notch: f64| Head {
            length: length * k,
            width: width * k,
            notch: notch * k,
        };
        Self {
            scale: k,
            em: text * POINT,
            stroke: Strokes::new(text),
            axis_head: head(2.4, 1.3, 0.5),
            signal_head: head(2.4, 1.5, 0.5),
            before_head: head(2.8, 1.5, 0.6),
            after_head: head(2.8, 1.9, 0.35),
            total_head: head(2.6, 1.25, 0.5),
            taper: 1.6 * k,
            headless: 2.8 * k,
            dot: 0.5 * k,
            ring: 0.42 * k,
            head_back: 3.2 * k,
            event: 0.8 * k,
            tick: 1.8 * k,
            half_tick: 1.0 * k,
            half_from: if text >= LARGE_TEXT {
                f64::INFINITY
            } else {
                20.0 * k
            },
            tick_apart: 12.0 * k,
            margins: [2.5 * k, 5.2 * k, 8.6 * k, 1.6 * k],
            past_field: 3.4 * k,
            gutter: 6.0 * k,
            below_axis: 6.525 * k,
            number_room: 5.6 * k,
            air: 6.4 * k,
            dash: [2.0 * k, 1.0 * k],
            line_dashes: [[4.0 * k, 1.0 * k], [1.0 * k, 1.0 * k]],
            overhang: [4.0 * k, 2.3 * k],
            arc_number: 4.1 * k,
            upright_number: [1.2 * k, 0.75 * k],
            level_number: [0.85 * k, 1.4 * k],
            centred_number: 1.5 * k,
            slide: 0.6 * k,
            upright_title: [1.6 * k, 1.92 * k],
            level_title: [0.4 * k, 3.91 * k],
            symbol_at: [2.2 * k, 0.55 * k],
            clear_ink: 0.45 * k,
            clear_label: 0.9 * k,
            clear_edge: 0.1 * k,
            letter: [1.45 * k, 0.2 * k, 6.0 * k],
            name: [1.2 * k, 1.7 * k, 4.2 * k],
            name_below_end: 2.8 * k,
            name_step: 1.6 * k,
            panel_letter: 0.99 * k,
            tick_stretch: 2.5,
            head_at: [0.6, 0.65, 0.55, 0.7, 0.5, 0.75, 0.45, 0.8, 0.4],
        }
    }

    /// Lettering so large that the plate is to be shown on a wall.
    pub(super) fn is_large(&self) -> bool {
        self.scale * USUAL_TEXT >= LARGE_TEXT
    }
}

/// From here on lettering is for a wall, pt.
const LARGE_TEXT: f64 = 11.0;
/// Weight of strokes on a wall, relative to print.
const LARGE_WEIGHT: f64 = 1.5;
/// The thinnest stroke on a wall, pt.
const LARGE_FLOOR: f64 = 0.75;

impl Strokes {
    /// Widths for some lettering: as in print up to 9 pt, growing to half as much again at 11 pt, with it beyond.
    fn new(text: f64) -> Self {
        let weight = if text <= USUAL_TEXT {
            1.0
        } else if text <= LARGE_TEXT {
            1.0 + (LARGE_WEIGHT - 1.0) * (text - USUAL_TEXT) / (LARGE_TEXT - USUAL_TEXT)
        } else {
            LARGE_WEIGHT * text / LARGE_TEXT
        };
        let floor = if text >= LARGE_TEXT { LARGE_FLOOR } else { 0.0 };
        let wide = |points: f64| (points * weight).max(floor) * POINT;
        let shaft = text / USUAL_TEXT;
        Self {
            fine: wide(0.5),
            axis: wide(0.75),
            signal: wide(1.0),
            world: wide(1.5),
            shaft: 1.25 * POINT * shaft,
            hollow_shaft: 0.78 * shaft,
            rim: 0.6 * POINT * weight.min(shaft.max(1.0)),
            total: 1.0 * POINT * shaft,
        }
    }
}
