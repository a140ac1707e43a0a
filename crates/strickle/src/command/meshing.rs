//! From what was asked of a mesh to its plan, for every command that makes one.

use crate::arguments::Meshing;
use crate::failure::Failure;
use mesh::{MeshError, Options, Plan};
use std::num::NonZeroU32;
use strickle::Study;
use strickle::figures::{Kind, Scale};

/// Plans the mesh of a part as it was asked for.
///
/// # Errors
/// An option that makes no sense, or no mesh by these options; each with what to do.
pub(super) fn plan(study: &Study, asked: &Meshing) -> Result<Plan, Failure> {
    let within = match &asked.within {
        Some(text) => length(study, "--within", text)?,
        None => study.default_within(),
    };
    let edge = asked
        .edge
        .as_deref()
        .map(|text| length(study, "--edge", text))
        .transpose()?;
    let options = Options {
        placement: asked.placement.placement(),
        least_segments: NonZeroU32::new(asked.segments).unwrap_or(NonZeroU32::MIN),
        greatest_edge: edge,
        greatest_aspect: aspect(asked.aspect)?,
        most_triangles: asked.most,
        ..Options::within(within)
    };
    study
        .plan(&options, asked.triangles)
        .map_err(|error| refused(study, &error))
}

/// A positive length, metres.
fn length(study: &Study, option: &str, text: &str) -> Result<f64, Failure> {
    let hint = format!("for example: {option} 0.05mm");
    let length = part::length(text, study.part.unit).map_err(|fault| {
        Failure::usage(format!("{option} {text}: {}", fault.message))
            .with_hint(fault.help.as_deref().unwrap_or(&hint))
    })?;
    if length.is_finite() && length > 0.0 {
        Ok(length)
    } else {
        Err(Failure::usage(format!("{option} {text}: the length must be positive")).with_hint(hint))
    }
}

/// Less than this no division of rings can promise.
const LEAST_ASPECT: f64 = 6.0;

fn aspect(asked: Option<f64>) -> Result<Option<f64>, Failure> {
    match asked {
        // Not a number is refused too.
        Some(ratio) if !(ratio.is_finite() && ratio >= LEAST_ASPECT) => Err(Failure::usage(
            format!("--aspect {ratio}: the ratio must be a number of at least {LEAST_ASPECT}"),
        )
        .with_hint("for example: --aspect 10")),
        other => Ok(other),
    }
}

/// Why there is no mesh, and what to do.
pub(super) fn refused(study: &Study, error: &MeshError) -> Failure {
    let place = Scale::of(Kind::Length, study.exact().largest_diameter);
    match *error {
        MeshError::TooThin { r, z } => Failure::usage(format!(
            "two faces come closer than a mesh can keep apart, near r {}, z {}",
            place.text(r),
            place.text(z)
        ))
        .with_hint("make the wall thicker there, or ask for a larger --within so that fewer triangles are needed elsewhere"),
        MeshError::Within => {
            Failure::usage(error.to_string()).with_hint("ask for a larger distance with --within")
        }
        MeshError::TooMany { .. } => Failure::usage(error.to_string())
            .with_hint("ask for a larger distance with --within, or allow more with --most"),
        MeshError::TooFew { .. } => Failure::usage(error.to_string())
            .with_hint("ask for more --triangles, or fewer --segments"),
        MeshError::Aspect { .. } => Failure::usage(error.to_string()).with_hint(
            "ask for a larger --aspect; a part that reaches the axis needs --placement volume-true",
        ),
        _ => Failure::usage(error.to_string()),
    }
}
