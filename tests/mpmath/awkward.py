"""Awkward sections and their figures at 50 digits: those that a formula loses its digits on first.

    python awkward.py            writes awkward.json: 71 seeded parts and their figures
    python awkward.py --check N  works out N of the quick ones again, chosen by a seed, and compares with awkward.json

Edges and figures are those of make.py. Only the quadrature differs: an edge is halved until its halves agree with the
whole, since an ellipse a millionth as wide as long, or a parallel curve just short of its cusp, turns in a very small
part of itself. What makes a class awkward stands at its maker. The parts are invented.
"""

import math

from mpmath import mp, mpf
from mpmath.calculus.quadrature import GaussLegendre

from make import (
    HERE,
    TAU,
    bowed,
    closed,
    dome,
    integrals,
    integrands,
    main,
    make,
    ordinary,
    oval,
    shell,
    solid,
    straight,
    wall,
)

# --- quadrature that follows the curve -----------------------------------------------------------------------------


# mpmath's own Gauss-Legendre rule of 24 points on [0, 1].
RULE = GaussLegendre(mp).get_nodes(mpf(0), mpf(1), 4, mp.prec)
AGREEMENT = mpf(10) ** -23
# More halvings than this mean a curve that is not smooth.
HALVINGS = 26


def halved_until_settled(curve):
    """The integrals by a rule on intervals of t, each halved until its halves agree with the whole."""
    amounts = [[weight * abs(term) for term in integrands(curve, t)] for t, weight in RULE]
    # Agreement is relative to the integrals of the absolute values: the integrals themselves may vanish.
    allowed = [AGREEMENT * (sum(column) + mpf(10) ** -40) for column in zip(*amounts)]

    def over(a, b):
        return integrals(curve, [(a + (b - a) * t, (b - a) * weight) for t, weight in RULE])

    def settle(a, b, whole, halvings):
        assert halvings > 0, (a, b)
        middle = (a + b) / 2
        first, second = over(a, middle), over(middle, b)
        if all(abs(x + y - z) <= limit for x, y, z, limit in zip(first, second, whole, allowed)):
            return [x + y for x, y in zip(first, second)]
        halves = settle(a, middle, first, halvings - 1), settle(middle, b, second, halvings - 1)
        return [x + y for x, y in zip(*halves)]

    return settle(mpf(0), mpf(1), over(mpf(0), mpf(1)), HALVINGS)


# --- thin walls far from the axis ----------------------------------------------------------------------------------


def thin_cone(rng):
    """A cone's wall at a slant: the corners' own rounding is seen in its area, and no edge runs along r or z."""
    r, length, slant, thickness = 10 * rng.uniform(0.9, 1.1), rng.uniform(0.5, 4), rng.uniform(0.3, 1.2), 1e-4
    along = [math.cos(slant), math.sin(slant)]
    across = [-along[1], along[0]]
    p = [r, rng.uniform(-3, 3)]
    q = [p[0] + length * along[0], p[1] + length * along[1]]
    beside = lambda corner: [corner[0] + thickness * across[0], corner[1] + thickness * across[1]]
    return [closed([p, q, beside(q), beside(p)], straight)]


def very_thin_dome(rng):
    """A ten-millionth of the radius thick: the two faces' integrals agree in their first seven digits."""
    return dome(rng, 10 * rng.uniform(0.9, 1.1), 1e-6)


def elliptic_dome(rng):
    """Two ellipses that are no parallels: the wall is a difference of two edges that share no centre of curvature."""
    a, b, thickness = 10.0, 4.0, 1e-4
    low, sweep = rng.uniform(0.1, 0.3), rng.uniform(0.5, 1.1)
    high = low + sweep

    def belt(a, b, start, end, sweep):
        on = lambda angle: [a * math.cos(angle), b * math.sin(angle)]
        return oval(on(start), on(end), [a, 0.0], [0.0, b], start, sweep)

    return [shell(belt(a, b, low, high, sweep), belt(a - thickness, b - thickness, high, low, -sweep))]


