"""Derives fixed_stars.csv: bright stars' places and V from sefstars.txt (Debian swe-basic-data, CC0; Hipparcos values).

  apt-get download swe-basic-data && dpkg-deb -x swe-basic-data_*.deb x
  python3 fixed_stars.py x/usr/share/libswe/ephe/sefstars.txt ../fixed_stars.csv
"""
import re
import sys

LETTERS = {"al": "α", "be": "β", "ga": "γ", "de": "δ", "ep": "ε", "ze": "ζ", "et": "η", "th": "θ", "io": "ι", "ka": "κ", "la": "λ",
           "mu": "μ", "nu": "ν", "xi": "ξ", "omi": "ο", "pi": "π", "rh": "ρ", "si": "σ", "ta": "τ", "up": "υ", "ph": "φ", "ch": "χ",
           "ps": "ψ", "ome": "ω"}
FAINTEST = 4.3

source, target = sys.argv[1:]
rows = {}
for line in open(source, encoding="latin-1"):
    cells = [c.strip() for c in line.split(",")]
    if line.startswith("#") or len(cells) < 14 or cells[2] != "ICRS":
        continue
    parts = re.fullmatch(r"([a-z]{2,3})(?:-(\d))?([A-Z][A-Za-z]{2})", cells[1])
    if not parts or parts[1] not in LETTERS:
        continue
    v = float(cells[13])
    if v > FAINTEST:
        continue
    ra = (int(cells[3]) + int(cells[4]) / 60 + float(cells[5]) / 3600) * 15
    sign = -1 if cells[6].startswith("-") else 1
    dec = sign * (abs(int(cells[6])) + int(cells[7]) / 60 + float(cells[8]) / 3600)
    bayer = LETTERS[parts[1]] + (" ¹²³⁴⁵⁶⁷⁸⁹"[int(parts[2])] if parts[2] else "")
    rows.setdefault((parts[3], bayer), f"{bayer},{parts[3]},{ra:.6f},{dec:.6f},{cells[9]},{cells[10]},{v:g}")
with open(target, "w", encoding="utf-8") as f:
    f.write("# Stars with a Bayer letter of V <= %.1f: place (ICRS, epoch J2000, degrees), proper motion (mas a year, in right ascension times\n"
            "# cos dec), V. source: sefstars.txt of Debian swe-basic-data 4.0-20221111 (CC0-1.0; Hipparcos values). %d rows, all that qualify;\n"
            "# derived by make/fixed_stars.py.\n"
            "bayer,constellation,ra_deg,dec_deg,pm_ra_mas,pm_dec_mas,v\n" % (FAINTEST, len(rows)))
    f.write("".join(rows[k] + "\n" for k in sorted(rows)))
