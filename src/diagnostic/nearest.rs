//! The name that was probably meant.

/// The candidate nearest to a misspelt name, where one is near enough to be meant.
///
/// Near enough: letters that differ in case alone, or as many slips (a letter too many, too few, wrong, or two
/// swapped) as a third of the name's length, at least one. Of equally near ones the first in order wins.
#[must_use]
pub fn nearest<'a>(name: &str, candidates: impl IntoIterator<Item = &'a str>) -> Option<&'a str> {
    // Longer texts are no names; comparing them would cost more than the hint is worth.
    const LONGEST: usize = 64;
    if name.is_empty() || name.len() > LONGEST {
        return None;
    }
    let allowed = (name.chars().count() / 3).max(1);
    let lower = name.to_lowercase();
    let mut best: Option<(usize, &'a str)> = None;
    for candidate in candidates {
        if candidate == name || candidate.len().abs_diff(name.len()) > 3 * allowed.max(1) || candidate.len() > LONGEST {
            continue;
        }
        let slips = if candidate.to_lowercase() == lower { 0 } else { strsim::damerau_levenshtein(name, candidate) };
        // A single letter replaced by another single letter has nothing in common with it.
        let related = slips < name.chars().count().max(candidate.chars().count());
        if slips <= allowed && related && best.is_none_or(|(least, _)| slips < least) {
            best = Some((slips, candidate));
        }
    }
    best.map(|(_, candidate)| candidate)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[track_caller]
    fn check(name: &str, candidates: &[&str], expected: Option<&str>) {
        assert_eq!(nearest(name, candidates.iter().copied()), expected);
    }

    #[test]
    fn slips_are_forgiven_and_strangers_are_not() {
        check("sectoin", &["kind", "section", "material"], Some("section"));
        check("N9", &["N1", "N4"], Some("N1"));
        check("Fixed", &["fixed", "pinned"], Some("fixed"));
        check("Z", &["A", "B"], None);
        check("snow", &["members", "nodes"], None);
        check("", &["a"], None);
    }
}
