//! Outlines from SVG and CSV files.

use crate::{arc, assert_close, assert_near, at, edges, part_of};
use profile::Edge;
use std::f64::consts::{FRAC_PI_2, PI};

const ROOT: &str = "xmlns=\"http://www.w3.org/2000/svg\" width=\"4000mm\" viewBox=\"0 0 4 4\"";

/// The edges of the shape `shape` in a drawing whose unit is a metre; `keys` are further keys of the outline.
fn drawn_with(shape: &str, keys: &str) -> Vec<Edge> {
    let svg = format!("<svg {ROOT}>{shape}</svg>");
    let section = format!("outline = {{ svg = \"s.svg\"{keys} }}");
    let part = part_of(&section, &[("s.svg", &svg)]);
    part.bodies[0].region.outer().edges().to_vec()
}

fn drawn(shape: &str) -> Vec<Edge> {
    drawn_with(shape, "")
}

#[test]
fn y_runs_down_and_z_up() {
    // Clockwise on the page is clockwise in (r, z), so the region runs the other way round.
    let edges = drawn("<path d='M1 0 L1 -2 h2 v2 z'/>");
    let mut corners: Vec<(f64, f64)> = edges.iter().map(|e| (e.start().x, e.start().y)).collect();
    corners.sort_by(|a, b| a.partial_cmp(b).unwrap());
    assert_eq!(corners, [(1.0, 0.0), (1.0, 2.0), (3.0, 0.0), (3.0, 2.0)]);
}

#[test]
fn arcs_of_circles_stay_arcs_exactly() {
    // Counter-clockwise on the page (sweep 0) is counter-clockwise in (r, z).
    let edges = drawn("<path d='M2 0 A 1 1 0 0 0 3 -1 V-3 H2 z'/>");
    let arc = arc(&edges[0]);
    assert_eq!((arc.start, arc.end), (at(2.0, 0.0), at(3.0, 1.0)));
    assert_close(arc.sweep, FRAC_PI_2);
    assert_near(arc.centre(), at(2.0, 1.0));
}

#[test]
fn large_arcs_are_two_edges() {
    let edges = drawn("<path d='M2 0 A 1 1 0 1 0 3 -1 z'/>");
    assert_eq!(edges.len(), 3);
    for half in &edges[..2] {
        assert_close(arc(half).sweep, 0.75 * PI);
        assert_near(arc(half).centre(), at(3.0, 0.0));
    }
}

#[test]
fn radii_that_are_too_small_grow_to_half_a_turn() {
    for radius in [0.5, 0.75, 1.0] {
        let edges = drawn(&format!(
            "<path d='M2 0 A {radius} {radius} 0 0 0 2 -2 z'/>"
        ));
        assert_eq!(arc(&edges[0]).sweep, PI);
    }
    let edges = drawn("<path d='M2 0 A 0.25 0.5 0 0 0 2 -2 z'/>");
    let Edge::Ellipse(ellipse) = edges[0] else {
        panic!("{:?}", edges[0]);
    };
    assert_near(ellipse.point(0.5), at(2.5, 1.0));
}

#[test]
fn elliptic_arcs_stay_ellipses() {
    // A quarter of the ellipse with half axes 2 and 1 about (1, -1) on the page.
    let edges = drawn("<path d='M1 0 A 2 1 0 0 0 3 -1 V-3 H1 z'/>");
    let Edge::Ellipse(ellipse) = edges[0] else {
        panic!("{:?}", edges[0]);
    };
    assert_near(ellipse.centre(), at(1.0, 1.0));
    assert_near(
        ellipse.point(0.5),
        at(1.0 + 2.0 * 0.5_f64.sqrt(), 1.0 - 0.5_f64.sqrt()),
    );
    // Turned by a right angle and with its axes exchanged it is the same ellipse.
    let turned = drawn("<path d='M1 0 A 1 2 90 0 0 3 -1 V-3 H1 z'/>");
    assert_near(turned[0].point(0.5), ellipse.point(0.5));
}

#[test]
fn a_turned_ellipse_passes_its_vertices() {
    // Half axes 2 and 1 turned by 30 degrees about (3, -3) on the page: from one end of the long axis to the other.
    let (c, s) = (3.0_f64.sqrt() / 2.0, 0.5);
    let [x0, y0, x1, y1] = [3.0 - 2.0 * c, -3.0 - 2.0 * s, 3.0 + 2.0 * c, -3.0 + 2.0 * s];
    let edges = drawn(&format!("<path d='M{x0} {y0} A 2 1 30 0 0 {x1} {y1} z'/>"));
    // Half way is an end of the short axis, below the chord on the page for sweep 0.
    assert_near(edges[0].point(0.5), at(3.0 - s, 3.0 - c));
}

