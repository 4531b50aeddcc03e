//! Writes the files of a package: all of them appear, or the earlier ones stay as they were.
use std::fs::{self, File};
use std::io::{self, Write};
use std::path::{Path, PathBuf};

/// A file to be written.
pub(super) struct Output {
    /// Where it goes.
    pub(super) path: PathBuf,
    /// What it holds.
    pub(super) bytes: Vec<u8>,
}

/// What could not be done, and to which file.
pub(super) struct Fault {
    pub(super) path: PathBuf,
    pub(super) error: io::Error,
}

/// Writes every file beside its place, synced, then moves all into place.
///
/// # Errors
/// A file cannot be written (no permission, no room): nothing has been replaced then.
pub(super) fn write_all(outputs: &[Output]) -> Result<(), Fault> {
    let written: Vec<PathBuf> = outputs.iter().map(|output| aside(&output.path)).collect();
    // Waiting for the disk is the slow part: every file waits at the same time.
    let results: Vec<io::Result<()>> = std::thread::scope(|scope| {
        let waiting: Vec<_> = outputs
            .iter()
            .zip(&written)
            .map(|(output, aside)| scope.spawn(move || write_one(aside, &output.bytes)))
            .collect();
        waiting
            .into_iter()
            .map(|handle| handle.join().unwrap_or_else(|_| Err(io::Error::other("the writer stopped"))))
            .collect()
    });
    for (output, result) in outputs.iter().zip(results) {
        if let Err(error) = result {
            written.iter().for_each(|path| drop(fs::remove_file(path)));
            return Err(Fault { path: output.path.clone(), error });
        }
    }
    for (output, aside) in outputs.iter().zip(&written) {
        if let Err(error) = fs::rename(aside, &output.path) {
            written.iter().for_each(|path| drop(fs::remove_file(path)));
            return Err(Fault { path: output.path.clone(), error });
        }
    }
    Ok(())
}

fn write_one(path: &Path, bytes: &[u8]) -> io::Result<()> {
    if let Some(folder) = path.parent() {
        fs::create_dir_all(folder)?;
    }
    let mut file = File::create(path)?;
    file.write_all(bytes)?;
    file.sync_all()
}

/// The name a file has until all are written: hidden, beside its place, told apart by process.
fn aside(path: &Path) -> PathBuf {
    let name = path.file_name().map_or_else(String::new, |name| name.to_string_lossy().into_owned());
    path.with_file_name(format!(".{name}.{}.part", std::process::id()))
}
