//! Along the section: an edge becomes a chain of chords.
//!
//! A curved edge is first cut where it changes from convex to concave and, for the one-sided placements, where its
//! normal is parallel to the axis; each piece is a *span*. A span is divided so that its chords have equal sagittas: the
//! sagitta of a short chord c on curvature k is k c^2 / 8, so equal parts of F = ∫ sqrt(|k|) ds have equal sagittas F_i^2 / 8.
//!
//! Volume-true: the corners inside a span are moved by d along the normal to the convex side, its ends stay (corners of
//! the profile stay corners, flat faces stay flat). With inner chords of sagitta s and the two end chords of sagitta s/2
//! (shorter by sqrt 2), d = 2 s / 3 makes the area between chain and edge vanish chord by chord, and the largest distance is
//! d itself: at the chord middles it is s/3, in the end chords below s/4. The exact factor on d that makes the *moment*
//! ∬ r dA vanish, which is what Guldin's theorem turns into volume, is found by Newton's method.

use crate::{MeshError, Placement};
use profile::{Base, Bezier, DVec2, Edge, left_of};

/// How an edge is divided.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Division {
    /// Greatest distance of chain and edge, metres.
    pub(crate) within: f64,
    /// Where the chain lies.
    pub(crate) placement: Placement,
    /// Greatest angle in radians that one chord may stand for.
    pub(crate) greatest_turn: f64,
    /// Greatest length of a chord, metres.
    pub(crate) greatest_chord: f64,
    /// A place nearer to the axis than this is on it, metres.
    pub(crate) axis: f64,
    /// Chords beyond which the mesh would break the limit on triangles whatever its rings' counts.
    pub(crate) most_pieces: u64,
}

/// A corner of the chain.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) struct Node {
    /// Where it is, r and z.
    pub(crate) at: DVec2,
    /// Outward unit normal (to the right of travel) of the true edge there.
    pub(crate) normal: DVec2,
    /// |Curvature| of the true edge there, 1/m.
    pub(crate) curvature: f64,
}

/// An edge as a chain of chords: all nodes but the last, which is the next edge's first.
#[derive(Debug, Clone)]
pub(crate) struct Chain {
    /// The nodes, from the edge's start; its end is left out.
    pub(crate) nodes: Vec<Node>,
    /// Greatest distance of chain and edge, both ways; a bound.
    pub(crate) deviation: f64,
    /// The chain's moment ∬ r dA less the edge's, m3 a radian.
    pub(crate) moment_excess: f64,
}

/// Panels in which F is tabulated; node places between are found by interpolation, which moves them along the edge only.
const PANELS: usize = 64;

/// `edge` divided by `division`.
///
/// # Errors
/// More chords than the limit on triangles allows.
pub(crate) fn divide(edge: &Edge, division: &Division) -> Result<Chain, MeshError> {
    let mut chain = Chain {
        nodes: Vec::new(),
        deviation: 0.0,
        moment_excess: 0.0,
    };
    if let Edge::Line(line) = edge {
        let pieces = pieces_of(line.chord().length() / division.greatest_chord);
        division.allow(pieces)?;
        let normal = -left_of(line.chord().normalize());
        chain.nodes.extend((0..pieces).map(|i| Node {
            at: line.point(f64::from(i) / f64::from(pieces)),
            normal,
            curvature: 0.0,
        }));
        return Ok(chain);
    }
    for span in spans(edge, division) {
        divide_span(edge, span, division, &mut chain)?;
    }
    Ok(chain)
}

impl Division {
    fn allow(&self, pieces: u32) -> Result<(), MeshError> {
        if u64::from(pieces) <= self.most_pieces {
            return Ok(());
        }
        // Each chord is a band of at least three quads.
        Err(MeshError::TooMany {
            triangles: 6 * u64::from(pieces),
            allowed: 6 * self.most_pieces,
        })
    }
}

