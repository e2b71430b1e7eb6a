//! The answer where there is one body: tensors, centres, diffusion, a motion, the verdict.

use std::f64::consts::PI;

use super::DragError;
use super::blocks::{mobility_blocks, resistance_blocks, rows};
use super::motion::motion_answer;
use super::question::{Draft, DragQuestion};
use super::scene::Scene;
use crate::question::answer::{Diffusion, DragAnswer, MeanDrag, PrincipalDrag, Vector};
use crate::question::validity::Regime;
use crate::stokes::rigid::{Motion, Principal, Resistance};
use crate::stokes::solve::GrandSolution;
use crate::surface::Point;

/// Principal values that agree within this are told as different axes' only if the solver is surer than that.
const WORST_AXIS_TOLERANCE: f64 = 0.05;

impl DragQuestion {
    /// Fills in what is known of one body.
    pub(super) fn answer_of_one(
        &self,
        scene: &Scene,
        solution: &GrandSolution,
        reference: Point,
        draft: Draft,
    ) -> Result<DragAnswer, DragError> {
        let (standing, length) = (&scene.bodies[0], scene.length);
        let reduced = solution.resistance.alone(0).symmetrised();
        let reduced_mobility = reduced.mobility().map_err(|source| DragError::Rigid { name: scene.name(), source })?;
        let viscosity = self.fluid.viscosity_pa_s();
        let mut resistance = reduced.scaled(viscosity, length);
        let mut mobility = reduced_mobility.scaled(viscosity, length);
        (resistance.reference, mobility.reference) = (reference, reference);

        let radius_m = reduced_mobility.hydrodynamic_radius() * length;
        let diffusive = mobility.about(&mobility.centre());
        let energy = self.fluid.thermal_energy_j();
        let motion = self.motion.map(|motion| Motion { velocity: motion.velocity, rotation: motion.rotation });
        let axis = motion.map_or_else(Point::zeros, |motion| motion.rotation);
        let regime = Regime {
            density_kg_m3: self.fluid.density_kg_m3(),
            viscosity_pa_s: viscosity,
            mean_free_path_m: self.fluid.mean_free_path_m(),
            open_resistance: resistance,
            hydrodynamic_radius_m: radius_m,
            diffusion_m2_per_s: energy * diffusive.velocity_force().trace() / 3.0,
            motion,
            radius_of_turning_m: standing.extent.distance_from_axis(&reference, &axis),
        };
        let error = &draft.relative_error;
        let volume_m3 = standing.extent.measure.volume;
        Ok(DragAnswer {
            body: draft.bodies.into_iter().next(),
            bodies: None,
            reference_point_m: Some(reference.into()),
            resistance: Some(resistance_blocks(&resistance)),
            mobility: Some(mobility_blocks(&mobility)),
            grand_resistance: None,
            grand_mobility: None,
            centre_of_resistance_m: Some(resistance.centre().into()),
            centre_of_mobility_m: Some(mobility.centre().into()),
            hydrodynamic_radius_m: Some(radius_m),
            principal: Some(principal_drag(&resistance, viscosity, radius_m, volume_m3, error.force)),
            diffusion: Some(Diffusion {
                translation_m2_per_s: rows(&(diffusive.velocity_force() * energy)),
                rotation_per_s: rows(&(diffusive.rotation_torque() * energy)),
            }),
            motion: self.motion.map(|motion| motion_answer(&motion, &resistance, error, &regime)),
            validity: regime.validity(),
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

fn principal_drag(
    resistance: &Resistance,
    viscosity: f64,
    radius_m: f64,
    volume_m3: f64,
    error: Option<f64>,
) -> PrincipalDrag {
    let tolerance = error.unwrap_or(WORST_AXIS_TOLERANCE).min(WORST_AXIS_TOLERANCE);
    let drag = Principal::of(&resistance.force_velocity(), tolerance);
    let rotation = Principal::of(&resistance.about(&resistance.centre()).torque_rotation(), tolerance);
    let volume_radius = (3.0 * volume_m3 / (4.0 * PI)).cbrt();
    PrincipalDrag {
        mean: Some(MeanDrag {
            drag_n_s_per_m: 6.0 * PI * viscosity * radius_m,
            dynamic_shape_factor: radius_m / volume_radius,
        }),
        drag_n_s_per_m: drag.values,
        drag_axes: drag.axes.map(Vector::from),
        rotation_n_m_s: rotation.values,
        rotation_axes: rotation.axes.map(Vector::from),
    }
}
