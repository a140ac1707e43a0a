//! From rings to triangles.

use crate::plan::{BodyPlan, LoopPlan, Station};
use crate::zip::{Facet, zip};
use crate::{MeshError, cap};
use glam::DVec3;
use profile::{DVec2, trig};
use rayon::prelude::*;
use std::f64::consts::TAU;

/// A body's corners and triangles, its corners numbered from 0.
#[derive(Debug, Clone, Default)]
pub(crate) struct Shells {
    pub(crate) positions: Vec<DVec3>,
    pub(crate) triangles: Vec<[u32; 3]>,
}

/// Where a station's corners are numbered. On a full turn a point on the axis has a corner for each band that ends in it,
/// since two cones that meet in one point are two fans; in a part turn the end caps join them.
#[derive(Debug, Clone, Copy)]
struct Numbered {
    station: Station,
    /// First corner towards the band before, and towards the band after.
    arriving: u32,
    leaving: u32,
    /// How many corners the station has.
    corners: u32,
}

/// Makes the triangles of one body.
pub(crate) fn revolve(plan: &BodyPlan, angle: f64) -> Result<Shells, MeshError> {
    let full = angle == TAU;
    let mut next = 0_u32;
    let numbered: Vec<Vec<Numbered>> = plan
        .loops
        .iter()
        .map(|l| number(l, full, &mut next))
        .collect();
    let mut shells = Shells {
        positions: vec![DVec3::ZERO; next as usize],
        triangles: vec![
            [0; 3];
            plan.loops
                .iter()
                .flat_map(LoopPlan::bands)
                .map(|(a, b)| (a.segments + b.segments) as usize)
                .sum()
        ],
    };
    place(&numbered, angle, full, &mut shells.positions);
    join(&numbered, full, &mut shells.triangles);
    if !full {
        close_ends(&numbered, &mut shells)?;
    }
    Ok(shells)
}

fn number(outline: &LoopPlan, full: bool, next: &mut u32) -> Vec<Numbered> {
    let stations = &outline.stations;
    let count = stations.len();
    let mut take = |corners: u32| {
        let first = *next;
        *next += corners;
        first
    };
    (0..count)
        .map(|i| {
            let station = stations[i];
            let (before, after) = (stations[(i + count - 1) % count], stations[(i + 1) % count]);
            if !station.is_pole() {
                let corners = station.segments + u32::from(!full);
                let first = take(corners);
                return Numbered {
                    station,
                    arriving: first,
                    leaving: first,
                    corners,
                };
            }
            let (fan_before, fan_after) = (!before.is_pole(), !after.is_pole());
            // Between two edges on the axis a full turn needs no corner.
            let corners = if full {
                u32::from(fan_before) + u32::from(fan_after)
            } else {
                1
            };
            let arriving = take(corners);
            let leaving = arriving + u32::from(corners == 2);
            Numbered {
                station,
                arriving,
                leaving,
                corners,
            }
        })
        .collect()
}

/// Directions of a ring's corners. A full turn's are a quarter's, turned: exact symmetry, and no angle of 2 pi is taken.
fn directions(segments: u32, angle: f64, full: bool) -> Vec<DVec2> {
    let step = angle / f64::from(segments);
    if full && segments.is_multiple_of(4) {
        let quarter: Vec<DVec2> = (0..segments / 4)
            .map(|i| trig::direction(f64::from(i) * step))
            .collect();
        let turns = [DVec2::X, DVec2::Y, DVec2::NEG_X, DVec2::NEG_Y];
        turns
            .iter()
            .flat_map(|turn| quarter.iter().map(|d| turn.rotate(*d)))
            .collect()
    } else {
        let last = if full { segments - 1 } else { segments };
        (0..=last)
            .map(|i| trig::direction(f64::from(i) * step))
            .collect()
    }
}

fn place(numbered: &[Vec<Numbered>], angle: f64, full: bool, positions: &mut [DVec3]) {
    let mut rest = positions;
    let mut tasks = Vec::new();
    for n in numbered.iter().flatten() {
        let (own, others) = rest.split_at_mut(n.corners as usize);
        rest = others;
        tasks.push((n.station, own));
    }
    tasks.into_par_iter().for_each(|(station, own)| {
        if station.is_pole() {
            own.fill(DVec3::new(0.0, 0.0, station.z));
            return;
        }
        for (corner, d) in own
            .iter_mut()
            .zip(directions(station.segments, angle, full))
        {
            *corner = DVec3::new(station.radius * d.x, station.radius * d.y, station.z);
        }
    });
}

fn join(numbered: &[Vec<Numbered>], full: bool, triangles: &mut [[u32; 3]]) {
    let mut rest = triangles;
    let mut tasks = Vec::new();
    for l in numbered {
        for (a, b) in l.iter().zip(l.iter().cycle().skip(1)) {
            if a.station.is_pole() && b.station.is_pole() {
                continue;
            }
            let (own, others) =
                rest.split_at_mut((a.station.segments + b.station.segments) as usize);
            rest = others;
            tasks.push((*a, *b, own));
        }
    }
    tasks
        .into_par_iter()
        .for_each(|(a, b, own)| band(a, b, full, own));
}

fn band(a: Numbered, b: Numbered, full: bool, own: &mut [[u32; 3]]) {
    let (m, n) = (a.station.segments, b.station.segments);
    // On a full turn the last segment ends in the first corner.
    let corner =
        |first: u32, i: u32, count: u32| if full && i == count { first } else { first + i };
    let on_a = |i: u32| corner(a.leaving, i, m);
    let on_b = |j: u32| corner(b.arriving, j, n);
    if m == n {
        for (quad, i) in own.chunks_exact_mut(2).zip(0..m) {
            let (a0, a1, b0, b1) = (on_a(i), on_a(i + 1), on_b(i), on_b(i + 1));
            quad[0] = [a0, a1, b0];
            quad[1] = [b0, a1, b1];
        }
        return;
    }
    for (triangle, facet) in own.iter_mut().zip(zip(m, n)) {
        *triangle = match facet {
            Facet::OnA(i, j) => [
                on_a(i),
                on_a(i + 1),
                if n == 0 { b.arriving } else { on_b(j) },
            ],
            Facet::OnB(i, j) => [
                on_b(j),
                if m == 0 { a.leaving } else { on_a(i) },
                on_b(j + 1),
            ],
        };
    }
}

/// Triangulates the section on the rings' first and last corners.
fn close_ends(numbered: &[Vec<Numbered>], shells: &mut Shells) -> Result<(), MeshError> {
    let section: Vec<Vec<DVec2>> = numbered
        .iter()
        .map(|l| {
            l.iter()
                .map(|n| DVec2::new(n.station.radius, n.station.z))
                .collect()
        })
        .collect();
    let flat: Vec<Numbered> = numbered.concat();
    for [i, j, k] in cap::triangulate(&section)? {
        let [a, b, c] = [i, j, k].map(|index| flat[index as usize]);
        // The first cap lies in y = 0 and faces -y: counter-clockwise in (x, z) seen from there.
        shells.triangles.push([a.arriving, b.arriving, c.arriving]);
        // The last one faces the other way.
        let last = |n: Numbered| n.arriving + n.station.segments;
        shells.triangles.push([last(a), last(c), last(b)]);
    }
    Ok(())
}
