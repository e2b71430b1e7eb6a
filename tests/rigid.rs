//! Properties of the algebra of resistances and mobilities, for every body there could be.

use std::f64::consts::PI;

use nalgebra::{Matrix3, Matrix6, Rotation3, Vector6};
use proptest::prelude::*;
use slowmote::stokes::rigid::{Mobility, Motion, Principal, Resistance, RigidError, Wrench};
use slowmote::surface::Point;

/// Rounding of a few 6 x 6 products with entries and condition numbers below about 1e3.
const ROUNDING: f64 = 1e-9;

fn point() -> impl Strategy<Value = Point> {
    (-2.0..2.0, -2.0..2.0, -2.0..2.0).prop_map(|(x, y, z)| Point::new(x, y, z))
}

fn turn() -> impl Strategy<Value = Matrix3<f64>> {
    point().prop_map(|axis_angle| Rotation3::from_scaled_axis(axis_angle).into_inner())
}

/// Any symmetric positive definite matrix that is not too close to singular, about any point.
fn resistance() -> impl Strategy<Value = Resistance> {
    (prop::array::uniform32(-1.0..1.0), prop::array::uniform4(-1.0..1.0), point()).prop_map(
        |(most, rest, reference)| {
            let entries = most.iter().chain(&rest).copied();
            let factor = Matrix6::from_iterator(entries);
            Resistance::new(factor * factor.transpose() + 0.5 * Matrix6::identity(), reference)
        },
    )
}

fn close<R: nalgebra::Dim, C: nalgebra::Dim, S: nalgebra::RawStorage<f64, R, C>>(
    a: &nalgebra::Matrix<f64, R, C, S>,
    b: &nalgebra::Matrix<f64, R, C, S>,
) -> bool {
    let scale = a.iter().chain(b.iter()).fold(1.0_f64, |scale, x| scale.max(x.abs()));
    a.iter().zip(b.iter()).all(|(x, y)| (x - y).abs() <= ROUNDING * scale)
}

fn antisymmetric(matrix: &Matrix3<f64>) -> f64 {
    (matrix - matrix.transpose()).abs().max()
}

