//! Flow driven by pressure through a straight tube, slot or duct, fully developed and laminar.
//!
//! Tube of diameter `D` (Hagen 1839, Poiseuille 1840): largest speed `2 U`, wall shear rate `8 U / D`, gradient
//! `32 mu U / D^2`. Slot of height `h`: `3/2 U`, `6 U / h`, `12 mu U / h^2`. Duct: see [`super::duct`]. The exact solutions
//! hold with inertia too, as long as the flow is laminar and far from ends, posts and bends.

use std::f64::consts::PI;

use super::duct::DuctFlow;
use super::given::{Given, Input};

/// Cross-section of a channel.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Section {
    /// A round tube.
    Tube,
    /// Two parallel plates without ends.
    Slot,
    /// A rectangle.
    Duct,
}

impl Section {
    /// Its word on the command line.
    pub fn word(self) -> &'static str {
        match self {
            Self::Tube => "tube",
            Self::Slot => "slot",
            Self::Duct => "duct",
        }
    }
}

/// A channel's cross-section with its sizes, m.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Channel {
    pub section: Section,
    /// Diameter of a tube; the larger side of a duct; infinite for a slot.
    pub wide: f64,
    /// Diameter of a tube, height of a slot, smaller side of a duct.
    pub narrow: f64,
    pub length: Option<f64>,
    pub bend_radius: Option<f64>,
}

/// The flow in a channel, SI units.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct ChannelFlow {
    pub mean_speed: f64,
    pub largest_speed: f64,
    /// None for a slot.
    pub flow_rate: Option<f64>,
    pub pressure_gradient: f64,
    pub largest_wall_shear: f64,
    pub mean_wall_shear: f64,
    pub reynolds: f64,
    pub entry_length: f64,
}

impl Channel {
    /// The channel of this section; none if a size is missing.
    pub(super) fn of(section: Section, given: &Given) -> Option<Self> {
        let (wide, narrow) = match section {
            Section::Tube => {
                let diameter = given.get(Input::Diameter)?;
                (diameter, diameter)
            }
            Section::Slot => (f64::INFINITY, given.get(Input::Height)?),
            Section::Duct => {
                let (width, height) = (given.get(Input::Width)?, given.get(Input::Height)?);
                (width.max(height), width.min(height))
            }
        };
        let (length, bend_radius) = (given.get(Input::Length), given.get(Input::BendRadius));
        Some(Self { section, wide, narrow, length, bend_radius })
    }

    /// Four times the cross-section over its perimeter, m.
    pub(super) fn hydraulic_diameter(&self) -> f64 {
        match self.section {
            Section::Tube => self.narrow,
            Section::Slot => 2.0 * self.narrow,
            Section::Duct => 2.0 * self.narrow / (1.0 + self.narrow / self.wide),
        }
    }

    /// Area of the cross-section, m2; none for a slot.
    pub(super) fn area(&self) -> Option<f64> {
        match self.section {
            Section::Tube => Some(0.25 * PI * self.narrow * self.narrow),
            Section::Slot => None,
            Section::Duct => Some(self.wide * self.narrow),
        }
    }

    /// The flow in it; none if neither its mean speed nor its rate is given.
    pub(super) fn flow(&self, given: &Given) -> Option<ChannelFlow> {
        let (viscosity, density) = (given.get(Input::Viscosity)?, given.get(Input::FluidDensity)?);
        let by_rate = || Some(given.get(Input::FlowRate)? / self.area()?);
        let mean_speed = given.get(Input::MeanSpeed).or_else(by_rate)?;
        let h = self.narrow;
        let unit = match self.section {
            Section::Tube => DuctFlow { gradient: 32.0, largest_speed: 2.0, wall_shear: 8.0 },
            Section::Slot => DuctFlow { gradient: 12.0, largest_speed: 1.5, wall_shear: 6.0 },
            Section::Duct => DuctFlow::of(self.wide / self.narrow),
        };
        let hydraulic = self.hydraulic_diameter();
        let pressure_gradient = unit.gradient * viscosity * mean_speed / (h * h);
        let reynolds = density * mean_speed * hydraulic / viscosity;
        Some(ChannelFlow {
            mean_speed,
            largest_speed: unit.largest_speed * mean_speed,
            flow_rate: self.area().map(|area| mean_speed * area),
            pressure_gradient,
            largest_wall_shear: unit.wall_shear * mean_speed / h,
            // The pressure on the cross-section is what the walls hold back.
            mean_wall_shear: 0.25 * pressure_gradient * hydraulic / viscosity,
            reynolds,
            entry_length: hydraulic * entry_diameters(reynolds),
        })
    }

