//! The desk's colours, sizes and type: the only place where they stand. Lengths are points.

use egui::{
    Color32, Context, CornerRadius, FontData, FontDefinitions, FontFamily, FontId, Margin, Shadow,
    Stroke, Style, TextStyle, Theme, Vec2, Visuals,
};

/// Colours by role.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Palette {
    /// Regions.
    pub(crate) panel: Color32,
    /// Round the paper.
    pub(crate) ground: Color32,
    /// Inside an entry field.
    pub(crate) field: Color32,
    /// Text.
    pub(crate) text: Color32,
    /// Captions and facts beside names.
    pub(crate) quiet: Color32,
    /// Text of what cannot be used now.
    pub(crate) disabled: Color32,
    /// What acts.
    pub(crate) accent: Color32,
    /// Text on the accent.
    pub(crate) on_accent: Color32,
    /// A selected row, the chosen one of a segment; never alone.
    pub(crate) wash: Color32,
    /// Under the pointer.
    pub(crate) hover: Color32,
    /// Edge of a control.
    pub(crate) edge: Color32,
    /// Divides, nothing else.
    pub(crate) hairline: Color32,
    /// Rules of tables, the paper's edge.
    pub(crate) rule: Color32,
    /// Faults, nothing else.
    pub(crate) fault: Color32,
}

const fn rgb(hex: u32) -> Color32 {
    Color32::from_rgb(
        (hex >> 16 & 0xff) as u8,
        (hex >> 8 & 0xff) as u8,
        (hex & 0xff) as u8,
    )
}

const LIGHT: Palette = Palette {
    panel: rgb(0xF3F5F6),
    ground: rgb(0xD5DADD),
    field: rgb(0xFFFFFF),
    text: rgb(0x172026),
    quiet: rgb(0x4D5B64),
    disabled: rgb(0x7D8991),
    accent: rgb(0x00677A),
    on_accent: rgb(0xFFFFFF),
    wash: rgb(0xD3E7EB),
    hover: rgb(0xE4E9EB),
    edge: rgb(0x68757D),
    hairline: rgb(0xCDD4D8),
    rule: rgb(0x7F8B92),
    fault: rgb(0xB42318),
};

const DARK: Palette = Palette {
    panel: rgb(0x1F262A),
    ground: rgb(0x13181B),
    field: rgb(0x161B1E),
    text: rgb(0xE6EBEE),
    quiet: rgb(0xA9B5BC),
    disabled: rgb(0x6F7B82),
    accent: rgb(0x58C4D6),
    on_accent: rgb(0x0B1417),
    wash: rgb(0x1E4048),
    hover: rgb(0x2A3338),
    edge: rgb(0x7C8A92),
    hairline: rgb(0x374147),
    rule: rgb(0x66737A),
    fault: rgb(0xFF8F80),
};

/// The paper, in both themes.
pub(crate) const PAPER: [u8; 3] = [0xFF, 0xFF, 0xFF];
/// Panel mark and outlines on paper, in both themes.
pub(crate) const ON_PAPER: Color32 = rgb(0x00677A);
/// The band under what is selected on paper, in both themes.
pub(crate) const SELECTION: [u8; 3] = [0x54, 0x99, 0xA8];
/// Width of that band.
pub(crate) const BAND: f32 = 7.0;

/// The colours of a theme.
pub(crate) fn palette(visuals: &Visuals) -> &'static Palette {
    if visuals.dark_mode { &DARK } else { &LIGHT }
}

/// The window as it opens.
pub(crate) const WINDOW: [f32; 2] = [1440.0, 900.0];
/// The smallest window.
pub(crate) const WINDOW_MIN: [f32; 2] = [900.0, 640.0];
/// From this width on the window is not cramped.
pub(crate) const WIDE: f32 = 1400.0;
/// Inner margin of a region.
pub(crate) const MARGIN: f32 = 16.0;
/// Inner margin of list and ledger.
pub(crate) const MARGIN_SMALL: f32 = 12.0;
/// Height of fields and buttons.
pub(crate) const CONTROL: f32 = 24.0;
/// Radius of controls and rows.
pub(crate) const RADIUS: u8 = 4;
/// Stroke of focus and panel marks.
pub(crate) const FOCUS: f32 = 2.0;

/// Sizes of type.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) enum Type {
    /// Title of an empty page.
    Title,
    /// An object's name in the particulars.
    Name,
    /// Body, fields, numbers, menus.
    Body,
    /// Body, for sums and what is selected.
    BodyStrong,
    /// Captions, heads, names and numbers of the rail.
    Caption,
    /// Captions, for heads and what is active.
    CaptionStrong,
}

impl Type {
    /// Its font.
    pub(crate) fn font(self) -> FontId {
        let (size, strong) = match self {
            Self::Title => (20.0, true),
            Self::Name => (16.0, true),
            Self::Body => (13.0, false),
            Self::BodyStrong => (13.0, true),
            Self::Caption => (12.0, false),
            Self::CaptionStrong => (12.0, true),
        };
        FontId::new(
            size,
            if strong {
                semibold()
            } else {
                FontFamily::Proportional
            },
        )
    }

