//! `slowmote regime [BODY]`.

use std::path::PathBuf;

use clap::Args;
use slowmote::physical::quantity::{
    parse_acceleration, parse_angular_speed, parse_density, parse_force, parse_fraction, parse_frequency, parse_length,
    parse_pressure, parse_speed, parse_surface_tension, parse_temperature_difference,
};
use slowmote::physical::{Dimension, Material, Quantity, QuantityError};
use slowmote::question::{Given, Input, LengthUnit, RegimeAnswer, RegimeBody, RegimeQuestion, StandingBody, Verdict};
use slowmote::show::{Assumed, regime_text};
use slowmote::surface::Shape;

use super::asked::Asked;
use super::case::filled;
use super::drag::settle;
use super::material::known_material;
use super::options::{
    BodyOptions, ChannelOption, FlowOption, FluidOptions, OutputOptions, PiecesName, RecordOptions, centrifuge,
    channel, flow, length_unit, parse_with,
};
use super::output::Output;
use super::{Exit, Failure};

/// Options of `regime`.
#[derive(Debug, Args)]
#[command(after_help = "\
Nothing is solved: a body of any shape is held between the sphere of its volume and what encloses
it, and the worse end decides. Quantities may carry their uncertainty, as in 10±0.3um.

Examples:
  slowmote regime --size 10um --body-density 1.05g/mL
  slowmote regime rod:12x2um --force 2pN --fluid glycerol:60%
  slowmote regime --in duct:width=100um,height=40um,length=2cm --flow duct:rate=10uL/min
  slowmote regime redcell:7.82um --material red-cell --fluid pbs --centrifuge g=1000")]
pub struct RegimeArguments {
    /// A shape such as `rod:12x2um`, or a surface file (.stl .obj .ply .off .msh), or a case file (.json); none for a
    /// channel alone
    #[arg(value_name = "BODY", conflicts_with = "size")]
    body: Option<String>,

    /// Only the span of the body, such as `10um`: it is taken as a sphere of this diameter
    #[arg(long, value_name = "LENGTH", value_parser = span, help_heading = BODY)]
    size: Option<Quantity>,

    /// The unit of a surface file's coordinates, such as `um`
    #[arg(long, value_name = "UNIT", value_parser = length_unit, help_heading = BODY, requires = "body")]
    unit: Option<LengthUnit>,

    /// Density of the body, such as `1.05g/mL`
    #[arg(long, value_name = "DENSITY", value_parser = positive(parse_density), help_heading = BODY)]
    body_density: Option<Quantity>,

    /// What the body is made of, such as `polystyrene`, for its usual density
    #[arg(long, value_name = "NAME", help_heading = BODY, conflicts_with = "body_density")]
    material: Option<String>,

    /// Surface tension or shear modulus of a skin, such as `5uN/m`, or elastic modulus of a body, such as `1kPa`
    #[arg(long, value_name = "STIFFNESS", value_parser = stiffness, help_heading = BODY)]
    stiffness: Option<Quantity>,

    /// Volume fraction of such bodies in the fluid, such as `2%`
    #[arg(long, value_name = "FRACTION", value_parser = concentration, help_heading = BODY)]
    concentration: Option<Quantity>,

    /// Gap between the body and a wall, such as `200nm`
    #[arg(long, value_name = "LENGTH", value_parser = positive(parse_length), help_heading = BODY)]
    gap: Option<Quantity>,

    /// Height of the roughness in the gap, such as `10nm`
    #[arg(long, value_name = "LENGTH", value_parser = positive(parse_length), help_heading = BODY)]
    roughness: Option<Quantity>,

    #[command(flatten)]
    fluid: FluidOptions,

    /// Speed through the fluid, such as `50um/s`
    #[arg(long, value_name = "SPEED", value_parser = positive(parse_speed), help_heading = MOTION)]
    speed: Option<Quantity>,

    /// Angular speed, such as `10/s` (radians a second) or `60rpm`
    #[arg(long, value_name = "RATE", value_parser = positive(parse_angular_speed), help_heading = MOTION)]
    spin: Option<Quantity>,

    /// Force on the body, such as `2pN`
    #[arg(long, value_name = "FORCE", value_parser = positive(parse_force), help_heading = MOTION)]
    force: Option<Quantity>,

    /// Acceleration that the body's weight comes from [default: 9.80665m/s2]
    #[arg(long, value_name = "ACCELERATION", value_parser = gravity, help_heading = MOTION)]
    gravity: Option<Quantity>,

    /// A centrifuge: `g=1000`, or `rpm=3000,radius=80mm`
    #[arg(long, value_name = "HOW", value_parser = centrifuge, help_heading = MOTION, conflicts_with = "gravity")]
    centrifuge: Option<Quantity>,

