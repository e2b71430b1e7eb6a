//! The same body on coarser spaces, at little cost: the coarse Galerkin matrix is `P^T A P`, with no new integrals.
//!
//! Spaces are nested, so by the minimum principle the resistance rises from level to level towards the exact one.

use nalgebra::DMatrix;
use rayon::prelude::*;

use super::dense::Factored;
use super::{Factor, SolveError};
use crate::stokes::single_layer::Moments;
use crate::surface::{Panels, Prolongation};

/// Coarser levels are of no use below this many nodes.
const FEWEST_NODES: usize = 12;

/// Levels beside the fine one that the error estimate wants.
const WANTED_LEVELS: usize = 2;

/// Resistances on coarser spaces than the panels' own, finest first; `matrix` is the fine one.
pub(super) fn coarse_resistances(
    panels: &Panels,
    matrix: &[f64],
    moments: &Moments,
) -> Result<Vec<DMatrix<f64>>, SolveError> {
    let mut resistances = Vec::new();
    let mut prolongations = panels.coarsenings.clone();
    prolongations.truncate(WANTED_LEVELS);
    let mut right = moments.motions.iter().flatten().copied().collect::<Vec<_>>();
    let mut coarse: Option<Vec<f64>> = None;
    let mut nodes = panels.node_count;
    if prolongations.is_empty() {
        prolongations.extend(panels.thinned());
    }
    for prolongation in prolongations {
        if prolongation.coarse_count < FEWEST_NODES || prolongation.coarse_count >= nodes {
            break;
        }
        let fine = coarse.as_deref().unwrap_or(matrix);
        let next = restrict_matrix(fine, nodes, &prolongation);
        right = restrict_columns(&right, nodes, &prolongation);
        nodes = prolongation.coarse_count;
        resistances.push(resistance_of(next.clone(), &right, nodes)?);
        coarse = Some(next);
    }
    Ok(resistances)
}

/// `8 pi B^T A^-1 B`.
fn resistance_of(matrix: Vec<f64>, right: &[f64], nodes: usize) -> Result<DMatrix<f64>, SolveError> {
    let factored = Factored::new(matrix, 3 * nodes, Factor::Cholesky)?;
    let mut tractions = right.to_vec();
    factored.solve(&mut tractions);
    Ok(energy(right, &tractions, 3 * nodes))
}

/// `8 pi B^T F` for columns of `size` numbers, made symmetric.
pub(super) fn energy(right: &[f64], tractions: &[f64], size: usize) -> DMatrix<f64> {
    let count = right.len() / size;
    let column = |values: &'_ [f64], k: usize| values[k * size..(k + 1) * size].to_vec();
    let product = DMatrix::from_fn(count, count, |i, j| {
        column(right, i).iter().zip(column(tractions, j)).map(|(b, f)| b * f).sum::<f64>()
    });
    4.0 * std::f64::consts::PI * (&product + product.transpose())
}

fn restrict_columns(columns: &[f64], nodes: usize, prolongation: &Prolongation) -> Vec<f64> {
    let coarse_size = 3 * prolongation.coarse_count;
    let mut restricted = vec![0.0; columns.len() / (3 * nodes) * coarse_size];
    for (fine, coarse) in columns.chunks_exact(3 * nodes).zip(restricted.chunks_exact_mut(coarse_size)) {
        for (values, row) in fine.chunks_exact(3).zip(&prolongation.rows) {
            for &(node, weight) in row {
                for (sum, value) in coarse[3 * node..3 * node + 3].iter_mut().zip(values) {
                    *sum += weight * value;
                }
            }
        }
    }
    restricted
}

fn restrict_matrix(matrix: &[f64], nodes: usize, prolongation: &Prolongation) -> Vec<f64> {
    let size = 3 * nodes;
    let coarse_size = 3 * prolongation.coarse_count;
    let mut contributors = vec![Vec::new(); prolongation.coarse_count];
    for (fine, row) in prolongation.rows.iter().enumerate() {
        for &(coarse, weight) in row {
            contributors[coarse].push((fine, weight));
        }
    }
    let mut restricted = vec![0.0; coarse_size * coarse_size];
    restricted.par_chunks_mut(3 * coarse_size).zip(&contributors).for_each(|(columns, contributors)| {
        let mut sum = vec![0.0; 3 * size];
        for &(fine, weight) in contributors {
            let source = &matrix[3 * fine * size..3 * (fine + 1) * size];
            for (sum, value) in sum.iter_mut().zip(source) {
                *sum += weight * value;
            }
        }
        columns.copy_from_slice(&restrict_columns(&sum, nodes, prolongation));
    });
    restricted
}
