//! What every resistance must be, whatever the body: symmetric, covariant, monotone, and independent of how the system
//! is solved.

mod collocation;
mod solving;

use nalgebra::{Matrix6, Rotation3};
use slowmote::stokes::quadrature::PairRules;
use slowmote::stokes::rigid::Resistance;
use slowmote::stokes::solve::{Factor, Request, SolveError, resistance, resistance_of_panels};
use slowmote::surface::{Geometry, Placement, Point};
use solving::{body, cut, errors, moved, turn, with};

const BODIES: [(&str, usize); 7] = [
    ("ellipsoid:3x2x1m", 2),
    ("cube:1m", 2),
    ("cylinder:2x1m", 1),
    ("disc:2x0.2m", 1),
    ("ring:3x1m", 2),
    ("redcell:2m", 1),
    ("cone:1x1m", 1),
];

fn relative_difference(a: &Matrix6<f64>, b: &Matrix6<f64>) -> f64 {
    (a - b).norm() / a.norm()
}

/// Both eliminate the same matrix; its condition is at most 1e8 here, and 1e8 times the arithmetic's 1e-16 is 1e-8 in the
/// traction, but the resistance is the matrix's energy, whose error is the square's size.
#[test]
fn lu_and_cholesky_agree() {
    for (shape, cuts) in BODIES {
        let blueprint = body(shape);
        let [lu, cholesky] = [Factor::Lu, Factor::Cholesky].map(|factor| {
            let request = Request { factor: Some(factor), ..Request::default() };
            let solution = with(&blueprint, cuts, Geometry::Exact, &request);
            assert_eq!(solution.statistics.factor, factor);
            solution.resistance.matrix
        });
        let difference = relative_difference(&lu, &cholesky);
        assert!(difference < 1e-9, "{shape}: {difference:e}");
    }
}

/// The pressure constant is not in the drag: a shift ten times smaller or larger moves the answer by less than a hundredth of
/// the error that the discretisation leaves.
#[test]
fn the_null_space_shift_does_not_show() {
    for (shape, cuts) in BODIES {
        let blueprint = body(shape);
        let solve = |shift: f64| with(&blueprint, cuts, Geometry::Exact, &Request { shift, ..Request::default() });
        let usual = solve(1.0);
        for shift in [0.1, 10.0] {
            let difference = relative_difference(&usual.resistance.matrix, &solve(shift).resistance.matrix);
            let error = usual.error.force.min(usual.error.torque);
            assert!(difference < 0.01 * error.max(1e-6), "{shape}: {difference:e} {error:e}");
        }
    }
}

/// The mean normal traction is the pressure constant that the shift sets to zero.
#[test]
fn the_traction_carries_no_arbitrary_pressure() {
    let solution = cut(&body("sphere:2m"), 2, Geometry::Exact);
    for tractions in &solution.tractions {
        // Stokes (1851): the traction of a translating sphere is 3/2a everywhere, along the velocity.
        for (k, traction) in tractions[..3].iter().enumerate() {
            assert!((traction - Point::ith(k, 1.5)).norm() < 1e-3, "{traction:?}");
        }
    }
}

/// The quadrature's own error, seen against rules that are far finer in every respect, is far below the discretisation's.
#[test]
fn quadrature_is_not_the_bottleneck() {
    for (shape, cuts, share) in [
        ("ellipsoid:3x2x1m", 1, 0.05),
        ("cube:1m", 1, 0.02),
        ("cylinder:2x1m", 1, 0.05),
        ("disc:2x0.1m", 1, 0.05),
        ("box:4x4x0.1m", 1, 0.05),
    ] {
        let blueprint = body(shape);
        let [standard, fine] = [PairRules::standard(), PairRules::fine()].map(|rules| {
            with(&blueprint, cuts, Geometry::Exact, &Request { rules: Some(rules), ..Request::default() })
        });
        let better = cut(&blueprint, 2 * cuts, Geometry::Exact);
        let quadrature = relative_difference(&standard.resistance.matrix, &fine.resistance.matrix);
        let discretisation = relative_difference(&better.resistance.matrix, &fine.resistance.matrix);
        assert!(quadrature < share * discretisation, "{shape}: {quadrature:e} of {discretisation:e}");
    }
}

