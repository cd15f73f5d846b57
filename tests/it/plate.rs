//! Tests of `plate`.
