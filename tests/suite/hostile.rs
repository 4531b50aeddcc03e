//! Inputs made to do harm: each is refused in words, or packed in a form that `retrace` confirms.
use calcsheaf::diagnostic::Colour;
use calcsheaf::document::Templates;
use calcsheaf::typeset::Fonts;
use calcsheaf::{package, retrace};
use pulldown_cmark::{Event, Options, Parser};
use std::collections::BTreeSet;

/// A cantilever of 3 m with its parts open to change.
fn cantilever(project: &str, tip: &str, x: &str, load: &str) -> String {
    format!(
        "calcsheaf: 1\nproject: {project}\n\
         materials: {{S: {{E: 210 GPa, allowable: {{tension: 165 MPa, compression: 165 MPa, source: R1}}}}}}\n\
         sections: {{P: {{shape: rectangle, depth: 100 mm, width: 50 mm}}}}\n\
         nodes: {{A: {{x: 0 m, y: 0 m}}, {tip}: {{x: {x}, y: 0 m}}}}\nsupports: {{A: fixed}}\n\
         members: {{AB: {{kind: frame, from: A, to: {tip}, section: P, material: S}}}}\n\
         load_cases: {{D: {{loads: [{{at: {tip}, fy: {load}}}]}}}}\n"
    )
}

/// What is said of an input that is refused; nothing where it is packed, which must be confirmed.
fn refusal(text: &str) -> Option<String> {
    match package::solve(text) {
        Err(refusal) => Some(refusal.render("hostile.yaml", Colour::Never)),
        Ok(solved) => {
            let made =
                solved.package("hostile.yaml", text, &Templates::built_in()).unwrap_or_else(|fault| panic!("{fault}"));
            let pdf = solved.pdf(&made, &Fonts::built_in()).expect("a PDF");
            assert!(pdf.starts_with(b"%PDF"));
            let report = retrace::confirm(&retrace::read(&made.markdown).expect("a package"), Some(text));
            assert!(report.ok(), "{report}");
            None
        }
    }
}

#[track_caller]
fn refused(text: &str, code: &str) {
    let said = refusal(text).expect("refused");
    assert!(said.contains(code), "{said}");
    // Not the input itself thrown back.
    assert!(said.len() < 20_000, "{} bytes are said", said.len());
}

#[test]
fn loads_without_measure_are_refused() {
    let load = |load: &str| cantilever("{title: T}", "B", "3 m", load);
    for text in
        ["nan", "NaN kN", ".nan", ".inf", "inf kN", "-Infinity", "1e999 kN", "1e308 kN", "0x10 kN", "1_000 kN", "٣ kN"]
    {
        refused(&load(text), "E030");
    }
    for text in ["1e300 kN", "-1e13 kN", "1e-300 kN"] {
        refused(&load(text), "E034");
    }
    // 10⁹ kN on a light cantilever: P·L³/(3·E·I) is 10¹³ m.
    refused(&load("1e9 kN"), "E072");
    assert_eq!(refusal(&load("-0 kN")), None);
    assert_eq!(refusal(&load("-1e-9 kN")), None);
}

#[test]
fn members_of_no_length_are_refused_and_short_ones_worked() {
    for x in ["0 m", "0", "-0 mm"] {
        assert!(refusal(&cantilever("{title: T}", "B", x, "-1 kN")).is_some(), "{x}");
    }
    refused(&cantilever("{title: T}", "B", "1e-200 m", "-1 kN"), "E034");
    assert_eq!(refusal(&cantilever("{title: T}", "B", "1e-6 m", "-1 kN")), None);
}

#[test]
fn names_that_files_or_readers_could_stumble_over_are_only_names() {
    for name in ["a", "CON", "nul", "no", "1e3", "0x1F", "null", "BBBBBBBBBBBBBBBBBBBBBBBB"] {
        assert_eq!(refusal(&cantilever("{title: T}", name, "3 m", "-1 kN")), None, "{name}");
    }
    for name in ["B".repeat(1000), "\"../B\"".into(), "\"a b\"".into(), "Ä".into(), "\"B\u{202e}\"".into()] {
        refused(&cantilever("{title: T}", &name, "3 m", "-1 kN"), "E020");
    }
}

#[test]
fn files_made_to_keep_a_reader_busy_are_refused_at_once() {
    let bomb: String = ('a'..'j')
        .zip('b'..'k')
        .map(|(before, name)| format!("{name}: &{name} [{}]\n", vec![format!("*{before}"); 9].join(", ")))
        .collect();
    refused(&format!("calcsheaf: 1\na: &a [x, x, x, x, x, x, x, x, x]\n{bomb}"), "E006");
    refused(&format!("calcsheaf: 1\na: {}", "[".repeat(100_000)), "E003");
    refused(&format!("calcsheaf: 1\na: {}", "{b: ".repeat(100_000)), "E003");
    refused(&format!("calcsheaf: 1\n# {}\n", "x".repeat(100_000_000)), "E002");
    refused(&format!("calcsheaf: 1\na: \"{}", "x".repeat(1_000_000)), "E001");
}

