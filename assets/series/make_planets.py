"""Trims VSOP87A to the files *.txt beside this.

    pip install numpy jplephem
    python make_planets.py SOURCE_FOLDER_OF_THE_CRATE_vsop87_3.0.0/src

A term goes when its greatest amplitude over 1598-2403, A |t|^power, is below one threshold for
the whole planet; the threshold is the largest for which the trimmed series stays, at 4000
random instants, within 0.005 arcsec of the full one as seen from the planet's least distance
from the Earth (for the Earth: as seen from Venus at its closest).
"""

import sys

import numpy

from vsop87 import (ARCSEC, DAYS_PER_MILLENNIUM, FIRST_DAY, HERE, LAST_DAY, PLANETS, evaluate,
                    read_asset, read_crate)

ALLOWED = 0.005 * ARCSEC
# Least distance from the Earth, au, rounded down.
LEAST_DISTANCE_AU = {
    "mercury": 0.54, "venus": 0.26, "earth": 0.26, "mars": 0.37,
    "jupiter": 3.9, "saturn": 7.9, "uranus": 17.2, "neptune": 28.6,
}
T_MAX = max(-FIRST_DAY, LAST_DAY) / DAYS_PER_MILLENNIUM


def split(series, threshold):
    kept, dropped = {}, {}
    for (axis, power), terms in series.items():
        keep = numpy.abs(terms[:, 0]) * T_MAX**power >= threshold
        kept[(axis, power)] = terms[keep]
        dropped[(axis, power)] = terms[~keep]
    return kept, dropped


def loss(series, threshold, days):
    return numpy.linalg.norm(evaluate(split(series, threshold)[1], days), axis=0).max()


def main(source_folder):
    days = numpy.random.default_rng(1987).uniform(FIRST_DAY, LAST_DAY, 4000)
    for planet in PLANETS:
        full = read_crate(source_folder, planet)
        allowed_au = ALLOWED * LEAST_DISTANCE_AU[planet]
        low, high = allowed_au / 1000, allowed_au
        while high / low > 1.05:
            middle = (low * high) ** 0.5
            if loss(full, middle, days) <= allowed_au:
                low = middle
            else:
                high = middle
        kept, _ = split(full, low)
        count = sum(map(len, kept.values()))
        of = sum(map(len, full.values()))
        with open(HERE / f"{planet}.txt", "w") as out:
            out.write("# axis power A_1e-11_au B_rad C_rad_per_millennium\n")
            for (axis, power), terms in sorted(kept.items()):
                for a, b, c in terms:
                    digits = max(1, len(str(round(abs(a) * 1e11))))
                    phase = f"{b:.{digits}f}"  # good to the last digit of A
                    out.write(f"{axis} {power} {a * 1e11:.0f} {phase} {c:.11f}".rstrip("0"))
                    out.write("\n")
        # Of the file as written, with its rounded amplitudes and phases.
        difference = evaluate(read_asset(planet), days) - evaluate(full, days)
        lost = numpy.linalg.norm(difference, axis=0).max()
        print(f"| {planet} | {of} | {count} | {lost:.1e} | {lost / LEAST_DISTANCE_AU[planet] / ARCSEC:.4f} |")


if __name__ == "__main__":
    main(sys.argv[1])
