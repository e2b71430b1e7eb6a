//! From what the user wrote to a body: a named shape, or a surface file with its unit.

use std::path::{Path, PathBuf};

use thiserror::Error;

use super::body::{Body, KnownSize};
use super::budget::InputUncertainty;
use crate::physical::quantity::{DisplayUnit, format_number, format_si};
use crate::surface::shapes::{CATALOGUE, ShapeSpec};
use crate::surface::{
    Examination, FacetedGeometry, FacetedOptions, FileError, Geometry, Placement, Point, RawSurface, ShapeError,
    SurfaceError, SurfaceFormat, TriangleMesh, examine, faceted, read_surface, usable, weld, weld_tolerance,
};

/// Extension of case files.
const CASE_EXTENSION: &str = "json";

/// Digits of sizes in messages.
const SIZE_DIGITS: usize = 3;

/// Sizes from here to there, m, are those of bodies in creeping flow: units that give one are worth a hint.
const USUAL_SIZES_M: std::ops::RangeInclusive<f64> = 1e-8..=0.1;

/// Units that surface files are written in, the most frequent first.
const FILE_UNITS: [(&str, f64); 4] = [("um", 1e-6), ("mm", 1e-3), ("nm", 1e-9), ("m", 1.0)];

/// A unit of length as it was written.
#[derive(Debug, Clone, PartialEq)]
pub struct LengthUnit {
    /// Its symbol.
    pub symbol: String,
    /// Its size, m.
    pub metres: f64,
}

/// What the separate pieces of a surface file are.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum Pieces {
    /// Not told: a file of several is refused.
    #[default]
    Untold,
    /// One rigid body.
    Joined,
    /// Bodies that move on their own.
    Apart,
}

