//! The embedded `rules/` and `templates/`, and the user's own folders on top of them.
//!
//! This file is the only one besides the command line that knows of folders, and even here the
//! disk is reached only through [`Files`].

use include_dir::{Dir, include_dir};

static RULES: Dir<'static> = include_dir!("$CARGO_MANIFEST_DIR/rules");
static TEMPLATES: Dir<'static> = include_dir!("$CARGO_MANIFEST_DIR/templates");

/// What the path of an embedded rule file begins with in messages.
pub const BUILT_IN: &str = "<builtin>/rules/";

/// Folders that stand beside the rules and have readers of their own.
const BESIDE: &[&str] = &["messages/", "bearings/"];

/// A door to the files of the user.
pub trait Files {
    /// Paths of all files below a folder, relative to it, with `/`, sorted. Empty where the
    /// folder is not there.
    ///
    /// # Errors
    /// The path and what the system says, where a folder cannot be listed.
    fn below(&self, folder: &str) -> Result<Vec<String>, Unread>;

    /// The text of a file.
    ///
    /// # Errors
    /// The path and what the system says, also where the file is not text.
    fn text(&self, path: &str) -> Result<String, Unread>;
}

/// A file or folder that could not be read.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
#[error("{path} cannot be read: {why}")]
pub struct Unread {
    /// The path.
    pub path: String,
    /// What the system says.
    pub why: String,
}

/// A text with the path it is named by in messages.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct TextFile {
    /// `<builtin>/rules/parts/pumps.yaml`, or the user's own path.
    pub path: String,
    /// The text.
    pub text: String,
}

/// Rule files of one origin. Later layers replace entries of earlier ones.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Layer {
    /// `built in`, or the folder.
    pub name: String,
    /// The files, sorted by path.
    pub files: Vec<TextFile>,
}

/// The embedded rule files.
pub fn builtin_rules() -> Layer {
    let mut files = texts(&RULES);
    files.retain(|f| is_rule(&f.path));
    for file in &mut files {
        file.path.insert_str(0, BUILT_IN);
    }
    Layer {
        name: "built in".into(),
        files,
    }
}

/// An embedded rule file, by its path below `rules/`.
pub fn rule_text(path: &str) -> Option<&'static str> {
    RULES.get_file(path)?.contents_utf8()
}

/// An embedded template, by its path below `templates/`.
pub fn template(path: &str) -> Option<&'static str> {
    TEMPLATES.get_file(path)?.contents_utf8()
}

/// The embedded templates below a folder of `templates/`, sorted by path; paths are relative to
/// `templates/`.
pub fn templates(folder: &str) -> Vec<TextFile> {
    let mut found = texts(&TEMPLATES);
    let prefix = format!("{}/", folder.trim_end_matches('/'));
    found.retain(|f| folder.is_empty() || f.path.starts_with(&prefix));
    found
}

/// The layers of the rules, lowest first: built in, then each of the user's folders.
///
/// # Errors
/// Where a folder or file of the user cannot be read.
pub fn rule_layers(folders: &[&str], files: &dyn Files) -> Result<Vec<Layer>, Unread> {
    let mut layers = vec![builtin_rules()];
    for folder in folders {
        let mut layer = Layer {
            name: (*folder).to_owned(),
            files: Vec::new(),
        };
        for path in files.below(folder)? {
            if !is_rule(&path) {
                continue;
            }
            let path = format!("{}/{path}", folder.trim_end_matches('/'));
            let text = files.text(&path)?;
            layer.files.push(TextFile { path, text });
        }
        layers.push(layer);
    }
    Ok(layers)
}

/// Whether a file of a rules folder is read as rules.
fn is_rule(path: &str) -> bool {
    let extension = path.rsplit('.').next().unwrap_or_default();
    matches!(extension, "yaml" | "yml" | "md")
        && !BESIDE.iter().any(|folder| path.starts_with(folder))
}

fn texts(dir: &Dir<'static>) -> Vec<TextFile> {
    let mut found = Vec::new();
    collect(dir, &mut found);
    found.sort_by(|a, b| a.path.cmp(&b.path));
    found
}

fn collect(dir: &Dir<'static>, found: &mut Vec<TextFile>) {
    for file in dir.files() {
        if let (Some(path), Some(text)) = (file.path().to_str(), file.contents_utf8()) {
            found.push(TextFile {
                path: path.replace('\\', "/"),
                text: text.to_owned(),
            });
        }
    }
    for inner in dir.dirs() {
        collect(inner, found);
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use std::path::Path;

    #[expect(
        clippy::disallowed_methods,
        reason = "compares the embedded list with the folder"
    )]
    fn on_disk(root: &Path, folder: &Path, found: &mut Vec<String>) {
        for entry in std::fs::read_dir(folder).expect("the folder is there") {
            let path = entry.expect("it can be listed").path();
            if path.is_dir() {
                on_disk(root, &path, found);
            } else {
                let below = path.strip_prefix(root).expect("it is below the root");
                found.push(below.to_str().expect("names are text").replace('\\', "/"));
            }
        }
    }

    #[test]
    fn embedded_files_are_those_of_the_folders() {
        for (name, dir) in [("rules", &RULES), ("templates", &TEMPLATES)] {
            let root = Path::new(env!("CARGO_MANIFEST_DIR")).join(name);
            let mut disk = Vec::new();
            on_disk(&root, &root, &mut disk);
            disk.sort();
            let embedded: Vec<String> = texts(dir).into_iter().map(|f| f.path).collect();
            assert_eq!(embedded, disk, "{name}");
        }
    }

    struct Two;

    impl Files for Two {
        fn below(&self, folder: &str) -> Result<Vec<String>, Unread> {
            Ok(match folder {
                "own" => vec![
                    "messages/unit-missing.md".into(),
                    "pumps.yaml".into(),
                    "readme.txt".into(),
                ],
                _ => Vec::new(),
            })
        }

        fn text(&self, path: &str) -> Result<String, Unread> {
            Ok(format!("text of {path}"))
        }
    }

    #[test]
    fn the_users_folders_lie_on_top() {
        let layers = rule_layers(&["site/rules", "own"], &Two).expect("both can be read");
        let names: Vec<&str> = layers.iter().map(|l| l.name.as_str()).collect();
        assert_eq!(names, ["built in", "site/rules", "own"]);
        assert_eq!(layers[1].files, []);
        assert_eq!(
            layers[2].files,
            [TextFile {
                path: "own/pumps.yaml".into(),
                text: "text of own/pumps.yaml".into()
            }]
        );
    }
}
