//! Volume, area and centroid of a closed discretised surface, by the divergence theorem.
//!
//! ```text
//! V = 1/3 oint x . n dS,      V c_i = 1/2 oint x_i^2 n_i dS
//! ```

use std::ops::Range;

use super::{Panels, Point, triangle_rule};

/// Size of a closed surface, in the surface's own length unit.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Measure {
    /// Enclosed volume; negative if the surface is inside out.
    pub volume: f64,
    /// Surface area.
    pub area: f64,
    /// Centroid of the enclosed volume.
    pub centroid: Point,
}

impl Panels {
    /// Volume, area and volume centroid, with the degree-8 rule on each panel.
    pub fn measure(&self) -> Measure {
        self.measure_of(0..self.panels.len())
    }

    /// The same of one body's panels, which are closed by themselves.
    pub fn measure_of(&self, range: Range<usize>) -> Measure {
        let panels = self.panels.get(range).unwrap_or(&[]);
        // Moments are taken about a point of the surface: far from the origin the flux formulas cancel badly.
        let Some(origin) = panels.first().map(|panel| panel.patch.corners()[0]) else {
            return Measure { volume: 0.0, area: 0.0, centroid: Point::zeros() };
        };
        let rule = triangle_rule::degree_8();
        let (mut volume, mut area, mut moment) = (0.0, 0.0, Point::zeros());
        for panel in panels {
            for point in rule {
                let at = panel.patch.at(point.u, point.v);
                let normal = at.area_normal() * point.weight;
                let x = at.position - origin;
                volume += x.dot(&normal) / 3.0;
                area += normal.norm();
                moment += 0.5 * x.component_mul(&x).component_mul(&normal);
            }
        }
        Measure { volume, area, centroid: origin + moment / volume }
    }
}
