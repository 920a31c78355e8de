# The drawings of the Lookout: horizon view, fade, inset, phase, plot.

# The horizon view. Keys are named as on the keyboard.
horizon-name = Horizon view. Drag or Ctrl and arrows turn it, the wheel or plus and minus widen it.
horizon-target = { $body } { $magnitude }
horizon-target-clear = { $altitude } up · { $fists } over { $obstacle }
horizon-target-close = { $altitude } up · just over { $obstacle }
horizon-target-washed-out = { $altitude } up · sky too bright
horizon-target-blocked = { $altitude } up · behind { $obstacle }
horizon-clearance = clear by { $clearance }
horizon-moon = Moon { $lit }
horizon-fists = { $fists }  { $degrees }

# The fade.
fade-name = Fade
fade-value = { $time }, Sun { $sun }
fade-sunset = sunset
fade-sunrise = sunrise
fade-civil = civil
fade-nautical = nautical
fade-astronomical = astronomical
lane-sunset = sunset { $time }
lane-sunrise = sunrise { $time }
lane-caps-on = caps on { $time }
lane-caps-off = caps off { $time }
lane-too-bright-from = sky too bright { $time }
lane-dark-enough-from = from { $time }
lane-into-haze = into the haze { $time }
lane-out-of-haze = out of the haze { $time }
lane-moonlight-from = lost in moonlight { $time }
lane-moonlight-until = out of the moonlight { $time }
lane-behind-from = behind { $obstacle } { $time }
lane-clears-at = clears { $obstacle } { $time }
# How far the time of an end may stray as haze and eyes differ; in the harshest air the body may
# not be seen at all.
lane-stray = { $time } ({ $from }–{ $to })
lane-stray-end = { $time } (to { $to } at best, or not at all)
lane-stray-start = { $time } (from { $from } at best, or not at all)
lane-sets = sets { $time }
lane-rises = rises { $time }
lane-not-up = below the horizon
lane-hidden = hidden by the skyline
lane-too-bright = sky too bright
# The bodies that are not seen, in one line: each with why, and what stands between them.
lane-absent = { $body }: { $why }
lane-absent-between = {"  ·  "}

# The inset: the plan of the orbits.
inset-name = Plan of the orbits seen from north of the ecliptic. { $body } stands { $elongation } from the Sun.
inset-title = From north of the ecliptic
inset-earth = Earth
inset-sun = Sun
inset-to-sun = to the Sun
inset-days-ago = { $aspect } { $days ->
    [one] { $days } day ago
   *[other] { $days } days ago
}
inset-days-on = { $aspect } in { $days ->
    [one] { $days } day
   *[other] { $days } days
}
inset-today = { $aspect } today
aspect-new-moon = new moon
aspect-full-moon = full moon
aspect-inferior-conjunction = inferior conjunction
aspect-superior-conjunction = superior conjunction
aspect-conjunction = conjunction
aspect-opposition = opposition
aspect-greatest-elongation-east = greatest elongation east
aspect-greatest-elongation-west = greatest elongation west

# The phase.
phase-name = Phase of { $body }: { $lit } lit, { $diameter } across
phase-title = Phase, to one scale
phase-eye = to the eye
phase-eye-point = a brilliant point
phase-eye-disc = as it hangs
phase-binocular = binocular
phase-telescope = telescope
phase-power = { $power }×, { $view }
phase-erect = erect
phase-inverted = inverted
phase-mirrored = mirrored
phase-scale = ring { $size }
phase-arcseconds = { $size }″
phase-arcminutes = { $size }′
phase-change = { $name }, { $note }. Press for the next way round.

# The plot.
plot-name = Margin of { $body } for each eye in magnitudes against minutes from sunset or sunrise: above 0 it is seen. The upright line marks the moment shown; a click sets it.
plot-title = margin of each eye in magnitudes · { $minutes }
plot-sun-up = Sun up
plot-threshold = seen above this line
# An eye's curve that leaves the plot at the top.
plot-off-the-top = { $eye } ↑
plot-minutes-sunset = minutes from sunset
plot-minutes-sunrise = minutes from sunrise
plot-minutes-start = minutes of the half-night
plot-positive = +{ $number }
plot-negative = { $number }
