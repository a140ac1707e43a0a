"""A second reading of part files, by other means than the program's: edges as functions of a parameter, corners by
Newton's method, integrals by Gauss's quadrature. Slow and for legal parts only; it answers within about 1e-11.

Lengths are in the part's unit until `figures`, which is SI. A point (r, z) is the complex number r + iz.
"""

import ast
import cmath
import csv
import math
import operator
import re
import tomllib
from dataclasses import dataclass, replace
from pathlib import Path
from typing import Callable

import numpy as np

UNIT = {"mm": 1e-3, "cm": 1e-2, "m": 1.0, "in": 0.0254, "ft": 0.3048}


# Expressions -----------------------------------------------------------------------------------------------------------


def degrees(function):
    return lambda x: function(math.radians(x))


def in_degrees(function):
    return lambda x: math.degrees(function(x))


FUNCTIONS = {
    "sqrt": math.sqrt,
    "abs": abs,
    "min": min,
    "max": max,
    "sin": degrees(math.sin),
    "cos": degrees(math.cos),
    "tan": degrees(math.tan),
    "asin": in_degrees(math.asin),
    "acos": in_degrees(math.acos),
    "atan": in_degrees(math.atan),
}
OPERATORS = {
    ast.Add: operator.add,
    ast.Sub: operator.sub,
    ast.Mult: operator.mul,
    ast.Div: operator.truediv,
    ast.Pow: operator.pow,
}


class Values:
    """What numbers and expressions of one file come to, in its unit."""

    def __init__(self, unit, sizes):
        self.unit = unit
        self.sizes = sizes

    def __call__(self, written):
        if isinstance(written, (int, float)):
            return float(written)
        if isinstance(written, dict):
            return self(written["is"])

        def with_unit(match):
            factor = UNIT[match[2]] / UNIT[self.unit] if match[2] != "deg" else 1.0
            return f"({match[1]} * {factor!r})"

        # "3/4 in" is three quarters of an inch.
        text = re.sub(r"([\d.]+(?:\s*/\s*[\d.]+)?)\s*(mm|cm|m|in|ft|deg)\b", with_unit, written)
        # A leading sign binds less than a power in both notations.
        return self._of(ast.parse(text.replace("^", "**"), mode="eval").body)

    def _of(self, node):
        if isinstance(node, ast.Constant):
            return float(node.value)
        if isinstance(node, ast.Name):
            return math.pi if node.id == "pi" else self(self.sizes[node.id])
        if isinstance(node, ast.UnaryOp):
            return -self._of(node.operand) if isinstance(node.op, ast.USub) else self._of(node.operand)
        if isinstance(node, ast.BinOp):
            return OPERATORS[type(node.op)](self._of(node.left), self._of(node.right))
        return FUNCTIONS[node.func.id](*map(self._of, node.args))


# Edges -----------------------------------------------------------------------------------------------------------------


@dataclass(frozen=True)
class Edge:
    """The curve `point` with its first and second derivative, from parameter `start` to `end`."""

    point: Callable
    derivative: Callable
    second: Callable
    start: float = 0.0
    end: float = 1.0
    name: str | None = None

    def direction(self, t):
        derivative = self.derivative(t)
        return derivative / np.abs(derivative)

    def beside(self, distance):
        """The point function of the curve at `distance` to the left."""
        return lambda t: self.point(t) + 1j * self.direction(t) * distance


def line(a, b):
    return Edge(lambda t: a + (b - a) * t, lambda t: (b - a) + 0 * t, lambda t: 0 * t)


def arc(centre, a, sweep):
    radius = a - centre
    return Edge(
        lambda t: centre + radius * np.exp(1j * sweep * t),
        lambda t: 1j * sweep * radius * np.exp(1j * sweep * t),
        lambda t: -(sweep**2) * radius * np.exp(1j * sweep * t),
    )


def arc_of_radius(a, b, radius, left, long=False):
    half = (b - a) / 2
    height = math.sqrt(max(0.0, radius**2 - abs(half) ** 2))
    # The shorter arc's centre is on its own side of the chord, the longer one's on the other.
    side = (1 if left else -1) * (-1 if long else 1)
    centre = (a + b) / 2 + 1j * half / abs(half) * side * height
    return arc(centre, a, swept(centre, a, b, left))


def swept(centre, a, b, left):
    angle = cmath.phase((b - centre) / (a - centre)) % math.tau
    return angle if left else angle - math.tau


