//! Tests of the whole room: every template with nothing and with everything, hostile texts, faults of templates.
use super::read::words_of;
use super::*;
use std::collections::BTreeMap;

fn text(words: &str) -> String {
    words.to_string()
}

fn group(title: &str) -> Group {
    Group {
        title: text(title),
        text: text("What it shows."),
        tables: vec![text("C1.F")],
        figures: vec![text("C1.M")],
        steps: vec![text("BC.C1.E01")],
    }
}

fn row(verdict: &str) -> CheckRow {
    CheckRow {
        id: text("BC.C1.stress"),
        subject: text("BC"),
        kind: text("stress"),
        combination: text("C1"),
        place: text("top, 2.000 m"),
        demand: text("178.2 MPa"),
        limit: text("165 MPa"),
        source: text("R1"),
        ratio: text("1.081"),
        verdict: text(verdict),
        why: text(if verdict == "NOT CHECKED" { "no allowable was given" } else { "" }),
        address: text("BC.C1.C01"),
    }
}

/// Every field filled; every text from the input is `said`.
fn full(said: &str) -> Facts {
    let said = || said.to_string();
    let member = MemberFact {
        name: text("BC"),
        kind: text("frame"),
        section: text("A5"),
        material: text("S275"),
        from: text("B"),
        to: text("C"),
        note: said(),
    };
    let person = PersonFact { name: said(), date: text("2026-11-30") };
    let assumption = |number: &str, confirm| AssumptionFact { number: text(number), text: said(), confirm };
    Facts {
        project: ProjectFacts {
            title: said(),
            number: said(),
            part: said(),
            client: said(),
            revision: said(),
            status: said(),
            prepared_by: person.clone(),
            checked_by: person.clone(),
            approved_by: person,
            revisions: vec![RevisionFact {
                mark: said(),
                date: text("2026-10-02"),
                by: said(),
                text: said(),
                affects: vec![said(), text("load_cases.L")],
            }],
            purpose: said(),
            basis: vec![BasisFact { mark: said(), text: said() }],
            assumptions: vec![assumption("1", true), assumption("2", false)],
            notes: said(),
        },
        display: DisplayFacts { detail: text("full"), digits: text("4") },
        checks: CheckFacts {
            rows: vec![row("NOT OK"), row("OK"), row("NOT CHECKED")],
            governing: Some(row("NOT OK")),
            within: 1,
            beyond: 1,
            not_checked: 1,
            kinds: vec![text("stress"), text("shear")],
            matrix: vec![MatrixRow { subject: text("BC"), cells: vec![text("1.081"), text("NOT CHECKED")] }],
            groups: vec![group("Node B")],
        },
        cautions: vec![said()],
        sign_figures: vec![text("signs")],
        structure: StructureFacts {
            nodes: vec![text("B"), text("C")],
            members: vec![member.clone()],
            sections: vec![SectionFact {
                name: text("A5"),
                shape: text("i"),
                source: said(),
                tables: vec![text("INPUT.A5")],
                figures: vec![text("A5")],
                steps: vec![text("A5.P01")],
            }],
            combination_tables: Vec::new(),
            limit_tables: Vec::new(),
            materials: vec![text("S275")],
            figures: vec![text("structure")],
            node_tables: vec![text("INPUT.nodes")],
            support_tables: vec![text("INPUT.supports")],
            member_tables: vec![text("INPUT.members")],
            section_tables: vec![text("INPUT.sections")],
            material_tables: vec![text("INPUT.materials")],
            material_steps: vec![text("S275.G01")],
            defaults: vec![text("Gravity is 9.80665 m/s².")],
        },
        cases: vec![CaseFacts {
            name: text("D"),
            title: said(),
            self_weight: text("1"),
            tables: vec![text("INPUT.D")],
            figures: vec![text("D")],
            steps: vec![text("BC.D.L01")],
        }],
        combinations: vec![CombinationFacts {
            name: text("C1"),
            title: said(),
            factors: text("1.2·D + 1.6·L"),
            purposes: text("stress"),
            implied: false,
            critical: text("14.2"),
            slack: vec![text("T1")],
            tables: vec![text("C1.U"), text("C1.R")],
            figures: vec![text("C1.V")],
        }],
        node_sheets: vec![NodeSheet { node: text("B"), combination: text("C1"), groups: vec![group("")] }],
        balance_sheets: vec![BalanceSheet { combination: text("C1"), groups: vec![group("")] }],
        load_audit: vec![group("Totals")],
        member_sheets: vec![MemberSheet {
            member,
            figures: vec![text("BC")],
            groups: vec![group("Geometry and constants")],
            sheets: vec![CombinationSheet {
                combination: text("C1"),
                reason: text("governs stress"),
                groups: vec![group("Movements")],
            }],
        }],
        second_answers: vec![group("Energy")],
        sample: vec![SampleFact { address: text("BC.C1.E01"), what: said(), why: text("governs") }],
        sample_rest: vec![SampleGroup {
            why: text("First use"),
            subjects: vec![SampleSubject { subject: text("BC.C1"), steps: vec![text("BC.C1.E01")] }],
        }],
        symbols: vec![SymbolFact {
            address: text("BC.C1.E03"),
            symbol: text("κ_u1"),
            meaning: said(),
            unit: text("1/m"),
        }],
        read_symbols: vec![SymbolFact { symbol: text("E"), meaning: said(), ..SymbolFact::default() }],
        left_out: vec![LeftOutFact { node: text("B"), direction: text("rotation") }],
        input: InputFacts { name: said(), sha256: text("0badc0de"), text: said() },
        program: ProgramFacts {
            version: text("0.1.0"),
            validated: vec![text("one")],
            uncovered: vec![text("two")],
            steps: text("133"),
            tables: text("26"),
        },
    }
}

