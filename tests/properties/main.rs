//! What must hold of every part, whatever its figures: laws of mechanics and of geometry, on random parts.
//!
//! Cases come from a fixed seed, so that a run says the same twice; `PROPTEST_RNG_SEED` and `PROPTEST_CASES` choose
//! others.

mod meshes;
mod turned;

use checks::{exact, one_body};
use profile::trig::{sin, sin_cos};
use proptest::prelude::*;
use proptest::test_runner::{Config, RngSeed};
use strickle::record::{Exact, Matrix, Vector};
use turned::{BETWEEN, Outline, turned};

/// The promised relative accuracy on ordinary parts.
const PROMISED: f64 = 1e-13;

const DENSITY: f64 = 8700.0;

fn config() -> Config {
    let mut config = Config {
        failure_persistence: None,
        ..Config::default()
    };
    if matches!(config.rng_seed, RngSeed::Random) {
        config.rng_seed = RngSeed::Fixed(1641);
    }
    if std::env::var_os("PROPTEST_CASES").is_none() {
        config.cases = 128;
    }
    config
}

/// Weighs one body.
fn weigh(outline: &Outline) -> Exact {
    exact(&one_body(
        "m",
        DENSITY,
        &format!("outline = {}", outline.steps()),
    ))
}

/// Weighs one body of a part turn.
fn weigh_turn(outline: &Outline, degrees: f64) -> Exact {
    let text = one_body("m", DENSITY, &format!("outline = {}", outline.steps()));
    exact(&text.replace(
        "unit = \"m\"",
        &format!("unit = \"m\"\nrevolve = {degrees:?}"),
    ))
}

/// What adds up when solids are put together: volume, mass, first moments and inertia about the origin.
#[derive(Debug, Clone, Copy)]
struct Sums {
    volume: f64,
    mass: f64,
    first: Vector,
    inertia: Matrix,
}

impl Sums {
    fn of(exact: &Exact) -> Self {
        Self {
            volume: exact.volume,
            mass: exact.mass,
            first: exact.centre.map(|place| place * exact.mass),
            inertia: exact.inertia_about_origin,
        }
    }

    fn plus(self, other: Self) -> Self {
        let [a, b, c] = self.inertia;
        let [d, e, f] = other.inertia;
        Self {
            volume: self.volume + other.volume,
            mass: self.mass + other.mass,
            first: add(self.first, other.first),
            inertia: [add(a, d), add(b, e), add(c, f)],
        }
    }

    /// The same solid turned about the axis.
    fn turned(self, angle: f64) -> Self {
        let (s, c) = sin_cos(angle);
        let rotation = [[c, -s, 0.0], [s, c, 0.0], [0.0, 0.0, 1.0]];
        let times = |matrix: Matrix, other: Matrix| -> Matrix {
            matrix
                .map(|row| [0, 1, 2].map(|column| (0..3).map(|k| row[k] * other[k][column]).sum()))
        };
        let transposed = [0, 1, 2].map(|row: usize| rotation.map(|line| line[row]));
        Self {
            first: rotation.map(|row| (0..3).map(|k| row[k] * self.first[k]).sum()),
            inertia: times(times(rotation, self.inertia), transposed),
            ..self
        }
    }

    /// Compares with other sums of which each figure may be off by `promised` of its scale.
    fn compare(self, other: Self, promised: f64, extent: f64) -> Result<(), TestCaseError> {
        let near = |what: &str, a: f64, b: f64, scale: f64| {
            prop_assert!(
                (a - b).abs() <= promised * scale,
                "{what}: {a:e} and {b:e} differ by {:e} of {scale:e}",
                (a - b).abs() / scale
            );
            Ok(())
        };
        near("volume", self.volume, other.volume, self.volume)?;
        near("mass", self.mass, other.mass, self.mass)?;
        for (a, b) in self.first.into_iter().zip(other.first) {
            near("first moment", a, b, self.mass * extent)?;
        }
        for (a, b) in self
            .inertia
            .into_iter()
            .flatten()
            .zip(other.inertia.into_iter().flatten())
        {
            near("inertia", a, b, self.mass * extent * extent)?;
        }
        Ok(())
    }
}

fn add(a: Vector, b: Vector) -> Vector {
    [a[0] + b[0], a[1] + b[1], a[2] + b[2]]
}

