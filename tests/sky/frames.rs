//! Precession, nutation and sidereal time against IAU SOFA's test values (t_sofa_c.c, as the
//! crate `sofars` carries them in its own tests).

use crate::common::assert_within;
use dimmet::measure::{Chebyshev, Moment, Tt, Ut1};
use dimmet::sky::frame::{self, Frame};
use std::f64::consts::PI;

/// Modified Julian Date, as SOFA's tests give their dates.
fn days_from_mjd(mjd: f64) -> f64 {
    mjd - 51_544.5
}

#[test]
fn nutation_and_equation_of_the_equinoxes_match_sofa() {
    let terms = frame::nutation(Tt::from_days_since_j2000(days_from_mjd(53_736.0)));
    assert_within(terms.x, -0.963_091_202_582_031e-5, 1e-13, "t_nut06a dpsi");
    assert_within(terms.y, 0.406_323_849_688_724_97e-4, 1e-13, "t_nut06a deps");
    // The difference of two sidereal times: rounding leaves 1e-14.
    assert_within(terms.z, -0.883_419_507_204_379e-5, 1e-14, "t_ee06a");
}

#[test]
fn bias_precession_nutation_matches_sofa() {
    let tt = Tt::from_days_since_j2000(days_from_mjd(50_123.999_9));
    let moment = Moment::new(tt, Ut1::from_days_since_j2000(tt.days_since_j2000()));
    let matrix = Frame::new(moment, frame::nutation(tt)).true_from_icrs;
    let expected = [
        [
            0.999_999_583_279_420_5,
            0.837_238_277_263_096_2e-3,
            0.363_968_477_114_062_3e-3,
        ],
        [
            -0.837_253_374_474_368_4e-3,
            0.999_999_648_649_286_2,
            0.413_290_594_461_101_95e-4,
        ],
        [
            -0.363_933_746_962_946_5e-3,
            -0.416_337_760_591_066_4e-4,
            0.999_999_932_909_426,
        ],
    ];
    for (row, expected_row) in matrix.0.iter().zip(expected) {
        for (actual, expected) in row.iter().zip(expected_row) {
            assert_within(*actual, expected, 1e-13, "t_pnm06a");
        }
    }
}

#[test]
fn apparent_sidereal_time_matches_sofa() {
    let days = days_from_mjd(53_736.0);
    let (tt, ut1) = (
        Tt::from_days_since_j2000(days),
        Ut1::from_days_since_j2000(days),
    );
    let frame = Frame::new(Moment::new(tt, ut1), frame::nutation(tt));
    // A Julian date in one number is good to 1e-10 rad.
    assert_within(
        frame.sidereal_time.radians(),
        1.754_166_137_675_019,
        1e-10,
        "t_gst06a",
    );
}

// The issue is rounding and fitting, so the pieces are compared with the series itself; a
// milliarcsecond is what the places need.
#[test]
fn nutation_pieces_keep_within_a_milliarcsecond() {
    let milliarcsecond = PI / 180.0 / 3.6e6;
    for start in [-146_000.0, -3000.0, 9400.0, 146_000.0] {
        let series = |days| frame::nutation(Tt::from_days_since_j2000(days));
        let (length, nodes) = (frame::NUTATION_PIECE_DAYS, frame::NUTATION_PIECE_NODES);
        let piece = Chebyshev::fit(start, length, nodes, series);
        for step in 0..=50 {
            let days = start + length * f64::from(step) / 50.0;
            let error = piece.value(days) - series(days);
            assert_within(
                error.length(),
                0.0,
                0.05 * milliarcsecond,
                "piece of the nutation",
            );
        }
    }
}