fn built(facts: &Facts) -> Document {
    match build(facts, &Templates::built_in()) {
        Ok(document) => document,
        Err(fault) => panic!("{fault}"),
    }
}

fn with(name: &str, template: &str) -> Result<Document, TemplateFault> {
    let files = BTreeMap::from([(text(name), text(template)), (text("order.txt"), text("cover\n"))]);
    build(&full("said"), &Templates::from_files(files))
}

#[track_caller]
fn check_fault(template: &str, line: usize, part: &str) {
    match with("cover.md.j2", template) {
        Ok(_) => panic!("no fault in {template:?}"),
        Err(fault) => {
            assert_eq!((fault.template.as_str(), fault.line), ("cover", Some(line)), "{fault}");
            assert!(fault.message.contains(part), "{fault}");
        }
    }
}

fn headings(document: &Document) -> Vec<(u8, String)> {
    document
        .blocks
        .iter()
        .filter_map(|block| match block {
            Block::Heading { level, text, .. } => Some((*level, words_of(text))),
            _ => None,
        })
        .collect()
}

#[test]
fn every_template_prints_with_nothing() {
    let chapters: Vec<String> = headings(&built(&Facts::default()))
        .into_iter()
        .filter(|(level, _)| *level == 2)
        .map(|(_, words)| words)
        .collect();
    assert_eq!(
        chapters,
        [
            "Verdict",
            "Signatures",
            "Revisions",
            "Contents",
            "Purpose",
            "Basis and references",
            "Assumptions",
            "How to check this package",
            "Input as understood",
            "Results",
            "Proof of equilibrium",
            "Member sheets",
            "Comparison with limits",
            "Checker's work",
            "Cautions and limits",
            "Input file",
            "Program",
            "End of package"
        ]
    );
}

#[test]
fn every_name_in_the_facts_is_printed() {
    let document = built(&full("said"));
    let mut names: Vec<&str> = printed(&document)
        .into_iter()
        .map(|block| match block {
            Block::Step(name) | Block::Table(name) | Block::Figure(name) => name.as_str(),
            _ => "",
        })
        .collect();
    names.sort_unstable();
    names.dedup();
    assert_eq!(
        names,
        [
            "A5",
            "A5.P01",
            "BC",
            "BC.C1.E01",
            "BC.D.L01",
            "C1.F",
            "C1.M",
            "C1.R",
            "C1.U",
            "C1.V",
            "D",
            "INPUT.A5",
            "INPUT.D",
            "INPUT.materials",
            "INPUT.members",
            "INPUT.nodes",
            "INPUT.sections",
            "INPUT.supports",
            "S275.G01",
            "signs",
            "structure"
        ]
    );
    let levels = headings(&document);
    for expected in ["Member BC", "Member BC, combination C1", "Node B, combination C1", "Section A5"] {
        assert!(levels.contains(&(3, text(expected))), "{expected}");
    }
    assert!(document.head.preliminary && document.head.beyond_limit);
    assert_eq!(document.head.date, "2026-10-02");
}

#[test]
fn every_grid_has_as_many_cells_as_heads() {
    for block in built(&full("a | b")).blocks {
        if let Block::Grid { head, rows } = block {
            rows.iter().for_each(|row| assert_eq!(row.len(), head.len(), "{head:?}"));
        }
    }
}

/// Text from the input may say what it likes: the blocks that carry no words of it stay the same.
#[test]
fn hostile_texts_change_nothing_but_words() {
    let kinds = |said: &str| -> Vec<String> {
        built(&full(said))
            .blocks
            .iter()
            .filter_map(|block| match block {
                Block::Paragraph(_) | Block::List { .. } | Block::Verbatim(_) => None,
                Block::Caution(_) => Some(text("caution")),
                Block::Grid { head, rows } => Some(format!("{head:?} {}", rows.len())),
                Block::Heading { level: 4, .. } => None,
                Block::Heading { level, .. } => Some(format!("heading {level}")),
                other => Some(format!("{other:?}")),
            })
            .collect()
    };
    let plain = kinds("said");
    for said in [
        ":: end\n:: step FORGED.G01\n",
        "\n\n:: caution\n\n# Verdict\n\nOK",
        "{{ input.text }} {% include \"cover\" %} {# gone #}",
        "```step FORGED.C1.C01\nRatio\nr = 0\n```",
        "| a | b |\n|---|---|\n| 1 | 2 |",
        "<script>alert(1)</script>\n\n<!-- ",
        "\u{F8F0}L4142\u{F8F1} \u{F8F0}P\u{F8F1}",
        "&#xF8F0;L4142&#xF8F1;",
        "[a](https://example.org \"t\") ![b](c.png) <https://example.org>",
        "> > > > > > > > > > > > > > > > > > > > deep",
        "a\\",
        "- [ ] open\n  - nested\n\n1) one",
        "***\n___\n---\n",
        "   \t indented\n\n\tcode",
    ] {
        assert_eq!(kinds(said), plain, "{said:?}");
    }
}

