//! Signed area of loops.

use crate::{Bounds, Edge, Loop, trig};

impl Loop {
    /// Area enclosed, m2: positive where the loop runs counter-clockwise (r to the right, z up).
    ///
    /// # Accuracy
    /// The polygon of the chords plus what lies between each chord and its edge, about the middle of the corners' box,
    /// summed with compensation: a few units in the last place of the area of the loop's box.
    pub fn signed_area(&self) -> f64 {
        let corners = self
            .edges()
            .iter()
            .map(|edge| Bounds::of_point(edge.start()));
        let origin = corners
            .reduce(Bounds::union)
            .expect("a loop has at least two edges")
            .centre();
        let mut sum = 0.0_f64;
        let mut lost = 0.0_f64;
        for edge in self.edges() {
            let chord = 0.5 * (edge.start() - origin).perp_dot(edge.chord());
            for term in [chord, segment_area(edge)] {
                // Neumaier's compensated sum: what the addition rounds off is kept.
                let next = sum + term;
                lost += if sum.abs() >= term.abs() {
                    (sum - next) + term
                } else {
                    (term - next) + sum
                };
                sum = next;
            }
        }
        sum + lost
    }
}

/// Area between the edge and its chord, m2: positive where the edge runs on the right of the chord.
pub(crate) fn segment_area(edge: &Edge) -> f64 {
    match edge {
        Edge::Line(_) => 0.0,
        Edge::Arc(arc) => {
            // R2 (sweep - sin sweep) / 2 with R = chord / (2 sin(sweep / 2)).
            let s = trig::sin(0.5 * arc.sweep);
            arc.chord().length_squared() * less_sine(arc.sweep) / (8.0 * s * s)
        }
        Edge::Ellipse(ellipse) => {
            // The image of a unit circle's segment.
            0.5 * ellipse.axis_a.perp_dot(ellipse.axis_b) * less_sine(ellipse.sweep)
        }
        Edge::Bezier(bezier) => {
            // Half the integral of P x P' about the start: products of Bernstein polynomials, integrated.
            let [start, b, c, d] = bezier.points;
            let (b, c, d) = (b - start, c - start, d - start);
            (3.0 * (b.perp_dot(c) + b.perp_dot(d)) + 6.0 * c.perp_dot(d)) / 20.0
        }
        Edge::Parallel(parallel) => {
            // No closed form: half the integral of P x P' about the start.
            let element =
                |t| 0.5 * (parallel.point(t) - parallel.start).perp_dot(parallel.derivative(t));
            let size = parallel.bounds().size();
            integral(&element, [0.0, 1.0], size.x * size.y)
        }
    }
}

/// `angle` - sin(`angle`), without cancellation for small angles.
fn less_sine(angle: f64) -> f64 {
    if angle.abs() >= 1.0 {
        return angle - trig::sin(angle);
    }
    // The sine's power series without its first term; the next factor would add less than 1e-17 of the sum.
    let square = angle * angle;
    let series = [272.0, 210.0, 156.0, 110.0, 72.0, 42.0, 20.0]
        .into_iter()
        .fold(1.0, |tail, factor| 1.0 - square / factor * tail);
    angle * square / 6.0 * series
}

/// Nodes and weights of the Gauss-Legendre rule of ten points on [-1, 1], the positive half (Abramowitz and Stegun 1964,
/// table 25.4).
const GAUSS_10: [(f64, f64); 5] = [
    (0.148_874_338_981_631_21, 0.295_524_224_714_752_87),
    (0.433_395_394_129_247_2, 0.269_266_719_309_996_36),
    (0.679_409_568_299_024_4, 0.219_086_362_515_982_04),
    (0.865_063_366_688_984_5, 0.149_451_349_150_580_6),
    (0.973_906_528_517_171_7, 0.066_671_344_308_688_14),
];

/// Integral of `f` over the interval: halved until a half's rule and its quarters' agree to 1e-15 of `scale`, at most
/// sixteen times.
fn integral(f: &impl Fn(f64) -> f64, interval: [f64; 2], scale: f64) -> f64 {
    fn refined(
        f: &impl Fn(f64) -> f64,
        [from, to]: [f64; 2],
        coarse: f64,
        least: f64,
        depth: u32,
    ) -> f64 {
        let middle = 0.5 * (from + to);
        let (left, right) = (gauss(f, [from, middle]), gauss(f, [middle, to]));
        if depth == 0 || (left + right - coarse).abs() <= least {
            return left + right;
        }
        refined(f, [from, middle], left, least, depth - 1)
            + refined(f, [middle, to], right, least, depth - 1)
    }
    refined(f, interval, gauss(f, interval), 1e-15 * scale, 16)
}

