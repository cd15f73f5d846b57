//! SVG in mm.
use super::{ExportFault, Lettering};
use crate::marks::Sheet;
/// Writes a sheet as SVG, mm with 4 decimals.
pub fn svg(sheet: &Sheet, lettering: Lettering) -> Result<Vec<u8>, ExportFault> {
    todo!()
}
