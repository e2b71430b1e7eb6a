//! The enum of all named shapes.

use super::catalogue;
use super::text::shape_text;
use super::{
    Cone, Cuboid, Cylinder, Disc, Doublet, Ellipsoid, Helix, HelixSizes, Octahedron, RedCell, Ring, Rod, ShapeError,
    Sphere, Tetrahedron,
};
use crate::surface::Blueprint;

/// Size of a shape by closed forms.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct ExactMeasure {
    /// Volume (m3).
    pub volume: f64,
    /// Surface area (m2), where a closed form exists.
    pub area: Option<f64>,
}

/// What a family of shapes must tell.
pub(super) trait Form {
    /// The name before the colon.
    fn keyword(&self) -> &'static str;
    /// The dimensions in the order in which they are written: lengths (m), and a helix's turns.
    fn dimensions(&self) -> Vec<f64>;
    /// The surface, in metres, with the volume centroid at the origin.
    fn blueprint(&self) -> Blueprint;
    /// Volume and area by closed forms.
    fn exact_measure(&self) -> ExactMeasure;
}

/// A named shape: lengths in metres, the volume centroid at the origin, long shapes along x, flat ones normal to z.
#[derive(Debug, Clone, Copy, PartialEq)]
#[non_exhaustive]
pub enum Shape {
    /// A sphere.
    Sphere(Sphere),
    /// An ellipsoid.
    Ellipsoid(Ellipsoid),
    /// A box or a cube.
    Cuboid(Cuboid),
    /// A rod with hemispherical ends.
    Rod(Rod),
    /// A cylinder with sharp rims, along x.
    Cylinder(Cylinder),
    /// A disc with sharp rims, normal to z.
    Disc(Disc),
    /// A torus around z.
    Ring(Ring),
    /// A red blood cell, normal to z.
    RedCell(RedCell),
    /// A helical wire around x.
    Helix(Helix),
    /// Two touching spheres along x.
    Doublet(Doublet),
    /// A cone, pointing along +x.
    Cone(Cone),
    /// A regular tetrahedron.
    Tetrahedron(Tetrahedron),
    /// A regular octahedron.
    Octahedron(Octahedron),
}

impl Shape {
    /// A sphere of the given diameter (m).
    ///
    /// # Errors
    /// See [`Sphere::new`].
    pub fn sphere(diameter: f64) -> Result<Self, ShapeError> {
        Sphere::new(diameter).map(Self::Sphere)
    }

    /// An ellipsoid of the given full axes along x, y, z (m).
    ///
    /// # Errors
    /// See [`Ellipsoid::new`].
    pub fn ellipsoid(axes: [f64; 3]) -> Result<Self, ShapeError> {
        Ellipsoid::new(axes).map(Self::Ellipsoid)
    }

    /// A box of the given sides along x, y, z (m).
    ///
    /// # Errors
    /// See [`Cuboid::new`].
    pub fn cuboid(sides: [f64; 3]) -> Result<Self, ShapeError> {
        Cuboid::new(sides).map(Self::Cuboid)
    }

    /// A cube of the given side (m).
    ///
    /// # Errors
    /// See [`Cuboid::cube`].
    pub fn cube(side: f64) -> Result<Self, ShapeError> {
        Cuboid::cube(side).map(Self::Cuboid)
    }

    /// A rod of the given overall length along x and diameter (m).
    ///
    /// # Errors
    /// See [`Rod::new`].
    pub fn rod(length: f64, diameter: f64) -> Result<Self, ShapeError> {
        Rod::new(length, diameter).map(Self::Rod)
    }

    /// A cylinder of the given length along x and diameter (m).
    ///
    /// # Errors
    /// See [`Cylinder::new`].
    pub fn cylinder(length: f64, diameter: f64) -> Result<Self, ShapeError> {
        Cylinder::new(length, diameter).map(Self::Cylinder)
    }

    /// A disc of the given diameter and thickness along z (m).
    ///
    /// # Errors
    /// See [`Disc::new`].
    pub fn disc(diameter: f64, thickness: f64) -> Result<Self, ShapeError> {
        Disc::new(diameter, thickness).map(Self::Disc)
    }

