# The desktop window. One message for each thing that is read; where a control has a hint, its
# message has the same name with "-hint".

program = Dimmet
lookout = Lookout
help = Help
help-hint = Keys and cautions
close = Close
close-hint = Close without changing anything (Escape)
theme-dark = Dark
theme-light = Light
theme-red = Red light
dismiss-notice = Got it
dismiss-notice-hint = Take this notice away

# Pickers
site-and-spot = { $site } · { $spot }
site-picker = Site and spot: { $shown }
spots = Spots on this site
new-site = New site…
new-site-title = New site
new-site-hint = Name, coordinates, time zone and three points of the skyline
find-site-file = Open a site file…
find-site-file-hint = Choose a file that ends in .site.ron
date-picker = Date: { $date }
date-field = Date as year-month-day
date-field-error = Write the date as year-month-day, for example 2026-12-05.
previous-month = Month before
next-month = Month after
previous-day = Day before
next-day = Day after
half-dusk = Dusk
half-dawn = Dawn
for-eye = for
eye-picker = Whose eye: { $eye }
eye-passer-by = passer-by
eye-passer-by-hint = An untrained eye that nobody points to the place
eye-visitor = visitor
eye-visitor-hint = An untrained eye that is pointed to the place
eye-keen = keen
eye-keen-hint = A practised eye that knows exactly where to look
eye-optics = optics
eye-optics-hint = A visitor at the first instrument of the site’s kit, at its lowest power

# The air
in-air = in
air-picker = Air: { $air }
air-as-stated = the site’s air
air-very-clear = very clear air
air-clear = clear air
air-hazy = hazy air
air-murky = murky air
air-line = { $word }: { $extinction } mag

# The moment
back-ten-minutes = Ten minutes back
back-one-minute = One minute back
on-one-minute = One minute on
on-ten-minutes = Ten minutes on
go-to-best = Best moment
go-to-best-hint = Go to the moment at which the chosen body stands best (Home)
this-minute = This minute
this-minute-hint = Go to the clock’s time and follow it (T)
let-it-run = Let it run
let-it-run-hint = Minutes of the night in one second (Space runs and stops)
stop = Stop
stop-hint = Hold the time (Space)
speed = { $minutes ->
    [1] Let it run at one minute a second
   *[other] Let it run at { $minutes } minutes a second
}
speed-unit = min/s

# The new site
site-name = Name
site-name-error = Give the site a name.
site-file-exists = There is a site file of that name already ({ $file }): choose another name.
latitude = Latitude in degrees, for example 51.05 or 33.9 S
latitude-error = Write the latitude as a number from −90 to 90 degrees, or with N or S behind it.
longitude = Longitude in degrees, for example −3.42 or 18.4 E
longitude-error = Write the longitude as a number from −180 to 180 degrees, or with E or W behind it.
time-zone = Time zone (suggested from the coordinates; change it if it is wrong)
time-zone-choose = Choose a time zone
time-zone-filter = Part of its name
time-zone-error = Choose the site’s time zone from the list.
skyline-in-fists = Skyline: how many fists at arm’s length stand between the level and the top of what blocks the view, in up to three directions. One fist is 10°. Leave out what is open.
skyline-direction = Direction { $number }
skyline-fists = Fists { $number }
skyline-fists-error = Write the height as a number of fists from 0 to 9, for example 1.5.
skyline-doubled-error = This direction has a height already: choose another direction.
no-sites-folder = There is no folder to keep sites in: start the program with one.
save-new-site = Save site
save-new-site-hint = Write the site’s file and open it

# Finding a site file
file-path = Path
open-site-file = Open
open-site-file-hint = Read the file at this path
no-such-folder = There is no such folder.
folder-above = .. (the folder above)
no-site-files = No site files stand in this folder.

# Sites
terrain-looking = Looking along the terrain
terrain-stopped = Looking along the terrain was stopped: the skyline holds what was found so far.
terrain-disagrees = The elevation tiles put the ground of { $site } at { $ground } m, but the site file says { $stated } m: { $off } m apart. Check the coordinates and the elevation.
terrain-uncovered = { $share } of the terrain within sight of { $site } lies outside its elevation tiles, and nothing there blocks: add the tiles that are missing.
terrain-far-spot = The spot { $spot } lies { $away } km from the mark of { $site }, and the terrain there is only roughly what was seen from the mark: make it a site of its own.
terrain-voids = { $share } of the terrain within sight of { $site } is void in its elevation tiles, and nothing there blocks: take tiles with their voids filled.
stop-terrain = Stop
stop-terrain-hint = Stop looking along the terrain
look-along-terrain = Look along it
look-along-terrain-hint = Look along the terrain from the beginning

# Settings
settings-set-aside = The settings could not be used ({ $reason }); they were kept as { $file } and the usual ones are in use.
settings-not-saved = The settings could not be written to { $file }: { $reason }.

# Facts
fact-altitude = altitude
fact-azimuth = azimuth
fact-clearance = clearance
fact-sun = Sun
fact-elongation = elongation
fact-lit = lit
fact-disc = disc
fact-magnitude = magnitude

# In which order the chosen eye finds things at dusk, or loses them at dawn
appearing-dusk = Order of appearing
appearing-dawn = Order of vanishing, the last first
appearing-none = Nothing comes out between sunset and the end of twilight.
appearing-by = by { $time }
appearing-past = past { $time }

# Cautions
cautions = Cautions
caution-until = Caps stay on until at least { $time }
caution-sun-up-dusk-text = The Sun is up. Caps stay on until then, and until the named Sun-watcher agrees.
caution-just-set-text = The Sun has only just gone. Caps stay on until then, and until the named Sun-watcher agrees.
caution-no-time = No optics time tonight: caps stay on
caution-no-time-text = The Sun does not go down far enough in this half of the night.
caution-sun-up = The Sun is up: caps stay on
caution-sun-up-text = No instrument is uncapped until the Sun has set again.
caution-cap-by = Cap every instrument by { $time }
caution-sunrise-text = Sunrise { $time }. Never sweep for a planet with the Sun up or about to rise.
caution-open-until = The Sun is down: optics until { $time }
caution-open = The Sun is down
caution-open-text = Uncap only when the named Sun-watcher agrees, and cap again before the Sun is about to rise.
caution-about-to-rise = The Sun is about to rise: caps are on
caution-near-sun = { $body } is only { $angle } from the Sun: nobody sweeps for it with any optics.
caution-always = Local rules and licensed practice come first.
caution-caps = Caps stay on until the optics time at dusk and from it at dawn, and until the named Sun-watcher agrees.
caution-filters = Solar filters belong at the front of an instrument only.
caution-viewers = Solar viewers (ISO 12312-2) are for the unaided eye and never go with optics.
caution-finders = Finders and children’s binoculars are optics.
caution-rules = Local rules and licensed practice come first.

# Help
keys = Keys
turn-view-keys = Ctrl ← →, ↑ ↓
turn-view = Turn and tilt the horizon view or the skyline (Tab to it first)
widen-view-keys = + −
widen-view = Narrow and widen it
move-point-keys = Ctrl ← → ↑ ↓
move-point = Move the chosen point of the measured skyline by 0.1°
delete-point-keys = Delete
delete-point = Take that point away
zoom-keys = Ctrl + / Ctrl − / Ctrl 0
zoom = Larger, smaller, usual size
status-keys = ← → one minute · ⇧ ten · Page a day · Home best moment · Space let it run · T this minute · F1 help
status-keys-plan = On the plan: 1–9, 0 tools · Tab next thing · ← ↑ → ↓ move · Space set a point · Delete · E everything · Ctrl Z undo · M measure · F1 help