def quarter_ellipse(a, b, along_r):
    centre = complex(a.real, b.imag) if along_r else complex(b.real, a.imag)
    first, second = a - centre, b - centre
    quarter = math.pi / 2
    return Edge(
        lambda t: centre + first * np.cos(quarter * t) + second * np.sin(quarter * t),
        lambda t: quarter * (second * np.cos(quarter * t) - first * np.sin(quarter * t)),
        lambda t: -(quarter**2) * (first * np.cos(quarter * t) + second * np.sin(quarter * t)),
    )


def bezier(*points):
    def curve(points):
        n = len(points) - 1
        return lambda t: sum(
            math.comb(n, k) * (1 - t) ** (n - k) * t**k * p for k, p in enumerate(points)
        )

    def differences(points):
        return [(len(points) - 1) * (q - p) for p, q in zip(points, points[1:])]

    first = differences(points)
    return Edge(curve(points), curve(first), curve(differences(first)))


def meet(f, g, s, t):
    """Parameters where f(s) = g(t), by Newton's method from a guess."""
    h = 1e-6
    for _ in range(60):
        gap = f(s) - g(t)
        df = (f(s + h) - f(s - h)) / (2 * h)
        dg = (g(t + h) - g(t - h)) / (2 * h)
        matrix = [[df.real, -dg.real], [df.imag, -dg.imag]]
        ds, dt = np.linalg.solve(matrix, [-gap.real, -gap.imag])
        s, t = s + ds, t + dt
        if abs(ds) + abs(dt) < 1e-15:
            break
    assert abs(f(s) - g(t)) < 1e-11 * (1 + abs(f(s)))
    return s, t


def rounded(before, after, radius):
    turn = cmath.phase(after.direction(after.start) / before.direction(before.end))
    leg = radius * math.tan(abs(turn) / 2)
    distance = math.copysign(radius, turn)
    s, t = meet(
        before.beside(distance),
        after.beside(distance),
        before.end - leg / abs(before.derivative(before.end)),
        after.start + leg / abs(after.derivative(after.start)),
    )
    first, last = before.point(s), after.point(t)
    centre = before.beside(distance)(s)
    fillet = arc(centre, first, cmath.phase((last - centre) / (first - centre)))
    return replace(before, end=s), fillet, replace(after, start=t)


def chamfered(before, after, legs):
    corner = before.point(before.end)

    def at_distance(edge, t, leg):
        for _ in range(60):
            away = edge.point(t) - corner
            slope = (edge.derivative(t) * away.conjugate()).real / abs(away)
            step = (leg - abs(away)) / slope
            t += step
            if abs(step) < 1e-15:
                break
        return t

    s = before.end - legs[0] / abs(before.derivative(before.end))
    t = after.start + legs[1] / abs(after.derivative(after.start))
    s, t = at_distance(before, s, legs[0]), at_distance(after, t, legs[1])
    return replace(before, end=s), line(before.point(s), after.point(t)), replace(after, start=t)


# Outlines --------------------------------------------------------------------------------------------------------------


def target(value, table, at):
    r, z = at.real, at.imag
    for key, what in table.items():
        if key in ("d", "r"):
            r = value(what) / (2 if key == "d" else 1)
        elif key in ("dd", "dr"):
            r = at.real + value(what) / (2 if key == "dd" else 1)
        elif key == "z":
            z = value(what)
        elif key == "dz":
            z = at.imag + value(what)
    return complex(r, z)


def sloped(value, step, at, to):
    """The coordinate that a taper or an angle gives."""
    if "taper" in step:
        change, length = step["taper"].split(":")
        slope = float(change) / float(length) / 2
    else:
        slope = math.tan(math.radians(value(step["angle"])))
    if {"z", "dz"} & step.keys():
        return complex(at.real + slope * abs(to.imag - at.imag), to.imag)
    raise NotImplementedError("no example leaves z to its slope")


def edge_of(value, step, at, to, arriving):
    if "arc" in step:
        return arc_of_radius(at, to, value(step["arc"]), step["centre_on"] == "left", step.get("long", False))
    if "via" in step:
        through = target(value, step["via"], at)
        a, b = through - at, to - at
        centre = at + 1j * (abs(b) ** 2 * a - abs(a) ** 2 * b) / (2 * (a.conjugate() * b).imag)
        left = (a.conjugate() * b).imag > 0
        return arc(centre, at, swept(centre, at, to, left))
    if "centre" in step:
        centre = target(value, step["centre"], at)
        left = (to - centre) * (at - centre).conjugate()
        side = step.get("centre_on", "left" if left.imag > 0 else "right") == "left"
        return arc(centre, at, swept(centre, at, to, side))
    if "tangent" in step:
        chord = to - at
        turn = 2 * cmath.phase(chord / arriving)
        radius = abs(chord) / (2 * math.sin(turn / 2))
        return arc(at + 1j * arriving * radius, at, turn)
    if "ellipse" in step:
        return quarter_ellipse(at, to, step["ellipse"] == "r")
    if "curve" in step:
        return bezier(at, *(target(value, point, at) for point in step["curve"]), to)
    return line(at, to)


