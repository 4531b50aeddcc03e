//! The address of a value in the YAML: the keys and list places that lead to it, such as `load_cases.D.loads[2].w`.
use std::fmt;
use std::sync::Arc;

/// The keys and list places that lead to a value. Cloning is cheap: children share their parent.
#[derive(Clone, Default, PartialEq, Eq)]
pub struct Address(Option<Arc<Step>>);

#[derive(PartialEq, Eq)]
struct Step {
    parent: Address,
    segment: Segment,
}

/// One step of an address.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum Segment {
    /// A key of a map.
    Key(String),
    /// A place in a list, from 0.
    Index(usize),
}

impl Address {
    /// The whole file.
    #[must_use]
    pub const fn root() -> Self {
        Self(None)
    }

    /// The value under a key of this map.
    #[must_use]
    pub fn key(&self, key: impl Into<String>) -> Self {
        self.step(Segment::Key(key.into()))
    }

    /// The value at a place of this list, from 0.
    #[must_use]
    pub fn index(&self, index: usize) -> Self {
        self.step(Segment::Index(index))
    }

    fn step(&self, segment: Segment) -> Self {
        Self(Some(Arc::new(Step { parent: self.clone(), segment })))
    }

    /// Reads the printed form, such as `members.BC.from` or `load_cases.D.loads[2]`.
    ///
    /// Keys that hold a dot or a bracket cannot be written this way; no name of the language does.
    #[must_use]
    pub fn parse(text: &str) -> Self {
        let mut address = Self::root();
        for part in text.split('.').filter(|part| !part.is_empty()) {
            let (key, indices) = part.split_once('[').unwrap_or((part, ""));
            if !key.is_empty() {
                address = address.key(key);
            }
            for index in indices.split('[').filter_map(|i| i.trim_end_matches(']').parse().ok()) {
                address = address.index(index);
            }
        }
        address
    }

    /// The steps from the root.
    #[must_use]
    pub fn segments(&self) -> Vec<&Segment> {
        let mut found = Vec::new();
        let mut at = self;
        while let Some(step) = &at.0 {
            found.push(&step.segment);
            at = &step.parent;
        }
        found.reverse();
        found
    }

    /// What holds this value; the root holds itself.
    #[must_use]
    pub fn parent(&self) -> Self {
        self.0.as_ref().map_or_else(Self::root, |step| step.parent.clone())
    }
}

impl fmt::Display for Address {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        for (at, segment) in self.segments().into_iter().enumerate() {
            match segment {
                Segment::Key(key) if at == 0 => f.write_str(key)?,
                Segment::Key(key) => write!(f, ".{key}")?,
                Segment::Index(index) => write!(f, "[{index}]")?,
            }
        }
        Ok(())
    }
}

impl fmt::Debug for Address {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "Address({self})")
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn printed_addresses_read_back() {
        for text in ["", "members", "members.BC.from", "load_cases.D.loads[2].w[0]"] {
            assert_eq!(Address::parse(text).to_string(), text);
        }
        let address = Address::root().key("nodes").key("1").key("x");
        assert_eq!(address, Address::parse("nodes.1.x"));
        assert_eq!(address.parent(), Address::parse("nodes.1"));
    }
}
