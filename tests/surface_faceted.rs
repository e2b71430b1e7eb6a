//! From facets to the body they stand for: layouts of polyhedra, accuracy of curved patches, and honest estimates.

mod meshes;

use std::collections::{HashMap, HashSet};
use std::f64::consts::PI;

use meshes::{cuboid, cylinder, globe, gridded_cuboid, icosphere, torus};
use proptest::prelude::*;
use slowmote::surface::{
    CharacterKind, Chart, FacetedBody, FacetedGeometry, FacetedLayout, FacetedOptions, Geometry, Grading, Measure,
    Panels, Patch, Point, SixNodeChart, SurfaceError, SurfaceFormat, TriangleMesh, examine, faceted,
    read_surface_bytes, surface_bytes, weld, weld_tolerance,
};

fn body(mesh: &TriangleMesh, options: FacetedOptions) -> FacetedBody {
    faceted(mesh, &examine(mesh), &options).expect("a usable mesh")
}

fn automatic(mesh: &TriangleMesh) -> FacetedBody {
    body(mesh, FacetedOptions::default())
}

fn of_geometry(mesh: &TriangleMesh, geometry: FacetedGeometry) -> FacetedBody {
    body(mesh, FacetedOptions { geometry: Some(geometry), ..FacetedOptions::default() })
}

fn measure(body: &FacetedBody) -> Measure {
    body.blueprint.subdivide(1, body.panel_geometry).measure()
}

/// Through a binary STL file and back, as users' bodies come.
fn through_stl(mesh: &TriangleMesh) -> TriangleMesh {
    let raw = read_surface_bytes(&surface_bytes(mesh, SurfaceFormat::Stl).unwrap(), SurfaceFormat::Stl).unwrap().mesh;
    weld(&raw, weld_tolerance(&raw)).mesh
}

/// Every edge has two panels that run along it in opposite directions, and meet there.
fn assert_closed(panels: &Panels) {
    let mut edges = HashMap::new();
    for panel in &panels.panels {
        for k in 0..3 {
            let middle = [(0.5, 0.0), (0.5, 0.5), (0.0, 0.5)][k];
            let place = panel.patch.at(middle.0, middle.1).position;
            let direction = (panel.vertices[k], panel.vertices[(k + 1) % 3]);
            assert!(edges.insert(direction, place).is_none(), "an edge is there twice");
        }
    }
    for ((a, b), place) in &edges {
        let other = edges.get(&(*b, *a)).expect("a neighbour");
        assert!((place - other).norm() < 1e-12, "a gap of {}", (place - other).norm());
    }
    // The outward normals of a closed surface cancel.
    let rule = slowmote::surface::triangle_rule::degree_8();
    let total: Point = panels
        .panels
        .iter()
        .flat_map(|panel| rule.iter().map(|at| panel.patch.at(at.u, at.v).area_normal() * at.weight))
        .sum();
    assert!(total.norm() < 1e-11, "{total}");
}

fn faces(body: &FacetedBody) -> usize {
    body.blueprint.triangles.iter().map(|triangle| triangle.face).collect::<HashSet<_>>().len()
}

#[test]
fn the_cube_of_twelve_facets_is_six_faces_of_eight_graded_triangles() {
    let cube = automatic(&through_stl(&cuboid([1.0; 3])));
    assert_eq!((cube.geometry.geometry, cube.layout.layout), (FacetedGeometry::Flat, FacetedLayout::Graded));
    assert_eq!(cube.blueprint.triangles.len(), 48);
    assert!(cube.blueprint.triangles.iter().all(|triangle| triangle.grading == Grading::Corner));
    assert_eq!((cube.layout.graded_triangles, cube.layout.as_is_triangles), (Some(48), 12));
    assert_eq!((faces(&cube), cube.relative_geometry_error), (6, 0.0));
    let panels = cube.blueprint.subdivide(4, cube.panel_geometry);
    // Nodes: 48 n^2 panels in six faces that are closed discs: 4 n^2 + 4 n / 2 ... counted by Euler's formula.
    assert_eq!(panels.panels.len(), 768);
    assert_eq!(panels.vertex_count, 768 / 2 + 2);
    let boundary = 8 * 4;
    assert_eq!(panels.node_count, 6 * ((128 + boundary) / 2 + 1));
    assert_closed(&panels);
    let size = panels.measure();
    assert!((size.volume - 1.0).abs() < 1e-13 && (size.area - 6.0).abs() < 1e-12);
    assert!((size.centroid - Point::repeat(0.5)).norm() < 1e-13);
}

