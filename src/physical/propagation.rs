//! Propagation of uncertainty to first order: named contributions, added in quadrature.
//!
//! ```text
//! (dF/F)^2 = sum_i (s_i dx_i/x_i)^2,   s_i = dln F / dln x_i
//! ```
//!
//! The contributions are taken as independent, which the caller has to see to.

/// One named contribution to a relative uncertainty.
#[derive(Debug, Clone, PartialEq)]
pub struct Contribution {
    /// What it comes from, such as "temperature".
    pub name: String,
    /// Its size as a fraction of the result, never negative.
    pub relative: f64,
}

/// A list of independent contributions to the relative uncertainty of one result.
///
/// # Examples
/// ```
/// use slowmote::physical::ErrorBudget;
///
/// let budget = ErrorBudget::new()
///     .with("viscosity", 0.03)
///     .with_sensitivity("diameter", 2.0, 0.02); // settling speed goes with the square
/// assert!((budget.total() - 0.05).abs() < 1e-12);
/// assert_eq!(budget.largest().map(|c| c.name.as_str()), Some("diameter"));
/// ```
#[derive(Debug, Clone, Default, PartialEq)]
pub struct ErrorBudget {
    contributions: Vec<Contribution>,
}

impl ErrorBudget {
    /// An empty budget, whose total is zero.
    pub fn new() -> Self {
        Self::default()
    }

    /// Adds a contribution given as a fraction of the result; its sign does not matter.
    #[must_use]
    pub fn with(mut self, name: impl Into<String>, relative: f64) -> Self {
        self.add(name, relative);
        self
    }

    /// Adds the contribution of an input with relative uncertainty `relative_input` on which the
    /// result depends with the logarithmic sensitivity `dln result / dln input`.
    #[must_use]
    pub fn with_sensitivity(self, name: impl Into<String>, sensitivity: f64, relative_input: f64) -> Self {
        self.with(name, sensitivity * relative_input)
    }

    /// Adds a contribution in place. A contribution of exactly zero is left out; one that is not a
    /// number counts as infinite, since an unknown error must not look like none.
    pub fn add(&mut self, name: impl Into<String>, relative: f64) {
        let relative = if relative.is_nan() { f64::INFINITY } else { relative.abs() };
        if relative > 0.0 {
            self.contributions.push(Contribution { name: name.into(), relative });
        }
    }

    /// The contributions in the order in which they were added.
    pub fn contributions(&self) -> &[Contribution] {
        &self.contributions
    }

    /// The root of the sum of squares of all contributions.
    pub fn total(&self) -> f64 {
        self.contributions.iter().fold(0.0, |sum, c| f64::hypot(sum, c.relative))
    }

    /// The largest contribution; none if the budget is empty.
    pub fn largest(&self) -> Option<&Contribution> {
        self.contributions.iter().max_by(|a, b| a.relative.total_cmp(&b.relative))
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn an_empty_budget_is_certain() {
        let budget = ErrorBudget::new().with("nothing", 0.0);
        assert_eq!(budget.total(), 0.0);
        assert!(budget.largest().is_none());
    }

    #[test]
    fn contributions_add_in_quadrature() {
        let budget = ErrorBudget::new().with("a", 0.03).with("b", -0.04);
        assert!((budget.total() - 0.05).abs() < 1e-15);
        assert_eq!(budget.largest().map(|c| c.name.as_str()), Some("b"));
    }

    #[test]
    fn what_is_not_a_number_counts_as_unbounded() {
        let budget = ErrorBudget::new().with("broken", f64::NAN).with("fine", 0.1);
        assert_eq!(budget.total(), f64::INFINITY);
        assert_eq!(budget.largest().map(|c| c.name.as_str()), Some("broken"));
    }
}
