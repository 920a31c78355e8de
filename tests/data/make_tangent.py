"""Writes tangent.csv: where places around five marks lie east and north of them.

Needs pyproj (PyPI). The places are laid out along geodesics, and their plan is the azimuthal
equidistant projection on WGS84, which keeps distance and bearing from the mark.
"""

import pyproj

MARKS = [(51.05, -3.42), (69.421, 19.27), (-33.884, 149.275), (0.042, 36.915), (-16.77, 179.995)]
WAYS = [(0, 100), (63, 250), (200, 1000), (315, 9999), (90, 9999), (45, 9000)]

geodesic = pyproj.Geod(ellps="WGS84")
with open("tangent.csv", "w") as table:
    table.write("# Azimuthal equidistant, WGS84: pyproj %s, PROJ %s\n" % (pyproj.__version__, pyproj.proj_version_str))
    table.write("mark_lat_deg,mark_lon_deg,lat_deg,lon_deg,east_m,north_m\n")
    for latitude, longitude in MARKS:
        plan = pyproj.Proj(proj="aeqd", lat_0=latitude, lon_0=longitude, ellps="WGS84")
        for azimuth, distance in WAYS:
            place_longitude, place_latitude, _ = geodesic.fwd(longitude, latitude, azimuth, distance)
            east, north = plan(place_longitude, place_latitude)
            table.write(
                f"{latitude},{longitude},{place_latitude:.10f},{place_longitude:.10f},{east:.4f},{north:.4f}\n"
            )
