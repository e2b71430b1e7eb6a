//! Laying macro triangles: vertices, rings of vertices, and the strips and fans between them.
//!
//! Bodies with an axis are built from *rings*: `count` vertices around the axis, every other ring turned by half a
//! step. The strips between such rings consist of isosceles triangles, so the mesh keeps the mirror planes and the
//! rotations of the body, and cannot couple a translation to a rotation by its own handedness.

use std::sync::Arc;

use crate::surface::{Blueprint, Chart, Grading, MacroTriangle, Point};

/// A corner of a macro triangle: the macro vertex, and the chart point.
pub(super) type Corner = (usize, Point);

/// What the triangles of one smooth piece have in common.
#[derive(Debug, Clone, Copy)]
pub(super) struct Piece {
    /// Chart, or `None` for a plane piece in space coordinates.
    pub chart: Option<usize>,
    /// Smooth face.
    pub face: usize,
    /// Closed surface.
    pub shell: usize,
}

/// Vertices around an axis, counter-clockwise seen against the axis.
#[derive(Debug, Clone)]
pub(super) struct Ring {
    vertices: Vec<usize>,
    staggered: bool,
}

impl Ring {
    /// Number of vertices.
    pub fn count(&self) -> usize {
        self.vertices.len()
    }

    /// Whether the ring is turned by half a step.
    pub fn is_staggered(&self) -> bool {
        self.staggered
    }

    /// The macro vertex `index` (any integer from 0; it wraps) and its place in turns, which does not wrap.
    fn at(&self, index: usize) -> (usize, f64) {
        let count = self.vertices.len();
        let offset = if self.staggered { 0.5 } else { 0.0 };
        (self.vertices[index % count], (index as f64 + offset) / count as f64)
    }
}

/// A ring and the map from turns to chart points there.
pub(super) type PlacedRing<'a> = (&'a Ring, &'a dyn Fn(f64) -> Point);

/// The rim, if any, that a strip is graded towards.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Rim {
    /// None.
    None,
    /// The strip's first ring is a crease.
    First,
    /// The strip's second ring is a crease.
    Second,
}

/// A triangle of a strip by its base, which lies on one of the rings, and its tip, which lies on the other.
#[derive(Debug, Clone, Copy)]
pub(super) struct StripTriangle {
    /// The base, in the order that makes the triangle counter-clockwise.
    pub base: [(usize, f64); 2],
    /// The tip.
    pub tip: (usize, f64),
    /// Whether the base lies on the first ring.
    pub base_on_first: bool,
}

/// The triangles between two rings, of which one is staggered.
///
/// Seen from the fluid the second ring lies to the left of the first one's direction: farther along the axis on the
/// side of a body, farther inwards on an end that faces along the axis.
pub(super) fn strip_triangles(first: &Ring, second: &Ring) -> Vec<StripTriangle> {
    // The vertex of the other ring between the vertices `j` and `j + 1` of a ring.
    let between = |ring: &Ring, j: usize| if ring.staggered { j + 1 } else { j };
    (0..first.vertices.len())
        .flat_map(|j| {
            let up = StripTriangle {
                base: [first.at(j), first.at(j + 1)],
                tip: second.at(between(first, j)),
                base_on_first: true,
            };
            let down = StripTriangle {
                base: [second.at(j + 1), second.at(j)],
                tip: first.at(between(second, j)),
                base_on_first: false,
            };
            [up, down]
        })
        .collect()
}

/// A blueprint in the making.
#[derive(Debug, Default)]
pub(super) struct Layout {
    blueprint: Blueprint,
    vertex_count: usize,
}

impl Layout {
    /// Nothing laid yet.
    pub fn new() -> Self {
        Self::default()
    }

    /// The finished blueprint.
    pub fn finish(self) -> Blueprint {
        self.blueprint
    }

    /// A new macro vertex.
    pub fn vertex(&mut self) -> usize {
        self.vertex_count += 1;
        self.vertex_count - 1
    }

    /// A ring of new macro vertices; at least three.
    pub fn ring(&mut self, count: usize, staggered: bool) -> Ring {
        Ring { vertices: (0..count.max(3)).map(|_| self.vertex()).collect(), staggered }
    }

