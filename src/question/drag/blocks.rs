//! Matrices of the solver as the rows of numbers that an answer holds.

use nalgebra::{DMatrix, Matrix3};

use crate::question::answer::{MobilityBlocks, ResistanceBlocks, Tensor};
use crate::stokes::rigid::{Mobility, Resistance};

pub(super) fn resistance_blocks(resistance: &Resistance) -> ResistanceBlocks {
    ResistanceBlocks {
        force_velocity_n_s_per_m: rows(&resistance.force_velocity()),
        force_rotation_n_s: rows(&resistance.force_rotation()),
        torque_velocity_n_s: rows(&resistance.torque_velocity()),
        torque_rotation_n_m_s: rows(&resistance.torque_rotation()),
    }
}

pub(super) fn mobility_blocks(mobility: &Mobility) -> MobilityBlocks {
    MobilityBlocks {
        velocity_force_m_per_n_s: rows(&mobility.velocity_force()),
        velocity_torque_per_n_s: rows(&mobility.velocity_torque()),
        rotation_force_per_n_s: rows(&mobility.rotation_force()),
        rotation_torque_per_n_m_s: rows(&mobility.rotation_torque()),
    }
}

pub(super) fn rows(matrix: &Matrix3<f64>) -> Tensor {
    [0, 1, 2].map(|row| [0, 1, 2].map(|column| matrix[(row, column)]))
}

/// A matrix of any size as its rows.
pub(super) fn all_rows(matrix: &DMatrix<f64>) -> Vec<Vec<f64>> {
    matrix.row_iter().map(|row| row.iter().copied().collect()).collect()
}
