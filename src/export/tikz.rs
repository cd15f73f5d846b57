//! TikZ: a picture to `\input`.
use super::ExportFault;
use crate::marks::Sheet;
/// Writes a sheet as a TikZ picture.
pub fn tikz(sheet: &Sheet) -> Result<Vec<u8>, ExportFault> {
    todo!()
}
