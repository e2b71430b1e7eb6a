//! Mending: changes a mesh where it is told to, and lists what it did.

use std::collections::HashSet;
use std::fmt;

use super::error::{At, short};
use super::flaws::{duplicates, thin_facets};
use super::holes::find_holes;
use super::nesting::find_nesting;
use super::shells::find_shells;
use super::usable::told;
use crate::surface::mesh::{EdgeTable, MAX_POLYGON_CORNERS, triangulate};
use crate::surface::{Point, TriangleMesh, weld, weld_tolerance};

/// Rounds of cutting facets at a vertex on their edge: one for each vertex on the same edge.
const CUTTING_ROUNDS: usize = 100;

/// What may be mended.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct MendOptions {
    /// Merge vertices that coincide.
    pub weld: bool,
    /// Distance for that, in file units; by default a few roundings of single precision.
    pub weld_tolerance: Option<f64>,
    /// Drop facets that are there twice and facets without area; where a facet without area fills the gap beside a
    /// vertex on its neighbour's edge, that neighbour is cut in two instead.
    pub drop_bad_facets: bool,
    /// Turn facets so that all face outward.
    pub orient: bool,
    /// Close holes with new facets over their boundary.
    pub close_holes: bool,
    /// The longest boundary of a hole to close, as a part of the diagonal of the surface's box.
    pub largest_hole: f64,
    /// Drop pieces inside other pieces.
    pub drop_inner_shells: bool,
}

impl Default for MendOptions {
    /// Everything, with holes up to a boundary as long as the body's diagonal.
    fn default() -> Self {
        Self {
            weld: true,
            weld_tolerance: None,
            drop_bad_facets: true,
            orient: true,
            close_holes: true,
            largest_hole: 1.0,
            drop_inner_shells: true,
        }
    }
}

/// One thing that was mended; its text is a sentence for the user. Lengths and places are in file units.
#[derive(Debug, Clone, PartialEq)]
#[non_exhaustive]
pub enum Mended {
    /// Vertices were merged.
    Welded {
        /// How many.
        vertices: usize,
        /// The largest distance that one was moved.
        largest_move: f64,
    },
    /// Facets that were there twice were dropped.
    DroppedDuplicates {
        /// How many.
        facets: usize,
    },
    /// Facets without area were dropped.
    DroppedDegenerate {
        /// How many.
        facets: usize,
    },
    /// Facets were cut in two at a vertex on their edge, and the facets without area beside them dropped.
    CutAtVertex {
        /// How many.
        facets: usize,
    },
    /// Facets were turned round.
    Turned {
        /// How many.
        facets: usize,
        /// Of how many.
        of: usize,
    },
    /// A hole was closed.
    ClosedHole {
        /// Its centre.
        place: Point,
        /// Length of its boundary.
        length: f64,
        /// How many facets were added.
        facets: usize,
    },
    /// A hole was left open because it is too large.
    LeftHole {
        /// Its centre.
        place: Point,
        /// Length of its boundary.
        length: f64,
    },
    /// Inner pieces were dropped.
    DroppedInner {
        /// How many pieces.
        shells: usize,
        /// How many facets.
        facets: usize,
    },
}

impl fmt::Display for Mended {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::Welded { vertices, largest_move: 0.0 } => {
                write!(f, "Merged {} with others at the same place.", Count(*vertices, "vertex", "vertices"))
            }
            Self::Welded { vertices, largest_move } => write!(
                f,
                "Merged {} with others beside them (moved by {largest_move:.2e} at most).",
                Count(*vertices, "vertex", "vertices")
            ),
            Self::DroppedDuplicates { facets: 1 } => write!(f, "Dropped 1 facet that was there twice."),
            Self::DroppedDuplicates { facets } => write!(f, "Dropped {facets} facets that were there twice."),
            Self::DroppedDegenerate { facets } => write!(f, "Dropped {} without area.", facet_count(*facets)),
            Self::CutAtVertex { facets } => write!(f, "Cut {} in two at a vertex on an edge.", facet_count(*facets)),
            Self::Turned { facets, of } => {
                write!(f, "Turned {} of {of} round to face outward.", facet_count(*facets))
            }
            Self::ClosedHole { place, length, facets } => write!(
                f,
                "Closed the hole near {}, {} long around, with {}.",
                At(place),
                short(*length),
                facet_count(*facets)
            ),
            Self::LeftHole { place, length } => {
                write!(f, "Left the hole near {} open: its boundary of {} is too long.", At(place), short(*length))
            }
            Self::DroppedInner { shells, facets } => {
                let lie = if *shells == 1 { "lies inside another" } else { "lie inside others" };
                write!(f, "Dropped {} ({}) that {lie}.", Count(*shells, "piece", "pieces"), facet_count(*facets))
            }
        }
    }
}

