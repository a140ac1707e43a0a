//! The page that `prove` prints of one part.

use crate::command::weigh::{caution, expected, title};
use crate::grid::{Cell, Grid};
use crate::style::{BAD, GOOD, QUIET, STRONG};
use strickle::figures::{Kind, Scale, plain};
use strickle::record::{Budget, Mesh};
use strickle::{Kept, Study, Weighed};

/// The page of a part that was proved.
pub(super) fn of(
    study: &Study,
    predicted: &Weighed,
    measured: Option<&Weighed>,
    kept: &Kept,
) -> String {
    let sections = [
        title(study),
        mesh(study, kept),
        comparison(study, predicted, measured),
        study
            .record
            .budget
            .as_ref()
            .map(|budget| causes(study, budget))
            .unwrap_or_default(),
        expected::of(&study.record),
        verdict(study),
        caution(study),
    ];
    let sections: Vec<String> = sections
        .into_iter()
        .filter(|section| !section.is_empty())
        .collect();
    sections.join("\n")
}

/// What mesh it is and how near the surface.
fn mesh(study: &Study, kept: &Kept) -> String {
    let Some(mesh) = &study.record.mesh else {
        return String::new();
    };
    let file = kept.file.as_deref().map_or_else(
        || "not written; give -o FOLDER to keep it".to_owned(),
        |file| format!("written to {} and .3mf", plain(file)),
    );
    format!(
        "mesh       {} triangles, {}, {file}\n{}",
        mesh.triangles,
        mesh.placement,
        distances(mesh),
    )
}

/// How near the surface a mesh is.
pub(in crate::command) fn distances(mesh: &Mesh) -> String {
    let distance = Scale::of(Kind::Length, mesh.within);
    format!(
        "distance   {} from the true surface at most, {} asked for\n",
        distance.text(mesh.largest_deviation),
        distance.text(mesh.within),
    )
}

/// Exact, predicted and measured side by side.
fn comparison(study: &Study, predicted: &Weighed, measured: Option<&Weighed>) -> String {
    let exact = study.exact();
    let surface = study
        .record
        .measured
        .as_ref()
        .map(|measured| measured.surface);
    let mut grid = Grid::new(2);
    let heads = ["exact", "predicted", "measured", "difference"].map(Cell::right);
    grid.row(
        [Cell::default()]
            .into_iter()
            .chain(heads)
            .map(|cell| cell.styled(QUIET)),
    );
    let mut row = |what: &str,
                   kind: Kind,
                   size: f64,
                   exact: f64,
                   predicted: Option<f64>,
                   measured: Option<f64>| {
        let scale = Scale::of(kind, size);
        let unit = scale.unit();
        let text = |value: Option<f64>| {
            Cell::right(value.map_or("-".to_owned(), |value| scale.number(value)))
        };
        let difference = measured.map(|measured| measured - exact);
        // A difference is small against the figure: it has a unit of its own.
        let own = difference.map(|difference| {
            let negligible = difference.abs() <= NEGLIGIBLE * size.abs();
            if negligible {
                "none".to_owned()
            } else {
                Scale::of_difference(kind, difference).signed(difference)
            }
        });
        grid.row([
            Cell::left(format!("{what}, {unit}")),
            text(Some(exact)),
            text(predicted),
            text(measured),
            Cell::right(own.unwrap_or_else(|| "-".to_owned())),
        ]);
    };
    let of = |figure: fn(&Weighed) -> f64| (Some(figure(predicted)), measured.map(figure));
    let (p, m) = of(|w| w.volume);
    row("volume", Kind::Volume, exact.volume, exact.volume, p, m);
    row(
        "surface",
        Kind::Area,
        exact.surface,
        exact.surface,
        None,
        surface,
    );
    let (p, m) = of(|w| w.mass);
    row("mass", Kind::Mass, exact.mass, exact.mass, p, m);
    let extent = exact.largest_diameter.max(exact.length);
    let [x, y, z] = exact.centre;
    let (p, m) = of(|w| w.centre.x);
    row("centre x", Kind::Length, extent, x, p, m);
    let (p, m) = of(|w| w.centre.y);
    row("centre y", Kind::Length, extent, y, p, m);
    let (p, m) = of(|w| w.centre.z);
    row("centre z", Kind::Length, extent, z, p, m);
    let inertia = &exact.inertia_about_centre;
    let size = inertia[0][0].max(inertia[2][2]);
    let (p, m) = of(|w| w.inertia.z_axis.z);
    row("inertia axis", Kind::Inertia, size, inertia[2][2], p, m);
    let (p, m) = of(|w| w.inertia.x_axis.x);
    row("inertia across", Kind::Inertia, size, inertia[0][0], p, m);
    grid.lines()
}

/// Share of a figure below which a difference is not shown: the precision of a file's numbers, f32.
const NEGLIGIBLE: f64 = 6e-8;

/// Where the difference in volume comes from.
fn causes(study: &Study, budget: &Budget) -> String {
    let volume = study.exact().volume;
    let mut grid = Grid::new(2);
    let causes = [
        ("polygons in place of circles", budget.circumferential),
        ("chords in place of curved edges", budget.meridional),
        ("coordinates rounded by the file", budget.rounding),
        ("no cause found", budget.unexplained),
    ];
    for (index, (what, part)) in causes.into_iter().enumerate() {
        let label = if index == 0 { "volume" } else { "" };
        let scale = Scale::of_difference(Kind::Volume, part);
        grid.row([
            Cell::left(format!("{label:<9}")),
            Cell::left(what),
            Cell::right(scale.signed(part)),
            Cell::right(format!("{:+.1e} of the whole", part / volume)).styled(QUIET),
        ]);
    }
    grid.lines()
}

/// The answer and why.
fn verdict(study: &Study) -> String {
    let Some(verdict) = &study.record.verdict else {
        return String::new();
    };
    if verdict.holds {
        return format!("{GOOD}PROVED{GOOD:#}: closed, sound, and every difference explained.\n");
    }
    let reasons = verdict
        .reasons
        .iter()
        .map(|reason| format!("  - {STRONG}{}{STRONG:#}\n", plain(reason)));
    std::iter::once(format!("{BAD}NOT PROVED{BAD:#}:\n"))
        .chain(reasons)
        .collect()
}
