//! Dimensions: the exponents of length, mass, time and temperature, and the angle that units keep apart.

use std::fmt;

/// Exponents of length, mass, time and temperature, and of the angle.
///
/// The angle has no dimension in the SI, yet `30` is no angle and `10 rad/s` no shear rate: its
/// exponent only serves to tell them apart.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Default)]
pub(super) struct Exponents {
    pub length: i32,
    pub mass: i32,
    pub time: i32,
    pub temperature: i32,
    pub angle: i32,
}

impl Exponents {
    pub(super) const fn new(length: i32, mass: i32, time: i32) -> Self {
        Self { length, mass, time, temperature: 0, angle: 0 }
    }

    const fn with_angle(self, angle: i32) -> Self {
        Self { angle, ..self }
    }

    const fn with_temperature(self, temperature: i32) -> Self {
        Self { temperature, ..self }
    }

    pub(super) fn plus(self, other: Self, times: i32) -> Self {
        Self {
            length: self.length + times * other.length,
            mass: self.mass + times * other.mass,
            time: self.time + times * other.time,
            temperature: self.temperature + times * other.temperature,
            angle: self.angle + times * other.angle,
        }
    }
}

pub(super) const LENGTH: Exponents = Exponents::new(1, 0, 0);
pub(super) const MASS: Exponents = Exponents::new(0, 1, 0);
pub(super) const TIME: Exponents = Exponents::new(0, 0, 1);
pub(super) const TEMPERATURE: Exponents = Exponents::new(0, 0, 0).with_temperature(1);
pub(super) const ANGLE: Exponents = Exponents::new(0, 0, 0).with_angle(1);
pub(super) const NONE: Exponents = Exponents::new(0, 0, 0);

/// What a quantity measures: its exponents together with the words used for it in messages.
///
/// Two dimensions are equal if their exponents are, whatever they are called: a diffusion coefficient
/// and a kinematic viscosity are both m2/s.
#[derive(Debug, Clone, Copy)]
pub struct Dimension {
    exponents: Exponents,
    name: &'static str,
    example: &'static str,
    is_difference: bool,
}

