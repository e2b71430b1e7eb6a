//! `slowmote surface BODY`.

use std::path::{Path, PathBuf};

use clap::Args;
use slowmote::question::{LengthUnit, Surface, SurfaceReport};
use slowmote::show::surface_text;
use slowmote::surface::{SurfaceFormat, surface_bytes};

use super::options::{OutputOptions, length_unit};
use super::output::{NewFile, Output};
use super::{Exit, Failure};

/// Triangles of a named shape that is written.
const DEFAULT_ELEMENTS: usize = 1000;

/// Options of `surface`.
#[derive(Debug, Args)]
#[command(after_help = "\
Examples:
  slowmote surface part.stl --unit mm
  slowmote surface scan.ply --unit um --mend --write whole.stl
  slowmote surface redcell:7.82um --elements 2000 --write cell.off

The exit code is 1 if the solver would refuse the surface as it stands at the end.")]
pub struct SurfaceArguments {
    /// A surface file (.stl .obj .ply .off .msh), or a shape such as `rod:12x2um`
    #[arg(value_name = "BODY")]
    body: String,

    /// The unit of the coordinates, such as `um`; without it lengths are told in file units, and a shape is written in um
    #[arg(long, value_name = "UNIT", value_parser = length_unit)]
    unit: Option<LengthUnit>,

    /// Closes small holes, turns facets outward, drops what is plainly wrong, and lists what it did
    #[arg(long)]
    mend: bool,

    /// Writes the surface, in the format that the name ends with
    #[arg(long, value_name = "FILE")]
    write: Option<PathBuf>,

    /// Triangles of a named shape, about
    #[arg(long, value_name = "N", default_value_t = DEFAULT_ELEMENTS, value_parser = elements)]
    elements: usize,

    #[command(flatten)]
    output: OutputOptions,
}

impl SurfaceArguments {
    /// Looks, mends and writes as asked.
    ///
    /// # Errors
    /// A surface that can't be read, or a file that can't be written.
    pub fn run(&self, _asked: super::asked::Asked) -> Result<Exit, Failure> {
        let input = Path::new(&self.body);
        let format = self.format()?;
        let output = Output::open(&self.output, &[input])?;
        let written = match &self.write {
            Some(path) => Some(NewFile::create("surface", path, &[input])?),
            None => None,
        };
        let surface = Surface::read(&self.body, self.unit.as_ref(), self.elements).map_err(|error| {
            let hints = error.hints();
            hints.into_iter().fold(Failure::of(&error), Failure::hint)
        })?;
        let (surface, done) = if self.mend { surface.mended() } else { (surface, Vec::new()) };
        let mut report = surface.report(done);
        self.advise(&mut report);
        if let (Some(file), Some(format)) = (written, format) {
            let bytes = surface_bytes(&surface.mesh, format).map_err(|error| Failure::of(&error))?;
            file.finish(&bytes)?;
        }
        let usable = report.usable;
        output.write(&report, |style| surface_text(&report, style))?;
        Ok(if usable { Exit::Done } else { Exit::Failed })
    }

    fn format(&self) -> Result<Option<SurfaceFormat>, Failure> {
        let Some(path) = &self.write else { return Ok(None) };
        let unknown = || {
            Failure::new(format!("{} does not end as a surface file does", path.display()))
                .hint("end its name with .stl, .obj, .ply, .off or .msh")
        };
        SurfaceFormat::of_path(path).map(Some).ok_or_else(unknown)
    }

    /// The library's hints name its options; here the next step is a command.
    fn advise(&self, report: &mut SurfaceReport) {
        if report.refusal.is_some() && !self.mend {
            let step = report.next_step.take().unwrap_or_default();
            report.next_step = Some(format!(
                "{step}; `slowmote surface {} --mend --write MENDED.stl` tries what can be mended",
                self.body
            ));
        }
    }
}

fn elements(text: &str) -> Result<usize, String> {
    match text.parse::<usize>() {
        Ok(count) if (4..=1_000_000).contains(&count) => Ok(count),
        _ => Err("a number of triangles from 4 to 1000000 is possible".to_owned()),
    }
}
