//! The mobility of one rigid body about a point.
//!
//! With `S` as for the resistance, `M_P = S^-1 M_O S^-T`: the rotation under a torque, M_WT, is the same about every
//! point, and `M_WF,P = M_WF,O + M_WT [r]`.

use nalgebra::{Cholesky, Matrix3, Matrix6};

use super::resistance::shift_matrix;
use super::{Motion, Resistance, RigidError, Wrench};
use crate::surface::Point;

/// `[U; W] = M [F; T]`: the motion of a body that exerts this force and torque on the fluid.
///
/// A body that an outer force pulls passes that force on to the fluid, so F is the outer force.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Mobility {
    /// The 6 x 6 matrix, velocity before rotation and force before torque.
    pub matrix: Matrix6<f64>,
    /// The reference point.
    pub reference: Point,
}

impl Mobility {
    /// Velocity for force, M_UF.
    pub fn velocity_force(&self) -> Matrix3<f64> {
        self.block(0, 0)
    }

    /// Velocity for torque, M_UT, the transpose of [`Mobility::rotation_force`].
    pub fn velocity_torque(&self) -> Matrix3<f64> {
        self.block(0, 3)
    }

    /// Rotation for force, M_WF: the coupling.
    pub fn rotation_force(&self) -> Matrix3<f64> {
        self.block(3, 0)
    }

    /// Rotation for torque, M_WT; the same about every point.
    pub fn rotation_torque(&self) -> Matrix3<f64> {
        self.block(3, 3)
    }

    /// The motion of a body that exerts this load on the fluid, about the same reference point.
    pub fn motion(&self, load: &Wrench) -> Motion {
        Motion::from_column(&(self.matrix * load.column()))
    }

    /// The same body's mobility about another point.
    pub fn about(&self, point: &Point) -> Self {
        let back = shift_matrix(&(self.reference - point));
        Self { matrix: back * self.matrix * back.transpose(), reference: *point }
    }

    /// The mobility of a body `length` times as large in a fluid `viscosity` times as viscous; the inverse of
    /// [`Resistance::scaled`].
    pub fn scaled(&self, viscosity: f64, length: f64) -> Self {
        let mut matrix = self.matrix / (viscosity * length);
        matrix.fixed_rows_mut::<3>(3).scale_mut(1.0 / length);
        matrix.fixed_columns_mut::<3>(3).scale_mut(1.0 / length);
        Self { matrix, reference: self.reference * length }
    }

    /// The resistance about the same point.
    ///
    /// # Errors
    /// [`RigidError::NotPositiveDefinite`] if this is no mobility of a body.
    pub fn resistance(&self) -> Result<Resistance, RigidError> {
        let symmetric = 0.5 * (self.matrix + self.matrix.transpose());
        let factors = Cholesky::new(symmetric).ok_or(RigidError::NotPositiveDefinite)?;
        Ok(Resistance { matrix: factors.inverse(), reference: self.reference }.symmetrised())
    }

    fn block(&self, row: usize, column: usize) -> Matrix3<f64> {
        self.matrix.fixed_view::<3, 3>(row, column).into_owned()
    }
}
