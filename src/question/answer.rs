//! The answer to `drag`, as people and programs read it: SI units, with the unit in every name.
//!
//! This is the documented schema `slowmote.drag.1`. A key that does not apply is null, never left out. Tensors are
//! rows of numbers in the laboratory frame x, y, z; force before torque, velocity before rotation; forces and torques
//! of the resistance are those that the body exerts on the fluid, torques about `reference_point_m`.

use schemars::JsonSchema;
use serde::{Deserialize, Serialize};

use super::budget::{TORQUE_POWER, force_total, torque_total};

/// A vector: x, y, z.
pub type Vector = [f64; 3];

/// A tensor: its rows.
pub type Tensor = [[f64; 3]; 3];

/// What `drag` answers.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct DragAnswer {
    /// Name and version of this layout: `slowmote.drag.1`.
    pub schema: String,
    /// The body; null if there are several.
    pub body: Option<BodyAnswer>,
    /// The bodies, when there are several; null for one.
    pub bodies: Option<Vec<BodyAnswer>>,
    /// The fluid.
    pub fluid: FluidAnswer,
    /// The walls around it; null in open fluid.
    pub surroundings: Option<Vec<String>>,
    /// The point about which torques are taken and whose velocity is meant, m; null if there are several bodies.
    pub reference_point_m: Option<Vector>,
    /// Resistance about the reference point; null if there are several bodies.
    pub resistance: Option<ResistanceBlocks>,
    /// Mobility about the reference point; null if there are several bodies.
    pub mobility: Option<MobilityBlocks>,
    /// Resistance of several bodies together, SI: six rows and columns a body, force before torque and velocity before
    /// rotation, each about that body's own centroid; null for one.
    pub grand_resistance: Option<Vec<Vec<f64>>>,
    /// Mobility of several bodies together, its inverse; null for one.
    pub grand_mobility: Option<Vec<Vec<f64>>>,
    /// The point about which the coupling of the resistance is symmetric, m; null if there are several bodies.
    pub centre_of_resistance_m: Option<Vector>,
    /// The point about which the coupling of the mobility is symmetric, m; null if there are several bodies.
    pub centre_of_mobility_m: Option<Vector>,
    /// Radius of the sphere of equal mobility in the mean over all orientations, m; null near walls and for several bodies.
    pub hydrodynamic_radius_m: Option<f64>,
    /// Mean and principal drags; null if there are several bodies.
    pub principal: Option<PrincipalDrag>,
    /// Brownian motion about the centre of mobility; null if there are several bodies.
    pub diffusion: Option<Diffusion>,
    /// How far the numbers can be trusted.
    pub relative_error: RelativeErrorAnswer,
    /// Force and torque of the motion that was asked for; null if none was.
    pub motion: Option<MotionAnswer>,
    /// The body in a background flow; null if there is none.
    pub flow: Option<FlowAnswer>,
    /// Whether creeping flow holds.
    pub validity: Validity,
    /// What a careful user would want to be reminded of.
    pub cautions: Vec<String>,
    /// How it was solved.
    pub solver: SolverAnswer,
}

/// What an answer about one body holds beside what every answer does.
#[derive(Debug, Clone, Copy)]
pub struct OneBody<'a> {
    /// See [`DragAnswer::body`].
    pub body: &'a BodyAnswer,
    /// See [`DragAnswer::reference_point_m`].
    pub reference_point_m: Vector,
    /// See [`DragAnswer::resistance`].
    pub resistance: &'a ResistanceBlocks,
    /// See [`DragAnswer::mobility`].
    pub mobility: &'a MobilityBlocks,
    /// See [`DragAnswer::centre_of_resistance_m`].
    pub centre_of_resistance_m: Vector,
    /// See [`DragAnswer::centre_of_mobility_m`].
    pub centre_of_mobility_m: Vector,
    /// See [`DragAnswer::principal`].
    pub principal: &'a PrincipalDrag,
    /// See [`DragAnswer::diffusion`].
    pub diffusion: &'a Diffusion,
}

impl DragAnswer {
    /// The tensors of one body; none if there are several.
    pub fn one(&self) -> Option<OneBody<'_>> {
        Some(OneBody {
            body: self.body.as_ref()?,
            reference_point_m: self.reference_point_m?,
            resistance: self.resistance.as_ref()?,
            mobility: self.mobility.as_ref()?,
            centre_of_resistance_m: self.centre_of_resistance_m?,
            centre_of_mobility_m: self.centre_of_mobility_m?,
            principal: self.principal.as_ref()?,
            diffusion: self.diffusion.as_ref()?,
        })
    }
}

