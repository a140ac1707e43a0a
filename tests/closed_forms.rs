//! Closed forms that any mechanics handbook prints: volume, surface, centroid and moments of inertia of the plain bodies.
//!
//! Every body stands off the origin, so that a figure about the wrong point shows. Tolerance: what the project promises,
//! 1e-13 of the figure, and for a place or a matrix entry of its own scale.

use checks::{exact, one_body, ring};
use std::f64::consts::PI;
use strickle::record::Exact;

/// The promised relative accuracy on ordinary parts.
const PROMISED: f64 = 1e-13;

/// What a handbook says of one body with its axis along z.
struct Handbook {
    volume: f64,
    surface: f64,
    /// Station of the centre of mass.
    centre_z: f64,
    /// Moments of inertia over the mass about the axis and, through the centre of mass, across it.
    axial_per_mass: f64,
    across_per_mass: f64,
}

const DENSITY: f64 = 7850.0;

fn compare(what: &str, found: &Exact, book: &Handbook) {
    let near = |name: &str, found: f64, wanted: f64, scale: f64| {
        assert!(
            (found - wanted).abs() <= PROMISED * scale,
            "{what}, {name}: {found:e}, handbook {wanted:e}, off by {:e} of {scale:e}",
            (found - wanted).abs() / scale
        );
    };
    let mass = DENSITY * book.volume;
    near("volume", found.volume, book.volume, book.volume);
    near("surface", found.surface, book.surface, book.surface);
    near("mass", found.mass, mass, mass);
    let extent = found
        .length
        .max(found.largest_diameter)
        .max(book.centre_z.abs());
    for (axis, wanted) in [0.0, 0.0, book.centre_z].into_iter().enumerate() {
        near("centre", found.centre[axis], wanted, extent);
    }
    // Steiner: the entries about the origin hold m z^2 more across the axis.
    let steiner = book.centre_z * book.centre_z;
    let about = |extra: f64| {
        [
            book.across_per_mass + extra,
            book.across_per_mass + extra,
            book.axial_per_mass,
        ]
    };
    for (name, matrix, diagonal) in [
        (
            "inertia about the centre",
            &found.inertia_about_centre,
            about(0.0),
        ),
        (
            "inertia about the origin",
            &found.inertia_about_origin,
            about(steiner),
        ),
    ] {
        let scale = mass * (steiner + book.axial_per_mass + book.across_per_mass);
        for (row, entries) in matrix.iter().enumerate() {
            for (column, &entry) in entries.iter().enumerate() {
                let wanted = if row == column {
                    mass * diagonal[row]
                } else {
                    0.0
                };
                near(name, entry, wanted, scale);
            }
        }
    }
    near(
        "axial inertia",
        found.inertia_about_axis,
        mass * book.axial_per_mass,
        mass * book.axial_per_mass,
    );
}

#[test]
fn solid_cylinder() {
    for (r, h, z) in [(0.03_f64, 0.08_f64, 0.5_f64), (2.0, 0.01, -3.0)] {
        let section = format!(
            "outline = [{{ r = 0, z = {z} }}, {{ r = {r} }}, {{ z = {} }}, {{ r = 0 }}]",
            z + h
        );
        // The printed bounds are decimal; the handbook takes the height that they leave.
        let h = (z + h) - z;
        let book = Handbook {
            volume: PI * r * r * h,
            surface: 2.0 * PI * r * (r + h),
            centre_z: z + h / 2.0,
            axial_per_mass: r * r / 2.0,
            across_per_mass: (3.0 * r * r + h * h) / 12.0,
        };
        compare("cylinder", &exact(&one_body("m", DENSITY, &section)), &book);
    }
}

#[test]
fn hollow_cylinder() {
    let (inside, outside, h) = (0.21_f64, 0.25_f64, 0.6_f64);
    let (a, b) = (inside / 2.0, outside / 2.0);
    let book = Handbook {
        volume: PI * (b * b - a * a) * h,
        surface: 2.0 * PI * ((a + b) * h + b * b - a * a),
        centre_z: h / 2.0,
        axial_per_mass: 0.5 * (a * a + b * b),
        across_per_mass: (3.0 * (a * a + b * b) + h * h) / 12.0,
    };
    compare(
        "hollow cylinder",
        &exact(&ring("m", DENSITY, inside, outside, h)),
        &book,
    );
}

