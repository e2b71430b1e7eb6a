//! A tree of boxes around facets, to find the pairs that may touch.

use std::ops::ControlFlow;

use crate::surface::{Point, TriangleMesh};

/// Facets in a leaf at most.
const LEAF: usize = 4;

#[derive(Debug, Clone, Copy)]
struct Bounds {
    low: Point,
    high: Point,
}

impl Bounds {
    fn union(&self, other: &Self) -> Self {
        Self { low: self.low.inf(&other.low), high: self.high.sup(&other.high) }
    }

    fn meets(&self, other: &Self) -> bool {
        (0..3).all(|axis| self.low[axis] <= other.high[axis] && other.low[axis] <= self.high[axis])
    }

    fn extent(&self) -> f64 {
        (self.high - self.low).sum()
    }
}

#[derive(Debug, Clone, Copy)]
enum Node {
    Leaf { from: usize, to: usize },
    Split { left: usize, right: usize },
}

/// Axis-aligned boxes around groups of facets, halved at the median.
#[derive(Debug)]
pub(super) struct BoxTree {
    order: Vec<usize>,
    boxes: Vec<Bounds>,
    nodes: Vec<(Bounds, Node)>,
}

impl BoxTree {
    pub fn new(mesh: &TriangleMesh) -> Self {
        let boxes = (0..mesh.facets().len())
            .map(|facet| {
                let [a, b, c] = mesh.corners(facet);
                Bounds { low: a.inf(&b).inf(&c), high: a.sup(&b).sup(&c) }
            })
            .collect::<Vec<_>>();
        let mut tree = Self { order: (0..boxes.len()).collect(), boxes, nodes: Vec::new() };
        if !tree.order.is_empty() {
            tree.build(0, tree.order.len());
        }
        tree
    }

    fn build(&mut self, from: usize, to: usize) -> usize {
        let facets = &self.order[from..to];
        let bounds = facets.iter().map(|facet| self.boxes[*facet]).reduce(|a, b| a.union(&b));
        let Some(bounds) = bounds else { return 0 };
        let number = self.nodes.len();
        self.nodes.push((bounds, Node::Leaf { from, to }));
        if to - from > LEAF {
            let boxes = &self.boxes;
            let axis = (bounds.high - bounds.low).imax();
            let middle = (from + to) / 2;
            let key = |facet: &usize| boxes[*facet].low[axis] + boxes[*facet].high[axis];
            self.order[from..to].select_nth_unstable_by(middle - from, |a, b| key(a).total_cmp(&key(b)).then(a.cmp(b)));
            let left = self.build(from, middle);
            let right = self.build(middle, to);
            self.nodes[number].1 = Node::Split { left, right };
        }
        number
    }

    /// Visits each pair of different facets whose boxes meet, once, until told to stop.
    pub fn pairs(&self, mut visit: impl FnMut(usize, usize) -> ControlFlow<()>) {
        let mut stack = if self.nodes.is_empty() { Vec::new() } else { vec![(0, 0)] };
        while let Some((a, b)) = stack.pop() {
            let ((box_a, node_a), (box_b, node_b)) = (&self.nodes[a], &self.nodes[b]);
            if !box_a.meets(box_b) {
                continue;
            }
            match (*node_a, *node_b) {
                (Node::Leaf { from, to }, Node::Leaf { from: from_b, to: to_b }) => {
                    for i in from..to {
                        for j in (if a == b { i + 1 } else { from_b })..to_b {
                            let (f, g) = (self.order[i], self.order[j]);
                            if self.boxes[f].meets(&self.boxes[g]) && visit(f.min(g), f.max(g)).is_break() {
                                return;
                            }
                        }
                    }
                }
                (Node::Split { left, right }, _) if a == b => {
                    stack.extend([(left, left), (right, right), (left, right)])
                }
                (Node::Split { left, right }, Node::Split { .. }) if box_a.extent() >= box_b.extent() => {
                    stack.extend([(left, b), (right, b)]);
                }
                (_, Node::Split { left, right }) => stack.extend([(a, left), (a, right)]),
                (Node::Split { left, right }, _) => stack.extend([(left, b), (right, b)]),
            }
        }
    }
}
