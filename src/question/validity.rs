//! Does creeping flow hold? The verdict, from the resistance in open fluid alone.
//!
//! The first effect of inertia on a body of **any** shape that translates with `U` in unbounded fluid needs no
//! further solve (H. Brenner and R. G. Cox, J. Fluid Mech. 17 (1963) 561). With `f = R_tt U`,
//!
//! ```text
//! F = -f - rho / (32 pi mu^2) [ 3 |U| R_tt f - (u . f) f ],   u = U / |U|,
//! ```
//!
//! the force of the fluid on the body. Its component along U is right to this order for every shape; the lateral one
//! for shapes with a centre of symmetry. Along a principal direction the drag `D` grows by the factor
//! `1 + rho D / (16 pi mu^2)`, that is by `3/16 Re_h` with
//!
//! ```text
//! Re_h = 2 rho U R_h / mu,   R_h = (u . f) / (6 pi mu U).
//! ```
//!
//! Against the standard drag curve of a sphere the first order is 1 % too high at Re 0.3, 2 % at 0.5 and 5.6 % at 1
//! (R. Clift, J. R. Grace and M. E. Weber, *Bubbles, Drops, and Particles* (1978), table 5.2).

use std::f64::consts::PI;

use super::answer::{NumberVerdict, Validity, Verdict};
use super::bands::{
    BLURRED_PECLET, Bands, CORRECTABLE_REYNOLDS, KNUDSEN, PARTICLE_REYNOLDS, SPEED_LIMIT_REYNOLDS, TURNING_REYNOLDS,
    slip_factor, sphere_curve_excess,
};
use crate::stokes::rigid::{Motion, Resistance};
use crate::surface::Point;

/// What the verdict is made from; SI units throughout.
#[derive(Debug, Clone)]
pub struct Regime {
    /// Density of the fluid, kg/m3.
    pub density_kg_m3: f64,
    /// Its viscosity, Pa.s.
    pub viscosity_pa_s: f64,
    /// Its mean free path, m; none for a liquid.
    pub mean_free_path_m: Option<f64>,
    /// Resistance in open fluid, SI units.
    pub open_resistance: Resistance,
    /// Hydrodynamic radius of the orientation mean in open fluid, m.
    pub hydrodynamic_radius_m: f64,
    /// Diffusion coefficient, mean over directions, m2/s.
    pub diffusion_m2_per_s: f64,
    /// The motion about the resistance's reference point, m/s and rad/s; none if none is asked for.
    pub motion: Option<Motion>,
    /// Largest distance of the surface from the axis of rotation, m.
    pub radius_of_turning_m: f64,
}

impl Regime {
    /// The verdict: the worst of the numbers that apply decides.
    pub fn validity(&self) -> Validity {
        let translation = self.translation();
        let mut numbers = Vec::new();
        let mut notes = Vec::new();
        if let Some(translation) = &translation {
            numbers.push(self.particle_reynolds(translation));
            notes.extend(translation_note(translation));
            notes.extend(self.diffusion_note(translation.speed));
        }
        numbers.extend(self.rotation_reynolds());
        if let Some((number, note)) = self.knudsen() {
            numbers.push(number);
            notes.extend(note);
        }
        // The first of equally bad ones decides.
        let decisive = numbers.iter().rev().max_by_key(|number| number.verdict);
        Validity {
            verdict: decisive.map(|number| number.verdict),
            reynolds: translation.as_ref().map(|translation| translation.reynolds),
            inertial_drag_excess: translation.as_ref().map(|translation| translation.excess),
            decided_by: decisive.map(|number| number.name.clone()),
            speed_limit_m_per_s: self.speed_limit(translation.as_ref()),
            numbers,
            notes,
        }
    }

    /// Force of the fluid on a body that translates, with the first effect of inertia, N.
    ///
    /// None without a motion, and for one with rotation, which the law does not cover.
    pub fn force_with_inertia(&self) -> Option<Point> {
        let motion = self.motion.filter(|motion| motion.rotation == Point::zeros())?;
        let resistance = self.open_resistance.force_velocity();
        let speed = motion.velocity.norm();
        let drag = resistance * motion.velocity;
        if speed == 0.0 {
            return Some(Point::zeros());
        }
        let direction = motion.velocity / speed;
        let bracket = 3.0 * speed * (resistance * drag) - direction.dot(&drag) * drag;
        Some(-drag - self.inertia_factor() * bracket)
    }

