//! Why there is no answer to `drag`.

use thiserror::Error;

use crate::physical::quantity::{DisplayUnit, format_number};
use crate::stokes::rigid::RigidError;
use crate::stokes::solve::SolveError;
use crate::surface::Point;

/// Why there is no answer.
#[derive(Debug, Clone, PartialEq, Error)]
#[non_exhaustive]
pub enum DragError {
    /// There is no body.
    #[error("there is no body")]
    NoBody,
    /// The surface encloses nothing, or is inside out.
    #[error("the surface of {name} encloses no volume ({volume_m3:e} m3)")]
    NoVolume {
        /// The body.
        name: String,
        /// What it encloses, m3.
        volume_m3: f64,
    },
    /// Two bodies are in one place.
    #[error("{first} and {second} overlap or touch {}", place(.place_m))]
    Overlap {
        /// One body.
        first: String,
        /// The other.
        second: String,
        /// Where, m; none if one lies inside the other.
        place_m: Option<Point>,
    },
    /// Two bodies could be in one place.
    #[error("with the uncertainty of their sizes, {first} and {second} may overlap or touch")]
    MayOverlap {
        /// One body.
        first: String,
        /// The other.
        second: String,
    },
    /// What was asked for is known for one body only.
    #[error("{what} is for one body, and there are {bodies}")]
    OneBodyOnly {
        /// What was asked for.
        what: &'static str,
        /// How many bodies there are.
        bodies: usize,
    },
    /// The solver gave up.
    #[error("the drag of {name} could not be computed")]
    Solve {
        /// The body or bodies.
        name: String,
        /// Why.
        source: SolveError,
    },
    /// What the solver gave is no resistance.
    #[error("the drag of {name} could not be computed")]
    Rigid {
        /// The body or bodies.
        name: String,
        /// Why.
        source: RigidError,
    },
}

fn place(place_m: &Option<Point>) -> String {
    match place_m {
        Some(place) => {
            let unit = DisplayUnit::LENGTH.choose(place.amax(), 3);
            let coordinates = place.map(|x| format_number(unit.value(x), 3));
            format!("near ({}, {}, {}) {}", coordinates.x, coordinates.y, coordinates.z, unit.symbol())
        }
        None => "since one lies inside the other".to_owned(),
    }
}
