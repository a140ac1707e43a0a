//! The segment between a circular or elliptic arc and its chord, in closed form.
//!
//! The segment of the unit circle over the angles -h..h, its chord's middle as the origin, X towards the arc, Y along the
//! chord, has ∬ X^a Y^b dA as closed forms in h, sin h and cos h: those about the circle's centre, with s and c the sine and cosine
//! of h and u = h - s c, are
//!
//! ∬ 1 = u, ∬ x = 2/3 s³, ∬ x² = (u + 2 s³ c)/4, ∬ y² = (u - 2/3 s³ c)/4, ∬ x³ = 2/3 s³ - 2/5 s⁵, ∬ x y² = 2/15 s⁵
//!
//! (from ∫ x^a (1 - x²)^(1/2) dx and its like), and x = X + c. For a flat arc these cancel; there their power series in h are
//! taken, whose coefficients are rational numbers found by expanding the same forms. Any other arc is an affine image of
//! this one: P = M + X a + Y b, dA = a × b dX dY.

use profile::{Arc, DVec2, EllipseArc, left_of, trig};

/// ∬ X^a Y^b dA of the unit segment; odd powers of Y vanish.
#[derive(Debug, Clone, Copy)]
struct Unit {
    one: f64,
    x: f64,
    xx: f64,
    yy: f64,
    xxx: f64,
    xyy: f64,
}

/// Half angle below which the series is taken: at it the closed forms have lost three digits of their highest moments,
/// which are themselves a thousandth of the chord polygon's.
const FLAT: f64 = 0.5;

const ONE: [f64; 11] = [
    0.666_666_666_666_666_6,
    -0.133_333_333_333_333_33,
    0.012_698_412_698_412_698,
    -0.000_705_467_372_134_038_8,
    2.565_335_898_669_232e-5,
    -6.577_784_355_562_133e-7,
    1.252_911_305_821_358_7e-8,
    -1.842_516_626_207_880_4e-10,
    2.154_990_206_091_088_2e-12,
    -2.052_371_624_848_655_7e-14,
    1.622_428_161_935_696e-16,
];
const X: [f64; 11] = [
    0.133_333_333_333_333_33,
    -0.034_920_634_920_634_92,
    0.004_497_354_497_354_497,
    -0.000_369_568_702_902_036_24,
    2.133_411_855_634_078e-5,
    -9.143_927_794_721_446e-7,
    3.025_595_832_162_903_4e-8,
    -7.962_104_817_578_651e-10,
    1.706_165_599_902_919_4e-11,
    -3.034_681_958_951_251_4e-13,
    4.552_022_949_773_51e-15,
];
const XX: [f64; 11] = [
    0.038_095_238_095_238_1,
    -0.012_698_412_698_412_698,
    0.002_077_922_077_922_078,
    -0.000_221_013_554_346_887_67,
    1.702_706_464_611_226_6e-5,
    -1.004_908_567_933_778e-6,
    4.705_852_113_041_109e-8,
    -1.793_198_136_062_767_3e-9,
    5.670_629_790_189_548e-11,
    -1.512_200_392_613_784_8e-12,
    3.446_630_919_586_724_5e-14,
];
const YY: [f64; 11] = [
    0.133_333_333_333_333_33,
    -0.063_492_063_492_063_49,
    0.014_814_814_814_814_815,
    -0.002_180_535_513_868_847,
    0.000_224_302_446_524_668_76,
    -1.710_223_932_446_154_8e-5,
    1.006_198_329_572_123_5e-6,
    -4.707_576_105_205_983e-8,
    1.793_382_849_509_003_7e-9,
    -5.670_792_033_005_742e-11,
    1.512_212_290_420_305_8e-12,
];
const XXX: [f64; 11] = [
    0.012_698_412_698_412_698,
    -0.005_194_805_194_805_195,
    0.001_041_181_041_181_041_2,
    -0.000_136_142_517_094_898_05,
    1.302_409_075_518_319_2e-5,
    -9.683_315_066_871_998e-7,
    5.804_825_992_647_71e-8,
    -2.876_359_266_724_164e-9,
    1.199_899_212_720_451e-10,
    -4.275_168_465_757_836_5e-12,
    1.316_493_685_127_423e-13,
];
const XYY: [f64; 11] = [
    0.019_047_619_047_619_05,
    -0.009_523_809_523_809_525,
    0.002_409_812_409_812_41,
    -0.000_400_402_067_068_733_7,
    4.827_645_899_074_471e-5,
    -4.457_344_968_549_45e-6,
    3.263_601_168_528_246_6e-7,
    -1.943_757_186_716_943_6e-8,
    9.605_566_533_897_828e-10,
    -4.002_622_857_319_99e-11,
    1.425_474_396_677_63e-12,
];

