//! PDF with embedded fonts.
use super::{ExportFault, Lettering};
use crate::marks::Sheet;
/// Writes a sheet as PDF.
pub fn pdf(sheet: &Sheet, lettering: Lettering) -> Result<Vec<u8>, ExportFault> {
    todo!()
}
