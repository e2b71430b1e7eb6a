//! What the solver's tests share: bodies of unit size and the numbers of a solution.
#![allow(dead_code, reason = "each test file uses its own part")]

use std::f64::consts::PI;

use nalgebra::Matrix3;
use slowmote::stokes::quadrature::PairRules;
use slowmote::stokes::solve::{Request, Solution, resistance, resistance_of_panels};
use slowmote::surface::shapes::Shape;
use slowmote::surface::{Blueprint, Geometry, Placement, Point};

/// The named shape with one metre as the unit of length, so that "sphere:2m" is the unit sphere.
pub fn body(shape: &str) -> Blueprint {
    Shape::parse(shape).unwrap().blueprint()
}

/// Solved with every macro edge cut into `cuts`.
pub fn cut(blueprint: &Blueprint, cuts: usize, geometry: Geometry) -> Solution {
    with(blueprint, cuts, geometry, &Request { rules: Some(PairRules::standard()), ..Request::default() })
}

/// The same with other settings.
pub fn with(blueprint: &Blueprint, cuts: usize, geometry: Geometry, request: &Request) -> Solution {
    resistance_of_panels(blueprint.subdivide(cuts, geometry), Point::zeros(), request, &()).unwrap()
}

/// Solved to an accuracy.
pub fn to_accuracy(shape: &str, accuracy: f64) -> Solution {
    let blueprint = body(shape);
    let solution = resistance(&blueprint, Point::zeros(), &Request { accuracy, ..Request::default() }, &()).unwrap();
    assert!(solution.reached, "{shape} at {accuracy}");
    solution
}

/// Drags along x, y, z over `6 pi`, torques about x, y, z over `8 pi`.
pub fn diagonal(solution: &Solution) -> [f64; 6] {
    std::array::from_fn(|k| solution.resistance.matrix[(k, k)] / (PI * if k < 3 { 6.0 } else { 8.0 }))
}

/// Largest relative difference from exact values of the drags, and of the torques.
pub fn errors(solution: &Solution, exact: [f64; 6]) -> [f64; 2] {
    let relative = |k: usize| (diagonal(solution)[k] / exact[k] - 1.0).abs();
    [relative(0).max(relative(1)).max(relative(2)), relative(3).max(relative(4)).max(relative(5))]
}

/// A rotation about an axis that is no axis of any body here.
pub fn turn() -> Matrix3<f64> {
    *nalgebra::Rotation3::from_euler_angles(0.4, -1.1, 2.3).matrix()
}

/// The body turned, scaled and moved.
pub fn moved(blueprint: &Blueprint, scale: f64, turn: Matrix3<f64>, shift: Point) -> Blueprint {
    blueprint.placed(&Placement { scale, turn, shift })
}