#[test]
fn the_layout_of_a_polyhedron_does_not_depend_on_how_its_faces_were_cut() {
    for n in [2, 3, 7] {
        let cut = automatic(&through_stl(&gridded_cuboid([1.0; 3], n)));
        assert_eq!(cut.blueprint.triangles.len(), 48, "{n}");
        assert_closed(&cut.blueprint.subdivide(3, cut.panel_geometry));
    }
}

#[test]
fn polyhedra_are_graded_and_exact() {
    let l = [[0.0, 0.0], [2.0, 0.0], [2.0, 1.0], [1.0, 1.0], [1.0, 2.0], [0.0, 2.0]];
    let l_block = meshes::prism(&l, &[[0, 1, 2], [0, 2, 3], [0, 3, 4], [0, 4, 5]]);
    let edge = 8.0_f64.sqrt();
    let cases = [
        ("tetrahedron", meshes::tetrahedron(), edge.powi(3) / 72.0_f64.sqrt(), 4),
        ("flat box", cuboid([3.0, 2.0, 0.5]), 3.0, 6),
        ("L block", l_block, 3.0, 8),
        ("hexagonal prism", cylinder(1.0, 2.0, 6, 1), 3.0 * 3.0_f64.sqrt(), 8),
        ("icosahedron", meshes::icosahedron(), 2.536150710, 20),
    ];
    for (name, mesh, volume, face_count) in cases {
        let body = automatic(&mesh);
        assert_eq!(body.layout.layout, FacetedLayout::Graded, "{name}: {}", body.layout.reason);
        assert_eq!(faces(&body), face_count, "{name}");
        for n in [1, 4] {
            let panels = body.blueprint.subdivide(n, body.panel_geometry);
            assert_closed(&panels);
            assert!((panels.measure().volume / volume - 1.0).abs() < 1e-9, "{name}");
        }
    }
}

#[test]
fn faces_with_holes_are_graded_too() {
    // A square frame: a box with a square hole through it.
    let square = |h: f64| [[-h, -h], [h, -h], [h, h], [-h, h]];
    let mut vertices = Vec::new();
    for z in [0.0, 1.0] {
        for h in [2.0, 1.0] {
            vertices.extend(square(h).map(|[x, y]| Point::new(x, y, z)));
        }
    }
    let mut facets = Vec::new();
    let mut quad = |[a, b, c, d]: [usize; 4]| facets.extend([[a, b, c], [a, c, d]]);
    for k in 0..4 {
        let l = (k + 1) % 4;
        quad([k, l, 8 + l, 8 + k]);
        quad([4 + l, 4 + k, 12 + k, 12 + l]);
        quad([8 + k, 8 + l, 12 + l, 12 + k]);
        quad([k, 4 + k, 4 + l, l]);
    }
    let frame = meshes::mesh(vertices, facets);
    assert_eq!(examine(&frame).genus, Some(1));
    let body = automatic(&frame);
    assert_eq!((body.layout.layout, faces(&body)), (FacetedLayout::Graded, 10), "{}", body.layout.reason);
    let panels = body.blueprint.subdivide(3, body.panel_geometry);
    assert_closed(&panels);
    assert!((panels.measure().volume - 12.0).abs() < 1e-12);
}

