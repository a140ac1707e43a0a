//! The best mesh of at most so many triangles.

use crate::{MeshError, Options, Plan, Solid};

impl Plan {
    /// The plan with the least distance to the surface among those of at most `most` triangles; `options.within` is not
    /// looked at.
    ///
    /// # Errors
    /// [`MeshError::TooFew`] where the plainest mesh has more; else see [`MeshError`].
    pub fn of_at_most(
        most: u64,
        solids: &[Solid],
        angle: f64,
        options: &Options,
    ) -> Result<Self, MeshError> {
        let extent = solids
            .iter()
            .map(|solid| {
                solid
                    .region
                    .bounds()
                    .size()
                    .max_element()
                    .max(solid.region.bounds().max.x)
            })
            .fold(0.0, f64::max);
        let with = |within: f64| {
            let options = Options {
                within,
                most_triangles: most,
                ..*options
            };
            Self::new(solids, angle, &options)
        };
        let mut best = match with(extent) {
            Err(MeshError::TooMany { triangles, .. }) => {
                return Err(MeshError::TooFew {
                    least: triangles,
                    asked: most,
                });
            }
            other => other?,
        };
        // The count falls with the square root of the distance at least: bisect on its logarithm.
        let (mut fine, mut coarse) = (extent * FINEST, extent);
        while coarse / fine > STEP {
            let middle = (fine * coarse).sqrt();
            match with(middle) {
                Ok(plan) => {
                    coarse = middle;
                    if plan.deviation() <= best.deviation() {
                        best = plan;
                    }
                }
                Err(MeshError::TooMany { .. }) => fine = middle,
                Err(other) => return Err(other),
            }
        }
        Ok(best)
    }
}

/// Finer than any mesh of allowed size.
const FINEST: f64 = 1e-11;
/// Ratio of distances at which the search stops: a hundredth of a percent in the count.
const STEP: f64 = 1.0002;
