"""Makes deep_sky_places.csv: second sources of places and magnitudes for the table of what to show.

  python3 deep_sky_places.py /usr/share/siril/catalogue/messier.txt /usr/share/libswe/ephe/sefstars.txt ../deep_sky_places.csv
"""
import sys

# Rows that only the first list has (no NGC or IC number), and one whose declination has lost its sign there.
LEFT_OUT = {"M45", "M24", "M52"}
# Rows of ICRS places; M44's is rounded to the minute and another point of the cluster.
FROM_STARS = {"M31", "M42", "M34", "M6", "M7", "M22"}
# Magnitudes there are of another kind (M42 with its stars, M22 in another band).
NO_MAGNITUDE = {"M42", "M22"}


def main(messier, stars, target):
    with open(target, "w", encoding="utf-8") as out:
        out.write("# Places (J2000, degrees) and magnitudes of clusters, nebulae and galaxies, to check src/data/show_objects.csv, whose rows\n"
                  "# come from lists of NGC and IC numbers. Made by make/deep_sky_places.py.\n"
                  "# source \"messier\": messier.txt of Debian siril-common 1.0.6; M52 is left out (its declination has lost its sign there).\n"
                  "# source \"icrs\": ICRS rows of sefstars.txt of Debian swe-basic-data 4.0 (CC0); these fix the equinox.\n"
                  "code,source,ra_deg,dec_deg,magnitude\n")
        with open(messier, encoding="utf-8") as f:
            for line in list(f)[1:]:
                code, ra, sign, dec, _, magnitude = line.strip("\n").split(";")[:6]
                if code not in LEFT_OUT:
                    out.write(f"{code},messier,{float(ra) * 15:.5f},{float(sign + dec):.5f},{magnitude.split(' ')[0]}\n")
        done = set()
        with open(stars, encoding="utf-8") as f:
            for line in f:
                cells = [c.strip() for c in line.split(",")]
                if line.startswith("#") or len(cells) < 14 or cells[1] not in FROM_STARS - done:
                    continue
                done.add(cells[1])
                h, m, s = map(float, cells[3:6])
                sign = -1 if cells[6].startswith("-") else 1
                d, dm, ds = abs(float(cells[6])), float(cells[7]), float(cells[8])
                magnitude = "" if cells[1] in NO_MAGNITUDE else cells[13]
                out.write(f"{cells[1]},icrs,{15 * (h + m / 60 + s / 3600):.5f},{sign * (d + dm / 60 + ds / 3600):.5f},{magnitude}\n")


if __name__ == "__main__":
    main(*sys.argv[1:])