#[test]
fn a_crease_that_runs_straight_through_a_corner_point_is_an_edge_there() {
    // A step: the long lower edges pass the points where the upper block begins.
    let outline = [[0.0, 0.0], [2.0, 0.0], [2.0, 1.0], [1.0, 1.0], [1.0, 2.0], [0.0, 2.0]];
    let mesh = meshes::prism(&outline, &[[0, 1, 3], [1, 2, 3], [0, 3, 4], [0, 4, 5]]);
    let body = automatic(&mesh);
    let gradings = body.blueprint.triangles.iter().map(|triangle| triangle.grading);
    let kinds = gradings.fold(HashMap::new(), |mut kinds, grading| {
        *kinds.entry(format!("{grading:?}")).or_insert(0) += 1;
        kinds
    });
    // 18 edges of the body, each with two faces and two halves; the cuts across both L faces start at corners.
    assert_eq!(kinds.get("Corner"), Some(&72));
    assert!(kinds.contains_key("Vertex"));
    assert_closed(&body.blueprint.subdivide(2, body.panel_geometry));
}

#[test]
fn a_ball_of_320_facets_gives_area_and_volume_within_a_thousandth() {
    let ball = automatic(&through_stl(&icosphere(2)));
    assert_eq!((ball.geometry.geometry, ball.panel_geometry), (FacetedGeometry::Curved, Geometry::Curved));
    assert_eq!((faces(&ball), ball.blueprint.triangles.len()), (1, 320));
    let size = measure(&ball);
    // Measured: -1.42e-4 and -9.4e-5.
    assert!((size.volume / (4.0 * PI / 3.0) - 1.0).abs() < 2e-4);
    assert!((size.area / (4.0 * PI) - 1.0).abs() < 2e-4);
    assert_closed(&ball.blueprint.subdivide(1, ball.panel_geometry));
}

/// Worst of the relative errors in volume and area, as changes of length.
fn size_error(size: &Measure, volume: f64, area: f64) -> f64 {
    ((size.volume / volume - 1.0) / 3.0).abs().max((size.area / area - 1.0).abs() / 2.0)
}

/// Volume between a body's panels and the true surface, each panel's share counted as positive, over area and radius of
/// the ball of equal volume.
fn displacement(body: &FacetedBody, distance: &dyn Fn(&Point) -> f64) -> f64 {
    let panels = body.blueprint.subdivide(1, body.panel_geometry);
    let (mut sum, mut area) = (0.0, 0.0);
    for panel in &panels.panels {
        let mut own = 0.0;
        for point in slowmote::surface::triangle_rule::degree_8() {
            let at = panel.patch.at(point.u, point.v);
            let weight = point.weight * at.area_normal().norm();
            own += weight * distance(&at.position);
            area += weight;
        }
        sum += own.abs();
    }
    sum / area / (0.75 * panels.measure().volume / PI).cbrt()
}

type Distance = Box<dyn Fn(&Point) -> f64>;

/// A body's sampled surface at three facet sizes, each half of the one before; the true surface's distance; the true
/// volume and area.
struct Case {
    name: &'static str,
    meshes: [TriangleMesh; 3],
    distance: Distance,
    sizes: [f64; 2],
}

