//! Constant traction collocated at centroids: the method people write by hand, as an independent check.

use faer::Mat;
use faer::linalg::solvers::Solve;
use slowmote::stokes::quadrature::flat_inner::FlatTriangle;
use slowmote::surface::Point;

/// Hydrodynamic radius of the unit cube with `cells` by `cells` uniform squares a face.
pub fn drag_of_a_cube(cells: usize) -> f64 {
    let triangles = cube(cells);
    let size = 3 * triangles.len();
    let mut matrix = Mat::<f64>::zeros(size, size);
    for (column, corners) in triangles.iter().enumerate() {
        let source = FlatTriangle::new(corners);
        for (row, target) in triangles.iter().enumerate() {
            let x = (target[0] + target[1] + target[2]) / 3.0;
            let integrals = source.integrals(&x);
            let [xx, xy, xz, yy, yz, zz] =
                std::array::from_fn(|entry| integrals.iter().map(|corner| corner[entry]).sum::<f64>());
            for (i, values) in [[xx, xy, xz], [xy, yy, yz], [xz, yz, zz]].iter().enumerate() {
                for (j, value) in values.iter().enumerate() {
                    matrix[(3 * row + i, 3 * column + j)] = value / (8.0 * std::f64::consts::PI);
                }
            }
        }
    }
    let velocity = Mat::<f64>::from_fn(size, 1, |row, _| if row % 3 == 0 { 1.0 } else { 0.0 });
    let traction = matrix.partial_piv_lu().solve(&velocity);
    let force =
        triangles.iter().enumerate().map(|(k, [a, b, c])| 0.5 * (b - a).cross(&(c - a)).norm() * traction[(3 * k, 0)]);
    force.sum::<f64>() / (6.0 * std::f64::consts::PI)
}

fn cube(cells: usize) -> Vec<[Point; 3]> {
    let mut triangles = Vec::new();
    let place = |step: usize| step as f64 / cells as f64 - 0.5;
    for axis in 0..3 {
        for side in [-0.5, 0.5] {
            let point = |i: usize, j: usize| {
                let mut x = Point::zeros();
                x[axis] = side;
                x[(axis + 1) % 3] = place(i);
                x[(axis + 2) % 3] = place(j);
                x
            };
            for i in 0..cells {
                for j in 0..cells {
                    let [a, b, c, d] = [point(i, j), point(i + 1, j), point(i + 1, j + 1), point(i, j + 1)];
                    triangles.extend([[a, b, c], [a, c, d]]);
                }
            }
        }
    }
    triangles
}
