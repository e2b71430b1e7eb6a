//! How hard does the fluid hold a body: resistance, mobility, diffusion, and the drag of a motion.
//!
//! The body is turned and moved so that its centroid is the origin and half its longest edge is 1, solved in a fluid
//! of viscosity 1, and the resistance is then scaled by `mu L`, `mu L^2` and `mu L^3`.

use std::f64::consts::PI;
use std::time::Instant;

use nalgebra::Matrix3;
use thiserror::Error;

use super::answer::{
    BodyAnswer, Diffusion, DragAnswer, MeanDrag, MobilityBlocks, MotionAnswer, PrincipalDrag, RelativeErrorAnswer,
    ResistanceBlocks, SolverAnswer, Tensor, Vector,
};
use super::body::{Body, Extent};
use super::budget::{InputUncertainty, TORQUE_POWER, force_total, input_shares, torque_total};
use super::cautions::body_cautions;
use super::placing::Placing;
use super::validity::Regime;
use crate::physical::Fluid;
use crate::stokes::rigid::{Mobility, Motion, Principal, Resistance, RigidError};
use crate::stokes::solve::{self, Factor, Observer, Request, Solution, SolveError};
use crate::surface::{Geometry, Placement, Point};

/// Name and version of the layout of [`DragAnswer`].
pub const DRAG_SCHEMA: &str = "slowmote.drag.1";

/// Relative difference of two measures of one surface that is nothing but rounding.
const ROUNDING: f64 = 1e-10;

/// Principal values that agree within this are told as different axes' only if the solver is surer than that.
const WORST_AXIS_TOLERANCE: f64 = 0.05;

/// A question about one body in open fluid.
#[derive(Debug, Clone)]
pub struct DragQuestion {
    /// The body.
    pub body: Body,
    /// The fluid around it.
    pub fluid: Fluid,
    /// How it stands.
    pub placing: Placing,
    /// The reference point, m; none for the volume centroid.
    pub reference: Option<Point>,
    /// A motion whose force and torque are wanted.
    pub motion: Option<PrescribedMotion>,
    /// What is asked of the solver; the geometry is the body's.
    pub request: Request,
}

/// A motion of the reference point and about it, in SI units.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PrescribedMotion {
    /// Velocity of the reference point, m/s.
    pub velocity: Point,
    /// Angular velocity, rad/s.
    pub rotation: Point,
    /// Relative uncertainty of the speed.
    pub velocity_uncertainty: f64,
    /// Relative uncertainty of the spin.
    pub rotation_uncertainty: f64,
}

/// Why there is no answer.
#[derive(Debug, Clone, PartialEq, Error)]
#[non_exhaustive]
pub enum DragError {
    /// The surface encloses nothing, or is inside out.
    #[error("the surface of {name} encloses no volume ({volume_m3:e} m3)")]
    NoVolume {
        /// The body.
        name: String,
        /// What it encloses, m3.
        volume_m3: f64,
    },
    /// The solver gave up.
    #[error("the drag of {name} could not be computed")]
    Solve {
        /// The body.
        name: String,
        /// Why.
        source: SolveError,
    },
    /// What the solver gave is no resistance.
    #[error("the drag of {name} could not be computed")]
    Rigid {
        /// The body.
        name: String,
        /// Why.
        source: RigidError,
    },
}