#[test]
fn a_resistance_is_symmetric_and_positive() {
    for (shape, cuts) in BODIES {
        let matrix = cut(&body(shape), cuts, Geometry::Exact).resistance.matrix;
        assert_eq!(matrix, matrix.transpose(), "{shape}");
        assert!(matrix.cholesky().is_some(), "{shape}");
    }
}

/// Turning, scaling and moving the body does to the resistance what it must; rounding may decide which of two equal edges
/// is cut first, so the two differ by the quadrature's own error.
#[test]
fn a_resistance_is_covariant() {
    let scale = 2.5;
    let shift = Point::new(0.3, -4.0, 7.0);
    for shape in ["ellipsoid:3x2x1m", "cone:1x1m"] {
        let blueprint = body(shape);
        let plain = cut(&blueprint, 1, Geometry::Exact).resistance;
        let placed = moved(&blueprint, scale, turn(), shift).subdivide(1, Geometry::Exact);
        let request = Request { rules: Some(PairRules::standard()), ..Request::default() };
        let solution = resistance_of_panels(placed, shift, &request, &()).unwrap();
        let expected = plain.turned(&turn()).scaled(1.0, scale);
        assert_eq!(solution.resistance.reference, shift);
        let difference = relative_difference(&expected.matrix, &solution.resistance.matrix);
        assert!(difference < 1e-5, "{shape}: {difference:e}");
    }
}

/// The order in which panels are listed is no part of the question.
#[test]
fn the_order_of_panels_does_not_matter() {
    let mut panels = body("cylinder:2x1m").subdivide(1, Geometry::Exact);
    let solve =
        |panels| resistance_of_panels(panels, Point::zeros(), &Request::default(), &()).unwrap().resistance.matrix;
    let straight = solve(panels.clone());
    panels.panels.reverse();
    // The order of summation changes, and with it which of two equal panels is integrated over first.
    let difference = relative_difference(&straight, &solve(panels));
    assert!(difference < 1e-6, "{difference:e}");
}

#[test]
fn the_number_of_threads_does_not_matter() {
    let solve = |threads: usize| {
        let pool = rayon::ThreadPoolBuilder::new().num_threads(threads).build().unwrap();
        pool.install(|| cut(&body("cube:1m"), 2, Geometry::Exact).resistance.matrix)
    };
    // The assembly sums in one fixed order; the factorisation may divide its work, which leaves rounding.
    assert!(relative_difference(&solve(1), &solve(2)) < 1e-12);
}

/// Galerkin's energy is the drag, so it rises as elements are added: each refinement gives a lower bound.
#[test]
fn drag_rises_with_refinement() {
    for shape in ["cube:1m", "octahedron:1m", "ellipsoid:3x2x1m"] {
        let blueprint = body(shape);
        let coarse = cut(&blueprint, 2, Geometry::Exact);
        let fine = cut(&blueprint, 4, Geometry::Exact);
        let mut levels = vec![fine.resistance.matrix, coarse.resistance.matrix];
        levels.extend(&coarse.coarser);
        for pair in levels.windows(2) {
            for k in 0..6 {
                assert!(pair[0][(k, k)] > pair[1][(k, k)] * (1.0 - 1e-7), "{shape}, motion {k}");
            }
        }
    }
}

/// Hill & Power (1956): a body drags no more than one that encloses it.
#[test]
fn an_enclosed_body_drags_less() {
    let least = |matrix: &Matrix6<f64>| {
        let smallest =
            |block: usize| matrix.fixed_view::<3, 3>(3 * block, 3 * block).into_owned().symmetric_eigenvalues().min();
        [smallest(0), smallest(1)]
    };
    let cube = cut(&body("cube:1m"), 2, Geometry::Exact).resistance.matrix;
    let inside = cut(&body("sphere:1m"), 2, Geometry::Exact).resistance.matrix;
    let around = cut(&body("sphere:1.7320508m"), 2, Geometry::Exact).resistance.matrix;
    assert!(least(&(cube - inside)).into_iter().all(|value| value > 0.0));
    assert!(least(&(around - cube)).into_iter().all(|value| value > 0.0));
}

