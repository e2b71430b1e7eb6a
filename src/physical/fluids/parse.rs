//! Reading a fluid as it is specified: `water`, `glycerol:60%`, `viscosity=1mPa.s,density=1g/mL`.

use super::air::Air;
use super::aqueous::{CULTURE_MEDIUM, PBS, PLASMA, SALINE};
use super::catalogue::{all_names, canonical, known_forms, plain_name};
use super::error::FluidError;
use super::fluid::Fluid;
use super::glycerol::Glycerol;
use super::heavy_water::HeavyWater;
use super::model::Model;
use super::silicone_oil::SiliconeOil;
use super::sucrose::Sucrose;
use super::water::Water;
use crate::physical::nearest::nearest;
use crate::physical::quantity::{Quantity, echo};

impl Fluid {
    /// Reads a fluid by name, or by numbers, and evaluates it at a temperature.
    ///
    /// Names: see [`CATALOGUE`](super::CATALOGUE); case, spaces and underscores do not matter. A mixture or
    /// a grade follows a colon: `glycerol:60%` (by mass), `glycerol:60%vol` (converted, and said so),
    /// `sucrose:20±0.5%`, `silicone-oil:1000cSt`. By numbers: `viscosity=1mPa.s,density=1g/mL`, each with an
    /// uncertainty if need be.
    ///
    /// # Errors
    /// A [`FluidError`] that says what is wrong and what is known.
    ///
    /// # Examples
    /// ```
    /// use slowmote::physical::Fluid;
    /// use slowmote::physical::fluids::default_temperature;
    ///
    /// let bench = Fluid::parse("glycerol:80%", default_temperature())?;
    /// assert!((bench.viscosity_pa_s() - 60.8e-3).abs() < 0.1e-3);
    /// # Ok::<(), slowmote::physical::FluidError>(())
    /// ```
    pub fn parse(specification: &str, temperature: Quantity) -> Result<Fluid, FluidError> {
        if specification.contains('=') {
            return Fluid::parse_numbers(specification, temperature);
        }
        let (name, parameter) = match specification.split_once(':') {
            Some((name, parameter)) => (name, Some(parameter)),
            None => (specification, None),
        };
        let canonical = canonical(name).ok_or_else(|| unknown(name))?;
        if let Some(simple) = without_parameter(canonical) {
            return match parameter {
                None => Fluid::from_model(simple, temperature),
                Some(parameter) => {
                    Err(FluidError::UnexpectedParameter { fluid: canonical.into(), parameter: echo(parameter) })
                }
            };
        }
        let needs = |what, example| parameter.ok_or(FluidError::NeedsParameter { fluid: canonical, what, example });
        match canonical {
            "glycerol" => {
                let parameter = needs("its fraction in water", "glycerol:60%")?;
                Fluid::from_model(&Glycerol::parse(parameter)?, temperature)
            }
            "sucrose" => {
                let parameter = needs("its fraction in water", "sucrose:20%")?;
                Fluid::from_model(&Sucrose::parse(parameter)?, temperature)
            }
            "silicone-oil" => {
                let parameter = needs("its grade", "silicone-oil:1000cSt")?;
                Fluid::from_model(&SiliconeOil::parse(parameter)?, temperature)
            }
            _ => Err(unknown(name)),
        }
    }
}

fn without_parameter(canonical: &str) -> Option<&'static dyn Model> {
    Some(match canonical {
        "water" => &Water,
        "heavy-water" => &HeavyWater,
        "air" => &Air,
        "saline" => &SALINE,
        "pbs" => &PBS,
        "plasma" => &PLASMA,
        "culture-medium" => &CULTURE_MEDIUM,
        _ => return None,
    })
}

fn unknown(name: &str) -> FluidError {
    FluidError::UnknownFluid {
        name: echo(name),
        nearest: nearest(&plain_name(name), all_names()).and_then(canonical),
        known: known_forms(),
    }
}

#[cfg(test)]
mod tests {
    use super::super::catalogue::CATALOGUE;
    use super::super::fluid::default_temperature;
    use super::*;

    #[test]
    fn every_entry_of_the_catalogue_is_read_and_names_itself() {
        for entry in CATALOGUE {
            let fluid = Fluid::parse(entry.example, default_temperature()).expect(entry.example);
            assert_eq!(fluid.name(), entry.example);
            for alias in entry.aliases {
                let spelt = entry.example.replacen(entry.name, &alias.to_uppercase(), 1);
                let again = Fluid::parse(&spelt, default_temperature());
                assert_eq!(again.as_ref(), Ok(&fluid), "{spelt}");
            }
        }
    }
}
