"""Makes the Moon's series (moon.csv) from the ELP/MPP02 coefficients.

Source: Chapront & Francou 2003 (Astron. Astrophys. 404, 735), constants fitted to DE405, as
carried by the npm package `astronomia` 4.2.0 (MIT) in data/elpMppDeFull.js, where the arguments
are already worked out as polynomials of time. Call: python3 make_moon.py elpMppDeFull.js

Each line is amplitude * T**power * sin(c0 + c1 T + c2 T^2 + c3 T^3 + c4 T^4), T in Julian
centuries TDB from J2000; the longitude also has the mean longitude W1. The series are cut where
the loss, measured at random instants of 1598-2402, stays within LOSS_ARCSEC of the Moon's
direction and LOSS_KM of its distance.
"""
import json
import re
import sys

import numpy as np

LOSS_ARCSEC = 0.15
LOSS_KM = 0.15


def read(path):
    text = open(path).read()
    text = text[text.index("{"):text.rindex("}") + 1]
    text = re.sub(r"(\w+): (?=[\[{\"])", r'"\1": ', text)
    return json.loads(re.sub(r",(\s*[}\]])", r"\1", text))


def total(rows, t):
    result = np.zeros_like(t)
    for power, a, c in rows:
        result += a * t**power * np.sin(np.polynomial.polynomial.polyval(t, c))
    return result


def main(path):
    series = read(path)
    t = np.random.default_rng(1).uniform(-4.02, 4.02, 400)
    with open("moon.csv", "w") as out:
        out.write("# mean longitude W1, rad and powers of Julian centuries: " + " ".join(map(repr, series["W1"])) + "\n")
        out.write("part,power,amplitude,c0_rad,c1,c2,c3,c4\n")
        for part, limit in (("L", LOSS_ARCSEC / 1.5), ("B", LOSS_ARCSEC / 1.5), ("R", LOSS_KM)):
            rows = [(int(p), r[0], r[1:]) for p, rs in series[part].items() for r in rs]
            whole = total(rows, t)
            size = np.array([abs(a) * 4.02**p for p, a, _ in rows])
            low, high = 1e-7, 1.0
            for _ in range(16):
                middle = (low * high) ** 0.5
                lost = total([r for r, s in zip(rows, size) if s < middle], t)
                low, high = (middle, high) if np.abs(lost).max() <= limit else (low, middle)
            chosen = [r for r, s in zip(rows, size) if s >= low]
            print(part, len(chosen), "of", len(rows), "terms; loss", np.abs(whole - total(chosen, t)).max())
            for power, a, c in chosen:
                c = (list(c) + [0.0] * 5)[:5]
                out.write(f"{part},{power},{a!r}," + ",".join(map(repr, c)) + "\n")


if __name__ == "__main__":
    main(sys.argv[1])
