//! `slowmote drag BODY`.

use std::path::Path;

use clap::Args;
use slowmote::question::{DragAnswer, DragError, DragQuestion, Verdict};
use slowmote::show::{Assumed, drag_text};
use slowmote::stokes::solve::SolveError;

use super::case::filled;
use super::options::{BodyOptions, FluidOptions, MotionOptions, OutputOptions, SolverOptions};
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

    /// Exit with code 4 if the motion is outside creeping flow
    #[arg(long, help_heading = "Output")]
    strict: bool,
}

impl DragArguments {
    /// Asks, shows, and tells how it ended.
    ///
    /// # Errors
    /// Input that can't be used, a solve that failed, or an output that can't be written.
    pub fn run(&self) -> Result<Exit, Failure> {
        let filled = filled(&self.body, &self.fluid)?;
        let fluid = filled.fluid.fluid()?;
        let bodies = filled.standing(self.solver.geometry())?;
        let output = Output::open(&self.output, &[Path::new(&self.body.body)])?;
        self.solver.start_threads()?;
        let question = DragQuestion {
            bodies,
            fluid,
            reference: self.body.reference,
            motion: self.motion.motion(),
            request: self.solver.request(),
        };
        let progress = Progress::new(self.output.quiet);
        let answer = question.answer(&progress).map_err(|error| failure(&error))?;
        drop(progress);
        let assumed = self.assumed(filled.one(), &filled.fluid);
        output.write(&answer, |style| drag_text(&answer, &assumed, style))?;
        Ok(self.exit(&answer))
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