    /// `rho / (32 pi mu^2)`.
    fn inertia_factor(&self) -> f64 {
        self.density_kg_m3 / (32.0 * PI * self.viscosity_pa_s.powi(2))
    }

    /// The translation of the centre of resistance: turning about a far point moves the body as a whole.
    fn translation(&self) -> Option<Translation> {
        let motion = self.motion?;
        let arm = self.open_resistance.centre() - self.open_resistance.reference;
        let velocity = motion.seen_from(&arm).velocity;
        let speed = velocity.norm();
        // A spin about the centre itself leaves only rounding there.
        if speed == 0.0 || speed <= 1e-9 * motion.rotation.norm() * self.radius_of_turning_m {
            return None;
        }
        let resistance = self.open_resistance.force_velocity();
        let direction = velocity / speed;
        let drag = resistance * velocity;
        let along = direction.dot(&drag);
        let bracket = 3.0 * speed * direction.dot(&(resistance * drag)) - along * along;
        let radius_m = along / (6.0 * PI * self.viscosity_pa_s * speed);
        Some(Translation {
            speed,
            reynolds: self.reynolds(speed, radius_m),
            excess: self.inertia_factor() * bracket / along,
            radius_m,
            oblique: (drag - along * direction).norm() > 1e-3 * along,
        })
    }

    fn reynolds(&self, speed: f64, radius_m: f64) -> f64 {
        2.0 * self.density_kg_m3 * speed * radius_m / self.viscosity_pa_s
    }

    fn speed_limit(&self, translation: Option<&Translation>) -> Option<f64> {
        let radius_m = match translation {
            Some(translation) => translation.radius_m,
            None => {
                let values = self.open_resistance.force_velocity().symmetric_eigenvalues();
                values.max() / (6.0 * PI * self.viscosity_pa_s)
            }
        };
        let limit = SPEED_LIMIT_REYNOLDS / self.reynolds(1.0, radius_m);
        limit.is_finite().then_some(limit)
    }

    fn particle_reynolds(&self, translation: &Translation) -> NumberVerdict {
        let Translation { reynolds, excess, .. } = *translation;
        let percent = 100.0 * excess;
        let verdict = PARTICLE_REYNOLDS.verdict(reynolds);
        let meaning = match verdict {
            Verdict::Creeping => "inertia adds less than 1 % to the drag".to_owned(),
            Verdict::Corrected => format!("inertia adds about {percent:.1} % to the drag; take the corrected force"),
            Verdict::Doubtful => format!("inertia adds 5 to 20 % to the drag; {percent:.0} % is the first order only"),
            Verdict::Outside => "inertia is as strong as viscosity; the Stokes drag is far too low".to_owned(),
        };
        named("particle Reynolds number", reynolds, PARTICLE_REYNOLDS, meaning)
    }

    fn rotation_reynolds(&self) -> Option<NumberVerdict> {
        let rate = self.motion?.rotation.norm();
        if rate == 0.0 {
            return None;
        }
        let value = self.density_kg_m3 * rate * self.radius_of_turning_m.powi(2) / self.viscosity_pa_s;
        let meaning = match TURNING_REYNOLDS.verdict(value) {
            Verdict::Creeping | Verdict::Corrected => "the turning body drives no secondary flow that matters",
            Verdict::Doubtful => "the turning body begins to drive a secondary flow, which adds to the torque",
            Verdict::Outside => "the turning body flings fluid outwards; the Stokes torque is too low",
        };
        Some(named("rotation Reynolds number", value, TURNING_REYNOLDS, meaning.to_owned()))
    }

    fn knudsen(&self) -> Option<(NumberVerdict, Option<String>)> {
        let value = self.mean_free_path_m? / self.hydrodynamic_radius_m;
        let verdict = KNUDSEN.verdict(value);
        let meaning = match verdict {
            Verdict::Creeping => "the gas sticks to the body as a liquid would",
            Verdict::Corrected => "the gas slips a little along the body; divide drags by the slip factor",
            Verdict::Doubtful => "the gas slips along the body; the slip factor is that of a sphere",
            Verdict::Outside => "molecules hit the body one by one; the flow of a continuum is no answer",
        };
        let note = (verdict > Verdict::Creeping).then(|| {
            let slip = slip_factor(value);
            format!(
                "The drags are those without slip. In this gas divide them by {slip:.3}, and multiply mobilities and \
                 diffusion by it (slip factor of the sphere of equal hydrodynamic radius, Kim et al. 2005)."
            )
        });
        Some((named("Knudsen number", value, KNUDSEN, meaning.to_owned()), note))
    }

