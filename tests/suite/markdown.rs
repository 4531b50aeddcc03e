//! Markdown that is written is read back by a parser of its own as the same words and the same shapes.
use calcsheaf::document::{Block, Document, Facts, Inline, RunningHead, Templates, build};
use calcsheaf::sheet::{Cell, Column, Row, Sheet, Table};
use calcsheaf::write::markdown::write;
use proptest::prelude::*;
use pulldown_cmark::{Event, Options, Parser, Tag};

fn written(blocks: Vec<Block>, sheet: &Sheet) -> String {
    write(&Document { head: RunningHead::default(), blocks }, sheet, "stem")
}

fn events(markdown: &str) -> Vec<Event<'_>> {
    Parser::new_ext(markdown, Options::ENABLE_TABLES | Options::ENABLE_STRIKETHROUGH | Options::ENABLE_GFM).collect()
}

/// The words that a reader sees, blanks counted once.
fn seen(markdown: &str) -> String {
    let mut words = String::new();
    for event in events(markdown) {
        match event {
            Event::Text(text) | Event::Code(text) => words.push_str(&text),
            Event::Html(html) | Event::InlineHtml(html) => {
                words.push_str(if &*html == "<br>" { " " } else { "[HTML]" })
            }
            Event::SoftBreak | Event::HardBreak | Event::End(_) => words.push(' '),
            Event::Start(Tag::Paragraph | Tag::Strong | Tag::Emphasis) => {}
            Event::Start(tag) => words.push_str(&format!("[{tag:?}]")),
            other => words.push_str(&format!("[{other:?}]")),
        }
    }
    spaced(&words)
}

fn spaced(words: &str) -> String {
    words.split_whitespace().collect::<Vec<_>>().join(" ")
}

#[test]
fn a_named_table_is_a_table() {
    let mut sheet = Sheet::default();
    sheet.push_table(Table {
        id: "C1.U".into(),
        title: "Node displacements".into(),
        head: "Node".into(),
        columns: vec![Column { symbol: "σ_top".into(), unit: None }],
        rows: vec![Row { name: "B_1_".into(), cells: vec![Cell::Text("a | `b|c` \\| <br>".into())] }],
        note: None,
    });
    let markdown = written(vec![Block::Table("C1.U".into())], &sheet);
    let events = events(&markdown);
    let count = |wanted: fn(&Tag<'_>) -> bool| {
        events.iter().filter(|event| matches!(event, Event::Start(tag) if wanted(tag))).count()
    };
    assert_eq!(count(|tag| matches!(tag, Tag::Table(_))), 1, "{markdown}");
    assert_eq!(count(|tag| matches!(tag, Tag::TableCell)), 4, "{markdown}");
    let cells: String = events
        .iter()
        .filter_map(|event| if let Event::Text(text) = event { Some(text.to_string()) } else { None })
        .collect();
    assert_eq!(cells, "Table C1.U Node displacementsNodeσ_topB_1_a | `b|c` \\| <br>", "{markdown}");
}

#[test]
fn the_whole_package_reads_back_as_its_words() {
    let said = "**Table C1.U** | `a` | :: step X <b>x</b> ![i](j) https://a.example # {{ y }} ~~z~~ $e$ &amp; \\";
    let mut facts = Facts::default();
    facts.project.title = said.into();
    facts.project.part = said.into();
    facts.cautions = vec![said.into(), said.into()];
    facts.input.text = "a: ``` b\n```step FORGED.G01\n".into();
    let document = build(&facts, &Templates::built_in()).unwrap_or_else(|fault| panic!("{fault}"));
    let markdown = write(&document, &Sheet::default(), "stem");
    let fences: Vec<String> = events(&markdown)
        .iter()
        .filter_map(
            |event| if let Event::Start(Tag::CodeBlock(kind)) = event { Some(format!("{kind:?}")) } else { None },
        )
        .collect();
    assert_eq!(fences.len(), 1, "{fences:?}");
    assert!(!fences[0].contains("step"));
    let html = events(&markdown)
        .iter()
        .filter(|event| matches!(event, Event::Html(_) | Event::InlineHtml(_) | Event::Start(Tag::Image { .. })))
        .count();
    assert_eq!(html, 0);
    assert_eq!(seen(&markdown).matches(said).count(), 6, "{markdown}");
    assert!(!markdown.lines().any(|line| line.ends_with(' ')));
}