/// How far from the origin a part reaches.
fn extent(exact: &Exact) -> f64 {
    let bounds = &exact.bounds;
    bounds
        .min
        .into_iter()
        .chain(bounds.max)
        .fold(0.0, |most, place| place.abs().max(most))
}

fn near(what: &str, a: f64, b: f64, promised: f64) -> Result<(), TestCaseError> {
    prop_assert!(
        (a - b).abs() <= promised * b.abs(),
        "{what}: {a:e} and {b:e} differ by {:e}",
        (a / b - 1.0).abs()
    );
    Ok(())
}

proptest! {
    #![proptest_config(config())]

    // Two figures are compared, each with the promised accuracy: twice that in all, three times where two are added.

    #[test]
    fn cut_across_the_axis_the_pieces_add_up(part in turned(), at in 0.0..1.0) {
        let last = part.stations() - 1;
        // A station that is neither end: there are three stations at least.
        #[expect(clippy::cast_possible_truncation, clippy::cast_sign_loss, reason = "a fraction of a small count")]
        let cut = 1 + (at * (last - 1) as f64) as usize;
        let whole = weigh(&part.outline(0, last));
        let (below, above) = (weigh(&part.outline(0, cut)), weigh(&part.outline(cut, last)));
        Sums::of(&below).plus(Sums::of(&above)).compare(Sums::of(&whole), 3.0 * PROMISED, extent(&whole))?;
        // The cut has two faces.
        let (inner, outer) = part.radii(cut);
        let face = std::f64::consts::PI * (outer * outer - inner * inner);
        near("surface", below.surface + above.surface - 2.0 * face, whole.surface, 4.0 * PROMISED)?;
    }

    #[test]
    fn cut_by_a_cylinder_the_sleeves_add_up(part in turned()) {
        let whole = weigh(&part.outline(0, part.stations() - 1));
        let sleeves = part.sleeves();
        let [inner, outer] = sleeves.each_ref().map(weigh);
        Sums::of(&inner).plus(Sums::of(&outer)).compare(Sums::of(&whole), 3.0 * PROMISED, extent(&whole))?;
        let face = 2.0 * std::f64::consts::PI * BETWEEN * whole.length;
        near("surface", inner.surface + outer.surface - 2.0 * face, whole.surface, 5.0 * PROMISED)?;
        // The same as two bodies of one part, which touch along the cylinder.
        let [inside, outside] = sleeves.map(|sleeve| sleeve.steps());
        let both = exact(&format!(
            "{}[[body]]\nname = \"outside\"\ndensity = \"{DENSITY} kg/m3\"\noutline = {outside}\n",
            one_body("m", DENSITY, &format!("outline = {inside}"))
        ));
        Sums::of(&both).compare(Sums::of(&whole), 3.0 * PROMISED, extent(&whole))?;
        near("surface of two bodies", both.surface, inner.surface + outer.surface, 4.0 * PROMISED)?;
    }

    #[test]
    fn scaled_by_k_the_volume_grows_as_its_cube_and_inertia_as_its_fifth_power(
        part in turned(),
        exponent in -10_i32..10,
        mantissa in 1.0..2.0,
    ) {
        let k = (0..exponent.abs()).fold(mantissa, |k, _| if exponent < 0 { k / 2.0 } else { k * 2.0 });
        let outline = part.outline(0, part.stations() - 1);
        let plain = weigh(&outline);
        let scaled = weigh(&outline.mapped(|(r, z)| (r * k, z * k)));
        let cube = k * k * k;
        // Every coordinate is rounded once more; a figure of fifth degree feels that fivefold, and its differences more.
        let promised = 3.0 * PROMISED;
        near("volume", scaled.volume, plain.volume * cube, promised)?;
        near("surface", scaled.surface, plain.surface * k * k, promised)?;
        near("section", scaled.section.area, plain.section.area * k * k, promised)?;
        near("axial inertia", scaled.inertia_about_axis, plain.inertia_about_axis * cube * k * k, promised)?;
        for axis in 0..3 {
            near(
                "principal inertia",
                scaled.inertia_about_centre[axis][axis],
                plain.inertia_about_centre[axis][axis] * cube * k * k,
                promised,
            )?;
        }
    }

    #[test]
    fn moved_along_the_axis_the_parallel_axis_theorem_holds(part in turned(), by in -20.0..20.0_f64) {
        let outline = part.outline(0, part.stations() - 1);
        let plain = weigh(&outline);
        let moved = weigh(&outline.mapped(|(r, z)| (r, z + by)));
        // Far from the origin the stations themselves are rounded: at 25 m by 25 parts of those at 1 m.
        let promised = 3.0 * PROMISED + 10.0 * f64::EPSILON * (1.0 + by.abs());
        near("volume", moved.volume, plain.volume, promised)?;
        near("surface", moved.surface, plain.surface, promised)?;
        for axis in 0..3 {
            near(
                "inertia about the centre",
                moved.inertia_about_centre[axis][axis],
                plain.inertia_about_centre[axis][axis],
                promised,
            )?;
        }
        let sums = Sums::of(&plain);
        let centre = plain.centre[2];
        let steiner = plain.mass * ((centre + by) * (centre + by) - centre * centre);
        let mut inertia = sums.inertia;
        inertia[0][0] += steiner;
        inertia[1][1] += steiner;
        let first = add(sums.first, [0.0, 0.0, plain.mass * by]);
        Sums::of(&moved).compare(Sums { first, inertia, ..sums }, promised, extent(&moved))?;
    }

    #[test]
    fn a_full_turn_is_four_quarters(part in turned()) {
        let outline = part.outline(0, part.stations() - 1);
        let full = weigh(&outline);
        let quarter = weigh_turn(&outline, 90.0);
        let sum = (1..4).fold(Sums::of(&quarter), |sum, turns| {
            sum.plus(Sums::of(&quarter).turned(f64::from(turns) * std::f64::consts::FRAC_PI_2))
        });
        sum.compare(Sums::of(&full), 3.0 * PROMISED, extent(&full))?;
        // Each quarter has two end caps, the section itself.
        near("surface", 4.0 * quarter.surface - 8.0 * full.section.area, full.surface, 5.0 * PROMISED)?;
    }

    #[test]
    fn two_part_turns_make_a_whole_one(part in turned(), degrees in 1.0..359.0) {
        let outline = part.outline(0, part.stations() - 1);
        let full = weigh(&outline);
        let first = weigh_turn(&outline, degrees);
        let second = weigh_turn(&outline, 360.0 - degrees);
        let sum = Sums::of(&first).plus(Sums::of(&second).turned(f64::to_radians(degrees)));
        sum.compare(Sums::of(&full), 3.0 * PROMISED, extent(&full))?;
        // The centre of a part turn lies on its middle plane, nearer to the axis than that of the section's path.
        let half = f64::to_radians(degrees) / 2.0;
        let [x, y, _] = first.centre;
        let (s, c) = sin_cos(half);
        prop_assert!((y * c - x * s).abs() <= 3.0 * PROMISED * extent(&full));
        let distance = x * c + y * s;
        let section = &full.section;
        // Distance = integral of r^2 dA / integral of r dA, times sin(half)/half; the fraction is at least the centroid.
        prop_assert!(distance >= section.centroid_r * sin(half) / half * (1.0 - PROMISED));
    }

    #[test]
    fn the_way_round_and_the_first_corner_do_not_matter(part in turned(), corner in 1_usize..12) {
        let outline = part.outline(0, part.stations() - 1);
        let plain = weigh(&outline);
        for other in [outline.backwards(), outline.starting_at(corner), outline.backwards().starting_at(corner)] {
            let other = weigh(&other);
            Sums::of(&other).compare(Sums::of(&plain), 2.0 * PROMISED, extent(&plain))?;
            near("surface", other.surface, plain.surface, 2.0 * PROMISED)?;
            near("perimeter", other.section.perimeter, plain.section.perimeter, 2.0 * PROMISED)?;
        }
    }

    #[test]
    fn the_theorems_used_backwards_give_the_centroids(part in turned()) {
        let found = weigh(&part.outline(0, part.stations() - 1));
        let turn = std::f64::consts::TAU;
        let section = &found.section;
        near("path of the area", found.volume / (turn * section.area), section.centroid_r, 3.0 * PROMISED)?;
        near("path of the boundary", found.surface / (turn * section.perimeter), section.perimeter_centroid_r, 3.0 * PROMISED)?;
    }
}
