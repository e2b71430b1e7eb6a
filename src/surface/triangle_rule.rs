//! Quadrature rules on the reference triangle `u, v >= 0, u + v <= 1` (area 1/2).
//!
//! Symmetric rules of Dunavant (1985), Int. J. Numer. Meth. Engng 21, 1129, degrees 1, 2, 4, 6 and 8, with 1, 3, 6,
//! 12 and 16 points, all inside and with positive weights. Orbits are polished to double precision by the tests'
//! moment equations.

/// A point of a rule: reference coordinates and weight; the weights sum to the area 1/2.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct RulePoint {
    /// First reference coordinate.
    pub u: f64,
    /// Second reference coordinate.
    pub v: f64,
    /// Weight.
    pub weight: f64,
}

/// The 1-point rule, exact for polynomials of degree 1.
pub fn degree_1() -> &'static [RulePoint] {
    &DEGREE_1
}

/// The 3-point rule, exact for polynomials of degree 2.
pub fn degree_2() -> &'static [RulePoint] {
    &DEGREE_2
}

/// The 6-point rule, exact for polynomials of degree 4.
pub fn degree_4() -> &'static [RulePoint] {
    &DEGREE_4
}

/// The 12-point rule, exact for polynomials of degree 6.
pub fn degree_6() -> &'static [RulePoint] {
    &DEGREE_6
}

/// The 16-point rule, exact for polynomials of degree 8.
pub fn degree_8() -> &'static [RulePoint] {
    &DEGREE_8
}

static DEGREE_1: [RulePoint; 1] = [RulePoint { u: 0.3333333333333333, v: 0.3333333333333333, weight: 0.5 }];

static DEGREE_2: [RulePoint; 3] = [
    RulePoint { u: 0.16666666666666669, v: 0.16666666666666669, weight: 0.16666666666666666 },
    RulePoint { u: 0.6666666666666666, v: 0.16666666666666669, weight: 0.16666666666666666 },
    RulePoint { u: 0.16666666666666669, v: 0.6666666666666666, weight: 0.16666666666666666 },
];

static DEGREE_4: [RulePoint; 6] = [
    RulePoint { u: 0.4459484909159647, v: 0.4459484909159647, weight: 0.11169079483900547 },
    RulePoint { u: 0.10810301816807055, v: 0.4459484909159647, weight: 0.11169079483900547 },
    RulePoint { u: 0.4459484909159647, v: 0.10810301816807055, weight: 0.11169079483900547 },
    RulePoint { u: 0.09157621350977109, v: 0.09157621350977109, weight: 0.054975871827661185 },
    RulePoint { u: 0.8168475729804578, v: 0.09157621350977109, weight: 0.054975871827661185 },
    RulePoint { u: 0.09157621350977109, v: 0.8168475729804578, weight: 0.054975871827661185 },
];

static DEGREE_6: [RulePoint; 12] = [
    RulePoint { u: 0.2492867451708931, v: 0.2492867451708931, weight: 0.05839313786320402 },
    RulePoint { u: 0.5014265096582138, v: 0.2492867451708931, weight: 0.05839313786320402 },
    RulePoint { u: 0.2492867451708931, v: 0.5014265096582138, weight: 0.05839313786320402 },
    RulePoint { u: 0.0630890144915057, v: 0.0630890144915057, weight: 0.0254224531851059 },
    RulePoint { u: 0.8738219710169886, v: 0.0630890144915057, weight: 0.0254224531851059 },
    RulePoint { u: 0.0630890144915057, v: 0.8738219710169886, weight: 0.0254224531851059 },
    RulePoint { u: 0.05314504984480485, v: 0.31035245103379766, weight: 0.04142553780917838 },
    RulePoint { u: 0.31035245103379766, v: 0.05314504984480485, weight: 0.04142553780917838 },
    RulePoint { u: 0.05314504984480485, v: 0.6365024991213974, weight: 0.04142553780917838 },
    RulePoint { u: 0.6365024991213974, v: 0.05314504984480485, weight: 0.04142553780917838 },
    RulePoint { u: 0.31035245103379766, v: 0.6365024991213974, weight: 0.04142553780917838 },
    RulePoint { u: 0.6365024991213974, v: 0.31035245103379766, weight: 0.04142553780917838 },
];

static DEGREE_8: [RulePoint; 16] = [
    RulePoint { u: 0.3333333333333333, v: 0.3333333333333333, weight: 0.0721578038388157 },
    RulePoint { u: 0.4592925882926215, v: 0.4592925882926215, weight: 0.04754581713369295 },
    RulePoint { u: 0.08141482341475703, v: 0.4592925882926215, weight: 0.04754581713369295 },
    RulePoint { u: 0.4592925882926215, v: 0.08141482341475703, weight: 0.04754581713369295 },
    RulePoint { u: 0.1705693077516521, v: 0.1705693077516521, weight: 0.05160868526735799 },
    RulePoint { u: 0.6588613844966957, v: 0.1705693077516521, weight: 0.05160868526735799 },
    RulePoint { u: 0.1705693077516521, v: 0.6588613844966957, weight: 0.05160868526735799 },
    RulePoint { u: 0.050547228317032324, v: 0.050547228317032324, weight: 0.016229248811604174 },
    RulePoint { u: 0.8989055433659353, v: 0.050547228317032324, weight: 0.016229248811604174 },
    RulePoint { u: 0.050547228317032324, v: 0.8989055433659353, weight: 0.016229248811604174 },
    RulePoint { u: 0.008394777409834778, v: 0.2631128296349457, weight: 0.013615157087203159 },
    RulePoint { u: 0.2631128296349457, v: 0.008394777409834778, weight: 0.013615157087203159 },
    RulePoint { u: 0.008394777409834778, v: 0.7284923929552196, weight: 0.013615157087203159 },
    RulePoint { u: 0.7284923929552196, v: 0.008394777409834778, weight: 0.013615157087203159 },
    RulePoint { u: 0.2631128296349457, v: 0.7284923929552196, weight: 0.013615157087203159 },
    RulePoint { u: 0.7284923929552196, v: 0.2631128296349457, weight: 0.013615157087203159 },
];

#[cfg(test)]
mod tests {
    use super::*;

    /// The integral of `u^a v^b` over the reference triangle is `a! b! / (a + b + 2)!` (Dirichlet's formula).
    #[test]
    fn each_rule_is_exact_to_its_degree_and_not_beyond() {
        let factorial = |n: i32| (1..=n).map(f64::from).product::<f64>();
        for (degree, rule) in [(1, degree_1()), (2, degree_2()), (4, degree_4()), (6, degree_6()), (8, degree_8())] {
            let error = |a: i32, b: i32| {
                let sum: f64 = rule.iter().map(|p| p.weight * p.u.powi(a) * p.v.powi(b)).sum();
                (sum - factorial(a) * factorial(b) / factorial(a + b + 2)).abs()
            };
            for a in 0..=degree {
                for b in 0..=degree - a {
                    assert!(error(a, b) < 2e-16, "degree {degree}, u^{a} v^{b}: {}", error(a, b));
                }
            }
            assert!((0..=degree + 1).any(|a| error(a, degree + 1 - a) > 1e-7), "degree {degree} is better than named");
        }
    }
}
