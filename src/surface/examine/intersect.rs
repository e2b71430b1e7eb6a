//! Where a surface passes through itself.

use std::ops::ControlFlow;

use super::boxes::BoxTree;
use super::triangle_pair::meeting_point;
use crate::surface::{Point, TriangleMesh};

/// The most intersections that are listed.
const LISTED: usize = 1000;

/// The most pairs of facets that are looked at, for each facet and in all: bodies of this trade have some ten
/// neighbours a facet, and a file that has thousands must not keep its user waiting.
const PAIRS_PER_FACET: usize = 2000;

/// Two facets that meet where they should not.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Intersection {
    /// The facets, numbered from 0.
    pub facets: [usize; 2],
    /// A place where they meet.
    pub place: Point,
}

/// All intersections that were found.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Intersections {
    /// The pairs, sorted by facet.
    pub pairs: Vec<Intersection>,
    /// `false` if the search stopped early: at a thousand intersections, or in a mesh with absurdly many facets in
    /// one place.
    pub complete: bool,
}

/// Finds the pairs of facets that meet apart from shared corners and edges; touching counts.
pub(super) fn find_intersections(mesh: &TriangleMesh) -> Intersections {
    let mut pairs = Vec::new();
    let (mut looked_at, mut complete) = (0_usize, true);
    let budget = mesh.facets().len().saturating_mul(PAIRS_PER_FACET).max(1_000_000);
    BoxTree::new(mesh).pairs(|a, b| {
        looked_at += 1;
        let names = [mesh.facets()[a], mesh.facets()[b]];
        if let Some(place) = meeting_point(names, [mesh.corners(a), mesh.corners(b)]) {
            pairs.push(Intersection { facets: [a, b], place });
        }
        complete = pairs.len() < LISTED && looked_at < budget;
        if complete { ControlFlow::Continue(()) } else { ControlFlow::Break(()) }
    });
    pairs.sort_by_key(|pair| pair.facets);
    Intersections { pairs, complete }
}
