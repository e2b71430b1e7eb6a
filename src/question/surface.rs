//! The question of `surface`: what is this surface like, and can the solver trust it?

use std::path::Path;

use super::surface_flaws::{creases, flaws, holes, shells, wrong_facing};
use super::surface_report::{SURFACE_SCHEMA, SolvedAs, SurfaceReport, WrittenReport};
use super::{BodyError, LengthUnit, Vector};
use crate::physical::quantity::format_number;
use crate::surface::shapes::ShapeSpec;
use crate::surface::{
    CharacterKind, FacetedGeometry, FacetedOptions, Geometry, MendOptions, Orientation, Point, RawSurface,
    SMOOTH_SURFACE_CREASE_DEG, ShapeError, SurfaceError, SurfaceFormat, TriangleMesh, WriteError, examine, faceted,
    mend, read_surface, read_surface_bytes, surface_bytes, usable, weld, weld_tolerance,
};

/// A surface that was written must keep its area to this part. Single precision keeps it to 1e-6 or so; what a body far
/// from its origin loses beyond this is no longer small beside the accuracy of an answer.
const LARGEST_AREA_CHANGE: f64 = 1e-4;

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
    /// What was mended, a sentence each; none if nobody mended it.
    pub mended: Option<Vec<String>>,
    /// What there is to know about how it was read.
    pub notes: Vec<String>,
}

/// A length or a place in file units, and in SI where the unit is known.
#[derive(Debug, Clone, Copy)]
pub(super) struct Scale {
    metres: Option<f64>,
}

impl Scale {
    /// A length, an area or a volume by its power of length.
    pub fn si(self, value: f64, power: i32) -> Option<f64> {
        self.metres.map(|unit| value * unit.powi(power))
    }

    /// A place or a size.
    pub fn vector_m(self, x: Point) -> Option<Vector> {
        self.metres.map(|unit| vector(x * unit))
    }
}

pub(super) fn vector(x: Point) -> Vector {
    [x.x, x.y, x.z]
}

impl Surface {
    /// Reads a file, or cuts a named shape into about `elements` flat triangles, in `unit` (micrometres if none is given).
    ///
    /// # Errors
    /// [`BodyError`]: no such shape or file, or one that can't be read.
    pub fn read(text: &str, unit: Option<&LengthUnit>, elements: usize) -> Result<Self, BodyError> {
        let path = Path::new(text);
        let shape = ShapeSpec::parse(text);
        if let Ok(spec) = shape {
            let unit = unit.cloned().unwrap_or(LengthUnit { symbol: "um".to_owned(), metres: 1e-6 });
            let blueprint = spec.shape.blueprint().ungraded();
            let panels = blueprint.subdivide(blueprint.cuts_for(elements), Geometry::Flat);
            let mesh = TriangleMesh::of_panels(&panels, 1.0 / unit.metres);
            let name = spec.shape.name();
            return Ok(Self { name, format: None, mesh, unit: Some(unit), mended: None, notes: Vec::new() });
        }
        if is_endless(path) {
            return Err(BodyError::Device { path: path.to_path_buf() });
        }
        if let (Err(source), false, None) = (shape, path.exists(), SurfaceFormat::of_path(path)) {
            return Err(match source {
                ShapeError::UnknownShape { .. } => BodyError::Neither { text: text.to_owned(), source },
                source => BodyError::Shape(source),
            });
        }
        let RawSurface { mesh, format, variant, notes, .. } = read_surface(path).map_err(BodyError::File)?;
        let mesh = weld(&mesh, weld_tolerance(&mesh)).mesh;
        let name = path.file_name().unwrap_or(path.as_os_str()).to_string_lossy().into_owned();
        let format = Some(format!("{format}, {variant}"));
        Ok(Self { name, format, mesh, unit: unit.cloned(), mended: None, notes })
    }

    /// Closes small holes, turns facets outward, drops what is plainly wrong, and lists each thing done.
    pub fn mended(&self) -> Self {
        let (mesh, done) = mend(&self.mesh, &MendOptions::default());
        Self { mesh, mended: Some(done.iter().map(ToString::to_string).collect()), ..self.clone() }
    }

    /// The bytes of a file in this format, and what the solver says of it when it is read back: the single precision of
    /// STL may be too low for a body far from its origin. `seen` is the surface's own report; the path is left empty.
    ///
    /// # Errors
    /// [`WriteError`]: the format can't hold the surface.
    pub fn written(&self, format: SurfaceFormat, seen: &SurfaceReport) -> Result<(Vec<u8>, WrittenReport), WriteError> {
        let bytes = surface_bytes(&self.mesh, format)?;
        let refusal = match read_surface_bytes(&bytes, format) {
            Ok(raw) => {
                let mesh = weld(&raw.mesh, weld_tolerance(&raw.mesh)).mesh;
                let found = examine(&mesh);
                let change = (found.area / seen.area_in_file_units - 1.0).abs();
                let changed = || {
                    let percent = format_number(100.0 * change, 2);
                    (change > LARGEST_AREA_CHANGE).then(|| format!("its area has changed by {percent} %"))
                };
                usable(&mesh, &found).err().map(|error| error.to_string()).or_else(changed)
            }
            Err(error) => Some(error.to_string()),
        };
        let report = WrittenReport {
            path: String::new(),
            format: format.to_string(),
            facets: self.mesh.facets().len(),
            usable: refusal.is_none(),
            refusal,
        };
        Ok((bytes, report))
    }

