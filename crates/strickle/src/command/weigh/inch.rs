//! The main figures in inches and pounds, for a part that is drawn in them.

use crate::grid::{Cell, Grid};
use crate::style::QUIET;
use strickle::figures::{Kind, Scale, System};
use strickle::record::Exact;

/// Volume, surface, mass, size, centre and inertia, two columns of them.
pub(super) fn of(exact: &Exact) -> String {
    let figure = |label: &str, kind: Kind, value: f64| {
        let scale = Scale::of_system(kind, System::Inch, value);
        [
            Cell::left(label).styled(QUIET),
            Cell::right(scale.number(value)),
            Cell::left(scale.unit()),
        ]
    };
    let size = exact.largest_diameter.max(exact.length);
    let length = |label: &str, value: f64| {
        let scale = Scale::of_system(Kind::Length, System::Inch, size);
        [
            Cell::left(label).styled(QUIET),
            Cell::right(scale.number(value)),
            Cell::left(scale.unit()),
        ]
    };
    let mut grid = Grid::new(1);
    for (left, right) in [
        (
            figure("volume", Kind::Volume, exact.volume),
            length("largest diameter", exact.largest_diameter),
        ),
        (
            figure("surface", Kind::Area, exact.surface),
            length("length", exact.length),
        ),
        (
            figure("mass", Kind::Mass, exact.mass),
            length("centre z", exact.centre[2]),
        ),
        (
            figure(
                "inertia about the axis",
                Kind::Inertia,
                exact.inertia_about_axis,
            ),
            length("radius of gyration", exact.radii_of_gyration.axis),
        ),
    ] {
        grid.row(left.into_iter().chain([Cell::left("   ")]).chain(right));
    }
    grid.lines()
}
