//! The nearest known word to a mistyped one, for hints in error messages.

/// Longer words than this are no typing mistakes of a name we know, and would only cost time.
const LONGEST_WORD: usize = 40;

/// Cost of a single edit in [`typing_distance`]; a difference of case costs one.
pub(crate) const ONE_EDIT: usize = 2;

/// Distance between two words as typing mistakes: two for each edit (insertion, deletion,
/// substitution, exchange of neighbours), one more if only the case of some letter differs.
pub(crate) fn typing_distance(written: &str, known: &str) -> usize {
    let written_lower: Vec<char> = written.to_lowercase().chars().collect();
    let known_lower: Vec<char> = known.to_lowercase().chars().collect();
    let edits = edit_distance(&written_lower, &known_lower);
    let case_differs = usize::from(edits == 0 && written != known);
    ONE_EDIT * edits + case_differs
}

/// The candidate nearest to `written`, if it is near enough to be a typing mistake.
pub(crate) fn nearest<'a>(written: &str, candidates: impl IntoIterator<Item = &'a str>) -> Option<&'a str> {
    let length = written.chars().count();
    if length == 0 || length > LONGEST_WORD {
        return None;
    }
    // One mistake in three letters is still a recognisable word.
    let allowed = ONE_EDIT * (length / 3).max(1);
    candidates
        .into_iter()
        .map(|candidate| (typing_distance(written, candidate), candidate))
        .filter(|(distance, _)| *distance <= allowed)
        .min_by_key(|(distance, _)| *distance)
        .map(|(_, candidate)| candidate)
}

/// Optimal string alignment distance (Levenshtein with exchanges of neighbours).
fn edit_distance(a: &[char], b: &[char]) -> usize {
    let width = b.len() + 1;
    let mut before_last = vec![0; width];
    let mut last: Vec<usize> = (0..width).collect();
    for i in 1..=a.len() {
        let mut current = vec![i; width];
        for j in 1..width {
            let substitution = last[j - 1] + usize::from(a[i - 1] != b[j - 1]);
            let mut best = substitution.min(last[j] + 1).min(current[j - 1] + 1);
            if i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1] {
                best = best.min(before_last[j - 2] + 1);
            }
            current[j] = best;
        }
        before_last = std::mem::replace(&mut last, current);
    }
    last[b.len()]
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn distances_count_edits_and_case() {
        assert_eq!(typing_distance("um", "um"), 0);
        assert_eq!(typing_distance("uM", "um"), 1);
        assert_eq!(typing_distance("mu", "um"), ONE_EDIT);
        assert_eq!(typing_distance("", "um"), 2 * ONE_EDIT);
        assert_eq!(typing_distance("glycerine", "glycerol"), 3 * ONE_EDIT);
    }

    #[test]
    fn only_near_words_are_offered() {
        let known = ["water", "heavy-water", "air"];
        assert_eq!(nearest("watr", known), Some("water"));
        assert_eq!(nearest("WATER", known), Some("water"));
        assert_eq!(nearest("honey", known), None);
        assert_eq!(nearest("", known), None);
        assert_eq!(nearest(&"w".repeat(10_000), known), None);
    }
}
