//! THE table of keys: what each block of the language may hold. Reading, help texts and schema draw on it.
use crate::catalogue::section::{self, SectionKind};
use crate::units::Measure;
use std::borrow::Cow;

/// What follows a key.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Takes {
    /// One line of text.
    Text,
    /// Markdown prose.
    Prose,
    /// `true` or `false`.
    Flag,
    /// A plain number.
    Number(Sign),
    /// A whole number within bounds.
    Whole(u8, u8),
    /// A number with its unit.
    Quantity(Measure, Sign),
    /// A unit that prints a kind of quantity.
    Unit(Measure),
    /// A distance from the member's start, or a percentage of its length.
    Place,
    /// One of a few words.
    Word(&'static [&'static str]),
    /// The name of something listed under this block.
    Name(&'static str),
    /// A list of such values.
    List(&'static Takes),
    /// One value, or a list of them.
    OneOrList(&'static Takes),
    /// Either of these.
    Either(&'static [Takes]),
    /// A block of keys.
    Block(&'static Block),
    /// Names, and a value for each.
    Named(&'static Takes),
}

/// Which numbers make sense.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Sign {
    /// Any.
    Any,
    /// Above zero.
    Positive,
    /// Zero or above.
    NotNegative,
}

/// Whether a key may be left out.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Presence {
    /// It may not.
    Required,
    /// It may; then there is none.
    Optional,
    /// It may; then this value counts.
    Default(&'static str),
}

/// One key of a block.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Key {
    /// As it is typed.
    pub name: &'static str,
    /// Whether it may be left out.
    pub presence: Presence,
    /// What follows it.
    pub takes: Takes,
    /// One phrase for help texts.
    pub doc: &'static str,
}

/// A block of keys.
#[derive(Debug, Clone, PartialEq)]
pub struct Block {
    /// Where it stands, `<name>` for a name of the user's.
    pub address: &'static str,
    /// One phrase for help texts.
    pub doc: &'static str,
    /// Its keys in the order of the manual.
    pub keys: Cow<'static, [Key]>,
}

use Presence::{Default as Else, Optional, Required};
use Sign::{Any, NotNegative, Positive};
use Takes::{
    Block as Keys, Either, Flag, List, Name, Named, Number, OneOrList, Place, Prose, Quantity, Text, Whole, Word,
};

const fn key(name: &'static str, presence: Presence, takes: Takes, doc: &'static str) -> Key {
    Key { name, presence, takes, doc }
}

/// Declares a block of the table.
macro_rules! block {
    ($name:ident $address:literal $doc:literal $($key:literal $presence:expr, $takes:expr, $about:literal;)*) => {
        #[doc = $doc]
        pub(super) static $name: Block =
            Block { address: $address, doc: $doc, keys: Cow::Borrowed(&[$(key($key, $presence, $takes, $about)),*]) };
    };
}

block! { ROOT "" "One structure, its loads, its checks and the paperwork around it."
    "calcsheaf" Required, Word(&["1"]), "the version of the input language; the first line of a file is `calcsheaf: 1`";
    "project" Required, Keys(&PROJECT), "titles, people, revisions and prose";
    "display" Optional, Keys(&DISPLAY), "units, digits, paper and detail";
    "gravity" Else("9.80665 m/s2"), Quantity(Measure::Acceleration, Positive), "acceleration of self-weight";
    "materials" Required, Named(&Keys(&MATERIAL)), "materials by name";
    "sections" Required, Named(&Keys(&SECTION)), "cross-sections by name";
    "nodes" Required, Named(&Keys(&NODE)), "nodes by name";
    "supports" Optional, Named(&Either(&[Word(SUPPORT_WORDS), Keys(&SUPPORT)])), "supports by the name of their node";
    "members" Required, Named(&Keys(&MEMBER)), "members by name";
    "load_cases" Required, Named(&Keys(&CASE)), "load cases by name";
    "combinations" Optional, Named(&Keys(&COMBINATION)), "combinations by name; left out, each load case stands alone";
    "checks" Optional, Keys(&CHECKS), "what is compared with limits";
}
block! { PROJECT "project" "Titles, people, revisions and prose."
    "title" Required, Text, "what the package is about";
    "number" Optional, Text, "job number";
    "part" Optional, Text, "what this package covers";
    "client" Optional, Text, "for whom it is made";
    "prepared_by" Optional, Keys(&PERSON), "who prepared it";
    "checked_by" Optional, Keys(&PERSON), "who checked it; blank until signed";
    "approved_by" Optional, Keys(&PERSON), "who approved it; blank until signed";
    "revision" Optional, Text, "mark of this revision";
    "status" Optional, Text, "printed on every sheet";
    "revisions" Optional, List(&Keys(&REVISION)), "what each revision changed";
    "purpose" Optional, Prose, "what the package is to show";
    "basis" Optional, List(&Keys(&BASIS)), "codes, drawings and letters the numbers rest on";
    "assumptions" Optional, List(&Keys(&ASSUMPTION)), "what is assumed";
    "notes" Optional, Prose, "further remarks";
}
block! { PERSON "project.prepared_by" "Who did something, and when."
    "name" Optional, Text, "the person";
    "date" Optional, Text, "the day";
}
block! { REVISION "project.revisions[]" "One revision."
    "mark" Required, Text, "its mark";
    "date" Optional, Text, "the day of issue";
    "by" Optional, Text, "initials";
    "text" Optional, Text, "what changed";
    "affects" Optional, List(&Text), "addresses of what changed, such as `members.BC`";
}
block! { BASIS "project.basis[]" "A document the numbers rest on."
    "mark" Required, Text, "a short mark to refer to it";
    "text" Required, Text, "title, revision, clause";
}
block! { ASSUMPTION "project.assumptions[]" "An assumption."
    "text" Required, Text, "what is assumed";
    "confirm" Else("false"), Flag, "whether it is to be settled before use";
}
block! { DISPLAY "display" "Units, digits, paper and detail of what is printed; any one unit may be set by the kind of quantity."
    "system" Else("metric"), Word(&["metric", "us"]), "the family of units";
    "digits" Else("4"), Whole(3, 8), "significant digits of a result";
    "paper" Else("A4"), Word(&["A4", "Letter"]), "paper size";
    "detail" Else("governing"), Word(&["governing", "full", "summary"]), "which member sheets are worked line by line";
}
block! { MATERIAL "materials.<name>" "A material."
    "E" Required, Quantity(Measure::Stress, Positive), "modulus of elasticity";
    "G" Optional, Quantity(Measure::Stress, Positive), "shear modulus, for shear deformation";
    "density" Optional, Quantity(Measure::Density, NotNegative), "mass or weight per volume, for self-weight";
    "expansion" Optional, Quantity(Measure::Expansion, Any), "thermal expansion, for temperature loads";
    "allowable" Optional, Keys(&ALLOWABLE), "stress limits, safety already taken off";
}
block! { ALLOWABLE "materials.<name>.allowable" "Stress limits already reduced by whatever safety factor the governing code asks; on a member they replace the material's key by key."
    "tension" Optional, Quantity(Measure::Stress, Positive), "largest tensile stress";
    "compression" Optional, Quantity(Measure::Stress, Positive), "largest compressive stress, a magnitude";
    "shear" Optional, Quantity(Measure::Stress, Positive), "largest shear stress";
    "source" Optional, Text, "a mark of `basis` or plain text, printed beside every comparison";
}
block! { SECTION "sections.<name>" "A cross-section; the keys of its shape stand beside these."
    "shape" Required, Text, "its shape";
    "source" Optional, Text, "where its dimensions come from";
    "turned" Else("false"), Flag, "whether it is turned by 90° anticlockwise";
    "shear_area" Optional, Quantity(Measure::Area, Positive), "area that carries shear, for shear deformation";
}
block! { PLATES "sections.<name> (plates)" "What a built-up section has in place of dimensions."
    "plates" Required, List(&Keys(&PLATE)), "rectangles stacked along y";
}
block! { PLATE "sections.<name>.plates[]" "One rectangle of a built-up section."
    "width" Required, Quantity(Measure::Length, Positive), "breadth across the plane of bending";
    "height" Required, Quantity(Measure::Length, Positive), "height along y";
    "at" Required, Quantity(Measure::Length, Any), "y of its centre";
}
block! { NODE "nodes.<name>" "A node."
    "x" Required, Quantity(Measure::Span, Any), "to the right";
    "y" Required, Quantity(Measure::Span, Any), "upward";
}
pub(super) const SUPPORT_WORDS: &[&str] = &["fixed", "pinned"];
pub(super) const AXES: &[&str] = &["x", "y", "r"];
block! { SUPPORT "supports.<node>" "What holds a node; `fixed` (x, y, r) and `pinned` (x, y) are short for the common ones."
    "hold" Optional, OneOrList(&Word(AXES)), "held directions";
    "spring" Optional, Keys(&SPRING), "spring stiffness by direction";
    "turned" Else("0 deg"), Quantity(Measure::Angle, Any), "anticlockwise turn of these directions";
}
block! { SPRING "supports.<node>.spring" "Springs."
    "x" Optional, Quantity(Measure::Spring, Positive), "force per movement";
    "y" Optional, Quantity(Measure::Spring, Positive), "force per movement";
    "r" Optional, Quantity(Measure::RotationalSpring, Positive), "moment per rotation";
}
block! { MEMBER "members.<name>" "A member."
    "kind" Required, Word(&["frame", "bar", "bar3", "beam"]), "bar, bar3, beam or frame";
    "from" Required, Name("nodes"), "the node at its start";
    "to" Required, Name("nodes"), "the node at its end";
    "section" Required, Name("sections"), "its cross-section";
    "material" Required, Name("materials"), "its material";
    "hinge" Optional, Word(&["start", "end", "both"]), "ends that pass no moment (beam, frame)";
    "allowable" Optional, Keys(&ALLOWABLE), "stress limits that replace the material's";
    "effective_length" Optional, Keys(&EFFECTIVE_LENGTH), "for buckling and slenderness";
    "tension_only" Else("false"), Flag, "carries no compression (bar, bar3)";
    "note" Optional, Text, "a remark";
}
const FACTOR_OR_LENGTH: Takes = Either(&[Number(Positive), Quantity(Measure::Span, Positive)]);
block! { EFFECTIVE_LENGTH "members.<name>.effective_length" "Effective lengths: factors K on the member's length, or lengths."
    "in_plane" Else("1"), FACTOR_OR_LENGTH, "in the plane of the structure";
    "out_of_plane" Optional, FACTOR_OR_LENGTH, "out of it; without it that check is not made";
}
block! { CASE "load_cases.<name>" "A load case."
    "title" Optional, Text, "what it is";
    "self_weight" Else("false"), Either(&[Flag, Number(Any)]), "whether the members weigh, or a factor on their weight";
    "loads" Optional, List(&Either(&LOADS)), "its loads";
}
const DIRECTIONS: Takes = Word(&["X", "Y", "x", "y"]);
const ON: Takes = OneOrList(&Name("members"));
const INTENSITY: Takes = OneOrList(&Quantity(Measure::LineLoad, Any));
block! { NODE_LOAD "load_cases.<name>.loads[] (node)" "Forces and a couple on a node, global axes."
    "at" Required, Name("nodes"), "the node";
    "fx" Optional, Quantity(Measure::Force, Any), "force to the right";
    "fy" Optional, Quantity(Measure::Force, Any), "force upward";
    "m" Optional, Quantity(Measure::Moment, Any), "couple, anticlockwise";
}
block! { LINE_LOAD "load_cases.<name>.loads[] (line)" "Force per length of a member."
    "on" Required, ON, "the member, or several";
    "dir" Required, DIRECTIONS, "X, Y global or x, y local";
    "w" Required, INTENSITY, "force per length, or two: at the start and the end of the loaded part";
    "over" Optional, List(&Place), "the loaded part, two distances from `from`";
    "per" Optional, Word(&["plan"]), "`plan`: per length projected square to the direction";
}
block! { POINT_LOAD "load_cases.<name>.loads[] (point)" "A force on a member."
    "on" Required, ON, "the member, or several";
    "dir" Required, DIRECTIONS, "X, Y global or x, y local";
    "p" Required, Quantity(Measure::Force, Any), "the force";
    "at" Required, Place, "distance from `from`, or a percentage";
}
block! { MOMENT_LOAD "load_cases.<name>.loads[] (moment)" "A couple on a member."
    "on" Required, ON, "the member, or several";
    "m" Required, Quantity(Measure::Moment, Any), "the couple, anticlockwise";
    "at" Required, Place, "distance from `from`, or a percentage";
}
block! { WARM_LOAD "load_cases.<name>.loads[] (warm)" "A temperature rise of a member."
    "on" Required, ON, "the member, or several";
    "warm" Required, Either(&[Quantity(Measure::Temperature, Any), Keys(&GRADIENT)]), "the rise, or `{top: .., bottom: ..}`";
}
block! { GRADIENT "load_cases.<name>.loads[].warm" "Temperature rises of the two faces, straight between."
    "top" Required, Quantity(Measure::Temperature, Any), "at the +y face";
    "bottom" Required, Quantity(Measure::Temperature, Any), "at the −y face";
}
block! { FIT_LOAD "load_cases.<name>.loads[] (fit)" "Lack of fit of a member."
    "on" Required, ON, "the member, or several";
    "too_long" Required, Quantity(Measure::Length, Any), "by how much it is too long";
}
block! { SETTLE "load_cases.<name>.loads[] (settle)" "Imposed movement of held or sprung directions of a support."
    "settle" Required, Name("nodes"), "the supported node";
    "x" Optional, Quantity(Measure::Length, Any), "movement in x of the support";
    "y" Optional, Quantity(Measure::Length, Any), "movement in y of the support";
    "r" Optional, Quantity(Measure::Rotation, Any), "rotation, anticlockwise";
}
static LOADS: [Takes; 7] = [
    Keys(&NODE_LOAD),
    Keys(&LINE_LOAD),
    Keys(&POINT_LOAD),
    Keys(&MOMENT_LOAD),
    Keys(&WARM_LOAD),
    Keys(&FIT_LOAD),
    Keys(&SETTLE),
];
pub(super) const PURPOSES: &[&str] = &["stress", "shear", "deflection", "buckling", "slenderness", "stability"];
block! { COMBINATION "combinations.<name>" "A combination of load cases."
    "factors" Required, Named(&Number(Any)), "load cases and their factors";
    "title" Optional, Text, "what it is";
    "for" Optional, OneOrList(&Word(PURPOSES)), "the checks it counts for; left out, all";
}
const SELECTION: Takes = Either(&[Word(&["all", "off"]), List(&Name("members"))]);
block! { CHECKS "checks" "What is compared with limits."
    "stress" Else("all"), SELECTION, "fibre stress: all, off or a list of members";
    "shear" Else("all"), SELECTION, "shear stress: all, off or a list of members";
    "deflection" Optional, List(&Either(&[Keys(&MEMBER_DEFLECTION), Keys(&NODE_DEFLECTION)])), "limits on movement";
    "buckling" Optional, Keys(&BUCKLING), "compression members against their critical load";
    "slenderness" Optional, Number(Positive), "largest K·L/r of members in compression";
    "stability" Optional, Keys(&STABILITY), "elastic critical load factor of the whole";
}
block! { MEMBER_DEFLECTION "checks.deflection[] (member)" "A limit on a member's deflection from the chord between its ends."
    "member" Required, Name("members"), "the member";
    "limit" Required, Either(&[Text, Quantity(Measure::Length, Positive)]), "`L/360`, or a length";
}
block! { NODE_DEFLECTION "checks.deflection[] (node)" "A limit on a node's movement."
    "node" Required, Name("nodes"), "the node";
    "dir" Required, Word(AXES), "x, y or r";
    "limit" Required, Quantity(Measure::Length, Positive), "a length, or for r an angle";
}
block! { BUCKLING "checks.buckling" "Compression members against their critical load."
    "method" Else("euler"), Word(&["euler"]), "how the critical load is found";
    "safety" Required, Number(Positive), "critical load over allowed load";
}
block! { STABILITY "checks.stability" "The elastic critical load factor of the whole."
    "at_least" Required, Number(Positive), "the smallest that is allowed";
}

static FIXED: &[&Block] = &[
    &ROOT,
    &PROJECT,
    &PERSON,
    &REVISION,
    &BASIS,
    &ASSUMPTION,
    &DISPLAY,
    &MATERIAL,
    &ALLOWABLE,
    &SECTION,
    &PLATE,
    &NODE,
    &SUPPORT,
    &SPRING,
    &MEMBER,
    &EFFECTIVE_LENGTH,
    &CASE,
    &NODE_LOAD,
    &LINE_LOAD,
    &POINT_LOAD,
    &MOMENT_LOAD,
    &WARM_LOAD,
    &GRADIENT,
    &FIT_LOAD,
    &SETTLE,
    &COMBINATION,
    &CHECKS,
    &MEMBER_DEFLECTION,
    &NODE_DEFLECTION,
    &BUCKLING,
    &STABILITY,
];

/// Every block of the language with its keys, in the order of the manual; `display` with the kinds of quantity whose
/// unit may be set. The keys of the section shapes come from [`shape_keys`].
#[must_use]
pub fn blocks() -> Vec<Block> {
    FIXED
        .iter()
        .map(|block| match block.address {
            "display" => Block { keys: Cow::Owned(display_keys()), ..(*block).clone() },
            _ => (*block).clone(),
        })
        .collect()
}

/// The keys of every section shape, beside `shape`.
#[must_use]
pub fn shape_keys() -> Vec<(&'static str, Vec<Key>)> {
    section::ALL.iter().map(|kind| (kind.name(), section_keys(*kind))).collect()
}

/// The keys of a section of one shape: those of every section, and its own.
pub(super) fn section_keys(kind: &dyn SectionKind) -> Vec<Key> {
    let own = kind.params();
    let mut keys: Vec<Key> = vec![SECTION.keys[0]];
    keys.extend(own.iter().map(|param| {
        let presence = if is_required(kind, param) { Required } else { Optional };
        key(param.key, presence, Quantity(param.measure, Any), param.doc)
    }));
    if takes_plates(kind) {
        keys.extend(PLATES.keys.iter());
    }
    keys.extend(SECTION.keys[1..].iter().filter(|common| own.iter().all(|param| param.key != common.name)));
    keys
}

/// A built-up section is the one shape without dimensions of its own.
pub(super) fn takes_plates(kind: &dyn SectionKind) -> bool {
    kind.name() == "plates"
}

/// Whether a shape cannot be without a parameter. Of values read from a table only the area is always needed.
pub(super) fn is_required(kind: &dyn SectionKind, param: &section::Param) -> bool {
    param.default.is_none() && (kind.name() != "given" || param.symbol == section::AREA)
}

/// The keys of `display`: its own, and a unit for each kind of quantity that has one.
pub(super) fn display_keys() -> Vec<Key> {
    let units = Measure::ALL
        .iter()
        .filter(|measure| !measure.unit(crate::units::System::Metric).text.is_empty())
        .map(|measure| key(measure.key(), Optional, Takes::Unit(*measure), "unit in which this is printed"));
    DISPLAY.keys.iter().copied().chain(units).collect()
}

/// A quantity of this kind as somebody would type it.
pub(super) const fn example(measure: Measure) -> &'static str {
    match measure {
        Measure::Number | Measure::Ratio | Measure::Strain => "1.5",
        Measure::Length => "200 mm",
        Measure::Span => "2500 mm",
        Measure::Area => "2848 mm2",
        Measure::AreaMoment => "194e3 mm3",
        Measure::Inertia => "1943 cm4",
        Measure::Force => "12.5 kN",
        Measure::Moment => "4 kN·m",
        Measure::Energy => "3 N·m",
        Measure::Stress => "165 MPa",
        Measure::LineLoad => "4 kN/m",
        Measure::Rotation => "2 mrad",
        Measure::Angle => "30 deg",
        Measure::Curvature => "0.001 /m",
        Measure::Temperature => "30 K",
        Measure::Density => "7850 kg/m3",
        Measure::Acceleration => "9.81 m/s2",
        Measure::Expansion => "12e-6 /K",
        Measure::LoadSlope => "2 kN/m2",
        Measure::Spring => "12 kN/mm",
        Measure::RotationalSpring => "500 kN·m/rad",
        Measure::ForceArea | Measure::Rigidity => "5 kN·m2",
        Measure::ForceVolume => "5 kN·m3",
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::units::parse_quantity;

    #[test]
    fn examples_measure_what_they_stand_for() {
        for measure in Measure::ALL {
            let quantity = parse_quantity(example(*measure)).unwrap_or_else(|fault| panic!("{measure:?}: {fault:?}"));
            assert_eq!(quantity.dimension, measure.dimension(), "{measure:?}");
        }
    }

    #[test]
    fn no_block_lists_a_key_twice() {
        let shapes = shape_keys().into_iter();
        for (name, keys) in blocks().into_iter().map(|b| (b.address, b.keys.into_owned())).chain(shapes) {
            for (at, key) in keys.iter().enumerate() {
                assert!(keys[..at].iter().all(|other| other.name != key.name), "{name}: {}", key.name);
                assert!(!key.doc.is_empty(), "{name}: {}", key.name);
            }
        }
    }
}
