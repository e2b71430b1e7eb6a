//! Pairs of panels that are close but share no corner.
//!
//! One panel is the *outer* one, the other the *inner*. For every outer point the inner integral is found by cutting
//! the inner panel towards that point until each piece is small against its distance; pieces and their quadrature
//! points are made once a pair and shared by all outer points. The outer integrand is smooth but near the inner
//! panel's edges, so the outer panel is cut towards those, to a limited depth: what a neighbour of the inner panel
//! adds cancels what is left of the kinks there.

use super::direction::distance_to_segment;
use super::flat_inner::FlatTriangle;
use super::lanes::{CloudSums, Instructions, LANES, TILE_NUMBERS};
use super::pair::PairBlock;
use crate::surface::triangle_rule::{self, RulePoint};
use crate::surface::{Patch, Point};

/// How finely near pairs are integrated.
#[derive(Debug, Clone)]
pub struct NearRule {
    /// A piece of the inner panel is integrated at once when its centre is this many radii from the outer point.
    pub inner_separation: f64,
    /// Most bisections of the inner panel.
    pub inner_depth: usize,
    /// A piece of the outer panel is integrated at once when the inner panel's edges are this many radii away.
    pub outer_separation: f64,
    /// Most bisections of the outer panel.
    pub outer_depth: usize,
    /// The rule on each piece.
    pub rule: Vec<RulePoint>,
    /// Whether deeply cut pieces, which add little, get fewer points.
    pub tapered: bool,
}

/// Bisections of the outer panel at a common corner.
const CORNER_DEPTH: usize = 4;

/// A piece of a panel: a triangle in its reference coordinates.
type Piece = [[f64; 2]; 3];

const WHOLE: Piece = [[0.0, 0.0], [1.0, 0.0], [0.0, 1.0]];

/// A quadrature point of a piece: position and, for each corner's basis function, weight times area times value.
#[derive(Debug, Clone, Copy)]
struct CloudPoint {
    position: Point,
    weights: [f64; 3],
}

/// A piece with its points, and its halves once they are needed.
struct Node {
    piece: Piece,
    corners: [Point; 3],
    centre: Point,
    radius: f64,
    /// Quadrature points in chunks of [`LANES`], once they are needed.
    cloud: Vec<f64>,
    halves: Option<[usize; 2]>,
}

/// The pieces of one panel, made as they are needed.
struct Pieces<'a> {
    patch: &'a Patch,
    rule: &'a NearRule,
    nodes: Vec<Node>,
}

impl<'a> Pieces<'a> {
    fn new(patch: &'a Patch, rule: &'a NearRule) -> Self {
        let mut pieces = Self { patch, rule, nodes: Vec::new() };
        pieces.add(WHOLE);
        pieces
    }

    fn add(&mut self, piece: Piece) -> usize {
        let position = |[u, v]: [f64; 2]| self.patch.at(u, v).position;
        let corners = piece.map(position);
        let centre = position([0, 1].map(|k| (piece[0][k] + piece[1][k] + piece[2][k]) / 3.0));
        let radius = corners.iter().map(|corner| (corner - centre).norm()).fold(0.0, f64::max);
        self.nodes.push(Node { piece, corners, centre, radius, cloud: Vec::new(), halves: None });
        self.nodes.len() - 1
    }

    fn halves(&mut self, index: usize) -> [usize; 2] {
        if let Some(halves) = self.nodes[index].halves {
            return halves;
        }
        let node = &self.nodes[index];
        let [a, b, c] = node.piece;
        let sides = [0, 1, 2].map(|k| (node.corners[(k + 1) % 3] - node.corners[k]).norm_squared());
        let [from, to, apex] = if sides[0] >= sides[1] && sides[0] >= sides[2] {
            [a, b, c]
        } else if sides[1] >= sides[2] {
            [b, c, a]
        } else {
            [c, a, b]
        };
        let half = [0.5 * (from[0] + to[0]), 0.5 * (from[1] + to[1])];
        let halves = [[from, half, apex], [half, to, apex]].map(|piece| self.add(piece));
        self.nodes[index].halves = Some(halves);
        halves
    }

    fn fill(&mut self, index: usize, depth: usize) {
        if !self.nodes[index].cloud.is_empty() {
            return;
        }
        let points = cloud(self.patch, &self.nodes[index].piece, self.rule.points(depth));
        let mut numbers = vec![0.0; points.len().div_ceil(LANES) * TILE_NUMBERS * LANES];
        for (chunk, points) in numbers.chunks_exact_mut(TILE_NUMBERS * LANES).zip(points.chunks(LANES)) {
            for lane in 0..LANES {
                // What is left of the last chunk repeats a point with no weight.
                let (point, share) = match points.get(lane) {
                    Some(point) => (point, 1.0),
                    None => (&points[0], 0.0),
                };
                let [x, y, z] = [point.position.x, point.position.y, point.position.z];
                let all = [x, y, z].into_iter().chain(point.weights.map(|weight| share * weight));
                for (k, number) in all.enumerate() {
                    chunk[k * LANES + lane] = number;
                }
            }
        }
        self.nodes[index].cloud = numbers;
    }
}

