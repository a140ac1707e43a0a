//! Stations of a CSV file, joined by straight lines.

use super::Built;
use super::beside;
use super::origins::Origins;
use super::rounding::{ROUNDING, largest, on_axis};
use super::settle::settled;
use super::wording::Wording;
use crate::nearest::{advice, shown};
use crate::{Fault, LengthUnit, Neighbours, Span, limits};
use csv::{Position, ReaderBuilder, StringRecord, Trim};
use glam::DVec2;
use profile::{Edge, LARGEST};

/// Faults of one file that are told; the others most likely have the same cause.
const TOLD: usize = 10;

/// Names of columns.
const COLUMNS: [&str; 3] = ["r", "d", "z"];

/// The two columns.
#[derive(Debug, Clone, Copy)]
struct Columns {
    radial: usize,
    /// True where it holds diameters.
    is_diameter: bool,
    z: usize,
    /// Number of columns.
    count: usize,
}

/// A file that is being read.
struct Stations<'a> {
    file: &'a str,
    span: &'a Span,
    separator: char,
    wording: Wording,
}

/// The loop through the stations of `file`. Numbers are in the unit of `wording`; the last station is joined to the first.
pub(super) fn outline(
    file: &str,
    span: &Span,
    prefix: &str,
    wording: Wording,
    neighbours: &dyn Neighbours,
    faults: &mut Vec<Fault>,
) -> Option<Built> {
    let text = match beside::text(file, span, neighbours) {
        Ok(text) => text,
        Err(fault) => {
            faults.push(fault);
            return None;
        }
    };
    let stations = Stations {
        file,
        span,
        separator: separator(&text),
        wording,
    };
    let before = faults.len();
    let points = stations.read(&text, faults);
    if faults.len() > before {
        return None;
    }
    let points = stations.corners(points, faults)?;
    let mut origins = Origins::new(prefix);
    let next = points.iter().skip(1).chain(points.first());
    let edges = points
        .iter()
        .zip(next)
        .enumerate()
        .map(|(at, (&(from, _), &(to, line)))| {
            let words = if at + 1 < points.len() {
                format!("the edge to the station on line {line}")
            } else {
                "the closing edge".to_owned()
            };
            (
                Edge::line(from, to),
                origins.add(None, &words, span.clone()),
            )
        })
        .collect();
    settled(edges, origins, span, faults)
}

/// What divides the columns: the first of `;`, tab and `,` that the line of names has.
fn separator(text: &str) -> char {
    let names = text
        .lines()
        .find(|line| !line.trim().is_empty() && !line.starts_with('#'))
        .unwrap_or("");
    [';', '\t']
        .into_iter()
        .find(|&separator| names.contains(separator))
        .unwrap_or(',')
}

/// The line, counted from 1, that a record at `position` stands on. The reader notes where it went on reading: empty lines
/// and comments before the record come after that.
fn line(text: &str, position: Option<&Position>) -> u64 {
    let (at, line) = position.map_or((0, 1), |at| (at.byte(), at.line()));
    let rest = usize::try_from(at).ok().and_then(|at| text.get(at..));
    let before = rest
        .unwrap_or("")
        .lines()
        .take_while(|line| line.is_empty() || line.starts_with('#'));
    line + before.count() as u64
}

