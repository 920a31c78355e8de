//! Events as a page: one line each, in a visitor's words.

use super::Listed;
use crate::cli::page::{Page, Side};
use crate::measure::{Angle, CivilScale};
use crate::plan::phenomena::{Contact, Event, MOON_RADIUS_KM, SUN_SEMIDIAMETER_ARCSEC};
use crate::words::{Words, decimal};

pub(super) fn page(words: &Words, listed: &Listed) -> String {
    let mut page = Page::default();
    for caution in listed.cautions() {
        page.line(&words.text(caution));
    }
    page.gap();
    let dates = [
        ("from", words.weekday_date(listed.from)),
        ("to", words.weekday_date(listed.to)),
    ];
    page.line(&match &listed.site_name {
        None => words.text_with("phenomena-title", &dates),
        Some(site) => {
            let [from, to] = dates;
            words.text_with("phenomena-title-site", &[from, to, ("site", site.clone())])
        }
    });
    let clock = listed.clock;
    page.line(&words.text_with("phenomena-clock", &[("zone", clock.zone.name())]));
    let is_ut1 = |event: &Event| clock.scales.civil(event.moment).1 == CivilScale::Ut1;
    if listed.events.iter().any(is_ut1) {
        page.line(&words.text("clock-is-ut1"));
    }
    if listed.site_name.is_some() {
        page.line(&words.text("phenomena-altitude-note"));
    }
    page.gap();
    if listed.events.is_empty() {
        page.line(&words.text("phenomena-none"));
    } else {
        table(&mut page, words, listed);
    }
    for event in &listed.events {
        if !event.contacts.is_empty() || !event.local_contacts.is_empty() {
            contacts(&mut page, words, listed, event);
        }
    }
    page.text()
}

/// A transit's contacts beneath the table: the site's, or
/// else those for the Earth's centre.
fn contacts(page: &mut Page, words: &Words, listed: &Listed, event: &Event) {
    page.gap();
    let title = [
        ("body", words.body(event.body)),
        ("date", words.weekday_date(listed.clock.date(event.moment))),
        ("sun", decimal(SUN_SEMIDIAMETER_ARCSEC, 2)),
        ("moon", decimal(MOON_RADIUS_KM, 1)),
        ("radius", decimal(event.body.equatorial_radius_km(), 1)),
    ];
    page.line(&if event.is_transit() {
        words.text_with("phenomena-transit-title", &title)
    } else {
        words.text_with("phenomena-occultation-title", &title)
    });
    let contacts = match event.local {
        None => &event.contacts,
        Some(_) => &event.local_contacts,
    };
    let mut head = vec![
        words.text("column-contact"),
        words.text("column-time"),
        words.text("column-separation"),
        words.text("column-position-angle"),
    ];
    if event.local.is_some() {
        head.extend([
            words.text("column-altitude"),
            words.text("column-sun-altitude"),
        ]);
    }
    let rows: Vec<Vec<String>> = contacts
        .iter()
        .map(|contact| contact_row(words, listed, contact))
        .collect();
    page.table(
        &head,
        &rows,
        &[Side::Left, Side::Right, Side::Right, Side::Right],
    );
}

fn contact_row(words: &Words, listed: &Listed, contact: &Contact) -> Vec<String> {
    let local = listed.clock.local(contact.moment);
    let mut row = vec![
        words.text(&format!(
            "contact-{}",
            contact.name.name().to_lowercase().replace('_', "-")
        )),
        local.format("%-H:%M:%S").to_string(),
        words.text_with(
            "arcseconds",
            &[("arcseconds", decimal(contact.separation.arcsec(), 1))],
        ),
        words.degrees(contact.position_angle, 1),
    ];
    row.extend(
        contact
            .local
            .map(|local| altitude(words, local.sun_altitude, local.is_clear)),
    );
    row
}

/// An altitude, and whether it is hidden.
fn altitude(words: &Words, altitude: Angle, is_clear: bool) -> String {
    let altitude = words.degrees(altitude, 0);
    if is_clear {
        altitude
    } else {
        words.text_with("phenomena-hidden", &[("altitude", altitude)])
    }
}

fn table(page: &mut Page, words: &Words, listed: &Listed) {
    let mut head = vec![
        words.text("column-date"),
        words.text("column-time"),
        words.text("column-event"),
        words.text("column-value"),
    ];
    let mut sides = vec![Side::Right, Side::Right, Side::Left, Side::Left];
    if listed.site_name.is_some() {
        head.extend([
            words.text("column-altitude"),
            words.text("column-sun-altitude"),
        ]);
        sides.extend([Side::Left, Side::Right]);
    }
    let rows: Vec<Vec<String>> = listed
        .events
        .iter()
        .map(|event| row(words, listed, event))
        .collect();
    page.table(&head, &rows, &sides);
}

fn row(words: &Words, listed: &Listed, event: &Event) -> Vec<String> {
    let minute = listed.clock.minute(event.moment);
    let mut row = vec![
        words.weekday_date(minute.date()),
        words.clock_time(minute.time()),
        words.event(event),
        words.event_value(event.value),
    ];
    if let Some(local) = &event.local {
        row.push(altitude(words, local.place.altitude, local.is_clear));
        row.push(words.degrees(local.sun_altitude, 0));
    }
    row
}
