//! The quantity itself.

use super::dimension::Dimension;
use super::display::DisplayUnit;
use super::error::QuantityError;

/// Significant digits with which a value is said back in messages.
const DIGITS_IN_MESSAGES: usize = 4;

/// A value in SI units with its dimension and an uncertainty.
///
/// The uncertainty is a half width in the same unit, zero if none was given. What kind of bound it is, is
/// up to who wrote it; it is carried on to first order.
///
/// # Examples
/// ```
/// use slowmote::physical::{Dimension, Quantity};
///
/// let diameter = Quantity::parse("10±0.3um", Dimension::LENGTH)?.positive()?;
/// assert_eq!(diameter.value_si(), 1e-5);
/// assert_eq!(diameter.uncertainty_si(), 3e-7);
/// # Ok::<(), slowmote::physical::QuantityError>(())
/// ```
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Quantity {
    value_si: f64,
    uncertainty_si: f64,
    dimension: Dimension,
}

impl Quantity {
    /// A quantity without uncertainty from its value in SI units.
    ///
    /// # Errors
    /// [`QuantityError::NotFinite`] if the value is infinite or not a number;
    /// [`QuantityError::BelowAbsoluteZero`] for a negative absolute temperature.
    pub fn exact(value_si: f64, dimension: Dimension) -> Result<Self, QuantityError> {
        Self::with_uncertainty(value_si, 0.0, dimension)
    }

    /// A quantity from its value and its uncertainty in SI units.
    ///
    /// # Errors
    /// As [`Quantity::exact`], and [`QuantityError::BadUncertainty`] if the uncertainty is negative.
    pub fn with_uncertainty(value_si: f64, uncertainty_si: f64, dimension: Dimension) -> Result<Self, QuantityError> {
        if !value_si.is_finite() || !uncertainty_si.is_finite() {
            let text = format!("{value_si} ± {uncertainty_si}");
            return Err(QuantityError::NotFinite { text });
        }
        if uncertainty_si < 0.0 {
            let text = format!("{value_si} ± {uncertainty_si}");
            return Err(QuantityError::BadUncertainty { text, reason: "it is negative" });
        }
        if dimension.is_absolute_temperature() && value_si < 0.0 {
            return Err(QuantityError::BelowAbsoluteZero { text: format!("{value_si} K") });
        }
        Ok(Self { value_si, uncertainty_si, dimension })
    }

    /// A quantity of this program's own making, whose value needs no check.
    pub(crate) const fn trusted(value_si: f64, uncertainty_si: f64, dimension: Dimension) -> Self {
        Self { value_si, uncertainty_si, dimension }
    }

    /// The value in SI units (an absolute temperature in kelvin, an angle in radians).
    pub fn value_si(&self) -> f64 {
        self.value_si
    }

    /// The uncertainty in SI units, zero if none was given.
    pub fn uncertainty_si(&self) -> f64 {
        self.uncertainty_si
    }

    /// The uncertainty as a fraction of the value; infinite for an uncertain zero.
    pub fn relative_uncertainty(&self) -> f64 {
        if self.uncertainty_si == 0.0 { 0.0 } else { self.uncertainty_si / self.value_si.abs() }
    }

    /// What the quantity measures.
    pub fn dimension(&self) -> Dimension {
        self.dimension
    }

    /// The quantity itself if it is greater than zero and surer than its own size.
    ///
    /// # Errors
    /// [`QuantityError::NotPositive`], or [`QuantityError::UncertaintyTooLarge`] if the uncertainty is
    /// as large as the value.
    pub fn positive(self) -> Result<Self, QuantityError> {
        if self.value_si <= 0.0 {
            let (value, expected) = (self.to_text(DIGITS_IN_MESSAGES), self.dimension.name());
            return Err(QuantityError::NotPositive { value, expected });
        }
        if self.uncertainty_si >= self.value_si {
            let value = self.to_text(DIGITS_IN_MESSAGES);
            return Err(QuantityError::UncertaintyTooLarge { value });
        }
        Ok(self)
    }

    /// The quantity itself if it is zero or more.
    ///
    /// # Errors
    /// [`QuantityError::Negative`].
    pub fn non_negative(self) -> Result<Self, QuantityError> {
        if self.value_si < 0.0 {
            let (value, expected) = (self.to_text(DIGITS_IN_MESSAGES), self.dimension.name());
            return Err(QuantityError::Negative { value, expected });
        }
        Ok(self)
    }

    /// The quantity in a readable unit with so many significant digits: `10.0 ± 0.3 um`.
    pub fn to_text(&self, digits: usize) -> String {
        DisplayUnit::of(self.dimension).quantity(self, digits)
    }
}
