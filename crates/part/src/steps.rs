//! The steps of an outline: from tables to plain numbers, repeats written out.

use crate::fault::Found;
use crate::kind::{corner, kind};
use crate::nearest::grouped;
use crate::outline::{Coordinate, Corner, Kind, Step};
use crate::point::{AXIAL, MEANT, RADIAL, target};
use crate::tree::{Fields, Keys, Value};
use crate::values::Values;
use crate::{Fault, Span, limits};

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

/// Keys of a repeat, which stands among the steps.
pub(crate) const REPEAT: Keys = Keys {
    table: "a repeat",
    known: &["repeat", "steps"],
    meant: &[
        ("times", "`repeat`"),
        ("count", "`repeat`"),
        ("step", "`steps`"),
    ],
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
            if self.edges.0 > limits::EDGES {
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

    /// Writes out a repeat: `repeat = N, steps = [..]`.
    fn repeat(
        &mut self,
        item: &Value<'_>,
        number: usize,
        depth: usize,
        steps: &mut Vec<Step>,
    ) -> Option<()> {
        let found = &mut *self.found;
        let fields = Fields::open(item, &REPEAT, found)?;
        let count = fields.require("repeat", "say how often: repeat = 4", found);
        let inner = fields.require(
            "steps",
            "give the steps to repeat: steps = [ { dz = 6 } ]",
            found,
        );
        let (count, inner) = (count?, inner?);
        if depth == limits::REPEATS {
            found.push(
                Fault::new(
                    "limit::repeats",
                    format!(
                        "repeats stand in each other more than {} deep",
                        limits::REPEATS
                    ),
                    count.key_span(),
                    "",
                )
                .help("write some of them out"),
            );
            return None;
        }
        let times = self.times(&count.value);
        let items = inner.value.list("`steps`", self.found)?;
        if items.is_empty() {
            self.found.push(
                Fault::new(
                    "repeat::empty",
                    "there is nothing to repeat",
                    inner.value.span(),
                    "",
                )
                .help("write steps with increments: steps = [ { dz = 6 }, { dd = -4 } ]"),
            );
            return None;
        }
        let first = steps.len();
        let whole = self.sequence(items, depth + 1, steps);
        let times = times?;
        if !whole {
            return None;
        }
        let round = steps.len() - first;
        let moves = steps[first..].iter().any(moves_on);
        if times > 1 && !moves {
            self.found.push(
                Fault::new(
                    "repeat::stands_still",
                    "each round of this repeat would be drawn over the one before",
                    inner.value.span(),
                    "no step here has an increment",
                )
                .help("use dd, dr or dz in the steps, so that each round goes on from the last"),
            );
            return None;
        }
        // The first round has been counted; nothing is made before the others are.
        let more = round.saturating_mul(times - 1);
        if !self.edges.add(more, count.value.span(), self.found) {
            return None;
        }
        steps.reserve(more);
        for turn in 2..=times {
            for at in first..first + round {
                let mut step = steps[at].clone();
                step.words = in_round(&step.words, turn, number);
                steps.push(step);
            }
        }
        for step in &mut steps[first..first + round] {
            step.words = in_round(&step.words, 1, number);
        }
        Some(())
    }

    /// How often: a whole number from 1 on.
    fn times(&mut self, value: &Value<'_>) -> Option<usize> {
        let number = self.values.number(value, "`repeat`", self.found)?;
        // What an expression comes to may be off by rounding.
        let times = number.round();
        if (number - times).abs() > 1e-9 * times.abs() || times < 1.0 {
            self.found.push(
                Fault::new(
                    "repeat::count",
                    format!("a repeat is done a whole number of times, and this is {number}"),
                    value.span(),
                    "",
                )
                .help("write 1 or more"),
            );
            return None;
        }
        #[expect(
            clippy::cast_possible_truncation,
            clippy::cast_sign_loss,
            reason = "positive, and a cast of a float stops at the largest integer"
        )]
        Some(times as usize)
    }
}

fn in_round(words: &str, turn: usize, number: usize) -> String {
    // Of repeats inside each other the innermost is named first.
    match words.strip_suffix(')') {
        Some(inner) => format!("{inner}, round {turn} of the repeat in step {number})"),
        None => format!("{words} (round {turn} of the repeat in step {number})"),
    }
}

fn is_repeat(item: &Value<'_>) -> bool {
    match &item.kind {
        crate::tree::Kind::Table(table) => REPEAT.known.iter().any(|key| table.get(key).is_some()),
        _ => false,
    }
}

