//! The fonts, as printpdf writes them, brought over into the file.
use super::Faces;
use super::file::{File, Number, Packer};
use super::ink::Ink;
use lopdf::{Dictionary, Document, Object, ObjectId};
use printpdf::{FontId, Mm, PdfDocument, PdfPage, PdfSaveOptions};
use std::collections::BTreeMap;

/// Writes the fonts in use and gives the entries of the dictionary that names them.
pub(super) fn embed(faces: &Faces, file: &mut File) -> Vec<u8> {
    let mut pdf = PdfDocument::new("");
    let mut page = PdfPage::new(Mm(1.0), Mm(1.0), Vec::new());
    for face in faces.iter().flatten() {
        pdf.resources.fonts.map.insert(FontId(face.resource()), face.font());
        // printpdf embeds what the pages show: these operations name every glyph in use.
        page.ops.extend(face.carrier());
    }
    pdf.pages = vec![page];
    let options = PdfSaveOptions { optimize: false, subset_fonts: false, ..PdfSaveOptions::default() };
    let document = pdf.to_lopdf_document(&options, &mut Vec::new());
    let mut carrier =
        Carrier { document: &document, file, numbers: BTreeMap::new(), waiting: Vec::new(), packer: Packer::new() };
    let mut names = Ink::default();
    for face in faces.iter().flatten() {
        let resource = face.resource();
        // Looked for by its name among all objects: where printpdf hangs its resources is its own affair.
        let font = document.objects.iter().find(|(_, object)| {
            let has = |key, value: &[u8]| {
                object
                    .as_dict()
                    .and_then(|dict| dict.get(key))
                    .and_then(Object::as_name)
                    .is_ok_and(|name| name == value)
            };
            has(b"Subtype", b"Type0") && has(b"BaseFont", face.base_name().as_bytes())
        });
        if let Some((&id, _)) = font {
            names.name(resource.as_bytes());
            names.raw(b" ");
            let number = carrier.number(id);
            names.to(number);
        }
    }
    carrier.carry();
    names.0
}

/// Brings objects over, and what they refer to.
struct Carrier<'c> {
    document: &'c Document,
    file: &'c mut File,
    numbers: BTreeMap<ObjectId, Number>,
    waiting: Vec<ObjectId>,
    packer: Packer,
}

impl Carrier<'_> {
    fn number(&mut self, id: ObjectId) -> Number {
        if let Some(number) = self.numbers.get(&id) {
            return *number;
        }
        let number = self.file.number();
        self.numbers.insert(id, number);
        self.waiting.push(id);
        number
    }

    fn carry(&mut self) {
        while let Some(id) = self.waiting.pop() {
            let number = self.number(id);
            let mut ink = Ink::default();
            match self.document.objects.get(&id) {
                Some(Object::Stream(stream)) => {
                    let mut dict = stream.dict.clone();
                    let content = stream.decompressed_content().unwrap_or_else(|_| stream.content.clone());
                    for key in [&b"Length"[..], b"Filter", b"DecodeParms"] {
                        dict.remove(key);
                    }
                    self.entries(&dict, &mut ink);
                    let entries = String::from_utf8_lossy(&ink.0).into_owned();
                    self.file.stream(number, entries, self.packer.pack(&content));
                }
                Some(object) => {
                    self.object(object, &mut ink);
                    self.file.object(number, &ink.0);
                }
                None => self.file.object(number, b"null"),
            }
        }
    }

    fn entries(&mut self, dict: &Dictionary, ink: &mut Ink) {
        for (key, value) in dict {
            ink.name(key);
            ink.raw(b" ");
            self.object(value, ink);
        }
    }

    fn object(&mut self, object: &Object, ink: &mut Ink) {
        match object {
            Object::Null | Object::Stream(_) => ink.raw(b"null"),
            Object::Boolean(value) => ink.raw(value.to_string()),
            Object::Integer(value) => ink.integer(*value),
            Object::Real(value) => ink.raw(value.to_string()),
            Object::Name(name) => ink.name(name),
            Object::String(bytes, _) => ink.string(bytes),
            Object::Array(items) => {
                ink.raw(b"[");
                for item in items {
                    self.object(item, ink);
                    ink.raw(b" ");
                }
                ink.raw(b"]");
            }
            Object::Dictionary(dict) => {
                ink.raw(b"<<");
                self.entries(dict, ink);
                ink.raw(b">>");
            }
            Object::Reference(id) => {
                let number = self.number(*id);
                ink.to(number);
            }
        }
    }
}
