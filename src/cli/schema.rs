//! `slowmote schema [NAME]`.

use clap::Args;
use slowmote::question::Layout;
use slowmote::show::to_json;

use super::output::to_stdout;
use super::{Exit, Failure};

/// Options of `schema`.
#[derive(Debug, Args)]
#[command(after_help = "\
Examples:
  slowmote schema
  slowmote schema drag > drag.schema.json")]
pub struct SchemaArguments {
    /// A layout, such as `slowmote.drag.1` or `drag`
    #[arg(value_name = "NAME")]
    name: Option<String>,
}

impl SchemaArguments {
    /// Prints the schema, or the list of layouts.
    ///
    /// # Errors
    /// There is no such layout.
    pub fn run(&self) -> Result<Exit, Failure> {
        let Some(name) = &self.name else {
            let lines = Layout::ALL.iter().map(|layout| format!("  {:<22}{}\n", layout.name, layout.what));
            to_stdout(&lines.collect::<String>())?;
            return Ok(Exit::Done);
        };
        let layout = Layout::find(name).ok_or_else(|| {
            Failure::new(format!("no layout is called `{name}`")).hint("`slowmote schema` lists them")
        })?;
        let text = to_json(&layout.schema()).map_err(|error| Failure::of(&error))?;
        to_stdout(&text)?;
        Ok(Exit::Done)
    }
}
