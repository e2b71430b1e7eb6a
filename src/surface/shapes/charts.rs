//! The charts of the named shapes.
//!
//! Curves that two charts share have the same parametrisation in both: circles are always the radial projection of
//! a chord, whether they belong to a ball, a tube or a flat end.

use std::sync::Arc;

use nalgebra::Matrix3;

use crate::surface::{Chart, PatchPoint, Placement, Point};

/// `q/|q|` and its Jacobian `(1 - d d^T) / |q|`.
pub(super) fn direction(q: &Point) -> (Point, Matrix3<f64>) {
    let length = q.norm();
    let d = q / length;
    (d, (Matrix3::identity() - d * d.transpose()) / length)
}

/// `x = centre + frame q/|q|`: balls, and ellipsoids with the semi-axes as the frame's columns.
#[derive(Debug, Clone)]
pub(super) struct Radial {
    /// Centre.
    pub centre: Point,
    /// Linear map of the unit sphere.
    pub frame: Matrix3<f64>,
    /// Whether corners of panels are put on the unit sphere first. It makes the evenest panels, but a chart that shares an
    /// edge with another kind of chart must leave the edge's parametrisation alone.
    pub settles: bool,
}

impl Chart for Radial {
    fn at(&self, q: &Point) -> (Point, Matrix3<f64>) {
        let (d, jacobian) = direction(q);
        (self.centre + self.frame * d, self.frame * jacobian)
    }

    fn along(&self, q: &Point, along_u: &Point, along_v: &Point) -> PatchPoint {
        let inverse = 1.0 / q.norm();
        let d = q * inverse;
        let tangent = |along: &Point| self.frame * ((along - d * d.dot(along)) * inverse);
        PatchPoint { position: self.centre + self.frame * d, tangent_u: tangent(along_u), tangent_v: tangent(along_v) }
    }

    fn placed(&self, placement: &Placement) -> Option<Arc<dyn Chart>> {
        let frame = placement.scale * placement.turn * self.frame;
        Some(Arc::new(Self { centre: placement.apply(&self.centre), frame, settles: self.settles }))
    }

    fn settled(&self, q: &Point) -> Point {
        if self.settles { q.normalize() } else { *q }
    }
}

/// A surface of revolution with a straight side: `x = (q_x, r(q_x) (q_y, q_z)/|(q_y, q_z)|)`, `r` linear.
///
/// A cylinder, or a cone. At a cone's apex, where there is no tangent plane, the Jacobian is that of the axis.
#[derive(Debug, Clone)]
pub(super) struct StraightSide {
    /// Radius at `x = 0`.
    pub radius: f64,
    /// `dr/dx`.
    pub slope: f64,
}

impl Chart for StraightSide {
    fn at(&self, q: &Point) -> (Point, Matrix3<f64>) {
        let across = q.y.hypot(q.z);
        let mut jacobian = Matrix3::zeros();
        jacobian[(0, 0)] = 1.0;
        if across == 0.0 {
            return (Point::new(q.x, 0.0, 0.0), jacobian);
        }
        let (cos, sin) = (q.y / across, q.z / across);
        let radius = self.radius + self.slope * q.x;
        let turning = radius / across;
        jacobian[(1, 0)] = self.slope * cos;
        jacobian[(2, 0)] = self.slope * sin;
        jacobian[(1, 1)] = turning * sin * sin;
        jacobian[(1, 2)] = -turning * sin * cos;
        jacobian[(2, 1)] = -turning * sin * cos;
        jacobian[(2, 2)] = turning * cos * cos;
        (Point::new(q.x, radius * cos, radius * sin), jacobian)
    }
}

/// A plane triangle whose edge 0-1 is bent to the circle around `centre` through both ends.
///
/// Chart coordinates are barycentric. With the corners `P_k`, `e_k = P_k - centre` and `s = (1 + q_1 - q_0)/2`,
///
/// ```text
/// x = sum q_k P_k + q_0 q_1 G(s),    G = c k / (v (1 + v)),    c = (1 - s) e_0 + s e_1,    v = |c| / |e_0|
/// ```
///
/// where `k = 2 - 2 cos(e_0, e_1)`, so that `v^2 = 1 - k s (1 - s)`. On the edge `x = centre + c / v`: the radial
/// projection of the chord. The other two edges stay straight, and the map is smooth at all three corners.
#[derive(Debug, Clone)]
pub(super) struct ArcTriangle {
    /// Corners; the first two equally far from the centre.
    pub corners: [Point; 3],
    /// Centre of the circle, in the plane of the corners.
    pub centre: Point,
}

impl Chart for ArcTriangle {
    fn at(&self, q: &Point) -> (Point, Matrix3<f64>) {
        let [p0, p1, p2] = &self.corners;
        let (e0, e1) = (p0 - self.centre, p1 - self.centre);
        let radius_squared = e0.norm_squared();
        let k = (e1 - e0).norm_squared() / radius_squared;
        let s = 0.5 * (1.0 + q.y - q.x);
        let v = (1.0 - k * s * (1.0 - s)).sqrt();
        let chord = e0 + s * (e1 - e0);
        let factor = k / (v * (1.0 + v));
        // v v' = -k (1 - 2 s) / 2, and d(1 / (v + v^2)) = -(1 + 2 v) v' / (v + v^2)^2.
        let v_by_s = -0.5 * k * (1.0 - 2.0 * s) / v;
        let factor_by_s = -factor * (1.0 + 2.0 * v) / (v * (1.0 + v)) * v_by_s;
        let bend = factor * chord;
        let bend_by_s = factor_by_s * chord + factor * (e1 - e0);
        let product = q.x * q.y;
        let position = q.x * p0 + q.y * p1 + q.z * p2 + product * bend;
        let columns = [p0 + q.y * bend - 0.5 * product * bend_by_s, p1 + q.x * bend + 0.5 * product * bend_by_s, *p2];
        (position, Matrix3::from_columns(&columns))
    }
}
