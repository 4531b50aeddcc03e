//! A package as a text of steps to be changed, read without `retrace`.
use super::Weight;
use super::change::Change;
use super::judge::{Operands, Step, number_of};
use calcsheaf::retrace;
use std::collections::{BTreeMap, BTreeSet};

/// A step in the text.
pub(super) struct Place {
    pub(super) number: String,
    /// Bytes of its lines, behind the fence's.
    start: usize,
    end: usize,
    sound: Step,
    operands: Operands,
}

/// A package.
pub(super) struct Page {
    pub(super) text: String,
    pub(super) steps: Vec<Place>,
    /// What stands at the addresses of steps and cells.
    printed: BTreeMap<String, String>,
}

impl Page {
    pub(super) fn new(text: String) -> Self {
        let mut steps = Vec::new();
        let mut printed = cells(&text);
        let mut rest = 0;
        while let Some(at) = text[rest..].find("\n```step ") {
            let fence = rest + at + 1;
            let start = fence + text[fence..].find('\n').expect("a line") + 1;
            let end = start + text[start..].find("```\n").expect("a closing fence");
            let number = text[fence + "```step ".len()..start - 1].to_owned();
            let sound = Step::read(&text[start..end]).unwrap_or_else(|| panic!("{number} cannot be read"));
            let operands = sound.operands().unwrap_or_else(|| panic!("the lines of {number} do not match"));
            assert_eq!(sound.misses(&sound, &operands), None, "{number}:\n{}", &text[start..end]);
            printed.insert(number.clone(), sound.result().to_owned());
            steps.push(Place { number, start, end, sound, operands });
            rest = end;
        }
        assert!(steps.len() > 10, "{} steps", steps.len());
        Self { text, steps, printed }
    }

    pub(super) fn body(&self, at: usize) -> &str {
        &self.text[self.steps[at].start..self.steps[at].end]
    }

    /// Addresses to put in the place of an operand's: of the next steps, of the same step elsewhere, of a cell.
    pub(super) fn others(&self, at: usize) -> Vec<&str> {
        let number = &self.steps[at].number;
        let kind = number.rsplit('.').next();
        let same = self.steps.iter().filter(|step| step.number.rsplit('.').next() == kind && step.number != *number);
        let next = self.steps.iter().cycle().skip(at + 1);
        let cells = self.printed.keys().filter(|address| address.contains(".U."));
        let mut found: Vec<&str> = same.take(2).map(|step| step.number.as_str()).collect();
        found.extend(next.take(3).map(|step| step.number.as_str()));
        found.extend(cells.skip(at % 5).take(2).map(String::as_str));
        found
    }

    /// Groups of steps that may be changed at once: none draws on another, none is of another's kind.
    pub(super) fn groups(&self) -> Vec<Vec<usize>> {
        let mut groups: Vec<(BTreeSet<&str>, Vec<usize>)> = Vec::new();
        for (at, step) in self.steps.iter().enumerate() {
            let own = [step.number.as_str(), step.number.rsplit('.').next().unwrap_or_default()];
            let names: Vec<&str> =
                own.into_iter().chain(step.sound.from.iter().map(|(_, address)| address.as_str())).collect();
            let place = groups.iter().position(|(taken, _)| names.iter().all(|name| !taken.contains(name)));
            let place = place.unwrap_or_else(|| {
                groups.push(Default::default());
                groups.len() - 1
            });
            groups[place].0.extend(names);
            groups[place].1.push(at);
        }
        groups.into_iter().map(|(_, group)| group).collect()
    }

    /// The steps at fault after some changes, with an empty name for faults elsewhere; none where the text is refused.
    pub(super) fn faulty_steps(&self, changes: &[(usize, &Change)]) -> Option<BTreeSet<String>> {
        let mut text = self.text.clone();
        let mut sorted: Vec<_> = changes.to_vec();
        sorted.sort_by_key(|(at, _)| std::cmp::Reverse(*at));
        for (at, change) in sorted {
            let start = self.steps[at].start + change.at;
            text.replace_range(start..start + change.length, &change.to);
        }
        let report = retrace::confirm(&retrace::read(&text).ok()?, None);
        Some(report.findings.into_iter().map(|finding| finding.step.unwrap_or_default()).collect())
    }

    /// Whether a change makes the step wrong by more than its closure.
    pub(super) fn weight(&self, at: usize, change: &Change) -> Weight {
        if ["words", "source and remark", "own symbol"].contains(&change.class) {
            return Weight::Words;
        }
        let place = &self.steps[at];
        let Some(changed) = Step::read(&change.made(self.body(at))) else { return Weight::Beyond };
        if changed.title != place.sound.title || changed.symbol != place.sound.symbol {
            return Weight::Words;
        }
        if changed.misses(&place.sound, &place.operands).is_some() {
            return Weight::Beyond;
        }
        // An operand must print what stands at its address.
        let numbers = changed.operands().unwrap_or_default();
        for ((symbol, address), (_, before)) in changed.from.iter().zip(&place.sound.from) {
            let prints = |text: &str| number_of(text).zip(numbers.get(symbol)).is_some_and(|(a, b)| a.prints_as(b));
            if address != before && !self.printed.get(address).is_some_and(|text| prints(text)) {
                return Weight::Beyond;
            }
        }
        Weight::Below
    }

    /// The changed line, with the line before the change.
    pub(super) fn shown(&self, at: usize, change: &Change) -> String {
        let made = change.made(self.body(at));
        let line = |text: &str| {
            let start = text[..change.at].rfind('\n').map_or(0, |at| at + 1);
            text[start..].lines().next().unwrap_or_default().trim().to_owned()
        };
        format!("`{}` for `{}`", line(&made), line(self.body(at)))
    }
}

/// Addresses of the cells of tables with an id, and their numbers with the unit of the column.
fn cells(text: &str) -> BTreeMap<String, String> {
    let mut found = BTreeMap::new();
    let split = |line: &str| -> Vec<String> {
        line.trim().trim_matches('|').split('|').map(|cell| cell.trim().to_owned()).collect()
    };
    let mut lines = text.lines();
    while let Some(line) = lines.next() {
        let Some(id) = line.strip_prefix("**Table ").and_then(|rest| rest.split("**").next()) else { continue };
        let mut lines = lines.by_ref().skip_while(|line| line.is_empty());
        let head = split(lines.next().unwrap_or_default());
        for row in lines.skip(1).take_while(|line| line.starts_with('|')).map(split) {
            for (column, cell) in head.iter().zip(&row).skip(1).filter(|(_, cell)| !cell.is_empty()) {
                let (symbol, unit) = column.split_once(", ").unwrap_or((column, ""));
                found.insert(format!("{id}.{}.{symbol}", row[0]), format!("{cell} {unit}").trim().to_owned());
            }
        }
    }
    found
}
