//! PNG with its physical size.
use super::ExportFault;
use crate::marks::Sheet;
/// Writes a sheet as PNG at some dots per inch, on white.
pub fn png(sheet: &Sheet, dpi: f64) -> Result<Vec<u8>, ExportFault> {
    todo!()
}
