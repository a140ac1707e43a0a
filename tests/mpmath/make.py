"""Random sections and their figures at 50 digits, by mpmath.

    python make.py            writes parts.json: 200 seeded parts and their figures
    python make.py --check N  works out N of them again, chosen by a seed, and compares with parts.json

The figures come from another form of Green's theorem than the program's (minus the integral of r^a z^(b+1)/(b+1) dr in
place of that of r^(a+1)/(a+1) z^b dz), by mpmath's quadrature on each edge written about its centre. What is exact about an
edge, and so the same for both, are the doubles that stand in parts.json: a line's ends; an arc's ends and sweep; a cubic's
points; an elliptic arc and a parallel curve are their stored chord and the segment between the curve and its own chord.
The parts are invented.
"""

import argparse
import json
import math
import pathlib
import random

from mpmath import mp, mpf
from mpmath.calculus.quadrature import GaussLegendre

mp.dps = 50
HERE = pathlib.Path(__file__).parent
TAU = 2 * math.pi


# --- edges as functions of t, at 50 digits -------------------------------------------------------------------------


def exact(numbers):
    return [mpf(x) for x in numbers]


def line(p, q):
    p, q = exact(p), exact(q)
    d = [q[0] - p[0], q[1] - p[1]]
    return lambda t: ((p[0] + t * d[0], p[1] + t * d[1]), d)


def arc(p, q, sweep):
    p, q, s = exact(p), exact(q), mpf(sweep)
    chord = [q[0] - p[0], q[1] - p[1]]
    lift = mp.cot(s / 2) / 2
    centre = [p[0] + chord[0] / 2 - chord[1] * lift, p[1] + chord[1] / 2 + chord[0] * lift]
    v = [p[0] - centre[0], p[1] - centre[1]]

    def at(t):
        c, n = mp.cos(s * t), mp.sin(s * t)
        x, y = v[0] * c - v[1] * n, v[0] * n + v[1] * c
        return (centre[0] + x, centre[1] + y), (-y * s, x * s)

    return at


def ellipse(p, a, b, start, sweep):
    p, a, b, u0, s = exact(p), exact(a), exact(b), mpf(start), mpf(sweep)
    c0, n0 = mp.cos(u0), mp.sin(u0)
    centre = [p[i] - c0 * a[i] - n0 * b[i] for i in (0, 1)]

    def at(t):
        c, n = mp.cos(u0 + s * t), mp.sin(u0 + s * t)
        place = [centre[i] + c * a[i] + n * b[i] for i in (0, 1)]
        return place, [s * (c * b[i] - n * a[i]) for i in (0, 1)]

    return at


def cubic(points):
    k = [exact(p) for p in points]

    def at(t):
        u = 1 - t
        weights = (u**3, 3 * u * u * t, 3 * u * t * t, t**3)
        place = [sum(w * p[i] for w, p in zip(weights, k)) for i in (0, 1)]
        rates = (u * u, 2 * u * t, t * t)
        rate = [3 * sum(w * (k[j + 1][i] - k[j][i]) for j, w in enumerate(rates)) for i in (0, 1)]
        return place, rate

    return at


def beside(base, distance):
    d = mpf(distance)

    def at(t):
        (r, z), (dr, dz) = base(t)
        speed = mp.sqrt(dr * dr + dz * dz)
        if speed == 0:
            # The curve stalls at this end; a step inwards it has the direction of the limit, to 30 digits. No rate:
            # it is only a chord that asks for an end.
            step = mpf(10) ** -30
            _, (dr, dz) = base(step if t == 0 else 1 - step)
            speed = mp.sqrt(dr * dr + dz * dz)
            return (r - d * dz / speed, z + d * dr / speed), None
        place = (r - d * dz / speed, z + d * dr / speed)
        # The second derivative by the curve itself: mpmath's central difference at 50 digits would do as well.
        h = mpf(10) ** -20
        (_, p), (_, q) = base(t + h), base(t - h)
        bend = [(p[i] - q[i]) / (2 * h) for i in (0, 1)]
        factor = 1 - d * (dr * bend[1] - dz * bend[0]) / speed**3
        return place, (dr * factor, dz * factor)

    return at


