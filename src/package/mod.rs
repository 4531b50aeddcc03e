//! Joins the arrows: text of an input to the finished package. No files, no clock.
mod comparisons;
mod facts;
mod failure;
mod figures;
mod symbols;
mod validation;

pub use facts::{Origin, facts};

use crate::analysis::Solution;
use crate::diagnostic::{Colour, Diagnostics, Source};
use crate::document::{self, Document, Templates};
use crate::figure::Figure;
use crate::model::{self, Model};
use crate::sheet::{self, Results, Sheet};
use crate::typeset::{self, Fonts};
use crate::work;
use crate::write;
use sha2::{Digest, Sha256};

/// A structure read and solved, with everything that is said of it.
pub struct Solved {
    /// As understood.
    pub model: Model,
    /// Movements.
    pub solution: Solution,
    /// Everything worked from them.
    pub results: Results,
    /// What a reader of the input should know.
    pub warnings: Diagnostics,
    /// The text with its places.
    pub source: Source,
    /// SHA-256 of the input's bytes, in hexadecimal.
    pub sha256: String,
}

/// Why an input gives no package.
pub struct Refusal {
    /// Every fault.
    pub faults: Diagnostics,
    /// The text with its places.
    pub source: Source,
}

impl Refusal {
    /// The faults as text.
    #[must_use]
    pub fn render(&self, file: &str, colour: Colour) -> String {
        self.faults.render(&self.source, file, colour)
    }
}

/// Reads and solves an input.
///
/// # Errors
/// The faults of the input, or why its structure cannot be solved.
pub fn solve(text: &str) -> Result<Solved, Box<Refusal>> {
    let refuse = |faults| Box::new(Refusal { faults, source: Source::new(text) });
    let reading = model::read(text).map_err(refuse)?;
    let model = reading.model;
    let prepared = work::prepare(&mut crate::formula::Silent, &model);
    let solution = work::solve(&model, &prepared).map_err(|fault| {
        let mut faults = Diagnostics::default();
        failure::diagnose(&model, &fault).into_iter().for_each(|diagnostic| faults.push(diagnostic));
        refuse(faults.placed(&reading.source))
    })?;
    if let Some(fault) = failure::out_of_this_world(&model, &solution) {
        return Err(refuse([fault].into_iter().collect::<Diagnostics>().placed(&reading.source)));
    }
    let results = sheet::results(&model, &solution);
    let sha256 = Sha256::digest(text.as_bytes()).iter().map(|byte| format!("{byte:02x}")).collect();
    Ok(Solved { model, solution, results, warnings: reading.warnings, source: reading.source, sha256 })
}

/// The results file of an input.
///
/// # Errors
/// The faults as text.
pub fn results(text: &str) -> Result<String, String> {
    solve(text).map(|solved| solved.json()).map_err(|refusal| refusal.render("input", Colour::Never))
}

/// A finished package.
pub struct Package {
    /// The sheet.
    pub sheet: Sheet,
    /// The document.
    pub document: Document,
    /// Name without ending, under which its files stand.
    pub stem: String,
    /// Markdown.
    pub markdown: String,
    /// Results file.
    pub results: String,
    /// Drawings: id and SVG text.
    pub figures: Vec<(String, String)>,
    /// Open points, such as a check beyond its limit: how many.
    pub beyond: usize,
}

/// What a package says in text.
pub struct Texts {
    /// Markdown.
    pub markdown: String,
    /// Results file.
    pub results: String,
    /// Drawings: id and SVG text.
    pub figures: Vec<(String, String)>,
}

impl Package {
    /// Markdown, results file and drawings.
    fn texts(&self, solved: &Solved) -> (String, String, Vec<(String, String)>) {
        let markdown = write::markdown::write(&self.document, &self.sheet, &self.stem);
        let figures =
            self.sheet.figures.iter().map(|figure: &Figure| (figure.id.clone(), write::svg::write(figure))).collect();
        (markdown, solved.json(), figures)
    }

    fn write_texts(&mut self, solved: &Solved) {
        (self.markdown, self.results, self.figures) = self.texts(solved);
    }
}

impl Solved {
    /// The results file.
    #[must_use]
    pub fn json(&self) -> String {
        write::json::write(
            &self.model,
            &self.sha256,
            &self.results.prepared,
            &self.solution,
            &self.results.combinations,
        )
    }

