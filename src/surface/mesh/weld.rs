//! Welding: vertices that coincide become one.
//!
//! STL repeats every vertex in each facet that touches it, rounded to single precision; other formats repeat
//! vertices along seams. Two vertices coincide when they are no further apart than [`weld_tolerance`].

use std::collections::HashMap;

use super::TriangleMesh;
use crate::surface::Point;

/// Welding distance in single-precision roundings of the largest coordinate.
///
/// Rounding to single precision moves a coordinate by half a rounding (`2^-24` of its power of two), so that two
/// copies of a vertex which were computed along different ways and then rounded lie within one or two of them in each
/// coordinate; four leave room for the diagonal and for one more operation. The largest coordinate counts, not the
/// body's size: a body far from the origin has coarser noise.
pub const WELD_ULPS: f64 = 4.0;

/// A welded mesh and what welding did to it.
#[derive(Debug, Clone, PartialEq)]
pub struct Welded {
    /// The mesh; facets keep their numbers, also those that lost their area.
    pub mesh: TriangleMesh,
    /// How many vertices were merged into another one at exactly the same place.
    pub exact: usize,
    /// How many vertices were merged into another one at a small distance.
    pub near: usize,
    /// The largest distance that a vertex was moved, in file units.
    pub largest_move: f64,
    /// The distance within which vertices were merged, in file units.
    pub tolerance: f64,
    /// Facets that have a vertex twice after welding but had three different ones before.
    pub collapsed: Vec<usize>,
}

/// The distance within which two vertices of this mesh are taken for the same: [`WELD_ULPS`] single-precision
/// roundings of the largest coordinate, in file units.
pub fn weld_tolerance(mesh: &TriangleMesh) -> f64 {
    let largest = mesh.vertices().iter().fold(0.0_f64, |largest, x| largest.max(x.amax()));
    WELD_ULPS * f64::from(f32::EPSILON) * largest
}

/// Merges vertices that are no further than `tolerance` (file units; [`weld_tolerance`] is the usual choice) from a
/// vertex that came earlier. Vertices that no facet uses are dropped. The result does not depend on anything but
/// the order of the file.
pub fn weld(mesh: &TriangleMesh, tolerance: f64) -> Welded {
    let tolerance = if tolerance.is_finite() { tolerance.max(0.0) } else { 0.0 };
    let mut welder = Welder { tolerance, kept: Vec::new(), exact: HashMap::new(), cells: HashMap::new() };
    let mut numbers = vec![None; mesh.vertices().len()];
    let (mut exact, mut near, mut largest_move) = (0, 0, 0.0_f64);
    let mut collapsed = Vec::new();
    let mut facets = Vec::with_capacity(mesh.facets().len());
    for (facet, corners) in mesh.facets().iter().enumerate() {
        let welded = corners.map(|vertex| {
            *numbers[vertex].get_or_insert_with(|| {
                let x = mesh.vertices()[vertex];
                let before = welder.kept.len();
                let number = welder.place(x);
                let distance = (welder.kept[number] - x).norm();
                if number < before {
                    if distance > 0.0 {
                        near += 1
                    } else {
                        exact += 1
                    }
                    largest_move = largest_move.max(distance);
                }
                number
            })
        });
        let repeats = |[a, b, c]: [usize; 3]| a == b || b == c || c == a;
        if repeats(welded) && !repeats(*corners) {
            collapsed.push(facet);
        }
        facets.push(welded);
    }
    // Indices and coordinates come from a valid mesh, so that this can't fail; an empty mesh would be the outcome.
    let mesh = TriangleMesh::with_groups(welder.kept, facets, mesh.groups().to_vec()).unwrap_or_default();
    Welded { mesh, exact, near, largest_move, tolerance, collapsed }
}

struct Welder {
    tolerance: f64,
    kept: Vec<Point>,
    exact: HashMap<[u64; 3], usize>,
    cells: HashMap<[i64; 3], Vec<usize>>,
}

impl Welder {
    fn place(&mut self, x: Point) -> usize {
        // Adding zero turns -0.0 into 0.0, which is the same place with other bits.
        let bits = [x.x, x.y, x.z].map(|c| (c + 0.0).to_bits());
        if let Some(&number) = self.exact.get(&bits) {
            return number;
        }
        let number = self.nearby(&x).unwrap_or_else(|| {
            self.kept.push(x);
            if self.tolerance > 0.0 {
                let home = self.cell(&x);
                self.cells.entry(home).or_default().push(self.kept.len() - 1);
            }
            self.kept.len() - 1
        });
        self.exact.insert(bits, number);
        number
    }

    /// The cell of a point; cells are twice as wide as the tolerance, so that a ball touches two along each axis.
    fn cell(&self, x: &Point) -> [i64; 3] {
        [x.x, x.y, x.z].map(|c| (c / (2.0 * self.tolerance)).floor() as i64)
    }

    fn nearby(&self, x: &Point) -> Option<usize> {
        if self.tolerance == 0.0 {
            return None;
        }
        let reach = Point::repeat(self.tolerance);
        let (low, high) = (self.cell(&(x - reach)), self.cell(&(x + reach)));
        let mut best: Option<(f64, usize)> = None;
        for i in low[0]..=high[0] {
            for j in low[1]..=high[1] {
                for k in low[2]..=high[2] {
                    for &other in self.cells.get(&[i, j, k]).into_iter().flatten() {
                        let distance = (self.kept[other] - x).norm();
                        let better = best.is_none_or(|(least, _)| distance < least);
                        if distance <= self.tolerance && better {
                            best = Some((distance, other));
                        }
                    }
                }
            }
        }
        best.map(|(_, other)| other)
    }
}