    /// Body or its strong form.
    pub(crate) fn body(strong: bool) -> Self {
        if strong { Self::BodyStrong } else { Self::Body }
    }

    /// Caption or its strong form.
    pub(crate) fn caption(strong: bool) -> Self {
        if strong {
            Self::CaptionStrong
        } else {
            Self::Caption
        }
    }
}

/// The family of Open Sans Semibold.
pub(crate) fn semibold() -> FontFamily {
    FontFamily::Name("semibold".into())
}

/// Gives a context the desk's type and colours, light and dark.
pub fn install(ctx: &Context) {
    ctx.set_fonts(fonts());
    ctx.style_mut_of(Theme::Light, |style| dress(style, &LIGHT));
    ctx.style_mut_of(Theme::Dark, |style| dress(style, &DARK));
    ctx.options_mut(|options| {
        options.fallback_theme = Theme::Light;
        options.zoom_with_keyboard = false;
    });
}

fn fonts() -> FontDefinitions {
    let regular = FontData::from_static(include_bytes!("fonts/OpenSans-Regular.ttf"));
    let strong = FontData::from_static(include_bytes!("fonts/OpenSans-Semibold.ttf"));
    let mut fonts = FontDefinitions::empty();
    fonts.font_data.insert("regular".into(), regular.into());
    fonts.font_data.insert("semibold".into(), strong.into());
    for (family, name) in [
        (FontFamily::Proportional, "regular"),
        (FontFamily::Monospace, "regular"),
        (semibold(), "semibold"),
    ] {
        fonts.families.insert(family, vec![name.into()]);
    }
    fonts
}

fn dress(style: &mut Style, colours: &Palette) {
    style.text_styles = [
        (TextStyle::Heading, Type::Name.font()),
        (TextStyle::Body, Type::Body.font()),
        (TextStyle::Button, Type::Body.font()),
        (TextStyle::Monospace, Type::Body.font()),
        (TextStyle::Small, Type::Caption.font()),
    ]
    .into();
    style.spacing.item_spacing = Vec2::new(8.0, 4.0);
    style.spacing.button_padding = Vec2::new(10.0, 3.0);
    style.spacing.interact_size = Vec2::new(CONTROL, CONTROL);
    style.spacing.menu_margin = Margin::same(4);
    style.spacing.window_margin = Margin::same(16);
    style.spacing.scroll.floating = true;
    style.interaction.tooltip_delay = 0.4;
    style.visuals.dark_mode = colours.panel == DARK.panel;
    dress_surfaces(&mut style.visuals, colours);
    dress_widgets(&mut style.visuals, colours);
}

fn dress_surfaces(visuals: &mut Visuals, colours: &Palette) {
    visuals.override_text_color = None;
    visuals.weak_text_color = Some(colours.quiet);
    visuals.hyperlink_color = colours.accent;
    visuals.panel_fill = colours.panel;
    visuals.window_fill = colours.panel;
    visuals.window_stroke = Stroke::new(1.0, colours.edge);
    visuals.window_shadow = Shadow::NONE;
    visuals.popup_shadow = Shadow::NONE;
    visuals.window_corner_radius = CornerRadius::same(RADIUS);
    visuals.menu_corner_radius = CornerRadius::same(RADIUS);
    visuals.extreme_bg_color = colours.field;
    visuals.text_edit_bg_color = Some(colours.field);
    visuals.faint_bg_color = colours.hover;
    visuals.error_fg_color = colours.fault;
    visuals.warn_fg_color = colours.quiet;
    visuals.selection.bg_fill = colours.wash;
    visuals.selection.stroke = Stroke::new(FOCUS, colours.accent);
}

fn dress_widgets(visuals: &mut Visuals, colours: &Palette) {
    let radius = CornerRadius::same(RADIUS);
    let widgets = &mut visuals.widgets;
    for state in [
        &mut widgets.noninteractive,
        &mut widgets.inactive,
        &mut widgets.hovered,
        &mut widgets.active,
        &mut widgets.open,
    ] {
        state.corner_radius = radius;
        state.expansion = 0.0;
        state.fg_stroke = Stroke::new(1.0, colours.text);
        state.bg_stroke = Stroke::new(1.0, colours.edge);
        state.bg_fill = colours.panel;
        state.weak_bg_fill = colours.panel;
    }
    widgets.noninteractive.bg_stroke = Stroke::new(1.0, colours.hairline);
    widgets.hovered.weak_bg_fill = colours.hover;
    widgets.hovered.bg_fill = colours.hover;
    widgets.active.weak_bg_fill = colours.wash;
    widgets.active.bg_fill = colours.wash;
    widgets.open.weak_bg_fill = colours.wash;
    widgets.open.bg_fill = colours.wash;
}
