//! Flow driven by pressure through a rectangular duct, in closed series.
//!
//! A duct of long side `w` and short side `h` in a fluid of viscosity `mu` with pressure gradient `G = -dp/dx`. With
//! `n = 1, 3, 5, ...`, `x_n = n pi w / (2 h)` and the sums of the leading parts in closed form (J. Boussinesq 1868, as in
//! F. M. White, *Viscous Fluid Flow*, from memory; the tests compare with tabled values):
//!
//! ```text
//! mean speed          h^2 G / (12 mu)  [1 - (192 / pi^5) (h/w) sum tanh(x_n) / n^5]
//! largest speed       h^2 G / (8 mu)   [1 - (32 / pi^3) sum (-1)^((n-1)/2) sech(x_n) / n^3]
//! largest wall shear  h G / (2 mu)     [1 - (8 / pi^2) sum sech(x_n) / n^2],  in the middle of the long side
//! ```
//!
//! As `x_n >= n pi/2`, the sums converge like `exp(-n pi/2)`; so does the first with `tanh = 1 - 2/(exp(2x) + 1)`.

use std::f64::consts::PI;

/// Terms of each sum: the last is below 1e-20 of the first in a square duct, and smaller in a flat one.
const TERMS: usize = 16;

/// `sum 1/n^5` over odd n: `31/32 zeta(5)`.
const SUM_OF_FIFTH_POWERS: f64 = 1.004_523_762_795_139_6;

/// What a duct makes of a mean speed of one, in units of its short side.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct DuctFlow {
    /// Pressure gradient over `mu U / h^2`.
    pub gradient: f64,
    /// Largest over mean speed.
    pub largest_speed: f64,
    /// Largest shear rate at the wall over `U / h`.
    pub wall_shear: f64,
}

impl DuctFlow {
    /// The flow in a duct whose long side is so many times the short one, one at least.
    pub(super) fn of(aspect: f64) -> Self {
        let odd = (0..TERMS).map(|k| {
            let n = (2 * k + 1) as f64;
            let sign = if k % 2 == 0 { 1.0 } else { -1.0 };
            (n, sign, 0.5 * n * PI * aspect)
        });
        let (mut fifth, mut third, mut second) = (SUM_OF_FIFTH_POWERS, 0.0, 0.0);
        for (n, sign, x) in odd {
            fifth -= 2.0 / (n.powi(5) * ((2.0 * x).exp() + 1.0));
            third += sign / (n.powi(3) * x.cosh());
            second += 1.0 / (n * n * x.cosh());
        }
        let mean = (1.0 - 192.0 / PI.powi(5) / aspect * fifth) / 12.0;
        let largest = (1.0 - 32.0 / PI.powi(3) * third) / 8.0;
        let shear = (1.0 - 8.0 / (PI * PI) * second) / 2.0;
        Self { gradient: 1.0 / mean, largest_speed: largest / mean, wall_shear: shear / mean }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// The plain sums, with so many terms that the slowest is below 1e-10.
    fn plain(aspect: f64) -> [f64; 3] {
        let (mut mean, mut largest, mut shear) = (0.0, 0.0, 0.0);
        for k in 0..4_000_000_u32 {
            let n = f64::from(2 * k + 1);
            let x = 0.5 * n * PI * aspect;
            let sign = if k % 2 == 0 { 1.0 } else { -1.0 };
            let sech = if x < 700.0 { 1.0 / x.cosh() } else { 0.0 };
            mean += x.tanh() / n.powi(5);
            largest += sign * (1.0 - sech) / n.powi(3);
            shear += (1.0 - sech) / (n * n);
        }
        let mean = (1.0 - 192.0 / PI.powi(5) / aspect * mean) / 12.0;
        [1.0 / mean, 4.0 / PI.powi(3) * largest / mean, 4.0 / (PI * PI) * shear / mean]
    }

    #[test]
    fn the_quick_sums_are_the_plain_ones() {
        for aspect in [1.0, 1.7, 5.0] {
            let DuctFlow { gradient, largest_speed, wall_shear } = DuctFlow::of(aspect);
            let [a, b, c] = plain(aspect);
            assert!((gradient / a - 1.0).abs() < 1e-12 && (largest_speed / b - 1.0).abs() < 1e-12);
            // The plain sum of 1/n^2 lacks 1/(4 N) of pi^2/8 after N terms.
            assert!((wall_shear / c - 1.0).abs() < 1e-7, "{aspect}");
        }
    }

    #[test]
    fn friction_is_that_of_the_tables() {
        // Shah and London 1978, Fanning f Re of rectangular ducts, from memory: 14.22708 (1:1), 15.54806 (1:2),
        // 18.23278 (1:4), 21.16888 (1:10). Four times that is Darcy's, 2 D_h^2 G / (mu U).
        for (aspect, tabled) in [(1.0, 14.22708), (2.0, 15.54806), (4.0, 18.23278), (10.0, 21.16888)] {
            let hydraulic = 2.0 * aspect / (1.0 + aspect);
            let friction = 0.5 * hydraulic * hydraulic * DuctFlow::of(aspect).gradient;
            assert!((friction - tabled).abs() < 1e-5, "{aspect}: {friction}");
        }
        // The same table: largest over mean speed 2.0962 (1:1), from memory.
        assert!((DuctFlow::of(1.0).largest_speed - 2.0962).abs() < 2e-4);
    }

    #[test]
    fn a_flat_duct_is_a_slot_but_for_its_ends() {
        // As w/h grows: 12, 3/2, 6, with the ends taking 0.630 h/w of the flow.
        let flow = DuctFlow::of(1e6);
        assert!((flow.gradient / 12.0 - 1.0).abs() < 1e-6);
        assert!((flow.largest_speed - 1.5).abs() < 2e-6 && (flow.wall_shear - 6.0).abs() < 1e-5);
        assert!((12.0 / DuctFlow::of(100.0).gradient - (1.0 - 0.6302e-2)).abs() < 1e-5);
    }
}