    fn diffusion_note(&self, speed: f64) -> Option<String> {
        let peclet = speed * self.hydrodynamic_radius_m / self.diffusion_m2_per_s;
        if peclet >= BLURRED_PECLET || !peclet.is_finite() {
            return None;
        }
        let what = if peclet < 1.0 { "is ruled by Brownian motion" } else { "is blurred by Brownian motion" };
        Some(format!("At this speed the path {what} (Peclet number {peclet:.2}): force and speed are means."))
    }
}

/// How a body translates, and what inertia makes of it.
#[derive(Debug, Clone, Copy)]
struct Translation {
    speed: f64,
    reynolds: f64,
    excess: f64,
    /// Drag along the motion over `6 pi mu U`.
    radius_m: f64,
    /// Whether the drag is not along the motion.
    oblique: bool,
}

/// What there is to add about the correction.
fn translation_note(translation: &Translation) -> Vec<String> {
    let mut notes = Vec::new();
    if translation.reynolds > CORRECTABLE_REYNOLDS {
        let curve = 100.0 * sphere_curve_excess(translation.reynolds);
        let first = 100.0 * translation.excess;
        notes.push(format!(
            "Inertia for this shape, to first order: +{first:.0} %. On the standard curve of a sphere at this \
             Reynolds number: +{curve:.0} % (Clift, Grace and Weber 1978). The truth for a compact body lies about \
             there; long and flat ones differ."
        ));
    }
    if translation.oblique && translation.reynolds > SPEED_LIMIT_REYNOLDS {
        notes.push(
            "The sideways part of the inertial force holds for bodies with a centre of symmetry; for others it is the \
             mean of moving forth and back."
                .to_owned(),
        );
    }
    notes
}

fn named(name: &str, value: f64, bands: Bands, meaning: String) -> NumberVerdict {
    let (threshold, verdict) = (bands.creeping, bands.verdict(value));
    NumberVerdict { name: name.to_owned(), value, threshold, verdict, meaning }
}

#[cfg(test)]
mod tests {
    use nalgebra::{Matrix3, Matrix6};

    use super::*;

    /// A sphere of radius 1 mm in a fluid of density 1000 and viscosity 1, so that Re_h = 2 U in m/s.
    fn sphere(motion: Option<Motion>) -> Regime {
        let (viscosity, radius) = (1.0, 1e-3);
        let unit = Resistance::isotropic(6.0 * PI, 8.0 * PI, Point::zeros());
        Regime {
            density_kg_m3: 1000.0,
            viscosity_pa_s: viscosity,
            mean_free_path_m: None,
            open_resistance: unit.scaled(viscosity, radius),
            hydrodynamic_radius_m: radius,
            diffusion_m2_per_s: 1e-19,
            motion,
            radius_of_turning_m: radius,
        }
    }

    fn moving(speed: f64) -> Option<Motion> {
        Some(Motion { velocity: Point::x() * speed, rotation: Point::zeros() })
    }

    #[test]
    fn a_sphere_has_the_excess_of_oseen() {
        // Oseen 1910: 3/16 Re, exact.
        let regime = sphere(moving(0.02));
        let validity = regime.validity();
        assert!((validity.reynolds.unwrap() - 0.04).abs() < 1e-12);
        assert!((validity.inertial_drag_excess.unwrap() - 3.0 / 16.0 * 0.04).abs() < 1e-12);
        let force = regime.force_with_inertia().unwrap();
        let expected = -6.0 * PI * 1e-3 * 0.02 * (1.0 + 3.0 / 16.0 * 0.04);
        assert!((force - Point::x() * expected).norm() < 1e-12 * expected.abs());
    }

