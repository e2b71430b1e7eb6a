//! The geometry error that a faceted body states, against the drag of the smooth body it stands for.

mod meshes;
mod solving;

use std::f64::consts::PI;

use meshes::{cylinder, globe, icosphere, map, torus};
use slowmote::stokes::solve::{Request, Solution, resistance};
use slowmote::surface::{
    FacetedGeometry, FacetedOptions, Geometry, Point, RawSurface, SurfaceFormat, TriangleMesh, examine, faceted,
    read_surface_bytes, surface_bytes, weld, weld_tolerance,
};
use solving::body;

/// Torques and volumes go as the cube of a length, drags as the length.
const TORQUE_POWER: f64 = 3.0;

/// Meshes of fewer facets are cut once more, so that the solver's error stays below the geometry's.
const FEW_FACETS: usize = 200;

/// Accuracy that the smooth bodies are solved to.
const SMOOTH_ACCURACY: f64 = 1e-3;

/// Through a binary STL file and back, as users' bodies come.
fn through_stl(mesh: &TriangleMesh) -> TriangleMesh {
    let bytes = surface_bytes(mesh, SurfaceFormat::Stl).unwrap();
    let RawSurface { mesh, .. } = read_surface_bytes(&bytes, SurfaceFormat::Stl).unwrap();
    weld(&mesh, weld_tolerance(&mesh)).mesh
}

/// Drags and torques about the centroid over `6 pi` and `8 pi`, with the geometry's and the solver's error, of facets that are
/// read as `geometry`.
struct Read {
    numbers: [f64; 6],
    geometry: f64,
    solver: [f64; 2],
}

fn read(mesh: &TriangleMesh, geometry: FacetedGeometry) -> Read {
    let options = FacetedOptions { geometry: Some(geometry), ..FacetedOptions::default() };
    let body = faceted(mesh, &examine(mesh), &options).unwrap();
    let centroid = body.blueprint.subdivide(2, Geometry::Exact).measure().centroid;
    // Four times as many panels as facets where these are few: what is left is the solver's error, which is stated.
    let facets = mesh.facets().len();
    let elements = Some(if facets < FEW_FACETS { 4 * facets } else { facets });
    let request = Request { elements, geometry: body.panel_geometry, ..Request::default() };
    let solution = resistance(&body.blueprint, centroid, &request, &()).unwrap();
    Read {
        numbers: numbers(&solution),
        geometry: body.relative_geometry_error,
        solver: [solution.error.force, solution.error.torque],
    }
}

fn numbers(solution: &Solution) -> [f64; 6] {
    std::array::from_fn(|k| solution.resistance.matrix[(k, k)] / (PI * if k < 3 { 6.0 } else { 8.0 }))
}

/// The smooth body by its name.
fn smooth(shape: &str) -> [f64; 6] {
    numbers(
        &resistance(&body(shape), Point::zeros(), &Request { accuracy: SMOOTH_ACCURACY, ..Request::default() }, &())
            .unwrap(),
    )
}

/// A named body, its meshes from coarse to fine, and how its axes x, y, z are called by the name.
type Case = (&'static str, Vec<TriangleMesh>, [usize; 3]);

fn cases() -> Vec<Case> {
    let stretched = |levels| map(&icosphere(levels), |x| Point::new(3.0 * x.x, 2.0 * x.y, x.z));
    vec![
        ("sphere:2m", [1, 2, 3].map(icosphere).to_vec(), [0, 1, 2]),
        ("sphere:2m", [8, 16].map(|n| globe(2 * n, n)).to_vec(), [0, 1, 2]),
        ("ellipsoid:6x4x2m", [1, 2, 3].map(stretched).to_vec(), [0, 1, 2]),
        ("ring:4x1.4m", [24, 36, 48].map(|n| torus(2.0, 0.7, n, n / 2)).to_vec(), [0, 1, 2]),
        // Drawn along z where the name has x.
        ("cylinder:3x2m", [12, 24, 48].map(|n| cylinder(1.0, 3.0, n, n / 4)).to_vec(), [1, 2, 0]),
    ]
}

#[test]
fn the_stated_geometry_error_holds_for_the_drag() {
    for (shape, meshes, axes) in cases() {
        let exact = smooth(shape);
        let exact: [f64; 6] = std::array::from_fn(|k| exact[3 * (k / 3) + axes[k % 3]]);
        for mesh in meshes.iter().map(through_stl) {
            for geometry in [FacetedGeometry::Curved, FacetedGeometry::Flat] {
                let Read { numbers, geometry: stated, solver } = read(&mesh, geometry);
                let error = |k: usize| (numbers[k] / exact[k] - 1.0).abs();
                let drag = [0, 1, 2].map(error).into_iter().fold(0.0, f64::max);
                let torque = [3, 4, 5].map(error).into_iter().fold(0.0, f64::max);
                let about = format!(
                    "{shape}, {} facets, {geometry:?}: drag {drag:.1e} of {stated:.1e} + {:.1e}, torque {torque:.1e} of {:.1e} + {:.1e}",
                    mesh.facets().len(),
                    solver[0],
                    TORQUE_POWER * stated,
                    solver[1]
                );
                assert!(drag <= stated + solver[0] + SMOOTH_ACCURACY, "{about}");
                assert!(torque <= TORQUE_POWER * stated + solver[1] + SMOOTH_ACCURACY, "{about}");
            }
        }
    }
}

/// A sphere's 320 facets read as curved give the sphere's drag within 0.1 %, where the facets themselves are 1.1 % off.
#[test]
fn the_drag_of_320_facets_is_that_of_the_sphere() {
    let mesh = through_stl(&icosphere(2));
    let [curved, flat] = [FacetedGeometry::Curved, FacetedGeometry::Flat].map(|geometry| read(&mesh, geometry));
    let error = |read: &Read| (read.numbers[0] - 1.0).abs();
    assert!(error(&curved) < 1e-3, "{:e}", error(&curved));
    assert!(error(&flat) > 5e-3 && error(&flat) < 2e-2, "{:e}", error(&flat));
}
