//! The named shapes: sizes against closed forms, closedness, agreement across charts, creases, names.

mod shapes {
    pub mod suite;
}

use std::collections::{HashMap, HashSet};

use proptest::prelude::*;
use shapes::suite::{Creases, Sample, helix, suite};
use slowmote::surface::shapes::{Hand, HelixSizes, Shape};
use slowmote::surface::{Geometry, Panels, Placement, Point};

/// Agreement of positions that must be the same point, relative to the body's size. Rounding only.
const COINCIDENCE: f64 = 1e-12;

fn size(panels: &Panels) -> f64 {
    let (low, high) = panels.bounding_box();
    (high - low).norm()
}

/// Relative errors of volume and area against the reference.
fn errors(sample: &Sample, n: usize, geometry: Geometry) -> [f64; 2] {
    let measure = sample.shape.blueprint().subdivide(n, geometry).measure();
    [(measure.volume / sample.volume - 1.0).abs(), (measure.area / sample.area - 1.0).abs()]
}

/// Every edge is shared by two panels that run along it in opposite directions, and the surface has the right genus.
fn assert_closed(name: &str, panels: &Panels, euler: isize) {
    let mut edges = HashSet::new();
    for panel in &panels.panels {
        let [a, b, c] = panel.vertices;
        for edge in [(a, b), (b, c), (c, a)] {
            assert!(edges.insert(edge), "{name}: edge {edge:?} is run along twice in the same direction");
        }
    }
    assert!(edges.iter().all(|(a, b)| edges.contains(&(*b, *a))), "{name}: a panel has no neighbour");
    let characteristic = panels.vertex_count as isize - edges.len() as isize / 2 + panels.panels.len() as isize;
    assert_eq!(characteristic, euler, "{name}: Euler characteristic");
}

/// Panels that share a vertex or an edge agree where it is, all along it.
fn assert_coincident(name: &str, panels: &Panels) {
    let size = size(panels);
    let mut places: HashMap<usize, Point> = HashMap::new();
    let mut edges: HashMap<(usize, usize), [Point; 3]> = HashMap::new();
    let reference = [Point::new(0.0, 0.0, 0.0), Point::new(1.0, 0.0, 0.0), Point::new(0.0, 1.0, 0.0)];
    for panel in &panels.panels {
        for (k, x) in panel.patch.corners().into_iter().enumerate() {
            let first = places.entry(panel.vertices[k]).or_insert(x);
            assert!((*first - x).norm() < COINCIDENCE * size, "{name}: vertex {}", panel.vertices[k]);
            let (from, to) = (k, (k + 1) % 3);
            let ends = (panel.vertices[from], panel.vertices[to]);
            let along = [0.2, 0.5, 0.8].map(|s| {
                let q = reference[from] * (1.0 - s) + reference[to] * s;
                panel.patch.at(q.x, q.y).position
            });
            if let Some(other) = edges.insert(ends, along) {
                panic!("{name}: edge {ends:?} twice: {other:?}");
            }
            if let Some(back) = edges.get(&(ends.1, ends.0)) {
                for (x, y) in along.iter().zip(back.iter().rev()) {
                    assert!(
                        (x - y).norm() < COINCIDENCE * size,
                        "{name}: along edge {ends:?}, {}",
                        (x - y).norm() / size
                    );
                }
            }
        }
    }
    // Different vertices are different points, but for bodies that touch themselves.
    let mut seen = HashSet::new();
    for x in places.values() {
        assert!(seen.insert(x.map(|c| (c / size * 1e11).round() as i64)), "{name}: two vertices at {x:?}");
    }
}

#[test]
fn surfaces_are_closed_and_charts_agree() {
    for sample in suite() {
        for n in [1, 2, 3, 4] {
            for geometry in [Geometry::Exact, Geometry::Curved, Geometry::Flat] {
                let panels = sample.shape.blueprint().subdivide(n, geometry);
                assert_eq!(panels.panels.len(), sample.macros * n * n, "{}", sample.name());
                assert_closed(&sample.name(), &panels, sample.euler);
                assert_coincident(&sample.name(), &panels);
            }
        }
    }
}

