# The skyline from a spot, the spots side by side, where to stand.

# Whose height; the height is the eye's over the ground.
stature-adult = adult { $height } m
stature-child = child { $height } m
stature-wheelchair = wheelchair { $height } m

# The strip
strip-title = Skyline from { $spot }
strip-name = Skyline from { $spot }, all round. Drag turns it, the wheel widens it; a measured point is dragged, added by a double click and deleted by its key.
strip-all-round = All round
strip-where-it-passes = Where { $body } passes
strip-clear = { $azimuth }, { $altitude } up: { $clearance } clear of { $obstacle }
strip-behind = { $azimuth }, { $altitude } up: behind { $obstacle }, { $clearance } from its edge
strip-body-clear = { $body } at { $azimuth }, { $altitude } up: { $clearance } clear of { $obstacle }
strip-body-behind = { $body } at { $azimuth }, { $altitude } up: behind { $obstacle }, { $clearance } from its edge
measured-here = The measured skyline is this spot’s own: drag its points, double-click for a new one.
measured-nothing = Nothing is measured from here yet: double-click in the drawing for a first point.
measured-nowhere = Nothing was measured from here: the skyline is that of the obstacles alone.
measured-elsewhere = The skyline measured elsewhere does not hold at this spot: none of it is marked far.
measured-far-only = Only the far parts of the measured skyline hold at this spot.
measured-point = Chosen point: { $azimuth }, { $altitude }. Ctrl and arrows move it by 0.1°, Delete takes it away.

# The standing map
standing-title = Where to stand
standing-map = Map
standing-place = Stand where I click
standing-nights = { $nights ->
    [1] This night
   *[other] { $nights } nights
}
standing-sum = All together
standing-least = The worst of them
standing-progress = How far the standing map has come
standing-cancel = Cancel
standing-stopped = Stopped: the map is as far as it came.
standing-again = Go on
standing-legend = Legend: from { $least } min in night blue to { $most } min in amber
standing-minutes = { $minutes } min
standing-whereabouts = { $east }, { $north }
metres-east = { $metres } m east
metres-west = { $metres } m west
metres-north = { $metres } m north
metres-south = { $metres } m south
standing-times = { $start } to { $end }, { $minutes } min: { $why }
standing-times-open = { $start } to { $end }, { $minutes } min
standing-not-seen = not seen from there
standing-best = { $number }  { $said }
standing-place-one = { $where }: { $times }
standing-place-sum = { $where }: { $minutes } min in { $nights } nights; this night { $times }
standing-place-least = { $where }: at least { $minutes } min in each of { $nights } nights; this night { $times }
standing-stand-here = Stand here
standing-stand-here-named = Stand at best place { $number }
standing-cost = At { $spot }: { $minutes } min, { $fewer } fewer than at the best place.
standing-no-cost = At { $spot }: { $minutes } min, and no place of the grounds gives more.
standing-gain = Ten minutes more: { $metres } m to the { $direction }.
standing-no-gain = Nowhere on the grounds gives ten minutes more.
standing-nowhere = Nobody can stand anywhere on these grounds: everything is built over or left out.
standing-pointed = There, { $said }
standing-point-at = Point at the map: what a square metre gives is read beneath it.
new-spot-name = spot { $number }

# The spots side by side
compare-title = The spots side by side
compare-about = { $body } at { $half }, whose eye: { $eye }. The longest time stands in amber. Press a spot to choose it.
compare-times = { $start }–{ $end }  { $minutes } min
compare-best = best { $time }
compare-not-seen = not seen
compare-too-faint = too faint for the unaided eye
compare-row = { $spot }: { $times }, { $best }, { $why }. { $kit }
kit-stands = Kit
kit-nowhere = wherever people stand
kit-at = { $instrument }: { $spot }
kit-menu = Put { $instrument } at a spot, now { $spot }
measured-all-far = Measured from another place: all of it is far and holds here.

# The Lookout
move-measured = Move the measured skyline
move-measured-hint = Show the points of the measured skyline: drag one, double-click for a new one, Delete takes it away
