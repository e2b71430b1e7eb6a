//! Factorising the dense symmetric matrix, with every check that tells a number from a guess.

use faer::dyn_stack::{MemBuffer, MemStack};
use faer::linalg::cholesky::llt;
use faer::linalg::lu::partial_pivoting as lu;
use faer::perm::PermRef;
use faer::{MatMut, MatRef, Par};

use super::{Factor, SolveError};

/// A matrix counts as singular beyond this condition number: the sixteen digits of the arithmetic leave too few.
///
/// Graded cubes reach 2e6 and smooth bodies 1e3, so a sound surface stays far below.
const WORST_CONDITION: f64 = 1e12;

/// Largest backward error of a solution. A stable factorisation leaves about `1e-15 sqrt(n)`.
const WORST_RESIDUAL: f64 = 1e-11;

/// Random directions in which residuals are looked at.
const PROBES: usize = 3;

/// A factorised symmetric matrix.
pub(super) struct Factored {
    /// The factor or factors, column by column.
    values: Vec<f64>,
    size: usize,
    kind: Kind,
    /// 1-norm of the matrix.
    norm: f64,
    /// Random sign vectors `z` and the products `A z`, since the factorisation overwrites `A`.
    probes: Vec<(Vec<f64>, Vec<f64>)>,
}

enum Kind {
    Lu { order: Vec<usize>, order_inverse: Vec<usize> },
    Cholesky,
}

impl Factored {
    /// Factorises in place; `matrix` is symmetric, both halves, column by column.
    pub fn new(mut matrix: Vec<f64>, size: usize, factor: Factor) -> Result<Self, SolveError> {
        let norm = norm_of_finite(&matrix, size)?;
        let probes = (0..PROBES).map(|seed| probe(&matrix, size, seed as u64)).collect();
        let par = parallelism(size);
        let view = MatMut::from_column_major_slice_mut(&mut matrix, size, size);
        let kind = match factor {
            Factor::Cholesky => {
                let mut memory =
                    MemBuffer::new(llt::factor::cholesky_in_place_scratch::<f64>(size, par, Default::default()));
                let stack = MemStack::new(&mut memory);
                llt::factor::cholesky_in_place(view, Default::default(), par, stack, Default::default()).map_err(
                    |llt::factor::LltError::NonPositivePivot { index }| SolveError::NotPositiveDefinite {
                        index,
                        unknowns: size,
                    },
                )?;
                Kind::Cholesky
            }
            Factor::Lu => {
                let (mut order, mut order_inverse) = (vec![0; size], vec![0; size]);
                let scratch = lu::factor::lu_in_place_scratch::<usize, f64>(size, size, par, Default::default());
                let mut memory = MemBuffer::new(scratch);
                let stack = MemStack::new(&mut memory);
                lu::factor::lu_in_place(view, &mut order, &mut order_inverse, par, stack, Default::default());
                Kind::Lu { order, order_inverse }
            }
        };
        let factored = Self { values: matrix, size, kind, norm, probes };
        factored.check_pivots()?;
        Ok(factored)
    }

    /// A zero or non-finite pivot would turn solutions into nonsense without an error.
    fn check_pivots(&self) -> Result<(), SolveError> {
        let pivot = |index: usize| self.values[index * self.size + index].abs();
        let smallest = (0..self.size).map(pivot).fold(f64::INFINITY, f64::min);
        if smallest > 0.0 && smallest.is_finite() {
            Ok(())
        } else {
            Err(SolveError::IllConditioned { condition: f64::INFINITY })
        }
    }

    /// Solves in place for columns of `size` numbers.
    pub fn solve(&self, columns: &mut [f64]) {
        let count = columns.len() / self.size;
        let par = parallelism(self.size);
        let factor = MatRef::from_column_major_slice(&self.values, self.size, self.size);
        let right = MatMut::from_column_major_slice_mut(columns, self.size, count);
        match &self.kind {
            Kind::Cholesky => {
                let mut memory = MemBuffer::new(llt::solve::solve_in_place_scratch::<f64>(self.size, count, par));
                llt::solve::solve_in_place(factor, right, par, MemStack::new(&mut memory));
            }
            Kind::Lu { order, order_inverse } => {
                let mut memory = MemBuffer::new(lu::solve::solve_in_place_scratch::<usize, f64>(self.size, count, par));
                let order = PermRef::new_checked(order, order_inverse, self.size);
                lu::solve::solve_in_place(factor, factor, order, right, par, MemStack::new(&mut memory));
            }
        }
    }