    /// Looks at it. The options say how it would be solved; its crease angle is also that from which edges are counted.
    pub fn report(&self, options: &FacetedOptions) -> SurfaceReport {
        let seen = examine(&self.mesh);
        let refusal = usable(&self.mesh, &seen).err();
        let solved_as = match refusal {
            None => faceted(&self.mesh, &seen, options).ok().map(|body| SolvedAs {
                geometry: match body.geometry.geometry {
                    FacetedGeometry::Flat => "flat",
                    FacetedGeometry::Curved => "curved",
                }
                .to_owned(),
                reason: body.geometry.reason,
                creases_from_deg: body.crease_deg,
                relative_geometry_error: body.relative_geometry_error,
                macro_triangles: body.blueprint.triangles.len(),
            }),
            Some(_) => None,
        };
        let scale = Scale { metres: self.unit.as_ref().map(|unit| unit.metres) };
        let (low, high) = seen.bounding_box;
        let next = refusal.as_ref().map(|refusal| self.next_step(refusal));
        let flaws = flaws(&self.mesh, &seen, scale);
        SurfaceReport {
            schema: SURFACE_SCHEMA.to_owned(),
            name: self.name.clone(),
            format: self.format.clone(),
            unit: self.unit.as_ref().map(|unit| unit.symbol.clone()),
            metres_per_file_unit: scale.metres,
            vertices: seen.vertices,
            facets: seen.facets,
            size_in_file_units: vector(high - low),
            size_m: scale.vector_m(high - low),
            lowest_corner_in_file_units: vector(low),
            lowest_corner_m: scale.vector_m(low),
            centroid_in_file_units: vector(seen.centroid),
            centroid_m: scale.vector_m(seen.centroid),
            volume_in_file_units: seen.volume,
            volume_m3: scale.si(seen.volume, 3),
            area_in_file_units: seen.area,
            area_m2: scale.si(seen.area, 2),
            shortest_edge_in_file_units: seen.edge_lengths.0,
            shortest_edge_m: scale.si(seen.edge_lengths.0, 1),
            longest_edge_in_file_units: seen.edge_lengths.1,
            longest_edge_m: scale.si(seen.edge_lengths.1, 1),
            closed: seen.is_closed(),
            orientation: orientation(seen.orientation).to_owned(),
            wrong_facing: wrong_facing(&seen).len(),
            wrong_facing_places: flaws.wrong_facing,
            shell_count: seen.shells.len(),
            shells: shells(&seen, scale),
            genus: seen.genus,
            hole_count: seen.holes.len(),
            holes: holes(&seen, scale),
            non_manifold_edges: seen.non_manifold_edges.len(),
            non_manifold_edge_places: flaws.non_manifold_edges,
            pinched_vertices: seen.pinched_vertices.len(),
            pinched_vertex_places: flaws.pinched_vertices,
            touching_vertices: seen.pinched_vertices.iter().filter(|vertex| vertex.between_shells).count(),
            duplicate_facets: seen.duplicate_facets.len(),
            duplicate_facet_places: flaws.duplicate_facets,
            degenerate_facets: seen.degenerate_facets.len(),
            degenerate_facet_places: flaws.degenerate_facets,
            slivers: seen.slivers.len(),
            sliver_places: flaws.slivers,
            intersections: seen.intersections.pairs.len(),
            intersections_complete: seen.intersections.complete,
            intersection_places: flaws.intersections,
            creases: creases(&seen, options.crease_deg.unwrap_or(SMOOTH_SURFACE_CREASE_DEG), scale),
            kind: match seen.character.kind {
                CharacterKind::FacetedSmooth => "faceted smooth",
                CharacterKind::Polyhedral => "polyhedral",
            }
            .to_owned(),
            kind_reason: seen.character.reason.clone(),
            solved_as,
            mended: self.mended.clone(),
            usable: refusal.is_none(),
            refusal: refusal.map(|error| error.to_string()),
            mending_suffices: next.as_ref().and_then(|next| next.mending_suffices),
            next_step: next.map(|next| next.text),
            next_command: None,
            written: None,
            notes: self.notes.clone(),
        }
    }

    /// Mends a copy to see whether that is worth offering.
    fn next_step(&self, refusal: &SurfaceError) -> NextStep {
        if self.mended.is_some() {
            return NextStep { mending_suffices: None, text: refusal.hint_beyond_mending().to_owned() };
        }
        let text = match refusal_of(&self.mended().mesh) {
            None => return NextStep { mending_suffices: Some(true), text: refusal.hint().to_owned() },
            Some(left) if std::mem::discriminant(&left) == std::mem::discriminant(refusal) => {
                left.hint_beyond_mending().to_owned()
            }
            Some(left) => format!("mending would not do: then {left}; {}", left.hint_beyond_mending()),
        };
        NextStep { mending_suffices: Some(false), text }
    }
}

/// Whether it is a device, which may never end.
#[cfg(unix)]
fn is_endless(path: &Path) -> bool {
    use std::os::unix::fs::FileTypeExt;
    std::fs::metadata(path).is_ok_and(|file| file.file_type().is_char_device() || file.file_type().is_block_device())
}

#[cfg(not(unix))]
fn is_endless(_: &Path) -> bool {
    false
}

struct NextStep {
    mending_suffices: Option<bool>,
    text: String,
}

fn refusal_of(mesh: &TriangleMesh) -> Option<SurfaceError> {
    usable(mesh, &examine(mesh)).err()
}

pub(super) fn orientation(orientation: Orientation) -> &'static str {
    match orientation {
        Orientation::Outward => "outward",
        Orientation::Inward => "inward",
        Orientation::Mixed => "mixed",
        Orientation::Impossible => "impossible",
        Orientation::Consistent => "consistent",
    }
}
