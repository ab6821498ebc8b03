"""Derives constellation_boundaries.csv and constellations.csv.

  python3 constellations.py constellation_data_roman87.dat NAMES.csv ..

The first file is CDS VI/42 as Debian's python3-astropy carries it (apt-get download, dpkg-deb -x); NAMES.csv holds
abbr, latin_name, genitive.
"""
import math
import sys
from os.path import join

from sphere import Boundaries, rows_of


def boundaries(source, target):
    with open(source) as f, open(target, "w") as out:
        rows = [line.split() for line in f if not line.startswith("#")]
        out.write("# Boundaries of the constellations, equinox B1875, from north to south: the first row with dec_lower <= dec and\n"
                  "# ra_from <= ra < ra_to (seconds of time) names the place. %d rows.\n"
                  "# source: N. G. Roman 1987, \"Identification of a Constellation from a Position\", PASP 99, 695; CDS catalogue VI/42, as\n"
                  "# carried by Debian python3-astropy 5.2.1 (BSD-3-Clause), coordinates/data/constellation_data_roman87.dat. The source rounds\n"
                  "# hours and degrees to 4 decimals; here they are the whole seconds and arcminutes of E. Delporte 1930 again.\n"
                  "ra_from_seconds,ra_to_seconds,dec_lower_arcmin,abbreviation\n" % len(rows))
        for low, high, dec, name in rows:
            out.write(f"{round(float(low) * 3600)},{round(float(high) * 3600)},{round(float(dec) * 60)},{name}\n")


def measures(table):
    """Area (square degrees), mean declination (degrees), least and greatest declination of each, equinox B1875."""
    area, moment, south_end, north_end = {}, {}, {}, {}
    for name, west, east, south, north in table.cells():
        width, s, n = math.radians((east - west) * 15), math.radians(south), math.radians(north)
        area[name] = area.get(name, 0) + width * (math.sin(n) - math.sin(s))
        # The integral of x cos x is x sin x + cos x.
        moment[name] = moment.get(name, 0) + width * (n * math.sin(n) + math.cos(n) - s * math.sin(s) - math.cos(s))
        south_end[name] = min(south_end.get(name, 90), south)
        north_end[name] = max(north_end.get(name, -90), north)
    return {k: (area[k] * math.degrees(1) ** 2, math.degrees(moment[k] / area[k]), south_end[k], north_end[k]) for k in area}


def constellations(names, table, target):
    measured = measures(table)
    with open(target, "w", encoding="utf-8") as out:
        out.write("# The 88 constellations. Area, mean declination and the two marks are computed from constellation_boundaries.csv (B1875):\n"
                  "# near_equator = mean declination of the area within 30 degrees of the equator (35); on_equator = the area, its border\n"
                  "# included, holds declination 0 (16; Canis Minor, Eridanus and Libra touch it with a border).\n"
                  "# source of names and genitives: CDS catalogue VI/42 (N. G. Roman 1987, PASP 99, 695), its dictionary, spelling corrected.\n"
                  "abbreviation,name,genitive,area_sqdeg,mean_declination_deg,near_equator,on_equator\n")
        for r in sorted(rows_of(names), key=lambda r: r["abbr"]):
            area, mean, south, north = measured[r["abbr"]]
            out.write(f"{r['abbr']},{r['latin_name']},{r['genitive']},{area:.3f},{mean:.3f},{int(abs(mean) <= 30)},"
                      f"{int(south <= 0 <= north)}\n")


if __name__ == "__main__":
    roman, names_file, out_folder = sys.argv[1:]
    table_file = join(out_folder, "constellation_boundaries.csv")
    boundaries(roman, table_file)
    constellations(names_file, Boundaries.read(table_file), join(out_folder, "constellations.csv"))
