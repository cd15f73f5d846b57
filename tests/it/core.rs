//! Tests of `core`.
