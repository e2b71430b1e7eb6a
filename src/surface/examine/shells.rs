//! The connected pieces of a surface and their sizes.
//!
//! ```text
//! V = 1/6 sum (a x b) . c,   V c = 1/24 sum ((a x b) . c) (a + b + c),   corners a, b, c about a point of the shell
//! chi = vertices - edges + facets = 2 - 2 genus
//! ```

use std::collections::HashSet;

use super::orientation::{Orientation, relative_flips};
use crate::surface::mesh::EdgeTable;
use crate::surface::{Point, TriangleMesh};

/// One connected piece of a surface; pieces that touch only in vertices are different ones.
#[derive(Debug, Clone, PartialEq)]
pub struct Shell {
    /// Its first facet, numbered from 0.
    pub first_facet: usize,
    /// How many facets it has.
    pub facets: usize,
    /// `true` if every edge has exactly two facets.
    pub closed: bool,
    /// Which way it faces.
    pub orientation: Orientation,
    /// Facets that face the other way than they should (outward if the shell is closed, as the majority otherwise),
    /// numbered from 0.
    pub flipped: Vec<usize>,
    /// Surface area, file units squared.
    pub area: f64,
    /// Enclosed volume, file units cubed, counted as if all facets faced outward; zero for an open shell.
    pub volume: f64,
    /// Centroid of the volume of a closed shell, of the area of an open one.
    pub centroid: Point,
    /// Number of handles of a closed orientable shell: 0 for a ball, 1 for a ring.
    pub genus: Option<usize>,
    /// The smallest other shell that this one lies inside of.
    pub inside: Option<usize>,
}

/// The shells, and the shell of each facet.
pub(super) fn find_shells(mesh: &TriangleMesh, table: &EdgeTable) -> (Vec<Shell>, Vec<usize>) {
    let (labels, count) = table.label(|_| true);
    let (flips, possible) = relative_flips(table, &labels, count);
    let mut members = vec![Vec::new(); count];
    for (facet, shell) in labels.iter().enumerate() {
        members[*shell].push(facet);
    }
    let shells = members.iter().zip(possible).map(|(facets, possible)| shell(mesh, table, facets, &flips, possible));
    (shells.collect(), labels)
}

fn shell(mesh: &TriangleMesh, table: &EdgeTable, facets: &[usize], flips: &[bool], possible: bool) -> Shell {
    let mut edges = HashSet::new();
    let mut vertices = HashSet::new();
    for facet in facets {
        edges.extend(table.of_facet[*facet].into_iter().filter(|edge| *edge != usize::MAX));
        vertices.extend(mesh.facets()[*facet]);
    }
    let closed = !edges.is_empty() && edges.iter().all(|edge| table.edges[*edge].facets.len() == 2);
    let sizes = Sizes::new(mesh, facets, flips);
    let flipped_count = facets.iter().filter(|facet| flips[**facet]).count();
    // Which of the two consistent choices is the right one.
    let first_is_wrong = if closed { sizes.volume < 0.0 } else { 2 * flipped_count > facets.len() };
    let flipped = if possible {
        facets.iter().copied().filter(|facet| flips[*facet] != first_is_wrong).collect()
    } else {
        Vec::new()
    };
    let orientation = match (possible, flipped.len()) {
        (false, _) => Orientation::Impossible,
        (true, 0) if closed => Orientation::Outward,
        (true, 0) => Orientation::Consistent,
        (true, n) if n == facets.len() => Orientation::Inward,
        _ => Orientation::Mixed,
    };
    let characteristic = vertices.len() as i64 - edges.len() as i64 + facets.len() as i64;
    let genus = usize::try_from(2 - characteristic).ok().filter(|twice| closed && possible && twice % 2 == 0);
    Shell {
        first_facet: facets.first().copied().unwrap_or(0),
        facets: facets.len(),
        closed,
        orientation,
        flipped,
        area: sizes.area,
        volume: if closed && possible { sizes.volume.abs() } else { 0.0 },
        centroid: if closed && possible && sizes.volume != 0.0 { sizes.volume_centroid } else { sizes.area_centroid },
        genus: genus.map(|twice| twice / 2),
        inside: None,
    }
}

struct Sizes {
    volume: f64,
    area: f64,
    volume_centroid: Point,
    area_centroid: Point,
}

impl Sizes {
    fn new(mesh: &TriangleMesh, facets: &[usize], flips: &[bool]) -> Self {
        let origin = facets.first().map_or_else(Point::zeros, |facet| mesh.corners(*facet)[0]);
        let (mut six_volumes, mut area, mut moment, mut area_moment) = (0.0, 0.0, Point::zeros(), Point::zeros());
        for facet in facets {
            let [a, b, c] = mesh.corners(*facet).map(|x| x - origin);
            let sign = if flips[*facet] { -1.0 } else { 1.0 };
            let part = sign * a.cross(&b).dot(&c);
            six_volumes += part;
            moment += part * (a + b + c) / 4.0;
            let own = 0.5 * mesh.area_normal(*facet).norm();
            area += own;
            area_moment += own * (a + b + c) / 3.0;
        }
        let mean = |moment: Point, size: f64| if size == 0.0 { origin } else { origin + moment / size };
        Self {
            volume: six_volumes / 6.0,
            area,
            volume_centroid: mean(moment, six_volumes),
            area_centroid: mean(area_moment, area),
        }
    }
}
