//! The body, how it stands, and the point that torques are about.

use std::path::Path;

use clap::{Args, ValueEnum};
use slowmote::physical::quantity::{parse_angle, parse_length};
use slowmote::question::{Body, CaseBody, LengthUnit, Pieces, Placing, StandingBody, Turn};
use slowmote::surface::{Geometry, Point, SurfaceFormat};

use super::values::{direction, place};
use crate::cli::Failure;

/// Which body, and where.
#[derive(Debug, Clone, Args)]
#[command(next_help_heading = "The body")]
pub struct BodyOptions {
    /// A shape such as `rod:12x2um`, a surface file (.stl .obj .ply .off .msh), or a case file (.json)
    #[arg(value_name = "BODY", help_heading = None::<&str>)]
    pub body: String,

    /// The unit of a surface file's coordinates, such as `um`; files don't tell, and it is never guessed
    #[arg(long, value_name = "UNIT", value_parser = length_unit)]
    pub unit: Option<LengthUnit>,

    /// What the pieces of a surface file are, if it has several; otherwise such a file is refused
    #[arg(long, value_enum, value_name = "WHAT")]
    pub pieces: Option<PiecesName>,

    /// Turns the body about a fixed axis through its centroid; repeat it for more turns, in their order
    #[arg(long, value_name = "ANGLE@AXIS", value_parser = turn, allow_hyphen_values = true)]
    pub turn: Vec<Turn>,

    /// Where the body's centroid stands, such as `0um,0um,12um`
    #[arg(long, value_name = "X,Y,Z", value_parser = place, allow_hyphen_values = true)]
    pub at: Option<Point>,

    /// The point whose velocity is meant and that torques are about [default: the centroid]
    #[arg(long, value_name = "X,Y,Z", value_parser = place, allow_hyphen_values = true)]
    pub reference: Option<Point>,
}

/// What the pieces of a surface file are.
#[derive(Debug, Clone, Copy, PartialEq, Eq, ValueEnum)]
pub enum PiecesName {
    /// One rigid body
    Joined,
    /// Bodies that move on their own
    Apart,
}

impl BodyOptions {
    /// Takes the body of a case, and what else the case says of it where no option does.
    ///
    /// # Errors
    /// A unit, turn or place that can't be read.
    pub fn fill(&mut self, body: &CaseBody, case: &Path) -> Result<(), Failure> {
        let wrong = |error: String| {
            Failure::new(format!("the case file {} can't be used", case.display()))
                .because(error)
                .hint("its texts are read as the options of the same name")
        };
        let beside = case.parent().unwrap_or(Path::new("")).join(&body.surface);
        let is_file = SurfaceFormat::of_path(Path::new(&body.surface)).is_some();
        self.body = if is_file { beside.to_string_lossy().into_owned() } else { body.surface.clone() };
        if let (None, Some(unit)) = (&self.unit, &body.unit) {
            self.unit = Some(length_unit(unit).map_err(wrong)?);
        }
        if let (None, Some(pieces)) = (self.pieces, &body.pieces) {
            let unknown = |_| wrong(format!("`{pieces}` is not what pieces can be: `joined` or `apart`"));
            self.pieces = Some(PiecesName::from_str(pieces, false).map_err(unknown)?);
        }
        if self.turn.is_empty() {
            self.turn = body.turn.iter().map(|text| turn(text)).collect::<Result<_, _>>().map_err(wrong)?;
        }
        if let (None, Some(at)) = (self.at, &body.at) {
            self.at = Some(place(&at.join(",")).map_err(wrong)?);
        }
        Ok(())
    }

    /// Makes or reads the body, or the bodies that are the pieces of a file, where they stand, with panels of this geometry or
    /// of the one that fits.
    ///
    /// # Errors
    /// There is no such shape or file, or it can't be used.
    pub fn bodies(&self, geometry: Option<Geometry>) -> Result<Vec<StandingBody>, Failure> {
        let pieces = match self.pieces {
            None => Pieces::Untold,
            Some(PiecesName::Joined) => Pieces::Joined,
            Some(PiecesName::Apart) => Pieces::Apart,
        };
        let read = Body::read(&self.body, self.unit.as_ref(), geometry, pieces).map_err(|error| {
            let hints = error.hints();
            hints.into_iter().fold(Failure::of(&error), Failure::hint)
        })?;
        let placing = Placing { turns: self.turn.clone(), at: self.at };
        match <[Body; 1]>::try_from(read) {
            Ok([body]) => Ok(vec![StandingBody { body, placing }]),
            Err(pieces) => Ok(StandingBody::together(pieces, &placing)),
        }
    }
}

/// A unit of length such as `um`.
pub fn length_unit(text: &str) -> Result<LengthUnit, String> {
    let one = parse_length(&format!("1{text}")).map_err(|_| format!("`{text}` is no unit of length such as `um`"))?;
    if one.uncertainty_si() > 0.0 || text.starts_with(|c: char| c.is_ascii_digit() || c == '.') {
        return Err(format!("`{text}` is no unit of length such as `um`"));
    }
    Ok(LengthUnit { symbol: text.trim().to_owned(), metres: one.value_si() })
}

fn turn(text: &str) -> Result<Turn, String> {
    let (angle, axis) =
        text.split_once('@').ok_or_else(|| format!("`{text}` is no turn such as `30deg@y`: the axis is missing"))?;
    let angle = parse_angle(angle).map_err(|error| error.to_string())?;
    if angle.uncertainty_si() > 0.0 {
        return Err(format!("the angle in `{text}` has an uncertainty, which is not carried on"));
    }
    Ok(Turn { angle: angle.value_si(), axis: direction(axis)? })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn turns_have_an_angle_and_an_axis() {
        let quarter = turn("90deg@-z").unwrap();
        assert!((quarter.angle - std::f64::consts::FRAC_PI_2).abs() < 1e-15);
        assert_eq!(quarter.axis, -Point::z());
        for wrong in ["", "90deg", "90@z", "90deg@", "z@90deg", "90±1deg@z"] {
            assert!(turn(wrong).is_err(), "{wrong}");
        }
    }

    #[test]
    fn units_are_units_of_length() {
        assert_eq!(length_unit("um").unwrap().metres, 1e-6);
        assert_eq!(length_unit("mm").unwrap().symbol, "mm");
        for wrong in ["", "kg", "2um", "um2", "0um", "parsec", "±1um"] {
            assert!(length_unit(wrong).is_err(), "{wrong}");
        }
    }
}
