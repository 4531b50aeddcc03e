//! Why a structure could not be solved, as data and in words.
use super::mechanism::{Motion, describe, direction_in_words};

/// Names of things by their place, for messages.
#[derive(Debug, Clone, Copy, Default)]
pub struct Names<'a> {
    /// Of the nodes.
    pub nodes: &'a [String],
    /// Of the members.
    pub members: &'a [String],
    /// Of the combinations.
    pub combinations: &'a [String],
}

impl Names<'_> {
    pub(super) fn node(&self, node: usize) -> String {
        named(self.nodes, node)
    }

    pub(super) fn member(&self, member: usize) -> String {
        named(self.members, member)
    }

    fn combination(&self, combination: usize) -> String {
        named(self.combinations, combination)
    }

    /// `A`, `A and B`, `A, B and C`; a long list is cut with the number of those left unnamed.
    pub(super) fn list(names: &[String]) -> String {
        const SHOWN: usize = 8;
        match names {
            [] => String::new(),
            [one] => one.clone(),
            [start @ .., last] if names.len() <= SHOWN => format!("{} and {last}", start.join(", ")),
            _ => format!("{} and {} more", names[..SHOWN - 1].join(", "), names.len() - SHOWN + 1),
        }
    }

    pub(super) fn node_list(&self, nodes: &[usize]) -> String {
        let names: Vec<String> = nodes.iter().map(|node| self.node(*node)).collect();
        Self::list(&names)
    }

    pub(super) fn member_list(&self, members: &[usize]) -> String {
        let names: Vec<String> = members.iter().map(|member| self.member(*member)).collect();
        Self::list(&names)
    }
}

fn named(names: &[String], place: usize) -> String {
    names.get(place).map_or_else(|| format!("no. {}", place + 1), |name| format!("`{name}`"))
}

/// Why a structure could not be solved.
#[derive(Debug, Clone, PartialEq)]
pub enum Failure {
    /// The numbers handed over do not fit together or are not finite.
    Inconsistent {
        /// What is wrong.
        what: String,
    },
    /// Nothing holds the structure at all.
    NoSupport,
    /// A load acts in a direction that nothing stiffens.
    LoadedFreeDirection {
        /// The combination.
        combination: usize,
        /// The node.
        node: usize,
        /// `None` for the rotation; else the unit vector of the direction in global axes.
        direction: Option<[f64; 2]>,
        /// Force along the direction or couple, N or N·m.
        load: f64,
        /// Tension-only bars that were slack.
        slack: Vec<usize>,
    },
    /// The structure, or part of it, can move without any member being strained.
    Mechanism {
        /// How it can move: at most three ways.
        motions: Vec<Motion>,
        /// The combination, where it moves only because bars have gone slack under it.
        combination: Option<usize>,
        /// Those bars.
        slack: Vec<usize>,
    },
    /// The equations are so close to singular that too few digits survive.
    Untrustworthy {
        /// Estimated condition number of the scaled stiffness matrix.
        condition: f64,
    },
    /// No set of slack bars agrees with itself.
    TensionOnlyUnsettled {
        /// The combination.
        combination: usize,
        /// The bars that keep changing.
        members: Vec<usize>,
    },
}

impl Failure {
    /// What is wrong and what usually mends it, one sentence or two an entry.
    #[must_use]
    pub fn describe(&self, names: &Names<'_>) -> Vec<String> {
        match self {
            Self::Inconsistent { what } => vec![format!("the structure cannot be solved: {what}")],
            Self::NoSupport => vec![
                "nothing holds the structure: there is no support and no spring. Hold three directions at least, \
                 for instance one node pinned and another on a roller"
                    .into(),
            ],
            Self::LoadedFreeDirection { combination, node, direction, load, slack } => {
                let (what, unit) = match direction {
                    Some(direction) => (format!("move {}", direction_in_words(*direction)), "N"),
                    None => ("turn".into(), "N·m"),
                };
                vec![format!(
                    "node {} is free to {what}: nothing there resists it, and combination {} loads it with {} {unit}{}. \
                     Hold that direction, take the load away, or join a member that carries it",
                    names.node(*node),
                    names.combination(*combination),
                    short(*load),
                    with_slack(slack, names),
                )]
            }
            Self::Mechanism { motions, combination, slack } => {
                let when = combination.map_or_else(String::new, |combination| {
                    format!("under combination {}{}: ", names.combination(combination), with_slack(slack, names))
                });
                motions.iter().map(|motion| format!("{when}{}", describe(motion, names))).collect()
            }
            Self::Untrustworthy { condition } => vec![format!(
                "fewer than four digits of the results would be right (condition number {condition:.0e}): the structure \
                 is nearly a mechanism, or neighbouring stiffnesses differ too much. Look for a member or spring that \
                 is far too soft or far too stiff, and for members or supports that nearly line up"
            )],
            Self::TensionOnlyUnsettled { combination, members } => vec![format!(
                "under combination {} no set of slack bars agrees with the forces: {} keep changing between taut and \
                 slack. Stiffen the bracing, or let one of them carry compression",
                names.combination(*combination),
                names.member_list(members),
            )],
        }
    }
}

fn with_slack(slack: &[usize], names: &Names<'_>) -> String {
    if slack.is_empty() { String::new() } else { format!(", with {} slack", names.member_list(slack)) }
}

/// Four significant digits, plainly written.
pub(super) fn short(value: f64) -> String {
    if value.abs() <= 0.0 || !value.is_finite() {
        return format!("{value}");
    }
    let decimals = 3 - value.abs().log10().floor() as i32;
    if (0..=9).contains(&decimals) {
        let text = format!("{value:.*}", decimals as usize);
        if text.contains('.') { text.trim_end_matches('0').trim_end_matches('.').to_owned() } else { text }
    } else if (-6..0).contains(&decimals) {
        format!("{value:.0}")
    } else {
        format!("{value:.3e}")
    }
}
