//! The map's colours, its picture and its legend.

use crate::app::palette::{Colours, Look};
use crate::plan::standing::StandingMap;
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

/// Fewest and most minutes of what is known; `None` where nobody stands anywhere.
pub fn range(map: &StandingMap) -> Option<(f64, f64)> {
    map.stays().fold(None, |range, (_, stay)| match range {
        None => Some((stay.minutes, stay.minutes)),
        Some((least, most)) => Some((stay.minutes.min(least), stay.minutes.max(most))),
    })
}

/// Round minutes to draw lines at: a handful within a range.
pub fn levels((least, most): (f64, f64)) -> Vec<f64> {
    const MOST_LINES: f64 = 6.0;
    const STEPS: [f64; 10] = [1.0, 2.0, 5.0, 10.0, 15.0, 20.0, 30.0, 60.0, 120.0, 240.0];
    let step = STEPS
        .into_iter()
        .find(|step| (most - least) / step <= MOST_LINES)
        .unwrap_or(480.0);
    let first = (least / step).floor() as i32 + 1;
    (first..)
        .map(|count| f64::from(count) * step)
        .take_while(|level| *level < most)
        .collect()
}

/// The share of a range that a number of minutes stands at; where all is one, at the top,
/// or at the foot where it is none.
pub fn share((least, most): (f64, f64), minutes: f64) -> f32 {
    if most > least {
        ((minutes - least) / (most - least)) as f32
    } else if most > 0.0 {
        1.0
    } else {
        // Nowhere is anything seen: nothing of it is amber.
        0.0
    }
}

/// One pixel to a square, the northern row first; clear where nobody stands. A square that waits
/// has the colour of the coarser one that stands for it.
pub fn image(map: &StandingMap, range: (f64, f64), look: &Look) -> ColorImage {
    let (columns, rows) = (map.raster.columns, map.raster.rows);
    let pixel = |row: usize, column: usize| match map.shown(column, row).stay() {
        Some(stay) => look
            .texel(colour(&look.colours, share(range, stay.minutes)))
            .gamma_multiply(OPACITY),
        None => Color32::TRANSPARENT,
    };
    let pixels = (0..rows)
        .rev()
        .flat_map(|row| (0..columns).map(move |column| pixel(row, column)))
        .collect();
    ColorImage::new([columns, rows], pixels)
}

#[cfg(test)]
mod tests {
    use super::{colour, levels, share};
    use crate::app::palette::{Palette, Theme};
    use eframe::egui::Rgba;

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
    fn lines_are_round_minutes_inside_the_range() {
        assert_eq!(levels((3.2, 8.9)), [4.0, 5.0, 6.0, 7.0, 8.0]);
        assert_eq!(levels((0.0, 95.0)), [20.0, 40.0, 60.0, 80.0]);
        assert_eq!(levels((5.0, 5.0)), [] as [f64; 0], "all is one");
        for (least, most) in [(0.0, 3000.0), (11.0, 47.0), (0.3, 0.9)] {
            let levels = levels((least, most));
            assert!(levels.len() <= 7, "{levels:?}");
            assert!(levels.iter().all(|level| *level > least && *level < most));
        }
        assert_eq!(share((10.0, 20.0), 15.0), 0.5);
        assert_eq!(share((10.0, 10.0), 10.0), 1.0);
        assert_eq!(share((0.0, 0.0), 0.0), 0.0, "nothing seen is not the best");
    }
}
