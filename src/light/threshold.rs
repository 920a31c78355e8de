//! The least light that an eye detects against a background.
//!
//! Source: Crumey 2014 (MNRAS 442, 2600), fitted to Blackwell 1946 and Knoll et al. 1946, from
//! starlight to daylight, the place known. One observer differs from another by a factor of the
//! light, the field factor F; here it is 1 (the laboratory's half of all trials).

/// Coefficients of Crumey's eq. 34: luminance in cd/m², illuminance in lux.
const A: [f64; 5] = [5.949e-8, -2.389e-7, 2.459e-7, 4.120e-4, -4.225e-4];

/// Coefficients of the contrast threshold of a very large target.
const B: [f64; 5] = [9.606e-6, -6.337e-5, 1.092e-4, 5.791e-3, -6.177e-3];

/// Below this the eye's own darkness is the background; cd/m².
const DARKEST: f64 = 1e-5;

/// Between these luminances eq. 34 asks for less light against a brighter sky, by 0.03 mag at
/// most; the threshold is held at its value at the first.
const PLATEAU: [f64; 2] = [0.021_567, 0.065_021];

/// Zero point: V = 0 outside the atmosphere, in lux, is 10^(-0.4 * 13.99) (Crumey 2014).
const ZERO_POINT_MAG: f64 = -13.99;

/// The magnitude of a point that gives this illuminance, lux.
pub fn magnitude_from_lux(illuminance_lx: f64) -> f64 {
    ZERO_POINT_MAG - 2.5 * illuminance_lx.log10()
}

/// Illuminance from a point of this magnitude, lux.
pub fn lux_from_magnitude(magnitude: f64) -> f64 {
    10f64.powf(0.4 * (ZERO_POINT_MAG - magnitude))
}

/// Eq. 34: threshold illuminance of a point, lux, against a background in cd/m².
fn eq_34(luminance: f64) -> f64 {
    let root = luminance.sqrt();
    let fourth = root.sqrt();
    let under = A[0] * root + A[1] * root * fourth + A[2] * luminance;
    let sum = under.max(0.0).sqrt() + A[3] * fourth + A[4] * root;
    sum * sum
}

/// Threshold illuminance of a point for F = 1, lux, against a background in cd/m²: eq. 34, never
/// falling with luminance.
pub fn point_lx(luminance: f64) -> f64 {
    let luminance = luminance.max(DARKEST);
    let threshold = eq_34(luminance);
    if luminance > PLATEAU[0] && luminance < PLATEAU[1] {
        threshold.max(eq_34(PLATEAU[0]))
    } else {
        threshold
    }
}

/// Threshold illuminance for F = 1, lux, of a target that covers `area_arcmin2` evenly, against
/// a background in cd/m². A small target counts as a point, a large one by its contrast.
///
/// Source: Crumey 2014, the threshold curve C = ((R/A)^q + C∞^q)^(1/q) for round targets;
/// a crescent is taken as a round target of the same area.
pub fn extended_lx(luminance: f64, area_arcmin2: f64) -> f64 {
    let luminance = luminance.max(DARKEST);
    let point = point_lx(luminance);
    if area_arcmin2 <= 0.0 {
        return point;
    }
    const ARCMIN2_PER_STERADIAN: f64 = 1.181_834e7;
    let even = luminance * area_arcmin2 / ARCMIN2_PER_STERADIAN;
    let fourth = luminance.powf(-0.25);
    let root = fourth * fourth;
    let large = (B[0] * root + B[1] * fourth + B[2]).max(0.0).sqrt() + B[3] * fourth + B[4];
    let log = luminance.log10();
    // Crumey gives q in three pieces that meet at 0.193 and 3.426 cd/m².
    let q = (0.8861 + 0.4 * log).min(1.146 - 0.0885 * log).max(0.6);
    (point.powf(q) + (large * even).powf(q)).powf(1.0 / q)
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Eq. 34 first falls at one end of the plateau and is back at that value at the other.
    #[test]
    fn the_plateau_holds_where_the_published_curve_dips() {
        let peak = eq_34(PLATEAU[0]);
        assert!(
            eq_34(PLATEAU[0] * 0.99) < peak,
            "still rising before the plateau"
        );
        assert!(eq_34(PLATEAU[0] * 1.01) < peak, "falling after its start");
        assert!(eq_34(PLATEAU[1] * 1.001) > peak, "above it at its end");
        assert!(eq_34(PLATEAU[1] * 0.999) < peak, "not sooner");
    }
}