impl DragQuestion {
    /// Solves and answers.
    ///
    /// # Errors
    /// [`DragError`] if the surface encloses nothing or the solver fails. An accuracy that was not reached is no
    /// error: see [`RelativeErrorAnswer::accuracy_reached`].
    pub fn answer(&self, observer: &dyn Observer) -> Result<DragAnswer, DragError> {
        let start = Instant::now();
        let name = || self.body.name.clone();
        let given = self.body.extent();
        let volume_m3 = given.measure.volume;
        let encloses = volume_m3 > 0.0 && given.measure.centroid.iter().all(|x| x.is_finite());
        if !encloses {
            return Err(DragError::NoVolume { name: name(), volume_m3 });
        }

        let stand = self.stand(&given);
        let standing = given.placed(&stand);
        let centroid = standing.measure.centroid;
        let reference = self.reference.unwrap_or(centroid);
        let length = 0.5 * standing.size().max();
        // Straight from the body's own coordinates: by way of a far place digits would be lost.
        let shift = -(stand.turn * given.measure.centroid) / length;
        let blueprint = self.body.blueprint.placed(&Placement { scale: 1.0 / length, turn: stand.turn, shift });
        let reduced_reference = (reference - centroid) / length;
        let request = Request { geometry: self.body.geometry, ..self.request.clone() };
        let solution = solve::resistance(&blueprint, reduced_reference, &request, observer)
            .map_err(|source| DragError::Solve { name: name(), source })?;

        let reduced = solution.resistance.symmetrised();
        let reduced_mobility = reduced.mobility().map_err(|source| DragError::Rigid { name: name(), source })?;
        let viscosity = self.fluid.viscosity_pa_s();
        let mut resistance = reduced.scaled(viscosity, length);
        let mut mobility = reduced_mobility.scaled(viscosity, length);
        (resistance.reference, mobility.reference) = (reference, reference);

        let relative_error = self.relative_error(&solution, &standing, length);
        let radius_m = reduced_mobility.hydrodynamic_radius() * length;
        let diffusive = mobility.about(&mobility.centre());
        let energy = self.fluid.thermal_energy_j();
        let motion = self.motion.map(|motion| Motion { velocity: motion.velocity, rotation: motion.rotation });
        let regime = Regime {
            density_kg_m3: self.fluid.density_kg_m3(),
            viscosity_pa_s: viscosity,
            mean_free_path_m: self.fluid.mean_free_path_m(),
            open_resistance: resistance,
            hydrodynamic_radius_m: radius_m,
            diffusion_m2_per_s: energy * diffusive.velocity_force().trace() / 3.0,
            motion,
            radius_of_turning_m: standing
                .distance_from_axis(&reference, &motion.map_or_else(Point::zeros, |motion| motion.rotation)),
        };
        Ok(DragAnswer {
            schema: DRAG_SCHEMA.to_owned(),
            body: BodyAnswer {
                name: name(),
                volume_m3,
                area_m2: given.measure.area,
                centroid_m: centroid.into(),
                size_m: standing.size().into(),
                triangles: self.body.facets.unwrap_or(solution.statistics.triangles),
                notes: self.body.notes.clone(),
            },
            bodies: None,
            fluid: (&self.fluid).into(),
            surroundings: None,
            reference_point_m: reference.into(),
            resistance: resistance_blocks(&resistance),
            mobility: mobility_blocks(&mobility),
            grand_resistance: None,
            grand_mobility: None,
            centre_of_resistance_m: resistance.centre().into(),
            centre_of_mobility_m: mobility.centre().into(),
            hydrodynamic_radius_m: Some(radius_m),
            principal: principal_drag(&resistance, viscosity, radius_m, volume_m3, relative_error.force),
            diffusion: Diffusion {
                translation_m2_per_s: rows(&(diffusive.velocity_force() * energy)),
                rotation_per_s: rows(&(diffusive.rotation_torque() * energy)),
            },
            motion: self.motion.map(|motion| motion_answer(&motion, &resistance, &relative_error, &regime)),
            flow: None,
            validity: regime.validity(),
            cautions: body_cautions(&self.body.name, length, &self.fluid),
            solver: solver_answer(&solution, start.elapsed().as_secs_f64()),
            relative_error,
        })
    }

    /// From the body's own coordinates to the laboratory's.
    fn stand(&self, given: &Extent) -> Placement {
        let centroid = given.measure.centroid;
        let turn = self.placing.turn();
        let place = self.placing.at.unwrap_or(centroid);
        Placement { scale: 1.0, turn, shift: place - turn * centroid }
    }

    fn relative_error(&self, solution: &Solution, standing: &Extent, length: f64) -> RelativeErrorAnswer {
        let estimate = solution.error;
        let viscosity = InputUncertainty::Viscosity { relative: self.fluid.viscosity_relative_uncertainty() };
        let mut inputs = vec![viscosity];
        inputs.extend(self.body.uncertainties.iter().cloned());
        let input_shares = input_shares(&inputs);
        let geometry = TORQUE_POWER * self.body.geometry_error + self.panel_error(solution, standing, length);
        let inputs = force_total(&input_shares).max(torque_total(&input_shares));
        RelativeErrorAnswer {
            force: bound(estimate.force),
            torque: bound(estimate.torque),
            coupling: bound(estimate.coupling),
            geometry: finite(geometry),
            inputs,
            total: bound(estimate.worst()).and_then(|solver| finite(solver + geometry + inputs)),
            input_shares,
            accuracy_asked: self.request.elements.is_none().then_some(self.request.accuracy),
            accuracy_reached: solution.reached,
        }
    }

