//! Rounds and chamfers.

use super::MOST_FAULTS;
use super::chain::Link;
use super::origins::Origins;
use super::step::{Corner, Step};
use super::wording::Wording;
use crate::Fault;
use glam::DVec2;
use profile::{CornerFault, Treated, chamfer_corner, round_corner};

/// Treats the corners of `links` one after the other, so that each one finds what its neighbours have left. Where
/// `closed`, the last link ends where the first one starts.
pub(super) fn treat_corners(
    links: &mut [Link<'_>],
    closed: bool,
    origins: &mut Origins,
    wording: Wording,
    faults: &mut Vec<Fault>,
) {
    let most = faults.len() + MOST_FAULTS;
    for at in 0..links.len() {
        let next = if at + 1 < links.len() { at + 1 } else { 0 };
        if !closed && next == 0 {
            continue;
        }
        let Some((corner, step)) = links[at].treatment else {
            continue;
        };
        if let Err(fault) = treat(links, [at, next], corner, step, origins, wording) {
            faults.push(fault);
            if faults.len() >= most {
                return;
            }
        }
    }
}

fn treat(
    links: &mut [Link<'_>],
    [at, next]: [usize; 2],
    corner: &Corner,
    step: &Step,
    origins: &mut Origins,
    wording: Wording,
) -> Result<(), Fault> {
    let place = Place {
        corner,
        step,
        before: links[at].tag,
        after: links[next].tag,
        cut_before: links[at].is_cut_at_start,
        cut_after: links[next].is_cut_at_end,
        wording,
    };
    let before = links[at].arriving().and_then(|edge| *edge);
    let after = links[next].leaving().and_then(|edge| *edge);
    let (Some(before), Some(after)) = (before, after) else {
        return Err(place.nothing_left(before.is_none(), origins));
    };
    let treated = match *corner {
        Corner::Round(radius, _) => round_corner(&before, &after, radius),
        Corner::Chamfer([first, second], _) => chamfer_corner(&before, &after, first, second),
    };
    let Treated {
        before: shorter,
        corner: edge,
        after: later,
    } = treated.map_err(|fault| place.fault(fault, before.end(), origins))?;

    let tag = origins.corner(corner, step, links[at].tag, links[next].tag);
    if let Some(slot) = links[at].arriving() {
        *slot = shorter;
    }
    if let Some(slot) = links[next].leaving() {
        *slot = later;
    }
    links[at].is_cut_at_end = true;
    links[next].is_cut_at_start = true;
    links[at].treat(edge, tag);
    Ok(())
}

/// A corner, for messages.
struct Place<'s> {
    corner: &'s Corner,
    step: &'s Step,
    before: u32,
    after: u32,
    /// The edge before has another treated corner at its start.
    cut_before: bool,
    /// The edge after has one at its end.
    cut_after: bool,
    wording: Wording,
}

impl Place<'_> {
    /// `the round of 3 mm between step 2 and step 3`
    fn words(&self, origins: &Origins) -> String {
        let length = |metres| self.wording.length(metres);
        let size = match *self.corner {
            Corner::Round(radius, _) => format!("round of {}", length(radius)),
            Corner::Chamfer([a, b], _) if a == b => format!("chamfer of {}", length(a)),
            Corner::Chamfer([a, b], _) => format!("chamfer of {} and {}", length(a), length(b)),
        };
        format!(
            "the {size} between {} and {}",
            origins.short(self.before),
            origins.short(self.after)
        )
    }

    fn report(
        &self,
        code: &'static str,
        message: String,
        label: String,
        origins: &Origins,
    ) -> Fault {
        let after = origins.get(self.after);
        Fault::new(code, message, self.corner.words().1, label)
            .also(after.span.clone(), origins.short(self.after))
    }

    fn fault(&self, fault: CornerFault, at: DVec2, origins: &Origins) -> Fault {
        let place = self.wording.place(at);
        let what = self.corner.words().0;
        let words = self.words(origins);
        let (code, message) = match fault {
            CornerFault::NoCorner => (
                "corner::smooth",
                format!("there is no corner for {words}: they run on smoothly at {place}"),
            ),
            CornerFault::TurnsBack => (
                "corner::turns_back",
                format!("{words} does not fit: the outline turns straight back at {place}"),
            ),
            CornerFault::TooLarge {
                largest,
                on_before,
                on_after,
            } => return self.too_large(largest, [on_before, on_after], at, origins),
            // The reader lets no other size through.
            _ => (
                "corner::not_a_length",
                format!("{words} cannot be made: {fault}"),
            ),
        };
        self.report(code, message, place, origins)
            .help(format!("leave the {what} out of {}", self.step.words))
    }

    fn too_large(
        &self,
        largest: Option<f64>,
        [on_before, on_after]: [bool; 2],
        at: DVec2,
        origins: &Origins,
    ) -> Fault {
        let (before, after) = (origins.short(self.before), origins.short(self.after));
        let short = match (on_before, on_after) {
            (true, false) => format!(": {before} is too short for it"),
            (false, true) => format!(": {after} is too short for it"),
            (true, true) => format!(": {before} and {after} are too short for it"),
            (false, false) => String::new(),
        };
        let what = match self.corner {
            Corner::Round(..) => "radius",
            Corner::Chamfer(..) => "leg",
        };
        let (label, mut help) = match largest.map(|metres| self.wording.at_most(metres)) {
            Some(largest) => (
                format!("at most {largest}"),
                format!("the largest {what} that fits is {largest}"),
            ),
            None => (String::new(), format!("make the {what} smaller")),
        };
        for (is_cut, is_short, edge, end) in [
            (self.cut_before, on_before, before, "start"),
            (self.cut_after, on_after, after, "end"),
        ] {
            if is_cut && is_short {
                help.push_str("; the corner at the ");
                help.push_str(end);
                help.push_str(" of ");
                help.push_str(edge);
                help.push_str(" already takes a part of it");
            }
        }
        let message = format!(
            "{} does not fit at {}{short}",
            self.words(origins),
            self.wording.place(at)
        );
        self.report("corner::too_large", message, label, origins)
            .help(help)
    }

    /// A neighbour's corner has taken the whole edge.
    fn nothing_left(&self, is_before: bool, origins: &Origins) -> Fault {
        let edge = if is_before { self.before } else { self.after };
        let edge = origins.short(edge);
        self.report(
            "corner::nothing_left",
            format!(
                "{} does not fit: the corner at the other end takes the whole of {edge}",
                self.words(origins)
            ),
            String::new(),
            origins,
        )
        .help(format!("make one of the two corners of {edge} smaller"))
    }
}
