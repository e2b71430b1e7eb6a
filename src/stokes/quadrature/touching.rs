//! Pairs of panels that share a corner, an edge, or all three corners.
//!
//! The integrand is singular where the two points meet. In each case the four reference coordinates are changed to a
//! scale `rho` in `[0, 1]`, a direction on the faces of a polytope, and translations along what is shared. With `z`
//! the coordinates whose vanishing makes the points meet (`k` of them) and `g(z)` the gauge of the polytope,
//!
//! ```text
//! z = rho d,  g(d) = 1,       int F dz dt = sum_faces int dA(d) int_0^1 rho^(k-1) d rho int_(room(rho)) dt F,
//! ```
//!
//! and the room left for the translations shrinks by the plain factor `1 - rho`:
//!
//! | shared | z | k | gauge | translations |
//! |---|---|---|---|---|
//! | all | `eta - xi` | 2 | hexagon `T - T` | a triangle, scaled by `1 - rho` |
//! | edge | `(s' - s, t, t')` | 3 | `max(t, t' + sigma)` or `max(t - sigma, t')` by the sign of `sigma = s' - s` | a line, scaled by `1 - rho` |
//! | corner | `(s, t, s', t')` | 4 | `max(s + t, s' + t')` | none |
//!
//! `rho^(k-1) G` is smooth in `rho`, and on flat panels the integrand is a polynomial in everything but the direction:
//! three points in `rho` and the lowest rules for the translations are exact there. The direction is integrated by
//! [`super::direction`], whatever the aspect ratio. The idea of regularising coordinates is that of Sauter & Schwab,
//! Boundary Element Methods (2011), chapter 5; the splitting by gauge is derived here.

use super::direction::{Affine, DirectionRule};
use super::gauss::gauss_legendre;
use crate::surface::Point;
use crate::surface::triangle_rule::RulePoint;

/// A quadrature point of a pair; for [`TouchingRule::same`] it stands for the pair with the two points exchanged too.
#[derive(Debug, Clone, Copy)]
pub struct PairPoint {
    /// `(s, t)` in the first panel, counted from its corners in the order of what is shared.
    pub first: [f64; 2],
    /// `(s, t)` in the second panel.
    pub second: [f64; 2],
    /// The scale `rho`.
    pub scale: f64,
    /// Weight.
    pub weight: f64,
}

/// Reference coordinates `[u, v]` of the point `(s, t)` counted from the corners in the given order.
pub(super) fn reference(order: [usize; 3], [s, t]: [f64; 2]) -> [f64; 2] {
    let mut weights = [0.0; 3];
    weights[order[0]] = 1.0 - s - t;
    weights[order[1]] = s;
    weights[order[2]] = t;
    [weights[1], weights[2]]
}

/// Rules for touching pairs.
#[derive(Debug, Clone)]
pub struct TouchingRule {
    directions: DirectionRule,
    scale: Vec<(f64, f64)>,
    line: Vec<(f64, f64)>,
    triangle: Vec<RulePoint>,
}

impl TouchingRule {
    /// `scale` points in `rho`, `line` and `triangle` for the translations.
    pub fn new(directions: DirectionRule, scale: usize, line: usize, triangle: &[RulePoint]) -> Self {
        Self { directions, scale: gauss_legendre(scale), line: gauss_legendre(line), triangle: triangle.to_vec() }
    }

    /// Points that share a direction, for panels with all or two corners in common: they come one after another.
    pub fn group_size(&self, same: bool) -> usize {
        self.scale.len() * if same { self.triangle.len() } else { self.line.len() }
    }

