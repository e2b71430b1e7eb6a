//! Directions of a touching pair, cut until the kernel varies mildly over each cell.
//!
//! After the change of variables of [`super::touching`] the difference of the two points is `rho V(d)`, with `V`
//! affine in the direction coordinates `d` on each face. What is left of the singularity is `1/|V(d)|`, which is
//! nearly singular when a panel is thin or the two panels nearly fold onto each other. Cells are bisected until they
//! are small against the distance of `V` from zero, so that on thin panels their number grows like the logarithm of the
//! aspect ratio and one rule serves all shapes.
//!
//! Where `V` comes near zero along a whole line (two thin panels side by side), isotropic cells would be many. There the
//! coordinates are taken one after the other: the inner integral is cut towards its own nearest point, and the outer one
//! only where the inner, as a function of the outer coordinate, is not smooth.

use super::gauss::gauss_legendre;
use crate::surface::Point;
use crate::surface::triangle_rule::{self, RulePoint};

/// Most bisections of a triangle's cell: what is left is `2^-13` of its size.
const DEEPEST_TRIANGLE: usize = 26;

/// Most bisections of an interval.
const DEEPEST_INTERVAL: usize = 20;

/// An affine map from one or two direction coordinates to the difference vector.
#[derive(Debug, Clone, Copy)]
pub struct Affine {
    /// Value at the origin.
    pub origin: Point,
    /// Derivative by each coordinate.
    pub slopes: [Point; 2],
}

impl Affine {
    fn at(&self, d: [f64; 2]) -> Point {
        self.origin + self.slopes[0] * d[0] + self.slopes[1] * d[1]
    }
}

/// How finely directions are integrated.
#[derive(Debug, Clone)]
pub struct DirectionRule {
    /// Gauss points for an interval, on `[0, 1]`.
    line: Vec<(f64, f64)>,
    /// Points for a triangle.
    triangle: Vec<RulePoint>,
    /// Whether deeply cut cells get fewer points.
    tapered: bool,
    /// Gauss points for deep and for very deep outer intervals.
    short_lines: [Vec<(f64, f64)>; 2],
    /// A cell is cut while its centre is nearer to what it must avoid than this many half sizes.
    separation: f64,
}

impl DirectionRule {
    /// A rule with `line` Gauss points an interval and the given points a triangle.
    pub fn new(line: usize, triangle: &[RulePoint], separation: f64) -> Self {
        let short_lines = [line.div_ceil(2) + 1, line.div_ceil(3) + 1].map(gauss_legendre);
        Self { line: gauss_legendre(line), triangle: triangle.to_vec(), tapered: true, short_lines, separation }
    }

    /// The same rule with all its points on every cell.
    pub fn untapered(self) -> Self {
        Self { tapered: false, ..self }
    }

    /// The integral over a cell of a triangle, or over an outer interval, shrinks with the cell's size, so small cells may
    /// have a larger relative error.
    fn outer_line(&self, depth: usize) -> &[(f64, f64)] {
        match depth {
            _ if !self.tapered => &self.line,
            0..3 => &self.line,
            3..6 => &self.short_lines[0],
            _ => &self.short_lines[1],
        }
    }

    fn cell(&self, depth: usize) -> &[RulePoint] {
        match depth {
            _ if !self.tapered => &self.triangle,
            0..5 => &self.triangle,
            5..9 => triangle_rule::degree_4(),
            _ => triangle_rule::degree_2(),
        }
    }

    /// Points and weights on `[0, 1]`; `V = origin + d slope` must stay away from zero.
    pub fn interval(&self, origin: Point, slope: Point, take: &mut dyn FnMut(f64, f64)) {
        let half_size = 0.5 * slope.norm();
        let needs_cut = |middle: f64, size: f64| (origin + middle * slope).norm() < self.separation * half_size * size;
        self.cut_interval([0.0, 1.0], 0, &needs_cut, false, take);
    }

