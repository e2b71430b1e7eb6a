//! The gate to the solver.

use super::error::SurfaceError;
use super::examination::Examination;
use super::flaws::ABSURD_ASPECT;
use super::orientation::Orientation;
use crate::surface::{Point, TriangleMesh};

/// Volume over the three-halves power of the area below which a closed surface is taken for a folded sheet. A disc a
/// thousand times wider than thick has 3e-4.
const FLAT_VOLUME: f64 = 1e-7;

/// Sizes of a surface, in file units, whose fourth powers and their inverses are still far from the ends of double
/// precision.
const SIZES: std::ops::Range<f64> = 1e-50..1e50;

/// Says whether the solver can use the surface that was examined.
///
/// It must be closed, two-sided, facing outward, without facets that lack area, are there twice or are absurdly thin,
/// it must not meet itself, and no piece may lie inside another. Pieces may touch in a vertex.
///
/// # Errors
/// The first reason found, in the order in which flaws cause each other.
pub fn usable(mesh: &TriangleMesh, examination: &Examination) -> Result<(), SurfaceError> {
    let (examined, facets) = (examination.facets, mesh.facets().len());
    if examined != facets {
        return Err(SurfaceError::OtherMesh { examined, facets });
    }
    if facets == 0 {
        return Err(SurfaceError::Empty);
    }
    let size = size(examination);
    if !SIZES.contains(&size) {
        return Err(SurfaceError::AbsurdSize { size });
    }
    facets_are_sound(mesh, examination)?;
    edges_are_sound(examination)?;
    orientation_is_outward(mesh, examination)?;
    space_is_sound(examination)
}

fn size(examination: &Examination) -> f64 {
    let (low, high) = examination.bounding_box;
    (high - low).norm()
}

/// Places are rounded to this part of the body's size: single precision, as most files have.
pub(super) const PLACE_ROUNDING: f64 = f32::EPSILON as f64;

/// A place to be told: what is rounding on a body of this size is 0.
pub(super) fn told(place: Point, size: f64) -> Point {
    place.map(|x| if x.abs() <= PLACE_ROUNDING * size { 0.0 } else { x })
}

fn facets_are_sound(mesh: &TriangleMesh, examination: &Examination) -> Result<(), SurfaceError> {
    if let Some(&facet) = examination.degenerate_facets.first() {
        let count = examination.degenerate_facets.len();
        return Err(SurfaceError::DegenerateFacet { facet, place: told(mesh.centre(facet), size(examination)), count });
    }
    if let Some(&facets) = examination.duplicate_facets.first() {
        let count = examination.duplicate_facets.len();
        return Err(SurfaceError::DuplicateFacet {
            facets,
            place: told(mesh.centre(facets[0]), size(examination)),
            count,
        });
    }
    Ok(())
}

fn edges_are_sound(examination: &Examination) -> Result<(), SurfaceError> {
    let size = size(examination);
    if let Some(edge) = examination.non_manifold_edges.first() {
        let count = examination.non_manifold_edges.len();
        return Err(SurfaceError::NonManifoldEdge { place: told(edge.place, size), facets: edge.facets.len(), count });
    }
    if let Some(hole) = examination.holes.iter().max_by(|a, b| a.length.total_cmp(&b.length)) {
        return Err(SurfaceError::Open {
            place: told(hole.place, size),
            edges: hole.vertices.len(),
            length: hole.length,
            facet: hole.facet,
            count: examination.holes.len(),
        });
    }
    Ok(())
}

fn orientation_is_outward(mesh: &TriangleMesh, examination: &Examination) -> Result<(), SurfaceError> {
    let shells = &examination.shells;
    if let Some(shell) = shells.iter().find(|shell| shell.orientation == Orientation::Impossible) {
        return Err(SurfaceError::OneSided { facet: shell.first_facet });
    }
    let flat = |volume: f64, area: f64| volume < FLAT_VOLUME * area.powf(1.5);
    if let Some(shell) = shells.iter().find(|shell| flat(shell.volume, shell.area)) {
        return Err(SurfaceError::NoVolume { volume: shell.volume, area: shell.area });
    }
    // An inner piece that faces inward is a hollow, and is named as such further on.
    let wrong = |inside: bool| shells.iter().filter(move |shell| shell.inside.is_some() == inside);
    if wrong(false).all(|shell| shell.orientation == Orientation::Inward) {
        return Err(SurfaceError::InsideOut);
    }
    let flipped = wrong(false).flat_map(|shell| &shell.flipped);
    if let Some(&facet) = flipped.clone().min() {
        return Err(SurfaceError::MixedOrientation {
            facet,
            place: told(mesh.centre(facet), size(examination)),
            count: flipped.count(),
        });
    }
    Ok(())
}

fn space_is_sound(examination: &Examination) -> Result<(), SurfaceError> {
    let size = size(examination);
    let mut pinched = examination.pinched_vertices.iter().filter(|vertex| !vertex.between_shells);
    if let Some(vertex) = pinched.next() {
        return Err(SurfaceError::PinchedVertex { place: told(vertex.place, size), count: 1 + pinched.count() });
    }
    if let Some(pair) = examination.intersections.pairs.first() {
        return Err(SurfaceError::SelfIntersecting {
            facets: pair.facets,
            place: told(pair.place, size),
            count: examination.intersections.pairs.len(),
            complete: examination.intersections.complete,
        });
    }
    let nested = || examination.shells.iter().filter_map(|shell| Some((shell, shell.inside?)));
    if let Some((inner, outer)) = nested().next() {
        return Err(SurfaceError::Nested {
            inner_facet: inner.first_facet,
            outer_facet: examination.shells[outer].first_facet,
            count: nested().count(),
        });
    }
    let absurd = || examination.slivers.iter().filter(|sliver| sliver.aspect > ABSURD_ASPECT);
    if let Some(worst) = absurd().max_by(|a, b| a.aspect.total_cmp(&b.aspect)) {
        let count = absurd().count();
        return Err(SurfaceError::AbsurdSliver {
            facet: worst.facet,
            place: told(worst.place, size),
            aspect: worst.aspect,
            count,
        });
    }
    Ok(())
}