#[test]
fn cone() {
    let (r, h) = (0.4_f64, 1.1_f64);
    let section = format!("outline = [{{ r = 0, z = 0 }}, {{ r = {r} }}, {{ r = 0, z = {h} }}]");
    let book = Handbook {
        volume: PI * r * r * h / 3.0,
        surface: PI * r * (r + (r * r + h * h).sqrt()),
        centre_z: h / 4.0,
        axial_per_mass: 0.3 * r * r,
        across_per_mass: 3.0 / 80.0 * (4.0 * r * r + h * h),
    };
    compare("cone", &exact(&one_body("m", DENSITY, &section)), &book);
}

#[test]
fn frustum() {
    let (big, small, h) = (0.4_f64, 0.15_f64, 0.9_f64);
    let section = format!(
        "outline = [{{ r = 0, z = 0 }}, {{ r = {big} }}, {{ r = {small}, z = {h} }}, {{ r = 0 }}]"
    );
    let power = |x: f64, n: u32| (0..n).fold(1.0, |product, _| product * x);
    let squares = big * big + big * small + small * small;
    // The frustum as the cone on its base less the cone on its top.
    let whole = h * big / (big - small);
    let cut = whole - h;
    let (outer, inner) = (PI * big * big * whole / 3.0, PI * small * small * cut / 3.0);
    let volume = PI * h * squares / 3.0;
    let centre_z = h / 4.0 * (big * big + 2.0 * big * small + 3.0 * small * small) / squares;
    let cone_across = |r: f64, h: f64| 3.0 / 80.0 * (4.0 * r * r + h * h);
    let about_own_centre = |cone_volume: f64, r: f64, length: f64, centre: f64| {
        cone_volume * (cone_across(r, length) + power(centre - centre_z, 2))
    };
    let across = about_own_centre(outer, big, whole, whole / 4.0)
        - about_own_centre(inner, small, cut, h + cut / 4.0);
    let book = Handbook {
        volume,
        surface: PI
            * (big * big + small * small + (big + small) * (h * h + power(big - small, 2)).sqrt()),
        centre_z,
        axial_per_mass: 0.3 * (power(big, 5) - power(small, 5)) / (power(big, 3) - power(small, 3)),
        across_per_mass: across / volume,
    };
    compare("frustum", &exact(&one_body("m", DENSITY, &section)), &book);
}

/// A half circle about (0, z), from its foot to its top.
fn sphere(r: f64, z: f64) -> String {
    format!(
        "outline = [{{ r = 0, z = {} }}, {{ z = {}, centre = {{ r = 0, z = {z} }}, centre_on = \"left\" }}]",
        z - r,
        z + r
    )
}

#[test]
fn whole_sphere() {
    let (r, z) = (0.75_f64, 2.0_f64);
    let book = Handbook {
        volume: 4.0 / 3.0 * PI * r * r * r,
        surface: 4.0 * PI * r * r,
        centre_z: z,
        axial_per_mass: 0.4 * r * r,
        across_per_mass: 0.4 * r * r,
    };
    compare(
        "sphere",
        &exact(&one_body("m", DENSITY, &sphere(r, z))),
        &book,
    );
}

#[test]
fn hemisphere() {
    let r = 0.3_f64;
    let section = format!(
        "outline = [{{ r = 0, z = 0 }}, {{ r = {r} }}, {{ r = 0, z = {r}, centre = {{ r = 0, z = 0 }} }}]"
    );
    let book = Handbook {
        volume: 2.0 / 3.0 * PI * r * r * r,
        surface: 3.0 * PI * r * r,
        centre_z: 3.0 / 8.0 * r,
        axial_per_mass: 0.4 * r * r,
        across_per_mass: 83.0 / 320.0 * r * r,
    };
    compare(
        "hemisphere",
        &exact(&one_body("m", DENSITY, &section)),
        &book,
    );
}