#[test]
fn macro_edges_are_told_apart_by_their_ends() {
    for sample in suite() {
        let mut edges: HashMap<(usize, usize), usize> = HashMap::new();
        for triangle in sample.shape.blueprint().triangles {
            let [a, b, c] = triangle.vertices;
            for (from, to) in [(a, b), (b, c), (c, a)] {
                assert_ne!(from, to);
                *edges.entry((from.min(to), from.max(to))).or_default() += 1;
            }
        }
        assert!(edges.values().all(|&count| count == 2), "{}", sample.name());
    }
}

#[test]
fn exact_geometry_converges_to_the_closed_forms() {
    for sample in suite() {
        let [coarse, fine] = [4, 8].map(|n| errors(&sample, n, Geometry::Exact));
        let name = sample.name();
        for (k, what) in ["volume", "area"].into_iter().enumerate() {
            // The rule has degree 8, so the error falls like n^-9 or faster until rounding ends it; the grading towards
            // a cone's tip shrinks the panels there, where the integrand is not smooth, like n^-3 only, so n^-6 in area.
            let factor = if sample.pointed { 50.0 } else { 200.0 };
            let falls = fine[k] < coarse[k] / factor || fine[k] < 1e-11;
            assert!(falls && fine[k] < sample.tolerance, "{name}: {what} {:.2e} {:.2e}", coarse[k], fine[k]);
        }
    }
}

#[test]
fn curved_and_flat_geometry_converge_with_their_orders() {
    for sample in suite().into_iter().filter(|sample| sample.curved && sample.moderate()) {
        let name = sample.name();
        for (geometry, order) in [(Geometry::Curved, 4.0), (Geometry::Flat, 2.0)] {
            let [coarse, fine] = [8, 16].map(|n| errors(&sample, n, geometry));
            for (k, what) in ["volume", "area"].into_iter().enumerate() {
                let observed = (coarse[k] / fine[k]).log2();
                let converged = observed > order - 0.6 || fine[k] < 1e-11;
                assert!(converged, "{name}, {geometry:?}: {what} order {observed:.2}, {:.2e}", fine[k]);
            }
        }
    }
}

#[test]
fn centroids_are_at_the_origin() {
    for sample in suite() {
        let panels = sample.shape.blueprint().subdivide(6, Geometry::Exact);
        let offset = panels.measure().centroid.norm() / size(&panels);
        assert!(offset < 1e-7, "{}: {offset:e}", sample.name());
    }
}

#[test]
fn extents_are_the_dimensions() {
    for sample in suite() {
        let panels = sample.shape.blueprint().subdivide(8, Geometry::Exact);
        let (low, high) = panels.bounding_box();
        for axis in 0..3 {
            let (found, wanted) = (high[axis] - low[axis], sample.extents[axis]);
            assert!((found / wanted - 1.0).abs() < sample.extent_slack, "{}: {axis} {found:e}", sample.name());
        }
    }
}

/// Tangents against central differences; the panel's own scale sets the step.
#[test]
fn tangents_are_the_derivatives_of_positions() {
    const STEP: f64 = 1e-4;
    for sample in suite() {
        for panel in sample.shape.blueprint().subdivide(2, Geometry::Exact).panels {
            for (u, v) in [(0.3, 0.3), (0.1, 0.7), (0.6, 0.15), (0.05, 0.05)] {
                let at = panel.patch.at(u, v);
                let difference = |du: f64, dv: f64| {
                    let (ahead, behind) = (panel.patch.at(u + du, v + dv), panel.patch.at(u - du, v - dv));
                    (ahead.position - behind.position) / (2.0 * STEP)
                };
                for (tangent, slope) in [(at.tangent_u, difference(STEP, 0.0)), (at.tangent_v, difference(0.0, STEP))] {
                    let error = (tangent - slope).norm() / tangent.norm().max(slope.norm());
                    assert!(error < 1e-5, "{}: {error:e} at {u}, {v}", sample.name());
                }
            }
        }
    }
}

