//! The two end caps of a part turn: the section triangulated on the rings' own corners.

use crate::MeshError;
use profile::DVec2;
use spade::{ConstrainedDelaunayTriangulation, Point2, Triangulation};

/// Triangles of the section bounded by `loops` (outer counter-clockwise, voids clockwise), by the corners' numbers in
/// order of the loops, counter-clockwise (r to the right, z up). No corner is added.
///
/// # Errors
/// Loops that cross or touch each other.
pub(crate) fn triangulate(loops: &[Vec<DVec2>]) -> Result<Vec<[u32; 3]>, MeshError> {
    let corners: Vec<Point2<f64>> = loops
        .iter()
        .flatten()
        .map(|p| Point2::new(p.x, p.y))
        .collect();
    let mut edges = Vec::with_capacity(corners.len());
    let mut first = 0;
    for l in loops {
        edges.extend((0..l.len()).map(|i| [first + i, first + (i + 1) % l.len()]));
        first += l.len();
    }
    let cdt =
        ConstrainedDelaunayTriangulation::<Point2<f64>>::bulk_load_cdt(corners, edges.clone())
            .map_err(|source| MeshError::Cap {
                why: source.to_string(),
            })?;
    if cdt.num_vertices() != first || cdt.num_constraints() != edges.len() {
        return Err(MeshError::Cap {
            why: "loops touch or cross".to_owned(),
        });
    }
    Ok(inside(&cdt))
}

/// The faces on the inner side of an odd number of constraint edges, found by walking from the outer face.
fn inside(cdt: &ConstrainedDelaunayTriangulation<Point2<f64>>) -> Vec<[u32; 3]> {
    let mut state: Vec<Option<bool>> = vec![None; cdt.num_all_faces()];
    let mut open = vec![cdt.outer_face().fix()];
    state[cdt.outer_face().fix().index()] = Some(false);
    while let Some(face) = open.pop() {
        let is_inside = state[face.index()].unwrap_or(false);
        let borders: Vec<_> = match cdt.face(face).as_inner() {
            Some(inner) => inner.adjacent_edges().to_vec(),
            None => cdt.convex_hull().collect(),
        };
        for edge in borders {
            // The neighbour over the edge; the hull's edges are walked from outside.
            let across = if cdt.face(face).is_outer() && !edge.face().is_outer() {
                edge.face()
            } else {
                edge.rev().face()
            };
            let number = across.fix().index();
            if state[number].is_none() {
                state[number] = Some(is_inside != edge.is_constraint_edge());
                open.push(across.fix());
            }
        }
    }
    cdt.inner_faces()
        .filter(|face| state[face.fix().index()] == Some(true))
        .map(|face| {
            face.vertices()
                .map(|vertex| u32::try_from(vertex.fix().index()).unwrap_or(u32::MAX))
        })
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    fn area(loops: &[Vec<DVec2>], triangles: &[[u32; 3]]) -> f64 {
        let points: Vec<DVec2> = loops.concat();
        triangles
            .iter()
            .map(|t| {
                let [a, b, c] = t.map(|i| points[i as usize]);
                let twice = (b - a).perp_dot(c - a);
                assert!(twice > 0.0);
                0.5 * twice
            })
            .sum()
    }

    #[test]
    fn a_square_with_a_square_hole() {
        let square = |low: f64, high: f64| {
            vec![
                DVec2::new(low, low),
                DVec2::new(high, low),
                DVec2::new(high, high),
                DVec2::new(low, high),
            ]
        };
        let mut hole = square(2.0, 3.0);
        hole.reverse();
        let loops = [square(1.0, 5.0), hole];
        let triangles = triangulate(&loops).unwrap();
        assert_eq!(triangles.len(), 8 + 2 - 2);
        assert!((area(&loops, &triangles) - 15.0).abs() < 1e-12);
    }

    #[test]
    fn a_horseshoe_keeps_its_gap() {
        let loops = [[
            (0., 0.),
            (5., 0.),
            (5., 4.),
            (4., 4.),
            (4., 1.),
            (1., 1.),
            (1., 4.),
            (0., 4.),
        ]
        .map(|(x, y)| DVec2::new(x, y))
        .to_vec()];
        let triangles = triangulate(&loops).unwrap();
        assert_eq!(triangles.len(), 6);
        assert!((area(&loops, &triangles) - 11.0).abs() < 1e-12);
    }
}