proptest! {
    #[test]
    fn a_shift_there_and_back_changes_nothing(body in resistance(), away in point()) {
        let back = body.about(&away).about(&body.reference);
        prop_assert!(close(&back.matrix, &body.matrix));
        let mobility = body.mobility().unwrap();
        let back = mobility.about(&away).about(&mobility.reference);
        prop_assert!(close(&back.matrix, &mobility.matrix));
    }

    #[test]
    fn resistance_times_mobility_is_one(body in resistance(), away in point()) {
        let product = body.matrix * body.mobility().unwrap().matrix;
        prop_assert!(close(&product, &Matrix6::identity()));
        let elsewhere = body.about(&away).matrix * body.mobility().unwrap().about(&away).matrix;
        prop_assert!(close(&elsewhere, &Matrix6::identity()));
        prop_assert!(close(&body.mobility().unwrap().resistance().unwrap().matrix, &body.matrix));
    }

    #[test]
    fn the_shift_is_that_of_velocities_and_torques(
        body in resistance(), away in point(), velocity in point(), rotation in point()
    ) {
        let motion = Motion { velocity, rotation };
        let arm = away - body.reference;
        let here = body.load(&motion).seen_from(&arm);
        let there = body.about(&away).load(&motion.seen_from(&arm));
        prop_assert!(close(&here.force, &there.force));
        prop_assert!(close(&here.torque, &there.torque));
        // What is dissipated depends on no point of reference.
        let power = |load: &Wrench, motion: &Motion| load.column().dot(&motion.column());
        let difference = power(&here, &motion.seen_from(&arm)) - power(&body.load(&motion), &motion);
        prop_assert!(difference.abs() < ROUNDING * 1e3);
    }

    #[test]
    fn centres_make_the_coupling_symmetric_and_do_not_depend_on_the_reference(body in resistance(), away in point()) {
        let centre = body.centre();
        prop_assert!(antisymmetric(&body.about(&centre).torque_velocity()) < ROUNDING);
        prop_assert!(close(&centre, &body.about(&away).centre()));
        let mobility = body.mobility().unwrap();
        let centre = mobility.centre();
        prop_assert!(antisymmetric(&mobility.about(&centre).rotation_force()) < ROUNDING);
        prop_assert!(close(&centre, &mobility.about(&away).centre()));
    }

    #[test]
    fn traces_are_least_about_the_centres(body in resistance(), off in point()) {
        let trace = |at: &Point| body.about(at).torque_rotation().trace();
        prop_assert!(trace(&body.centre()) <= trace(&(body.centre() + off)) + ROUNDING);
        let mobility = body.mobility().unwrap();
        let trace = |at: &Point| mobility.about(at).velocity_force().trace();
        prop_assert!(trace(&mobility.centre()) <= trace(&(mobility.centre() + off)) + ROUNDING);
    }

    #[test]
    fn everything_turns_with_the_body(body in resistance(), turn in turn(), motion in point(), rotation in point()) {
        let turned = body.turned(&turn);
        let motion = Motion { velocity: motion, rotation };
        let turned_motion = Motion { velocity: turn * motion.velocity, rotation: turn * motion.rotation };
        prop_assert!(close(&(turn * body.load(&motion).force), &turned.load(&turned_motion).force));
        prop_assert!(close(&(turn * body.load(&motion).torque), &turned.load(&turned_motion).torque));
        prop_assert!(close(&(turn * body.centre()), &turned.centre()));
        let (mobility, turned_mobility) = (body.mobility().unwrap(), turned.mobility().unwrap());
        prop_assert!(close(&(turn * mobility.centre()), &turned_mobility.centre()));
        let (radius, turned_radius) = (mobility.hydrodynamic_radius(), turned_mobility.hydrodynamic_radius());
        prop_assert!((radius - turned_radius).abs() < ROUNDING * radius);
    }

    #[test]
    fn size_and_viscosity_scale_each_block(body in resistance(), viscosity in 1e-4..1e2f64, length in 1e-7..1e1f64) {
        let scaled = body.scaled(viscosity, length);
        let factor = viscosity * length;
        prop_assert!(close(&(scaled.force_velocity() / factor), &body.force_velocity()));
        prop_assert!(close(&(scaled.torque_velocity() / (factor * length)), &body.torque_velocity()));
        prop_assert!(close(&(scaled.force_rotation() / (factor * length)), &body.force_rotation()));
        prop_assert!(close(&(scaled.torque_rotation() / (factor * length * length)), &body.torque_rotation()));
        prop_assert!(close(&(scaled.centre() / length), &body.centre()));
        // Inverting in units and giving units to the inverse are the same.
        let mobility = body.mobility().unwrap().scaled(viscosity, length);
        let product = scaled.matrix * mobility.matrix;
        for row in 0..6 {
            for column in 0..6 {
                let units = length.powi(i32::from(row >= 3) - i32::from(column >= 3));
                let expected = f64::from(u8::from(row == column));
                prop_assert!((product[(row, column)] / units - expected).abs() < 1e-7);
            }
        }
    }

    #[test]
    fn principal_axes_are_a_frame_with_fixed_signs(body in resistance()) {
        let tensor = body.force_velocity();
        let principal = Principal::of(&tensor, 0.0);
        let [a, b, c] = principal.axes;
        prop_assert!((a.cross(&b) - c).norm() < ROUNDING);
        prop_assert!(principal.values.is_sorted());
        for (axis, value) in principal.axes.iter().zip(principal.values) {
            prop_assert!((tensor * axis - axis * value).norm() < ROUNDING * tensor.norm());
            prop_assert!((axis.norm() - 1.0).abs() < ROUNDING);
        }
        for axis in [a, b] {
            prop_assert!(axis[axis.iamax()] > 0.0);
        }
    }
}

fn sphere(radius: f64, centre: Point) -> Resistance {
    Resistance::isotropic(6.0 * PI * radius, 8.0 * PI * radius.powi(3), centre)
}

/// A thin disc of unit radius: 16 broadside, 32/3 edgewise, 32/3 for turning about any axis, times its radius and the
/// radius cubed. Exact (Oberbeck 1876; Jeffery 1922; Happel and Brenner 1965).
fn disc(normal: &Point, centre: Point) -> Resistance {
    let n = normal.normalize();
    let mut matrix = Matrix6::identity() * (32.0 / 3.0);
    let drag = Matrix3::identity() * (32.0 / 3.0) + n * n.transpose() * (16.0 - 32.0 / 3.0);
    matrix.fixed_view_mut::<3, 3>(0, 0).copy_from(&drag);
    Resistance::new(matrix, centre)
}

/// Bodies so far apart on one frame that they do not feel each other: their resistances about one point add.
fn far_apart(parts: &[Resistance]) -> Resistance {
    let matrix = parts.iter().map(|part| part.about(&Point::zeros()).matrix).sum();
    Resistance::new(matrix, Point::zeros())
}

/// Four discs on a rod along z, each tilted about its own arm like the blades of two propellers, the upper pair turned
/// by a right angle and of another pitch.
fn helicoid(hand: f64) -> Resistance {
    let blade = |arm: Point, height: f64, pitch: f64| {
        let across = Point::z().cross(&arm);
        let normal = Point::z() * pitch.cos() + across * (hand * pitch.sin());
        disc(&normal, 20.0 * arm + Point::z() * height)
    };
    far_apart(&[
        blade(Point::x(), -10.0, 0.6),
        blade(-Point::x(), -10.0, 0.6),
        blade(Point::y(), 15.0, 0.4),
        blade(-Point::y(), 15.0, 0.4),
    ])
}