def unrolled(value, steps):
    for step in steps:
        if "repeat" in step:
            for _ in range(int(value(step["repeat"]))):
                yield from unrolled(value, step["steps"])
        else:
            yield step


def chain(value, steps, closed):
    """The edges of steps, with their corners treated."""
    steps = list(unrolled(value, steps))
    at = first = target(value, steps[0], 0j)
    edges, corners = [], []
    for step in steps[1:]:
        to = target(value, step, at)
        if {"taper", "angle"} & step.keys():
            to = sloped(value, step, at, to)
        arriving = edges[-1].direction(1.0) if edges else None
        edges.append(replace(edge_of(value, step, at, to, arriving), name=step.get("name")))
        corners.append(step)
        at = to
    if closed and at != first:
        edges.append(line(at, first))
        corners.append({})
    if closed:
        corners[-1] = corners[-1] | {k: v for k, v in steps[0].items() if k in ("round", "chamfer")}
    whole = []
    for index, corner in enumerate(corners):
        after = (index + 1) % len(edges)
        if "round" in corner:
            edges[index], cut, edges[after] = rounded(edges[index], edges[after], value(corner["round"]))
            whole.append((index, cut))
        elif "chamfer" in corner:
            legs = corner["chamfer"] if isinstance(corner["chamfer"], list) else [corner["chamfer"]] * 2
            edges[index], cut, edges[after] = chamfered(edges[index], edges[after], [value(leg) for leg in legs])
            whole.append((index, cut))
    cuts = dict(whole)
    return [piece for index, edge in enumerate(edges) for piece in (edge, cuts.get(index)) if piece]


def parallel(edge, distance):
    """The edge at `distance` to the left; only its point and derivative are asked for."""

    def derivative(t):
        first = edge.derivative(t)
        curvature = (first.conjugate() * edge.second(t)).imag / np.abs(first) ** 3
        return first * (1 - distance * curvature)

    return replace(edge, point=edge.beside(distance), derivative=derivative)


def reverse(edge):
    span = edge.start + edge.end
    return replace(
        edge,
        point=lambda t: edge.point(span - t),
        derivative=lambda t: -edge.derivative(span - t),
        second=lambda t: edge.second(span - t),
    )


def wall(value, table):
    thickness = value(table["thickness"])
    low, high = {"left": (0, thickness), "right": (-thickness, 0), "both": (-thickness / 2, thickness / 2)}[table["grow"]]
    face = chain(value, table["line"], closed=False)

    def side(distance):
        edges = [parallel(edge, distance) if distance else edge for edge in face]
        for index in range(len(edges) - 1):
            before, after = edges[index], edges[index + 1]
            if abs(before.point(before.end) - after.point(after.start)) > 1e-9 * thickness:
                s, t = meet(before.point, after.point, before.end, after.start)
                edges[index], edges[index + 1] = replace(before, end=s), replace(after, start=t)
        return edges

    right, left = side(low), side(high)
    there, back = right[-1], left[-1]
    end = line(there.point(there.end), back.point(back.end))
    start = line(left[0].point(left[0].start), right[0].point(right[0].start))
    return [*right, end, *map(reverse, reversed(left)), start]


def from_csv(path):
    with path.open(encoding="utf-8") as file:
        rows = list(csv.DictReader(file))
    points = [complex(float(row["r"]) if "r" in row else float(row["d"]) / 2, float(row["z"])) for row in rows]
    return [line(a, b) for a, b in zip(points, points[1:] + points[:1])]


def from_svg(path):
    """The one path of a drawing in millimetres, of absolute commands M L C A Z; y runs down, z up."""
    data = re.search(r'\bd="([^"]*)"', path.read_text(encoding="utf-8"))[1]
    edges, at, first = [], 0j, 0j
    point = lambda x, y: complex(x, -y)
    for command, rest in re.findall(r"([MLCAZ])([^MLCAZ]*)", data):
        n = [float(number) for number in re.findall(r"-?[\d.]+", rest)]
        if command == "M":
            at = first = point(*n)
            continue
        to = first if command == "Z" else point(*n[-2:])
        if command == "C":
            edges.append(bezier(at, point(*n[:2]), point(*n[2:4]), to))
        elif command == "A":
            edges.append(arc_of_radius(at, to, n[0], left=not n[4], long=bool(n[3])))
        elif at != to:
            edges.append(line(at, to))
        at = to
    return edges


