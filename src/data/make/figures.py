"""Draws figures.csv: this project's own constellation figures, by rule and then by hand.

  python3 figures.py ..          (stars.csv must be there already)

The rule, for each IAU area:
1. Stars: charted ones of V <= 5.0 in the area, brightest first. One that stands within 1/30 of the area's width (at least 0.7
   degree) of a brighter one is passed over. There are as many as the square root of the area over 2.6, from 3 to 14; to V 5.6
   where fewer than 3 would be left.
2. Lines: the relative neighbourhood graph (G. T. Toussaint 1980, Pattern Recognition 12, 261) of those stars: two are joined
   when no third is nearer to both. Distance counts as separation times 10^(0.05 (V1 + V2)), so that bright stars join first.
   It holds the minimum spanning tree and closes short loops by itself.
3. Of lines that cross, the longer goes. A line that is more than 2.2 times the median length goes when its ends stay joined
   without it.
4. Ends fainter than V 4.6 on a line longer than the median go, while 4 stars are left.
Figures that observers know by another shape stand in by_hand.py and replace what the rule gives.
"""
import math
import sys
from os.path import join

from by_hand import ASTERISMS, BY_HAND
from sphere import rows_of, separation_deg, vector


def read_stars(folder):
    stars = []
    for r in rows_of(join(folder, "stars.csv")):
        p = vector(float(r["ra_deg"]), float(r["dec_deg"]))
        stars.append({"hr": int(r["hr"]), "p": p, "v": float(r["v_seen"] or r["v"]), "bayer": r["bayer"], "flamsteed": r["flamsteed"],
                      "area": r["constellation"], "designated": r["designation_constellation"] or r["constellation"],
                      "charted": r["uncharted"] == ""})
    return stars


def chosen(stars, area_sqdeg):
    count = min(14, max(3, round(math.sqrt(area_sqdeg) / 2.6)))
    apart = max(0.7, math.sqrt(area_sqdeg) / 30)
    for limit in (5.0, 5.6):
        picked = []
        for s in sorted(stars, key=lambda s: (s["v"], s["hr"])):
            if len(picked) < count and s["v"] <= limit and all(separation_deg(s["p"], q["p"]) > apart for q in picked):
                picked.append(s)
        if len(picked) >= 3:
            break
    return picked


def flat(stars):
    """Gnomonic places about the stars' mean direction, on which great circles are straight."""
    m = [sum(s["p"][k] for s in stars) for k in range(3)]
    n = math.sqrt(sum(x * x for x in m))
    m = [x / n for x in m]
    h = math.hypot(m[0], m[1])
    east = (-m[1] / h, m[0] / h, 0)
    north = (-m[2] * m[0] / h, -m[2] * m[1] / h, h)
    dot = lambda a, b: sum(x * y for x, y in zip(a, b))
    return {s["hr"]: (-dot(s["p"], east) / max(0.05, dot(s["p"], m)), dot(s["p"], north) / max(0.05, dot(s["p"], m))) for s in stars}


def cross(a, b, c, d):
    if len({a, b, c, d}) < 4:
        return False
    side = lambda p, q, r: (q[0] - p[0]) * (r[1] - p[1]) - (q[1] - p[1]) * (r[0] - p[0])
    return side(a, b, c) * side(a, b, d) < 0 and side(c, d, a) * side(c, d, b) < 0


def joined(a, b, lines):
    seen, reached = {a}, [a]
    while reached:
        x = reached.pop()
        for p, q in lines:
            for y, z in ((p, q), (q, p)):
                if y == x and z not in seen:
                    seen.add(z)
                    reached.append(z)
    return b in seen


