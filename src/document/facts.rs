//! What the templates may speak of: project texts, names, and the numbers of steps, tables and figures by place.
//!
//! Every text is ready to print. A text is empty, a list has no items where there is nothing to say; the templates
//! see to it that the chapter then says so or leaves it out. Texts that come from the input are handed over as typed:
//! the templates' own escaping makes them harmless.
use super::fact::facts;

facts! {
    /// Everything the templates may print. Fields stand in the order of the chapters that use them.
    Facts {
        /// Titles, people, revisions and prose of the input.
        project: ProjectFacts,
        /// How the package is printed.
        display: DisplayFacts,
        /// Comparisons with limits.
        checks: CheckFacts,
        /// Cautions about this structure and this solution, worst first: sentences made by the program, such as a
        /// low critical load factor or an ill-conditioned system. Printed on the cover and among the limits.
        cautions: Vec<String>,
        /// Figures that show axes and signs.
        sign_figures: Vec<String>,
        /// The structure as it was understood.
        structure: StructureFacts,
        /// Load cases in the input's order.
        cases: Vec<CaseFacts>,
        /// Combinations in the input's order.
        combinations: Vec<CombinationFacts>,
        /// Balance of each node, by combination.
        node_sheets: Vec<NodeSheet>,
        /// Balance of the whole, by combination.
        balance_sheets: Vec<BalanceSheet>,
        /// Loads as typed, as applied and as resisted, added up.
        load_audit: Vec<Group>,
        /// Members worked line by line, in the input's order; those left out by `display.detail` are absent.
        member_sheets: Vec<MemberSheet>,
        /// Second answers by another route: bounds, energy, orders of magnitude.
        second_answers: Vec<Group>,
        /// What the sampling rule chose for a line of its own: what governs, what is near its limit.
        sample: Vec<SampleFact>,
        /// What it chose besides: each kind of formula once, and a draw from the rest.
        sample_rest: Vec<SampleGroup>,
        /// Every symbol that a step finds, by name, with the first step of each kind.
        symbols: Vec<SymbolFact>,
        /// Every other symbol of the formulas, by name.
        read_symbols: Vec<SymbolFact>,
        /// Directions that nothing stiffens and nothing loads.
        left_out: Vec<LeftOutFact>,
        /// The input file.
        input: InputFacts,
        /// The program.
        program: ProgramFacts,
    }

    /// Titles, people, revisions and prose of the input, as typed.
    ProjectFacts {
        /// Title.
        title: String,
        /// Job number.
        number: String,
        /// What this package covers.
        part: String,
        /// Client.
        client: String,
        /// Current revision.
        revision: String,
        /// Status, such as `for check`.
        status: String,
        /// Who prepared it.
        prepared_by: PersonFact,
        /// Who checked it; blank until signed.
        checked_by: PersonFact,
        /// Who approved it; blank until signed.
        approved_by: PersonFact,
        /// Revisions in the input's order.
        revisions: Vec<RevisionFact>,
        /// Purpose; Markdown prose.
        purpose: String,
        /// Documents that the numbers rest on.
        basis: Vec<BasisFact>,
        /// Assumptions in the input's order.
        assumptions: Vec<AssumptionFact>,
        /// Notes; Markdown prose.
        notes: String,
    }

    /// Who did something, and when.
    PersonFact {
        /// Name.
        name: String,
        /// Date.
        date: String,
    }

    /// One revision.
    RevisionFact {
        /// Mark, such as `B`.
        mark: String,
        /// Date.
        date: String,
        /// Initials or name.
        by: String,
        /// What changed and why; Markdown prose.
        text: String,
        /// Parts of the input it affects, as typed: `members.BC`.
        affects: Vec<String>,
    }

    /// A document that the numbers rest on.
    BasisFact {
        /// Mark, such as `R1`.
        mark: String,
        /// What it is; Markdown prose.
        text: String,
    }

    /// An assumption.
    AssumptionFact {
        /// Its number, made of its place in the list: `1`, `2`, ...
        number: String,
        /// What is assumed; Markdown prose.
        text: String,
        /// Whether it has to be confirmed before use.
        confirm: bool,
    }

    /// How the package is printed.
    DisplayFacts {
        /// `governing`, `full` or `summary`.
        detail: String,
        /// Significant digits of a result, such as `4`.
        digits: String,
    }

    /// Comparisons with limits.
    CheckFacts {
        /// Every row, governing first, those not checked last.
        rows: Vec<CheckRow>,
        /// The governing row: the largest ratio.
        governing: Option<CheckRow>,
        /// How many are within their limits.
        within: usize,
        /// How many are beyond their limits.
        beyond: usize,
        /// How many could not be checked.
        not_checked: usize,
        /// Heads of the completeness matrix: kinds of check, such as `stress`.
        kinds: Vec<String>,
        /// Rows of the completeness matrix: every member, every node with a check, the structure.
        matrix: Vec<MatrixRow>,
        /// Comparisons that stand on no member sheet: of nodes, of the structure, of members not worked line by line.
        groups: Vec<Group>,
    }

    /// One comparison.
    CheckRow {
        /// `<subject>.<combination>.<kind>`.
        id: String,
        /// Member, node or `structure`.
        subject: String,
        /// Kind, such as `stress`.
        kind: String,
        /// Combination.
        combination: String,
        /// Place within the subject, such as `top, 2.000 m`; may be empty.
        place: String,
        /// Demand with its unit.
        demand: String,
        /// Limit with its unit.
        limit: String,
        /// Where the limit comes from: a basis mark or text as typed; may be empty.
        source: String,
        /// Ratio, rounded up; empty where not checked.
        ratio: String,
        /// `OK`, `NOT OK` or `NOT CHECKED`.
        verdict: String,
        /// Why it could not be checked; empty otherwise.
        why: String,
        /// Number of the step that compares; empty where there is none.
        address: String,
    }

    /// One row of the completeness matrix.
    MatrixRow {
        /// Member, node or `structure`.
        subject: String,
        /// One text a kind: the worst ratio, `NOT CHECKED`, or `–` where the kind does not apply.
        cells: Vec<String>,
    }

    /// A titled run of tables, figures and steps, printed in that order.
    Group {
        /// Title; empty where the group follows its heading directly.
        title: String,
        /// A sentence or two on what it shows; may be empty.
        text: String,
        /// Table ids.
        tables: Vec<String>,
        /// Figure ids.
        figures: Vec<String>,
        /// Step numbers.
        steps: Vec<String>,
    }

    /// The structure as it was understood.
    StructureFacts {
        /// Node names.
        nodes: Vec<String>,
        /// Members.
        members: Vec<MemberFact>,
        /// Sections.
        sections: Vec<SectionFact>,
        /// Material names.
        materials: Vec<String>,
        /// Figures of the whole structure.
        figures: Vec<String>,
        /// Ids of the tables of nodes.
        node_tables: Vec<String>,
        /// Ids of the tables of supports.
        support_tables: Vec<String>,
        /// Ids of the tables of members.
        member_tables: Vec<String>,
        /// Ids of the tables of sections.
        section_tables: Vec<String>,
        /// Ids of the tables of materials.
        material_tables: Vec<String>,
        /// Ids of the tables of combinations.
        combination_tables: Vec<String>,
        /// Ids of the tables of limits.
        limit_tables: Vec<String>,
        /// Steps that work material constants.
        material_steps: Vec<String>,
        /// Values that stand because the input says nothing: sentences, such as `Gravity is 9.80665 m/s².`
        defaults: Vec<String>,
    }

    /// A member.
    MemberFact {
        /// Name.
        name: String,
        /// Kind in words, such as `frame`.
        kind: String,
        /// Section's name.
        section: String,
        /// Material's name.
        material: String,
        /// Start node.
        from: String,
        /// End node.
        to: String,
        /// The member's own note.
        note: String,
    }

    /// A section and how its properties are worked.
    SectionFact {
        /// Name.
        name: String,
        /// Shape, such as `i`.
        shape: String,
        /// Where its dimensions come from, as typed.
        source: String,
        /// Ids of its own tables, such as dimensions.
        tables: Vec<String>,
        /// Ids of its drawings.
        figures: Vec<String>,
        /// Steps from dimensions to properties; none where they were given.
        steps: Vec<String>,
    }

    /// A load case.
    CaseFacts {
        /// Name.
        name: String,
        /// Title, as typed.
        title: String,
        /// Factor on self-weight, empty where it has none.
        self_weight: String,
        /// Ids of its tables of loads.
        tables: Vec<String>,
        /// Ids of its drawings.
        figures: Vec<String>,
        /// Steps that work its loads, such as weights and totals.
        steps: Vec<String>,
    }

    /// A combination and where its results stand.
    CombinationFacts {
        /// Name.
        name: String,
        /// Title, as typed.
        title: String,
        /// Factors: `1.2·D + 1.6·L`.
        factors: String,
        /// What it is for: `stress, buckling`; empty where it is for everything.
        purposes: String,
        /// Whether it is a load case by itself because the input names no combinations.
        implied: bool,
        /// Elastic critical load factor, empty where nothing is compressed or it was not worked.
        critical: String,
        /// Members that have gone slack.
        slack: Vec<String>,
        /// Ids of tables: displacements, reactions, end forces, stress summary, in that order.
        tables: Vec<String>,
        /// Ids of drawings: deflected shape, N, V, M.
        figures: Vec<String>,
    }

    /// Balance of one node.
    NodeSheet {
        /// The node.
        node: String,
        /// The combination.
        combination: String,
        /// Its steps.
        groups: Vec<Group>,
    }

    /// Balance of the whole.
    BalanceSheet {
        /// The combination.
        combination: String,
        /// Its steps.
        groups: Vec<Group>,
    }

    /// A member worked line by line.
    MemberSheet {
        /// The member.
        member: MemberFact,
        /// Figures of the member alone.
        figures: Vec<String>,
        /// What does not depend on the combination: geometry and constants.
        groups: Vec<Group>,
        /// What does.
        sheets: Vec<CombinationSheet>,
    }

    /// A member under one combination.
    CombinationSheet {
        /// The combination.
        combination: String,
        /// Why this one is printed, such as `governs stress`; may be empty.
        reason: String,
        /// Movements, strain, end forces, stress, extremes, comparisons.
        groups: Vec<Group>,
    }

    /// One line of the sampling list.
    SampleFact {
        /// A step's number, a table's id or the id of a comparison.
        address: String,
        /// What it is, in words.
        what: String,
        /// The rule that chose it.
        why: String,
    }

    /// Steps of the sampling list that one rule chose.
    SampleGroup {
        /// The rule, such as `first use of a formula`.
        why: String,
        /// The steps by subject.
        subjects: Vec<SampleSubject>,
    }

    /// Steps of one subject in the sampling list.
    SampleSubject {
        /// What stands before the letter of the steps' numbers, such as `BC.C1`.
        subject: String,
        /// The steps' numbers.
        steps: Vec<String>,
    }

    /// A symbol of the formulas.
    SymbolFact {
        /// The first step that finds it; empty where it is read from a table.
        address: String,
        /// As it stands in formulas.
        symbol: String,
        /// What it stands for; of a step words, symbol and method, as `retrace` holds them against it.
        meaning: String,
        /// The units of its numbers, such as `mm`; empty where it has none.
        unit: String,
    }

    /// A direction that nothing stiffens and nothing loads.
    LeftOutFact {
        /// The node.
        node: String,
        /// The direction, in words: `rotation`, `movement along X`.
        direction: String,
    }

    /// The input file.
    InputFacts {
        /// Its name without folders.
        name: String,
        /// SHA-256 of its bytes, in hexadecimal.
        sha256: String,
        /// Its text.
        text: String,
    }

    /// The program.
    ProgramFacts {
        /// Version.
        version: String,
        /// Published cases and promises it was validated on: one line each.
        validated: Vec<String>,
        /// Features this input uses that no validation case covers: one line each.
        uncovered: Vec<String>,
        /// How many steps the package holds.
        steps: String,
        /// How many of its tables have an id.
        tables: String,
    }
}