def loops_of(value, body, folder):
    """The outline and the voids of a body, the way round that they should have."""
    outline = body.get("outline")
    if "wall" in body:
        outer = wall(value, body["wall"])
    elif isinstance(outline, list):
        outer = chain(value, outline, closed=True)
    elif "circle" in outline:
        centre, radius = target(value, outline["circle"], 0j), value(outline["radius"])
        outer = [arc(centre, centre + radius, math.tau)]
    elif "csv" in outline:
        outer = from_csv(folder / outline["csv"])
    else:
        outer = from_svg(folder / outline["svg"])
    voids = [chain(value, steps, closed=True) for steps in body.get("voids", [])]
    return [directed(outer, 1), *(directed(loop, -1) for loop in voids)]


def directed(loop, sign):
    return loop if integral(loop, lambda r, z: r) * sign > 0 else [reverse(edge) for edge in reversed(loop)]


# Figures ---------------------------------------------------------------------------------------------------------------

NODES, WEIGHTS = np.polynomial.legendre.leggauss(24)
PANELS = 8


def points_along(edge):
    """Points, derivatives and weights of the quadrature along an edge."""
    ends = np.linspace(edge.start, edge.end, PANELS + 1)
    half = np.diff(ends)[:, None] / 2
    t = (ends[:-1, None] + half * (NODES + 1)).ravel()
    return edge.point(t), edge.derivative(t), (half * WEIGHTS).ravel()


def integral(loop, of):
    """Integral of `of` dz around a loop: by Green's theorem that of its derivative along r over the area."""
    total = 0.0
    for edge in loop:
        p, derivative, weights = points_along(edge)
        total += float(np.sum(of(p.real, p.imag) * derivative.imag * weights))
    return total


def along(loop, of):
    """Integral of `of` ds along a loop."""
    total = 0.0
    for edge in loop:
        p, derivative, weights = points_along(edge)
        total += float(np.sum(of(p.real, p.imag) * np.abs(derivative) * weights))
    return total


def solid(loops, density, turn, scale):
    """Volume, surface, mass, first moments and inertia about the origin of one body, SI."""
    area = lambda of, power: sum(integral(loop, of) for loop in loops) * scale**power
    section = area(lambda r, z: r, 2)
    r1 = area(lambda r, z: r**2 / 2, 3)
    r2 = area(lambda r, z: r**3 / 3, 4)
    r1z = area(lambda r, z: r**2 / 2 * z, 4)
    r3 = area(lambda r, z: r**4 / 4, 5)
    r2z = area(lambda r, z: r**3 / 3 * z, 5)
    r1zz = area(lambda r, z: r**2 / 2 * z**2, 5)
    swept_surface = turn * sum(along(loop, lambda r, z: r) for loop in loops) * scale**2
    full = turn == math.tau
    sin, cos = (0.0, 1.0) if full else (math.sin(turn), math.cos(turn))
    xx, yy = r3 * (turn / 2 + sin * cos / 2), r3 * (turn / 2 - sin * cos / 2)
    xy, xz, yz, zz = r3 * sin**2 / 2, r2z * sin, r2z * (1 - cos), r1zz * turn
    first = np.array([r2 * sin, r2 * (1 - cos), r1z * turn])
    inertia = np.array([[yy + zz, -xy, -xz], [-xy, xx + zz, -yz], [-xz, -yz, xx + yy]])
    return {
        "area": section,
        "perimeter": sum(along(loop, lambda r, z: r**0) for loop in loops) * scale,
        "volume": turn * r1,
        "surface": swept_surface + (0.0 if full else 2 * section),
        "mass": density * turn * r1,
        "first": density * first,
        "inertia_about_origin": density * inertia,
    }


def figures(path, density_of):
    """The figures of the part file at `path`; `density_of` gives the density of a designation, kg/m3."""
    path = Path(path)
    file = tomllib.loads(path.read_text(encoding="utf-8"))
    unit = file["part"].get("unit", "mm")
    value = Values(unit, file.get("size", {}))
    degrees_turned = value(file["part"].get("revolve", 360))
    turn = math.tau if degrees_turned == 360 else math.radians(degrees_turned)
    own = {material["name"]: material["density"] for material in file.get("material", [])}
    bodies = []
    for body in file["body"]:
        written = body.get("density") or own.get(body.get("material"))
        density = float(written.split()[0]) if written else density_of(body["material"])
        bodies.append(solid(loops_of(value, body, path.parent), density, turn, UNIT[unit]))
    whole = {key: sum(body[key] for body in bodies) for key in bodies[0]}
    whole["centre"] = whole.pop("first") / whole["mass"]
    return whole
