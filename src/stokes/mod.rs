//! The solver: Stokes flow around rigid bodies as a first-kind boundary-integral equation.
//!
//! ```text
//! 1/(8 pi) int_S G(x, y) f(y) dS(y) = u(x),   G = I/r + r r^T / r^3
//! ```
//!
//! Dimensionless: the viscosity is 1 and lengths are whatever the surface is given in, best body lengths. No units, no
//! files, no printing. `f` is the force per area that the body exerts on the fluid.

pub mod green;
pub mod quadrature;
pub mod rigid;
pub mod single_layer;
pub mod solve;
