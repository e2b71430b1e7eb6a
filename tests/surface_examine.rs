//! Examination: sizes against closed forms, and each flaw found, placed, refused and mended.

mod meshes;

use std::f64::consts::PI;

use meshes::{cuboid, cylinder, globe, gridded_cuboid, icosphere, mesh, moved, together, torus, turned_inside_out};
use proptest::prelude::*;
use slowmote::surface::{
    CharacterKind, MendOptions, Mended, MeshError, Orientation, Point, SurfaceError, TriangleMesh, examine, mend,
    usable,
};

fn refusal(body: &TriangleMesh) -> SurfaceError {
    let error = usable(body, &examine(body)).expect_err("an unusable surface");
    assert!(!error.hint().is_empty());
    error
}

fn is_usable(body: &TriangleMesh) -> bool {
    usable(body, &examine(body)).is_ok()
}

fn without(body: &TriangleMesh, dropped: &[usize]) -> TriangleMesh {
    body.filtered(|facet| !dropped.contains(&facet))
}

fn with_facet(body: &TriangleMesh, facet: [usize; 3]) -> TriangleMesh {
    let mut facets = body.facets().to_vec();
    facets.push(facet);
    mesh(body.vertices().to_vec(), facets)
}

#[test]
fn a_mesh_must_be_one() {
    let corner = Point::zeros();
    let missing = MeshError::NoSuchVertex { facet: 0, vertex: 3, vertex_count: 1 };
    assert_eq!(TriangleMesh::new(vec![corner], vec![[0, 0, 3]]), Err(missing));
    let bad = Point::new(0.0, f64::NAN, 0.0);
    assert_eq!(TriangleMesh::new(vec![corner, bad], vec![]), Err(MeshError::NotFinite { vertex: 1 }));
    let groups = TriangleMesh::with_groups(vec![corner], vec![[0; 3]; 2], vec![1]);
    assert_eq!(groups, Err(MeshError::GroupCount { groups: 1, facets: 2 }));
}

#[test]
fn sizes_of_a_box_far_from_the_origin() {
    // Closed forms: volume and area of a box, its centroid, Euler's characteristic.
    let found = examine(&moved(&cuboid([2.0, 3.0, 5.0]), [1e6, -1e6, 1e6]));
    assert!((found.volume - 30.0).abs() < 1e-6);
    assert!((found.area - 62.0).abs() < 1e-6);
    assert!((found.centroid - Point::new(1e6 + 1.0, -1e6 + 1.5, 1e6 + 2.5)).norm() < 1e-6);
    assert_eq!((found.vertices, found.edges, found.facets), (8, 18, 12));
    assert_eq!((found.genus, found.orientation, found.shells.len()), (Some(0), Orientation::Outward, 1));
    assert_eq!(found.edge_lengths, (2.0, (9.0_f64 + 25.0).sqrt()));
    assert_eq!(found.creases.0, 12);
    assert!((found.creases.1 - 40.0).abs() < 1e-6);
    assert!((found.sharpest_turn_deg - 90.0).abs() < 1e-6);
    assert!(found.is_closed() && found.intersections.complete);
}

#[test]
fn sizes_of_a_ring_converge_to_the_smooth_one() {
    // Pappus: volume 2 pi^2 R r^2, area 4 pi^2 R r; the facets' error falls with the square of their size.
    let errors = [24, 48].map(|n| {
        let found = examine(&torus(3.0, 1.0, 2 * n, n));
        assert_eq!(found.genus, Some(1));
        [found.volume / (6.0 * PI * PI) - 1.0, found.area / (12.0 * PI * PI) - 1.0]
    });
    for (coarse, fine) in errors[0].iter().zip(errors[1]) {
        assert!((coarse / fine - 4.0).abs() < 0.2, "{coarse} {fine}");
    }
}

#[test]
fn genus_counts_handles_over_all_shells() {
    let two = together(&[
        torus(3.0, 1.0, 12, 8),
        moved(&torus(3.0, 1.0, 12, 8), [20.0, 0.0, 0.0]),
        moved(&cuboid([1.0; 3]), [0.0, 9.0, 9.0]),
    ]);
    let found = examine(&two);
    assert_eq!((found.genus, found.shells.len()), (Some(2), 3));
    assert!(is_usable(&two));
}

