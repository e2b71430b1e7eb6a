//! `slowmote drag BODY`.

use std::path::PathBuf;

use clap::Args;
use slowmote::question::{DragAnswer, DragError, DragQuestion, Verdict};
use slowmote::show::{Assumed, drag_text};
use slowmote::stokes::solve::SolveError;

use super::asked::Asked;
use super::case::{Filled, filled};
use super::options::{
    BodyOptions, DEFAULT_FLUID, DEFAULT_TEMPERATURE, FluidOptions, MotionOptions, OutputOptions, RecordOptions,
    SolverOptions,
};
use super::output::Output;
use super::progress::Progress;
use super::{Exit, Failure};

/// Options of `drag`.
#[derive(Debug, Args)]
#[command(after_help = "\
Shapes, in full dimensions (long ones lie along x, flat ones are normal to z):
  sphere:10um  ellipsoid:6x4x2um  rod:12x2um  cylinder:10x2um  disc:8x1um  box:6x4x2um
  cube:5um  ring:10x2um  redcell:7.82um  doublet:2um  cone:6x4um  octahedron:5um
  tetrahedron:5um  helix:turns=4,pitch=2um,diameter=1um,thickness=0.2um,hand=left
A size may carry its uncertainty: sphere:10±0.3um")]
pub struct DragArguments {
    #[command(flatten)]
    body: BodyOptions,
    #[command(flatten)]
    fluid: FluidOptions,
    #[command(flatten)]
    motion: MotionOptions,
    #[command(flatten)]
    solver: SolverOptions,
    #[command(flatten)]
    output: OutputOptions,
    #[command(flatten)]
    record: RecordOptions,

    /// Exit with code 4 if the motion is outside creeping flow
    #[arg(long, help_heading = "Output")]
    strict: bool,
}

impl DragArguments {
    /// Asks, shows, and tells how it ended.
    ///
    /// # Errors
    /// Input that can't be used, a solve that failed, or an output that can't be written.
    pub fn run(&self, mut asked: Asked) -> Result<Exit, Failure> {
        let filled = filled(&self.body, &self.fluid)?;
        let question = self.question(&filled)?;
        let assumed = self.assumed(filled.one(), &filled.fluid);
        settle(&mut asked, &assumed);
        let files = filled.files();
        let inputs = files.iter().map(PathBuf::as_path).collect::<Vec<_>>();
        let output = Output::open(&self.output, &inputs)?.recording(&self.record, asked, &files)?;
        let answer = self.ask(&question, self.output.quiet)?;
        output.write(&answer, |style| drag_text(&answer, &assumed, style))?;
        Ok(self.exit(&answer))
    }

    /// The answer alone.
    ///
    /// # Errors
    /// As [`DragArguments::run`].
    pub fn answer(&self, quiet: bool) -> Result<DragAnswer, Failure> {
        self.ask(&self.question(&filled(&self.body, &self.fluid)?)?, quiet)
    }

    fn question(&self, filled: &Filled) -> Result<DragQuestion, Failure> {
        Ok(DragQuestion {
            fluid: filled.fluid.fluid()?,
            bodies: filled.standing(self.solver.geometry())?,
            reference: self.body.reference,
            motion: self.motion.motion(),
            request: self.solver.request(),
        })
    }

    fn ask(&self, question: &DragQuestion, quiet: bool) -> Result<DragAnswer, Failure> {
        self.solver.start_threads()?;
        let progress = Progress::new(quiet);
        question.answer(&progress).map_err(|error| failure(&error))
    }

    fn assumed(&self, body: Option<&BodyOptions>, fluid: &FluidOptions) -> Assumed {
        Assumed {
            fluid: fluid.fluid.is_none(),
            temperature: fluid.temperature.is_none(),
            direction: self.motion.speed.is_some() && self.motion.along.is_none(),
            axis: self.motion.spin.is_some() && self.motion.about.is_none(),
            file_unit: body.and_then(|body| body.unit.clone()),
        }
    }

    /// The regime is told before the accuracy: a precise answer to the wrong question is the worse of the two.
    fn exit(&self, answer: &DragAnswer) -> Exit {
        if self.strict && answer.validity.verdict == Some(Verdict::Outside) {
            Exit::OutsideCreepingFlow
        } else if !answer.relative_error.accuracy_reached {
            Exit::NotReached
        } else {
            Exit::Done
        }
    }
}

/// Writes down what was taken for granted.
pub fn settle(asked: &mut Asked, assumed: &Assumed) {
    let taken = [
        (assumed.fluid, "fluid", DEFAULT_FLUID),
        (assumed.temperature, "temperature", DEFAULT_TEMPERATURE),
        (assumed.direction, "along", "x"),
        (assumed.axis, "about", "z"),
    ];
    for (_, option, text) in taken.into_iter().filter(|(assumed, ..)| *assumed) {
        asked.settle(option, text);
    }
}

fn failure(error: &DragError) -> Failure {
    let failure = Failure::of(error);
    match error {
        DragError::Overlap { .. } => failure.hint("set them apart, or say `--pieces joined` if they are pieces of one body"),
        DragError::MayOverlap { .. } => failure.hint("set them farther apart, or give their sizes more narrowly"),
        DragError::OneBodyOnly { .. } => {
            failure.hint("the grand resistance gives forces and torques of all motions; leave the option out")
        }
        DragError::NoVolume { .. } => failure.hint("the body must be a closed surface with its normals outwards"),
        DragError::Solve { source: SolveError::TooLarge { .. }, .. } => {
            failure.hint("ask for less with --accuracy or --elements, or allow more with --memory")
        }
        DragError::Solve { source: SolveError::NotPositiveDefinite { .. }, .. } => failure.hint(
            "pieces that touch or cross each other can't be solved, nor bodies some hundred times as wide as thick: look at \
             the surface, or try a tighter --accuracy, which integrates more finely",
        ),
        _ => failure.hint(
            "try another --elements, and look at the surface: pieces that touch or cross each other can't be solved",
        ),
    }
}
