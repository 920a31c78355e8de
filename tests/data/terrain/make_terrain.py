"""Writes the elevation files and the expectations for them that the terrain tests use.

Usage: python make_terrain.py   (writes beside itself)
Needs from PyPI: numpy 2.4, rasterio 1.4.4, pyproj 3.7.2, matplotlib 3.11.2 (whose sample data
hold an excerpt of the SRTM elevations around the Jacksboro fault, Tennessee; public domain).

jacksboro.tif    the excerpt, as it is: 3 arc-seconds, whole metres
skyline.csv      what it makes of the skyline, by dense sampling along geodesics
kinds/*.tif      small made-up surfaces in many kinds of GeoTIFF
kinds.csv        elevations in them, read and placed by rasterio
hgt.csv          elevations in a made-up .hgt tile (the tests write the same bytes: `crc32`)
"""

import tempfile
import zlib
from pathlib import Path

import numpy as np
import rasterio
from matplotlib import cbook
from pyproj import Geod
from rasterio.transform import Affine
from rasterio.warp import transform as reproject

here = Path(__file__).parent
geod = Geod(ellps="WGS84")


def bilinear(values, column, row):
    """Between cell centres; nan outside the outermost centres."""
    rows, columns = values.shape
    inside = (column >= 0) & (row >= 0) & (column <= columns - 1) & (row <= rows - 1)
    column, row = np.where(inside, column, 0), np.where(inside, row, 0)
    left = np.minimum(np.floor(column).astype(int), columns - 2)
    top = np.minimum(np.floor(row).astype(int), rows - 2)
    x, y = column - left, row - top
    upper = values[top, left] * (1 - x) + values[top, left + 1] * x
    lower = values[top + 1, left] * (1 - x) + values[top + 1, left + 1] * x
    return np.where(inside, upper * (1 - y) + lower * y, np.nan)


# --- the excerpt and its skyline ---------------------------------------------------------------

with cbook.get_sample_data("jacksboro_fault_dem.npz") as dem:
    elevation = dem["elevation"]
    cell = float(dem["dx"])
    west, north = float(dem["xmin"]), float(dem["ymin"])  # the names are swapped there
with rasterio.open(
    here / "jacksboro.tif", "w", driver="GTiff", width=elevation.shape[1],
    height=elevation.shape[0], count=1, dtype="int16", crs="EPSG:4326",
    transform=Affine(cell, 0, west, 0, -cell, north), compress="deflate", predictor=2,
    zlevel=9, nodata=-32768,
) as out:
    out.write(elevation, 1)

with rasterio.open(here / "jacksboro.tif") as file:
    surface = file.read(1).astype(float)
    to_cell = ~file.transform


def ground(longitude, latitude):
    column, row = to_cell * (np.asarray(longitude), np.asarray(latitude))
    rows, columns = surface.shape
    outside = (column < 0) | (row < 0) | (column > columns) | (row > rows)
    # In the outer half of the outermost cells their own elevation holds.
    column = np.clip(column - 0.5, 0, columns - 1)
    row = np.clip(row - 0.5, 0, rows - 1)
    return np.where(outside, np.nan, bilinear(surface, column, row))


MARK = (-84.2122, 36.6028)  # longitude, latitude: a valley floor
EYE_M, K, RADIUS_M = 1.6, 0.13, 25_000.0
# A sphere whose surface falls away as the ray sees it.
LATITUDE = np.radians(MARK[1])
E2 = geod.es
MERIDIAN = geod.a * (1 - E2) / (1 - E2 * np.sin(LATITUDE) ** 2) ** 1.5
NORMAL = geod.a / np.sqrt(1 - E2 * np.sin(LATITUDE) ** 2)


def altitude_deg(azimuth_deg, longitude, latitude, eye_m):
    """The highest altitude along one geodesic, by the exact triangle on the swollen sphere."""
    distance = np.arange(60, RADIUS_M, 1.0)
    ones = np.ones_like(distance)
    lon, lat, _ = geod.fwd(longitude * ones, latitude * ones, azimuth_deg * ones, distance)
    height = ground(lon, lat)
    # Nearer to the mark than 200 m the program leaves terrain out, whatever the spot.
    _, _, from_mark = geod.inv(MARK[0] * ones, MARK[1] * ones, lon, lat)
    known = ~np.isnan(height) & (from_mark >= 200.0 - 1e-3)
    azimuth = np.radians(azimuth_deg)
    radius = 1 / (np.cos(azimuth) ** 2 / MERIDIAN + np.sin(azimuth) ** 2 / NORMAL) / (1 - K)
    angle = distance[known] / radius
    up = (radius + height[known]) * np.cos(angle) - (radius + eye_m)
    along = (radius + height[known]) * np.sin(angle)
    return np.degrees(np.arctan2(up, along).max())


ground_m = float(ground(*MARK))
with open(here / "skyline.csv", "w") as out:
    out.write("# Skyline of jacksboro.tif by dense geodesic sampling, from make_terrain.py\n")
    out.write(f"# from {MARK[1]}, {MARK[0]} (eye {EYE_M} m) and from spots; ")
    out.write(f"k {K}, radius {RADIUS_M:.0f} m, from 200 m on\n")
    out.write(f"# ground at the mark: {ground_m:.3f} m\n")
    out.write("# east_m,north_m,eye_m,azimuth_deg,altitude_deg\n")
    # Three spots; the eye is counted from the ground at the mark.
    for east, north_m, eye in [(0, 0, 1.6), (30, -40, 1.6), (-60, 80, 6.0)]:
        lon, lat, _ = geod.fwd(*MARK, np.degrees(np.arctan2(east, north_m)), np.hypot(east, north_m))
        for azimuth in np.arange(0, 360, 0.5 if east == 0 else 2.0):
            height = altitude_deg(azimuth, lon, lat, ground_m + eye)
            out.write(f"{east},{north_m},{eye},{azimuth},{height:.4f}\n")

