//! The answer to `regime`, as people and programs read it: SI units, with the unit in every name.
//!
//! This is the documented schema `slowmote.regime.1`. A key that does not apply is null, never left out.

use schemars::JsonSchema;
use serde::{Deserialize, Serialize};

use crate::question::{FluidAnswer, Vector, Verdict};

/// Name and version of the layout of [`RegimeAnswer`].
pub const REGIME_SCHEMA: &str = "slowmote.regime.1";

/// What `regime` answers.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct RegimeAnswer {
    /// Name and version of this layout: `slowmote.regime.1`.
    pub schema: String,
    /// The fluid.
    pub fluid: FluidAnswer,
    /// The body; null without one.
    pub body: Option<RegimeBodyAnswer>,
    /// The channel and the flow in it; null without one.
    pub channel: Option<ChannelAnswer>,
    /// How fast the body moves through the fluid, for each cause that is known.
    pub motions: Vec<RegimeMotion>,
    /// Largest rate of shear around the body, at the wall of a channel, 1/s; null without a flow that has one.
    pub shear_rate_per_s: Option<f64>,
    /// Gravity or the acceleration of a centrifuge, m/s2.
    pub acceleration_m_per_s2: f64,
    /// Largest speed of thermal convection, m/s; null without a difference of temperature.
    pub convection_speed_m_per_s: Option<f64>,
    /// Whether creeping flow holds.
    pub validity: RegimeValidity,
    /// What a careful user would want to be reminded of.
    pub cautions: Vec<String>,
    /// What was not told, and which numbers would need it.
    pub questions_left: Vec<Untold>,
}

/// The body as far as it is known without solving.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct RegimeBodyAnswer {
    /// What it was called.
    pub name: String,
    /// Edges of the box around it, m.
    pub size_m: Vector,
    /// Enclosed volume, m3.
    pub volume_m3: f64,
    /// Relative uncertainty of its size.
    pub size_relative_uncertainty: f64,
    /// Radius of a sphere around it, m.
    pub enclosing_radius_m: f64,
    /// Hydrodynamic radius, at least: that of the sphere of equal volume, m.
    pub hydrodynamic_radius_at_least_m: f64,
    /// Hydrodynamic radius, at most, in any direction: by a sphere or an ellipsoid around the body, m.
    pub hydrodynamic_radius_at_most_m: f64,
    /// Density, kg/m3; null if not told.
    pub density_kg_m3: Option<f64>,
    /// How it was read, in plain words.
    pub notes: Vec<String>,
}

/// A channel, and the laminar, developed flow in it.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct ChannelAnswer {
    /// `tube`, `slot` or `duct`.
    pub section: String,
    /// Diameter of a tube, or width of a duct, m; null for a slot.
    pub width_m: Option<f64>,
    /// Diameter of a tube, or height of a slot or a duct, m.
    pub height_m: f64,
    /// Length, m; null if not told.
    pub length_m: Option<f64>,
    /// Radius of its bends, m; null if not told.
    pub bend_radius_m: Option<f64>,
    /// Four times the cross-section over its perimeter, m.
    pub hydraulic_diameter_m: f64,
    /// Mean speed, m/s; null without a flow, as everything below.
    pub mean_speed_m_per_s: Option<f64>,
    /// Relative uncertainty of the speeds and of the flow rate.
    pub speed_relative_uncertainty: Option<f64>,
    /// Largest speed, in the middle, m/s.
    pub largest_speed_m_per_s: Option<f64>,
    /// Volume flow rate, m3/s; null for a slot.
    pub flow_rate_m3_per_s: Option<f64>,
    /// Reynolds number `rho U D_h / mu` of the mean speed.
    pub reynolds: Option<f64>,
    /// Fall of the pressure along the channel, Pa/m.
    pub pressure_gradient_pa_per_m: Option<f64>,
    /// Fall of the pressure over its length without ends and bends, Pa; null without a length.
    pub pressure_drop_pa: Option<f64>,
    /// Relative uncertainty of the pressure drop, or of the gradient without a length.
    pub pressure_relative_uncertainty: Option<f64>,
    /// Largest rate of shear at the wall: everywhere but in a duct, there in the middle of the long side, 1/s.
    pub wall_shear_rate_per_s: Option<f64>,
    /// Rate of shear at the wall in the mean over the perimeter, 1/s.
    pub mean_wall_shear_rate_per_s: Option<f64>,
    /// Largest shear stress at the wall, Pa.
    pub wall_shear_stress_pa: Option<f64>,
    /// Relative uncertainty of the rates of shear.
    pub shear_relative_uncertainty: Option<f64>,
    /// Length over which the flow develops, m.
    pub entry_length_m: Option<f64>,
}