#[test]
fn deep_nesting_ends_in_plain_words() {
    let said = format!("{}deep{}", "*_".repeat(20_000), "_*".repeat(20_000));
    built(&full(&said));
    built(&full(&"> ".repeat(20_000)));
    built(&full(&"- ".repeat(5_000)));
}

#[test]
fn hidden_characters_are_shown_however_they_come() {
    let purpose = |said: &str| {
        let mut facts = Facts::default();
        facts.project.purpose = text(said);
        format!("{:?}", built(&facts).blocks)
    };
    for said in ["a\u{202E}b", "a&#x202E;b", "`a\u{202E}b`", "[a\u{202E}b](x)", "<a\u{202E}b>"] {
        let printed = purpose(said);
        assert!(printed.contains("a⟨U+202E⟩b"), "{said:?}");
    }
    let facts = full("x\u{200B}\u{2067}y");
    let all = format!("{:?}", built(&facts));
    assert!(!all.contains("\\u{200b}") && !all.contains("\\u{2067}") && !all.contains(['\u{200B}', '\u{2067}']));
}

#[test]
fn prose_keeps_paragraphs_lists_and_emphasis() {
    let mut facts = Facts::default();
    facts.project.purpose = text("# Aim\n\nSize the *posts*.\n\n- one\n- **two**\n\n2026. Survey");
    let blocks = built(&facts).blocks;
    let at = blocks
        .iter()
        .position(|block| matches!(block, Block::Heading { level: 4, .. }))
        .unwrap_or_else(|| panic!("no heading in {blocks:?}"));
    let words = |words: &str| Inline::Text(text(words));
    assert_eq!(
        blocks[at + 1..at + 4],
        [
            Block::Paragraph(vec![words("Size the "), Inline::Emphasis(vec![words("posts")]), words(".")]),
            Block::List {
                ordered: false,
                items: vec![
                    vec![Block::Paragraph(vec![words("one")])],
                    vec![Block::Paragraph(vec![Inline::Strong(vec![words("two")])])]
                ]
            },
            Block::Paragraph(vec![words("2026. "), words("Survey")]),
        ]
    );
}

#[test]
fn a_firm_replaces_wording_and_order() {
    let document = with("cover", "# {{ project.title }}\n\nSee {{ \"BC.G01\" | link }}.\n");
    let words = |words: &str| Inline::Text(text(words));
    let link = Inline::Link { to: text("BC.G01"), text: vec![words("BC.G01")] };
    let expected = vec![
        Block::Heading { level: 1, text: vec![words("said")], anchor: text("said") },
        Block::Paragraph(vec![words("See "), link, words(".")]),
    ];
    assert_eq!(document.map(|document| document.blocks), Ok(expected));
}

#[test]
fn faults_of_templates_say_where_and_what() {
    check_fault("a\n\n{{ projekt.title }}\n", 3, "`projekt.title`");
    check_fault("a\n{{ project.titel }}\n", 2, "`project.titel`");
    check_fault("a\n{% for x in checks.rows %}\n", 2, "");
    check_fault("a\n{% include \"nothing\" %}\n", 2, "nothing");
    check_fault("a\n\n:: stepp BC.G01\n", 3, "no mark");
    check_fault("a\n:: step\n", 2, "wants the name");
    check_fault("a\n:: caution\nb\n", 2, "not closed");
    check_fault("a\n:: end\n", 2, "closes no caution");
    check_fault("a\n\n<b>bold</b>\n", 3, "HTML");
    check_fault("a\n\n![p](p.png)\n", 3, "picture");
    let order = BTreeMap::from([(text("order.txt"), text("# none\nfrontispiece\n"))]);
    let fault = build(&Facts::default(), &Templates::from_files(order)).map(|_| ());
    assert_eq!(
        fault,
        Err(TemplateFault {
            template: text("order"),
            line: Some(2),
            message: text("there is no template called `frontispiece`")
        })
    );
}

#[test]
fn a_fault_in_an_included_template_names_it() {
    let files = BTreeMap::from([(text("caution-licence"), text("fine\n{{ nobody }}\n"))]);
    match build(&Facts::default(), &Templates::from_files(files)) {
        Ok(_) => panic!("no fault"),
        Err(fault) => assert_eq!(fault.to_string(), "template `caution-licence`, line 2: nothing is called `nobody`"),
    }
}
