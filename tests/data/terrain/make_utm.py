"""Writes utm.csv and geodesic.csv: coordinates by PROJ (PyPI pyproj 3.7.2).

Usage: python make_utm.py   (writes beside itself)
"""

from pathlib import Path

import numpy as np
from pyproj import CRS, Geod, Transformer

here = Path(__file__).parent
random = np.random.default_rng(20)

with open(here / "utm.csv", "w") as out:
    out.write("# UTM coordinates by PROJ (pyproj 3.7.2), from make_utm.py\n")
    out.write("# epsg,latitude_deg,longitude_deg,easting_m,northing_m\n")
    for k in range(60):
        number = int(random.integers(1, 61))
        south = bool(random.integers(0, 2))
        epsg = (32700 if south else 32600) + number
        # Within the zone, and up to 12 degrees beside its meridian: a tile may reach over.
        longitude = number * 6 - 183 + float(random.uniform(-12, 12))
        longitude = (longitude + 180) % 360 - 180
        latitude = float(random.uniform(-80, 0) if south else random.uniform(0, 84))
        latitude, longitude = round(latitude, 6), round(longitude, 6)
        to_utm = Transformer.from_crs(CRS(4326), CRS(epsg), always_xy=True)
        easting, northing = to_utm.transform(longitude, latitude)
        out.write(f"{epsg},{latitude},{longitude},{easting:.4f},{northing:.4f}\n")

geod = Geod(ellps="WGS84")
with open(here / "geodesic.csv", "w") as out:
    out.write("# Ends of geodesics on WGS84 by PROJ (pyproj 3.7.2), from make_utm.py\n")
    out.write("# latitude_deg,longitude_deg,azimuth_deg,distance_m,end_latitude_deg,end_longitude_deg\n")
    for k in range(40):
        latitude = round(float(random.uniform(-75, 75)), 6)
        longitude = round(float(random.uniform(-180, 180)), 6)
        azimuth = round(float(random.uniform(0, 360)), 4)
        distance = [200, 5_000, 30_000, 60_000][k % 4]
        lon, lat, _ = geod.fwd(longitude, latitude, azimuth, distance)
        out.write(f"{latitude},{longitude},{azimuth},{distance},{lat:.9f},{lon:.9f}\n")