fn smooth_cases() -> [Case; 6] {
    let ball = || -> Distance { Box::new(|x| x.norm() - 1.0) };
    // To first order in the distance.
    let spheroid: Distance = Box::new(|x| {
        let level = x.x * x.x / 4.0 + x.y * x.y + x.z * x.z - 1.0;
        level / Point::new(x.x / 2.0, 2.0 * x.y, 2.0 * x.z).norm()
    });
    let ring: Distance = Box::new(|x| (x.xy().norm() - 2.0).hypot(x.z) - 0.7);
    let drum = || -> Distance {
        Box::new(|x| {
            let distances = [x.xy().norm() - 1.0, -x.z, x.z - 3.0];
            distances.into_iter().fold(9.0, |a: f64, b| if a.abs() < b.abs() { a } else { b })
        })
    };
    let stretched = |levels| meshes::map(&icosphere(levels), |x| Point::new(2.0 * x.x, x.y, x.z));
    // Closed forms: ball, prolate spheroid of axis ratio 2, torus by Pappus, cylinder.
    let e = 0.75_f64.sqrt();
    let (of_ball, of_drum) = ([4.0 * PI / 3.0, 4.0 * PI], [3.0 * PI, 8.0 * PI]);
    let of_spheroid = [8.0 * PI / 3.0, 2.0 * PI * (1.0 + 2.0 / e * e.asin())];
    let of_ring = [1.96 * PI * PI, 5.6 * PI * PI];
    let case = |name, meshes, distance, sizes| Case { name, meshes, distance, sizes };
    [
        case("sphere", [2, 3, 4].map(icosphere), ball(), of_ball),
        case("spheroid", [2, 3, 4].map(stretched), spheroid, of_spheroid),
        case("globe", [8, 16, 32].map(|n| globe(2 * n, n)), ball(), of_ball),
        case("ring", [1, 2, 4].map(|k| torus(2.0, 0.7, 24 * k, 12 * k)), ring, of_ring),
        case("drawn cylinder", [16, 32, 64].map(|n| cylinder(1.0, 3.0, n, 1)), drum(), of_drum),
        case("cut cylinder", [16, 32, 64].map(|n| cylinder(1.0, 3.0, n, n / 4)), drum(), of_drum),
    ]
}

#[test]
fn curved_patches_converge_with_the_third_power_or_better_and_estimates_hold() {
    for Case { name, meshes, distance, sizes: [volume, area] } in smooth_cases() {
        let mut displacements = Vec::new();
        for mesh in meshes.iter().map(through_stl) {
            let bodies = [FacetedGeometry::Curved, FacetedGeometry::Flat].map(|geometry| of_geometry(&mesh, geometry));
            assert_closed(&bodies[0].blueprint.subdivide(1, Geometry::Curved));
            let displaced = bodies.each_ref().map(|body| displacement(body, &*distance));
            let estimates = bodies.each_ref().map(|body| body.relative_geometry_error);
            let errors = bodies.each_ref().map(|body| size_error(&measure(body), volume, area));
            let about = format!("{name}, {} facets: {errors:?} {displaced:?} {estimates:?}", mesh.facets().len());
            // A ring's hydrodynamic radius, of which the estimate is, depends less on its volume than a ball's.
            assert!(errors[0] <= estimates[0] && 0.9 * errors[1] <= estimates[1], "{about}");
            // Half as much again as the displacement is meant, for uneven traction.
            assert!(estimates[0] < 18.0 * displaced[0] && estimates[1] < 2.0 * displaced[1], "{about}");
            assert!(displaced[0] < 0.12 * displaced[1], "{about}");
            displacements.push(displaced);
        }
        for pair in displacements.windows(2) {
            let orders = [0, 1].map(|k| f64::log2(pair[0][k] / pair[1][k]));
            // Measured: 4 on balls and spheroids, 3.1 on the ring, 2.7 and more on cylinders, which begin at 1e-5.
            assert!(orders[0] > 2.5, "{name}: curved patches of order {}", orders[0]);
            assert!((orders[1] - 2.0).abs() < 0.25, "{name}: flat facets of order {}", orders[1]);
        }
    }
}

#[test]
fn rims_stay_sharp_and_caps_plane() {
    let body = of_geometry(&through_stl(&cylinder(1.0, 3.0, 24, 1)), FacetedGeometry::Curved);
    assert_eq!(faces(&body), 3);
    let panels = body.blueprint.subdivide(1, body.panel_geometry);
    for panel in &panels.panels {
        let corners = panel.patch.corners();
        for cap in [0.0, 3.0] {
            if corners.iter().all(|x| (x.z - cap).abs() < 1e-6) {
                let inside = panel.patch.at(0.3, 0.3).position;
                assert!((inside.z - cap).abs() < 1e-6, "{inside}");
            }
        }
    }
    // Middles of rim edges lie on the circle.
    let on_rim = |x: &Point| x.z.abs() < 1e-6 && x.xy().norm() > 0.999;
    let sixes = panels.panels.iter().filter_map(|panel| match &panel.patch {
        Patch::SixNode([a, b, _, ab, ..]) if on_rim(a) && on_rim(b) && (a - b).norm() < 0.3 => Some(ab.xy().norm()),
        _ => None,
    });
    let radii = sixes.collect::<Vec<_>>();
    assert!(!radii.is_empty());
    assert!(radii.iter().all(|radius| (radius - 1.0).abs() < 1e-6), "{radii:?}");
}