/// A count of at least one from a ratio that may be zero, huge or not finite.
#[expect(
    clippy::cast_possible_truncation,
    clippy::cast_sign_loss,
    reason = "clamped to the range of u32 first"
)]
fn pieces_of(ratio: f64) -> u32 {
    ratio.ceil().clamp(1.0, 1e9) as u32
}

/// Parameters between which the edge turns one way only, does not touch the axis and, where asked, its normal does not pass the
/// axis' direction.
fn spans(edge: &Edge, division: &Division) -> Vec<[f64; 2]> {
    let mut cuts = vec![0.0, 1.0];
    let touching = standstills(edge, |tangent| tangent.x).into_iter();
    cuts.extend(touching.filter(|t| edge.point(*t).x <= division.axis));
    if let Edge::Bezier(bezier)
    | Edge::Parallel(profile::Parallel {
        base: Base::Bezier(bezier),
        ..
    }) = edge
    {
        cuts.extend(inflections(*bezier));
    }
    if division.placement != Placement::VolumeTrue {
        cuts.extend(standstills(edge, |tangent| tangent.y));
    }
    cuts.retain(|t| (0.0..=1.0).contains(t));
    cuts.sort_by(f64::total_cmp);
    // A cut within rounding of another would make a span of no length.
    cuts.dedup_by(|b, a| *b - *a < 1e-9);
    if let Some(last) = cuts.last_mut() {
        *last = 1.0;
    }
    cuts.windows(2).map(|pair| [pair[0], pair[1]]).collect()
}

/// Where a cubic's curvature changes sign: roots of C' x C'', a quadratic in t.
fn inflections(bezier: Bezier) -> impl Iterator<Item = f64> {
    let [a, b, c, d] = bezier.points;
    let (first, second, third) = (b - a, c - b, d - c);
    let (x01, x02, x12) = (
        first.perp_dot(second),
        first.perp_dot(third),
        second.perp_dot(third),
    );
    roots(x01 - x02 + x12, x02 - 2.0 * x01, x01)
}

/// Real roots of a t2 + b t + c.
fn roots(a: f64, b: f64, c: f64) -> impl Iterator<Item = f64> {
    let discriminant = b * b - 4.0 * a * c;
    let q = -0.5 * (b + b.signum() * discriminant.max(0.0).sqrt());
    [
        (discriminant >= 0.0 && a != 0.0).then(|| q / a),
        (discriminant >= 0.0 && q != 0.0).then(|| c / q),
    ]
    .into_iter()
    .flatten()
}

/// Parameters at which a component of the direction changes its sign, by bisection between samples finer than half a turn of
/// any edge kind.
fn standstills(edge: &Edge, component: impl Fn(DVec2) -> f64) -> Vec<f64> {
    let slope = |t: f64| component(edge.tangent(t));
    let grid = |i: usize| i as f64 / PANELS as f64;
    let mut found = Vec::new();
    for i in 0..PANELS {
        let (mut low, mut high) = (grid(i), grid(i + 1));
        let (before, after) = (slope(low), slope(high));
        if after == 0.0 && i + 1 < PANELS {
            found.push(high);
        } else if before * after < 0.0 {
            for _ in 0..60 {
                let middle = 0.5 * (low + high);
                if (slope(middle) > 0.0) == (after > 0.0) {
                    high = middle;
                } else {
                    low = middle;
                }
            }
            found.push(0.5 * (low + high));
        }
    }
    found
}

/// F tabulated over a span, for placing nodes at equal shares of it.
struct Spacing {
    from: f64,
    to: f64,
    sums: [f64; PANELS + 1],
}

