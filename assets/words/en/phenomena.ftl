# Dated events: the page, and what each kind means in a visitor's words.

phenomena-title = Events from { $from } to { $to }, as seen from the Earth’s centre
phenomena-title-site = Events from { $from } to { $to }, and where their planets then stand at { $site }
phenomena-none = No planet has an event in these days.
phenomena-clock = Times are those of { $zone }.
phenomena-altitude-note = Altitudes are without refraction.
phenomena-reversed = --to is { $to }, but must not be before --from, which is { $from }
phenomena-no-planet = --body is { $body }, but must be one of { $known }, or with --site moon
phenomena-hidden = { $altitude }, hidden
phenomena-transit-title = Transit of { $body }, { $date } (Sun { $sun }″ at 1 au, planet { $radius } km)

phenomena-occultation-title = { $body } behind the Moon, { $date } (Moon { $moon } km, planet { $radius } km, mean limb)
contact-first-touch = the Moon touches the disc
contact-disappearance = its centre is covered
contact-reappearance = its centre is uncovered
contact-last-touch = the disc is clear again
contact-i = I, first touch
contact-ii = II, wholly on the disc
contact-greatest = deepest
contact-iii = III, reaches the limb
contact-iv = IV, off the disc

column-contact = contact
column-separation = from centre
column-position-angle = position angle
column-date = date
column-time = time
column-event = event
column-value = value
column-sun-altitude = Sun

# One line for each kind.
phenomena-kind-inferior-conjunction-lon = { $body } passes between the Earth and the Sun, from the evening sky to the morning sky (in longitude)
phenomena-kind-inferior-conjunction-ra = { $body } passes between the Earth and the Sun (in right ascension)
phenomena-kind-superior-conjunction-lon = { $body } passes behind the Sun, from the morning sky to the evening sky (in longitude)
phenomena-kind-superior-conjunction-ra = { $body } passes behind the Sun (in right ascension)
phenomena-kind-conjunction-lon = { $body } is lost behind the Sun (in longitude)
phenomena-kind-conjunction-ra = { $body } is lost behind the Sun (in right ascension)
phenomena-kind-opposition-lon = { $body } stands opposite the Sun and is up all night (in longitude)
phenomena-kind-opposition-ra = { $body } stands opposite the Sun (in right ascension)
phenomena-kind-greatest-elongation-e = { $body } is farthest from the Sun in the evening sky
phenomena-kind-greatest-elongation-w = { $body } is farthest from the Sun in the morning sky
phenomena-kind-stationary-ra-then-westward = { $body } stands still among the stars and turns back west
phenomena-kind-stationary-ra-then-eastward = { $body } stands still among the stars and goes on east
phenomena-kind-dichotomy-e = { $body } shows a half disc in the telescope, waning towards a crescent
phenomena-kind-dichotomy-w = { $body } shows a half disc in the telescope, filling up
phenomena-kind-greatest-illuminated-extent-e = { $body } shows its largest lit area as an evening crescent
phenomena-kind-greatest-illuminated-extent-w = { $body } shows its largest lit area as a morning crescent
phenomena-kind-magnitude-minimum-e = { $body } shines brightest in the evening sky
phenomena-kind-magnitude-minimum-w = { $body } shines brightest in the morning sky
phenomena-kind-perigee = { $body } is nearest to the Earth
phenomena-kind-apogee = { $body } is farthest from the Earth
phenomena-kind-ring-opening-greatest = { $body }’s rings are open widest for the time being
phenomena-kind-ring-opening-least = { $body }’s rings are narrowest for the time being
phenomena-kind-appulse = { $body } stands close to { $other }
phenomena-kind-lunar-occultation = { $body } is hidden by { $other }
phenomena-kind-transit = { $body } crosses the face of the Sun (solar filters only)
phenomena-kind-ring-plane-crossing = { $body }’s rings are seen edge-on

# Values with their units.
phenomena-value-arcsec = { $number }″
phenomena-value-arcmin = { $number }′
phenomena-value-deg = { $number }°
phenomena-value-arcsec2 = { $number } square arcsec
phenomena-value-mag = magnitude { $number }
phenomena-value-au = { $number } au