fn moves_on(step: &Step) -> bool {
    let by = |coordinate: &Option<(Coordinate, Span)>| {
        matches!(coordinate, Some((Coordinate::By(_), _)))
    };
    by(&step.to.r) || by(&step.to.z)
}

/// Whether a step says where it goes, and not more than that.
fn check_target(step: &Step, fields: &Fields<'_, '_>, found: &mut Found) {
    let r = fields.first_of(&RADIAL);
    let z = fields.first_of(&AXIAL);
    match (&step.kind, r, z) {
        (Kind::Sloped(_), Some(r), Some(z)) => {
            let slope = fields.first_of(&["taper", "angle"]);
            let (key, place) = slope.map_or(("taper", step.span.clone()), |entry| {
                (&*entry.key, entry.key_span())
            });
            found.push(
                Fault::new(
                    "step::slope_and_both",
                    format!("`{key}` gives the coordinate that is left out, and none is"),
                    place,
                    "",
                )
                .also(r.key_span(), "one coordinate")
                .also(z.key_span(), "the other")
                .help(format!("leave out `{}`, `{}` or `{key}`", r.key, z.key)),
            );
        }
        (Kind::Sloped(_), None, None) => {
            found.push(
                Fault::new(
                    "step::slope_alone",
                    "a slope alone does not say how far the step goes",
                    step.span.clone(),
                    "",
                )
                .help("give one coordinate; the slope gives the other"),
            );
        }
        (_, None, None) => {
            found.push(
                Fault::new(
                    "step::goes_nowhere",
                    "this step goes nowhere",
                    step.span.clone(),
                    "",
                )
                .help("give d or r, z, or an increment dd, dr, dz"),
            );
        }
        _ => {}
    }
}

/// Whether the steps begin and end as an outline or a line does.
fn check_ends(steps: &[Step], items: &[Value<'_>], span: Span, purpose: Use, found: &mut Found) {
    let [first, others @ ..] = steps else {
        let code = "outline::empty";
        return found.push(
            Fault::new(code, "there are no steps here", span, "").help(
                "an outline is a list of steps: [ { d = 40, z = 0 }, { d = 60 }, { z = 12 } ]",
            ),
        );
    };
    check_first(first, items, found);
    let Some(last) = others.last() else {
        return found.push(
            Fault::new(
                "outline::one_step",
                "one step encloses nothing",
                first.span.clone(),
                "",
            )
            .help("the first step only says where the outline starts; add those that go on from there"),
        );
    };
    if purpose == Use::Wall {
        for (step, end) in [(first, "begins"), (last, "ends")] {
            if let Some(Corner::Round(_, span) | Corner::Chamfer(_, span)) = &step.corner {
                found.push(
                    Fault::new(
                        "wall::corner_at_end",
                        format!("where the line {end} there is no corner to round or chamfer"),
                        span.clone(),
                        "",
                    )
                    .help(
                        "leave round and chamfer out here: the wall's ends are square to its face",
                    ),
                );
            }
        }
        if first.name.is_some() {
            found.push(
                Fault::new(
                    "wall::name_at_start",
                    "the first step of a line draws no edge that could have a name",
                    first.span.clone(),
                    "",
                )
                .help("put the name on the step that arrives at the edge's end"),
            );
        }
    }
}

/// The first step says where the outline starts: both coordinates, no increments, no curve.
fn check_first(first: &Step, items: &[Value<'_>], found: &mut Found) {
    let help = "the first step gives both coordinates: { d = 40, z = 0 }";
    let coordinates = [("d or r", &first.to.r), ("z", &first.to.z)];
    for (key, coordinate) in coordinates {
        match coordinate {
            Some((Coordinate::At(_), _)) => {}
            Some((Coordinate::By(_), span)) => found.push(
                Fault::new(
                    "step::first_by_increment",
                    "the first step has no step before it to add an increment to",
                    span.clone(),
                    "",
                )
                .help(help),
            ),
            None => found.push(
                Fault::new(
                    "step::first_coordinate",
                    format!("the first step lacks {key}"),
                    first.span.clone(),
                    "",
                )
                .help(help),
            ),
        }
    }
    if first.kind != Kind::Line {
        // A repeat's first step stands inside it; the place is the step's all the same.
        let place = items
            .first()
            .filter(|item| !is_repeat(item))
            .map_or(first.span.clone(), Value::span);
        found.push(
            Fault::new(
                "step::first_kind",
                "the first step only says where the outline starts, so it has no curve or slope",
                place,
                "",
            )
            .help("put the curve on the step that arrives at its end; the last step runs straight back to the first"),
        );
    }
}
