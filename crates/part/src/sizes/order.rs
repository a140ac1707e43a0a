//! The order in which sizes need each other.

use super::{Draft, Source};
use crate::fault::Found;
use crate::nearest::shown;
use crate::{Fault, Span};

/// The sizes in an order in which each comes after those it needs; those in a circle, and those that need them, are left out.
pub(super) fn in_order(drafts: &[Draft<'_, '_>], found: &mut Found) -> Vec<usize> {
    #[derive(Clone, Copy, PartialEq)]
    enum State {
        New,
        Open,
        Done,
    }
    let needs: Vec<Vec<(usize, Span)>> = drafts
        .iter()
        .map(|draft| match &draft.source {
            Source::Expression(expression, written, setting) => expression
                .sizes()
                .map(|(size, at)| {
                    let place = match setting {
                        Some(_) => draft.entry.key_span(),
                        None => written.span(at),
                    };
                    (size, place)
                })
                .collect(),
            _ => Vec::new(),
        })
        .collect();
    let mut state = vec![State::New; drafts.len()];
    let mut order = Vec::with_capacity(drafts.len());
    let mut in_circle = vec![false; drafts.len()];
    for root in 0..drafts.len() {
        if state[root] != State::New {
            continue;
        }
        // A stack of its own, since a chain of sizes may be longer than the program's.
        let mut path: Vec<(usize, usize)> = vec![(root, 0)];
        state[root] = State::Open;
        while let Some((size, next)) = path.last_mut() {
            let size = *size;
            let Some((needed, _)) = needs[size].get(*next) else {
                state[size] = State::Done;
                path.pop();
                order.push(size);
                continue;
            };
            *next += 1;
            match state[*needed] {
                State::New => {
                    state[*needed] = State::Open;
                    path.push((*needed, 0));
                }
                State::Done => {}
                State::Open => {
                    let from = path
                        .iter()
                        .position(|(open, _)| open == needed)
                        .unwrap_or_default();
                    let circle = &path[from..];
                    for (size, _) in circle {
                        in_circle[*size] = true;
                    }
                    found.push(circle_fault(drafts, &needs, circle));
                }
            }
        }
    }
    order.retain(|&size| !in_circle[size]);
    order
}

fn circle_fault(
    drafts: &[Draft<'_, '_>],
    needs: &[Vec<(usize, Span)>],
    circle: &[(usize, usize)],
) -> Fault {
    const NAMED: usize = 12;
    const SHOWN: usize = 4;
    let name = |size: usize| shown(&drafts[size].entry.key);
    let mut names: Vec<String> = circle
        .iter()
        .take(NAMED)
        .map(|&(size, _)| name(size))
        .collect();
    if circle.len() > NAMED {
        names.push("…".to_owned());
    }
    names.extend(circle.first().map(|&(size, _)| name(size)));
    let mut places = circle.iter().filter_map(|&(size, next)| {
        let (needed, span) = needs[size].get(next.checked_sub(1)?)?;
        Some((size, *needed, span.clone()))
    });
    let first = places.next();
    let mut fault = match first {
        Some((size, _, span)) if circle.len() == 1 => Fault::new(
            "size::circle",
            format!("the size `{}` needs itself", name(size)),
            span,
            "",
        ),
        Some((size, needed, span)) => Fault::new(
            "size::circle",
            format!("sizes need each other in a circle: {}", names.join(" → ")),
            span,
            format!("{} needs {}", name(size), name(needed)),
        ),
        None => Fault::new(
            "size::circle",
            "sizes need each other in a circle",
            0..0,
            "",
        ),
    };
    for (size, needed, span) in places.take(SHOWN) {
        fault = fault.also(span, format!("{} needs {}", name(size), name(needed)));
    }
    fault.help("give one of them a number")
}
