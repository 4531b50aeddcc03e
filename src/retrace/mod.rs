//! Reads a package back and confirms every line of it. Shares formula parsing and the units table with the rest, nothing else.
