//! Charts: smooth maps from a flat chart domain to a body's true surface.
//!
//! A chart takes three chart coordinates `q` and gives the position `x(q)` and the Jacobian `dx/dq`. Charts that
//! need two coordinates ignore the third (its Jacobian column is zero); radial charts, such as the sphere's
//! `x = a q/|q|`, use all three. Triangles are cut in the chart domain, where they stay flat.

use std::fmt::Debug;
use std::sync::Arc;

use nalgebra::Matrix3;

use super::{PatchPoint, Point};

/// A smooth map from chart coordinates to the surface.
pub trait Chart: Send + Sync + Debug {
    /// Position (length unit of the body) and Jacobian, column `k` being `dx/dq_k`, at the chart point `q`.
    fn at(&self, q: &Point) -> (Point, Matrix3<f64>);

    /// Position and the derivatives along two directions of the chart domain: what [`Chart::at`] says, but cheaper where a
    /// chart says it directly. This is called for every quadrature point.
    fn along(&self, q: &Point, along_u: &Point, along_v: &Point) -> PatchPoint {
        let (position, jacobian) = self.at(q);
        PatchPoint { position, tangent_u: jacobian * along_u, tangent_v: jacobian * along_v }
    }

    /// The chart with a placement taken into its own numbers, where it can; otherwise it is wrapped in [`Placed`].
    fn placed(&self, _placement: &Placement) -> Option<Arc<dyn Chart>> {
        None
    }

    /// The chart point that stands for the same surface point and makes the evenest panels: a radial chart puts `q` on
    /// the unit sphere. Corners of panels are settled before the panels are made.
    fn settled(&self, q: &Point) -> Point {
        *q
    }
}

/// Where a body stands: `x -> scale * turn * x + shift`.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Placement {
    /// Factor on all lengths, positive.
    pub scale: f64,
    /// A proper rotation.
    pub turn: Matrix3<f64>,
    /// Shift after turning and scaling.
    pub shift: Point,
}

impl Placement {
    /// The placement that changes nothing.
    pub fn identity() -> Self {
        Self { scale: 1.0, turn: Matrix3::identity(), shift: Point::zeros() }
    }

    /// The image of a point.
    pub fn apply(&self, x: &Point) -> Point {
        self.scale * (self.turn * x) + self.shift
    }

    /// `self` after `first`, as one placement.
    pub fn after(&self, first: &Placement) -> Self {
        Self { scale: self.scale * first.scale, turn: self.turn * first.turn, shift: self.apply(&first.shift) }
    }
}

/// A chart followed by a [`Placement`].
#[derive(Debug, Clone)]
pub struct Placed {
    /// The chart in the body's own frame.
    pub chart: Arc<dyn Chart>,
    /// What moves it.
    pub placement: Placement,
}

impl Chart for Placed {
    fn at(&self, q: &Point) -> (Point, Matrix3<f64>) {
        let (x, jacobian) = self.chart.at(q);
        (self.placement.apply(&x), self.placement.scale * self.placement.turn * jacobian)
    }

    fn along(&self, q: &Point, along_u: &Point, along_v: &Point) -> PatchPoint {
        let point = self.chart.along(q, along_u, along_v);
        let turned = |direction: &Point| self.placement.scale * (self.placement.turn * direction);
        PatchPoint {
            position: self.placement.apply(&point.position),
            tangent_u: turned(&point.tangent_u),
            tangent_v: turned(&point.tangent_v),
        }
    }

    fn settled(&self, q: &Point) -> Point {
        self.chart.settled(q)
    }
}