#[test]
fn curves_are_the_same_cubics_and_parabolas() {
    let smooth = drawn("<path d='M1 0 c1 0 1 -0.5 1 -1 s0 -1 1 -1 h-2 z'/>");
    let plain = drawn("<path d='M1 0 C2 0 2 -0.5 2 -1 C2 -1.5 2 -2 3 -2 H1 z'/>");
    assert_eq!(smooth, plain);
    let smooth = drawn("<path d='M1 0 Q2 0 2 -1 T3 -2 H1 z'/>");
    let plain = drawn("<path d='M1 0 Q2 0 2 -1 Q2 -2 3 -2 H1 z'/>");
    assert_eq!(smooth, plain);
    // (1, 0), (2, 0), (2, 1) at half the parameter.
    assert_near(plain[0].point(0.5), at(1.75, 0.25));
}

#[test]
fn transforms_are_applied_from_the_inside_out() {
    let edges = drawn(
        "<g transform='translate(2 -1)'><path transform='rotate(-90) scale(2)' d='M0 0 A .5 .5 0 0 1 .5 .5 h-.5 z'/></g>",
    );
    // A quarter of radius 1: (0, 0) to (0.5, 0.5) on the page, doubled, turned up to the right, moved.
    let arcs: Vec<_> = edges
        .iter()
        .filter(|edge| matches!(edge, Edge::Arc(_)))
        .collect();
    assert_eq!(arcs.len(), 1);
    assert_close(arc(arcs[0]).radius(), 1.0);
    let ends = [arcs[0].start(), arcs[0].end()];
    assert!(
        ends.iter()
            .any(|end| (*end - at(2.0, 1.0)).length() < 1e-15)
    );
    assert!(
        ends.iter()
            .any(|end| (*end - at(3.0, 2.0)).length() < 1e-15)
    );
}

#[test]
fn a_circle_under_an_uneven_scale_is_an_ellipse() {
    let edges = drawn("<circle transform='scale(1 2)' cx='2' cy='-1' r='0.5'/>");
    assert!(edges.iter().all(|edge| matches!(edge, Edge::Ellipse(_))));
    let top = edges
        .iter()
        .map(|edge| edge.bounds().max.y)
        .fold(0.0, f64::max);
    assert_close(top, 3.0);
    // And back again by another one.
    let edges = drawn(
        "<g transform='scale(1 .5)'><circle transform='scale(1 2)' cx='2' cy='-1' r='0.5'/></g>",
    );
    assert!(edges.iter().all(|edge| matches!(edge, Edge::Arc(_))));
}

#[test]
fn basic_shapes() {
    let rect = drawn("<rect x='1' y='-2' width='2' height='1'/>");
    assert_eq!(rect.len(), 4);
    let rounded = drawn("<rect x='1' y='-2' width='2' height='1' rx='.25'/>");
    assert_eq!(rounded.len(), 8);
    let radii: Vec<f64> = rounded
        .iter()
        .filter(|e| matches!(e, Edge::Arc(_)))
        .map(|e| arc(e).radius())
        .collect();
    assert_eq!(radii.len(), 4);
    for radius in radii {
        assert_close(radius, 0.25);
    }
    let pill = drawn("<rect x='1' y='-2' width='2' height='1' rx='.5'/>");
    assert_eq!(pill.len(), 6);
    let circle = drawn("<circle cx='2' cy='-1' r='0.5'/>");
    assert_eq!(circle.len(), 2);
    assert_near(arc(&circle[0]).centre(), at(2.0, 1.0));
    let ellipse = drawn("<ellipse cx='2' cy='-1' rx='0.5' ry='0.25'/>");
    assert!(matches!(ellipse[..], [Edge::Ellipse(_), Edge::Ellipse(_)]));
    let polygon = drawn("<polygon points='1,0 3,0 3,-1'/>");
    assert_eq!(polygon.len(), 3);
    assert_eq!(drawn("<polyline points='1,0 3,0 3,-1'/>"), polygon);
}

#[test]
fn the_axis_may_stand_elsewhere_and_the_section_on_its_left() {
    let right = drawn("<path d='M1 0 h2 v-1 z'/>");
    let moved = drawn_with("<path d='M11 0 h2 v-1 z'/>", ", axis_x = 10");
    let left = drawn_with("<path d='M9 0 h-2 v-1 z'/>", ", axis_x = 10");
    let corners = |edges: &[Edge]| {
        let mut all: Vec<(f64, f64)> = edges.iter().map(|e| (e.start().x, e.start().y)).collect();
        all.sort_by(|a, b| a.partial_cmp(b).unwrap());
        all
    };
    assert_eq!(corners(&right), corners(&moved));
    assert_eq!(corners(&right), corners(&left));
}