impl Spacing {
    fn new(edge: &Edge, [from, to]: [f64; 2]) -> Self {
        let step = (to - from) / PANELS as f64;
        let density = |t: f64| {
            let speed = edge.derivative(t).length();
            let curvature = edge.curvature(t).abs();
            // At a vanishing derivative the curvature may be infinite; the density stays integrable.
            if curvature.is_finite() {
                speed * curvature.sqrt()
            } else {
                0.0
            }
        };
        let mut sums = [0.0; PANELS + 1];
        for i in 0..PANELS {
            let t = from + step * i as f64;
            // Gauss-Legendre with two points, exact to the third power.
            let (low, high) = (
                t + step * 0.211_324_865_405_187_1,
                t + step * 0.788_675_134_594_812_9,
            );
            sums[i + 1] = sums[i] + 0.5 * step * (density(low) + density(high));
        }
        Self { from, to, sums }
    }

    fn total(&self) -> f64 {
        self.sums[PANELS]
    }

    /// Parameter of node `i` of `pieces`, at which F has reached `f`; the ends exactly.
    fn at(&self, i: u32, pieces: u32, f: f64) -> f64 {
        match i {
            0 => self.from,
            i if i == pieces => self.to,
            _ => self.parameter(f),
        }
    }

    fn parameter(&self, f: f64) -> f64 {
        let i = self.sums.partition_point(|&sum| sum <= f).clamp(1, PANELS);
        let (low, high) = (self.sums[i - 1], self.sums[i]);
        let inside = if high > low {
            (f - low) / (high - low)
        } else {
            0.5
        };
        self.from
            + (self.to - self.from) * ((i - 1) as f64 + inside.clamp(0.0, 1.0)) / PANELS as f64
    }
}

/// Nodes of one span: its start and the inner ones, on the edge or displaced.
fn divide_span(
    edge: &Edge,
    span: [f64; 2],
    division: &Division,
    chain: &mut Chain,
) -> Result<(), MeshError> {
    let spacing = Spacing::new(edge, span);
    let turn = profile::trig::angle_between(edge.tangent(span[0]), edge.tangent(span[1])).abs();
    let length = edge.part(span[0], span[1]).chord().length();
    let mut pieces = pieces_of(turn / division.greatest_turn)
        .max(pieces_of(length / division.greatest_chord))
        .max(pieces_for(spacing.total(), division));
    loop {
        division.allow(pieces)?;
        let nodes = match division.placement {
            Placement::VolumeTrue => moment_true(edge, &spacing, pieces),
            _ if chords_suffice(edge, span, division.placement) => on_edge(edge, &spacing, pieces),
            _ => tangent_polygon(edge, &spacing, pieces),
        };
        let deviation = deviation(edge, &nodes);
        if deviation <= division.within {
            let mut nodes = nodes;
            for (_, node) in &mut nodes {
                if node.at.x <= division.axis {
                    node.at.x = 0.0;
                }
            }
            let origin = edge.point(span[0]).x;
            let parameters: Vec<f64> = nodes.iter().map(|(t, _)| *t).collect();
            chain.moment_excess +=
                chain_moment(&nodes, origin) - edge_moment(edge, &parameters, origin);
            chain.deviation = chain.deviation.max(deviation);
            chain
                .nodes
                .extend(nodes.iter().take(nodes.len() - 1).map(|(_, node)| *node));
            return Ok(());
        }
        // The estimate holds for evenly curved spans; others need a few more.
        pieces += 1 + pieces / 16;
    }
}

/// Chords for a span of `total` F so that its distance is within the division's: see the head of the file.
fn pieces_for(total: f64, division: &Division) -> u32 {
    match division.placement {
        // d = F_i^2 / 12 <= within, and the two end chords count for 1/sqrt 2 each.
        Placement::VolumeTrue => {
            let inner = total / (12.0 * division.within).sqrt();
            pieces_of(inner + 2.0 - std::f64::consts::SQRT_2).max(2)
        }
        // F_i^2 / 8 <= within.
        Placement::Inscribed | Placement::Circumscribed => {
            pieces_of(total / (8.0 * division.within).sqrt())
        }
    }
}

