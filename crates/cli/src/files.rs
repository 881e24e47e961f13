//! The only place in Rust that touches files.

use leeway_api::response::Problem;
use std::io::Read;
use std::path::Path;

/// A line file is refused above 4 MB: no more than this is read, so that a huge file costs nothing.
const MOST: u64 = 4_000_001;

/// Bytes of a file, or of standard input for `-`.
///
/// A directory, a missing file and a file that may not be read are problems; the caller names the file.
pub(crate) fn read(path: &Path) -> Result<Vec<u8>, Problem> {
    let mut bytes = Vec::new();
    let taken = if path.as_os_str() == "-" {
        std::io::stdin().lock().take(MOST).read_to_end(&mut bytes)
    } else {
        std::fs::File::open(path).and_then(|f| f.take(MOST).read_to_end(&mut bytes))
    };
    taken.map_err(|e| Problem {
        code: "file.read".to_owned(),
        at: String::new(),
        place: String::new(),
        message: format!("it is not read: {e}"),
        found: e.to_string(),
        expected: "a line file that can be read".to_owned(),
        hints: Vec::new(),
        more: Vec::new(),
    })?;
    Ok(bytes)
}
