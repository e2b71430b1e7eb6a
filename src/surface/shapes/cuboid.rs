//! Boxes and cubes.
//!
//! Every face is cut along its middle lines, and each quarter along the diagonal from the body's corner: one crease
//! and one corner a macro triangle. A box much longer than its other sides gets further cuts across its length.

use super::error::{ShapeError, check_aspect, check_length};
use super::layout::{Corner, Layout, Piece};
use super::stations::{Widening, widening};
use super::{ExactMeasure, Form};
use crate::surface::{Blueprint, Grading, Point};
use std::collections::HashMap;

/// Up to this ratio of its length to its width a box is cut at the middle only.
const SHORT_ASPECT: f64 = 3.0;

/// Length of the graded piece at the ends of a long box, in widths of the box.
const END_PIECE: f64 = 0.75;

/// A box with its sides along x, y and z.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Cuboid {
    sides: [f64; 3],
    keyword: &'static str,
}

impl Cuboid {
    /// A box of the given sides along x, y, z (m).
    ///
    /// # Errors
    /// If a side is not a possible length, or the aspect ratio is beyond what can be meshed.
    pub fn new(sides: [f64; 3]) -> Result<Self, ShapeError> {
        for (name, side) in ["x side", "y side", "z side"].into_iter().zip(sides) {
            check_length(name, side)?;
        }
        check_aspect(sides)?;
        Ok(Self { sides, keyword: "box" })
    }

    /// A cube of the given side (m).
    ///
    /// # Errors
    /// If the side is not a possible length.
    pub fn cube(side: f64) -> Result<Self, ShapeError> {
        let side = check_length("side", side)?;
        Ok(Self { sides: [side; 3], keyword: "cube" })
    }
}

impl Form for Cuboid {
    fn keyword(&self) -> &'static str {
        self.keyword
    }

    fn dimensions(&self) -> Vec<f64> {
        if self.keyword == "cube" { vec![self.sides[0]] } else { self.sides.to_vec() }
    }

    fn blueprint(&self) -> Blueprint {
        let mut tiles = Tiles { layout: Layout::new(), vertices: HashMap::new(), cuts: self.cuts() };
        for axis in 0..3 {
            for end in [0, tiles.cuts[axis].len() - 1] {
                tiles.face(axis, end);
            }
        }
        tiles.layout.finish()
    }

    fn exact_measure(&self) -> ExactMeasure {
        let [a, b, c] = self.sides;
        ExactMeasure { volume: a * b * c, area: Some(2.0 * (a * b + b * c + c * a)) }
    }
}

impl Cuboid {
    /// Where each axis is cut: always at both ends and in the middle.
    fn cuts(&self) -> [Vec<f64>; 3] {
        let mut order = [0, 1, 2];
        order.sort_by(|&i, &j| self.sides[j].total_cmp(&self.sides[i]));
        let mut cuts = self.sides.map(|side| vec![-0.5 * side, 0.0, 0.5 * side]);
        let (length, width) = (self.sides[order[0]], self.sides[order[1]]);
        if length > SHORT_ASPECT * width {
            let (half, end) = (0.5 * length, END_PIECE * width);
            // The last rows of the graded end piece are three times as wide as those of a plain piece of its length.
            let steps = Widening { first: 3.0 * end, ratio: 2.0, widest: (8.0 * width).max(half / 6.0) };
            let inner = widening(half - end, steps).into_iter().map(|s| half - end - s).collect::<Vec<_>>();
            let right = std::iter::once(half).chain(inner);
            let left = right.clone().rev().skip(1).map(|x| -x).collect::<Vec<_>>();
            let mut all = right.collect::<Vec<_>>();
            all.extend(left);
            all.reverse();
            cuts[order[0]] = all;
        }
        cuts
    }
}

/// The box's faces as rectangles between cuts.
struct Tiles {
    layout: Layout,
    vertices: HashMap<[usize; 3], usize>,
    cuts: [Vec<f64>; 3],
}

impl Tiles {
    /// The face normal to `axis` at its first or last cut.
    fn face(&mut self, axis: usize, end: usize) {
        let (u, v) = ((axis + 1) % 3, (axis + 2) % 3);
        let face = 2 * axis + usize::from(end != 0);
        for i in 1..self.cuts[u].len() {
            for j in 1..self.cuts[v].len() {
                // Corners of the rectangle, counter-clockwise seen from +axis.
                let rectangle = [(i - 1, j - 1), (i, j - 1), (i, j), (i - 1, j)].map(|(i, j)| {
                    let mut index = [end; 3];
                    (index[u], index[v]) = (i, j);
                    index
                });
                self.rectangle(Piece { chart: None, face, shell: 0 }, rectangle, end == 0);
            }
        }
    }

    /// The macro vertex at a crossing of cuts, and its position.
    fn corner(&mut self, index: [usize; 3]) -> Corner {
        let Self { layout, vertices, cuts } = self;
        let vertex = *vertices.entry(index).or_insert_with(|| layout.vertex());
        (vertex, Point::new(cuts[0][index[0]], cuts[1][index[1]], cuts[2][index[2]]))
    }

    /// Cuts a rectangle along the diagonal from the corner nearest to a corner of the box.
    fn rectangle(&mut self, piece: Piece, corners: [[usize; 3]; 4], flip: bool) {
        let mut corners = corners;
        if flip {
            corners.reverse();
        }
        let last = self.cuts.clone().map(|cuts| cuts.len() - 1);
        // How many axes have an end of the box here: 3 at its corners, 2 on its edges, 1 inside a face.
        let ends = |index: &[usize; 3]| (0..3).filter(|&k| index[k] == 0 || index[k] == last[k]).count();
        let outness = |index: &[usize; 3]| {
            let middles = last.map(|last| last / 2);
            (ends(index), (0..3).map(|k| index[k].abs_diff(middles[k])).sum::<usize>())
        };
        let start = (0..4).max_by_key(|&k| outness(&corners[k])).unwrap_or(0);
        corners.rotate_left(start);
        let counts = corners.map(|index| ends(&index));
        let [a, b, c, d] = corners.map(|index| self.corner(index));
        // One triangle to each side of the diagonal a-c.
        match counts {
            [3, ..] => {
                self.layout.triangle(piece, [a, b, c], Grading::Corner);
                self.layout.clockwise_corner(piece, [a, d, c]);
            }
            [2, 2, ..] => {
                self.layout.triangle(piece, [a, b, c], Grading::Edge);
                self.layout.triangle(piece, [a, c, d], Grading::Vertex);
            }
            [2, _, _, 2] => {
                self.layout.triangle(piece, [d, a, c], Grading::Edge);
                self.layout.triangle(piece, [a, b, c], Grading::Vertex);
            }
            _ => {
                self.layout.triangle(piece, [a, b, c], Grading::Plain);
                self.layout.triangle(piece, [a, c, d], Grading::Plain);
            }
        }
    }
}