macro_rules! dimensions {
    ($($(#[$doc:meta])* $constant:ident = $name:literal, $example:literal, $exponents:expr;)*) => {
        impl Dimension {
            $($(#[$doc])* pub const $constant: Dimension = Dimension {
                exponents: $exponents, name: $name, example: $example, is_difference: false,
            };)*

            /// Every dimension that has a name, in the order in which a name is looked for.
            pub const ALL: &'static [Dimension] = &[$(Dimension::$constant),*];
        }
    };
}

dimensions! {
    /// Pure number; SI unit 1. A percentage is accepted.
    DIMENSIONLESS = "a number", "0.5", NONE;
    /// Length; SI unit m.
    LENGTH = "a length", "10um", LENGTH;
    /// Area; SI unit m2.
    AREA = "an area", "100um2", Exponents::new(2, 0, 0);
    /// Volume; SI unit m3.
    VOLUME = "a volume", "10pL", Exponents::new(3, 0, 0);
    /// Mass; SI unit kg.
    MASS = "a mass", "10pg", MASS;
    /// Time; SI unit s.
    TIME = "a time", "10s", TIME;
    /// Absolute temperature; SI unit K. Offset units are turned to kelvin.
    TEMPERATURE = "a temperature", "25degC", TEMPERATURE;
    /// Angle; SI unit rad.
    ANGLE = "an angle", "30deg", ANGLE;
    /// Speed; SI unit m/s.
    SPEED = "a speed", "50um/s", Exponents::new(1, 0, -1);
    /// Acceleration; SI unit m/s2.
    ACCELERATION = "an acceleration", "9.81m/s2", Exponents::new(1, 0, -2);
    /// Rate of shear or of strain; SI unit 1/s. Units that hold an angle are refused.
    SHEAR_RATE = "a rate", "10/s", Exponents::new(0, 0, -1);
    /// Angular speed; SI unit rad/s. A bare `1/s` is taken as radians a second, `Hz` is refused.
    ANGULAR_SPEED = "an angular speed", "10rad/s", Exponents::new(0, 0, -1).with_angle(1);
    /// Frequency of something that oscillates, in cycles; SI unit Hz.
    FREQUENCY = "a frequency", "10Hz", Exponents::new(0, 0, -1);
    /// Force; SI unit N.
    FORCE = "a force", "10pN", Exponents::new(1, 1, -2);
    /// Torque; SI unit N.m.
    TORQUE = "a torque", "10pN.um", Exponents::new(2, 1, -2);
    /// Pressure or stress; SI unit Pa.
    PRESSURE = "a pressure or stress", "1Pa", Exponents::new(-1, 1, -2);
    /// Pressure gradient; SI unit Pa/m.
    PRESSURE_GRADIENT = "a pressure gradient", "1kPa/m", Exponents::new(-2, 1, -2);
    /// Dynamic viscosity; SI unit Pa.s.
    VISCOSITY = "a viscosity", "1mPa.s", Exponents::new(-1, 1, -1);
    /// Kinematic viscosity; SI unit m2/s.
    KINEMATIC_VISCOSITY = "a kinematic viscosity", "1cSt", Exponents::new(2, 0, -1);
    /// Diffusion coefficient; SI unit m2/s.
    DIFFUSION = "a diffusion coefficient", "1um2/s", Exponents::new(2, 0, -1);
    /// Density; SI unit kg/m3.
    DENSITY = "a density", "1.05g/mL", Exponents::new(-3, 1, 0);
    /// Volume flow rate; SI unit m3/s.
    FLOW_RATE = "a flow rate", "10uL/min", Exponents::new(3, 0, -1);
    /// Surface tension or membrane shear modulus; SI unit N/m.
    SURFACE_TENSION = "a surface tension", "72mN/m", Exponents::new(0, 1, -2);
    /// Translational resistance; SI unit N.s/m.
    RESISTANCE = "a resistance", "1nN.s/m", Exponents::new(0, 1, -1);
    /// Coupling resistance, torque over velocity; SI unit N.s.
    COUPLING_RESISTANCE = "a coupling resistance", "1pN.s", Exponents::new(1, 1, -1);
    /// Rotational resistance; SI unit N.m.s.
    ROTATIONAL_RESISTANCE = "a rotational resistance", "1pN.um.s", Exponents::new(2, 1, -1);
    /// Translational mobility; SI unit m/(N.s).
    MOBILITY = "a mobility", "1um/(s.pN)", Exponents::new(0, -1, 1);
    /// Coupling mobility, rotation over force; SI unit 1/(N.s).
    COUPLING_MOBILITY = "a coupling mobility", "1/(s.pN)", Exponents::new(-1, -1, 1);
    /// Rotational mobility; SI unit 1/(N.m.s).
    ROTATIONAL_MOBILITY = "a rotational mobility", "1/(s.pN.um)", Exponents::new(-2, -1, 1);
}

impl Dimension {
    /// Difference of two temperatures; SI unit K. Offset units count without their offset.
    pub const TEMPERATURE_DIFFERENCE: Dimension =
        Dimension { exponents: TEMPERATURE, name: "a temperature difference", example: "2K", is_difference: true };

    /// What it is called in a sentence, with its article: "a length".
    pub fn name(&self) -> &'static str {
        self.name
    }

    /// A quantity of this dimension as one would write it: `10um`.
    pub fn example(&self) -> &'static str {
        self.example
    }

    /// Whether a temperature is meant absolutely, so that the offsets of degC and degF count.
    pub(super) fn is_absolute_temperature(&self) -> bool {
        self.exponents == TEMPERATURE && !self.is_difference
    }

    /// Whether the bare `1/s` is accepted although an angle is expected.
    pub(super) fn accepts(&self, given: Exponents) -> bool {
        let bare_rate_as_angular_speed =
            self.exponents == Self::ANGULAR_SPEED.exponents && given == Self::SHEAR_RATE.exponents;
        given == self.exponents || bare_rate_as_angular_speed
    }
}

impl PartialEq for Dimension {
    fn eq(&self, other: &Self) -> bool {
        self.exponents == other.exponents && self.is_difference == other.is_difference
    }
}

impl Eq for Dimension {}

impl fmt::Display for Dimension {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(self.name)
    }
}

/// Words for what a unit measures: the name of a known dimension, or its base units.
pub(super) fn describe(exponents: Exponents) -> String {
    let known = Dimension::ALL.iter().find(|known| known.exponents == exponents);
    if let Some(known) = known {
        return known.name.to_string();
    }
    let parts = [
        ("kg", exponents.mass),
        ("m", exponents.length),
        ("s", exponents.time),
        ("K", exponents.temperature),
        ("rad", exponents.angle),
    ];
    let unit: Vec<String> = parts
        .iter()
        .filter(|(_, power)| *power != 0)
        .map(|(symbol, power)| match power {
            1 => (*symbol).to_string(),
            _ => format!("{symbol}^{power}"),
        })
        .collect();
    format!("a quantity in {}", unit.join("."))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_dimension_without_a_name_is_described_by_its_base_units() {
        assert_eq!(describe(Exponents::new(4, 0, -3)), "a quantity in m^4.s^-3");
        assert_eq!(describe(Dimension::VISCOSITY.exponents), "a viscosity");
    }

    #[test]
    fn a_bare_rate_is_an_angular_speed_but_not_the_other_way_round() {
        assert!(Dimension::ANGULAR_SPEED.accepts(Dimension::SHEAR_RATE.exponents));
        assert!(!Dimension::SHEAR_RATE.accepts(Dimension::ANGULAR_SPEED.exponents));
    }
}