#[test]
fn plane_sides_beside_roundings_stay_plane() {
    let r = 0.3;
    let side: f64 = 1.0 - r;
    let volume = 8.0 * side.powi(3) + 24.0 * side * side * r + 6.0 * PI * r * r * side + 4.0 * PI / 3.0 * r.powi(3);
    let area = 24.0 * side * side + 12.0 * PI * r * side + 4.0 * PI * r * r;
    for n in [2, 4, 8] {
        let body = of_geometry(&meshes::rounded_cube(r, n), FacetedGeometry::Curved);
        let error = size_error(&measure(&body), volume, area);
        assert!(error < 6e-3 / (n * n) as f64 && error < body.relative_geometry_error, "{n}: {error}");
        let panels = body.blueprint.subdivide(1, body.panel_geometry);
        let flat = panels.panels.iter().filter(|panel| panel.patch.corners().iter().all(|x| x.z == 1.0));
        let heights = flat.map(|panel| panel.patch.at(0.33, 0.33).position.z).collect::<Vec<_>>();
        assert_eq!(heights.len(), 2);
        assert!(heights.iter().all(|z| (z - 1.0).abs() < 2e-3), "{heights:?}");
    }
}

#[test]
fn a_cube_stays_a_cube_in_curved_geometry() {
    for mesh in [cuboid([1.0; 3]), gridded_cuboid([1.0; 3], 4)] {
        let body = of_geometry(&mesh, FacetedGeometry::Curved);
        let size = measure(&body);
        assert!((size.volume - 1.0).abs() < 1e-12 && (size.area - 6.0).abs() < 1e-12);
        assert_eq!(faces(&body), 6);
        assert!(body.relative_geometry_error < 1e-12);
    }
}

#[test]
fn cutting_a_curved_body_does_not_change_it() {
    let ring = automatic(&torus(3.0, 1.0, 24, 12));
    let sizes = [1, 2, 3].map(|n| ring.blueprint.subdivide(n, ring.panel_geometry).measure());
    for size in &sizes[1..] {
        assert!((size.volume / sizes[0].volume - 1.0).abs() < 1e-12);
        assert!((size.area / sizes[0].area - 1.0).abs() < 1e-6);
    }
    let nodes = [[0.0, 0.0, 0.0], [1.0, 0.0, 0.0], [0.0, 1.0, 0.0], [0.5, 0.0, 0.1], [0.5, 0.5, 0.2], [0.0, 0.5, 0.1]];
    let chart = SixNodeChart::new(nodes.map(Point::from));
    let patch = Patch::SixNode(*chart.nodes());
    let (position, jacobian) = chart.at(&Point::new(0.2, 0.3, 0.0));
    let at = patch.at(0.2, 0.3);
    assert_eq!((position, jacobian.column(0).into_owned()), (at.position, at.tangent_u));
}

#[test]
fn what_is_asked_for_is_done_and_said() {
    let ball = icosphere(2);
    let flat = of_geometry(&ball, FacetedGeometry::Flat);
    assert_eq!((flat.geometry.geometry, flat.layout.layout), (FacetedGeometry::Flat, FacetedLayout::AsIs));
    assert!(flat.geometry.reason.contains("as asked for"));
    assert!(flat.relative_geometry_error > 5e-3);

    let graded = FacetedOptions { layout: Some(FacetedLayout::Graded), ..FacetedOptions::default() };
    let curved = body(&ball, graded);
    assert_eq!(curved.layout.layout, FacetedLayout::AsIs);
    assert_eq!(curved.notes, ["The graded layout was asked for, but curved patches are not graded."]);

    let plain =
        body(&cuboid([1.0; 3]), FacetedOptions { layout: Some(FacetedLayout::AsIs), ..FacetedOptions::default() });
    assert_eq!(plain.blueprint.triangles.len(), 12);
    assert_eq!(faces(&plain), 6);

    let smooth = body(&cuboid([1.0; 3]), FacetedOptions { crease_deg: Some(120.0), ..FacetedOptions::default() });
    assert_eq!(faces(&smooth), 1);
}

