//! What can be said of the drag of a body of any shape without solving.
//!
//! Its hydrodynamic radius, in the mean over orientations, is at least that of the sphere of its volume. The drag in any
//! direction is at most that of a body around it (R. Hill and G. Power, Q. J. Mech. Appl. Math. 9 (1956) 313): of the
//! sphere that encloses it, and of an ellipsoid that does, whose principal drags have closed forms (A. Oberbeck 1876):
//!
//! ```text
//! R_i = (8/3) / (2 R_F + (2/3) a_i^2 R_D,i),   Carlson's integrals of a_1^2, a_2^2, a_3^2.
//! ```
//!
//! For a sphere all of them are its radius.

use std::f64::consts::PI;

use crate::physical::{Dimension, Quantity};
use crate::question::Vector;
use crate::question::body::Body;
use crate::question::budget::InputUncertainty;
use crate::surface::shapes::carlson::{r_d, r_f};

/// Bounds closer than this are one number: the points that enclose a smooth body are no closer.
const SAME: f64 = 1e-3;

/// A body as far as it is known without solving. Lengths in m.
#[derive(Debug, Clone, PartialEq)]
pub struct RegimeBody {
    /// What it is called.
    pub name: String,
    /// The name of its shape; none for a file or a span.
    pub shape: Option<String>,
    /// Edges of the box around it.
    pub size_m: Vector,
    /// Volume, m3.
    pub volume_m3: f64,
    /// Radius of a sphere around it.
    pub enclosing_radius_m: f64,
    /// Hydrodynamic radius, at least: that of the sphere of its volume.
    pub radius_at_least_m: f64,
    /// Hydrodynamic radius, at most, in any direction.
    pub radius_at_most_m: f64,
    /// The size over what was given: one, with its uncertainty.
    pub scale: Quantity,
    /// How it was read.
    pub notes: Vec<String>,
}

impl RegimeBody {
    /// A sphere that stands for a body of which only the span is known, m.
    pub fn of_span(span: Quantity) -> Self {
        let diameter = span.value_si();
        let radius = 0.5 * diameter;
        Self {
            name: format!("a body of {}", span.to_text(3)),
            shape: None,
            size_m: [diameter; 3],
            volume_m3: PI * diameter.powi(3) / 6.0,
            enclosing_radius_m: radius,
            radius_at_least_m: radius,
            radius_at_most_m: radius,
            scale: scale(span.relative_uncertainty()),
            notes: vec!["Only its size is given: it is taken as a sphere of this diameter.".to_owned()],
        }
    }

    /// The bounds of a body; none if its surface encloses no volume.
    pub fn of(body: &Body) -> Option<Self> {
        let extent = body.extent();
        let volume = extent.measure.volume;
        if !(volume > 0.0 && volume.is_finite()) {
            return None;
        }
        let least = (3.0 * volume / (4.0 * PI)).cbrt();
        let sphere = extent.enclosing_radius().max(least);
        let ellipsoid = principal_radii(extent.enclosing_ellipsoid()).into_iter().fold(0.0, f64::max);
        let most = if ellipsoid.is_finite() { sphere.min(ellipsoid).max(least) } else { sphere };
        let same = |bound: f64| if bound < least * (1.0 + SAME) { least } else { bound };
        let relative = body.uncertainties.iter().map(|input| match input {
            InputUncertainty::Size { relative, .. } => *relative,
            InputUncertainty::Viscosity { .. } => 0.0,
        });
        Some(Self {
            name: body.name.clone(),
            shape: body.shape.clone(),
            size_m: extent.size().into(),
            volume_m3: volume,
            enclosing_radius_m: same(sphere),
            radius_at_least_m: least,
            radius_at_most_m: same(most),
            scale: scale(relative.fold(0.0, f64::max)),
            notes: body.notes.clone(),
        })
    }

