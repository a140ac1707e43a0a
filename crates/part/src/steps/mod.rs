//! The steps of an outline: from tables to plain numbers, repeats written out.

mod corner;
mod ends;
mod kind;
mod point;
mod repeat;

pub(crate) use kind::side;
#[cfg(test)]
pub(crate) use point::POINT;
pub(crate) use point::{CENTRE, target};
#[cfg(test)]
pub(crate) use repeat::REPEAT;

use crate::fault::Found;
use crate::nearest::grouped;
use crate::outline::Step;
use crate::tree::{Fields, Keys, Value};
use crate::values::Values;
use crate::{Fault, Span, limits};
use corner::corner;
use ends::{check_ends, check_target};
use kind::kind;
use point::MEANT;
use repeat::is_repeat;

/// Keys of a step.
pub(crate) const STEP: Keys = Keys {
    table: "a step",
    known: &[
        "d",
        "r",
        "z",
        "dd",
        "dr",
        "dz",
        "taper",
        "angle",
        "arc",
        "centre_on",
        "long",
        "via",
        "centre",
        "tangent",
        "ellipse",
        "curve",
        "round",
        "chamfer",
        "name",
    ],
    meant: &STEP_MEANT,
};

/// What people write for the keys of a step.
const STEP_MEANT: [(&str, &str); 24] = {
    let mut all = [("", ""); 24];
    let mut at = 0;
    while at < MEANT.len() {
        all[at] = MEANT[at];
        at += 1;
    }
    let more = [
        ("center", "`centre`"),
        ("center_on", "`centre_on`"),
        ("fillet", "`round`"),
        ("radius_corner", "`round`"),
        ("bevel", "`chamfer`"),
        ("cone", "`taper` or `angle`"),
        ("slope", "`taper` or `angle`"),
        ("draft", "`angle`"),
        ("bezier", "`curve`"),
        ("through", "`via`"),
        ("side", "`centre_on`"),
        ("label", "`name`"),
        ("arc_radius", "`arc`"),
        ("oval", "`ellipse`"),
    ];
    let mut extra = 0;
    while extra < more.len() {
        all[at + extra] = more[extra];
        extra += 1;
    }
    all
};

/// Counts the edges of the whole part.
#[derive(Debug, Default)]
pub(crate) struct EdgeCount(usize);

impl EdgeCount {
    /// Counts `more` edges; false, and a fault, where that makes too many.
    fn add(&mut self, more: usize, span: Span, found: &mut Found) -> bool {
        let room = limits::EDGES - self.0.min(limits::EDGES);
        let before = self.0;
        self.0 = self.0.saturating_add(more);
        if more <= room {
            return true;
        }
        if before <= limits::EDGES {
            found.push(
                Fault::new(
                    "limit::edges",
                    format!("the part has more than {} edges", grouped(limits::EDGES)),
                    span,
                    "the limit is passed here",
                )
                .help("look for a repeat that is too large, or describe the part more simply"),
            );
        }
        false
    }
}

/// What a list of steps is.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum Use {
    /// A closed outline: the last step runs back to the first.
    Outline,
    /// The face of a thin wall: an open line.
    Wall,
}

/// The steps in the list `value`; `None` where one has a fault.
pub(crate) fn steps(
    value: &Value<'_>,
    purpose: Use,
    values: &Values<'_>,
    edges: &mut EdgeCount,
    found: &mut Found,
) -> Option<Vec<Step>> {
    let what = match purpose {
        Use::Outline => "an outline",
        Use::Wall => "`line`",
    };
    let items = value.list(what, found)?;
    let before = found.count();
    let mut reader = Reader {
        values,
        edges,
        found,
    };
    let mut steps = Vec::new();
    let whole = reader.sequence(items, 0, &mut steps);
    if found.count() == before {
        check_ends(&steps, items, value.span(), purpose, found);
    }
    (whole && found.count() == before).then_some(steps)
}

struct Reader<'r, 't> {
    values: &'r Values<'t>,
    edges: &'r mut EdgeCount,
    found: &'r mut Found,
}

impl Reader<'_, '_> {
    /// Adds the steps of `items` to `steps`; false where one of them has a fault.
    fn sequence(&mut self, items: &[Value<'_>], depth: usize, steps: &mut Vec<Step>) -> bool {
        let mut whole = true;
        for (at, item) in items.iter().enumerate() {
            whole &= if is_repeat(item) {
                self.repeat(item, at + 1, depth, steps).is_some()
            } else {
                match self.step(item, at + 1) {
                    Some(step) => {
                        steps.push(step);
                        true
                    }
                    None => false,
                }
            };
            if self.edges.0 > limits::EDGES || self.found.is_enough() {
                return false;
            }
        }
        whole
    }

    fn step(&mut self, item: &Value<'_>, number: usize) -> Option<Step> {
        let Self {
            values,
            edges,
            found,
        } = self;
        let before = found.count();
        let fields = Fields::open(item, &STEP, found)?;
        if !edges.add(1, item.span(), found) {
            return None;
        }
        // All parts of a step are read, so that each of its faults is told.
        let to = target(&fields, values, found);
        let kind = kind(&fields, values, found);
        let corner = corner(&fields, values, found);
        let name = match fields.get("name") {
            Some(entry) => Some(entry.value.text("`name`", found)?.to_owned()),
            None => None,
        };
        let (to, kind, corner) = (to?, kind?, corner?);
        if found.count() > before {
            return None;
        }
        let step = Step {
            to,
            kind,
            corner,
            name,
            words: format!("step {number}"),
            span: item.span(),
        };
        check_target(&step, &fields, found);
        (found.count() == before).then_some(step)
    }
}

#[cfg(test)]
mod tests;