#[test]
fn large_polyhedra_keep_their_facets() {
    let many =
        (0..20).map(|k| meshes::moved(&meshes::icosahedron(), [3.0 * f64::from(k), 0.0, 0.0])).collect::<Vec<_>>();
    let mesh = meshes::together(&many);
    let body = automatic(&mesh);
    assert_eq!((body.geometry.character, body.layout.layout), (CharacterKind::Polyhedral, FacetedLayout::AsIs));
    assert_eq!((body.layout.graded_triangles, body.blueprint.triangles.len()), (Some(2400), 400));
    let shells = body.blueprint.triangles.iter().map(|triangle| triangle.shell).collect::<HashSet<_>>();
    assert_eq!(shells.len(), 20);
}

#[test]
fn unusable_meshes_come_no_further() {
    let open = icosphere(1).filtered(|facet| facet != 3);
    let error = faceted(&open, &examine(&open), &FacetedOptions::default()).unwrap_err();
    assert!(matches!(error, SurfaceError::Open { .. }));
}

#[test]
fn extreme_options_are_harmless() {
    for angle in [f64::NAN, -5.0, 0.0, 1e9, f64::INFINITY] {
        for geometry in [FacetedGeometry::Flat, FacetedGeometry::Curved] {
            let options = FacetedOptions { crease_deg: Some(angle), geometry: Some(geometry), layout: None };
            for mesh in [icosphere(1), cylinder(1.0, 1.0, 12, 2), meshes::tetrahedron()] {
                let body = body(&mesh, options);
                assert_closed(&body.blueprint.subdivide(1, body.panel_geometry));
            }
        }
    }
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(24))]

    #[test]
    fn bodies_do_not_depend_on_place_and_turn(angle in 0.1..3.0_f64, shift in prop::array::uniform3(-3.0..3.0_f64)) {
        let turn = nalgebra::Rotation3::from_euler_angles(angle, 0.5 * angle, 1.0);
        for mesh in [cylinder(1.0, 2.0, 16, 2), torus(3.0, 1.0, 16, 10), cuboid([1.0, 2.0, 3.0])] {
            let (before, after) = (automatic(&mesh), automatic(&meshes::map(&mesh, |x| turn * x + Point::from(shift))));
            prop_assert_eq!(before.blueprint.triangles.len(), after.blueprint.triangles.len());
            let (a, b) = (measure(&before), measure(&after));
            prop_assert!((a.volume / b.volume - 1.0).abs() < 1e-10);
            prop_assert!((a.area / b.area - 1.0).abs() < 1e-10);
            prop_assert!((before.relative_geometry_error - after.relative_geometry_error).abs() < 1e-10);
        }
    }

    #[test]
    fn rough_surfaces_give_closed_bodies(bumps in prop::collection::vec(-0.3..0.3_f64, 162), flat in any::<bool>()) {
        let ball = icosphere(2);
        let vertices = ball.vertices().iter().zip(&bumps).map(|(x, bump)| x * (1.0 + bump)).collect();
        let rough = meshes::mesh(vertices, ball.facets().to_vec());
        let geometry = if flat { FacetedGeometry::Flat } else { FacetedGeometry::Curved };
        let body = of_geometry(&rough, geometry);
        assert_closed(&body.blueprint.subdivide(2, body.panel_geometry));
        prop_assert!(body.relative_geometry_error.is_finite());
    }
}
