# Finding a bright planet in full day.

daylight-caution-sun = Caution: never look at the Sun, nor sweep the sky near it, with anything or with nothing. A glance through an instrument blinds at once.
daylight-caution-shade = The times below are for the unaided eye only, and only where the named building hides the whole Sun from it. Stand deep in that shade before you look up, keep everyone in it, and stop when the slot ends. Trees, hedges, walls and a measured skyline give no such shade. The figures are no better than the site file: see for yourself that the shade is there, and wait for another day if it is not.
daylight-caution-instruments = Instruments by day need a supervised, filtered or tracked set-up in the hands of people practised in it; this page gives no time for optics.
daylight-title = { $body } by day from { $spot } at { $site }, { $date }
daylight-no-day = The Sun stands no higher than 5° on this date: the night’s plan is the one to ask.
daylight-lost = { $body } is at no time of this day both bright enough for a keen eye and clear of the skyline.
daylight-no-shade = { $body } would be bright enough for a keen eye today, but no building of the site file hides the Sun from this spot long enough while { $body } is clear: there is no slot. Another spot may have one.
daylight-slot = { $start } to { $end }: { $body } from the shade of { $building }, which stays over this spot until { $until } at least.
daylight-place = At { $time } it stands { $altitude } up in the { $direction }: { $fromSun }.
daylight-moon = It is then { $fromMoon }.
daylight-drift = { $body } is west of the Sun, so the sky carries the Sun towards where an untracked tube points: one pointed at { $body } at { $start } has the Sun within 5° of its axis from { $time } on.
daylight-drift-past = { $body } is west of the Sun, so the sky carries the Sun towards where an untracked tube points. Today it passes more than 5° from it; that does not make such a tube safe.
daylight-apart = { $degrees } from { $other }{ $acrossSide ->
    [right] , { $across } to the right{ $upSide ->
        [above] {" "}and { $up } above
        [below] {" "}and { $up } below
       *[none] {""}
    }
    [left] , { $across } to the left{ $upSide ->
        [above] {" "}and { $up } above
        [below] {" "}and { $up } below
       *[none] {""}
    }
   *[none] { $upSide ->
        [above] , { $up } above
        [below] , { $up } below
       *[none] {""}
    }
}
