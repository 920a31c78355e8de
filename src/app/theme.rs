//! The look put into the window library: fonts, widget colours, and the red theme.

use super::palette::{BOLD, Look, Theme, red_of_same_brightness};
use eframe::egui::epaint::shape_transform::adjust_colors;
use eframe::egui::{
    self, Color32, Context, CornerRadius, FontData, FontDefinitions, FontFamily, Margin, Shadow,
    Stroke, TextStyle, Visuals, vec2,
};
use std::sync::Arc;
use std::sync::atomic::{AtomicBool, Ordering};

/// Registers the shipped faces in front of the library's own.
pub fn install_fonts(ctx: &Context) {
    let mut fonts = FontDefinitions::default();
    let faces: [(&str, &'static [u8]); 2] = [
        (
            "regular",
            include_bytes!("../../assets/fonts/DejaVuSans.ttf"),
        ),
        (
            BOLD,
            include_bytes!("../../assets/fonts/DejaVuSans-Bold.ttf"),
        ),
    ];
    for (name, bytes) in faces {
        let face = Arc::new(FontData::from_static(bytes));
        fonts.font_data.insert(name.to_owned(), face);
    }
    let fallback = fonts.families.get(&FontFamily::Proportional).cloned();
    for family in [FontFamily::Proportional, FontFamily::Monospace] {
        fonts
            .families
            .entry(family)
            .or_default()
            .insert(0, "regular".to_owned());
    }
    let mut bold = vec![BOLD.to_owned(), "regular".to_owned()];
    bold.extend(fallback.unwrap_or_default());
    fonts.families.insert(FontFamily::Name(BOLD.into()), bold);
    ctx.set_fonts(fonts);
}

/// Colours every widget and sets the sizes of type.
pub fn apply(ctx: &Context, look: &Look) {
    let theme = match look.theme {
        Theme::Light => egui::Theme::Light,
        Theme::Dark | Theme::Red => egui::Theme::Dark,
    };
    ctx.set_theme(theme);
    ctx.set_visuals_of(theme, visuals(look, theme));
    let sizes = look.sizes;
    ctx.all_styles_mut(|style| {
        for (text_style, size) in [
            (TextStyle::Small, sizes.label),
            (TextStyle::Body, sizes.control),
            (TextStyle::Button, sizes.control),
            (TextStyle::Monospace, sizes.control),
            (TextStyle::Heading, sizes.name),
        ] {
            style.text_styles.insert(text_style, look.font(size));
        }
        style.spacing.item_spacing = vec2(8.0, 8.0);
        style.spacing.button_padding = vec2(9.0, 6.0);
        style.spacing.interact_size.y = 30.0;
        style.spacing.menu_margin = Margin::same(look.room.inside as i8);
        // Over the content, so that cards keep one width whether or not they scroll, yet seen.
        style.spacing.scroll = egui::style::ScrollStyle {
            dormant_handle_opacity: 0.6,
            ..egui::style::ScrollStyle::floating()
        };
        // Nothing moves but what the host moves.
        style.animation_time = 0.0;
    });
}

fn visuals(look: &Look, theme: egui::Theme) -> Visuals {
    let colours = &look.colours;
    let mut visuals = match theme {
        egui::Theme::Dark => Visuals::dark(),
        egui::Theme::Light => Visuals::light(),
    };
    let corner = CornerRadius::same(look.room.corner as u8);
    let line = Stroke::new(1.0, colours.line);
    visuals.override_text_color = None;
    visuals.weak_text_color = Some(colours.lesser);
    visuals.panel_fill = colours.ground;
    visuals.window_fill = colours.card;
    visuals.window_stroke = line;
    visuals.window_corner_radius = corner;
    visuals.menu_corner_radius = corner;
    visuals.extreme_bg_color = colours.ground;
    visuals.faint_bg_color = colours.card;
    visuals.hyperlink_color = colours.chosen;
    visuals.error_fg_color = colours.caution;
    visuals.warn_fg_color = colours.caution;
    visuals.window_shadow = Shadow::NONE;
    visuals.popup_shadow = Shadow {
        offset: [0, 4],
        blur: 12,
        spread: 0,
        color: Color32::from_black_alpha(90),
    };
    visuals.selection.bg_fill = colours.chosen_ground;
    visuals.selection.stroke = Stroke::new(1.5, colours.chosen);
    visuals.text_cursor.stroke = Stroke::new(2.0, colours.chosen);
    let widgets = &mut visuals.widgets;
    for (widget, fill, stroke, text) in [
        (
            &mut widgets.noninteractive,
            colours.card,
            line,
            colours.text,
        ),
        (&mut widgets.inactive, colours.card, line, colours.text),
        (
            &mut widgets.hovered,
            colours.chosen_ground,
            Stroke::new(1.0, colours.lesser),
            colours.text,
        ),
        (
            &mut widgets.active,
            colours.chosen_ground,
            Stroke::new(1.5, colours.chosen),
            colours.text,
        ),
        (&mut widgets.open, colours.chosen_ground, line, colours.text),
    ] {
        widget.bg_fill = fill;
        widget.weak_bg_fill = fill;
        widget.bg_stroke = stroke;
        widget.fg_stroke = Stroke::new(1.0, text);
        widget.corner_radius = corner;
        widget.expansion = 0.0;
    }
    visuals
}

/// Turns every shape of every frame red while it is on.
pub struct RedLight {
    /// Whether it is.
    pub is_on: Arc<AtomicBool>,
}

impl egui::Plugin for RedLight {
    fn debug_name(&self) -> &'static str {
        "red light"
    }

    fn output_hook(&mut self, _ctx: &Context, output: &mut egui::FullOutput) {
        if !self.is_on.load(Ordering::Relaxed) {
            return;
        }
        for clipped in &mut output.shapes {
            adjust_colors(&mut clipped.shape, |colour| {
                if *colour != Color32::PLACEHOLDER {
                    *colour = red_of_same_brightness(*colour);
                }
            });
        }
    }
}
