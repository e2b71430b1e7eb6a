//! Do all facets agree on which side is outside?

use crate::surface::mesh::EdgeTable;

/// Which way the facets of a surface, or of one shell of it, face.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[non_exhaustive]
pub enum Orientation {
    /// All corners run counter-clockwise seen from outside.
    Outward,
    /// All corners run clockwise seen from outside.
    Inward,
    /// Some facets face the other way than their neighbours.
    Mixed,
    /// No choice of directions makes all neighbours agree, as on a Klein bottle.
    Impossible,
    /// Neighbours agree, but the surface is open and has no outside.
    Consistent,
}

/// For each facet whether it faces the other way than the first facet of its shell, walking over edges that exactly
/// two facets share; and for each shell whether that is possible without contradiction.
pub(super) fn relative_flips(table: &EdgeTable, shells: &[usize], shell_count: usize) -> (Vec<bool>, Vec<bool>) {
    let mut flips = vec![None; shells.len()];
    let mut possible = vec![true; shell_count];
    let mut stack = Vec::new();
    for first in 0..shells.len() {
        if flips[first].is_some() {
            continue;
        }
        flips[first] = Some(false);
        stack.push((first, false));
        while let Some((facet, flip)) = stack.pop() {
            for (edge, other) in table.neighbours(facet) {
                let agrees = table.edges[edge].pair().is_some();
                let wanted = flip == agrees;
                match flips[other] {
                    None => {
                        flips[other] = Some(wanted);
                        stack.push((other, wanted));
                    }
                    Some(flip) if flip != wanted => possible[shells[facet]] = false,
                    Some(_) => {}
                }
            }
        }
    }
    (flips.into_iter().map(|flip| flip.unwrap_or(false)).collect(), possible)
}