def base_curve(edge):
    if edge["kind"] == "ellipse":
        return ellipse(edge["start"], edge["a"], edge["b"], edge["from"], edge["sweep"])
    return cubic(edge["points"])


def pieces(edge):
    """(curve, sign) whose integrals add up to the edge's; the first is the edge itself for lengths."""
    kind = edge["kind"]
    if kind == "line":
        return [(line(edge["start"], edge["end"]), 1)]
    if kind == "arc":
        return [(arc(edge["start"], edge["end"], edge["sweep"]), 1)]
    if kind == "cubic":
        return [(cubic(edge["points"]), 1)]
    curve = base_curve(edge) if kind == "ellipse" else beside(base_curve(edge["base"]), edge["distance"])
    own = line(curve(mpf(0))[0], curve(mpf(1))[0])
    return [(curve, 1), (own, -1), (line(edge["start"], edge["end"]), 1)]


# --- figures -----------------------------------------------------------------------------------------------------


MOMENTS = [(0, 0), (1, 0), (0, 1), (2, 0), (1, 1), (3, 0), (2, 1), (1, 2)]


def nodes(degree):
    """mpmath's own Gauss-Legendre rule of 3 * 2^(degree - 1) points on each half of [0, 1]."""
    rule = GaussLegendre(mp)
    half = mpf(1) / 2
    return [pair for a, b in ((0, half), (half, 1)) for pair in rule.get_nodes(a, b, degree, mp.prec)]


FINE, COARSE = nodes(5), nodes(4)


def integrands(curve, t):
    """The eight moments' integrands, the length's and that of its first moment along r."""
    (r, z), (dr, dz) = curve(t)
    speed = mp.sqrt(dr * dr + dz * dz)
    return [-(r**a) * z ** (b + 1) / (b + 1) * dr for a, b in MOMENTS] + [speed, r * speed]


def integrals(curve, points):
    """The eight moments' line integrals, the length and its first moment along r."""
    sums = [mpf(0)] * (len(MOMENTS) + 2)
    for t, weight in points:
        sums = [total + weight * term for total, term in zip(sums, integrands(curve, t))]
    return sums


def settled(curve):
    """The integrals by a rule of fixed points, which a coarser one confirms."""
    fine, coarse = integrals(curve, FINE), integrals(curve, COARSE)
    for a, b in zip(fine, coarse):
        assert abs(a - b) <= mpf(10) ** -22 * (abs(a) + abs(b) + mpf(10) ** -30), (a, b)
    return fine


def sums(edges, integrate):
    """The integrals of r^a z^b over the section, and length and first moment of its boundary, each by `integrate`."""
    totals = [mpf(0)] * (len(MOMENTS) + 2)
    for edge in edges:
        for number, (curve, sign) in enumerate(pieces(edge)):
            own = integrate(curve)
            if number > 0:
                # Only the curve itself has the edge's length.
                own[-2:] = [mpf(0), mpf(0)]
            totals = [total + sign * value for total, value in zip(totals, own)]
    return dict(zip(MOMENTS, totals)), totals[-2], totals[-1]