    /// A panel with itself; `tangents` are `dx/du` and `dx/dv` at its middle. Half of the hexagon: see [`PairPoint`].
    pub fn same(&self, tangents: [Point; 2]) -> Vec<PairPoint> {
        let corners = [[1.0, 0.0], [0.0, 1.0], [-1.0, 1.0], [-1.0, 0.0]];
        let vector = |z: [f64; 2]| tangents[0] * z[0] + tangents[1] * z[1];
        let mut points = Vec::new();
        for ends in corners.windows(2) {
            let (from, to) = (ends[0], ends[1]);
            self.directions.interval(vector(from), vector(to) - vector(from), &mut |d, weight| {
                let z = [0, 1].map(|k| from[k] + d * (to[k] - from[k]));
                for &(rho, w) in &self.scale {
                    let room = 1.0 - rho;
                    let step = z.map(|component| rho * component);
                    let base = step.map(|component| (-component).max(0.0));
                    let weight = weight * w * rho * room * room;
                    for place in &self.triangle {
                        let first = [base[0] + room * place.u, base[1] + room * place.v];
                        let second = [first[0] + step[0], first[1] + step[1]];
                        points.push(PairPoint { first, second, scale: rho, weight: weight * place.weight });
                    }
                }
            });
        }
        points
    }

    /// Two panels with the edge from corner 0 to corner 1 in common, in the same direction. `edge` is `dx/ds` along
    /// it, `across` are `dx/dt` towards the third corners of the first and the second panel, all at its middle.
    pub fn edge(&self, edge: Point, across: [Point; 2]) -> Vec<PairPoint> {
        let [first, second] = across;
        let mut points = Vec::new();
        // Faces as affine maps of their coordinates (d0, d1) to (sigma, t, t').
        let faces: [(bool, [f64; 3], [[f64; 3]; 2]); 4] = [
            (true, [0.0, 1.0, 0.0], [[1.0, 0.0, 0.0], [0.0, 0.0, 1.0]]),
            (false, [1.0, 0.0, 0.0], [[-1.0, 0.0, 1.0], [0.0, 1.0, 0.0]]),
            (false, [-1.0, 0.0, 0.0], [[1.0, 1.0, 0.0], [0.0, 0.0, 1.0]]),
            (true, [0.0, 0.0, 1.0], [[-1.0, 0.0, 0.0], [0.0, 1.0, 0.0]]),
        ];
        for (is_triangle, origin, slopes) in faces {
            let vector = |z: [f64; 3]| edge * z[0] - first * z[1] + second * z[2];
            let map = Affine { origin: vector(origin), slopes: slopes.map(vector) };
            let mut take = |d: [f64; 2], weight: f64| {
                let [sigma, t, t_other] = [0, 1, 2].map(|k| origin[k] + d[0] * slopes[0][k] + d[1] * slopes[1][k]);
                for &(rho, w) in &self.scale {
                    let room = 1.0 - rho;
                    let base = (-rho * sigma).max(0.0);
                    for &(along, w_along) in &self.line {
                        let s = base + room * along;
                        let weight = weight * w * rho * rho * room * w_along;
                        let (first, second) = ([s, rho * t], [s + rho * sigma, rho * t_other]);
                        points.push(PairPoint { first, second, scale: rho, weight });
                    }
                }
            };
            if is_triangle {
                self.directions.triangle(&map, &mut take);
            } else {
                self.directions.square(&map, &mut take);
            }
        }
        points
    }

    /// Two panels with corner 0 in common; `first` and `second` are `dx/du, dx/dv` of each at that corner.
    pub fn corner(&self, first: [Point; 2], second: [Point; 2]) -> Vec<PairPoint> {
        let mut points = Vec::new();
        for swapped in [false, true] {
            // `near` is inside its triangle, `far` on the edge opposite the shared corner.
            let (near, far) = if swapped { (first, second) } else { (second, first) };
            let outline = [Point::zeros(), near[0], near[1]];
            self.directions.edge(&far, &outline, &mut |share, edge_weight| {
                let map = Affine { origin: -(far[0] + share * (far[1] - far[0])), slopes: near };
                self.directions.triangle(&map, &mut |d, weight| {
                    for &(rho, w) in &self.scale {
                        let on_edge = [rho * (1.0 - share), rho * share];
                        let inside = [rho * d[0], rho * d[1]];
                        let weight = edge_weight * weight * w * rho.powi(3);
                        let (first, second) = if swapped { (inside, on_edge) } else { (on_edge, inside) };
                        points.push(PairPoint { first, second, scale: rho, weight });
                    }
                });
            });
        }
        points
    }
}