/// True where chords with ends on the edge lie on the allowed side: inside the solid for an inscribed mesh where the edge
/// is convex outward, outside for a circumscribed one where it is concave.
fn chords_suffice(edge: &Edge, [from, to]: [f64; 2], placement: Placement) -> bool {
    // The material is on the left: an edge that turns left bulges out of it.
    let turns_left = edge.tangent(from).perp_dot(edge.tangent(to)) > 0.0;
    turns_left == (placement == Placement::Inscribed)
}

/// A node with the parameter of the point of the edge that it stands for.
type Placed = (f64, Node);

fn node(edge: &Edge, t: f64, displacement: f64) -> Placed {
    let normal = -left_of(edge.tangent(t));
    let curvature = edge.curvature(t);
    let at = if displacement == 0.0 {
        edge.point(t)
    } else {
        edge.point(t) + displacement * normal
    };
    (
        t,
        Node {
            at,
            normal,
            curvature: if curvature.is_finite() {
                curvature.abs()
            } else {
                0.0
            },
        },
    )
}

/// Nodes on the edge at equal shares of F.
fn on_edge(edge: &Edge, spacing: &Spacing, pieces: u32) -> Vec<Placed> {
    let step = spacing.total() / f64::from(pieces);
    (0..=pieces)
        .map(|i| node(edge, spacing.at(i, pieces, f64::from(i) * step), 0.0))
        .collect()
}

/// Start, the meetings of neighbouring tangents, end: a chain on the convex side of the edge.
fn tangent_polygon(edge: &Edge, spacing: &Spacing, pieces: u32) -> Vec<Placed> {
    let touching = on_edge(edge, spacing, pieces);
    let mut nodes = vec![touching[0]];
    for pair in touching.windows(2) {
        let ([(t0, a), (t1, b)], middle) = ([pair[0], pair[1]], 0.5 * (pair[0].0 + pair[1].0));
        let (u, v) = (edge.tangent(t0), edge.tangent(t1));
        let turned = u.perp_dot(v);
        if turned != 0.0 {
            let (_, between) = node(edge, middle, 0.0);
            let at = a.at + u * ((b.at - a.at).perp_dot(v) / turned);
            nodes.push((middle, Node { at, ..between }));
        }
    }
    nodes.extend(touching.last());
    nodes
}

/// Nodes displaced so that the chain has the edge's moment ∬ r dA; the span's ends stay.
fn moment_true(edge: &Edge, spacing: &Spacing, pieces: u32) -> Vec<Placed> {
    let inner = spacing.total() / (f64::from(pieces) - 2.0 + std::f64::consts::SQRT_2);
    let end = inner * std::f64::consts::FRAC_1_SQRT_2;
    let parameters: Vec<f64> = (0..=pieces)
        .map(|i| {
            spacing.at(
                i,
                pieces,
                if i == 0 {
                    0.0
                } else {
                    end + inner * f64::from(i - 1)
                },
            )
        })
        .collect();
    let last = parameters.len() - 1;
    // To the convex side: to the right of travel (outward) where the edge turns left.
    let middle = 0.5 * (spacing.from + spacing.to);
    let side = edge.curvature(middle).signum();
    let displaced = |factor: f64| -> Vec<Placed> {
        let displacement = factor * side * inner * inner / 12.0;
        let nodes = parameters.iter().enumerate().map(|(i, &t)| {
            let moved = node(
                edge,
                t,
                if i == 0 || i == last {
                    0.0
                } else {
                    displacement
                },
            );
            // A node must not be moved over the axis.
            if moved.1.at.x > 0.0 {
                moved
            } else {
                node(edge, t, 0.0)
            }
        });
        nodes.collect()
    };
    let origin = edge.point(spacing.from);
    let wanted = edge_moment(edge, &parameters, origin.x);
    let excess = |nodes: &[Placed]| chain_moment(nodes, origin.x) - wanted;
    // The moment is a cubic in the factor and nearly a straight line: the secant settles in two or three steps.
    let (mut low, mut high) = (0.9, 1.0);
    let mut at_low = excess(&displaced(low));
    for _ in 0..6 {
        let at_high = excess(&displaced(high));
        let slope = (at_high - at_low) / (high - low);
        let next = high - at_high / slope;
        // Where the axis holds nodes back there may be no such factor; the volume is then closed by the last correction.
        if !(0.0..=2.0).contains(&next) {
            break;
        }
        (low, at_low, high) = (high, at_high, next);
        if (high - low).abs() <= 4.0 * f64::EPSILON {
            break;
        }
    }
    displaced(high)
}

