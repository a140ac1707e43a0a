//! Mass, size, centre and inertia of the whole part.

use super::report::is_full_turn;
use crate::grid::{Cell, Grid};
use crate::style::QUIET;
use part::Part;
use strickle::figures::{Kind, Scale};
use strickle::record::{Exact, Matrix};

/// Columns of the labels.
const LABEL: usize = "inertia".len();

/// A label and what belongs to it, line by line.
pub(super) fn of(exact: &Exact, part: &Part) -> String {
    let mut grid = Grid::new(2);
    let mut line = |label: &str, text: String| {
        grid.row([Cell::left(format!("{label:<LABEL$}")), Cell::left(text)]);
    };
    let mass = Scale::of(Kind::Mass, exact.mass);
    if let Some([least, most]) = exact.mass_range {
        line(
            "mass",
            format!(
                "{}, from {} to {} as the densities may vary",
                mass.text(exact.mass),
                mass.number(least),
                mass.text(most)
            ),
        );
    }
    let (min, max) = (exact.bounds.min, exact.bounds.max);
    let size = Scale::of(Kind::Length, exact.largest_diameter.max(exact.length));
    line(
        "size",
        format!(
            "largest diameter {}, length {}, z from {} to {}",
            size.number(exact.largest_diameter),
            size.number(exact.length),
            size.number(min[2]),
            size.text(max[2])
        ),
    );
    let [x, y, z] = exact.centre;
    if is_full_turn(part) {
        line("centre", format!("z = {}", size.text(z)));
    } else {
        line(
            "",
            format!(
                "x from {} to {}, y from {} to {}",
                size.number(min[0]),
                size.number(max[0]),
                size.number(min[1]),
                size.text(max[1])
            ),
        );
        line(
            "centre",
            format!(
                "x = {}, y = {}, z = {}",
                size.number(x),
                size.number(y),
                size.text(z)
            ),
        );
    }
    grid.lines() + &inertia(exact, is_full_turn(part))
}

/// Moments of inertia and radii of gyration; of a part turn also the matrices, which have products.
fn inertia(exact: &Exact, full_turn: bool) -> String {
    let (centre, origin) = (&exact.inertia_about_centre, &exact.inertia_about_origin);
    let largest = [centre, origin]
        .into_iter()
        .flat_map(|matrix| matrix.as_flattened())
        .fold(0.0_f64, |largest, entry| largest.max(entry.abs()));
    let scale = Scale::of(Kind::Inertia, largest);
    let radii = &exact.radii_of_gyration;
    let radius = Scale::of_column(Kind::Length, [radii.axis, radii.across_x, radii.across_y]);
    let rows: &[(&str, f64, Option<f64>)] = if full_turn {
        &[
            ("about the axis", exact.inertia_about_axis, Some(radii.axis)),
            (
                "across, through the centre",
                centre[0][0],
                Some(radii.across_x),
            ),
            ("across, through the origin", origin[0][0], None),
        ]
    } else {
        &[
            ("about the axis", exact.inertia_about_axis, Some(radii.axis)),
            (
                "along x, through the centre",
                centre[0][0],
                Some(radii.across_x),
            ),
            (
                "along y, through the centre",
                centre[1][1],
                Some(radii.across_y),
            ),
        ]
    };
    let mut grid = Grid::new(2);
    for (index, (what, value, gyration)) in rows.iter().enumerate() {
        let label = if index == 0 { "inertia" } else { "" };
        let gyration = gyration.map_or_else(String::new, |gyration| {
            format!("radius of gyration {}", radius.text(gyration))
        });
        grid.row([
            Cell::left(format!("{label:<LABEL$}")),
            Cell::left(*what),
            Cell::right(scale.text(*value)),
            Cell::left(gyration),
        ]);
    }
    if full_turn {
        grid.lines()
    } else {
        grid.lines() + &matrices(scale, centre, origin)
    }
}

/// The two matrices of inertia, a line each.
fn matrices(scale: Scale, centre: &Matrix, origin: &Matrix) -> String {
    let mut grid = Grid::new(2);
    let names = ["xx", "yy", "zz", "xy", "xz", "yz"].map(Cell::right);
    grid.row(
        [
            Cell::left(" ".repeat(LABEL)),
            Cell::left(format!("matrix, {}", scale.unit())),
        ]
        .into_iter()
        .chain(names)
        .map(|cell| cell.styled(QUIET)),
    );
    for (what, matrix) in [("at the centre", centre), ("at the origin", origin)] {
        let [[xx, xy, xz], [_, yy, yz], [_, _, zz]] = *matrix;
        let entries = [xx, yy, zz, xy, xz, yz].map(|entry| Cell::right(scale.number(entry)));
        grid.row(
            [Cell::default(), Cell::left(what)]
                .into_iter()
                .chain(entries),
        );
    }
    grid.lines()
}
