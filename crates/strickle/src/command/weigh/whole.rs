//! Mass, size, centre and inertia of the whole part.

use super::report::is_full_turn;
use crate::grid::{Cell, Grid};
use part::Part;
use strickle::figures::{Kind, Scale};
use strickle::record::{Exact, Matrix};

/// A label and what belongs to it, line by line.
pub(super) fn of(exact: &Exact, part: &Part) -> String {
    let mut grid = Grid::new(2);
    let mut line = |label: &str, text: String| {
        grid.row([Cell::left(label), Cell::left(text)]);
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
            "largest diameter {}, length {} (z from {} to {})",
            size.text(exact.largest_diameter),
            size.text(exact.length),
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
                size.text(max[0]),
                size.number(min[1]),
                size.text(max[1])
            ),
        );
        line(
            "centre",
            format!(
                "x = {}, y = {}, z = {}",
                size.text(x),
                size.text(y),
                size.text(z)
            ),
        );
    }
    grid.lines() + &inertia(exact, is_full_turn(part))
}

/// Moments of inertia and radii of gyration.
fn inertia(exact: &Exact, full_turn: bool) -> String {
    let (centre, origin) = (&exact.inertia_about_centre, &exact.inertia_about_origin);
    let largest = diagonal(centre)
        .into_iter()
        .chain(diagonal(origin))
        .fold(exact.inertia_about_axis, f64::max);
    let scale = Scale::of(Kind::Inertia, largest);
    let radii = &exact.radii_of_gyration;
    let radius = Scale::of_column(Kind::Length, [radii.axis, radii.across_x, radii.across_y]);
    let mut grid = Grid::new(2);
    let mut first = true;
    let mut line = |what: &str, value: f64, gyration: Option<f64>| {
        let label = if first { "inertia" } else { "" };
        first = false;
        let gyration = gyration.map_or_else(String::new, |gyration| {
            format!("radius of gyration {}", radius.text(gyration))
        });
        grid.row([
            Cell::left(label),
            Cell::left(what),
            Cell::right(scale.text(value)),
            Cell::left(gyration),
        ]);
    };
    line(
        "about the axis of revolution",
        exact.inertia_about_axis,
        Some(radii.axis),
    );
    if full_turn {
        line(
            "across it, through the centre",
            centre[0][0],
            Some(radii.across_x),
        );
        line("across it, through the origin", origin[0][0], None);
        return grid.lines();
    }
    for (i, name) in ["x", "y", "z"].into_iter().enumerate() {
        let gyration = [Some(radii.across_x), Some(radii.across_y), None];
        line(
            &format!("along {name}, through the centre"),
            centre[i][i],
            gyration[i],
        );
    }
    for (i, j, name) in [(0, 1, "xy"), (0, 2, "xz"), (1, 2, "yz")] {
        line(
            &format!("product {name}, at the centre"),
            centre[i][j],
            None,
        );
    }
    for (i, name) in ["x", "y"].into_iter().enumerate() {
        line(
            &format!("along {name}, through the origin"),
            origin[i][i],
            None,
        );
    }
    grid.lines()
}

fn diagonal(matrix: &Matrix) -> [f64; 3] {
    [matrix[0][0], matrix[1][1], matrix[2][2]]
}
