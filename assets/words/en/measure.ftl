# The ways to measure what stands around a spot.

measure = Measure
measure-hint = Readings, heights, noted times, a photograph
measure-from = Measured from: { $spot }
measure-readings = Compass and clinometer
measure-readings-hint = Stand at the spot, turn once round and note bearing and altitude wherever the skyline bends.
measure-heights = Height
measure-heights-hint = Pace or tape the distance, then measure an angle, a stick or a shadow.
measure-vanishing = Noted time
measure-vanishing-hint = Note when a body went behind something or came out from behind it, seen from this spot: that is one exact point.
measure-shadow = Sun’s shadow
measure-shadow-hint = The shadow of an upright pole shows true north at any noted time, and what your compass is out by.
measure-photo = Photograph
measure-photo-hint = Mark two or more known directions and the level, then draw the outline from left to right.

# Units
unit-metres = m
unit-paces = paces
unit-degrees = °
unit-degrees-east = ° (east +)
unit-seconds = s

# North
north-true = From true north
north-magnetic = From magnetic north
declination = Declination

# Readings
tilt-degrees = Degrees
tilt-percent = Per cent
reading-bearing = Bearing
reading-altitude = Altitude
reading-within = Known to
reading-bearing-of = Bearing of reading { $number }
reading-altitude-of = Altitude of reading { $number }
reading-remove = Remove reading { $number }
reading-error = ±{ $azimuth }° across, ±{ $altitude }° up
reading-add = One more reading
readings-all-round = They go all round: nothing measured before is kept
readings-far = Far away: it looks the same from every spot
readings-none = There is no reading yet: add one.
put-into-skyline = Put into the skyline
points-put-in = Put into the skyline of { $spot }; points: { $count }.

# Heights
height-by-angle = Angle and distance
height-by-angle-hint = From the spot: the altitude of the top, and the distance to the foot below it.
height-by-two-angles = Two angles
height-by-two-angles-hint = Where the foot cannot be reached: the altitude of the top, then again after walking straight towards it.
height-by-held-stick = Stick held out
height-by-held-stick-hint = Hold a stick upright so that it just covers the thing from foot to top.
height-by-placed-stick = Stick in the ground
height-by-placed-stick-hint = Move until the stick’s tip and the top stand in one line; distances are counted from your eye.
height-by-shadow = Shadow
height-by-shadow-hint = Measure both shadows in the same minute, on level ground. Look at the ground, never towards the Sun.
in-metres = Metres
in-paces = Paces
pace-length = One pace
distance-to-foot = Distance
line-walked = Walked towards it
altitude-of-top = Altitude of the top
altitude-far = Altitude from afar
altitude-near = Altitude from near
stick-length = Stick
eye-to-stick = From eye to stick
stick-shadow = The stick’s shadow
object-shadow = Its shadow
height-measured = Height { $length } m. Half a metre of length makes { $by-distance } m, one degree { $by-angle } m; together ±{ $together } m.
distance-measured = Distance { $length } m. Half a metre of length makes { $by-distance } m, one degree { $by-angle } m; together ±{ $together } m.
obstacle-picked = Which obstacle
give-height = Give it this height
height-given = The height of { $label } is set.
height-given-within = { $label } is { $height } m high, to ±{ $off } m.
bearing-to-it = Bearing to it
angle-across = Angle across it
put-tree-there = Put a tree there
new-tree = tree
tree-put = A tree stands there now, to ±{ $off } m; move or rename it on the plan.

# Noted times
noted-date = Date
noted-time = Time
noted-within = To within
noted-date-unread = The date { $written } cannot be read: write it as 2026-12-05.
noted-time-unread = The time { $written } cannot be read: write it as 19:42 or 19:42:30.
vanishing-sun-caution = Never look at the Sun, least of all through optics: take the moment from where the light leaves the ground beside you.
vanishing-point = Azimuth { $azimuth }° ±{ $azimuth-off }, altitude { $altitude }° ±{ $altitude-off }.
height-from-vanishing = Give it the height that this shows
obstacle-not-there = { $label } does not stand in that direction from this spot: check the spot and the plan.

# Shadow
shadow-caution = Turn your back to the Sun and look at the shadow. Local rules come first.
shadow-azimuth = The shadow points to azimuth { $azimuth }° ±{ $off }; a pole that leans sideways by 1° moves it by { $lean }°.
compass-along-shadow = The compass, laid along it, reads
shadow-declination = So the declination, with this compass’s own error, is { $declination }° east.
use-declination = Use this declination
declination-used = The compass readings are counted from it now.

# Photograph
photo-file = Picture
photo-load = Load
photo-reading = Reading the picture…
photo-single = Single photo
photo-panorama = Panorama
photo-panorama-even = Panorama, even upwards
photo-mark = Known directions
photo-mark-hint = Click things whose direction you know and write their bearings below. Drag moves a mark; the wheel zooms, the right button drags the picture.
photo-level = Level
photo-level-hint = Click points at your eye’s height (a sea horizon, a level line). None: the picture was taken level.
photo-outline = Outline
photo-outline-hint = Click along the skyline from left to right; drag a point to move it.
photo-take-back = Take the last point back
photo-canvas = The photograph
photo-fit = The picture fits: one pixel is { $pixel }°.
photo-fit-unchecked = The picture fits, but nothing checks it: mark one direction more. One pixel is { $pixel }°.
mark-bearing = Bearing
mark-from-plan = From the plan
mark-altitude = Altitude, if known
mark-missed = Missed by
mark-bearing-of = Bearing of mark { $number }
mark-from-plan-of = Bearing of mark { $number } from the plan
mark-altitude-known-of = Altitude of mark { $number } is known
mark-altitude-of = Altitude of mark { $number }
mark-remove = Remove mark { $number }

# Files in and out
exchange = Files in and out
exchange-hint = Skyline tables and GeoJSON
skyline-in = Bring a skyline table in
skyline-in-hint = Comma-separated, with columns az_deg and alt_deg; takes the place of the skyline measured from this spot.
geojson-in = Bring GeoJSON in
geojson-in-hint = Spots, obstacles and areas drawn in mapping software (RFC 7946) are added to the plan.
skyline-out = Write the measured skyline
skyline-out-hint = Comma-separated; the skyline measured from this spot.
geojson-out = Write the plan as GeoJSON
geojson-out-hint = Spots, obstacles and areas, for mapping software.
write-over = { $file } is there already: press again to write over it.
file-written = Written: { $file }
geojson-taken = Added to the plan: { $spots } spots, { $obstacles } obstacles, { $excluded } areas.
remark-height-assumed = { $number } · { $label }: no height is given; { $value } m is assumed.
remark-from-storeys = { $number } · { $label }: { $value } m is taken from its storeys.
remark-width-assumed = { $number } · { $label }: no width is given; { $value } m is assumed.
remark-roof-flat = { $number } · { $label }: only its whole height is known, so its roof is flat.
remark-kind-assumed = { $number } · { $label }: nothing says what it is; a line is taken as a wall, an area as a shape.
remark-length-not-read = { $number } · { $label }: its { $value } is not a length in metres and was left out.
remark-holes = { $number } · { $label }: its holes are left out.
remark-renamed = { $number } · { $label }: it has a new name here.
remark-passed-over = { $number } { $label }: neither blocks the view nor is stood on; passed over.
remark-no-geometry = { $number } { $label }: it has no geometry; passed over.
remarks-more = and { $count } more remarks
