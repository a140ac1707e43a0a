//! From loops to the region of one body, profile's faults told in the part file's words and places.

use super::Built;
use super::MOST_FAULTS;
use super::wording::Wording;
use crate::{Fault, LengthUnit, StepOrigin};
use glam::DVec2;
use profile::{EdgeRef, Loop, Region, RegionFault};

/// The region inside `outer` less the `voids`, and where its edges come from (the tags index it); or `None` and one more
/// fault at least, in the part file's words and places. Messages give lengths in `unit`.
pub fn region(
    outer: Built,
    voids: Vec<Built>,
    unit: LengthUnit,
    faults: &mut Vec<Fault>,
) -> Option<(Region, Vec<StepOrigin>)> {
    let mut steps = Vec::new();
    let mut firsts = Vec::with_capacity(voids.len() + 1);
    let mut loops = std::iter::once(outer).chain(voids).map(|built| {
        let first = steps.len();
        firsts.push(first);
        steps.extend(built.steps);
        retagged(&built.outline, first)
    });
    let outer = loops.next()?;
    let voids: Vec<Loop> = loops.collect();
    match Region::new(outer, voids) {
        Ok(region) => Some((region, steps)),
        Err(found) => {
            let told = Told {
                steps: &steps,
                firsts: &firsts,
                wording: Wording { unit },
            };
            faults.extend(
                found
                    .iter()
                    .take(MOST_FAULTS)
                    .map(|fault| told.fault(fault)),
            );
            None
        }
    }
}

/// `outline` with `first` added to its tags.
fn retagged(outline: &Loop, first: usize) -> Loop {
    // A part has 100,000 edges at most.
    let first = u32::try_from(first).unwrap_or(u32::MAX);
    let tags = outline.tags().iter().map(|tag| tag.saturating_add(first));
    Loop::new(outline.edges().iter().copied().zip(tags)).expect("the edges are those of a loop")
}

/// The origins of a region's edges, for messages.
struct Told<'s> {
    steps: &'s [StepOrigin],
    /// Index of each loop's first origin.
    firsts: &'s [usize],
    wording: Wording,
}

