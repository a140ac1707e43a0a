//! The closed forms and the general way tell the same.

use super::super::contact::Contacts;
use super::super::{Meeting, graphs, meetings};
use super::random::{elliptic_edge, simple_edge};
use super::v;
use crate::Edge;
use proptest::prelude::*;

/// The meetings as if there were no closed forms.
fn general(a: &Edge, b: &Edge, within: f64) -> Vec<Meeting> {
    let mut found = Contacts::default();
    graphs::contacts(a, b, within, &mut found);
    found.into_meetings(a, b, within)
}

/// Pairs that have a closed form.
fn pair() -> impl Strategy<Value = (Edge, Edge)> {
    prop_oneof![
        (simple_edge(), simple_edge()),
        (elliptic_edge(), simple_edge()).prop_filter("a line", |(_, b)| matches!(b, Edge::Line(_))),
    ]
}

fn assert_same(a: &Edge, b: &Edge, accuracy: f64) -> Result<(), TestCaseError> {
    let within = 1e-12;
    let (closed, general) = (meetings(a, b, within), general(a, b, within));
    prop_assert_eq!(
        closed.len(),
        general.len(),
        "{:?}\n{:?}\n{:?}\n{:?}",
        a,
        b,
        closed,
        general
    );
    for (p, q) in closed.iter().zip(&general) {
        let (
            Meeting::Point {
                point: p,
                crossing: c,
                ..
            },
            Meeting::Point {
                point: q,
                crossing: d,
                ..
            },
        ) = (p, q)
        else {
            return Err(TestCaseError::fail(format!("{closed:?} {general:?}")));
        };
        prop_assert!(
            p.distance(*q) <= accuracy && c == d,
            "{closed:?} {general:?}"
        );
    }
    Ok(())
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 1000, ..ProptestConfig::default() })]

    #[test]
    fn anywhere((a, b) in pair()) {
        assert_same(&a, &b, 1e-9)?;
    }

    /// Small edges ten metres out: the digits that are left of the coordinates are kept.
    #[test]
    fn small_and_far_away((a, b) in pair(), size in 1e-5..1e-2_f64) {
        let place = |edge: &Edge| {
            let far = v(10.0, 7.0);
            let scaled = |p: crate::DVec2| p * size + far;
            match *edge {
                Edge::Ellipse(e) => Edge::Ellipse(crate::EllipseArc {
                    start: scaled(e.start),
                    end: scaled(e.end),
                    axis_a: e.axis_a * size,
                    axis_b: e.axis_b * size,
                    ..e
                }),
                other => other.with_ends(scaled(other.start()), scaled(other.end())),
            }
        };
        assert_same(&place(&a), &place(&b), 1e-9)?;
    }
}
