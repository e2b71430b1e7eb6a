//! Coarser node sets for surfaces that were not made by cutting: every node is kept or next to one that is.

use std::collections::BTreeSet;

use super::{Panels, Prolongation};

impl Panels {
    /// A coarser node set: a maximal independent set of the nodes, each other node taking the mean of its kept neighbours.
    /// `None` if nothing can be left out.
    pub fn thinned(&self) -> Option<Prolongation> {
        let mut neighbours = vec![BTreeSet::new(); self.node_count];
        for panel in &self.panels {
            for (k, &node) in panel.nodes.iter().enumerate() {
                neighbours[node].extend([panel.nodes[(k + 1) % 3], panel.nodes[(k + 2) % 3]]);
            }
        }
        let mut number = vec![None; neighbours.len()];
        let mut kept = 0;
        for node in 0..neighbours.len() {
            if neighbours[node].iter().all(|&other| number[other].is_none()) {
                number[node] = Some(kept);
                kept += 1;
            }
        }
        let rows = neighbours
            .iter()
            .enumerate()
            .map(|(node, around)| match number[node] {
                Some(coarse) => vec![(coarse, 1.0)],
                None => {
                    let coarse = around.iter().filter_map(|&other| number[other]).collect::<Vec<_>>();
                    let weight = 1.0 / coarse.len() as f64;
                    coarse.into_iter().map(|node| (node, weight)).collect()
                }
            })
            .collect();
        (kept < neighbours.len()).then_some(Prolongation { coarse_count: kept, rows })
    }
}