    /// Whether it is a sphere, or taken as one.
    pub fn is_sphere(&self) -> bool {
        self.enclosing_radius_m == self.radius_at_least_m
    }

    /// Longest over shortest edge of its box.
    pub(super) fn aspect(&self) -> f64 {
        let longest = self.size_m.into_iter().fold(0.0, f64::max);
        longest / self.size_m.into_iter().fold(f64::INFINITY, f64::min)
    }

    /// The same body, larger by a factor.
    pub(super) fn scaled(&self, factor: f64) -> Self {
        Self {
            size_m: self.size_m.map(|edge| factor * edge),
            volume_m3: factor.powi(3) * self.volume_m3,
            enclosing_radius_m: factor * self.enclosing_radius_m,
            radius_at_least_m: factor * self.radius_at_least_m,
            radius_at_most_m: factor * self.radius_at_most_m,
            ..self.clone()
        }
    }
}

fn scale(relative: f64) -> Quantity {
    Quantity::trusted(1.0, relative, Dimension::DIMENSIONLESS)
}

/// Principal drags of an ellipsoid over `6 pi mu`, by its half axes.
fn principal_radii(half_axes: [f64; 3]) -> [f64; 3] {
    // In units of the longest, so that squares neither overflow nor vanish.
    let unit = half_axes.into_iter().fold(0.0, f64::max);
    let [a, b, c] = half_axes.map(|x| (x / unit).powi(2));
    let radius = |own: f64, other: f64, third: f64| {
        unit * (8.0 / 3.0) / (2.0 * r_f(own, other, third) + 2.0 / 3.0 * own * r_d(other, third, own))
    };
    [radius(a, b, c), radius(b, c, a), radius(c, a, b)]
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::question::Pieces;

    fn body(text: &str) -> RegimeBody {
        RegimeBody::of(&Body::read(text, None, None, Pieces::Untold).unwrap()[0]).unwrap()
    }

    #[test]
    fn principal_drags_of_ellipsoids() {
        assert!(principal_radii([2.0; 3]).iter().all(|radius| (radius - 2.0).abs() < 1e-14));
        // README's table for 6 x 4 x 2: 1.794296 along x, 2.204821 along z (Oberbeck 1876).
        let [x, _, z] = principal_radii([3.0, 2.0, 1.0]);
        assert!((x - 1.794296).abs() < 1e-6 && (z - 2.204821).abs() < 1e-6);
        // A disc of radius 1, broadside: 16 mu a, that is 8/(3 pi).
        assert!((principal_radii([1.0, 1.0, 1e-9])[2] - 8.0 / (3.0 * PI)).abs() < 1e-6);
    }

    #[test]
    fn bounds_hold_the_solved_radius() {
        // Solved by `slowmote drag`, as in README: mean and largest drag over 6 pi mu, um.
        for (text, mean, largest) in [("rod:12x2um", 2.68, 2.961), ("cube:5um", 3.3733, 3.3733)] {
            let body = body(text);
            assert!(body.radius_at_least_m < mean * 1e-6 && body.radius_at_most_m > largest * 1e-6, "{body:?}");
            assert!(body.radius_at_most_m < 2.0 * body.radius_at_least_m);
        }
        let cell = body("redcell:7.82um");
        // A computation of our own: 3.02 um edge-on, 3.55 um face-on.
        assert!(cell.radius_at_least_m < 3.02e-6 && cell.radius_at_most_m > 3.55e-6);
    }

    #[test]
    fn the_bounds_of_a_sphere_meet() {
        let sphere = body("sphere:10±1um");
        assert!(sphere.is_sphere() && sphere.radius_at_most_m == sphere.radius_at_least_m);
        assert!(
            (sphere.radius_at_least_m / 5e-6 - 1.0).abs() < 1e-12
                && (sphere.scale.relative_uncertainty() - 0.1).abs() < 1e-12
        );
        assert!(!body("rod:12x2um").is_sphere());
    }
}