    /// A ring of the given centre-line diameter and tube diameter (m).
    ///
    /// # Errors
    /// See [`Ring::new`].
    pub fn ring(centre_line: f64, tube: f64) -> Result<Self, ShapeError> {
        Ring::new(centre_line, tube).map(Self::Ring)
    }

    /// A red blood cell of the given diameter (m).
    ///
    /// # Errors
    /// See [`RedCell::new`].
    pub fn red_cell(diameter: f64) -> Result<Self, ShapeError> {
        RedCell::new(diameter).map(Self::RedCell)
    }

    /// A helix of the given sizes.
    ///
    /// # Errors
    /// See [`Helix::new`].
    pub fn helix(sizes: HelixSizes) -> Result<Self, ShapeError> {
        Helix::new(sizes).map(Self::Helix)
    }

    /// Two touching spheres of the given diameter (m) each.
    ///
    /// # Errors
    /// See [`Doublet::new`].
    pub fn doublet(diameter: f64) -> Result<Self, ShapeError> {
        Doublet::new(diameter).map(Self::Doublet)
    }

    /// A cone of the given height along x and base diameter (m).
    ///
    /// # Errors
    /// See [`Cone::new`].
    pub fn cone(height: f64, diameter: f64) -> Result<Self, ShapeError> {
        Cone::new(height, diameter).map(Self::Cone)
    }

    /// A regular tetrahedron of the given edge (m).
    ///
    /// # Errors
    /// See [`Tetrahedron::new`].
    pub fn tetrahedron(edge: f64) -> Result<Self, ShapeError> {
        Tetrahedron::new(edge).map(Self::Tetrahedron)
    }

    /// A regular octahedron of the given edge (m).
    ///
    /// # Errors
    /// See [`Octahedron::new`].
    pub fn octahedron(edge: f64) -> Result<Self, ShapeError> {
        Octahedron::new(edge).map(Self::Octahedron)
    }

    /// The text that reads back as this shape, such as `rod:12x2um`.
    pub fn name(&self) -> String {
        shape_text(self)
    }

    /// The dimensions in the order in which they are written: lengths (m), and a helix's turns before its lengths.
    pub fn dimensions(&self) -> Vec<f64> {
        self.form().dimensions()
    }

    /// A shape of the same kind with other dimensions, in the order of [`Shape::dimensions`]; for sensitivities.
    ///
    /// # Errors
    /// If their number is another one, or no such body exists.
    pub fn with_dimensions(&self, dimensions: &[f64]) -> Result<Self, ShapeError> {
        if let (Self::Helix(helix), [turns, pitch, diameter, thickness]) = (self, dimensions) {
            let (turns, pitch, diameter, thickness) = (*turns, *pitch, *diameter, *thickness);
            return Self::helix(HelixSizes { turns, pitch, diameter, thickness, ..helix.sizes() });
        }
        match catalogue::find(self.form().keyword()) {
            Some(entry) => entry.shape_of(dimensions),
            None => Err(ShapeError::UnknownShape { name: self.form().keyword().to_string(), guess: None }),
        }
    }

    /// The surface as macro triangles, in metres.
    pub fn blueprint(&self) -> Blueprint {
        self.form().blueprint()
    }

    /// Volume and area by closed forms.
    pub fn exact_measure(&self) -> ExactMeasure {
        self.form().exact_measure()
    }

    pub(super) fn form(&self) -> &dyn Form {
        match self {
            Self::Sphere(form) => form,
            Self::Ellipsoid(form) => form,
            Self::Cuboid(form) => form,
            Self::Rod(form) => form,
            Self::Cylinder(form) => form,
            Self::Disc(form) => form,
            Self::Ring(form) => form,
            Self::RedCell(form) => form,
            Self::Helix(form) => form,
            Self::Doublet(form) => form,
            Self::Cone(form) => form,
            Self::Tetrahedron(form) => form,
            Self::Octahedron(form) => form,
        }
    }
}