#[test]
fn a_unit_has_the_drawing_s_size_or_the_given_one() {
    let width = |root: &str, keys: &str| {
        let svg = format!("<svg {root}><path d='M1 0 h2 v-1 z'/></svg>");
        let section = format!("outline = {{ svg = \"s.svg\"{keys} }}");
        let part = part_of(&section, &[("s.svg", &svg)]);
        part.bodies[0].region.bounds().size().x
    };
    assert_close(
        width("width='60mm' height='100mm' viewBox='0 0 60 100'", ""),
        0.002,
    );
    assert_close(width("height='10cm' viewBox='0 0 60 100'", ""), 0.002);
    assert_close(width("width='1in' viewBox='0 0 1 1'", ""), 0.0508);
    assert_close(width("width='72pt' viewBox='0 0 1 1'", ""), 0.0508);
    assert_close(width("width='6pc' viewBox='0 0 1 1'", ""), 0.0508);
    // Without a viewBox a unit is 1/96 inch.
    assert_close(width("width='60mm'", ""), 2.0 * 0.0254 / 96.0);
    assert_close(width("", ", scale = 0.5"), 1.0);
    assert_close(
        width("width='60mm' viewBox='0 0 60 100'", ", scale = 1"),
        2.0,
    );
}

#[test]
fn a_shape_is_found_by_its_id_or_as_the_only_one() {
    let shapes = "<defs><path id='grid' d='M0 0 h1'/></defs><path id='a' d='M1 0 h1 v-1 z'/>";
    assert_eq!(drawn(shapes).len(), 3);
    let two = format!("{shapes}<path id='b' d='M1 0 h1 v-1 h-1 z'/>");
    assert_eq!(drawn_with(&two, ", id = \"b\"").len(), 4);
    let prefixed = "<s:svg xmlns:s='http://www.w3.org/2000/svg' width='1mm' viewBox='0 0 1 1'><s:path d='M1 0 h1 v-1 z'/><path d='M0 0'/></s:svg>";
    let part = part_of("outline = { svg = \"s.svg\" }", &[("s.svg", prefixed)]);
    assert_eq!(part.bodies[0].region.outer().edges().len(), 3);
}

#[test]
fn pieces_without_length_are_left_out_and_an_open_path_is_closed() {
    let edges = drawn("<path d='M1 0 L1 0 h2 h0 v-1 M9 9'/>");
    assert_eq!(edges.len(), 3);
}

#[test]
fn relative_commands_close_to_rounding() {
    // Ten times 0.1 is not 1 in binary.
    let edges =
        drawn("<path d='M1 0 h1 v-1 h-.1 h-.1 h-.1 h-.1 h-.1 h-.1 h-.1 h-.1 h-.1 h-.1 v1 z'/>");
    assert_eq!(edges.len(), 13);
}

#[test]
fn stations_are_the_steps_of_straight_edges() {
    let steps = edges("[ { r = 1, z = 0 }, { r = 3 }, { r = 2.5, z = 1.25 }, { r = 1 } ]");
    for csv in [
        "r,z\n1,0\n3,0\n2.5,1.25\n1,1.25\n",
        "d;z\n2;0\n6;0\n5;1.25\n2;1.25\n",
        "z\td\n0\t2\n0\t6\n1.25\t5\n1.25\t2\n",
        "# measured on the old one\n\u{20}R , Z\n1, 0\n\n# shoulder\n3, 0\n2.5, 1.25\n1, 1.25\n1, 0\n",
        "\u{feff}\"r\",\"z\"\r\n1,0\r\n3,0\r\n2.5,1.25\r\n1,1.25\r\n,\r\n",
    ] {
        let part = part_of("outline = { csv = \"s.csv\" }", &[("s.csv", csv)]);
        assert_eq!(part.bodies[0].region.outer().edges(), steps, "{csv}");
    }
}

#[test]
fn stations_know_their_lines() {
    let csv = "# old one\nr,z\n1,0\n3,0\n\n# bent\n2.5,1.25\n";
    let part = part_of("outline = { csv = \"s.csv\" }", &[("s.csv", csv)]);
    let words: Vec<&str> = part.bodies[0]
        .steps
        .iter()
        .map(|step| &*step.words)
        .collect();
    assert_eq!(
        words,
        [
            "outline, the edge to the station on line 4",
            "outline, the edge to the station on line 7",
            "outline, the closing edge",
        ]
    );
}