/// A motion of the body through the fluid, by Stokes's law.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct RegimeMotion {
    /// What moves it: `speed`, `flow`, `force` or `weight`.
    pub cause: String,
    /// Name of its Reynolds number in the list of numbers.
    pub reynolds_name: String,
    /// The driving force, N, for a weight less buoyancy, negative if the body rises; null if the speed is given.
    pub force_n: Option<f64>,
    /// Speed at least, m/s; null for a force on a body of unknown size.
    pub speed_at_least_m_per_s: Option<f64>,
    /// Speed at most, m/s.
    pub speed_at_most_m_per_s: Option<f64>,
    /// Relative uncertainty of both by the inputs; null where it has no bound.
    pub speed_relative_uncertainty: Option<f64>,
}

/// The verdict on the regime.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct RegimeValidity {
    /// The worst verdict of the numbers on the flow and the body; null if there is none.
    pub verdict: Option<Verdict>,
    /// Name of the number that decided it.
    pub decided_by: Option<String>,
    /// The worst verdict of the numbers on the path, which do not touch the flow: whether the path of a body follows
    /// from its drag alone. Null if there is none.
    pub path_verdict: Option<Verdict>,
    /// Name of the number that decided that.
    pub path_decided_by: Option<String>,
    /// Every number that applies.
    pub numbers: Vec<RegimeNumber>,
    /// The speed at which Re_h reaches 0.05 at the latest, m/s; null without a body.
    pub speed_limit_m_per_s: Option<f64>,
    /// The force at which Re_h reaches 0.05, N: it is the same for a body of any shape and size.
    pub force_limit_n: f64,
    /// What else there is to know, in plain words.
    pub notes: Vec<String>,
}

/// What a number is about.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Serialize, Deserialize, JsonSchema)]
#[serde(rename_all = "lowercase")]
pub enum Concern {
    /// Whether the flow is creeping.
    Flow,
    /// Whether the body is a single, rigid, smooth one.
    Body,
    /// Whether the body's path follows from its drag.
    Path,
}

/// One dimensionless number and what it says.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct RegimeNumber {
    /// Its name.
    pub name: String,
    /// How it is made.
    pub formula: String,
    /// What it is about; numbers on the path do not count in the verdict on the flow.
    pub concerns: Concern,
    /// Its value: the worse end of what the shape allows.
    pub value: f64,
    /// The better end of what the shape allows; null if both are one.
    pub value_at_best: Option<f64>,
    /// Relative uncertainty by the inputs, to first order; null where it has no bound.
    pub relative_uncertainty: Option<f64>,
    /// What its uncertainty is owed to mostly; null if there is none.
    pub largest_uncertainty: Option<String>,
    /// Up to this, creeping flow holds as far as it is concerned; for Peclet numbers, from this on a path is a path.
    pub threshold: f64,
    /// What it says.
    pub verdict: Verdict,
    /// Another verdict within its uncertainty, the worse of two; null if there is none.
    pub may_be: Option<Verdict>,
    /// What it means, in a sentence.
    pub meaning: String,
}

impl RegimeNumber {
    /// Whether large values are the good ones, as those of Peclet numbers.
    pub fn wants_large(&self) -> bool {
        (self.value < self.threshold) == (self.verdict > Verdict::Creeping)
    }

    /// How much of the way to its limit the number has gone; beyond one it has passed it.
    pub(super) fn share_of_limit(&self) -> f64 {
        if self.wants_large() { self.threshold / self.value } else { self.value / self.threshold }
    }
}

/// Something that was not told.
#[derive(Debug, Clone, PartialEq, Eq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct Untold {
    /// What: an option, or a part of one.
    pub what: String,
    /// What would follow from it.
    pub would_tell: String,
}
