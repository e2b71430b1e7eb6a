//! How far the answer can be trusted: the solver's error, the geometry's and that of the inputs in one struct.

use super::scene::Scene;
use crate::question::answer::{InputShare, RelativeErrorAnswer};
use crate::question::budget::{TORQUE_POWER, force_total, torque_total};
use crate::stokes::solve::{GrandSolution, Request};
use crate::surface::{Geometry, Measure};

/// Relative difference of two measures of one surface that is nothing but rounding.
const ROUNDING: f64 = 1e-10;

/// All errors of the solution of a scene, with these shares of the inputs.
pub(super) fn relative_error(
    scene: &Scene,
    solution: &GrandSolution,
    request: &Request,
    input_shares: Vec<InputShare>,
) -> RelativeErrorAnswer {
    let estimate = solution.error;
    let geometry = geometry_error(scene, solution);
    let inputs = force_total(&input_shares).max(torque_total(&input_shares));
    RelativeErrorAnswer {
        force: bound(estimate.force),
        torque: bound(estimate.torque),
        coupling: bound(estimate.coupling),
        geometry: finite(geometry),
        inputs,
        total: bound(estimate.worst()).and_then(|solver| finite(solver + geometry + inputs)),
        input_shares,
        accuracy_asked: request.elements.is_none().then_some(request.accuracy),
        accuracy_reached: solution.reached,
    }
}

/// What the worst body's surface brings, for torques.
fn geometry_error(scene: &Scene, solution: &GrandSolution) -> f64 {
    let solved = scene.bodies.iter().zip(&solution.panels_of_body).map(|(standing, panels)| {
        let body = standing.body;
        let measure = || solution.panels.measure_of(panels.clone());
        let of_panels = if body.geometry == Geometry::Exact {
            0.0
        } else {
            panel_error(&measure(), &standing.extent.measure, scene.length)
        };
        TORQUE_POWER * body.geometry_error + of_panels
    });
    solved.fold(0.0, f64::max)
}

/// How far panels with another geometry than the exact one are from the true surface.
///
/// Torques go as the cube of a length, and so does the volume: the relative difference of the volumes is that of
/// the torque if the panels are off by the same everywhere, as flat ones inside a round body are. The area stands
/// in where inside and outside cancel.
fn panel_error(solved: &Measure, exact: &Measure, length: f64) -> f64 {
    let volume = (solved.volume * length.powi(3) / exact.volume - 1.0).abs();
    let area = (solved.area * length.powi(2) / exact.area - 1.0).abs();
    let difference = volume.max(area);
    if difference > ROUNDING { difference } else { 0.0 }
}

/// A solver's estimate of 100 % or more says that there were too few elements to tell.
fn bound(estimate: f64) -> Option<f64> {
    finite(estimate).filter(|estimate| *estimate < 1.0)
}

/// JSON has no infinity: what has no bound is null there.
pub(super) fn finite(value: f64) -> Option<f64> {
    value.is_finite().then_some(value)
}
