//! The integrals of one pair of panels, by the rule that its closeness asks for.
//!
//! ```text
//! block[a][b] = int int phi_a(x) G(x - y) phi_b(y) dS(y) dS(x)
//! ```
//!
//! with the linear basis functions of the corners, and `G` by its six different entries.

use super::direction::DirectionRule;
use super::lanes::{Instructions, LANES, PAIR_NUMBERS};
use super::near::NearRule;
use super::touching::{PairPoint, TouchingRule, reference};
use super::touching_flat::{corner_pair, sum_groups};
use crate::surface::triangle_rule;
use crate::surface::{Panel, Panels, Patch, Point};

/// `block[a][b][entry]`: corner of the first panel, corner of the second, entry xx, xy, xz, yy, yz, zz.
pub type PairBlock = [[[f64; 6]; 3]; 3];

/// The rules for close pairs, by how the panels touch.
#[derive(Debug, Clone)]
pub struct PairRules {
    /// Curved panels: same panel, common edge, common corner.
    curved: [TouchingRule; 3],
    /// Flat panels: same panel, common edge.
    flat: [TouchingRule; 2],
    /// Flat panels with a common corner.
    flat_corner: DirectionRule,
    /// Close, with nothing in common.
    near: NearRule,
    /// Relative error that the rules leave in the resistance of a smooth body whose panels turn by one radian, and the
    /// power by which it falls with that angle. Measured on spheres, whose translation has no other error, and doubled.
    curvature_error: (f64, i32),
}

impl PairRules {
    /// The cheapest rules whose error is far below `accuracy`.
    pub fn for_accuracy(accuracy: f64) -> Self {
        if accuracy >= ECONOMICAL_FROM { Self::economical() } else { Self::standard() }
    }

    /// Relative error of the resistance that the quadrature leaves on these panels.
    ///
    /// On flat panels the close rules are exact in all but the directions, and what is left is below 1e-8.
    pub fn error_on(&self, panels: &Panels) -> f64 {
        let (factor, power) = self.curvature_error;
        let (mut sum, mut area) = (0.0, 0.0);
        for panel in panels.panels.iter().filter(|panel| panel.patch.as_flat().is_none()) {
            let normals = [(0.0, 0.0), (1.0, 0.0), (0.0, 1.0)].map(|(u, v)| panel.patch.at(u, v).area_normal());
            let turn = [0, 1, 2].map(|k| normals[k].angle(&normals[(k + 1) % 3])).into_iter().fold(0.0, f64::max);
            let weight = normals[0].norm();
            sum += weight * turn.powi(power);
            area += weight;
        }
        if area > 0.0 { factor * sum / area } else { 0.0 }
    }

    /// The rules for small errors: far below the discretisation error on all bodies, and a few 1e-8 on smooth ones
    /// (measured by the tests against [`PairRules::fine`]).
    pub fn standard() -> Self {
        let [d2, d6, d8] = [triangle_rule::degree_2(), triangle_rule::degree_6(), triangle_rule::degree_8()];
        Self {
            curved: [
                TouchingRule::new(DirectionRule::new(8, d8, 1.2), 5, 3, d6),
                TouchingRule::new(DirectionRule::new(6, d8, 1.2), 4, 3, d2),
                TouchingRule::new(DirectionRule::new(5, d8, 1.2), 4, 1, d2),
            ],
            flat: [
                TouchingRule::new(DirectionRule::new(8, d8, 1.2), 3, 2, d2),
                TouchingRule::new(DirectionRule::new(6, d8, 1.2), 3, 2, d2),
            ],
            flat_corner: DirectionRule::new(5, d8, 1.0),
            near: NearRule {
                inner_separation: 2.5,
                inner_depth: 30,
                outer_separation: 1.5,
                outer_depth: 9,
                rule: d8.to_vec(),
                tapered: true,
            },
            curvature_error: (1e-4, 6),
        }
    }

