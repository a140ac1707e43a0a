//! The units that figures are shown in.

/// What a figure is.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Kind {
    /// A length, m.
    Length,
    /// An area, m2.
    Area,
    /// A volume, m3.
    Volume,
    /// A mass, kg.
    Mass,
    /// A mass moment of inertia, kg m2.
    Inertia,
    /// A density, kg/m3.
    Density,
}

/// A family of units.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum System {
    /// The SI's, with litre, gram and tonne.
    #[default]
    Metric,
    /// Inch, foot, and the avoirdupois pound.
    Inch,
}

impl System {
    /// The family of the units that `written` is in: `7 lb +- 2 %` is in pounds.
    pub fn of_text(written: &str) -> Self {
        let inch =
            |word: &str| ["in", "ft", "lb", "oz"].contains(&word.trim_end_matches(['2', '3']));
        // `27lb` is a number and a unit.
        let mut words = written
            .split(|c: char| !c.is_alphanumeric())
            .map(|word| word.trim_start_matches(|c: char| c.is_ascii_digit()));
        if words.any(inch) {
            Self::Inch
        } else {
            Self::Metric
        }
    }
}

/// A unit of a kind.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Unit {
    /// How it is written.
    pub(super) name: &'static str,
    /// How many SI units it is.
    pub(super) size: f64,
    /// The least figure that is given in it, SI; the smallest unit takes all that is less.
    from: f64,
}

const fn unit(name: &'static str, size: f64, from: f64) -> Unit {
    Unit { name, size, from }
}

const INCH: f64 = 0.0254;
const FOOT: f64 = 0.3048;
const POUND: f64 = 0.453_592_37;
const OUNCE: f64 = POUND / 16.0;

// From small to large. A length stays in mm from 0.1 mm to 10 m, as on drawings.
const LENGTH: [Unit; 3] = [
    unit("um", 1e-6, 0.0),
    unit("mm", 1e-3, 1e-4),
    unit("m", 1.0, 10.0),
];
const AREA: [Unit; 3] = [
    unit("mm2", 1e-6, 0.0),
    unit("cm2", 1e-4, 1e-4),
    unit("m2", 1.0, 1.0),
];
const VOLUME: [Unit; 4] = [
    unit("mm3", 1e-9, 0.0),
    unit("cm3", 1e-6, 1e-6),
    unit("l", 1e-3, 1e-3),
    unit("m3", 1.0, 1.0),
];
const MASS: [Unit; 4] = [
    unit("mg", 1e-6, 0.0),
    unit("g", 1e-3, 1e-4),
    unit("kg", 1.0, 1.0),
    unit("t", 1e3, 1e3),
];
const INERTIA: [Unit; 4] = [
    unit("g mm2", 1e-9, 0.0),
    unit("g cm2", 1e-7, 1e-7),
    unit("kg cm2", 1e-4, 1e-4),
    unit("kg m2", 1.0, 0.1),
];
const DENSITY: [Unit; 1] = [unit("kg/m3", 1.0, 0.0)];

const LENGTH_IN: [Unit; 1] = [unit("in", INCH, 0.0)];
const AREA_IN: [Unit; 2] = [
    unit("in2", INCH * INCH, 0.0),
    unit("ft2", FOOT * FOOT, 100.0 * FOOT * FOOT),
];
const VOLUME_IN: [Unit; 2] = [
    unit("in3", INCH * INCH * INCH, 0.0),
    unit("ft3", FOOT * FOOT * FOOT, 10.0 * FOOT * FOOT * FOOT),
];
const MASS_IN: [Unit; 2] = [unit("oz", OUNCE, 0.0), unit("lb", POUND, POUND)];
const INERTIA_IN: [Unit; 2] = [
    unit("lb in2", POUND * INCH * INCH, 0.0),
    unit("lb ft2", POUND * FOOT * FOOT, 10.0 * POUND * FOOT * FOOT),
];
const DENSITY_IN: [Unit; 1] = [unit("lb/in3", POUND / (INCH * INCH * INCH), 0.0)];