def by_rule(stars):
    star = {s["hr"]: s for s in stars}
    distance = lambda a, b: separation_deg(star[a]["p"], star[b]["p"])
    weight = lambda a, b: distance(a, b) * 10 ** (0.05 * (star[a]["v"] + star[b]["v"]))
    keys = sorted(star)
    lines = [(a, b) for i, a in enumerate(keys) for b in keys[i + 1:]
             if not any(max(weight(a, c), weight(b, c)) < weight(a, b) for c in keys if c not in (a, b))]
    place = flat(stars)
    lines.sort(key=lambda e: distance(*e))
    kept = []
    for e in lines:
        if not any(cross(*(place[k] for k in e + f)) for f in kept):
            kept.append(e)
    median = distance(*kept[len(kept) // 2])
    for e in reversed(kept[:]):
        others = [f for f in kept if f != e]
        if distance(*e) > 2.2 * median and joined(*e, others):
            kept = others
    while len({k for e in kept for k in e}) > 4:
        ends = [(star[k]["v"], e) for e in kept for k in e
                if sum(k in f for f in kept) == 1 and star[k]["v"] > 4.6 and distance(*e) > median]
        if not ends:
            break
        kept.remove(max(ends)[1])
    return kept


def paths(lines):
    """The lines as few strokes: each walk follows lines not yet drawn, from an end or a crossing."""
    left, walks = sorted(tuple(sorted(e)) for e in lines), []
    while left:
        degree = {}
        for e in left:
            for k in e:
                degree[k] = degree.get(k, 0) + 1
        odd = sorted(k for k in degree if degree[k] % 2)
        at = odd[0] if odd else min(degree)
        walk = [at]
        while True:
            step = next((e for e in left if at in e), None)
            if step is None:
                break
            left.remove(step)
            at = step[0] if step[1] == at else step[1]
            walk.append(at)
        walks.append(walk)
    return walks


def find(word, home, stars):
    """A star by Bayer letter or Flamsteed number, "Peg:α" for another constellation's, "#553" by HR number."""
    if word.startswith("#"):
        found = [s for s in stars if s["hr"] == int(word[1:])]
    else:
        where, _, letter = word.rpartition(":")
        where = where or home
        found = [s for s in stars if s["designated"] == where and s["charted"] and letter in (s["bayer"], s["flamsteed"])]
    found.sort(key=lambda s: s["v"])
    if not found or not found[0]["charted"] or len(found) > 1 and found[1]["v"] < found[0]["v"] + 2:
        raise ValueError(f"{home} {word}: {[(s['hr'], s['charted'], s['v']) for s in found]}")
    return found[0]["hr"]


def main(folder):
    stars = read_stars(folder)
    areas = {r["abbreviation"]: float(r["area_sqdeg"]) for r in rows_of(join(folder, "constellations.csv"))}
    ruled = 0
    with open(join(folder, "figures.csv"), "w", encoding="utf-8") as f:
        f.write("# Constellation figures: strokes through stars by HR number. This project's own, drawn by make/figures.py (its rule is in\n"
                "# data/README.md) and corrected by hand in make/by_hand.py.\n"
                "constellation,part,path\n")
        for name in sorted(areas):
            hand = BY_HAND.get(name)
            if hand is None:
                ruled += 1
                parts = {"": paths(by_rule(chosen([s for s in stars if s["area"] == name and s["charted"]], areas[name])))}
            else:
                parts = hand if isinstance(hand, dict) else {"": hand}
                parts = {part: [[find(w, name, stars) for w in walk.split()] for walk in walks] for part, walks in parts.items()}
            for part, walks in parts.items():
                for walk in walks:
                    f.write(f"{name},{part},{' '.join(map(str, walk))}\n")
    with open(join(folder, "asterisms.csv"), "w", encoding="utf-8") as f:
        f.write("# Asterisms that observers name (common practice): key for the words files, and the stars by HR number.\n"
                "key,constellation,stars\n")
        for key, (home, words) in ASTERISMS.items():
            f.write(f"{key},{home},{' '.join(str(find(w, home, stars)) for w in words.split())}\n")
    print(ruled, "figures by rule,", len(areas) - ruled, "by hand")


if __name__ == "__main__":
    main(sys.argv[1])
