//! temporary
pub fn write(_: &crate::typeset::Pages, _: &crate::typeset::Fonts) -> Result<Vec<u8>, String> {
    Ok(vec![])
}
