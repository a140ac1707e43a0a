//! Keeping triangles from becoming needles: rings where bands are too long for their segments, segments where rings are too
//! close for theirs.
//!
//! A triangle on a ring's segment c with its apex on a ring at the distance s has the aspect ratio (longest edge over the
//! height on it) c/s + s/c where the apex stands over the segment's end, more where it leans. So every band's s is kept
//! between c/k and k c for both of its rings, and k is lowered until the leaning ones hold too. The end caps of a part turn
//! are left out: their triangles fill the section as it is.

use crate::MeshError;
use crate::plan::{BodyPlan, Corner, LoopPlan, Outline, Station};
use crate::ring::Circle;
use crate::zip::{Facet, zip};
use glam::DVec3;
use profile::trig;

/// Tries, each with the bands' ratio brought nearer to one.
const TRIES: u32 = 12;
/// How much of its excess over one the bands' ratio keeps from try to try.
const TIGHTER: f64 = 0.75;
/// Rounds in which new rings and new counts settle with each other.
const ROUNDS: u32 = 24;
/// New rings of one band beyond which there is no end: where the surface comes to the axis in a cusp, each ring would ask for
/// a closer one.
const MOST_RINGS: usize = 10_000;
/// A new ring is set at this share of the greatest distance, so that its own segments may grow a little.
const STRIDE: f64 = 0.7;

/// The plan that `rings` makes of the chains, refined until no swept triangle is longer than `asked` times its height.
///
/// # Errors
/// Those of `rings`; [`MeshError::Aspect`] where no refinement of up to `most` triangles holds.
pub(crate) fn kept(
    asked: f64,
    chains: &[Outline],
    angle: f64,
    most: u64,
    rings: impl Fn(&[Outline]) -> Result<BodyPlan, MeshError>,
) -> Result<BodyPlan, MeshError> {
    let mut ratio = 0.5 * asked;
    for _ in 0..TRIES {
        let mut refined = chains.to_vec();
        for _ in 0..ROUNDS {
            let plan = match rings(&refined) {
                Err(MeshError::TooMany { .. }) if ratio < 0.5 * asked => {
                    return Err(MeshError::Aspect { asked });
                }
                plan => plan?,
            };
            if !refine(&mut refined, &plan, angle, [asked, ratio], most)? {
                if worst(&plan, angle) <= asked {
                    return Ok(plan);
                }
                break;
            }
        }
        ratio = 1.0 + (ratio - 1.0) * TIGHTER;
    }
    Err(MeshError::Aspect { asked })
}

/// Adds rings and raises counts where a band breaks the ratio; true where anything was changed.
fn refine(
    chains: &mut [Outline],
    plan: &BodyPlan,
    angle: f64,
    [asked, ratio]: [f64; 2],
    most: u64,
) -> Result<bool, MeshError> {
    let mut is_changed = false;
    let mut total = 0_u64;
    for (outline, l) in chains.iter_mut().zip(&plan.loops) {
        let stations = &l.stations;
        let count = stations.len();
        let mut corners = Vec::with_capacity(count);
        for i in 0..count {
            let [before, here, after] =
                [(i + count - 1) % count, i, (i + 1) % count].map(|i| &stations[i]);
            let mut corner = outline.corners[i];
            if !here.is_pole() {
                let shortest = slant(before, here).min(slant(here, after));
                let least = here.radius * angle / (ratio * shortest);
                if f64::from(here.segments) < least {
                    corner.least = whole(least);
                    is_changed = true;
                }
                total += u64::from(here.segments.max(corner.least));
            }
            corners.push(corner);
            let inserted = between(outline, i, [here, after], angle, [asked, ratio])
                .ok_or(MeshError::Aspect { asked })?;
            is_changed |= !inserted.is_empty();
            total += inserted.iter().map(|c| u64::from(c.least)).sum::<u64>();
            corners.extend(inserted);
        }
        outline.corners = corners;
    }
    // A one-sided mesh has one count for all rings: towards the axis there would be no end of them.
    if 2 * total > most {
        return Err(MeshError::Aspect { asked });
    }
    Ok(is_changed)
}

/// Rounded up to a count.
#[expect(
    clippy::cast_possible_truncation,
    clippy::cast_sign_loss,
    reason = "clamped to the range of u32 first"
)]
fn whole(count: f64) -> u32 {
    count.ceil().clamp(1.0, 1e9) as u32
}

/// Length of a band in the section; none where it lies on the axis.
fn slant(a: &Station, b: &Station) -> f64 {
    if a.is_pole() && b.is_pole() {
        return f64::INFINITY;
    }
    trig::hypot(a.radius - b.radius, a.z - b.z)
}

