//! Tests of `label`.
