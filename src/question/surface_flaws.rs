//! Pieces, holes, creases and flaws of a surface, each with its place. Lists end after some; counts are whole.

use super::surface::{Scale, orientation, vector};
use super::surface_report::{AngleBand, CreaseReport, FlawPlace, HoleReport, ShellReport};
use crate::surface::{Examination, Orientation, Point, Shell, TriangleMesh};

/// Lists end here.
const MOST_LISTED: usize = 20;

/// Borders of the ranges of angles, degrees. A sampled smooth body turns by less than 20 at an edge, 40 is where creases
/// begin, 90 is a block's edge, and what turns by more is a knife or a fold.
const ANGLE_BORDERS_DEG: [f64; 7] = [0.0, 10.0, 20.0, 40.0, 60.0, 90.0, 180.0];

/// Angles are rounded to so many steps a degree before they are sorted in, so that the rounding of single-precision
/// coordinates doesn't decide about the edges of blocks and prisms, which lie on the borders.
const ANGLE_STEPS: f64 = 100.0;

/// A right angle belongs to the range that it ends, so that the last one has only what is sharper than a block.
const RIGHT_ANGLE_DEG: f64 = 90.0;

/// The first places of each kind of flaw.
pub(super) struct Flaws {
    pub wrong_facing: Vec<FlawPlace>,
    pub non_manifold_edges: Vec<FlawPlace>,
    pub pinched_vertices: Vec<FlawPlace>,
    pub duplicate_facets: Vec<FlawPlace>,
    pub degenerate_facets: Vec<FlawPlace>,
    pub slivers: Vec<FlawPlace>,
    pub intersections: Vec<FlawPlace>,
}

pub(super) fn flaws(mesh: &TriangleMesh, seen: &Examination, scale: Scale) -> Flaws {
    let flaw = |facets: &[usize], place: Point| FlawPlace {
        facets: facets.iter().map(|facet| facet + 1).collect(),
        place_in_file_units: vector(place),
        place_m: scale.vector_m(place),
        aspect: None,
    };
    let of_facet = |facet: &usize| flaw(&[*facet], mesh.centre(*facet));
    let flipped = wrong_facing(seen);
    let mut slivers = seen.slivers.clone();
    slivers.sort_by(|a, b| b.aspect.total_cmp(&a.aspect).then(a.facet.cmp(&b.facet)));
    let edges = seen.non_manifold_edges.iter().take(MOST_LISTED);
    // Vertices that do harm come before those that only join separate pieces.
    let mut pinched = seen.pinched_vertices.iter().collect::<Vec<_>>();
    pinched.sort_by_key(|vertex| vertex.between_shells);
    let pairs = seen.intersections.pairs.iter().take(MOST_LISTED);
    let duplicates = seen.duplicate_facets.iter().take(MOST_LISTED);
    let thin = slivers.iter().take(MOST_LISTED);
    Flaws {
        wrong_facing: flipped.iter().take(MOST_LISTED).map(of_facet).collect(),
        non_manifold_edges: edges.map(|edge| flaw(&edge.facets, edge.place)).collect(),
        pinched_vertices: pinched.iter().take(MOST_LISTED).map(|at| flaw(&at.facets, at.place)).collect(),
        duplicate_facets: duplicates.map(|pair| flaw(pair, mesh.centre(pair[0]))).collect(),
        degenerate_facets: seen.degenerate_facets.iter().take(MOST_LISTED).map(of_facet).collect(),
        slivers: thin.map(|thin| FlawPlace { aspect: Some(thin.aspect), ..flaw(&[thin.facet], thin.place) }).collect(),
        intersections: pairs.map(|pair| flaw(&pair.facets, pair.place)).collect(),
    }
}

/// Facets that face the other way than they should, in order. A piece inside another that faces inward all over is a
/// hollow and counts as right: what is wrong with it is its place.
pub(super) fn wrong_facing(seen: &Examination) -> Vec<usize> {
    let hollow = |shell: &&Shell| shell.inside.is_some() && shell.orientation == Orientation::Inward;
    let judged = seen.shells.iter().filter(|shell| !hollow(shell));
    let mut flipped = judged.flat_map(|shell| &shell.flipped).copied().collect::<Vec<_>>();
    flipped.sort_unstable();
    flipped
}

pub(super) fn shells(seen: &Examination, scale: Scale) -> Vec<ShellReport> {
    let report = |shell: &Shell| ShellReport {
        first_facet: shell.first_facet + 1,
        facets: shell.facets,
        closed: shell.closed,
        orientation: orientation(shell.orientation).to_owned(),
        volume_in_file_units: shell.volume,
        volume_m3: scale.si(shell.volume, 3),
        area_in_file_units: shell.area,
        area_m2: scale.si(shell.area, 2),
        centroid_in_file_units: vector(shell.centroid),
        centroid_m: scale.vector_m(shell.centroid),
        genus: shell.genus,
        inside_shell: shell.inside.map(|outer| outer + 1),
    };
    seen.shells.iter().take(MOST_LISTED).map(report).collect()
}

pub(super) fn holes(seen: &Examination, scale: Scale) -> Vec<HoleReport> {
    let mut holes = seen.holes.iter().collect::<Vec<_>>();
    holes.sort_by(|a, b| b.length.total_cmp(&a.length).then(a.facet.cmp(&b.facet)));
    let report = |hole: &&crate::surface::Hole| HoleReport {
        edges: hole.vertices.len(),
        length_in_file_units: hole.length,
        length_m: scale.si(hole.length, 1),
        facet: hole.facet + 1,
        place_in_file_units: vector(hole.place),
        place_m: scale.vector_m(hole.place),
    };
    holes.iter().take(MOST_LISTED).map(report).collect()
}

pub(super) fn creases(seen: &Examination, from_deg: f64, scale: Scale) -> CreaseReport {
    let (count, length) = seen.creases_from(from_deg);
    let mut by_angle = ANGLE_BORDERS_DEG
        .windows(2)
        .map(|ends| AngleBand {
            from_deg: ends[0],
            to_deg: ends[1],
            edges: 0,
            length_in_file_units: 0.0,
            length_m: None,
        })
        .collect::<Vec<_>>();
    for turn in &seen.turns {
        let angle = (turn.angle_deg * ANGLE_STEPS).round() / ANGLE_STEPS;
        let reaches =
            |band: &AngleBand| angle > band.from_deg || (angle == band.from_deg && band.from_deg != RIGHT_ANGLE_DEG);
        let found = by_angle.iter().rposition(reaches).unwrap_or(0);
        if let Some(band) = by_angle.get_mut(found) {
            band.edges += 1;
            band.length_in_file_units += turn.length;
        }
    }
    for band in &mut by_angle {
        band.length_m = scale.si(band.length_in_file_units, 1);
    }
    CreaseReport {
        from_deg,
        count,
        length_in_file_units: length,
        length_m: scale.si(length, 1),
        sharpest_turn_deg: seen.sharpest_turn_deg,
        by_angle,
    }
}
