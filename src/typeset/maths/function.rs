//! Named functions: an upright name, then its arguments in brackets.
use super::{Box2, Filling, Maths, Place};
use crate::formula::Tree;
use std::borrow::Borrow;

/// Space after the comma between arguments, ems.
pub(super) const AFTER_COMMA: f32 = 0.2;

impl Maths<'_, '_> {
    pub(super) fn function<T: Borrow<Tree>>(
        &mut self,
        name: &str,
        parts: &[T],
        filling: Filling<'_>,
        size: f32,
        depth: u8,
    ) -> Box2 {
        let name = self.text(name, size);
        let mut inside = self.nothing();
        for (at, part) in parts.iter().enumerate() {
            let argument = self.build(part.borrow(), filling, Place::Alone, size, depth);
            inside = self.join(inside, if at == 0 { 0.0 } else { AFTER_COMMA * size }, argument);
            if at + 1 < parts.len() {
                let comma = self.text(",", size);
                inside = self.join(inside, 0.0, comma);
            }
        }
        let bracketed = self.enclose(inside, '(', ')', size);
        self.join(name, 0.0, bracketed)
    }
}
