//! Tapers and angles: the coordinate that a step leaves out.

use super::step::{Slope, Step};
use super::wording::Wording;
use crate::{Fault, Span};
use glam::DVec2;
use profile::trig;
use std::f64::consts::FRAC_PI_2;

impl Slope {
    fn span(&self) -> Span {
        match self {
            Self::Taper(_, span) | Self::Angle(_, span) => span.clone(),
        }
    }

    /// Its name in a part file.
    fn key(&self) -> &'static str {
        match self {
            Self::Taper(..) => "taper",
            Self::Angle(..) => "angle",
        }
    }

    /// Change of r over length along the axis; infinite for a right angle.
    fn rate(&self) -> f64 {
        match *self {
            Self::Taper(rate, _) => 0.5 * rate,
            // The tangent of the f64 nearest to a right angle is some 1e16.
            Self::Angle(angle, _) if angle.abs() == FRAC_PI_2 => f64::INFINITY.copysign(angle),
            Self::Angle(angle, _) => trig::tan(angle),
        }
    }
}

/// Where `step` gets from `start` along `slope`, of its coordinates `r` and `z` the one that is given.
///
/// Positive is outward: with z given, r grows by rate * |dz| whichever way the step goes. With r given, the step goes
/// towards +z, and the sign must agree with what r does.
///
/// # Errors
/// The slope does not reach the coordinate, or says the opposite of it.
pub(super) fn sloped(
    start: DVec2,
    [r, z]: [Option<f64>; 2],
    slope: &Slope,
    step: &Step,
    wording: Wording,
) -> Result<DVec2, Fault> {
    let rate = slope.rate();
    let key = slope.key();
    match (r, z) {
        (None, Some(z)) => {
            let length = (z - start.y).abs();
            if rate.is_infinite() && length > 0.0 {
                return Err(Fault::new(
                    "step::slope_parallel",
                    format!(
                        "{} is square to the axis and never gets to another z",
                        step.words
                    ),
                    slope.span(),
                    "a right angle",
                )
                .help("give d or r in place of z, or an angle below 90 degrees"));
            }
            let change = if length > 0.0 { rate * length } else { 0.0 };
            Ok(DVec2::new(start.x + change, z))
        }
        (Some(r), None) => {
            let change = r - start.x;
            if rate == 0.0 && change != 0.0 {
                return Err(Fault::new(
                    "step::slope_parallel",
                    format!(
                        "{} runs along the axis and never gets to another diameter",
                        step.words
                    ),
                    slope.span(),
                    format!("no {key}"),
                )
                .help(format!(
                    "give z in place of d or r, or a {key} that is not 0"
                )));
            }
            if rate * change < 0.0 {
                let (goes, says) = if change > 0.0 {
                    ("outward", "inward")
                } else {
                    ("inward", "outward")
                };
                return Err(Fault::new(
                    "step::slope_against",
                    format!(
                        "{} goes {goes} by {}, and the sign of its {key} says {says}",
                        step.words,
                        wording.length(change.abs())
                    ),
                    slope.span(),
                    format!("this says {says}"),
                )
                .help(
                    "change the sign; with d or r given the step goes towards +z, to go the other way give z in its place",
                ));
            }
            let length = if change == 0.0 { 0.0 } else { change / rate };
            Ok(DVec2::new(r, start.y + length))
        }
        // Nothing is missing, or nothing is said.
        (r, z) => Ok(DVec2::new(r.unwrap_or(start.x), z.unwrap_or(start.y))),
    }
}