def figures(part, integrate):
    edges = [edge for loop in part["loops"] for edge in loop]
    f = 2 * mp.pi if part["revolve"] == TAU else mpf(part["revolve"])
    full = part["revolve"] == TAU
    m, length, first = sums(edges, integrate)
    s, c = (mpf(0), mpf(1)) if full else (mp.sin(f), mp.cos(f))
    volume = f * m[1, 0]
    centre = [s * m[2, 0] / volume, (1 - c) * m[2, 0] / volume, f * m[1, 1] / volume]
    xx, yy, zz = (f + s * c) / 2 * m[3, 0], (f - s * c) / 2 * m[3, 0], f * m[1, 2]
    xy, yz, zx = s * s / 2 * m[3, 0], (1 - c) * m[2, 1], s * m[2, 1]
    origin = [yy + zz, zz + xx, xx + yy, -xy, -yz, -zx]
    x, y, z = centre
    own = [
        origin[0] - volume * (y * y + z * z),
        origin[1] - volume * (z * z + x * x),
        origin[2] - volume * (x * x + y * y),
        origin[3] + volume * x * y,
        origin[4] + volume * y * z,
        origin[5] + volume * z * x,
    ]
    numbers = lambda values: [float(value) for value in values]
    return {
        "area": float(m[0, 0]),
        "centroid": numbers([m[1, 0] / m[0, 0], m[0, 1] / m[0, 0]]),
        "perimeter": float(length),
        "perimeter_r": float(first / length),
        "volume": float(volume),
        "swept": float(f * first),
        "centre": numbers(centre),
        "inertia_origin": numbers(origin),
        "inertia_centre": numbers(own),
    }


# --- random parts ------------------------------------------------------------------------------------------------


def straight(p, q):
    return {"kind": "line", "start": p, "end": q}


def bowed(p, q, sweep):
    return {"kind": "arc", "start": p, "end": q, "sweep": sweep}


def oval(p, q, a, b, start, sweep):
    return {"kind": "ellipse", "start": p, "end": q, "a": a, "b": b, "from": start, "sweep": sweep}


def bend(rng, p, q):
    """An edge of a random kind from p to q that stays near its chord."""
    kind = rng.choice(["line", "arc", "ellipse", "cubic"])
    if kind == "line":
        return straight(p, q)
    if kind == "arc":
        return bowed(p, q, rng.choice([-1, 1]) * rng.uniform(0.02, 0.5))
    chord = [q[0] - p[0], q[1] - p[1]]
    normal = [chord[1], -chord[0]]
    if kind == "ellipse":
        half = rng.uniform(0.1, 0.6)
        bulge = rng.choice([-1, 1]) * rng.uniform(0.02, 0.1) / (1 - math.cos(half))
        skew = rng.uniform(-0.2, 0.2)
        b = [x / (2 * math.sin(half)) for x in chord]
        a = [bulge * n + skew * x for n, x in zip(normal, chord)]
        return oval(p, q, a, b, -half, 2 * half)
    near = lambda share: [
        p[i] + (share + rng.uniform(-0.1, 0.1)) * chord[i] + lift * normal[i] for i in (0, 1)
    ]
    lift = rng.uniform(-0.15, 0.15)
    first = near(1 / 3)
    lift = rng.uniform(-0.15, 0.15)
    return {"kind": "cubic", "points": [p, first, near(2 / 3), q]}


def closed(points, edge):
    return [edge(p, q) for p, q in zip(points, points[1:] + points[:1])]


def star(rng, r0, z0, size):
    """Corners round (r0, z0), counter-clockwise."""
    count = rng.randint(5, 11)
    angles = [(i + rng.uniform(-0.2, 0.2)) * TAU / count for i in range(count)]
    return [[r0 + size * rng.uniform(0.7, 1) * math.cos(x), z0 + size * rng.uniform(0.7, 1) * math.sin(x)] for x in angles]


def ordinary(rng):
    size = 10 ** rng.uniform(-3, 0)
    r0, z0 = size * rng.uniform(1.3, 4), size * rng.uniform(-3, 3)
    loops = [closed(star(rng, r0, z0, size), lambda p, q: bend(rng, p, q))]
    if rng.random() < 0.3:
        inner = star(rng, r0, z0, 0.3 * size)[::-1]
        loops.append(closed(inner, lambda p, q: bend(rng, p, q)))
    return loops


