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
    /// Natural logarithm of the shown light of 1 cd/m², before the curve that keeps it under 1.
    ln_scale: f64,
}

/// The light levels between which colour vision fades, cd/m²: above the first full, below the
/// second none (CIE 191:2010 puts the ends of the mesopic range at 5 and 0.005).
const FULL_COLOUR: f64 = 3.0;
const NO_COLOUR: f64 = 0.005;

/// Contrast within a picture, as a power of the sky's: the eye adapts to each part of a wide
/// sky, so the glow of dusk neither blinds it to the rest nor turns white.
const CONTRAST: f64 = 0.75;

impl Exposure {
    /// Exposes for a scene whose typical luminance, such as the mean over the sky, is this
    /// (cd/m²).
    ///
    /// A typical patch is shown at 45 % in daylight (3000 cd/m²), and 0.24 of a decade lower for
    /// each decade of luminance: about 20 % with the Sun 2 degrees down, 1 % on a dark night.
    /// These are chosen by eye: a screen cannot follow the sky, only tell how dark it is getting.
    pub fn for_luminance(typical: f64) -> Self {
        let typical = if typical.is_finite() {
            typical.clamp(1e-5, 1e6)
        } else {
            1.0
        };
        let shown = (0.45 * (typical / 3000.0).powf(0.24)).min(0.60);
        // The curve of `linear` maps s to s / (1 + s).
        Self {
            ln_scale: (shown / (1.0 - shown)).ln() - CONTRAST * typical.ln(),
        }
    }
    /// The picture's linear sRGB, each 0 to 1, of a colour X, Y, Z (Y in cd/m²).
    pub fn linear(&self, xyz: [f64; 3]) -> [f64; 3] {
        if !xyz.iter().all(|part| part.is_finite()) {
            return [0.0; 3];
        }
        let y = xyz[1].max(1e-9);
        // Single precision: far finer than a screen's step, and much quicker.
        let ln_y = f64::from((y as f32).ln());
        let s = f64::from(((CONTRAST * ln_y + self.ln_scale) as f32).exp());
        let shown = s / (1.0 + s);
        let mut rgb = linear_srgb_from_xyz(xyz).map(|part| part / y);
        let night = nightly(ln_y);
        for (part, grey) in rgb.iter_mut().zip(NIGHT_GREY) {
            *part += (grey - *part) * night;
        }
        into_gamut(rgb.map(|part| part * shown), shown)
    }
    /// The picture's sRGB bytes of a colour X, Y, Z (Y in cd/m²).
    pub fn srgb(&self, xyz: [f64; 3]) -> [u8; 3] {
        let bytes = srgb_bytes();
        self.linear(xyz).map(|part| {
            // Parts are within 0 to 1, so the cast is safe and short.
            let index = ((part as f32).sqrt() * SRGB_STEPS as f32 + 0.5) as i32 as usize;
            bytes[index.min(SRGB_STEPS)]
        })
    }
}

/// Night vision: a bluish grey, of luminance 1.
const NIGHT_GREY: [f64; 3] = [0.62, 1.00, 2.10];

/// How far the colour of a patch gives way to night vision's, 0 to 0.85: a hint of it is kept.
fn nightly(ln_y: f64) -> f64 {
    let fade = (FULL_COLOUR.ln() - ln_y) / (FULL_COLOUR / NO_COLOUR).ln();
    let fade = fade.clamp(0.0, 1.0);
    0.85 * fade * fade * (3.0 - 2.0 * fade)
}

/// Mixes with grey of the same luminance until no part is below 0 or above 1.
fn into_gamut(rgb: [f64; 3], luminance: f64) -> [f64; 3] {
    let least = rgb[0].min(rgb[1]).min(rgb[2]);
    let most = rgb[0].max(rgb[1]).max(rgb[2]);
    let mut keep: f64 = 1.0;
    if least < 0.0 {
        keep = luminance / (luminance - least);
    }
    if most > 1.0 {
        keep = keep.min((1.0 - luminance) / (most - luminance));
    }
    rgb.map(|part| (luminance + (part - luminance) * keep).clamp(0.0, 1.0))
}

/// Steps of the table of [`srgb_bytes`]: by the square root of the linear value, so that the
/// dark end is as fine as the bright.
const SRGB_STEPS: usize = 4096;

/// The sRGB byte (IEC 61966-2-1) of each linear value (i / steps)².
fn srgb_bytes() -> &'static [u8] {
    static BYTES: OnceLock<Vec<u8>> = OnceLock::new();
    BYTES.get_or_init(|| {
        (0..=SRGB_STEPS)
            .map(|i| {
                let linear = (i as f64 / SRGB_STEPS as f64).powi(2);
                let coded = if linear <= 0.003_130_8 {
                    12.92 * linear
                } else {
                    1.055 * linear.powf(1.0 / 2.4) - 0.055
                };
                (coded * 255.0).round() as u8
            })
            .collect()
    })
}
