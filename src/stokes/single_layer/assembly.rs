//! Assembly of the dense Galerkin matrix.
//!
//! ```text
//! A[3 m + i][3 n + j] = int int phi_m(x) G_ij(x - y) phi_n(y) dS(y) dS(x)
//! ```
//!
//! Each pair of panels is integrated once, and the matrix is `M + M^T` with `M` the sum over pairs whose first panel
//! comes later in a space-filling order. Groups of target panels are worked on in parallel, each into a buffer of its own;
//! the buffers are then added to the matrix column by column, in the order of the groups. So no two threads write to the
//! same place, and the sum does not depend on the number of threads.

use rayon::prelude::*;

use super::clouds::Clouds;
use crate::stokes::quadrature::lanes::{LANES, TileBlock};
use crate::stokes::quadrature::{Instructions, PairBlock, PairRules};
use crate::surface::{Panels, Point, triangle_rule};

/// Far rules by the distance of the centres over the larger radius, farthest first; nearer pairs are close ones.
///
/// Measured on a 3:2:1 ellipsoid of 320 panels: these keep the resistance to 1e-7; three points beyond 6 radii would cost
/// 4e-5.
const FAR_DISTANCES: [f64; 3] = [6.0, 3.0, 2.0];

/// Bytes that assembling and factorising a system of `unknowns` takes: the matrix, buffers, and coarse copies.
pub fn bytes_needed(unknowns: usize) -> u64 {
    let unknowns = unknowns as u64;
    let matrix = 8 * unknowns * unknowns;
    matrix + matrix / 8 + 2 * (1 << 20)
}

/// The matrix, both halves, column by column; `progress` hears the fraction done.
pub fn assemble(panels: &Panels, rules: &PairRules, instructions: Instructions, progress: &dyn Fn(f64)) -> Vec<f64> {
    let size = 3 * panels.node_count;
    let far = Far::new(panels, instructions);
    let mut matrix = vec![0.0; size * size];
    let count = panels.panels.len();
    let group_size = (count / 32).clamp(LANES, 48).next_multiple_of(LANES);
    let groups = (0..count).step_by(group_size).map(|from| from..(from + group_size).min(count)).collect::<Vec<_>>();
    let wave = 2 * rayon::current_num_threads();
    // The work of a group grows with its place, so waves of one size take ever longer; the last pairs count most.
    for wave_groups in groups.chunks(wave) {
        let buffers =
            wave_groups.par_iter().map(|group| Buffer::compute(panels, &far, rules, group.clone())).collect::<Vec<_>>();
        matrix.par_chunks_mut(3 * size).enumerate().for_each(|(node, columns)| {
            for buffer in &buffers {
                buffer.add_to(node, columns, size);
            }
        });
        let done = wave_groups.last().map_or(count, |group| group.end) as f64 / count as f64;
        progress(done * done);
    }
    add_transpose(&mut matrix, size);
    matrix
}

/// What the far field needs of all panels, in the order of the space-filling curve.
struct Far {
    order: Vec<usize>,
    centres: Vec<Point>,
    radii: Vec<f64>,
    clouds: [Clouds; 3],
    instructions: Instructions,
}

impl Far {
    fn new(panels: &Panels, instructions: Instructions) -> Self {
        let order = space_filling_order(panels);
        let bounds = order.iter().map(|&index| {
            let patch = &panels.panels[index].patch;
            let centre = patch.at(1.0 / 3.0, 1.0 / 3.0).position;
            let radius = patch.corners().iter().map(|corner| (corner - centre).norm()).fold(0.0, f64::max);
            (centre, radius)
        });
        let (centres, radii) = bounds.unzip();
        let rules = [triangle_rule::degree_4(), triangle_rule::degree_6(), triangle_rule::degree_8()];
        let clouds = rules.map(|rule| Clouds::new(panels, &order, rule));
        Self { order, centres, radii, clouds, instructions }
    }

    fn closeness(&self, first: usize, second: usize) -> f64 {
        (self.centres[first] - self.centres[second]).norm() / self.radii[first].max(self.radii[second])
    }
}

/// Contributions of a group of target panels: for each source node a column of its target nodes' blocks.
struct Buffer {
    /// The target nodes, in the order of the buffer.
    nodes: Vec<usize>,
    /// `blocks[(source * nodes.len() + target) * 6 + entry]`.
    blocks: Vec<f64>,
}

