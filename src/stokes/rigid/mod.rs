//! The algebra of rigid bodies in Stokes flow: resistance, mobility, their centres, axes and averages.
//!
//! ```text
//! [F]   [ R_FU  R_FW ] [U]          [U]   [ M_UF  M_UT ] [F]
//! [T] = [ R_TU  R_TW ] [W]          [W] = [ M_WF  M_WT ] [T],     M = R^-1
//! ```
//!
//! | symbol | meaning |
//! |---|---|
//! | F, T | force and torque that the **body exerts on the fluid**, T about the reference point |
//! | U, W | velocity of the body's material point at the reference point, and angular velocity |
//! | R, M | resistance and mobility, 6 x 6, symmetric and positive definite |
//!
//! Force stands before torque and velocity before rotation; the frame is the laboratory's. Viscosity is 1, so that a
//! drag is a length and a rotational resistance a length cubed; [`Resistance::scaled`] gives both their units.
//!
//! Sources, with every formula derived again here: H. Brenner, Chem. Eng. Sci. 18 (1963) 1 and 19 (1964) 599;
//! J. Happel and H. Brenner, *Low Reynolds Number Hydrodynamics* (1965), chapter 5; S. Kim and S. J. Karrila,
//! *Microhydrodynamics* (1991), chapter 5.

mod average;
mod centre;
mod grand;
mod mobility;
mod motion;
mod principal;
mod resistance;

pub use grand::{GrandMobility, GrandResistance};
pub use mobility::Mobility;
pub use motion::{Motion, Wrench};
pub use principal::Principal;
pub use resistance::{Resistance, RigidError};
