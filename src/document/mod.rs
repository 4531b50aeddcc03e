//! Templates and sheet put together: one document, from which Markdown and PDF are written alike.
mod block;

pub use block::{Block, Document, Inline, RunningHead};
