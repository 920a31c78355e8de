//! The first and last days on which a body is seen beside the Sun.
//!
//! The arcus visionis is the Sun's geometric depression while the body stands on the horizon, on
//! the first or the last such day. It tests extinction, the sky over the Sun, and the threshold
//! at once.

use crate::document::{assert_documented, table};
use crate::published::sky;
use dimmet::light::{Eye, Eyes, SkyLight, Target};
use dimmet::measure::{Angle, TimeScales, Tt};
use dimmet::sky::{Air, Body, Ephemeris, Observer, Span, stars};

const LATITUDE_DEG: f64 = 32.5;

/// Steps through a night's edge, minutes.
const STEP_MINUTES: f64 = 3.0;

/// Days looked at: half a year of Saturn's, so that its rings count as open as they are in the
/// mean, and one round of Mars's oppositions.
const DAYS: i32 = 15 * 365;

/// Farther from the Sun than this nothing has its first or last day (Sirius stands 40 deg off
/// the ecliptic).
const FARTHEST_DEG: f64 = 35.0;
const FARTHEST_SIRIUS_DEG: f64 = 55.0;

/// One end of a body's visibility.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum End {
    MorningFirst,
    MorningLast,
    EveningFirst,
    EveningLast,
}

/// Published arcus visionis, degrees. Planets: the constants of modern work on Babylonian dates
/// (after Schoch's table of the 1920s); from memory for Sirius (8.5 to 9.4, modern sightings).
const PUBLISHED: [(Who, End, f64); 14] = [
    (Who::Planet(Body::Venus), End::MorningFirst, 5.7),
    (Who::Planet(Body::Venus), End::MorningLast, 6.0),
    (Who::Planet(Body::Venus), End::EveningFirst, 6.0),
    (Who::Planet(Body::Venus), End::EveningLast, 5.2),
    (Who::Planet(Body::Jupiter), End::MorningFirst, 9.3),
    (Who::Planet(Body::Jupiter), End::EveningLast, 7.4),
    (Who::Sirius, End::MorningFirst, 9.0),
    (Who::Planet(Body::Mercury), End::MorningFirst, 13.0),
    (Who::Planet(Body::Mercury), End::MorningLast, 9.5),
    (Who::Planet(Body::Mercury), End::EveningFirst, 10.5),
    (Who::Planet(Body::Mercury), End::EveningLast, 11.0),
    (Who::Planet(Body::Saturn), End::MorningFirst, 13.0),
    (Who::Planet(Body::Saturn), End::EveningLast, 10.0),
    (Who::Planet(Body::Mars), End::MorningFirst, 14.5),
];
const MARS_EVENING_LAST: (Who, End, f64) = (Who::Planet(Body::Mars), End::EveningLast, 13.2);

#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum Who {
    Planet(Body),
    Sirius,
}

impl Who {
    fn name(self) -> String {
        match self {
            Self::Planet(body) => body.name().to_owned(),
            Self::Sirius => "Sirius".to_owned(),
        }
    }
}

impl End {
    fn name(self) -> &'static str {
        match self {
            Self::MorningFirst => "morning first",
            Self::MorningLast => "morning last",
            Self::EveningFirst => "evening first",
            Self::EveningLast => "evening last",
        }
    }
}

const WHO: [Who; 6] = [
    Who::Planet(Body::Venus),
    Who::Planet(Body::Jupiter),
    Who::Sirius,
    Who::Planet(Body::Mercury),
    Who::Planet(Body::Saturn),
    Who::Planet(Body::Mars),
];

/// What one edge of a night shows of a body.
#[derive(Clone, Copy, Debug)]
struct Look {
    /// The best margin of a keen eye there, for each sky.
    margins: [f64; 3],
    /// The Sun's depression when the body is on the horizon, degrees; NaN if it is not then.
    depression_deg: f64,
    /// Whether the body was near enough to the Sun to be looked at.
    is_near: bool,
}

