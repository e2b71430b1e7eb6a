//! The solve itself, on one surface and on ever finer ones until the error is small enough.

use std::time::Instant;

use super::dense::Factored;
use super::{
    Factor, GrandSolution, Observer, Part, RelativeError, Request, Solution, SolveError, Stage, Statistics, estimate,
    levels,
};
use crate::stokes::quadrature::{Instructions, PairRules};
use crate::stokes::rigid::GrandResistance;
use crate::stokes::single_layer::{self, Bodies, Moments};
use crate::surface::{Blueprint, Panels, Point};

/// Above this many unknowns Cholesky's third of the work is felt; below, LU is the reference.
const CHOLESKY_FROM: usize = 1000;

/// Next mesh is chosen for this share of the wanted error, so that one more step is usually the last.
const AIM: f64 = 0.6;

/// Macro triangles from which on the first mesh is the macro triangles themselves.
const RESOLVED_FROM: usize = 200;

/// The cost grows like this power of the panels: two for the pairs; the factorisation (three) is small until late.
const COST_POWER: i32 = 2;

/// Most that the number of cuts grows in one step: beyond, the observed order is not to be trusted.
const LARGEST_STEP: f64 = 2.0;

/// Resistance of the rigid body about `reference`, to the accuracy asked for.
///
/// The surface may consist of several closed shells; they move as one body. `reference` is in the blueprint's length
/// unit, and so is the resistance (viscosity 1): force per velocity is a length, torque per rotation a length cubed.
///
/// # Errors
/// [`SolveError`] if the system does not fit the memory, is singular or ill-conditioned, or its solution fails the
/// residual check.
pub fn resistance(
    blueprint: &Blueprint,
    reference: Point,
    request: &Request,
    observer: &dyn Observer,
) -> Result<Solution, SolveError> {
    let part = Part { blueprint, geometry: request.geometry, reference };
    grand_resistance(&[part], request, observer).map(GrandSolution::of_one)
}

/// Resistance on one given surface, all of whose shells move as one body.
///
/// # Errors
/// As [`resistance`].
pub fn resistance_of_panels(
    panels: Panels,
    reference: Point,
    request: &Request,
    observer: &dyn Observer,
) -> Result<Solution, SolveError> {
    let bodies = Bodies::one(reference, panels.shell_count);
    on_panels(panels, &bodies, request, observer).map(GrandSolution::of_one)
}

/// Resistance of several rigid bodies that move on their own, each about its own reference point, to the accuracy asked for.
///
/// # Errors
/// As [`resistance`].
pub fn grand_resistance(
    parts: &[Part],
    request: &Request,
    observer: &dyn Observer,
) -> Result<GrandSolution, SolveError> {
    if let Some(wanted) = request.elements {
        let cuts = parts.iter().map(|part| part.blueprint.cuts_for(wanted)).collect::<Vec<_>>();
        let (panels, bodies) = subdivided(parts, &cuts);
        return on_panels(panels, &bodies, request, observer);
    }
    let mut request = request.clone();
    let begin = Instant::now();
    // A body of many macro triangles is already resolved by them; a shape of a few is not.
    let first = |part: &Part| if part.blueprint.triangles.len() > RESOLVED_FROM { 1 } else { 2 };
    let mut cuts = parts.iter().map(first).collect::<Vec<usize>>();
    let mut best: Option<GrandSolution> = None;
    loop {
        let (panels, bodies) = subdivided(parts, &cuts);
        if best.is_some() && single_layer::bytes_needed(3 * panels.node_count) > request.memory_limit {
            break;
        }
        let began = Instant::now();
        let solution = match on_panels(panels.clone(), &bodies, &request, observer) {
            // The matrix of a very thin body is so nearly indefinite that only finer quadrature keeps it positive.
            Err(SolveError::NotPositiveDefinite { .. }) if request.rules.is_none() => {
                request.rules = Some(PairRules::standard());
                on_panels(panels, &bodies, &request, observer)?
            }
            other => other?,
        };
        let error = solution.error.worst();
        let order = solution.ratio.log2();
        let count = solution.panels.panels.len() as f64;
        best = Some(solution);
        if error <= request.accuracy {
            break;
        }
        let growth = (error / (AIM * request.accuracy)).powf(1.0 / order).min(LARGEST_STEP);
        let finer = |&cuts: &usize| ((cuts as f64 * growth).ceil() as usize).next_multiple_of(2).max(cuts + 1);
        let next = cuts.iter().map(finer).collect::<Vec<_>>();
        let next_count = parts.iter().zip(&next).map(|(part, &n)| part.blueprint.panel_count(n) as f64).sum::<f64>();
        let expected = began.elapsed().as_secs_f64() * (next_count / count).powi(COST_POWER);
        if begin.elapsed().as_secs_f64() + expected > request.time_limit_s {
            break;
        }
        cuts = next;
    }
    // The loop ends with a solution: the first pass always makes one.
    best.map(|mut solution| {
        solution.reached = solution.error.worst() <= request.accuracy;
        // On a fixed mesh the plain Galerkin value stands, which is a lower bound; here the best value is asked for.
        solution.resistance.matrix = estimate::extrapolated(&solution.resistance.matrix, &solution.coarser);
        solution
    })
    .ok_or(SolveError::IllConditioned { condition: f64::INFINITY })
}