/// The body as it was understood.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct BodyAnswer {
    /// What it was called: a shape as it was written, or a file's name.
    pub name: String,
    /// Enclosed volume, m3.
    pub volume_m3: f64,
    /// Surface, m2.
    pub area_m2: f64,
    /// Volume centroid where it stands, m.
    pub centroid_m: Vector,
    /// Edges of the box around it, as turned, m.
    pub size_m: Vector,
    /// Facets of the file; for a named shape, those of the surface that was solved.
    pub triangles: usize,
    /// How its surface was read, in plain words.
    pub notes: Vec<String>,
}

/// The fluid as it was understood.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct FluidAnswer {
    /// Its name.
    pub name: String,
    /// Temperature, degC.
    pub temperature_c: f64,
    /// Dynamic viscosity, Pa.s.
    pub viscosity_pa_s: f64,
    /// Density, kg/m3.
    pub density_kg_m3: f64,
    /// Relative uncertainty of the viscosity.
    pub relative_uncertainty: f64,
    /// Where the numbers come from.
    pub source: String,
}

/// `[F; T] = R [U; Omega]`, F and T by the body on the fluid.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct ResistanceBlocks {
    /// Force for velocity, N.s/m.
    pub force_velocity_n_s_per_m: Tensor,
    /// Force for rotation, N.s.
    pub force_rotation_n_s: Tensor,
    /// Torque for velocity, N.s.
    pub torque_velocity_n_s: Tensor,
    /// Torque for rotation, N.m.s.
    pub torque_rotation_n_m_s: Tensor,
}

/// `[U; Omega] = M [F; T]`, the inverse of the resistance.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct MobilityBlocks {
    /// Velocity for force, m/(N.s).
    pub velocity_force_m_per_n_s: Tensor,
    /// Velocity for torque, 1/(N.s).
    pub velocity_torque_per_n_s: Tensor,
    /// Rotation for force, 1/(N.s).
    pub rotation_force_per_n_s: Tensor,
    /// Rotation for torque, 1/(N.m.s).
    pub rotation_torque_per_n_m_s: Tensor,
}

/// The drag without its axes: what the body feels on average, at least and at most.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct PrincipalDrag {
    /// Mean over orientations; null near walls.
    pub mean: Option<MeanDrag>,
    /// Principal values of the force-velocity block, smallest first, N.s/m.
    pub drag_n_s_per_m: Vector,
    /// Their axes, one a row.
    pub drag_axes: Tensor,
    /// Principal values of the torque-rotation block about the centre of resistance, smallest first, N.m.s.
    pub rotation_n_m_s: Vector,
    /// Their axes, one a row.
    pub rotation_axes: Tensor,
}

/// The mean over orientations, from the mobility about its centre.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct MeanDrag {
    /// Drag of a freely tumbling body, `6 pi mu R_h`, N.s/m.
    pub drag_n_s_per_m: f64,
    /// That drag over the drag of the sphere of equal volume.
    pub dynamic_shape_factor: f64,
}

/// Brownian motion about the centre of mobility, `k_B T M`.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct Diffusion {
    /// Translation, m2/s.
    pub translation_m2_per_s: Tensor,
    /// Rotation, rad2/s.
    pub rotation_per_s: Tensor,
}

/// Bounds on the relative error, each for the worst direction.
///
/// `total` is the sum of the solver's worst, of `geometry` and of `inputs`. The sum, and no root of squares: the
/// solver's error and the geometry's are systematic and mostly of one sign.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct RelativeErrorAnswer {
    /// Solver, force-velocity block; null if there is no estimate.
    pub force: Option<f64>,
    /// Solver, torque-rotation block.
    pub torque: Option<f64>,
    /// Solver, coupling against `sqrt(R_tt R_rr)`.
    pub coupling: Option<f64>,
    /// What the surface that was solved differs from the smooth body it stands for, for the block it touches most:
    /// torques of rotation, which go as the cube of a length. Drags feel a third of it.
    pub geometry: Option<f64>,
    /// What fluid and given uncertainties bring, for the block they touch most.
    pub inputs: f64,
    /// Sum of the solver's worst, `geometry` and `inputs`; null if one of them has no estimate.
    pub total: Option<f64>,
    /// The inputs one by one, largest first.
    pub input_shares: Vec<InputShare>,
    /// The accuracy that was asked of the solver; null on a fixed mesh.
    pub accuracy_asked: Option<f64>,
    /// Whether the solver reached it.
    pub accuracy_reached: bool,
}

impl RelativeErrorAnswer {
    /// The solver's worst; none if there is no estimate.
    pub fn solver_worst(&self) -> Option<f64> {
        Some(self.force?.max(self.torque?).max(self.coupling?))
    }

