//! Templates and sheet put together: one document, from which Markdown and PDF are written alike.
mod anchor;
mod block;
mod build;
mod fact;
mod facts;
mod fault;
mod marks;
mod read;
mod templates;
mod token;
mod visible;

pub use block::{Block, Document, Inline, RunningHead};
pub use build::{build, printed};
pub use facts::*;
pub use fault::TemplateFault;
pub use templates::Templates;
pub use visible::visible;

#[cfg(test)]
mod tests;
