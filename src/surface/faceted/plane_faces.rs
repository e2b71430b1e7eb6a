//! The plane faces of a polyhedron as convex polygons, whatever triangles the file cut them into.
//!
//! Each plane region's boundary is traced, vertices in the middle of straight edges are dropped, the rest is cut into
//! triangles by clipping ears (holes joined to the outer boundary by bridges: D. Eberly, "Triangulation by ear
//! clipping"; from memory), and triangles are merged again into convex polygons, longest diagonals first (after Hertel
//! & Mehlhorn 1983, FCT, LNCS 158, 207-218; from memory).

use std::collections::{BTreeMap, HashMap};

use crate::surface::examine::Regions;
use crate::surface::mesh::{EdgeTable, triangulate};
use crate::surface::{Point, TriangleMesh};

/// Most corners of a polygon: the stars of polygons with more become slender.
const MOST_CORNERS: usize = 8;

/// Most corners of a plane region with all its holes: finding bridges to holes takes time with their square, and a
/// graded layout of such a body would be too large anyway.
const MOST_OUTLINE: usize = 1000;

/// Sine of the angle by which a boundary may turn and still be straight; single-precision coordinates of an edge a
/// thousandth of the body long are off by 1e-4 of its length.
const STRAIGHT: f64 = 1e-3;

/// Relative difference between the area of a region's facets and of its polygons that rounding can explain.
const SAME_AREA: f64 = 1e-4;

/// A convex polygon.
#[derive(Debug, Clone)]
pub(super) struct Polygon {
    /// Its corners by mesh vertex, counter-clockwise seen from outside.
    pub corners: Vec<usize>,
    /// The plane region it belongs to.
    pub region: usize,
}

/// The plane regions of a mesh as convex polygons that meet edge to edge; `None` if a region is too intricate.
pub(super) fn plane_faces(mesh: &TriangleMesh, table: &EdgeTable, regions: &Regions) -> Option<Vec<Polygon>> {
    let boundary = Boundary::new(mesh, table, regions)?;
    let mut polygons = Vec::new();
    for (region, edges) in boundary.edges.iter().enumerate() {
        let loops = trace_loops(edges)?;
        let loops = loops.into_iter().map(|mut ring| {
            ring.retain(|vertex| !boundary.is_straight[*vertex]);
            ring
        });
        let loops = loops.collect::<Vec<_>>();
        let intricate = loops.iter().map(Vec::len).sum::<usize>() > MOST_OUTLINE;
        if intricate || loops.iter().any(|ring| ring.len() < 3) {
            return None;
        }
        let normal = regions.normals[region];
        let outline = join_loops(mesh, loops, &normal)?;
        let places = outline.iter().map(|vertex| mesh.vertices()[*vertex]).collect::<Vec<_>>();
        let triangles = triangulate(&places).into_iter().map(|triangle| triangle.map(|corner| outline[corner]));
        let merged = merge(mesh, triangles.collect(), &normal);
        let area = merged.iter().map(|corners| area_along(mesh, corners, &normal)).sum::<f64>();
        if (area - regions.areas[region]).abs() > SAME_AREA * regions.areas[region] {
            return None;
        }
        polygons.extend(merged.into_iter().map(|corners| Polygon { corners, region }));
    }
    meet_edge_to_edge(&polygons).then_some(polygons)
}

/// The edges between plane regions.
struct Boundary {
    /// For each region its directed boundary edges.
    edges: Vec<Vec<[usize; 2]>>,
    /// Vertices inside a straight edge between two regions.
    is_straight: Vec<bool>,
}

impl Boundary {
    fn new(mesh: &TriangleMesh, table: &EdgeTable, regions: &Regions) -> Option<Self> {
        let mut edges = vec![Vec::new(); regions.normals.len()];
        let mut ends = vec![Vec::new(); mesh.vertices().len()];
        for edge in &table.edges {
            let [forward, backward] = edge.pair()?.map(|facet| regions.of_facet[facet]);
            if forward != backward {
                let [a, b] = edge.ends;
                edges[forward].push([a, b]);
                edges[backward].push([b, a]);
                ends[a].push(b);
                ends[b].push(a);
            }
        }
        let place = |vertex: usize| mesh.vertices()[vertex];
        let straight = |(vertex, others): (usize, &Vec<usize>)| {
            let [before, after] = others[..] else { return false };
            let (a, b) = (place(vertex) - place(before), place(after) - place(vertex));
            a.dot(&b) > 0.0 && a.cross(&b).norm() <= STRAIGHT * a.norm() * b.norm()
        };
        let is_straight = ends.iter().enumerate().map(straight).collect();
        Some(Self { edges, is_straight })
    }
}

/// Directed edges chained to closed loops; `None` if a vertex has several ways on, where a region touches itself.
fn trace_loops(edges: &[[usize; 2]]) -> Option<Vec<Vec<usize>>> {
    let mut next = BTreeMap::new();
    for [from, to] in edges {
        if next.insert(*from, *to).is_some() {
            return None;
        }
    }
    let mut loops = Vec::new();
    while let Some((&start, _)) = next.iter().next() {
        let mut ring = Vec::new();
        let mut at = start;
        while let Some(onward) = next.remove(&at) {
            ring.push(at);
            at = onward;
        }
        if at != start {
            return None;
        }
        loops.push(ring);
    }
    Some(loops)
}

