//! Where creeping flow ends: the thresholds of the dimensionless numbers, and what is known beyond the first of them.
//!
//! Shared by the verdict of `drag` and by `regime`, so that both say the same of the same number.

use super::answer::Verdict;

/// Three thresholds that rise, or fall for a number that must be large, and cut its values into verdicts.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Bands {
    /// Up to here creeping flow holds.
    pub creeping: f64,
    /// Up to here a correction can be given; where there is none, equal to `creeping`.
    pub corrected: f64,
    /// Beyond this the answer is none.
    pub doubtful: f64,
}

impl Bands {
    pub(super) const fn new(creeping: f64, corrected: f64, doubtful: f64) -> Self {
        Self { creeping, corrected, doubtful }
    }

    /// The verdict on a value.
    pub(super) fn verdict(&self, value: f64) -> Verdict {
        if self.wants_large() {
            // The reciprocal of a number that must be large is one that must be small.
            return Self::new(1.0 / self.creeping, 1.0 / self.corrected, 1.0 / self.doubtful).verdict(1.0 / value);
        }
        if value < self.creeping {
            Verdict::Creeping
        } else if value < self.corrected {
            Verdict::Corrected
        } else if value <= self.doubtful {
            Verdict::Doubtful
        } else {
            Verdict::Outside
        }
    }

    /// Whether the number must be large.
    pub(super) fn wants_large(&self) -> bool {
        self.creeping > self.doubtful
    }

    /// The same bands for a number that is a multiple of this one.
    pub(super) const fn times(&self, factor: f64) -> Self {
        Self::new(factor * self.creeping, factor * self.corrected, factor * self.doubtful)
    }
}

/// Below this Re_h inertia adds less than 1 % to the drag (3/16 x 0.05 = 0.94 %); the speed limit is set by it.
pub const SPEED_LIMIT_REYNOLDS: f64 = 0.05;

/// Up to this Re_h the first-order correction is good to 2 % of the drag of a sphere.
pub(super) const CORRECTABLE_REYNOLDS: f64 = 0.5;

/// Beyond this Re_h the first order is off by more than 5 %, and wakes differ from shape to shape.
const LARGEST_REYNOLDS: f64 = 1.0;

/// The particle Reynolds number `Re_h = 2 rho U R_h / mu`.
pub(super) const PARTICLE_REYNOLDS: Bands = Bands::new(SPEED_LIMIT_REYNOLDS, CORRECTABLE_REYNOLDS, LARGEST_REYNOLDS);

/// Below this rotational Reynolds number a turning body drives no secondary flow to speak of. Common practice, no
/// source; a sphere's torque is then raised by less than 1e-4, from memory.
const CREEPING_ROTATION_REYNOLDS: f64 = 0.1;

/// Beyond this rotational Reynolds number secondary flow is as strong as the rotation itself. Common practice.
const LARGEST_ROTATION_REYNOLDS: f64 = 1.0;

/// `rho Omega a^2 / mu` and `rho gamma a^2 / mu`. There is no correction to give, so that band is empty.
pub(super) const TURNING_REYNOLDS: Bands =
    Bands::new(CREEPING_ROTATION_REYNOLDS, CREEPING_ROTATION_REYNOLDS, LARGEST_ROTATION_REYNOLDS);

/// Below this Knudsen number slip changes the drag by less than 1.2 %.
const CONTINUUM_KNUDSEN: f64 = 0.01;

/// Up to this Knudsen number the slip factor of a sphere serves for bodies that are not too long or flat.
const SLIP_KNUDSEN: f64 = 0.1;

/// Beyond this Knudsen number the drag in a continuum is more than twice what a gas exerts.
const LARGEST_KNUDSEN: f64 = 1.0;

/// The Knudsen number, mean free path over hydrodynamic radius.
pub(super) const KNUDSEN: Bands = Bands::new(CONTINUUM_KNUDSEN, SLIP_KNUDSEN, LARGEST_KNUDSEN);

/// Slip factor `1 + Kn [A + B exp(-C / Kn)]`: J. H. Kim et al., J. Res. Natl. Inst. Stand. Technol. 110 (2005) 31.
const SLIP_A: f64 = 1.165;
const SLIP_B: f64 = 0.483;
const SLIP_C: f64 = 0.997;

/// Below this Peclet number a path is visibly blurred by diffusion, and below 1 ruled by it. Common practice.
pub(super) const BLURRED_PECLET: f64 = 100.0;

/// What drags in a gas are divided by, for a sphere of this Knudsen number.
pub(super) fn slip_factor(knudsen: f64) -> f64 {
    1.0 + knudsen * (SLIP_A + SLIP_B * (-SLIP_C / knudsen).exp())
}

/// Excess of a sphere's drag over Stokes's on the standard curve, for Re from 0.01 to 260.
///
/// Source: Clift, Grace and Weber (1978), table 5.2; the first branch is Oseen's.
pub(super) fn sphere_curve_excess(reynolds: f64) -> f64 {
    if reynolds < 0.01 {
        3.0 / 16.0 * reynolds
    } else if reynolds <= 20.0 {
        0.1315 * reynolds.powf(0.82 - 0.05 * reynolds.log10())
    } else {
        0.1935 * reynolds.powf(0.6305)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_number_that_must_be_large_is_judged_the_other_way_round() {
        let bands = Bands::new(100.0, 1.0, 1.0);
        let words = [101.0, 99.0, 1.1, 0.9].map(|value| bands.verdict(value));
        assert_eq!(words, [Verdict::Creeping, Verdict::Corrected, Verdict::Corrected, Verdict::Outside]);
        assert_eq!(bands.verdict(0.0), Verdict::Outside);
    }

    #[test]
    fn the_standard_curve_of_the_sphere() {
        // Clift, Grace and Weber 1978: 0.19 % at Re 0.01, 1.8 % at 0.1, 4.7 % at 0.3, 7.4 % at 0.5, 13 % at 1.
        for (reynolds, percent, digits) in
            [(0.01, 0.19, 0.005), (0.1, 1.8, 0.05), (0.3, 4.7, 0.05), (0.5, 7.4, 0.05), (1.0, 13.0, 0.5)]
        {
            assert!((100.0 * sphere_curve_excess(reynolds) - percent).abs() <= digits, "{reynolds}");
        }
    }
}
