//! Green's functions: the velocity of a point force.

mod free_space;

pub use free_space::stokeslet;
