//! The one test binary: published values, promises, diagnostics, packages, commands, tidiness of the house.
mod diagnostics;
mod independent;
mod published;
mod tidy;
