//! Averages over all orientations.
//!
//! A body that tumbles freely, pulled by a force of fixed direction, moves on average with the mobility
//! `tr(M_UF) / 3`, taken about the centre of mobility: about any other point the trace is larger, and the point's own
//! swinging about the centre is counted as mobility. The hydrodynamic radius is that of the sphere of equal mean
//! mobility (viscosity 1):
//!
//! ```text
//! 1 / (6 pi R_h) = tr(M_UF) / 3,     R_h = 1 / (2 pi tr M_UF)
//! ```
//!
//! Source: H. Brenner, J. Colloid Interface Sci. 23 (1967) 407; the factor is Stokes's 6 pi.

use std::f64::consts::PI;

use super::Mobility;

impl Mobility {
    /// Orientation mean of the mobility, `tr(M_UF) / 3` about the centre of mobility.
    pub fn mean_velocity_force(&self) -> f64 {
        self.about(&self.centre()).velocity_force().trace() / 3.0
    }

    /// Hydrodynamic radius of the orientation mean, in the unit of length, for viscosity 1.
    pub fn hydrodynamic_radius(&self) -> f64 {
        1.0 / (6.0 * PI * self.mean_velocity_force())
    }
}
