//! The answer where there are several bodies: the grand tensors, and the verdict on all moving together.

use super::DragError;
use super::blocks::all_rows;
use super::question::{Draft, DragQuestion};
use super::scene::Scene;
use crate::question::answer::DragAnswer;
use crate::question::validity::Regime;
use crate::stokes::solve::GrandSolution;
use crate::surface::Point;

impl DragQuestion {
    /// Fills in what is known of several bodies.
    pub(super) fn answer_of_several(
        &self,
        scene: &Scene,
        solution: &GrandSolution,
        draft: Draft,
    ) -> Result<DragAnswer, DragError> {
        let wrong = |source| DragError::Rigid { name: scene.name(), source };
        let viscosity = self.fluid.viscosity_pa_s();
        let reduced = solution.resistance.symmetrised();
        let resistance = reduced.scaled(viscosity, scene.length);
        let mobility = reduced.mobility().map_err(wrong)?.scaled(viscosity, scene.length);
        let joined = resistance.joined(&Point::zeros());
        let radii = (0..scene.bodies.len()).map(|body| Ok(resistance.alone(body).mobility()?.hydrodynamic_radius()));
        let radii = radii.collect::<Result<Vec<_>, _>>().map_err(wrong)?;
        let validity = Regime {
            density_kg_m3: self.fluid.density_kg_m3(),
            viscosity_pa_s: viscosity,
            mean_free_path_m: self.fluid.mean_free_path_m(),
            open_resistance: joined,
            // The smallest body feels the molecules first.
            hydrodynamic_radius_m: radii.into_iter().fold(f64::INFINITY, f64::min) / viscosity,
            diffusion_m2_per_s: 0.0,
            motion: None,
            radius_of_turning_m: 0.0,
        }
        .validity();
        Ok(DragAnswer {
            body: None,
            bodies: Some(draft.bodies),
            reference_point_m: None,
            resistance: None,
            mobility: None,
            grand_resistance: Some(all_rows(&resistance.matrix)),
            grand_mobility: Some(all_rows(&mobility.matrix)),
            centre_of_resistance_m: None,
            centre_of_mobility_m: None,
            hydrodynamic_radius_m: None,
            principal: None,
            diffusion: None,
            motion: None,
            validity,
            schema: draft.schema,
            fluid: draft.fluid,
            surroundings: None,
            flow: None,
            cautions: draft.cautions,
            solver: draft.solver,
            relative_error: draft.relative_error,
        })
    }
}
