//! How far the surface that is solved may be from the smooth body it stands for.
//!
//! Moving the surface of a body outward by a small distance `d` everywhere changes its hydrodynamic radius by about
//! `d`, so that the relative change is
//!
//! ```text
//! (sum of displaced volumes) / (area r),     r = (3 V / 4 pi)^(1/3)
//! ```
//! with the volume between the two surfaces taken as positive over every facet.

use super::curved::curved;
use super::normals::{Estimate, VertexNormals};
use super::smooth_faces::SmoothFaces;
use crate::surface::{Patch, Point, TriangleMesh, triangle_rule};

/// Part of the sagitta of a patch, for each square of its turn, by which a quadratic patch misses a sphere: measured on
/// icospheres of 80 to 5120 facets as 0.15, doubled.
const QUADRATIC_MISS: f64 = 0.3;

/// Inside a smooth face the fitted normals are better than the mean ones by about the turn of the normal from one facet
/// to the next; this many times the turn is taken.
const FITTED_OVER_MEAN: f64 = 3.0;

/// Beside a crease the fit sees one side only and may be no better than the mean: on cylinders of 16 to 64 sides, where
/// the mean is exact, the difference is the error; it is doubled.
const FITTED_AT_CREASE: f64 = 2.0;

/// Displacement counts for more where the traction is larger, at tips and edges, and the area of the facets is less than
/// that of the body: the plain mean is multiplied by this.
const UNEVEN: f64 = 1.5;

/// On a smooth body, creases that turn by less than this many degrees may be edges of a coarse sampling: a tube of six
/// facets around turns by 60 at each of them.
pub(super) const CERTAIN_CREASE_DEG: f64 = 65.0;

/// Such edges lie where the body curves most, at tips and rims, where displacement counts for more than elsewhere: on
/// ellipsoids 3:2:1 of 80 to 224 facets up to 2.0 times the plain mean, for the torque.
const AT_TIPS: f64 = 2.5;

/// Relative error of flat facets that stand for the smooth body with these patches.
pub(super) fn of_flat_facets(mesh: &TriangleMesh, best: &[[Point; 6]]) -> f64 {
    UNEVEN * relative_change(mesh, |facet| swept_volume(&flat_patch(mesh, facet), &best[facet]).abs())
}

/// Relative error of the patches themselves, from what they lie above the facets, how much their normals turn, and how
/// far they are from patches with less exact normals.
pub(super) fn of_patches(mesh: &TriangleMesh, faces: &SmoothFaces, best: &[[Point; 6]], coarse: &[[Point; 6]]) -> f64 {
    let at_crease = faces.vertices_on_creases(mesh);
    UNEVEN
        * relative_change(mesh, |facet| {
            let turn = largest_turn(&best[facet]);
            let sagitta = swept_volume(&flat_patch(mesh, facet), &best[facet]).abs();
            let normals = swept_volume(&coarse[facet], &best[facet]).abs();
            let one_sided = mesh.facets()[facet].iter().any(|vertex| at_crease[*vertex]);
            let trust = if one_sided { FITTED_AT_CREASE } else { (FITTED_OVER_MEAN * turn).min(1.0) };
            QUADRATIC_MISS * turn * turn * sagitta + trust * normals
        })
}

/// Relative error of patches that keep creases from `crease_deg` on, should those be none that turn by less than
/// [`CERTAIN_CREASE_DEG`]; 0 where there are none of these.
pub(super) fn of_doubtful_creases(mesh: &TriangleMesh, crease_deg: f64) -> f64 {
    let [kept, rounded] = [crease_deg, CERTAIN_CREASE_DEG].map(|angle| SmoothFaces::new(mesh, angle));
    if crease_deg >= CERTAIN_CREASE_DEG || kept.is_crease == rounded.is_crease {
        return 0.0;
    }
    let [kept, rounded] = [kept, rounded].map(|faces| {
        let normals = VertexNormals::new(mesh, &faces);
        curved(mesh, &faces, &normals, Estimate::Fitted).patches
    });
    AT_TIPS * relative_change(mesh, |facet| swept_volume(&kept[facet], &rounded[facet]).abs())
}

fn relative_change(mesh: &TriangleMesh, displaced: impl Fn(usize) -> f64) -> f64 {
    let (mut total, mut area, mut volume) = (0.0, 0.0, 0.0);
    let origin = mesh.vertices().first().copied().unwrap_or_else(Point::zeros);
    for facet in 0..mesh.facets().len() {
        let normal = mesh.area_normal(facet);
        area += 0.5 * normal.norm();
        volume += normal.dot(&(mesh.corners(facet)[0] - origin)) / 6.0;
        total += displaced(facet);
    }
    let radius = (0.75 * volume.abs() / std::f64::consts::PI).cbrt();
    if area > 0.0 && radius > 0.0 { total / (area * radius) } else { 0.0 }
}

/// The largest angle, in radians, between the facet and its patch at a corner.
fn largest_turn(nodes: &[Point; 6]) -> f64 {
    let [a, b, c, ..] = nodes;
    let facet = (b - a).cross(&(c - a));
    let patch = Patch::SixNode(*nodes);
    let turn = |(u, v)| {
        let normal = patch.at(u, v).area_normal();
        normal.cross(&facet).norm().atan2(normal.dot(&facet))
    };
    [(0.0, 0.0), (1.0, 0.0), (0.0, 1.0)].map(turn).into_iter().fold(0.0, f64::max)
}

/// A flat facet as a six-node patch.
fn flat_patch(mesh: &TriangleMesh, facet: usize) -> [Point; 6] {
    let [a, b, c] = mesh.corners(facet);
    [a, b, c, 0.5 * (a + b), 0.5 * (b + c), 0.5 * (c + a)]
}

/// Signed volume between two patches with the same corners, to first order in their distance.
fn swept_volume(first: &[Point; 6], second: &[Point; 6]) -> f64 {
    let (first, second) = (Patch::SixNode(*first), Patch::SixNode(*second));
    let part = |point: &triangle_rule::RulePoint| {
        let (a, b) = (first.at(point.u, point.v), second.at(point.u, point.v));
        point.weight * (b.position - a.position).dot(&(0.5 * (a.area_normal() + b.area_normal())))
    };
    triangle_rule::degree_8().iter().map(part).sum()
}
