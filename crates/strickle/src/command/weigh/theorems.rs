//! The two theorems of Pappus and Guldin, a line each.

use super::report::is_full_turn;
use crate::grid::{Cell, Grid};
use crate::style::STRONG;
use part::Part;
use strickle::figures::{Kind, Scale};
use strickle::record::Exact;

/// Area times path is volume; perimeter times path is swept surface; the ends of a part turn come to that.
pub(super) fn of(exact: &Exact, part: &Part) -> String {
    let section = &exact.section;
    let area_path = part.revolve * section.centroid_r;
    let perimeter_path = part.revolve * section.perimeter_centroid_r;
    let path = Scale::of_column(Kind::Length, [area_path, perimeter_path]);
    let area = Scale::of(Kind::Area, section.area);
    let perimeter = Scale::of(Kind::Length, section.perimeter);
    let volume = Scale::of(Kind::Volume, exact.volume);
    let surface = Scale::of(Kind::Area, exact.surface);
    let swept = section.perimeter * perimeter_path;

    let mut grid = Grid::new(1);
    grid.row(
        [Cell::left("area ")]
            .into_iter()
            .chain(figure(area, section.area))
            .chain([Cell::left(" x path of centroid")])
            .chain(figure(path, area_path))
            .chain([Cell::left(" = volume ")])
            .chain(total(volume, exact.volume)),
    );
    let full = is_full_turn(part);
    let result = if full { total } else { figure };
    grid.row(
        [Cell::left("perimeter ")]
            .into_iter()
            .chain(figure(perimeter, section.perimeter))
            .chain([Cell::left(" x path of centroid")])
            .chain(figure(path, perimeter_path))
            .chain([Cell::left(" = surface")])
            .chain(result(surface, swept)),
    );
    if !full {
        grid.row(
            [Cell::left("two ends")]
                .into_iter()
                .chain(figure(area, section.area))
                .chain([
                    Cell::left(" x 2"),
                    Cell::default(),
                    Cell::default(),
                    Cell::left(" + surface"),
                ])
                .chain(figure(surface, 2.0 * section.area)),
        );
        let blank = std::iter::repeat_with(Cell::default).take(6);
        grid.row(
            blank
                .chain([Cell::left(" = surface")])
                .chain(total(surface, exact.surface)),
        );
    }
    grid.lines()
}

/// A figure and its unit, a cell each.
fn figure(scale: Scale, value: f64) -> [Cell; 2] {
    [Cell::right(scale.number(value)), Cell::left(scale.unit())]
}

/// The same for a result.
fn total(scale: Scale, value: f64) -> [Cell; 2] {
    figure(scale, value).map(|cell| cell.styled(STRONG))
}
