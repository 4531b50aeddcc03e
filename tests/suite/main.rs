//! The one test binary: published values, promises, diagnostics, packages, commands, tidiness of the house.
mod commands;
mod damage;
mod diagnostics;
mod figures;
#[path = "../fuzz/mod.rs"]
mod fuzz;
mod hostile;
mod independent;
mod laws;
mod markdown;
mod packages;
mod pages;
mod promises;
mod published;
mod readme;
mod tidy;
