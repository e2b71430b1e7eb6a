//! A case file in the place of BODY: what it says stands in for options that were not given.

use std::path::{Path, PathBuf};

use slowmote::physical::quantity::parse_temperature;
use slowmote::question::{Case, StandingBody};
use slowmote::surface::Geometry;

use super::Failure;
use super::options::{BodyOptions, FluidOptions};

/// What the command line and the case file say together.
pub struct Filled {
    /// The case file, if there is one.
    case: Option<PathBuf>,
    /// The bodies' options, one a body of the case, and what the case says of it beside them.
    bodies: Vec<(BodyOptions, Said)>,
    /// The fluid.
    pub fluid: FluidOptions,
}

/// What a case says of a body that is no option of every command.
#[derive(Debug, Clone, Default)]
pub struct Said {
    /// What it is called.
    pub name: Option<String>,
    /// Its density, as in `1.05g/mL`.
    pub density: Option<String>,
}

impl Filled {
    /// All bodies where they stand.
    ///
    /// # Errors
    /// There is no such shape or file, or it can't be used.
    pub fn standing(&self, geometry: Option<Geometry>) -> Result<Vec<StandingBody>, Failure> {
        let mut standing = Vec::new();
        for (options, said) in &self.bodies {
            let mut bodies = options.bodies(geometry)?;
            if let Some(name) = &said.name {
                let several = bodies.len() > 1;
                for (piece, standing) in bodies.iter_mut().enumerate() {
                    let piece = if several { format!(", piece {}", piece + 1) } else { String::new() };
                    standing.body.name = format!("{name}{piece}");
                }
            }
            standing.extend(bodies);
        }
        Ok(standing)
    }

    /// The files that were read: the case and all surfaces.
    pub fn files(&self) -> Vec<PathBuf> {
        let surfaces =
            self.bodies.iter().map(|(options, _)| PathBuf::from(&options.body)).filter(|path| path.is_file());
        let mut files = self.case.iter().cloned().chain(surfaces).collect::<Vec<_>>();
        files.dedup();
        files
    }

    /// The only body's options.
    pub fn one(&self) -> Option<&BodyOptions> {
        match self.bodies.as_slice() {
            [(one, _)] => Some(one),
            _ => None,
        }
    }

    /// What the case says of the only body.
    pub fn said_of_one(&self) -> Said {
        match self.bodies.as_slice() {
            [(_, said)] => said.clone(),
            _ => Said::default(),
        }
    }
}

/// Reads the case if BODY is one.
///
/// # Errors
/// A case that can't be read, that asks for what can't be done yet, or options that are for one body and a case of several.
pub fn filled(body: &BodyOptions, fluid: &FluidOptions) -> Result<Filled, Failure> {
    let path = Path::new(&body.body);
    if !path.extension().is_some_and(|extension| extension.eq_ignore_ascii_case("json")) {
        return Ok(Filled { case: None, bodies: vec![(body.clone(), Said::default())], fluid: fluid.clone() });
    }
    let hint = "README shows a case file; quantities are texts with units, as in \"25degC\"";
    let case = Case::read(path).map_err(|error| Failure::of(&error).hint(hint))?;
    if let Some(wall) = case.surroundings.first() {
        return Err(Failure::new(format!("the case has a wall, `{wall}`, and only open fluid is known so far"))
            .hint("leave `surroundings` empty; walls are for a later version"));
    }
    if let Some(flow) = &case.flow {
        return Err(Failure::new(format!("the case has a flow, `{flow}`, and only fluid at rest is known so far"))
            .hint("leave `flow` out; background flows are for a later version"));
    }
    let placed = [("--at", body.at.is_some()), ("--turn", !body.turn.is_empty())];
    if let Some((option, _)) = placed.into_iter().find(|(_, given)| *given && case.bodies.len() > 1) {
        let count = case.bodies.len();
        return Err(Failure::new(format!("{option} is for one body, and the case holds {count}"))
            .hint("say in the case file how each of them stands: `at` and `turn`"));
    }
    let mut filled = Filled { case: Some(path.to_path_buf()), bodies: Vec::new(), fluid: fluid.clone() };
    for one in &case.bodies {
        let mut options = body.clone();
        options.fill(one, path)?;
        filled.bodies.push((options, Said { name: one.name.clone(), density: one.density.clone() }));
    }
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