    /// The package but for the PDF.
    ///
    /// # Errors
    /// A template is at fault.
    pub fn package(&self, name: &str, text: &str, templates: &Templates) -> Result<Package, document::TemplateFault> {
        let mut package = self.document(name, text, templates)?;
        package.write_texts(self);
        Ok(package)
    }

    /// The package with its PDF; both are made at the same time. `ready` gets the texts while the pages are still set.
    ///
    /// # Errors
    /// A template or a font is at fault, as text.
    pub fn package_and_pdf<'f, R>(
        &self,
        name: &str,
        text: &str,
        templates: &Templates,
        fonts: &(impl Fn() -> &'f Fonts + Sync),
        ready: impl FnOnce(Texts) -> R,
    ) -> Result<(Package, R, Vec<u8>), String> {
        let package = self.document(name, text, templates).map_err(|fault| fault.to_string())?;
        let (ready, pdf) = std::thread::scope(|scope| {
            let pdf = scope.spawn(|| self.pdf(&package, fonts()));
            let (markdown, results, figures) = package.texts(self);
            let ready = ready(Texts { markdown, results, figures });
            (ready, pdf.join().unwrap_or_else(|reason| std::panic::resume_unwind(reason)))
        });
        Ok((package, ready, pdf?))
    }

    /// Sheet and document of a package, nothing written yet.
    fn document(&self, name: &str, text: &str, templates: &Templates) -> Result<Package, document::TemplateFault> {
        let (drawn, mut sheet) = std::thread::scope(|scope| {
            let drawn = scope.spawn(|| figures::draw(&self.model, &self.solution, &self.results));
            let sheet = sheet::compose(&self.model, &self.solution, &self.results);
            (drawn.join(), sheet)
        });
        sheet.figures = drawn.unwrap_or_else(|reason| std::panic::resume_unwind(reason));
        sheet.figures.extend(figures::depth::draw(&self.model, &self.results, &sheet));
        let origin = Origin { name, text, sha256: &self.sha256 };
        let cautions = failure::cautions(&self.model, &self.solution);
        let facts = facts(&self.model, &self.solution, &self.results, &sheet, cautions, origin);
        let document = document::build(&facts, templates)?;
        let stem = name.strip_suffix(".yaml").or_else(|| name.strip_suffix(".yml")).unwrap_or(name).to_owned();
        let beyond = facts.checks.beyond;
        Ok(Package {
            sheet,
            document,
            stem,
            markdown: String::new(),
            results: String::new(),
            figures: Vec::new(),
            beyond,
        })
    }

    /// The brief without results, for a checker who works independently first.
    ///
    /// # Errors
    /// A template is at fault.
    pub fn brief(&self, name: &str, text: &str, templates: &Templates) -> Result<Package, document::TemplateFault> {
        let mut sheet = sheet::brief(&self.model);
        let drawn = figures::draw(&self.model, &self.solution, &self.results);
        // What follows from results is left out; so is every drawing made from them.
        let of_input = |id: &str| id == "structure" || id == "signs" || id.starts_with("case.");
        sheet.figures = drawn.into_iter().filter(|figure| of_input(&figure.id)).collect();
        let origin = Origin { name, text, sha256: &self.sha256 };
        let facts = facts::brief(&self.model, &sheet, origin);
        let document = document::build(&facts, &templates.with_order("order-brief"))?;
        let stem = name.strip_suffix(".yaml").or_else(|| name.strip_suffix(".yml")).unwrap_or(name);
        let stem = format!("{stem}.brief");
        let mut package = Package {
            sheet,
            document,
            stem,
            markdown: String::new(),
            results: String::new(),
            figures: Vec::new(),
            beyond: 0,
        };
        package.write_texts(self);
        package.results.clear();
        Ok(package)
    }

    /// The PDF of a package.
    ///
    /// # Errors
    /// A font cannot be used.
    pub fn pdf(&self, package: &Package, fonts: &Fonts) -> Result<Vec<u8>, String> {
        let pages = typeset::typeset(&package.document, &package.sheet, self.model.display.paper, fonts);
        let facts = write::pdf::Facts::of(&package.document.head);
        write::pdf::write(&pages, fonts, &facts).map_err(|fault| fault.to_string())
    }
}
