//! The shapes that the tests run over, each with what is known of it.

use std::f64::consts::PI;

use slowmote::surface::shapes::{Hand, HelixSizes, Shape};

/// Where nodes are doubled.
#[derive(Debug, Clone, Copy)]
pub enum Creases {
    /// Nowhere.
    None,
    /// On closed rims without corners, each of so many macro edges.
    Rims { count: usize, around: usize },
    /// On a polyhedron's edges, which are cut into so many macro edges.
    Edges { edges: usize, pieces: usize, corners: usize, faces_at_corner: usize },
    /// At one point where two surfaces touch.
    Contact,
}

/// A shape, and what is known of it. Lengths in metres.
#[derive(Debug, Clone)]
pub struct Sample {
    pub shape: Shape,
    /// Number of macro triangles.
    pub macros: usize,
    /// Euler characteristic of its surface.
    pub euler: isize,
    /// Volume and area by formulas of their own, not the library's.
    pub volume: f64,
    pub area: f64,
    /// Bound on the relative error of both with six cuts and exact geometry.
    pub tolerance: f64,
    /// Size of the bounding box.
    pub extents: [f64; 3],
    /// Relative slack of the bounding box: extreme points that are not vertices are missed a little.
    pub extent_slack: f64,
    pub creases: Creases,
    /// Whether any side is curved.
    pub curved: bool,
    /// Whether there is a point without a tangent plane within a face.
    pub pointed: bool,
}

/// Beyond this ratio of extents facets are so much longer than the curvature they follow that orders show late.
const MODERATE: f64 = 12.0;

impl Sample {
    /// Whether the dimensions differ by no more than an order of magnitude.
    pub fn moderate(&self) -> bool {
        let low = self.extents.iter().fold(f64::INFINITY, |low, x| low.min(*x));
        self.extents.iter().all(|x| *x <= MODERATE * low)
    }

    pub fn name(&self) -> String {
        self.shape.name()
    }
}

fn round(shape: Shape, macros: usize, volume: f64, area: f64, extents: [f64; 3]) -> Sample {
    Sample {
        shape,
        macros,
        euler: 2,
        volume,
        area,
        tolerance: 1e-8,
        extents,
        extent_slack: 1e-3,
        creases: Creases::None,
        curved: true,
        pointed: false,
    }
}

fn box_of([a, b, c]: [f64; 3], macros: usize, pieces: usize) -> Sample {
    let (volume, area) = (a * b * c, 2.0 * (a * b + b * c + c * a));
    let creases = Creases::Edges { edges: 12, pieces, corners: 8, faces_at_corner: 3 };
    let sample = round(Shape::cuboid([a, b, c]).unwrap(), macros, volume, area, [a, b, c]);
    Sample { creases, curved: false, extent_slack: 1e-12, tolerance: 1e-12, ..sample }
}

/// Spheroid of semi-axes `equatorial`, `equatorial`, `polar`; the classical closed forms of its area.
fn spheroid_area(equatorial: f64, polar: f64) -> f64 {
    let (a, c) = (equatorial, polar);
    if c < a {
        let e = (1.0 - (c / a).powi(2)).sqrt();
        2.0 * PI * a * a * (1.0 + (1.0 - e * e) / e * e.atanh())
    } else {
        let e = (1.0 - (a / c).powi(2)).sqrt();
        2.0 * PI * a * a * (1.0 + c / (a * e) * e.asin())
    }
}

fn cylinder_area(length: f64, diameter: f64) -> f64 {
    PI * diameter * (length + 0.5 * diameter)
}

/// Area of the red cell by the midpoint rule in the polar angle, extrapolated from two step numbers.
///
/// `dA = 2 pi r sqrt(r'^2 + z'^2) dt` with `r = R sin t`, `z = R/2 cos t P(sin^2 t)`.
fn red_cell_area(diameter: f64) -> f64 {
    let (c0, c1, c2) = (0.207161, 2.002558, -1.122762);
    let midpoint = |steps: usize| {
        let slice = |k: usize| {
            let (s, c) = ((k as f64 + 0.5) * PI / steps as f64).sin_cos();
            let w = s * s;
            let (p, p_w) = (c0 + c1 * w + c2 * w * w, c1 + 2.0 * c2 * w);
            s * c.hypot(0.5 * (-s * p + c * p_w * 2.0 * s * c))
        };
        (0..steps).map(slice).sum::<f64>() * PI / steps as f64
    };
    let radius = 0.5 * diameter;
    2.0 * PI * radius * radius * (4.0 * midpoint(2000) - midpoint(1000)) / 3.0
}

