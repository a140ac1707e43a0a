//! STL: loose facets, f32, no unit of its own. As bytes and as text.

pub(crate) mod binary;
pub(crate) mod text;

use glam::DVec3;

/// A facet with the unit normal of its own rounded corners; zero where they lie on a line.
fn facet(corners: [[f32; 3]; 3]) -> stl_io::Triangle {
    let [a, b, c] = corners.map(|p| glam::Vec3::from_array(p).as_dvec3());
    let normal = (b - a).cross(c - a).normalize_or_zero();
    stl_io::Triangle {
        normal: stl_io::Normal::new((normal.as_vec3() + glam::Vec3::ZERO).to_array()),
        vertices: corners.map(stl_io::Vertex::new),
    }
}

/// A corner as an STL in units of `unit` metres holds it, in metres.
pub fn rounded(position: DVec3, unit: f64) -> DVec3 {
    (position / unit).as_vec3().as_dvec3() * unit
}
