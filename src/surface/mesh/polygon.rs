//! Polygons into triangles.
//!
//! Convex polygons become a fan from their first corner (quads: along the shorter diagonal); others are cut by
//! ear clipping in the plane of their mean normal (Meisters 1975, Amer. Math. Monthly 82, 648-651: every simple
//! polygon with more than three corners has two ears; reference from memory).

use crate::surface::Point;

/// The most corners that a polygon of a file may have: clipping ears takes time with the square of it.
pub(crate) const MAX_POLYGON_CORNERS: usize = 10_000;

/// Triangles over the corners of a polygon, as places in its list of corners; the direction of turn is kept. Fewer
/// than three corners give nothing.
///
/// The polygon should be nearly plane and simple. If it is not, the triangles still cover its boundary once, so that
/// a closed surface stays closed.
pub(crate) fn triangulate(corners: &[Point]) -> Vec<[usize; 3]> {
    let n = corners.len();
    match n {
        0..=2 => return Vec::new(),
        3 => return vec![[0, 1, 2]],
        _ => {}
    }
    let normal = newell_normal(corners);
    if is_convex(corners, &normal) {
        if n == 4 {
            let diagonals = [(corners[2] - corners[0]).norm(), (corners[3] - corners[1]).norm()];
            let first = usize::from(diagonals[1] < diagonals[0]);
            return vec![[first, first + 1, first + 2], [first, first + 2, (first + 3) % 4]];
        }
        return (1..n - 1).map(|i| [0, i, i + 1]).collect();
    }
    clip_ears(corners, &normal)
}

/// Twice the vector area of a closed polygon.
pub(crate) fn newell_normal(corners: &[Point]) -> Point {
    let Some(origin) = corners.first() else { return Point::zeros() };
    corners.windows(2).map(|pair| (pair[0] - origin).cross(&(pair[1] - origin))).sum()
}

fn is_convex(corners: &[Point], normal: &Point) -> bool {
    let n = corners.len();
    (0..n).all(|i| {
        let [a, b, c] = [corners[i], corners[(i + 1) % n], corners[(i + 2) % n]];
        (b - a).cross(&(c - b)).dot(normal) > 0.0
    })
}

fn clip_ears(corners: &[Point], normal: &Point) -> Vec<[usize; 3]> {
    let mut left = (0..corners.len()).collect::<Vec<_>>();
    let ear = |left: &[usize], i: usize| {
        let n = left.len();
        [left[(i + n - 1) % n], left[i % n], left[(i + 1) % n]]
    };
    let mut qualities = (0..left.len()).map(|i| ear_quality(corners, normal, &left, ear(&left, i))).collect::<Vec<_>>();
    let mut triangles = Vec::with_capacity(corners.len().saturating_sub(2));
    while left.len() > 3 {
        // The roundest ear; when rounding or a crossing boundary leaves none, any corner will do: the boundary is
        // what has to survive.
        let best = (0..left.len()).max_by(|a, b| qualities[*a].total_cmp(&qualities[*b])).unwrap_or(0);
        triangles.push(ear(&left, best));
        left.remove(best);
        qualities.remove(best);
        let n = left.len();
        for i in [(best + n - 1) % n, best % n] {
            qualities[i] = ear_quality(corners, normal, &left, ear(&left, i));
        }
    }
    triangles.extend(<[usize; 3]>::try_from(left).ok());
    triangles
}

/// Area over squared edge lengths for an ear, negative for a corner that is none.
fn ear_quality(corners: &[Point], normal: &Point, left: &[usize], ear: [usize; 3]) -> f64 {
    let [a, b, c] = ear.map(|i| corners[i]);
    let turn = |p: &Point, q: &Point, r: &Point| (q - p).cross(&(r - p)).dot(normal);
    let area = turn(&a, &b, &c);
    let edges = (b - a).norm_squared() + (c - b).norm_squared() + (a - c).norm_squared();
    let scale = normal.norm() * edges;
    if !(scale > 0.0 && area > 0.0) {
        return -1.0;
    }
    let blocked = left.iter().filter(|i| !ear.contains(i)).map(|i| corners[*i]).any(|x| {
        let inside = turn(&a, &b, &x) >= 0.0 && turn(&b, &c, &x) >= 0.0 && turn(&c, &a, &x) >= 0.0;
        // A bridge to a hole passes its ends twice: the same place is no obstacle.
        inside && x != a && x != b && x != c
    });
    if blocked { -1.0 } else { area / scale }
}
