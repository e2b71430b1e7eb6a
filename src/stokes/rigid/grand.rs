//! The resistance and mobility of several bodies together: six rows and columns a body.
//!
//! ```text
//! F_i = sum_j R_ij V_j,   V_i = sum_j M_ij F_j,   V = [U; W],  F = [F; T],  each about that body's own point.
//! ```
//!
//! Rigidly joined, the bodies share the motion of one point P: with `S_i` that takes it to body i's own point,
//! `R_P = sum_ij S_i^T R_ij S_j`.

use nalgebra::{Cholesky, DMatrix, Matrix6};

use super::resistance::shift_matrix;
use super::{Resistance, RigidError};
use crate::surface::Point;

/// Rows and columns of one body.
const ROWS: usize = 6;

/// What all bodies exert on the fluid, for each of their motions.
#[derive(Debug, Clone, PartialEq)]
pub struct GrandResistance {
    /// The 6 n x 6 n matrix: body by body, force before torque and velocity before rotation.
    pub matrix: DMatrix<f64>,
    /// The bodies' own reference points.
    pub references: Vec<Point>,
}

/// How all bodies move for the forces and torques that they exert on the fluid.
#[derive(Debug, Clone, PartialEq)]
pub struct GrandMobility {
    /// The 6 n x 6 n matrix: body by body, velocity before rotation and force before torque.
    pub matrix: DMatrix<f64>,
    /// The bodies' own reference points.
    pub references: Vec<Point>,
}

impl GrandResistance {
    /// Force and torque of body `i` for the motion of body `j`.
    pub fn block(&self, i: usize, j: usize) -> Matrix6<f64> {
        self.matrix.fixed_view::<ROWS, ROWS>(ROWS * i, ROWS * j).into_owned()
    }

    /// The resistance of body `i` while the others are held.
    pub fn alone(&self, i: usize) -> Resistance {
        Resistance::new(self.block(i, i), self.references[i])
    }

    /// The resistance of all bodies as one, rigidly joined, about `point`.
    pub fn joined(&self, point: &Point) -> Resistance {
        let shifts = self.references.iter().map(|own| shift_matrix(&(point - own))).collect::<Vec<_>>();
        let mut matrix = Matrix6::zeros();
        for (i, left) in shifts.iter().enumerate() {
            for (j, right) in shifts.iter().enumerate() {
                matrix += left.transpose() * self.block(i, j) * right;
            }
        }
        Resistance::new(matrix, *point)
    }

    /// The nearest symmetric matrix, which the exact resistance is.
    pub fn symmetrised(&self) -> Self {
        Self { matrix: 0.5 * (&self.matrix + self.matrix.transpose()), references: self.references.clone() }
    }

    /// The resistance of bodies `length` times as large and as far apart, in a fluid `viscosity` times as viscous.
    pub fn scaled(&self, viscosity: f64, length: f64) -> Self {
        Self {
            matrix: scaled(&self.matrix, viscosity * length, length),
            references: self.references.iter().map(|point| point * length).collect(),
        }
    }

    /// The mobility about the same points.
    ///
    /// # Errors
    /// [`RigidError`] if an entry is not finite or the matrix is not positive definite.
    pub fn mobility(&self) -> Result<GrandMobility, RigidError> {
        for (at, value) in self.matrix.iter().enumerate() {
            if !value.is_finite() {
                let rows = self.matrix.nrows();
                return Err(RigidError::NotFinite { row: at % rows, column: at / rows });
            }
        }
        let factors = Cholesky::new(self.symmetrised().matrix).ok_or(RigidError::NotPositiveDefinite)?;
        let inverse = factors.inverse();
        Ok(GrandMobility { matrix: 0.5 * (&inverse + inverse.transpose()), references: self.references.clone() })
    }
}

impl GrandMobility {
    /// The mobility of bodies `length` times as large and as far apart, in a fluid `viscosity` times as viscous.
    pub fn scaled(&self, viscosity: f64, length: f64) -> Self {
        Self {
            matrix: scaled(&self.matrix, 1.0 / (viscosity * length), 1.0 / length),
            references: self.references.iter().map(|point| point * length).collect(),
        }
    }
}

/// Every entry times `whole`, and once more times `turning` for each of row and column that is a torque or a rotation.
fn scaled(matrix: &DMatrix<f64>, whole: f64, turning: f64) -> DMatrix<f64> {
    let power = |at: usize| if at % ROWS < 3 { 1.0 } else { turning };
    DMatrix::from_fn(matrix.nrows(), matrix.ncols(), |i, j| matrix[(i, j)] * whole * power(i) * power(j))
}

#[cfg(test)]
mod tests {
    use super::*;

    fn pair() -> GrandResistance {
        // Two bodies that do not feel each other.
        let mut matrix = DMatrix::zeros(12, 12);
        let sphere = Resistance::isotropic(2.0, 3.0, Point::zeros()).matrix;
        matrix.fixed_view_mut::<6, 6>(0, 0).copy_from(&sphere);
        matrix.fixed_view_mut::<6, 6>(6, 6).copy_from(&(2.0 * sphere));
        GrandResistance { matrix, references: vec![Point::x(), -Point::x()] }
    }

    #[test]
    fn joined_bodies_turn_with_their_arms() {
        // About the origin: 3 + 2 * 1 of the one, 6 + 4 * 1 of the other; about the axis through both no arm.
        let joined = pair().joined(&Point::zeros());
        assert!((joined.matrix[(0, 0)] - 6.0).abs() < 1e-12);
        assert!((joined.matrix[(3, 3)] - 9.0).abs() < 1e-12);
        assert!((joined.matrix[(5, 5)] - 15.0).abs() < 1e-12);
        // Turned about z, the body at +x moves along +y with 2, the one at -x along -y with 4.
        assert!((joined.matrix[(1, 5)] + 2.0).abs() < 1e-12);
    }

    #[test]
    fn scaling_and_inverting_commute() {
        let (viscosity, length) = (0.7, 3.0);
        let one = pair().scaled(viscosity, length).mobility().unwrap();
        let other = pair().mobility().unwrap().scaled(viscosity, length);
        assert!((one.matrix - other.matrix).amax() < 1e-15);
        assert_eq!(one.references, other.references);
        assert!((pair().scaled(viscosity, length).alone(1).torque_rotation()[(0, 0)] - 6.0 * 0.7 * 27.0).abs() < 1e-12);
    }

    #[test]
    fn what_is_no_resistance_is_an_error() {
        let mut broken = pair();
        broken.matrix[(3, 4)] = f64::NAN;
        assert_eq!(broken.mobility(), Err(RigidError::NotFinite { row: 3, column: 4 }));
        let mut negative = pair();
        negative.matrix[(7, 7)] = -1.0;
        assert_eq!(negative.mobility(), Err(RigidError::NotPositiveDefinite));
    }
}
