//! The numbers on a body, and those that tell whether it is a single, rigid, smooth one.

use super::answer::Concern;
use super::bounds::RegimeBody;
use super::evaluation::{Evaluation, Setting};
use super::flow_numbers::{archimedes, knudsen, particle_reynolds, turning, unsteady};
use super::given::{Given, Input};
use super::motion::density_difference;
use super::number::{Number, one_of, percent};
use super::path_numbers::{convection, particle_stokes, peclet, rotational_peclet};
use crate::question::answer::Verdict;
use crate::question::bands::Bands;

/// Deformation is about the capillary number: 1 % is rigid, 5 % is not. Common practice, no source.
const RIGIDITY: Bands = Bands::new(0.01, 0.01, 0.05);

/// Batchelor's 6.55 phi is 1 % at 0.15 %, 20 % at 3 %; beyond 10 % nothing dilute is left. The first from the law, the
/// others a choice of this program.
const CROWDING: Bands = Bands::new(0.0015, 0.03, 0.1);

/// Slowing of settling spheres by their neighbours, to first order in the volume fraction (G. K. Batchelor, J. Fluid
/// Mech. 52 (1972) 245).
const BATCHELOR: f64 = 6.55;

/// The gap should be ten times the roughness; at the roughness bodies touch. A choice of this program.
const ROUGHNESS: Bands = Bands::new(0.1, 0.1, 1.0);

/// Every number that applies to the body, or to bodies in general.
pub(super) fn body_numbers(
    setting: &Setting<'_>,
    given: &Given,
    body: Option<&RegimeBody>,
    state: &Evaluation,
) -> Vec<Number> {
    let mut numbers: Vec<Number> = state.motions.iter().map(|motion| particle_reynolds(motion, body)).collect();
    if let Some(body) = body {
        let single = [
            archimedes(given, body),
            turning(given, body, given.get(Input::Spin), "rotation Reynolds number", "rho Omega a^2 / mu"),
            turning(given, body, state.shear_rate, "shear Reynolds number", "rho gamma a^2 / mu"),
            unsteady(given, body),
            knudsen(setting, body),
            capillary(given, body, state),
            bond(given, body),
            particle_stokes(given, body, state),
            peclet(setting, given, body, state),
            rotational_peclet(setting, given, body, state),
            convection(state),
        ];
        numbers.extend(single.into_iter().flatten());
    }
    numbers.extend([crowding(given), roughness(given)].into_iter().flatten());
    numbers
}

/// Stress of the flow over the stiffness, for the strongest of the flows.
fn capillary(given: &Given, body: &RegimeBody, state: &Evaluation) -> Option<Number> {
    let viscosity = given.get(Input::Viscosity)?;
    let radius = body.enclosing_radius_m;
    let by_shear = state.shear_rate.map(|rate| rate * radius);
    let speeds = state.motions.iter().filter_map(|motion| motion.speed.map(|[_, fastest]| fastest));
    let speed = speeds.chain(by_shear).reduce(f64::max)?;
    let (value, formula) = match (given.get(Input::SurfaceStiffness), given.get(Input::BulkStiffness)) {
        (Some(surface), _) => (viscosity * speed / surface, "mu U / sigma, mu gamma a / G_s"),
        (None, Some(bulk)) => (viscosity * speed / (body.radius_at_least_m * bulk), "mu gamma / G, mu U / (a G)"),
        (None, None) => return None,
    };
    Some(rigidity("capillary number", formula, value))
}

fn bond(given: &Given, body: &RegimeBody) -> Option<Number> {
    let pressure = density_difference(given)?.abs() * given.get(Input::Acceleration)? * body.enclosing_radius_m;
    let value = pressure * body.enclosing_radius_m / given.get(Input::SurfaceStiffness)?;
    Some(rigidity("Bond number", "|drho| g a^2 / sigma", value))
}

fn rigidity(name: &'static str, formula: &'static str, value: f64) -> Number {
    let meaning = one_of(
        RIGIDITY.verdict(value),
        [
            "the body keeps its shape",
            "the body keeps its shape nearly",
            "the body begins to yield: its shape and its drag change by some percent",
            "the body is not rigid; the drag of a rigid one is no answer",
        ],
    );
    Number { name, formula, concern: Concern::Body, value, other_end: None, bands: RIGIDITY, meaning }
}

fn crowding(given: &Given) -> Option<Number> {
    let value = given.get(Input::Concentration)?;
    let slowing = percent(BATCHELOR * value);
    let meaning = match CROWDING.verdict(value) {
        Verdict::Creeping => "each body is alone".to_owned(),
        Verdict::Corrected => format!("neighbours slow the settling by about {slowing} (spheres, Batchelor 1972)"),
        Verdict::Doubtful => {
            "neighbours slow the settling by a third or more; no law of single bodies holds".to_owned()
        }
        Verdict::Outside => "the bodies are a suspension; the drag of a single one is no answer".to_owned(),
    };
    Some(Number {
        name: "volume fraction",
        formula: "phi",
        concern: Concern::Body,
        value,
        other_end: None,
        bands: CROWDING,
        meaning,
    })
}

fn roughness(given: &Given) -> Option<Number> {
    let value = given.get(Input::Roughness)? / given.get(Input::Gap)?;
    let meaning = one_of(
        ROUGHNESS.verdict(value),
        [
            "the gap is wide against the roughness",
            "the gap is wide against the roughness",
            "the roughness fills a part of the gap, which smooth surfaces don't know of",
            "the surfaces touch: lubrication ends at the roughness",
        ],
    );
    Some(Number {
        name: "roughness over gap",
        formula: "roughness / gap",
        concern: Concern::Body,
        value,
        other_end: None,
        bands: ROUGHNESS,
        meaning,
    })
}
