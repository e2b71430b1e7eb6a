//! The centres of resistance and of mobility: the points about which the coupling is symmetric.
//!
//! Write `a(A)` for twice the axial vector of a matrix, `a_i = e_ijk A_jk`. For symmetric `K` and any `r`,
//! `a([r] K) = (K - tr K) r`, so that the antisymmetric part of the coupling vanishes where
//!
//! ```text
//! resistance:  a(R_TU - [r] R_FU) = 0,   r = -(tr R_FU - R_FU)^-1 a(R_TU)
//! mobility:    a(M_WF + M_WT [r]) = 0,   r =  (tr M_WT - M_WT)^-1 a(M_WF)
//! ```
//!
//! `tr K - K` has the sums of two principal values of `K` as its own, so it is positive definite: both centres exist,
//! once each. They are different points unless the body is symmetric enough. About its centre of mobility the trace
//! of M_UF is least, about its centre of resistance that of R_TW (Brenner 1964; the minima follow by differentiating
//! the shifts).

use nalgebra::Matrix3;

use super::motion::axial;
use super::{Mobility, Resistance};
use crate::surface::Point;

impl Resistance {
    /// The centre of resistance: the point about which the coupling R_TU is symmetric.
    ///
    /// Returns the reference point itself if the translational block is singular, which that of no body is.
    pub fn centre(&self) -> Point {
        self.reference - solve_trace_minus(&self.force_velocity(), &axial(&self.torque_velocity()))
    }
}

impl Mobility {
    /// The centre of mobility, also centre of diffusion: the point about which the coupling M_WF is symmetric.
    ///
    /// Returns the reference point itself if the rotational block is singular, which that of no body is.
    pub fn centre(&self) -> Point {
        self.reference + solve_trace_minus(&self.rotation_torque(), &axial(&self.rotation_force()))
    }
}

/// `(tr K - K)^-1 v`.
fn solve_trace_minus(matrix: &Matrix3<f64>, vector: &Point) -> Point {
    let lifted = Matrix3::identity() * matrix.trace() - matrix;
    lifted.lu().solve(vector).unwrap_or_else(Point::zeros)
}
