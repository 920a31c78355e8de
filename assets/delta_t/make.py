"""Makes observed.in and splines.in beside it.

    pip install astropy-iers-data pyerfa skyfield numpy
    python make.py

Read: eopc04.1962-now (IERS EOP 20 C04, UT1-UTC at 0h UTC, daily), finals2000A.all (IERS
Bulletin A, the last months and a year of prediction), both carried by astropy-iers-data;
TAI-UTC with its drifts before 1972 from pyerfa (SOFA's dat); Table-S15.2020 of Morrison, Stephenson, Hohenkerk and Zawilski 2021 (Proc.
R. Soc. A 477, 20200776), carried by skyfield as delta_t.npz.
"""

import pathlib

import astropy_iers_data as iers
import erfa
import numpy
import skyfield.data

HERE = pathlib.Path(__file__).parent
FIRST_MJD = 37665  # 1962-01-01, the first day of the C04 series
STEP_DAYS = 30
TT_MINUS_TAI_S = 32.184


def lines(name):
    return pathlib.Path(name).read_text(encoding="utf-8", errors="replace").splitlines()


def tai_minus_utc_s(mjd):
    year, month, day, fraction = erfa.jd2cal(2400000.5, mjd)
    return float(erfa.dat(year, month, day, fraction))


ut1_minus_utc_s = {}
for row in lines(iers.IERS_A_FILE):
    if row[58:68].strip():
        ut1_minus_utc_s[int(float(row[7:15]))] = float(row[58:68])
eopc04 = pathlib.Path(iers.IERS_A_FILE).parent / "eopc04.1962-now"
for row in lines(eopc04):
    if not row.startswith("#"):
        fields = row.split()
        last_final = int(float(fields[4]))
        ut1_minus_utc_s[last_final] = float(fields[7])

last = max(ut1_minus_utc_s)
days = range(FIRST_MJD, last + 1, STEP_DAYS)
values = [TT_MINUS_TAI_S + tai_minus_utc_s(day) - ut1_minus_utc_s[day] for day in days]
text = [
    "// TT - UT1, seconds, at 0h UTC of every 30th day from 1962-01-01 (MJD 37665).",
    f"// IERS EOP 20 C04 to MJD {last_final}, then Bulletin A with its prediction to MJD {last}.",
    "// Made by make.py; facts published by the IERS for free use.",
    "[",
]
for start in range(0, len(values), 8):
    text.append("    " + " ".join(f"{v:.4f}," for v in values[start : start + 8]))
text.append("]")
(HERE / "observed.in").write_text("\n".join(text) + "\n")

table = numpy.load(pathlib.Path(skyfield.data.__file__).parent / "delta_t.npz")
rows = [row for row in table["Table-S15.2020.txt"].T if row[1] > 1600 and row[0] < 1962]
text = [
    "// TT - UT1, seconds: one cubic a row, (first year, last year, a3, a2, a1, a0),",
    "// value = a0 + a1 t + a2 t^2 + a3 t^3, t from 0 to 1 between the years.",
    "// Morrison, Stephenson, Hohenkerk and Zawilski 2021, Table S15.2020, rows 1600 to 1962.",
    "// Made by make.py.",
    "[",
]
text += ["    (" + ", ".join(f"{v:.3f}" for v in row) + ")," for row in rows]
text.append("]")
(HERE / "splines.in").write_text("\n".join(text) + "\n")
print(f"{len(values)} observed values to MJD {days[-1]}, {len(rows)} cubics")
