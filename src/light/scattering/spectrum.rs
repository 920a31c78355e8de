//! Spectra: the Sun's, the scattering and absorption of air, haze and ozone, and the eye's.

/// How many wavelengths a spectrum holds.
pub const WAVELENGTHS: usize = 16;

/// One value per wavelength: 400, 420 ... 700 nm.
pub type Spectrum = [f32; WAVELENGTHS];

/// The step between wavelengths, nm.
const STEP_NM: f64 = 20.0;

/// The Sun's irradiance outside the atmosphere, W m⁻² nm⁻¹, averaged over 20 nm.
///
/// From memory of the published reference spectra (Thuillier et al. 2003; ASTM E-490). Folded
/// with the eye's response it gives 133.6 klx; the solar illuminance constant is 133.1 klx
/// (IESNA handbook).
pub const SUN: Spectrum = [
    1.50, 1.75, 1.83, 2.05, 2.04, 1.94, 1.86, 1.88, 1.83, 1.84, 1.76, 1.69, 1.62, 1.53, 1.47, 1.42,
];

/// Ozone's absorption cross section (Chappuis bands), 10⁻²¹ cm², from memory of Serdyuchenko et
/// al. 2014 (Atmos. Meas. Tech. 7, 625) at about 230 K.
const OZONE_CROSS_SECTION: Spectrum = [
    0.01, 0.04, 0.13, 0.36, 0.71, 1.23, 1.77, 2.90, 3.88, 4.60, 5.05, 4.00, 2.95, 2.10, 1.36, 0.87,
];

/// CIE 1931 colour-matching functions for the 2 degree observer (CIE 15), each 20 nm.
const MATCHING: [[f32; 3]; WAVELENGTHS] = [
    [0.0143, 0.0004, 0.0679],
    [0.1344, 0.0040, 0.6456],
    [0.3483, 0.0230, 1.7471],
    [0.2908, 0.0600, 1.6692],
    [0.0956, 0.1390, 0.8130],
    [0.0049, 0.3230, 0.2720],
    [0.0633, 0.7100, 0.0782],
    [0.2904, 0.9540, 0.0203],
    [0.5945, 0.9950, 0.0039],
    [0.9163, 0.8700, 0.0017],
    [1.0622, 0.6310, 0.0008],
    [0.8544, 0.3810, 0.0002],
    [0.4479, 0.1750, 0.0000],
    [0.1649, 0.0610, 0.0000],
    [0.0468, 0.0170, 0.0000],
    [0.0114, 0.0041, 0.0000],
];

fn wavelength_um(index: usize) -> f64 {
    0.400 + STEP_NM * 1e-3 * index as f64
}

fn spectrum(value: impl Fn(usize) -> f64) -> Spectrum {
    std::array::from_fn(|index| value(index) as f32)
}

/// Vertical optical depth of the whole clear air at sea level (1013.25 hPa), by scattering.
///
/// Source: Hansen and Travis 1974, Space Sci. Rev. 16, 527, eq. 2.30. At 0.55 µm 0.0973, that is
/// 0.1056 mag, beside Schaefer's 0.1066 in V.
pub fn air_depth() -> Spectrum {
    spectrum(|index| {
        let s = wavelength_um(index).powi(-2);
        0.008569 * s * s * (1.0 + 0.0113 * s + 0.00013 * s * s)
    })
}

/// Optical depth of haze relative to that at 0.55 µm: λ^-1.3 (Ångström; exponent as Schaefer).
pub fn haze_depth() -> Spectrum {
    spectrum(|index| (wavelength_um(index) / 0.55).powf(-1.3))
}

/// Vertical optical depth of the ozone layer, scaled so that its extinction folded with the
/// eye's response to sunlight is 0.031 mag (Schaefer's V value; about 300 Dobson units).
pub fn ozone_depth() -> Spectrum {
    let weight = |index: usize| f64::from(MATCHING[index][1] * SUN[index]);
    let total: f64 = (0..WAVELENGTHS).map(weight).sum();
    let mean: f64 = (0..WAVELENGTHS)
        .map(|i| weight(i) * f64::from(OZONE_CROSS_SECTION[i]))
        .sum::<f64>()
        / total;
    let scale = 0.031 / (2.5 * std::f64::consts::LOG10_E) / mean;
    spectrum(|index| f64::from(OZONE_CROSS_SECTION[index]) * scale)
}

/// CIE 1931 XYZ of a spectral radiance (W m⁻² sr⁻¹ nm⁻¹); Y in cd/m².
pub fn xyz(radiance: &Spectrum) -> [f64; 3] {
    std::array::from_fn(|axis| {
        let sum: f32 = (0..WAVELENGTHS)
            .map(|i| radiance[i] * MATCHING[i][axis])
            .sum();
        683.0 * STEP_NM * f64::from(sum)
    })
}

/// e^x to 2e-7, written so that a whole spectrum is done at once; 0 below -87.
#[inline(always)]
pub fn exp(x: f32) -> f32 {
    // Adding 1.5 * 2^23 rounds to a whole number and leaves it in the low bits.
    const ROUND: f32 = 12_582_912.0;
    let y = (x * std::f32::consts::LOG2_E).clamp(-126.0, 126.0);
    let rounded = y + ROUND;
    let f = (y - (rounded - ROUND)) * std::f32::consts::LN_2;
    let power = f32::from_bits((rounded.to_bits() << 23).wrapping_add(0x3f80_0000));
    let series = 1.0
        + f * (1.0
            + f * (0.5
                + f * (1.0 / 6.0 + f * (1.0 / 24.0 + f * (1.0 / 120.0 + f * (1.0 / 720.0))))));
    power * series
}
