//! What the solver gives back.

use std::ops::Range;

use nalgebra::{DMatrix, Matrix6};
use thiserror::Error;

use super::Factor;
use crate::stokes::rigid::{GrandResistance, Resistance};
use crate::surface::{Panels, Point};

/// Bounds on the relative error of the resistance against the surface that was solved.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct RelativeError {
    /// Worst direction of the force-velocity block.
    pub force: f64,
    /// Worst direction of the torque-rotation block.
    pub torque: f64,
    /// Coupling block, against `sqrt(R_tt R_rr)`.
    pub coupling: f64,
}

impl RelativeError {
    /// The largest of the three.
    pub fn worst(&self) -> f64 {
        self.force.max(self.torque).max(self.coupling)
    }
}

/// How the answer was found.
#[derive(Debug, Clone, PartialEq)]
pub struct Statistics {
    /// Panels of the final surface.
    pub triangles: usize,
    /// Unknowns of the final system, three a node.
    pub unknowns: usize,
    /// The factorisation that ran.
    pub factor: Factor,
    /// Estimated condition number (1-norm) of the matrix.
    pub condition: f64,
    /// Relative residual of the worst column, by random probes.
    pub residual: f64,
}

/// A solved body.
#[derive(Debug, Clone)]
pub struct Solution {
    /// The resistance.
    pub resistance: Resistance,
    /// Its error.
    pub error: RelativeError,
    /// Ratio of successive changes with refinement, in the slower of force and torque.
    pub ratio: f64,
    /// Resistances on coarser spaces, finest first, that the error was estimated from.
    pub coarser: Vec<Matrix6<f64>>,
    /// Whether the wanted accuracy was reached; always true on a fixed mesh.
    pub reached: bool,
    /// The surface that was solved.
    pub panels: Panels,
    /// Traction on the fluid at each node, for unit velocity along x, y, z and unit rotation about x, y, z through the
    /// reference point.
    pub tractions: Vec<[Point; 6]>,
    /// How it was found.
    pub statistics: Statistics,
}

/// Several solved bodies.
#[derive(Debug, Clone)]
pub struct GrandSolution {
    /// The resistance, six rows a body.
    pub resistance: GrandResistance,
    /// Its error: the worst direction of the motions of all bodies together.
    pub error: RelativeError,
    /// Ratio of successive changes with refinement, in the slower of force and torque.
    pub ratio: f64,
    /// Resistances on coarser spaces, finest first, that the error was estimated from.
    pub coarser: Vec<DMatrix<f64>>,
    /// Whether the wanted accuracy was reached; always true on a fixed mesh.
    pub reached: bool,
    /// The surfaces that were solved, body after body.
    pub panels: Panels,
    /// Which panels are whose.
    pub panels_of_body: Vec<Range<usize>>,
    /// Traction on the fluid at each node for the six unit motions of each body.
    pub tractions: Vec<Vec<Point>>,
    /// How it was found.
    pub statistics: Statistics,
}

impl GrandSolution {
    /// The solution of all bodies but the first left out: what one body was solved for.
    pub(super) fn of_one(self) -> Solution {
        let six = |matrix: &DMatrix<f64>| matrix.fixed_view::<6, 6>(0, 0).into_owned();
        Solution {
            resistance: self.resistance.alone(0),
            error: self.error,
            ratio: self.ratio,
            coarser: self.coarser.iter().map(six).collect(),
            reached: self.reached,
            panels: self.panels,
            tractions: self.tractions.iter().map(|node| std::array::from_fn(|motion| node[motion])).collect(),
            statistics: self.statistics,
        }
    }
}

/// Why there is no solution.
#[derive(Debug, Clone, PartialEq, Error)]
#[non_exhaustive]
pub enum SolveError {
    /// The matrix does not fit.
    #[error("{unknowns} unknowns need {} of memory, and {} are allowed", memory(*needed), memory(*available))]
    TooLarge {
        /// Unknowns of the system.
        unknowns: usize,
        /// Bytes needed.
        needed: u64,
        /// Bytes allowed or available.
        available: u64,
    },
    /// Cholesky met a pivot that is not positive: the assembled matrix is not positive definite.
    #[error("the system is not positive definite (pivot {index} of {unknowns}), so its quadrature cannot be trusted")]
    NotPositiveDefinite {
        /// The pivot.
        index: usize,
        /// Unknowns of the system.
        unknowns: usize,
    },
    /// The matrix is singular or nearly so.
    #[error("the system is ill-conditioned (condition about {condition:.1e})")]
    IllConditioned {
        /// Estimated condition number.
        condition: f64,
    },
    /// The solution does not solve the system.
    #[error("the solution fails its residual check ({residual:.1e})")]
    Residual {
        /// Relative residual.
        residual: f64,
    },
    /// A number that is not finite turned up.
    #[error("the matrix entry in row {row}, column {column} is not finite")]
    NotFinite {
        /// Row of the matrix.
        row: usize,
        /// Column of the matrix.
        column: usize,
    },
}

/// A size of memory as people read it.
fn memory(bytes: u64) -> String {
    match bytes {
        0..1_000_000_000 => format!("{:.0} MB", bytes as f64 / 1e6),
        _ => format!("{:.1} GB", bytes as f64 / 1e9),
    }
}
