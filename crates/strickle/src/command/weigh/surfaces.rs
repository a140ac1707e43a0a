//! The surface by edge name.

use super::report::WIDTH;
use crate::grid::{Cell, Grid, shortened};
use crate::style::QUIET;
use strickle::figures::{Kind, Scale, plain};
use strickle::record::Exact;

/// Most columns of a name.
const NAME: usize = (WIDTH - 16) / 2;

/// Area by body and edge name; nothing where no edge has a name and there are no end caps.
pub(super) fn of(exact: &Exact) -> String {
    let surfaces = &exact.surfaces;
    if surfaces.iter().all(|surface| surface.name.is_none()) {
        return String::new();
    }
    let area = Scale::of_column(Kind::Area, surfaces.iter().map(|surface| surface.area));
    let mut grid = Grid::new(2);
    grid.row(
        [
            Cell::left("surface"),
            Cell::left("edge"),
            Cell::right(area.unit()),
        ]
        .map(|cell| cell.styled(QUIET)),
    );
    let mut last = None;
    for surface in surfaces {
        let body = if last == Some(&surface.body) {
            String::new()
        } else {
            shortened(&plain(&surface.body), NAME)
        };
        last = Some(&surface.body);
        let name = match &surface.name {
            Some(name) => shortened(&plain(name), NAME),
            None => "(without a name)".to_owned(),
        };
        grid.row([
            Cell::left(body),
            Cell::left(name),
            Cell::right(area.number(surface.area)),
        ]);
    }
    grid.lines()
}