    /// Adds a chart and gives its index.
    pub fn chart(&mut self, chart: impl Chart + 'static) -> usize {
        self.blueprint.charts.push(Arc::new(chart));
        self.blueprint.charts.len() - 1
    }

    /// Adds a triangle, corners counter-clockwise seen from the fluid.
    pub fn triangle(&mut self, piece: Piece, corners: [Corner; 3], grading: Grading) {
        self.push(piece, corners, grading, false);
    }

    /// Adds a triangle with a crease along edge 0-1 from the body's corner 0, corners clockwise seen from the fluid.
    pub fn clockwise_corner(&mut self, piece: Piece, corners: [Corner; 3]) {
        self.push(piece, corners, Grading::Corner, true);
    }

    fn push(&mut self, piece: Piece, corners: [Corner; 3], grading: Grading, clockwise: bool) {
        self.blueprint.triangles.push(MacroTriangle {
            chart: piece.chart,
            corners: corners.map(|(_, point)| point),
            vertices: corners.map(|(vertex, _)| vertex),
            face: piece.face,
            shell: piece.shell,
            grading,
            clockwise,
        });
    }

    /// The strip between two rings, of which one is staggered; see [`strip_triangles`] for their order.
    pub fn strip(&mut self, piece: Piece, first: PlacedRing, second: PlacedRing, rim: Rim) {
        for StripTriangle { base, tip, base_on_first } in strip_triangles(first.0, second.0) {
            let (base_place, tip_place) = if base_on_first { (first.1, second.1) } else { (second.1, first.1) };
            let [start, end] = base.map(|(vertex, turns)| (vertex, base_place(turns)));
            let tip = (tip.0, tip_place(tip.1));
            match rim {
                Rim::None => self.triangle(piece, [start, end, tip], Grading::Plain),
                _ if (rim == Rim::First) == base_on_first => self.triangle(piece, [start, end, tip], Grading::Edge),
                _ => self.triangle(piece, [tip, start, end], Grading::Vertex),
            }
        }
    }

    /// The fan from a point that lies beyond the ring (to the left of its direction, seen from the fluid).
    pub fn fan_ahead(&mut self, piece: Piece, (ring, place): PlacedRing, apex: Corner, grading: Grading) {
        for j in 0..ring.vertices.len() {
            let [start, end] = [ring.at(j), ring.at(j + 1)].map(|(vertex, turns)| (vertex, place(turns)));
            self.triangle(piece, [apex, start, end], grading);
        }
    }

    /// The fan from a point that lies behind the ring.
    pub fn fan_behind(&mut self, piece: Piece, apex: Corner, (ring, place): PlacedRing, grading: Grading) {
        for j in 0..ring.vertices.len() {
            let [start, end] = [ring.at(j + 1), ring.at(j)].map(|(vertex, turns)| (vertex, place(turns)));
            self.triangle(piece, [apex, start, end], grading);
        }
    }

    /// A run of rings from a point to a point on one chart and one face: fan, strips, fan, none of them graded.
    ///
    /// `place(station, turns)` gives chart points; `poles` are the chart points at both ends.
    pub fn closed_run(
        &mut self,
        piece: Piece,
        count: usize,
        stations: &[f64],
        place: &dyn Fn(f64, f64) -> Point,
        poles: [Point; 2],
    ) {
        let rings = (0..stations.len()).map(|k| self.ring(count, k % 2 == 1)).collect::<Vec<_>>();
        let ends = poles.map(|pole| (self.vertex(), pole));
        let at = |k: usize| move |turns: f64| place(stations[k], turns);
        if let Some(last) = stations.len().checked_sub(1) {
            self.fan_behind(piece, ends[0], (&rings[0], &at(0)), Grading::Plain);
            for k in 0..last {
                self.strip(piece, (&rings[k], &at(k)), (&rings[k + 1], &at(k + 1)), Rim::None);
            }
            self.fan_ahead(piece, (&rings[last], &at(last)), ends[1], Grading::Plain);
        }
    }
}

/// The point of a circle around the x axis: axial position, radius, turns from the y axis towards z.
pub(super) fn on_circle(x: f64, radius: f64, turns: f64) -> Point {
    let (sin, cos) = (std::f64::consts::TAU * turns).sin_cos();
    Point::new(x, radius * cos, radius * sin)
}
