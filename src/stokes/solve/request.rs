//! What is asked of the solver, and how it reports while it works.

use crate::stokes::quadrature::PairRules;
use crate::surface::{Blueprint, Geometry, Point};

/// Which factorisation solves the dense system.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Factor {
    /// LU with partial pivoting.
    Lu,
    /// Cholesky; its failure is an error, since the matrix must be positive definite.
    Cholesky,
}

/// One of several bodies.
#[derive(Debug, Clone, Copy)]
pub struct Part<'a> {
    /// Its surface where it stands.
    pub blueprint: &'a Blueprint,
    /// The geometry of its panels.
    pub geometry: Geometry,
    /// Its own reference point.
    pub reference: Point,
}

/// What is wanted.
#[derive(Debug, Clone)]
pub struct Request {
    /// Wanted relative accuracy of force, torque and coupling.
    pub accuracy: f64,
    /// A fixed mesh of about this many triangles a body, with no adaptivity.
    pub elements: Option<usize>,
    /// The geometry of the panels, where one body is solved; several have each their own.
    pub geometry: Geometry,
    /// The factorisation, or `None` for the solver's choice.
    pub factor: Option<Factor>,
    /// Most memory the matrix may take, in bytes.
    pub memory_limit: u64,
    /// Most time to spend, in seconds: no finer mesh is begun whose solution is expected to end later. What is begun is
    /// always finished.
    pub time_limit_s: f64,
    /// Quadrature of close pairs; `None` for what the accuracy asks for.
    pub rules: Option<PairRules>,
    /// Factor on the shift that fixes the null space; for studies.
    pub shift: f64,
}

impl Default for Request {
    fn default() -> Self {
        Self {
            accuracy: 5e-3,
            elements: None,
            geometry: Geometry::Exact,
            factor: None,
            memory_limit: 4 << 30,
            time_limit_s: f64::INFINITY,
            rules: None,
            shift: 1.0,
        }
    }
}

/// What the solver is doing.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Stage {
    /// Integrating over pairs of panels.
    Assembling,
    /// Factorising the matrix.
    Factorising,
    /// Solving for the tractions and estimating the error.
    Solving,
}

/// Hears of progress; called from worker threads too.
pub trait Observer: Sync {
    /// `stage` of the solve with `unknowns` unknowns is done to `fraction`, from 0 to 1.
    fn progress(&self, stage: Stage, unknowns: usize, fraction: f64);
}

/// An observer that does nothing.
impl Observer for () {
    fn progress(&self, _: Stage, _: usize, _: f64) {}
}
