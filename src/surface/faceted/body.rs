//! The choices, and the blueprint that follows from them.

use std::sync::Arc;

use super::curved::{CurvedMesh, curved};
use super::ears::cut_ears;
use super::geometry_error::{CERTAIN_CREASE_DEG, of_doubtful_creases, of_flat_facets, of_patches};
use super::graded::graded;
use super::normals::{Estimate, VertexNormals};
use super::options::{FacetedGeometry, FacetedLayout, FacetedOptions, GeometryChoice, LayoutChoice};
use super::six_node::SixNodeChart;
use super::smooth_faces::SmoothFaces;
use crate::surface::{
    Blueprint, CharacterKind, Chart, Examination, Geometry, Grading, MacroTriangle, Point, SMOOTH_SURFACE_CREASE_DEG,
    SurfaceError, TriangleMesh, usable,
};

/// Turn of the normal, in degrees, from which an edge of a polyhedron is a crease. Every edge of a polyhedron is one,
/// but below this the traction is nearly smooth across it and doubling the unknowns buys nothing.
const POLYHEDRON_CREASE_DEG: f64 = 10.0;

/// The most macro triangles that the graded layout is chosen for: cut into 3, they are 5400 panels.
const MOST_GRADED: usize = 600;

/// A faceted body, ready for the solver.
#[derive(Debug, Clone)]
pub struct FacetedBody {
    /// The macro triangles, in file units and file coordinates.
    pub blueprint: Blueprint,
    /// The geometry to cut the blueprint with.
    pub panel_geometry: Geometry,
    /// What the facets were taken for.
    pub geometry: GeometryChoice,
    /// Where the macro triangles come from.
    pub layout: LayoutChoice,
    /// Turn of the normal, in degrees, from which edges were taken for creases.
    pub crease_deg: f64,
    /// Estimate of the relative error in the hydrodynamic radius that the surface brings, against the smooth body that
    /// it stands for; 0 for a polyhedron.
    pub relative_geometry_error: f64,
    /// What else the user should know, in sentences.
    pub notes: Vec<String>,
}

/// Makes a blueprint of a mesh that was examined.
///
/// Left to itself, a polyhedron becomes flat and, if it has few faces, graded; a sampled smooth body becomes curved.
///
/// # Errors
/// If the mesh is not usable; see [`usable`].
pub fn faceted(
    mesh: &TriangleMesh,
    examination: &Examination,
    options: &FacetedOptions,
) -> Result<FacetedBody, SurfaceError> {
    usable(mesh, examination)?;
    let geometry = choose_geometry(examination, options);
    let is_polyhedron = geometry.character == CharacterKind::Polyhedral;
    let is_flat = geometry.geometry == FacetedGeometry::Flat;
    let usual = if is_polyhedron && is_flat { POLYHEDRON_CREASE_DEG } else { SMOOTH_SURFACE_CREASE_DEG };
    let crease_deg = options.crease_deg.filter(|angle| angle.is_finite()).unwrap_or(usual).clamp(0.0, 180.0);
    let shells = &examination.shell_of_facet;

    let wanted = is_flat && (is_polyhedron || options.layout == Some(FacetedLayout::Graded));
    let graded = if wanted { graded(mesh, shells, crease_deg) } else { None };
    let layout = choose_layout(mesh, &geometry, graded.as_ref(), options);
    let mut notes = Vec::new();
    if options.layout == Some(FacetedLayout::Graded) && layout.layout != FacetedLayout::Graded {
        notes.push(format!("The graded layout was asked for, but {}.", layout.reason));
    }

    let smooth = SmoothBody::new(mesh, shells, crease_deg);
    // Whoever gives the angle knows the creases, and those of a polyhedron are its own.
    let of_creases = match options.crease_deg {
        None if !is_polyhedron => of_doubtful_creases(mesh, crease_deg),
        _ => 0.0,
    };
    if of_creases > 0.0 {
        notes.push(format!(
            "Some edges stay sharp though they turn by less than {CERTAIN_CREASE_DEG} degrees, and may be those of a coarse \
             sampling; the geometry error allows for it, and a finer file settles it."
        ));
    }
    let relative_geometry_error = match geometry.geometry {
        FacetedGeometry::Flat if is_polyhedron => 0.0,
        FacetedGeometry::Flat => of_flat_facets(&smooth.mesh, &smooth.best.patches) + of_creases,
        FacetedGeometry::Curved => {
            let patches = &smooth.best.patches;
            of_patches(&smooth.mesh, &smooth.faces, patches, &smooth.coarse.patches) + of_creases
        }
    };
    let blueprint = match (graded, layout.layout) {
        (Some(graded), FacetedLayout::Graded) => graded,
        _ if is_flat => as_is(mesh, &SmoothFaces::new(mesh, crease_deg), shells, None),
        _ => as_is(&smooth.mesh, &smooth.faces, &smooth.shells, Some(&smooth.best.patches)),
    };
    if !is_flat && smooth.best.straightened > 0 {
        let n = smooth.best.straightened;
        notes.push(format!("{n} edges were left straight, because curved patches beside them would fold."));
    }
    if !is_flat && smooth.ears > 0 {
        let n = smooth.ears;
        notes
            .push(format!("{n} facets with two edges on a round rim were cut in two, and their neighbours with them."));
    }
    let panel_geometry = if is_flat { Geometry::Flat } else { Geometry::Curved };
    Ok(FacetedBody { blueprint, panel_geometry, geometry, layout, crease_deg, relative_geometry_error, notes })
}

