//! Faults and how they are told: THE table of codes, addresses in the YAML, places in the text, rendering. Imports nothing.
mod address;
mod code;
mod collector;
mod events;
mod fault;
mod nearest;
mod render;
mod source;

pub use address::{Address, Segment};
pub use code::Code;
pub use collector::Diagnostics;
pub use fault::{Diagnostic, Severity};
pub use nearest::nearest;
pub use render::Colour;
pub use source::{Content, Entry, Found, Place, Source};
