//! The map's colours, its picture and its legend.

use super::field::Field;
use crate::app::palette::{Colours, Look};
use eframe::egui::{Color32, ColorImage, lerp};

/// How much of the plan under the map still shows through.
const OPACITY: f32 = 0.78;

/// From night blue over grey blue to amber: brighter and warmer the more minutes. The share is
/// of the range, 0 to 1.
pub fn colour(colours: &Colours, share: f32) -> Color32 {
    let mix = |a: Color32, b: Color32, share: f32| {
        let channel = |a: u8, b: u8| lerp(f32::from(a)..=f32::from(b), share).round() as u8;
        Color32::from_rgb(
            channel(a.r(), b.r()),
            channel(a.g(), b.g()),
            channel(a.b(), b.b()),
        )
    };
    let share = share.clamp(0.0, 1.0);
    if share < 0.5 {
        mix(colours.map_least, colours.map_middle, 2.0 * share)
    } else {
        mix(colours.map_middle, colours.map_most, 2.0 * share - 1.0)
    }
}

/// The share of a range that a number of minutes stands at; where all is one, at the top.
pub fn share((least, most): (f32, f32), minutes: f32) -> f32 {
    if most > least {
        (minutes - least) / (most - least)
    } else {
        1.0
    }
}

/// One pixel to a square, the northern row first; clear where nobody stands.
pub fn image(field: &Field, look: &Look) -> ColorImage {
    let (columns, rows) = (field.columns, field.rows());
    let range = field.range().unwrap_or_default();
    let pixels = (0..rows)
        .rev()
        .flat_map(|row| &field.minutes[row * columns..(row + 1) * columns])
        .map(|minutes| match minutes {
            Some(minutes) => look
                .texel(colour(&look.colours, share(range, *minutes)))
                .gamma_multiply(OPACITY),
            None => Color32::TRANSPARENT,
        })
        .collect();
    ColorImage::new([columns, rows], pixels)
}

#[cfg(test)]
mod tests {
    use super::{colour, image};
    use crate::app::grounds::standing::field::Field;
    use crate::app::palette::{Palette, Theme};
    use crate::place::PlanPoint;
    use eframe::egui::{Color32, Rgba};

    #[test]
    fn more_minutes_are_always_brighter() {
        let palette = Palette::shipped().expect("the shipped palette reads");
        for theme in Theme::ALL {
            let colours = palette.look(theme).colours;
            let light = |k: u8| Rgba::from(colour(&colours, f32::from(k) / 20.0)).intensity();
            for k in 1..=20 {
                assert!(light(k) > light(k - 1), "{theme:?} at {k}");
            }
        }
    }

    #[test]
    fn the_picture_has_north_above_and_nothing_where_nobody_stands() {
        let look = Palette::shipped()
            .expect("the shipped palette reads")
            .look(Theme::Dark);
        let field = Field {
            corner: PlanPoint::new(0.0, 0.0),
            step_m: 1.0,
            columns: 2,
            minutes: vec![Some(10.0), None, Some(20.0), Some(30.0)],
        };
        let image = image(&field, &look);
        assert_eq!(image.size, [2, 2]);
        assert_eq!(image.pixels[3], Color32::TRANSPARENT, "the south-eastern");
        let light = |k: usize| Rgba::from(image.pixels[k]).intensity();
        assert!(light(1) > light(0) && light(0) > light(2));
    }
}
