//! temporary
pub fn write(f: &crate::figure::Figure) -> String {
    f.id.clone()
}
