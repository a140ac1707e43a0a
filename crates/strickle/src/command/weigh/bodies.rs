//! The bodies, a line each, and the whole.

use super::report::WIDTH;
use crate::grid::{Cell, Grid, shortened};
use crate::style::{QUIET, STRONG};
use strickle::figures::{Kind, Scale, densities, plain};
use strickle::record::Exact;

/// Most columns of a body's or a material's name, so that the figures fit beside them.
const NAME: usize = (WIDTH - 44) / 2;

/// Density, volume, surface and mass by body; the whole below where there are several.
pub(super) fn of(exact: &Exact) -> String {
    let bodies = &exact.bodies;
    let density = densities(
        &bodies
            .iter()
            .map(|body| body.density)
            .chain([exact.density])
            .collect::<Vec<f64>>(),
    );
    let volume = Scale::of_column(
        Kind::Volume,
        bodies.iter().map(|body| body.volume).chain([exact.volume]),
    );
    let surface = Scale::of_column(
        Kind::Area,
        bodies
            .iter()
            .map(|body| body.surface)
            .chain([exact.surface]),
    );
    let mass = Scale::of_column(
        Kind::Mass,
        bodies.iter().map(|body| body.mass).chain([exact.mass]),
    );

    let mut grid = Grid::new(2);
    grid.row(
        [
            Cell::left("body"),
            Cell::left("material"),
            Cell::right("density"),
            Cell::right("volume"),
            Cell::right("surface"),
            Cell::right("mass"),
        ]
        .map(|cell| cell.styled(QUIET)),
    );
    grid.row(
        [
            Cell::default(),
            Cell::default(),
            Cell::right("kg/m3"),
            Cell::right(volume.unit()),
            Cell::right(surface.unit()),
            Cell::right(mass.unit()),
        ]
        .map(|cell| cell.styled(QUIET)),
    );
    for (body, density) in bodies.iter().zip(&density) {
        let material = body.material.as_deref().unwrap_or("(by density)");
        grid.row([
            Cell::left(shortened(&plain(&body.name), NAME)),
            Cell::left(shortened(&plain(material), NAME)),
            Cell::right(density),
            Cell::right(volume.number(body.volume)),
            Cell::right(surface.number(body.surface)),
            Cell::right(mass.number(body.mass)),
        ]);
    }
    if bodies.len() > 1 {
        grid.row(
            [
                Cell::left("whole"),
                Cell::left("(sum over the bodies)"),
                Cell::right(density.last().map_or("", String::as_str)),
                Cell::right(volume.number(exact.volume)),
                Cell::right(surface.number(exact.surface)),
                Cell::right(mass.number(exact.mass)),
            ]
            .map(|cell| cell.styled(STRONG)),
        );
    }
    grid.lines()
}