/// Length of a ring's segment; a point on the axis has none that could be too short.
fn segment(station: &Station, angle: f64) -> f64 {
    if station.is_pole() {
        f64::INFINITY
    } else {
        station.radius * angle / f64::from(station.segments)
    }
}

/// New corners on a band that is longer than its shorter segments allow, from both ends to the middle; `None` where there would
/// be no end of them.
fn between(
    outline: &Outline,
    i: usize,
    [here, after]: [&Station; 2],
    angle: f64,
    [asked, ratio]: [f64; 2],
) -> Option<Vec<Corner>> {
    let length = slant(here, after);
    let (mut low, mut high) = ((0.0, segment(here, angle)), (length, segment(after, angle)));
    // The tip of a cone is as slender with a ring next to it as without: there the triangles may be what was asked for, which
    // s/c + c/s is where s = c (a + (a^2 - 4)^(1/2)) / 2.
    let greatest = if here.is_pole() || after.is_pole() {
        0.5 * (asked + (asked * asked - 4.0).max(0.0).sqrt())
    } else {
        ratio
    };
    if !length.is_finite() || length <= greatest * low.1.min(high.1) {
        return Some(Vec::new());
    }
    let corners = &outline.corners;
    let (from, to) = (corners[i], corners[(i + 1) % corners.len()]);
    let along = (to.at - from.at).normalize_or_zero();
    let spent = outline
        .spent
        .get(from.edge as usize)
        .copied()
        .unwrap_or(0.0);
    let on_band = |way: f64, reach: f64| {
        let at = from.at.lerp(to.at, way / length);
        // On a straight edge the surface faces as the band does; on a curved one at most as its ends do.
        let curvature = from.circle.curvature.max(to.circle.curvature);
        let facing = if spent == 0.0 {
            along.y.abs()
        } else {
            along.y.abs().max(from.circle.facing).max(to.circle.facing)
        };
        Corner {
            at,
            circle: Circle {
                radius: at.x,
                facing,
                curvature,
            },
            spent,
            edge: from.edge,
            least: whole(at.x * angle / (ratio * reach)),
        }
    };
    let (mut rising, mut falling) = (Vec::new(), Vec::new());
    loop {
        let gap = high.0 - low.0;
        let shorter = low.1.min(high.1);
        if gap <= greatest * shorter {
            break;
        }
        if rising.len() + falling.len() >= MOST_RINGS {
            return None;
        }
        let stride = (STRIDE * ratio * shorter).min(0.5 * gap);
        let from_low = low.1 <= high.1;
        let way = if from_low {
            low.0 + stride
        } else {
            high.0 - stride
        };
        let corner = on_band(way, stride);
        let own = corner.at.x * angle / f64::from(corner.least);
        if from_low {
            rising.push(corner);
            low = (way, own);
        } else {
            falling.push(corner);
            high = (way, own);
        }
    }
    rising.extend(falling.into_iter().rev());
    Some(rising)
}

/// The greatest ratio of longest edge to height among the triangles of the bands.
pub(crate) fn worst(plan: &BodyPlan, angle: f64) -> f64 {
    let bands = plan.loops.iter().flat_map(LoopPlan::bands);
    bands.fold(0.0, |most, (a, b)| most.max(worst_of_band(&a, &b, angle)))
}

fn worst_of_band(a: &Station, b: &Station, angle: f64) -> f64 {
    let corner = |station: &Station, i: u32| {
        let turned = if station.is_pole() {
            profile::DVec2::X
        } else {
            trig::direction(f64::from(i) * angle / f64::from(station.segments))
        };
        DVec3::new(
            station.radius * turned.x,
            station.radius * turned.y,
            station.z,
        )
    };
    let of = |facet: Facet| match facet {
        Facet::OnA(i, j) => [corner(a, i), corner(a, i + 1), corner(b, j)],
        Facet::OnB(i, j) => [corner(b, j), corner(a, i), corner(b, j + 1)],
    };
    // The pattern of equal rings repeats from the first segment on.
    let facets = if a.segments == b.segments {
        2
    } else {
        usize::MAX
    };
    zip(a.segments, b.segments)
        .take(facets)
        .map(|facet| ratio(of(facet)))
        .fold(0.0, f64::max)
}

/// Longest edge over the height on it.
pub(crate) fn ratio([a, b, c]: [DVec3; 3]) -> f64 {
    let longest = a
        .distance_squared(b)
        .max(b.distance_squared(c))
        .max(c.distance_squared(a));
    longest / (b - a).cross(c - a).length()
}