impl Told<'_> {
    fn origin(&self, edge: EdgeRef) -> &StepOrigin {
        self.steps
            .get(edge.tag as usize)
            .expect("tags index the origins")
    }

    /// An origin that stands for the whole loop.
    fn of_loop(&self, loop_index: usize) -> (&str, &StepOrigin) {
        let first = self.firsts.get(loop_index).copied().unwrap_or(0);
        let origin = self
            .steps
            .get(first)
            .expect("each loop has its edges' origins");
        let name = origin.words.split(", ").next().unwrap_or(&origin.words);
        (name, origin)
    }

    /// `outline, step 3` and, of the same outline, `step 7`.
    fn both(&self, first: EdgeRef, second: EdgeRef) -> [&str; 2] {
        let (a, b) = (&*self.origin(first).words, &*self.origin(second).words);
        let short = match (a.split_once(", "), b.split_once(", ")) {
            (Some((name, _)), Some((other, short))) if name == other => short,
            _ => b,
        };
        [a, short]
    }

    fn one(&self, code: &'static str, edge: EdgeRef, what: &str, at: DVec2) -> Fault {
        let place = self.wording.place(at);
        let origin = self.origin(edge);
        let message = format!("{} {what} at {place}", origin.words);
        Fault::new(code, message, origin.span.clone(), place)
    }

    /// `what` has `{}` for the second edge.
    fn two(&self, code: &'static str, edges: [EdgeRef; 2], what: &str, place: &str) -> Fault {
        let [first, second] = edges;
        let [a, b] = self.both(first, second);
        Fault::new(
            code,
            format!("{a} {what} {b} {place}"),
            self.origin(second).span.clone(),
            b,
        )
        .also(self.origin(first).span.clone(), a)
    }

    fn whole(&self, code: &'static str, loop_index: usize, what: &str, at: DVec2) -> Fault {
        let (name, origin) = self.of_loop(loop_index);
        let message = format!("{name}: {what}");
        Fault::new(code, message, origin.span.clone(), self.wording.place(at))
    }

    fn fault(&self, fault: &RegionFault) -> Fault {
        let at = |point| format!("at {}", self.wording.place(point));
        match *fault {
            RegionFault::Crosses { first, second, at: point }
                if first.loop_index != second.loop_index =>
            {
                self.loops_meet([first, second], "crosses", &at(point))
            }
            RegionFault::Touches { first, second, at: point }
                if first.loop_index != second.loop_index =>
            {
                self.loops_meet([first, second], "touches", &at(point))
            }
            RegionFault::RunsAlong { first, second, from, to }
                if first.loop_index != second.loop_index =>
            {
                self.loops_meet([first, second], "runs along", &self.stretch(from, to))
            }
            RegionFault::Crosses { first, second, at: point } => self
                .two("outline::crosses", [first, second], "crosses", &at(point))
                .help("an outline goes round once without crossing itself; look at the coordinates of the two steps"),
            RegionFault::Touches { first, second, at: point } => self
                .two("outline::touches", [first, second], "touches", &at(point))
                .help("where the outline touches itself the part would hang together by a line without thickness; leave a gap, or draw two bodies"),
            RegionFault::RunsAlong { first, second, from, to } => self
                .two("outline::runs_along", [first, second], "runs along", &self.stretch(from, to))
                .help("between the two there is no material; leave out the way there and back"),
            RegionFault::TooIntricate { edge, at: point } => self
                .one("outline::too_intricate", edge, "is one of too many curves nested too closely to be told apart, it starts", point)
                .help("so many curves lie closer to each other than they bulge that checking them would take minutes; draw fewer, or divide them into shorter ones"),
            RegionFault::CrossesItself { edge, at: point } => self
                .one("outline::crosses_itself", edge, "crosses itself", point)
                .help("move its control points, or divide it into two steps"),
            RegionFault::TurnsBack { edge, at: point } => self
                .one("outline::edge_turns_back", edge, "turns straight back", point)
                .help("the wall is thicker there than the curve's radius, or a curve's control points lie beyond its ends"),
            RegionFault::BelowAxis { edge, at: point } => self
                .one("outline::past_axis", edge, "reaches past the axis", point)
                .help("the section lies on one side of the axis; it may touch the axis at r = 0"),
            RegionFault::NoLength { edge, at: point } => self
                .one("outline::no_length", edge, "has no length", point)
                .help("it is shorter than the rounding of its coordinates; leave it out"),
            RegionFault::NoArea { loop_index, at: point } => self
                .whole("outline::no_area", loop_index, "it encloses no area", point)
                .help("the way there and the way back are the same; look at the coordinates"),
            RegionFault::VoidOutside { void, at: point } => self
                .whole("void::outside", void, "it lies outside its body", point)
                .help("a void is a closed hole inside the section; what is open to the outside is a part of the outline"),
            RegionFault::VoidInVoid { void, within, at: point } => {
                let (other, origin) = self.of_loop(within);
                self.whole("void::in_void", void, &format!("it lies inside {other}"), point)
                    .also(origin.span.clone(), other)
                    .help("inside a void there is nothing to hollow out; material there is a body of its own")
            }
            RegionFault::TooLarge { loop_index, extent, at: point } => self.extent(loop_index, "reaches too far to be computed with", extent, point),
            RegionFault::TooSmall { loop_index, extent, at: point } => self.extent(loop_index, "is too small to be computed with", extent, point),
            RegionFault::NotFinite { edge } => {
                let origin = self.origin(edge);
                let message = format!("{} cannot be computed", origin.words);
                Fault::new("outline::not_finite", message, origin.span.clone(), "")
                    .help("look at the unit and at the powers of ten")
            }
            ref other => self.whole("outline::not_legal", other.loop_index(), &other.to_string(), other.place().unwrap_or_default()),
        }
    }

    fn loops_meet(&self, edges: [EdgeRef; 2], what: &str, place: &str) -> Fault {
        self.two("void::meets", edges, what, place).help(
            "a void keeps clear of the outline and of other voids; where they meet, draw the hole as a part of the outline",
        )
    }

    fn stretch(&self, from: DVec2, to: DVec2) -> String {
        format!(
            "from {} to {}",
            self.wording.place(from),
            self.wording.place(to)
        )
    }

    fn extent(&self, loop_index: usize, what: &str, extent: f64, at: DVec2) -> Fault {
        let what = format!("it {what}, {}", self.wording.length(extent));
        self.whole("outline::out_of_range", loop_index, &what, at)
            .help("look at the unit and at the powers of ten")
    }
}
