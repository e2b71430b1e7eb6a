//! Touching pairs of flat panels, where the scale and the translations integrate in closed form.
//!
//! On flat panels the difference of the two points is exactly `rho V(d)`, so `G = G(V)/rho` leaves the integrals over
//! `rho` and the translations, and what stays are polynomials: one kernel value a direction. For panels with one corner in
//! common, one of the two points runs over an edge and the other over a whole triangle, whose integral is the closed
//! form of [`super::flat_inner`]; only the edge is integrated by quadrature, cut where it comes near the triangle.

use super::direction::DirectionRule;
use super::flat_inner::FlatTriangle;
use super::pair::PairBlock;
use super::touching::{PairPoint, reference};
use crate::stokes::green::stokeslet;
use crate::surface::Point;

/// Sums the points of directions that come in groups of `group`, one kernel value a group.
pub(super) fn sum_groups(
    corners: [&[Point; 3]; 2],
    orders: [[usize; 3]; 2],
    points: &[PairPoint],
    group: usize,
) -> PairBlock {
    let mut block = PairBlock::default();
    let areas = corners.map(|[a, b, c]| (b - a).cross(&(c - a)).norm());
    for directions in points.chunks_exact(group) {
        let mut products = [[0.0; 3]; 3];
        let mut vector = Point::zeros();
        for point in directions {
            let [one, two] = [(point.first, 0), (point.second, 1)].map(|(place, side)| {
                let [u, v] = reference(orders[side], place);
                [1.0 - u - v, u, v]
            });
            let weight = point.weight / point.scale;
            for (row, value) in products.iter_mut().zip(one) {
                for (product, other) in row.iter_mut().zip(two) {
                    *product += weight * value * other;
                }
            }
            let position = |corners: &[Point; 3], values: [f64; 3]| -> Point {
                corners[0] * values[0] + corners[1] * values[1] + corners[2] * values[2]
            };
            // The last point of a group has the largest scale, hence the fewest lost digits.
            vector = (position(corners[0], one) - position(corners[1], two)) / point.scale;
        }
        let kernel = stokeslet(&vector);
        for (row, products) in block.iter_mut().zip(&products) {
            for (entries, product) in row.iter_mut().zip(products) {
                for (entry, g) in entries.iter_mut().zip(kernel) {
                    *entry += product * g;
                }
            }
        }
    }
    block.iter_mut().flatten().flatten().for_each(|entry| *entry *= areas[0] * areas[1]);
    block
}

/// Two flat panels whose corners 0, in the given orders, are the same point.
pub(super) fn corner_pair(corners: [&[Point; 3]; 2], orders: [[usize; 3]; 2], rule: &DirectionRule) -> PairBlock {
    let mut block = PairBlock::default();
    for swapped in [false, true] {
        let (far, near) = if swapped { (1, 0) } else { (0, 1) };
        let far_area = {
            let [a, b, c] = corners[far];
            (b - a).cross(&(c - a)).norm()
        };
        let ordered = orders[near].map(|k| corners[near][k]);
        let triangle = FlatTriangle::new(&ordered);
        let edge = [corners[far][orders[far][1]], corners[far][orders[far][2]]];
        rule.edge(&edge, &ordered, &mut |share, weight| {
            let x = edge[0] + share * (edge[1] - edge[0]);
            let integrals = triangle.integrals(&x);
            // Far basis functions at scale rho: 1 - rho, rho (1 - share), rho share. Near ones, in terms of those at scale 1:
            // (1 - rho) + rho phi_0, rho phi_1, rho phi_2. With rho^3 from the volume element and 1/rho from the kernel, the
            // moments int rho^2 (1 - rho)^2, int rho^3 (1 - rho), int rho^4 are 1/30, 1/20, 1/5; int rho^2 (1 - rho) 1/12.
            let far_values = [None, Some(1.0 - share), Some(share)];
            for entry in 0..6 {
                let [t0, t1, t2] = [0, 1, 2].map(|b| integrals[b][entry]);
                let whole = t0 + t1 + t2;
                for (a, far_value) in far_values.iter().enumerate() {
                    let values = match far_value {
                        None => [whole / 30.0 + t0 / 20.0, t1 / 20.0, t2 / 20.0],
                        Some(value) => [whole / 20.0 + t0 / 5.0, t1 / 5.0, t2 / 5.0].map(|number| number * value),
                    };
                    for (b, value) in values.iter().enumerate() {
                        let (row, column) = (orders[far][a], orders[near][b]);
                        let sum = if swapped { &mut block[column][row] } else { &mut block[row][column] };
                        sum[entry] += weight * far_area * value;
                    }
                }
            }
        });
    }
    block
}
