"""Directions, precession to B1875 and Roman's boundary table (N. G. Roman 1987, PASP 99, 695), for the other scripts."""
import csv
import math

JD_B1875 = 2405889.258550475  # Besselian epoch 1875.0
ARCSECOND = math.radians(1 / 3600)


def rows_of(path):
    with open(path, encoding="utf-8") as f:
        return list(csv.DictReader(line for line in f if not line.startswith("#")))


def vector(ra_deg, dec_deg):
    a, d = math.radians(ra_deg), math.radians(dec_deg)
    return (math.cos(d) * math.cos(a), math.cos(d) * math.sin(a), math.sin(d))


def separation_deg(p, q):
    return math.degrees(2 * math.asin(min(1.0, math.dist(p, q) / 2)))


def precession_j2000_to_b1875():
    """IAU 1976 precession (Lieske et al. 1977) from J2000 to B1875, as a matrix."""
    t = (JD_B1875 - 2451545.0) / 36525
    zeta = (2306.2181 * t + 0.30188 * t**2 + 0.017998 * t**3) * ARCSECOND
    z = (2306.2181 * t + 1.09468 * t**2 + 0.018203 * t**3) * ARCSECOND
    theta = (2004.3109 * t - 0.42665 * t**2 - 0.041833 * t**3) * ARCSECOND
    ca, sa, cz, sz, ct, st = math.cos(zeta), math.sin(zeta), math.cos(z), math.sin(z), math.cos(theta), math.sin(theta)
    return ((cz * ct * ca - sz * sa, -cz * ct * sa - sz * ca, -cz * st),
            (sz * ct * ca + cz * sa, -sz * ct * sa + cz * ca, -sz * st),
            (st * ca, -st * sa, ct))


class Boundaries:
    """Rows of right ascension from, to (hours), lower declination (degrees), abbreviation; from north to south."""

    def __init__(self, rows):
        self.rows = rows
        self.matrix = precession_j2000_to_b1875()

    @classmethod
    def read(cls, path):
        return cls([(int(r["ra_from_seconds"]) / 3600, int(r["ra_to_seconds"]) / 3600, int(r["dec_lower_arcmin"]) / 60,
                     r["abbreviation"]) for r in rows_of(path)])

    def at_1875(self, ra_hours, dec_deg):
        for low, high, lower, name in self.rows:
            if dec_deg >= lower and low <= ra_hours < high:
                return name
        raise ValueError("outside the table")

    def to_1875(self, p):
        x, y, z = (sum(m * c for m, c in zip(line, p)) for line in self.matrix)
        return math.degrees(math.atan2(y, x)) % 360 / 15, math.degrees(math.asin(max(-1, min(1, z))))

    def at(self, p):
        return self.at_1875(*self.to_1875(p))

    def cells(self):
        """The sphere cut along every boundary: (name, ra_from, ra_to in hours, dec_lower, dec_upper)."""
        decs = sorted({r[2] for r in self.rows} | {90.0})
        for south, north in zip(decs, decs[1:]):
            # Every row that can hold this band starts at or below it.
            cuts = sorted({r[0] for r in self.rows if r[2] <= south} | {r[1] for r in self.rows if r[2] <= south})
            for west, east in zip(cuts, cuts[1:]):
                yield self.at_1875((west + east) / 2, (south + north) / 2), west, east, south, north
