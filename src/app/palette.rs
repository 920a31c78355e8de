//! Colours and sizes, read once from `assets/look/palette.ron`.

use eframe::egui::{Color32, FontFamily, FontId};
use serde::{Deserialize, Deserializer, Serialize};

/// The family name under which the bold face is registered.
pub const BOLD: &str = "bold";

/// The three ways in which the window is coloured.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "lowercase")]
pub enum Theme {
    /// Light figures on night blue.
    #[default]
    Dark,
    /// Dark figures on warm paper.
    Light,
    /// The dark theme's brightness, dimmed, in red alone: spares eyes that are used to the dark.
    Red,
}

impl Theme {
    /// All of them, in the order of the switch.
    pub const ALL: [Self; 3] = [Self::Dark, Self::Light, Self::Red];
}

/// Everything in the palette file.
#[derive(Clone, Debug, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Palette {
    sizes: Sizes,
    room: Room,
    dark: Colours,
    light: Colours,
}

/// Sizes of type, points.
#[derive(Clone, Copy, Debug, Deserialize)]
#[serde(deny_unknown_fields)]
#[allow(missing_docs)]
pub struct Sizes {
    pub name: f32,
    pub sentence: f32,
    pub control: f32,
    pub label: f32,
    pub least: f32,
}

/// Room around things, points.
#[derive(Clone, Copy, Debug, Deserialize)]
#[serde(deny_unknown_fields)]
#[allow(missing_docs)]
pub struct Room {
    pub outer: f32,
    pub between: f32,
    pub inside: f32,
    pub corner: f32,
}

/// Colours by role; the palette file says what each is for.
#[derive(Clone, Copy, Debug, Deserialize)]
#[serde(deny_unknown_fields)]
#[allow(missing_docs)]
pub struct Colours {
    #[serde(deserialize_with = "hex")]
    pub ground: Color32,
    #[serde(deserialize_with = "hex")]
    pub card: Color32,
    #[serde(deserialize_with = "hex")]
    pub line: Color32,
    #[serde(deserialize_with = "hex")]
    pub text: Color32,
    #[serde(deserialize_with = "hex")]
    pub lesser: Color32,
    #[serde(deserialize_with = "hex")]
    pub chosen: Color32,
    #[serde(deserialize_with = "hex")]
    pub chosen_ground: Color32,
    #[serde(deserialize_with = "hex")]
    pub on_chosen: Color32,
    #[serde(deserialize_with = "hex")]
    pub keen: Color32,
    #[serde(deserialize_with = "hex")]
    pub passer_by: Color32,
    #[serde(deserialize_with = "hex")]
    pub caution: Color32,
    #[serde(deserialize_with = "hex")]
    pub seen: Color32,
    #[serde(deserialize_with = "hex")]
    pub too_bright: Color32,
    #[serde(deserialize_with = "hex")]
    pub hidden: Color32,
    #[serde(deserialize_with = "hex")]
    pub idle: Color32,
    #[serde(deserialize_with = "hex")]
    pub body: Color32,
    #[serde(deserialize_with = "hex")]
    pub sun: Color32,
    #[serde(deserialize_with = "hex")]
    pub orbit: Color32,
    #[serde(deserialize_with = "hex")]
    pub skyline: Color32,
    #[serde(deserialize_with = "hex")]
    pub skyline_name: Color32,
    #[serde(deserialize_with = "hex")]
    pub sky_text: Color32,
    #[serde(deserialize_with = "hex")]
    pub sky_shade: Color32,
    #[serde(deserialize_with = "hex")]
    pub disc_shade: Color32,
    #[serde(deserialize_with = "hex")]
    pub disc_lit: Color32,
    #[serde(deserialize_with = "hex")]
    pub strip_high: Color32,
    #[serde(deserialize_with = "hex")]
    pub strip_low: Color32,
    #[serde(deserialize_with = "hex")]
    pub map_least: Color32,
    #[serde(deserialize_with = "hex")]
    pub map_middle: Color32,
    #[serde(deserialize_with = "hex")]
    pub map_most: Color32,
}

/// The palette as one theme shows it: cheap to copy, handed to everything that draws.
#[derive(Clone, Copy, Debug)]
pub struct Look {
    /// Which theme.
    pub theme: Theme,
    /// Its colours. In the red theme they are the dark theme's: what is drawn with them is
    /// turned red after drawing ([`red_of_same_brightness`]); only pixels of textures must
    /// be handed over as brightness ([`Look::texel`]).
    pub colours: Colours,
    /// Sizes of type.
    pub sizes: Sizes,
    /// Room around things.
    pub room: Room,
}

