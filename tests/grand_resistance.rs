//! Several bodies at once, against series solutions and against what must hold.

mod solving;

use std::f64::consts::PI;

use nalgebra::DMatrix;
use slowmote::stokes::rigid::Resistance;
use slowmote::stokes::solve::{GrandSolution, Part, Request, grand_resistance, resistance};
use slowmote::surface::{Blueprint, Geometry, Placement, Point};
use solving::{body, moved, turn};

fn solve(bodies: &[(&Blueprint, Point)], request: &Request) -> GrandSolution {
    let parts = bodies.iter().map(|&(blueprint, reference)| Part { blueprint, geometry: Geometry::Exact, reference });
    grand_resistance(&parts.collect::<Vec<_>>(), request, &()).unwrap()
}

fn at(blueprint: &Blueprint, shift: Point) -> Blueprint {
    blueprint.placed(&Placement { shift, ..Placement::identity() })
}

/// Two spheres of radius 1 and `second` on the z axis, the first above, with this gap.
fn pair(second: f64, gap: f64, accuracy: f64) -> GrandSolution {
    let above = Point::z() * (1.0 + second + gap);
    let (large, small) = (at(&body("sphere:2m"), above), body(&format!("sphere:{}m", 2.0 * second)));
    let request = Request { accuracy, ..Request::default() };
    solve(&[(&large, above), (&small, Point::zeros())], &request)
}

/// Rows and columns: body 1 first; force along x, y, z, torque about x, y, z.
fn entry(solution: &GrandSolution, row: usize, column: usize) -> f64 {
    let (force, torque) = (6.0 * PI, 8.0 * PI);
    solution.resistance.matrix[(row, column)] / if row % 6 < 3 { force } else { torque }
}

/// Galerkin in bispherical coordinates (the problem of Stimson & Jeffery 1926; Goldman, Cox & Brenner 1966; Jeffrey & Onishi
/// 1984), ten digits. Each number is a force over `6 pi mu a1 U` or a torque over `8 pi mu a1^2 U` or `a1^3 W`; forces and torques
/// that are applied to the bodies, which pass them on to the fluid.
#[test]
fn two_spheres() {
    let equal_far: [(usize, usize, f64); 9] = [
        (2, 2, 1.06743771231),
        (8, 2, -0.262715951641),
        (0, 0, 1.01710947662),
        (4, 0, -0.00275835597021),
        (6, 0, -0.12957306502),
        (10, 0, -0.021199256638),
        (4, 4, 1.00068100365),
        (10, 4, 0.00239246927988),
        (5, 11, -0.00462974742293),
    ];
    let unequal_near: [(usize, usize, f64); 10] = [
        (2, 2, 2.49555395849),
        (8, 2, -1.63360498517),
        (0, 0, 1.2672635338),
        (4, 0, -0.162203753737),
        (6, 0, -0.413349208556),
        (10, 0, -0.0610618978402),
        (10, 4, 0.0265246771724),
        (8, 8, 1.8280133914),
        (10, 10, 0.147748861666),
        (11, 11, 0.129490226805),
    ];
    for (solution, expected) in [(pair(1.0, 4.0, 1e-3), &equal_far[..]), (pair(0.5, 0.1, 1e-2), &unequal_near[..])] {
        assert!(solution.reached);
        let size = |k: usize| entry(&solution, k, k);
        for &(row, column, value) in expected {
            // The bounds are relative to the energy norm of row and column, and so is this.
            let scale = (size(row) * size(column)).sqrt();
            let error = (entry(&solution, row, column) - value).abs() / scale;
            assert!(error <= solution.error.worst(), "({row}, {column}): {error:e} of {:e}", solution.error.worst());
        }
    }
}

/// Touching or not, what two spheres exert is symmetric, positive, and turns and shifts with them.
#[test]
fn the_grand_matrix_is_one_of_a_passive_system() {
    let (cube, helix) =
        (body("cube:1m"), at(&body("helix:turns=2,pitch=0.5m,diameter=1m,thickness=0.2m"), Point::z() * 1.6));
    let request = Request { elements: Some(200), ..Request::default() };
    let solution = solve(&[(&cube, Point::zeros()), (&helix, Point::z() * 1.6)], &request);
    let matrix = &solution.resistance.matrix;
    assert!((matrix - matrix.transpose()).amax() <= 1e-12 * matrix.amax());
    assert!(matrix.clone().symmetric_eigenvalues().min() > 0.0);

    let identity = solution.resistance.mobility().unwrap().matrix * matrix;
    assert!((identity - DMatrix::identity(12, 12)).amax() < 1e-9);

    let (turned, shift) = (turn(), Point::new(3.0, -1.0, 0.5));
    let place = |point: Point| turned * point + shift;
    let (cube, helix) = (moved(&cube, 1.0, turned, shift), moved(&helix, 1.0, turned, shift));
    let again = solve(&[(&cube, place(Point::zeros())), (&helix, place(Point::z() * 1.6))], &request);
    for i in 0..2 {
        let expected = solution.resistance.alone(i).turned(&turned).matrix;
        let difference = (again.resistance.block(i, i) - expected).amax() / expected.amax();
        // Rounding decides between equal edges in the quadrature, whose error is a few percent at most of the
        // discretisation's, and that is large on so coarse a helix; measured 2.9e-5.
        assert!(difference < 0.02 * solution.error.worst(), "{difference:e} of {:e}", solution.error.worst());
    }
}

/// Bodies that move as one feel what the one body of all their surfaces feels.
#[test]
fn joined_bodies_are_one_body() {
    let (left, right) = (at(&body("cube:1m"), -Point::x()), at(&body("sphere:1m"), Point::x()));
    let request = Request { elements: Some(300), ..Request::default() };
    let together = solve(&[(&left, -Point::x()), (&right, Point::x())], &request);
    let joined = together.resistance.joined(&Point::zeros());
    // The same surfaces with the same cuts, solved as one body.
    let panels = together.panels.clone();
    let one = slowmote::stokes::solve::resistance_of_panels(panels, Point::zeros(), &request, &()).unwrap();
    let difference = (joined.matrix - one.resistance.matrix).amax() / one.resistance.matrix.amax();
    assert!(difference < 1e-9, "{difference:e}");
}

/// The farther the other body, the less it matters; alone, the body's own resistance is left.
#[test]
fn a_far_neighbour_is_none() {
    let cube = body("cube:1m");
    let far = Point::x() * 1000.0;
    let request = Request { accuracy: 0.02, ..Request::default() };
    let pair = solve(&[(&cube, Point::zeros()), (&at(&cube, far), far)], &request);
    let one = resistance(&cube, Point::zeros(), &request, &()).unwrap();
    let own: Resistance = pair.resistance.alone(0);
    let difference = (own.matrix - one.resistance.matrix).amax() / one.resistance.matrix.amax();
    // A neighbour at distance r raises the drag by (3/2 R_h/r)^2, here 1e-6; the rest is the same mesh's.
    assert!(difference < 1e-5, "{difference:e}");
    // Smoluchowski's first order: -3/2 R_h/r along the line, -3/4 across it.
    let drag = one.resistance.matrix[(0, 0)];
    let first_order = 1.5 * drag / (6.0 * PI) / 1000.0;
    let coupling = pair.resistance.block(1, 0);
    assert!((coupling[(0, 0)] / drag / -first_order - 1.0).abs() < 1e-3);
    assert!((coupling[(1, 1)] / drag / (-0.5 * first_order) - 1.0).abs() < 1e-3);
}
