//! What the user knows: quantities by name, each with its uncertainty, and one of them shifted to see what it does.

use super::channel::Section;
use crate::physical::Quantity;

/// What a given quantity is.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Input {
    /// Viscosity of the fluid, Pa.s.
    Viscosity,
    /// Density of the fluid, kg/m3.
    FluidDensity,
    /// The body's size over what was given: one, with its relative uncertainty.
    BodyScale,
    /// Density of the body, kg/m3.
    BodyDensity,
    /// Acceleration by gravity or in a centrifuge, m/s2.
    Acceleration,
    /// Speed of the body through the fluid, m/s.
    Speed,
    /// Angular speed of the body, rad/s.
    Spin,
    /// Force on the body, N.
    Force,
    /// Diameter of a tube, m.
    Diameter,
    /// Width of a duct, m.
    Width,
    /// Height of a slot or a duct, m.
    Height,
    /// Length of the channel, m.
    Length,
    /// Radius of the channel's centre line in its bends, m.
    BendRadius,
    /// Mean speed of the flow in the channel, m/s.
    MeanSpeed,
    /// Volume flow rate in the channel, m3/s.
    FlowRate,
    /// Rate of shear of a flow without walls, 1/s.
    ShearRate,
    /// Speed of a uniform flow past a held body, m/s.
    UniformSpeed,
    /// Frequency of an oscillation, Hz.
    Frequency,
    /// Volume fraction of bodies in the fluid.
    Concentration,
    /// Surface tension, or shear modulus of the body's skin, N/m.
    SurfaceStiffness,
    /// Elastic modulus of the body's material, Pa.
    BulkStiffness,
    /// Difference of temperature across the chamber, K.
    TemperatureDifference,
    /// Width of the chamber that differs in temperature from side to side, m.
    ChamberWidth,
    /// Gap between the body and a wall, m.
    Gap,
    /// Height of the roughness on both, m.
    Roughness,
}

impl Input {
    /// What it is called in a sentence.
    pub fn words(self) -> &'static str {
        match self {
            Self::Viscosity => "the viscosity of the fluid",
            Self::FluidDensity => "the density of the fluid",
            Self::BodyScale => "the size of the body",
            Self::BodyDensity => "the density of the body",
            Self::Acceleration => "the acceleration",
            Self::Speed => "the speed",
            Self::Spin => "the spin",
            Self::Force => "the force",
            Self::Diameter => "the diameter of the tube",
            Self::Width => "the width of the duct",
            Self::Height => "the height of the channel",
            Self::Length => "the length of the channel",
            Self::BendRadius => "the radius of the bends",
            Self::MeanSpeed => "the mean speed of the flow",
            Self::FlowRate => "the flow rate",
            Self::ShearRate => "the shear rate",
            Self::UniformSpeed => "the speed of the flow",
            Self::Frequency => "the frequency",
            Self::Concentration => "the concentration",
            Self::SurfaceStiffness | Self::BulkStiffness => "the stiffness",
            Self::TemperatureDifference => "the difference of temperature",
            Self::ChamberWidth => "the width of the chamber",
            Self::Gap => "the gap",
            Self::Roughness => "the roughness",
        }
    }
}

/// A background flow.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Flow {
    /// Through the channel of this section, driven by pressure.
    Through(Section),
    /// Shear without walls.
    Shear,
    /// Uniform flow past a held body.
    Uniform,
}

/// Given quantities. Of each kind the last one counts.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Given {
    quantities: Vec<(Input, Quantity)>,
    shifted: Option<(Input, f64)>,
}

impl Given {
    /// Adds a quantity in the SI unit of its kind.
    pub fn set(&mut self, input: Input, quantity: Quantity) {
        self.quantities.retain(|(known, _)| *known != input);
        self.quantities.push((input, quantity));
    }

    /// Adds a quantity if there is one.
    pub fn set_some(&mut self, input: Input, quantity: Option<Quantity>) {
        if let Some(quantity) = quantity {
            self.set(input, quantity);
        }
    }

    /// Whether it was given.
    pub fn has(&self, input: Input) -> bool {
        self.quantity(input).is_some()
    }

    /// The quantity as given.
    pub fn quantity(&self, input: Input) -> Option<Quantity> {
        self.quantities.iter().find(|(known, _)| *known == input).map(|(_, quantity)| *quantity)
    }

    /// Its value in SI units, shifted if it is its turn.
    pub(super) fn get(&self, input: Input) -> Option<f64> {
        let quantity = self.quantity(input)?;
        let shift = self.shifted.filter(|(shifted, _)| *shifted == input).map_or(0.0, |(_, sign)| sign);
        Some(quantity.value_si() + shift * quantity.uncertainty_si())
    }

    /// What is uncertain.
    pub(super) fn uncertain(&self) -> impl Iterator<Item = Input> {
        self.quantities.iter().filter(|(_, quantity)| quantity.uncertainty_si() > 0.0).map(|(input, _)| *input)
    }

    /// The same with one quantity shifted by its uncertainty, up (1) or down (-1).
    pub(super) fn shifted(&self, input: Input, sign: f64) -> Self {
        Self { shifted: Some((input, sign)), ..self.clone() }
    }
}
