//! How lengths and places of one surface are written: in the unit of its file, with as many decimals as find a place.

use super::numbers::{GLUE, si};
use crate::physical::quantity::{DisplayUnit, format_number};
use crate::question::SurfaceReport;

/// Digits of volumes and areas.
const SIZE_DIGITS: usize = 4;

/// Units of area are a million apart: the larger one is taken from a fiftieth of it on.
const AREA_UNIT_LEAD: f64 = 50.0;

/// Digits of lengths.
const LENGTH_DIGITS: usize = 4;

/// Places are told to this part of the body's size.
const PLACE_RESOLUTION: f64 = 1e-3;

/// Most decimals that a place is written with; smaller bodies get exponents.
const MOST_DECIMALS: f64 = 8.0;

/// Coordinates of surface files are rounded to single precision, relative to the largest one: what is smaller is 0.
const ROUNDING: f64 = f32::EPSILON as f64;

/// A volume in a readable unit, or in file units where theirs is not known.
pub(super) fn volume(in_file_units: f64, m3: Option<f64>) -> String {
    match m3 {
        Some(volume) => si(volume, DisplayUnit::VOLUME, SIZE_DIGITS),
        None => format!("{} file units cubed", format_number(in_file_units, SIZE_DIGITS)),
    }
}

/// An area in a readable unit, or in file units where theirs is not known.
pub(super) fn area(in_file_units: f64, m2: Option<f64>) -> String {
    match m2 {
        Some(area) => {
            let unit = DisplayUnit::AREA.choose(AREA_UNIT_LEAD * area, SIZE_DIGITS);
            format!("{}{GLUE}{}", unit.number(area, SIZE_DIGITS), unit.symbol())
        }
        None => format!("{} file units squared", format_number(in_file_units, SIZE_DIGITS)),
    }
}

/// The unit of a surface, and how its numbers are written.
pub(super) struct Units {
    /// `um`, or `file units`.
    pub name: String,
    /// `um long`, or `long`.
    pub length_heading: String,
    /// Decimals of a place; none if it needs an exponent.
    decimals: Option<usize>,
    least: f64,
}

impl Units {
    pub fn of(report: &SurfaceReport) -> Self {
        let name = report.unit.clone().unwrap_or_else(|| "file units".to_owned());
        let length_heading = report.unit.as_ref().map_or_else(|| "length".to_owned(), |unit| format!("{unit} long"));
        let size = report.size_in_file_units.into_iter().fold(0.0, f64::max);
        let corner = report.lowest_corner_in_file_units.into_iter().fold(0.0, |most, x: f64| x.abs().max(most));
        let decimals = -(PLACE_RESOLUTION * size).log10().floor();
        let decimals = (decimals <= MOST_DECIMALS).then_some(decimals.max(0.0) as usize);
        Self { name, length_heading, decimals, least: ROUNDING * size.max(corner) }
    }

    /// A length without its unit.
    pub fn length(&self, length: f64) -> String {
        if length.abs() <= self.least { "0".to_owned() } else { format_number(length, LENGTH_DIGITS) }
    }

    /// `(1.50, 0, -2.25)`, on one line.
    pub fn place(&self, place: &[f64; 3]) -> String {
        let coordinate = |x: f64| match self.decimals {
            _ if x.abs() <= self.least => "0".to_owned(),
            Some(decimals) => {
                let shown = format!("{x:.decimals$}");
                // Not zero, but nothing at this resolution: without the sign.
                if shown.parse() == Ok(0.0) { shown.trim_start_matches('-').to_owned() } else { shown }
            }
            None => format!("{x:.3e}"),
        };
        format!("({})", place.map(coordinate).join(&format!(",{GLUE}")))
    }
}