/// The smooth body behind the facets.
struct SmoothBody {
    /// The facets, some of them cut so that patches fit.
    mesh: TriangleMesh,
    shells: Vec<usize>,
    faces: SmoothFaces,
    /// The patches.
    best: CurvedMesh,
    /// Less exact patches to tell the error from.
    coarse: CurvedMesh,
    /// How many facets were cut.
    ears: usize,
}

impl SmoothBody {
    fn new(mesh: &TriangleMesh, shells: &[usize], crease_deg: f64) -> Self {
        let faces = SmoothFaces::new(mesh, crease_deg);
        let normals = VertexNormals::new(mesh, &faces);
        if let Some((mesh, shells, ears)) = cut_ears(mesh, &faces, &normals, shells) {
            let faces = SmoothFaces::new(&mesh, crease_deg);
            let [best, coarse] = both(&mesh, &faces, &VertexNormals::new(&mesh, &faces));
            return Self { mesh, shells, faces, best, coarse, ears };
        }
        let [best, coarse] = both(mesh, &faces, &normals);
        Self { mesh: mesh.clone(), shells: shells.to_vec(), faces, best, coarse, ears: 0 }
    }
}

fn both(mesh: &TriangleMesh, faces: &SmoothFaces, normals: &VertexNormals) -> [CurvedMesh; 2] {
    [Estimate::Fitted, Estimate::Mean].map(|estimate| curved(mesh, faces, normals, estimate))
}

fn choose_geometry(examination: &Examination, options: &FacetedOptions) -> GeometryChoice {
    let character = examination.character.kind;
    let fitting = match character {
        CharacterKind::Polyhedral => FacetedGeometry::Flat,
        CharacterKind::FacetedSmooth => FacetedGeometry::Curved,
    };
    let geometry = options.geometry.unwrap_or(fitting);
    let looks = &examination.character.reason;
    let reason = match (options.geometry, geometry) {
        (None, FacetedGeometry::Flat) => format!("flat facets: the surface looks like {looks}"),
        (None, FacetedGeometry::Curved) => format!("curved patches: the surface looks like {looks}"),
        (Some(_), FacetedGeometry::Flat) => format!("flat facets, as asked for; the surface looks like {looks}"),
        (Some(_), FacetedGeometry::Curved) => format!("curved patches, as asked for; the surface looks like {looks}"),
    };
    GeometryChoice { geometry, character, reason }
}

fn choose_layout(
    mesh: &TriangleMesh,
    geometry: &GeometryChoice,
    graded: Option<&Blueprint>,
    options: &FacetedOptions,
) -> LayoutChoice {
    let as_is_triangles = mesh.facets().len();
    let graded_triangles = graded.map(|blueprint| blueprint.triangles.len());
    let asked = options.layout.is_some();
    let (layout, reason) = match (graded_triangles, options.layout) {
        (Some(n), Some(FacetedLayout::Graded)) => {
            (FacetedLayout::Graded, format!("{n} graded triangles, as asked for"))
        }
        (_, Some(FacetedLayout::AsIs)) => (FacetedLayout::AsIs, "the facets as they are, as asked for".to_owned()),
        (Some(n), None) if n <= MOST_GRADED && geometry.character == CharacterKind::Polyhedral => {
            (FacetedLayout::Graded, format!("few plane faces: {n} triangles graded towards the edges"))
        }
        (Some(n), None) if geometry.character == CharacterKind::Polyhedral => {
            (FacetedLayout::AsIs, format!("the graded layout would need {n} triangles, more than {MOST_GRADED}"))
        }
        (None, _)
            if geometry.geometry == FacetedGeometry::Flat
                && (asked || geometry.character == CharacterKind::Polyhedral) =>
        {
            (FacetedLayout::AsIs, "the plane faces are too intricate to be graded".to_owned())
        }
        (None, Some(_)) => (FacetedLayout::AsIs, "curved patches are not graded".to_owned()),
        _ => (FacetedLayout::AsIs, "the facets as they are: samples of a smooth surface".to_owned()),
    };
    LayoutChoice { layout, graded_triangles, as_is_triangles, reason }
}

/// Each facet as one macro triangle, flat or on its patch.
fn as_is(mesh: &TriangleMesh, faces: &SmoothFaces, shells: &[usize], patches: Option<&[[Point; 6]]>) -> Blueprint {
    let charts = patches.unwrap_or_default().iter();
    let charts = charts.map(|nodes| Arc::new(SixNodeChart::new(*nodes)) as Arc<dyn Chart>).collect();
    let triangle = |(facet, vertices): (usize, &[usize; 3])| MacroTriangle {
        chart: patches.map(|_| facet),
        corners: if patches.is_some() { SixNodeChart::CORNERS.map(Point::from) } else { mesh.corners(facet) },
        vertices: *vertices,
        face: faces.of_facet[facet],
        shell: shells[facet],
        grading: Grading::Plain,
        clockwise: false,
    };
    Blueprint { charts, triangles: mesh.facets().iter().enumerate().map(triangle).collect() }
}
