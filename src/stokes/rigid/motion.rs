//! Motions of a rigid body, and the force and torque that belong to them, about a point.

use nalgebra::{Matrix3, Vector6};

use crate::surface::Point;

/// The motion of a rigid body.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Motion {
    /// Velocity of the body's material point at the reference point.
    pub velocity: Point,
    /// Angular velocity, right-handed.
    pub rotation: Point,
}

impl Motion {
    /// The same motion told by the velocity of the point `arm` away from the reference: `U + W x arm`.
    pub fn seen_from(&self, arm: &Point) -> Self {
        Self { velocity: self.velocity + self.rotation.cross(arm), rotation: self.rotation }
    }

    /// Velocity and rotation in one column.
    pub fn column(&self) -> Vector6<f64> {
        stack(&self.velocity, &self.rotation)
    }

    /// The inverse of [`Motion::column`].
    pub fn from_column(column: &Vector6<f64>) -> Self {
        let [velocity, rotation] = split(column);
        Self { velocity, rotation }
    }
}

/// A force and a torque.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Wrench {
    /// The force.
    pub force: Point,
    /// The torque about the reference point.
    pub torque: Point,
}

impl Wrench {
    /// The same load with its torque about the point `arm` away from the reference: `T - arm x F`.
    pub fn seen_from(&self, arm: &Point) -> Self {
        Self { force: self.force, torque: self.torque - arm.cross(&self.force) }
    }

    /// The opposite load: what the fluid exerts on the body, if this is what the body exerts on the fluid.
    pub fn reversed(&self) -> Self {
        Self { force: -self.force, torque: -self.torque }
    }

    /// Force and torque in one column.
    pub fn column(&self) -> Vector6<f64> {
        stack(&self.force, &self.torque)
    }

    /// The inverse of [`Wrench::column`].
    pub fn from_column(column: &Vector6<f64>) -> Self {
        let [force, torque] = split(column);
        Self { force, torque }
    }
}

/// The matrix that multiplies by a cross product: `cross_matrix(r) v = r x v`.
pub(super) fn cross_matrix(r: &Point) -> Matrix3<f64> {
    r.cross_matrix()
}

/// Twice the axial vector of the antisymmetric part, `a_i = e_ijk A_jk`; zero if and only if `A` is symmetric.
pub(super) fn axial(matrix: &Matrix3<f64>) -> Point {
    Point::new(matrix[(1, 2)] - matrix[(2, 1)], matrix[(2, 0)] - matrix[(0, 2)], matrix[(0, 1)] - matrix[(1, 0)])
}

fn stack(upper: &Point, lower: &Point) -> Vector6<f64> {
    Vector6::new(upper.x, upper.y, upper.z, lower.x, lower.y, lower.z)
}

fn split(column: &Vector6<f64>) -> [Point; 2] {
    [column.fixed_rows::<3>(0).into_owned(), column.fixed_rows::<3>(3).into_owned()]
}