/// The stated errors against exact values, body by body; the rule knows nothing of the body.
#[test]
fn stated_errors_hold() {
    let cube = [0.674631, 0.674631, 0.674631, 0.320576, 0.320576, 0.320576];
    for cuts in [2, 4] {
        let cases = [
            (cut(&body("sphere:2m"), cuts, Geometry::Exact), [1.0; 6]),
            (cut(&body("cube:1m"), cuts, Geometry::Exact), cube),
        ];
        for (solution, exact) in cases {
            let [drag, torque] = errors(&solution, exact);
            assert!(drag <= solution.error.force && torque <= solution.error.torque, "{cuts}: {drag:e} {torque:e}");
        }
    }
}

/// A second implementation that shares nothing with the solver but the closed form of one integral: constant traction,
/// collocated at centroids. Its error is of first order at edges; extrapolated with the exponent of the 270-degree
/// edge it must meet the Galerkin value.
#[test]
fn constant_collocation_tends_to_the_same_cube() {
    let drag = |cells: usize| collocation::drag_of_a_cube(cells);
    let [coarse, fine] = [4, 8].map(drag);
    let ratio = 2.0_f64.powf(1.089);
    let extrapolated = (ratio * fine - coarse) / (ratio - 1.0);
    assert!((extrapolated / 0.674631 - 1.0).abs() < 4e-3, "{coarse} {fine} {extrapolated}");
}

#[test]
fn too_large_a_system_is_refused_before_it_is_made() {
    let request = Request { elements: Some(2_000_000), ..Request::default() };
    let error = resistance(&body("sphere:2m"), Point::zeros(), &request, &()).unwrap_err();
    let SolveError::TooLarge { unknowns, needed, available } = error else { panic!("{error}") };
    assert!(unknowns > 2_000_000 && needed > available);
}

/// The same surface twice: every traction can be shifted from one to the other at no cost.
#[test]
fn a_singular_system_is_an_error() {
    let mut panels = body("octahedron:1m").subdivide(1, Geometry::Exact);
    let copy = panels.panels.clone();
    for mut panel in copy {
        panel.vertices = panel.vertices.map(|vertex| vertex + panels.vertex_count);
        panel.nodes = panel.nodes.map(|node| node + panels.node_count);
        panel.shell += 1;
        panels.panels.push(panel);
    }
    panels.vertex_count *= 2;
    panels.node_count *= 2;
    panels.shell_count *= 2;
    panels.coarsenings.clear();
    for factor in [Factor::Lu, Factor::Cholesky] {
        let request = Request { factor: Some(factor), ..Request::default() };
        let error = resistance_of_panels(panels.clone(), Point::zeros(), &request, &()).unwrap_err();
        assert!(
            matches!(error, SolveError::IllConditioned { .. } | SolveError::NotPositiveDefinite { .. }),
            "{factor:?}: {error}"
        );
    }
}

#[test]
fn a_number_that_is_not_finite_is_an_error() {
    let placement = Placement { scale: f64::NAN, turn: *Rotation3::identity().matrix(), shift: Point::zeros() };
    let panels = body("octahedron:1m").placed(&placement).subdivide(1, Geometry::Exact);
    let error = resistance_of_panels(panels, Point::zeros(), &Request::default(), &()).unwrap_err();
    assert!(matches!(error, SolveError::NotFinite { .. }), "{error}");
}

/// A sphere's resistance is known about any point.
#[test]
fn the_reference_point_may_lie_anywhere() {
    let sphere = body("sphere:2m").subdivide(2, Geometry::Exact);
    let reference = Point::new(0.5, -2.0, 1.0);
    let request = Request { rules: Some(PairRules::standard()), ..Request::default() };
    let solution = resistance_of_panels(sphere, reference, &request, &()).unwrap();
    let pi = std::f64::consts::PI;
    let exact = Resistance::isotropic(6.0 * pi, 8.0 * pi, Point::zeros()).about(&reference);
    assert!(relative_difference(&exact.matrix, &solution.resistance.matrix) < 1e-4);
}