/// ∫ (r^2 - r0^2)/2 dz along the chain, written about r0 so that a thin ring keeps its digits.
fn chain_moment(nodes: &[Placed], r0: f64) -> f64 {
    nodes
        .windows(2)
        .map(|pair| {
            let (a, b) = (pair[0].1.at, pair[1].1.at);
            let (p, q) = (a.x - r0, b.x - r0);
            (b.y - a.y) * (0.5 * r0 * (p + q) + (p * p + p * q + q * q) / 6.0)
        })
        .sum()
}

/// ∫ (r^2 - r0^2)/2 dz along the edge, by Gauss-Legendre with eight points a chord: the error is of the sixteenth
/// power of the chord's share of a turn.
fn edge_moment(edge: &Edge, parameters: &[f64], r0: f64) -> f64 {
    let at = |t: f64| {
        let p = edge.point(t).x - r0;
        p * (r0 + 0.5 * p) * edge.derivative(t).y
    };
    parameters
        .windows(2)
        .map(|pair| {
            let (middle, half) = (0.5 * (pair[0] + pair[1]), 0.5 * (pair[1] - pair[0]));
            let sum: f64 = GAUSS_8
                .iter()
                .map(|&(x, weight)| weight * (at(middle - half * x) + at(middle + half * x)))
                .sum();
            half * sum
        })
        .sum()
}

/// Abscissae and weights of the eight-point Gauss-Legendre rule (Abramowitz and Stegun 1964, table 25.4).
const GAUSS_8: [(f64, f64); 4] = [
    (0.183_434_642_495_649_8, 0.362_683_783_378_362),
    (0.525_532_409_916_329, 0.313_706_645_877_887_3),
    (0.796_666_477_413_626_7, 0.222_381_034_453_374_47),
    (0.960_289_856_497_536_2, 0.101_228_536_290_376_26),
];

/// A bound on the distance of edge and chain, both ways.
///
/// Between two samples an edge that turns one way lies in the triangle of the samples and the meeting of their tangents,
/// so its greatest height over a chord is at most that of the samples and of those meetings; with eight parts a chord
/// the excess is a sixty-fourth of the sagitta.
fn deviation(edge: &Edge, nodes: &[Placed]) -> f64 {
    const PARTS: u32 = 8;
    let mut greatest = 0.0_f64;
    for pair in nodes.windows(2) {
        let [(t0, a), (t1, b)] = [pair[0], pair[1]];
        let Some(along) = (b.at - a.at).try_normalize() else {
            continue;
        };
        let height = |p: DVec2| along.perp_dot(p - a.at).abs();
        let mut before: Option<(DVec2, DVec2)> = None;
        for i in 0..=PARTS {
            let t = t0 + (t1 - t0) * f64::from(i) / f64::from(PARTS);
            let (point, tangent) = (edge.point(t), edge.tangent(t));
            greatest = greatest.max(height(point));
            if let Some((p, u)) = before {
                let turned = u.perp_dot(tangent);
                if turned != 0.0 {
                    greatest =
                        greatest.max(height(p + u * ((point - p).perp_dot(tangent) / turned)));
                }
            }
            before = Some((point, tangent));
        }
        // A displaced node is as far from the edge as it was moved.
        greatest = greatest.max(a.at.distance(edge.point(t0)));
    }
    greatest
}