#[test]
fn open_surfaces_are_refused_with_the_hole() {
    let open = without(&icosphere(2), &[7, 100, 101, 102, 103]);
    let found = examine(&open);
    assert_eq!(found.holes.len(), 2);
    assert_eq!(found.holes.iter().map(|hole| hole.vertices.len()).min(), Some(3));
    assert!(!found.is_closed());
    let SurfaceError::Open { place, edges, count, .. } = refusal(&open) else { panic!("not open") };
    assert_eq!(count, 2);
    assert!(edges >= 5 && (place.norm() - 1.0).abs() < 0.2);
    assert!(
        refusal(&without(&cuboid([1.0; 3]), &[0, 1]))
            .to_string()
            .contains("a hole of 4 edges, 4.0 long around, near (0.5, 0.5, 0.0)")
    );
}

#[test]
fn orientation_is_judged_and_never_mended_silently() {
    let sphere = icosphere(1);
    assert_eq!(examine(&turned_inside_out(&sphere)).orientation, Orientation::Inward);
    assert_eq!(refusal(&turned_inside_out(&sphere)), SurfaceError::InsideOut);

    let mut facets = sphere.facets().to_vec();
    for facet in [5, 6, 40] {
        facets[facet].swap(0, 1);
    }
    let mixed = mesh(sphere.vertices().to_vec(), facets);
    let found = examine(&mixed);
    assert_eq!(found.orientation, Orientation::Mixed);
    assert_eq!(found.shells[0].flipped, [5, 6, 40]);
    assert!(matches!(refusal(&mixed), SurfaceError::MixedOrientation { facet: 5, count: 3, .. }));
    assert!((found.volume - examine(&sphere).volume).abs() < 1e-12);

    // One of two shells inside out.
    let two = together(&[sphere.clone(), turned_inside_out(&moved(&sphere, [5.0, 0.0, 0.0]))]);
    assert!(matches!(refusal(&two), SurfaceError::MixedOrientation { facet: 80, count: 80, .. }));
}

#[test]
fn a_one_sided_surface_is_refused() {
    // A Klein bottle (Euler's characteristic 0): a torus grid whose last column is glued on upside down.
    let (n, m) = (8, 6);
    let at = |i: usize, j: usize| if i < n { i * m + j % m } else { (m - j % m) % m };
    let facets = (0..n * m).flat_map(|k| {
        let (i, j) = (k / m, k % m);
        let [a, b, c, d] = [at(i, j), at(i + 1, j), at(i + 1, j + 1), at(i, j + 1)];
        [[a, b, c], [a, c, d]]
    });
    let klein = mesh(torus(3.0, 1.0, n, m).vertices().to_vec(), facets.collect());
    let found = examine(&klein);
    assert_eq!((found.orientation, found.genus), (Orientation::Impossible, None));
    assert_eq!(refusal(&klein), SurfaceError::OneSided { facet: 0 });
}

#[test]
fn edges_with_more_than_two_facets() {
    // Two boxes that share an edge.
    let two = together(&[cuboid([1.0; 3]), moved(&cuboid([1.0; 3]), [1.0, 1.0, 0.0])]);
    let (joined, done) = mend(&two, &MendOptions::default());
    assert!(matches!(done[..], [Mended::Welded { vertices: 2, .. }]));
    let SurfaceError::NonManifoldEdge { place, facets, count } = refusal(&joined) else { panic!("manifold") };
    assert_eq!((place, facets, count), (Point::new(1.0, 1.0, 0.5), 4, 1));
}

#[test]
fn pinched_vertices_are_refused_within_a_shell_and_allowed_between_shells() {
    // Two balls that touch in a pole.
    let upper = moved(&globe(8, 6), [0.0, 0.0, 2.0]);
    let two = mend(&together(&[globe(8, 6), upper]), &MendOptions::default()).0;
    let found = examine(&two);
    assert_eq!((found.pinched_vertices.len(), found.shells.len()), (1, 2));
    assert!(found.pinched_vertices[0].between_shells);
    assert!(is_usable(&two));

    // The two poles of one ball brought together from outside: a ring pinched to nothing.
    let ring = torus(1.0, 1.0, 12, 8);
    let pinched = mend(&ring, &MendOptions { close_holes: false, ..MendOptions::default() }).0;
    let found = examine(&pinched);
    assert!(found.pinched_vertices.iter().any(|vertex| !vertex.between_shells));
    assert!(matches!(refusal(&pinched), SurfaceError::PinchedVertex { count: 1, .. }));
}

