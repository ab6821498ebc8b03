"""Derives showers.csv: the working list of visual meteor showers, with southern ones from two further lists.

  python3 showers.py LIST.csv ..

LIST.csv: code, name, activity_start, activity_end, max_date_2025, sol_lon_max_deg_J2000, ra_deg, dec_deg, speed_km_s, speed_kind, r,
zhr, source_id (I25, IX, NM), note.
"""
import math
import re
import sys
from os.path import join

from sphere import rows_of, separation_deg, vector

MONTHS = "Jan Feb Mar Apr May Jun Jul Aug Sep Oct Nov Dec".split()
# Nearer to the Sun than this at its peak a radiant is up by day (the calendar puts daytime showers within about 30 degrees).
DAYTIME_DEG = 35
OBLIQUITY = math.radians(23.4392911)

# Steepness before and after the peak, log10 of the rate per degree of the Sun's longitude: the forecast list of NASA's Meteoroid
# Environment Office, columns "Bp" and "Bm", where 0 stands for a fall like the rise (share/flux_showers.csv of
# github.com/CroatianMeteorNetwork/RMS, commit 027f864ccdd7766c1cfbfa003dae8376997b797b).
STEEPNESS = {
    "CAP": (0.059, 0.091), "STA": (0.026, 0), "GEM": (0.15, 0.462), "SDA": (0.109, 0.071), "PER": (0.35, 0), "ORI": (0.12, 0.119),
    "DRA": (7.225, 0), "QUA": (0.865, 0.827), "KCG": (0.069, 0), "LEO": (0.55, 0), "URS": (2.292, 1.258), "HYD": (0.1, 0),
    "NTA": (0.026, 0), "MON": (0.25, 0), "LMI": (0.093, 0.079), "ETA": (0.125, 0.079), "SSG": (0.037, 0), "ARI": (0.065, 0.055),
    "PAU": (0.4, 0), "AUR": (0.19, 0), "SPE": (0.193, 0), "DSX": (0.063, 0.167),
    # That list's Lyrids peak 0.8 degree later than here. The 2025 calendar, p. 7: above half of the peak for 32.1 h on average.
    "LYR": (round(math.log10(2) / (32.1 / 24 / 2 * 0.972), 2), 0),
}
# What that file itself uses for showers without a measured profile.
ORDINARY_STEEPNESS = 0.2


def solar_longitude_j2000(month, day, hour=12):
    """Geometric, degrees, of a moment of 2025: Meeus, Astronomical Algorithms (1998), ch. 25, to 0.01 degree."""
    days_before = [0, 31, 59, 90, 120, 151, 181, 212, 243, 273, 304, 334][month - 1]
    d = 9131.5 + days_before + day - 1 + hour / 24  # from J2000.0; 2025 January 1, 0 h
    t = d / 36525
    m = math.radians(357.52911 + 35999.05029 * t)
    centre = (1.914602 - 0.004817 * t) * math.sin(m) + 0.019993 * math.sin(2 * m) + 0.000289 * math.sin(3 * m)
    return (280.46646 + 36000.76983 * t + centre - 1.396971 * t) % 360


def date_of_longitude(longitude):
    """Month and day of 2025 (UT noon) on which the Sun is nearest to it."""
    lengths = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31]
    days = [(m + 1, d) for m, n in enumerate(lengths) for d in range(1, n + 1)]
    return min(days, key=lambda md: abs((solar_longitude_j2000(*md) - longitude + 180) % 360 - 180))


def month_day(text):
    month, day = text.split()
    return MONTHS.index(month) + 1, int(day)


def plain(value):
    return f"{value:.3f}".rstrip("0").rstrip(".")


def shower(row):
    note = row["note"]
    found = {"code": row["code"], "name": row["name"].replace(" mu ", " μ-"), "source": row["source_id"], "ra": float(row["ra_deg"]), "dec": float(row["dec_deg"]),
             "r": float(row["r"]), "zhr": row["zhr"] if row["zhr"] not in ("", "Var") else "", "speed": float(row["speed_km_s"])}
    if row["source_id"] == "NM":  # the peak of activity and its bounds are in the note
        begin, end = map(float, re.search(r"solar longitude begin (\S+) end (\S+);", note).groups())
        found["start"], found["end"] = date_of_longitude(begin), date_of_longitude(end)
        found["longitude"] = float(re.search(r"activity-peak solar longitude (\S+)", note).group(1))
    else:
        found["start"], found["end"] = month_day(row["activity_start"]), month_day(row["activity_end"])
        printed = row["sol_lon_max_deg_J2000"]
        # A list without longitudes: that of noon on its date, to the whole degree.
        found["longitude"] = float(printed) if printed else round(solar_longitude_j2000(*month_day(row["max_date_2025"]))) % 360
    if row["speed_kind"] == "V_g":  # the Earth's pull added: escape speed 11.1 km/s
        found["speed"] = round(math.sqrt(found["speed"] ** 2 + 124))
    return found


def main(source, out):
    showers = []
    for row in rows_of(source):
        first_list = row["source_id"] == "I25"
        if row["code"] == "ANT" or any(s["code"] == row["code"] for s in showers):
            continue
        if first_list or float(row["dec_deg"]) < 0:
            showers.append(shower(row))
    showers.sort(key=lambda s: s["longitude"])
    with open(join(out, "showers.csv"), "w", encoding="utf-8") as f:
        f.write("# The working list of visual meteor showers. Longitude of the Sun at the peak and radiant: equinox J2000, degrees; speed before\n"
                "# the air slows it; r: population index; zhr empty where it varies from year to year; daytime: the radiant is within 35 degrees of\n"
                "# the Sun at the peak. rise, fall: log10 of the rate per degree of the Sun's longitude before and after the peak.\n"
                "# source I25: International Meteor Organization, 2025 Meteor Shower Calendar (ed. J. Rendtel), table 5, all its rows but the\n"
                "# antihelion source, whose radiant moves through the year. IX, southern showers it lacks: its working list as a web service\n"
                "# (2025), peak's longitude from the date given. NM, the same: forecast list of NASA's Meteoroid Environment Office with radiants\n"
                "# of the Global Meteor Network. Rise and fall: that forecast list, LYR from the calendar; 0.2 where neither has one. Dates of an\n"
                "# activity known by longitudes are of 2025.\n"
                "code,name,start_month,start_day,end_month,end_day,peak_longitude_deg,ra_deg,dec_deg,speed_km_s,r,zhr,daytime,rise,fall,source\n")
        for s in showers:
            sun = math.radians(s["longitude"])
            sun_ra = math.degrees(math.atan2(math.sin(sun) * math.cos(OBLIQUITY), math.cos(sun)))
            sun_dec = math.degrees(math.asin(math.sin(sun) * math.sin(OBLIQUITY)))
            near = separation_deg(vector(sun_ra, sun_dec), vector(s["ra"], s["dec"])) < DAYTIME_DEG
            rise, fall = STEEPNESS.get(s["code"], (ORDINARY_STEEPNESS, 0))
            f.write(",".join([s["code"], s["name"], *map(str, s["start"] + s["end"]), plain(s["longitude"]), plain(s["ra"]), plain(s["dec"]),
                              plain(s["speed"]), plain(s["r"]), s["zhr"], "1" if near else "0", plain(rise), plain(fall or rise),
                              s["source"]]) + "\n")


if __name__ == "__main__":
    main(*sys.argv[1:])