    /// Frequency of an oscillation of the body or the flow, such as `10Hz`
    #[arg(long, value_name = "FREQUENCY", value_parser = frequency, help_heading = MOTION)]
    frequency: Option<Quantity>,

    /// A straight channel: `tube:diameter=50um`, `slot:height=20um` or `duct:width=100um,height=40um`; with `length=2cm`
    /// and `bend-radius=5mm` if known
    #[arg(long = "in", value_name = "CHANNEL", value_parser = channel, help_heading = CHANNEL)]
    channel: Option<ChannelOption>,

    /// The flow: `tube:mean=1mm/s` or `tube:rate=10uL/min` by the channel's name, or `shear:10/s` or `uniform:1mm/s`
    /// without walls
    #[arg(long, value_name = "FLOW", value_parser = flow, help_heading = CHANNEL)]
    flow: Option<FlowOption>,

    /// Difference of temperature across the channel or the chamber, such as `0.1K`, for thermal convection
    #[arg(long, value_name = "DT", value_parser = temperature_difference, help_heading = CHANNEL)]
    temperature_difference: Option<Quantity>,

    /// Width of a chamber between its warm and its cold side, such as `1mm` [default: the channel's narrow side]
    #[arg(long, value_name = "LENGTH", value_parser = positive(parse_length), help_heading = CHANNEL)]
    chamber: Option<Quantity>,

    #[command(flatten)]
    output: OutputOptions,
    #[command(flatten)]
    record: RecordOptions,

    /// Exit with code 4 if something is outside creeping flow
    #[arg(long, help_heading = "Output")]
    strict: bool,
}

/// What is known beside the quantities.
struct Known {
    body: Option<RegimeBody>,
    fluid: FluidOptions,
    /// Of the body, as a case file has it.
    density: Option<String>,
    /// The files that were read.
    files: Vec<PathBuf>,
}

const BODY: &str = "The body";
const MOTION: &str = "What moves it";
const CHANNEL: &str = "The channel and the flow";

impl RegimeArguments {
    /// Asks, shows, and tells how it ended.
    ///
    /// # Errors
    /// Input that can't be used or does not fit together, or an output that can't be written.
    pub fn run(&self, mut asked: Asked) -> Result<Exit, Failure> {
        let known = self.known()?;
        let assumed = Assumed {
            fluid: known.fluid.fluid.is_none(),
            temperature: known.fluid.temperature.is_none(),
            ..Assumed::default()
        };
        settle(&mut asked, &assumed);
        let files = known.files.clone();
        let answer = self.ask(known)?;
        let inputs = files.iter().map(PathBuf::as_path).collect::<Vec<_>>();
        let output = Output::open(&self.output, &inputs)?.recording(&self.record, asked, &files)?;
        output.write(&answer, |style| regime_text(&answer, &assumed, style))?;
        let outside = answer.validity.verdict == Some(Verdict::Outside);
        Ok(if self.strict && outside { Exit::OutsideCreepingFlow } else { Exit::Done })
    }

    /// The answer alone.
    ///
    /// # Errors
    /// As [`RegimeArguments::run`].
    pub fn answer(&self) -> Result<RegimeAnswer, Failure> {
        self.ask(self.known()?)
    }

    fn ask(&self, known: Known) -> Result<RegimeAnswer, Failure> {
        let material = self.material.as_deref().map(known_material).transpose()?;
        let density = match (self.body_density.or(material.map(Material::density)), &known.density) {
            (None, Some(text)) => Some(positive(parse_density)(text).map_err(|error| {
                Failure::new("the density in the case file can't be used")
                    .because(error)
                    .hint("write it as in `1.05g/mL`")
            })?),
            (told, _) => told,
        };
        let question = RegimeQuestion {
            fluid: known.fluid.fluid()?,
            body: known.body,
            material,
            channel: self.channel.as_ref().map(|channel| channel.section),
            flow: self.flow.as_ref().map(|flow| flow.flow),
            centrifuge: self.centrifuge.is_some(),
            given: self.given(density),
        };
        question.answer().map_err(|error| Failure::of(&error).hint(error.hint()))
    }

