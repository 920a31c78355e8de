# The command line: help, pages and refusals.

# Help
cli-about = Plans and runs public observing sessions of the bright planets at dusk and dawn. Without a subcommand it opens its window.
cli-about-positions = Where bodies stand at one instant from one place, or for each row of a table, and by how many magnitudes eyes see them
cli-more-positions = Sky, extinction, limit (a visitor’s) and margins are for usual air: clear, at the place’s elevation to 50 m, with a dark sky of 20.5 mag per square arcsecond and the usual eyes; the Moon’s own glow is left out for the Moon. They are blank for the Sun, for what is below the horizon and where no magnitude is known.
cli-about-night = One night at a site: when each planet stands clear of its skyline, and when optics may be uncapped
cli-about-daylight = A bright planet in full day, for the unaided eye from the shade of a building of the site file (Venus unless --body says otherwise). Read its cautions first
cli-about-phenomena = Dated events of the planets: conjunctions, oppositions, greatest elongations, stationary points, half phases, Venus’s brightest, nearest and farthest, Saturn’s rings, close approaches, transits
cli-more-phenomena = They are geocentric and apparent, of date. With a site each event says where its body and the Sun then stand there, without refraction, and whether the skyline lets it be seen; transits have local contacts, and the Moon’s meetings with the bright planets and its occultations of them are listed as the site has them
cli-about-skyline = What blocks the view from a spot, per azimuth, with the open sky beneath crowns
cli-more-skyline = As CSV its first columns are az_deg and alt_deg, so that it can be read back as a measured skyline; openings are floor and ceiling, low to high
cli-about-completions = Prints completions for a shell
cli-arg-now = Time that stands in for the clock, for example 2026-12-05T17:40:00Z
cli-arg-delta-t = TT − UT1 in seconds, in place of the program’s own; a table’s own column comes first
cli-arg-site = Site file, or the name of a known site (fennick-common, tarrow-bay-school, ternskjell-quay)
cli-arg-spot = Spot on the site [default: its first]
cli-arg-stature = Whose eyes: their height over the ground follows from the site file [default: adult]
cli-arg-leaf-date = Date that decides which trees stand leafless [default: all in leaf]
cli-arg-step = Degrees between azimuths, 0.01 to 90 [default: 1]
cli-arg-date = Date of the night’s evening
cli-arg-from = First day, by the site’s clock (UTC without a site)
cli-arg-to = Last day, included
cli-arg-planet = Planet in lower case; may be given again [default: all]
cli-arg-local-site = Site whose circumstances are wanted: a file, or the name of a known site
cli-arg-half = Half of the night
cli-arg-body = Body in lower case; may be given again for positions
cli-arg-renderer = What draws the window [default: glow, and wgpu where it fails]
cli-arg-at = Time with its offset; one without is UTC (UT1 before 1972 and from 2050 on)
cli-arg-lat = Latitude in degrees, north positive
cli-arg-lon = Longitude in degrees, east positive
cli-arg-elevation = Height above the ellipsoid in metres [default: 0]
cli-arg-table = Table with the columns id, utc or ut1, lat_deg, lon_deg, body and, if wanted, elevation_m and delta_t_s; “-” reads stdin. A row’s ut1 comes before its utc. Rows are written as they are read: those before a bad one have been written
cli-arg-format = How to print [default: text; csv for a table]
cli-arg-shell = Shell

# Pages
column-body = body
column-altitude = altitude
column-azimuth = azimuth
column-elongation = elongation
column-lit = lit
column-disc = disc
column-magnitude = magnitude
column-sky = sky cd/m²
column-extinction = extinction
column-limit = limit
column-passer-by = passer-by
column-visitor = visitor
column-keen = keen
column-optics = optics
column-from = from
column-until = until
column-length = length
column-best = best
column-clearance = clearance
positions-title = { $time } ({ $offset }) at latitude { $latitude }, longitude { $longitude }, { $elevation } m up
positions-note = Altitudes are refracted, in air of { $pressure } hPa and 10 °C. Elongation, lit part and magnitude are geocentric.
positions-seen-title = By how many magnitudes eyes see what is up, in clear air under a dark sky of 20.5 mag per square arcsecond (0 and more: seen; the limit is a visitor’s)
skyline-title = Skyline at { $spot }, { $site } (eye { $height } m over the mark’s ground)
skyline-measured-own = What was measured from this spot counts all round.
skyline-measured-mark = What was measured from the mark counts all round.
skyline-measured-far = Of what was measured elsewhere the parts marked far count.
skyline-measured-far-only = Of what was measured elsewhere only the parts marked far count; the rest is left out.
skyline-measured-left-out = What was measured elsewhere is left out: no part of it is marked far.
skyline-measured-nothing = Nothing was measured.
cli-measured-far-only = { $spot }: of the skyline measured elsewhere on { $site } only the parts marked far count here, and the rest is left out.
cli-measured-left-out = { $spot }: the skyline measured elsewhere on { $site } is left out here, since no part of it is marked far.
column-blocked-by = blocked by
column-openings = open beneath
skyline-blocked-measured = measured skyline
skyline-blocked-terrain = terrain
skyline-blocked-horizon = level horizon
skyline-opening = { $floor } to { $ceiling }

# Refusals: what, where, and what to do.
cli-bad-number = { $place } is { $value }, but must be a number from { $low } to { $high } { $unit ->
    [metres] metres
    [seconds] seconds
   *[degrees] degrees
}
cli-bad-time = { $place } is { $value }, but must be a time like 2026-12-05T17:40:00Z or 2026-12-05T18:40:00+01:00
cli-bad-table-time = { $place } is { $value }, but must be a time like 2026-12-05T17:40:00 with nothing or a Z behind it
cli-bad-date = { $place } is { $value }, but must be a date like 2026-12-05
cli-bad-body = { $place } is { $value }, but must be one of { $known }
cli-refused = { $place }: { $error }
cli-no-site = --site is { $value }, but there is no such file and no site of that name; always known are { $known }
cli-window-options = --site, --spot, --date, --half, --body and --renderer before a subcommand are for the window: write them behind the subcommand
cli-table-place = { $file }, line { $line }, column { $column }
cli-table-unreadable = cannot read the table { $file }: { $reason }
cli-is-folder = it is a folder
cli-table-uneven = { $file }, line { $line }: there are { $fields } fields where the first line has { $expected }
cli-table-column-missing = { $file }, line 1: there is no column { $column }; a table needs id, utc or ut1, lat_deg, lon_deg and body
cli-table-column-twice = { $file }, line 1: the column { $column } stands there twice
cli-table-no-text = --format text is not for tables: choose csv or json
cli-output-failed = cannot write the output: { $reason }
cli-message = dimmet: { $sentence }
no-window-built = this program was built without its window
cli-daylight-sun = --body is the Sun, which is never looked at: write another body, such as venus