/// A number with its noun, one of it and several.
struct Count(usize, &'static str, &'static str);

impl fmt::Display for Count {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        let Self(count, one, several) = self;
        write!(f, "{count} {}", if *count == 1 { one } else { several })
    }
}

/// A number of facets.
fn facet_count(count: usize) -> Count {
    Count(count, "facet", "facets")
}

/// Mends what the options allow, and lists what it did. The mesh that comes back may still be unusable: examine it.
pub fn mend(mesh: &TriangleMesh, options: &MendOptions) -> (TriangleMesh, Vec<Mended>) {
    let mut mesh = mesh.clone();
    let mut done = Vec::new();
    if options.weld {
        let welded = weld(&mesh, options.weld_tolerance.unwrap_or_else(|| weld_tolerance(&mesh)));
        let vertices = welded.exact + welded.near;
        if vertices > 0 {
            done.push(Mended::Welded { vertices, largest_move: welded.largest_move });
        }
        mesh = welded.mesh;
    }
    if options.drop_bad_facets {
        mesh = drop_bad_facets(mesh, &mut done);
    }
    if options.orient {
        mesh = orient(mesh, &mut done);
    }
    if options.close_holes {
        mesh = close_holes(mesh, options.largest_hole, &mut done);
        if options.orient {
            mesh = orient(mesh, &mut done);
        }
    }
    if options.drop_inner_shells {
        mesh = drop_inner_shells(mesh, &mut done);
    }
    (mesh, done)
}

/// The same mesh with other facets. New facets have vertices of old ones, so that this can't fail.
fn with_facets(mesh: &TriangleMesh, facets: Vec<[usize; 3]>, groups: Vec<usize>) -> TriangleMesh {
    TriangleMesh::with_groups(mesh.vertices().to_vec(), facets, groups).unwrap_or_else(|_| mesh.clone())
}

fn drop_bad_facets(mut mesh: TriangleMesh, done: &mut Vec<Mended>) -> TriangleMesh {
    let mut cut = 0;
    for _ in 0..CUTTING_ROUNDS {
        let Some((better, facets)) = cut_at_vertices(&mesh) else { break };
        cut += facets;
        mesh = better;
    }
    if cut > 0 {
        done.push(Mended::CutAtVertex { facets: cut });
    }
    let twice = duplicates(&mesh).into_iter().map(|[_, later]| later).collect::<HashSet<_>>();
    if !twice.is_empty() {
        done.push(Mended::DroppedDuplicates { facets: twice.len() });
        mesh = mesh.filtered(|facet| !twice.contains(&facet));
    }
    let flat = thin_facets(&mesh).0.into_iter().collect::<HashSet<_>>();
    if !flat.is_empty() {
        done.push(Mended::DroppedDegenerate { facets: flat.len() });
        mesh = mesh.filtered(|facet| !flat.contains(&facet));
    }
    mesh
}