#[test]
fn torus() {
    for (big, small) in [(0.5_f64, 0.06_f64), (0.5, 0.5), (0.125, 0.109_375)] {
        let section = format!("outline = {{ circle = {{ r = {big}, z = 1 }}, radius = {small} }}");
        let book = Handbook {
            volume: 2.0 * PI * PI * big * small * small,
            surface: 4.0 * PI * PI * big * small,
            centre_z: 1.0,
            axial_per_mass: big * big + 0.75 * small * small,
            across_per_mass: big * big / 2.0 + 0.625 * small * small,
        };
        compare("torus", &exact(&one_body("m", DENSITY, &section)), &book);
    }
}

#[test]
fn paraboloid() {
    // Apex up at z = h; the Bezier of one control point is the parabola itself.
    let (r, h) = (0.35_f64, 0.8_f64);
    let section = format!(
        "outline = [{{ r = 0, z = 0 }}, {{ r = {r} }}, {{ r = 0, z = {h}, curve = [{{ r = {}, z = {h} }}] }}]",
        r / 2.0
    );
    let slant = r * r + 4.0 * h * h;
    let book = Handbook {
        volume: PI * r * r * h / 2.0,
        surface: PI * r * r + PI * r / (6.0 * h * h) * (slant * slant.sqrt() - r * r * r),
        centre_z: h / 3.0,
        axial_per_mass: r * r / 3.0,
        across_per_mass: (3.0 * r * r + h * h) / 18.0,
    };
    compare(
        "paraboloid",
        &exact(&one_body("m", DENSITY, &section)),
        &book,
    );
}

#[test]
fn parabolic_barrel() {
    // Kepler's barrel with parabolic staves: V = pi h (8 D^2 + 4 D d + 3 d^2) / 60.
    let (bung, head, h) = (0.7_f64, 0.6_f64, 0.9_f64);
    // The control point that makes the parabola's middle reach the bung's radius.
    let control = bung - head / 2.0;
    let section = format!(
        "outline = [{{ r = 0, z = 0 }}, {{ d = {head} }}, {{ z = {h}, curve = [{{ r = {control}, z = {} }}] }}, {{ r = 0 }}]",
        h / 2.0
    );
    let wanted = PI * h * (8.0 * bung * bung + 4.0 * bung * head + 3.0 * head * head) / 60.0;
    let found = exact(&one_body("m", DENSITY, &section)).volume;
    assert!((found / wanted - 1.0).abs() <= PROMISED, "{found} {wanted}");
}

#[test]
fn spheroids() {
    for (a, c) in [(0.5_f64, 0.2_f64), (0.2, 0.5)] {
        let section = format!(
            "outline = [{{ r = 0, z = {} }}, {{ r = {a}, z = 0, ellipse = \"r\" }}, {{ r = 0, z = {c}, ellipse = \"z\" }}]",
            -c
        );
        // Surface of the oblate and of the prolate spheroid, by the handbook's two formulas.
        let cap = if a > c {
            let e = (1.0 - c * c / (a * a)).sqrt();
            c * c / e * libm::atanh(e)
        } else {
            let e = (1.0 - a * a / (c * c)).sqrt();
            a * c / e * profile::trig::asin(e)
        };
        let book = Handbook {
            volume: 4.0 / 3.0 * PI * a * a * c,
            surface: 2.0 * PI * (a * a + cap),
            centre_z: 0.0,
            axial_per_mass: 0.4 * a * a,
            across_per_mass: (a * a + c * c) / 5.0,
        };
        compare("spheroid", &exact(&one_body("m", DENSITY, &section)), &book);
    }
}