    /// Whether a body with these edges of its box can pass, m.
    pub(super) fn admits(&self, mut edges: [f64; 3]) -> bool {
        edges.sort_by(f64::total_cmp);
        let [thickness, width, _] = edges;
        thickness < self.narrow && width < self.wide
    }
}

/// Length over which the flow develops, in hydraulic diameters: `0.6 / (1 + 0.035 Re) + 0.056 Re`, laminar. Stated for
/// tubes, and taken for other sections with their hydraulic diameter.
///
/// Source: R. K. Shah and A. L. London, *Laminar Flow Forced Convection in Ducts* (1978).
fn entry_diameters(reynolds: f64) -> f64 {
    0.6 / (1.0 + 0.035 * reynolds) + 0.056 * reynolds
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::physical::{Dimension, Quantity};

    fn given(list: &[(Input, f64)]) -> Given {
        let mut given = Given::default();
        for (input, value) in list.iter().chain(&[(Input::Viscosity, 1e-3), (Input::FluidDensity, 1000.0)]) {
            given.set(*input, Quantity::exact(*value, Dimension::DIMENSIONLESS).unwrap());
        }
        given
    }

    fn close(a: f64, b: f64) -> bool {
        (a / b - 1.0).abs() < 1e-12
    }

    #[test]
    fn a_tube_is_poiseuilles() {
        let given = given(&[(Input::Diameter, 50e-6), (Input::FlowRate, 1e-12)]);
        let tube = Channel::of(Section::Tube, &given).unwrap();
        let flow = tube.flow(&given).unwrap();
        let area = PI * 625e-12;
        assert!(close(flow.mean_speed, 1e-12 / area) && close(flow.flow_rate.unwrap(), 1e-12));
        // Q = pi R^4 G / (8 mu)
        assert!(close(PI * 25e-6_f64.powi(4) * flow.pressure_gradient / 8e-3, 1e-12));
        assert!(close(flow.largest_wall_shear, flow.mean_wall_shear));
        assert!(close(flow.largest_wall_shear, 4.0 * 1e-12 / (PI * 25e-6_f64.powi(3))));
        assert!(close(flow.reynolds, 1000.0 * flow.mean_speed * 50e-6 / 1e-3));
    }

    #[test]
    fn a_slot_has_no_flow_rate() {
        let given = given(&[(Input::Height, 20e-6), (Input::MeanSpeed, 1e-3)]);
        let slot = Channel::of(Section::Slot, &given).unwrap();
        let flow = slot.flow(&given).unwrap();
        assert!(close(slot.hydraulic_diameter(), 40e-6) && flow.flow_rate.is_none());
        assert!(close(flow.largest_speed, 1.5e-3) && close(flow.largest_wall_shear, 300.0));
        assert!(close(flow.mean_wall_shear, 300.0) && close(flow.pressure_gradient, 12e-3 * 1e-3 / 400e-12));
    }

    #[test]
    fn a_duct_does_not_care_how_it_lies() {
        let lying = given(&[(Input::Width, 100e-6), (Input::Height, 40e-6), (Input::MeanSpeed, 1e-3)]);
        let standing = given(&[(Input::Width, 40e-6), (Input::Height, 100e-6), (Input::MeanSpeed, 1e-3)]);
        let flow = |given: &Given| Channel::of(Section::Duct, given).unwrap().flow(given).unwrap();
        assert_eq!(flow(&lying), flow(&standing));
        assert!(flow(&lying).largest_wall_shear > flow(&lying).mean_wall_shear);
    }

    #[test]
    fn the_entry_is_short_where_inertia_is_weak() {
        // Shah and London 1978: 0.6 at Re 0; at Re 100 0.6/4.5 + 5.6.
        assert_eq!(entry_diameters(0.0), 0.6);
        assert!((entry_diameters(100.0) - (0.6 / 4.5 + 5.6)).abs() < 1e-12);
    }

    #[test]
    fn a_body_must_pass() {
        let duct = given(&[(Input::Width, 100e-6), (Input::Height, 40e-6)]);
        let duct = Channel::of(Section::Duct, &duct).unwrap();
        assert!(duct.admits([200e-6, 30e-6, 50e-6]) && !duct.admits([50e-6; 3]));
    }
}