    /// The body, if there is one, and the fluid; a case file stands in for options that were not given.
    fn known(&self) -> Result<Known, Failure> {
        let mut known = Known { body: None, fluid: self.fluid.clone(), density: None, files: Vec::new() };
        if let Some(size) = self.size {
            known.body = Some(RegimeBody::of_span(size));
            return Ok(known);
        }
        let Some(text) = &self.body else { return Ok(known) };
        let (body, unit) = (text.clone(), self.unit.clone());
        // Of the size alone nothing changes with what the pieces are.
        let pieces = Some(PiecesName::Joined);
        let options = BodyOptions { body, unit, pieces, turn: Vec::new(), at: None, reference: None };
        let filled = filled(&options, &self.fluid)?;
        let mut bodies = filled.standing(None)?;
        let Some(StandingBody { body, .. }) = bodies.pop().filter(|_| bodies.is_empty()) else {
            return Err(Failure::new(format!("{text} holds {} bodies, and one is expected", bodies.len() + 1))
                .hint("ask for one after the other"));
        };
        let bounds = RegimeBody::of(&body).ok_or_else(|| {
            Failure::new(format!("the surface of {} encloses no volume", body.name))
                .hint("the body must be a closed surface with its normals outwards")
        })?;
        known.body = Some(bounds);
        known.density = filled.said_of_one().density;
        known.files = filled.files();
        known.fluid = filled.fluid;
        Ok(known)
    }

    fn given(&self, density: Option<Quantity>) -> Given {
        let mut given = Given::default();
        let stiffness = match self.stiffness {
            Some(stiffness) if stiffness.dimension() == Dimension::PRESSURE => Input::BulkStiffness,
            _ => Input::SurfaceStiffness,
        };
        for (input, quantity) in [
            (Input::BodyDensity, density),
            (stiffness, self.stiffness),
            (Input::Concentration, self.concentration),
            (Input::Gap, self.gap),
            (Input::Roughness, self.roughness),
            (Input::Speed, self.speed),
            (Input::Spin, self.spin),
            (Input::Force, self.force),
            (Input::Acceleration, self.gravity.or(self.centrifuge)),
            (Input::Frequency, self.frequency),
            (Input::TemperatureDifference, self.temperature_difference),
            (Input::ChamberWidth, self.chamber),
        ] {
            given.set_some(input, quantity);
        }
        for (input, quantity) in self.channel.iter().flat_map(|channel| &channel.sizes) {
            given.set(*input, *quantity);
        }
        if let Some(flow) = &self.flow {
            given.set(flow.given, flow.quantity);
        }
        given
    }
}

type Parse = fn(&str) -> Result<Quantity, QuantityError>;

/// A parser for clap of a quantity greater than zero.
fn positive(parse: Parse) -> impl Fn(&str) -> Result<Quantity, String> + Clone + Send + Sync + 'static {
    parse_with(move |text: &str| parse(text).and_then(|quantity| quantity.positive()))
}

/// A size as those of shapes, so that a mistyped exponent is caught.
fn span(text: &str) -> Result<Quantity, String> {
    let size = positive(parse_length)(text)?;
    Shape::sphere(size.value_si()).map(|_| size).map_err(|error| error.to_string())
}

fn gravity(text: &str) -> Result<Quantity, String> {
    parse_acceleration(text).and_then(|quantity| quantity.non_negative()).map_err(|error| error.to_string())
}

fn frequency(text: &str) -> Result<Quantity, String> {
    parse_frequency(text).and_then(|quantity| quantity.positive()).map_err(|error| match error {
        QuantityError::WrongDimension { given, .. } if given == Dimension::ANGULAR_SPEED.name() => {
            format!("`{text}` is an angular speed; an oscillation is counted in cycles, `10Hz`, 2 pi radians each")
        }
        other => other.to_string(),
    })
}

fn temperature_difference(text: &str) -> Result<Quantity, String> {
    parse_temperature_difference(text).and_then(|quantity| quantity.positive()).map_err(|error| error.to_string())
}

fn concentration(text: &str) -> Result<Quantity, String> {
    let fraction = parse_fraction(text).and_then(|quantity| quantity.positive()).map_err(|error| match error {
        QuantityError::WrongDimension { .. } => {
            format!("`{text}` is no share of the volume such as `2%`; divide a mass per volume by the body's density")
        }
        other => other.to_string(),
    })?;
    if fraction.value_si() < 1.0 {
        Ok(fraction)
    } else {
        Err(format!("`{text}` is all of the volume or more; a share such as `2%` or `0.02` is expected"))
    }
}

/// A stiffness of a surface, N/m, or of a body, Pa.
fn stiffness(text: &str) -> Result<Quantity, String> {
    let surface = parse_surface_tension(text);
    let read = match &surface {
        Err(QuantityError::WrongDimension { .. }) => parse_pressure(text),
        _ => surface,
    };
    read.and_then(|quantity| quantity.positive()).map_err(|error| match error {
        QuantityError::WrongDimension { given, .. } => {
            format!(
                "`{text}` is {given}, but a stiffness such as `5uN/m` (of a surface) or `1kPa` (of a body) is expected"
            )
        }
        other => other.to_string(),
    })
}