impl Palette {
    /// The palette that the program ships.
    ///
    /// # Errors
    /// The file is not one: a mistake in the program, found by a test.
    pub fn shipped() -> Result<Self, ron::error::SpannedError> {
        ron::from_str(include_str!("../../assets/look/palette.ron"))
    }

    /// As one theme shows it.
    pub fn look(&self, theme: Theme) -> Look {
        Look {
            theme,
            colours: match theme {
                Theme::Light => self.light,
                Theme::Dark | Theme::Red => self.dark,
            },
            sizes: self.sizes,
            room: self.room,
        }
    }
}

impl Look {
    /// The regular face.
    pub fn font(&self, size: f32) -> FontId {
        FontId::new(size.max(self.sizes.least), FontFamily::Proportional)
    }
    /// The bold face.
    pub fn bold(&self, size: f32) -> FontId {
        FontId::new(size.max(self.sizes.least), FontFamily::Name(BOLD.into()))
    }
    /// A texture's pixel in this theme. A textured shape keeps only its texture's red channel
    /// once it is turned red, so the red theme's texels are grey of the same brightness.
    pub fn texel(&self, colour: Color32) -> Color32 {
        match self.theme {
            Theme::Red => {
                let [r, g, b, a] = colour.to_array();
                let grey = brightness(r, g, b);
                Color32::from_rgba_premultiplied(grey, grey, grey, a)
            }
            Theme::Dark | Theme::Light => colour,
        }
    }
}

/// The red theme's rendering of a colour: its brightness, dimmed, in the red channel alone.
pub fn red_of_same_brightness(colour: Color32) -> Color32 {
    /// Red light spares the eye only while it is dim.
    const DIMMED: f32 = 0.85;
    /// Dark reds are told apart less well than dark blues, so the dark end is spread.
    const SPREAD: f32 = 0.85;
    let [r, g, b, a] = colour.to_array();
    let share = f32::from(brightness(r, g, b)) / 255.0;
    let red = 255.0 * DIMMED * share.powf(SPREAD);
    // Colours are premultiplied: red never exceeds the opacity.
    Color32::from_rgba_premultiplied((red.round() as u8).min(a), 0, 0, a)
}

/// Luma by the weights of ITU-R BT.709, which are the sRGB primaries'.
fn brightness(r: u8, g: u8, b: u8) -> u8 {
    (0.2126 * f32::from(r) + 0.7152 * f32::from(g) + 0.0722 * f32::from(b)).round() as u8
}

fn hex<'de, D: Deserializer<'de>>(deserializer: D) -> Result<Color32, D::Error> {
    let text = String::deserialize(deserializer)?;
    Color32::from_hex(&text)
        .map_err(|_| serde::de::Error::custom(format!("\"{text}\" is not a colour #rrggbb")))
}

#[cfg(test)]
mod tests {
    use super::{Palette, Theme, red_of_same_brightness};
    use eframe::egui::Color32;

    fn palette() -> Palette {
        Palette::shipped().expect("the shipped palette reads")
    }

    /// Relative luminance and contrast ratio by WCAG 2.1.
    fn contrast(a: Color32, b: Color32) -> f32 {
        let luminance = |colour: Color32| {
            let linear = eframe::egui::Rgba::from(colour);
            0.2126 * linear.r() + 0.7152 * linear.g() + 0.0722 * linear.b()
        };
        let (a, b) = (luminance(a) + 0.05, luminance(b) + 0.05);
        a.max(b) / a.min(b)
    }

    #[test]
    fn text_stands_out_from_its_ground_in_dark_and_light() {
        for theme in [Theme::Dark, Theme::Light] {
            let colours = palette().look(theme).colours;
            for (name, text) in [
                ("text", colours.text),
                ("lesser", colours.lesser),
                ("chosen", colours.chosen),
                ("caution", colours.caution),
                ("keen", colours.keen),
            ] {
                for ground in [colours.ground, colours.card] {
                    // 4.5 is WCAG 2.1's level AA for text of any size.
                    let ratio = contrast(text, ground);
                    assert!(ratio >= 4.5, "{name} in {theme:?}: {ratio:.1}");
                }
            }
        }
    }

    #[test]
    fn no_type_is_smaller_than_eleven_points() {
        let look = palette().look(Theme::Dark);
        assert_eq!(look.sizes.least, 11.0);
        assert_eq!(look.font(3.0).size, 11.0);
    }

    #[test]
    fn red_keeps_the_order_of_brightness_and_nothing_else() {
        let mut last = 0;
        for grey in 0..=255 {
            let [r, g, b, a] = red_of_same_brightness(Color32::from_gray(grey)).to_array();
            assert_eq!((g, b, a), (0, 0, 255));
            assert!(r >= last, "grey {grey}");
            last = r;
        }
    }
}