#[test]
fn duplicate_degenerate_and_sliver_facets() {
    let cube = cuboid([1.0; 3]);
    let [a, b, c] = cube.facets()[3];
    let twice = with_facet(&cube, [c, a, b]);
    assert_eq!(examine(&twice).duplicate_facets, [[3, 12]]);
    assert!(matches!(refusal(&twice), SurfaceError::DuplicateFacet { facets: [3, 12], count: 1, .. }));
    assert!(matches!(refusal(&with_facet(&cube, [a, a, b])), SurfaceError::DegenerateFacet { facet: 12, .. }));

    let thin = |aspect: f64| cuboid([1.0, 1.0, 1.0 / aspect]);
    assert!(examine(&thin(50.0)).slivers.is_empty());
    assert_eq!(examine(&thin(1000.0)).slivers.len(), 8);
    assert!(is_usable(&thin(5e3)));
    assert!(matches!(refusal(&thin(2e4)), SurfaceError::AbsurdSliver { count: 8, .. }));
}

#[test]
fn self_intersections_are_found_and_placed() {
    // Two boxes through each other.
    let two = together(&[cuboid([1.0; 3]), moved(&cuboid([1.0; 3]), [0.5, 0.25, 0.125])]);
    let found = examine(&two);
    assert!(!found.intersections.pairs.is_empty());
    for pair in &found.intersections.pairs {
        assert!(pair.facets[0] < 12 && pair.facets[1] >= 12);
        let inside =
            |low: Point| (0..3).all(|k| pair.place[k] >= low[k] - 1e-9 && pair.place[k] <= low[k] + 1.0 + 1e-9);
        assert!(inside(Point::zeros()) && inside(Point::new(0.5, 0.25, 0.125)));
    }
    assert!(matches!(refusal(&two), SurfaceError::SelfIntersecting { complete: true, .. }));

    // One vertex of a ball pushed out through the other side.
    let ball = icosphere(2);
    let far = ball.vertices()[0] * -1.5;
    let pushed = mesh(
        ball.vertices().iter().enumerate().map(|(k, x)| if k == 0 { far } else { *x }).collect(),
        ball.facets().to_vec(),
    );
    assert!(!examine(&pushed).intersections.pairs.is_empty());
}

#[test]
fn boxes_that_touch_count_as_intersecting_and_near_ones_do_not() {
    let beside = |gap: f64| together(&[cuboid([1.0; 3]), moved(&cuboid([1.0; 3]), [1.0 + gap, 0.25, 0.3])]);
    assert!(matches!(refusal(&beside(0.0)), SurfaceError::SelfIntersecting { .. }));
    assert!(is_usable(&beside(1e-12)));
}

#[test]
fn folded_facets_intersect() {
    // A flat cushion: both sides in one plane.
    let square = [[0.0, 0.0], [1.0, 0.0], [1.0, 1.0], [0.0, 1.0]];
    let mut vertices = square.map(|[x, y]| Point::new(x, y, 0.0)).to_vec();
    vertices.extend([Point::new(0.4, 0.5, 0.0), Point::new(0.6, 0.5, 0.0)]);
    let fan = |apex: usize| (0..4).map(move |k| [k, (k + 1) % 4, apex]);
    let facets = fan(4).chain(fan(5).map(|[a, b, c]| [b, a, c])).collect();
    let cushion = mesh(vertices, facets);
    assert!(!examine(&cushion).intersections.pairs.is_empty());
    assert!(matches!(refusal(&cushion), SurfaceError::NoVolume { .. }));
}

#[test]
fn no_false_alarms_on_coplanar_neighbours_in_single_precision() {
    // A finely cut box turned askew and rounded: neighbours lie in one plane up to rounding, on either side of it.
    let turn = nalgebra::Rotation3::from_euler_angles(0.3, 0.7, 1.1);
    let askew = meshes::map(&gridded_cuboid([1.0, 2.0, 3.0], 12), |x| {
        (turn * x + Point::new(10.0, 20.0, 30.0)).map(|c| f64::from(c as f32))
    });
    assert!(examine(&askew).intersections.pairs.is_empty());
    assert!(is_usable(&askew));
}