/// Long texts cost time in proportion: a title stands at the head of every sheet.
#[test]
fn long_titles_are_set() {
    for title in ["x".repeat(5_000), "word ".repeat(1_000)] {
        assert_eq!(refusal(&cantilever(&format!("{{title: \"{title}\"}}"), "B", "3 m", "-1 kN")), None);
    }
}

/// Texts that would be something else than words if they were let out of their place.
const TEXTS: &[&str] = &[
    "```step FORGED.G01\nLength\nL = x\n  = 1 m\n  = 1 m\nfrom: x INPUT.nodes.B.x\n```",
    "~~~step FORGED.G01\nx\n~~~",
    "> ```step FORGED.G01\n> x\n> ```",
    "from: x INPUT.nodes.B.x",
    "L = x\n= 1 m\nfrom: x INPUT.nodes.B.x\nby: nobody",
    "````\nends a fence",
    "| a | b |\n|---|---|\n| **Table C1.U** | 1 |",
    "**Table INPUT.nodes** Nodes\n\n| node | x, m |\n|---|---|\n| B | 9 |",
    "Governing: **AB, stress, combination D**, at **0.0001** of its limit, OK",
    "SHA-256: 0123456789abcdef0123456789abcdef0123456789abcdef0123456789abcdef.",
    "## Verdict\n\nAll is well.",
    "{{ 7777*7 }} {% raw %} {# x #} {% include \"cover\" %}",
    ":: step AB.G01\n:: new sheet",
    "<script>alert(1)</script><!-- x --><img src=x onerror=y>",
    "[link](javascript:alert(1)) ![figure](/etc/passwd) <https://a.example>",
    "a\u{202e}b\u{200b}c\u{2066}d\u{feff}e\u{2028}f",
    "\\[x\\] \\` \\\\ &lt; &#96; $x$",
];

#[test]
fn texts_do_not_break_out_of_their_place() {
    let plain = made(&project("words"));
    let numbers = |markdown: &str| -> BTreeSet<String> {
        let package = retrace::read(markdown).expect("a package");
        package.steps().iter().map(|step| step.number.clone()).collect()
    };
    let tables =
        |markdown: &str| retrace::read(markdown).expect("a package").tables().iter().filter(|t| t.id.is_some()).count();
    for text in TEXTS {
        let yaml = project(text);
        if yaml.contains('\u{feff}') {
            refused(&yaml, "E010");
            continue;
        }
        if yaml.contains('\u{2028}') {
            refused(&yaml, "E0");
            continue;
        }
        assert_eq!(refusal(&yaml), None, "{text}");
        let markdown = made(&yaml);
        assert_eq!(numbers(&markdown), numbers(&plain), "{text}");
        assert_eq!(tables(&markdown), tables(&plain), "{text}");
        let headings = |text: &str| text.lines().filter(|line| line.starts_with("## ")).count();
        assert!(headings(&markdown) <= headings(&plain), "{text}");
        let html =
            |event: &Event<'_>| matches!(event, Event::Html(html) | Event::InlineHtml(html) if &**html != "<br>");
        let events: Vec<Event<'_>> = Parser::new_ext(&markdown, Options::ENABLE_TABLES).filter(html).collect();
        assert!(events.is_empty(), "{text}: {events:?}");
        assert!(!markdown.contains("54439"), "a template was worked: {text}");
    }
}

/// A project with a text in every place that takes one.
fn project(text: &str) -> String {
    let quoted = serde_json::to_string(text).expect("a text");
    cantilever(
        &format!(
            "{{title: {quoted}, number: {quoted}, part: {quoted}, client: {quoted}, status: {quoted}, revision: {quoted}, \
             prepared_by: {{name: {quoted}, date: {quoted}}}, purpose: {quoted}, notes: {quoted}, \
             basis: [{{mark: R1, text: {quoted}}}], assumptions: [{{text: {quoted}, confirm: true}}], \
             revisions: [{{mark: {quoted}, date: {quoted}, by: {quoted}, text: {quoted}}}]}}"
        ),
        "B",
        "3 m",
        "-1 kN",
    )
}

fn made(text: &str) -> String {
    let solved = package::solve(text).unwrap_or_else(|refusal| panic!("{}", refusal.render("x", Colour::Never)));
    solved.package("hostile.yaml", text, &Templates::built_in()).unwrap_or_else(|fault| panic!("{fault}")).markdown
}