/// No panel folds: its area normal turns by less than a right angle, and its area ratio stays within bounds.
#[test]
fn panels_are_not_folded_or_pinched() {
    for sample in suite() {
        for panel in sample.shape.blueprint().subdivide(2, Geometry::Exact).panels {
            let points = [(0.02, 0.02), (0.96, 0.02), (0.02, 0.96), (0.33, 0.33), (0.5, 0.0), (0.5, 0.5), (0.0, 0.5)];
            let normals = points.map(|(u, v)| panel.patch.at(u, v).area_normal());
            let middle = normals[3].normalize();
            let areas = normals.map(|normal| normal.norm());
            let (low, high) = areas.iter().fold((f64::INFINITY, 0.0_f64), |(l, h), a| (l.min(*a), h.max(*a)));
            assert!(normals.iter().all(|normal| normal.dot(&middle) > 0.0), "{}: folded", sample.name());
            if !sample.pointed {
                assert!(high < 60.0 * low, "{}: pinched, {:.1}", sample.name(), high / low);
            }
        }
    }
}

#[test]
fn nodes_are_doubled_on_creases_only() {
    for sample in suite() {
        for n in [2, 5] {
            let panels = sample.shape.blueprint().subdivide(n, Geometry::Exact);
            let extra = panels.node_count - panels.vertex_count;
            let expected = match sample.creases {
                Creases::None => 0,
                Creases::Rims { count, around } => count * around * n,
                // Vertices within edges have one node more than one, corners one for each further face.
                Creases::Edges { edges, pieces, corners, faces_at_corner } => {
                    pieces * n - edges + corners * (faces_at_corner - 1)
                }
                Creases::Contact => 1,
            };
            assert_eq!(extra, expected, "{}, n = {n}", sample.name());
        }
    }
}

/// Linear functions of the macro triangle's own coordinates survive the way from coarse to fine: on flat faces these
/// are linear functions in space, and on any face the weights sum to one.
#[test]
fn coarsenings_reproduce_linear_functions() {
    for sample in suite() {
        let fine_panels = sample.shape.blueprint().subdivide(8, Geometry::Exact);
        assert_eq!(fine_panels.coarsenings.len(), 3);
        // Nodes of each level by place: those of the coarse levels are found as the rows with a single weight of one.
        let mut places = vec![None; fine_panels.node_count];
        let mut flat = vec![true; fine_panels.node_count];
        for panel in &fine_panels.panels {
            for (k, x) in panel.patch.corners().into_iter().enumerate() {
                places[panel.nodes[k]] = Some(x);
                flat[panel.nodes[k]] &= panel.patch.as_flat().is_some();
            }
        }
        let mut places = places.into_iter().map(Option::unwrap).collect::<Vec<Point>>();
        let size = size(&fine_panels);
        for coarsening in &fine_panels.coarsenings {
            assert_eq!(coarsening.rows.len(), places.len());
            let mut coarse = vec![(Point::zeros(), false); coarsening.coarse_count];
            for (fine, row) in coarsening.rows.iter().enumerate() {
                if let [(node, 1.0)] = row[..] {
                    coarse[node] = (places[fine], flat[fine]);
                }
            }
            for (fine, row) in coarsening.rows.iter().enumerate() {
                let total: f64 = row.iter().map(|(_, weight)| weight).sum();
                assert!((total - 1.0).abs() < 1e-12, "{}: weights sum to {total}", sample.name());
                assert!(row.iter().all(|(_, weight)| (-1e-9..=1.0 + 1e-9).contains(weight)), "{}", sample.name());
                if flat[fine] && row.iter().all(|(node, _)| coarse[*node].1) {
                    let x: Point = row.iter().map(|(node, weight)| coarse[*node].0 * *weight).sum();
                    assert!((x - places[fine]).norm() < COINCIDENCE * size, "{}: node {fine}", sample.name());
                }
            }
            (places, flat) = coarse.into_iter().unzip();
        }
    }
}

/// The left-handed helix is the right-handed one's mirror image, and the right-handed one turns from y to z, like an
/// ordinary screw, while it climbs along x.
#[test]
fn hands_are_mirror_images() {
    let [right, left] = [Hand::Right, Hand::Left].map(|hand| {
        let panels = helix(0.4, 2e-6, 1e-6, 0.2e-6, hand).blueprint().subdivide(2, Geometry::Exact).panels;
        panels.iter().flat_map(|panel| panel.patch.corners()).collect::<Vec<_>>()
    });
    for x in &left {
        let mirrored = Point::new(x.x, x.y, -x.z);
        assert!(right.iter().any(|y| (y - mirrored).norm() < COINCIDENCE * 1e-6));
    }
    assert!(right.iter().map(|x| x.x * x.z).sum::<f64>() > 0.0);
}

