//! The one test binary: published values, promises, diagnostics, packages, commands, tidiness of the house.
mod diagnostics;
mod independent;
mod markdown;
mod published;
mod tidy;