/// A facet without area lies along the edge of its neighbour, its middle vertex on that edge. The two together are cut
/// the other way, from that vertex to the neighbour's far corner. Gives the mesh and the number of cuts, or `None` if
/// nothing gets better.
fn cut_at_vertices(mesh: &TriangleMesh) -> Option<(TriangleMesh, usize)> {
    let table = EdgeTable::new(mesh);
    let flat = thin_facets(mesh).0;
    let mut facets = mesh.facets().to_vec();
    let mut touched = vec![false; facets.len()];
    let mut cuts = 0;
    for &facet in &flat {
        let corners = mesh.facets()[facet];
        let places = mesh.corners(facet);
        let length = |k: usize| (places[(k + 1) % 3] - places[k]).norm();
        let long = (0..3).max_by(|a, b| length(*a).total_cmp(&length(*b))).unwrap_or(0);
        let (a, c, b) = (corners[long], corners[(long + 1) % 3], corners[(long + 2) % 3]);
        let edge = table.of_facet[facet][long];
        if edge == usize::MAX || touched[facet] {
            continue;
        }
        let Some(pair) = table.edges[edge].pair() else { continue };
        let other = if pair[0] == facet { pair[1] } else { pair[0] };
        let Some(&apex) = mesh.facets()[other].iter().find(|vertex| **vertex != a && **vertex != c) else { continue };
        if touched[other] || apex == b {
            continue;
        }
        // The facet runs a, c, b and the neighbour c, a, apex.
        facets[other] = [c, b, apex];
        facets[facet] = [b, a, apex];
        (touched[other], touched[facet]) = (true, true);
        cuts += 1;
    }
    let better = with_facets(mesh, facets, mesh.groups().to_vec());
    (thin_facets(&better).0.len() < flat.len()).then_some((better, cuts))
}

fn orient(mesh: TriangleMesh, done: &mut Vec<Mended>) -> TriangleMesh {
    let (mut shells, labels) = find_shells(&mesh, &EdgeTable::new(&mesh));
    find_nesting(&mesh, &mut shells, &labels);
    let mut facets = mesh.facets().to_vec();
    let mut turned = 0;
    for facet in shells.iter().flat_map(|shell| &shell.flipped) {
        facets[*facet].swap(1, 2);
        turned += 1;
    }
    if turned == 0 {
        return mesh;
    }
    done.push(Mended::Turned { facets: turned, of: facets.len() });
    with_facets(&mesh, facets, mesh.groups().to_vec())
}

fn close_holes(mesh: TriangleMesh, largest: f64, done: &mut Vec<Mended>) -> TriangleMesh {
    let (low, high) = mesh.bounding_box();
    let size = (high - low).norm();
    let limit = largest * size;
    let (mut facets, mut groups) = (mesh.facets().to_vec(), mesh.groups().to_vec());
    for hole in find_holes(&mesh, &EdgeTable::new(&mesh)) {
        let (place, length) = (told(hole.place, size), hole.length);
        if length > limit || hole.vertices.len() > MAX_POLYGON_CORNERS {
            done.push(Mended::LeftHole { place, length });
            continue;
        }
        // New facets run against the facet along the hole's first edge.
        let around = hole.vertices.iter().rev().copied().collect::<Vec<_>>();
        let places = around.iter().map(|vertex| mesh.vertices()[*vertex]).collect::<Vec<_>>();
        let new = triangulate(&places).into_iter().map(|triangle| triangle.map(|corner| around[corner]));
        let before = facets.len();
        facets.extend(new);
        if !groups.is_empty() {
            let group = groups[hole.facet];
            groups.resize(facets.len(), group);
        }
        if facets.len() > before {
            done.push(Mended::ClosedHole { place, length, facets: facets.len() - before });
        }
    }
    with_facets(&mesh, facets, groups)
}

fn drop_inner_shells(mesh: TriangleMesh, done: &mut Vec<Mended>) -> TriangleMesh {
    let (mut shells, labels) = find_shells(&mesh, &EdgeTable::new(&mesh));
    find_nesting(&mesh, &mut shells, &labels);
    let inner = |facet: usize| shells[labels[facet]].inside.is_some();
    let facets = (0..labels.len()).filter(|facet| inner(*facet)).count();
    if facets == 0 {
        return mesh;
    }
    let count = shells.iter().filter(|shell| shell.inside.is_some()).count();
    done.push(Mended::DroppedInner { shells: count, facets });
    mesh.filtered(|facet| !inner(facet))
}
