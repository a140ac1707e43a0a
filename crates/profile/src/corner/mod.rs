//! Fillets and chamfers.

mod chamfer;
mod largest;
mod round;
#[cfg(test)]
mod tests;

pub use chamfer::chamfer_corner;
pub use round::round_corner;

use crate::{DVec2, Edge, trig};

/// Two edges with their corner treated. Ends are shared bit for bit: `before`, `corner`, `after` in order of travel.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Treated {
    /// What is left of the edge before the corner; `None` where the treatment takes up the whole of it, to rounding (the
    /// end of a plate that is rounded from both sides). `corner` then starts, bit for bit, where that edge started.
    pub before: Option<Edge>,
    /// The fillet or the chamfer.
    pub corner: Edge,
    /// What is left of the edge after the corner; `None` where the treatment takes up the whole of it. `corner` then
    /// ends, bit for bit, where that edge ended.
    pub after: Option<Edge>,
}

/// Why a corner cannot be treated.
#[derive(Debug, Clone, Copy, PartialEq, thiserror::Error)]
#[non_exhaustive]
pub enum CornerFault {
    /// The edges run on smoothly: there is no corner between them.
    #[error("the edges run on smoothly: there is no corner to treat")]
    NoCorner,
    /// The second edge turns straight back along the first: no circle touches both.
    #[error("the outline turns straight back here: no fillet or chamfer fits")]
    TurnsBack,
    /// The fillet or chamfer needs more than the edges have.
    #[error("the edges are too short for it")]
    TooLarge {
        /// The largest radius that would fit, or the largest leg on an edge that is too short (the smaller one where both
        /// are), where it can be told.
        largest: Option<f64>,
        /// The edge before the corner is too short or too sharply curved.
        on_before: bool,
        /// The edge after the corner is too short or too sharply curved.
        on_after: bool,
    },
    /// The radius or leg is not a positive finite length.
    #[error("a radius or leg must be a positive length")]
    NotALength,
}

/// Below this angle (radians) between two directions there is no corner: a joint that is computed to be smooth is so to
/// 1e-14 or so, and what a drawing calls a corner turns by far more.
const SMOOTH: f64 = 1e-9;

/// Points closer than this part of the coordinates are one: an edge of which no more is left is used up. A length that
/// somebody wrote as the sum of others differs from it by a few roundings of the coordinates.
const ROUNDING: f64 = 32.0 * f64::EPSILON;

/// Angle from the direction of arrival to that of departure, positive to the left.
fn turn(before: &Edge, after: &Edge) -> Result<f64, CornerFault> {
    let turn = trig::angle_between(before.tangent(1.0), after.tangent(0.0));
    if turn.abs() < SMOOTH {
        Err(CornerFault::NoCorner)
    } else if std::f64::consts::PI - turn.abs() < SMOOTH {
        Err(CornerFault::TurnsBack)
    } else {
        Ok(turn)
    }
}

/// The distance below which points of these edges count as one.
fn rounding(before: &Edge, after: &Edge) -> f64 {
    let largest = [before.start(), before.end(), after.end()]
        .into_iter()
        .map(|point| point.abs().max_element())
        .fold(0.0, f64::max);
    ROUNDING * largest
}

/// How much of the two edges a treatment takes: parameter and point on each. The parameter is exactly 0 on the edge
/// before, 1 on the edge after, where it takes all of it.
#[derive(Debug, Clone, Copy)]
struct Cut {
    before: (f64, DVec2),
    after: (f64, DVec2),
}

impl Cut {
    /// The treated edges, with what `corner` makes between the two points.
    fn treat(
        self,
        before: &Edge,
        after: &Edge,
        corner: impl FnOnce(DVec2, DVec2) -> Edge,
    ) -> Treated {
        let ((t_before, start), (t_after, end)) = (self.before, self.after);
        let start = if t_before == 0.0 {
            before.start()
        } else {
            start
        };
        let end = if t_after == 1.0 { after.end() } else { end };
        Treated {
            before: (t_before > 0.0)
                .then(|| before.part(0.0, t_before).with_ends(before.start(), start)),
            corner: corner(start, end),
            after: (t_after < 1.0).then(|| after.part(t_after, 1.0).with_ends(end, after.end())),
        }
    }
}
