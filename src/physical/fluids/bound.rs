//! How well a property is known, and on what grounds.

use std::fmt;

/// The grounds on which the uncertainty of a property is stated.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[non_exhaustive]
pub enum BoundKind {
    /// The uncertainty that the publication itself states.
    Published,
    /// The largest deviation from reference data in the stated range.
    ComparedWithData,
    /// The tolerance on the label of the product.
    LabelTolerance,
    /// A plausible spread about a value that is common practice or from memory, without a source.
    CommonPractice,
    /// What the user gave.
    Given,
}

impl fmt::Display for BoundKind {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(match self {
            Self::Published => "uncertainty stated by the publication",
            Self::ComparedWithData => "largest deviation from reference data",
            Self::LabelTolerance => "tolerance of the label",
            Self::CommonPractice => "plausible spread, common practice, no source",
            Self::Given => "as given",
        })
    }
}

/// A bound on the relative error of a property: half its width, and its grounds.
///
/// It is kept as stated and not divided down to a standard deviation, so that errors built on it are
/// bounds as well.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Bound {
    /// Half width as a fraction of the value.
    pub relative: f64,
    /// On what grounds.
    pub kind: BoundKind,
}

impl Bound {
    pub(super) const fn new(relative: f64, kind: BoundKind) -> Self {
        Self { relative, kind }
    }
}