/// The unit that suits a figure of the magnitude `size`, SI.
pub(super) fn suited(kind: Kind, system: System, size: f64) -> Unit {
    let units: &[Unit] = match (system, kind) {
        (System::Metric, Kind::Length) => &LENGTH,
        (System::Metric, Kind::Area) => &AREA,
        (System::Metric, Kind::Volume) => &VOLUME,
        (System::Metric, Kind::Mass) => &MASS,
        (System::Metric, Kind::Inertia) => &INERTIA,
        (System::Metric, Kind::Density) => &DENSITY,
        (System::Inch, Kind::Length) => &LENGTH_IN,
        (System::Inch, Kind::Area) => &AREA_IN,
        (System::Inch, Kind::Volume) => &VOLUME_IN,
        (System::Inch, Kind::Mass) => &MASS_IN,
        (System::Inch, Kind::Inertia) => &INERTIA_IN,
        (System::Inch, Kind::Density) => &DENSITY_IN,
    };
    let smallest = units.first().expect("every kind has a unit");
    *units
        .iter()
        .rev()
        .find(|unit| size >= unit.from)
        .unwrap_or(smallest)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_unit_suits_the_size() {
        for (kind, size, unit) in [
            (Kind::Length, 5e-5, "um"),
            (Kind::Length, 0.45, "mm"),
            (Kind::Length, 9.99, "mm"),
            (Kind::Length, 12.0, "m"),
            (Kind::Area, 5e-5, "mm2"),
            (Kind::Area, 0.5, "cm2"),
            (Kind::Area, 2.0, "m2"),
            (Kind::Volume, 5e-7, "mm3"),
            (Kind::Volume, 5e-4, "cm3"),
            (Kind::Volume, 0.5, "l"),
            (Kind::Volume, 1.0, "m3"),
            (Kind::Mass, 5e-5, "mg"),
            (Kind::Mass, 0.999, "g"),
            (Kind::Mass, 1.0, "kg"),
            (Kind::Mass, 1000.0, "t"),
            (Kind::Inertia, 0.3, "kg m2"),
            (Kind::Inertia, 0.003, "kg cm2"),
            (Kind::Inertia, 5e-6, "g cm2"),
            (Kind::Density, 7850.0, "kg/m3"),
        ] {
            assert_eq!(
                suited(kind, System::Metric, size).name,
                unit,
                "{kind:?} {size}"
            );
        }
        assert_eq!(suited(Kind::Mass, System::Inch, 10.0).name, "lb");
        assert_eq!(suited(Kind::Mass, System::Inch, 0.1).name, "oz");
    }

    #[test]
    fn the_family_is_that_of_the_text() {
        for written in [
            "7 lb +- 2 %",
            "27lb +- 1lb",
            "12 in3 +- 1 %",
            "1.5 ft +- 1/8 in",
        ] {
            assert_eq!(System::of_text(written), System::Inch, "{written}");
        }
        for written in ["12.4 kg +- 2 %", "101 mm", "inertia", "5 min", ""] {
            assert_eq!(System::of_text(written), System::Metric, "{written}");
        }
    }

    #[test]
    fn no_size_is_without_a_unit() {
        for size in [
            0.0,
            -1.0,
            f64::MIN_POSITIVE,
            f64::MAX,
            f64::INFINITY,
            f64::NAN,
        ] {
            assert_eq!(suited(Kind::Density, System::Metric, size).name, "kg/m3");
            suited(Kind::Length, System::Inch, size);
        }
    }

    #[test]
    fn units_run_from_small_to_large() {
        let tables: [&[Unit]; 8] = [
            &LENGTH, &AREA, &VOLUME, &MASS, &INERTIA, &AREA_IN, &VOLUME_IN, &MASS_IN,
        ];
        for units in tables {
            assert!(units.is_sorted_by(|a, b| a.size < b.size && a.from < b.from));
        }
    }
}
