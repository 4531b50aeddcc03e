//! The document: blocks in reading order. Steps, tables and figures are named, not copied.

/// A package, ready to be written.
#[derive(Debug, Clone, Default, PartialEq)]
pub struct Document {
    /// What stands at the head of every sheet.
    pub head: RunningHead,
    /// Blocks in reading order.
    pub blocks: Vec<Block>,
}

/// What stands at the head of every sheet. Empty where the input says nothing.
#[derive(Debug, Clone, Default, PartialEq, Eq)]
#[allow(missing_docs, reason = "the fields carry the names of the input language")]
pub struct RunningHead {
    pub title: String,
    pub number: String,
    pub part: String,
    pub client: String,
    pub revision: String,
    pub status: String,
    pub prepared: String,
    pub checked: String,
    /// Date from the input that stands for the package in document facts, `YYYY-MM-DD`, where there is one.
    pub date: String,
    /// Whether assumptions are still to be confirmed.
    pub preliminary: bool,
    /// Whether a check is beyond its limit.
    pub beyond_limit: bool,
}

/// A block.
#[derive(Debug, Clone, PartialEq)]
pub enum Block {
    /// A heading; the anchor is made of its own words or names.
    Heading {
        /// 1 for the title, 2 for parts, 3 and 4 below.
        level: u8,
        /// Its words.
        text: Vec<Inline>,
        /// Where links lead.
        anchor: String,
    },
    /// A paragraph.
    Paragraph(Vec<Inline>),
    /// A list; each item is a run of blocks.
    List {
        /// Numbered or with bullets.
        ordered: bool,
        /// Items.
        items: Vec<Vec<Block>>,
    },
    /// A caution, set apart to the eye.
    Caution(Vec<Block>),
    /// Text as it is, such as the input file.
    Verbatim(String),
    /// The step of that number.
    Step(String),
    /// The table of that id.
    Table(String),
    /// The figure of that id.
    Figure(String),
    /// A table of words alone, such as signatures; no step draws on it.
    Grid {
        /// Headings.
        head: Vec<Vec<Inline>>,
        /// Rows.
        rows: Vec<Vec<Vec<Inline>>>,
    },
    /// The table of contents, made from the headings by each writer.
    Contents,
    /// What follows begins a new sheet of paper.
    NewSheet,
}

/// A run of text.
#[derive(Debug, Clone, PartialEq)]
pub enum Inline {
    /// Plain words.
    Text(String),
    /// Set in bold.
    Strong(Vec<Inline>),
    /// Set in italics.
    Emphasis(Vec<Inline>),
    /// Set as typed.
    Code(String),
    /// A link to a step, a table or a heading of this document.
    Link {
        /// A step's number, a table's id or a heading's anchor.
        to: String,
        /// Its words.
        text: Vec<Inline>,
    },
    /// A line break.
    Break,
}