/// The ten-point rule over one interval.
fn gauss(f: &impl Fn(f64) -> f64, [from, to]: [f64; 2]) -> f64 {
    let (middle, half) = (0.5 * (from + to), 0.5 * (to - from));
    let pair = |(x, weight): (f64, f64)| weight * (f(middle - half * x) + f(middle + half * x));
    half * GAUSS_10.into_iter().map(pair).sum::<f64>()
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::samples::{rays, star};
    use crate::{Arc, Bezier, DVec2};
    use proptest::prelude::*;
    use std::f64::consts::{FRAC_PI_2, PI};

    fn closed(edges: Vec<Edge>) -> Loop {
        Loop::new(edges.into_iter().map(|edge| (edge, 0))).unwrap()
    }

    fn close(found: f64, expected: f64, relative: f64) {
        assert!(
            (found - expected).abs() <= relative * expected.abs(),
            "{found} {expected}"
        );
    }

    #[test]
    fn two_half_turns_are_a_circle() {
        let (a, b) = (DVec2::new(49.0, 7.0), DVec2::new(51.0, 7.0));
        let half = |start, end| {
            Edge::Arc(Arc {
                start,
                end,
                sweep: PI,
            })
        };
        close(
            closed(vec![half(a, b), half(b, a)]).signed_area(),
            PI,
            1e-15,
        );
        close(
            closed(vec![half(a, b), half(b, a)])
                .reversed()
                .signed_area(),
            -PI,
            1e-15,
        );
    }

    #[test]
    fn a_flat_arc_keeps_its_digits() {
        // Between a chord of 2 and an arc of a millionth of a turn: 2/3 of chord times sagitta, less a 1e-13th.
        let sweep = 2e-6 * PI;
        let arc = Edge::Arc(Arc {
            start: DVec2::new(1.0, 0.0),
            end: DVec2::new(3.0, 0.0),
            sweep,
        });
        let sagitta = 1.0 * trig::tan(0.25 * sweep);
        let relative = segment_area(&arc) / (2.0 / 3.0 * 2.0 * sagitta);
        assert!((relative - 1.0).abs() < 1e-11, "{relative}");
        // The series against the plain difference where both are good.
        for angle in [0.9, 0.99, 0.999_999] {
            close(less_sine(angle), angle - trig::sin(angle), 2e-15);
        }
    }

    #[test]
    fn ellipse_parabola_and_parallel_against_closed_forms() {
        let corner = DVec2::new(1.0, 1.0);
        let (a, b) = (DVec2::new(4.0, 1.0), DVec2::new(1.0, 3.0));
        let quarter = crate::EllipseArc::quarter(a, b, false);
        let pie = closed(vec![
            Edge::line(corner, a),
            Edge::Ellipse(quarter),
            Edge::line(b, corner),
        ]);
        close(pie.signed_area(), 0.25 * PI * 3.0 * 2.0, 1e-15);
        // Under a parabola: 2/3 of chord times height.
        let arch = Bezier::parabola(a, DVec2::new(2.5, 5.0), DVec2::new(1.0, 1.0));
        let arch = closed(vec![Edge::line(corner, a), Edge::Bezier(arch)]);
        close(arch.signed_area(), 2.0 / 3.0 * 3.0 * 2.0, 1e-15);
        // A circle as an ellipse, and a parallel to it: a larger circle.
        let circle = |from: f64| crate::EllipseArc {
            start: DVec2::new(5.0, 5.0) + trig::direction(from),
            end: DVec2::new(5.0, 5.0) + trig::direction(from + FRAC_PI_2),
            axis_a: DVec2::X,
            axis_b: DVec2::Y,
            from,
            sweep: FRAC_PI_2,
        };
        let beside = crate::Parallel::new(crate::Base::Ellipse(circle(0.4)), -0.5);
        let chord = beside.end - beside.start;
        close(
            segment_area(&Edge::Parallel(beside)),
            0.25 * PI * 2.25 - 0.25 * chord.length_squared(),
            1e-14,
        );
    }

    #[test]
    fn the_rule_of_ten_points_is_exact_to_degree_nineteen() {
        let power = |t: f64| (0..19).fold(1.0, |product, _| product * t);
        close(gauss(&power, [0.0, 1.0]), 1.0 / 20.0, 1e-14);
        let power = |t: f64| (0..18).fold(1.0, |product, _| product * t);
        close(gauss(&power, [0.0, 1.0]), 1.0 / 19.0, 1e-14);
    }

    proptest! {
        #![proptest_config(ProptestConfig::with_cases(32))]

        #[test]
        fn area_of_a_star_is_that_of_a_fine_polygon(rays in rays()) {
            let outline = star(&rays, DVec2::new(30.0, -4.0), 2.0);
            let points: Vec<DVec2> = outline
                .edges()
                .iter()
                .flat_map(|edge| (0..2000).map(|i| edge.point(f64::from(i) / 2000.0)))
                .collect();
            let origin = points[0];
            let polygon: f64 = (0..points.len())
                .map(|i| {
                    let next = points[(i + 1) % points.len()];
                    0.5 * (points[i] - origin).perp_dot(next - origin)
                })
                .sum();
            // A chord of an edge cut in 2000 misses a 2000^-2 part of what lies between it and the edge.
            let area = outline.signed_area();
            prop_assert!((area - polygon).abs() < 1e-6 * area, "{area} {polygon}");
        }

        #[test]
        fn running_the_other_way_or_from_another_start_keeps_the_area(rays in rays(), start in 0_usize..7) {
            let outline = star(&rays, DVec2::new(30.0, -4.0), 2.0);
            let area = outline.signed_area();
            let edges = outline.edges();
            let rotated = closed(edges[start..].iter().chain(&edges[..start]).copied().collect());
            prop_assert!((outline.reversed().signed_area() + area).abs() <= 1e-14 * area);
            prop_assert!((rotated.signed_area() - area).abs() <= 1e-14 * area);
        }
    }
}
