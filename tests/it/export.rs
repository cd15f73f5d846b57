//! Tests of `export`.