fn cloud(patch: &Patch, [a, b, c]: &Piece, rule: &[RulePoint]) -> Vec<CloudPoint> {
    let ratio = ((b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0])).abs();
    rule.iter()
        .map(|point| {
            let place = |k: usize| a[k] + point.u * (b[k] - a[k]) + point.v * (c[k] - a[k]);
            let (u, v) = (place(0), place(1));
            let at = patch.at(u, v);
            let weight = point.weight * ratio * at.area_normal().norm();
            CloudPoint { position: at.position, weights: [1.0 - u - v, u, v].map(|value| value * weight) }
        })
        .collect()
}

impl NearRule {
    fn points(&self, depth: usize) -> &[RulePoint] {
        match depth {
            _ if !self.tapered => &self.rule,
            0..4 => &self.rule,
            4..8 => triangle_rule::degree_4(),
            _ => triangle_rule::degree_2(),
        }
    }

    /// The rule for panels with a common corner: next to it pieces would be cut without end for a bounded integrand.
    pub fn at_corner(&self) -> Self {
        Self { outer_depth: self.outer_depth.min(CORNER_DEPTH), ..self.clone() }
    }

    /// Adds the pair's integrals to `block`, whose first index is the outer panel's corner.
    pub fn integrate(&self, outer: &Patch, inner: &Patch, block: &mut PairBlock) {
        let edges = edge_points(inner);
        if let Some(corners) = inner.as_flat() {
            let triangle = FlatTriangle::new(corners);
            self.outer(outer, &WHOLE, 0, &edges, &mut |x| triangle.integrals(x), block);
            return;
        }
        let mut pieces = Pieces::new(inner, self);
        let instructions = Instructions::best();
        let mut integrals = |x: &Point| {
            let mut sums: CloudSums = [[[0.0; LANES]; 6]; 3];
            self.inner(x, 0, 0, &mut pieces, instructions, &mut sums);
            sums.map(|row| row.map(|lanes| lanes.iter().sum()))
        };
        self.outer(outer, &WHOLE, 0, &edges, &mut integrals, block);
    }

    fn outer(
        &self,
        patch: &Patch,
        piece: &Piece,
        depth: usize,
        edges: &[[Point; 2]],
        inner: &mut dyn FnMut(&Point) -> [[f64; 6]; 3],
        block: &mut PairBlock,
    ) {
        if depth < self.outer_depth {
            let position = |[u, v]: [f64; 2]| patch.at(u, v).position;
            let corners = piece.map(position);
            let centre = position([0, 1].map(|k| (piece[0][k] + piece[1][k] + piece[2][k]) / 3.0));
            let radius = corners.iter().map(|corner| (corner - centre).norm()).fold(0.0, f64::max);
            let distance = edges.iter().map(|edge| distance_to_segment(&centre, edge)).fold(f64::INFINITY, f64::min);
            if distance < self.outer_separation * radius {
                let sides = [0, 1, 2].map(|k| (corners[(k + 1) % 3] - corners[k]).norm_squared());
                let k = if sides[0] >= sides[1] && sides[0] >= sides[2] {
                    0
                } else if sides[1] >= sides[2] {
                    1
                } else {
                    2
                };
                let [from, to, apex] = [piece[k], piece[(k + 1) % 3], piece[(k + 2) % 3]];
                let half = [0.5 * (from[0] + to[0]), 0.5 * (from[1] + to[1])];
                for part in [[from, half, apex], [half, to, apex]] {
                    self.outer(patch, &part, depth + 1, edges, inner, block);
                }
                return;
            }
        }
        for point in cloud(patch, piece, self.points(depth)) {
            let integrals = inner(&point.position);
            for (row, weight) in block.iter_mut().zip(point.weights) {
                for (entry, value) in row.iter_mut().flatten().zip(integrals.iter().flatten()) {
                    *entry += weight * value;
                }
            }
        }
    }

    fn inner(
        &self,
        x: &Point,
        index: usize,
        depth: usize,
        pieces: &mut Pieces<'_>,
        instructions: Instructions,
        sums: &mut CloudSums,
    ) {
        let node = &pieces.nodes[index];
        if depth < self.inner_depth && (x - node.centre).norm() < self.inner_separation * node.radius {
            for half in pieces.halves(index) {
                self.inner(x, half, depth + 1, pieces, instructions, sums);
            }
            return;
        }
        pieces.fill(index, depth);
        instructions.add_cloud(&[x.x, x.y, x.z], &pieces.nodes[index].cloud, sums);
    }
}

/// The three edges as chords: one each if flat, four each if curved.
fn edge_points(patch: &Patch) -> Vec<[Point; 2]> {
    let parts = if patch.as_flat().is_some() { 1 } else { 4 };
    let corner = WHOLE;
    let mut segments = Vec::with_capacity(3 * parts);
    for k in 0..3 {
        let (from, to) = (corner[k], corner[(k + 1) % 3]);
        let at = |step: usize| {
            let share = step as f64 / parts as f64;
            patch.at(from[0] + share * (to[0] - from[0]), from[1] + share * (to[1] - from[1])).position
        };
        segments.extend((0..parts).map(|step| [at(step), at(step + 1)]));
    }
    segments
}
