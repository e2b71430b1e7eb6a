//! A body: its surface in metres, its name, and what is uncertain about it.

use crate::question::budget::InputUncertainty;
use crate::surface::{Blueprint, Geometry, Measure, Panels, Placement, Point};

/// Panels on which a body is measured: volume and area are then right to 1e-6 or so, and it takes milliseconds.
const MEASURING_PANELS: usize = 1500;

/// A body as it was given: a closed surface in metres, in the coordinates of its shape or file.
#[derive(Debug, Clone)]
pub struct Body {
    /// What it is called.
    pub name: String,
    /// The name of its shape, such as `redcell`; none for a file.
    pub shape: Option<String>,
    /// Its surface, m.
    pub blueprint: Blueprint,
    /// What is known of its size without measuring.
    pub known: KnownSize,
    /// Facets of the file it came from; none for a named shape.
    pub facets: Option<usize>,
    /// What is uncertain about its size.
    pub uncertainties: Vec<InputUncertainty>,
    /// The geometry of its panels.
    pub geometry: Geometry,
    /// Relative change of the hydrodynamic radius between the blueprint and the smooth body it stands for.
    pub geometry_error: f64,
    /// What there is to know about how the surface was read.
    pub notes: Vec<String>,
}

impl Body {
    /// A body with an exactly known surface, in metres.
    pub fn exact(name: impl Into<String>, blueprint: Blueprint) -> Self {
        Self {
            name: name.into(),
            shape: None,
            blueprint,
            known: KnownSize::default(),
            facets: None,
            uncertainties: Vec::new(),
            geometry: Geometry::Exact,
            geometry_error: 0.0,
            notes: Vec::new(),
        }
    }

    /// Relative uncertainty of its size: the worst of its lengths.
    pub fn size_uncertainty(&self) -> f64 {
        let of_size = |input: &InputUncertainty| match input {
            InputUncertainty::Size { relative, .. } => *relative,
            InputUncertainty::Viscosity { .. } => 0.0,
        };
        self.uncertainties.iter().map(of_size).fold(0.0, f64::max)
    }

    /// Volume, area and centroid of the true surface, and its box.
    pub fn extent(&self) -> Extent {
        let cuts = self.blueprint.cuts_for(MEASURING_PANELS);
        let mut extent = Extent::of(&self.blueprint.subdivide(cuts, Geometry::Exact));
        let measure = &mut extent.measure;
        measure.volume = self.known.volume_m3.unwrap_or(measure.volume);
        measure.area = self.known.area_m2.unwrap_or(measure.area);
        measure.centroid = self.known.centroid_m.unwrap_or(measure.centroid);
        extent
    }
}

/// What closed forms tell of a body's size.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct KnownSize {
    /// Enclosed volume, m3.
    pub volume_m3: Option<f64>,
    /// Surface, m2.
    pub area_m2: Option<f64>,
    /// Volume centroid in the coordinates of the surface, m.
    pub centroid_m: Option<Point>,
}

/// How large a body is, in the unit of its surface.
#[derive(Debug, Clone)]
pub struct Extent {
    /// Volume, area and centroid.
    pub measure: Measure,
    /// Points of the surface, close enough to each other to tell its box.
    points: Vec<Point>,
}

impl Extent {
    fn of(panels: &Panels) -> Self {
        let middle = 1.0 / 3.0;
        let places = [(0.0, 0.0), (1.0, 0.0), (0.0, 1.0), (0.5, 0.5), (0.0, 0.5), (0.5, 0.0), (middle, middle)];
        let points = panels.panels.iter().flat_map(|panel| places.map(|(u, v)| panel.patch.at(u, v).position));
        Self { measure: panels.measure(), points: points.collect() }
    }

    /// Edges of the box around it.
    pub fn size(&self) -> Point {
        let (low, high) = self.bounds();
        high - low
    }

    /// The box around it: two opposite corners.
    pub fn bounds(&self) -> (Point, Point) {
        let mut low = Point::repeat(f64::INFINITY);
        let mut high = Point::repeat(f64::NEG_INFINITY);
        for point in &self.points {
            low = low.inf(point);
            high = high.sup(point);
        }
        (low, high)
    }

    /// The same after turning, scaling and moving.
    pub fn placed(&self, placement: &Placement) -> Self {
        let scale = placement.scale;
        let measure = Measure {
            volume: self.measure.volume * scale.powi(3),
            area: self.measure.area * scale.powi(2),
            centroid: placement.apply(&self.measure.centroid),
        };
        Self { measure, points: self.points.iter().map(|point| placement.apply(point)).collect() }
    }

    /// Radius of a sphere around its points, about the centre of its box or its centroid, whichever is smaller.
    pub(super) fn enclosing_radius(&self) -> f64 {
        let around =
            |centre: Point| self.points.iter().fold(0.0_f64, |largest, point| largest.max((point - centre).norm()));
        around(self.box_centre()).min(around(self.measure.centroid))
    }

    /// Half axes of an ellipsoid around its points, in the proportions of its box.
    pub(super) fn enclosing_ellipsoid(&self) -> [f64; 3] {
        let (half, centre) = (0.5 * self.size(), self.box_centre());
        let scale = |point: &Point| (point - centre).component_div(&half).norm();
        (half * self.points.iter().map(scale).fold(0.0, f64::max)).into()
    }

    fn box_centre(&self) -> Point {
        let low = self.points.iter().fold(Point::repeat(f64::INFINITY), |low, point| low.inf(point));
        low + 0.5 * self.size()
    }

    /// Largest distance of the surface from an axis through a point; from the point itself if the axis is zero.
    pub fn distance_from_axis(&self, through: &Point, axis: &Point) -> f64 {
        let axis = axis.try_normalize(0.0).unwrap_or_else(Point::zeros);
        let distances = self.points.iter().map(|point| {
            let arm = point - through;
            (arm - axis * axis.dot(&arm)).norm()
        });
        distances.fold(0.0, f64::max)
    }
}