def solid(rng):
    """A part that reaches the axis: along it, or in a point of a cone."""
    size = 10 ** rng.uniform(-3, 0)
    z0 = size * rng.uniform(-2, 2)
    top = z0 + size * rng.uniform(1, 3)
    outer = [[0.0, z0], [size * rng.uniform(0.5, 1), z0 - size * rng.uniform(0, 0.2)]]
    outer += [[size * rng.uniform(0.6, 1), z0 + 0.5 * (top - z0)], [0.0, top]]
    edges = [bend(rng, p, q) for p, q in zip(outer, outer[1:])]
    return [edges + [straight(outer[-1], outer[0])]]


def arched_wall(rng):
    """A wall beside a cubic or a quarter ellipse; its second face is a parallel curve."""
    size = 10 ** rng.uniform(-2, 0)
    p, q = [size, size * rng.uniform(-1, 0)], [size * 0.2, size * rng.uniform(0.6, 1)]
    if rng.random() < 0.5:
        base = oval(p, q, [p[0] - q[0], 0.0], [0.0, q[1] - p[1]], 0.0, math.pi / 2)
    else:
        base = {"kind": "cubic", "points": [p, [p[0], p[1] + 0.5 * (q[1] - p[1])], [q[0] + 0.4 * size, q[1]], q]}
    distance = size * 10 ** rng.uniform(-3, -1.3)
    return wall(base, distance)


def wall(base, distance):
    """The wall between a curve and its parallel at that distance, positive to the left of travel."""
    parallel = beside(base_curve(base), distance)
    first, last = (base["points"][0], base["points"][-1]) if base["kind"] == "cubic" else (base["start"], base["end"])
    ends = [[float(x) for x in parallel(mpf(t))[0]] for t in (0, 1)]
    face = {"kind": "parallel", "base": base, "distance": distance, "start": ends[0], "end": ends[1]}
    # The material is to the left of travel: the right one of the two is travelled forwards, the other one back.
    if distance > 0:
        return [[base, straight(last, ends[1]), turned(face), straight(ends[0], first)]]
    return [[face, straight(ends[1], last), turned(base), straight(first, ends[0])]]


def turned(edge):
    """The edge travelled the other way."""
    kind = edge["kind"]
    if kind == "cubic":
        return {"kind": "cubic", "points": edge["points"][::-1]}
    back = dict(edge, start=edge["end"], end=edge["start"])
    if kind == "arc":
        back["sweep"] = -edge["sweep"]
    elif kind == "ellipse":
        back["from"], back["sweep"] = edge["from"] + edge["sweep"], -edge["sweep"]
    elif kind == "parallel":
        back["base"], back["distance"] = turned(edge["base"]), -edge["distance"]
    return back


def thin_tube(rng):
    r, z, h = 10 * rng.uniform(0.9, 1.1), rng.uniform(-5, 5), rng.uniform(0.1, 2)
    return [closed([[r, z], [r + 1e-4, z], [r + 1e-4, z + h], [r, z + h]], straight)]


def thin_dome(rng):
    return dome(rng, 10 * rng.uniform(0.9, 1.1), 1e-4 * rng.uniform(0.8, 1.5))


def dome(rng, r, thickness):
    """A belt of a spherical shell of that outer radius."""
    low = rng.uniform(0.1, 0.5)
    on = lambda radius, angle: [radius * math.cos(angle), radius * math.sin(angle)]
    sweep = rng.uniform(0.5, 0.9)
    outer = bowed(on(r, low), on(r, low + sweep), sweep)
    return [shell(outer, bowed(on(r - thickness, low + sweep), on(r - thickness, low), -sweep))]


def shell(outer, inner):
    """Two faces that run against each other and the straight rims between them."""
    return [outer, straight(outer["end"], inner["start"]), inner, straight(inner["end"], outer["start"])]


def flat_arcs(rng):
    """Arcs of a millionth of a turn: the radius is some 160,000 chords; and of a radius of a million chords."""
    size = 10 ** rng.uniform(-2, 0)
    points = star(rng, 2 * size, 0, size)
    sweeps = [TAU * 1e-6, 1e-6]
    return [closed(points, lambda p, q: bowed(p, q, rng.choice([-1, 1]) * rng.choice(sweeps)))]


