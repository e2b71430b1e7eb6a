//! Does a mesh stand for a smooth body, or is it a polyhedron?
//!
//! A sampled smooth surface shows in its plane regions (facets, or strips of them): the normal turns mildly and by
//! comparable angles into *several* neighbours, and this goes on over many regions. On a polyhedron, edges are sharp
//! or few. So the area of regions that look sampled is weighed against that of all regions with a mild edge; regions
//! with sharp edges only, such as the end caps of a cylinder, belong to either kind of body and do not count.

use std::collections::BTreeMap;

use super::creases::{Regions, turn_angles};
use crate::surface::TriangleMesh;
use crate::surface::mesh::EdgeTable;

/// Turn of the normal, in degrees, from which an edge is a true crease of a body that is smooth elsewhere.
///
/// Among prisms, those with up to eight sides turn by 45 degrees or more at each edge and count as polyhedra; the
/// mildest regular solid, the icosahedron, turns by 41.8. A sphere of 80 facets turns by 23 at most.
pub const SMOOTH_SURFACE_CREASE_DEG: f64 = 40.0;

/// Plane regions that must hang together over mild edges before they are taken for a sampled surface: a shallow
/// pyramid on a block has four.
const FEWEST_REGIONS: usize = 8;

/// How far the two mildest turns of a sampled region may differ. Sampling by curvature or on a regular grid stays
/// within a factor of two or three; a bevel beside a rounding need not.
const COMPARABLE: f64 = 4.0;

/// What kind of body a mesh stands for.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[non_exhaustive]
pub enum CharacterKind {
    /// A smooth body, perhaps with some creases, sampled by facets.
    FacetedSmooth,
    /// A body of plane faces: its facets are its true surface.
    Polyhedral,
}

/// What kind of body a mesh stands for, and why.
#[derive(Debug, Clone, PartialEq)]
pub struct Character {
    /// The kind.
    pub kind: CharacterKind,
    /// Plane regions: facets in one plane count as one.
    pub plane_regions: usize,
    /// Part of the area with mild edges that looks like a sampled smooth surface, 0 to 1.
    pub sampled_share: f64,
    /// The reason, in a sentence for the user.
    pub reason: String,
}

pub(super) fn find_character(mesh: &TriangleMesh, table: &EdgeTable) -> Character {
    let regions = Regions::new(mesh, table);
    let angles = turn_angles(mesh, table);
    let sharp = SMOOTH_SURFACE_CREASE_DEG.to_radians();

    // The largest turn towards each neighbour that is mild throughout.
    let count = regions.normals.len();
    let mut neighbours = vec![BTreeMap::<usize, f64>::new(); count];
    let mut sharp_edges = 0;
    for (edge, angle) in table.edges.iter().zip(&angles) {
        let Some([a, b]) = edge.pair().map(|pair| pair.map(|facet| regions.of_facet[facet])) else { continue };
        if a == b {
            continue;
        }
        if *angle >= sharp {
            sharp_edges += 1;
            continue;
        }
        for (own, other) in [(a, b), (b, a)] {
            let turn = neighbours[own].entry(other).or_insert(0.0);
            *turn = turn.max(*angle);
        }
    }
    let cluster_sizes = clusters(&neighbours);
    let (mut sampled, mut mild) = (0.0, 0.0);
    for region in 0..count {
        let mut turns = neighbours[region].values().copied().collect::<Vec<_>>();
        turns.sort_by(f64::total_cmp);
        if turns.is_empty() {
            continue;
        }
        mild += regions.areas[region];
        let comparable = turns.windows(2).any(|pair| pair[1] <= COMPARABLE * pair[0]);
        if comparable && cluster_sizes[region] >= FEWEST_REGIONS {
            sampled += regions.areas[region];
        }
    }
    let sampled_share = if mild > 0.0 { sampled / mild } else { 0.0 };
    let (kind, reason) = if mild == 0.0 {
        (
            CharacterKind::Polyhedral,
            format!("a polyhedron: its {count} plane faces meet at {SMOOTH_SURFACE_CREASE_DEG} degrees or more"),
        )
    } else if sampled_share < 0.5 {
        let percent = 100.0 * sampled_share;
        (
            CharacterKind::Polyhedral,
            format!(
                "a polyhedron: of its {count} plane faces, only {percent:.0} % of the area looks like a sampled smooth surface"
            ),
        )
    } else {
        let percent = 100.0 * sampled_share;
        let creases = match sharp_edges {
            0 => "has no creases".to_owned(),
            n => format!("has {n} edges of {SMOOTH_SURFACE_CREASE_DEG} degrees or more, which stay sharp"),
        };
        (
            CharacterKind::FacetedSmooth,
            format!(
                "a smooth body sampled by facets: {percent:.0} % of the area with mild edges turns evenly, and it {creases}"
            ),
        )
    };
    Character { kind, plane_regions: count, sampled_share, reason }
}

/// For each region the number of regions that hang together with it over mild edges.
fn clusters(neighbours: &[BTreeMap<usize, f64>]) -> Vec<usize> {
    let mut sizes = vec![0; neighbours.len()];
    for first in 0..neighbours.len() {
        if sizes[first] != 0 {
            continue;
        }
        let mut members = vec![first];
        sizes[first] = usize::MAX;
        let mut next = 0;
        while next < members.len() {
            for other in neighbours[members[next]].keys() {
                if sizes[*other] == 0 {
                    sizes[*other] = usize::MAX;
                    members.push(*other);
                }
            }
            next += 1;
        }
        for member in &members {
            sizes[*member] = members.len();
        }
    }
    sizes
}
