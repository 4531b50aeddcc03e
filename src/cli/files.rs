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
#[derive(Debug)]
pub(super) struct Fault {
    pub(super) path: PathBuf,
    pub(super) error: io::Error,
}

/// Files written beside their places and not yet put there; dropped, they are gone and nothing has changed.
#[derive(Default)]
pub(super) struct Staged {
    files: Vec<Waiting>,
    /// Places that hold already what they should.
    unchanged: Vec<PathBuf>,
    /// Folders made for them, which go again if they stay empty.
    folders: Vec<PathBuf>,
}

struct Waiting {
    place: PathBuf,
    aside: PathBuf,
}

impl Staged {
    /// Writes and syncs files beside their places.
    ///
    /// # Errors
    /// A file cannot be written (no permission, no room): nothing has been replaced.
    pub(super) fn add(&mut self, outputs: &[Output]) -> Result<(), Fault> {
        let mut changed: Vec<&Output> = Vec::new();
        for output in outputs {
            self.make_folder(&output.path)?;
            if holds(&output.path, &output.bytes) {
                self.unchanged.push(output.path.clone());
            } else {
                self.files.push(Waiting { place: output.path.clone(), aside: beside(&output.path, "part") });
                changed.push(output);
            }
        }
        // Waiting for the disk is the slow part: several files wait at the same time.
        let share = changed.len().div_ceil(WRITERS).max(1);
        let results: Vec<Result<(), Fault>> = std::thread::scope(|scope| {
            let write = |part: &[&Output]| part.iter().try_for_each(|output| write_one(output));
            let waiting: Vec<_> = changed.chunks(share).map(|part| scope.spawn(move || write(part))).collect();
            waiting.into_iter().map(|part| part.join().unwrap_or_else(|e| std::panic::resume_unwind(e))).collect()
        });
        results.into_iter().collect()
    }

    /// Puts every file in its place, and takes away those that are in `stale` folders and not among them.
    ///
    /// # Errors
    /// A file cannot be put in its place: every place holds what it held before.
    pub(super) fn publish(mut self, stale: &[PathBuf]) -> Result<(), Fault> {
        let mut done: Vec<(PathBuf, Option<PathBuf>)> = Vec::new();
        let files = std::mem::take(&mut self.files);
        for (at, file) in files.iter().enumerate() {
            match put(file) {
                Ok(kept) => done.push((file.place.clone(), kept)),
                Err(error) => {
                    for (place, kept) in done.into_iter().rev() {
                        // What cannot be put back stands beside its place under its kept name.
                        drop(kept.map_or_else(|| fs::remove_file(&place), |kept| fs::rename(kept, &place)));
                    }
                    files[at..].iter().for_each(|file| drop(fs::remove_file(&file.aside)));
                    return Err(Fault { path: file.place.clone(), error });
                }
            }
        }
        done.iter().filter_map(|(_, kept)| kept.as_ref()).for_each(|kept| drop(fs::remove_file(kept)));
        for folder in stale {
            let entries = fs::read_dir(folder).into_iter().flatten().flatten();
            for path in entries.map(|entry| entry.path()) {
                let ours = self.unchanged.contains(&path) || files.iter().any(|file| file.place == path);
                if !ours && path.extension().is_some_and(|e| e == "svg") {
                    drop(fs::remove_file(path));
                }
            }
        }
        self.folders.clear();
        Ok(())
    }

    fn make_folder(&mut self, path: &Path) -> Result<(), Fault> {
        let Some(folder) = path.parent().filter(|folder| !folder.as_os_str().is_empty()) else { return Ok(()) };
        if !folder.exists() {
            fs::create_dir_all(folder).map_err(|error| Fault { path: path.to_path_buf(), error })?;
            self.folders.push(folder.to_path_buf());
        }
        Ok(())
    }
}

impl Drop for Staged {
    fn drop(&mut self) {
        self.files.iter().for_each(|file| drop(fs::remove_file(&file.aside)));
        // Only what is empty goes.
        self.folders.iter().rev().for_each(|folder| drop(fs::remove_dir(folder)));
    }
}

/// Files synced at the same time.
const WRITERS: usize = 8;

/// Whether a file holds these bytes; then it is left alone, with its date.
fn holds(path: &Path, bytes: &[u8]) -> bool {
    fs::metadata(path).is_ok_and(|about| about.is_file() && about.len() == bytes.len() as u64)
        && fs::read(path).is_ok_and(|there| there == bytes)
}

fn write_one(output: &Output) -> Result<(), Fault> {
    let write = || {
        let mut file = File::create(beside(&output.path, "part"))?;
        file.write_all(&output.bytes)?;
        file.sync_all()
    };
    write().map_err(|error| Fault { path: output.path.clone(), error })
}

/// Puts a file in its place; gives where the earlier one is kept, if there was one.
fn put(file: &Waiting) -> io::Result<Option<PathBuf>> {
    if file.place.is_dir() {
        return Err(io::Error::new(io::ErrorKind::IsADirectory, "a folder of that name stands there"));
    }
    // A second name for the earlier file, so that its place is never empty; where the disk knows no second names
    // the earlier file is lost only together with the failure of a later rename.
    let kept = beside(&file.place, "kept");
    drop(fs::remove_file(&kept));
    let kept = fs::hard_link(&file.place, &kept).is_ok().then_some(kept);
    match fs::rename(&file.aside, &file.place) {
        Ok(()) => Ok(kept),
        Err(error) => {
            kept.iter().for_each(|kept| drop(fs::remove_file(kept)));
            Err(error)
        }
    }
}

/// The name of a file that waits for its place: hidden, beside it, told apart by process. A long name is cut, so that
/// it stays within what file systems allow.
fn beside(path: &Path, ending: &str) -> PathBuf {
    let name = path.file_name().map_or_else(String::new, |name| name.to_string_lossy().into_owned());
    let most = (0..=name.len().min(200)).rev().find(|at| name.is_char_boundary(*at)).unwrap_or(0);
    path.with_file_name(format!(".{}.{}.{ending}", &name[..most], std::process::id()))
}