    /// How far panels with another geometry than the exact one are from the true surface.
    ///
    /// Torques go as the cube of a length, and so does the volume: the relative difference of the volumes is that of
    /// the torque if the panels are off by the same everywhere, as flat ones inside a round body are. The area stands
    /// in where inside and outside cancel.
    fn panel_error(&self, solution: &Solution, standing: &Extent, length: f64) -> f64 {
        if self.body.geometry == Geometry::Exact {
            return 0.0;
        }
        let solved = solution.panels.measure();
        let volume = (solved.volume * length.powi(3) / standing.measure.volume - 1.0).abs();
        let area = (solved.area * length.powi(2) / standing.measure.area - 1.0).abs();
        let difference = volume.max(area);
        if difference > ROUNDING { difference } else { 0.0 }
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

/// Force and torque of the fluid on the body, with bounds on their error.
///
/// With `0 <= R - R_computed <= e R`, as refinement guarantees, `|dR U| <= e sqrt(l_max (U . R U))`; the coupling's
/// error is stated against `sqrt(R_tt R_rr)` from the start.
fn motion_answer(
    motion: &PrescribedMotion,
    resistance: &Resistance,
    error: &RelativeErrorAnswer,
    regime: &Regime,
) -> MotionAnswer {
    let (velocity, rotation) = (motion.velocity, motion.rotation);
    let by_fluid = resistance.load(&Motion { velocity, rotation }).reversed();
    let (tt, tr, rr) = (resistance.force_velocity(), resistance.force_rotation(), resistance.torque_rotation());
    let (largest_tt, largest_rr) = (tt.symmetric_eigenvalues().max(), rr.symmetric_eigenvalues().max());
    let energy_norm = |matrix: &Matrix3<f64>, largest: f64, v: &Point| (largest * v.dot(&(matrix * v))).sqrt();
    let coupling_scale = (largest_tt * largest_rr).sqrt();
    let (force_inputs, torque_inputs) = (force_total(&error.input_shares), torque_total(&error.input_shares));
    let bounds = error.force.zip(error.torque).zip(error.coupling).zip(error.geometry);
    let bounds = bounds.map(|(((force, torque), coupling), geometry)| {
        let speed = motion.velocity_uncertainty;
        let spin = motion.rotation_uncertainty;
        let coupled = (coupling + geometry) * coupling_scale;
        let on_force = (force + geometry / TORQUE_POWER + force_inputs + speed)
            * energy_norm(&tt, largest_tt, &velocity)
            + coupled * rotation.norm()
            + (torque_inputs + spin) * (tr * rotation).norm();
        let on_torque = (torque + geometry + torque_inputs + spin) * energy_norm(&rr, largest_rr, &rotation)
            + coupled * velocity.norm()
            + (torque_inputs + speed) * (tr.transpose() * velocity).norm();
        (on_force, on_torque)
    });
    MotionAnswer {
        velocity_m_per_s: velocity.into(),
        rotation_per_s: rotation.into(),
        force_n: by_fluid.force.into(),
        torque_n_m: by_fluid.torque.into(),
        force_with_inertia_n: regime.force_with_inertia().map(Vector::from),
        force_error_n: bounds.and_then(|(force, _)| finite(force)),
        torque_error_n_m: bounds.and_then(|(_, torque)| finite(torque)),
    }
}

fn solver_answer(solution: &Solution, seconds: f64) -> SolverAnswer {
    let statistics = &solution.statistics;
    let method = match statistics.factor {
        Factor::Lu => "dense LU",
        Factor::Cholesky => "dense Cholesky",
    };
    SolverAnswer {
        version: env!("CARGO_PKG_VERSION").to_owned(),
        triangles: statistics.triangles,
        unknowns: statistics.unknowns,
        method: method.to_owned(),
        condition: statistics.condition,
        residual: statistics.residual,
        seconds,
    }
}

fn resistance_blocks(resistance: &Resistance) -> ResistanceBlocks {
    ResistanceBlocks {
        force_velocity_n_s_per_m: rows(&resistance.force_velocity()),
        force_rotation_n_s: rows(&resistance.force_rotation()),
        torque_velocity_n_s: rows(&resistance.torque_velocity()),
        torque_rotation_n_m_s: rows(&resistance.torque_rotation()),
    }
}

fn mobility_blocks(mobility: &Mobility) -> MobilityBlocks {
    MobilityBlocks {
        velocity_force_m_per_n_s: rows(&mobility.velocity_force()),
        velocity_torque_per_n_s: rows(&mobility.velocity_torque()),
        rotation_force_per_n_s: rows(&mobility.rotation_force()),
        rotation_torque_per_n_m_s: rows(&mobility.rotation_torque()),
    }
}

fn rows(matrix: &Matrix3<f64>) -> Tensor {
    [0, 1, 2].map(|row| [0, 1, 2].map(|column| matrix[(row, column)]))
}

/// A solver's estimate of 100 % or more says that there were too few elements to tell.
fn bound(estimate: f64) -> Option<f64> {
    finite(estimate).filter(|estimate| *estimate < 1.0)
}

/// JSON has no infinity: what has no bound is null there.
fn finite(value: f64) -> Option<f64> {
    value.is_finite().then_some(value)
}