#[test]
fn placing_moves_charts_and_flat_pieces_alike() {
    let turn = nalgebra::Rotation3::from_euler_angles(0.3, -0.7, 1.1).into_inner();
    let placement = Placement { scale: 2e5, turn, shift: Point::new(3.0, -1.0, 2.0) };
    for sample in suite() {
        let panels = sample.shape.blueprint().placed(&placement).subdivide(4, Geometry::Exact);
        assert_closed(&sample.name(), &panels, sample.euler);
        let measure = panels.measure();
        assert!((measure.volume / (sample.volume * 8e15) - 1.0).abs() < 1e-6, "{}", sample.name());
        assert!((measure.centroid - placement.shift).norm() < 1e-6 * size(&panels), "{}", sample.name());
    }
}

/// Lengths over four decades, in metres.
fn length() -> impl Strategy<Value = f64> {
    (-7.0..-3.0).prop_map(|exponent: f64| 10.0_f64.powf(exponent))
}

/// Any shape that the constructors accept.
fn any_shape() -> impl Strategy<Value = Shape> {
    let helix = (0.1..6.0, length(), 0.2..20.0, 0.01..0.9).prop_map(|(turns, diameter, pitch, thickness)| {
        let (pitch, thickness) = (pitch * diameter, thickness * diameter);
        Shape::helix(HelixSizes { turns, pitch, diameter, thickness, hand: Hand::Left })
    });
    let shape = prop_oneof![
        length().prop_map(Shape::sphere),
        [length(), length(), length()].prop_map(Shape::ellipsoid),
        [length(), length(), length()].prop_map(Shape::cuboid),
        (length(), length()).prop_map(|(a, b)| Shape::rod(a.max(b), a.min(b))),
        (length(), length()).prop_map(|(a, b)| Shape::cylinder(a, b)),
        (length(), length()).prop_map(|(a, b)| Shape::disc(a, b)),
        (length(), 0.001..0.999).prop_map(|(a, b)| Shape::ring(a, a * b)),
        (length(), length()).prop_map(|(a, b)| Shape::cone(a, b)),
        length().prop_map(Shape::red_cell),
        length().prop_map(Shape::doublet),
        length().prop_map(Shape::octahedron),
        length().prop_map(Shape::tetrahedron),
        helix,
    ];
    shape.prop_filter_map("refused", Result::ok)
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 300, ..ProptestConfig::default() })]

    #[test]
    fn any_accepted_shape_makes_a_sound_surface(shape in any_shape()) {
        let blueprint = shape.blueprint();
        prop_assert!(blueprint.triangles.len() <= 2000, "{}: {}", shape.name(), blueprint.triangles.len());
        let panels = blueprint.subdivide(4, Geometry::Exact);
        let euler = match shape {
            Shape::Ring(_) => 0,
            Shape::Doublet(_) => 3,
            _ => 2,
        };
        assert_closed(&shape.name(), &panels, euler);
        assert_coincident(&shape.name(), &panels);
        let (measure, exact) = (panels.measure(), shape.exact_measure());
        prop_assert!((measure.volume / exact.volume - 1.0).abs() < 1e-5, "{}: {measure:?} {exact:?}", shape.name());
        if let Some(area) = exact.area {
            prop_assert!((measure.area / area - 1.0).abs() < 1e-5, "{}: {measure:?} {exact:?}", shape.name());
        }
        prop_assert!(measure.centroid.norm() < 1e-6 * size(&panels), "{}: {measure:?}", shape.name());
    }

    #[test]
    fn names_read_back(shape in any_shape()) {
        let again = Shape::parse(&shape.name()).map_err(|error| TestCaseError::fail(error.to_string()))?;
        prop_assert_eq!(again.name(), shape.name());
        for (read, made) in again.dimensions().iter().zip(shape.dimensions()) {
            prop_assert!((read / made - 1.0).abs() < 1e-11);
        }
    }
}
