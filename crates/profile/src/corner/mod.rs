//! Fillets and chamfers.

use crate::{Arc, Edge};

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
        /// The largest radius or leg that would fit, where it can be told.
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

/// Rounds the corner where `before` ends and `after` starts with a fillet of `radius`: the circle that touches both edges
/// on the inner side of the turn, nearest the corner.
///
/// # Errors
/// See [`CornerFault`].
pub fn round_corner(before: &Edge, after: &Edge, radius: f64) -> Result<Treated, CornerFault> {
    if !(radius > 0.0 && radius.is_finite()) {
        return Err(CornerFault::NotALength);
    }
    let (arriving, leaving) = (before.tangent(1.0), after.tangent(0.0));
    let sweep = crate::trig::angle_between(arriving, leaving);
    let leg = radius * crate::trig::tan(0.5 * sweep.abs());
    let treated = chamfer_corner(before, after, leg, leg)?;
    Ok(Treated {
        corner: Edge::Arc(Arc {
            start: treated.corner.start(),
            end: treated.corner.end(),
            sweep,
        }),
        ..treated
    })
}

/// Cuts the corner where `before` ends and `after` starts by a straight chamfer. A leg is the straight distance from the
/// corner to the chamfer's end, on curved edges too.
///
/// # Errors
/// See [`CornerFault`].
pub fn chamfer_corner(
    before: &Edge,
    after: &Edge,
    leg_before: f64,
    leg_after: f64,
) -> Result<Treated, CornerFault> {
    if !(leg_before > 0.0 && leg_after > 0.0 && leg_before.is_finite() && leg_after.is_finite()) {
        return Err(CornerFault::NotALength);
    }
    let (length_before, length_after) = (before.chord().length(), after.chord().length());
    let (on_before, on_after) = (leg_before > length_before, leg_after > length_after);
    if on_before || on_after {
        return Err(CornerFault::TooLarge {
            largest: None,
            on_before,
            on_after,
        });
    }
    let corner = before.end();
    let start = corner - before.tangent(1.0) * leg_before;
    let end = corner + after.tangent(0.0) * leg_after;
    Ok(Treated {
        before: Some(
            before
                .part(0.0, 1.0 - leg_before / length_before)
                .with_ends(before.start(), start),
        ),
        corner: Edge::line(start, end),
        after: Some(
            after
                .part(leg_after / length_after, 1.0)
                .with_ends(end, after.end()),
        ),
    })
}
