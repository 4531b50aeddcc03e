//! Tests of the file: what a reader program finds in it.
