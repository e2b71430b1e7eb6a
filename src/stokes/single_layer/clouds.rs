//! Quadrature points of all panels for the far field, laid out in tiles of [`LANES`] panels.

use crate::stokes::quadrature::lanes::{LANES, TILE_NUMBERS as NUMBERS};
use crate::surface::triangle_rule::RulePoint;
use crate::surface::{Panel, Panels};

/// The points of one rule on all panels.
pub(super) struct Clouds {
    /// Points a panel.
    pub points: usize,
    /// A tile after another; within a tile, point after point: x, y, z and the three corners' weights (weight times area
    /// times basis function), each for all lanes.
    values: Vec<f64>,
}

impl Clouds {
    pub fn new(panels: &Panels, order: &[usize], rule: &[RulePoint]) -> Self {
        let tile_count = order.len().div_ceil(LANES);
        let stride = rule.len() * NUMBERS * LANES;
        let mut values = vec![0.0; tile_count * stride];
        for (tile, numbers) in values.chunks_exact_mut(stride).enumerate() {
            for lane in 0..LANES {
                // The last tile is filled up with its last panel, whose results nobody reads.
                let place = (tile * LANES + lane).min(order.len() - 1);
                fill(&panels.panels[order[place]], rule, lane, numbers);
            }
        }
        Self { points: rule.len(), values }
    }

    /// The numbers of one tile.
    pub fn tile(&self, tile: usize) -> &[f64] {
        let stride = self.points * NUMBERS * LANES;
        &self.values[tile * stride..(tile + 1) * stride]
    }

    /// One panel's points, in the same order, without the lanes.
    pub fn single(&self, place: usize, numbers: &mut Vec<f64>) {
        let lane = place % LANES;
        numbers.clear();
        numbers.extend(self.tile(place / LANES).chunks_exact(LANES).map(|lanes| lanes[lane]));
    }
}

fn fill(panel: &Panel, rule: &[RulePoint], lane: usize, numbers: &mut [f64]) {
    for (point, lanes) in rule.iter().zip(numbers.chunks_exact_mut(NUMBERS * LANES)) {
        let at = panel.patch.at(point.u, point.v);
        let weight = point.weight * at.area_normal().norm();
        let basis = [1.0 - point.u - point.v, point.u, point.v].map(|value| value * weight);
        let all = [at.position.x, at.position.y, at.position.z, basis[0], basis[1], basis[2]];
        for (slot, number) in lanes[lane..].iter_mut().step_by(LANES).zip(all) {
            *slot = number;
        }
    }
}