/// Words made of what Markdown takes for marks.
fn words() -> impl Strategy<Value = String> {
    let piece = prop_oneof![
        Just(" "),
        Just("a"),
        Just("Zeta"),
        Just("12"),
        Just("."),
        Just(". "),
        Just("*"),
        Just("**"),
        Just("_"),
        Just("`"),
        Just("```"),
        Just("#"),
        Just("-"),
        Just("+"),
        Just(">"),
        Just("<b>"),
        Just("["),
        Just("]("),
        Just(")"),
        Just("!"),
        Just("|"),
        Just("~~"),
        Just("&lt;"),
        Just("\\"),
        Just("="),
        Just(":"),
        Just("//"),
        Just("$"),
        Just("\n"),
        Just("\n\n"),
        Just("é"),
        Just("×10⁻⁶"),
        Just("www."),
        Just("://"),
        Just("\u{A0}"),
        Just("<!--"),
        Just("\t"),
        Just("   ")
    ];
    prop::collection::vec(piece, 0..12).prop_map(|pieces| pieces.concat())
}

fn inlines() -> impl Strategy<Value = Vec<Inline>> {
    let leaf = prop_oneof![
        4 => words().prop_map(Inline::Text),
        1 => words().prop_map(Inline::Code),
        1 => Just(Inline::Break),
    ];
    let inline = leaf.prop_recursive(3, 12, 3, |inner| {
        let run = prop::collection::vec(inner, 0..3);
        prop_oneof![run.clone().prop_map(Inline::Strong), run.prop_map(Inline::Emphasis)]
    });
    prop::collection::vec(inline, 0..5)
}

/// Without blanks: a break and a mark's bounds may add or swallow one.
fn dense(inlines: &[Inline]) -> String {
    inlines
        .iter()
        .map(|inline| match inline {
            Inline::Text(text) | Inline::Code(text) => text.split_whitespace().collect(),
            Inline::Strong(inner) | Inline::Emphasis(inner) | Inline::Link { text: inner, .. } => dense(inner),
            Inline::Break => String::new(),
        })
        .collect()
}

proptest! {
    #![proptest_config(ProptestConfig { failure_persistence: None, ..ProptestConfig::default() })]

    #[test]
    fn any_words_come_back(text in words()) {
        let markdown = written(vec![Block::Paragraph(vec![Inline::Text(text.clone())])], &Sheet::default());
        prop_assert_eq!(seen(&markdown), spaced(&text), "{:?}", markdown);
    }

    #[test]
    fn any_dressed_words_come_back(run in inlines()) {
        let markdown = written(vec![Block::Paragraph(run.clone())], &Sheet::default());
        let seen: String = seen(&markdown).split_whitespace().collect();
        prop_assert_eq!(seen, dense(&run), "{:?}", markdown);
    }

    #[test]
    fn any_words_come_back_from_a_cell_a_list_and_a_heading(run in inlines()) {
        let head = vec![vec![Inline::Text("x".into())]];
        let grid = Block::Grid { head, rows: vec![vec![run.clone()]] };
        let list = Block::List { ordered: false, items: vec![vec![Block::Paragraph(run.clone())]] };
        let heading = Block::Heading { level: 2, text: run.clone(), anchor: String::new() };
        for block in [grid, list, heading] {
            let markdown = written(vec![block], &Sheet::default());
            let bare: String = events(&markdown)
                .iter()
                .map(|event| match event {
                    Event::Text(text) | Event::Code(text) => text.split_whitespace().collect(),
                    _ => String::new(),
                })
                .collect();
            let bare = bare.strip_prefix("x").filter(|_| markdown.starts_with("| x")).unwrap_or(&bare);
            prop_assert_eq!(bare, dense(&run), "{:?}", markdown);
        }
    }
}