/// What two resistances of the same bodies differ in, relative to the first.
pub fn relative_change(whole: &GrandResistance, other: &GrandResistance) -> RelativeError {
    let [force, torque, coupling] = estimate::change(&whole.matrix, &other.matrix, &whole.matrix);
    RelativeError { force, torque, coupling }
}

/// All bodies cut, each macro edge into its body's number of parts.
fn subdivided(parts: &[Part], cuts: &[usize]) -> (Panels, Bodies) {
    let mut bodies = Bodies { references: Vec::new(), of_shell: Vec::new() };
    let mut pieces = Vec::new();
    for (body, (part, &cuts)) in parts.iter().zip(cuts).enumerate() {
        let panels = part.blueprint.subdivide(cuts, part.geometry);
        bodies.references.push(part.reference);
        bodies.of_shell.extend(std::iter::repeat_n(body, panels.shell_count));
        pieces.push(panels);
    }
    (Panels::joined(pieces), bodies)
}

/// The resistance on given surfaces.
fn on_panels(
    panels: Panels,
    bodies: &Bodies,
    request: &Request,
    observer: &dyn Observer,
) -> Result<GrandSolution, SolveError> {
    let unknowns = 3 * panels.node_count;
    let needed = single_layer::bytes_needed(unknowns);
    if needed > request.memory_limit {
        return Err(SolveError::TooLarge { unknowns, needed, available: request.memory_limit });
    }
    let rules = match &request.rules {
        Some(rules) => rules.clone(),
        None if request.elements.is_some() => PairRules::standard(),
        None => PairRules::for_accuracy(request.accuracy),
    };
    let report = |fraction: f64| observer.progress(Stage::Assembling, unknowns, fraction);
    let mut matrix = single_layer::assemble(&panels, &rules, Instructions::best(), &report);
    let moments = Moments::new(&panels, bodies);
    shift_null_space(&mut matrix, &moments, unknowns, request.shift);
    observer.progress(Stage::Factorising, unknowns, 0.0);
    let coarser = levels::coarse_resistances(&panels, &matrix, &moments)?;
    let factor = request.factor.unwrap_or(if unknowns < CHOLESKY_FROM { Factor::Lu } else { Factor::Cholesky });
    let factored = Factored::new(matrix, unknowns, factor)?;
    observer.progress(Stage::Solving, unknowns, 0.0);
    let right = moments.motions.iter().flatten().copied().collect::<Vec<_>>();
    let mut tractions = right.clone();
    factored.solve(&mut tractions);
    let residual = factored.residual(&tractions, &right)?;
    let condition = factored.condition()?;
    let matrix = levels::energy(&right, &tractions, unknowns);
    let (error, ratio) = estimate::relative_error(&matrix, &coarser, rules.error_on(&panels));
    let eight_pi = 8.0 * std::f64::consts::PI;
    let traction = |node: usize, motion: usize| {
        let at = motion * unknowns + 3 * node;
        eight_pi * Point::new(tractions[at], tractions[at + 1], tractions[at + 2])
    };
    let motions = 6 * bodies.references.len();
    Ok(GrandSolution {
        resistance: GrandResistance { matrix, references: bodies.references.clone() },
        error,
        ratio,
        coarser,
        reached: true,
        tractions: (0..panels.node_count)
            .map(|node| (0..motions).map(|motion| traction(node, motion)).collect())
            .collect(),
        panels_of_body: bodies.ranges(&panels),
        statistics: Statistics { triangles: panels.panels.len(), unknowns, factor, condition, residual },
        panels,
    })
}

/// Adds `sigma v v^T` for the null vector `v` of each closed shell, with `sigma` of the matrix's own size.
///
/// Constant pressure on a closed shell moves no fluid, so the matrix knows nothing of it; the shift sets the mean normal
/// traction of the solution to zero and leaves the resistance alone.
fn shift_null_space(matrix: &mut [f64], moments: &Moments, size: usize, factor: f64) {
    let mean_diagonal = (0..size).map(|k| matrix[k * size + k]).sum::<f64>() / size as f64;
    for normal in &moments.normals {
        let square = normal.iter().map(|value| value * value).sum::<f64>();
        let sigma = factor * mean_diagonal * (size as f64 / 3.0).sqrt() / square;
        for (column, value) in matrix.chunks_exact_mut(size).zip(normal) {
            for (entry, other) in column.iter_mut().zip(normal) {
                *entry += sigma * value * other;
            }
        }
    }
}