impl Buffer {
    fn compute(panels: &Panels, far: &Far, rules: &PairRules, group: std::ops::Range<usize>) -> Self {
        let mut local = vec![usize::MAX; panels.node_count];
        let mut nodes = Vec::new();
        for place in group.clone() {
            for &node in &panels.panels[far.order[place]].nodes {
                if local[node] == usize::MAX {
                    local[node] = nodes.len();
                    nodes.push(node);
                }
            }
        }
        let mut buffer = Self { blocks: vec![0.0; panels.node_count * nodes.len() * 6], nodes };
        let mut targets: [Vec<Vec<f64>>; 3] = Default::default();
        for (rule, singles) in targets.iter_mut().enumerate() {
            for place in group.clone() {
                let mut numbers = Vec::new();
                far.clouds[rule].single(place, &mut numbers);
                singles.push(numbers);
            }
        }
        let mut tile_block: TileBlock = [[[0.0; LANES]; 6]; 9];
        for tile in 0..group.end.div_ceil(LANES) {
            let sources = tile * LANES..((tile + 1) * LANES).min(far.order.len());
            for place in group.clone() {
                let target = &panels.panels[far.order[place]];
                let target_rows = target.nodes.map(|node| local[node]);
                let mut nearest = f64::INFINITY;
                let mut is_far = [false; LANES];
                for source in sources.clone().take_while(|&source| source <= place) {
                    let closeness = far.closeness(place, source);
                    if source < place && closeness > FAR_DISTANCES[2] {
                        is_far[source - sources.start] = true;
                        nearest = nearest.min(closeness);
                        continue;
                    }
                    let other = &panels.panels[far.order[source]];
                    let block =
                        if source == place { halved(rules.same(&target.patch)) } else { rules.close(target, other) };
                    for (a, &row) in target_rows.iter().enumerate() {
                        for (b, &node) in other.nodes.iter().enumerate() {
                            buffer.add(row, node, &block[a][b]);
                        }
                    }
                }
                if nearest == f64::INFINITY {
                    continue;
                }
                let rule = FAR_DISTANCES.iter().position(|&distance| nearest > distance).unwrap_or(2);
                let numbers = &targets[rule][place - group.start];
                far.instructions.tile_block(numbers, far.clouds[rule].tile(tile), &mut tile_block);
                for (lane, source) in sources.clone().enumerate() {
                    if !is_far[lane] {
                        continue;
                    }
                    let source_nodes = panels.panels[far.order[source]].nodes;
                    for (a, &row) in target_rows.iter().enumerate() {
                        for (b, &node) in source_nodes.iter().enumerate() {
                            let entries = std::array::from_fn(|entry| tile_block[3 * a + b][entry][lane]);
                            buffer.add(row, node, &entries);
                        }
                    }
                }
            }
        }
        buffer
    }

    #[inline(always)]
    fn add(&mut self, row: usize, source_node: usize, entries: &[f64; 6]) {
        let start = (source_node * self.nodes.len() + row) * 6;
        for (sum, entry) in self.blocks[start..start + 6].iter_mut().zip(entries) {
            *sum += entry;
        }
    }

    /// Adds the blocks of one source node to its three matrix columns.
    fn add_to(&self, source_node: usize, columns: &mut [f64], size: usize) {
        let start = source_node * self.nodes.len() * 6;
        let blocks = self.blocks[start..start + self.nodes.len() * 6].chunks_exact(6);
        for (block, &node) in blocks.zip(&self.nodes) {
            let &[xx, xy, xz, yy, yz, zz] = block else { continue };
            for (column, entries) in [[xx, xy, xz], [xy, yy, yz], [xz, yz, zz]].iter().enumerate() {
                let place = column * size + 3 * node;
                for (sum, entry) in columns[place..place + 3].iter_mut().zip(entries) {
                    *sum += entry;
                }
            }
        }
    }
}

fn halved(mut block: PairBlock) -> PairBlock {
    block.iter_mut().flatten().flatten().for_each(|entry| *entry *= 0.5);
    block
}

/// `M + M^T` in place, tile by tile so that both halves stay in the cache.
fn add_transpose(matrix: &mut [f64], size: usize) {
    const TILE: usize = 64;
    for left in (0..size).step_by(TILE) {
        for top in (left..size).step_by(TILE) {
            for column in left..(left + TILE).min(size) {
                for row in top.max(column)..(top + TILE).min(size) {
                    let (below, above) = (column * size + row, row * size + column);
                    let sum = matrix[below] + matrix[above];
                    matrix[below] = sum;
                    matrix[above] = sum;
                }
            }
        }
    }
}

/// Panels along a Morton curve through their centres, so that neighbours in the list are neighbours in space.
fn space_filling_order(panels: &Panels) -> Vec<usize> {
    let (low, high) = panels.bounding_box();
    let span = (high - low).max().max(f64::MIN_POSITIVE);
    let spread = |number: u64| (0..20).fold(0_u64, |code, bit| code | ((number >> bit) & 1) << (3 * bit));
    let mut order = (0..panels.panels.len())
        .map(|index| {
            let centre = panels.panels[index].patch.at(1.0 / 3.0, 1.0 / 3.0).position;
            let cell = (centre - low) / span;
            let code = [cell.x, cell.y, cell.z]
                .iter()
                .enumerate()
                .fold(0, |code, (k, &part)| code | spread((part.clamp(0.0, 1.0) * 1_048_575.0) as u64) << k);
            (code, index)
        })
        .collect::<Vec<_>>();
    order.sort_unstable();
    order.into_iter().map(|(_, index)| index).collect()
}