impl Look {
    const NONE: Self = Self {
        margins: [-99.0; 3],
        depression_deg: f64::NAN,
        is_near: false,
    };
}

struct Watch {
    span: Span,
    observer: Observer,
    skies: [SkyLight; 3],
}

impl Watch {
    fn new() -> Self {
        let span = Ephemeris::new()
            .cover(day(0), day(DAYS + 2), &Body::ALL)
            .unwrap();
        Self {
            span,
            observer: Observer {
                latitude: Angle::from_degrees(LATITUDE_DEG),
                longitude: Angle::ZERO,
                elevation_m: 50.0,
                air: Air::default(),
            },
            skies: [0.06, 0.11, 0.16].map(|aerosol_mag| sky(aerosol_mag, 50.0, 21.7)),
        }
    }
    /// Both edges of the night whose noon is `number` days on: evening, then morning.
    fn night(&self, number: i32, sirius: &stars::Star) -> [[Look; 6]; 2] {
        let mut looks = [[Look::NONE; 6]; 2];
        let scales = TimeScales::new();
        let at = |minutes: f64| {
            let days = day(number).days_since_j2000() + minutes / 1440.0;
            self.span
                .at(scales.moment_from_tt(Tt::from_days_since_j2000(days)))
        };
        let midnight = at(720.0);
        let near = WHO.map(|who| match who {
            Who::Planet(body) => midnight.appearance(body).elongation.degrees() < FARTHEST_DEG,
            Who::Sirius => {
                let sun = midnight.geocentric(Body::Sun).direction;
                let sirius = midnight.star(sirius).direction;
                sun.angle_to(sirius).degrees() < FARTHEST_SIRIUS_DEG
            }
        });
        if !near.contains(&true) {
            return looks;
        }
        let gaze = Eyes::default().gaze(Eye::Keen);
        let mut before: Option<(f64, [f64; 6])> = None;
        for step in 0..(1440.0 / STEP_MINUTES) as i32 {
            let minutes = f64::from(step) * STEP_MINUTES;
            // The Sun is up, or deep down, for all of these at this latitude.
            if (0.0..270.0).contains(&minutes)
                || (550.0..890.0).contains(&minutes)
                || minutes > 1170.0
            {
                before = None;
                continue;
            }
            let is_morning = usize::from(minutes > 720.0);
            let epoch = at(minutes);
            let view = epoch.seen_by(&self.observer);
            let sun = view.place(Body::Sun);
            let sun_deg = sun.altitude.degrees();
            if !(-20.0..1.0).contains(&sun_deg) {
                before = None;
                continue;
            }
            let glows = [0, 1, 2]
                .map(|i| self.skies[i].at(sun.altitude.radians(), sun.azimuth.radians(), None));
            let mut altitudes = [90.0; 6];
            for (i, who) in WHO.into_iter().enumerate().filter(|(i, _)| near[*i]) {
                let airless = match who {
                    Who::Planet(body) => view.place(body),
                    Who::Sirius => view.horizontal(view.star(sirius).direction),
                };
                altitudes[i] = airless.altitude.degrees();
                let look = &mut looks[is_morning][i];
                look.is_near = true;
                if let Some((sun_before, before)) = before
                    && before[i] * altitudes[i] <= 0.0
                {
                    let part = before[i] / (before[i] - altitudes[i]);
                    look.depression_deg = -(sun_before + part * (sun_deg - sun_before));
                }
                let refracted = view.refracted(airless);
                if !(0.0..20.0).contains(&refracted.altitude.degrees()) || sun_deg > -0.83 {
                    continue;
                }
                let magnitude = match who {
                    Who::Planet(body) => view.appearance(body).magnitude.value().unwrap(),
                    Who::Sirius => sirius.magnitude,
                };
                let target = Target::point(
                    magnitude,
                    refracted.altitude.radians(),
                    refracted.azimuth.radians(),
                );
                for (best, glow) in look.margins.iter_mut().zip(&glows) {
                    *best = best.max(glow.margin(&target, &gaze).margin_mag);
                }
            }
            before = Some((sun_deg, altitudes));
        }
        looks
    }
}

