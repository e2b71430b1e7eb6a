//! Do two triangles meet where they should not?
//!
//! All decisions rest on the signs of exact orientation determinants (Shewchuk 1997, Discrete Comput. Geom. 18,
//! 305-363; from memory), so that facets which merely share corners, or lie in one plane side by side, are never taken
//! for intersecting, whatever the rounding of their coordinates.

use robust::{Coord, Coord3D, orient2d, orient3d};

use crate::surface::Point;

/// Rounding of the distances below, relative to the coordinates, with a wide margin over 1e-16. It holds for slivers
/// too: however wrong their computed normal, the plane through a side leaves the third corner behind it, or nearer to
/// it than this.
const CLEARLY: f64 = 1e-12;

/// A place where the triangles meet apart from the corners they share, if there is one. Corners are named by vertex
/// number; triangles without area and triangles over the same three vertices never meet.
pub(super) fn meeting_point(names: [[usize; 3]; 2], corners: [[Point; 3]; 2]) -> Option<Point> {
    let [own, other] = names;
    let shared = own.iter().filter(|vertex| other.contains(vertex)).count();
    match shared {
        0 => (0..2).find_map(|i| {
            let [a, b, c] = corners[i];
            [(a, b), (b, c), (c, a)].iter().find_map(|(p, q)| segment_meets(p, q, &corners[1 - i]))
        }),
        1 => (0..2).find_map(|i| {
            // Edges that end in the shared corner meet the other triangle there; the third edge must not.
            let common = names[i].iter().position(|vertex| names[1 - i].contains(vertex))?;
            segment_meets(&corners[i][(common + 1) % 3], &corners[i][(common + 2) % 3], &corners[1 - i])
        }),
        2 => folded_over(names, corners),
        _ => None,
    }
}

/// Two triangles over one edge that lie in one plane on the same side of it.
fn folded_over(names: [[usize; 3]; 2], corners: [[Point; 3]; 2]) -> Option<Point> {
    let lone = |i: usize| names[i].iter().position(|vertex| !names[1 - i].contains(vertex));
    let (first, second) = (lone(0)?, lone(1)?);
    let (apex, a, b) = (corners[0][first], corners[0][(first + 1) % 3], corners[0][(first + 2) % 3]);
    let other = corners[1][second];
    if orientation(&a, &b, &apex, &other) != 0.0 {
        return None;
    }
    let axis = projection(&[a, b, apex])?;
    let side = |x: &Point| orientation_in_plane(&a, &b, x, axis);
    (side(&apex) * side(&other) > 0.0).then(|| (a + b + apex) / 3.0)
}

/// Where a closed segment meets a closed triangle.
fn segment_meets(p: &Point, q: &Point, triangle: &[Point; 3]) -> Option<Point> {
    let [a, b, c] = triangle;
    if is_clearly_outside(p, q, triangle) {
        return None;
    }
    let (at_p, at_q) = (orientation(a, b, c, p), orientation(a, b, c, q));
    if at_p == 0.0 && at_q == 0.0 {
        return segment_meets_in_plane(p, q, triangle);
    }
    if at_p * at_q > 0.0 || (at_p > 0.0 && at_q > 0.0) || (at_p < 0.0 && at_q < 0.0) {
        return None;
    }
    let turns = [orientation(p, q, a, b), orientation(p, q, b, c), orientation(p, q, c, a)];
    let meets = turns.iter().all(|turn| *turn >= 0.0) || turns.iter().all(|turn| *turn <= 0.0);
    let along = at_p / (at_p - at_q);
    meets.then(|| p + (q - p) * along)
}

/// A quick way out for most pairs, and for coplanar ones above all, whose determinants take longest: the segment lies
/// beyond one side of the triangle by more than any rounding.
fn is_clearly_outside(p: &Point, q: &Point, triangle: &[Point; 3]) -> bool {
    let [a, b, c] = triangle;
    let normal = (b - a).cross(&(c - a));
    let size = p.amax().max(q.amax()).max(a.amax());
    [(a, b), (b, c), (c, a)].into_iter().any(|(from, to)| {
        let outward = (to - from).cross(&normal);
        let beyond = |x: &Point| {
            let arm = x - from;
            outward.dot(&arm) > outward.norm() * CLEARLY * (size + arm.norm())
        };
        beyond(p) && beyond(q)
    })
}

fn segment_meets_in_plane(p: &Point, q: &Point, triangle: &[Point; 3]) -> Option<Point> {
    let axis = projection(triangle)?;
    let turn = |x: &Point, y: &Point, z: &Point| orientation_in_plane(x, y, z, axis);
    let [a, b, c] = triangle;
    let inside = |x: &Point| {
        let turns = [turn(a, b, x), turn(b, c, x), turn(c, a, x)];
        turns.iter().all(|t| *t >= 0.0) || turns.iter().all(|t| *t <= 0.0)
    };
    if let Some(x) = [p, q].into_iter().find(|x| inside(x)) {
        return Some(*x);
    }
    let opposite = |s: f64, t: f64| (s > 0.0 && t < 0.0) || (s < 0.0 && t > 0.0);
    [(a, b), (b, c), (c, a)].into_iter().find_map(|(r, s)| {
        // Touching at an end is covered above for p and q; a corner of the triangle on the segment counts as well.
        let (of_r, of_s) = (turn(p, q, r), turn(p, q, s));
        let (of_p, of_q) = (turn(r, s, p), turn(r, s, q));
        let crosses = opposite(of_p, of_q) && (opposite(of_r, of_s) || of_r == 0.0 || of_s == 0.0);
        crosses.then(|| p + (q - p) * (of_p / (of_p - of_q)))
    })
}

/// The axis along which the triangle is seen with area, the best one first.
fn projection(triangle: &[Point; 3]) -> Option<usize> {
    let [a, b, c] = triangle;
    let best = (b - a).cross(&(c - a)).iamax();
    [best, (best + 1) % 3, (best + 2) % 3].into_iter().find(|axis| orientation_in_plane(a, b, c, *axis) != 0.0)
}

fn orientation(a: &Point, b: &Point, c: &Point, d: &Point) -> f64 {
    let coord = |x: &Point| Coord3D { x: x.x, y: x.y, z: x.z };
    orient3d(coord(a), coord(b), coord(c), coord(d))
}

fn orientation_in_plane(a: &Point, b: &Point, c: &Point, axis: usize) -> f64 {
    let coord = |x: &Point| Coord { x: x[(axis + 1) % 3], y: x[(axis + 2) % 3] };
    orient2d(coord(a), coord(b), coord(c))
}
