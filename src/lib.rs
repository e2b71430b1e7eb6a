pub mod physical;
pub mod question;
pub mod show;
pub mod stokes;
pub mod surface;
