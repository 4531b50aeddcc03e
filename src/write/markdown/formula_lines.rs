//! Long formulas over several lines, broken after an operator as far outside as possible.

/// Lines longer than this are broken, characters.
const LONGEST: usize = 100;
/// How much deeper than the equals sign a line goes on.
const DEEPER: usize = 4;

/// Characters that take a place on the line.
pub(super) fn width(text: &str) -> usize {
    text.chars().count()
}

/// `<head> = <formula>` with the equals sign in the given column, broken where it is too long.
pub(super) fn broken(head: &str, column: usize, formula: &str) -> String {
    let chars: Vec<char> = formula.chars().collect();
    let breaks = break_points(&chars);
    let mut text = format!("{head}{}= ", " ".repeat(column - width(head)));
    let mut start = 0;
    let mut used = column + 2;
    while used + (chars.len() - start) > LONGEST {
        let room = LONGEST.saturating_sub(used);
        let mut ahead = breaks.iter().filter(|point| point.at > start);
        let outermost = ahead.clone().filter(|point| point.at - start <= room).map(|point| point.depth).min();
        let chosen = match outermost {
            Some(depth) => ahead.rfind(|point| point.depth == depth && point.at - start <= room),
            // Nothing fits: the first place there is.
            None => ahead.clone().next(),
        };
        let Some(chosen) = chosen else { break };
        text.extend(&chars[start..chosen.at]);
        let kept = text.trim_end().len();
        text.truncate(kept);
        text.push('\n');
        text.push_str(&" ".repeat(column + DEEPER));
        used = column + DEEPER;
        start = chosen.at;
    }
    text.extend(&chars[start..]);
    text
}

/// A place after an operator. Sums count as further outside than the products in them.
#[derive(Debug, Clone, Copy)]
struct BreakPoint {
    at: usize,
    depth: usize,
}

fn break_points(chars: &[char]) -> Vec<BreakPoint> {
    let mut points = Vec::new();
    let mut depth = 0_usize;
    let mut in_unit = false;
    for (at, &c) in chars.iter().enumerate() {
        let before = at.checked_sub(1).map(|at| chars[at]);
        let after = chars.get(at + 1).copied();
        match c {
            '(' => depth += 1,
            ')' => {
                depth = depth.saturating_sub(1);
                in_unit = false;
            }
            '|' if before.is_none_or(|before| "(·/ |".contains(before)) && after != Some(' ') => depth += 1,
            '|' => {
                depth = depth.saturating_sub(1);
                in_unit = false;
            }
            ',' => in_unit = false,
            '+' | '−' if before == Some(' ') && after == Some(' ') => {
                in_unit = false;
                points.push(BreakPoint { at: at + 2, depth: 2 * depth });
            }
            // What follows a blank is a unit, unless the blank belongs to an operator or a comma.
            ' ' => in_unit = before.is_some_and(|before| !"+−,".contains(before)),
            '·' | '/' if !in_unit => points.push(BreakPoint { at: at + 1, depth: 2 * depth + 1 }),
            _ => {}
        }
    }
    points
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn units_are_never_broken_and_sums_break_first() {
        let term = "(12.345 kN·m/rad)·(0.000123 rad)/(4000 mm)²";
        let formula = [term, term, term].join(" + ");
        let text = broken("M₁", 3, &formula);
        assert_eq!(text, format!("M₁ = {term} + {term} +\n       {term}"));
        assert!(text.lines().all(|line| width(line) <= LONGEST));
    }

    #[test]
    fn one_long_product_breaks_after_a_factor_and_joins_again() {
        let formula = ["(1234.5678 kN/m²)"; 9].join("·");
        let text = broken("x", 2, &formula);
        let joined: String = text.lines().map(str::trim).collect();
        assert_eq!(joined, format!("x = {formula}"));
        assert!(text.lines().skip(1).all(|line| line.starts_with("      (")), "{text}");
    }

    #[test]
    fn magnitudes_hold_together() {
        let inside = ["(1234.5678 kN·m)"; 4].join(" − ");
        let formula = format!("|{inside}| + |{inside}|");
        assert_eq!(broken("x", 2, &formula), format!("x = |{inside}| +\n      |{inside}|"));
    }
}
