//! Thin walls given by one face.

use crate::fault::Found;
use crate::nearest::unknown_word;
use crate::outline::Outline;
use crate::steps::{EdgeCount, Use, side, steps};
use crate::tree::{Fields, Keys, Value};
use crate::values::Values;

/// Keys of a thin wall.
pub(crate) const WALL: Keys = Keys {
    table: "a wall",
    known: &["line", "thickness", "grow"],
    meant: &[
        ("outline", "`line`"),
        ("steps", "`line`"),
        ("side", "`grow`"),
        ("thick", "`thickness`"),
    ],
};

pub(super) fn wall(
    value: &Value<'_>,
    values: &Values<'_>,
    edges: &mut EdgeCount,
    found: &mut Found,
) -> Option<Outline> {
    let fields = Fields::open(value, &WALL, found)?;
    let line = fields
        .require("line", "give the steps of one face: line = [ .. ]", found)
        .and_then(|entry| steps(&entry.value, Use::Wall, values, edges, found));
    let thickness = fields
        .require(
            "thickness",
            "give the wall's thickness: thickness = 2",
            found,
        )
        .and_then(|entry| values.positive(&entry.value, "`thickness`", found));
    let grow = fields
        .require(
            "grow",
            "say on which side of travel the wall is: grow = \"left\", \"right\" or \"both\"",
            found,
        )
        .and_then(|entry| {
            let word = entry.value.text("`grow`", found)?;
            match (side(word), word) {
                (Some(side), _) => Some(Some(side)),
                (None, "both") => Some(None),
                _ => {
                    found.push(unknown_word(
                        "wall::side",
                        "side for a wall",
                        word,
                        entry.value.span(),
                        &["left", "right", "both"],
                    ));
                    None
                }
            }
        });
    Some(Outline::Wall {
        line: line?,
        thickness: thickness?,
        grow: grow?,
        span: value.span(),
    })
}
