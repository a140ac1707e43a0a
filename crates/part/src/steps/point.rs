//! Where a step goes: its coordinates.

use crate::fault::Found;
use crate::outline::{Coordinate, Target};
use crate::tree::{Entry, Fields, Keys, Value};
use crate::values::Values;
use crate::{Fault, Span};

/// Keys for the distance from the axis.
pub(crate) const RADIAL: [&str; 4] = ["d", "r", "dd", "dr"];

/// Keys for the station along the axis.
pub(crate) const AXIAL: [&str; 2] = ["z", "dz"];

/// What people write for coordinates.
pub(crate) const MEANT: [(&str, &str); 10] = [
    ("diameter", "`d`"),
    ("dia", "`d`"),
    ("radius", "`r`"),
    ("x", "`r`, the distance from the axis"),
    ("dx", "`dr`"),
    ("y", "`z`, the station along the axis"),
    ("dy", "`dz`"),
    ("h", "`z`"),
    ("height", "`z` or `dz`"),
    ("length", "`dz`"),
];

/// Keys of a point inside a step.
pub(crate) const POINT: Keys = Keys {
    table: "a point",
    known: &["d", "r", "z", "dd", "dr", "dz"],
    meant: &MEANT,
};

/// Keys of a circle's centre.
pub(crate) const CENTRE: Keys = Keys {
    table: "a circle's centre",
    known: &["d", "r", "z"],
    meant: &MEANT,
};

/// A target; `None` where one of its coordinates has a fault.
pub(crate) fn target(
    fields: &Fields<'_, '_>,
    values: &Values<'_>,
    found: &mut Found,
) -> Option<Target> {
    let r = match one_of(fields, &RADIAL, found)? {
        Some(entry) => Some(radial(entry, values, found)?),
        None => None,
    };
    let z = match one_of(fields, &AXIAL, found)? {
        Some(entry) => Some(axial(entry, values, found)?),
        None => None,
    };
    Some(Target { r, z })
}

/// The point `value` inside a step; it gives at least one coordinate.
pub(crate) fn point(value: &Value<'_>, values: &Values<'_>, found: &mut Found) -> Option<Target> {
    let fields = Fields::open(value, &POINT, found)?;
    let before = found.count();
    let target = target(&fields, values, found)?;
    if target.r.is_none() && target.z.is_none() {
        if found.count() == before {
            found.push(
                Fault::new(
                    "point::empty",
                    "this point gives no coordinate",
                    value.span(),
                    "",
                )
                .help(
                    "write { d = 190, z = 120 }; a coordinate left out is that of the step before",
                ),
            );
        }
        return None;
    }
    Some(target)
}

/// The one entry among `keys`; two are reported, and then there is no target.
#[expect(
    clippy::option_option,
    reason = "given twice and left out are two things"
)]
fn one_of<'a, 't>(
    fields: &Fields<'a, 't>,
    keys: &[&str],
    found: &mut Found,
) -> Option<Option<&'a Entry<'t>>> {
    let mut given = keys.iter().filter_map(|key| fields.get(key));
    let first = given.next();
    let Some((first, second)) = first.zip(given.next()) else {
        return Some(first);
    };
    let (first, second) = if first.key_span().start < second.key_span().start {
        (first, second)
    } else {
        (second, first)
    };
    let along = keys.contains(&"z");
    let what = if along {
        "the station along the axis"
    } else {
        "the distance from the axis"
    };
    found.push(
        Fault::new(
            "step::coordinate_twice",
            format!("`{}` and `{}` both give {what}", first.key, second.key),
            second.key_span(),
            "the second",
        )
        .also(first.key_span(), "the first")
        .help("keep one of them"),
    );
    None
}

fn radial(entry: &Entry<'_>, values: &Values<'_>, found: &mut Found) -> Option<(Coordinate, Span)> {
    let what = format!("`{}`", entry.key);
    let length = values.length(&entry.value, &what, found)?;
    let span = entry.value.span();
    let coordinate = match &*entry.key {
        "d" => Coordinate::At(length / 2.0),
        "r" => Coordinate::At(length),
        "dd" => Coordinate::By(length / 2.0),
        _ => Coordinate::By(length),
    };
    if matches!(coordinate, Coordinate::At(r) if r < 0.0) {
        found.push(
            Fault::new(
                "step::beyond_axis",
                format!("{what} is negative: the outline would be beyond the axis"),
                span,
                "",
            )
            .help("the section lies on one side of the axis; give the distance without a sign"),
        );
        return None;
    }
    Some((coordinate, span))
}

fn axial(entry: &Entry<'_>, values: &Values<'_>, found: &mut Found) -> Option<(Coordinate, Span)> {
    let what = format!("`{}`", entry.key);
    let length = values.length(&entry.value, &what, found)?;
    let coordinate = if entry.key == "z" {
        Coordinate::At(length)
    } else {
        Coordinate::By(length)
    };
    Some((coordinate, entry.value.span()))
}
