"""Derives show_objects.csv: what is worth showing to a group beyond the Solar System.

  python3 show_objects.py CATALOGUES ..

CATALOGUES: the folder /usr/share/siril/catalogue of Debian's siril-common (messier.txt, ngc.txt, ic.txt: code; right ascension
in hours; sign; declination in degrees; greatest diameter in arcminutes; magnitude; name; alias; equinox J2000). stars.csv and
constellation_boundaries.csv must be there already.

The choice, the kinds, the ranks, the axis ratios and what counts as a bare-eye object are from memory. What else is from memory
stands in the column from_memory.
"""
import math
import re
import sys
from os.path import join

from sphere import Boundaries, rows_of, vector

# kind: code, row of the catalogues (where it differs), rank (3 showpiece, 2, 1), axis ratio, and what replaces the row's
# magnitude or size (from memory: the row lacks it, or counts what a small instrument does not show).
DEEP_SKY = {
    "open-cluster": [
        ("M45", "", 3), ("M44", "NGC2632", 3), ("NGC 869", "", 3, 1, {"size": 45}), ("M6", "NGC6405", 2), ("M7", "NGC6475", 3),
        ("M11", "NGC6705", 3), ("M35", "NGC2168", 2), ("M36", "NGC1960", 1), ("M37", "NGC2099", 2), ("M38", "NGC1912", 1),
        ("M41", "NGC2287", 2), ("M34", "NGC1039", 1), ("M39", "NGC7092", 1), ("M46", "NGC2437", 1), ("M47", "NGC2422", 2),
        ("M48", "NGC2548", 1), ("M67", "NGC2682", 1), ("M23", "NGC6494", 1), ("M25", "IC4725", 1), ("M52", "NGC7654", 1),
        ("NGC 457", "", 2), ("NGC 752", "", 2), ("NGC 7789", "", 1), ("NGC 2244", "", 2), ("NGC 2264", "", 2),
        ("NGC 2362", "", 2), ("IC 4665", "", 1), ("NGC 6633", "", 1), ("NGC 2451", "", 1), ("NGC 2477", "", 2),
        ("NGC 2516", "", 2), ("IC 2391", "", 2), ("IC 2602", "", 3), ("NGC 3293", "", 2), ("NGC 3532", "", 3),
        ("NGC 3766", "", 2), ("NGC 4755", "", 3), ("NGC 6087", "", 1), ("NGC 6231", "", 2)],
    "globular-cluster": [
        ("M13", "NGC6205", 3), ("M22", "NGC6656", 3), ("M3", "NGC5272", 2), ("M5", "NGC5904", 2), ("M15", "NGC7078", 2),
        ("M4", "NGC6121", 2), ("M2", "NGC7089", 2), ("M92", "NGC6341", 2), ("M10", "NGC6254", 1), ("M55", "NGC6809", 1),
        ("M79", "NGC1904", 1), ("NGC 104", "", 3), ("NGC 5139", "", 3, 1, {"magnitude": 3.9}), ("NGC 362", "", 1),
        ("NGC 6397", "", 2), ("NGC 6752", "", 2), ("NGC 3201", "", 1)],
    "nebula": [
        ("M42", "NGC1976", 3, 0.9), ("M8", "NGC6523", 3, 0.6, {"magnitude": 5.8}),
        ("M17", "NGC6618", 2, 0.6, {"magnitude": 6.0, "size": 11}), ("M20", "NGC6514", 2, 0.9, {"magnitude": 6.3}),
        ("M16", "NGC6611", 1, 0.8), ("M1", "NGC1952", 2, 0.7), ("NGC 7000", "", 1, 0.8),
        ("NGC 3372", "", 3, 1, {"magnitude": 3.0, "size": 60}), ("NGC 2070", "", 3, 0.8, {"magnitude": 5.0})],
    "planetary-nebula": [
        ("M57", "NGC6720", 3, 0.75, {"size": 1.4}), ("M27", "NGC6853", 3, 0.8), ("NGC 7293", "", 2, 0.8),
        ("NGC 7009", "", 2, 0.7), ("NGC 3132", "", 2, 0.8), ("NGC 3242", "", 2, 0.9), ("NGC 2392", "", 2),
        ("NGC 6543", "", 2, 0.9), ("NGC 7662", "", 2, 0.9), ("NGC 3918", "", 2)],
    "galaxy": [
        ("M31", "NGC224", 3, 0.33, {"size": 120}), ("M33", "NGC598", 2, 0.6), ("M81", "NGC3031", 3, 0.52),
        ("M82", "NGC3034", 3, 0.4),
        ("M51", "NGC5194", 2, 0.65), ("M101", "NGC5457", 1, 0.95), ("M104", "NGC4594", 3, 0.4), ("M83", "NGC5236", 2, 0.9),
        ("M64", "NGC4826", 2, 0.54), ("M66", "NGC3627", 2, 0.46), ("M87", "NGC4486", 1, 0.8), ("NGC 253", "", 3, 0.25),
        ("NGC 55", "", 2, 0.17), ("NGC 5128", "", 3, 0.78), ("NGC 4565", "", 2, 0.13), ("NGC 292", "", 3, 0.6)],
    "star-cloud": [("M24", "", 2, 0.5)],
}
# Not in the catalogues: all from memory. Code, kind, right ascension (h m), declination, magnitude, diameter, rank, axis ratio.
MEMORY = [
    ("Mel 25", "open-cluster", (4, 26.9), 15.87, 0.5, 330, 3, 1), ("Mel 20", "open-cluster", (3, 24.3), 49.87, 1.2, 185, 2, 1),
    ("Mel 111", "open-cluster", (12, 25.1), 26.1, 1.8, 275, 2, 1), ("Cr 399", "open-cluster", (19, 25.4), 20.18, 3.6, 60, 2, 1),
    ("LMC", "galaxy", (5, 23.6), -69.75, 0.9, 400, 3, 0.85),
]
# Doubles: HR of the brighter star, HR of the other where it has a row of its own, rank, and a separation or a difference in
# magnitude where the catalogue has none, means another pair, or an orbit has moved the stars since (then about 2027).
DOUBLES = [
    (7417, 7418, 3), (5054, 5055, 3, {"separation": 14.4}), (603, 604, 3), (4057, 4058, 3), (7051, 7053, 3),
    (2891, 2890, 3, {"separation": 5.7}), (546, 545, 2), (7948, 7947, 3), (219, 0, 3, {"separation": 13.5}), (4915, 4914, 3),
    (6406, 6407, 3), (5506, 5505, 2), (8085, 8086, 3, {"separation": 31.9}), (8571, 0, 2), (3475, 3474, 3), (6555, 6554, 2),
    (1212, 0, 2), (2356, 2357, 3), (5329, 5328, 1), (7141, 7142, 2), (7754, 7747, 2), (7735, 7730, 2),
    (5984, 5985, 2, {"separation": 13.6}), (4792, 0, 2), (8559, 8558, 1, {"separation": 2.4}), (2764, 0, 3), (424, 0, 2),
    (4825, 4826, 2, {"separation": 3.7}), (7056, 7057, 1), (7776, 7775, 1, {"separation": 205}), (1713, 0, 1), (6134, 0, 1),
    (5459, 5460, 3, {"separation": 9}), (4730, 4731, 3), (3207, 3206, 3), (897, 898, 3), (126, 127, 2),
    (487, 486, 2, {"separation": 11.5}), (4898, 4899, 2), (3890, 3891, 1), (5210, 0, 2), (5925, 5926, 2), (5646, 5647, 2),
    (8140, 0, 1), (2948, 2949, 2), (2736, 2735, 2),
]
ALPHABET = dict(zip("αβγδεζηθικλμνξοπρστυφχψω",
                    "alpha beta gamma delta epsilon zeta eta theta iota kappa lambda mu nu xi omicron pi rho sigma tau upsilon phi chi "
                    "psi omega".split()))
