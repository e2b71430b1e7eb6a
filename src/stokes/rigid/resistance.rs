//! The resistance of one rigid body about a point.
//!
//! Moving the reference from O to P, with `r = P - O` and `[r]` the matrix of the cross product `r x`:
//!
//! ```text
//! U_O = U_P + r x W,   T_P = T_O - r x F,   hence   R_P = S^T R_O S   with   S = [ 1  [r] ]
//!                                                                               [ 0   1  ]
//! R_FU is the same about every point;   R_TU,P = R_TU,O - [r] R_FU.
//! ```

use nalgebra::{Cholesky, Matrix3, Matrix6};
use thiserror::Error;

use super::motion::cross_matrix;
use super::{Mobility, Motion, Wrench};
use crate::surface::Point;

/// Why a tensor can't be used.
#[derive(Debug, Clone, PartialEq, Error)]
#[non_exhaustive]
pub enum RigidError {
    /// An entry is infinite or not a number.
    #[error("entry ({row}, {column}) of the resistance is not a finite number")]
    NotFinite {
        /// Row, from 0.
        row: usize,
        /// Column, from 0.
        column: usize,
    },
    /// A passive body in a viscous fluid always dissipates, so this is no resistance of one.
    #[error("the resistance is not positive definite, as that of every body must be")]
    NotPositiveDefinite,
}

/// `[F; T] = R [U; W]`: force and torque that the body exerts on the fluid, for each of its motions.
///
/// With viscosity 1 and lengths in any unit, the blocks are a length, two lengths squared, and a length cubed.
///
/// # Examples
/// ```
/// use slowmote::stokes::rigid::{Motion, Resistance};
/// use slowmote::surface::Point;
///
/// let sphere = Resistance::isotropic(6.0, 8.0, Point::zeros()).scaled(std::f64::consts::PI, 1.0);
/// // Held at a point of its surface and turned about it, its centre moves: a force goes with the torque.
/// let motion = Motion { velocity: Point::zeros(), rotation: Point::z() };
/// let load = sphere.about(&Point::x()).load(&motion);
/// assert!((load.torque.z - 14.0 * std::f64::consts::PI).abs() < 1e-12);
/// ```
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Resistance {
    /// The 6 x 6 matrix, force before torque and velocity before rotation.
    pub matrix: Matrix6<f64>,
    /// The reference point.
    pub reference: Point,
}

impl Resistance {
    /// The resistance with this matrix about this point.
    pub fn new(matrix: Matrix6<f64>, reference: Point) -> Self {
        Self { matrix, reference }
    }

    /// An isotropic resistance without coupling: `force_velocity` and `torque_rotation` times the unit tensor.
    pub fn isotropic(force_velocity: f64, torque_rotation: f64, reference: Point) -> Self {
        let mut matrix = Matrix6::identity() * force_velocity;
        matrix.fixed_view_mut::<3, 3>(3, 3).fill_diagonal(torque_rotation);
        Self { matrix, reference }
    }

    /// Force for velocity, R_FU; the same about every point.
    pub fn force_velocity(&self) -> Matrix3<f64> {
        self.block(0, 0)
    }

    /// Force for rotation, R_FW, the transpose of [`Resistance::torque_velocity`].
    pub fn force_rotation(&self) -> Matrix3<f64> {
        self.block(0, 3)
    }

    /// Torque for velocity, R_TU: the coupling.
    pub fn torque_velocity(&self) -> Matrix3<f64> {
        self.block(3, 0)
    }

    /// Torque for rotation, R_TW.
    pub fn torque_rotation(&self) -> Matrix3<f64> {
        self.block(3, 3)
    }

    /// What the body exerts on the fluid in this motion, about the same reference point.
    pub fn load(&self, motion: &Motion) -> Wrench {
        Wrench::from_column(&(self.matrix * motion.column()))
    }

    /// The same body's resistance about another point.
    pub fn about(&self, point: &Point) -> Self {
        let shift = shift_matrix(&(point - self.reference));
        Self { matrix: shift.transpose() * self.matrix * shift, reference: *point }
    }

    /// The resistance of the body after turning it, and its reference point, about the origin.
    ///
    /// `turn` is a proper rotation: the coupling is a pseudotensor, which a reflection would turn over.
    pub fn turned(&self, turn: &Matrix3<f64>) -> Self {
        let mut both = Matrix6::zeros();
        both.fixed_view_mut::<3, 3>(0, 0).copy_from(turn);
        both.fixed_view_mut::<3, 3>(3, 3).copy_from(turn);
        Self { matrix: both * self.matrix * both.transpose(), reference: turn * self.reference }
    }

    /// The resistance of a body `length` times as large in a fluid `viscosity` times as viscous.
    ///
    /// Blocks grow by `viscosity * length`, `viscosity * length^2` and `viscosity * length^3`, the reference point by
    /// `length`. With both in SI units, this gives a resistance of viscosity 1 and lengths in bodies its units.
    pub fn scaled(&self, viscosity: f64, length: f64) -> Self {
        let mut matrix = self.matrix * (viscosity * length);
        matrix.fixed_rows_mut::<3>(3).scale_mut(length);
        matrix.fixed_columns_mut::<3>(3).scale_mut(length);
        Self { matrix, reference: self.reference * length }
    }

    /// The nearest symmetric matrix, which the exact resistance is.
    pub fn symmetrised(&self) -> Self {
        Self { matrix: 0.5 * (self.matrix + self.matrix.transpose()), reference: self.reference }
    }

    /// The mobility about the same point.
    ///
    /// # Errors
    /// [`RigidError`] if an entry is not finite or the matrix is not positive definite.
    pub fn mobility(&self) -> Result<Mobility, RigidError> {
        for row in 0..6 {
            for column in 0..6 {
                if !self.matrix[(row, column)].is_finite() {
                    return Err(RigidError::NotFinite { row, column });
                }
            }
        }
        // Cholesky reads one triangle only; an asymmetric input must not be inverted by half.
        let factors = Cholesky::new(self.symmetrised().matrix).ok_or(RigidError::NotPositiveDefinite)?;
        let inverse = factors.inverse();
        Ok(Mobility { matrix: 0.5 * (inverse + inverse.transpose()), reference: self.reference })
    }

    fn block(&self, row: usize, column: usize) -> Matrix3<f64> {
        self.matrix.fixed_view::<3, 3>(row, column).into_owned()
    }
}

/// `S` of the module's head.
pub(super) fn shift_matrix(r: &Point) -> Matrix6<f64> {
    let mut shift = Matrix6::identity();
    shift.fixed_view_mut::<3, 3>(0, 3).copy_from(&cross_matrix(r));
    shift
}