#[test]
fn inner_pieces_are_named_and_dropped_when_asked() {
    let hollow = turned_inside_out(&meshes::map(&icosphere(1), |x| 0.5 * x));
    let pearl = meshes::map(&icosphere(1), |x| 0.2 * x);
    let body = together(&[hollow, icosphere(2), pearl]);
    let found = examine(&body);
    assert_eq!(found.shells.iter().map(|shell| shell.inside).collect::<Vec<_>>(), [Some(1), None, Some(0)]);
    let ball = |r: f64| examine(&meshes::map(&icosphere(1), |x| r * x)).volume;
    assert!((found.volume - (examine(&icosphere(2)).volume - ball(0.5) + ball(0.2))).abs() < 1e-12);
    assert_eq!(refusal(&body), SurfaceError::Nested { inner_facet: 0, outer_facet: 80, count: 2 });
    let (mended, done) = mend(&body, &MendOptions { orient: false, ..MendOptions::default() });
    assert!(done.contains(&Mended::DroppedInner { shells: 2, facets: 160 }));
    assert!(is_usable(&mended));
    assert_eq!(mended.facets().len(), 320);
}

#[test]
fn nothing_and_almost_nothing() {
    assert_eq!(refusal(&TriangleMesh::default()), SurfaceError::Empty);
    let other = usable(&cuboid([1.0; 3]), &examine(&icosphere(0)));
    assert_eq!(other, Err(SurfaceError::OtherMesh { examined: 20, facets: 12 }));
    assert_eq!(refusal(&mesh(vec![Point::x()], vec![])), SurfaceError::Empty);
    let point = mesh(vec![Point::x(); 3], vec![[0, 1, 2]]);
    assert_eq!(refusal(&point), SurfaceError::AbsurdSize { size: 0.0 });
    let line = mesh(vec![Point::zeros(), Point::x(), 3.0 * Point::x()], vec![[0, 1, 2]]);
    assert!(matches!(refusal(&line), SurfaceError::DegenerateFacet { facet: 0, .. }));
    let single = mesh(vec![Point::zeros(), Point::x(), Point::y()], vec![[0, 1, 2]]);
    assert!(matches!(refusal(&single), SurfaceError::Open { edges: 3, .. }));
}

#[test]
fn sizes_at_the_ends_of_double_precision_are_refused() {
    for size in [1e-200, 1e-80, 1e80, 1e200, 1e308] {
        let body = meshes::map(&icosphere(1), |x| x * size);
        assert!(
            matches!(refusal(&body), SurfaceError::AbsurdSize { .. } | SurfaceError::DegenerateFacet { .. }),
            "{size}"
        );
        let _ = mend(&body, &MendOptions::default());
    }
    for size in [1e-45, 1e-6, 1e45] {
        assert!(is_usable(&meshes::map(&icosphere(1), |x| x * size)), "{size}");
    }
}

#[test]
fn mending_repairs_a_battered_ball() {
    let ball = icosphere(2);
    let mut facets = ball.facets().to_vec();
    facets.retain(|facet| *facet != ball.facets()[17] && !facet.contains(&20));
    for facet in facets.iter_mut().step_by(7) {
        facet.swap(1, 2);
    }
    facets.push(facets[3]);
    facets.push([4, 4, 9]);
    // Every facet with vertices of its own, as in STL.
    let soup = facets.iter().flat_map(|corners| corners.map(|v| ball.vertices()[v])).collect::<Vec<_>>();
    let battered = mesh(soup, (0..facets.len()).map(|k| [3 * k, 3 * k + 1, 3 * k + 2]).collect());
    assert!(!is_usable(&battered));
    let (mended, done) = mend(&battered, &MendOptions::default());
    assert!(is_usable(&mended), "{}", refusal(&mended));
    assert!((examine(&mended).volume / examine(&ball).volume - 1.0).abs() < 0.02);
    let text = done.iter().map(ToString::to_string).collect::<Vec<_>>();
    for start in [
        "Merged",
        "Dropped 1 facet that was there twice",
        "Dropped 1 facet without area",
        "Turned",
        "Closed the hole near",
    ] {
        assert!(text.iter().any(|line| line.starts_with(start)), "{start}: {text:?}");
    }
}