    /// Everything that bounds the error of drags: solver, geometry and inputs.
    pub fn of_force(&self) -> Option<f64> {
        Some(self.force? + self.geometry? / TORQUE_POWER + force_total(&self.input_shares))
    }

    /// Everything that bounds the error of torques of rotation.
    pub fn of_torque(&self) -> Option<f64> {
        Some(self.torque? + self.geometry? + torque_total(&self.input_shares))
    }
}

/// What one uncertain input does to the answer, to first order.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct InputShare {
    /// Which input.
    pub name: String,
    /// Its own relative uncertainty.
    pub relative_uncertainty: f64,
    /// Relative error of drags that it causes.
    pub force: f64,
    /// Relative error of torques of rotation that it causes.
    pub torque: f64,
}

/// The motion that was asked for, and what the **fluid exerts on the body**.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct MotionAnswer {
    /// Velocity of the reference point, m/s.
    pub velocity_m_per_s: Vector,
    /// Angular velocity, rad/s.
    pub rotation_per_s: Vector,
    /// Force of the fluid on the body in creeping flow, N.
    pub force_n: Vector,
    /// Torque of the fluid on the body about the reference point, N.m.
    pub torque_n_m: Vector,
    /// The force with the first-order effect of inertia, N; null if the body turns too, or near walls.
    pub force_with_inertia_n: Option<Vector>,
    /// Bound on the error of the force, everything included, N; null if there is no estimate.
    pub force_error_n: Option<f64>,
    /// Bound on the error of the torque, N.m.
    pub torque_error_n_m: Option<f64>,
}

/// The body in a background flow.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct FlowAnswer {
    /// Force of the fluid on the held body, N.
    pub force_n: Vector,
    /// Torque of the fluid on the held body about the reference point, N.m.
    pub torque_n_m: Vector,
    /// Velocity of the reference point of the free body, m/s.
    pub free_velocity_m_per_s: Vector,
    /// Angular velocity of the free body, rad/s.
    pub free_rotation_per_s: Vector,
    /// Stresslet of the free body, symmetric and traceless, N.m.
    pub stresslet_n_m: Tensor,
}

/// How well creeping flow holds, from best to worst.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Serialize, Deserialize, JsonSchema)]
#[serde(rename_all = "lowercase")]
pub enum Verdict {
    /// What is left out does not matter.
    Creeping,
    /// It matters a little, and the correction is given.
    Corrected,
    /// It matters, and the correction is itself uncertain.
    Doubtful,
    /// The answer is not one for this motion.
    Outside,
}

impl Verdict {
    /// The word for it, as in JSON.
    pub fn word(self) -> &'static str {
        match self {
            Self::Creeping => "creeping",
            Self::Corrected => "corrected",
            Self::Doubtful => "doubtful",
            Self::Outside => "outside",
        }
    }
}

/// The verdict on the regime.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct Validity {
    /// The worst verdict of the numbers that apply; null if none does, because no motion was given.
    pub verdict: Option<Verdict>,
    /// `Re_h = 2 rho U R_h / mu` with the drag in the direction of the motion; null without a velocity.
    pub reynolds: Option<f64>,
    /// Relative excess of the drag along the motion by inertia, to first order.
    pub inertial_drag_excess: Option<f64>,
    /// Name of the number that decided the verdict.
    pub decided_by: Option<String>,
    /// Every number that applies.
    pub numbers: Vec<NumberVerdict>,
    /// The speed at which Re_h reaches 0.05, m/s: along the motion, or without one in the direction of most drag.
    pub speed_limit_m_per_s: Option<f64>,
    /// What else there is to know, in plain words.
    pub notes: Vec<String>,
}

/// One dimensionless number and what it says.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct NumberVerdict {
    /// Its name.
    pub name: String,
    /// Its value.
    pub value: f64,
    /// Below this, creeping flow holds as far as it is concerned.
    pub threshold: f64,
    /// What it says.
    pub verdict: Verdict,
    /// What it means, in a sentence.
    pub meaning: String,
}

/// How the answer was found.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct SolverAnswer {
    /// Version of this program.
    pub version: String,
    /// Triangles of the surface that was solved.
    pub triangles: usize,
    /// Unknowns, three a node.
    pub unknowns: usize,
    /// A fingerprint of the mesh: equal meshes have equal ones.
    pub mesh: String,
    /// What solved the system.
    pub method: String,
    /// Estimated condition number of the system.
    pub condition: f64,
    /// Relative residual of its solution.
    pub residual: f64,
    /// Wall-clock time, s.
    pub seconds: f64,
}