fn area_along(mesh: &TriangleMesh, corners: &[usize], normal: &Point) -> f64 {
    let Some(origin) = corners.first().map(|vertex| mesh.vertices()[*vertex]) else { return 0.0 };
    let arm = |vertex: usize| mesh.vertices()[vertex] - origin;
    0.5 * corners.windows(2).map(|pair| arm(pair[0]).cross(&arm(pair[1]))).sum::<Point>().dot(normal)
}

/// One closed outline from an outer loop and its holes, walking along each bridge twice.
fn join_loops(mesh: &TriangleMesh, mut loops: Vec<Vec<usize>>, normal: &Point) -> Option<Vec<usize>> {
    let area = |ring: &Vec<usize>| area_along(mesh, ring, normal);
    let outer = (0..loops.len()).max_by(|a, b| area(&loops[*a]).total_cmp(&area(&loops[*b])))?;
    let mut outline = loops.swap_remove(outer);
    if loops.iter().any(|ring| area(ring) >= 0.0) {
        return None;
    }
    let place = |vertex: usize| mesh.vertices()[vertex];
    while !loops.is_empty() {
        // The shortest bridge from a hole to the outline crosses neither of them, nor another hole.
        let candidates = loops.iter().enumerate().flat_map(|(hole, ring)| (0..ring.len()).map(move |i| (hole, i)));
        let pairs = candidates.flat_map(|(hole, i)| (0..outline.len()).map(move |j| (hole, i, j)));
        let length = |(hole, i, j): &(usize, usize, usize)| (place(loops[*hole][*i]) - place(outline[*j])).norm();
        let (hole, i, j) = pairs.min_by(|a, b| length(a).total_cmp(&length(b)))?;
        let mut ring = loops.swap_remove(hole);
        ring.rotate_left(i);
        let bridge = [ring[0], outline[j]];
        outline.splice(j + 1..j + 1, ring.into_iter().chain(bridge));
    }
    Some(outline)
}

/// Merges triangles over their common edges while the outcome is convex and has few corners.
fn merge(mesh: &TriangleMesh, triangles: Vec<[usize; 3]>, normal: &Point) -> Vec<Vec<usize>> {
    let mut polygons = triangles.into_iter().map(|triangle| Some(triangle.to_vec())).collect::<Vec<_>>();
    let mut owner = HashMap::new();
    let mut inner = Vec::new();
    for (number, polygon) in polygons.iter().enumerate() {
        for [a, b] in sides(polygon.as_deref().unwrap_or_default()) {
            owner.insert([a, b], number);
            if owner.contains_key(&[b, a]) {
                inner.push([a.min(b), a.max(b)]);
            }
        }
    }
    let length = |[a, b]: &[usize; 2]| (mesh.vertices()[*b] - mesh.vertices()[*a]).norm();
    inner.sort_by(|a, b| length(b).total_cmp(&length(a)).then(a.cmp(b)));
    for [a, b] in inner {
        let (Some(&left), Some(&right)) = (owner.get(&[a, b]), owner.get(&[b, a])) else { continue };
        let (Some(first), Some(second)) = (&polygons[left], &polygons[right]) else { continue };
        if left == right {
            continue;
        }
        let Some(union) = joined(first, second, [a, b]) else { continue };
        if union.len() <= MOST_CORNERS && is_convex(mesh, &union, normal) {
            for side in sides(&union) {
                owner.insert(side, left);
            }
            polygons[left] = Some(union);
            polygons[right] = None;
        }
    }
    polygons.into_iter().flatten().collect()
}

fn sides(corners: &[usize]) -> impl Iterator<Item = [usize; 2]> + '_ {
    corners.iter().zip(corners.iter().cycle().skip(1)).map(|(a, b)| [*a, *b])
}

/// The polygon around both; `first` runs along the edge forward. `None` if they share more than this edge's ends.
fn joined(first: &[usize], second: &[usize], [a, b]: [usize; 2]) -> Option<Vec<usize>> {
    let from = |ring: &[usize], start: usize| {
        let at = ring.iter().position(|vertex| *vertex == start)?;
        Some(ring[at..].iter().chain(&ring[..at]).copied().collect::<Vec<_>>())
    };
    // From b around to a, and from a around to b.
    let (outward, back) = (from(first, b)?, from(second, a)?);
    let union = outward[..outward.len() - 1].iter().chain(&back[..back.len() - 1]).copied().collect::<Vec<_>>();
    let mut sorted = union.clone();
    sorted.sort_unstable();
    sorted.windows(2).all(|pair| pair[0] != pair[1]).then_some(union)
}

fn is_convex(mesh: &TriangleMesh, corners: &[usize], normal: &Point) -> bool {
    let n = corners.len();
    (0..n).all(|i| {
        let [a, b, c] = [0, 1, 2].map(|k| mesh.vertices()[corners[(i + k) % n]]);
        let (u, v) = (b - a, c - b);
        u.cross(&v).dot(normal) >= -STRAIGHT * u.norm() * v.norm() && u.dot(&v) > -0.999 * u.norm() * v.norm()
    })
}

/// Every side of a polygon is once the side of another, the other way round.
fn meet_edge_to_edge(polygons: &[Polygon]) -> bool {
    let mut count = HashMap::new();
    for side in polygons.iter().flat_map(|polygon| sides(&polygon.corners)) {
        *count.entry(side).or_insert(0) += 1;
    }
    count.iter().all(|([a, b], times)| *times == 1 && count.get(&[*b, *a]) == Some(&1))
}
