//! Gauss-Legendre rules on `[0, 1]`.

/// Largest number of points that [`gauss_legendre`] tabulates.
pub const MOST_POINTS: usize = 16;

/// Points and weights of the `n`-point Gauss-Legendre rule on `[0, 1]`, exact to degree `2 n - 1`.
///
/// Roots of the Legendre polynomial by Newton's method from Tricomi's starting values. `n` is brought into
/// `1..=MOST_POINTS`.
pub fn gauss_legendre(n: usize) -> Vec<(f64, f64)> {
    let n = n.clamp(1, MOST_POINTS);
    (0..n)
        .map(|i| {
            let mut x = (std::f64::consts::PI * (i as f64 + 0.75) / (n as f64 + 0.5)).cos();
            let mut slope = 1.0;
            for _ in 0..20 {
                let (value, derivative) = legendre(n, x);
                slope = derivative;
                let step = value / slope;
                x -= step;
                if step.abs() < 1e-16 {
                    break;
                }
            }
            (0.5 * (1.0 - x), 1.0 / ((1.0 - x * x) * slope * slope))
        })
        .collect()
}

/// The Legendre polynomial of degree `n` and its derivative, for `|x| < 1`.
fn legendre(n: usize, x: f64) -> (f64, f64) {
    let (mut before, mut value) = (1.0, x);
    for k in 2..=n {
        let k = k as f64;
        (before, value) = (value, ((2.0 * k - 1.0) * x * value - (k - 1.0) * before) / k);
    }
    (value, n as f64 * (x * value - before) / (x * x - 1.0))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn each_rule_integrates_its_degree_and_not_beyond() {
        for n in 1..=MOST_POINTS {
            let rule = gauss_legendre(n);
            let error = |degree: i32| {
                (rule.iter().map(|(x, w)| w * x.powi(degree)).sum::<f64>() - 1.0 / f64::from(degree + 1)).abs()
            };
            let n = n as i32;
            for degree in 0..2 * n {
                assert!(error(degree) < 1e-15, "{n} points, degree {degree}: {:e}", error(degree));
            }
            if n < 8 {
                assert!(error(2 * n) > 1e-11);
            }
        }
    }
}