SUPERSCRIPTS = "¹²³⁴⁵⁶⁷⁸⁹"  # the pair goes by its letter alone
# Letters by which the trade knows doubles that have no row with one.
LETTERS = {2764: "145 CMa", 487: "p Eri", 2948: "k Pup"}
# Common names, which the words files spell.
NAMED = {"M45", "M44", "NGC 869", "M6", "M7", "M11", "M42", "M8", "M17", "M20", "M16", "M1", "M13", "M22", "M57", "M27",
         "M31", "M33", "M81", "M82", "M51", "M101", "M104", "M83", "M64", "M24", "M87", "NGC 104", "NGC 5139", "NGC 7293",
         "NGC 7009", "NGC 3132", "NGC 3242", "NGC 2392", "NGC 6543", "NGC 7662", "NGC 7000", "NGC 2244", "NGC 2264",
         "NGC 3372", "NGC 2070", "NGC 4755", "IC 2602", "NGC 253", "NGC 5128", "NGC 292", "LMC", "Mel 25", "Mel 20",
         "Mel 111", "Cr 399", "NGC 3532", "NGC 457", "NGC 4565", "NGC 7789"}
NAMED_DOUBLES = {7417, 5054, 603, 4057, 2891, 546, 4915, 6406, 5506, 4825, 424, 5459, 4730, 897, 7754, 5984, 1713, 6134, 7776}

