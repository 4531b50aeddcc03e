//! What the file says about itself: catalog, information dictionary and the same as XMP.
use super::Facts;
use super::file::Number;
use super::ink::Ink;

/// The catalog (ISO 32000-1, 7.7.2).
pub(super) fn catalog(tree: Number, metadata: Number, outline: Option<Number>) -> Vec<u8> {
    let mut ink = Ink::default();
    ink.raw(b"<</Type/Catalog/Pages ");
    ink.to(tree);
    ink.raw(b"/Metadata ");
    ink.to(metadata);
    ink.raw(b"/Lang(en)/PageLayout/SinglePage/ViewerPreferences<</DisplayDocTitle true>>");
    if let Some(outline) = outline {
        ink.raw(b"/Outlines ");
        ink.to(outline);
        ink.raw(b"/PageMode/UseOutlines");
    }
    ink.raw(b">>");
    ink.0
}

/// The information dictionary (14.3.3).
pub(super) fn information(facts: &Facts) -> Vec<u8> {
    let mut ink = Ink::default();
    ink.raw(b"<<");
    let texts = [
        ("/Title", &facts.title),
        ("/Author", &facts.author),
        ("/Subject", &facts.subject),
        ("/Creator", &facts.producer),
        ("/Producer", &facts.producer),
    ];
    for (key, text) in texts.into_iter().filter(|(_, text)| !text.is_empty()) {
        ink.raw(key);
        ink.text(text);
    }
    if let Some([year, month, day]) = facts.day() {
        for key in ["/CreationDate", "/ModDate"] {
            ink.raw(format!("{key}(D:{year}{month}{day}000000Z)"));
        }
    }
    ink.raw(b">>");
    ink.0
}

/// The same facts as XMP (ISO 16684-1). No conformance to PDF/A is claimed: nothing here has checked it.
pub(super) fn metadata(facts: &Facts) -> String {
    let mut text = String::from(concat!(
        "<?xpacket begin=\"\u{feff}\" id=\"W5M0MpCehiHzreSzNTczkc9d\"?>\n",
        "<x:xmpmeta xmlns:x=\"adobe:ns:meta/\"><rdf:RDF xmlns:rdf=\"http://www.w3.org/1999/02/22-rdf-syntax-ns#\">\n",
        "<rdf:Description rdf:about=\"\" xmlns:dc=\"http://purl.org/dc/elements/1.1/\" ",
        "xmlns:xmp=\"http://ns.adobe.com/xap/1.0/\" xmlns:pdf=\"http://ns.adobe.com/pdf/1.3/\">\n",
        "<dc:format>application/pdf</dc:format><dc:language><rdf:Bag><rdf:li>en</rdf:li></rdf:Bag></dc:language>\n",
    ));
    let listed = [
        ("dc:title", "Alt", "rdf:li xml:lang=\"x-default\"", &facts.title),
        ("dc:creator", "Seq", "rdf:li", &facts.author),
        ("dc:description", "Alt", "rdf:li xml:lang=\"x-default\"", &facts.subject),
    ];
    for (key, kind, item, words) in listed.into_iter().filter(|(.., words)| !words.is_empty()) {
        let words = escaped(words);
        text.push_str(&format!("<{key}><rdf:{kind}><{item}>{words}</rdf:li></rdf:{kind}></{key}>\n"));
    }
    let producer = escaped(&facts.producer);
    text.push_str(&format!("<xmp:CreatorTool>{producer}</xmp:CreatorTool><pdf:Producer>{producer}</pdf:Producer>\n"));
    if let Some([year, month, day]) = facts.day() {
        let day = format!("{year}-{month}-{day}T00:00:00Z");
        text.push_str(&format!("<xmp:CreateDate>{day}</xmp:CreateDate><xmp:ModifyDate>{day}</xmp:ModifyDate>\n"));
    }
    text.push_str("</rdf:Description></rdf:RDF></x:xmpmeta>\n<?xpacket end=\"r\"?>");
    text
}

/// Words as XML takes them; what XML 1.0 has no place for is left out.
fn escaped(words: &str) -> String {
    let mut text = String::with_capacity(words.len());
    for c in words.chars() {
        match c {
            '&' => text.push_str("&amp;"),
            '<' => text.push_str("&lt;"),
            '>' => text.push_str("&gt;"),
            '\u{0}'..='\u{8}' | '\u{b}' | '\u{c}' | '\u{e}'..='\u{1f}' | '\u{fffe}' | '\u{ffff}' => {}
            _ => text.push(c),
        }
    }
    text
}
