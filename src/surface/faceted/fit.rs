//! The normal at a vertex from a polynomial through it, fitted to the vertices around: an osculating jet (Cazals &
//! Pouget 2005, Comput. Aided Geom. Design 22, 121-146; from memory).
//!
//! ```text
//! z(x, y) = sum c_ij x^i y^j,  1 <= i + j <= degree,    normal = (-c_10, -c_01, 1) / |.|
//! ```
//! in a frame with the vertex as origin and the first estimate of the normal along z. A fit of degree `d` gives the
//! normal with an error of order `h^d`.

use std::collections::HashSet;

use nalgebra::{DMatrix, DVector};

use super::normals::Fans;
use crate::surface::{Point, TriangleMesh};

/// Degree of the polynomial; less where there are too few vertices.
const DEGREE: usize = 3;

/// Vertices for each coefficient of the polynomial: more than one, so that noise of the coordinates is averaged.
const VERTICES_PER_COEFFICIENT: f64 = 1.3;

/// Rings of neighbours to collect at most.
const MOST_RINGS: usize = 3;

/// Enough vertices: fans with a great many neighbours, such as the apex of a cone, need no more.
const ENOUGH: usize = 64;

/// Singular values below this part of the largest carry no information, single-precision noise at most: the vertices lie
/// on too few lines.
const RANK: f64 = 3e-6;

/// Where the vertices leave the slope open, it should be that of the first estimate: linear terms cost this many times
/// more than others in the least solution.
const STIFF_SLOPE: f64 = 30.0;

/// The fitted unit normal of `face` at `vertex`; `None` if there are too few vertices around.
pub(super) fn fitted_normal(
    mesh: &TriangleMesh,
    fans: &Fans,
    face: usize,
    vertex: usize,
    first: &Point,
) -> Option<Point> {
    let (degree, around) = neighbourhood(mesh, fans, face, vertex)?;
    let origin = mesh.vertices()[vertex];
    let arms = around.iter().map(|other| mesh.vertices()[*other] - origin).collect::<Vec<_>>();
    let [across, along] = frame(first, &arms)?;
    let size = arms.iter().map(|arm| arm.norm()).sum::<f64>() / arms.len() as f64;

    let powers = powers(degree);
    let mut system = DMatrix::zeros(arms.len(), powers.len());
    let mut heights = DVector::zeros(arms.len());
    for (row, arm) in arms.iter().enumerate() {
        let (x, y, z) = (arm.dot(&across) / size, arm.dot(&along) / size, arm.dot(first) / size);
        // Near vertices count more.
        let weight = size / arm.norm();
        for (column, [i, j]) in powers.iter().enumerate() {
            system[(row, column)] = weight * x.powi(*i) * y.powi(*j);
        }
        heights[row] = weight * z;
    }
    let stiff = |column: usize| if column < 2 { STIFF_SLOPE } else { 1.0 };
    let norms = system.column_iter().map(|column| column.norm().max(f64::MIN_POSITIVE)).enumerate();
    let scales = norms.map(|(column, norm)| norm * stiff(column)).collect::<Vec<_>>();
    for (mut column, scale) in system.column_iter_mut().zip(&scales) {
        column /= *scale;
    }
    let decomposition = system.try_svd(true, true, 1e-12, 200)?;
    let rank = RANK * decomposition.singular_values.max();
    let coefficients = decomposition.solve(&heights, rank).ok()?;
    let (by_x, by_y) = (coefficients[0] / scales[0], coefficients[1] / scales[1]);
    (first - across * by_x - along * by_y).try_normalize(0.0)
}

/// Two directions across the normal, along and across the longer spread of the arms. Where the arms lie on a few lines,
/// as on the side of a drawn cylinder, the fit depends on the frame; so the frame must be the body's own.
fn frame(normal: &Point, arms: &[Point]) -> Option<[Point; 2]> {
    let first = Point::ith(normal.iamin(), 1.0).cross(normal).try_normalize(1e-9)?;
    let second = normal.cross(&first);
    let flat = arms.iter().map(|arm| (arm.dot(&first), arm.dot(&second)));
    let (difference, product) = flat.fold((0.0, 0.0), |(d, p), (x, y)| (d + x * x - y * y, p + 2.0 * x * y));
    let (sin, cos) = (0.5 * product.atan2(difference)).sin_cos();
    let across = cos * first + sin * second;
    Some([across, normal.cross(&across)])
}

/// Exponents of x and y, the linear terms first.
fn powers(degree: usize) -> Vec<[i32; 2]> {
    (1..=degree as i32).flat_map(|total| (0..=total).map(move |j| [total - j, j])).collect()
}

/// Vertices around, ring by ring until there are enough, and the degree that they allow.
fn neighbourhood(mesh: &TriangleMesh, fans: &Fans, face: usize, vertex: usize) -> Option<(usize, Vec<usize>)> {
    let enough = |degree: usize, count: usize| count as f64 >= VERTICES_PER_COEFFICIENT * powers(degree).len() as f64;
    let mut seen = HashSet::from([vertex]);
    let mut around = Vec::new();
    let mut ring = vec![vertex];
    for _ in 0..MOST_RINGS {
        let mut next = Vec::new();
        for other in ring.iter().flat_map(|vertex| fans.get(&(face, *vertex)).into_iter().flatten()) {
            next.extend(mesh.facets()[*other].into_iter().filter(|corner| seen.insert(*corner)));
        }
        around.extend(next.iter().copied());
        if enough(DEGREE, around.len()) || next.is_empty() {
            break;
        }
        ring = next;
    }
    around.truncate(ENOUGH);
    (1..=DEGREE).rev().find(|degree| *degree > 1 && enough(*degree, around.len())).map(|degree| (degree, around))
}
