//! How accurately, and for study how.

use clap::{Args, ValueEnum};
use slowmote::physical::quantity::parse_fraction;
use slowmote::stokes::solve::{Factor, Request};
use slowmote::surface::Geometry;

use super::values::{memory, time};
use crate::cli::{Failure, machine::memory_limit};

/// A relative accuracy beyond this says nothing.
const LOOSEST_ACCURACY: f64 = 0.5;

/// Nothing below is reached in double precision, whatever the mesh.
const TIGHTEST_ACCURACY: f64 = 1e-10;

/// More triangles than this are a typing mistake on any machine.
const MOST_ELEMENTS: usize = 10_000_000;

/// More threads than any machine this runs on has.
const MOST_THREADS: i64 = 1024;

/// What is asked of the solver.
#[derive(Debug, Clone, Args)]
#[command(next_help_heading = "The solver")]
pub struct SolverOptions {
    /// Wanted relative accuracy of the solver, such as `1%`
    #[arg(long, value_name = "A", default_value = "0.5%", value_parser = accuracy)]
    pub accuracy: f64,

    /// For study: a fixed mesh of about this many triangles, not refined
    #[arg(long, value_name = "N", value_parser = elements)]
    pub elements: Option<usize>,

    /// For study: the geometry of the triangles [default: exact for shapes, what fits the facets for files]
    #[arg(long, value_enum)]
    pub geometry: Option<GeometryName>,

    /// For study: the factorisation [default: the solver's choice]
    #[arg(long, value_enum)]
    pub factor: Option<FactorName>,

    /// Threads to work with [default: all]
    #[arg(long, value_name = "N", value_parser = clap::value_parser!(u16).range(1..=MOST_THREADS))]
    pub threads: Option<u16>,

    /// Memory that the matrix may take, such as `4GB` [default: a share of what is free]
    #[arg(long, value_name = "SIZE", value_parser = memory)]
    pub memory: Option<u64>,

    /// Time to spend at most, such as `30s` or `10min`: no finer mesh is begun that would take longer
    #[arg(long, value_name = "T", default_value = "2min", value_parser = time)]
    pub time: f64,
}

/// The geometry of the triangles.
#[derive(Debug, Clone, Copy, PartialEq, Eq, ValueEnum)]
pub enum GeometryName {
    /// The true surface of a shape; the facets of a file as they are
    Exact,
    /// Patches of six nodes, on the true surface of a shape or through the vertices of a file
    Curved,
    /// Flat triangles, with their corners on the surface
    Flat,
}

/// The factorisation of the dense system.
#[derive(Debug, Clone, Copy, PartialEq, Eq, ValueEnum)]
pub enum FactorName {
    /// LU with partial pivoting
    Lu,
    /// Cholesky
    Cholesky,
}

impl SolverOptions {
    /// The request to the solver.
    pub fn request(&self) -> Request {
        Request {
            accuracy: self.accuracy,
            elements: self.elements,
            factor: self.factor.map(|factor| match factor {
                FactorName::Lu => Factor::Lu,
                FactorName::Cholesky => Factor::Cholesky,
            }),
            memory_limit: self.memory.unwrap_or_else(memory_limit),
            time_limit_s: self.time,
            ..Request::default()
        }
    }

    /// The geometry, if one was asked for.
    pub fn geometry(&self) -> Option<Geometry> {
        self.geometry.map(|geometry| match geometry {
            GeometryName::Exact => Geometry::Exact,
            GeometryName::Curved => Geometry::Curved,
            GeometryName::Flat => Geometry::Flat,
        })
    }

    /// Sets the number of threads, if one was given; otherwise they are started when first needed.
    ///
    /// # Errors
    /// The system doesn't let so many be started.
    pub fn start_threads(&self) -> Result<(), Failure> {
        let Some(threads) = self.threads else { return Ok(()) };
        rayon::ThreadPoolBuilder::new()
            .num_threads(usize::from(threads))
            .build_global()
            .map_err(|error| Failure::of(&error).during(format!("{threads} threads can't be started")))
    }
}

fn accuracy(text: &str) -> Result<f64, String> {
    let wanted = parse_fraction(text).map_err(|error| error.to_string())?;
    let value = wanted.value_si();
    if wanted.uncertainty_si() > 0.0 {
        return Err("an accuracy has no uncertainty of its own".to_owned());
    }
    if !(TIGHTEST_ACCURACY..=LOOSEST_ACCURACY).contains(&value) {
        return Err(format!(
            "a relative accuracy from {TIGHTEST_ACCURACY:e} to {} % is possible",
            100.0 * LOOSEST_ACCURACY
        ));
    }
    Ok(value)
}

fn elements(text: &str) -> Result<usize, String> {
    let count: usize = text.parse().map_err(|_| "a whole number of triangles is expected".to_owned())?;
    if !(1..=MOST_ELEMENTS).contains(&count) {
        return Err(format!("from 1 to {MOST_ELEMENTS} triangles are possible"));
    }
    Ok(count)
}