#[test]
fn mending_does_only_what_it_may() {
    let open = without(&icosphere(2), &[7]);
    let nothing = MendOptions {
        weld: false,
        drop_bad_facets: false,
        orient: false,
        close_holes: false,
        drop_inner_shells: false,
        ..MendOptions::default()
    };
    assert_eq!(mend(&open, &nothing), (open.clone(), vec![]));
    let (left, done) = mend(&open, &MendOptions { largest_hole: 0.01, ..MendOptions::default() });
    assert_eq!(left.facets().len(), 319);
    assert!(matches!(done[..], [Mended::LeftHole { .. }]));
    assert_eq!(mend(&icosphere(1), &MendOptions::default()).1, []);
}

#[test]
fn mending_cuts_facets_at_a_vertex_on_their_edge() {
    // A cube with a vertex in the middle of an edge on one side, and a facet without area to fill the gap.
    let cube = cuboid([1.0; 3]);
    let mut vertices = cube.vertices().to_vec();
    vertices.push(Point::new(0.5, 0.0, 0.0));
    let mut facets = cube.facets().to_vec();
    let split =
        facets.iter().position(|corners| corners.contains(&0) && corners.contains(&1) && corners.contains(&5)).unwrap();
    assert_eq!(facets[split], [0, 1, 5]);
    facets[split] = [0, 8, 5];
    facets.extend([[8, 1, 5], [0, 1, 8]]);
    let gapless = mesh(vertices, facets);
    assert!(matches!(refusal(&gapless), SurfaceError::DegenerateFacet { .. }));
    let (mended, done) = mend(&gapless, &MendOptions::default());
    assert_eq!(done, [Mended::CutAtVertex { facets: 1 }]);
    assert!(is_usable(&mended));
    assert!((examine(&mended).volume - 1.0).abs() < 1e-15);
}

#[test]
fn polyhedra_and_sampled_smooth_bodies_are_told_apart() {
    use CharacterKind::{FacetedSmooth, Polyhedral};
    let roof = meshes::prism(
        &[[0.0, 0.0], [4.0, 0.0], [4.0, 1.0], [2.0, 1.5], [0.0, 1.0]],
        &[[0, 1, 2], [0, 2, 3], [0, 3, 4]],
    );
    let pyramid_roof = {
        let mut body = cuboid([1.0; 3]);
        let mut vertices = body.vertices().to_vec();
        vertices.push(Point::new(0.5, 0.5, 1.1));
        let top = body.facets().iter().copied().filter(|f| f.iter().all(|v| *v >= 4)).collect::<Vec<_>>();
        let mut facets = body.facets().iter().copied().filter(|f| !top.contains(f)).collect::<Vec<_>>();
        facets.extend([[4, 5, 8], [5, 7, 8], [7, 6, 8], [6, 4, 8]]);
        body = mesh(vertices, facets);
        assert!(is_usable(&body));
        body
    };
    let cases = [
        ("cube", cuboid([1.0; 3]), Polyhedral),
        ("finely cut box", gridded_cuboid([1.0, 2.0, 3.0], 9), Polyhedral),
        ("tetrahedron", meshes::tetrahedron(), Polyhedral),
        ("icosahedron", meshes::icosahedron(), Polyhedral),
        ("octagonal prism", cylinder(1.0, 2.0, 8, 1), Polyhedral),
        ("house", roof, Polyhedral),
        ("block with a shallow pyramid", pyramid_roof, Polyhedral),
        ("coarse ball", icosphere(1), FacetedSmooth),
        ("fine ball", icosphere(4), FacetedSmooth),
        ("globe", globe(16, 8), FacetedSmooth),
        ("twelve-sided cylinder", cylinder(1.0, 3.0, 12, 1), FacetedSmooth),
        ("cylinder", cylinder(1.0, 3.0, 48, 6), FacetedSmooth),
        ("ring", torus(3.0, 1.0, 24, 12), FacetedSmooth),
        ("rounded cube", meshes::rounded_cube(0.2, 4), FacetedSmooth),
    ];
    for (name, body, kind) in cases {
        let character = examine(&body).character;
        assert_eq!(character.kind, kind, "{name}: {}", character.reason);
        assert!(!character.reason.is_empty());
    }
}