    /// Cheaper rules where a few 1e-6 do no harm.
    pub fn economical() -> Self {
        let [d2, d4, d6, d8] = [
            triangle_rule::degree_2(),
            triangle_rule::degree_4(),
            triangle_rule::degree_6(),
            triangle_rule::degree_8(),
        ];
        let standard = Self::standard();
        Self {
            curved: [
                TouchingRule::new(DirectionRule::new(6, d8, 1.0), 4, 3, d4),
                TouchingRule::new(DirectionRule::new(5, d6, 1.0), 3, 2, d2),
                TouchingRule::new(DirectionRule::new(4, d6, 0.9), 3, 1, d2),
            ],
            near: NearRule { inner_separation: 2.0, outer_separation: 1.2, outer_depth: 8, ..standard.near },
            curvature_error: (1e-3, 5),
            ..standard
        }
    }

    /// Much finer rules, to measure the standard ones by.
    pub fn fine() -> Self {
        let [d2, d8] = [triangle_rule::degree_2(), triangle_rule::degree_8()];
        Self {
            curved: [
                TouchingRule::new(DirectionRule::new(12, d8, 3.0).untapered(), 7, 5, d8),
                TouchingRule::new(DirectionRule::new(10, d8, 3.0).untapered(), 7, 5, d8),
                TouchingRule::new(DirectionRule::new(8, d8, 3.0).untapered(), 7, 5, d8),
            ],
            flat: [
                TouchingRule::new(DirectionRule::new(16, d8, 2.0).untapered(), 3, 2, d2),
                TouchingRule::new(DirectionRule::new(12, d8, 3.0).untapered(), 3, 2, d2),
            ],
            flat_corner: DirectionRule::new(10, d8, 2.0).untapered(),
            near: NearRule {
                inner_separation: 5.0,
                inner_depth: 40,
                outer_separation: 3.0,
                outer_depth: 9,
                rule: d8.to_vec(),
                tapered: false,
            },
            curvature_error: (1e-5, 6),
        }
    }

    /// The block of a panel with itself.
    pub fn same(&self, patch: &Patch) -> PairBlock {
        let middle = patch.at(1.0 / 3.0, 1.0 / 3.0);
        let tangents = [middle.tangent_u, middle.tangent_v];
        let orders = [[0, 1, 2]; 2];
        let half = match patch.as_flat() {
            Some(corners) => {
                let rule = &self.flat[0];
                sum_groups([corners; 2], orders, &rule.same(tangents), rule.group_size(true))
            }
            None => sum_points([patch; 2], orders, &self.curved[0].same(tangents)),
        };
        let mut block = half;
        for a in 0..3 {
            for b in 0..3 {
                for k in 0..6 {
                    block[a][b][k] = half[a][b][k] + half[b][a][k];
                }
            }
        }
        block
    }

    /// The block of two panels that are close; panels with one or two vertices in common are told by their vertex
    /// numbers.
    pub fn close(&self, first: &Panel, second: &Panel) -> PairBlock {
        let patches = [&first.patch, &second.patch];
        let flats = match patches.map(Patch::as_flat) {
            [Some(one), Some(two)] => Some([one, two]),
            _ => None,
        };
        let mut shared = Vec::with_capacity(2);
        // Shells that touch at a point are tangent there: their difference does not shrink in proportion to the distance
        // from the point, so they are close, not touching in the sense of the rules.
        let same_shell = first.shell == second.shell;
        for (a, vertex) in first.vertices.iter().enumerate().filter(|_| same_shell) {
            if let Some(b) = second.vertices.iter().position(|other| other == vertex) {
                shared.push((a, b));
            }
        }
        match shared[..] {
            [(a, b)] => {
                let orders = [a, b].map(|corner| [corner, (corner + 1) % 3, (corner + 2) % 3]);
                if let Some(corners) = flats {
                    return corner_pair(corners, orders, &self.flat_corner);
                }
                // Around one corner the potential is bounded, so thin panels, which would need a great many directions, can
                // be left to the near rule.
                if patches.iter().any(|patch| thinness(patch) > THIN) {
                    return near_block(&self.near.at_corner(), patches);
                }
                let [one, two] = [0, 1].map(|k| tangents_at(patches[k], orders[k], [0.0, 0.0]));
                sum_points(patches, orders, &self.curved[2].corner(one, two))
            }
            [(a0, b0), (a1, b1)] => {
                let orders = [[a0, a1, 3 - a0 - a1], [b0, b1, 3 - b0 - b1]];
                let [[edge, across], [_, across_other]] =
                    [0, 1].map(|k| tangents_at(patches[k], orders[k], [0.5, 0.0]));
                if let Some(corners) = flats {
                    let rule = &self.flat[1];
                    let points = rule.edge(edge, [across, across_other]);
                    return sum_groups(corners, orders, &points, rule.group_size(false));
                }
                sum_points(patches, orders, &self.curved[1].edge(edge, [across, across_other]))
            }
            _ => near_block(&self.near, patches),
        }
    }
}

