//! Case files: a question written down as JSON, in the words of the command line.
//!
//! ```json
//! {
//!   "fluid": {"name": "water", "temperature": "25degC"},
//!   "bodies": [{"name": "bead", "surface": "sphere:2um", "turn": ["30deg@y"], "density": "1.05g/mL"}],
//!   "surroundings": [],
//!   "flow": null
//! }
//! ```
//!
//! Quantities are texts with units, as everywhere. A surface file's path counts from the case file's folder. Only the
//! grammar is checked here; what the texts mean is read where they are used.

use std::fs::File;
use std::io::Read;
use std::path::{Path, PathBuf};

use schemars::JsonSchema;
use serde::Deserialize;
use thiserror::Error;

/// Name and version of the layout of [`Case`].
pub const CASE_SCHEMA: &str = "slowmote.case.1";

/// A case longer than this is not one; the file is not read beyond.
const LONGEST: u64 = 1 << 20;

/// What a case file says.
#[derive(Debug, Clone, PartialEq, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct Case {
    /// The fluid.
    pub fluid: Option<CaseFluid>,
    /// The bodies, one at least.
    pub bodies: Vec<CaseBody>,
    /// Walls, as in `plane:z=-3um`.
    #[serde(default)]
    pub surroundings: Vec<String>,
    /// The background flow, as in `shear:10/s`.
    pub flow: Option<String>,
}

/// A fluid by name, or by viscosity and density.
#[derive(Debug, Clone, PartialEq, Eq, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct CaseFluid {
    /// A name that `slowmote fluid` knows.
    pub name: Option<String>,
    /// Viscosity, as in `1mPa.s`.
    pub viscosity: Option<String>,
    /// Density, as in `1g/mL`.
    pub density: Option<String>,
    /// Temperature, as in `25degC`.
    pub temperature: Option<String>,
}

/// One body.
#[derive(Debug, Clone, PartialEq, Eq, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct CaseBody {
    /// What it is called in the answer.
    pub name: Option<String>,
    /// A shape, or a surface file.
    pub surface: String,
    /// Unit of a surface file.
    pub unit: Option<String>,
    /// What the pieces of a surface file are: `joined` or `apart`.
    pub pieces: Option<String>,
    /// Place of its centroid: three lengths.
    pub at: Option<[String; 3]>,
    /// Turns, as in `30deg@y`.
    #[serde(default)]
    pub turn: Vec<String>,
    /// Density, for questions of settling.
    pub density: Option<String>,
}

/// Why a case can't be used.
#[derive(Debug, Error)]
#[non_exhaustive]
pub enum CaseError {
    /// The file can't be read.
    #[error("the case file {} can't be read", .path.display())]
    Unreadable {
        /// The file.
        path: PathBuf,
        /// Why.
        source: std::io::Error,
    },
    /// The file is longer than any case.
    #[error("{} is longer than {LONGEST} bytes, so it is no case file", .path.display())]
    TooLong {
        /// The file.
        path: PathBuf,
    },
    /// The file is no case.
    #[error("{} is not a case file", .path.display())]
    Malformed {
        /// The file.
        path: PathBuf,
        /// What is wrong, with line and column.
        source: serde_json::Error,
    },
    /// There is no body.
    #[error("the case file {} names no body", .path.display())]
    NoBody {
        /// The file.
        path: PathBuf,
    },
    /// A fluid must be given in one way.
    #[error("the fluid of a case is given by its name, or by both viscosity and density")]
    Fluid,
}

impl Case {
    /// Reads a case file.
    ///
    /// # Errors
    /// [`CaseError`]: unreadable, too long, not JSON, unknown or missing keys, no body, a fluid given in two ways or none.
    pub fn read(path: &Path) -> Result<Self, CaseError> {
        let unreadable = |source| CaseError::Unreadable { path: path.to_path_buf(), source };
        let mut text = Vec::new();
        File::open(path).map_err(unreadable)?.take(LONGEST + 1).read_to_end(&mut text).map_err(unreadable)?;
        if text.len() as u64 > LONGEST {
            return Err(CaseError::TooLong { path: path.to_path_buf() });
        }
        let case: Self = serde_json::from_slice(&text)
            .map_err(|source| CaseError::Malformed { path: path.to_path_buf(), source })?;
        if case.bodies.is_empty() {
            return Err(CaseError::NoBody { path: path.to_path_buf() });
        }
        if let Some(fluid) = &case.fluid {
            fluid.specification()?;
        }
        Ok(case)
    }
}

impl CaseFluid {
    /// The fluid as the command line writes it.
    ///
    /// # Errors
    /// [`CaseError::Fluid`] if it is given in two ways or in none.
    pub fn specification(&self) -> Result<String, CaseError> {
        match (&self.name, &self.viscosity, &self.density) {
            (Some(name), None, None) => Ok(name.clone()),
            (None, Some(viscosity), Some(density)) => Ok(format!("viscosity={viscosity},density={density}")),
            _ => Err(CaseError::Fluid),
        }
    }
}