impl Stations<'_> {
    fn fault(&self, code: &'static str, message: &str, help: impl Into<String>) -> Fault {
        let message = format!("`{}`: {message}", shown(self.file));
        Fault::new(code, message, self.span.clone(), "").help(help)
    }

    /// The points with their lines.
    fn read(&self, text: &str, faults: &mut Vec<Fault>) -> Vec<(DVec2, u64)> {
        let mut reader = ReaderBuilder::new()
            .has_headers(false)
            .flexible(true)
            .comment(Some(b'#'))
            .trim(Trim::All)
            .delimiter(u8::try_from(self.separator).unwrap_or(b','))
            .from_reader(text.as_bytes());
        let mut columns: Option<Columns> = None;
        let mut points = Vec::new();
        let most = faults.len() + TOLD;
        for record in reader.records() {
            let told = record
                .map_err(|error| {
                    let help = "a CSV file has one station a line";
                    self.fault(
                        "csv::unreadable",
                        &format!("it cannot be read: {error}"),
                        help,
                    )
                })
                .and_then(|record| {
                    let line = line(text, record.position());
                    // Spreadsheets leave rows of separators behind.
                    if record.iter().all(str::is_empty) {
                        return Ok(());
                    }
                    let Some(columns) = columns else {
                        columns = Some(self.columns(&record)?);
                        return Ok(());
                    };
                    points.push((self.station(&record, columns, line)?, line));
                    Ok(())
                });
            if let Err(fault) = told {
                faults.push(fault);
                // Without names no number has a meaning.
                if columns.is_none() || faults.len() >= most {
                    return points;
                }
            }
            if points.len() > limits::EDGES {
                let message = format!("it has more than {} stations", limits::EDGES);
                faults.push(self.fault("csv::too_many", &message, "thin them out"));
                return points;
            }
        }
        if columns.is_none() {
            let help = "the first line names the columns: r or d, and z";
            faults.push(self.fault("csv::empty", "there is nothing in it", help));
        }
        points
    }

    fn columns(&self, names: &StringRecord) -> Result<Columns, Fault> {
        if names.iter().any(|name| name.parse::<f64>().is_ok()) {
            let help =
                "write a line like d,z before the numbers: r for radii or d for diameters, and z";
            let message = "its first line has numbers in place of the columns' names";
            return Err(self.fault("csv::no_names", message, help));
        }
        let mut places = [None; 3];
        for (at, name) in names.iter().enumerate() {
            let known = COLUMNS
                .iter()
                .position(|known| known.eq_ignore_ascii_case(name));
            let Some(slot) = known.and_then(|known| places.get_mut(known)) else {
                let help = format!(
                    "{}; numbers are in the part's unit, {}",
                    advice(name, &COLUMNS),
                    self.wording.unit.word()
                );
                let message = format!("it has a column called `{}`", shown(name));
                return Err(self.fault("csv::unknown_column", &message, help));
            };
            if slot.replace(at).is_some() {
                let message = format!("it has two columns called `{name}`");
                return Err(self.fault("csv::column_twice", &message, "take one of them out"));
            }
        }
        let [r, d, z] = places;
        let (radial, is_diameter) = match (r, d) {
            (Some(r), None) => (r, false),
            (None, Some(d)) => (d, true),
            (Some(_), Some(_)) => {
                let help = "keep the column r or the column d";
                let message = "it has both radii and diameters";
                return Err(self.fault("csv::r_and_d", message, help));
            }
            (None, None) => return Err(self.missing("r or d")),
        };
        Ok(Columns {
            radial,
            is_diameter,
            z: z.ok_or_else(|| self.missing("z"))?,
            count: names.len(),
        })
    }

    fn missing(&self, name: &str) -> Fault {
        let help =
            "the columns are called r or d, and z, and are divided by commas, semicolons or tabs";
        self.fault(
            "csv::missing_column",
            &format!("it has no column {name}"),
            help,
        )
    }

    fn station(&self, record: &StringRecord, columns: Columns, line: u64) -> Result<DVec2, Fault> {
        if record.len() != columns.count {
            let message = format!(
                "line {line} has {} values, and there are {} columns",
                record.len(),
                columns.count
            );
            let help = if self.separator == ',' && record.len() == 2 * columns.count {
                "the comma divides columns: write decimals with a point, as in 12.5"
            } else {
                "write one value a column"
            };
            return Err(self.fault("csv::values", &message, help));
        }
        let value = |at: usize| self.number(record.get(at).unwrap_or(""), line);
        let (radial, z) = (value(columns.radial)?, value(columns.z)?);
        if radial < 0.0 {
            let message = format!("the station on line {line} lies past the axis");
            let help = "the section lies on one side of the axis; give the distance without a sign";
            return Err(self.fault("csv::past_axis", &message, help));
        }
        let r = if columns.is_diameter {
            radial / 2.0
        } else {
            radial
        };
        let metres = self.wording.unit.to(LengthUnit::Metre, 1.0);
        let point = DVec2::new(metres.of(r), metres.of(z));
        if point.abs().max_element() > LARGEST {
            let message =
                format!("the station on line {line} is farther out than can be computed with");
            return Err(self.fault("csv::out_of_range", &message, "look at the powers of ten"));
        }
        Ok(point)
    }

    fn number(&self, text: &str, line: u64) -> Result<f64, Fault> {
        if let Ok(number) = text.parse::<f64>()
            && number.is_finite()
        {
            return Ok(number);
        }
        let shown = shown(text);
        if text.is_empty() {
            let message = format!("line {line} lacks a value");
            return Err(self.fault("csv::no_value", &message, "write one value a column"));
        }
        if text.contains(',') && text.replacen(',', ".", 1).parse::<f64>().is_ok() {
            let message = format!("line {line} has `{shown}` with a decimal comma");
            let help = format!(
                "write decimals with a point: {}",
                text.replacen(',', ".", 1)
            );
            return Err(self.fault("csv::decimal_comma", &message, help));
        }
        let message = format!("`{shown}` on line {line} is not a number");
        let help = "values are plain numbers, without units and expressions";
        Err(self.fault("csv::not_a_number", &message, help))
    }

    /// The corners: on the axis exactly where they are on it to rounding, each away from the one before.
    fn corners(
        &self,
        mut points: Vec<(DVec2, u64)>,
        faults: &mut Vec<Fault>,
    ) -> Option<Vec<(DVec2, u64)>> {
        let all: Vec<DVec2> = points.iter().map(|&(point, _)| point).collect();
        let size = largest(&all);
        for (point, _) in &mut points {
            point.x = on_axis(point.x, ROUNDING * size.x);
        }
        // A last station that is the first one again closes the outline itself.
        if points.len() > 1 && points.first().map(|p| p.0) == points.last().map(|p| p.0) {
            points.pop();
        }
        let before = faults.len();
        for pair in points.windows(2) {
            let [(from, _), (to, line)] = *pair else {
                continue;
            };
            if (to - from).abs().max_element() <= ROUNDING * size.max_element() {
                let message = format!(
                    "the station on line {line} is the one before again, at {}",
                    self.wording.place(to)
                );
                faults.push(self.fault("csv::repeated", &message, "take one of the two out"));
                if faults.len() >= before + TOLD {
                    return None;
                }
            }
        }
        if faults.len() > before {
            return None;
        }
        if points.len() < 3 {
            let message = format!("{} stations enclose nothing", points.len());
            faults.push(self.fault("csv::too_few", &message, "give three stations or more"));
            return None;
        }
        Some(points)
    }
}
