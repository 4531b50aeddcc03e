//! Tests of the whole writer.