# --- many kinds of GeoTIFF ---------------------------------------------------------------------

kinds = here / "kinds"
kinds.mkdir(exist_ok=True)
GEO = Affine(0.002, 0, -3.5, 0, -0.002, 51.1)
UTM30 = Affine(200, 0, 480_000, 0, -200, 5_660_000)
TURNED = UTM30 * Affine.rotation(20)
SOUTH = Affine(90, 0, 300_000, 0, -90, 6_250_000)
# name, type, crs, transform, nodata, point, creation options
KINDS = [
    ("u8_strips", "uint8", "EPSG:4326", GEO, None, False, {}),
    ("i16_lzw_point", "int16", "EPSG:4326", GEO, -9999, True, {"compress": "lzw"}),
    ("u16_deflate_tiles", "uint16", "EPSG:4258", GEO, 65535, False,
     {"compress": "deflate", "predictor": 2, "tiled": True, "blockxsize": 16, "blockysize": 32}),
    ("i32_utm", "int32", "EPSG:32630", UTM30, -2147483648, False, {"compress": "lzw", "predictor": 2}),
    ("f32_utm_tiles", "float32", "EPSG:25830", UTM30, -3.4028234663852886e38, False,
     {"compress": "deflate", "predictor": 3, "tiled": True, "blockxsize": 16, "blockysize": 16}),
    ("f32_turned", "float32", "EPSG:32630", TURNED, float("nan"), False, {"endianness": "big"}),
    ("f64_south_point", "float64", "EPSG:32756", SOUTH, -32768, True, {"BIGTIFF": "YES"}),
    ("u32_strips", "uint32", "EPSG:4326", GEO, None, False, {"blockysize": 7, "compress": "deflate"}),
]
random = np.random.default_rng(4)
rows, columns = 37, 45
r, c = np.mgrid[0:rows, 0:columns]
with open(here / "kinds.csv", "w") as out:
    out.write("# Elevations in kinds/*.tif by rasterio 1.4.4, from make_terrain.py; nan: a void\n")
    out.write("# file,latitude_deg,longitude_deg,elevation_m\n")
    for name, kind, crs, transform, nodata, point, options in KINDS:
        values = 120 + 60 * np.sin(r / 5) + 50 * np.cos(c / 7) + 0.25 * ((r * c) % 9)
        values = values.astype(kind)
        if nodata is not None:
            values[20:24, 30:33] = nodata
        path = kinds / f"{name}.tif"
        with rasterio.open(path, "w", driver="GTiff", width=columns, height=rows, count=1,
                           dtype=kind, crs=crs, transform=transform, nodata=nodata, **options) as file:
            if point:
                file.update_tags(AREA_OR_POINT="Point")
            file.write(values, 1)
        with rasterio.open(path) as file:
            known = file.read(1, masked=True).astype(float).filled(np.nan)
            for k in range(40):
                column, row = random.uniform(0, columns - 1), random.uniform(0, rows - 1)
                if k < 4:
                    column, row = random.uniform(30.1, 31.9), random.uniform(20.1, 22.9)
                elif k < 14:
                    # Cell centres exactly.
                    column, row = round(column), round(row)
                x, y = file.transform * (column + 0.5, row + 0.5)
                (longitude,), (latitude,) = reproject(file.crs, "EPSG:4326", [x], [y])
                left, top = min(int(column), columns - 2), min(int(row), rows - 2)
                voids = np.isnan(known[top:top + 2, left:left + 2]).sum()
                if k >= 4 and voids:
                    continue  # partly filled: the program's own rule
                height = float(bilinear(known, np.array(column), np.array(row)))
                out.write(f"{name},{latitude:.12f},{longitude:.12f},{height:.4f}\n")

# --- an .hgt tile ------------------------------------------------------------------------------

r, c = np.mgrid[0:1201, 0:1201].astype(np.int64)
tile = ((r * 7 + c * 13 + (r * c) // 50) % 3001 - 200).astype(">i2")
tile[(r // 40 + c // 40) % 11 == 0] = -32768
with tempfile.TemporaryDirectory() as folder:
    path = Path(folder) / "S34E151.hgt"
    path.write_bytes(tile.tobytes())
    with rasterio.open(path) as file, open(here / "hgt.csv", "w") as out:
        out.write("# Elevations in a made-up S34E151.hgt by rasterio 1.4.4, from make_terrain.py; ")
        out.write("nan: a void\n")
        out.write(f"# crc32,{zlib.crc32(tile.tobytes())}\n# latitude_deg,longitude_deg,elevation_m\n")
        known = file.read(1, masked=True).astype(float).filled(np.nan)
        for k in range(120):
            column, row = random.uniform(0, 1200), random.uniform(0, 1200)
            if k < 40:
                column, row = round(column), round(row)
            left, top = min(int(column), 1199), min(int(row), 1199)
            voids = np.isnan(known[top:top + 2, left:left + 2]).sum()
            if voids not in (0, 4):
                continue
            longitude, latitude = file.transform * (column + 0.5, row + 0.5)
            height = float(bilinear(known, np.array(column), np.array(row)))
            out.write(f"{latitude:.12f},{longitude:.12f},{height:.4f}\n")