def thin_arched_wall(rng):
    """A wall 40,000 times as long as thick between a curve and its parallel, whose integrals have no closed form."""
    p, q = [10.0, 0.0], [6.0, 4.0]
    base = {"kind": "cubic", "points": [p, [10.0, 2.0], [8.0, 4.0], q]}
    if rng.random() < 0.5:
        base = oval(p, q, [4.0, 0.0], [0.0, 4.0], 0.0, math.pi / 2)
    return wall(base, 1e-4)


# --- curves that hardly are ones -----------------------------------------------------------------------------------


def flat_ellipse(rng):
    """Half an ellipse 10,000 to 1,000,000 times as long as wide, along r or z: it turns back in almost no room."""
    long, short = 1.0, 10 ** -rng.uniform(4, 6)
    r, z = 3 * long, rng.uniform(-1, 1)
    if rng.random() < 0.5:
        p, q = [r + long, z], [r - long, z]
        return [[oval(p, q, [long, 0.0], [0.0, short], 0.0, math.pi), straight(q, p)]]
    p, q = [r, z - long], [r, z + long]
    return [[oval(p, q, [short, 0.0], [0.0, long], -math.pi / 2, math.pi), straight(q, p)]]


# Both ends of the cubics that stall.
BELOW, ABOVE = [1.0, 0.0], [1.2, 1.0]
STALLED_BELOW = [BELOW, BELOW, [1.6, 0.8], ABOVE]
STALLED_ABOVE = [BELOW, [1.7, 0.2], ABOVE, ABOVE]
STALLED_TWICE = [BELOW, BELOW, ABOVE, ABOVE]


def stalled_cubic(rng):
    """A control point on an end of the cubic, or one on each: there the speed is 0 and gives no direction."""
    points = rng.choice([STALLED_BELOW, STALLED_ABOVE, STALLED_TWICE])
    # The one that stalls twice is its own chord, so its section needs a third corner.
    back = [ABOVE, [0.5, 0.5], BELOW] if points is STALLED_TWICE else [ABOVE, BELOW]
    return [[{"kind": "cubic", "points": points}] + [straight(p, q) for p, q in zip(back, back[1:])]]


def beside_stalled_cubic(rng):
    """A parallel to a cubic that stalls: its own ends need the direction that the speed does not give."""
    points = rng.choice([STALLED_BELOW, STALLED_ABOVE])
    return wall({"kind": "cubic", "points": points}, -(10 ** -rng.uniform(2, 4)))


def near_cusp(rng):
    """A parallel to an ellipse, at a distance a tenth to a millionth short of where it would turn back on itself."""
    a, b = 1.0, 0.5
    least_radius = b * b / a
    distance = least_radius * (1 - 10 ** -rng.uniform(1, 6))
    return wall(oval([2 + a, 0.0], [2.0, b], [a, 0.0], [0.0, b], 0.0, math.pi / 2), distance)


# --- ordinary parts in an awkward place ----------------------------------------------------------------------------


def shifted(loops, dr, dz):
    move = lambda p: [p[0] + dr, p[1] + dz]

    def moved(edge):
        if edge["kind"] == "cubic":
            return dict(edge, points=[move(p) for p in edge["points"]])
        return dict(edge, start=move(edge["start"]), end=move(edge["end"]))

    return [[moved(edge) for edge in loop] for loop in loops]


def far_along_axis(rng):
    """A kilometre along the axis: moments about the origin would hide those about the centre."""
    return shifted(ordinary(rng), 0.0, 1000.0)


def far_from_axis(rng):
    """A kilometre from the axis: the moments in r would hide the section's own size."""
    return shifted(ordinary(rng), 1000.0, 0.0)


# --- sections between two arcs -------------------------------------------------------------------------------------


def needle(rng):
    """Two arcs of a tenth to a ten-millionth of a radian on one chord: all of the area is in their segments."""
    sweep = 10 ** -rng.uniform(1, 7)
    length = rng.uniform(0.1, 1)
    p = [1.0, 0.0]
    q = [1.0 + length * math.cos(1.0), length * math.sin(1.0)]
    return [[bowed(p, q, sweep), bowed(q, p, sweep * rng.uniform(0.2, 1))]]


