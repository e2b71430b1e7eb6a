//! The question of `surface`: what is this surface like, and can the solver trust it?

use std::path::Path;

use schemars::JsonSchema;
use serde::{Deserialize, Serialize};

use super::{BodyError, LengthUnit, Vector};
use crate::surface::shapes::ShapeSpec;
use crate::surface::{
    CharacterKind, Examination, FacetedGeometry, FacetedOptions, Geometry, MendOptions, Orientation, Point, RawSurface,
    TriangleMesh, examine, faceted, mend, read_surface, usable, weld, weld_tolerance,
};

/// Name and version of the answer's layout.
pub const SURFACE_SCHEMA: &str = "slowmote.surface.1";

/// Lists in the answer end here; their counts are given whole.
const MOST_LISTED: usize = 20;

/// A surface to look at.
#[derive(Debug, Clone, PartialEq)]
pub struct Surface {
    /// What it is called.
    pub name: String,
    /// The file format and its variant; none for a named shape.
    pub format: Option<String>,
    /// The welded mesh, in file units.
    pub mesh: TriangleMesh,
    /// The unit of its coordinates, if told.
    pub unit: Option<LengthUnit>,
    /// What there is to know about how it was read.
    pub notes: Vec<String>,
}

/// What there is to say of a surface. Lengths are in file units; where the unit is known, the size stands in SI too.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
#[allow(missing_docs, reason = "the keys say what they are")]
pub struct SurfaceReport {
    pub schema: String,
    pub name: String,
    pub format: Option<String>,
    pub metres_per_file_unit: Option<f64>,
    pub unit: Option<String>,
    pub vertices: usize,
    pub facets: usize,
    pub size_in_file_units: Vector,
    pub centroid_in_file_units: Vector,
    pub volume_in_file_units: f64,
    pub area_in_file_units: f64,
    pub shortest_edge_in_file_units: f64,
    pub longest_edge_in_file_units: f64,
    pub size_m: Option<Vector>,
    pub centroid_m: Option<Vector>,
    pub volume_m3: Option<f64>,
    pub area_m2: Option<f64>,
    pub closed: bool,
    pub orientation: String,
    pub shells: Vec<ShellReport>,
    pub genus: Option<usize>,
    pub hole_count: usize,
    pub holes: Vec<HoleReport>,
    pub non_manifold_edges: usize,
    pub pinched_vertices: usize,
    pub duplicate_facets: usize,
    pub degenerate_facets: usize,
    pub slivers: usize,
    pub intersections: usize,
    pub intersections_complete: bool,
    pub intersection_places_in_file_units: Vec<Vector>,
    pub crease_count: usize,
    pub crease_length_in_file_units: f64,
    pub sharpest_turn_deg: f64,
    pub kind: String,
    pub kind_reason: String,
    pub geometry: Option<String>,
    pub geometry_reason: Option<String>,
    pub relative_geometry_error: Option<f64>,
    pub macro_triangles: Option<usize>,
    pub mended: Vec<String>,
    pub usable: bool,
    pub refusal: Option<String>,
    pub next_step: Option<String>,
    pub notes: Vec<String>,
}

/// One piece of a surface, in file units.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
#[allow(missing_docs, reason = "the keys say what they are")]
pub struct ShellReport {
    pub facets: usize,
    pub closed: bool,
    pub volume_in_file_units: f64,
    pub area_in_file_units: f64,
    pub genus: Option<usize>,
    pub inside_shell: Option<usize>,
}

/// A hole, in file units.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
#[allow(missing_docs, reason = "the keys say what they are")]
pub struct HoleReport {
    pub edges: usize,
    pub length_in_file_units: f64,
    pub place_in_file_units: Vector,
}

impl Surface {
    /// Reads a file, or cuts a named shape into about `elements` flat triangles, in `unit` (micrometres if none is given).
    ///
    /// # Errors
    /// [`BodyError`]: no such shape or file, or one that can't be read.
    pub fn read(text: &str, unit: Option<&LengthUnit>, elements: usize) -> Result<Self, BodyError> {
        if let Ok(spec) = ShapeSpec::parse(text) {
            let unit = unit.cloned().unwrap_or(LengthUnit { symbol: "um".to_owned(), metres: 1e-6 });
            let blueprint = spec.shape.blueprint();
            let panels = blueprint.subdivide(blueprint.cuts_for(elements), Geometry::Flat);
            let mesh = TriangleMesh::of_panels(&panels, 1.0 / unit.metres);
            return Ok(Self { name: spec.shape.name(), format: None, mesh, unit: Some(unit), notes: Vec::new() });
        }
        let path = Path::new(text);
        let RawSurface { mesh, format, variant, notes, .. } = read_surface(path).map_err(BodyError::File)?;
        let mesh = weld(&mesh, weld_tolerance(&mesh)).mesh;
        let name = path.file_name().unwrap_or(path.as_os_str()).to_string_lossy().into_owned();
        Ok(Self { name, format: Some(format!("{format}, {variant}")), mesh, unit: unit.cloned(), notes })
    }

