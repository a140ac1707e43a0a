//! The last correction of a volume-true mesh: where rings of different counts meet on a slope, a band's volume differs a
//! little from its frustum's; all rings are moved by the same small share of their segments' squares, outward faces
//! outward and inward faces inward, until the whole encloses what it should.

use crate::plan::{LoopPlan, Station};
use crate::predict::Patterns;

/// Moves the rings so that the loops enclose `volume` (m3), as nearly as moves of the size of their own excess can.
pub(crate) fn close_volume(loops: &mut [LoopPlan], angle: f64, volume: f64) {
    let mut patterns = Patterns::new(angle);
    let plain: Vec<LoopPlan> = loops.to_vec();
    let moves: Vec<Vec<f64>> = plain.iter().map(|l| moves(&l.stations, angle)).collect();
    let mut excess_at = |share: f64, loops: &mut [LoopPlan]| {
        for ((target, source), moves) in loops.iter_mut().zip(&plain).zip(&moves) {
            for ((t, s), m) in target.stations.iter_mut().zip(&source.stations).zip(moves) {
                t.radius = s.radius + share * m;
            }
        }
        patterns.volume(loops) - volume
    };
    // The volume is a quadratic in the share; the secant settles in a few steps.
    let (mut low, mut high) = (0.0, 0.01);
    let mut at_low = excess_at(low, loops);
    for _ in 0..8 {
        if at_low.abs() <= CLOSED * volume {
            high = low;
            break;
        }
        let at_high = excess_at(high, loops);
        let slope = (at_high - at_low) / (high - low);
        let next = high - at_high / slope;
        // No share within the rings' own excess closes it: leave the rings where they are.
        if !next.is_finite() || next.abs() > 10.0 {
            high = 0.0;
            break;
        }
        (low, at_low, high) = (high, at_high, next);
    }
    excess_at(high, loops);
}

/// Relative difference at which the volume counts as closed: a hundred times finer than is promised.
const CLOSED: f64 = 1e-12;

/// How far each ring moves for a share of one: r t^2 / 12 with its sign, the size of its own excess.
fn moves(stations: &[Station], angle: f64) -> Vec<f64> {
    let count = stations.len();
    (0..count)
        .map(|i| {
            let (before, ring, after) = (
                stations[(i + count - 1) % count],
                stations[i],
                stations[(i + 1) % count],
            );
            if ring.is_pole() {
                return 0.0;
            }
            let step = angle / f64::from(ring.segments);
            let outward = after.z - before.z;
            let side = if outward < 0.0 { -1.0 } else { 1.0 };
            side * ring.node.x * step * step / 12.0
        })
        .collect()
}
