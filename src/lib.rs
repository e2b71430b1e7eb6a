//! Drag, torque and mobility of small bodies in viscous fluids, with an error estimate on every number.
//!
//! The modules, in the order in which they may use each other (each only those before it):
//!
//! | module | what it knows |
//! |---|---|
//! | [`physical`] | quantities with units and uncertainties, constants, fluids, materials |
//! | [`surface`] | bodies as triangulated surfaces: shapes by name, files, examination, panels |
//! | [`stokes`] | the solver: a pure shape in, a resistance and its error out; no units, no files |
//! | [`question`] | one question a file: makes it dimensionless, asks the solver, gives the answer its units back |
//! | [`show`] | what people and programs read: text and JSON |
//!
//! The library never prints, reads no environment, and never ends the process.
//!
//! # Example
//!
//! The hydrodynamic radius of a cube of side 2, in the same unit of length:
//!
//! ```
//! use slowmote::stokes::solve::{Request, resistance};
//! use slowmote::surface::{Point, shapes::Shape};
//!
//! let cube = Shape::cube(2.0)?.blueprint();
//! let request = Request { accuracy: 0.02, ..Request::default() };
//! let solution = resistance(&cube, Point::zeros(), &request, &())?;
//! let radius = solution.resistance.mobility()?.hydrodynamic_radius();
//! // 0.674631 sides, by extrapolation of our own.
//! assert!((radius / 1.349262 - 1.0).abs() <= solution.error.worst());
//! # Ok::<(), Box<dyn std::error::Error>>(())
//! ```
#![warn(clippy::unwrap_used, clippy::expect_used, clippy::panic)]
#![warn(clippy::print_stdout, clippy::print_stderr, clippy::exit)]
#![cfg_attr(test, allow(clippy::unwrap_used, clippy::expect_used, clippy::panic))]

pub mod physical;
pub mod question;
pub mod show;
pub mod stokes;
pub mod surface;
