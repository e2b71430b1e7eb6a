//! `slowmote surface BODY`.

use std::path::{Path, PathBuf};

use clap::{Args, ValueEnum};
use slowmote::question::{LengthUnit, Surface, SurfaceReport};
use slowmote::show::surface_text;
use slowmote::surface::{FacetedGeometry, FacetedOptions, SurfaceFormat};

use super::asked::Asked;
use super::options::{OutputOptions, RecordOptions, length_unit};
use super::output::{NewFile, Output};
use super::shell_word::shell_word;
use super::{Exit, Failure};

/// Triangles of a named shape that is written.
const DEFAULT_ELEMENTS: usize = 1000;

/// Names tried for a mended file beside the one that was read.
const MOST_NAMES: usize = 100;

/// Options of `surface`.
#[derive(Debug, Args)]
#[command(after_help = "\
Examples:
  slowmote surface part.stl --unit mm
  slowmote surface scan.ply --unit um --mend --write whole.stl
  slowmote surface scan.ply --unit um --geometry flat --crease-angle 25
  slowmote surface redcell:7.82um --elements 2000 --write cell.off

What is asked to be written is written, whatever is wrong with it. The exit code is 1 if the solver
would refuse the surface as it stands at the end, or the file that was written.")]
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

    /// What the facets would be solved as [default: what fits them]
    #[arg(long, value_enum)]
    geometry: Option<Facets>,

    /// Edges that turn by this angle in degrees or more are creases [default: 40]
    #[arg(long, value_name = "DEG", value_parser = angle)]
    crease_angle: Option<f64>,

    #[command(flatten)]
    output: OutputOptions,
    #[command(flatten)]
    record: RecordOptions,
}

/// What facets stand for.
#[derive(Debug, Clone, Copy, PartialEq, Eq, ValueEnum)]
pub enum Facets {
    /// Samples of a smooth surface
    Curved,
    /// The surface itself
    Flat,
}

impl SurfaceArguments {
    /// Looks, mends and writes as asked.
    ///
    /// # Errors
    /// A surface that can't be read, or a file that can't be written.
    pub fn run(&self, asked: Asked) -> Result<Exit, Failure> {
        let input = Path::new(&self.body);
        let format = self.format()?;
        let read = if input.is_file() { vec![input.to_path_buf()] } else { Vec::new() };
        let output = Output::open(&self.output, &[input])?.recording(&self.record, asked, &read)?;
        let file = match &self.write {
            Some(path) => Some(NewFile::create("surface", path, &[input])?),
            None => None,
        };
        let surface = self.surface()?;
        let mut report = self.report(&surface);
        if let (Some(path), Some(file), Some(format)) = (&self.write, file, format) {
            let (bytes, mut written) = surface.written(format, &report).map_err(|error| Failure::of(&error))?;
            file.finish(&bytes)?;
            written.path = path.display().to_string();
            report.written = Some(written);
        }
        let usable = report.usable && report.written.as_ref().is_none_or(|written| written.usable);
        output.write(&report, |style| surface_text(&report, style))?;
        Ok(if usable { Exit::Done } else { Exit::Failed })
    }

    /// The answer alone, with nothing written.
    ///
    /// # Errors
    /// A surface that can't be read.
    pub fn answer(&self) -> Result<SurfaceReport, Failure> {
        Ok(self.report(&self.surface()?))
    }

    fn surface(&self) -> Result<Surface, Failure> {
        let surface = Surface::read(&self.body, self.unit.as_ref(), self.elements).map_err(|error| {
            let hints = error.hints();
            hints.into_iter().fold(Failure::of(&error), Failure::hint)
        })?;
        Ok(if self.mend { surface.mended() } else { surface })
    }

    fn report(&self, surface: &Surface) -> SurfaceReport {
        let mut report = surface.report(&self.options());
        // The library knows its options only; the command line knows what to type.
        report.next_command = (report.mending_suffices == Some(true)).then(|| self.mending_command());
        report
    }

    fn options(&self) -> FacetedOptions {
        let geometry = self.geometry.map(|facets| match facets {
            Facets::Curved => FacetedGeometry::Curved,
            Facets::Flat => FacetedGeometry::Flat,
        });
        FacetedOptions { geometry, crease_deg: self.crease_angle, ..FacetedOptions::default() }
    }

    fn format(&self) -> Result<Option<SurfaceFormat>, Failure> {
        let Some(path) = &self.write else { return Ok(None) };
        let unknown = || {
            Failure::new(format!("{} does not end as a surface file does", path.display()))
                .hint("end its name with .stl, .obj, .ply, .off or .msh")
        };
        SurfaceFormat::of_path(path).map(Some).ok_or_else(unknown)
    }

    fn mending_command(&self) -> String {
        let mut words = vec!["slowmote surface".to_owned(), shell_word(&self.body)];
        if let Some(unit) = &self.unit {
            words.extend(["--unit".to_owned(), shell_word(&unit.symbol)]);
        }
        let target = self.write.clone().unwrap_or_else(|| mended_name(Path::new(&self.body)));
        words.extend(["--mend --write".to_owned(), shell_word(&target.to_string_lossy())]);
        words.join(" ")
    }
}

/// A name beside the file that was read, and not taken: `scan.stl` gives `scan-mended.stl`.
fn mended_name(read: &Path) -> PathBuf {
    let stem = read.file_stem().unwrap_or_default().to_string_lossy();
    let ending = SurfaceFormat::of_path(read).unwrap_or(SurfaceFormat::Stl).extension();
    let name = |number: usize| {
        let number = if number < 2 { String::new() } else { format!("-{number}") };
        read.with_file_name(format!("{stem}-mended{number}.{ending}"))
    };
    (1..MOST_NAMES).map(name).find(|path| !path.exists()).unwrap_or_else(|| name(MOST_NAMES))
}

fn elements(text: &str) -> Result<usize, String> {
    match text.parse::<usize>() {
        Ok(count) if (4..=1_000_000).contains(&count) => Ok(count),
        _ => Err("a number of triangles from 4 to 1000000 is possible".to_owned()),
    }
}

/// An angle in degrees, with or without its unit.
fn angle(text: &str) -> Result<f64, String> {
    match text.strip_suffix("deg").unwrap_or(text).trim().parse::<f64>() {
        Ok(angle) if (0.0..=180.0).contains(&angle) => Ok(angle),
        _ => Err("an angle from 0 to 180 degrees is possible".to_owned()),
    }
}
