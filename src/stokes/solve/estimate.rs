//! The error of a resistance from its values on coarser spaces: one rule for all bodies.
//!
//! Let `d1` be the change from the next coarser space and `d2` the change before that, each in its worst direction
//! relative to the resistance. If the changes shrink by the ratio `q = d2/d1` from level to level, those still to come
//! add up to `d1/(q - 1)`. The ratio is observed, but kept between bounds: a sequence that is not yet asymptotic may
//! show any number. The stated error is [`SAFETY`] times that.

use nalgebra::DMatrix;

use super::RelativeError;

/// Bounds of the ratio of changes: 1.6 is slower than uniform triangles at a sharp edge (2.1), 8 is third order.
const RATIO_BOUNDS: [f64; 2] = [1.6, 8.0];

/// The ratio that is assumed where only one coarser space is known.
const UNKNOWN_RATIO: f64 = 1.75;

/// Factor on the extrapolated remainder.
const SAFETY: f64 = 1.5;

/// What rounding and the far field's quadrature leave, whatever the levels say.
const FLOOR: f64 = 1e-7;

/// Rows of one body.
const ROWS: usize = 6;

/// Error of `fine`, of one body or several, given the resistances on coarser spaces, finest first, and the quadrature's own error; and the ratio of
/// changes in the slower of force and torque.
pub(super) fn relative_error(fine: &DMatrix<f64>, coarser: &[DMatrix<f64>], quadrature: f64) -> (RelativeError, f64) {
    let Some(first) = coarser.first() else {
        return (RelativeError { force: 1.0, torque: 1.0, coupling: 1.0 }, UNKNOWN_RATIO);
    };
    let changes = change(fine, fine, first);
    let earlier = coarser.get(1).map(|second| change(fine, first, second));
    let ratio = |pick: fn(&[f64; 3]) -> f64| {
        let Some(earlier) = &earlier else { return UNKNOWN_RATIO };
        (pick(earlier) / pick(&changes)).clamp(RATIO_BOUNDS[0], RATIO_BOUNDS[1])
    };
    let error = |change: f64, ratio: f64| SAFETY * change / (ratio - 1.0) + quadrature + FLOOR;
    let (force, torque) = (ratio(|c| c[0]), ratio(|c| c[1]));
    let error = RelativeError {
        force: error(changes[0], force),
        torque: error(changes[1], torque),
        coupling: error(changes[2], force.min(torque)),
    };
    (error, force.min(torque))
}

/// The least ratio of changes that the extrapolated value rests on: third order. A smaller one would be a larger
/// correction, resting on a sequence that has not settled.
const EXTRAPOLATION_RATIO: f64 = 8.0;

/// The value that the sequence tends to: `R + (R - R_coarse)/(q - 1)` with the observed ratio `q` of the slower of force and
/// torque, but never less than [`EXTRAPOLATION_RATIO`]. Symmetric and positive as `R` is, since the change is. Unchanged
/// where only one coarser space is known.
pub(super) fn extrapolated(fine: &DMatrix<f64>, coarser: &[DMatrix<f64>]) -> DMatrix<f64> {
    let [first, second, ..] = coarser else { return fine.clone() };
    let (now, before) = (change(fine, fine, first), change(fine, first, second));
    let ratio = (before[0] / now[0]).min(before[1] / now[1]);
    let ratio = if ratio.is_finite() { ratio.max(EXTRAPOLATION_RATIO) } else { EXTRAPOLATION_RATIO };
    fine + (fine - first) / (ratio - 1.0)
}

/// Changes from `coarse` to `fine` relative to `whole`: worst direction of the forces and of the torques of all bodies
/// together, and the coupling of any two.
pub(super) fn change(whole: &DMatrix<f64>, fine: &DMatrix<f64>, coarse: &DMatrix<f64>) -> [f64; 3] {
    let difference = fine - coarse;
    let force = worst_direction(&part(&difference, 0), &part(whole, 0));
    let torque = worst_direction(&part(&difference, 3), &part(whole, 3));
    let bodies = whole.nrows() / ROWS;
    let size = |body: usize, first: usize| {
        (0..3).map(|k| whole[(ROWS * body + first + k, ROWS * body + first + k)]).sum::<f64>() / 3.0
    };
    let coupling = (0..bodies).flat_map(|i| (0..bodies).map(move |j| (i, j))).map(|(i, j)| {
        let block = difference.fixed_view::<3, 3>(ROWS * i + 3, ROWS * j);
        block.norm() / (size(i, 3) * size(j, 0)).sqrt()
    });
    [force, torque, coupling.fold(0.0, f64::max)]
}

/// The rows and columns of all bodies' forces (`first` = 0) or torques (3).
fn part(matrix: &DMatrix<f64>, first: usize) -> DMatrix<f64> {
    let count = matrix.nrows() / ROWS * 3;
    let at = |k: usize| ROWS * (k / 3) + first + k % 3;
    DMatrix::from_fn(count, count, |i, j| matrix[(at(i), at(j))])
}

/// Largest `|x^T D x| / x^T W x`.
fn worst_direction(difference: &DMatrix<f64>, whole: &DMatrix<f64>) -> f64 {
    let Some(root) = whole.clone().cholesky() else { return 1.0 };
    let Some(inverse) = root.l().try_inverse() else { return 1.0 };
    (&inverse * difference * inverse.transpose()).symmetric_eigenvalues().amax()
}