pub fn helix(turns: f64, pitch: f64, diameter: f64, thickness: f64, hand: Hand) -> Shape {
    Shape::helix(HelixSizes { turns, pitch, diameter, thickness, hand }).unwrap()
}

fn helix_sample(shape: Shape, turns: f64, macros: usize) -> Sample {
    let (pitch, diameter, thickness) = (2e-6, 1e-6, 0.2e-6);
    // Pappus: the tube's section times the length of its centre line, and two halves of a ball.
    let length = turns * (PI * diameter).hypot(pitch);
    let volume = PI / 4.0 * thickness * thickness * length + PI / 6.0 * thickness.powi(3);
    let area = PI * thickness * (length + thickness);
    Sample { extent_slack: 10.0, ..round(shape, macros, volume, area, [1.0; 3]) }
}

/// All shapes, some of them extreme.
pub fn suite() -> Vec<Sample> {
    let um = 1e-6;
    let mut all = Vec::new();
    let ellipsoid = |axes: [f64; 3], macros: usize, area: f64| {
        let volume = PI / 6.0 * axes.iter().product::<f64>();
        round(Shape::ellipsoid(axes).unwrap(), macros, volume, area, axes)
    };
    all.push(round(Shape::sphere(10.0 * um).unwrap(), 20, PI / 6e15, PI * 1e-10, [10.0 * um; 3]));
    all.push(ellipsoid([2e-6, 2e-6, 4e-6], 20, spheroid_area(1e-6, 2e-6)));
    all.push(ellipsoid([10e-6, 1e-6, 1e-6], 40, spheroid_area(0.5e-6, 5e-6)));
    all.push(ellipsoid([100e-6, 1e-6, 1e-6], 104, spheroid_area(0.5e-6, 50e-6)));
    all.push(ellipsoid([1e-6, 6e-6, 6e-6], 36, spheroid_area(3e-6, 0.5e-6)));
    all.push(ellipsoid([100e-6, 100e-6, 1e-6], 84, spheroid_area(50e-6, 0.5e-6)));
    all.push(box_of([6e-6, 4e-6, 2e-6], 48, 24));
    all.push(Sample { shape: Shape::cube(5e-6).unwrap(), ..box_of([5e-6; 3], 48, 24) });
    all.push(box_of([100e-6, 100e-6, 1e-6], 48, 24));
    all.push(box_of([2e-6, 40e-6, 3e-6], 112, 40));
    all.push(box_of([1e-6, 1e-6, 100e-6], 272, 80));
    let cylinder = |shape: Shape, length: f64, diameter: f64, extents: [f64; 3], macros: usize, around: usize| {
        let volume = PI / 4.0 * diameter * diameter * length;
        let sample = round(shape, macros, volume, cylinder_area(length, diameter), extents);
        Sample { creases: Creases::Rims { count: 2, around }, ..sample }
    };
    let lying = |length: f64, diameter: f64, macros: usize, around: usize| {
        let shape = Shape::cylinder(length, diameter).unwrap();
        cylinder(shape, length, diameter, [length, diameter, diameter], macros, around)
    };
    let flat = |diameter: f64, thickness: f64, macros: usize, around: usize| {
        let shape = Shape::disc(diameter, thickness).unwrap();
        cylinder(shape, thickness, diameter, [diameter, diameter, thickness], macros, around)
    };
    all.push(lying(2e-6, 2e-6, 60, 6));
    all.push(lying(10e-6, 2e-6, 108, 6));
    all.push(lying(100e-6, 1e-6, 152, 4));
    all.push(lying(1e-6, 20e-6, 80, 8));
    all.push(flat(8e-6, 1e-6, 60, 6));
    all.push(flat(100e-6, 1e-6, 120, 12));
    let rod = |length: f64, diameter: f64, macros: usize| {
        let volume = PI / 4.0 * diameter * diameter * (length - diameter / 3.0);
        round(
            Shape::rod(length, diameter).unwrap(),
            macros,
            volume,
            PI * diameter * length,
            [length, diameter, diameter],
        )
    };
    all.push(rod(2e-6, 2e-6, 20));
    all.push(rod(2.2e-6, 2e-6, 24));
    all.push(rod(12e-6, 2e-6, 60));
    all.push(rod(100e-6, 1e-6, 136));
    let ring = |centre_line: f64, tube: f64, macros: usize| {
        let (volume, area) = (PI * PI / 4.0 * centre_line * tube * tube, PI * PI * centre_line * tube);
        let outer = centre_line + tube;
        let sample = round(Shape::ring(centre_line, tube).unwrap(), macros, volume, area, [outer, outer, tube]);
        Sample { euler: 0, ..sample }
    };
    all.push(ring(10e-6, 2e-6, 64));
    all.push(ring(10e-6, 6e-6, 96));
    all.push(ring(10e-6, 9.9e-6, 160));
    all.push(ring(100e-6, 1e-6, 192));
    // The volume as Evans & Fung's profile gives it: 94.1 fL. Its thickest place lies between vertices.
    let red_cell =
        round(Shape::red_cell(7.82 * um).unwrap(), 36, 94.1e-18, red_cell_area(7.82 * um), [7.82e-6, 7.82e-6, 2.57e-6]);
    all.push(Sample { extent_slack: 0.02, volume: red_cell.shape.exact_measure().volume, ..red_cell });
    all.push(helix_sample(helix(4.0, 2e-6, 1e-6, 0.2e-6, Hand::Right), 4.0, 232));
    all.push(helix_sample(helix(1.3, 2e-6, 1e-6, 0.2e-6, Hand::Left), 1.3, 88));
    let doublet = Shape::doublet(2e-6).unwrap();
    let doublet = round(doublet, 40, PI / 3.0 * 8e-18, 8.0 * PI * 1e-12, [4e-6, 2e-6, 2e-6]);
    all.push(Sample { euler: 3, creases: Creases::Contact, ..doublet });
    let cone = |height: f64, diameter: f64, macros: usize| {
        let (volume, side) = (PI / 12.0 * diameter * diameter * height, (0.5 * diameter).hypot(height));
        let area = PI / 4.0 * diameter * (diameter + 2.0 * side);
        let sample = round(Shape::cone(height, diameter).unwrap(), macros, volume, area, [height, diameter, diameter]);
        Sample { creases: Creases::Rims { count: 1, around: 6 }, pointed: true, tolerance: 1e-7, ..sample }
    };
    all.push(cone(4e-6, 4e-6, 36));
    all.push(cone(40e-6, 2e-6, 96));
    all.push(cone(0.2e-6, 2e-6, 36));
    let octahedron = Shape::octahedron(3e-6).unwrap();
    let edge = 3e-6_f64;
    let octahedron = round(
        octahedron,
        48,
        2.0_f64.sqrt() / 3.0 * edge.powi(3),
        12.0_f64.sqrt() * edge.powi(2),
        [edge * 2.0_f64.sqrt(); 3],
    );
    let creases = Creases::Edges { edges: 12, pieces: 24, corners: 6, faces_at_corner: 4 };
    all.push(Sample { creases, curved: false, extent_slack: 1e-12, tolerance: 1e-12, ..octahedron });
    let tetrahedron = Shape::tetrahedron(3e-6).unwrap();
    let tetrahedron = round(
        tetrahedron,
        24,
        edge.powi(3) / 72.0_f64.sqrt(),
        3.0_f64.sqrt() * edge.powi(2),
        [edge / 2.0_f64.sqrt(); 3],
    );
    let creases = Creases::Edges { edges: 6, pieces: 12, corners: 4, faces_at_corner: 3 };
    all.push(Sample { creases, curved: false, extent_slack: 1e-12, tolerance: 1e-12, ..tetrahedron });
    all
}
