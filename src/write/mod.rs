//! Writers: Markdown, SVG, JSON, PDF. Each takes finished values and gives text or bytes.
pub mod json;
pub mod markdown;
pub mod pdf;
pub mod svg;