    /// Closes small holes, turns facets outward, drops what is plainly wrong; gives a sentence for each thing done.
    pub fn mended(&self) -> (Self, Vec<String>) {
        let (mesh, done) = mend(&self.mesh, &MendOptions::default());
        (Self { mesh, ..self.clone() }, done.iter().map(ToString::to_string).collect())
    }

    /// Looks at it; `mended` is what was done to it before.
    pub fn report(&self, mended: Vec<String>) -> SurfaceReport {
        let seen = examine(&self.mesh);
        let refusal = usable(&self.mesh, &seen).err();
        let body = match refusal {
            None => faceted(&self.mesh, &seen, &FacetedOptions::default()).ok(),
            Some(_) => None,
        };
        let metres = self.unit.as_ref().map(|unit| unit.metres);
        let (low, high) = seen.bounding_box;
        let vector = |x: Point| -> Vector { [x.x, x.y, x.z] };
        SurfaceReport {
            schema: SURFACE_SCHEMA.to_owned(),
            name: self.name.clone(),
            format: self.format.clone(),
            metres_per_file_unit: metres,
            unit: self.unit.as_ref().map(|unit| unit.symbol.clone()),
            vertices: seen.vertices,
            facets: seen.facets,
            size_in_file_units: vector(high - low),
            centroid_in_file_units: vector(seen.centroid),
            volume_in_file_units: seen.volume,
            area_in_file_units: seen.area,
            shortest_edge_in_file_units: seen.edge_lengths.0,
            longest_edge_in_file_units: seen.edge_lengths.1,
            size_m: metres.map(|unit| vector((high - low) * unit)),
            centroid_m: metres.map(|unit| vector(seen.centroid * unit)),
            volume_m3: metres.map(|unit| seen.volume * unit.powi(3)),
            area_m2: metres.map(|unit| seen.area * unit.powi(2)),
            closed: seen.is_closed(),
            orientation: orientation(seen.orientation).to_owned(),
            shells: shells(&seen),
            genus: seen.genus,
            hole_count: seen.holes.len(),
            holes: holes(&seen),
            non_manifold_edges: seen.non_manifold_edges.len(),
            pinched_vertices: seen.pinched_vertices.len(),
            duplicate_facets: seen.duplicate_facets.len(),
            degenerate_facets: seen.degenerate_facets.len(),
            slivers: seen.slivers.len(),
            intersections: seen.intersections.pairs.len(),
            intersections_complete: seen.intersections.complete,
            intersection_places_in_file_units: seen
                .intersections
                .pairs
                .iter()
                .take(MOST_LISTED)
                .map(|pair| vector(pair.place))
                .collect(),
            crease_count: seen.creases.0,
            crease_length_in_file_units: seen.creases.1,
            sharpest_turn_deg: seen.sharpest_turn_deg,
            kind: match seen.character.kind {
                CharacterKind::FacetedSmooth => "faceted smooth",
                CharacterKind::Polyhedral => "polyhedral",
            }
            .to_owned(),
            kind_reason: seen.character.reason.clone(),
            geometry: body.as_ref().map(|body| {
                match body.geometry.geometry {
                    FacetedGeometry::Flat => "flat",
                    FacetedGeometry::Curved => "curved",
                }
                .to_owned()
            }),
            geometry_reason: body.as_ref().map(|body| body.geometry.reason.clone()),
            relative_geometry_error: body.as_ref().map(|body| body.relative_geometry_error),
            macro_triangles: body.as_ref().map(|body| body.blueprint.triangles.len()),
            mended,
            usable: refusal.is_none(),
            next_step: refusal.as_ref().map(|error| error.hint().to_owned()),
            refusal: refusal.map(|error| error.to_string()),
            notes: self.notes.clone(),
        }
    }
}

fn orientation(orientation: Orientation) -> &'static str {
    match orientation {
        Orientation::Outward => "outward",
        Orientation::Inward => "inward",
        Orientation::Mixed => "mixed",
        Orientation::Impossible => "impossible",
        Orientation::Consistent => "consistent",
    }
}

fn shells(seen: &Examination) -> Vec<ShellReport> {
    let report = |shell: &crate::surface::Shell| ShellReport {
        facets: shell.facets,
        closed: shell.closed,
        volume_in_file_units: shell.volume,
        area_in_file_units: shell.area,
        genus: shell.genus,
        inside_shell: shell.inside,
    };
    seen.shells.iter().map(report).collect()
}

fn holes(seen: &Examination) -> Vec<HoleReport> {
    let report = |hole: &crate::surface::Hole| HoleReport {
        edges: hole.vertices.len(),
        length_in_file_units: hole.length,
        place_in_file_units: [hole.place.x, hole.place.y, hole.place.z],
    };
    seen.holes.iter().take(MOST_LISTED).map(report).collect()
}