def tiny_fillets(rng):
    """A block of a metre whose corners are rounded by a micrometre."""
    r, z, f = rng.uniform(0.5, 1), rng.uniform(-1, 1), 1e-6
    w, h = rng.uniform(0.8, 1.2), rng.uniform(0.8, 1.2)
    corners = [([r, z], 0), ([r + w, z], 1), ([r + w, z + h], 2), ([r, z + h], 3)]
    way = [[1, 0], [0, 1], [-1, 0], [0, -1]]
    edges, before = [], None
    ends = []
    for (x, y), i in corners:
        arriving, leaving = way[i - 1], way[i]
        ends.append(([x - f * arriving[0], y - f * arriving[1]], [x + f * leaving[0], y + f * leaving[1]]))
    for i in range(4):
        edges.append(bowed(ends[i][0], ends[i][1], math.pi / 2))
        edges.append(straight(ends[i][1], ends[(i + 1) % 4][0]))
    return [edges]


def any_turn(rng):
    return rng.choice([TAU, TAU, TAU, math.pi / 2, rng.uniform(0.1, 6.2), TAU * 1e-6])


# (class, how many, maker, angle of revolution, relative error allowed)
CLASSES = [
    ("ordinary", 110, ordinary, any_turn, 1e-13),
    ("on the axis", 30, solid, any_turn, 1e-13),
    ("wall beside a curve", 15, arched_wall, any_turn, 1e-13),
    ("0.1 mm wall at 10 m", 10, thin_tube, any_turn, 1e-12),
    ("0.1 mm dome of 10 m radius", 10, thin_dome, any_turn, 1e-12),
    ("arcs of a millionth of a turn", 13, flat_arcs, any_turn, 1e-12),
    ("1 um fillets on 1 m", 12, tiny_fillets, any_turn, 1e-12),
]


def make(classes, seed):
    rng = random.Random(seed)
    parts = []
    for name, count, maker, turn, allowed in classes:
        for _ in range(count):
            loops = maker(rng)
            parts.append({"class": name, "allowed": allowed, "revolve": turn(rng), "loops": loops})
    return parts


def differences(a, b, path=""):
    if isinstance(a, dict):
        for key in a:
            yield from differences(a[key], b[key], f"{path}.{key}")
    elif isinstance(a, list):
        for i, (x, y) in enumerate(zip(a, b, strict=True)):
            yield from differences(x, y, f"{path}[{i}]")
    elif abs(a - b) > 4e-16 * max(abs(a), abs(b)):
        yield f"{path}: {a!r} is not {b!r}"


def main(path, made, integrate, slow=()):
    """The command line of a script that makes parts; a sample has none of the slow classes."""
    parser = argparse.ArgumentParser()
    parser.add_argument("--check", type=int, metavar="N")
    arguments = parser.parse_args()
    if arguments.check is None:
        for number, part in enumerate(made):
            part["figures"] = figures(part, integrate)
            print(number, part["class"], flush=True)
        lines = ",\n".join(json.dumps(part) for part in made)
        path.write_text(f"[\n{lines}\n]\n")
        return
    kept = json.loads(path.read_text())
    wrong = [] if len(kept) == len(made) else [f"{len(kept)} parts are kept, {len(made)} are made"]
    quick = [number for number, part in enumerate(made) if part["class"] not in slow]
    for number in sorted(random.Random(7).sample(quick, arguments.check)):
        part = kept[number]
        same = {key: part[key] for key in made[number]} == made[number]
        wrong += [] if same else [f"part {number} is not what the seed makes"]
        found = figures(part, integrate)
        wrong += [f"part {number}{text}" for text in differences(found, part["figures"])]
    print("\n".join(wrong))
    print(f"{arguments.check} passed, 0 failed" if not wrong else f"0 passed, {len(wrong)} failed")
    raise SystemExit(1 if wrong else 0)


if __name__ == "__main__":
    main(HERE / "parts.json", make(CLASSES, 20261201), settled)