#[test]
fn many_facets_around_one_vertex_end_in_time() {
    let fan = 3000;
    let cone = mend(&cylinder(1.0, 1.0, fan, 1), &MendOptions::default()).0;
    let found = examine(&cone);
    assert!(found.intersections.pairs.is_empty());
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(100))]

    #[test]
    fn any_mesh_can_be_examined_and_mended(
        vertices in prop::collection::vec(prop::array::uniform3(-2..3_i8), 1..12),
        facets in prop::collection::vec(prop::array::uniform3(any::<prop::sample::Index>()), 0..30),
    ) {
        let count = vertices.len();
        // Small whole numbers give every degeneracy there is.
        let vertices = vertices.iter().map(|x| Point::from(x.map(f64::from))).collect::<Vec<_>>();
        let facets = facets.iter().map(|corners| corners.map(|corner| corner.index(count))).collect();
        let body = mesh(vertices, facets);
        let _ = usable(&body, &examine(&body));
        let (mended, done) = mend(&body, &MendOptions::default());
        let _ = usable(&mended, &examine(&mended));
        for line in done {
            prop_assert!(line.to_string().ends_with('.'));
        }
    }

    #[test]
    fn sizes_do_not_depend_on_place_turn_or_order(angle in 0.0..6.0_f64, shift in prop::array::uniform3(-10.0..10.0_f64), by in 0..200_usize) {
        let body = meshes::map(&torus(3.0, 1.0, 10, 7), |x| Point::new(x.x, 0.7 * x.y, x.z));
        let turn = nalgebra::Rotation3::from_euler_angles(angle, 2.0 * angle, 1.0);
        let moved = meshes::map(&body, |x| turn * x + Point::from(shift));
        let mut facets = moved.facets().to_vec();
        facets.rotate_left(by % 140);
        let (before, after) = (examine(&body), examine(&mesh(moved.vertices().to_vec(), facets)));
        prop_assert!((after.volume / before.volume - 1.0).abs() < 1e-12);
        prop_assert!((after.area / before.area - 1.0).abs() < 1e-12);
        prop_assert!((after.centroid - (turn * before.centroid + Point::from(shift))).norm() < 1e-12);
        prop_assert_eq!(after.genus, before.genus);
        prop_assert_eq!(after.character.kind, before.character.kind);
    }
}

#[test]
fn texts_count_and_place_as_people_do() {
    let cube = cuboid([1.0; 3]);
    let far = moved(&cube, [1e6, 0.0, 0.0]);
    let one_hole = refusal(&without(&far, &[0, 1])).to_string();
    assert!(
        one_hole.ends_with("a hole of 4 edges, 4.0 long around, near (1000000.5, 0.5, 0.0), beside facet 3"),
        "{one_hole}"
    );
    let two = refusal(&without(&cube, &[0, 1, 2, 3])).to_string();
    assert!(two.ends_with("(2 such holes)"), "{two}");
    let ball = without(&icosphere(2), &[3]);
    let done = mend(&ball, &MendOptions::default()).1;
    let text = done.iter().map(ToString::to_string).collect::<String>();
    assert!(text.starts_with("Closed the hole near (") && text.ends_with("long around, with 1 facet."), "{text}");
    // What mending can't do has a hint of its own, which doesn't send the user back to mending.
    for error in [refusal(&without(&cube, &[0, 1])), refusal(&turned_inside_out(&cube))] {
        assert!(error.hint().contains("mending") && !error.hint_beyond_mending().contains("mending"));
    }
}

#[test]
fn each_edge_has_its_turn() {
    let found = examine(&cuboid([2.0, 3.0, 5.0]));
    assert_eq!(found.turns.len(), found.edges);
    assert_eq!(found.creases_from(40.0), found.creases);
    assert_eq!(found.creases_from(91.0), (0, 0.0));
    let (all, length) = found.creases_from(0.0);
    let diagonals = [[2.0_f64, 3.0], [2.0, 5.0], [3.0, 5.0]].map(|[a, b]| 2.0 * a.hypot(b)).iter().sum::<f64>();
    assert!(all == 18 && (length - 40.0 - diagonals).abs() < 1e-9);
}