#[test]
fn spherical_cap_and_zone() {
    let (r, h) = (0.5_f64, 0.2_f64);
    let rim = (h * (2.0 * r - h)).sqrt();
    let section = format!(
        "outline = [{{ r = 0, z = 0 }}, {{ r = {rim} }}, {{ r = 0, z = {h}, arc = {r}, centre_on = \"left\", name = \"zone\" }}]"
    );
    let found = exact(&one_body("m", DENSITY, &section));
    let volume = PI * h * h * (3.0 * r - h) / 3.0;
    let zone = 2.0 * PI * r * h;
    let centre_z = 0.75 * (2.0 * r - h) * (2.0 * r - h) / (3.0 * r - h) - (r - h);
    assert!((found.volume / volume - 1.0).abs() <= PROMISED);
    assert!((found.centre[2] / centre_z - 1.0).abs() <= PROMISED);
    let named = found
        .surfaces
        .iter()
        .find(|surface| surface.name.as_deref() == Some("zone"));
    assert!((named.expect("the zone has a name").area / zone - 1.0).abs() <= PROMISED);
}

#[test]
fn half_circle_by_the_theorems_used_backwards() {
    // The sphere's volume and surface give the centroids of the half disc, 4r/(3 pi), and of the half circle, 2r/pi.
    let r = 0.6;
    let found = exact(&one_body("m", DENSITY, &sphere(r, 0.0)));
    assert!((found.section.centroid_r / (4.0 * r / (3.0 * PI)) - 1.0).abs() <= PROMISED);
    // The boundary holds the diameter too, which lies on the axis: pi r at 2r/pi and 2r at 0.
    let perimeter = (PI + 2.0) * r;
    assert!((found.section.perimeter / perimeter - 1.0).abs() <= PROMISED);
    let centroid = 2.0 * r * r / perimeter;
    assert!((found.section.perimeter_centroid_r / centroid - 1.0).abs() <= PROMISED);
}

#[test]
fn sector_of_a_ring() {
    // A cylinder of which a part turn is left: centroid of a sector 2 r sin(alpha) / (3 alpha), alpha half the angle.
    let (r, h) = (0.2_f64, 0.05_f64);
    for degrees in [30.0_f64, 90.0, 180.0, 270.0, 359.0] {
        let section =
            format!("outline = [{{ r = 0, z = 0 }}, {{ r = {r} }}, {{ z = {h} }}, {{ r = 0 }}]");
        let text = one_body("m", DENSITY, &section).replace(
            "unit = \"m\"",
            &format!("unit = \"m\"\nrevolve = {degrees}"),
        );
        let found = exact(&text);
        let half = degrees.to_radians() / 2.0;
        let volume = half * r * r * h;
        assert!((found.volume / volume - 1.0).abs() <= PROMISED);
        let surface = 2.0 * half * r * r + 2.0 * half * r * h + 2.0 * r * h;
        assert!((found.surface / surface - 1.0).abs() <= PROMISED);
        let distance = 2.0 * r * profile::trig::sin(half) / (3.0 * half);
        let (sine, cosine) = profile::trig::sin_cos(half);
        let centre = [distance * cosine, distance * sine, h / 2.0];
        for (found, wanted) in found.centre.into_iter().zip(centre) {
            assert!(
                (found - wanted).abs() <= PROMISED * r,
                "{degrees}: {found} {wanted}"
            );
        }
        // About the origin: integrals of x^2, y^2 and x y over the sector, by parts of r^4/4.
        let mass = DENSITY * volume;
        let fourth = DENSITY * h * r * r * r * r / 4.0;
        let (sin2, cos2) = profile::trig::sin_cos(2.0 * half);
        let (xx, yy) = (
            fourth * (half + sin2 * cos2 / 2.0),
            fourth * (half - sin2 * cos2 / 2.0),
        );
        let xy = fourth * sin2 * sin2 / 2.0;
        let zz = mass * h * h / 3.0;
        let (xz, yz) = (mass * centre[0] * h / 2.0, mass * centre[1] * h / 2.0);
        let wanted = [
            [yy + zz, -xy, -xz],
            [-xy, xx + zz, -yz],
            [-xz, -yz, xx + yy],
        ];
        for (found, wanted) in found
            .inertia_about_origin
            .into_iter()
            .flatten()
            .zip(wanted.into_iter().flatten())
        {
            assert!(
                (found - wanted).abs() <= PROMISED * mass * r * r,
                "{degrees}: {found} {wanted}"
            );
        }
    }
}