/// Why there is no body.
#[derive(Debug, Error)]
#[non_exhaustive]
pub enum BodyError {
    /// The shape can't be made.
    #[error("the body can't be made")]
    Shape(#[source] ShapeError),
    /// The file can't be read.
    #[error("the body can't be read")]
    File(#[source] FileError),
    /// What was written is neither a known shape nor a file that exists.
    #[error("`{text}` is neither a shape nor a file that exists")]
    Neither {
        /// What was written.
        text: String,
        /// Why it is no shape.
        source: ShapeError,
    },
    /// A device was given, which may never end.
    #[error("{} is a device, not a file", .path.display())]
    Device {
        /// The device.
        path: PathBuf,
    },
    /// A case file was given where one body is expected.
    #[error("{} is a case file, which this version does not read", .path.display())]
    CaseFile {
        /// The file.
        path: PathBuf,
    },
    /// A surface file was given without its unit.
    #[error("the unit of {} is not given, and the file does not tell it", .path.display())]
    NoUnit {
        /// The file.
        path: PathBuf,
        /// Longest edge of the box around it, in the file's unit.
        longest: f64,
    },
    /// A unit was given for a shape, whose sizes have their own.
    #[error("`{text}` has a unit of its own, so `--unit {unit}` says nothing")]
    NeedlessUnit {
        /// The shape.
        text: String,
        /// The unit.
        unit: String,
    },
    /// A file of several pieces was given without saying what they are.
    #[error("{} holds {count} separate pieces, and it is not told what they are", .path.display())]
    SeveralPieces {
        /// The file.
        path: PathBuf,
        /// How many there are.
        count: usize,
    },
    /// The surface can't be used.
    #[error("the surface in {} can't be used", .path.display())]
    Surface {
        /// The file.
        path: PathBuf,
        /// Why.
        source: SurfaceError,
    },
}

impl BodyError {
    /// What the user can do next.
    pub fn hints(&self) -> Vec<String> {
        match self {
            Self::Shape(_) => vec!["`slowmote drag --help` shows how each shape is written".to_owned()],
            Self::File(error) => vec![error.hint()],
            Self::Neither { .. } => vec![
                "write a shape as in `sphere:10um` (`slowmote drag --help` lists them), or the path of a .stl, .obj, \
                 .ply, .off or .msh file"
                    .to_owned(),
            ],
            Self::Device { .. } | Self::CaseFile { .. } => {
                vec!["give one body: a shape such as `sphere:10um`, or a surface file".to_owned()]
            }
            Self::SeveralPieces { .. } => vec![
                "say `--pieces joined` for one rigid body, or `--pieces apart` for bodies that move on their own"
                    .to_owned(),
            ],
            Self::NoUnit { longest, .. } => vec![unit_hint(*longest)],
            Self::NeedlessUnit { .. } => vec!["leave `--unit` out; it is for surface files".to_owned()],
            Self::Surface { source, path } => vec![
                source.hint().to_owned(),
                format!(
                    "`slowmote surface {}` tells all that is wrong with it, and whether mending helps",
                    path.display()
                ),
            ],
        }
    }
}

impl Body {
    /// The body that a text stands for: a shape as in `rod:12x2um`, or a surface file, whose unit must be told and whose
    /// pieces, if there are several, are what `pieces` says. More than one body only for [`Pieces::Apart`].
    ///
    /// `geometry` is that of the panels; left out, a shape is exact and a file gets what fits its facets. For a file,
    /// [`Geometry::Exact`] takes the facets for the surface.
    ///
    /// # Errors
    /// [`BodyError`]: no such shape or file, no unit, or a surface that can't be used.
    pub fn read(
        text: &str,
        unit: Option<&LengthUnit>,
        geometry: Option<Geometry>,
        pieces: Pieces,
    ) -> Result<Vec<Self>, BodyError> {
        let path = Path::new(text);
        if names_a_shape(text) {
            return shape(text, unit, geometry).map(|body| vec![body]);
        }
        if path.extension().is_some_and(|extension| extension.eq_ignore_ascii_case(CASE_EXTENSION)) {
            return Err(BodyError::CaseFile { path: path.to_path_buf() });
        }
        if looks_like_a_file(text) || path.exists() {
            return file(path, unit, geometry, pieces);
        }
        match ShapeSpec::parse(text) {
            Ok(_) => shape(text, unit, geometry).map(|body| vec![body]),
            Err(source) => Err(BodyError::Neither { text: text.to_owned(), source }),
        }
    }
}

/// Whether the text begins with the name of a shape and a colon.
fn names_a_shape(text: &str) -> bool {
    let Some((name, _)) = text.split_once(':') else { return false };
    let name = name.trim();
    let mut names = CATALOGUE.iter().flat_map(|entry| entry.aliases.iter().chain([&entry.keyword]));
    names.any(|known| known.eq_ignore_ascii_case(name))
}

fn looks_like_a_file(text: &str) -> bool {
    SurfaceFormat::of_path(Path::new(text)).is_some() || text.contains(std::path::MAIN_SEPARATOR)
}

fn shape(text: &str, unit: Option<&LengthUnit>, geometry: Option<Geometry>) -> Result<Body, BodyError> {
    let spec = ShapeSpec::parse(text).map_err(BodyError::Shape)?;
    if let Some(unit) = unit {
        return Err(BodyError::NeedlessUnit { text: text.to_owned(), unit: unit.symbol.clone() });
    }
    let uncertain = spec.size_uncertainties.iter().filter(|relative| **relative > 0.0);
    let size = |relative: &f64| InputUncertainty::Size { name: "size of the body".to_owned(), relative: *relative };
    let exact = spec.shape.exact_measure();
    Ok(Body {
        // A shape's origin is its centroid.
        known: KnownSize { volume_m3: Some(exact.volume), area_m2: exact.area, centroid_m: Some(Point::zeros()) },
        shape: spec.shape.name().split(':').next().map(str::to_owned),
        uncertainties: uncertain.map(size).collect(),
        geometry: geometry.unwrap_or(Geometry::Exact),
        ..Body::exact(text.trim(), spec.shape.blueprint())
    })
}

fn file(
    path: &Path,
    unit: Option<&LengthUnit>,
    geometry: Option<Geometry>,
    pieces: Pieces,
) -> Result<Vec<Body>, BodyError> {
    if is_device(path) {
        return Err(BodyError::Device { path: path.to_path_buf() });
    }
    let RawSurface { mesh, notes, .. } = read_surface(path).map_err(BodyError::File)?;
    let path_buf = || path.to_path_buf();
    let Some(unit) = unit else {
        let (low, high) = mesh.bounding_box();
        return Err(BodyError::NoUnit { path: path_buf(), longest: (high - low).max() });
    };
    // Every corner of an STL facet is a vertex of its own.
    let mesh = weld(&mesh, weld_tolerance(&mesh)).mesh;
    let seen = examine(&mesh);
    // What is wrong with the whole, such as pieces that cross, is told before what the pieces are.
    let surface_error = |source| BodyError::Surface { path: path_buf(), source };
    usable(&mesh, &seen).map_err(surface_error)?;
    let name = path.file_name().unwrap_or(path.as_os_str()).to_string_lossy().into_owned();
    let count = seen.shells.len();
    let read = |mesh: &TriangleMesh, seen: &Examination, name: String| {
        let (mut body, more) = faceted_body(mesh, seen, unit, geometry).map_err(surface_error)?;
        body.name = name;
        body.notes = notes.iter().cloned().chain(more).collect();
        Ok(body)
    };
    match pieces {
        Pieces::Untold if count > 1 => Err(BodyError::SeveralPieces { path: path_buf(), count }),
        Pieces::Apart if count > 1 => {
            let piece = |shell: usize| {
                let piece = mesh.filtered(|facet| seen.shell_of_facet[facet] == shell);
                read(&piece, &examine(&piece), format!("{name}, piece {}", shell + 1))
            };
            (0..count).map(piece).collect()
        }
        _ => {
            let mut body = read(&mesh, &seen, name)?;
            if count > 1 {
                body.notes.push(format!("its {count} pieces are one rigid body"));
            }
            Ok(vec![body])
        }
    }
}

/// The body of a welded mesh without a name, and what there is to know about how its facets were read.
fn faceted_body(
    mesh: &TriangleMesh,
    seen: &Examination,
    unit: &LengthUnit,
    geometry: Option<Geometry>,
) -> Result<(Body, Vec<String>), SurfaceError> {
    let wanted = geometry.map(|geometry| match geometry {
        Geometry::Curved => FacetedGeometry::Curved,
        Geometry::Exact | Geometry::Flat => FacetedGeometry::Flat,
    });
    let body = faceted(mesh, seen, &FacetedOptions { geometry: wanted, ..FacetedOptions::default() })?;
    let notes = std::iter::once(body.geometry.reason).chain(body.notes).collect();
    let in_metres = Placement { scale: unit.metres, ..Placement::identity() };
    let body = Body {
        facets: Some(mesh.facets().len()),
        geometry: body.panel_geometry,
        geometry_error: body.relative_geometry_error,
        ..Body::exact(String::new(), body.blueprint.placed(&in_metres))
    };
    Ok((body, notes))
}

#[cfg(unix)]
fn is_device(path: &Path) -> bool {
    use std::os::unix::fs::FileTypeExt;
    std::fs::metadata(path).is_ok_and(|file| file.file_type().is_char_device() || file.file_type().is_block_device())
}

#[cfg(not(unix))]
fn is_device(_: &Path) -> bool {
    false
}

/// How long the body would be in each of the units that make it one for creeping flow.
fn unit_hint(longest: f64) -> String {
    let would_be = |(symbol, metres): (&str, f64)| {
        let number = format_number(longest, SIZE_DIGITS);
        let said = format_si(longest * metres, DisplayUnit::LENGTH, SIZE_DIGITS);
        let plain = format!("{number} {symbol}");
        if said == plain { format!("{symbol}: {plain}") } else { format!("{symbol}: {plain}, that is {said}") }
    };
    let mut units = FILE_UNITS.into_iter().filter(|(_, metres)| USUAL_SIZES_M.contains(&(longest * metres)));
    let lengths: Vec<String> = units.by_ref().take(2).map(would_be).collect();
    let lengths = if lengths.is_empty() { FILE_UNITS[..2].iter().copied().map(would_be).collect() } else { lengths };
    format!("give it with --unit; the body's longest edge would be, with {}", lengths.join("; with "))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn shapes_and_files_are_told_apart() {
        assert!(names_a_shape("sphere:10um") && names_a_shape("SPHERE : 1um"));
        assert!(!names_a_shape("sphere.stl") && !names_a_shape("C:sphere"));
        assert!(looks_like_a_file("bead.STL") && looks_like_a_file("folder/bead"));
        assert!(!looks_like_a_file("bead"));
    }

    #[test]
    fn the_hint_about_units_gives_sizes() {
        let hint = unit_hint(12.3);
        assert!(hint.contains("um: 12.3 um") && hint.contains("mm: 12.3 mm"), "{hint}");
        assert!(unit_hint(0.004).contains("mm: 0.00400 mm, that is 4.00 um"), "{}", unit_hint(0.004));
        assert!(unit_hint(1e20).contains("um:"));
    }
}
