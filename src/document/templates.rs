//! The templates: those built in, and those a firm puts in their place.
use std::collections::BTreeMap;

/// Name of the list that says which chapters make a package, in order, one name a line.
pub(super) const ORDER: &str = "order";

macro_rules! built_in {
    ($($name:literal)*) => {
        &[$(($name, include_str!(concat!("../../templates/", $name, ".md.j2"))),)*]
    };
}

/// Every template that is built in: its name and its text.
const BUILT_IN: &[(&str, &str)] = built_in![
    "cover" "revisions" "contents" "purpose" "checking" "input" "results" "equilibrium" "members" "comparison"
    "checker" "symbols" "limits" "file" "program"
    "marks" "caution-licence" "caution-limits" "caution-confirm" "caution-beyond" "caution-not-checked"
    "caution-change" "brief-cover" "brief-signs" "brief-results"
];

/// Name of the order list of a brief without results.
const ORDER_OF_BRIEF: &str = "order-brief";

/// A set of templates by name.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Templates {
    by_name: BTreeMap<String, String>,
}

impl Templates {
    /// The templates of the program itself.
    #[must_use]
    pub fn built_in() -> Self {
        let mut by_name: BTreeMap<String, String> =
            BUILT_IN.iter().map(|(name, text)| ((*name).to_string(), (*text).to_string())).collect();
        by_name.insert(ORDER.to_string(), include_str!("../../templates/order.txt").to_string());
        by_name.insert(ORDER_OF_BRIEF.to_string(), include_str!("../../templates/order-brief.txt").to_string());
        Self { by_name }
    }

    /// The templates of the program, with `files` in place of those of the same name and beside them.
    ///
    /// A name may carry the endings of its file: `cover.md.j2`, `order.txt`. What includes what, and which chapters
    /// are printed in what order, is then up to the files.
    #[must_use]
    pub fn from_files(files: BTreeMap<String, String>) -> Self {
        let mut templates = Self::built_in();
        for (name, text) in files {
            let stem = [".md.j2", ".j2", ".md", ".txt"].iter().find_map(|ending| name.strip_suffix(ending));
            let name = stem.unwrap_or(&name).to_string();
            templates.by_name.insert(name, text);
        }
        templates
    }

    /// The same templates with the chapters of another order list.
    #[must_use]
    pub fn with_order(&self, list: &str) -> Self {
        let mut templates = self.clone();
        if let Some(text) = self.text(list) {
            templates.by_name.insert(ORDER.to_string(), text.to_string());
        }
        templates
    }

    /// Names and texts, the order list included: what a firm may replace.
    pub fn iter(&self) -> impl Iterator<Item = (&str, &str)> {
        self.by_name.iter().map(|(name, text)| (name.as_str(), text.as_str()))
    }

    /// A template's text.
    #[must_use]
    pub fn text(&self, name: &str) -> Option<&str> {
        self.by_name.get(name).map(String::as_str)
    }

    /// The chapters in order, each with its line in the order list.
    pub(super) fn chapters(&self) -> impl Iterator<Item = (usize, &str)> {
        let list = self.text(ORDER).unwrap_or_default();
        list.lines()
            .enumerate()
            .map(|(at, line)| (at + 1, line.split('#').next().unwrap_or_default().trim()))
            .filter(|(_, name)| !name.is_empty())
    }
}