/// The smaller panel is the outer one.
fn near_block(rule: &NearRule, [one, two]: [&Patch; 2]) -> PairBlock {
    let mut block = PairBlock::default();
    if size(one) <= size(two) {
        rule.integrate(one, two, &mut block);
        return block;
    }
    let mut turned = PairBlock::default();
    rule.integrate(two, one, &mut turned);
    for a in 0..3 {
        for b in 0..3 {
            block[a][b] = turned[b][a];
        }
    }
    block
}

/// From this accuracy on the economical rules do.
const ECONOMICAL_FROM: f64 = 1e-3;

/// Beyond this ratio of longest edge to height a panel is thin.
const THIN: f64 = 4.0;

/// Longest edge over the height on it.
fn thinness(patch: &Patch) -> f64 {
    let [a, b, c] = patch.corners();
    size(patch) / (b - a).cross(&(c - a)).norm()
}

/// Square of the longest edge.
fn size(patch: &Patch) -> f64 {
    let [a, b, c] = patch.corners();
    (b - a).norm_squared().max((c - b).norm_squared()).max((a - c).norm_squared())
}

/// Derivatives by `s` and `t` of the position at the point `(s, t)` in the given order of corners.
fn tangents_at(patch: &Patch, order: [usize; 3], place: [f64; 2]) -> [Point; 2] {
    let [u, v] = reference(order, place);
    let at = patch.at(u, v);
    let corner = [Point::zeros(), at.tangent_u, at.tangent_v];
    [corner[order[1]] - corner[order[0]], corner[order[2]] - corner[order[0]]]
}

fn sum_points(patches: [&Patch; 2], orders: [[usize; 3]; 2], points: &[PairPoint]) -> PairBlock {
    let mut numbers = vec![0.0; points.len().div_ceil(LANES) * LANES * PAIR_NUMBERS];
    for (chunk, points) in numbers.chunks_exact_mut(LANES * PAIR_NUMBERS).zip(points.chunks(LANES)) {
        // What is left of the last chunk has weight zero and any distance but zero.
        chunk[..LANES].fill(1.0);
        for (lane, point) in points.iter().enumerate() {
            let [u, v] = reference(orders[0], point.first);
            let [u_two, v_two] = reference(orders[1], point.second);
            let x = patches[0].at(u, v);
            let y = patches[1].at(u_two, v_two);
            let difference = x.position - y.position;
            let weight = point.weight * (x.area_normal().norm_squared() * y.area_normal().norm_squared()).sqrt();
            let first = [1.0 - u - v, u, v].map(|value| weight * value);
            let all = [difference.x, difference.y, difference.z, first[0], first[1], first[2]];
            for (k, number) in all.into_iter().chain([1.0 - u_two - v_two, u_two, v_two]).enumerate() {
                chunk[k * LANES + lane] = number;
            }
        }
    }
    let mut block = PairBlock::default();
    Instructions::best().add_point_pairs(&numbers, &mut block);
    block
}
