//! The page that `mesh` prints.

use crate::command::prove::distances;
use crate::command::weigh::{expected, title};
use files::{Format, Unit};
use strickle::Study;
use strickle::figures::plain;

pub(super) fn of(study: &Study, format: Format, unit: Unit) -> String {
    let Some(mesh) = &study.record.mesh else {
        return String::new();
    };
    let written = format!(
        "written    {}, {}, in {}\n",
        plain(mesh.file.as_deref().unwrap_or("")),
        format.name(),
        unit.symbol()
    );
    let note = if format.has_unit() {
        String::new()
    } else {
        format!(
            "           {} has no unit of its own: tell the receiver that it is in {}\n",
            format.name(),
            unit.symbol()
        )
    };
    let page = format!(
        "{}\nmesh       {} triangles, {} vertices, {}\n{}{written}{note}",
        title(study),
        mesh.triangles,
        mesh.vertices,
        mesh.placement,
        distances(mesh),
    );
    let expected = expected::of(&study.record);
    if expected.is_empty() {
        page
    } else {
        format!("{page}\n{expected}")
    }
}
