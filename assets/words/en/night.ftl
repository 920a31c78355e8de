# What a host reads aloud of a half-night, and what the night's page says.

half-dusk-phrase = this dusk
half-dawn-phrase = this dawn

# One window, its two ends by their causes, and its best moment.
half-night-window = { $eye ->
    [passer-by] Passers-by notice { $body }
    [keen] A practised eye sees { $body }
    [optics] The telescope shows { $body }
   *[visitor] Visitors see { $body }
} { $startCause ->
    [skyline] from { $start }, when it comes out over { $startObstacle },
    [horizon] from { $start }, when it rises,
    [haze] from about { $start }, when it is up out of the haze,
    [moonlight] from about { $start }, when the moonlight fades,
    [sunset] from sunset at { $start }
    [optics] from { $start }, when instruments may be uncapped,
    [half] from the middle of the night ({ $start })
    [noon] from midday on
   *[twilight] from about { $start }, as the sky darkens,
} { $endCause ->
    [skyline] until { $end }, when it goes behind { $endObstacle }.
    [horizon] until { $end }, when it sets.
    [haze] until about { $end }, when it fades into the haze.
    [moonlight] until about { $end }, when the moonlight drowns it.
    [sunrise] until sunrise at { $end }.
    [optics] until { $end }, when every instrument is capped.
    [half] until the middle of the night ({ $end }) and beyond.
    [noon] until midday.
   *[twilight] until about { $end }, when the sky gets too bright.
} Best near { $best }: { $altitude } up in the { $direction }, { $fists } clear of { $bestObstacle }.
half-night-window-again = It is plain again from { $start } until { $end }, best near { $best }.

# No window, and why.
half-night-sun-up = The Sun does not set tonight, so the sky stays too bright for { $body }.
half-night-down = { $body } is below the horizon all through { $half }.
half-night-up-with-sun = { $body } is up only while the Sun is too.
half-night-blocked = { $body } stays behind { $obstacle } all through { $half }: another spot may do better.
half-night-too-bright = { $body } is clear of the skyline only while the sky is too bright for it.
half-night-not-for-eyes = { $body } is too faint for the unaided eye.

# The page of a night
night-title = { $site }, { $spot }: the night of { $date }
night-sun-dusk = Sunset { $set }; civil dusk { $civil }, nautical { $nautical }, astronomical { $astronomical }
night-sun-dawn = Astronomical dawn { $astronomical }, nautical { $nautical }, civil { $civil }; sunrise { $rise }
night-sun-stays-up = The Sun does not set: its lowest point is { $altitude }.
night-sun-stays-down = The Sun does not rise: its highest point is { $altitude }.
night-moon = Moon: { $percent } lit, { $elongation } from the Sun; rises { $rise }, sets { $set }
night-dusk = Dusk, { $date }
night-dawn = Dawn, { $date }
optics-from = Caps stay on until at least { $time }, and until the named Sun-watcher agrees.
optics-until = Cap every instrument by { $time }.
optics-none-dusk = No optics time at dusk: the Sun does not go down far enough.
optics-none-dawn = No optics time at dawn: the Sun does not go down far enough.
clock-of-site = Times are the site’s own ({ $zone }).
clock-is-ut1 = Beyond 1972 to 2050 civil time is counted from UT1.

# No display
no-display = There is no display to open the window on ({ $reason }). Here is the coming dusk at the demo site instead.
