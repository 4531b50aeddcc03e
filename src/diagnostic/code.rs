//! THE table of codes: one row for each kind of fault, its title and its explanation.

/// Declares the codes and the table from the same rows, so that neither can lack what the other has.
macro_rules! codes {
    ($($name:ident $id:literal $title:literal $explanation:literal)*) => {
        /// A kind of fault. Ids are stable: a code is never given another meaning.
        #[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, PartialOrd, Ord)]
        pub enum Code {
            $(#[doc = $title] $name,)*
        }

        impl Code {
            /// Every code in the order of the table.
            pub const ALL: &'static [Self] = &[$(Self::$name),*];

            const fn row(self) -> (&'static str, &'static str, &'static str) {
                match self {
                    $(Self::$name => ($id, $title, $explanation),)*
                }
            }
        }
    };
}

codes! {
    NotYaml "E001" "the file is not YAML"
        "The text breaks the rules of YAML, so nothing after this place can be trusted. Common causes: a bracket or quote that is not closed, a line indented differently from its neighbours, or a text with `: ` in it that is not in quotes."
    TooLarge "E002" "the file is too large"
        "Files above 16 MiB are not read. A package is for a small structure that somebody can check."
    TooDeep "E003" "blocks lie too deep in one another"
        "Blocks may lie 64 deep; the language itself needs 8. The usual cause is a row of brackets that are not closed."
    SecondDocument "E004" "the file holds a second document"
        "A line `---` begins another YAML document. One file describes one structure: put the second into a file of its own."
    Tab "E005" "a line is indented with a tab"
        "YAML does not say how wide a tab is, so indentation by tabs can be read in several ways. Indent with spaces."
    Alias "E006" "an alias repeats too much"
        "An alias `*name` repeats a block marked `&name`. That is read where it is small: it may not hold itself, and all aliases together may add 10,000 values at most."
    MergeKey "E007" "a merge key stands in the file"
        "`<<` merges a block into another, so that a value counts where it is not written. A checker must find every value where it counts: write the keys out."
    Tag "E008" "a value carries a YAML tag"
        "Tags such as `!!str` tell a program how to read a value. Every value of the input language is read as it is typed; a tag has no meaning in it."
    KeyNotText "E009" "a key is no single text"
        "YAML lets a list or a block be a key. In the input language each key is one word."
    ControlCharacter "E010" "the file holds a control character"
        "Control characters do not show and may hide what follows them. Save the file as plain UTF-8 text; line breaks and tabs inside texts are fine."
    TwoReadings "E011" "two YAML readers understand this differently"
        "The file is read by two independent YAML readers, and they do not agree on this value. Write it in a plainer way, for instance in double quotes on one line."
    DuplicateKey "E012" "a key is given twice"
        "Two equal keys in one block: it is not clear which one counts. Names need be unique only among their own kind, but within a kind they must be."
    Version "E013" "the version of the input language"
        "The first key of a file is `calcsheaf: 1`. It says in which version of the input language the file is written, so that an old file never changes its meaning."
    UnknownKey "E014" "a key is unknown"
        "The block has no such key. Keys are spelt exactly as in the manual; nothing is skipped silently, because a misspelt key would leave out a load or a limit."
    MissingKey "E015" "a required key is missing"
        "The block cannot be understood without this key, and there is no default that would be safe to assume."
    WrongForm "E016" "a value has the wrong form"
        "A list stands where a single value is needed, or the reverse, or a text where a block of keys is needed."
    NoValue "E017" "a key has no value"
        "The key stands there but nothing follows it. Write its value, or take the key out where it is optional."
    UnknownWord "E018" "a word is not one of those allowed here"
        "Some keys take one of a few words. They are listed in the help of the message, spelt as they must be."
    NotTogether "E019" "keys that do not go together"
        "Each load is one thing: it stands on a node or on a member, as a line load, a point force, a couple, a warming, a lack of fit or a settlement. Keys of two of them in one entry leave open which is meant. A direction may not be held and sprung at once either."
    BadName "E020" "a name breaks the rule for names"
        "Names are 1 to 24 of the characters A-Z a-z 0-9 _ and -, starting with a letter or digit. They go into step numbers such as `BC.C1.E02`, which have to stay readable."
    UnknownReference "E021" "a name refers to nothing"
        "A node, member, section, material or load case is named that the file does not list. The nearest name and the line where they are listed are given as help."
    NamedTwice "E022" "a name stands twice in one list"
        "The second mention would count the thing twice or change nothing; either is probably not meant."
    NotUtf8 "E023" "the file is not UTF-8"
        "Input files are text in UTF-8, which every editor can save. A file in another encoding, or one that is no text at all, cannot be read."
    NotAQuantity "E030" "a value is not a quantity"
        "A quantity is a finite number and its unit, such as `12.5 kN`, `2500 mm` or `8 ft 6 in`. Units may be multiplied, divided and raised to powers: `kN/m`, `N/mm2`, `kN·m/rad`."
    WrongDimension "E031" "a quantity measures the wrong thing"
        "The unit belongs to another kind of quantity than the key needs: a force where a length is needed, say."
    MissingUnit "E032" "a quantity has no unit"
        "A number alone leaves open what it counts. Only 0 may stand without a unit, and numbers that have no dimension, such as factors."
    NotANumber "E033" "a value is not a plain number"
        "Factors, digits and ratios are plain numbers without a unit, such as `1.35`."
    OutOfRange "E034" "a number is out of its range"
        "The value is well written, but nothing real has it: an elastic modulus or a stress limit is above zero, digits lie from 3 to 8."
    NothingThere "E040" "there is nothing to solve"
        "A structure has nodes, members between them, and load cases on them. One of these blocks is missing or empty."
    ZeroLength "E041" "a member has no length"
        "Both ends of the member lie at the same place, so it has no direction and no stiffness. Two nodes at one place can not be joined by a member; use one node instead."
    NotForKind "E042" "a key does not suit the kind of member"
        "Bars carry axial force alone, so they have no hinges to release; only bars can be tension-only."
    BadSection "E043" "these dimensions make no section"
        "The dimensions contradict one another, for instance a wall thicker than half the diameter, or lie outside what the shape can be."
    SectionLacks "E044" "a section lacks a value that is needed"
        "A section read from a table may leave out what nothing needs. A beam or frame needs its second moment of area, and a temperature gradient the distances of the top and bottom fibres."
    HoldsNothing "E045" "a support holds nothing"
        "A support holds at least one direction or puts a spring on it. Take it out where the node is free."
    OutsideMember "E050" "a place lies outside the member"
        "Places along a member are distances from its `from` node, 0 to its length, or percentages from 0 % to 100 %."
    Reversed "E051" "a part of a member is given backwards"
        "`over` runs from the smaller distance to the larger, both counted from the member's `from` node."
    MaterialLacks "E052" "a material lacks a value that is needed"
        "Self-weight needs the density of every material that a member uses; warming needs the thermal expansion of the member's material."
    NotHeld "E053" "a movement is imposed where nothing holds"
        "`settle` moves the support itself, so the node must have a support, and the direction must be held or sprung by it."
    EmptyLoad "E054" "a load says nothing"
        "The entry names where it acts, but no force, couple, warming, lack of fit or movement."
    Mechanism "E070" "the structure can move without resistance"
        "The named node can move in the named direction and nothing resists. Supports are missing, or hinges and bars make a linkage."
    NoStiffness "E071" "a load acts where there is no stiffness"
        "The node is held by members that carry nothing in this direction: bars do not resist rotation, beams alone do not resist movement along their axis."
    BeyondArithmetic "E072" "the numbers are too far apart to compute with"
        "Stiffnesses in one structure differ so much that the solution would have no correct digits. Look for a dimension or modulus in the wrong unit."
    UnusedEntry "W101" "something is listed that nothing uses"
        "A section or material that no member uses, or a load case that no combination contains, is often a misspelt reference somewhere else."
    NoSource "W102" "a stress limit has no source"
        "A limit is printed beside every comparison together with its source. A checker cannot accept a limit that comes from nowhere."
    NoOutOfPlane "W103" "no effective length out of the plane"
        "A plane model cannot see what holds a member sideways. Where buckling is checked, the length out of the plane is an input; without it that part is reported as NOT CHECKED."
    Suspicious "W104" "a value is unusual"
        "The value is possible, but so far from what is common that a slip in the unit is likelier."
    LooseNode "W105" "a node belongs to no member"
        "Nothing connects the node to the structure. It has no stiffness and may carry no load."
    SamePlace "W106" "two nodes stand at the same place"
        "They are not joined: forces do not pass from one to the other. Where a joint is meant, use one node."
    Crossing "W107" "members cross without a joint"
        "Where members cross, or a node lies on a member without belonging to it, no force passes between them. Add a node and split the member where a joint is meant."
    BareAngle "W108" "an angle without a unit is read in radians"
        "An angle has no dimension, so a bare number is allowed and means radians. Write `30 deg` or `0.5 rad` to be clear."
    NoEffect "W109" "an entry has no effect"
        "The entry is understood, but changes nothing: a load per projected length on a member that has none in that direction, say."
    NoSuchPlace "W110" "a revision names something that is not there"
        "`affects` lists addresses such as `members.BC`. One that leads nowhere is either misspelt or was removed later."
}

impl Code {
    /// The id, such as `E021`; warnings begin with W.
    #[must_use]
    pub const fn id(self) -> &'static str {
        self.row().0
    }

    /// One line that names the kind of fault.
    #[must_use]
    pub const fn title(self) -> &'static str {
        self.row().1
    }

    /// A paragraph for `explain`.
    #[must_use]
    pub const fn explanation(self) -> &'static str {
        self.row().2
    }

    /// The code with an id, however its letter is typed.
    #[must_use]
    pub fn find(id: &str) -> Option<Self> {
        Self::ALL.iter().copied().find(|code| code.id().eq_ignore_ascii_case(id))
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn ids_are_unique_and_rise() {
        let errors = Code::ALL.iter().map(|code| code.id()).collect::<Vec<_>>();
        assert!(errors.windows(2).all(|pair| pair[0] < pair[1]), "{errors:?}");
        assert!(Code::ALL.iter().all(|code| Code::find(&code.id().to_lowercase()) == Some(*code)));
        assert!(Code::ALL.iter().all(|code| code.explanation().ends_with('.') && !code.title().ends_with('.')));
    }
}
