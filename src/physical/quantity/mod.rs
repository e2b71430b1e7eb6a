//! Quantities with dimensions: read as people write them, with an optional uncertainty, held in SI
//! units, and written back in a readable unit.

mod dimension;
mod display;
mod error;
mod list;
mod number;
mod parse;
mod symbols;
mod unit;
mod value;

pub use dimension::Dimension;
pub use display::{DisplayUnit, ScaledUnit, format_number, format_si};
pub use error::QuantityError;
pub(crate) use error::echo;
pub use list::parse_lengths;
pub use parse::{
    parse_acceleration, parse_angle, parse_angular_speed, parse_density, parse_flow_rate, parse_force, parse_fraction,
    parse_frequency, parse_length, parse_pressure, parse_shear_rate, parse_speed, parse_surface_tension,
    parse_temperature, parse_temperature_difference, parse_time, parse_torque, parse_viscosity, parse_volume,
};
pub use value::Quantity;