# What observers call bare-eye objects under a dark sky, as more than a star: all others take optics, whatever their light sums to.
BARE_EYE = {"M45", "Mel 25", "M44", "NGC 869", "M6", "M7", "M41", "Mel 20", "Mel 111", "NGC 2451", "NGC 2516", "IC 2391", "IC 2602",
            "NGC 3532", "NGC 6231", "NGC 104", "NGC 5139", "M42", "M8", "NGC 3372", "M31", "NGC 292", "LMC", "M24"}
# How a pair looks, the brighter star first: by the B-V of both where the catalogue has them, else from memory (common practice).
LOOKS = {7417: "gold-blue", 603: "gold-blue", 3475: "yellow-blue", 7735: "orange-blue", 7776: "yellow-blue", 8085: "orange-orange",
         7754: "yellow-yellow", 5459: "yellow-yellow"}
LOOKS_BY_MEMORY = {2764: "orange-blue", 8571: "yellow-blue", 5506: "orange-blue", 4057: "gold-gold",
                   7051: "double-double"}
B_V = {"gold": (1.1, 1.5), "orange": (1.1, 1.8), "yellow": (0.6, 1.1), "blue": (-0.3, 0.1)}


def catalogue(folder):
    """Right ascension and declination (degrees), magnitude, size, by code without a space."""
    found = {}
    for name in ("messier.txt", "ngc.txt", "ic.txt"):
        with open(join(folder, name), encoding="utf-8") as f:
            for line in list(f)[1:]:
                code, ra, sign, dec, size, magnitude = line.split(";")[:6]
                magnitude = magnitude.split(" ")[0]
                found.setdefault(code, (float(ra) * 15, float(sign + dec), float(magnitude) if magnitude else None,
                                        float(size) if size else None))
    return found


def key_of(code):
    return re.sub(r"[^a-z0-9]+", "-", "".join(ALPHABET.get(c, c) for c in code).lower())


def deep_sky(known):
    for kind, choices in DEEP_SKY.items():
        for code, row, rank, *rest in choices:
            ratio, memory = (rest[0] if rest else 1), (rest[1] if len(rest) > 1 else {})
            ra, dec, magnitude, size = known[row or code.replace(" ", "")]
            if magnitude is None and code.replace(" ", "") in known:
                magnitude = known[code.replace(" ", "")][2]
            if code == "NGC 869":  # the two clusters as one sight, between them
                ra2, dec2, magnitude2, _ = known["NGC884"]
                ra, dec = (ra + ra2) / 2, (dec + dec2) / 2
                magnitude = -2.5 * math.log10(10 ** (-0.4 * magnitude) + 10 ** (-0.4 * magnitude2))
            yield {"code": code, "name": key_of(code) if code in NAMED else "", "kind": kind, "rank": rank, "ra": ra, "dec": dec,
                   "magnitude": memory.get("magnitude", magnitude), "size": memory.get("size", size), "axis_ratio": ratio,
                   "from_memory": "+".join(sorted(memory))}
    for code, kind, (h, m), dec, magnitude, size, rank, ratio in MEMORY:
        yield {"code": code, "name": key_of(code), "kind": kind, "rank": rank, "ra": 15 * (h + m / 60), "dec": dec,
               "magnitude": magnitude, "size": size, "axis_ratio": ratio, "from_memory": "magnitude+place+size"}


