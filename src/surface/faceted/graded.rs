//! The graded layout of a polyhedron: each convex polygon is cut starwise from its centre to its corners and to the
//! middles of its edges, so that every macro triangle has one crease, and one corner of the body, at most.

use std::collections::HashMap;

use super::corners::{CreaseRole, crease_role};
use super::plane_faces::{Polygon, plane_faces};
use crate::surface::examine::Regions;
use crate::surface::mesh::EdgeTable;
use crate::surface::{Blueprint, Grading, MacroTriangle, Point, TriangleMesh};

/// The graded blueprint of a closed mesh; `None` if its plane faces are too intricate.
pub(super) fn graded(mesh: &TriangleMesh, shell_of_facet: &[usize], crease_deg: f64) -> Option<Blueprint> {
    let table = EdgeTable::new(mesh);
    let regions = Regions::new(mesh, &table);
    let polygons = plane_faces(mesh, &table, &regions)?;
    let mut shell_of_region = vec![0; regions.normals.len()];
    for (facet, region) in regions.of_facet.iter().enumerate() {
        shell_of_region[*region] = shell_of_facet[facet];
    }
    let creases = Creases::new(mesh, &polygons, &regions, crease_deg);
    let faces = smooth_faces(&polygons, &creases);
    let mut stars = Stars { mesh, creases: &creases, vertices: HashMap::new(), triangles: Vec::new() };
    for (polygon, face) in polygons.iter().zip(faces) {
        stars.cut(polygon, face, shell_of_region[polygon.region]);
    }
    Some(Blueprint { charts: Vec::new(), triangles: stars.triangles })
}

/// The edges between polygons.
struct Creases {
    /// For each directed edge the polygon that runs along it.
    owner: HashMap<[usize; 2], usize>,
    is_crease: HashMap<[usize; 2], bool>,
    roles: Vec<CreaseRole>,
}

impl Creases {
    fn new(mesh: &TriangleMesh, polygons: &[Polygon], regions: &Regions, crease_deg: f64) -> Self {
        let mut owner = HashMap::new();
        for (number, polygon) in polygons.iter().enumerate() {
            for side in sides(polygon) {
                owner.insert(side, number);
            }
        }
        let limit = crease_deg.to_radians();
        let normal = |side: [usize; 2]| owner.get(&side).map(|polygon| regions.normals[polygons[*polygon].region]);
        let turn = |[a, b]: [usize; 2]| match (normal([a, b]), normal([b, a])) {
            (Some(n), Some(m)) => n.cross(&m).norm().atan2(n.dot(&m)),
            _ => 0.0,
        };
        let is_crease = owner.keys().map(|side| (*side, turn(*side) >= limit)).collect::<HashMap<_, _>>();
        let mut ends = vec![Vec::new(); mesh.vertices().len()];
        let mut creases = is_crease.iter().filter(|(_, crease)| **crease).map(|(side, _)| *side).collect::<Vec<_>>();
        creases.sort_unstable();
        for [a, b] in creases {
            ends[a].push(mesh.vertices()[b]);
        }
        let roles = ends.iter().zip(mesh.vertices()).map(|(ends, place)| crease_role(place, ends)).collect();
        Self { owner, is_crease, roles }
    }

    fn is_crease(&self, side: [usize; 2]) -> bool {
        self.is_crease.get(&side).copied().unwrap_or(false)
    }
}

fn sides(polygon: &Polygon) -> impl Iterator<Item = [usize; 2]> + '_ {
    let corners = &polygon.corners;
    corners.iter().zip(corners.iter().cycle().skip(1)).map(|(a, b)| [*a, *b])
}

/// Labels polygons that hang together over edges that are no creases.
fn smooth_faces(polygons: &[Polygon], creases: &Creases) -> Vec<usize> {
    let mut faces = vec![usize::MAX; polygons.len()];
    let mut count = 0;
    for first in 0..polygons.len() {
        if faces[first] != usize::MAX {
            continue;
        }
        faces[first] = count;
        let mut stack = vec![first];
        while let Some(polygon) = stack.pop() {
            for [a, b] in sides(&polygons[polygon]).filter(|side| !creases.is_crease(*side)) {
                if let Some(&other) = creases.owner.get(&[b, a]).filter(|other| faces[**other] == usize::MAX) {
                    faces[other] = count;
                    stack.push(other);
                }
            }
        }
        count += 1;
    }
    faces
}

/// What a macro vertex is.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
enum Name {
    Corner(usize),
    Middle(usize, usize),
    Centre(usize),
}

struct Stars<'a> {
    mesh: &'a TriangleMesh,
    creases: &'a Creases,
    vertices: HashMap<Name, usize>,
    triangles: Vec<MacroTriangle>,
}

impl Stars<'_> {
    fn vertex(&mut self, name: Name) -> usize {
        let fresh = self.vertices.len();
        *self.vertices.entry(name).or_insert(fresh)
    }

    fn cut(&mut self, polygon: &Polygon, face: usize, shell: usize) {
        let place = |vertex: usize| self.mesh.vertices()[vertex];
        let centre = centroid(&polygon.corners.iter().map(|vertex| place(*vertex)).collect::<Vec<_>>());
        let centre_vertex = self.vertex(Name::Centre(self.triangles.len()));
        for [a, b] in sides(polygon) {
            let middle = 0.5 * (self.mesh.vertices()[a] + self.mesh.vertices()[b]);
            let middle_vertex = self.vertex(Name::Middle(a.min(b), a.max(b)));
            let crease = self.creases.is_crease([a, b]);
            for (corner, clockwise) in [(a, false), (b, true)] {
                let grading = match (crease, self.creases.roles[corner]) {
                    (true, CreaseRole::Corner) => Grading::Corner,
                    (true, _) => Grading::Edge,
                    (false, CreaseRole::Off) => Grading::Plain,
                    (false, _) => Grading::Vertex,
                };
                let corner_vertex = self.vertex(Name::Corner(corner));
                self.triangles.push(MacroTriangle {
                    chart: None,
                    corners: [self.mesh.vertices()[corner], middle, centre],
                    vertices: [corner_vertex, middle_vertex, centre_vertex],
                    face,
                    shell,
                    grading,
                    clockwise,
                });
            }
        }
    }
}

/// Centroid of the area of a plane convex polygon.
fn centroid(corners: &[Point]) -> Point {
    let Some(origin) = corners.first() else { return Point::zeros() };
    let (mut area, mut moment) = (0.0, Point::zeros());
    for pair in corners.windows(2) {
        let own = (pair[0] - origin).cross(&(pair[1] - origin)).norm();
        area += own;
        moment += own * (pair[0] + pair[1] + origin) / 3.0;
    }
    if area > 0.0 { moment / area } else { *origin }
}
