//! Tests of `desk`.
