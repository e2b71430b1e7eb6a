//! Where to cut along a direction: narrow steps near an end, wider and wider away from it.

/// How steps widen with the distance from an end.
#[derive(Debug, Clone, Copy)]
pub(super) struct Widening {
    /// Width of the first step.
    pub first: f64,
    /// Ratio of one step to the one before.
    pub ratio: f64,
    /// Steps grow no wider than this.
    pub widest: f64,
}

/// Cuts `[0, length]` into steps that start near `first` at 0 and widen; the ends are included.
///
/// The steps are those of the continuous width `w(s) = min(first' + ln(ratio) s, widest)`, shrunk together so that a
/// whole number of them fits: step `k` ends where the integral of `1 / w` reaches `k` times its `N`-th part.
pub(super) fn widening(length: f64, steps: Widening) -> Vec<f64> {
    let rate = steps.ratio.ln();
    let widest = steps.widest.max(steps.first);
    // The continuous width whose first step comes out as `first`.
    let start = steps.first * rate / (steps.ratio - 1.0);
    let turning = (widest - start) / rate;
    let count_at_turning = (widest / start).ln() / rate;
    let count_at = |s: f64| {
        if s < turning { (1.0 + rate * s / start).ln() / rate } else { count_at_turning + (s - turning) / widest }
    };
    let place_of = |count: f64| {
        if count < count_at_turning {
            start * (rate * count).exp_m1() / rate
        } else {
            turning + (count - count_at_turning) * widest
        }
    };
    let total = count_at(length);
    // A step may come out a quarter wider than asked before another one is spent.
    let whole = (total - 0.25).ceil().max(1.0);
    let mut places = (0..whole as usize).map(|k| place_of(total * k as f64 / whole)).collect::<Vec<_>>();
    places.push(length);
    places
}

/// Cuts `[-half, half]` symmetrically, with the narrow steps at both ends; an even number of steps.
pub(super) fn widening_from_both_ends(half: f64, steps: Widening) -> Vec<f64> {
    let side = widening(half, steps);
    let left = side.iter().map(|s| s - half);
    let right = side.iter().rev().skip(1).map(|s| half - s);
    left.chain(right).collect()
}
