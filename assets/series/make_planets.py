"""Makes the planets' series (NAME.csv) from the VSOP87A coefficients.

Source: Bretagnon & Francou 1988 (Astron. Astrophys. 202, 309), version A: heliocentric
rectangular coordinates, dynamical ecliptic and equinox J2000, as carried by the registry
crate `vsop87` 3.0.0 (MIT or Apache-2.0). Call: python3 make_planets.py FOLDER_OF_THE_CRATE

Each series is cut where the loss, measured at random instants of 1598-2402, stays within
LOSS_ARCSEC as seen over the planet's least distance from the Earth.
"""
import math
import os
import re
import sys

import numpy as np

LOSS_ARCSEC = 0.004
# Least distance at which an error of this planet's place is seen, au. The Earth's own counts
# at Venus' least distance.
LEAST_AU = {
    "mercury": 0.54, "venus": 0.26, "earth": 0.26, "mars": 0.37,
    "jupiter": 3.9, "saturn": 8.0, "uranus": 17.2, "neptune": 28.8,
}
NUMBER = re.compile(r"-?\d+\.?\d*(?:[eE]-?\d+)?")


def series_of(path):
    """[(axis, power, a, b, c)] of one planet's source file."""
    text = open(path).read()
    terms = []
    for block in re.finditer(r"const ([XYZ])(\d): \[\[f64; \d+\]; 3\] = \[(.*?)\n\];", text, re.S):
        axis, power, body = block.group(1), int(block.group(2)), block.group(3)
        body = re.sub(r"//.*", "", body).replace("_", "")
        body = re.sub(r"(?:std::f64::consts::|core::f64::consts::)?\bPI\b", repr(math.pi), body)
        columns = [
            [float(number) for number in NUMBER.findall(column)]
            for column in re.findall(r"\[(.*?)\]", body, re.S)
        ]
        assert len(columns) == 3 and len(set(map(len, columns))) == 1, (path, axis, power)
        terms += [(axis, power, a, b, c) for a, b, c in zip(*columns) if a != 0.0]
    return terms


def places(terms, millennia):
    total = {axis: np.zeros_like(millennia) for axis in "XYZ"}
    for axis, power, a, b, c in terms:
        total[axis] += a * millennia**power * np.cos(b + c * millennia)
    return np.array([total[axis] for axis in "XYZ"])


def main(crate):
    rng = np.random.default_rng(1)
    millennia = rng.uniform(-0.402, 0.402, 1500)
    for planet, least_au in LEAST_AU.items():
        terms = series_of(os.path.join(crate, "src", "vsop87a", planet + ".rs"))
        size = [a * 0.402**power for _, power, a, _, _ in terms]
        whole = places(terms, millennia)

        def kept(cut):
            return [term for term, s in zip(terms, size) if abs(s) >= cut]

        def loss(cut):
            missed = places(kept(cut), millennia) - whole
            return np.degrees(np.linalg.norm(missed, axis=0).max() / least_au) * 3600

        low, high = 1e-12, 1e-5
        for _ in range(24):
            middle = math.sqrt(low * high)
            low, high = (middle, high) if loss(middle) <= LOSS_ARCSEC else (low, middle)
        chosen = kept(low)
        with open(planet + ".csv", "w") as out:
            out.write("axis,power,amplitude_au,phase_rad,rate_rad_per_millennium\n")
            for axis, power, a, b, c in chosen:
                out.write(f"{axis.lower()},{power},{a!r},{b!r},{c!r}\n")
        print(f"{planet}: {len(chosen)} of {len(terms)} terms, loss {loss(low):.4f} arcsec")


main(sys.argv[1])
