"""Derives stars.csv: the Bright Star Catalogue with IAU names, areas, and what the eye sees of close doubles.

  python3 stars.py CATALOGUE.csv NAMES.csv ..

CATALOGUE.csv: CDS V/50 as CSV (hr, designation, ra_deg, dec_deg, pm_ra_cosdec_arcsec_per_year, pm_dec_arcsec_per_year, v,
b_minus_v, component_magnitude_difference, component_separation_arcsec). NAMES.csv: the IAU Catalog of Star Names (name, hr).
constellation_boundaries.csv must be there already.
"""
import math
import sys
from os.path import join

from sphere import Boundaries, rows_of, separation_deg, vector

GREEK = dict(zip("Alp Bet Gam Del Eps Zet Eta The Iot Kap Lam Mu Nu Xi Omi Pi Rho Sig Tau Ups Phi Chi Psi Ome".split(),
                 "αβγδεζηθικλμνξοπρστυφχψω"))
SUPERSCRIPT = dict(zip("123456789", "¹²³⁴⁵⁶⁷⁸⁹"))
CLOSE_ARCSEC = 60  # nearer than this the bare eye sees one star (common practice)

# A recurrent nova at its outburst, and long-period variables of large range (Mira type, L2 Pup, T Cen: kinds from memory,
# GCVS classes), which stand at or near their greatest light in the catalogue and are invisible to the eye most of the time.
OUTBURST = {5958}
LONG_PERIOD = {90, 663, 681, 758, 868, 1607, 1707, 2063, 2671, 2748, 3248, 3816, 3882, 3999, 4800, 4808, 5080, 5101, 5147, 5199,
               5326, 5894, 6119, 7002, 7243, 7564, 8113, 8992, 9066, 9090}
# Both rows of these pairs give the V of the two together already.
COMBINED_ALREADY = {(887, 888), (5788, 5789)}
# V of The Astronomical Almanac for 2016 where the catalogue's is out by more than 0.1 (54 Sgr, gamma Vir, alpha Psc).
REVISED_V = {7476: 5.30, 4825: 3.48, 4826: 3.50, 596: 4.18}


def groups(rows):
    """Rows nearer to each other than CLOSE_ARCSEC, each group brightest first."""
    by_dec = sorted(rows, key=lambda r: r["dec"])
    parent = {r["hr"]: r["hr"] for r in rows}

    def root(k):
        while parent[k] != k:
            k = parent[k]
        return k

    for i, r in enumerate(by_dec):
        for q in by_dec[i + 1:]:
            if q["dec"] - r["dec"] > CLOSE_ARCSEC / 3600:
                break
            if separation_deg(r["p"], q["p"]) * 3600 < CLOSE_ARCSEC:
                parent[root(q["hr"])] = root(r["hr"])
    found = {}
    for r in rows:
        found.setdefault(root(r["hr"]), []).append(r)
    return [sorted(g, key=lambda r: (r["light_v"], r["hr"])) for g in found.values() if len(g) > 1]


def read(catalogue):
    rows = []
    for c in rows_of(catalogue):
        d = c["designation"].ljust(10)
        ra, dec = float(c["ra_deg"]), float(c["dec_deg"])
        hr = int(c["hr"])
        rows.append({
            "hr": hr, "ra": c["ra_deg"], "dec": dec, "dec_text": c["dec_deg"], "p": vector(ra, dec),
            "pm_ra": c["pm_ra_cosdec_arcsec_per_year"], "pm_dec": c["pm_dec_arcsec_per_year"],
            "v": c["v"].strip(), "light_v": REVISED_V.get(hr, float(c["v"])), "b_v": c["b_minus_v"].strip(),
            "flamsteed": d[:3].strip(), "letter": GREEK[d[3:6].strip()] if d[3:6].strip() else "",
            "digit": SUPERSCRIPT[d[6]] if d[6].strip() else "", "designated": d[7:10].strip(),
            "dmag": c["component_magnitude_difference"].strip(), "sep": c["component_separation_arcsec"].strip().rstrip("."),
            "name": "", "seen": "", "uncharted": ""})
    return rows