    /// Points and weights on `[0, 1]^2`, coordinate 1 innermost.
    pub fn square(&self, map: &Affine, take: &mut dyn FnMut([f64; 2], f64)) {
        let [outer, inner] = map.slopes;
        let (half_size, inner_square) = (0.5 * outer.norm(), inner.norm_squared());
        let half_approach = 0.5 * (outer - inner * (outer.dot(&inner) / inner_square)).norm();
        let needs_cut = |middle: f64, size: f64| {
            let start = map.at([middle, 0.0]);
            let end = start + inner;
            let nearest = start + inner * (-start.dot(&inner) / inner_square).clamp(0.0, 1.0);
            start.norm().min(end.norm()) < self.separation * half_size * size
                || nearest.norm() < self.separation * half_approach * size
        };
        self.cut_interval([0.0, 1.0], 0, &needs_cut, true, &mut |d, weight| {
            self.interval(map.at([d, 0.0]), inner, &mut |other, inner_weight| take([d, other], weight * inner_weight));
        });
    }

    /// Points and weights on the triangle `d0, d1 >= 0, d0 + d1 <= 1`.
    pub fn triangle(&self, map: &Affine, take: &mut dyn FnMut([f64; 2], f64)) {
        self.cut_triangle(map, [[0.0, 0.0], [1.0, 0.0], [0.0, 1.0]], 0, take);
    }

    /// Points and weights on an edge in space, crowded where it comes near the outline of a triangle.
    pub fn edge(&self, edge: &[Point; 2], outline: &[Point; 3], take: &mut dyn FnMut(f64, f64)) {
        let along = edge[1] - edge[0];
        let half_size = 0.5 * along.norm();
        let needs_cut = |middle: f64, size: f64| {
            let centre = edge[0] + middle * along;
            let distance = |k: usize| distance_to_segment(&centre, &[outline[k], outline[(k + 1) % 3]]);
            distance(0).min(distance(1)).min(distance(2)) < self.separation * half_size * size
        };
        self.cut_interval([0.0, 1.0], 0, &needs_cut, true, take);
    }

    fn cut_interval(
        &self,
        [from, to]: [f64; 2],
        depth: usize,
        needs_cut: &dyn Fn(f64, f64) -> bool,
        outer: bool,
        take: &mut dyn FnMut(f64, f64),
    ) {
        let middle = 0.5 * (from + to);
        if depth < DEEPEST_INTERVAL && needs_cut(middle, to - from) {
            self.cut_interval([from, middle], depth + 1, needs_cut, outer, take);
            self.cut_interval([middle, to], depth + 1, needs_cut, outer, take);
            return;
        }
        for &(x, weight) in if outer { self.outer_line(depth) } else { &self.line } {
            take(from + (to - from) * x, weight * (to - from));
        }
    }

    fn cut_triangle(&self, map: &Affine, corners: [[f64; 2]; 3], depth: usize, take: &mut dyn FnMut([f64; 2], f64)) {
        let [a, b, c] = corners;
        let centre = [0, 1].map(|k| (a[k] + b[k] + c[k]) / 3.0);
        let edges = [[a, b, c], [b, c, a], [c, a, b]];
        let lengths =
            edges.map(|[from, to, _]| (map.slopes[0] * (to[0] - from[0]) + map.slopes[1] * (to[1] - from[1])).norm());
        let longest = if lengths[0] >= lengths[1] && lengths[0] >= lengths[2] {
            0
        } else if lengths[1] >= lengths[2] {
            1
        } else {
            2
        };
        if depth < DEEPEST_TRIANGLE && map.at(centre).norm() < self.separation * 0.5 * lengths[longest] {
            let [from, to, apex] = edges[longest];
            let half = [0, 1].map(|k| 0.5 * (from[k] + to[k]));
            self.cut_triangle(map, [from, half, apex], depth + 1, take);
            self.cut_triangle(map, [half, to, apex], depth + 1, take);
            return;
        }
        let area_ratio = ((b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0])).abs();
        for point in self.cell(depth) {
            let place = [0, 1].map(|k| a[k] + point.u * (b[k] - a[k]) + point.v * (c[k] - a[k]));
            take(place, point.weight * area_ratio);
        }
    }
}

/// Distance of a point from a segment.
pub(super) fn distance_to_segment(x: &Point, [from, to]: &[Point; 2]) -> f64 {
    let along = to - from;
    let share = ((x - from).dot(&along) / along.norm_squared()).clamp(0.0, 1.0);
    (x - from - share * along).norm()
}