def doubles(stars):
    for hr, other, rank, *rest in DOUBLES:
        memory, star = (rest[0] if rest else {}), stars[hr]
        separation = memory.get("separation") or float(star["separation"])
        v = float(star["v"])
        second = float(stars[other]["v"]) if other else v + float(star["magnitude_difference"])
        area = star["designation_constellation"] or star["constellation"]
        code = LETTERS.get(hr) or f"{star['bayer'].rstrip(SUPERSCRIPTS) or star['flamsteed']} {area}"
        if hr in LOOKS:
            for colour, row in zip(LOOKS[hr].split("-"), (star, stars[other])):
                assert B_V[colour][0] <= float(row["b_v"]) <= B_V[colour][1], (code, colour)
        yield {"code": code, "name": key_of(code) if hr in NAMED_DOUBLES else "", "kind": "double-star", "rank": rank,
               "ra": float(star["ra_deg"]), "dec": float(star["dec_deg"]), "magnitude": v, "second_magnitude": f"{second:.2f}",
               "size": separation / 60, "axis_ratio": 1, "hr": hr, "look": LOOKS.get(hr) or LOOKS_BY_MEMORY.get(hr, ""),
               "from_memory": "+".join(sorted(memory) + (["look"] if hr in LOOKS_BY_MEMORY else []))}


def main(folder, target):
    stars = {int(r["hr"]): r for r in rows_of(join(target, "stars.csv"))}
    areas = Boundaries.read(join(target, "constellation_boundaries.csv"))
    rows = list(deep_sky(catalogue(folder))) + list(doubles(stars))
    assert len({r["code"] for r in rows}) == len(rows)
    assert BARE_EYE <= {r["code"] for r in rows}
    columns = ("code,name,kind,rank,ra_deg,dec_deg,magnitude,second_magnitude,size_arcmin,axis_ratio,constellation,hr,"
               "look,bare_eye,from_memory").split(",")
    with open(join(target, "show_objects.csv"), "w", encoding="utf-8") as out:
        out.write("# What is worth showing to a group beyond the Solar System, both hemispheres. Places J2000; magnitude V of the whole,\n"
                  "# or of a double's brighter star; size: greatest diameter, or a double's separation; axis_ratio: least over greatest\n"
                  "# diameter; rank: from 3, a showpiece, to 1; name: key of words/LANG.yaml after \"show-object.\"; constellation: IAU area\n"
                  "# in which it stands; look: of a double, key of words after \"show.look-\", by the B-V of its stars; bare_eye: yes where\n"
                  "# observers call it a bare-eye object. NGC 869 is taken with NGC 884.\n"
                  "# source of clusters, nebulae and galaxies: ngc.txt, ic.txt, messier.txt of Debian siril-common 1.0.6. Source of doubles:\n"
                  "# stars.csv (The Bright Star Catalogue, CDS V/50). Choice, kind, rank, axis ratio and bare_eye: from memory,\n"
                  "# and so is what from_memory names (separations of doubles in orbit there: about 2027).\n" + ",".join(columns) + "\n")
        for r in rows:
            r["ra_deg"], r["dec_deg"], r["size_arcmin"] = f"{r['ra']:.5f}", f"{r['dec']:.5f}", f"{r['size']:.4g}"
            r["magnitude"] = f"{r['magnitude']:.2f}"
            r["bare_eye"] = "yes" if r["code"] in BARE_EYE else ""
            star = stars.get(r.get("hr"))
            r["constellation"] = star["constellation"] if star else areas.at(vector(r["ra"], r["dec"]))
            out.write(",".join(str(r.get(c, "")) for c in columns) + "\n")


if __name__ == "__main__":
    main(*sys.argv[1:])
