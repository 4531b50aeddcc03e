//! Self-weight with a factor of its own.
use crate::catalogue::element::definitions;
use crate::catalogue::symbol::*;
use crate::formula::source;

definitions! {
    SCALED: WG, LineLoad, FW * WG1, &source::STATICS;
}
