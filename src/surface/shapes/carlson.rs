//! Carlson's symmetric elliptic integrals, for the area of ellipsoids and for bounds on the drag of bodies in them.
//!
//! Duplication algorithm of Carlson (1995), Numerical Algorithms 10, 13-26; series and definitions as in DLMF 19.36
//! and 19.21. Relative error a few units of 1e-15.

/// The series below is cut after fifth order: below this spread its error is under one part in 1e16.
const SPREAD: f64 = 2.5e-3;

/// More duplications than any pair of doubles needs: each brings the arguments closer by a factor of four.
const MOST_STEPS: usize = 400;

/// `R_F(x, y, z) = 1/2 int_0^inf dt / sqrt((t + x)(t + y)(t + z))`; arguments not negative, at most one zero.
pub(crate) fn r_f(x: f64, y: f64, z: f64) -> f64 {
    let (mut x, mut y, mut z) = (x, y, z);
    for _ in 0..MOST_STEPS {
        let mean = (x + y + z) / 3.0;
        let (dx, dy) = (1.0 - x / mean, 1.0 - y / mean);
        let dz = -(dx + dy);
        if dx.abs().max(dy.abs()).max(dz.abs()) < SPREAD {
            let (e2, e3) = (dx * dy - dz * dz, dx * dy * dz);
            return (1.0 - e2 / 10.0 + e3 / 14.0 + e2 * e2 / 24.0 - 3.0 * e2 * e3 / 44.0) / mean.sqrt();
        }
        let shift = (x * y).sqrt() + (y * z).sqrt() + (z * x).sqrt();
        (x, y, z) = (0.25 * (x + shift), 0.25 * (y + shift), 0.25 * (z + shift));
    }
    f64::NAN
}

/// `R_D(x, y, z) = 3/2 int_0^inf dt / ((t + z) sqrt((t + x)(t + y)(t + z)))`; `z > 0`, `x + y > 0`.
pub(crate) fn r_d(x: f64, y: f64, z: f64) -> f64 {
    let (mut x, mut y, mut z) = (x, y, z);
    let (mut sum, mut factor) = (0.0, 1.0);
    for _ in 0..MOST_STEPS {
        let mean = (x + y + 3.0 * z) / 5.0;
        let (dx, dy) = (1.0 - x / mean, 1.0 - y / mean);
        let dz = -(dx + dy) / 3.0;
        if dx.abs().max(dy.abs()).max(dz.abs()) < SPREAD {
            let (xy, zz) = (dx * dy, dz * dz);
            let e2 = xy - 6.0 * zz;
            let e3 = (3.0 * xy - 8.0 * zz) * dz;
            let e4 = 3.0 * (xy - zz) * zz;
            let e5 = xy * zz * dz;
            let series =
                1.0 - 3.0 * e2 / 14.0 + e3 / 6.0 + 9.0 * e2 * e2 / 88.0 - 3.0 * e4 / 22.0 - 9.0 * e2 * e3 / 52.0
                    + 3.0 * e5 / 26.0;
            return 3.0 * sum + factor * series / (mean * mean.sqrt());
        }
        let shift = (x * y).sqrt() + (y * z).sqrt() + (z * x).sqrt();
        sum += factor / (z.sqrt() * (z + shift));
        factor *= 0.25;
        (x, y, z) = (0.25 * (x + shift), 0.25 * (y + shift), 0.25 * (z + shift));
    }
    f64::NAN
}

/// `R_G`, the mean of `sqrt(x u_x^2 + y u_y^2 + z u_z^2)` over directions; arguments not negative (DLMF 19.21.10).
pub(super) fn r_g(x: f64, y: f64, z: f64) -> f64 {
    // The largest argument stands in for the formula's z, and the middle one for its y, against cancellation.
    let mut ordered = [x, y, z];
    ordered.sort_by(f64::total_cmp);
    let [x, z, y] = ordered;
    0.5 * (z * r_f(x, y, z) - (x - z) * (y - z) * r_d(x, y, z) / 3.0 + (x * y / z).sqrt())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn equal_arguments_have_closed_forms() {
        for x in [0.3, 1.0, 70.0_f64] {
            assert!((r_f(x, x, x) * x.sqrt() - 1.0).abs() < 4e-16);
            assert!((r_d(x, x, x) * x.powf(1.5) - 1.0).abs() < 4e-16);
            assert!((r_g(x, x, x) / x.sqrt() - 1.0).abs() < 4e-16);
        }
    }

    /// Carlson (1995), section 3, as reprinted in DLMF 19.36: R_F(1, 2, 0), R_D(0, 2, 1), R_G(0, 0.0796, 4).
    #[test]
    fn published_values() {
        assert!((r_f(1.0, 2.0, 0.0) - 1.3110287771461).abs() < 1e-13);
        assert!((r_d(0.0, 2.0, 1.0) - 1.7972103521034).abs() < 1e-13);
        assert!((r_g(0.0, 0.0796, 4.0) - 1.0284758090288).abs() < 1e-13);
    }
}
