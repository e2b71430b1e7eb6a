//! Which shell lies inside which, by the solid angle under which one is seen from a vertex of the other
//! (Van Oosterom & Strackee 1983, IEEE Trans. Biomed. Eng. 30, 125-126; from memory).

use std::f64::consts::TAU;

use super::shells::Shell;
use crate::surface::{Point, TriangleMesh};

/// Fills in [`Shell::inside`] for closed shells that do not pass through each other.
pub(super) fn find_nesting(mesh: &TriangleMesh, shells: &mut [Shell], labels: &[usize]) {
    if shells.len() < 2 {
        return;
    }
    let mut members = vec![Vec::new(); shells.len()];
    for (facet, shell) in labels.iter().enumerate() {
        members[*shell].push(facet);
    }
    let boxes = members.iter().map(|facets| bounds(mesh, facets)).collect::<Vec<_>>();
    let mut order = (0..shells.len()).filter(|shell| shells[*shell].closed).collect::<Vec<_>>();
    order.sort_by(|a, b| shells[*a].volume.total_cmp(&shells[*b].volume).then(a.cmp(b)));
    for (place, inner) in order.iter().enumerate() {
        let seen_from = mesh.corners(shells[*inner].first_facet)[0];
        // From small to large, so that the first one that encloses is the innermost.
        let outer = order[place + 1..].iter().find(|outer| {
            let ((low, high), (outer_low, outer_high)) = (boxes[*inner], boxes[**outer]);
            let fits = (0..3).all(|axis| low[axis] >= outer_low[axis] && high[axis] <= outer_high[axis]);
            fits && turns_around(mesh, &members[**outer], &seen_from) > 0.5
        });
        shells[*inner].inside = outer.copied();
    }
}

fn bounds(mesh: &TriangleMesh, facets: &[usize]) -> (Point, Point) {
    let empty = (Point::repeat(f64::INFINITY), Point::repeat(f64::NEG_INFINITY));
    let corners = facets.iter().flat_map(|facet| mesh.corners(*facet));
    corners.fold(empty, |(low, high), x| (low.inf(&x), high.sup(&x)))
}

/// How many times the facets wind around a point: 1 inside a closed shell, 0 outside, whichever way it faces.
fn turns_around(mesh: &TriangleMesh, facets: &[usize], x: &Point) -> f64 {
    let angle = facets.iter().map(|facet| {
        let [a, b, c] = mesh.corners(*facet).map(|corner| corner - x);
        let (la, lb, lc) = (a.norm(), b.norm(), c.norm());
        let below = la * lb * lc + a.dot(&b) * lc + b.dot(&c) * la + c.dot(&a) * lb;
        2.0 * a.dot(&b.cross(&c)).atan2(below)
    });
    (angle.sum::<f64>() / (2.0 * TAU)).abs()
}