    #[test]
    fn oblique_motion_follows_the_vector_law() {
        // Drags 1 and 2 (times 16 pi) along x and y, motion along the bisector, worked by hand:
        // f = 16 pi (1, 2) U/sqrt2, R f = (16 pi)^2 (1, 4) U/sqrt2, u.f = 16 pi 3/2 U;
        // along U: [3 * 5/2 - 9/4] (16 pi)^2 U^2 / (32 pi) = 21/4 * 8 pi U^2, over u.f: 21/12 = 1.75 rho U.
        let mut regime = sphere(None);
        let mut matrix = Matrix6::identity() * (16.0 * PI);
        matrix[(1, 1)] *= 2.0;
        regime.open_resistance = Resistance::new(matrix, Point::zeros());
        regime.density_kg_m3 = 1.0;
        let velocity = Point::new(1.0, 1.0, 0.0).normalize() * 0.01;
        regime.motion = Some(Motion { velocity, rotation: Point::zeros() });
        let validity = regime.validity();
        assert!((validity.inertial_drag_excess.unwrap() - 0.0175).abs() < 1e-12);
        let stokes = -(matrix.fixed_view::<3, 3>(0, 0).into_owned() as Matrix3<f64>) * velocity;
        let extra = regime.force_with_inertia().unwrap() - stokes;
        let ratio = extra.dot(&velocity) / stokes.dot(&velocity);
        assert!((ratio - 0.0175).abs() < 1e-12);
    }

    #[test]
    fn words_change_at_the_thresholds() {
        let word = |reynolds: f64| sphere(moving(reynolds / 2.0)).validity().verdict.unwrap();
        assert_eq!(word(0.049), Verdict::Creeping);
        assert_eq!(word(0.051), Verdict::Corrected);
        assert_eq!(word(0.49), Verdict::Corrected);
        assert_eq!(word(0.51), Verdict::Doubtful);
        assert_eq!(word(0.99), Verdict::Doubtful);
        assert_eq!(word(1.01), Verdict::Outside);
        assert!(sphere(moving(0.3)).validity().notes.iter().any(|note| note.contains("Clift")));
    }

    #[test]
    fn the_limit_is_where_the_reynolds_number_says() {
        let limit = sphere(None).validity().speed_limit_m_per_s.unwrap();
        assert!((limit - 0.025).abs() < 1e-12);
        assert_eq!(sphere(None).validity().verdict, None);
        let at_limit = sphere(moving(limit)).validity();
        assert!((at_limit.reynolds.unwrap() - SPEED_LIMIT_REYNOLDS).abs() < 1e-12);
    }

    #[test]
    fn a_spin_has_a_number_of_its_own() {
        let spin =
            |rate: f64| sphere(Some(Motion { velocity: Point::zeros(), rotation: Point::z() * rate })).validity();
        // rho Omega a^2 / mu = 1e-3 Omega
        assert_eq!(spin(99.0).verdict, Some(Verdict::Creeping));
        assert_eq!(spin(101.0).verdict, Some(Verdict::Doubtful));
        assert_eq!(spin(1001.0).verdict, Some(Verdict::Outside));
        assert_eq!(spin(99.0).reynolds, None);
        assert_eq!(spin(99.0).decided_by.as_deref(), Some("rotation Reynolds number"));
        let both = Motion { velocity: Point::x() * 0.001, rotation: Point::z() * 101.0 };
        let both = sphere(Some(both)).validity();
        assert_eq!((both.numbers.len(), both.verdict), (2, Some(Verdict::Doubtful)));
    }

    #[test]
    fn turning_about_a_far_point_counts_as_translation() {
        let mut regime = sphere(Some(Motion { velocity: Point::zeros(), rotation: Point::z() }));
        regime.open_resistance = regime.open_resistance.about(&(Point::x() * -0.02));
        regime.radius_of_turning_m = 0.021;
        let reynolds = regime.validity().reynolds.unwrap();
        assert!((reynolds - 2.0 * 0.02).abs() < 1e-12);
    }

    #[test]
    fn a_gas_brings_its_slip_factor() {
        // Kim et al. 2005 at 1 um and a mean free path of 67.3 nm: 1.1568, recomputed.
        let mut regime = sphere(None);
        regime.hydrodynamic_radius_m = 0.5e-6;
        regime.mean_free_path_m = Some(67.3e-9);
        let validity = regime.validity();
        assert_eq!(validity.verdict, Some(Verdict::Doubtful));
        assert!(validity.notes.iter().any(|note| note.contains("1.157")));
        regime.hydrodynamic_radius_m = 5e-6;
        assert_eq!(regime.validity().verdict, Some(Verdict::Corrected));
    }
}
