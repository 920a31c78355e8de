//! What no single number of a site file shows: rules between its fields.

use super::locate::Token;
use super::plan_point::footprint_flaw;
use super::{Extinction, Instrument, PlanPoint, Site, SiteError};

/// A broken rule, and the text of the file that shows it.
pub(super) struct Flaw {
    pub sentence: String,
    pub token: Token,
}

const MOST_SPOTS: usize = 200;
const MOST_OBSTACLES: usize = 2000;
const MOST_EXCLUDED: usize = 200;
const MOST_KIT: usize = 200;
/// As many sectors as anybody can tell apart.
const MOST_SECTORS: usize = 100;

impl Site {
    /// Whether the site, however it came about, can be written to a file and read again.
    ///
    /// # Errors
    /// A number is out of range or a rule between fields is broken; one sentence.
    pub fn check(&self) -> Result<(), SiteError> {
        super::file::reread(self).map(|_| ())
    }
}

impl Site {
    /// The rules between fields alone, quickly: for a site of which every number is known to be
    /// in range, as while something is dragged. [`Site::check`] looks at everything.
    ///
    /// # Errors
    /// The first rule that is broken; one sentence.
    pub fn check_rules(&self) -> Result<(), SiteError> {
        match flaw(self) {
            None => Ok(()),
            Some(flaw) => Err(SiteError(flaw.sentence)),
        }
    }
}

/// The first rule that a site breaks.
pub(super) fn flaw(site: &Site) -> Option<Flaw> {
    air(site)
        .or_else(|| counts(site))
        .or_else(|| spot_names(site))
        .or_else(|| shapes(site))
        .or_else(|| areas(site))
        .or_else(|| spots_within(site))
        .or_else(|| kit_spots(site))
}

fn air(site: &Site) -> Option<Flaw> {
    let total_mag = site.air.extinction_mag?;
    if site.air.haze.is_some() {
        return Some(Flaw {
            sentence: "air has both extinction_mag and haze: keep one".into(),
            token: Token::word("haze"),
        });
    }
    let least_mag = Extinction::of_clean_air(site.elevation_m).total_mag();
    (total_mag < least_mag).then(|| Flaw {
        sentence: format!(
            "extinction_mag is {total_mag}, but clean air at {} m alone takes {:.4}: give that \
             or more",
            site.elevation_m,
            // Rounded up, so that the figure given is accepted.
            (least_mag * 1e4).ceil() / 1e4
        ),
        token: Token::word("extinction_mag"),
    })
}

fn counts(site: &Site) -> Option<Flaw> {
    let too_many = |what: &str, count: usize, most: usize| {
        (count > most).then(|| Flaw {
            sentence: format!("there are {count} {what}, but may be at most {most}"),
            token: Token::word(what),
        })
    };
    too_many("spots", site.spots.len(), MOST_SPOTS)
        .or_else(|| too_many("obstacles", site.obstacles.len(), MOST_OBSTACLES))
        .or_else(|| too_many("excluded", site.excluded.len(), MOST_EXCLUDED))
        .or_else(|| too_many("kit", site.kit.len(), MOST_KIT))
        .or_else(|| {
            let of_spots = site.spots.iter().map(|spot| &spot.skyline_far);
            let mut all = of_spots.chain([&site.skyline_far]);
            all.find_map(|far| too_many("skyline_far", far.len(), MOST_SECTORS))
        })
}

fn spot_names(site: &Site) -> Option<Flaw> {
    let spots = &site.spots;
    let is_repeated = |k: &usize| spots[..*k].iter().any(|spot| spot.name == spots[*k].name);
    (1..spots.len()).find(is_repeated).map(|k| Flaw {
        sentence: format!("there are two spots named {:?}: rename one", spots[k].name),
        token: Token::quoted(&spots[k].name, 1),
    })
}

fn shapes(site: &Site) -> Option<Flaw> {
    site.obstacles.iter().find_map(|obstacle| {
        let flaw = obstacle.flaw()?;
        Some(Flaw {
            sentence: format!("the obstacle {:?} cannot be: {flaw}", obstacle.label()),
            token: Token::quoted(obstacle.label(), 0),
        })
    })
}

/// Excluded areas and the outline of the grounds.
fn areas(site: &Site) -> Option<Flaw> {
    let excluded = site.excluded.iter().find_map(|area| {
        let flaw = footprint_flaw(&area.corners_m)?;
        Some(Flaw {
            sentence: format!("the excluded area {:?} cannot be: {flaw}", area.label),
            token: Token::quoted(&area.label, 0),
        })
    });
    excluded.or_else(|| {
        let flaw = outline_flaw(&site.outline_m)?;
        Some(Flaw {
            sentence: format!("the outline of the grounds cannot be: {flaw}"),
            token: Token::word("outline_m"),
        })
    })
}

fn outline_flaw(outline_m: &[PlanPoint]) -> Option<String> {
    if outline_m.is_empty() {
        return None;
    }
    let flaw = footprint_flaw(outline_m)?;
    Some(flaw.replace("corners_m", "outline_m"))
}

fn spots_within(site: &Site) -> Option<Flaw> {
    site.spots.iter().find_map(|spot| {
        let around = site
            .obstacles
            .iter()
            .find(|obstacle| obstacle.surrounds(spot.plan_point()))?;
        Some(Flaw {
            sentence: format!(
                "the spot {:?} stands inside the obstacle {:?}: move one of them",
                spot.name,
                around.label()
            ),
            token: Token::quoted(&spot.name, 0),
        })
    })
}

fn kit_spots(site: &Site) -> Option<Flaw> {
    let at_no_spot = |instrument: &&Instrument| {
        let name = instrument.spot();
        name.is_some_and(|name| site.spots.iter().all(|spot| spot.name != name))
    };
    let instrument = site.kit.iter().find(at_no_spot)?;
    let name = instrument.spot()?;
    let known: Vec<String> = site
        .spots
        .iter()
        .map(|spot| format!("{:?}", spot.name))
        .collect();
    Some(Flaw {
        sentence: format!(
            "the instrument {:?} stands at the spot {name:?}, but there is none of that name: \
             write one of {}, or leave it out",
            instrument.label(),
            known.join(", ")
        ),
        token: Token::quoted(name, 0),
    })
}
