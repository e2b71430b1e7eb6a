//! What a careful user would want to be reminded of, when nothing is solved.

use super::bounds::RegimeBody;
use super::evaluation::Evaluation;
use super::given::{Given, Input};
use crate::physical::quantity::{DisplayUnit, format_si};
use crate::physical::{Fluid, Material};
use crate::question::cautions::{SOFT, body_cautions, fluid_cautions, material_cautions};

/// The cautions for this fluid, body, material and centrifuge.
pub(super) fn cautions(
    fluid: &Fluid,
    body: Option<&RegimeBody>,
    material: Option<&Material>,
    centrifuge: bool,
    given: &Given,
    state: &Evaluation,
) -> Vec<String> {
    let mut cautions = match body {
        Some(body) => {
            let half = 0.5 * body.size_m.into_iter().fold(0.0, f64::max);
            body_cautions(body.shape.as_deref(), half, fluid)
        }
        None => fluid_cautions(fluid),
    };
    cautions.extend(one_viscosity(fluid, body, given, state));
    for caution in material.map(material_cautions).unwrap_or_default() {
        let said = caution == SOFT && cautions.iter().any(|known| known.contains("is soft"));
        if !said && !cautions.contains(&caution) {
            cautions.push(caution);
        }
    }
    if let Some(material) = material.filter(|material| !material.note().is_empty()) {
        cautions.push(format!("The density is a usual one for {}: {}.", material.name(), material.note()));
    }
    if centrifuge {
        cautions.push(
            "Stay within the rated speed, load and balance of rotor and tubes. The centrifuge's manual, trained staff \
             and the local rules come first."
                .to_owned(),
        );
    }
    cautions
}

/// One viscosity does not describe every fluid: said wherever one was given by number. Plasma brings a caution of its own.
fn one_viscosity(fluid: &Fluid, body: Option<&RegimeBody>, given: &Given, state: &Evaluation) -> Option<String> {
    if !fluid.is_given_by_numbers() {
        return None;
    }
    let moving = body.and_then(|body| {
        let speeds = state.motions.iter().filter_map(|motion| motion.speed);
        let fastest = speeds.map(|[_, fastest]| fastest).reduce(f64::max)?;
        Some(fastest / body.radius_at_least_m)
    });
    let rate = [moving, state.shear_rate, given.get(Input::Spin)].into_iter().flatten().reduce(f64::max);
    let advice = rate.map_or_else(
        || "Take a viscosity measured at the rate of shear of your flow.".to_owned(),
        |rate| format!("Take a viscosity measured at about {}, as here.", format_si(rate, DisplayUnit::RATE, 1)),
    );
    Some(format!(
        "One viscosity does not describe blood, mucus, paint, lava or polymer solutions: it falls with the rate of \
         shear, and some of them don't flow at all below a yield stress. {advice}"
    ))
}
