//! The open math faces that labels are set in.

/// One of the bundled faces.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Face(&'static str);

impl Face {
    /// The file's name without its ending: `KaTeX_Main-Regular`.
    pub fn name(self) -> &'static str {
        self.0
    }
    /// The TrueType bytes.
    pub fn bytes(self) -> &'static [u8] {
        todo!()
    }
}
