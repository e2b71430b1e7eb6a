//! The library's way from a shape to its resistance: the drag of a helix, and how far it swims when it is turned.
//!
//! ```text
//! cargo run --release --example drag_of_a_body
//! ```

use std::error::Error;

use slowmote::physical::Fluid;
use slowmote::physical::quantity::parse_temperature;
use slowmote::stokes::solve::{Request, resistance};
use slowmote::surface::shapes::Shape;
use slowmote::surface::{Placement, Point};

fn main() -> Result<(), Box<dyn Error>> {
    // The body, in metres, its volume centroid at the origin.
    let shape = Shape::parse("helix:turns=2,pitch=4um,diameter=2um,thickness=0.3um")?;

    // The solver knows no units: lengths in micrometres, viscosity 1.
    let micrometre = 1e-6;
    let to_micrometres = Placement { scale: 1.0 / micrometre, ..Placement::identity() };
    let body = shape.blueprint().placed(&to_micrometres);
    let request = Request { accuracy: 0.01, ..Request::default() };
    let solution = resistance(&body, Point::zeros(), &request, &())?;

    // Units back: force per velocity is viscosity times a length, torque per rotation viscosity times a length cubed.
    let water = Fluid::water(parse_temperature("25degC")?)?;
    let dimensional = solution.resistance.scaled(water.viscosity_pa_s(), micrometre);
    println!("{} in {}", shape.name(), water.name());
    println!("drag along the axis: {:.3e} N.s/m", dimensional.matrix[(0, 0)]);
    println!(
        "relative error of drags, torques, coupling: {:.1e}, {:.1e}, {:.1e}",
        solution.error.force, solution.error.torque, solution.error.coupling
    );

    // Turned by a torque about x and pulled by no force: 0 = R_00 U + R_03 W.
    let advance = -dimensional.matrix[(0, 3)] / dimensional.matrix[(0, 0)];
    println!("advance a turn: {:.3} um", advance * std::f64::consts::TAU / micrometre);
    Ok(())
}