def crescent(rng):
    """Two arcs on one chord whose sweeps agree to two to eight digits: its area is what their segments differ by."""
    sweep = rng.uniform(0.3, 3.1)
    less = 10 ** -rng.uniform(2, 8)
    p, q = [3.0, -1.0], [3.0, 1.0]
    return [[bowed(p, q, sweep), bowed(q, p, -sweep * (1 - less))]]


def ring(rng):
    """A torus of two half circles: the tangents at the ends are parallel, and each centre is on its chord."""
    r, z, radius = 2.0, rng.uniform(-1, 1), 1.0
    p, q = [r, z - radius], [r, z + radius]
    return [[bowed(p, q, math.pi), bowed(q, p, math.pi)]]


def hollow_ball(rng):
    """A shell of a hundredth to a millionth of its radius, from pole to pole: it is thin and touches the axis."""
    radius, thickness = 1.0, 10 ** -rng.uniform(2, 6)
    inner = radius - thickness
    return [shell(bowed([0.0, -radius], [0.0, radius], math.pi), bowed([0.0, inner], [0.0, -inner], -math.pi))]


# --- many edges, narrow turns --------------------------------------------------------------------------------------


def saw(rng):
    """A flank of 120 teeth: the rounding of as many edges adds up."""
    edges, p = [], [1.0, 0.0]
    for number in range(120):
        q = [p[0] + 0.01 * (1 if number % 2 == 0 else -1), p[1] + 0.003]
        edges.append(straight(p, q) if number % 3 else bowed(p, q, 0.7))
        p = q
    back = [p, [0.5, p[1]], [0.5, 0.0], [1.0, 0.0]]
    return [edges + [straight(a, b) for a, b in zip(back, back[1:])]]


def any_turn(rng):
    return rng.choice([TAU, math.pi / 2, rng.uniform(0.1, 6.2), TAU * 1e-6])


def narrow_turn(rng):
    """Angles whose cosine is nearly 1, on both sides of where a series takes over."""
    # Drawn and dropped: a class of another turn leaves the parts after it as they are.
    any_turn(rng)
    return rng.choice([TAU * 1e-6, 1e-9, 0.04, 0.06])


# (class, how many, maker, angle of revolution, relative error allowed)
CLASSES = [
    ("0.1 mm cone at 10 m", 4, thin_cone, any_turn, 1e-12),
    ("1 um dome of 10 m radius", 3, very_thin_dome, any_turn, 1e-12),
    ("0.1 mm elliptic dome of 10 m radius", 4, elliptic_dome, any_turn, 1e-12),
    ("0.1 mm wall beside a curve at 10 m", 4, thin_arched_wall, any_turn, 1e-12),
    ("flat ellipse", 6, flat_ellipse, any_turn, 1e-12),
    ("cubic that stalls", 5, stalled_cubic, any_turn, 1e-12),
    ("wall beside a cubic that stalls", 4, beside_stalled_cubic, any_turn, 1e-12),
    ("nearly a cusp", 6, near_cusp, any_turn, 1e-12),
    ("1 km along the axis", 4, far_along_axis, any_turn, 1e-12),
    ("1 km from the axis", 4, far_from_axis, any_turn, 1e-12),
    ("needle of two arcs", 6, needle, any_turn, 1e-12),
    ("crescent of two arcs", 6, crescent, any_turn, 1e-12),
    ("ring of two half circles", 2, ring, any_turn, 1e-13),
    ("hollow ball", 5, hollow_ball, any_turn, 1e-12),
    ("saw of 120 teeth", 1, saw, any_turn, 1e-12),
    ("ordinary, narrow turn", 4, ordinary, narrow_turn, 1e-13),
    ("on the axis, narrow turn", 3, solid, narrow_turn, 1e-13),
]

# A sample is taken from the other classes, so that two parts take seconds and `tests/run` stays under half a minute
# here: an ellipse as flat as that is halved many times, and the others have many edges.
SLOW = {"flat ellipse", "saw of 120 teeth", "ordinary, narrow turn", "1 km along the axis", "1 km from the axis"}


if __name__ == "__main__":
    main(HERE / "awkward.json", make(CLASSES, 5), halved_until_settled, SLOW)
