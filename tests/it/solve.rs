//! Tests of `solve`.