fn day(number: i32) -> Tt {
    // Noon at longitude 0.
    Tt::from_days_since_j2000(1461.0 + f64::from(number))
}

/// Mean depression over all such days and the three hazes, and how many there were.
fn arcus(nights: &[[[Look; 6]; 2]], who: Who, end: End) -> (f64, usize) {
    let i = WHO.iter().position(|other| *other == who).unwrap();
    let edge = usize::from(matches!(end, End::MorningFirst | End::MorningLast));
    let is_first = matches!(end, End::MorningFirst | End::EveningFirst);
    let mut found = Vec::new();
    for haze in 0..3 {
        for pair in nights.windows(2) {
            let [a, b] = [pair[0][edge][i], pair[1][edge][i]];
            let [seen_before, seen_after] = [a, b].map(|look| look.margins[haze] >= 0.0);
            let day = match (seen_before, seen_after) {
                (false, true) if is_first => b,
                (true, false) if !is_first => a,
                _ => continue,
            };
            if a.is_near && b.is_near && day.depression_deg.is_finite() {
                found.push(day.depression_deg);
            }
        }
    }
    (found.iter().sum::<f64>() / found.len() as f64, found.len())
}

#[test] // 2 deg per body, 3.5 deg per row, 1 deg in the mean: the sources differ by as much
fn bodies_come_and_go_beside_the_sun_as_published() {
    let watch = Watch::new();
    let sirius = stars::star_named("Sirius").unwrap();
    let nights: Vec<_> = (0..DAYS)
        .map(|number| watch.night(number, sirius))
        .collect();
    let mut rows = Vec::new();
    for (who, end, published) in PUBLISHED.into_iter().chain([MARS_EVENING_LAST]) {
        let (model, count) = arcus(&nights, who, end);
        assert!(count >= 20, "{who:?} {end:?}: only {count} such days");
        rows.push((who, end, published, model));
    }
    let mean = |values: Vec<f64>| values.iter().sum::<f64>() / values.len() as f64;
    for (who, end, published, model) in &rows {
        assert!(
            (model - published).abs() <= 3.5,
            "{who:?} {end:?}: {model:.1}, published {published}"
        );
    }
    let of = |who: Who| {
        let of_body = rows.iter().filter(move |row| row.0 == who);
        (
            mean(of_body.clone().map(|row| row.3).collect()),
            mean(of_body.map(|row| row.2).collect()),
        )
    };
    for who in WHO {
        let (model, published) = of(who);
        assert!(
            (model - published).abs() <= 2.0,
            "{who:?}: {model:.1}, published {published:.1}"
        );
    }
    let signed = mean(rows.iter().map(|row| row.3 - row.2).collect());
    assert!(signed.abs() < 1.0, "mean signed error {signed:.2}");
    let order: Vec<f64> = WHO
        .into_iter()
        .filter(|who| *who != Who::Sirius)
        .map(|who| of(who).0)
        .collect();
    assert!(
        order.windows(2).all(|pair| pair[0] < pair[1]),
        "Venus, Jupiter, Mercury, Saturn, Mars: {order:.1?}"
    );
    let mut table_rows: Vec<[String; 4]> = rows
        .iter()
        .map(|(who, end, published, model)| {
            [
                who.name(),
                end.name().to_owned(),
                format!("{model:.1}"),
                format!("{published:.1}"),
            ]
        })
        .collect();
    table_rows.push([
        "all".into(),
        "mean error".into(),
        format!("{signed:+.1}"),
        String::new(),
    ]);
    let head = ["body", "day", "model", "published"];
    assert_documented("arcus", &table(head, &table_rows));
}
