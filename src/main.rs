//! Picks the desk or the command line.
fn main() {}
