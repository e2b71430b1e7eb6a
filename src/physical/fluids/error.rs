//! What can be wrong with a fluid as it was specified.

use crate::physical::quantity::QuantityError;
use thiserror::Error;

/// Why a specification is no usable fluid. Each message is one sentence.
#[derive(Debug, Clone, PartialEq, Error)]
#[non_exhaustive]
pub enum FluidError {
    /// No fluid of that name is known.
    #[error("no fluid is called `{name}`{}; known are {known}", guess(.nearest))]
    UnknownFluid {
        /// The name as written, shortened.
        name: String,
        /// The known name that is spelt nearly so.
        nearest: Option<&'static str>,
        /// The known forms, joined by commas.
        known: String,
    },
    /// The fluid needs a parameter that is missing.
    #[error("{fluid} needs {what}, as in `{example}`")]
    NeedsParameter {
        /// The fluid's name.
        fluid: &'static str,
        /// What is missing.
        what: &'static str,
        /// How one would write it.
        example: &'static str,
    },
    /// The fluid takes no parameter.
    #[error("{fluid} takes nothing after its name, but `{parameter}` was given")]
    UnexpectedParameter {
        /// The fluid's name.
        fluid: String,
        /// What was given, shortened.
        parameter: String,
    },
    /// A fraction that is neither clearly by mass nor clearly by volume, or is no percentage.
    #[error("the fraction `{text}` can't be used: {reason}")]
    BadFraction {
        /// The fraction as written, shortened.
        text: String,
        /// What is wrong.
        reason: &'static str,
    },
    /// The composition or the grade is outside what is described here.
    #[error("{fluid} is described for {what} from {low} to {high}, not at {given}")]
    CompositionOutOfRange {
        /// The fluid's name.
        fluid: &'static str,
        /// Which parameter.
        what: &'static str,
        /// Lowest value described.
        low: &'static str,
        /// Highest value described.
        high: &'static str,
        /// The value given.
        given: String,
    },
    /// The temperature is outside what is described here.
    #[error(
        "{fluid} is described from {low_c} to {high_c} degC ({reason}), not at {} degC",
        rounded(.given_c)
    )]
    TemperatureOutOfRange {
        /// The fluid's name.
        fluid: String,
        /// Lowest temperature described, degC.
        low_c: f64,
        /// Highest temperature described, degC.
        high_c: f64,
        /// Why the description ends there.
        reason: &'static str,
        /// The temperature given, degC.
        given_c: f64,
    },
    /// What was given as the temperature is none.
    #[error("the temperature of a fluid is given by {given}, where an absolute temperature is needed")]
    NotATemperature {
        /// What it is instead, with its article.
        given: &'static str,
    },
    /// Of a fluid given by numbers, one is missing.
    #[error("a fluid given by numbers needs its {missing} too, as in `viscosity=1mPa.s,density=1g/mL`")]
    MissingNumber {
        /// "viscosity" or "density".
        missing: &'static str,
    },
    /// A part of a fluid given by numbers is no `key=value` with a known key.
    #[error("`{part}` is no part of a fluid such as `viscosity=1mPa.s,density=1g/mL`")]
    UnknownPart {
        /// The part as written, shortened.
        part: String,
    },
    /// A number was given twice.
    #[error("the {key} of the fluid is given twice")]
    GivenTwice {
        /// "viscosity" or "density".
        key: &'static str,
    },
    /// A quantity in the specification can't be used.
    #[error("the {what} of the fluid can't be used: {source}")]
    Quantity {
        /// Which quantity.
        what: &'static str,
        /// What is wrong with it.
        source: QuantityError,
    },
}

fn guess(nearest: &Option<&'static str>) -> String {
    nearest.map_or_else(String::new, |name| format!(", did you mean `{name}`"))
}

/// Rounded so that a temperature says nothing of binary fractions of a kelvin.
fn rounded(temperature_c: &f64) -> f64 {
    (temperature_c * 1e4).round() / 1e4
}
