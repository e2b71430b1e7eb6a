//! The question and the way to its answer.

use std::time::Instant;

use super::fingerprint::fingerprint;
use super::scene::{Scene, Standing};
use super::trust::relative_error;
use super::{DragError, PrescribedMotion, StandingBody};
use crate::physical::Fluid;
use crate::question::answer::{BodyAnswer, DragAnswer, FluidAnswer, InputShare, RelativeErrorAnswer, SolverAnswer};
use crate::question::budget::{InputUncertainty, input_shares};
use crate::question::cautions::body_cautions;
use crate::stokes::solve::{self, Factor, GrandSolution, Observer, Request};
use crate::surface::Point;

/// Name and version of the layout of [`DragAnswer`].
pub const DRAG_SCHEMA: &str = "slowmote.drag.1";

/// What an uncertain size is called in the error.
const SIZES: &str = "size of the bodies";

/// A question about rigid bodies in open fluid.
#[derive(Debug, Clone)]
pub struct DragQuestion {
    /// The bodies, one at least, and how they stand.
    pub bodies: Vec<StandingBody>,
    /// The fluid around them.
    pub fluid: Fluid,
    /// The reference point of one body, m; none for the volume centroid, which it is for each of several.
    pub reference: Option<Point>,
    /// A motion of one body, whose force and torque are wanted.
    pub motion: Option<PrescribedMotion>,
    /// What is asked of the solver; the geometry is each body's own.
    pub request: Request,
}

/// The part of an answer that one body and several have in common.
pub(super) struct Draft {
    pub schema: String,
    pub bodies: Vec<BodyAnswer>,
    pub fluid: FluidAnswer,
    pub relative_error: RelativeErrorAnswer,
    pub cautions: Vec<String>,
    pub solver: SolverAnswer,
}

impl DragQuestion {
    /// Solves and answers.
    ///
    /// # Errors
    /// [`DragError`] if a surface encloses nothing, bodies overlap, or the solver fails. An accuracy that was not reached is
    /// no error: see [`RelativeErrorAnswer::accuracy_reached`].
    pub fn answer(&self, observer: &dyn Observer) -> Result<DragAnswer, DragError> {
        let start = Instant::now();
        let scene = Scene::new(&self.bodies)?;
        let bodies = scene.bodies.len();
        let asked = [("a motion", self.motion.is_some()), ("a reference point", self.reference.is_some())];
        if let Some((what, _)) = asked.into_iter().find(|(_, asked)| *asked && bodies > 1) {
            return Err(DragError::OneBodyOnly { what, bodies });
        }
        let as_given = vec![1.0; bodies];
        let grown = scene.bodies.iter().map(|standing| 1.0 + standing.body.size_uncertainty()).collect::<Vec<_>>();
        let names = |bodies: [usize; 2]| bodies.map(|body| scene.bodies[body].body.name.clone());
        if let Some((first, second, place_m)) = scene.overlap(&as_given) {
            let [first, second] = names([first, second]);
            return Err(DragError::Overlap { first, second, place_m });
        }
        if let Some((first, second, _)) = scene.overlap(&grown).filter(|_| grown != as_given) {
            let [first, second] = names([first, second]);
            return Err(DragError::MayOverlap { first, second });
        }
        let centroids = scene.bodies.iter().map(Standing::centroid);
        let references = centroids.map(|own| self.reference.unwrap_or(own)).collect::<Vec<_>>();
        let solution = self.solve(&scene, &references, &as_given, observer)?;
        let shares = self.input_shares(&scene, &references, &solution, &grown, observer)?;
        let draft = Draft {
            schema: DRAG_SCHEMA.to_owned(),
            bodies: scene
                .bodies
                .iter()
                .zip(&solution.panels_of_body)
                .map(|(standing, p)| body(standing, p.len()))
                .collect(),
            fluid: (&self.fluid).into(),
            relative_error: relative_error(&scene, &solution, &self.request, shares),
            cautions: self.cautions(&scene),
            solver: solver_answer(&solution, start.elapsed().as_secs_f64()),
        };
        match references.as_slice() {
            [reference] => self.answer_of_one(&scene, &solution, *reference, draft),
            _ => self.answer_of_several(&scene, &solution, draft),
        }
    }

    /// Solves the scene with each body grown about its centroid.
    fn solve(
        &self,
        scene: &Scene,
        references: &[Point],
        growth: &[f64],
        observer: &dyn Observer,
    ) -> Result<GrandSolution, DragError> {
        let blueprints = scene.blueprints(growth);
        let parts = scene.parts(&blueprints, references);
        solve::grand_resistance(&parts, &self.request, observer)
            .map_err(|source| DragError::Solve { name: scene.name(), source })
    }

    /// What the uncertain inputs do. One body scales as a whole; of several the gaps change with their sizes, and they are
    /// solved once more, each grown by its uncertainty.
    fn input_shares(
        &self,
        scene: &Scene,
        references: &[Point],
        solution: &GrandSolution,
        grown: &[f64],
        observer: &dyn Observer,
    ) -> Result<Vec<InputShare>, DragError> {
        let viscosity = InputUncertainty::Viscosity { relative: self.fluid.viscosity_relative_uncertainty() };
        let mut inputs = vec![viscosity];
        if let [one] = scene.bodies.as_slice() {
            inputs.extend(one.body.uncertainties.iter().cloned());
            return Ok(input_shares(&inputs));
        }
        let mut shares = input_shares(&inputs);
        let relative_uncertainty = grown.iter().fold(0.0_f64, |worst, growth| worst.max(growth - 1.0));
        if relative_uncertainty > 0.0 {
            let grown = self.solve(scene, references, grown, observer)?;
            let change = solve::relative_change(&solution.resistance, &grown.resistance);
            shares.push(InputShare {
                name: SIZES.to_owned(),
                relative_uncertainty,
                force: change.force,
                torque: change.torque,
            });
            shares.sort_by(|a, b| b.torque.total_cmp(&a.torque));
        }
        Ok(shares)
    }

    fn cautions(&self, scene: &Scene) -> Vec<String> {
        let mut all = Vec::new();
        for standing in &scene.bodies {
            let half_length_m = 0.5 * standing.extent.size().max();
            for caution in body_cautions(standing.body.shape.as_deref(), half_length_m, &self.fluid) {
                if !all.contains(&caution) {
                    all.push(caution);
                }
            }
        }
        all
    }
}

fn body(standing: &Standing, panels: usize) -> BodyAnswer {
    let (body, extent) = (standing.body, &standing.extent);
    BodyAnswer {
        name: body.name.clone(),
        volume_m3: extent.measure.volume,
        area_m2: extent.measure.area,
        centroid_m: extent.measure.centroid.into(),
        size_m: extent.size().into(),
        triangles: body.facets.unwrap_or(panels),
        notes: body.notes.clone(),
    }
}

fn solver_answer(solution: &GrandSolution, seconds: f64) -> SolverAnswer {
    let statistics = &solution.statistics;
    let method = match statistics.factor {
        Factor::Lu => "dense LU",
        Factor::Cholesky => "dense Cholesky",
    };
    SolverAnswer {
        version: env!("CARGO_PKG_VERSION").to_owned(),
        triangles: statistics.triangles,
        unknowns: statistics.unknowns,
        mesh: fingerprint(&solution.panels),
        method: method.to_owned(),
        condition: statistics.condition,
        residual: statistics.residual,
        seconds,
    }
}
