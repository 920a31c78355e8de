//! TT - UT1 over the supported years.
//!
//! | years | from | good to |
//! | --- | --- | --- |
//! | 1600 to 1962 | the cubics of Morrison, Stephenson, Hohenkerk and Zawilski 2021 (Proc. R. Soc. A 477, 20200776, Table S15.2020) | 20 s in 1600, 1 s in 1800, 0.5 s after 1900 |
//! | 1962 to autumn 2027 | values every 30 days from IERS EOP 20 C04, the last year a Bulletin A prediction | 0.006 s (interpolation; 0.03 s at the end) |
//! | to 2400 | one cubic that leaves the table with the mean slope of its last five years and meets the long-term parabola of Stephenson, Morrison and Hohenkerk 2016 (Proc. R. Soc. A 472, 20160404) in 2500, slope included | unknown: 2 s in 2035, minutes by 2300 |
//!
//! The cubics of 2021 end 0.38 s below the first IERS value; that difference is let in linearly
//! from 1950 on, so that there is no step. The Earth's rotation cannot be predicted: the last
//! line of the table is a stated choice, not knowledge, and [`delta_t_uncertainty_s`] says how
//! far off it may be. Data and their maker stand in `assets/delta_t`.

use super::Tt;

/// One cubic of the 2021 table: first year, last year, then a3, a2, a1 and a0.
type Cubic = (f64, f64, f64, f64, f64, f64);

const CUBICS: &[Cubic] = &include!("../../assets/delta_t/splines.in");
const OBSERVED_S: &[f64] = &include!("../../assets/delta_t/observed.in");

/// 1962-01-01 0h (MJD 37665), the first observed value.
const OBSERVED_START: Tt = Tt::from_julian_date(2_437_665.5);
const OBSERVED_STEP_DAYS: f64 = 30.0;
const OBSERVED_START_YEAR: f64 = 1962.0;
/// Where the difference between the cubics and the first observed value begins to be let in.
const BLEND_START_YEAR: f64 = 1950.0;
/// Where the future's cubic meets the long-term parabola; beyond every supported year.
const PARABOLA_YEAR: f64 = 2500.0;

/// TT - UT1, seconds. Continuous; before 1600 and after 2400 the outermost pieces run on and
/// mean nothing.
pub fn delta_t_s(tt: Tt) -> f64 {
    let step = (tt.days_since_j2000() - OBSERVED_START.days_since_j2000()) / OBSERVED_STEP_DAYS;
    if step < 0.0 {
        historical_s(tt.decimal_year())
    } else if step <= (OBSERVED_S.len() - 1) as f64 {
        observed_s(step)
    } else {
        future_s(tt.decimal_year())
    }
}

/// Standard error of [`delta_t_s`], seconds.
///
/// Before 1962: straight lines through the errors commonly quoted with the historical tables
/// (20 s in 1600, 5 s in 1700, 1 s in 1800, 0.5 s from 1900; from memory of the published
/// lists, so a guide only). After the table: the random-walk estimate of Huber for a span of
/// N years, 365.25 N sqrt(N Q / 3 (1 + N / M)) / 1000 with Q = 0.058 ms²/year and M = 2500
/// years (from memory).
pub fn delta_t_uncertainty_s(tt: Tt) -> f64 {
    const QUOTED: [(f64, f64); 5] = [
        (1600.0, 20.0),
        (1700.0, 5.0),
        (1800.0, 1.0),
        (1900.0, 0.5),
        (OBSERVED_START_YEAR, 0.5),
    ];
    const OBSERVED: f64 = 0.01;
    let year = tt.decimal_year();
    if year < OBSERVED_START_YEAR {
        let line = QUOTED.windows(2).find(|ends| year < ends[1].0);
        line.map_or(OBSERVED, |ends| {
            let share = ((year - ends[0].0) / (ends[1].0 - ends[0].0)).max(0.0);
            ends[0].1 + share * (ends[1].1 - ends[0].1)
        })
    } else {
        let years = (year - observed_end_year()).max(0.0);
        let walk = years * 0.058 / 3.0 * (1.0 + years / 2500.0);
        OBSERVED + 365.25 * years * walk.sqrt() / 1000.0
    }
}

/// The cubics of 2021, led to the first observed value.
fn historical_s(year: f64) -> f64 {
    let end = OBSERVED_START_YEAR;
    let share = ((year - BLEND_START_YEAR) / (end - BLEND_START_YEAR)).max(0.0);
    spline_s(year) + share * (OBSERVED_S[0] - spline_s(end))
}

fn spline_s(year: f64) -> f64 {
    let index = CUBICS.partition_point(|cubic| cubic.1 < year);
    let (first, last, a3, a2, a1, a0) = CUBICS[index.min(CUBICS.len() - 1)];
    let t = (year - first) / (last - first);
    a0 + t * (a1 + t * (a2 + t * a3))
}

/// Cubic interpolation with slopes from the neighbours (Catmull-Rom); within 0.006 s of the
/// daily series.
fn observed_s(step: f64) -> f64 {
    let last = OBSERVED_S.len() - 1;
    let k = (step as usize).min(last - 1);
    let (start, end) = (OBSERVED_S[k], OBSERVED_S[k + 1]);
    let start_slope = if k == 0 {
        end - start
    } else {
        0.5 * (end - OBSERVED_S[k - 1])
    };
    let end_slope = if k + 1 == last {
        end - start
    } else {
        0.5 * (OBSERVED_S[k + 2] - start)
    };
    hermite(step - k as f64, (start, start_slope), (end, end_slope))
}

/// From the table's end to the long-term parabola.
fn future_s(year: f64) -> f64 {
    // About five years: longer than the seasons' swing, so that it does not set the slope.
    const STEPS_BACK: usize = 61;
    let start = observed_end_year();
    let width = PARABOLA_YEAR - start;
    let last = OBSERVED_S[OBSERVED_S.len() - 1];
    let earlier = OBSERVED_S[OBSERVED_S.len() - 1 - STEPS_BACK];
    let slope = (last - earlier) * 365.25 / (STEPS_BACK as f64 * OBSERVED_STEP_DAYS);
    // Stephenson, Morrison and Hohenkerk 2016: -320 + 32.5 ((year - 1825) / 100)^2.
    let centuries = (PARABOLA_YEAR - 1825.0) / 100.0;
    let parabola = -320.0 + 32.5 * centuries * centuries;
    let parabola_slope = 2.0 * 32.5 * centuries / 100.0;
    hermite(
        (year - start) / width,
        (last, slope * width),
        (parabola, parabola_slope * width),
    )
}

fn observed_end_year() -> f64 {
    OBSERVED_START
        .plus_days((OBSERVED_S.len() - 1) as f64 * OBSERVED_STEP_DAYS)
        .decimal_year()
}

/// The cubic on [0, 1] with given values and slopes at both ends.
fn hermite(t: f64, (start, start_slope): (f64, f64), (end, end_slope): (f64, f64)) -> f64 {
    let rise = end - start;
    let a2 = 3.0 * rise - 2.0 * start_slope - end_slope;
    let a3 = start_slope + end_slope - 2.0 * rise;
    start + t * (start_slope + t * (a2 + t * a3))
}
