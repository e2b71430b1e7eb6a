//! A case file in the place of BODY: what it says stands in for options that were not given.

use std::path::Path;

use slowmote::physical::quantity::parse_temperature;
use slowmote::question::Case;

use super::Failure;
use super::options::{BodyOptions, FluidOptions};

/// Options filled up from a case file, and the body's name there.
pub struct Filled {
    /// The body.
    pub body: BodyOptions,
    /// The fluid.
    pub fluid: FluidOptions,
    /// What the case calls the body.
    pub name: Option<String>,
    /// The body's density, as in `1.05g/mL`.
    pub density: Option<String>,
}

/// Reads the case if BODY is one.
///
/// # Errors
/// A case that can't be read, or that asks for what can't be done yet.
pub fn filled(body: &BodyOptions, fluid: &FluidOptions) -> Result<Filled, Failure> {
    let mut filled = Filled { body: body.clone(), fluid: fluid.clone(), name: None, density: None };
    let path = Path::new(&body.body);
    if !path.extension().is_some_and(|extension| extension.eq_ignore_ascii_case("json")) {
        return Ok(filled);
    }
    let hint = "README shows a case file; quantities are texts with units, as in \"25degC\"";
    let case = Case::read(path).map_err(|error| Failure::of(&error).hint(hint))?;
    let [one] = case.bodies.as_slice() else {
        return Err(Failure::new(format!("the case holds {} bodies, and one is expected", case.bodies.len()))
            .hint("write a case for each body; several at once are for a later version"));
    };
    if let Some(wall) = case.surroundings.first() {
        return Err(Failure::new(format!("the case has a wall, `{wall}`, and only open fluid is known so far"))
            .hint("leave `surroundings` empty; walls are for a later version"));
    }
    if let Some(flow) = &case.flow {
        return Err(Failure::new(format!("the case has a flow, `{flow}`, and only fluid at rest is known so far"))
            .hint("leave `flow` out; background flows are for a later version"));
    }
    filled.body.fill(one, path)?;
    filled.name = one.name.clone();
    filled.density = one.density.clone();
    if let Some(given) = &case.fluid {
        if fluid.fluid.is_none() {
            filled.fluid.fluid = Some(given.specification().map_err(|error| Failure::of(&error).hint(hint))?);
        }
        if let (None, Some(text)) = (fluid.temperature, &given.temperature) {
            let temperature = parse_temperature(text).map_err(|error| Failure::of(&error).hint(hint))?;
            filled.fluid.temperature = Some(temperature);
        }
    }
    Ok(filled)
}