impl Unit {
    fn new(h: f64, s: f64, c: f64) -> Self {
        if h < FLAT {
            Self::series(h)
        } else {
            Self::closed(h, s, c)
        }
    }

    fn series(h: f64) -> Self {
        let (h2, h3) = (h * h, h * h * h);
        let series =
            |coefficients: &[f64; 11]| coefficients.iter().rev().fold(0.0, |sum, q| sum * h2 + q);
        let (h5, h7) = (h3 * h2, h3 * h2 * h2);
        Self {
            one: h3 * series(&ONE),
            x: h5 * series(&X),
            xx: h7 * series(&XX),
            yy: h5 * series(&YY),
            xxx: h7 * h2 * series(&XXX),
            xyy: h7 * series(&XYY),
        }
    }

    fn closed(h: f64, s: f64, c: f64) -> Self {
        let (s3, u) = (s * s * s, h - s * c);
        let (x, xx, yy) = (
            2.0 / 3.0 * s3,
            0.25 * (u + 2.0 * s3 * c),
            0.25 * (u - 2.0 / 3.0 * s3 * c),
        );
        let (xxx, xyy) = (s3 * (2.0 / 3.0 - 0.4 * s * s), 2.0 / 15.0 * s3 * s * s);
        Self {
            one: u,
            x: x - c * u,
            xx: xx - c * (2.0 * x - c * u),
            yy,
            xxx: xxx - c * (3.0 * xx - c * (3.0 * x - c * u)),
            xyy: xyy - c * yy,
        }
    }
}

/// A segment in its place: P = `middle` + X `a` + Y `b` about a local origin.
pub(crate) struct Segment {
    middle: DVec2,
    a: DVec2,
    b: DVec2,
    unit: Unit,
}

impl Segment {
    /// Between a circular arc and its chord.
    pub(crate) fn of_arc(arc: &Arc, origin: DVec2) -> Self {
        let h = 0.5 * arc.sweep.abs();
        let (s, c) = trig::sin_cos(h);
        let chord = arc.chord();
        let b = chord / (2.0 * s);
        // The arc lies to the right of the chord where it turns left.
        let a = -left_of(b) * arc.sweep.signum();
        Self {
            middle: arc.start - origin + 0.5 * chord,
            a,
            b,
            unit: Unit::new(h, s, c),
        }
    }

    /// Between an elliptic arc and its own chord, which starts in the stored start.
    pub(crate) fn of_ellipse(ellipse: &EllipseArc, origin: DVec2) -> Self {
        let h = 0.5 * ellipse.sweep.abs();
        let (s, c) = trig::sin_cos(h);
        let (sm, cm) = trig::sin_cos(ellipse.from + 0.5 * ellipse.sweep);
        let a = cm * ellipse.axis_a + sm * ellipse.axis_b;
        let b = (cm * ellipse.axis_b - sm * ellipse.axis_a) * ellipse.sweep.signum();
        Self {
            middle: ellipse.start - origin + s * b,
            a,
            b,
            unit: Unit::new(h, s, c),
        }
    }