    /// Estimate of the condition number in the 1-norm, usually within a factor of 3 from below (Hager 1984; Higham 1988).
    ///
    /// # Errors
    /// [`SolveError::IllConditioned`] if it is too large.
    pub fn condition(&self) -> Result<f64, SolveError> {
        let mut x = vec![1.0 / self.size as f64; self.size];
        let mut inverse_norm: f64 = 0.0;
        for _ in 0..5 {
            self.solve(&mut x);
            let norm = x.iter().map(|value| value.abs()).sum::<f64>();
            if !norm.is_finite() {
                return Err(SolveError::IllConditioned { condition: f64::INFINITY });
            }
            if norm <= inverse_norm {
                break;
            }
            inverse_norm = norm;
            let mut signs = x.iter().map(|value| value.signum()).collect::<Vec<_>>();
            self.solve(&mut signs);
            let largest =
                signs.iter().enumerate().max_by(|a, b| a.1.abs().total_cmp(&b.1.abs())).map_or(0, |(at, _)| at);
            x = vec![0.0; self.size];
            x[largest] = 1.0;
        }
        let condition = self.norm * inverse_norm;
        if condition < WORST_CONDITION { Ok(condition) } else { Err(SolveError::IllConditioned { condition }) }
    }

    /// Largest backward error of solved columns, seen along the random probes: `|z^T (A x - b)|` over the sum of the
    /// magnitudes of its terms.
    ///
    /// # Errors
    /// [`SolveError::Residual`] if it is too large.
    pub fn residual(&self, solutions: &[f64], right_hand_sides: &[f64]) -> Result<f64, SolveError> {
        let columns = solutions.chunks_exact(self.size).zip(right_hand_sides.chunks_exact(self.size));
        let mut worst: f64 = 0.0;
        for (x, b) in columns {
            for (z, image) in &self.probes {
                let (mut sum, mut scale) = (0.0, 0.0);
                for k in 0..self.size {
                    let (left, right) = (image[k] * x[k], z[k] * b[k]);
                    sum += left - right;
                    scale += left.abs() + right.abs();
                }
                let error = if scale > 0.0 { sum.abs() / scale } else { 0.0 };
                worst = if error.is_nan() { f64::INFINITY } else { worst.max(error) };
            }
        }
        if worst < WORST_RESIDUAL { Ok(worst) } else { Err(SolveError::Residual { residual: worst }) }
    }
}

/// Small systems are not worth waking threads for.
fn parallelism(size: usize) -> Par {
    if size < 256 { Par::Seq } else { Par::rayon(0) }
}

fn norm_of_finite(matrix: &[f64], size: usize) -> Result<f64, SolveError> {
    let mut norm: f64 = 0.0;
    for (column, values) in matrix.chunks_exact(size).enumerate() {
        let sum = values.iter().map(|value| value.abs()).sum::<f64>();
        if !sum.is_finite() {
            let row = values.iter().position(|value| !value.is_finite()).unwrap_or(0);
            return Err(SolveError::NotFinite { row, column });
        }
        norm = norm.max(sum);
    }
    Ok(norm)
}

/// A reproducible vector of signs, and its product with the matrix.
fn probe(matrix: &[f64], size: usize, seed: u64) -> (Vec<f64>, Vec<f64>) {
    let mut state = 0x9E37_79B9_7F4A_7C15_u64.wrapping_mul(seed + 1) | 1;
    let signs = (0..size)
        .map(|_| {
            // xorshift64 (Marsaglia 2003).
            state ^= state << 13;
            state ^= state >> 7;
            state ^= state << 17;
            if state & 1 == 0 { 1.0 } else { -1.0 }
        })
        .collect::<Vec<_>>();
    let mut image = vec![0.0; size];
    for (column, sign) in matrix.chunks_exact(size).zip(&signs) {
        for (sum, value) in image.iter_mut().zip(column) {
            *sum += sign * value;
        }
    }
    (signs, image)
}
