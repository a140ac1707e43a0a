//! Is a mesh the boundary of a solid? Asked of its triangles' indices alone, in time linear in their number.

use crate::Triangles;

/// What an audit found. Counts are of undirected edges and of triangles.
#[derive(Debug, Clone, Copy, Default, PartialEq, Eq)]
pub struct Audit {
    /// Triangles looked at.
    pub triangles: usize,
    /// Pieces that hang together by shared corners.
    pub components: usize,
    /// Pieces whose volume is negative: cavities, or pieces inside out.
    pub inverted_components: usize,
    /// Edges with one triangle.
    pub boundary_edges: usize,
    /// Edges with more than two triangles.
    pub nonmanifold_edges: usize,
    /// Edges whose triangles run along them the same way.
    pub flipped_edges: usize,
    /// Triangles with a corner twice, or of no area against their own edges.
    pub degenerate_triangles: usize,
    /// Triangles whose three corners another one has too; each further one counts.
    pub duplicate_triangles: usize,
    /// Corners that no triangle uses.
    pub unreferenced_vertices: usize,
    /// True where the signed volume of the whole is positive.
    pub outward: bool,
}

impl Audit {
    /// Every edge has a triangle on each side.
    pub fn is_closed(&self) -> bool {
        self.triangles > 0 && self.boundary_edges == 0
    }

    /// No edge has more than two triangles and none stands twice.
    pub fn is_manifold(&self) -> bool {
        self.is_closed() && self.nonmanifold_edges == 0 && self.duplicate_triangles == 0
    }

    /// Neighbours agree on which side is outside.
    pub fn is_oriented(&self) -> bool {
        self.flipped_edges == 0
    }

    /// Nothing at all is wrong.
    pub fn is_sound(&self) -> bool {
        self.is_manifold()
            && self.is_oriented()
            && self.outward
            && self.degenerate_triangles == 0
            && self.unreferenced_vertices == 0
    }
}

/// A directed edge of a triangle: the other corner, and whether it runs up from the corner it is filed under.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
struct Filed {
    other: u32,
    upward: bool,
}

/// Audits a mesh whose indices are in range.
pub fn audit(mesh: Triangles) -> Audit {
    let corners = mesh.positions.len();
    let mut found = Audit {
        triangles: mesh.triangles.len(),
        ..Audit::default()
    };
    let mut used = vec![false; corners];
    for &triangle in mesh.triangles {
        for i in triangle {
            used[i as usize] = true;
        }
        found.degenerate_triangles += usize::from(is_degenerate(mesh, triangle));
    }
    found.unreferenced_vertices = used.iter().filter(|used| !**used).count();
    count_edges(mesh, &mut found);
    found.duplicate_triangles = duplicates(mesh);
    count_components(mesh, &mut found);
    found
}

/// Height over the longest edge, as a share of it, below which a triangle has no area: f64 cannot tell its direction.
const FLAT: f64 = 1e-15;

fn is_degenerate(mesh: Triangles, [i, j, k]: [u32; 3]) -> bool {
    if i == j || j == k || k == i {
        return true;
    }
    let [a, b, c] = mesh.corners([i, j, k]);
    let longest = a
        .distance_squared(b)
        .max(b.distance_squared(c))
        .max(c.distance_squared(a));
    (b - a).cross(c - a).length() <= FLAT * longest
}

/// Groups items by a key below `keys` in linear time: where each key's items start, and the items.
fn grouped<T: Copy>(
    keys: usize,
    empty: T,
    items: impl Fn(&mut dyn FnMut(u32, T)),
) -> (Vec<usize>, Vec<T>) {
    let mut starts = vec![0_usize; keys + 1];
    items(&mut |key, _| starts[key as usize + 1] += 1);
    for i in 0..keys {
        starts[i + 1] += starts[i];
    }
    let mut next = starts.clone();
    let mut sorted = vec![empty; starts[keys]];
    items(&mut |key, item| {
        let place = &mut next[key as usize];
        sorted[*place] = item;
        *place += 1;
    });
    (starts, sorted)
}

/// Files every directed edge under its lower corner and looks at each undirected edge's set.
fn count_edges(mesh: Triangles, found: &mut Audit) {
    let empty = Filed {
        other: 0,
        upward: false,
    };
    let (starts, mut edges) = grouped(mesh.positions.len(), empty, |file| {
        for [i, j, k] in mesh.triangles {
            for (from, to) in [(*i, *j), (*j, *k), (*k, *i)] {
                if from != to {
                    file(
                        from.min(to),
                        Filed {
                            other: from.max(to),
                            upward: from < to,
                        },
                    );
                }
            }
        }
    });
    for pair in starts.windows(2) {
        let group = &mut edges[pair[0]..pair[1]];
        group.sort_unstable();
        for edge in group.chunk_by(|a, b| a.other == b.other) {
            let up = edge.iter().filter(|filed| filed.upward).count();
            match edge.len() {
                1 => found.boundary_edges += 1,
                2 => found.flipped_edges += usize::from(up != 1),
                more => {
                    found.nonmanifold_edges += 1;
                    found.flipped_edges += usize::from(2 * up != more);
                }
            }
        }
    }
}

fn duplicates(mesh: Triangles) -> usize {
    let (starts, mut others) = grouped(mesh.positions.len(), [0_u32; 2], |file| {
        for triangle in mesh.triangles {
            let mut sorted = *triangle;
            sorted.sort_unstable();
            file(sorted[0], [sorted[1], sorted[2]]);
        }
    });
    let mut count = 0;
    for pair in starts.windows(2) {
        let group = &mut others[pair[0]..pair[1]];
        group.sort_unstable();
        count += group.windows(2).filter(|two| two[0] == two[1]).count();
    }
    count
}

/// Pieces by union of the triangles' corners, and each piece's signed volume about its own first corner's neighbourhood.
fn count_components(mesh: Triangles, found: &mut Audit) {
    let mut parent: Vec<u32> =
        (0..u32::try_from(mesh.positions.len()).unwrap_or(u32::MAX)).collect();
    for [i, j, k] in mesh.triangles {
        let root = find(&mut parent, *i);
        for other in [*j, *k] {
            let other = find(&mut parent, other);
            parent[other.max(root) as usize] = other.min(root);
            parent[root as usize] = other.min(root);
        }
    }
    let middle = mesh
        .bounds()
        .map_or(glam::DVec3::ZERO, |(low, high)| 0.5 * (low + high));
    let mut volumes = vec![0.0_f64; mesh.positions.len()];
    let mut is_piece = vec![false; mesh.positions.len()];
    for triangle in mesh.triangles {
        let root = find(&mut parent, triangle[0]) as usize;
        let [a, b, c] = mesh.corners(*triangle).map(|p| p - middle);
        volumes[root] += a.dot((b - a).cross(c - a));
        is_piece[root] = true;
    }
    let pieces = || {
        volumes
            .iter()
            .zip(&is_piece)
            .filter(|(_, is)| **is)
            .map(|(volume, _)| *volume)
    };
    found.components = pieces().count();
    found.inverted_components = pieces().filter(|volume| *volume < 0.0).count();
    found.outward = pieces().sum::<f64>() > 0.0;
}

/// The lowest corner of a piece, with the path to it halved on the way.
fn find(parent: &mut [u32], mut i: u32) -> u32 {
    while parent[i as usize] != i {
        parent[i as usize] = parent[parent[i as usize] as usize];
        i = parent[i as usize];
    }
    i
}
