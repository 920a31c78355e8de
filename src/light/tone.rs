//! From the sky's colour to a screen's.
//!
//! A screen shows a hundredfold range, the sky a thousand million. The sky is exposed for the
//! eye's state, which follows its luminance only in part, so the picture darkens through dusk
//! as the scene is felt to; and below the light that cones need it loses its colour and turns
//! bluish, as night vision does.

use std::sync::OnceLock;

/// Linear sRGB of CIE 1931 X, Y, Z (IEC 61966-2-1); parts may be negative outside the gamut.
pub fn linear_srgb_from_xyz([x, y, z]: [f64; 3]) -> [f64; 3] {
    [
        3.2406 * x - 1.5372 * y - 0.4986 * z,
        -0.9689 * x + 1.8758 * y + 0.0415 * z,
        0.0557 * x - 0.2040 * y + 1.0570 * z,
    ]
}

/// How a scene is exposed: made once per picture.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Exposure {
    scale: f64,
    /// 0: colours as by day; 1: none left.
    night: f64,
}

/// The light levels between which colour vision fades, cd/m²: above the first full, below the
/// second none (CIE 191:2010 puts the ends of the mesopic range at 5 and 0.005).
const FULL_COLOUR: f64 = 3.0;
const NO_COLOUR: f64 = 0.005;

impl Exposure {
    /// Exposes for a scene whose typical luminance, such as the mean of the logarithm over the
    /// picture, is this (cd/m²).
    ///
    /// A typical patch is shown at 40 % in daylight (3000 cd/m²), and 0.19 of a decade lower for
    /// each decade of luminance: about 10 % at sunset less 3 degrees, 1 % on a dark night.
    pub fn for_luminance(typical: f64) -> Self {
        let typical = if typical.is_finite() {
            typical.clamp(1e-5, 1e6)
        } else {
            1.0
        };
        let shown = (0.40 * (typical / 3000.0).powf(0.22)).min(0.60);
        // The curve of `linear` maps scale * Y = s to s / (1 + s).
        let fade = (FULL_COLOUR / typical).log10() / (FULL_COLOUR / NO_COLOUR).log10();
        let night = fade.clamp(0.0, 1.0);
        Self {
            scale: shown / (1.0 - shown) / typical,
            night: night * night * (3.0 - 2.0 * night),
        }
    }
    /// The picture's linear sRGB, each 0 to 1, of a colour X, Y, Z (Y in cd/m²).
    pub fn linear(&self, xyz: [f64; 3]) -> [f64; 3] {
        let is_light = xyz.iter().all(|part| part.is_finite());
        let xyz = if is_light { xyz } else { [0.0; 3] };
        let y = xyz[1].max(1e-9);
        let s = self.scale * y;
        let shown = s / (1.0 + s);
        let mut rgb = linear_srgb_from_xyz(xyz).map(|part| part / y);
        // Night vision: a bluish grey of the same luminance.
        const NIGHT_GREY: [f64; 3] = [0.78, 1.00, 1.55];
        for (part, grey) in rgb.iter_mut().zip(NIGHT_GREY) {
            *part += (grey - *part) * self.night * 0.85;
        }
        into_gamut(rgb.map(|part| part * shown), shown)
    }
    /// The picture's sRGB bytes of a colour X, Y, Z (Y in cd/m²).
    pub fn srgb(&self, xyz: [f64; 3]) -> [u8; 3] {
        self.linear(xyz).map(encoded)
    }
}

/// Mixes with grey of the same luminance until no part is below 0 or above 1.
fn into_gamut(rgb: [f64; 3], luminance: f64) -> [f64; 3] {
    let mut keep: f64 = 1.0;
    for part in rgb {
        if part < 0.0 {
            keep = keep.min(luminance / (luminance - part));
        } else if part > 1.0 {
            keep = keep.min((1.0 - luminance) / (part - luminance));
        }
    }
    rgb.map(|part| (luminance + (part - luminance) * keep).clamp(0.0, 1.0))
}

/// The sRGB byte of a linear value from 0 to 1, from a table fine enough for every byte.
fn encoded(linear: f64) -> u8 {
    const STEPS: usize = 4096;
    static BYTES: OnceLock<Vec<u8>> = OnceLock::new();
    // By the square root, so that the dark end is as fine as the bright.
    let bytes = BYTES.get_or_init(|| {
        (0..=STEPS)
            .map(|i| {
                let value = (i as f64 / STEPS as f64).powi(2);
                let coded = if value <= 0.003_130_8 {
                    12.92 * value
                } else {
                    1.055 * value.powf(1.0 / 2.4) - 0.055
                };
                (coded * 255.0).round() as u8
            })
            .collect()
    });
    let index = (linear.clamp(0.0, 1.0).sqrt() * STEPS as f64 + 0.5) as usize;
    bytes[index.min(STEPS)]
}
