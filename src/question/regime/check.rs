//! Whether what was given fits together.

use thiserror::Error;

use super::channel::{Channel, Section};
use super::given::{Flow, Input};
use super::question::RegimeQuestion;
use crate::physical::quantity::{DisplayUnit, format_si};

/// Why the question makes no sense.
#[derive(Debug, Clone, PartialEq, Eq, Error)]
#[non_exhaustive]
pub enum RegimeError {
    /// Nothing to tell a number from.
    #[error("there is neither a body nor a channel nor a force")]
    Nothing,
    /// A quantity that only makes sense together with another.
    #[error("{what} needs {partner}")]
    Alone {
        /// What was given.
        what: &'static str,
        /// What is missing.
        partner: &'static str,
        /// How to give it.
        hint: &'static str,
    },
    /// A flow through another channel than the one given.
    #[error("the flow is one through a {flow}, and the channel is a {channel}")]
    OtherChannel {
        /// The flow.
        flow: &'static str,
        /// The channel.
        channel: &'static str,
    },
    /// A flow that does not obey the walls.
    #[error("a {flow} flow does not obey the walls of a {channel}")]
    ThroughWalls {
        /// The flow.
        flow: &'static str,
        /// The channel.
        channel: &'static str,
    },
    /// Some result is too large for any number.
    #[error("what follows from these quantities is larger or smaller than any number held here")]
    Beyond,
    /// A slot has no ends, and so no flow rate.
    #[error("a slot has no width, so a flow rate says nothing of its speed")]
    RateInSlot,
    /// The body is larger than the channel.
    #[error("the body, {body}, does not fit into the {channel}, {space}")]
    DoesNotFit {
        /// Its size in words.
        body: String,
        /// The channel.
        channel: &'static str,
        /// Its size in words.
        space: String,
    },
}

impl RegimeError {
    /// What the user can do next.
    pub fn hint(&self) -> String {
        match self {
            Self::Nothing => "give a body such as `rod:12x2um`, a size such as `--size 10um`, a channel such as `--in \
                              tube:diameter=50um`, or a force such as `--force 2pN`"
                .to_owned(),
            Self::Alone { hint, .. } => (*hint).to_owned(),
            Self::Beyond => "check the units and the powers of ten".to_owned(),
            Self::OtherChannel { channel, .. } => format!("write `--flow {channel}:mean=1mm/s`"),
            Self::ThroughWalls { channel, .. } => {
                format!("write `--flow {channel}:mean=1mm/s`, or leave `--in` out for a flow without walls")
            }
            Self::RateInSlot => {
                "give its mean speed, `--flow slot:mean=1mm/s`, or make it a duct, `--in duct:width=1mm,height=20um`"
                    .to_owned()
            }
            Self::DoesNotFit { .. } => {
                "check the units of both; sizes are full dimensions, diameters and no radii".to_owned()
            }
        }
    }
}

/// What to do where a body is missing.
const A_BODY: &str = "give the body, such as `rod:12x2um`, or its size, `--size 10um`";

impl RegimeQuestion {
    /// Whether each quantity has what it needs.
    pub(super) fn check(&self) -> Result<(), RegimeError> {
        let has = |input| self.given.has(input);
        let alone = |what, partner, hint| Err(RegimeError::Alone { what, partner, hint });
        let body = self.body.is_some();
        match (self.flow, self.channel) {
            (Some(Flow::Through(flow)), Some(channel)) if flow != channel => {
                return Err(RegimeError::OtherChannel { flow: flow.word(), channel: channel.word() });
            }
            (Some(Flow::Shear), Some(channel)) => {
                return Err(RegimeError::ThroughWalls { flow: "shear", channel: channel.word() });
            }
            (Some(Flow::Uniform), Some(channel)) => {
                return Err(RegimeError::ThroughWalls { flow: "uniform", channel: channel.word() });
            }
            (Some(Flow::Through(Section::Tube)), None) => {
                return alone("the flow through a tube", "the tube", "give it, `--in tube:diameter=50um`");
            }
            (Some(Flow::Through(Section::Slot)), None) => {
                return alone("the flow through a slot", "the slot", "give it, `--in slot:height=20um`");
            }
            (Some(Flow::Through(Section::Duct)), None) => {
                return alone("the flow through a duct", "the duct", "give it, `--in duct:width=100um,height=40um`");
            }
            _ => {}
        }
        if self.channel == Some(Section::Slot) && has(Input::FlowRate) {
            return Err(RegimeError::RateInSlot);
        }
        let needs_body = [
            (Input::Speed, "a speed"),
            (Input::UniformSpeed, "a uniform flow"),
            (Input::ShearRate, "a shear flow"),
            (Input::Spin, "a spin"),
            (Input::BodyDensity, "the body's density"),
            (Input::SurfaceStiffness, "a stiffness"),
            (Input::BulkStiffness, "a stiffness"),
        ];
        for (input, what) in needs_body {
            if has(input) && !body {
                return alone(what, "a body", A_BODY);
            }
        }
        if !body && self.channel.is_none() && !has(Input::Force) {
            return Err(RegimeError::Nothing);
        }
        if has(Input::Frequency) && !body && self.channel.is_none() {
            return alone("a frequency", "a body or a channel", A_BODY);
        }
        if self.centrifuge && !has(Input::BodyDensity) {
            let hint = "give `--body-density 1.05g/mL`, or `--material polystyrene`";
            return alone("a centrifuge", "the density of the body", hint);
        }
        let width = has(Input::ChamberWidth) || self.channel.is_some();
        if has(Input::TemperatureDifference) && !width {
            let hint = "give the distance between the warm and the cold side, `--chamber 1mm`";
            return alone("a difference of temperature", "the width of the chamber", hint);
        }
        if has(Input::ChamberWidth) && !has(Input::TemperatureDifference) {
            let hint = "give it, `--temperature-difference 0.1K`";
            return alone("the width of the chamber", "the difference of temperature across it", hint);
        }
        match (has(Input::Gap), has(Input::Roughness)) {
            (true, false) => alone("a gap", "the roughness", "give it, `--roughness 10nm`"),
            (false, true) => alone("a roughness", "the gap", "give it, `--gap 200nm`"),
            _ => Ok(()),
        }
    }

    /// Whether the body fits into the channel.
    pub(super) fn check_fit(&self, channel: Option<&Channel>) -> Result<(), RegimeError> {
        let (Some(body), Some(channel)) = (&self.body, channel) else { return Ok(()) };
        if channel.admits(body.size_m) {
            return Ok(());
        }
        let length = |metres: f64| format_si(metres, DisplayUnit::LENGTH, 3);
        let space = match channel.section {
            Section::Tube => format!("{} across", length(channel.narrow)),
            Section::Slot => format!("{} high", length(channel.narrow)),
            Section::Duct => format!("{} by {}", length(channel.wide), length(channel.narrow)),
        };
        let body = body.size_m.map(length).join(" x ");
        Err(RegimeError::DoesNotFit { body, channel: channel.section.word(), space })
    }
}