    /// ∬ r^a z^b dA in the order 1, r, z, rr, rz, zz, rrr, rrz, rzz: added material positive.
    pub(crate) fn moments(&self) -> [f64; 9] {
        let Self {
            middle: m,
            a,
            b,
            unit,
        } = self;
        let area = a.perp_dot(*b);
        let linear = |m: f64, a: f64| m * unit.one + a * unit.x;
        let squares = |m: [f64; 2], a: [f64; 2], b: [f64; 2]| {
            m[0] * m[1] * unit.one
                + (m[0] * a[1] + m[1] * a[0]) * unit.x
                + a[0] * a[1] * unit.xx
                + b[0] * b[1] * unit.yy
        };
        let cubes = |m: [f64; 3], a: [f64; 3], b: [f64; 3]| {
            // Each sum takes every choice of the factor that stands alone.
            let one_of = |p: &[f64; 3], q: &[f64; 3]| {
                p[0] * q[1] * q[2] + q[0] * p[1] * q[2] + q[0] * q[1] * p[2]
            };
            m[0] * m[1] * m[2] * unit.one
                + one_of(&a, &m) * unit.x
                + one_of(&m, &a) * unit.xx
                + one_of(&m, &b) * unit.yy
                + a[0] * a[1] * a[2] * unit.xxx
                + one_of(&a, &b) * unit.xyy
        };
        let (r, z) = ((m.x, a.x, b.x), (m.y, a.y, b.y));
        [
            unit.one,
            linear(r.0, r.1),
            linear(z.0, z.1),
            squares([r.0; 2], [r.1; 2], [r.2; 2]),
            squares([r.0, z.0], [r.1, z.1], [r.2, z.2]),
            squares([z.0; 2], [z.1; 2], [z.2; 2]),
            cubes([r.0; 3], [r.1; 3], [r.2; 3]),
            cubes([r.0, r.0, z.0], [r.1, r.1, z.1], [r.2, r.2, z.2]),
            cubes([r.0, z.0, z.0], [r.1, z.1, z.1], [r.2, z.2, z.2]),
        ]
        .map(|moment| moment * area)
    }
}

/// Length of a circular arc and the middle of that length: the centre of mass of a wire bent to it.
pub(crate) fn arc_length(arc: &Arc) -> (f64, DVec2) {
    let h = 0.5 * arc.sweep.abs();
    let (s, c) = trig::sin_cos(h);
    let chord = arc.chord();
    let b = chord / (2.0 * s);
    // The wire's centre is sin h / h from the circle's, the chord's middle cos h.
    let h2 = h * h;
    let above_chord = if h < FLAT {
        // sin h / h - cos h = sum of (-1)^(k+1) h^2k 2k/(2k+1)!
        [
            -1.0 / 39_916_800.0 * 10.0,
            8.0 / 362_880.0,
            -6.0 / 5_040.0,
            4.0 / 120.0,
            -2.0 / 6.0,
        ]
        .into_iter()
        .fold(1.0 / 518_918_400.0, |sum, q| sum * h2 + q)
            * -h2
    } else {
        s / h - c
    };
    let towards_arc = -left_of(b) * arc.sweep.signum();
    (
        2.0 * h * b.length(),
        arc.start + 0.5 * chord + towards_arc * above_chord,
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use std::f64::consts::PI;

    /// Centroid of a semicircular area 4r/(3 pi), of its arc 2r/pi, from the diameter (any mechanics handbook).
    #[test]
    fn semicircle() {
        let arc = Arc {
            start: DVec2::new(0.0, -2.0),
            end: DVec2::new(0.0, 2.0),
            sweep: PI,
        };
        let m = Segment::of_arc(&arc, DVec2::ZERO).moments();
        assert!((m[0] - 2.0 * PI).abs() < 1e-15);
        assert!((m[1] / m[0] - 8.0 / (3.0 * PI)).abs() < 1e-15);
        assert!((m[3] - PI * 16.0 / 8.0).abs() < 2e-15);
        assert!((m[5] - PI * 16.0 / 8.0).abs() < 2e-15);
        let (length, middle) = arc_length(&arc);
        assert!((length - 2.0 * PI).abs() < 1e-15);
        assert!((middle - DVec2::new(4.0 / PI, 0.0)).length() < 1e-15);
    }

    #[test]
    fn closed_forms_and_series_meet() {
        let list = |u: Unit| [u.one, u.x, u.xx, u.yy, u.xxx, u.xyy];
        for h in [0.3, FLAT, 0.7] {
            let (s, c) = trig::sin_cos(h);
            // Cancellation leaves the closed forms an absolute error of a few roundings of terms below one half.
            for (p, q) in list(Unit::series(h))
                .into_iter()
                .zip(list(Unit::closed(h, s, c)))
            {
                assert!((p - q).abs() < 2e-16, "{h}: {p} {q}");
            }
        }
        let at = |sweep: f64| {
            arc_length(&Arc {
                start: DVec2::ZERO,
                end: DVec2::X,
                sweep,
            })
            .1
        };
        assert!((at(2.0 * FLAT - 1e-15) - at(2.0 * FLAT)).length() < 1e-15);
    }
}
