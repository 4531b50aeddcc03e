//! temporary
pub struct Fonts;
pub struct Pages;
impl Fonts {
    pub fn built_in() -> Result<Self, String> {
        Ok(Fonts)
    }
}
pub fn typeset(_: &crate::document::Document, _: &crate::sheet::Sheet, _: crate::model::Paper, _: &Fonts) -> Pages {
    Pages
}
