# Names and units that everything uses.

# Bodies
body-sun = Sun
body-moon = Moon
body-mercury = Mercury
body-venus = Venus
body-mars = Mars
body-jupiter = Jupiter
body-saturn = Saturn
body-uranus = Uranus
body-neptune = Neptune
# Within a sentence.
the-sun = the Sun
the-moon = the Moon
the-moon-first = The Moon

# Directions: the sixteen compass points, clockwise from north.
compass-0 = north
compass-1 = north-north-east
compass-2 = north-east
compass-3 = east-north-east
compass-4 = east
compass-5 = east-south-east
compass-6 = south-east
compass-7 = south-south-east
compass-8 = south
compass-9 = south-south-west
compass-10 = south-west
compass-11 = west-south-west
compass-12 = west
compass-13 = west-north-west
compass-14 = north-west
compass-15 = north-north-west
compass-short-0 = N
compass-short-1 = NNE
compass-short-2 = NE
compass-short-3 = ENE
compass-short-4 = E
compass-short-5 = ESE
compass-short-6 = SE
compass-short-7 = SSE
compass-short-8 = S
compass-short-9 = SSW
compass-short-10 = SW
compass-short-11 = WSW
compass-short-12 = W
compass-short-13 = WNW
compass-short-14 = NW
compass-short-15 = NNW

# Quantities
azimuth-with-point = { $degrees } { $point }
elongation-east = { $degrees } E
elongation-west = { $degrees } W
percent = { $percent } %
arcseconds = { $arcseconds }″
fists = { $fists } { $count ->
    [few] fist
   *[many] fists
}
no-value = –
duration-minutes = { $minutes } min
duration-hours = { $hours } h { $minutes } min
countdown = In { $minutes } min { $seconds } s.
countdown-hours = In { $hours } h { $minutes } min.

# Dates and times
weekday-1 = Mon
weekday-2 = Tue
weekday-3 = Wed
weekday-4 = Thu
weekday-5 = Fri
weekday-6 = Sat
weekday-7 = Sun
month-1 = January
month-2 = February
month-3 = March
month-4 = April
month-5 = May
month-6 = June
month-7 = July
month-8 = August
month-9 = September
month-10 = October
month-11 = November
month-12 = December
month-short-1 = Jan
month-short-2 = Feb
month-short-3 = Mar
month-short-4 = Apr
month-short-5 = May
month-short-6 = Jun
month-short-7 = Jul
month-short-8 = Aug
month-short-9 = Sep
month-short-10 = Oct
month-short-11 = Nov
month-short-12 = Dec
weekday-date = { $weekday } { $day } { $month } { $year }
month-year = { $month } { $year }
weekday-date-time = { $weekday } { $day } { $month } { $year }  { $time }

# Sites
the-skyline = the skyline
the-obstacle = the { $label }
air-and-sky = extinction { $extinction } mag · sky { $sky } mag/″²
