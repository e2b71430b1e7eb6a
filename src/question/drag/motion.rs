//! The load of a motion that was asked for, and how well it is known.

use nalgebra::Matrix3;

use super::trust::finite;
use crate::question::answer::{MotionAnswer, RelativeErrorAnswer, Vector};
use crate::question::budget::{TORQUE_POWER, force_total, torque_total};
use crate::question::validity::Regime;
use crate::stokes::rigid::{Motion, Resistance};
use crate::surface::Point;

/// A motion of the reference point and about it, in SI units.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PrescribedMotion {
    /// Velocity of the reference point, m/s.
    pub velocity: Point,
    /// Angular velocity, rad/s.
    pub rotation: Point,
    /// Relative uncertainty of the speed.
    pub velocity_uncertainty: f64,
    /// Relative uncertainty of the spin.
    pub rotation_uncertainty: f64,
}

/// Force and torque of the fluid on the body, with bounds on their error.
///
/// With `0 <= R - R_computed <= e R`, as refinement guarantees, `|dR U| <= e sqrt(l_max (U . R U))`; the coupling's
/// error is stated against `sqrt(R_tt R_rr)` from the start.
pub(super) fn motion_answer(
    motion: &PrescribedMotion,
    resistance: &Resistance,
    error: &RelativeErrorAnswer,
    regime: &Regime,
) -> MotionAnswer {
    let (velocity, rotation) = (motion.velocity, motion.rotation);
    let by_fluid = resistance.load(&Motion { velocity, rotation }).reversed();
    let (tt, tr, rr) = (resistance.force_velocity(), resistance.force_rotation(), resistance.torque_rotation());
    let (largest_tt, largest_rr) = (tt.symmetric_eigenvalues().max(), rr.symmetric_eigenvalues().max());
    let energy_norm = |matrix: &Matrix3<f64>, largest: f64, v: &Point| (largest * v.dot(&(matrix * v))).sqrt();
    let coupling_scale = (largest_tt * largest_rr).sqrt();
    let (force_inputs, torque_inputs) = (force_total(&error.input_shares), torque_total(&error.input_shares));
    let bounds = error.force.zip(error.torque).zip(error.coupling).zip(error.geometry);
    let bounds = bounds.map(|(((force, torque), coupling), geometry)| {
        let speed = motion.velocity_uncertainty;
        let spin = motion.rotation_uncertainty;
        let coupled = (coupling + geometry) * coupling_scale;
        let on_force = (force + geometry / TORQUE_POWER + force_inputs + speed)
            * energy_norm(&tt, largest_tt, &velocity)
            + coupled * rotation.norm()
            + (torque_inputs + spin) * (tr * rotation).norm();
        let on_torque = (torque + geometry + torque_inputs + spin) * energy_norm(&rr, largest_rr, &rotation)
            + coupled * velocity.norm()
            + (torque_inputs + speed) * (tr.transpose() * velocity).norm();
        (on_force, on_torque)
    });
    MotionAnswer {
        velocity_m_per_s: velocity.into(),
        rotation_per_s: rotation.into(),
        force_n: by_fluid.force.into(),
        torque_n_m: by_fluid.torque.into(),
        force_with_inertia_n: regime.force_with_inertia().map(Vector::from),
        force_error_n: bounds.and_then(|(force, _)| finite(force)),
        torque_error_n_m: bounds.and_then(|(_, torque)| finite(torque)),
    }
}