#[test]
fn a_helicoid_turns_as_it_is_pulled_and_its_mirror_image_the_other_way() {
    let spin = |hand| {
        let mobility = helicoid(hand).mobility().unwrap();
        let pull = Wrench { force: Point::z(), torque: Point::zeros() };
        mobility.motion(&pull)
    };
    let (right, left) = (spin(1.0), spin(-1.0));
    assert!(right.rotation.z.abs() > 1e-6);
    assert!((right.rotation.z + left.rotation.z).abs() < 1e-15);
    assert!((right.velocity.z - left.velocity.z).abs() < 1e-15);
    // Pulled along its axis it goes straight: two blades opposite each other balance.
    assert!(right.velocity.xy().norm() < 1e-15);
}

#[test]
fn the_coupling_of_a_helicoid_is_symmetric_about_its_centre_only() {
    let body = helicoid(1.0);
    assert!(antisymmetric(&body.torque_velocity()) > 1.0, "about the origin the coupling must not be symmetric");
    let centred = body.about(&body.centre());
    assert!(antisymmetric(&centred.torque_velocity()) < 1e-9);
    assert!(centred.torque_velocity().norm() > 1.0, "a chiral body couples about every point");
    // The two centres of a body without planes of symmetry are different points of its axis.
    let mobility = body.mobility().unwrap();
    assert!(body.centre().xy().norm() < 1e-9 && mobility.centre().xy().norm() < 1e-9);
    assert!((body.centre() - mobility.centre()).norm() > 1e-3);
}

#[test]
fn centres_of_two_far_spheres_lie_where_their_drags_balance() {
    // Radii 1 and 3 at distance 40 along x: forces add like the radii, so the centre divides the line 3 : 1.
    let pair = far_apart(&[sphere(1.0, Point::zeros()), sphere(3.0, Point::x() * 40.0)]);
    assert!((pair.centre() - Point::x() * 30.0).norm() < 1e-9);
    assert!((pair.mobility().unwrap().centre() - Point::x() * 30.0).norm() < 1e-9);
}

#[test]
fn the_mean_over_orientations_needs_the_centre() {
    // A sphere told about a point of its surface is the same sphere, though the trace there is larger.
    let off_centre = sphere(2.0, Point::zeros()).about(&Point::new(0.0, 2.0, 0.0)).mobility().unwrap();
    assert!((off_centre.hydrodynamic_radius() - 2.0).abs() < 1e-12);
    assert!(
        off_centre.velocity_force().trace()
            > 1.1 * sphere(2.0, Point::zeros()).mobility().unwrap().velocity_force().trace()
    );
}

#[test]
fn degenerate_axes_are_the_laboratorys() {
    let principal = Principal::of(&sphere(1.0, Point::zeros()).force_velocity(), 1e-6);
    assert_eq!(principal.axes, [Point::x(), Point::y(), Point::z()]);
    let principal = Principal::of(&disc(&Point::z(), Point::zeros()).force_velocity(), 1e-6);
    assert_eq!(principal.axes, [Point::x(), Point::y(), Point::z()]);
    assert!((principal.values[2] - 16.0).abs() < 1e-12);
    let principal = Principal::of(&disc(&Point::new(0.0, -1.0, 0.0), Point::zeros()).force_velocity(), 1e-6);
    assert!((principal.axes[2] - Point::y()).norm() < 1e-12);
    assert!((principal.axes[0] - Point::x()).norm() < 1e-12);
    // Split by less than the tolerance, the axes stay where they were.
    let nearly = Matrix3::new(1.0, 1e-7, 0.0, 1e-7, 1.0, 0.0, 0.0, 0.0, 2.0);
    assert_eq!(Principal::of(&nearly, 1e-6).axes, [Point::x(), Point::y(), Point::z()]);
    assert!((Principal::of(&nearly, 0.0).axes[1] - Point::new(1.0, 1.0, 0.0).normalize()).norm() < 1e-6);
}

#[test]
fn what_is_no_resistance_is_refused() {
    let mut matrix = Matrix6::identity();
    matrix[(2, 2)] = -1.0;
    assert_eq!(Resistance::new(matrix, Point::zeros()).mobility(), Err(RigidError::NotPositiveDefinite));
    matrix[(2, 2)] = f64::NAN;
    let refused = Resistance::new(matrix, Point::zeros()).mobility();
    assert_eq!(refused, Err(RigidError::NotFinite { row: 2, column: 2 }));
    let singular = Resistance::new(Matrix6::from_diagonal(&Vector6::new(1., 1., 1., 1., 1., 0.)), Point::zeros());
    assert_eq!(singular.mobility(), Err(RigidError::NotPositiveDefinite));
    let mobility = Mobility { matrix: -Matrix6::identity(), reference: Point::zeros() };
    assert_eq!(mobility.resistance(), Err(RigidError::NotPositiveDefinite));
}
