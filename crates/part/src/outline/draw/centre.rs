//! `centre = {..}`: the arc about a given centre.

use super::{Drawn, Leg, Turn};
use crate::Fault;
use crate::outline::step::{Centre, Side};
use glam::DVec2;
use profile::trig;
use std::f64::consts::{PI, TAU};

/// How far the two ends' distances from the centre may differ, relative to the radius, and how far from half a turn an
/// angle still is one, in radians. Drawings give six digits at most; what differs by less is meant to be the same. (The arc
/// runs through both ends exactly; the centre gives way.)
const ON_CIRCLE: f64 = 1e-6;

/// The same relative to the chord: of an arc that is short for its radius the direction must be known too.
const ON_CIRCLE_OF_CHORD: f64 = 1e-3;

/// The arc about `centre`, the shorter way round unless `long` is given.
///
/// # Errors
/// The centre is not as far from one end as from the other, it is one of them, its side is not the given one, or it leaves
/// open on which side half a turn goes round.
pub(super) fn arc(leg: &Leg<'_>, centre: &Centre) -> Result<Drawn, Fault> {
    let at = leg.point(&centre.at);
    let (to_start, to_end) = (leg.start - at, leg.end - at);
    check_distances(leg, centre, at)?;

    let sweep = trig::angle_between(to_start, to_end);
    let is_half = PI - sweep.abs() <= ON_CIRCLE;
    if is_half {
        let Some(side) = centre.centre_on else {
            return Err(Fault::new(
                "step::half_turn_side",
                format!(
                    "the arc of {} is half a turn and can go round either side",
                    leg.step.words
                ),
                centre.span.clone(),
                "the centre is in the middle between the ends",
            )
            .help(
                "add centre_on = \"left\" or \"right\": the side of travel on which the centre is",
            ));
        };
        return Ok(Turn {
            angle: PI,
            rest: PI,
            counter_clockwise: side == Side::Left,
        }
        .arc(leg.start, leg.end));
    }

    let turn = Turn {
        angle: if centre.long {
            TAU - sweep.abs()
        } else {
            sweep.abs()
        },
        rest: if centre.long {
            sweep.abs()
        } else {
            TAU - sweep.abs()
        },
        counter_clockwise: (sweep > 0.0) != centre.long,
    };
    let (side, word, other) = if turn.counter_clockwise {
        (Side::Left, "left", "right")
    } else {
        (Side::Right, "right", "left")
    };
    if centre.centre_on.is_some_and(|given| given != side) {
        let (way, help) = if centre.long {
            ("longer", "leave out `long`")
        } else {
            ("shorter", "add long = true")
        };
        return Err(Fault::new(
            "step::centre_on_contradicts",
            format!(
                "the {way} arc of {} has its centre on the {word}, not on the {other}",
                leg.step.words
            ),
            centre.span.clone(),
            format!("on the {word} of travel"),
        )
        .help(format!(
            "{help} for the arc that goes round the other way, or write centre_on = \"{word}\""
        )));
    }
    Ok(turn.arc(leg.start, leg.end))
}

fn check_distances(leg: &Leg<'_>, centre: &Centre, at: DVec2) -> Result<(), Fault> {
    let (first, second) = ((leg.start - at).length(), (leg.end - at).length());
    for (end, words) in [(leg.start, "starts"), (leg.end, "ends")] {
        if leg.is_short(at, end) {
            return Err(Fault::new(
                "step::centre_at_end",
                format!("the centre is the point where {} {words}", leg.step.words),
                centre.span.clone(),
                leg.place(at),
            )
            .help("give the centre of the circle that both ends lie on"));
        }
    }
    let apart = (first - second).abs();
    let radius = first.max(second);
    if apart <= (ON_CIRCLE * radius).min(ON_CIRCLE_OF_CHORD * leg.chord().length()) {
        return Ok(());
    }
    Err(Fault::new(
        "step::centre_off",
        format!(
            "no circle about this centre goes through both ends of {}: its start is {} away, its end {}",
            leg.step.words,
            leg.wording.length(first),
            leg.wording.length(second)
        ),
        centre.span.clone(),
        leg.place(at),
    )
    .help("write the centre as an expression to give it all its digits, or give the radius: arc = .., centre_on = .."))
}
