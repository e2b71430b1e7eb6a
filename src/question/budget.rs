//! What uncertain inputs do to the answer, to first order.
//!
//! Resistances are homogeneous: blocks go as `mu L`, `mu L^2` and `mu L^3`. For one body length that settles the
//! sensitivities. A shape has several lengths `l_i`, with sensitivities `s_i = dln R / dln l_i` that sum to the
//! block's power `p`. None of them is negative as long as enlarging one length gives a body that contains the old
//! one, since drag and torque then grow (Hill and Power, Q. J. Mech. Appl. Math. 9 (1956) 313). Hence
//!
//! ```text
//! |dR/R| = |sum_i s_i d_i| <= p max_i |d_i|,
//! ```
//!
//! whatever the shares are and however the `d_i` hang together: no further solve is needed.

use super::answer::InputShare;
use crate::physical::ErrorBudget;

/// Powers of the length with which the blocks grow.
const FORCE_POWER: f64 = 1.0;
pub(super) const TORQUE_POWER: f64 = 3.0;

/// An input that is not known exactly.
#[derive(Debug, Clone, PartialEq)]
pub enum InputUncertainty {
    /// The fluid's viscosity.
    Viscosity {
        /// Relative uncertainty.
        relative: f64,
    },
    /// A length of the body.
    Size {
        /// What it is called.
        name: String,
        /// Relative uncertainty.
        relative: f64,
    },
}

/// The shares of all inputs in the error, largest first; the lengths of the body count as one, by the worst of them.
pub(super) fn input_shares(inputs: &[InputUncertainty]) -> Vec<InputShare> {
    let mut shares = Vec::new();
    let mut worst_size: Option<(&str, f64)> = None;
    for input in inputs {
        match input {
            InputUncertainty::Viscosity { relative } if *relative > 0.0 => shares.push(InputShare {
                name: "viscosity".to_owned(),
                relative_uncertainty: *relative,
                force: *relative,
                torque: *relative,
            }),
            InputUncertainty::Size { name, relative } if *relative > worst_size.map_or(0.0, |(_, worst)| worst) => {
                worst_size = Some((name, *relative));
            }
            _ => {}
        }
    }
    shares.extend(worst_size.map(|(name, relative)| InputShare {
        name: name.to_owned(),
        relative_uncertainty: relative,
        force: FORCE_POWER * relative,
        torque: TORQUE_POWER * relative,
    }));
    shares.sort_by(|a, b| b.torque.total_cmp(&a.torque));
    shares
}

/// All shares of drags, as independent, in quadrature.
pub(super) fn force_total(shares: &[InputShare]) -> f64 {
    total(shares.iter().map(|share| (&share.name, share.force)))
}

/// All shares of torques, as independent, in quadrature.
pub(super) fn torque_total(shares: &[InputShare]) -> f64 {
    total(shares.iter().map(|share| (&share.name, share.torque)))
}

fn total<'a>(shares: impl Iterator<Item = (&'a String, f64)>) -> f64 {
    shares.fold(ErrorBudget::new(), |budget, (name, relative)| budget.with(name, relative)).total()
}

#[cfg(test)]
mod tests {
    use super::*;

    fn size(name: &str, relative: f64) -> InputUncertainty {
        InputUncertainty::Size { name: name.to_owned(), relative }
    }

    #[test]
    fn torque_feels_a_length_three_times_as_much_as_drag() {
        let shares = input_shares(&[InputUncertainty::Viscosity { relative: 0.04 }, size("diameter", 0.03)]);
        assert_eq!(shares[0].name, "diameter");
        assert!((force_total(&shares) - 0.05).abs() < 1e-15);
        assert!((torque_total(&shares) - 0.09_f64.hypot(0.04)).abs() < 1e-15);
    }

    #[test]
    fn of_several_lengths_the_worst_bounds_them_all() {
        let shares = input_shares(&[size("length", 0.01), size("diameter", 0.02), size("pitch", 0.0)]);
        assert_eq!(shares.len(), 1);
        assert_eq!((shares[0].name.as_str(), shares[0].force), ("diameter", 0.02));
        assert!(input_shares(&[]).is_empty() && force_total(&[]) == 0.0);
    }
}