def plain(text):
    """A number without sign +, and without zeros at its end."""
    if not text:
        return ""
    value = f"{float(text):.5f}".rstrip("0").rstrip(".")
    return "0" if value in ("-0", "") else value


def main(catalogue, names, out):
    table = Boundaries.read(join(out, "constellation_boundaries.csv"))
    rows = read(catalogue)
    by_hr = {r["hr"]: r for r in rows}
    for n in rows_of(names):
        if n["hr"].strip() and int(n["hr"]) in by_hr:
            by_hr[int(n["hr"])]["name"] = n["name_diacritics"]
    for hr in LONG_PERIOD:
        by_hr[hr]["uncharted"] = "variable"
    for hr in OUTBURST:
        by_hr[hr]["uncharted"] = "outburst"
    for hr, v in REVISED_V.items():
        by_hr[hr]["seen"] = f"{v:.2f}"
    merged = 0
    for group in groups(rows):
        first, others = group[0], group[1:]
        if tuple(sorted(r["hr"] for r in group)) in COMBINED_ALREADY:
            total = first["light_v"]
        else:
            total = -2.5 * math.log10(sum(10 ** (-0.4 * r["light_v"]) for r in group))
        first["seen"] = f"{total:.2f}"
        for r in others:
            r["uncharted"] = "companion"
            r["seen"] = ""
            merged += 1
            if not first["name"]:
                first["name"], r["name"] = r["name"], ""
        # One dot for alpha 1 and alpha 2 together is "alpha", unless a further one of that letter stands apart.
        family = {r["hr"] for r in rows if r["letter"] and (r["letter"], r["designated"]) == (first["letter"], first["designated"])}
        if family <= {r["hr"] for r in group}:
            first["digit"] = ""
    with open(join(out, "stars.csv"), "w", encoding="utf-8") as f:
        f.write(f"# The Bright Star Catalogue: {len(rows)} stars, complete to V 6.5. Place and proper motion: FK5, equinox and epoch J2000; degrees,\n"
                "# arcseconds a year (in right ascension times cos dec). v: as catalogued; v_seen: what the bare eye sees, where that differs (stars\n"
                f"# nearer than {CLOSE_ARCSEC} arcseconds to each other are one dot, its light the sum; {merged} companions). constellation: IAU area in which it\n"
                "# stands; designation_constellation: of its letter or number, where another. separation, magnitude_difference: of the double.\n"
                "# uncharted: companion (its light is in the brighter star's), variable (long-period, catalogued near its greatest light), outburst.\n"
                "# source: D. Hoffleit & W. H. Warren 1991, The Bright Star Catalogue, 5th revised ed., CDS V/50; names: IAU Catalog of Star Names\n"
                "# (IAU Division C WGSN, 2022-04-04, CC BY); V of HR 596, 4825, 4826, 7476: The Astronomical Almanac for 2016, section H.\n"
                "hr,ra_deg,dec_deg,pm_ra,pm_dec,v,v_seen,b_v,bayer,flamsteed,constellation,designation_constellation,name,separation,"
                "magnitude_difference,uncharted\n")
        for r in rows:
            area = table.at(r["p"])
            other = r["designated"] if r["designated"] and r["designated"] != area else ""
            f.write(",".join([str(r["hr"]), plain(r["ra"]), plain(r["dec_text"]), plain(r["pm_ra"]), plain(r["pm_dec"]), plain(r["v"]),
                              r["seen"], plain(r["b_v"]), r["letter"] + r["digit"] if r["letter"] else "", r["flamsteed"], area, other,
                              r["name"], plain(r["sep"]), plain(r["dmag"]), r["uncharted"]]) + "\n")


if __name__ == "__main__":
    main(*sys.argv[1:])
