#!/usr/bin/env python3
"""Makes stars.csv: the stars to V 4.5. See README.md for the sources and how to call it."""

import csv
import json
import math
import re
import sys

FAINTEST_V = 4.5
# A name without a Hipparcos number belongs to the star within this distance, if any.
NAME_RADIUS_DEG = 60.0 / 3600.0
# iau.rs gives both stars of alpha Centauri the number of the fainter one.
CORRECTED_HIP = {"Rigil Kentaurus": 71683}


def read_photometry(path):
    """HIP -> (V, B-V), from the Hipparcos main catalogue as hipparcos_mag7.json carries it."""
    with open(path, encoding="utf-8") as file:
        return {hip: (v, b_v) for hip, _ra, _dec, _light_years, v, b_v in json.load(file)["stars"]}


def read_astrometry(path):
    """HIP -> (ra, dec in degrees, parallax, pm_ra*, pm_dec in mas), ICRS, epoch J1991.25."""
    stars = {}
    with open(path, encoding="ascii") as file:
        for line in file:
            hip = int(line[0:6])
            ra, dec = float(line[15:28]), float(line[29:42])
            parallax, pm_ra, pm_dec = float(line[43:50]), float(line[51:59]), float(line[60:68])
            stars[hip] = (math.degrees(ra), math.degrees(dec), parallax, pm_ra, pm_dec)
    return stars


def read_names(path):
    """(name, HIP or None, ra, dec in degrees), from the source text of iau.rs."""
    with open(path, encoding="utf-8") as file:
        rows = re.findall(
            r'\("([^"]+)", (?:Some\((\d+)\)|None), ([-\d.]+), ([-\d.]+)\)', file.read()
        )
    return [
        (name, CORRECTED_HIP.get(name, int(hip) if hip else None), float(ra), float(dec))
        for name, hip, ra, dec in rows
    ]


def separation_deg(ra1, dec1, ra2, dec2):
    """Small angles only."""
    d_ra = (ra1 - ra2 + 180.0) % 360.0 - 180.0
    return math.hypot(d_ra * math.cos(math.radians(dec1)), dec1 - dec2)


def name_stars(names, stars):
    """HIP -> name."""
    named = {}
    for name, hip, ra, dec in names:
        if hip is None:
            near = [(separation_deg(ra, dec, s[0], s[1]), h) for h, s in stars.items()]
            distance, hip = min(near)
            if distance > NAME_RADIUS_DEG:
                continue
            print(f"{name}: by position, HIP {hip}, {distance * 3600:.0f} arcsec", file=sys.stderr)
        if hip in stars:
            if hip in named:
                sys.exit(f"HIP {hip} has two names, {named[hip]} and {name}: correct one")
            named[hip] = name
    return named


def main(photometry_path, astrometry_path, names_path, out_path):
    photometry = read_photometry(photometry_path)
    astrometry = read_astrometry(astrometry_path)
    bright = {hip for hip, (v, _) in photometry.items() if v <= FAINTEST_V}
    for hip in sorted(bright - astrometry.keys()):
        print(f"HIP {hip}: no astrometry, left out", file=sys.stderr)
    stars = {hip: astrometry[hip] for hip in bright if hip in astrometry}
    names = name_stars(read_names(names_path), stars)
    with open(out_path, "w", encoding="utf-8", newline="") as file:
        out = csv.writer(file, lineterminator="\n")
        out.writerow(
            "hip name ra_deg dec_deg pm_ra_mas_yr pm_dec_mas_yr parallax_mas v_mag b_v_mag".split()
        )
        for hip in sorted(stars, key=lambda hip: (photometry[hip][0], hip)):
            ra, dec, parallax, pm_ra, pm_dec = stars[hip]
            v, b_v = photometry[hip]
            out.writerow(
                [hip, names.get(hip, ""), f"{ra:.8f}", f"{dec:.8f}", pm_ra, pm_dec, parallax, v, b_v]
            )
    print(f"{len(stars)} stars, {len(names)} names", file=sys.stderr)


if __name__ == "__main__":
    if len(sys.argv) != 5:
        sys.exit("usage: make_stars.py hipparcos_mag7.json hip2.dat iau.rs stars.csv")
    main(*sys.argv[1:])
